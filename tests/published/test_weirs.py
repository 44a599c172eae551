"""Weirs against worked textbook examples, the standard's formulas and a general-purpose library.

The textbook answers were read in an open collection of worked textbook examples. ISO 1438's coefficients are from
memory.
"""

from __future__ import annotations

import math

import fluids
import numpy as np
import pytest
from scipy.integrate import quad

from headfall.outlet.outlet import Conditions
from headfall.outlet.standpipe import Standpipe
from headfall.outlet.weir import Weir
from headfall.solve.draw_down import run_time
from headfall.solve.span import cut_span

G = 9.80665
FOOT = 0.3048


def passed(weir: Weir | Standpipe, head: float, **conditions: float) -> float:
    """The typical flow [m³/s] at a head."""
    level = np.array([weir.crest + head])
    row = weir.coefficients[:, [1]]
    if not conditions:
        return float(weir.flow(level, row)[0])
    return float(weir.flow(level, row, 1.0, Conditions(**conditions))[0])


def own(form: str, coefficient: float, gravity: float = G, **sizes: float) -> Weir:
    return Weir("weir", "drain", form, 1.0, gravity, given=(coefficient,) * 3, **sizes)


def lowering_time(weir: Weir, area: float, first: float, last: float) -> float:
    """Time [s] from one head to another over a constant area."""
    row = weir.coefficients[:, [1]][..., None]
    edges = np.array(cut_span(weir.crest + first, weir.crest + last, weir.edges()))
    return float(run_time(edges, lambda h: np.full_like(h, area), lambda h: weir.flow(h, row)))


def test_rectangular_notch_of_choudhary_and_prakash() -> None:
    """A. K. Choudhary & Om Prakash, Fluid Mechanics, Ex. 11.4 p. 329: 0.0228 m³/s."""
    assert passed(own("rectangular", 0.62, 9.81, width=0.3), 0.12) == pytest.approx(0.0228, abs=5e-5)


def test_v_notch_of_choudhary_and_prakash() -> None:
    """The same, Ex. 11.6 p. 331: 1572 L/min."""
    found = passed(own("vnotch", 0.62, 9.81, angle=math.pi / 2), 0.2)
    assert found * 60000 == pytest.approx(1572, abs=0.6)


def test_lowering_a_reservoir_over_a_weir() -> None:
    """The same, Ex. 11.8 p. 335: 220 m² over 0.3 m from 0.168 to 0.068 m, 1066 s."""
    weir = own("rectangular", 0.65, 9.81, width=0.3)
    assert lowering_time(weir, 220.0, 0.168, 0.068) == pytest.approx(1066, abs=1.0)


def test_basin_lowered_over_a_weir_in_closed_form() -> None:
    """t = (2A/k)·(H1^−½ − H0^−½), k = (2/3)·C·b·√(2g): 361.4254760273495 s."""
    weir = own("rectangular", 0.62, width=0.4)
    assert lowering_time(weir, 50.0, 0.3, 0.05) == pytest.approx(361.4254760273495, rel=1e-10)


def test_plain_coefficient_of_lal() -> None:
    """J. Lal, Hydraulics, Ex. 4.5 p. 108: 7.573 ft at 1.2 ft with C 0.62, 33.02 ft³/s."""
    found = passed(own("rectangular", 0.62, 32.2 * FOOT, width=7.573 * FOOT), 1.2 * FOOT)
    assert found / FOOT**3 == pytest.approx(33.02, abs=0.01)


FULL_WIDTH = [
    (1.0, 0.1, 0.5, 0.058798299),
    (1.0, 0.2, 0.5, 0.16925306),
    (1.0, 0.3, 0.5, 0.31811261),
    (0.5, 0.15, 0.3, 0.055850918),
]


@pytest.mark.parametrize(("width", "head", "crest", "flow"), FULL_WIDTH)
def test_full_width_weir(width: float, head: float, crest: float, flow: float) -> None:
    """Rehbock's formula, worked apart; the library's version of it agrees within a fifth of a percent."""
    weir = Weir("weir", "drain", "rectangular", crest, G, width=width, channel_width=width)
    assert passed(weir, head) == pytest.approx(flow, rel=1e-6)
    library = fluids.open_flow.Q_weir_rectangular_full_Rehbock(head, crest, width)
    assert passed(weir, head) == pytest.approx(library, rel=2e-3)


