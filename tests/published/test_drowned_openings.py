"""Openings against a tailwater, under a pressure, and at low Reynolds numbers; closed forms and published limits."""

from __future__ import annotations

import math
from itertools import pairwise

import numpy as np
import pytest
from scipy.integrate import quad

from headfall.case.reading import read_case_data
from headfall.outlet.low_reynolds import coefficient_factor, creeping_closure
from headfall.outlet.orifice import OrificeOutlet
from headfall.outlet.outlet import Conditions
from headfall.study import solve

G = 9.80665


def side(shape: str, width: float, height: float) -> OrificeOutlet:
    return OrificeOutlet("drain", shape, "side", width, height, 0.5, 1, 0.6, 0.6, 0.6, "own_coefficient", G)


def chord(outlet: OrificeOutlet, y: float) -> float:
    foot, d = outlet.elevation - 0.5 * outlet.height, outlet.height
    return 2 * math.sqrt(max((y - foot) * (d - (y - foot)), 0.0)) if outlet.shape == "round" else outlet.width


CASES = [
    (0.45, 0.3, 0.0), (0.9, 0.55, 0.0), (0.9, 0.8, 0.0), (0.52, 0.5, 0.0), (2.0, -math.inf, 0.3), (0.5, -math.inf, 0.2),
    (0.9, 0.55, -0.2), (0.9, -math.inf, -0.35), (0.8, 0.45, 0.4),
]  # fmt: skip


@pytest.mark.parametrize(("shape", "width", "height"), [("round", 0.3, 0.3), ("rectangle", 0.2, 0.4)])
@pytest.mark.parametrize(("level", "tail", "pressure"), CASES)
def test_side_opening_against_adaptive_quadrature(
    shape: str, width: float, height: float, level: float, tail: float, pressure: float
) -> None:
    """The same law integrated by a general-purpose routine, piece by piece."""
    outlet = side(shape, width, height)
    foot, top = outlet.elevation - 0.5 * height, outlet.elevation + 0.5 * height
    found = outlet.flow(np.array([level]), outlet.coefficients[:, [1]], 1.0, Conditions(pressure, tail))

    def speed(y: float) -> float:
        inside, outside = level + pressure if y < level else -math.inf, tail if y < tail else -math.inf
        driving = max(inside, y if y >= level else -math.inf, y if outside == -math.inf else -math.inf)
        if y < level and y < tail:
            gap = inside - outside
            return math.copysign(math.sqrt(2 * G * abs(gap)), gap)
        if y < level:
            return math.sqrt(2 * G * max(driving - y, 0.0))
        if y < tail:
            return -math.sqrt(2 * G * max(outside - pressure - y, 0.0))
        return 0.0

    marks = sorted({foot, top, *(m for m in (level, tail, level + pressure, tail - pressure) if foot < m < top)})
    exact = sum(
        quad(lambda y: 0.6 * chord(outlet, y) * speed(y), a, b, epsabs=1e-13, epsrel=1e-11, limit=200)[0]
        for a, b in pairwise(marks)
    )
    assert float(found[0]) == pytest.approx(exact, rel=1e-7, abs=1e-12)


def two_tanks(first: float, second: float, gap: float) -> dict[str, object]:
    """Two upright tanks joined by a hole at the floor of both, levels 2 m and 2 m less the gap."""
    return {
        "headfall": 1,
        "vessel": {"shape": "upright_cylinder", "diameter": f"{first} m", "height": "3 m"},
        "outlets": [
            {
                "kind": "orifice",
                "opening": {"form": "round", "diameter": "80 mm"},
                "coefficient": {"low": 0.6, "typical": 0.6, "high": 0.6},
                "tailwater": {
                    "vessel": {"shape": "upright_cylinder", "diameter": f"{second} m", "height": "3 m"},
                    "elevation": "0 m",
                    "level": f"{2 - gap} m",
                },
            }
        ],
        "headspace": {"kind": "open"},
        "levels": {"start": "2 m", "stop": "1.7 m"},
    }


def test_two_prismatic_tanks_in_closed_form() -> None:
    """t = 2·A1·A2·(√Δ0 − √Δ1)/((A1 + A2)·C_d·a·√(2g))."""
    answers = solve(read_case_data(two_tanks(2.0, 3.0, 1.5)))
    one, other = math.pi / 4 * 4.0, math.pi / 4 * 9.0
    last = 1.7 - (0.5 + 0.3 * one / other)
    strength = 0.6 * math.pi / 4 * 0.08**2 * math.sqrt(2 * G)
    exact = 2 * one * other * (math.sqrt(1.5) - math.sqrt(last)) / ((one + other) * strength)
    assert answers.draw_down.time.typical == pytest.approx(exact, rel=1e-9)
    assert answers.receiver_level == pytest.approx(0.5 + 0.3 * one / other, rel=1e-9)


