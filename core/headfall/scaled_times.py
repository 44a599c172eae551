"""Drain times with the first drain's size scaled: what sizing searches over."""

from __future__ import annotations

import numpy as np
import numpy.typing as npt

from headfall.outlet.orifice import OrificeOutlet
from headfall.runs import Runs
from headfall.solve.draw_down import run_time
from headfall.solve.sizing import scale_for_time
from headfall.solve.span import align_spans, cut_span

Array = npt.NDArray[np.float64]

_SMALLEST, _LARGEST = 1e-4, 1e4
_LARGEST_BORE_PARTS = 1.0
_LOW, _TYPICAL, _HIGH = 0, 1, 2


def largest_scale(runs: Runs) -> float:
    """Return the largest scale [-] at which the first drain still fits where it is."""
    system = runs.system
    outlet = system.outlets[system.first_drain]
    if not isinstance(outlet, OrificeOutlet) or outlet.facing == "down":
        return _LARGEST
    room = min(outlet.elevation, system.profile.height - outlet.elevation)
    return max(room / (0.5 * outlet.height), 1.0)


def scales_for_time(runs: Runs, target: float, largest: float) -> Array:
    """Return the scales [-], shape (3,), for lowest, typical and highest coefficient; not finite where none does."""
    system = runs.system
    outlet = system.outlets[system.first_drain]
    found = _first_guess(runs, target)
    # Through one downward opening coefficient and area count only as their product: one search serves all three.
    one = (
        len(system.outlets) == 1
        and isinstance(outlet, OrificeOutlet)
        and outlet.is_plain
        and outlet.facing == "down"
        and runs.discharge.is_free
    )
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
    return scale * np.sqrt(outlet.coefficients[0, _TYPICAL] / outlet.coefficients[0]) if one else scale


def times_at(runs: Runs, scales: Array, indices: tuple[int, ...]) -> Array:
    """Return the drain times [s] with the first drain's size times each scale; infinite where the stop is missed.

    ``scales`` (samples,) goes with ``indices``: which coefficients each sample takes.
    """
    system, discharge, still = runs.system, runs.discharge, runs.still
    rows = runs.rows(list(indices))
    slack = system.tolerance
    step = 1e-5 * (system.start - system.stop)
    probe = np.array([[system.stop], [system.stop + step], [system.stop + 2 * slack]]) + 0 * scales
    flow = np.stack([still.flow(level, rows, scales) for level in probe])
    net, slope = flow[0] - system.inflow, (flow[1] - flow[0]) / step
    with np.errstate(divide="ignore", invalid="ignore"):
        poles = system.stop - net / slope
    onsets = discharge.onsets(rows, scales).T if discharge.is_free else np.empty((len(scales), 0))
    spans, reached = [], []
    for place, (scale, index) in enumerate(zip(scales, indices, strict=True)):
        if system.inflow > 0:
            # Twice the slack, for the pole is only estimated here.
            leap = bool(flow[2, place] > system.inflow and net[place] < 0)
            ok = leap or bool(net[place] > 0 and poles[place] < system.stop - 2 * slack)
        else:
            ok = bool(flow[2, place] > 0) and not _fades_at_stop(runs, float(scale))
        near = onsets[place].tolist()
        if system.inflow > 0 and np.isfinite(poles[place]) and poles[place] < system.stop:
            near.append(float(poles[place]))
        reached.append(ok)
        breaks = [*system.profile.breakpoints, *discharge.edges(index, float(scale))]
        spans.append(cut_span(system.start, system.stop, breaks, near))
    ok_array = np.array(reached)
    if not ok_array.any():
        return np.full(scales.shape, np.inf)
    shaped = runs.rows(list(indices), extra_axes=2)
    with np.errstate(divide="ignore", invalid="ignore"):
        times = run_time(
            align_spans(spans),
            system.profile.plan_area,
            lambda level: discharge.flow(level, shaped, scales.reshape(-1, 1, 1)) - system.inflow,
        )
    return np.where(ok_array & np.isfinite(times) & (times > 0), times, np.inf)


def _fades_at_stop(runs: Runs, scale: float) -> bool:
    """Whether the stop stands where the last outlet to run takes for ever: at a side opening's edge or a crest."""
    system = runs.system
    slack = system.tolerance
    if not runs.discharge.is_free:
        return False
    edges = []
    for place, outlet in enumerate(system.outlets):
        edge = outlet.edges(scale)[0] if place == system.first_drain and not outlet.drains_to_its_edge else None
        edges.append((outlet.lower_edge if edge is None else edge, outlet.drains_to_its_edge))
    heel = min(edge for edge, _ in edges)
    to_its_plane = any(drains and edge <= heel + slack for edge, drains in edges)
    return not to_its_plane and system.stop <= heel + slack


def _first_guess(runs: Runs, target: float) -> tuple[Array, Array, Array, Array]:
    """For the search: a first scale, the mean flow going as its square; the run's present time; the square of the scale
    that just holds the stop level; and the time constant of the level there."""
    system = runs.system
    place = system.first_drain
    first = system.outlets[place]
    rows = runs.rows()
    released = float(np.diff(system.profile.volume(np.array([system.stop, system.start])))[0])
    at_stop = runs.still.each(np.full(3, system.stop), rows)[place]
    mean = np.maximum(runs.still.each(np.full(3, 0.5 * (system.start + system.stop)), rows)[place], 1e-300)
    present = np.array([run.time[-1] if run.ends == "stop" else np.inf for run in runs.curves])
    others = runs.standing_flow_at(system.stop) - at_stop
    short = system.inflow - others
    mean = np.where(np.isfinite(present), np.maximum(released / present - others + system.inflow, 0.1 * mean), mean)
    blocked = np.where(at_stop > 0, short / np.maximum(at_stop, 1e-300), 0.0)
    if not isinstance(first, OrificeOutlet):
        # Nothing is known of how the flow goes with the size: the search finds out.
        blocked = np.minimum(blocked, 0.0)
    elif first.facing == "side":
        # The flow of a side opening does not go quite with the square: covered, it may pass 4 % more; partly covered,
        # nothing can be said.
        blocked = np.where((system.stop > first.upper_edge) & (blocked > 0), 0.95 * blocked, np.minimum(blocked, 0.0))
    surface = float(system.profile.plan_area(np.array(system.stop)))
    twice_head = 2 * first.head(system.stop)
    held = surface > 0 and twice_head > 0
    time_constant = np.where((short > 0) & held, surface * twice_head / np.maximum(short, 1e-300), np.inf)
    return np.sqrt(np.maximum(blocked, 0.0) + released / target / mean), present, blocked, time_constant
