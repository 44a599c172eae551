"""Flow through openings and entry coefficients against published values and 30-digit integrals."""

from __future__ import annotations

import mpmath
import numpy as np
import pytest

from headfall.outlet.entries import entry_coefficient
from headfall.outlet.orifice import OrificeOutlet
from headfall.outlet.side_opening import rectangular_opening, round_opening

FOOT = 0.3048


def opening(shape: str, facing: str, width: float, height: float, elevation: float, gravity: float) -> OrificeOutlet:
    return OrificeOutlet(
        "drain", shape, facing, width, height, elevation, 1, 0.6, 0.62, 0.64, "own_coefficient", gravity
    )


def test_dighe_large_rectangular_orifice() -> None:
    # R. S. Dighe, Hydraulics Made Easy, ex. 4.20, p. 132 (read in the FOSSEE companions): 3 ft wide, edges 0.75 ft and
    # 1.5 ft below the surface, C_d 0.62: 709.1 ft³/min.
    hole = opening("rectangle", "side", 3 * FOOT, 0.75 * FOOT, 0.375 * FOOT, 32.2 * FOOT)
    flow = float(hole.flow(np.array(1.5 * FOOT), np.array([0.62])))
    assert flow / FOOT**3 * 60 == pytest.approx(709.1, abs=0.1)


@pytest.mark.parametrize(
    ("covered", "value"),
    [(0.1, 0.00765445142463), (0.25, 0.0458876665293), (0.5, 0.169442616959), (0.75, 0.345081307988), (1.0, 8 / 15)],
)
def test_partly_covered_circle(covered: float, value: float) -> None:
    # Own 30-digit quadrature of ∫ 2·√(y(1 − y))·√(s − y) dy; exactly 8/15 at s = 1.
    assert float(round_opening(np.array(covered))) == pytest.approx(value, rel=1e-11)


@pytest.mark.parametrize("covered", [1e-6, 0.03, 0.4999, 0.6, 0.95, 0.999, 1.001, 1.1, 1.4999, 1.6, 3.0, 50.0, 1e4])
def test_round_opening_against_mpmath(covered: float) -> None:
    with mpmath.workdps(30):
        s = mpmath.mpf(covered)
        exact = mpmath.quad(lambda y: 2 * mpmath.sqrt(y * (1 - y) * (s - y)), mpmath.linspace(0, min(s, 1), 3))
        assert float(round_opening(np.array(covered))) == pytest.approx(float(exact), rel=1e-13)


@pytest.mark.parametrize("depth", [0.01, 0.2, 0.5, 0.51, 2.0, 40.0])
def test_rectangular_opening_against_mpmath(depth: float) -> None:
    height = 0.5
    with mpmath.workdps(30):
        low = max(mpmath.mpf(depth) - height, 0)
        exact = mpmath.quad(mpmath.sqrt, [low, depth])
    assert float(rectangular_opening(np.array(depth), height)) == pytest.approx(float(exact), rel=1e-12)


@pytest.mark.parametrize(
    ("heads_over_diameter", "ratio"),
    [(3.0, 0.9991), (2.0, 0.9980), (1.5, 0.9965), (1.0, 0.9919), (0.75, 0.9850), (0.5, 0.9603)],
)
def test_integrated_circle_against_the_centroid_formula(heads_over_diameter: float, ratio: float) -> None:
    # The ratio of the integrated flow to C_d·a·√(2gH): series 1 − (d/H)²/128 − 5(d/H)⁴/16384 …, own derivation.
    hole = opening("round", "side", 0.1, 0.1, 0.5, 9.80665)
    level = np.array(0.5 + 0.1 * heads_over_diameter)
    centroid = 0.62 * hole.area * np.sqrt(2 * 9.80665 * 0.1 * heads_over_diameter)
    assert float(hole.flow(level, np.array([0.62]))) / centroid == pytest.approx(ratio, abs=6e-5)


def test_sharp_edge_against_bovey_and_unwin() -> None:
    # H. T. Bovey's sharp circular orifice (0.196 in²) at heads of 1 to 20 ft, table in W. C. Unwin, Hydraulics,
    # Encyclopaedia Britannica, 11th ed. (1911), read; and Unwin's formula for Mair's experiments there.
    sharp = entry_coefficient("sharp_edged")
    bovey = [0.620, 0.613, 0.608, 0.607, 0.606, 0.605, 0.604, 0.604, 0.603, 0.603, 0.603]
    mair = [0.6075 + 0.0098 / np.sqrt(head) - 0.0037 * inches for head, inches in [(0.75, 1), (1, 2), (2, 2), (2, 3)]]
    for measured in [*bovey, *mair]:
        assert sharp.low < measured < sharp.high
        assert sharp.typical == pytest.approx(measured, abs=0.015)


def test_sharp_edge_against_the_free_streamline_slot() -> None:
    # Kirchhoff's slot in an infinite wall, C_c = π/(π + 2) = 0.6110, from memory.
    assert entry_coefficient("sharp_edged").typical == pytest.approx(np.pi / (np.pi + 2), abs=0.005)


def test_reentrant_mouthpiece() -> None:
    # Borda 0.5149, Weisbach 0.5324, Bidone 0.5547; theory 0.5: Unwin (1911), read.
    borda = entry_coefficient("reentrant_free")
    assert 0.5 < borda.low <= 0.5149 < 0.5324 < borda.high <= 0.5547


def test_short_tube_running_full() -> None:
    # Measured 0.82 against 0.87 of theory with C_c = 0.64: Unwin (1911), read.
    tube = entry_coefficient("short_tube")
    assert tube.low < 0.82 < tube.high < 1 / np.sqrt(1 + (1 / 0.64 - 1) ** 2)


def test_bellmouth() -> None:
    # Weisbach 0.959 to 0.994: Unwin (1911), read.
    bell = entry_coefficient("bellmouth")
    assert 0.94 < bell.low <= 0.959
    assert bell.high == pytest.approx(0.994, abs=0.005)


def test_rounded_entry_runs_from_short_tube_to_bellmouth() -> None:
    tube, bell = entry_coefficient("short_tube"), entry_coefficient("bellmouth")
    assert entry_coefficient("rounded", 0.1, 0.0).typical == tube.typical
    assert entry_coefficient("rounded", 0.1, 0.015).typical == bell.typical
    # Loss 0.28 at a radius of 0.02 diameters (Idelchik, from memory): C_d = 1/√1.28.
    assert entry_coefficient("rounded", 0.1, 0.002).typical == pytest.approx(1.28**-0.5, abs=0.005)
