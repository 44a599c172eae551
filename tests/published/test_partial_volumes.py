"""Partial volumes against printed values and against an independent library.

The printed values in gallons are worked examples of D. Jones as carried by the docstrings of the library fluids 1.3.1,
where they were read; each was recomputed by integrating slices with 30 digits. The values in cubic metres were computed
the same way, apart from this program.
"""

from __future__ import annotations

import math

import mpmath
import numpy as np
import pytest
from fluids.geometry import TANK
from hypothesis import given, settings
from hypothesis import strategies as st

from headfall.vessel import ends
from headfall.vessel.drum import Drum
from headfall.vessel.profile import Profile
from headfall.vessel.sphere import Sphere
from headfall.vessel.upright_cylinder import UprightCylinder

INCH = 0.0254
GALLON = 231 * INCH**3

GALLON_EXAMPLES = {
    # A drum of 108 in by 156 in, 36 in deep.
    "conical heads of 42 in": (42, 2041.1923581273443),
    "ellipsoidal heads of 42 in": (42, 2380.9565415578145),
    "torispherical heads, crown 1, knuckle 0.06": (None, 2028.62667),
}


def _example_drum(name: str) -> Drum:
    diameter = 108 * INCH
    if name.startswith("conical"):
        head: ends.End = ends.cone(42 * INCH)
    elif name.startswith("ellipsoidal"):
        head = ends.ellipsoidal(diameter, ratio=108 / 84)
    else:
        head = ends.torispherical(diameter, 1.0, 0.06)
    return Drum(diameter, 156 * INCH, head, head)


@pytest.mark.parametrize("name", GALLON_EXAMPLES)
def test_drum_examples_in_gallons(name: str) -> None:
    volume = _example_drum(name).volume(np.asarray(36 * INCH)) / GALLON
    assert volume == pytest.approx(GALLON_EXAMPLES[name][1], rel=1e-8, abs=0)


@pytest.mark.parametrize(
    ("floor", "gallons"),
    [
        # An upright tank of 132 in, floor 33 in deep, liquid 24 in deep.
        (ends.cone(33 * INCH), 250.67461381371024),
        (ends.ellipsoidal(132 * INCH, 2.0), 783.3581681678445),
    ],
)
def test_floor_examples_in_gallons(floor: ends.End, gallons: float) -> None:
    vessel = UprightCylinder(132 * INCH, 100 * INCH, floor)
    assert vessel.volume(np.asarray(24 * INCH)) / GALLON == pytest.approx(gallons, rel=1e-10, abs=0)


DRUM_LEVELS = [0.2, 0.5, 1.0, 1.5, 2.0]
DRUM_TABLES = {
    # Drum of 2 m by 6 m between tangent lines; slices with 30 digits.
    "flat": (
        ends.flat(),
        DRUM_LEVELS,
        [0.9810066527597, 3.685109095826, 9.424777960769, 15.16444682571, 18.84955592154],
    ),
    "ellipsoidal": (
        ends.ellipsoidal(2.0),
        DRUM_LEVELS,
        [1.039649715627, 4.012358330575, 10.47197551197, 16.93159269336, 20.94395102393],
    ),
}


@pytest.mark.parametrize("name", DRUM_TABLES)
def test_drum_tables(name: str) -> None:
    head, levels, volumes = DRUM_TABLES[name]
    assert Drum(2.0, 6.0, head, head).volume(np.array(levels)) == pytest.approx(volumes, rel=1e-11, abs=0)


@pytest.mark.parametrize(
    ("knuckle_ratio", "volumes"),
    [
        # The same drum, quadrature of segments along the axis, agreed with fluids 1.3.1 to 1e-10.
        (0.1, [0.365219, 5.097672, 10.216506, 18.561305, 20.433012]),
        (0.06, [0.361861, 5.027347, 10.072770, 18.297935, 20.145540]),
    ],
)
def test_torispherical_drum_tables(knuckle_ratio: float, volumes: list[float]) -> None:
    head = ends.torispherical(2.0, 1.0, knuckle_ratio)
    computed = Drum(2.0, 6.0, head, head).volume(np.array([0.1, 0.6, 1.0, 1.7, 2.0]))
    assert computed == pytest.approx(volumes, abs=6e-7)


@pytest.mark.parametrize(
    ("head", "volume", "depth"),
    [
        # One head on a diameter of 2 m: closed forms, the torispherical one by quadrature with 30 digits.
        (ends.hemispherical(2.0), 2.0943951023932, 1.0),
        (ends.ellipsoidal(2.0), 1.0471975511966, 0.5),
        (ends.torispherical(2.0), 0.64799203432921, 0.33867522741639),
        (ends.cone(0.5), 0.5235987755983, 0.5),
    ],
)
def test_whole_heads(head: ends.End, volume: float, depth: float) -> None:
    fitted = head.fitted(2.0)
    assert fitted.capacity == pytest.approx(volume, rel=1e-12, abs=0)
    assert fitted.depth == pytest.approx(depth, rel=1e-12, abs=0)