def test_two_tanks_come_to_the_same_level() -> None:
    data = two_tanks(2.0, 3.0, 1.5)
    answers = solve(read_case_data(data))
    one, other = 4.0, 9.0
    assert answers.equilibrium.level.typical == pytest.approx((2.0 * one + 0.5 * other) / (one + other), rel=1e-9)


def test_constant_pad_over_the_liquid() -> None:
    """t = (2A/K)·(√(h1 + p/ρg) − √(h2 + p/ρg)) with 20 kPa: 470.5641403687987 s, ρ 998 kg/m³."""
    data = {
        "headfall": 1,
        "vessel": {"shape": "box", "length": "3 m", "width": "1 m", "height": "3 m"},
        "liquid": {"name": "test liquid", "density": "998 kg/m^3", "viscosity": "1 mPa*s"},
        "outlets": [
            {
                "kind": "orifice",
                "opening": {"form": "round", "diameter": "50 mm"},
                "coefficient": {"low": 0.61, "typical": 0.61, "high": 0.61},
            }
        ],
        "headspace": {"kind": "pressurised", "gauge_pressure": "20 kPa"},
        "levels": {"start": "2 m", "stop": "0.5 m"},
    }
    assert solve(read_case_data(data)).draw_down.time.typical == pytest.approx(470.5641403687987, rel=1e-9)


@pytest.mark.parametrize(("head", "column", "drop", "vacuum"), [(1.9, 0.1, 0.022, 18.4), (1.6, 0.4, 0.069, 15.0)])
def test_sealed_tank_stops(head: float, column: float, drop: float, vacuum: float) -> None:
    """Water under a sealed gas at constant temperature: the drop and the vacuum, worked apart from p·V = const."""
    data = {
        "headfall": 1,
        "vessel": {"shape": "upright_cylinder", "diameter": "2 m", "height": f"{head + column} m"},
        "outlets": [{"kind": "orifice", "opening": {"form": "round", "diameter": "50 mm"}}],
        "headspace": {"kind": "closed"},
        "levels": {"start": f"{head} m", "stop": "0.1 m"},
    }
    answers = solve(read_case_data(data))
    assert not answers.draw_down.reaches_stop
    assert head - (answers.equilibrium.level.typical or 0.0) == pytest.approx(drop, abs=0.0006)
    assert answers.headspace is not None
    assert -answers.headspace.lowest / 1000 == pytest.approx(vacuum, abs=0.06)


# Low Reynolds numbers -----------------------------------------------------------------------------------------------


@pytest.mark.parametrize(
    ("reynolds", "coefficient"), [(10, 0.228), (30, 0.420), (100, 0.545), (300, 0.588), (1000, 0.604)]
)
def test_closure_between_creeping_and_turbulent_flow(reynolds: float, coefficient: float) -> None:
    """1 = 12π·C/Re + (C/0.611)², worked apart to three digits."""
    assert float(creeping_closure(np.array(float(reynolds)))) == pytest.approx(coefficient, abs=0.0006)


@pytest.mark.parametrize(("mean_reynolds", "near"), [(0.001, 0.005), (0.1, 0.05), (1.0, 0.07)])
def test_creeping_limit_of_sampson(mean_reynolds: float, near: float) -> None:
    """C = √(Re/(12π)) with the mean velocity's Re (Sampson 1891, from memory); Re there is C·Re of √(2gH).

    The closure bends away from the limit, on the low side, as inertia sets in.
    """
    limit = math.sqrt(mean_reynolds / (12 * math.pi))
    found = float(creeping_closure(np.array(mean_reynolds / limit)))
    assert found == pytest.approx(limit, rel=near) and found < limit


def test_handbook_range_widens_at_low_reynolds_numbers() -> None:
    at = np.array([2e5, 5e4, 4e3])
    assert coefficient_factor(at, np.array(0.0)) == pytest.approx([1.0, 1.0, 1.0])
    assert coefficient_factor(at, np.array(1.0)) == pytest.approx([1.0, 1.01, 1.12])
    assert coefficient_factor(at, np.array(-1.0)) == pytest.approx([1.0, 1.0, 0.95])
