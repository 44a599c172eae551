"""Drain time through a pipe, turbulent and viscous, by our quadrature and by a general integrator on the same law."""

from __future__ import annotations

import math
from dataclasses import dataclass

import numpy as np
from scipy.integrate import solve_ivp
from scipy.optimize import brentq

from headfall.outlet.outlet import TYPICAL
from headfall.outlet.pipe import PipeOutlet
from headfall.outlet.pipe_sections import NamedLoss, PipeSection
from headfall.solve.draw_down import run_time
from headfall.solve.span import cut_span
from tests.bench.clock import best

G = 9.80665
AREA, START, STOP = math.pi, 2.8, 0.3
BORE, LENGTH, DROP, ROUGHNESS = 0.0779, 6.0, 1.5, 4.5e-5
ENTRY, BEND, BEND_LAMINAR = 0.5, 0.75, 800.0


@dataclass(frozen=True)
class Fluid:
    """A liquid by its kinematic viscosity [m²/s]."""

    name: str
    viscosity: float


FLUIDS = (Fluid("turbulent, water", 1.003e-6), Fluid("viscous, glycerol", 1.12e-3))


def _pipe(fluid: Fluid) -> PipeOutlet:
    bends = tuple(NamedLoss("elbow", BEND, BEND, BEND, BEND_LAMINAR) for _ in range(2))
    section = PipeSection(BORE, LENGTH, (ROUGHNESS, ROUGHNESS, ROUGHNESS), None, bends)
    entry = NamedLoss("entry", ENTRY, ENTRY, ENTRY)
    return PipeOutlet("line", "drain", 0.0, -DROP, (section,), entry, G, fluid.viscosity)


def _by_quadrature(fluid: Fluid) -> float:
    pipe = _pipe(fluid)
    typical = pipe.coefficients[:, TYPICAL]
    edges = np.array(cut_span(START, STOP, [], []))
    return float(run_time(edges, lambda level: np.full_like(level, AREA), lambda level: pipe.flow(level, typical)))


def _friction(reynolds: float) -> float:
    """64/Re, or the friction factor of Colebrook and White found by a root finder."""
    if reynolds < 2100.0:
        return 64.0 / reynolds

    def residual(root: float) -> float:
        return root + 2.0 * math.log10(ROUGHNESS / BORE / 3.7 + 2.51 * root / reynolds)

    return float(brentq(residual, 1.0, 30.0)) ** -2


def _velocity(head: float, viscosity: float) -> float:
    """The velocity [m/s] that a head [m] drives, by a root finder; the outflow leaves with one velocity head."""

    def residual(velocity: float) -> float:
        reynolds = velocity * BORE / viscosity
        bends = 2.0 * (BEND + BEND_LAMINAR / reynolds)
        kinetic = 2.0 if reynolds < 2100.0 else 1.0
        return (kinetic + ENTRY + bends + _friction(reynolds) * LENGTH / BORE) * velocity**2 / (2 * G) - head

    return float(brentq(residual, 1e-9, 20.0, xtol=1e-13))


def _by_integrator(fluid: Fluid) -> float:
    def rate(_time: float, level: np.ndarray) -> list[float]:
        return [-math.pi / 4 * BORE**2 * _velocity(float(level[0]) + DROP, fluid.viscosity) / AREA]

    def arrival(_time: float, level: np.ndarray) -> float:
        return float(level[0]) - STOP

    arrival.terminal = True  # type: ignore[attr-defined]
    run = solve_ivp(rate, (0.0, 1e6), [START], method="DOP853", rtol=1e-9, atol=1e-12, events=arrival)
    return float(run.t_events[0][0])


def print_pipes() -> None:
    """Print both drain times, how long each took, and by how much ours differs."""
    print("  integrator: scipy.integrate.solve_ivp, DOP853, with scipy.optimize.brentq for the velocity")
    print(f"  {'pipe':22}{'ours':>10}{'integrator':>13}{'ratio':>8}{'drain time':>13}{'difference':>13}")
    for fluid in FLUIDS:
        ours, theirs = best(lambda f=fluid: _by_quadrature(f)), best(lambda f=fluid: _by_integrator(f), repeats=3)
        time, other = _by_quadrature(fluid), _by_integrator(fluid)
        took = f"{1e3 * ours:7.2f} ms{1e3 * theirs:10.1f} ms{theirs / ours:8.0f}"
        print(f"  {fluid.name:22}{took}{time:11.3f} s{time / other - 1:13.1e}")
