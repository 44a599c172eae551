"""All checks on one case: where the answers' numbers are handed to the checks."""

from __future__ import annotations

import numpy as np
import numpy.typing as npt

from headfall.answers import DoubtfulPart, DrawDown, Equilibrium, Figure, HeadspaceRun, Peak, VesselFigures
from headfall.case.defaults import effective
from headfall.case.model import Case, Liquid, Structure, TableVessel
from headfall.checks.finding import Finding
from headfall.checks.heel import check_heel
from headfall.checks.order import sorted_findings
from headfall.checks.overflow import check_alarm_level, check_overflow, check_overflow_outlets
from headfall.checks.scope import check_scope
from headfall.checks.standing_level import check_standing_level
from headfall.checks.structure import check_base_load, check_hoop_stress, liquid_pressure
from headfall.checks.surging import check_surging
from headfall.checks.table_rule import check_table_end, check_table_rule
from headfall.checks.temperature import check_temperature
from headfall.checks.venting import (
    check_closed_headspace,
    check_open_headspace,
    check_pressurised_headspace,
    check_vented_headspace,
)
from headfall.checks.wording import listed
from headfall.outlet.headspace import ClosedHeadspace, VentedHeadspace
from headfall.outlet_assessment import form_of, lowest_outlet, outlet_findings
from headfall.quantities import DisplayUnits
from headfall.runs import Runs
from headfall.system.profiles import taken_from_sizes
from headfall.vessel.table import rule_difference

Array = npt.NDArray[np.float64]

_LOW, _TYPICAL = 0, 1


def assess(
    case: Case,
    runs: Runs,
    vessel: VesselFigures,
    draw_down: DrawDown,
    equilibrium: Equilibrium,
    peak: Peak,
    headspace: HeadspaceRun | None,
    doubtful: tuple[DoubtfulPart, ...],
    display: DisplayUnits,
) -> tuple[Finding, ...]:
    """Return the findings of every check, worst first, those not made among them."""
    findings = check_scope() + _headspace_checks(runs, headspace, display)
    findings += _standing_check(runs, draw_down, equilibrium, display)
    findings += check_surging(
        inflow=runs.system.inflow,
        surges_at=equilibrium.surges_at,
        full_flow=equilibrium.surging_flow,
        display=display,
    )
    findings += _overflow_checks(runs, vessel, draw_down, equilibrium, peak, display)
    findings += _heel_check(runs, display)
    findings += outlet_findings(case, runs, draw_down, doubtful, display)
    findings += _liquid_checks(case, runs, draw_down, display)
    findings += _table_checks(case, runs, display)
    findings += _structure_checks(case, runs, vessel, headspace, display)
    return sorted_findings(findings)


def _headspace_checks(runs: Runs, headspace: HeadspaceRun | None, display: DisplayUnits) -> list[Finding]:
    space = runs.system.headspace
    if headspace is None:
        return check_open_headspace(declared=runs.system.headspace_declared)
    if isinstance(space, VentedHeadspace):
        return check_vented_headspace(
            vacuum=-headspace.lowest,
            air_flow=headspace.largest_air_flow,
            ambient=runs.system.pressure,
            display=display,
        )
    if isinstance(space, ClosedHeadspace):
        return _closed_check(runs, display)
    return check_pressurised_headspace(gauge_pressure=headspace.lowest, display=display)


def _closed_check(runs: Runs, display: DisplayUnits) -> list[Finding]:
    system = runs.system
    levels = [_end_level(runs, index) for index in (_LOW, _TYPICAL)]
    weight = system.liquid.density * system.gravity
    fast, slow = (weight * _vacuum_head(runs, index, level) for index, level in enumerate(levels))
    held = system.profile.volume(np.array([system.start, levels[1]]))
    return check_closed_headspace(
        ends_at=levels[1],
        released=float(held[0] - held[1]),
        vacuum=slow,
        fast_ends_at=levels[0],
        fast_vacuum=fast,
        stops=not runs.reaches[_TYPICAL] and system.inflow <= 0 and _held_by(runs) == "vacuum",
        display=display,
    )


def _vacuum_head(runs: Runs, index: int, level: float) -> float:
    """How far the gas stands below atmospheric [m of liquid]."""
    return -float(np.ravel(runs.discharge.pressure_head(np.array([level]), runs.rows([index])))[0])


def _end_level(runs: Runs, index: int) -> float:
    """The level [m] that a run comes to: the resting level where it settles, or hardly moves."""
    level, why = runs.ends[index]
    return float(runs.rest[index]) if why in ("settled", "at rest") else level


def _standing_check(runs: Runs, draw_down: DrawDown, equilibrium: Equilibrium, display: DisplayUnits) -> list[Finding]:
    system = runs.system
    at_stop = [float(flow) for flow in runs.flow_at(system.stop)]
    return check_standing_level(
        start=system.start,
        stop=system.stop,
        overflow=system.profile.height if runs.has_overflow_outlet else system.overflow,
        reaches_stop=draw_down.reaches_stop,
        time=draw_down.time,
        settles_at=equilibrium.level,
        settled_volume=equilibrium.volume,
        inflow=system.inflow,
        flow_at_stop=Figure(at_stop[1], at_stop[0], at_stop[2]),
        heel=_heel(runs),
        form=form_of(system.outlets[lowest_outlet(runs)]),
        held_by=_held_by(runs),
        surges_at=equilibrium.surges_at,
        surging_flow=equilibrium.surging_flow,
        display=display,
    )


