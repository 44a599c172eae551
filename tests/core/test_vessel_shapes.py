"""Shapes of vessels: heights, breakpoints, reach, arrays of any shape, and sizes that cannot be."""

from __future__ import annotations

import math
from collections.abc import Callable

import numpy as np
import pytest

from headfall.vessel import ends
from headfall.vessel.box import Box
from headfall.vessel.cone import Cone
from headfall.vessel.drum import Drum
from headfall.vessel.profile import Profile
from headfall.vessel.sizes import ImpossibleShapeError
from headfall.vessel.sphere import Sphere
from headfall.vessel.upright_cylinder import UprightCylinder

KLOEPPER = ends.torispherical(2.0, 1.0, 0.1)

VESSELS: dict[str, Profile] = {
    "upright, flat": UprightCylinder(2.0, 3.0, ends.flat()),
    "upright, cone": UprightCylinder(2.0, 3.0, ends.cone(0.8)),
    "upright, torispherical": UprightCylinder(2.0, 3.0, KLOEPPER),
    "box": Box(2.0, 1.5, 3.0),
    "cone": Cone(2.0, 0.0, 3.0),
    "drum, flat": Drum(2.0, 6.0, ends.flat(), ends.flat()),
    "drum, two heads": Drum(2.0, 6.0, KLOEPPER, ends.cone(0.5)),
    "sphere": Sphere(2.0),
}


@pytest.mark.parametrize("name", VESSELS)
def test_arrays_of_any_shape(name: str) -> None:
    profile = VESSELS[name]
    flat = profile.height * np.linspace(-0.1, 1.1, 24)
    for answer in (profile.plan_area, profile.volume):
        assert answer(flat.reshape(2, 3, 4)).shape == (2, 3, 4)
        assert np.array_equal(answer(flat.reshape(2, 3, 4)).ravel(), answer(flat))
        assert answer(np.asarray(0.5)).shape == ()
        assert answer(np.zeros(0)).shape == (0,)
    volumes = profile.capacity * np.linspace(-0.1, 1.1, 24)
    assert profile.level(volumes.reshape(4, 6)).shape == (4, 6)
    assert profile.level(np.asarray(0.5)).shape == ()
    assert profile.level(np.zeros(0)).shape == (0,)


@pytest.mark.parametrize("name", VESSELS)
def test_empty_and_full(name: str) -> None:
    profile = VESSELS[name]
    assert profile.level(np.array([0.0, profile.capacity])) == pytest.approx([0.0, profile.height], rel=1e-7, abs=0)
    assert profile.breakpoints[0] == 0
    assert profile.breakpoints[-1] == profile.height


def test_height_of_an_upright_cylinder_counts_the_floor() -> None:
    vessel = UprightCylinder(2.0, 3.0, ends.cone(0.8))
    assert vessel.height == pytest.approx(3.8)
    assert vessel.capacity == pytest.approx(math.pi * (3.0 + 0.8 / 3))
    assert vessel.breakpoints == pytest.approx((0.0, 0.8, 3.8))


def test_breakpoints_of_a_torispherical_floor() -> None:
    # Sines and cosines of the rim of a Klöpper floor: sin s = 0.8/1.8 on a diameter of 2.
    cosine = math.sqrt(1 - (0.8 / 1.8) ** 2)
    vessel = UprightCylinder(2.0, 3.0, KLOEPPER)
    assert vessel.breakpoints == pytest.approx((0.0, 2 - 2 * cosine, 2 - 1.8 * cosine, 5 - 1.8 * cosine))


def test_breakpoints_of_a_drum() -> None:
    drum = Drum(2.0, 6.0, KLOEPPER, ends.cone(0.5))
    assert drum.breakpoints == pytest.approx((0.0, 1 - 2 * 0.8 / 1.8, 1.0, 1 + 2 * 0.8 / 1.8, 2.0))
    assert Drum(2.0, 6.0, ends.ellipsoidal(2.0), ends.flat()).breakpoints == (0.0, 2.0)


@pytest.mark.parametrize(
    ("profile", "level", "reach"),
    [
        (Box(2.0, 1.5, 3.0), 1.0, (-1.0, 1.0)),
        (Cone(2.0, 0.0, 3.0), 1.5, (-0.5, 0.5)),
        (Cone(1.0, 2.0, 3.0), 1.5, (-0.75, 0.75)),
        (Sphere(2.0), 0.4, (-0.8, 0.8)),
        (UprightCylinder(2.0, 3.0, ends.cone(0.8)), 0.4, (-0.5, 0.5)),
        (UprightCylinder(2.0, 3.0, ends.cone(0.8)), 1.7, (-1.0, 1.0)),
        (Drum(2.0, 6.0, ends.flat(), ends.hemispherical(2.0)), 0.4, (0.0, 6.8)),
        (Drum(2.0, 6.0, ends.cone(0.5), ends.ellipsoidal(2.0)), 1.0, (-0.5, 6.5)),
        (Drum(2.0, 6.0, KLOEPPER, KLOEPPER), 0.0, (0.0, 6.0)),
    ],
)
def test_reach(profile: Box | Cone | Sphere | UprightCylinder | Drum, level: float, reach: tuple[float, float]) -> None:
    assert profile.reach(level) == pytest.approx(reach)


@pytest.mark.parametrize("size", [0.0, -1.0, math.nan, math.inf])
@pytest.mark.parametrize(
    "make",
    [
        lambda size: UprightCylinder(size, 1.0, ends.flat()),
        lambda size: UprightCylinder(1.0, size, ends.flat()),
        lambda size: Box(size, 1.0, 1.0),
        lambda size: Box(1.0, size, 1.0),
        lambda size: Box(1.0, 1.0, size),
        lambda size: Cone(1.0, 1.0, size),
        lambda size: Cone(size, -1.0, 1.0),
        lambda size: Drum(size, 1.0, ends.flat(), ends.flat()),
        lambda size: Drum(1.0, size, ends.flat(), ends.flat()),
        lambda size: Sphere(size),
    ],
)
def test_sizes_that_cannot_be(make: Callable[[float], Profile], size: float) -> None:
    with pytest.raises(ImpossibleShapeError, match="it must be a finite size"):
        make(size)


def test_a_cone_needs_one_diameter() -> None:
    with pytest.raises(ImpossibleShapeError, match="above nil where the bottom comes to a point"):
        Cone(0.0, 0.0, 1.0)


def test_a_floor_of_another_diameter_is_refused() -> None:
    with pytest.raises(ImpossibleShapeError, match="it must be the vessel's, 3"):
        UprightCylinder(3.0, 1.0, ends.hemispherical(2.0))
    with pytest.raises(ImpossibleShapeError, match="it must be the vessel's, 3"):
        Drum(3.0, 1.0, ends.flat(), KLOEPPER)