@pytest.mark.parametrize(
    ("crown_ratio", "knuckle_ratio", "depth", "volume"),
    [
        # Depth over D and volume over D³ of the customary heads, from memory of DIN 28011, DIN 28013 and UG-32.
        (1.0, 0.1, 0.1938, 0.0990),
        (0.8, 0.154, 0.2545, 0.1308),
        (1.0, 0.06, 0.1693, 0.0810),
    ],
)
def test_customary_heads(crown_ratio: float, knuckle_ratio: float, depth: float, volume: float) -> None:
    head = ends.torispherical(1.0, crown_ratio, knuckle_ratio)
    assert head.depth == pytest.approx(depth, abs=6e-5)
    assert head.capacity == pytest.approx(volume, abs=6e-5)


def test_cone_bottom_tank() -> None:
    # D 2 m, cone 1 m deep: π·R²·(1/3 + 1.5) at 2.5 m and (π/3)·0.6³ at 0.6 m.
    vessel = UprightCylinder(2.0, 3.0, ends.cone(1.0))
    volumes = vessel.volume(np.array([2.5, 0.6]))
    assert volumes == pytest.approx([5.7595865315813, 0.22619467105847], rel=1e-12, abs=0)


# A library of others --------------------------------------------------------------------------------------------------

FORMS = ["conical", "ellipsoidal", "spherical", "torispherical"]
diameters = st.floats(0.2, 20.0)
shares = st.floats(0.001, 0.999)


@st.composite
def heads(draw: st.DrawFn, diameter: float, side: str) -> tuple[ends.End, dict[str, float | str]]:
    """One end, and what the library calls it."""
    form = draw(st.sampled_from(FORMS))
    if form == "torispherical":
        crown, knuckle = draw(st.floats(0.6, 2.0)), draw(st.floats(0.02, 0.4))
        named = {f"side{side}": form, f"side{side}_f": crown, f"side{side}_k": knuckle}
        return ends.torispherical(diameter, crown, knuckle), named
    ratio = draw(st.floats(0.6, 5.0)) if form != "spherical" else 1.0
    depth = diameter / (2 * ratio)
    named = {f"side{side}": form, f"side{side}_a": depth}
    if form == "conical":
        return ends.cone(depth), named
    return ends.ellipsoidal(diameter, ratio), named


@given(data=st.data(), diameter=diameters, length=st.floats(0.1, 5.0), share=shares)
@settings(max_examples=40)
def test_drums_against_library(data: st.DataObject, diameter: float, length: float, share: float) -> None:
    low, low_named = data.draw(heads(diameter, "A"))
    high, high_named = data.draw(heads(diameter, "B"))
    drum = Drum(diameter, length * diameter, low, high)
    theirs = TANK(D=diameter, L=length * diameter, horizontal=True, **low_named, **high_named)
    # The library stops its quadrature at an absolute 1e-8; the slices below are closer.
    assert drum.volume(np.asarray(share * diameter)) == pytest.approx(
        theirs.V_from_h(share * diameter), rel=1e-6, abs=0
    )
    assert drum.capacity == pytest.approx(theirs.V_total, rel=1e-9, abs=0)


@given(data=st.data(), diameter=diameters, height=st.floats(0.1, 5.0), share=shares)
@settings(max_examples=60)
def test_upright_tanks_against_library(data: st.DataObject, diameter: float, height: float, share: float) -> None:
    floor, named = data.draw(heads(diameter, "A"))
    vessel = UprightCylinder(diameter, height * diameter, floor)
    theirs = TANK(D=diameter, L=height * diameter, horizontal=False, **named)
    level = share * vessel.height
    assert vessel.height == pytest.approx(theirs.h_max, rel=1e-12, abs=0)
    assert vessel.volume(np.asarray(level)) == pytest.approx(theirs.V_from_h(level), rel=1e-9, abs=0)


# Slices with more digits ----------------------------------------------------------------------------------------------


def _wall(crown_ratio: float, knuckle_ratio: float) -> tuple[mpmath.mpf, mpmath.mpf, mpmath.mpf, mpmath.mpf]:
    """Crown radius, knuckle radius, depth and rim of a torispherical head on a radius of 1."""
    crown, knuckle = 2 * mpmath.mpf(crown_ratio), 2 * mpmath.mpf(knuckle_ratio)
    cosine = mpmath.sqrt((crown - knuckle) ** 2 - (1 - knuckle) ** 2) / (crown - knuckle)
    return crown, knuckle, crown - (crown - knuckle) * cosine, knuckle * cosine


