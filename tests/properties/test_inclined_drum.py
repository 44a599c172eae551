"""Laws that a drum on a slope keeps, over random sizes and heads."""

from __future__ import annotations

import math
from collections.abc import Callable

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st
from scipy.integrate import quad

from headfall.vessel import ends
from headfall.vessel.drum import Drum
from headfall.vessel.inclined_drum import InclinedDrum
from headfall.vessel.sizes import ImpossibleShapeError
from tests.properties.drum_slices import Slices

shares = st.floats(0.0, 1.0)
# A fall as a share of the length, from next to nothing to nearly upright.
falls = st.one_of(st.floats(0.001, 0.95), st.floats(-9.0, -3.0).map(lambda power: 10.0**power))


@st.composite
def heads(draw: st.DrawFn, diameter: float) -> ends.End:
    """Any head of the diameter."""
    form = draw(st.sampled_from(["flat", "cone", "ellipsoidal", "torispherical", "hemispherical"]))
    made: dict[str, Callable[[], ends.End]] = {
        "flat": ends.flat,
        "cone": lambda: ends.cone(draw(st.floats(0.05, 3.0)) * diameter),
        "ellipsoidal": lambda: ends.ellipsoidal(diameter, draw(st.floats(0.5, 6.0))),
        "torispherical": lambda: ends.torispherical(diameter, draw(st.floats(0.5, 3.0)), draw(st.floats(0.01, 0.5))),
        "hemispherical": lambda: ends.hemispherical(diameter),
    }
    return made[form]()


@st.composite
def drums(draw: st.DrawFn, fall_shares: st.SearchStrategy[float] = falls) -> InclinedDrum:
    """Any drum on a slope."""
    diameter = draw(st.floats(0.05, 30.0))
    length = diameter * draw(st.floats(0.2, 15.0))
    fall = length * draw(fall_shares)
    return InclinedDrum(diameter, length, draw(heads(diameter)), draw(heads(diameter)), fall)


@settings(max_examples=40, deadline=None)
@given(drums(), st.floats(0.001, 0.999))
def test_slices_across_the_axis_agree(drum: InclinedDrum, share: float) -> None:
    slices = Slices(drum)
    level = share * drum.height
    assert drum.height == pytest.approx(slices.height, rel=1e-10, abs=0)
    assert float(drum.volume(np.asarray(level))) == pytest.approx(
        slices.volume(level), rel=1e-9, abs=1e-10 * drum.capacity
    )
    area = float(drum.plan_area(np.asarray(level)))
    assert area == pytest.approx(slices.plan_area(level), rel=1e-8, abs=1e-8 * drum.capacity / drum.height)


@settings(max_examples=60, deadline=None)
@given(drums())
def test_a_full_drum_holds_what_the_level_drum_holds(drum: InclinedDrum) -> None:
    level_drum = Drum(drum.diameter, drum.length, drum.low_head, drum.high_head)
    assert drum.capacity == level_drum.capacity
    assert float(drum.volume(np.asarray(drum.height))) == drum.capacity
    assert float(drum.volume(np.asarray(0.0))) == 0.0


@settings(max_examples=60, deadline=None)
@given(drums(), shares)
def test_a_drum_turned_over_holds_the_rest(drum: InclinedDrum, share: float) -> None:
    turned = InclinedDrum(drum.diameter, drum.length, drum.high_head, drum.low_head, drum.fall)
    # Both are worked out from the bottom up to half height, and nothing but the geometry makes the two meet there.
    for level in (0.5 * drum.height, share * drum.height):
        held, rest = drum.volume(np.asarray(level)), turned.volume(np.asarray(drum.height - level))
        assert float(held + rest) == pytest.approx(drum.capacity, rel=1e-11, abs=0)


