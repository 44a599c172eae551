"""Laws that every vessel keeps, over random sizes."""

from __future__ import annotations

import math
from collections.abc import Callable
from itertools import pairwise

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st
from scipy.integrate import quad

from headfall.vessel import ends
from headfall.vessel.box import Box
from headfall.vessel.cone import Cone
from headfall.vessel.drum import Drum
from headfall.vessel.profile import Profile
from headfall.vessel.sphere import Sphere
from headfall.vessel.upright_cylinder import UprightCylinder

Builder = Callable[[float], Profile]

sizes = st.floats(0.05, 30.0)
shares = st.floats(0.0, 1.0)


@st.composite
def end_builders(draw: st.DrawFn, diameter: float) -> Callable[[float], ends.End]:
    """An end on the diameter times any scale."""
    form = draw(st.sampled_from(["flat", "cone", "ellipsoidal", "torispherical", "hemispherical"]))
    depth, ratio = draw(st.floats(0.05, 2.0)), draw(st.floats(0.5, 6.0))
    crown, knuckle = draw(st.floats(0.5, 3.0)), draw(st.floats(0.01, 0.5))
    made: dict[str, Callable[[float], ends.End]] = {
        "flat": lambda scale: ends.flat(),
        "cone": lambda scale: ends.cone(scale * depth * diameter),
        "ellipsoidal": lambda scale: ends.ellipsoidal(scale * diameter, ratio),
        "torispherical": lambda scale: ends.torispherical(scale * diameter, crown, knuckle),
        "hemispherical": lambda scale: ends.hemispherical(scale * diameter),
    }
    return made[form]


@st.composite
def drum_builders(draw: st.DrawFn) -> Callable[[float], Drum]:
    """A drum with any two heads, at any scale."""
    diameter, length = draw(sizes), draw(sizes)
    low, high = draw(end_builders(diameter)), draw(end_builders(diameter))
    return lambda scale: Drum(scale * diameter, scale * length, low(scale), high(scale))


@st.composite
def builders(draw: st.DrawFn) -> Builder:
    """Any vessel, at any scale."""
    shape = draw(st.sampled_from(["upright_cylinder", "box", "cone", "drum", "sphere"]))
    a, b, c = draw(sizes), draw(sizes), draw(sizes)
    if shape == "drum":
        return draw(drum_builders())
    if shape == "upright_cylinder":
        floor = draw(end_builders(a))
        return lambda scale: UprightCylinder(scale * a, scale * b, floor(scale))
    pointed = draw(st.sampled_from([(a, b), (a, 0.0), (0.0, b), (a, a)]))
    made: dict[str, Builder] = {
        "box": lambda scale: Box(scale * a, scale * b, scale * c),
        "cone": lambda scale: Cone(scale * pointed[0], scale * pointed[1], scale * c),
        "sphere": lambda scale: Sphere(scale * a),
    }
    return made[shape]


@given(build=builders())
def test_volume_rises_from_nil_to_capacity(build: Builder) -> None:
    profile = build(1.0)
    levels = profile.height * np.linspace(0.0, 1.0, 400)
    volumes = profile.volume(levels)
    assert volumes[0] == 0
    assert volumes[-1] == pytest.approx(profile.capacity, rel=1e-14)
    assert np.all(np.diff(volumes) > 0)
    assert np.all(profile.plan_area(levels[1:-1]) > 0)


@given(build=builders(), first=shares, last=shares)
@settings(max_examples=60)
def test_plan_area_is_the_rate_of_volume(build: Builder, first: float, last: float) -> None:
    profile = build(1.0)
    low, high = sorted((first * profile.height, last * profile.height))
    edges = [low, *(level for level in profile.breakpoints if low < level < high), high]
    risen = 0.0
    for start, end in pairwise(edges):
        # h = a + (b − a)·sin²θ, so that the square roots at the ends of a piece do not trouble the quadrature.
        def slice_at(theta: float, start: float = start, end: float = end) -> float:
            level = start + (end - start) * math.sin(theta) ** 2
            return float(profile.plan_area(np.asarray(level))) * (end - start) * math.sin(2 * theta)

        risen += quad(slice_at, 0.0, math.pi / 2, epsabs=0.0, epsrel=1e-10, limit=200)[0] if end > start else 0.0
    volumes = profile.volume(np.array([low, high]))
    assert volumes[1] - volumes[0] == pytest.approx(risen, rel=1e-8, abs=1e-12 * profile.capacity)


@given(build=builders(), share=shares)
def test_level_of_volume_of_level(build: Builder, share: float) -> None:
    profile = build(1.0)
    level = np.asarray(share * profile.height)
    volume = profile.volume(level)
    # A volume near a pointed top is rounded; what that rounding is worth in level is forgiven.
    rounding = 4e-16 * profile.capacity / max(float(profile.plan_area(level)), 1e-300)
    assert profile.level(volume) == pytest.approx(level, rel=1e-12, abs=1e-13 * profile.height + rounding)


@given(build=builders(), exponent=st.floats(-10.0, -1.0))
def test_level_of_a_film_keeps_its_digits(build: Builder, exponent: float) -> None:
    profile = build(1.0)
    level = np.asarray(profile.height * 10**exponent)
    assert profile.level(profile.volume(level)) == pytest.approx(level, rel=1e-12, abs=0)


