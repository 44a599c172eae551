"""Drain time by our quadrature and by a general integrator, both against the closed form to 30 digits."""

from __future__ import annotations

import math
from collections.abc import Callable
from dataclasses import dataclass
from typing import Any

import mpmath
import numpy as np
from scipy.integrate import solve_ivp

from headfall.outlet.orifice import OrificeOutlet
from headfall.solve.draw_down import run_time
from headfall.solve.span import cut_span
from headfall.vessel import ends
from headfall.vessel.cone import Cone
from headfall.vessel.drum import Drum
from headfall.vessel.profile import Profile
from headfall.vessel.sphere import Sphere
from headfall.vessel.upright_cylinder import UprightCylinder
from tests.bench.clock import best

mpmath.mp.dps = 30
G = 9.80665
BORE, COEFFICIENT = 0.08, 0.61
OUTLET = OrificeOutlet("drain", "round", "down", BORE, BORE, 0.0, 1, 0.59, COEFFICIENT, 0.63, "unwin_1911", G)
STRENGTH = COEFFICIENT * math.pi / 4 * BORE**2 * math.sqrt(2 * G)
# The same numbers without rounding: the truth is that of the floats that both solvers are given.
EXACT_STRENGTH = mpmath.mpf(COEFFICIENT) * mpmath.pi / 4 * mpmath.mpf(BORE) ** 2 * mpmath.sqrt(2 * mpmath.mpf(G))


@dataclass(frozen=True)
class Problem:
    """A draw-down with its closed form; ``area`` is a plain function, as an integrator likes it best."""

    name: str
    profile: Profile
    start: float
    stop: float
    inflow: float
    area: Callable[[float], float]
    truth: Any


def _problems() -> list[Problem]:
    cylinder = UprightCylinder(2.0, 3.0, ends.flat())
    plan = math.pi
    found = [
        Problem("upright cylinder", cylinder, 2.8, 0.1, 0.0, lambda h: plan, _cylinder(2.0, 2.8, 0.1, 0.0)),
        Problem("cone", Cone(2.0, 0.0, 2.0), 2.0, 0.05, 0.0, lambda h: math.pi * (h / 2.0) ** 2, _cone(2.0, 0.05)),
        Problem(
            "drum, flat ends",
            Drum(2.0, 6.0, ends.flat(), ends.flat()),
            1.9,
            0.05,
            0.0,
            lambda h: 12.0 * math.sqrt(h * (2.0 - h)),
            _drum(6.0, 2.0, 1.9, 0.05),
        ),
        Problem("sphere", Sphere(2.0), 1.9, 0.05, 0.0, lambda h: math.pi * h * (2.0 - h), _sphere(1.0, 1.9, 0.05)),
    ]
    inflow = 0.008
    rest = (inflow / STRENGTH) ** 2
    for part in (1e-2, 1e-3, 1e-6):
        # The span runs from the start to the equilibrium; this part of it is left at the stop.
        stop = rest + part * (2.8 - rest)
        name = f"cylinder, inflow, {part:.0e} from rest"
        found.append(Problem(name, cylinder, 2.8, stop, inflow, lambda h: plan, _cylinder(2.0, 2.8, stop, inflow)))
    return found


def _cylinder(diameter: float, start: float, stop: float, inflow: float) -> Any:
    """t = (2A/c)·[√h0 − √h1 + (q/c)·ln((c√h0 − q)/(c√h1 − q))]."""
    area, c, q = mpmath.pi * mpmath.mpf(diameter) ** 2 / 4, EXACT_STRENGTH, mpmath.mpf(inflow)
    root0, root1 = mpmath.sqrt(mpmath.mpf(start)), mpmath.sqrt(mpmath.mpf(stop))
    logarithm = mpmath.log((c * root0 - q) / (c * root1 - q))
    return 2 * area / c * (root0 - root1 + q / c * logarithm)


def _cone(start: float, stop: float) -> Any:
    """t = (2/5)·(π/4)·(h0^2.5 − h1^2.5)/c for a cone as wide as it is high, apex down."""
    return mpmath.pi / 10 * (mpmath.mpf(start) ** 2.5 - mpmath.mpf(stop) ** 2.5) / EXACT_STRENGTH


def _drum(length: float, diameter: float, start: float, stop: float) -> Any:
    """t = (4L/3c)·[(D − h1)^1.5 − (D − h0)^1.5]."""
    high, low = diameter - mpmath.mpf(stop), diameter - mpmath.mpf(start)
    return 4 * mpmath.mpf(length) / (3 * EXACT_STRENGTH) * (high ** mpmath.mpf(1.5) - low ** mpmath.mpf(1.5))


def _sphere(radius: float, start: float, stop: float) -> Any:
    """t = (π/c)·[(4/3)·R·h^1.5 − (2/5)·h^2.5] between the levels."""

    def primitive(level: float) -> Any:
        h = mpmath.mpf(level)
        return mpmath.mpf(4) / 3 * radius * h ** mpmath.mpf(1.5) - mpmath.mpf(2) / 5 * h ** mpmath.mpf(2.5)

    return mpmath.pi / EXACT_STRENGTH * (primitive(start) - primitive(stop))


@dataclass(frozen=True)
class _Arrival:
    """An event as ``solve_ivp`` wants it: nil at the stop, and the end of the run."""

    stop: float
    terminal: bool = True

    def __call__(self, _time: float, level: Any) -> float:
        return float(level[0] - self.stop)


def _by_quadrature(problem: Problem) -> float:
    poles = [(problem.inflow / STRENGTH) ** 2] if problem.inflow else []
    edges = np.array(cut_span(problem.start, problem.stop, [*problem.profile.breakpoints, 0.0], poles))

    def net_outflow(level: Any) -> Any:
        return OUTLET.flow(level, np.array([COEFFICIENT])) - problem.inflow

    return float(run_time(edges, problem.profile.plan_area, net_outflow))


def _by_integrator(problem: Problem) -> float:
    def rate(_time: float, level: Any) -> list[float]:
        # Trial steps reach beyond the stop, where a level may be nil or less and the area with it.
        h = max(float(level[0]), 1e-6)
        return [(problem.inflow - STRENGTH * math.sqrt(h)) / problem.area(h)]

    longest = 10.0 * float(problem.truth)
    run = solve_ivp(
        rate, (0.0, longest), [problem.start], method="DOP853", rtol=1e-9, atol=1e-12, events=_Arrival(problem.stop)
    )
    return float(run.t_events[0][0]) if run.t_events[0].size else math.nan


def print_drain_times() -> None:
    """Print, for each problem, both times of computing and both relative deviations from the truth."""
    print("  integrator: scipy.integrate.solve_ivp, DOP853, rtol 1e-9, atol 1e-12, stopped by an event")
    print(f"  {'problem':34}{'ours':>10}{'integrator':>12}{'ratio':>8}{'ours off by':>14}{'integrator off by':>19}")
    for problem in _problems():
        ours, theirs = best(lambda p=problem: _by_quadrature(p)), best(lambda p=problem: _by_integrator(p), repeats=3)
        off = [float(abs(mpmath.mpf(solve(problem)) / problem.truth - 1)) for solve in (_by_quadrature, _by_integrator)]
        times = f"{1e6 * ours:7.0f} µs{1e3 * theirs:9.2f} ms{theirs / ours:8.0f}"
        print(f"  {problem.name:34}{times}{off[0]:14.1e}{off[1]:19.1e}")
