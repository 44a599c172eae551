"""Laws that basins, sloped floors, stacks, tables and displaced vessels keep, over random sizes."""

from __future__ import annotations

import math
from itertools import pairwise

import numpy as np
import pytest
from hypothesis import assume, given, settings
from hypothesis import strategies as st
from scipy.integrate import quad
from scipy.interpolate import PchipInterpolator

from headfall.vessel import ends
from headfall.vessel.basin import Basin
from headfall.vessel.box import Box
from headfall.vessel.cone import Cone
from headfall.vessel.displaced import DisplacedVessel
from headfall.vessel.drum import Drum
from headfall.vessel.profile import Profile
from headfall.vessel.sloped_floor import SlopedBox, SlopedCylinder
from headfall.vessel.sphere import Sphere
from headfall.vessel.stack import Stack
from headfall.vessel.table import AreaRule, AreaTable, VolumeTable, rule_difference, volumes_from_increments
from headfall.vessel.upright_cylinder import UprightCylinder

sizes = st.floats(0.05, 30.0)
shares = st.floats(0.0, 1.0)
rules: st.SearchStrategy[AreaRule] = st.sampled_from(["linear", "conic"])


@st.composite
def basins(draw: st.DrawFn) -> Basin:
    """Any basin, base a rectangle, a line or a point."""
    slopes = draw(st.floats(0.01, 5.0)), draw(st.floats(0.01, 5.0))
    bases = draw(sizes), draw(sizes)
    nil = draw(st.sampled_from(["", "base_length", "base_width", "both bases", "slope_length", "slope_width"]))
    return Basin(
        0.0 if nil in ("base_length", "both bases") else bases[0],
        0.0 if nil in ("base_width", "both bases") else bases[1],
        0.0 if nil == "slope_length" else slopes[0],
        0.0 if nil == "slope_width" else slopes[1],
        draw(sizes),
    )


@st.composite
def sloped(draw: st.DrawFn) -> SlopedCylinder | SlopedBox:
    """Either vessel on a sloped floor."""
    a, b, c = draw(sizes), draw(sizes), draw(sizes)
    if draw(st.booleans()):
        return SlopedCylinder(a, b, draw(st.floats(0.001, 5.0)))
    return SlopedBox(a, b, c, c * draw(st.floats(0.001, 0.999)))


@st.composite
def rising(draw: st.DrawFn, rows: int) -> list[float]:
    """Levels from nil, layers of any depth."""
    depths = draw(st.lists(st.floats(0.01, 5.0), min_size=rows - 1, max_size=rows - 1))
    return [0.0, *np.cumsum(depths).tolist()]


@st.composite
def area_rows(draw: st.DrawFn) -> tuple[list[float], list[float]]:
    """Levels and areas, now and then a ledge or an area of nil."""
    rows = draw(st.integers(2, 8))
    levels = draw(rising(rows))
    areas = draw(st.lists(st.floats(0.1, 500.0), min_size=rows, max_size=rows))
    if draw(st.booleans()):
        areas[draw(st.sampled_from([0, rows - 1]))] = 0.0
    if draw(st.booleans()):
        place = draw(st.integers(0, rows - 1))
        levels.insert(place, levels[place])
        areas.insert(place, draw(st.floats(0.1, 500.0)))
    return levels, areas


@st.composite
def volume_rows(draw: st.DrawFn) -> tuple[list[float], list[float]]:
    """Levels and volumes, now and then a volume above nil at the first row."""
    rows = draw(st.integers(2, 8))
    increments = draw(st.lists(st.floats(0.1, 500.0), min_size=rows, max_size=rows))
    if draw(st.booleans()):
        increments[0] = 0.0
    return draw(rising(rows)), list(volumes_from_increments(increments))


@st.composite
def tables(draw: st.DrawFn) -> Profile:
    """Any table."""
    if draw(st.booleans()):
        return VolumeTable(*draw(volume_rows()))
    return AreaTable(*draw(area_rows()), draw(rules))


@st.composite
def parts(draw: st.DrawFn) -> Profile:
    """Any part of a stack above the lowest."""
    a, b, c = draw(st.floats(0.3, 5.0)), draw(st.floats(0.3, 5.0)), draw(st.floats(0.3, 5.0))
    made: list[Profile] = [
        Box(a, b, c),
        Cone(a, b, c),
        Cone(a, 0.0, c),
        Sphere(a),
        UprightCylinder(a, b, ends.cone(c)),
        Basin(a, b, 1.0, 0.5, c),
        AreaTable([0.0, a, a, a + b], [a, b, c, a], "conic"),
        SlopedBox(a, b, c, c / 3),
    ]
    return draw(st.sampled_from(made))


