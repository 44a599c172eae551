"""The run at chosen times, level by level, and at other temperatures."""

from __future__ import annotations

import numpy as np

from headfall.answers import AtTemperature, AtTime, Curve, Figure, Stage
from headfall.case.model import Case
from headfall.outlet.orifice import OrificeOutlet
from headfall.outlet.pipe import PipeOutlet
from headfall.runs import Runs
from headfall.solve.span import nodes
from headfall.system import System, build_system

_LOW, _TYPICAL, _HIGH = 0, 1, 2
_NEWTON_STEPS = 12
_MOST_STAGES = 2000


def run_at_times(runs: Runs, times: tuple[float, ...]) -> tuple[AtTime, ...]:
    """Return the typical run at each time [s] from the start; nothing after a run that ends at its stop or overflow."""
    return tuple(_at_time(runs, time) for time in times)


def _at_time(runs: Runs, time: float) -> AtTime:
    curve = runs.curves[_TYPICAL]
    if time > curve.time[-1] and curve.ends in ("stop", "overflow"):
        return AtTime(time, None, None, None)
    if time >= curve.time[-1]:
        level = float(curve.level[-1] if curve.ends == "at rest" else runs.rest[_TYPICAL])
        level = float(curve.level[-1]) if time == curve.time[-1] else level
    else:
        level = level_at(runs, curve, time)
    volume = float(runs.system.profile.volume(np.array(level)))
    return AtTime(time, level, volume, float(runs.flow_at(level)[_TYPICAL]))


def level_at(runs: Runs, curve: Curve, time: float) -> float:
    """Return the level [m] of the typical run at a time [s] within its curve: the curve, then Newton's rule on t(h)."""
    place = int(np.clip(np.searchsorted(curve.time, time, side="right") - 1, 0, len(curve.time) - 2))
    first, last = float(curve.level[place]), float(curve.level[place + 1])
    share = (time - curve.time[place]) / (curve.time[place + 1] - curve.time[place])
    level, row = first + float(share) * (last - first), runs.rows([_TYPICAL], extra_axes=1)
    low, high = sorted((first, last))
    for _ in range(_NEWTON_STEPS):
        if level == first:
            break
        points, weight = nodes(np.array([first, level]))
        rates = runs.system.profile.plan_area(points) / (runs.discharge.flow(points, row) - runs.system.inflow)
        reached = float(curve.time[place]) - float((weight * rates).sum())
        here = np.array([[level]])
        rate = runs.system.profile.plan_area(here) / (runs.discharge.flow(here, row) - runs.system.inflow)
        step = (reached - time) / float(rate[0, 0]) if np.isfinite(rate).all() and rate[0, 0] != 0 else 0.0
        level = float(np.clip(level + step, low, high))
        if abs(step) <= 1e-14 * runs.system.profile.height:
            break
    return level


def stages(runs: Runs, step: float) -> tuple[Stage, ...]:
    """Return surface, volume and outflow at every ``step`` [m] of level from the bottom, and at the top."""
    profile = runs.system.profile
    count = min(int(profile.height / step + 1e-9), _MOST_STAGES)
    steps = step * np.arange(count + 1)
    levels = np.append(steps[steps < profile.height * (1 - 1e-9)], profile.height)
    flows = runs.still.flow(np.broadcast_to(levels, (3, len(levels))), runs.rows(extra_axes=1))
    areas, volumes = profile.plan_area(levels), profile.volume(levels)
    return tuple(
        Stage(float(h), float(a), float(v), Figure(float(q[_TYPICAL]), float(q[_LOW]), float(q[_HIGH])))
        for h, a, v, q in zip(levels, areas, volumes, flows.T, strict=True)
    )


def run_at_temperatures(case: Case, temperatures: tuple[float, ...]) -> tuple[AtTemperature, ...]:
    """Return the drain time at each temperature [K]. Raises CaseError for one at which the liquid is not described."""
    return tuple(_at_temperature(build_system(case, temperature)) for temperature in temperatures)


def _at_temperature(system: System) -> AtTemperature:
    runs = Runs(system)
    times = [runs.time_to(runs.ends[index][0], index) if runs.ends[index][1] == "stop" else None for index in (0, 1, 2)]
    ends = [time for time in (times[_LOW], times[_HIGH]) if time is not None]
    last = runs.ends[_TYPICAL][0]
    return AtTemperature(
        temperature=system.liquid.temperature,
        density=system.liquid.density,
        viscosity=system.liquid.viscosity,
        time=Figure(times[_TYPICAL], min(ends, default=None), max(ends) if len(ends) == 2 else None),
        reynolds_first=reynolds_number(runs, system.start),
        reynolds_last=reynolds_number(runs, last),
    )


def reynolds_number(runs: Runs, level: float) -> float:
    """Return the Reynolds number [-] of the first outlet at a level [m]: of the flow in a pipe's first bore, else

    d·√(2gH)/ν of an opening, d its smaller size; nil for a weir and where nothing flows."""
    outlet, liquid = runs.system.outlets[0], runs.system.liquid
    kinematic = liquid.viscosity / liquid.density
    if isinstance(outlet, PipeOutlet):
        flow = abs(float(runs.discharge.each(np.array([level]), runs.rows([_TYPICAL]))[0][0]))
        bore = outlet.sections[0].bore
        return 4 * flow / outlet.count / (np.pi * bore * kinematic)
    if isinstance(outlet, OrificeOutlet):
        speed = np.sqrt(2 * outlet.gravity * outlet.head(level))
        return float(min(outlet.width, outlet.height) * speed / kinematic)
    return 0.0