def _held_by(runs: Runs) -> str:
    """What holds the liquid where the outlets do not run dry: ``vacuum``, ``kept_vacuum``, ``tailwater`` or nothing."""
    system, rest = runs.system, float(runs.rest[_TYPICAL])
    if runs.still.is_free or abs(rest - runs.heel) <= system.tolerance or not np.isfinite(rest):
        return ""
    pressure = runs.still.pressure_head(np.array([rest]), runs.rows([_TYPICAL]))
    if float(np.ravel(pressure)[0]) < 0.0:
        return "vacuum" if isinstance(system.headspace, ClosedHeadspace) else "kept_vacuum"
    return "tailwater" if any(tail != -np.inf for tail in runs.discharge.tailwaters) else ""


def _overflow_checks(
    runs: Runs,
    vessel: VesselFigures,
    draw_down: DrawDown,
    equilibrium: Equilibrium,
    peak: Peak,
    display: DisplayUnits,
) -> list[Finding]:
    system = runs.system
    over = [outlet for outlet in system.outlets if outlet.role == "overflow"]
    findings = check_overflow(
        inflow=system.inflow,
        largest_inflow=equilibrium.largest_inflow,
        overflow=system.overflow,
        time_to_overflow=draw_down.time_to_overflow,
        room=vessel.overflow_volume - float(system.profile.volume(np.array(peak.level))),
        taken_by=listed([outlet.name for outlet in over]),
        display=display,
    )
    if over and peak.overflowed is not None:
        crest = min(outlet.lower_edge for outlet in over)
        end = np.array([_end_level(runs, _TYPICAL)])
        each = runs.discharge.each(end, runs.rows([_TYPICAL]))
        findings += check_overflow_outlets(
            names=[outlet.name for outlet in over],
            crest=crest,
            passed=peak.overflowed,
            flowing=_time_above(runs, crest),
            flow_at_end=sum(
                float(flow[0]) for outlet, flow in zip(system.outlets, each, strict=True) if outlet in over
            ),
            peak=peak.level,
            overflow=system.overflow,
            top=system.profile.height,
            display=display,
        )
    return findings + check_alarm_level(peak=peak.level, start=system.start, high=system.high, display=display)


def _time_above(runs: Runs, level: float) -> float:
    """How long the typical run stands above a level [s]; the level of a run goes one way."""
    curve = runs.curves[_TYPICAL]
    first, last, whole = float(curve.level[0]), float(curve.level[-1]), float(curve.time[-1])
    if max(first, last) <= level:
        return 0.0
    if min(first, last) >= level:
        return whole
    rising = slice(None) if last > first else slice(None, None, -1)
    crossing = float(np.interp(level, curve.level[rising], curve.time[rising]))
    return whole - crossing if last > first else crossing


def _heel(runs: Runs) -> float:
    """The level below which no outlet draws [m]: a pressure in the headspace may press the liquid lower."""
    return min(runs.heel, max(float(runs.rest[_TYPICAL]), 0.0))


def _heel_check(runs: Runs, display: DisplayUnits) -> list[Finding]:
    system, lowest, heel = runs.system, lowest_outlet(runs), _heel(runs)
    form = form_of(system.outlets[lowest])
    return check_heel(
        level=heel,
        volume=float(system.profile.volume(np.array(heel))),
        capacity=system.profile.capacity,
        form=form,
        start=system.start,
        stop=system.stop,
        display=display,
        place=f"outlets[{lowest}].{'crest' if form == 'weir' else 'elevation'}",
    )


def _liquid_checks(case: Case, runs: Runs, draw_down: DrawDown, display: DisplayUnits) -> list[Finding]:
    state, typed = runs.system.liquid, case.liquid or Liquid()
    beside = [(temperature.value, None) for temperature in typed.also_at or ()]
    one_row = typed.properties is not None and len(typed.properties) == 1
    return check_temperature(
        liquid=state.name,
        density=state.density,
        viscosity=state.viscosity,
        worked_out=[(state.temperature, draw_down.time.typical), *beside],
        described_once=one_row or (typed.properties is None and typed.density is not None),
        display=display,
    )


def _table_checks(case: Case, runs: Runs, display: DisplayUnits) -> list[Finding]:
    table = case.vessel
    if not isinstance(table, TableVessel):
        return []
    highest = float(runs.curves[_TYPICAL].level.max())
    findings = check_table_end(end=runs.system.profile.height, highest=highest, display=display)
    if table.column == "area":
        level, difference = rule_difference([row[0].value for row in table.rows], [row[1].value for row in table.rows])
        rule = effective(table, "between")
        findings += check_table_rule(rule=rule, level=level, difference=difference, display=display)
    return findings


def _structure_checks(
    case: Case, runs: Runs, vessel: VesselFigures, headspace: HeadspaceRun | None, display: DisplayUnits
) -> list[Finding]:
    system = runs.system
    structure = case.structure or Structure()
    density, gravity = system.liquid.density, system.gravity
    diameter = getattr(case.vessel, "diameter", None)
    gas = float(headspace.pressure.max()) if headspace is not None else 0.0
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
        diameter=diameter.value - taken_from_sizes(case.vessel) if diameter is not None else None,
        pressure=liquid_pressure(density=density, gravity=gravity, depth=system.overflow) + max(gas, 0.0),
        thickness=effective(structure, "shell_thickness"),
        allowable=effective(structure, "allowable_stress"),
        joint_efficiency=effective(structure, "joint_efficiency"),
        display=display,
    )