@st.composite
def stacks(draw: st.DrawFn) -> Stack:
    """One to four parts on one another."""
    return Stack(draw(st.lists(parts(), min_size=1, max_size=4)))


@st.composite
def displaced(draw: st.DrawFn) -> DisplacedVessel:
    """A vessel with bodies that take up to half its room at any level they reach."""
    a, b = draw(st.floats(0.5, 5.0)), draw(st.floats(0.5, 5.0))
    made: list[Profile] = [
        UprightCylinder(a, b, ends.hemispherical(a)),
        Drum(a, b, ends.torispherical(a, 1.0, 0.1), ends.flat()),
        Sphere(a),
        SlopedCylinder(a, b, a / 4),
        VolumeTable([0.0, a, a + b], [0.0, 1.0, 1.0 + b]),
    ]
    vessel = draw(st.sampled_from(made))
    count = draw(st.integers(0, 3))
    bodies = []
    for _ in range(count):
        low, high = sorted((draw(st.floats(0.05, 0.9)), draw(st.floats(0.05, 0.9))))
        assume(high - low > 0.01)
        levels = vessel.height * np.linspace(low, high, 50)
        room = float(vessel.plan_area(levels).min()) * (levels[-1] - levels[0])
        bodies.append((float(levels[0]), float(levels[-1]), draw(st.floats(0.0, 0.5)) * room / count))
    return DisplacedVessel(vessel, bodies)


vessels = st.one_of(basins(), sloped(), tables(), stacks(), displaced())


@given(profile=vessels)
def test_volume_rises_to_capacity(profile: Profile) -> None:
    levels = profile.height * np.linspace(0.0, 1.0, 400)
    volumes = profile.volume(levels)
    assert volumes[-1] == pytest.approx(profile.capacity, rel=1e-14)
    assert np.all(np.diff(volumes) > 0)
    assert profile.breakpoints[0] == 0
    assert profile.breakpoints[-1] == profile.height
    assert np.all(np.diff(profile.breakpoints) > 0)
    between = (np.array(profile.breakpoints[1:]) + np.array(profile.breakpoints[:-1])) / 2
    assert np.all(profile.plan_area(between) > 0)


@given(profile=vessels, first=shares, last=shares)
@settings(max_examples=60)
def test_plan_area_is_the_rate_of_volume(profile: Profile, first: float, last: float) -> None:
    low, high = sorted((first * profile.height, last * profile.height))
    edges = [low, *(level for level in profile.breakpoints if low < level < high), high]
    risen = 0.0
    for start, end in pairwise(edges):
        # h = a + (b − a)·sin²θ, so that square roots at the ends of a piece do not trouble the quadrature.
        def slice_at(theta: float, start: float = start, end: float = end) -> float:
            level = start + (end - start) * math.sin(theta) ** 2
            return float(profile.plan_area(np.asarray(level))) * (end - start) * math.sin(2 * theta)

        risen += quad(slice_at, 0.0, math.pi / 2, epsabs=0.0, epsrel=1e-10, limit=200)[0] if end > start else 0.0
    volumes = profile.volume(np.array([low, high]))
    assert volumes[1] - volumes[0] == pytest.approx(risen, rel=1e-8, abs=1e-12 * profile.capacity)


@given(profile=vessels, share=shares)
def test_volume_of_level_of_volume(profile: Profile, share: float) -> None:
    lowest = float(profile.volume(np.asarray(0.0)))
    volume = np.asarray(lowest + share * (profile.capacity - lowest))
    level = profile.level(volume)
    assert 0 <= level <= profile.height
    # A level is rounded to a float; above a narrow part the rounding may be worth more than the last digit of volume.
    areas = profile.plan_area(level * np.array([1 - 1e-15, 1.0, 1 + 1e-15]))
    rounding = 4e-16 * float(level) * float(areas.max())
    assert profile.volume(level) == pytest.approx(volume, rel=1e-12, abs=rounding + 1e-280)


@given(profile=vessels, share=shares)
def test_level_of_volume_of_level(profile: Profile, share: float) -> None:
    level = np.asarray(share * profile.height)
    volume = profile.volume(level)
    # Where the wall closes in, a volume's last digit is worth much level: no more than by the area near by.
    near = profile.plan_area(np.clip(level + profile.height * np.array([-1e-9, 1e-9]), 0.0, profile.height))
    rounding = 1e-15 * profile.capacity / max(float(near.min()), 1e-300)
    assert profile.level(volume) == pytest.approx(level, rel=1e-12, abs=1e-13 * profile.height + rounding)


