"""The size of the first drain that meets a target, and the listed sizes beside it."""

from __future__ import annotations

from collections.abc import Callable

import numpy as np
import numpy.typing as npt

from headfall.answers import Figure, Neighbour, Sizing
from headfall.listed_sizes import ListedSize, listed_sizes_for
from headfall.outlet.orifice import OrificeOutlet
from headfall.quantities import DisplayUnits, duration
from headfall.runs import Runs
from headfall.scaled_times import largest_scale, scales_for_time, times_at
from headfall.solve.root import bracketed_root

Array = npt.NDArray[np.float64]
Flags = npt.NDArray[np.bool_]

_SMALLEST = 1e-4
_LOW, _TYPICAL, _HIGH = 0, 1, 2
_ALL = (_LOW, _TYPICAL, _HIGH)


def size_for_drain_time(runs: Runs, target: float, display: DisplayUnits) -> Sizing:
    """Return the size of the first drain that empties from start to stop in ``target`` [s], with listed neighbours."""
    place = runs.system.first_drain
    name = runs.system.outlets[place].name
    if runs.system.stop >= runs.system.start:
        reason = "an outlet is sized for a drain time only where the stop level lies below the start"
        return _none("drain_time", name, reason)
    largest = largest_scale(runs)
    scale = scales_for_time(runs, target, largest)
    if not np.isfinite(scale).all():
        return _none("drain_time", name, _why_none(runs, target, largest, display))
    return _sized(
        runs,
        "drain_time",
        scale,
        largest,
        lambda scales, indices: times_at(runs, scales, indices),
        good=lambda achieved: achieved <= target * (1 + 1e-9),
        larger_is_better=True,
    )


def size_for_highest_level(runs: Runs, target: float, display: DisplayUnits) -> Sizing:
    """Return the smallest size whose resting level is not above ``target`` [m], the start not being above it either."""
    system = runs.system
    name = system.outlets[system.first_drain].name
    at = display.text(target, "level")
    if system.start > target + system.tolerance:
        return _none("highest_level", name, f"the start stands above {at}")
    if system.inflow <= 0:
        return _none("highest_level", name, f"nothing flows in: the level never rises to {at}")
    largest = largest_scale(runs)
    low, high = np.full(3, _SMALLEST), np.full(3, largest)
    with_most, with_least = _flow_at(runs, target, high, _ALL), _flow_at(runs, target, low, _ALL)
    if np.any(with_least >= system.inflow):
        return _none("highest_level", name, f"the other outlets alone keep the level below {at}")
    if np.any(with_most < system.inflow):
        return _none("highest_level", name, f"no size that fits at its height keeps the level at or below {at}")
    scale = bracketed_root(lambda s: _flow_at(runs, target, s, _ALL) - system.inflow, low, high, 1e-12)
    return _sized(
        runs,
        "highest_level",
        scale,
        largest,
        lambda scales, indices: _resting_levels(runs, scales, indices),
        good=lambda achieved: achieved <= target + system.tolerance,
        larger_is_better=True,
    )


def size_for_flow(runs: Runs, level: float, flow: float, display: DisplayUnits) -> Sizing:
    """Return the largest size with which all outlets pass no more than ``flow`` [m³/s] at ``level`` [m]."""
    system = runs.system
    name = system.outlets[system.first_drain].name
    largest = largest_scale(runs)
    low, high = np.full(3, _SMALLEST), np.full(3, largest)
    at, limit = display.text(level, "level"), display.text(flow, "flow")
    if np.any(_flow_at(runs, level, low, _ALL) > flow):
        return _none("flow_at", name, f"the other outlets alone pass more than {limit} at {at}")
    if np.any(_flow_at(runs, level, high, _ALL) < flow):
        return _none("flow_at", name, f"no size that fits at its height passes {limit} at {at}")
    scale = bracketed_root(lambda s: _flow_at(runs, level, s, _ALL) - flow, low, high, 1e-12)
    return _sized(
        runs,
        "flow_at",
        scale,
        largest,
        lambda scales, indices: _flow_at(runs, level, scales, indices),
        good=lambda achieved: achieved <= flow * (1 + 1e-9),
        larger_is_better=False,
    )


Achieved = Callable[[Array, tuple[int, ...]], Array]


