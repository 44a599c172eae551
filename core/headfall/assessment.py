"""All checks on one case: where the answers' numbers are handed to the checks."""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import replace

import numpy as np
import numpy.typing as npt

from headfall.answers import DrawDown, Equilibrium, Figure, Peak, VesselFigures
from headfall.case.defaults import effective
from headfall.case.model import Case, Structure
from headfall.checks.dip import check_dip
from headfall.checks.finding import Finding
from headfall.checks.heel import check_heel
from headfall.checks.large_outlet import check_large_outlet
from headfall.checks.nominal_size import check_nominal_size
from headfall.checks.order import sorted_findings
from headfall.checks.overflow import check_alarm_level, check_overflow
from headfall.checks.scope import check_scope
from headfall.checks.standing_level import check_standing_level
from headfall.checks.structure import check_base_load, check_hoop_stress, liquid_pressure
from headfall.checks.venting import check_venting
from headfall.outlet.orifice import OrificeOutlet
from headfall.quantities import DisplayUnits
from headfall.runs import Runs

Array = npt.NDArray[np.float64]

_TYPICAL = 1
_FULL_JET = ("rounded", "bellmouth", "short_tube", "reentrant_full")
_CONTRACTED, _NOT_CONTRACTED = 0.62, 1.0


def assess(
    case: Case,
    runs: Runs,
    vessel: VesselFigures,
    draw_down: DrawDown,
    equilibrium: Equilibrium,
    peak: Peak,
    display: DisplayUnits,
) -> tuple[Finding, ...]:
    """Return the findings of every check, worst first, those not made among them."""
    system = runs.system
    findings = check_scope() + check_venting(headspace_declared=system.headspace_declared)
    findings += _level_checks(runs, vessel, draw_down, equilibrium, peak, display)
    for index, outlet in enumerate(system.outlets):
        findings += _outlet_checks(case, runs, index, outlet, display)
    findings += _surface_check(case, runs, display)
    findings += _structure_checks(case, runs, vessel, display)
    return sorted_findings(findings)


def _level_checks(
    runs: Runs,
    vessel: VesselFigures,
    draw_down: DrawDown,
    equilibrium: Equilibrium,
    peak: Peak,
    display: DisplayUnits,
) -> list[Finding]:
    system = runs.system
    at_stop = [float(flow) for flow in runs.flow_at(system.stop)]
    lowest = min(range(len(system.outlets)), key=lambda index: system.outlets[index].lower_edge)
    highest_volume = float(system.profile.volume(np.array(peak.level)))
    findings = check_standing_level(
        start=system.start,
        stop=system.stop,
        overflow=system.overflow,
        reaches_stop=draw_down.reaches_stop,
        time=draw_down.time,
        settles_at=equilibrium.level,
        settled_volume=equilibrium.volume,
        inflow=system.inflow,
        flow_at_stop=Figure(at_stop[1], at_stop[0], at_stop[2]),
        heel=runs.heel,
        display=display,
    )
    findings += check_overflow(
        inflow=system.inflow,
        largest_inflow=equilibrium.largest_inflow,
        overflow=system.overflow,
        time_to_overflow=draw_down.time_to_overflow,
        room=vessel.overflow_volume - highest_volume,
        display=display,
    )
    findings += check_alarm_level(peak=peak.level, start=system.start, high=system.high, display=display)
    findings += check_heel(
        level=runs.heel,
        volume=float(system.profile.volume(np.array(runs.heel))),
        facing=system.outlets[lowest].facing,
        start=system.start,
        stop=system.stop,
        display=display,
        place=f"outlets[{lowest}].elevation",
    )
    return findings


def _outlet_checks(case: Case, runs: Runs, index: int, outlet: OrificeOutlet, display: DisplayUnits) -> list[Finding]:
    entry = effective(case.outlets[index], "entry")
    one_opening = replace(outlet, count=1)
    name = outlet.name if len(runs.system.outlets) > 1 else "the outlet"
    curve = runs.curves[_TYPICAL]
    return check_dip(
        outlet=name,
        facing=outlet.facing,
        elevation=outlet.elevation,
        flow_at=_flow_of(one_opening),
        lowest=float(curve.level.min()),
        top=runs.system.profile.height,
        gravity=runs.system.gravity,
        display=display,
        others_go_on=runs.heel < outlet.lower_edge - runs.system.tolerance,
    ) + check_nominal_size(
        outlet=name,
        entry=entry,
        diameter=outlet.width if outlet.shape == "round" else None,
        display=display,
        place=f"outlets[{index}].opening" + (".diameter" if outlet.shape == "round" else ""),
    )


def _flow_of(outlet: OrificeOutlet) -> Callable[[Array], Array]:
    return lambda level: outlet.flow(level, outlet.coefficient_typical)


def _surface_check(case: Case, runs: Runs, display: DisplayUnits) -> list[Finding]:
    curve = runs.curves[_TYPICAL]
    contracted = sum(
        outlet.area * (_NOT_CONTRACTED if effective(typed, "entry") in _FULL_JET else _CONTRACTED)
        for typed, outlet in zip(case.outlets, runs.system.outlets, strict=True)
    )
    return check_large_outlet(
        contracted_area=float(contracted),
        surface=runs.system.profile.plan_area(curve.level),
        level=curve.level,
        time=curve.time,
        display=display,
        place="outlets[0].opening",
    )


def _structure_checks(case: Case, runs: Runs, vessel: VesselFigures, display: DisplayUnits) -> list[Finding]:
    system = runs.system
    structure = case.structure or Structure()
    density, gravity = system.liquid.density, system.gravity
    diameter = getattr(case.vessel, "diameter", None)
    return check_base_load(
        density=density,
        gravity=gravity,
        start=system.start,
        overflow=system.overflow,
        overflow_volume=vessel.overflow_volume,
        empty_mass=effective(structure, "empty_mass"),
        display=display,
    ) + check_hoop_stress(
        shape=case.vessel.shape,
        diameter=diameter.value if diameter is not None else None,
        pressure=liquid_pressure(density=density, gravity=gravity, depth=system.overflow),
        thickness=effective(structure, "shell_thickness"),
        allowable=effective(structure, "allowable_stress"),
        joint_efficiency=effective(structure, "joint_efficiency"),
        display=display,
    )
