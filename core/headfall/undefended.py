"""The parts of a run over which the model is not to be believed."""

from __future__ import annotations

from collections.abc import Callable

import numpy as np
import numpy.typing as npt

from headfall.answers import DoubtfulPart
from headfall.checks.dip import dip_level
from headfall.discharge import Receiver
from headfall.outlet.headspace import ClosedHeadspace, PressurisedHeadspace
from headfall.outlet.orifice import OrificeOutlet
from headfall.outlet.outlet import Conditions, Outlet
from headfall.outlet.pipe import PipeOutlet
from headfall.runs import Runs

Array = npt.NDArray[np.float64]

_TYPICAL = 1


def undefended_parts(runs: Runs) -> tuple[DoubtfulPart, ...]:
    """Return the spans of level that the typical run passes through where an outlet's law fails, lowest first.

    Below the dip level air goes out with the liquid; the rest is each outlet's own: the transition between laminar and
    turbulent flow, an opening partly covered, an orifice below the handbook's Reynolds numbers, a standpipe between
    weir and orifice.
    """
    curve = runs.curves[_TYPICAL]
    lowest, highest = float(curve.level.min()), float(curve.level.max())
    pressure = runs.system.headspace
    gauge = pressure.pressure_head if isinstance(pressure, PressurisedHeadspace) else 0.0
    found: list[DoubtfulPart] = []
    for place, outlet in enumerate(runs.system.outlets):
        tail = runs.discharge.tailwaters[place]
        conditions = Conditions(gauge, -np.inf if isinstance(tail, Receiver) else tail)
        spans = [(s.low, s.high, s.why) for s in outlet.doubtful(outlet.coefficients[:, _TYPICAL], conditions)]
        if isinstance(outlet, OrificeOutlet | PipeOutlet):
            spans.append((outlet.lower_edge, dip_level_of(runs, place), "dip"))
        for low, high, why in spans:
            part = (max(low, lowest), min(high, highest))
            if part[1] - part[0] > runs.system.tolerance:
                found.append(DoubtfulPart(outlet.name, *part, why))
    return tuple(sorted(found, key=lambda part: (part.low, part.high)))


def dip_level_of(runs: Runs, place: int) -> float:
    """Return the level [m] down to which no air is drawn into an opening or a pipe, by its typical flow."""
    outlet = runs.system.outlets[place]
    return dip_level(
        flow_of_one(runs, place),
        facing=facing_of(outlet),
        elevation=outlet.elevation,
        top=_highest(runs),
        gravity=runs.system.gravity,
    )


def _highest(runs: Runs) -> float:
    """The highest level to look at: of a closed gas, which holds the liquid lower down, the run's own."""
    closed = isinstance(runs.system.headspace, ClosedHeadspace)
    return float(runs.curves[_TYPICAL].level.max()) if closed else runs.system.profile.height


def facing_of(outlet: Outlet) -> str:
    """Return ``down`` or ``side``; the inlet of a pipe counts as facing down."""
    return outlet.facing if isinstance(outlet, OrificeOutlet) else "down"


def flow_of_one(runs: Runs, place: int) -> Callable[[Array], Array]:
    """Return the flow of one of an outlet's alike openings [m³/s] as a function of levels [m], typical coefficients."""
    rows = runs.rows([_TYPICAL])
    outlet = runs.system.outlets[place]
    count = outlet.count if isinstance(outlet, OrificeOutlet | PipeOutlet) else 1
    return lambda level: np.maximum(runs.still.each(level, rows)[place], 0.0) / count
