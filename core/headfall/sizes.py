"""The outlet that meets a drain time, and the listed sizes beside it."""

from __future__ import annotations

from collections.abc import Sequence
from functools import cache

import numpy as np
import numpy.typing as npt

from headfall.answers import Figure, Neighbour, Sizing
from headfall.outlet.discharge import flow_breakpoints, onset_poles, total_flow
from headfall.quantities import DisplayUnits, duration
from headfall.resources import read_resource
from headfall.runs import Runs
from headfall.solve.draw_down import run_time
from headfall.solve.sizing import scale_for_time
from headfall.solve.span import align_spans, cut_span

Array = npt.NDArray[np.float64]

_SMALLEST, _LARGEST = 1e-4, 1e4
_HIGH, _TYPICAL, _LOW = 2, 1, 0


def size_for_drain_time(runs: Runs, target: float, display: DisplayUnits) -> Sizing:
    """Return the size of the first outlet that drains from start to stop in ``target`` [s], with listed neighbours."""
    outlet = runs.system.outlets[0]
    if runs.system.stop >= runs.system.start:
        return _none(outlet.name, "an outlet is sized for a drain time only where the stop level lies below the start")
    largest = _largest_scale(runs)
    scale = _scales(runs, target, largest)
    if not np.isfinite(scale).all():
        return _none(outlet.name, _why_none(runs, target, largest, display))
    if outlet.shape != "round":
        return Sizing("drain_time", outlet.name, Figure(None, None, None), float(scale[_TYPICAL]), "", None, (), "")
    diameter = outlet.width * scale
    sizes = listed_sizes()
    low, typical, high = diameter[_HIGH], diameter[_TYPICAL], diameter[_LOW]
    above = next((entry for entry in sizes if entry[0] >= high * (1 - 1e-9)), None)
    smaller = [entry for entry in sizes if entry[0] < typical * (1 - 1e-9)][-1:]
    larger = [entry for entry in sizes if entry[0] >= typical * (1 - 1e-9)][:1]
    neighbours = _neighbours(runs, [*smaller, *larger], largest)
    return Sizing(
        target="drain_time",
        outlet=outlet.name,
        diameter=Figure(float(typical), float(low), float(high)),
        scale=float(scale[_TYPICAL]),
        standard=above[1] if above else "",
        standard_diameter=above[0] if above else None,
        neighbours=neighbours,
        reason="",
    )


def _scales(runs: Runs, target: float, largest: float) -> Array:
    """The scales for the lowest, typical and highest coefficient; not finite where none meets the target."""
    outlet = runs.system.outlets[0]
    found = _first_guess(runs, target)
    # Through one downward opening coefficient and area count only as their product: one search serves all three.
    one = len(runs.system.outlets) == 1 and outlet.facing == "down"
    picked = (_TYPICAL,) if one else (_LOW, _TYPICAL, _HIGH)
    rows = list(picked)
    scale = scale_for_time(
        lambda s: times_at(runs, s, picked),
        target,
        first_guess=found[0][rows],
        present_time=found[1][rows],
        blocked=found[2][rows],
        time_constant=found[3][rows],
        smallest=_SMALLEST,
        largest=largest,
    )
    return scale * np.sqrt(outlet.coefficient_typical / np.array(outlet.coefficients)) if one else scale


def _none(outlet: str, reason: str) -> Sizing:
    return Sizing("drain_time", outlet, Figure(None, None, None), None, "", None, (), reason)


@cache
def listed_sizes() -> tuple[tuple[float, str], ...]:
    """Return the listed drill and plate sizes [m] with their names, rising."""
    data = read_resource("opening_sizes.json")
    return tuple(
        (size * 1e-3, group["name"].format(size=f"{size:g}")) for group in data["groups"] for size in group["sizes_mm"]
    )


def times_at(runs: Runs, scales: Array, indices: tuple[int, ...]) -> Array:
    """Return the drain times [s] with the first outlet's sizes times each scale; infinite where the stop is missed.

    ``scales`` (samples,) goes with ``indices``: which coefficients each sample takes.
    """
    system = runs.system
    rows = [coefficients[list(indices)] for coefficients in runs.coefficients]
    slack = system.tolerance
    step = 1e-5 * (system.start - system.stop)
    probe = np.array([[system.stop], [system.stop + step]])
    flow = total_flow(system.outlets, probe, rows, scales)
    net = flow[0] - system.inflow
    slope = (flow[1] - flow[0]) / step
    with np.errstate(divide="ignore", invalid="ignore"):
        poles = system.stop - net / slope
    onsets = onset_poles(system.outlets, rows, system.inflow, scales).T
    spans = []
    reached = []
    for scale, net_at_stop, pole, onset in zip(scales, net, poles, onsets, strict=True):
        breaks = flow_breakpoints(system.outlets, float(scale))
        if system.inflow > 0:
            # Twice the slack, for the pole is only estimated here.
            ok = bool(net_at_stop > 0 and pole < system.stop - 2 * slack)
        else:
            ok = _drains_to_stop(runs, float(scale))
        near = onset.tolist()
        if system.inflow > 0 and np.isfinite(pole) and pole < system.stop:
            near.append(float(pole))
        reached.append(ok)
        spans.append(cut_span(system.start, system.stop, [*system.profile.breakpoints, *breaks], near))
    ok_array = np.array(reached)
    if not ok_array.any():
        return np.full(scales.shape, np.inf)
    shaped = [row.reshape(-1, 1, 1) for row in rows]
    with np.errstate(divide="ignore", invalid="ignore"):
        times = run_time(
            align_spans(spans),
            system.profile.plan_area,
            lambda level: total_flow(system.outlets, level, shaped, scales.reshape(-1, 1, 1)) - system.inflow,
        )
    return np.where(ok_array & np.isfinite(times) & (times > 0), times, np.inf)