@given(profile=st.one_of(basins(), sloped(), displaced()), exponent=st.floats(-9.0, -1.5))
def test_level_of_a_film_keeps_its_digits(profile: Profile, exponent: float) -> None:
    level = np.asarray(profile.height * 10**exponent)
    assert profile.level(profile.volume(level)) == pytest.approx(level, rel=1e-12, abs=0)


@given(profile=vessels, beyond=st.floats(0.001, 100.0))
def test_levels_outside_are_clipped(profile: Profile, beyond: float) -> None:
    outside = np.array([-beyond, profile.height + beyond])
    inside = np.array([0.0, profile.height])
    assert np.array_equal(profile.volume(outside), profile.volume(inside))
    assert np.array_equal(profile.plan_area(outside), profile.plan_area(inside))
    held = np.array([-beyond, profile.capacity + beyond])
    assert profile.level(held) == pytest.approx(inside, rel=1e-7, abs=0)


def alike(one: Profile, other: Profile, rel: float = 1e-13) -> None:
    """Both vessels answer alike, at every level and for every volume."""
    assert one.height == pytest.approx(other.height, rel=rel)
    # Not at the top: the top of one may be a last digit below the other's, which a steep area would tell.
    levels = other.height * np.linspace(0.0, 0.999, 61)
    assert one.volume(levels) == pytest.approx(other.volume(levels), rel=rel, abs=rel * other.capacity)
    assert one.plan_area(levels) == pytest.approx(other.plan_area(levels), rel=rel)
    volumes = other.capacity * np.linspace(0.0, 1.0, 61)
    assert one.level(volumes) == pytest.approx(other.level(volumes), rel=10 * rel, abs=rel * other.height)


@given(a=sizes, b=sizes, c=sizes)
def test_nil_slope_and_nil_fall_are_flat(a: float, b: float, c: float) -> None:
    alike(Basin(a, b, 0.0, 0.0, c), Box(a, b, c))
    alike(SlopedBox(a, b, c, 0.0), Box(a, b, c))
    alike(SlopedCylinder(a, b, 0.0), UprightCylinder(a, b, ends.flat()))


@given(a=sizes, b=sizes, low=sizes, high=sizes)
def test_stack_of_equal_widths_is_one(a: float, b: float, low: float, high: float) -> None:
    flat = ends.flat()
    alike(Stack([UprightCylinder(a, low, flat), UprightCylinder(a, high, flat)]), UprightCylinder(a, low + high, flat))
    alike(Stack([Box(a, b, low), Box(a, b, high)]), Box(a, b, low + high))
    cone = UprightCylinder(a, high, ends.cone(low))
    alike(Stack([Cone(a, 0.0, low), UprightCylinder(a, high, flat)]), cone)


@given(vessel=st.one_of(basins(), sloped(), tables(), stacks()))
def test_displaced_by_nothing_is_the_vessel(vessel: Profile) -> None:
    alike(DisplacedVessel(vessel, []), vessel)
    alike(DisplacedVessel(vessel, [(0.2 * vessel.height, 0.7 * vessel.height, 0.0)]), vessel, 1e-12)


@given(fall=st.floats(0.01, 3.0), diameter=sizes, share=shares)
def test_wedge_turned_over_fills_the_rest(fall: float, diameter: float, share: float) -> None:
    # The room between floor and its high side is cut in two equal wedges by the floor itself.
    vessel = SlopedCylinder(diameter, 1.0, fall)
    level = share * fall
    shell = math.pi * diameter**2 / 4
    wet = vessel.plan_area(np.array([level, fall - level]))
    assert wet.sum() == pytest.approx(shell, rel=1e-12)
    held = vessel.volume(np.array([level, fall - level, fall]))
    assert held[2] == pytest.approx(shell * fall / 2, rel=1e-14)
    assert held[0] - held[1] == pytest.approx(shell * (level - fall / 2), rel=1e-11, abs=1e-13 * held[2])


