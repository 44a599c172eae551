"""Friction, losses, valves and drain times through pipes, against published values and a general-purpose library.

The textbook answer was read in an open collection of worked textbook examples; the closed forms are derived; the values
of Colebrook's equation were solved to 30 digits apart from this program.
"""

from __future__ import annotations

import math

import fluids
import numpy as np
import pytest
from scipy.integrate import solve_ivp

from headfall.outlet.friction import colebrook, friction_factor, laminar
from headfall.outlet.handbook_losses import entry_loss, fitting, fittings, material_roughness, materials
from headfall.outlet.outlet import FREE, Conditions
from headfall.outlet.pipe import PipeOutlet
from headfall.outlet.pipe_sections import NamedLoss, PipeSection, change_of_bore
from headfall.outlet.valve import kv_from_cv, opened, valve_loss
from headfall.solve.draw_down import run_time
from headfall.solve.span import cut_span

G = 9.80665
FOOT = 0.3048


def line(
    bore: float,
    length: float,
    loss: float,
    drop: float = 0.0,
    roughness: float = 0.0,
    fixed: float | None = None,
    viscosity: float = 1.0e-6,
    gravity: float = G,
) -> PipeOutlet:
    """A pipe from level 0 down by ``drop``, all of its losses at the entry."""
    section = PipeSection(bore, length, (roughness,) * 3, fixed)
    return PipeOutlet("line", "drain", 0.0, -drop, (section,), NamedLoss("entry", loss, loss, loss), gravity, viscosity)


def drain_time(outlet: PipeOutlet, area: float, start: float, stop: float) -> float:
    row = outlet.coefficients[:, [1]][..., None]
    edges = np.array(cut_span(start, stop, outlet.edges(1.0, outlet.coefficients[:, 1])))
    return float(run_time(edges, lambda h: np.full_like(h, area), lambda h: outlet.flow(h, row)))


# Friction -----------------------------------------------------------------------------------------------------------

COLEBROOK = [
    (4000.0, 0.0, 0.0399070140556),
    (10000.0, 0.0, 0.0308829503535),
    (100000.0, 0.0, 0.0179897730843),
    (1000000.0, 0.0, 0.011645040998),
    (100000.0, 0.001, 0.0221745359445),
    (1000000.0, 0.0001, 0.0134414376925),
    (10000.0, 0.01, 0.0431265847068),
    (10000000.0, 1e-05, 0.00899571174483),
    (100000000.0, 0.05, 0.0715509040911),
    (500000.0, 0.002, 0.0237888409957),
]


@pytest.mark.parametrize(("reynolds", "rough", "factor"), COLEBROOK)
def test_colebrook_to_twelve_digits(reynolds: float, rough: float, factor: float) -> None:
    assert float(colebrook(np.array(reynolds), rough)) == pytest.approx(factor, rel=1e-11)
    assert float(friction_factor(np.array(reynolds), rough)) == pytest.approx(factor, rel=1e-11)


def test_colebrook_against_the_library() -> None:
    rng = np.random.default_rng(4)
    reynolds, rough = 10 ** rng.uniform(3.61, 8, 200), 10 ** rng.uniform(-6, -1.3, 200)
    found = colebrook(reynolds, rough)
    library = [fluids.friction.Colebrook(re, eD, tol=0) for re, eD in zip(reynolds, rough, strict=True)]
    assert found == pytest.approx(np.array(library), rel=1e-10)


@pytest.mark.parametrize(("reynolds", "factor"), [(100, 0.64), (1000, 0.064), (2000, 0.032)])
def test_laminar_friction(reynolds: float, factor: float) -> None:
    """Hagen–Poiseuille, f = 64/Re (from memory)."""
    assert float(laminar(np.array(float(reynolds)))) == pytest.approx(factor, rel=1e-12)
    assert float(friction_factor(np.array(float(reynolds)), 0.001)) == pytest.approx(factor, rel=1e-12)


def test_bare_switch_at_2100_would_jump_by_sixty_percent() -> None:
    """The blend starts on the laminar side of that jump and ends on Colebrook's, both bounds on either side."""
    here = np.array([2100.0, 2500.0, 3000.0, 3500.0, 4000.0])
    typical, late, early = (friction_factor(here, 0.0005, side) for side in (0.0, 1.0, -1.0))
    assert typical[0] == pytest.approx(64 / 2100, rel=1e-12)
    assert float(colebrook(here[:1], 0.0005)[0]) / typical[0] == pytest.approx(1.6, abs=0.05)
    assert typical[-1] == pytest.approx(float(colebrook(here[-1:], 0.0005)[0]), rel=1e-12)
    assert np.all(late <= typical + 1e-15) and np.all(typical <= early + 1e-15)
    assert late[3] == pytest.approx(64 / 3500) and early[2] == pytest.approx(float(colebrook(here[2:3], 0.0005)[0]))


