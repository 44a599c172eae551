"""Basins, sloped floors, stacks and tables against closed forms, printed answers and an independent library.

Drain times of closed forms were computed with 30 digits by mpmath, apart from this program, for g = 9.80665 m/s². The
textbook answers were read in an open collection of worked examples (FOSSEE Python Textbook Companions) that reprints
the answers of the books named beside each check. Volumes in gallons are worked examples of D. Jones as carried by the
docstrings of the library fluids 1.3.1, where they were read.
"""

from __future__ import annotations

import math
from collections.abc import Callable

import mpmath
import numpy as np
import pytest
from fluids.geometry import TANK
from hypothesis import given, settings
from hypothesis import strategies as st
from scipy.interpolate import CubicHermiteSpline, PchipInterpolator

from headfall.solve.draw_down import run_time
from headfall.solve.span import cut_span
from headfall.vessel import ends
from headfall.vessel.basin import Basin
from headfall.vessel.cone import Cone
from headfall.vessel.displaced import DisplacedVessel
from headfall.vessel.profile import Array, Profile
from headfall.vessel.sloped_floor import SlopedBox, SlopedCylinder
from headfall.vessel.stack import Stack
from headfall.vessel.table import AreaTable, VolumeTable, rule_difference
from headfall.vessel.upright_cylinder import UprightCylinder

G = 9.80665
FOOT, INCH = 0.3048, 0.0254
GALLON = 231 * INCH**3


def drain_time(profile: Profile, opening: float, start: float, stop: float, gravity: float = G) -> float:
    """Time [s] through an opening in the lowest point, ``opening`` being coefficient times area [m²]."""

    def outflow(level: Array) -> Array:
        return np.asarray(opening * np.sqrt(2 * gravity * level))

    edges = np.array(cut_span(start, stop, [*profile.breakpoints, 0.0]))
    return float(run_time(edges, profile.plan_area, outflow))


def hole(coefficient: float, bore: float) -> float:
    return coefficient * math.pi / 4 * bore**2


FLAT = ends.flat()
CLOSED_FORMS: dict[str, tuple[Callable[[], Profile], float, float, float, float]] = {
    # t = [2·L·W·√h + (4/3)·z·(L + W)·h^1.5 + (8/5)·z²·h^2.5]/K
    "basin": (lambda: Basin(6.0, 4.0, 1.5, 1.5, 2.0), hole(0.6, 0.15), 2.0, 0.5, 2197.05692039941024),
    # t = 2A(√h1 − √h2)/K
    "cylinder on cylinder": (
        lambda: Stack([UprightCylinder(2.0, 1.0, FLAT), UprightCylinder(2.0, 2.0, FLAT)]),
        hole(0.61, 0.05),
        3.0,
        0.5,
        1214.07343453781028,
    ),
    "cylinder, volumes at rows": (
        lambda: VolumeTable([0.0, 1.0, 1.2, 3.0], [0.0, math.pi, 1.2 * math.pi, 3.0 * math.pi]),
        hole(0.61, 0.05),
        3.0,
        0.5,
        1214.07343453781028,
    ),
    # t = (2/5)·π·(R/H)²·h^2.5/K: the square root of a cone's area runs straight.
    "cone, areas at rows": (
        lambda: AreaTable([0.0, 2.0], [0.0, math.pi], "conic"),
        hole(0.62, 0.04),
        2.0,
        0.0,
        515.0483173888044,
    ),
    # t = π/K·[2·r0²·√h + (4/3)·r0·m·h^1.5 + (2/5)·m²·h^2.5]
    "frustum on frustum": (
        lambda: Stack([Cone(1.16, 0.6, 0.8), Cone(2.0, 1.16, 1.2)]),
        hole(0.6, 0.05),
        2.0,
        0.2,
        502.0759496766718,
    ),
}


@pytest.mark.parametrize("name", CLOSED_FORMS)
def test_drain_time_of_a_closed_form(name: str) -> None:
    vessel, opening, start, stop, seconds = CLOSED_FORMS[name]
    assert drain_time(vessel(), opening, start, stop) == pytest.approx(seconds, rel=1e-11)


def test_dighe_swimming_bath() -> None:
    # R. S. Dighe, Hydraulics Made Easy, ex. 4.12, p. 118: 750.1 s; the closed form gives 750.12428.
    bath = SlopedBox(90 * FOOT, 30 * FOOT, 8 * FOOT, 5 * FOOT)
    seconds = drain_time(bath, 0.6 * 2 * FOOT**2, 8 * FOOT, 0.0, 32.2 * FOOT)
    assert seconds == pytest.approx(750.1, abs=0.06)
    assert seconds == pytest.approx(750.12428, abs=6e-6)