def _slices(crown_ratio: float, knuckle_ratio: float, level: float, *, volume: bool) -> mpmath.mpf:
    """Volume or plan area of the head below a level, by slices across the axis."""
    crown, knuckle, depth, rim = _wall(crown_ratio, knuckle_ratio)
    below = 1 - mpmath.mpf(level)

    def radius(x: mpmath.mpf) -> mpmath.mpf:
        if x <= rim:
            return 1 - knuckle + mpmath.sqrt(knuckle**2 - x**2)
        return mpmath.sqrt(mpmath.fabs(crown**2 - (x - depth + crown) ** 2))

    def slice_at(x: mpmath.mpf) -> mpmath.mpf:
        wall = radius(x)
        if wall <= below:
            return mpmath.mpf(0)
        chord = mpmath.sqrt(wall**2 - below**2)
        return _segment(wall, below) if volume else 2 * chord

    if radius(rim) > below:
        edge = depth - crown + mpmath.sqrt(crown**2 - below**2)
        return mpmath.quad(slice_at, [0, rim, edge])
    return mpmath.quad(slice_at, [0, mpmath.sqrt(knuckle**2 - (below - 1 + knuckle) ** 2)])


@pytest.mark.parametrize(
    ("crown_ratio", "knuckle_ratio"),
    [(1.0, 0.06), (1.0, 0.1), (0.8, 0.154), (1.0, 0.03125), (1.0, 0.005), (3.0, 0.3), (0.52, 0.2), (1.2, 0.45)],
)
def test_torispherical_head_of_a_drum_by_slices(crown_ratio: float, knuckle_ratio: float) -> None:
    head = ends.torispherical(2.0, crown_ratio, knuckle_ratio)
    rim_level = 1 - head.rim[1]
    for level in (1e-6, 1e-3, rim_level / 2, 0.0625, rim_level * 1.0001, rim_level + 0.1, 0.7, 0.999, 1.0):
        with mpmath.workdps(30):
            area = float(_slices(crown_ratio, knuckle_ratio, level, volume=False))
            volume = float(_slices(crown_ratio, knuckle_ratio, level, volume=True))
        assert head.lying_area(np.asarray(level)) == pytest.approx(area, rel=1e-12, abs=0)
        assert head.lying_volume(np.asarray(level)) == pytest.approx(volume, rel=1e-12, abs=0)


def _segment(radius: mpmath.mpf, below: mpmath.mpf) -> mpmath.mpf:
    return radius**2 * mpmath.acos(below / radius) - below * mpmath.sqrt(radius**2 - below**2)


@pytest.mark.parametrize("level", [1e-8, 1e-4, 0.05, 0.0835, 0.09, 0.5, 0.999, 1.0])
def test_conical_head_of_a_drum_by_slices(level: float) -> None:
    head = ends.cone(0.6).fitted(2.0)
    with mpmath.workdps(30):
        below = 1 - mpmath.mpf(level)
        edges = [below, (1 + below) / 2, 1]
        area = float(mpmath.quad(lambda r: 1.2 * mpmath.sqrt(r**2 - below**2), edges))
        volume = float(0.6 * mpmath.quad(lambda r: _segment(r, below), edges))
    assert head.lying_area(np.asarray(level)) == pytest.approx(area, rel=1e-12, abs=0)
    assert head.lying_volume(np.asarray(level)) == pytest.approx(volume, rel=1e-12, abs=0)


@pytest.mark.parametrize("level", [1e-9, 1e-6, 1e-3, 0.1, 0.25, 0.5, 1.0])
def test_near_empty_drum_keeps_its_digits(level: float) -> None:
    with mpmath.workdps(40):
        depth = mpmath.mpf(level)
        segment = mpmath.acos(1 - depth) - (1 - depth) * mpmath.sqrt(2 * depth - depth**2)
    volume = Drum(2.0, 1.0, ends.flat(), ends.flat()).volume(np.asarray(level))
    assert volume == pytest.approx(float(segment), rel=1e-14, abs=0)


@pytest.mark.parametrize(
    ("profile", "level", "volume"),
    [
        (Sphere(3.0), 1.0, math.pi * (4.5 - 1) / 3),
        (Sphere(3.0), 3.0, math.pi * 4.5),
        # A bowl on a sphere's lower half and a straight side.
        (UprightCylinder(3.0, 2.0, ends.hemispherical(3.0)), 1.5, math.pi * 2.25),
    ],
)
def test_sphere(profile: Profile, level: float, volume: float) -> None:
    # π·h²·(3R − h)/3, common practice.
    assert profile.volume(np.asarray(level)) == pytest.approx(volume, rel=1e-14, abs=0)