# Losses -------------------------------------------------------------------------------------------------------------


def test_entry_losses_within_what_the_authors_differ_by() -> None:
    """Crane TP-410, Idelchik and Rennels as the library carries them: 0.5, 0.78, 0.04."""
    sharp, inward, rounded = (
        entry_loss("sharp_edged", 0.1),
        entry_loss("reentrant_full", 0.1),
        entry_loss("bellmouth", 0.1),
    )
    assert sharp.low - 0.03 <= fluids.fittings.entrance_sharp() <= sharp.high
    assert sharp.typical == 0.5
    assert inward.low <= 0.78 <= inward.high
    assert rounded.typical == pytest.approx(0.04)
    assert entry_loss("rounded", 0.1, 0.015).typical == pytest.approx(rounded.typical)
    assert entry_loss("rounded", 0.1, 0.0).typical == pytest.approx(sharp.typical)


def test_sudden_changes_against_the_library() -> None:
    loss, on_next = change_of_bore(0.05, 0.1)
    assert not on_next
    assert loss == pytest.approx(fluids.fittings.diffuser_sharp(0.05, 0.1), rel=1e-12)
    loss, on_next = change_of_bore(0.1, 0.05)
    assert on_next
    # Crane TP-410's contraction with a flat shoulder, on the smaller bore.
    assert loss == pytest.approx(fluids.fittings.contraction_conical_Crane(Di1=0.1, Di2=0.05, angle=180), rel=1e-9)


def test_handbook_names() -> None:
    elbow = fitting("Elbow 90")
    assert elbow is not None and (elbow.low, elbow.typical, elbow.high, elbow.laminar) == (0.5, 0.75, 0.9, 800)
    assert fitting("long-radius elbow") is not None and fitting("flux capacitor") is None
    assert all(one.low <= one.typical <= one.high for one in fittings())
    assert material_roughness("new commercial steel") == pytest.approx((3e-5, 4.5e-5, 9e-5))
    assert material_roughness("cheese") is None and "concrete" in materials()


def test_two_k_constants_of_the_library() -> None:
    """Hooper's K1, by the library's table: 800 of elbows and butterfly valves, 300 of gate and ball, 1500 of globe."""
    hooper = fluids.fittings.Hooper
    assert fitting("90 elbow").laminar == hooper["Elbow, 90°, Standard (R/D = 1), Screwed"][0]  # type: ignore[union-attr]
    assert fitting("gate valve").laminar == hooper["Valve, Gate, Full line size, Beta = 1"][0]  # type: ignore[union-attr]
    assert fitting("globe valve").laminar == hooper["Valve, Globe, Standard"][0]  # type: ignore[union-attr]


def test_valve_constants() -> None:
    assert valve_loss(100.0, 0.08) == pytest.approx(6.549, abs=0.0006)
    assert valve_loss(10.0, 0.05) == pytest.approx(99.92974456105979, rel=1e-9)
    # The library counts water at 999 kg/m³ or so.
    assert valve_loss(10.0, 0.05) == pytest.approx(fluids.fittings.Kv_to_K(10.0, 0.05), rel=1e-3)
    assert 10.0 / kv_from_cv(10.0) == pytest.approx(1.156, abs=5e-4)
    flow = math.sqrt(0.2) * 10.0
    speed = flow / 3600 / (math.pi / 4 * 0.05**2)
    assert valve_loss(10.0, 0.05) * 1000 * speed**2 / 2 == pytest.approx(0.2e5, rel=1e-12)


def test_valve_characteristics() -> None:
    assert opened(100.0, 0.5, "linear") == 50.0 and opened(100.0, 1.0, "equal_percentage") == 100.0
    assert opened(100.0, 0.5, "equal_percentage") == pytest.approx(100 / math.sqrt(50))
    assert opened(100.0, 0.02, "equal_percentage") == 0.0 and math.isinf(valve_loss(0.0, 0.1))


# Drain times --------------------------------------------------------------------------------------------------------