@settings(max_examples=60, deadline=None)
@given(drums(st.just(1e-9)), shares)
def test_without_a_fall_to_speak_of_it_is_the_level_drum(drum: InclinedDrum, share: float) -> None:
    level_drum = Drum(drum.diameter, drum.length, drum.low_head, drum.high_head)
    level = np.asarray(share * drum.diameter)
    held = drum.volume(level + drum.fall / 2)
    assert float(held) == pytest.approx(float(level_drum.volume(level)), rel=1e-7, abs=1e-9 * drum.capacity)
    area = float(drum.plan_area(level + drum.fall / 2))
    middle = float(level_drum.plan_area(np.asarray(drum.diameter / 2)))
    assert area == pytest.approx(float(level_drum.plan_area(level)), rel=1e-7, abs=1e-3 * middle)
    if 0.01 < share < 0.99:
        assert area == pytest.approx(float(level_drum.plan_area(level)), rel=1e-5, abs=0)


@settings(max_examples=60, deadline=None)
@given(drums(), st.lists(shares, min_size=2, max_size=12))
def test_volume_and_level_undo_each_other(drum: InclinedDrum, shares_held: list[float]) -> None:
    volumes = np.array(shares_held) * drum.capacity
    assert drum.volume(drum.level(volumes)) == pytest.approx(volumes, rel=1e-12, abs=1e-200)


@settings(max_examples=40, deadline=None)
@given(drums(), st.floats(-9.0, -0.05))
def test_a_film_is_read_back_with_all_its_digits(drum: InclinedDrum, power: float) -> None:
    level = np.asarray(10.0**power * drum.height)
    assert float(drum.level(drum.volume(level))) == pytest.approx(float(level), rel=1e-12, abs=0)


@settings(max_examples=60, deadline=None)
@given(drums())
def test_volume_rises_with_level(drum: InclinedDrum) -> None:
    volumes = drum.volume(np.linspace(-0.1, 1.1, 500) * drum.height)
    assert np.all(np.diff(volumes) >= -1e-14 * drum.capacity)
    assert np.all(drum.plan_area(np.linspace(0.001, 0.999, 200) * drum.height) > 0)


@settings(max_examples=40, deadline=None)
@given(drums(st.floats(0.001, 0.9)), st.floats(0.02, 0.98))
def test_plan_area_is_the_rate_of_volume(drum: InclinedDrum, share: float) -> None:
    level, step = share * drum.height, 1e-3 * drum.height
    points = [turn for turn in drum.breakpoints if level - step < turn < level + step]
    risen, _ = quad(
        lambda z: float(drum.plan_area(np.asarray(z))), level - step, level + step, points=points or None, limit=200
    )
    volumes = drum.volume(np.array((level - step, level + step)))
    assert float(volumes[1] - volumes[0]) == pytest.approx(risen, rel=1e-8, abs=0)


def test_points_scattered_in_a_steep_drum_agree() -> None:
    low, high = ends.torispherical(2.0, 1.0, 0.1), ends.cone(1.2).fitted(2.0)
    drum = InclinedDrum(2.0, 3.0, low, high, 1.6)
    sine = 1.6 / 3.0
    cosine = math.sqrt(1 - sine**2)
    generator = np.random.default_rng(20)
    count = 2_000_000
    along = generator.uniform(-low.depth, 3.0 + high.depth, count)
    off, aside = generator.uniform(-1.0, 1.0, (2, count))
    radius = np.where(
        along < 0,
        low.radius(np.clip(-along, 0, low.depth)),
        np.where(along > 3, high.radius(np.clip(along - 3, 0, high.depth)), 1.0),
    )
    inside = off**2 + aside**2 <= radius**2
    # The lowest point lies in the knuckle, where its circle of 0.2 m about the ring of 0.8 m has its lowest.
    up = (along * sine + off * cosine)[inside] + 0.8 * cosine + 0.2
    box = (3.0 + low.depth + high.depth) * 4.0
    for level in (0.2, 0.5, 1.2, 2.0, 3.0):
        share = float(np.sum(up < level)) / count
        scatter = box * math.sqrt(share * (1 - share) / count)
        assert float(drum.volume(np.asarray(level))) == pytest.approx(share * box, abs=4 * scatter)


