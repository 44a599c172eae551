"""One case in, all answers out."""

from __future__ import annotations

from dataclasses import replace

import numpy as np

from headfall.answers import (
    Answers,
    AtTemperature,
    AtTime,
    CoefficientUsed,
    Curve,
    DrawDown,
    Equilibrium,
    Figure,
    HeadspaceRun,
    Peak,
    Sizing,
    Stage,
    VesselFigures,
)
from headfall.assessment import assess
from headfall.case.faults import CaseError, Fault
from headfall.case.model import Case
from headfall.chosen import run_at_temperatures, run_at_times, stages
from headfall.discharge import Receiver
from headfall.outlet.headspace import ClosedHeadspace, OpenHeadspace, VentedHeadspace
from headfall.quantities import DisplayUnits, display_units
from headfall.reasons import reason_no_rest, reason_stop_not_reached, reason_surging
from headfall.runs import NEAR_PART, Runs
from headfall.sizes import size_for_drain_time, size_for_flow, size_for_highest_level
from headfall.system import System, build_system
from headfall.undefended import undefended_parts

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
    headspace = _headspace(runs)
    doubtful = undefended_parts(runs)
    return Answers(
        case=case,
        system=system,
        vessel=vessel,
        draw_down=draw_down,
        equilibrium=equilibrium,
        peak=peak,
        sizing=sizing,
        coefficients=tuple(
            CoefficientUsed(o.name, *o.discharge_coefficients(system.start), source=o.coefficient_source)
            for o in system.outlets
        ),
        findings=assess(case, runs, vessel, draw_down, equilibrium, peak, headspace, doubtful, display),
        curve=runs.curves[TYPICAL],
        curve_low=runs.curves[LOW],
        curve_high=runs.curves[HIGH],
        doubtful=doubtful,
        headspace=headspace,
        receiver_level=_receiver_level(runs),
        at_times=_at_times(case, runs),
        stages=_stages(case, runs),
        at_temperatures=_at_temperatures(case),
    )


def _headspace(runs: Runs) -> HeadspaceRun | None:
    system, curve = runs.system, runs.curves[TYPICAL]
    space = system.headspace
    if isinstance(space, OpenHeadspace):
        return None
    weight = system.liquid.density * system.gravity
    head = runs.discharge.pressure_head(curve.level, runs.rows([TYPICAL]))
    pressure = np.broadcast_to(np.asarray(head, dtype=float), curve.level.shape) * weight
    place = int(np.argmin(pressure))
    lowest = fast = float(pressure[place])
    lowest_level = float(curve.level[place])
    if isinstance(space, ClosedHeadspace):
        at_rest, fast = (_closed_pressure(runs, index) * weight for index in (TYPICAL, LOW))
        if at_rest < lowest:
            lowest, lowest_level = at_rest, float(runs.rest[TYPICAL])
        fast = min(fast, lowest)
    air = float(np.max(np.maximum(curve.outflow - system.inflow, 0.0))) if isinstance(space, VentedHeadspace) else 0.0
    return HeadspaceRun(pressure, lowest, lowest_level, air, fast)


def _closed_pressure(runs: Runs, index: int) -> float:
    """The lowest gauge pressure [m of liquid] of a closed gas on a run, where it comes to rest included."""
    levels = runs.curves[index].level
    if runs.curves[index].ends in ("settled", "at rest") and np.isfinite(runs.rest[index]):
        levels = np.append(levels, runs.rest[index])
    return float(np.min(runs.discharge.pressure_head(levels, runs.rows([index]))))


def _receiver_level(runs: Runs) -> float | None:
    tail = runs.discharge.tailwaters[0]
    if not isinstance(tail, Receiver):
        return None
    level = float(tail.tailwater(runs.curves[TYPICAL].level[-1:])[0])
    return level if np.isfinite(level) else tail.elevation


def _at_times(case: Case, runs: Runs) -> tuple[AtTime, ...]:
    times = case.tables.times if case.tables is not None else None
    return run_at_times(runs, tuple(time.value for time in times)) if times else ()


def _stages(case: Case, runs: Runs) -> tuple[Stage, ...]:
    step = case.tables.level_step if case.tables is not None else None
    return stages(runs, step.value) if step is not None else ()


def _at_temperatures(case: Case) -> tuple[AtTemperature, ...]:
    temperatures = case.liquid.also_at if case.liquid is not None else None
    if not temperatures:
        return ()
    found: list[AtTemperature] = []
    for place, temperature in enumerate(temperatures):
        try:
            found += run_at_temperatures(case, (temperature.value,))
        except CaseError as refusal:
            where = ("liquid", "also_at", place)
            raise CaseError([Fault(where, fault.found, fault.wanted) for fault in refusal.faults]) from None
    return tuple(found)


def _vessel_figures(system: System) -> VesselFigures:
    levels = np.array([system.start, system.stop, system.overflow])
    start, stop, overflow = (float(volume) for volume in system.profile.volume(levels))
    return VesselFigures(system.profile.height, system.profile.capacity, start, stop, overflow)


def _draw_down(runs: Runs, vessel: VesselFigures, display: DisplayUnits) -> DrawDown:
    system = runs.system
    times = [_end_time(runs, index, "stop") for index in range(3)]
    over = [_end_time(runs, index, "overflow") for index in range(3)]
    time = _between_ends(times)
    typical = times[TYPICAL]
    released = None if typical is None else vessel.start_volume - vessel.stop_volume + system.inflow * typical
    flow = [float(value) for value in runs.flow_at(system.start)]
    return DrawDown(
        reaches_stop=runs.reaches[TYPICAL],
        reason="" if runs.reaches[TYPICAL] else reason_stop_not_reached(runs, display),
        time=time,
        time_to_overflow=_between_ends(over),
        released=released,
        outflow_at_start=Figure(flow[TYPICAL], flow[LOW], flow[HIGH]),
    )