def test_prism_through_a_line_with_fixed_friction() -> None:
    """t = (A/a)·√(2·(α + ΣK + f·L/d)/g)·(√(h0 + Δz) − √(h1 + Δz)): 411.535 s."""
    found = drain_time(line(0.08, 12.0, 2.5, 1.5, fixed=0.019), 3.0, 2.0, 0.1)
    ratio = 3.0 / (math.pi / 4 * 0.08**2)
    closed = ratio * math.sqrt(2 * (1 + 2.5 + 0.019 * 12 / 0.08) / G) * (math.sqrt(3.5) - math.sqrt(1.6))
    assert found == pytest.approx(411.535, abs=0.0006)
    assert found == pytest.approx(closed, rel=1e-12)


def test_reservoir_through_1500_feet_of_pipe() -> None:
    """J. Lal, Hydraulics, Ex. 5.18 p. 164: 25 h; losses entry 0.5 and exit 1, Fanning f 0.0075, g 32.2 ft/s²."""
    outlet = line(0.5 * FOOT, 1500 * FOOT, 0.5, 0.0, fixed=4 * 0.0075, gravity=32.2 * FOOT)
    found = drain_time(outlet, 10000 * FOOT**2, 50 * FOOT, 40 * FOOT) / 3600
    assert found == pytest.approx(25.1769, abs=0.0006)
    assert found == pytest.approx(25, abs=0.5)


def test_tank_through_twenty_metres_of_steel_pipe() -> None:
    """Friction by Colebrook at every level: 9245.017 s, two integrations elsewhere agreeing."""
    outlet = line(0.05, 20.0, 0.5, 1.0, roughness=4.5e-5, viscosity=1.0035e-6)
    assert drain_time(outlet, math.pi * 4, 3.0, 0.0) == pytest.approx(9245.017, rel=1e-6)


def test_laminar_line_empties_exponentially() -> None:
    """t = (128·ν·L·A/(π·g·d⁴))·ln((h0 + Δz)/(h1 + Δz)), entry and kinetic term made small by a long narrow line."""
    outlet = line(0.01, 60.0, 0.0, 0.5, roughness=1e-6, viscosity=1e-4)
    found = drain_time(outlet, 0.5, 1.0, 0.1)
    closed = 128 * 1e-4 * 60.0 * 0.5 / (math.pi * G * 0.01**4) * math.log(1.5 / 0.6)
    # The kinetic term of 2 beside f·L/d of some thousands.
    assert found == pytest.approx(closed, rel=2e-3)
    assert found > closed


@pytest.mark.parametrize("viscosity", [1e-6, 2e-5, 1e-3])
def test_drain_time_against_an_integrator(viscosity: float) -> None:
    outlet = line(0.08, 9.0, 1.5, 1.1, roughness=4.5e-5, viscosity=viscosity)
    row = outlet.coefficients[:, 1]
    found = drain_time(outlet, 3.8, 2.6, 0.1)

    def falls(_time: float, level: np.ndarray) -> np.ndarray:
        return -outlet.flow(level, row) / 3.8

    def there(_time: float, level: np.ndarray) -> float:
        return float(level[0]) - 0.1

    there.terminal = True  # type: ignore[attr-defined]
    run = solve_ivp(falls, (0, 3 * found), [2.6], events=there, rtol=1e-10, atol=1e-12, method="DOP853")
    assert found == pytest.approx(float(run.t_events[0][0]), rel=1e-8)


def test_velocity_energy_and_library_agree() -> None:
    """Bernoulli with the library's friction factor at the velocity found."""
    outlet = line(0.10226, 6.0, 1.15, 1.2, roughness=4.5e-5, viscosity=1.9e-3 / 1109)
    speed = float(outlet.flow(np.array([1.511]), outlet.coefficients[:, 1])[0]) / outlet.area
    factor = fluids.friction_factor(Re=speed * 0.10226 / outlet.viscosity, eD=4.5e-5 / 0.10226, Method="Colebrook")
    head = (1 + 1.15 + factor * 6.0 / 0.10226) * speed**2 / (2 * G)
    assert head == pytest.approx(2.711, rel=1e-9)


def test_a_drowned_end_loses_once_and_lets_liquid_back() -> None:
    outlet = line(0.1, 0.0, 0.5, 0.0, fixed=0.02)
    row = outlet.coefficients[:, [1]]
    out = float(outlet.flow(np.array([2.0]), row, 1.0, Conditions(0.0, 1.0))[0])
    back = float(outlet.flow(np.array([1.0]), row, 1.0, Conditions(0.0, 2.0))[0])
    free = float(outlet.flow(np.array([1.0]), row, 1.0, FREE)[0])
    assert out == pytest.approx(free, rel=1e-12) == pytest.approx(-back, rel=1e-12)
