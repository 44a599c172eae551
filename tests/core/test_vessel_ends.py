"""Ends: wall, distance and radius, whole volume, and shapes that cannot be."""

from __future__ import annotations

import math

import numpy as np
import pytest

from headfall.vessel import ends, lying_torispherical
from headfall.vessel.sizes import ImpossibleShapeError

ENDS = {
    "cone": ends.cone(0.7).fitted(2.0),
    "ellipsoidal": ends.ellipsoidal(2.0),
    "torispherical": ends.torispherical(2.0, 1.0, 0.1),
    "hemispherical": ends.hemispherical(2.0),
}


@pytest.mark.parametrize("name", ENDS)
def test_wall_runs_from_tangent_line_to_tip(name: str) -> None:
    end = ENDS[name]
    wall = end.meridian()
    assert tuple(wall[0]) == (0.0, 1.0)
    assert tuple(wall[-1]) == (end.depth, 0.0)
    assert np.all(np.diff(wall[:, 0]) > 0)
    assert np.all(np.diff(wall[:, 1]) < 0)


@pytest.mark.parametrize("name", ENDS)
def test_drawn_wall_is_the_wall(name: str) -> None:
    end = ENDS[name]
    distance, radius = end.meridian().T
    assert end.radius(distance) == pytest.approx(radius, abs=1e-7)
    assert end.distance(radius) == pytest.approx(distance, abs=1e-7)


@pytest.mark.parametrize("name", ENDS)
def test_distance_undoes_radius(name: str) -> None:
    end = ENDS[name]
    distance = np.linspace(0.0, end.depth, 50)[1:-1]
    assert end.distance(end.radius(distance)) == pytest.approx(distance, rel=1e-9)


@pytest.mark.parametrize("name", ENDS)
def test_whole_end_holds_its_capacity(name: str) -> None:
    end = ENDS[name]
    assert end.volume(np.asarray(end.depth)) == pytest.approx(end.capacity, rel=1e-14)
    assert 2 * end.lying_volume(np.asarray(1.0)) == pytest.approx(end.capacity, rel=1e-13)


def test_knuckle_meets_crown_in_one_tangent() -> None:
    end = ENDS["torispherical"]
    assert end.rim is not None
    distance, radius = end.rim
    step = 1e-6
    slopes = np.diff(end.radius(distance + np.array([-step, 0.0, step]))) / step
    assert end.radius(np.asarray(distance)) == pytest.approx(radius, rel=1e-12)
    assert slopes[0] == pytest.approx(slopes[1], rel=1e-4)


def test_only_a_cone_has_a_depth_of_its_own() -> None:
    assert [name for name, end in ENDS.items() if end.typed_depth] == ["cone"]


def test_flat_end_has_nothing_beyond_the_tangent_line() -> None:
    end = ends.flat().fitted(2.0)
    assert (end.depth, end.capacity, end.rim) == (0.0, 0.0, None)
    assert end.distance(np.array([0.2, 1.0])).tolist() == [0.0, 0.0]
    assert end.lying_area(np.array([0.5])).tolist() == [0.0]


@pytest.mark.parametrize(("crown_ratio", "knuckle_ratio"), [(0.5, 0.5), (0.5, 0.06), (2.0, 0.5)])
def test_extreme_torispherical_ends_are_hemispheres(crown_ratio: float, knuckle_ratio: float) -> None:
    assert ends.torispherical(3.0, crown_ratio, knuckle_ratio) == ends.hemispherical(3.0)


@pytest.mark.parametrize(
    ("crown_ratio", "knuckle_ratio", "sentence"),
    [
        (0.49, 0.1, "The crown ratio of the torispherical end is 0.49; it must be 0.5 or more."),
        (1.0, 0.51, "The knuckle ratio of the torispherical end is 0.51; it must be 0.5 or less."),
        (1.0, 0.0, "The knuckle ratio of the torispherical end is 0; it must be a finite size above nil."),
        (math.inf, 0.1, "The crown ratio of the torispherical end is inf; it must be a finite size above nil."),
    ],
)
def test_torispherical_ends_that_cannot_be(crown_ratio: float, knuckle_ratio: float, sentence: str) -> None:
    with pytest.raises(ImpossibleShapeError) as refused:
        ends.torispherical(2.0, crown_ratio, knuckle_ratio)
    assert str(refused.value) == sentence


@pytest.mark.parametrize("size", [0.0, -1.0, math.nan, math.inf])
def test_ends_of_no_size_are_refused(size: float) -> None:
    for make in (ends.cone, ends.ellipsoidal, ends.torispherical, ends.hemispherical):
        with pytest.raises(ValueError, match="it must be a finite size above nil"):
            make(size)
    with pytest.raises(ValueError, match="ratio of the ellipsoidal end"):
        ends.ellipsoidal(1.0, size)


def test_an_end_fits_its_own_diameter_only() -> None:
    with pytest.raises(ImpossibleShapeError) as refused:
        ends.ellipsoidal(2.0).fitted(2.5)
    assert str(refused.value) == "The diameter of the end is 2; it must be the vessel's, 2.5."


def test_table_is_kept_for_every_diameter() -> None:
    lying_torispherical.table.cache_clear()
    for diameter in (1.0, 2.0, 2.5):
        ends.torispherical(diameter, 1.0, 0.07).lying_volume(np.asarray(0.2 * diameter))
    assert lying_torispherical.table.cache_info().misses == 1