def test_lal_cylinder_on_a_hemisphere_in_two_parts() -> None:
    # J. Lal, Hydraulics, ex. 3.8, p. 85: 10 ft cylinder on a hemisphere, 17 ft deep, 3 in hole: 1885 s.
    lower = UprightCylinder(10 * FOOT, 5 * FOOT, ends.hemispherical(10 * FOOT))
    vessel = Stack([lower, UprightCylinder(10 * FOOT, 7 * FOOT, FLAT)])
    assert drain_time(vessel, hole(0.62, 3 * INCH), 17 * FOOT, 0.0, 32.2 * FOOT) == pytest.approx(1885, abs=1)


def test_cone_bottom_as_a_stack() -> None:
    # V = π·R²·(H/3 + h − H), and (π/3)·(R·h/H)²·h in the cone.
    vessel = Stack([Cone(2.0, 0.0, 1.0), UprightCylinder(2.0, 3.0, FLAT)])
    assert vessel.volume(np.array([0.6, 2.5])) == pytest.approx([0.22619467105847, 5.7595865315813], rel=1e-12)


def test_jones_examples_as_stacks() -> None:
    # 132 in bore, floor 33 in deep, filled 24 in: 250.67 gal on a cone, 783.36 gal on half a 2:1 ellipsoid.
    side = UprightCylinder(132 * INCH, 60 * INCH, FLAT)
    on_cone = Stack([Cone(132 * INCH, 0.0, 33 * INCH), side])
    on_ellipsoid = Stack([UprightCylinder(132 * INCH, 1 * INCH, ends.ellipsoidal(132 * INCH, 2.0)), side])
    level = np.asarray(24 * INCH)
    assert on_cone.volume(level) / GALLON == pytest.approx(250.67461381371024, rel=1e-8)
    assert on_ellipsoid.volume(level) / GALLON == pytest.approx(783.3581681678445, rel=1e-8)


@given(depth=st.floats(0.1, 3.0), side=st.floats(0.1, 5.0), share=st.floats(0.0, 1.0))
@settings(max_examples=40)
def test_stack_against_fluids(depth: float, side: float, share: float) -> None:
    vessel = Stack([Cone(2.0, 0.0, depth), UprightCylinder(2.0, side, FLAT)])
    tank = TANK(D=2.0, L=side, horizontal=False, sideA="conical", sideA_a=depth)
    level = share * vessel.height
    assert vessel.volume(np.asarray(level)) == pytest.approx(tank.V_from_h(level), rel=1e-11, abs=1e-13)


def test_archimedes_hoof() -> None:
    # The surface meets the floor in a diameter: V = (2/3)·R²·H, the hoof of Archimedes (from memory); here R = 1 m
    # and H = R/tan 10°, 3.78085… m³ by integrating slices with 30 digits.
    deep = 1 / math.tan(math.radians(10))
    vessel = SlopedCylinder(2.0, 1.0, 2 * deep)
    assert vessel.volume(np.asarray(deep)) == pytest.approx(3.780854546411806354, rel=1e-14)
    assert vessel.plan_area(np.asarray(deep)) == pytest.approx(math.pi / 2, rel=1e-14)


@pytest.mark.parametrize("share", [1e-9, 1e-4, 0.02, 0.2, 0.2298, 0.2299, 0.3, 0.7, 0.999, 1.0])
def test_cylindrical_wedge_against_mpmath(share: float) -> None:
    # The share 0.22985 is where the half angle of the surface is one radian.
    diameter, fall = 3.0, 0.25
    level = share * fall
    with mpmath.workdps(40):
        half, top = mpmath.mpf(diameter) / 2, mpmath.mpf(diameter) * mpmath.mpf(level) / mpmath.mpf(fall)

        def column(across: mpmath.mpf) -> mpmath.mpf:
            depth = (top - across) * mpmath.mpf(fall) / (2 * half)
            return depth * 2 * mpmath.sqrt(across * (2 * half - across))

        exact = mpmath.quad(column, [0, top / 2, top])
    assert SlopedCylinder(diameter, 2.0, fall).volume(np.asarray(level)) == pytest.approx(float(exact), rel=2e-15)


# Plan areas surveyed in a detention basin (an invented one); its volumes were computed apart from this program.
LEVELS = [0.0, 0.25, 0.5, 1.0, 1.5, 2.0, 2.4]
AREAS = [60.0, 420.0, 610.0, 840.0, 1110.0, 1420.0, 1700.0]


def test_detention_basin_by_both_rules() -> None:
    conic, linear = AreaTable(LEVELS, AREAS, "conic"), AreaTable(LEVELS, AREAS, "linear")
    assert conic.volume(np.asarray(0.5)) == pytest.approx(181.2, abs=0.05)
    assert linear.volume(np.asarray(0.5)) == pytest.approx(188.8, abs=0.051)
    assert conic.volume(np.array([1.0, 1.6, 2.4])) == pytest.approx([542, 1142, 2282], abs=0.5)