def _drains_to_stop(runs: Runs, scale: float) -> bool:
    """Whether the level comes down to the stop where nothing flows in: not quite to the edge of a side opening."""
    system = runs.system
    slack = system.tolerance
    first = system.outlets[0]
    edges = [(first.edges(scale)[0], first.facing), *((o.lower_edge, o.facing) for o in system.outlets[1:])]
    heel = min(edge for edge, _ in edges)
    to_its_plane = any(facing == "down" and edge <= heel + slack for edge, facing in edges)
    return system.stop >= heel - slack if to_its_plane else system.stop > heel + slack


def _largest_scale(runs: Runs) -> float:
    outlet = runs.system.outlets[0]
    if outlet.facing == "down":
        return _LARGEST
    room = min(outlet.elevation, runs.system.profile.height - outlet.elevation)
    return max(room / (0.5 * outlet.height), 1.0)


def _first_guess(runs: Runs, target: float) -> tuple[Array, Array, Array, Array]:
    """For the search: a first scale, the mean flow going as its square; the run's present time; the square of the scale
    that just holds the stop level; and the time constant of the level there."""
    system = runs.system
    first = system.outlets[0]
    released = float(np.diff(system.profile.volume(np.array([system.stop, system.start])))[0])
    at_stop = first.flow(np.full(3, system.stop), runs.coefficients[0])
    mean = np.maximum(first.flow(np.full(3, 0.5 * (system.start + system.stop)), runs.coefficients[0]), 1e-300)
    present = np.array([run.time[-1] if run.ends == "stop" else np.inf for run in runs.curves])
    others = runs.flow_at(system.stop) - at_stop
    short = system.inflow - others
    mean = np.where(np.isfinite(present), np.maximum(released / present - others + system.inflow, 0.1 * mean), mean)
    blocked = np.where(at_stop > 0, short / np.maximum(at_stop, 1e-300), 0.0)
    if first.facing == "side":
        # The flow of a side opening does not go quite with the square: covered, it may pass 4 % more; partly covered,
        # nothing can be said.
        blocked = np.where((system.stop > first.upper_edge) & (blocked > 0), 0.95 * blocked, np.minimum(blocked, 0.0))
    surface = float(system.profile.plan_area(np.array(system.stop)))
    twice_head = 2 * first.head(system.stop)
    held = surface > 0 and twice_head > 0
    time_constant = np.where((short > 0) & held, surface * twice_head / np.maximum(short, 1e-300), np.inf)
    return np.sqrt(np.maximum(blocked, 0.0) + released / target / mean), present, blocked, time_constant


def _neighbours(runs: Runs, sizes: Sequence[tuple[float, str]], largest: float) -> tuple[Neighbour, ...]:
    width = runs.system.outlets[0].width
    sizes = [entry for entry in sizes if entry[0] <= largest * width * (1 + 1e-9)]
    if not sizes:
        return ()
    scales = np.repeat([size / width for size, _ in sizes], 3)
    times = times_at(runs, scales, (0, 1, 2) * len(sizes)).reshape(-1, 3)
    found = []
    for (size, name), row in zip(sizes, times, strict=True):
        low, typical, high = (float(t) if np.isfinite(t) else None for t in (row[_HIGH], row[_TYPICAL], row[_LOW]))
        found.append(Neighbour(name, size, Figure(typical, low, high)))
    return tuple(found)


def _why_none(runs: Runs, target: float, largest: float, display: DisplayUnits) -> str:
    slowest = times_at(runs, np.full(3, _SMALLEST), (0, 1, 2))
    if np.all(slowest <= target):
        return f"the other outlets alone drain it in {duration(float(slowest[_TYPICAL]))}"
    if np.any(slowest <= target):
        return "with part of the coefficient range the other outlets alone drain it in time, with the rest they do not"
    fastest = times_at(runs, np.full(3, largest), (0, 1, 2))
    outlet = runs.system.outlets[0]
    size = f"even {display.text(outlet.height * largest, 'bore')}, the largest that fits at its height,"
    if not np.isfinite(fastest).all():
        return f"{size} does not reach the stop level over the whole range"
    return f"{size} takes {duration(float(fastest[_LOW]))}"