@given(rows=area_rows(), rule=rules)
def test_area_rows_are_met_and_layers_follow_the_rule(rows: tuple[list[float], list[float]], rule: AreaRule) -> None:
    levels, areas = rows
    table = AreaTable(levels, areas, rule)
    held = 0.0
    for (low, high), (a, b) in zip(pairwise(levels), pairwise(areas), strict=True):
        mean = (a + b) / 2 if rule == "linear" else (a + b + math.sqrt(a * b)) / 3
        held += (high - low) * mean
        assert table.volume(np.asarray(high)) == pytest.approx(held, rel=1e-12)
    upper = {level: area for level, area in zip(levels, areas, strict=True) if level < levels[-1]}
    assert table.plan_area(np.array(list(upper))) == pytest.approx(list(upper.values()), rel=1e-14)
    below = np.asarray(levels[-1] * (1 - 1e-12))
    last = areas[-1] if levels[-1] > levels[-2] else areas[-2]
    assert table.plan_area(below) == pytest.approx(last, rel=1e-3, abs=1e-3)


@given(rows=area_rows())
def test_linear_rule_never_holds_less(rows: tuple[list[float], list[float]]) -> None:
    level, difference = rule_difference(*rows)
    linear, conic = AreaTable(*rows, "linear"), AreaTable(*rows, "conic")
    levels = np.array(sorted(set(rows[0]) - {0.0}))
    ratios = linear.volume(levels) / conic.volume(levels) - 1
    assert np.all(ratios > -1e-14)
    assert difference == pytest.approx(float(ratios.max()), abs=1e-14)
    assert level in rows[0] and level > 0
    assert difference <= 0.5 + 1e-12


@given(rows=volume_rows(), share=shares)
def test_volume_rows_are_met(rows: tuple[list[float], list[float]], share: float) -> None:
    levels, volumes = rows
    table = VolumeTable(levels, volumes)
    assert np.array_equal(table.volume(np.array(levels)), volumes)
    assert table.level(np.array(volumes)) == pytest.approx(levels, rel=1e-14, abs=0)
    # The plan area is continuous over a row.
    inner = np.array(levels[1:-1])
    around = table.plan_area(np.array([inner * (1 - 1e-12), inner * (1 + 1e-12)]))
    assert around[0] == pytest.approx(around[1], rel=1e-6, abs=1e-6 * table.capacity)
    # SciPy's monotone cubic, with other slopes, stays between the same rows: never further off than the layer.
    level = share * table.height
    layer = min(int(np.searchsorted(levels, level, side="right")) - 1, len(levels) - 2)
    second = float(PchipInterpolator(levels, volumes)(level))
    assert abs(float(table.volume(np.asarray(level))) - second) < 0.6 * (volumes[layer + 1] - volumes[layer])


@given(a=sizes, levels=rising(6))
def test_tables_of_a_cylinder_are_the_cylinder(a: float, levels: list[float]) -> None:
    cylinder = UprightCylinder(a, levels[-1], ends.flat())
    exact = cylinder.volume(np.array(levels)).tolist()
    alike(VolumeTable(levels, exact), cylinder, 1e-9)
    area = math.pi * a**2 / 4
    alike(AreaTable(levels, [area] * 6, "linear"), cylinder, 1e-12)
    alike(AreaTable(levels, [area] * 6, "conic"), cylinder, 1e-12)


@given(base=st.floats(0.5, 20.0), slope=st.floats(0.1, 3.0), levels=rising(6))
def test_tables_are_exact_where_their_rule_is(base: float, slope: float, levels: list[float]) -> None:
    rows = np.array(levels)
    ditch = Basin(base, 7.0, 0.0, slope, levels[-1])
    alike(AreaTable(levels, ditch.plan_area(rows).tolist(), "linear"), ditch, 1e-12)
    # Its volume is a parabola, and so are the slopes that the cubic takes at the rows.
    alike(VolumeTable(levels, ditch.volume(rows).tolist()), ditch, 1e-9)
    cone = Cone(base + slope, base, levels[-1])
    alike(AreaTable(levels, cone.plan_area(rows).tolist(), "conic"), cone, 1e-12)


@given(base=st.floats(0.5, 20.0), slope=st.floats(0.1, 3.0), rows=st.integers(6, 40))
def test_table_of_a_basin_is_near_the_basin(base: float, slope: float, rows: int) -> None:
    basin = Basin(base, base, slope, slope, 2.0)
    levels = np.linspace(0.0, 2.0, rows)
    step = levels[1]
    table = VolumeTable(levels.tolist(), basin.volume(levels).tolist())
    between = np.linspace(0.0, 2.0, 301)
    # V‴ = 8·m²; slopes of parabolas are off by Δh²·V‴/6 inside and Δh²·V‴/3 at the ends, and a cubic with slopes off
    # by e is off by Δh·e/4 at the most.
    allowed = step**3 * 8 * slope**2 / 12
    assert np.abs(table.volume(between) - basin.volume(between)).max() <= allowed * (1 + 1e-9) + 1e-12 * basin.capacity