def test_full_width_of_lal_by_rehbock() -> None:
    """J. Lal, Ex. 4.5 p. 108: 34.12 ft³/s by an older form of the same author's formula."""
    width = 7.573 * FOOT
    weir = Weir("weir", "drain", "rectangular", 2.85 * FOOT, 32.2 * FOOT, width=width, channel_width=width)
    assert passed(weir, 1.2 * FOOT) / FOOT**3 == pytest.approx(34.12, rel=3e-3)


@pytest.mark.parametrize(("width", "head"), [(0.4, 0.2), (0.4, 0.1), (0.6, 0.25)])
def test_contracted_notch_against_the_swiss_formula(width: float, head: float) -> None:
    """The contracted notch of the Swiss society of engineers (SIA 1926, from memory) in a channel of 1 m."""
    weir = Weir("weir", "drain", "rectangular", 0.5, G, width=width, channel_width=1.0)
    ratio = width**2
    coefficient = 0.544 * (1 + 0.064 * ratio + (0.00626 - 0.00519 * ratio) / (head + 0.0016))
    coefficient *= 1 + 0.5 * ratio**2 * (head / (head + 0.5)) ** 2
    assert passed(weir, head) == pytest.approx(coefficient * width * math.sqrt(G) * head**1.5, rel=0.015)


NOTCH = [(0.05, 0.7960297), (0.06, 1.246962), (0.1, 4.409523), (0.15, 12.06605), (0.2, 24.68207), (0.3, 67.77616)]


@pytest.mark.parametrize(("head", "flow"), NOTCH)
def test_right_angled_notch_by_kindsvater_and_shen(head: float, flow: float) -> None:
    """C_e 0.578 and 0.85 mm (ISO 1438, from memory), worked apart."""
    weir = Weir("weir", "drain", "vnotch", 1.0, G, angle=math.pi / 2)
    assert passed(weir, head) * 1000 == pytest.approx(flow, rel=1e-6)


@pytest.mark.parametrize(("head", "flow"), [(0.05, 0.803), (0.06, 1.257)])
def test_right_angled_notch_against_the_standard_table(head: float, flow: float) -> None:
    """Two rows of ISO 1438's table, L/s (from memory)."""
    weir = Weir("weir", "drain", "vnotch", 1.0, G, angle=math.pi / 2)
    assert passed(weir, head) * 1000 == pytest.approx(flow, rel=0.01)


def test_broad_crest() -> None:
    """Q = 1.7046·C·b·H^1.5: critical flow over the crest."""
    weir = own("broad_crested", 1.0, width=2.0)
    depth = 2 / 3 * 0.4
    assert passed(weir, 0.4) == pytest.approx(2.0 * depth * math.sqrt(G * depth), rel=1e-12)
    assert passed(weir, 1.0) / 2.0 == pytest.approx(1.7046, abs=2e-4)


@pytest.mark.parametrize(("ratio", "share"), [(0.5, 0.845), (0.8, 0.616)])
def test_submergence_by_villemonte(ratio: float, share: float) -> None:
    weir = own("rectangular", 0.611, width=1.0)
    drowned = passed(weir, 0.3, tailwater=1.0 + 0.3 * ratio)
    assert drowned / passed(weir, 0.3) == pytest.approx(share, abs=6e-4)
    back = passed(weir, 0.3 * ratio, tailwater=1.3)
    assert back == pytest.approx(-drowned, rel=1e-12)


def test_standpipe_from_rim_to_orifice_to_full_pipe() -> None:
    """Weir and orifice pass alike at H/D 0.36 to 0.44 over the range of the rim's coefficient, 0.39 at 1.7."""
    pipe = Standpipe("pipe", "overflow", 0.2, 1.0, G)
    assert pipe.control(1.02) == "weir" and pipe.control(1.3) == "orifice"
    changed = pipe.edges()[1]
    assert (changed - 1.0) / 0.2 == pytest.approx(0.39, abs=0.006)
    assert passed(pipe, 0.02) == pytest.approx(1.7 * math.pi * 0.2 * 0.02**1.5, rel=1e-12)
    assert passed(pipe, 0.3) == pytest.approx(0.6 * math.pi / 4 * 0.04 * math.sqrt(2 * G * 0.3), rel=1e-12)


def test_draw_down_over_a_v_notch_against_quadrature() -> None:
    weir = Weir("weir", "drain", "vnotch", 0.5, G, angle=1.0)
    found = lowering_time(weir, 12.0, 0.4, 0.03)
    row = weir.coefficients[:, [1]]
    exact = quad(lambda h: 12.0 / float(weir.flow(np.array([h]), row)[0]), 0.53, 0.9, epsrel=1e-12)[0]
    assert found == pytest.approx(exact, rel=1e-9)
