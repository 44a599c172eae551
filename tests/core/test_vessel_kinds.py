"""Basins, sloped floors, stacks, tables and displaced vessels: outlines, shapes of arrays, sizes that cannot be."""

from __future__ import annotations

from collections.abc import Callable

import numpy as np
import pytest

from headfall.vessel import ends
from headfall.vessel.basin import Basin
from headfall.vessel.box import Box
from headfall.vessel.cone import Cone
from headfall.vessel.displaced import DisplacedVessel
from headfall.vessel.drum import Drum
from headfall.vessel.profile import Profile
from headfall.vessel.sizes import ImpossibleShapeError
from headfall.vessel.sloped_floor import SlopedBox, SlopedCylinder
from headfall.vessel.sphere import Sphere
from headfall.vessel.stack import Stack
from headfall.vessel.table import AreaTable, ImpossibleRowError, VolumeTable, volumes_from_increments
from headfall.vessel.upright_cylinder import UprightCylinder

FLAT = ends.flat()
LEDGE = AreaTable([0.0, 1.0, 1.0, 2.0], [2.0, 2.0, 5.0, 6.0], "linear")

VESSELS: dict[str, Profile] = {
    "basin": Basin(6.0, 4.0, 1.5, 1.0, 2.0),
    "basin on a point": Basin(0.0, 0.0, 1.5, 1.0, 2.0),
    "cylinder, sloped": SlopedCylinder(2.0, 3.0, 0.4),
    "cylinder, fall nil": SlopedCylinder(2.0, 3.0, 0.0),
    "box, sloped": SlopedBox(6.0, 2.0, 2.5, 1.5),
    "stack": Stack([Cone(2.0, 0.6, 1.0), UprightCylinder(3.0, 2.0, FLAT), Box(1.0, 2.0, 0.5)]),
    "stack, dished": Stack([UprightCylinder(2.0, 1.0, ends.cone(0.8)), Cone(2.0, 3.0, 1.0)]),
    "stack, domed": Stack([UprightCylinder(2.0, 1.0, FLAT), Cone(0.0, 2.0, 0.7)]),
    "stack, sphere": Stack([Cone(1.0, 0.0, 0.5), Sphere(2.0)]),
    "areas": LEDGE,
    "areas, conic": AreaTable([0.0, 1.0, 2.5], [0.0, 3.0, 4.0], "conic"),
    "areas, closing": AreaTable([0.0, 1.0, 2.5], [1.0, 3.0, 0.0], "conic"),
    "areas, roof": AreaTable([0.0, 2.5, 2.5], [1.0, 3.0, 0.0], "linear"),
    "volumes": VolumeTable([0.0, 1.0, 2.0, 4.0], [0.3, 1.5, 4.0, 7.0]),
    "displaced": DisplacedVessel(Drum(2.0, 6.0, FLAT, FLAT), [(0.5, 1.0, 0.4), (0.7, 1.5, 0.2)]),
}
CLOSED = ["stack, domed", "stack, sphere", "areas, closing", "areas, roof", "displaced"]


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
def test_wall_stands_on_nil_and_reaches_the_top(name: str) -> None:
    outline = VESSELS[name].outline
    wall = outline.wall
    assert wall[:, 1].min() == 0
    assert wall[:, 1].max() == VESSELS[name].height
    assert np.all(np.hypot(*np.diff(wall, axis=0).T) > 0), "no point is drawn twice"
    assert outline.closed == (name in CLOSED)
    if outline.closed:
        assert np.array_equal(wall[0], wall[-1])
    else:
        assert wall[0, 1] == wall[-1, 1] == VESSELS[name].height
        assert wall[0, 0] == -wall[-1, 0] < 0
    # From the upper left down round the bottom: counter-clockwise, so the area enclosed counts as positive.
    x, y = np.vstack((wall, wall[:1])).T
    assert float(np.sum(x[:-1] * y[1:] - x[1:] * y[:-1])) > 0


@pytest.mark.parametrize("name", [name for name in VESSELS if name != "displaced"])
def test_wall_is_where_the_vessel_reaches(name: str) -> None:
    vessel = VESSELS[name]
    levels = np.array(vessel.breakpoints)
    for level in (levels[:-1] + levels[1:]) / 2:
        wall = vessel.outline.wall
        low, high = wall[:-1], wall[1:]
        met = (np.minimum(low[:, 1], high[:, 1]) <= level) & (np.maximum(low[:, 1], high[:, 1]) > level)
        share = (level - low[met, 1]) / (high[met, 1] - low[met, 1])
        across = low[met, 0] + share * (high[met, 0] - low[met, 0])
        # A curved wall is drawn in short straight lines.
        assert vessel.reach(float(level)) == pytest.approx((across.min(), across.max()), abs=2e-3)


