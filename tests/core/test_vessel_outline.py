"""Outlines: the section that is drawn, its dimensions and tangent lines."""

from __future__ import annotations

import numpy as np
import pytest

from headfall.vessel import ends
from headfall.vessel.box import Box
from headfall.vessel.cone import Cone
from headfall.vessel.drum import Drum
from headfall.vessel.profile import Profile
from headfall.vessel.sphere import Sphere
from headfall.vessel.upright_cylinder import UprightCylinder

DISHED = ends.torispherical(2.0, 1.0, 0.1)

VESSELS: dict[str, Box | Cone | Sphere | UprightCylinder | Drum] = {
    "upright, flat": UprightCylinder(2.0, 3.0, ends.flat()),
    "upright, cone": UprightCylinder(2.0, 3.0, ends.cone(0.8)),
    "upright, dished": UprightCylinder(2.0, 3.0, DISHED),
    "box": Box(2.0, 1.5, 3.0),
    "cone": Cone(2.0, 0.6, 3.0),
    "cone, point down": Cone(2.0, 0.0, 3.0),
    "cone, point up": Cone(0.0, 2.0, 3.0),
    "drum": Drum(2.0, 6.0, DISHED, ends.cone(0.5)),
    "drum, flat": Drum(2.0, 6.0, ends.flat(), ends.flat()),
    "sphere": Sphere(2.0),
}
OPEN = [name for name in VESSELS if not VESSELS[name].outline.closed]


@pytest.mark.parametrize("name", VESSELS)
def test_wall_stands_on_nil_and_reaches_the_top(name: str) -> None:
    wall = VESSELS[name].outline.wall
    assert wall[:, 1].min() == pytest.approx(0.0, abs=1e-15)
    assert wall[:, 1].max() == pytest.approx(VESSELS[name].height)
    assert np.all(np.hypot(*np.diff(wall, axis=0).T) > 0), "no point is drawn twice"


@pytest.mark.parametrize("name", VESSELS)
def test_wall_is_where_the_vessel_reaches(name: str) -> None:
    vessel = VESSELS[name]
    for across, up in vessel.outline.wall:
        left, right = vessel.reach(up)
        # At the tangent line of a dish, and at the top of a curve, reach rises as a root of level.
        assert left - 1e-6 <= across <= right + 1e-6
        assert up in (0.0, vessel.height) or min(across - left, right - across) < 1e-6


@pytest.mark.parametrize("name", OPEN)
def test_open_wall_runs_from_upper_left_to_upper_right(name: str) -> None:
    wall = VESSELS[name].outline.wall
    assert wall[0, 1] == wall[-1, 1] == VESSELS[name].height
    assert wall[0, 0] == -wall[-1, 0] < 0
    assert np.all(np.diff(wall[:, 0]) >= 0)


def test_closed_walls() -> None:
    assert [name for name in VESSELS if name not in OPEN] == ["cone, point up", "drum", "drum, flat", "sphere"]
    for name in ("cone, point up", "drum", "drum, flat", "sphere"):
        wall = VESSELS[name].outline.wall
        assert np.array_equal(wall[0], wall[-1])
        # From the upper left down round the bottom: counter-clockwise, so the area enclosed counts as positive.
        x, y = wall.T
        assert float(np.sum(x[:-1] * y[1:] - x[1:] * y[:-1])) > 0


def test_drum_stands_on_its_tangent_lines() -> None:
    outline = VESSELS["drum"].outline
    assert outline.axis == "horizontal"
    assert outline.tangents == outline.uniform == (0.0, 6.0)
    assert outline.wall[:, 0].min() == pytest.approx(-DISHED.depth)
    assert outline.wall[:, 0].max() == pytest.approx(6.5)


def test_joint_of_a_floor() -> None:
    assert VESSELS["upright, flat"].outline.joints == ()
    assert VESSELS["upright, cone"].outline.joints == pytest.approx((0.8,))
    assert VESSELS["upright, cone"].outline.axis == "vertical"


def _sizes(profile: Profile) -> dict[str, tuple[float, bool]]:
    lengths = {}
    for dimension in profile.outline.dimensions:
        length = float(np.hypot(*np.subtract(dimension.end, dimension.start)))
        lengths[dimension.field] = (round(length, 9), dimension.typed)
    return lengths


DEPTH = round(DISHED.depth, 9)


@pytest.mark.parametrize(
    ("name", "sizes"),
    [
        ("upright, flat", {"diameter": (2.0, True), "height": (3.0, True)}),
        ("upright, cone", {"diameter": (2.0, True), "height": (3.0, True), "floor.depth": (0.8, True)}),
        ("upright, dished", {"diameter": (2.0, True), "height": (3.0, True), "floor.depth": (DEPTH, False)}),
        ("box", {"length": (2.0, True), "height": (3.0, True)}),
        ("cone", {"top_diameter": (2.0, True), "bottom_diameter": (0.6, True), "height": (3.0, True)}),
        ("drum, flat", {"diameter": (2.0, True), "length": (6.0, True)}),
        (
            "drum",
            {
                "diameter": (2.0, True),
                "length": (6.0, True),
                "heads.0.depth": (DEPTH, False),
                "heads.1.depth": (0.5, True),
            },
        ),
        ("sphere", {"diameter": (2.0, True)}),
    ],
)
def test_dimensions(name: str, sizes: dict[str, tuple[float, bool]]) -> None:
    assert _sizes(VESSELS[name]) == sizes


def test_alike_heads_share_one_field() -> None:
    fields = [dimension.field for dimension in Drum(2.0, 6.0, DISHED, DISHED).outline.dimensions]
    assert fields == ["diameter", "length", "heads.depth", "heads.depth"]
