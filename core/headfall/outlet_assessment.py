"""The checks of the outlets: where each outlet's numbers are handed to them."""

from __future__ import annotations

import numpy as np
import numpy.typing as npt

from headfall.answers import DoubtfulPart, DrawDown
from headfall.case import model
from headfall.case.defaults import effective
from headfall.case.model import Case
from headfall.checks.dip import check_dip
from headfall.checks.finding import Finding
from headfall.checks.laminar_losses import check_laminar_losses
from headfall.checks.large_outlet import check_large_outlet
from headfall.checks.low_reynolds import check_low_reynolds
from headfall.checks.nominal_size import check_nominal_size, is_made_of_pipe
from headfall.checks.thick_plate import check_thick_plate
from headfall.checks.transition import check_transition
from headfall.discharge import Receiver
from headfall.outlet.entries import entry_coefficient
from headfall.outlet.headspace import ClosedHeadspace
from headfall.outlet.orifice import OrificeOutlet
from headfall.outlet.outlet import Outlet
from headfall.outlet.pipe import PipeOutlet
from headfall.quantities import DisplayUnits
from headfall.quantities.listed_bores import series_of
from headfall.runs import Runs
from headfall.undefended import dip_level_of, flow_of_one

Array = npt.NDArray[np.float64]

_TYPICAL = 1
_FULL_JET = ("rounded", "bellmouth", "short_tube", "reentrant_full")
_CONTRACTED, _NOT_CONTRACTED = 0.62, 1.0
_LAST_HEAD = 0.01
"""Of the highest head: what is left below it of an approach to rest is the last of it."""


def outlet_findings(
    case: Case, runs: Runs, draw_down: DrawDown, doubtful: tuple[DoubtfulPart, ...], display: DisplayUnits
) -> list[Finding]:
    """Return the findings of the checks that look at each outlet, and of their size against the surface."""
    findings: list[Finding] = []
    for index, (typed, outlet) in enumerate(zip(case.outlets, runs.system.outlets, strict=True)):
        name = outlet.name if len(runs.system.outlets) > 1 else "the outlet"
        if isinstance(typed, model.Orifice) and isinstance(outlet, OrificeOutlet):
            dip = dip_level_of(runs, index)
            findings += _dip_check(runs, index, name, dip, display)
            findings += _orifice_checks(runs, index, name, typed, outlet, dip, draw_down, display)
        elif isinstance(typed, model.Pipe) and isinstance(outlet, PipeOutlet):
            dip = dip_level_of(runs, index)
            findings += _dip_check(runs, index, name, dip, display)
            findings += _pipe_checks(runs, index, name, typed, outlet, dip, draw_down, doubtful, display)
    return findings + _surface_check(case, runs, display)


def lowest_outlet(runs: Runs) -> int:
    """Return the index of the outlet that runs dry last."""
    outlets = runs.system.outlets
    return min(range(len(outlets)), key=lambda index: outlets[index].lower_edge)


def form_of(outlet: Outlet) -> str:
    """Return what the sentences call an outlet's edge by: ``down``, ``side``, ``pipe``, ``rising_pipe`` or ``weir``."""
    if isinstance(outlet, OrificeOutlet):
        return outlet.facing
    if isinstance(outlet, PipeOutlet):
        return "rising_pipe" if outlet.discharge_elevation > outlet.elevation else "pipe"
    return "weir"


def _dip_check(runs: Runs, index: int, name: str, dip: float, display: DisplayUnits) -> list[Finding]:
    outlet, lowest, stop = runs.system.outlets[index], float(runs.curves[_TYPICAL].level.min()), runs.system.stop
    # Where the last of a laminar flow takes for ever the run ends a hair above its stop.
    lowest = stop if abs(lowest - stop) <= 2 * runs.system.tolerance else lowest
    others_go_on = runs.heel < outlet.lower_edge - runs.system.tolerance
    return check_dip(
        outlet=name,
        level=dip,
        lowest=lowest,
        tolerance=runs.system.tolerance,
        runs_dry=others_go_on and float(flow_of_one(runs, index)(np.array([lowest]))[0]) <= 0.0,
        display=display,
    )


def _orifice_checks(
    runs: Runs,
    index: int,
    name: str,
    typed: model.Orifice,
    outlet: OrificeOutlet,
    dip: float,
    draw_down: DrawDown,
    display: DisplayUnits,
) -> list[Finding]:
    entry, place = effective(typed, "entry"), f"outlets[{index}]"
    findings = check_nominal_size(
        outlet=name,
        made_of_pipe=is_made_of_pipe(entry),
        diameter=outlet.width if outlet.shape == "round" else None,
        display=display,
        place=f"{place}.opening" + (".diameter" if outlet.shape == "round" else ""),
    )
    if isinstance(typed.coefficient, model.CoefficientRange):
        return findings
    findings += _low_reynolds_check(runs, index, name, outlet, dip, display)
    if entry == "thick_plate":
        alone = len(runs.system.outlets) == 1 and not isinstance(runs.system.headspace, ClosedHeadspace)
        handbook = entry_coefficient(entry)
        findings += check_thick_plate(
            outlet=name,
            thickness=typed.thickness.value if typed.thickness is not None else None,
            size=min(outlet.width, outlet.height),
            low=handbook.low,
            high=handbook.high,
            time=draw_down.time if alone else None,
            display=display,
            place=f"{place}.thickness",
        )
    return findings


