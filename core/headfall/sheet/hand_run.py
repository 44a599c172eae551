"""The run whose time a checker redoes by hand."""

from __future__ import annotations

import math
from dataclasses import dataclass

import numpy as np

from headfall.answers import Answers
from headfall.case.model import Case
from headfall.discharge import Discharge
from headfall.outlet.orifice import OrificeOutlet
from headfall.outlet.outlet import TYPICAL, Outlet
from headfall.sheet.model import Table
from headfall.vessel.profile import Profile


@dataclass(frozen=True, slots=True)
class HandRun:
    """From level ``first`` to level ``last`` [m] in ``time`` [s], as the solver found it, typical coefficients."""

    case: Case
    profile: Profile
    flows: Discharge
    inflow: float
    gravity: float
    first: float
    last: float
    time: float
    goal: str

    @property
    def outlets(self) -> tuple[Outlet, ...]:
        """All outlets."""
        return self.flows.outlets

    @property
    def plain_openings(self) -> tuple[OrificeOutlet, ...]:
        """The outlets where all are openings with a constant coefficient, discharging freely; nothing else."""
        found = tuple(o for o in self.outlets if isinstance(o, OrificeOutlet) and o.is_plain)
        return found if len(found) == len(self.outlets) and self.flows.is_free else ()

    def outflow(self, level: float) -> float:
        """Return the outflow of all outlets [m³/s] at the level [m]."""
        rows = [row[:, [TYPICAL]] for row in self.flows.coefficients]
        return float(self.flows.flow(np.array([level]), rows)[0])

    def volume(self, level: float) -> float:
        """Return the volume [m³] at the level [m]."""
        return float(self.profile.volume(np.array([level]))[0])

    @property
    def plane(self) -> float | None:
        """The one plane [m] in which all outlets lie, facing down; None where there is none, or a head would be nil."""
        planes = {outlet.elevation for outlet in self.plain_openings}
        if len(planes) != 1 or any(outlet.facing != "down" for outlet in self.plain_openings):
            return None
        plane = planes.pop()
        return plane if min(self.first, self.last) >= plane else None

    @property
    def discharge(self) -> float:
        """Outflow over the root of the head, Σ C_d·a·√(2g) [m^2.5/s]."""
        total = sum(outlet.coefficient_typical * open_area(outlet) for outlet in self.plain_openings)
        return total * math.sqrt(2 * self.gravity)


def open_area(outlet: OrificeOutlet) -> float:
    """Return the area [m²] that is not blocked."""
    return outlet.area * (1 - outlet.blocked)


@dataclass(frozen=True, slots=True)
class HandCalculation:
    """A calculation in printed figures and what it comes to [s]; ``rule`` says in a line what was done."""

    lines: tuple[str, ...]
    seconds: float
    table: Table | None = None


def hand_run(answers: Answers) -> HandRun | None:
    """Return the run behind the main answer, or None where that is a level and not a time."""
    system, run = answers.system, answers.draw_down
    if run.reaches_stop and run.time.typical:
        last, time, goal = system.stop, run.time.typical, "stop"
    elif run.time_to_overflow.typical:
        last, time, goal = system.overflow, run.time_to_overflow.typical, "overflow"
    else:
        return None
    return HandRun(
        answers.case, system.profile, system.discharge, system.inflow, system.gravity, system.start, last, time, goal
    )