def test_difference_between_the_rules() -> None:
    # By hand, below 0.25 m: 0.125·(60 + 420) against (0.25/3)·(60 + 420 + √(60·420)).
    level, difference = rule_difference(LEVELS, AREAS)
    assert level == 0.25
    assert difference == pytest.approx(60 / (0.25 / 3 * (480 + math.sqrt(25200))) - 1, rel=1e-12)
    # Between the rules: 4.1 % at 0.5 m and 0.6 % when full.
    conic, linear = AreaTable(LEVELS, AREAS, "conic"), AreaTable(LEVELS, AREAS, "linear")
    assert linear.volume(np.array([0.5, 2.4])) / conic.volume(np.array([0.5, 2.4])) == pytest.approx(
        [1.041, 1.006], abs=6e-4
    )


# The data that Fritsch and Carlson (1980) call RPN 14, from memory; a radiochemist's, levelling off at both ends.
RPN_LEVELS = np.array([7.99, 8.09, 8.19, 8.7, 9.2, 10.0, 12.0, 15.0, 20.0]) - 7.99
RPN_VALUES = np.array([0.0, 2.76429e-5, 4.37498e-2, 0.169183, 0.469428, 0.943740, 0.998636, 0.999919, 0.999994])


def test_fritsch_and_carlson_data_never_fall() -> None:
    table = VolumeTable(RPN_LEVELS.tolist(), RPN_VALUES.tolist())
    levels = np.linspace(0.0, table.height, 20_001)
    assert np.all(np.diff(table.volume(levels)) >= 0)
    assert np.all(table.plan_area(levels) >= 0)
    # The same slopes of parabolas left as they are would let the volume fall.
    depths, means = np.diff(RPN_LEVELS), np.diff(RPN_VALUES) / np.diff(RPN_LEVELS)
    inner = (depths[:-1] * means[1:] + depths[1:] * means[:-1]) / (depths[:-1] + depths[1:])
    free = CubicHermiteSpline(RPN_LEVELS, RPN_VALUES, [0.0, *inner, 0.0])
    assert np.any(np.diff(free(levels)) < -1e-6)
    # A second opinion: SciPy's monotone cubic (Fritsch and Butland's slopes) stays as near as the steepest layer lets.
    assert table.volume(levels) == pytest.approx(PchipInterpolator(RPN_LEVELS, RPN_VALUES)(levels), abs=0.05)


@pytest.mark.parametrize("rows", [9, 17])
def test_strapping_table_of_a_drum_against_fluids(rows: int) -> None:
    # A table of the volumes that fluids gives at even levels Δh. Slopes of parabolas are off by Δh²·A″/6, which leaves
    # the cubic off by up to 0.096·Δh times that; in the middle half of this drum |A″| is below 22.
    tank = TANK(D=2.0, L=6.0, horizontal=True, sideA="ellipsoidal", sideB="ellipsoidal", sideA_a=0.5, sideB_a=0.5)
    levels = np.linspace(0.0, 2.0, rows)
    table = VolumeTable(levels.tolist(), [tank.V_from_h(level) for level in levels])
    middle = np.linspace(0.5, 1.5, 101)
    exact = np.array([tank.V_from_h(level) for level in middle])
    assert table.volume(levels) == pytest.approx([tank.V_from_h(level) for level in levels], rel=1e-14)
    assert np.abs(table.volume(middle) - exact).max() < 0.5 * (2.0 / (rows - 1)) ** 3


def test_basin_by_the_prismoidal_rule() -> None:
    # h/6·(A1 + 4·Am + A2) is exact for plane sides.
    # A(0) = 6·4 = 24, A(1) = 9·7 = 63, A(2) = 12·10 = 120 m²; V(2) = 2/6·(24 + 252 + 120) = 132 m³.
    basin = Basin(6.0, 4.0, 1.5, 1.5, 2.0)
    assert basin.plan_area(np.array([0.0, 1.0, 2.0])) == pytest.approx([24.0, 63.0, 120.0], rel=1e-15)
    assert basin.capacity == pytest.approx(132.0, rel=1e-15)


def test_displaced_cylinder_by_hand() -> None:
    # 2 m bore less 1 m³ between 1 m and 2 m: t = [2(√3 − √2)·A + 2(√2 − 1)·(A − 1) + 2·A]/K, by the prism's form.
    vessel = DisplacedVessel(UprightCylinder(2.0, 3.0, FLAT), [(1.0, 2.0, 1.0)])
    opening = hole(0.61, 0.05)
    narrow, wide = math.sqrt(2) - 1, math.sqrt(3) - math.sqrt(2) + 1
    by_hand = 2 * (wide * math.pi + narrow * (math.pi - 1)) / (opening * math.sqrt(2 * G))
    assert drain_time(vessel, opening, 3.0, 0.0) == pytest.approx(by_hand, rel=1e-12)
    assert vessel.capacity == pytest.approx(3 * math.pi - 1, rel=1e-15)