def _low_reynolds_check(
    runs: Runs, index: int, name: str, outlet: OrificeOutlet, dip: float, display: DisplayUnits
) -> list[Finding]:
    curve, liquid = runs.curves[_TYPICAL], runs.system.liquid
    heads = _heads(runs, index, curve.level)
    speed = np.sqrt(2 * runs.system.gravity * heads)
    reynolds = min(outlet.width, outlet.height) * speed * liquid.density / liquid.viscosity
    if float(reynolds.max()) <= 0.0:
        return []
    return check_low_reynolds(
        outlet=name,
        level=curve.level,
        reynolds=reynolds,
        counted=(curve.level >= dip) & ((heads > _LAST_HEAD * heads.max()) | (curve.ends != "settled")),
        display=display,
        place=f"outlets[{index}].coefficient",
    )


def _heads(runs: Runs, index: int, level: Array) -> Array:
    """The head [m] on an opening's centre or plane along the typical run; nil where it flows back."""
    outlet, tail = runs.system.outlets[index], runs.discharge.tailwaters[index]
    outside = tail.tailwater(level) if isinstance(tail, Receiver) else tail
    pressure = runs.discharge.pressure_head(level, runs.rows([_TYPICAL]))
    return np.asarray(np.maximum(level + pressure - np.maximum(outlet.elevation, outside), 0.0))


def _pipe_checks(
    runs: Runs,
    index: int,
    name: str,
    typed: model.Pipe,
    outlet: PipeOutlet,
    dip: float,
    draw_down: DrawDown,
    doubtful: tuple[DoubtfulPart, ...],
    display: DisplayUnits,
) -> list[Finding]:
    place = f"outlets[{index}]"
    findings = _bore_checks(name, place, typed, display)
    findings += check_transition(
        outlet=name,
        spans=[(part.low, part.high) for part in doubtful if part.outlet == outlet.name and part.why == "transition"],
        time=draw_down.time,
        display=display,
        place=f"{place}.bore",
    )
    return findings + _laminar_check(runs, index, name, outlet, dip, display)


def _laminar_check(
    runs: Runs, index: int, name: str, outlet: PipeOutlet, dip: float, display: DisplayUnits
) -> list[Finding]:
    level = runs.curves[_TYPICAL].level
    # The flow rises with the level; below the dip air is drawn in and no Reynolds number is to be told.
    lowest = min(max(float(level.min()), dip), float(level.max()))
    flow = abs(float(flow_of_one(runs, index)(np.array([lowest]))[0]))
    lacking = [
        [loss.name for loss in part.losses if loss.typical > 0 and loss.laminar <= 0] for part in outlet.sections
    ]
    bores = [part.bore for part, names in zip(outlet.sections, lacking, strict=True) if names] or [
        outlet.sections[0].bore
    ]
    return check_laminar_losses(
        outlet=name,
        least_reynolds=4 * flow / (np.pi * max(bores) * outlet.viscosity),
        fittings=list(dict.fromkeys(lost for names in lacking for lost in names)),
        display=display,
        place=f"outlets[{index}].fittings",
    )


def _bore_checks(name: str, place: str, typed: model.Pipe, display: DisplayUnits) -> list[Finding]:
    findings: list[Finding] = []
    parts: list[model.Pipe | model.PipeSection] = [typed, *(typed.sections or ())]
    for number, part in enumerate(parts):
        findings += check_nominal_size(
            outlet=name,
            made_of_pipe=True,
            diameter=part.bore.value,
            listed=part.bore.text if series_of(part.bore.text) else "",
            display=display,
            place=f"{place}.sections[{number - 1}].bore" if number else f"{place}.bore",
        )
    return findings


def _surface_check(case: Case, runs: Runs, display: DisplayUnits) -> list[Finding]:
    curve = runs.curves[_TYPICAL]
    contracted, first = 0.0, -1
    for index, (typed, outlet) in enumerate(zip(case.outlets, runs.system.outlets, strict=True)):
        if isinstance(typed, model.Weir):
            continue
        full = isinstance(typed, model.Pipe) or effective(typed, "entry") in _FULL_JET
        contracted += outlet.area * (_NOT_CONTRACTED if full else _CONTRACTED)
        first = index if first < 0 else first
    if first < 0:
        return []
    what = "bore" if isinstance(case.outlets[first], model.Pipe) else "opening"
    return check_large_outlet(
        contracted_area=contracted,
        surface=runs.system.profile.plan_area(curve.level),
        level=curve.level,
        time=curve.time,
        display=display,
        place=f"outlets[{first}].{what}",
    )