def test_basin_outline_and_sizes() -> None:
    outline = VESSELS["basin"].outline
    assert outline.wall.tolist() == [[-6.0, 2.0], [-3.0, 0.0], [3.0, 0.0], [6.0, 2.0]]
    assert [(size.field, size.start, size.end, size.typed) for size in outline.dimensions] == [
        ("base_length", (-3.0, 0.0), (3.0, 0.0), True),
        ("depth", (6.0, 0.0), (6.0, 2.0), True),
    ]
    assert VESSELS["basin on a point"].outline.wall.tolist() == [[-3.0, 2.0], [0.0, 0.0], [3.0, 2.0]]


def test_sloped_floors_are_drawn_with_the_low_side_to_the_left() -> None:
    cylinder, box = VESSELS["cylinder, sloped"], VESSELS["box, sloped"]
    assert cylinder.height == 3.4
    assert cylinder.outline.wall.tolist() == [[-1.0, 3.4], [-1.0, 0.0], [1.0, 0.4], [1.0, 3.4]]
    # The straight side counts from the high side of the floor; the height of the box from its deep end.
    sizes = {size.field: (size.start, size.end) for size in cylinder.outline.dimensions}
    assert sizes["height"] == ((1.0, 0.4), (1.0, 3.4))
    assert sizes["floor.fall"] == ((1.0, 0.0), (1.0, 0.4))
    sizes = {size.field: (size.start, size.end) for size in box.outline.dimensions}
    assert sizes["height"] == ((3.0, 0.0), (3.0, 2.5))
    assert sizes["floor.fall"] == ((3.0, 0.0), (3.0, 1.5))
    assert cylinder.reach(0.1) == pytest.approx((-1.0, -0.5))
    assert box.reach(0.5) == pytest.approx((-3.0, -1.0))
    assert box.reach(2.0) == (-3.0, 3.0)
    flat = VESSELS["cylinder, fall nil"]
    assert [size.field for size in flat.outline.dimensions] == ["diameter", "height"]
    assert flat.breakpoints == (0.0, 3.0)
    assert flat.reach(0.0) == (-1.0, 1.0)


def test_stack_has_ledges_and_the_sizes_of_its_parts() -> None:
    stack = VESSELS["stack"]
    right = [[0.3, 0.0], [1.0, 1.0], [1.5, 1.0], [1.5, 3.0], [0.5, 3.0], [0.5, 3.5]]
    left = [[-across, up] for across, up in reversed(right)]
    assert stack.outline.wall == pytest.approx(np.array(left + right))
    assert stack.outline.joints == (1.0, 3.0)
    assert stack.breakpoints == (0.0, 1.0, 3.0, 3.5)
    sizes = {size.field: (size.start, size.end) for size in stack.outline.dimensions}
    assert sizes["parts.0.height"] == ((1.0, 0.0), (1.0, 1.0))
    assert sizes["parts.1.diameter"] == ((-1.5, 3.0), (1.5, 3.0))
    assert sizes["parts.2.height"] == ((0.5, 3.0), (0.5, 3.5))


def test_stack_takes_the_area_above_a_joint() -> None:
    stack = VESSELS["stack"]
    upper = UprightCylinder(3.0, 2.0, FLAT).plan_area(np.asarray(1.0))
    assert stack.plan_area(np.asarray(1.0)) == upper
    assert stack.plan_area(np.array([3.0, 3.5])) == pytest.approx([2.0, 2.0])
    assert stack.reach(1.0) == (-1.5, 1.5)
    assert stack.reach(99.0) == (-0.5, 0.5)


def test_stack_centres_a_lying_part() -> None:
    drum = Drum(2.0, 6.0, ends.cone(0.5), ends.cone(1.5))
    stack = Stack([drum, Box(1.0, 1.0, 1.0)])
    assert stack.outline.wall[:, 0].min() == pytest.approx(-4.0)
    assert stack.outline.wall[:, 0].max() == pytest.approx(4.0)
    assert stack.reach(1.0) == pytest.approx((-4.0, 4.0))


