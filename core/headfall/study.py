"""One case in, all answers out."""

from __future__ import annotations

import numpy as np

from headfall.answers import (
    Answers,
    CoefficientUsed,
    DrawDown,
    Equilibrium,
    Figure,
    Peak,
    Sizing,
    VesselFigures,
)
from headfall.assessment import assess
from headfall.case.model import Case
from headfall.quantities import DisplayUnits, display_units
from headfall.reasons import reason_no_rest, reason_stop_not_reached
from headfall.runs import NEAR_PART, Runs
from headfall.sizes import size_for_drain_time
from headfall.system import System, build_system

LOW, TYPICAL, HIGH = 0, 1, 2


def solve(case: Case, display: DisplayUnits | None = None) -> Answers:
    """Return all answers to a case; texts in its display units unless ``display`` says otherwise.

    Raises CaseError, with every fault, where the entries contradict one another.
    """
    display = display or display_units(case.units or "metric")
    system = build_system(case)
    runs = Runs(system)
    vessel = _vessel_figures(system)
    equilibrium = _equilibrium(runs, display)
    draw_down = _draw_down(runs, vessel, display)
    peak = _peak(runs)
    sizing = _sizing(runs, display)
    return Answers(
        case=case,
        system=system,
        vessel=vessel,
        draw_down=draw_down,
        equilibrium=equilibrium,
        peak=peak,
        sizing=sizing,
        coefficients=tuple(
            CoefficientUsed(o.name, *o.coefficients, source=o.coefficient_source) for o in system.outlets
        ),
        findings=assess(case, runs, vessel, draw_down, equilibrium, peak, display),
        curve=runs.curves[TYPICAL],
        curve_low=runs.curves[LOW],
        curve_high=runs.curves[HIGH],
    )


def _vessel_figures(system: System) -> VesselFigures:
    levels = np.array([system.start, system.stop, system.overflow])
    start, stop, overflow = (float(volume) for volume in system.profile.volume(levels))
    return VesselFigures(system.profile.height, system.profile.capacity, start, stop, overflow)


def _draw_down(runs: Runs, vessel: VesselFigures, display: DisplayUnits) -> DrawDown:
    system = runs.system
    times = [_end_time(runs, index, "stop") for index in range(3)]
    over = [_end_time(runs, index, "overflow") for index in range(3)]
    ends = (times[LOW], times[HIGH]) if system.stop > system.start else (times[HIGH], times[LOW])
    time = _figure(times[TYPICAL], *ends)
    typical = times[TYPICAL]
    released = None if typical is None else vessel.start_volume - vessel.stop_volume + system.inflow * typical
    flow = [float(value) for value in runs.flow_at(system.start)]
    return DrawDown(
        reaches_stop=runs.reaches[TYPICAL],
        reason="" if runs.reaches[TYPICAL] else reason_stop_not_reached(runs, display),
        time=time,
        time_to_overflow=Figure(over[TYPICAL], over[LOW], over[HIGH]),
        released=released,
        outflow_at_start=Figure(flow[TYPICAL], flow[LOW], flow[HIGH]),
    )


def _figure(typical: float | None, low: float | None, high: float | None) -> Figure:
    """A figure whose ends do not cross the typical by round-off."""
    if typical is not None:
        low = None if low is None else min(low, typical)
        high = None if high is None else max(high, typical)
    return Figure(typical, low, high)


def _end_time(runs: Runs, index: int, why: str) -> float | None:
    """The time of a run that ends for this reason; None where it ends for another."""
    return float(runs.curves[index].time[-1]) if runs.ends[index][1] == why else None


def _equilibrium(runs: Runs, display: DisplayUnits) -> Equilibrium:
    system = runs.system
    top = system.profile.height + system.tolerance
    rest = [float(level) for level in runs.rest]
    inside = [min(level, system.profile.height) if level <= top else None for level in rest]
    level = Figure(inside[TYPICAL], inside[HIGH], inside[LOW])
    overflows = rest[TYPICAL] > system.overflow + system.tolerance
    volume = None if level.typical is None else float(system.profile.volume(np.array(level.typical)))
    largest = [float(value) for value in runs.flow_at(system.overflow)]
    return Equilibrium(
        level=level,
        volume=volume,
        overflows=overflows,
        reason=reason_no_rest(runs, display) if overflows else "",
        needed_level=rest[TYPICAL] if np.isfinite(rest[TYPICAL]) else None,
        largest_inflow=Figure(largest[TYPICAL], largest[LOW], largest[HIGH]),
        time_to_98_percent=None if overflows or volume is None else _time_near_rest(runs, volume),
    )


def _time_near_rest(runs: Runs, volume: float) -> float | None:
    """Time from the start until the volume is within 2 % of the equilibrium's; None where it never is."""
    system = runs.system
    start = float(system.profile.volume(np.array(system.start)))
    if abs(start - volume) <= NEAR_PART * volume:
        return 0.0
    if system.inflow <= 0 and start < volume:
        return None
    near = volume * (1 + NEAR_PART if start > volume else 1 - NEAR_PART)
    if near <= 0 and not runs.drains_to_heel:
        return None
    return runs.time_to(float(system.profile.level(np.array(near))), TYPICAL)


def _peak(runs: Runs) -> Peak:
    curve = runs.curves[TYPICAL]
    highest = int(np.argmax(curve.level))
    goes_on = curve.ends == "overflow"
    nothing = None if goes_on else 0.0
    return Peak(float(curve.level[highest]), float(curve.time[highest]), nothing, nothing)


def _sizing(runs: Runs, display: DisplayUnits) -> tuple[Sizing, ...]:
    if runs.system.drain_time is None:
        return ()
    return (size_for_drain_time(runs, runs.system.drain_time, display),)