def _sized(
    runs: Runs,
    target: str,
    scale: Array,
    largest: float,
    achieved: Achieved,
    good: Callable[[Array], Flags],
    larger_is_better: bool,
) -> Sizing:
    """The sizing made of the scales for the lowest, typical and highest coefficient."""
    system = runs.system
    outlet = system.outlets[system.first_drain]
    size = outlet.size
    nothing = Figure(None, None, None)
    if size is None:
        return Sizing(target, outlet.name, nothing, float(scale[_TYPICAL]), "", None, (), "")
    low, typical, high = (float(size * scale[index]) for index in (_HIGH, _TYPICAL, _LOW))
    listed = [entry for entry in listed_sizes_for(outlet) if entry.size <= largest * size * (1 + 1e-9)]
    smaller = [entry for entry in listed if entry.size < typical * (1 - 1e-9)][-1:]
    larger = [entry for entry in listed if entry.size >= typical * (1 - 1e-9)][:1]
    if larger_is_better:
        standard = next((entry for entry in listed if entry.size >= high * (1 - 1e-9)), None)
    else:
        standard = next((entry for entry in reversed(listed) if entry.size <= low * (1 + 1e-9)), None)
    return Sizing(
        target=target,
        outlet=outlet.name,
        diameter=Figure(typical, low, high),
        scale=float(scale[_TYPICAL]),
        standard=standard.name if standard else "",
        standard_diameter=standard.size if standard else None,
        neighbours=_neighbours([*smaller, *larger], size, achieved, good),
        reason="",
    )


def _neighbours(
    listed: list[ListedSize], size: float, achieved: Achieved, good: Callable[[Array], Flags]
) -> tuple[Neighbour, ...]:
    if not listed:
        return ()
    scales = np.repeat([entry.size / size for entry in listed], 3)
    values = achieved(scales, _ALL * len(listed)).reshape(-1, 3)
    found = []
    for entry, row in zip(listed, values, strict=True):
        ends = sorted((row[_LOW], row[_HIGH]))
        low, typical, high = (float(v) if np.isfinite(v) else None for v in (ends[0], row[_TYPICAL], ends[1]))
        meets = bool(np.all(np.isfinite(row)) and np.all(good(row)))
        found.append(Neighbour(entry.name, entry.size, Figure(typical, low, high), meets))
    return tuple(found)


def _none(target: str, outlet: str, reason: str) -> Sizing:
    return Sizing(target, outlet, Figure(None, None, None), None, "", None, (), reason)


def _flow_at(runs: Runs, level: float, scales: Array, indices: tuple[int, ...]) -> Array:
    rows = runs.rows(list(indices))
    return runs.still.flow(np.full(scales.shape, level), rows, scales)


def _resting_levels(runs: Runs, scales: Array, indices: tuple[int, ...]) -> Array:
    """The resting levels [m] with the first drain scaled; not finite above the vessel's top."""
    system, rows = runs.system, runs.rows(list(indices))
    top = system.profile.height
    low, high = np.zeros(scales.shape), np.full(scales.shape, top)
    flow = runs.still.flow
    over = flow(high, rows, scales) < system.inflow
    found = bracketed_root(
        lambda level: np.where(over, level - 0.5 * top, flow(level, rows, scales) - system.inflow), low, high
    )
    return np.where(over, np.inf, found)


def _why_none(runs: Runs, target: float, largest: float, display: DisplayUnits) -> str:
    slowest = times_at(runs, np.full(3, _SMALLEST), _ALL)
    if np.all(slowest <= target):
        return f"the other outlets alone drain it in {duration(float(slowest[_TYPICAL]))}"
    if np.any(slowest <= target):
        return "with part of the coefficient range the other outlets alone drain it in time, with the rest they do not"
    fastest = times_at(runs, np.full(3, largest), _ALL)
    outlet = runs.system.outlets[runs.system.first_drain]
    size = "even the largest size"
    if isinstance(outlet, OrificeOutlet):
        size = f"even {display.text(outlet.height * largest, 'bore')}, the largest that fits at its height,"
    if not np.isfinite(fastest).all():
        return f"{size} does not reach the stop level over the whole range"
    return f"{size} takes {duration(float(fastest[_LOW]))}"