def test_ledge_of_an_area_table() -> None:
    assert LEDGE.breakpoints == (0.0, 1.0, 2.0)
    assert LEDGE.plan_area(np.array([0.0, 0.999, 1.0, 1.5, 2.0])) == pytest.approx([2.0, 2.0, 5.0, 5.5, 6.0])
    assert LEDGE.volume(np.array([1.0, 2.0])) == pytest.approx([2.0, 7.5])
    wall = LEDGE.outline.wall
    on_ledge = wall[(wall[:, 1] == 1.0) & (wall[:, 0] > 0)]
    assert np.pi * on_ledge[:, 0] ** 2 == pytest.approx([2.0, 5.0])
    assert LEDGE.outline.dimensions == ()


def test_what_stands_below_the_first_row_is_there_at_level_nil() -> None:
    table = VESSELS["volumes"]
    assert table.volume(np.array([-1.0, 0.0])).tolist() == [0.3, 0.3]
    assert table.level(np.array([0.0, 0.2, 0.3])).tolist() == [0.0, 0.0, 0.0]


def test_volumes_from_increments() -> None:
    assert volumes_from_increments([0.0, 0.5, 0.25]) == (0.0, 0.5, 0.75)
    assert volumes_from_increments([0.1, 0.5]) == pytest.approx((0.1, 0.6))


def test_displaced_vessel_is_net_of_its_bodies() -> None:
    vessel = DisplacedVessel(Box(2.0, 1.0, 3.0), [(0.0, 1.0, 0.5), (0.5, 3.0, 1.0)])
    assert vessel.breakpoints == (0.0, 0.5, 1.0, 3.0)
    assert vessel.plan_area(np.array([-1.0, 0.0, 0.5, 1.0, 3.0, 4.0])) == pytest.approx([1.5, 1.5, 1.1, 1.6, 1.6, 1.6])
    assert vessel.volume(np.array([0.5, 1.0, 3.0])) == pytest.approx([0.75, 1.3, 4.5])
    assert vessel.capacity == pytest.approx(4.5)
    assert vessel.level(np.array([0.75, 1.3, 2.9, 99.0])) == pytest.approx([0.5, 1.0, 2.0, 3.0])
    assert vessel.outline.wall.tolist() == vessel.vessel.outline.wall.tolist()


def test_bodies_may_end_where_the_vessel_narrows() -> None:
    stack = Stack([Box(2.0, 2.0, 1.0), Box(0.1, 0.1, 1.0)])
    assert DisplacedVessel(stack, [(0.0, 1.0, 3.0)]).capacity == pytest.approx(1.01)
    with pytest.raises(ImpossibleShapeError, match=r"body 1, from 0 m to 1\.1 m, is 3; .* room for liquid at 1 m"):
        DisplacedVessel(stack, [(0.0, 1.1, 3.0)])


BOX = Box(2.0, 1.0, 3.0)
REFUSED: dict[str, tuple[Callable[[], object], str]] = {
    "basin without depth": (lambda: Basin(1, 1, 1, 1, 0), "The depth of the basin is 0; it must be a finite size abov"),
    "basin with a negative slope": (
        lambda: Basin(1, 1, -1, 1, 1),
        "The side slope of the basin along its length is -1",
    ),
    "basin without width": (
        lambda: Basin(1, 0, 1, 0, 1),
        "The base width of the basin is 0; it must be above nil where its sides do not slope.",
    ),
    "negative fall": (
        lambda: SlopedCylinder(1, 1, -0.1),
        "The fall of the floor is -0.1; it must be a finite size, nil",
    ),
    "cylinder all floor": (lambda: SlopedCylinder(1, 0, 0.1), "The height of the upright cylinder is 0"),
    "box all floor": (lambda: SlopedBox(1, 1, 1, 1), "The fall of the floor is 1; it must be below the height of the"),
    "stack of nothing": (lambda: Stack([]), "The number of parts in the stack is 0; it must be one or more."),
    "stack on a volume": (
        lambda: Stack([BOX, VESSELS["volumes"]]),
        "The volume at level 0 of part 2 of the stack is 0.3; it must be nil.",
    ),
    "body outside": (
        lambda: DisplacedVessel(BOX, [(0, 1, 0.1), (1, 4, 0.1)]),
        "The upper level of body 2 is 4; it must be inside the vessel, 3 or less.",
    ),
    "body upside down": (
        lambda: DisplacedVessel(BOX, [(2, 1, 0.1)]),
        "The lower level of body 1 is 2; it must be below its upper level, 1.",
    ),
    "body below the floor": (lambda: DisplacedVessel(BOX, [(-1, 1, 0.1)]), "The lower level of body 1 is -1"),
    "negative body": (lambda: DisplacedVessel(BOX, [(0, 1, -0.1)]), "The volume of body 1 is -0.1"),
    "two bodies too many": (
        lambda: DisplacedVessel(BOX, [(0, 2, 2.5), (1, 2, 0.8)]),
        "The volume of body 2, from 1 m to 2 m, is 0.8; it must be small enough to leave room for liquid at 1 m.",
    ),
    "body in a closing bottom": (
        lambda: DisplacedVessel(Sphere(2.0), [(0, 1, 0.01)]),
        "The volume of body 1, from 0 m to 1 m, is 0.01; it must be kept away from 0 m, where the vessel has no width.",
    ),
    "body under a closing top": (lambda: DisplacedVessel(Sphere(2.0), [(1, 2, 0.01)]), "must be kept away from 2 m"),
    "one row": (lambda: AreaTable([0], [1], "conic"), "The number of rows of the table is 1; it must be two or more."),
    "columns of two lengths": (
        lambda: VolumeTable([0, 1], [0, 1, 2]),
        "The number of volumes in the table is 3; it must be that of levels, 2.",
    ),
}