def _between_ends(times: list[float | None]) -> Figure:
    """The shortest and the longest of three times; no longest where one end does not come there at all."""
    typical = times[TYPICAL]
    ends = [time for time in (times[LOW], times[HIGH]) if time is not None]
    known = ends if typical is None else [*ends, typical]
    return Figure(typical, min(known) if ends else None, max(known) if len(ends) == 2 else None)


def _end_time(runs: Runs, index: int, why: str) -> float | None:
    """The time of a run that ends for this reason; None where it ends for another."""
    return float(runs.curves[index].time[-1]) if runs.ends[index][1] == why else None


def _equilibrium(runs: Runs, display: DisplayUnits) -> Equilibrium:
    system = runs.system
    top = system.profile.height + system.tolerance
    rest = [float(level) for level in runs.rest]
    inside = [
        min(level, system.profile.height) if level <= top and not surges else None
        for level, surges in zip(rest, runs.surging, strict=True)
    ]
    level = _resting_figure(inside)
    surges = runs.surging[TYPICAL]
    overflows = rest[TYPICAL] > system.overflow + system.tolerance
    volume = None if level.typical is None else float(system.profile.volume(np.array(level.typical)))
    reason = reason_no_rest(runs, display) if overflows else reason_surging(runs, display) if surges else ""
    return Equilibrium(
        level=level,
        volume=volume,
        overflows=overflows,
        reason=reason,
        needed_level=rest[TYPICAL] if np.isfinite(rest[TYPICAL]) and not surges else None,
        largest_inflow=_largest_inflow(runs),
        time_to_98_percent=None if overflows or volume is None else _time_near_rest(runs, volume),
        surges_at=rest[TYPICAL] if surges else None,
        surging_flow=runs.leaps[TYPICAL] if surges else None,
    )


def _resting_figure(levels: list[float | None]) -> Figure:
    """The resting level with its range; in a closed headspace the ends may change places."""
    low, typical, high = levels[HIGH], levels[TYPICAL], levels[LOW]
    if low is None or typical is None or high is None:
        return Figure(typical, low, high)
    return Figure(typical, min(low, typical, high), max(low, typical, high))


def _largest_inflow(runs: Runs) -> Figure:
    """What the drains pass with the level standing at overflow; the gas of a closed headspace is not counted on."""
    system, still = runs.system, runs.still
    if isinstance(system.headspace, ClosedHeadspace):
        # Pressed into what room is left under the lid it would drive out far more than any tank bears.
        still = replace(still, headspace=OpenHeadspace())
    each = still.each(np.full(3, system.overflow), runs.rows())
    drains = [flow for outlet, flow in zip(system.outlets, each, strict=True) if outlet.role == "drain"]
    total = np.sum(drains, axis=0) if drains else np.zeros(3)
    low, typical, high = (max(float(value), 0.0) for value in total)
    return Figure(typical, low, high)


def _time_near_rest(runs: Runs, volume: float) -> float | None:
    """Time from the start until the volume is within 2 % of the equilibrium's; None where it never is."""
    system = runs.system
    start = float(system.profile.volume(np.array(system.start)))
    if abs(start - volume) <= NEAR_PART * volume:
        return 0.0
    if runs.first_net[TYPICAL] == 0 or (runs.first_net[TYPICAL] > 0) != (start > volume):
        return None
    near = volume * (1 + NEAR_PART if start > volume else 1 - NEAR_PART)
    if near <= 0 and not runs.comes_to_rest_in_time(TYPICAL):
        return None
    return runs.time_to(float(system.profile.level(np.array(near))), TYPICAL)


def _peak(runs: Runs) -> Peak:
    system, curve = runs.system, runs.curves[TYPICAL]
    highest = int(np.argmax(curve.level))
    level, time = float(curve.level[highest]), float(curve.time[highest])
    if curve.ends == "overflow":
        return Peak(level, time, None, None)
    if not runs.has_overflow_outlet or curve.ends == "at rest":
        return Peak(level, time, 0.0, 0.0)
    passed = runs.passed_by_overflow(float(curve.level[-1]), TYPICAL)
    return Peak(level, time, passed, _time_above(runs, system.overflow, curve))


def _time_above(runs: Runs, overflow: float, curve: Curve) -> float:
    """How long the run stands above the overflow level [s]."""
    first, last = float(curve.level[0]), float(curve.level[-1])
    whole = float(curve.time[-1])
    if max(first, last) <= overflow:
        return 0.0
    if min(first, last) >= overflow:
        return whole
    crossing = runs.time_to(overflow, TYPICAL)
    return crossing if first > last else whole - crossing


def _sizing(runs: Runs, display: DisplayUnits) -> tuple[Sizing, ...]:
    system = runs.system
    found: list[Sizing] = []
    if system.drain_time is not None:
        found.append(size_for_drain_time(runs, system.drain_time, display))
    if system.highest_level is not None:
        found.append(size_for_highest_level(runs, system.highest_level, display))
    if system.flow_limit is not None:
        found.append(size_for_flow(runs, system.flow_limit.level, system.flow_limit.flow, display))
    return tuple(found)