@settings(max_examples=60, deadline=None)
@given(drums(st.floats(0.001, 0.9)), st.floats(0.01, 0.99))
def test_reach_ends_at_the_wall(drum: InclinedDrum, share: float) -> None:
    slices, level = Slices(drum), share * drum.height
    left, right = drum.reach(level)
    little = 1e-6 * drum.diameter
    assert left < right
    assert slices.holds(left + little, level) and slices.holds(right - little, level)
    assert not slices.holds(left - little, level) and not slices.holds(right + little, level)


@settings(max_examples=60, deadline=None)
@given(drums(st.floats(0.001, 0.9)))
def test_the_outline_is_the_wall_turned(drum: InclinedDrum) -> None:
    outline, slices = drum.outline, Slices(drum)
    assert outline.closed and outline.axis == "horizontal" and outline.uniform is None
    assert np.array_equal(outline.wall[0], outline.wall[-1])
    assert outline.wall[:, 1].min() == pytest.approx(0.0, abs=1e-12 * drum.height)
    assert outline.wall[:, 1].max() == pytest.approx(drum.height, rel=1e-12)
    middle = np.array((drum.length / 2 * slices.cosine, slices.axis + drum.fall / 2))
    inward = middle + (outline.wall - middle) * (1 - 1e-6)
    outward = middle + (outline.wall - middle) * (1 + 1e-6)
    assert all(slices.holds(*point) for point in inward)
    assert not any(slices.holds(*point) for point in outward)
    lengths = {line.field: math.dist(line.start, line.end) for line in outline.dimensions}
    assert lengths["diameter"] == pytest.approx(drum.diameter) and lengths["length"] == pytest.approx(drum.length)
    fall = next(line for line in outline.dimensions if line.field == "fall")
    assert fall.start[0] == fall.end[0]
    assert fall.start[1] == pytest.approx(drum.invert_at(0.0), abs=1e-12 * drum.height)
    assert fall.end[1] == pytest.approx(drum.invert_at(drum.length), rel=1e-12)


def test_inverts_and_soffits_rise_with_the_slope() -> None:
    drum = InclinedDrum(2.0, 5.0, ends.flat(), ends.flat(), 3.0)
    # Slope 3 in 5: the cosine is 0.8, and the lowest point is the corner at the low end.
    assert [drum.invert_at(x) for x in (0.0, 2.0, 5.0)] == pytest.approx([0.0, 1.2, 3.0])
    assert [drum.soffit_at(x) for x in (0.0, 2.0, 5.0)] == pytest.approx([1.6, 2.8, 4.6])
    assert drum.height == pytest.approx(4.6)
    assert drum.breakpoints == pytest.approx((0.0, 1.6, 3.0, 4.6))
    for station in (-0.1, 5.1, math.nan):
        with pytest.raises(ImpossibleShapeError):
            drum.invert_at(station)


@pytest.mark.parametrize("fall", [0.0, -1.0, 5.0, 6.0, math.nan, math.inf])
def test_a_fall_must_stand_between_nil_and_the_length(fall: float) -> None:
    with pytest.raises(ImpossibleShapeError):
        InclinedDrum(2.0, 5.0, ends.flat(), ends.flat(), fall)


@pytest.mark.parametrize("turned", [False, True])
def test_a_cone_whose_bottom_line_lies_level(turned: bool) -> None:
    # Slope 3 in 5 and a cone as deep as 4/3 of the radius: the cone's lowest line is horizontal.
    cone = ends.cone(4 / 3)
    low, high = (ends.flat(), cone) if turned else (cone, ends.flat())
    drum = InclinedDrum(2.0, 5.0, low, high, 3.0)
    slices = Slices(drum)
    for share in (0.001, 0.1, 0.5, 0.9, 0.999):
        level = share * drum.height
        assert float(drum.volume(np.asarray(level))) == pytest.approx(
            slices.volume(level), rel=1e-9, abs=1e-12 * drum.capacity
        )