@pytest.mark.parametrize("name", REFUSED)
def test_sizes_that_cannot_be(name: str) -> None:
    build, sentence = REFUSED[name]
    with pytest.raises(ImpossibleShapeError) as refused:
        build()
    assert sentence in str(refused.value)
    assert not isinstance(refused.value, ImpossibleRowError)


ROWS: dict[str, tuple[Callable[[], object], int, str]] = {
    "first level": (
        lambda: AreaTable([0.1, 1], [1, 1], "linear"),
        1,
        "Row 1 of the table: the level is 0.1; it must be nil, the lowest point of the inside.",
    ),
    "falling level": (
        lambda: AreaTable([0, 1, 2, 1.5], [1, 1, 1, 1], "linear"),
        4,
        "Row 4 of the table: the level is 1.5; it must be above that of row 3.",
    ),
    "three rows at one level": (lambda: AreaTable([0, 1, 1, 1, 2], [1, 1, 2, 3, 4], "conic"), 4, "the level is 1"),
    "volumes at one level": (lambda: VolumeTable([0, 1, 1], [0, 1, 2]), 3, "the level is 1; it must be above"),
    "no height": (lambda: AreaTable([0, 0], [1, 2], "conic"), 2, "the level is 0; it must be above that of row 1"),
    "negative area": (
        lambda: AreaTable([0, 1], [1, -1], "conic"),
        2,
        "the area is -1; it must be a finite number, nil",
    ),
    "areas of nil": (lambda: AreaTable([0, 1], [0, 0], "conic"), 2, "the area is 0; it must be above nil, as that of"),
    "a waist of nil": (lambda: AreaTable([0, 1, 2, 3], [1, 0, 0, 1], "linear"), 3, "as that of row 2 is nil."),
    "no number": (lambda: AreaTable([0, float("nan")], [1, 1], "linear"), 2, "the level is nan; it must be a finite"),
    "no end": (lambda: VolumeTable([0, 1], [0, float("inf")]), 2, "the volume is inf"),
    "volume stands": (
        lambda: VolumeTable([0, 1, 2], [0, 1, 1]),
        3,
        "Row 3 of the table: the volume is 1; it must be above that of row 2.",
    ),
    "negative volume": (lambda: VolumeTable([0, 1], [-1, 1]), 1, "the volume is -1"),
    "nothing put in": (
        lambda: volumes_from_increments([0, 1, 0]),
        3,
        "Row 3 of the table: the increment is 0; it must be a finite number above nil.",
    ),
    "something taken out": (lambda: volumes_from_increments([-1, 1]), 1, "the increment is -1"),
}


@pytest.mark.parametrize("name", ROWS)
def test_rows_that_cannot_be(name: str) -> None:
    build, row, sentence = ROWS[name]
    with pytest.raises(ImpossibleRowError) as refused:
        build()
    assert refused.value.row == row
    assert str(refused.value).startswith(f"Row {row} of the table: ")
    assert sentence in str(refused.value)


def test_another_rule_is_refused() -> None:
    with pytest.raises(ValueError, match="The rule between rows is cubic; it must be linear or conic"):
        AreaTable([0, 1], [1, 1], "cubic")  # type: ignore[arg-type]