@given(build=builders(), share=shares)
def test_volume_of_level_of_volume(build: Builder, share: float) -> None:
    profile = build(1.0)
    volume = np.asarray(share * profile.capacity)
    assert profile.volume(profile.level(volume)) == pytest.approx(volume, rel=1e-12, abs=1e-14 * profile.capacity)


@given(build=builders(), share=shares, scale=st.floats(0.01, 100.0))
def test_scaling_of_every_size(build: Builder, share: float, scale: float) -> None:
    small, large = build(1.0), build(scale)
    level = share * small.height
    assert large.height == pytest.approx(scale * small.height, rel=1e-13)
    grown = large.volume(np.asarray(min(scale * level, large.height)))
    # The level at a large scale is rounded; near empty that rounding counts up to threefold.
    assert grown == pytest.approx(scale**3 * small.volume(np.asarray(level)), rel=1e-12, abs=1e-290)


@given(build=builders(), beyond=st.floats(0.001, 100.0))
def test_levels_outside_are_clipped(build: Builder, beyond: float) -> None:
    profile = build(1.0)
    outside = np.array([-beyond, profile.height + beyond])
    inside = np.array([0.0, profile.height])
    assert np.array_equal(profile.volume(outside), profile.volume(inside))
    assert np.array_equal(profile.plan_area(outside), profile.plan_area(inside))
    held = np.array([-beyond, profile.capacity + beyond])
    assert profile.level(held) == pytest.approx([0.0, profile.height], rel=1e-7, abs=0)


@given(build=drum_builders(), share=shares)
def test_a_drum_is_its_own_mirror_image(build: Callable[[float], Drum], share: float) -> None:
    drum = build(1.0)
    level = share * drum.diameter
    pair = np.array([level, drum.diameter - level])
    assert drum.volume(pair).sum() == pytest.approx(drum.capacity, rel=1e-14)
    areas = drum.plan_area(pair)
    # The mirrored level is rounded, and near the ends area rises as the root of level.
    assert areas[0] == pytest.approx(areas[1], abs=1e-7 * float(drum.plan_area(np.asarray(drum.diameter / 2))))


@given(top=sizes, bottom=sizes, height=sizes, share=shares)
def test_a_cone_turned_over(top: float, bottom: float, height: float, share: float) -> None:
    upright, turned = Cone(top, bottom, height), Cone(bottom, top, height)
    both = upright.volume(np.asarray(share * height)) + turned.volume(np.asarray((1 - share) * height))
    assert both == pytest.approx(upright.capacity, rel=1e-13)


def _alike(one: Profile, other: Profile, rel: float = 1e-12) -> None:
    levels = one.height * np.linspace(0.0, 1.0, 101)
    largest = float(one.plan_area(levels).max())
    assert other.height == pytest.approx(one.height, rel=rel)
    assert other.capacity == pytest.approx(one.capacity, rel=rel)
    assert other.volume(levels) == pytest.approx(one.volume(levels), rel=rel, abs=1e-14 * one.capacity)
    assert other.plan_area(levels) == pytest.approx(one.plan_area(levels), rel=rel, abs=1e-13 * largest)


@given(diameter=sizes, height=sizes)
def test_shapes_that_become_one_another(diameter: float, height: float) -> None:
    hemisphere = ends.hemispherical(diameter)
    _alike(Cone(diameter, diameter, height), UprightCylinder(diameter, height, ends.flat()))
    _alike(Drum(diameter, 0.0, hemisphere, hemisphere), Sphere(diameter))
    round_ends = (
        ends.ellipsoidal(diameter, 1.0),
        ends.torispherical(diameter, 0.5, 0.1),
        ends.torispherical(diameter, 1.0, 0.5),
    )
    for end in round_ends:
        _alike(Drum(diameter, height, hemisphere, hemisphere), Drum(diameter, height, end, end))
        _alike(UprightCylinder(diameter, height, hemisphere), UprightCylinder(diameter, height, end))


@given(diameter=sizes, length=sizes, knuckle=st.floats(0.01, 0.45))
@settings(max_examples=25)
def test_a_crown_nears_a_hemisphere(diameter: float, length: float, knuckle: float) -> None:
    # The depth differs by the square root of what the crown has over a hemisphere's.
    near = ends.torispherical(diameter, 0.5 + 1e-12, knuckle)
    hemisphere = ends.hemispherical(diameter)
    _alike(Drum(diameter, length, hemisphere, hemisphere), Drum(diameter, length, near, near), rel=1e-4)


@given(diameter=sizes, length=sizes, share=st.floats(0.0, 1.0), data=st.data())
def test_two_heads_add_up(diameter: float, length: float, share: float, data: st.DataObject) -> None:
    low, high = (data.draw(end_builders(diameter))(1.0) for _ in range(2))
    level = np.asarray(share * diameter)
    mixed = Drum(diameter, length, low, high).volume(level)
    pairs = Drum(diameter, length, low, low).volume(level) + Drum(diameter, length, high, high).volume(level)
    assert mixed == pytest.approx(pairs / 2, rel=1e-13)
