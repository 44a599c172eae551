"""Why there is no answer, in a sentence."""

from __future__ import annotations

import numpy as np

from headfall.outlet.headspace import ClosedHeadspace
from headfall.quantities import DisplayUnits
from headfall.runs import Runs

_TYPICAL = 1


def reason_stop_not_reached(runs: Runs, display: DisplayUnits) -> str:
    """Return why the run with typical coefficients does not come to its stop level."""
    system = runs.system
    never = f"never reaches {display.text(system.stop, 'level')}"
    rest, why = float(runs.rest[_TYPICAL]), runs.ends[_TYPICAL][1]
    if why == "overflow":
        return f"{never}: it rises to overflow, {display.text(runs.ends[_TYPICAL][0], 'level')}"
    if why == "surging":
        return f"{never}: {reason_surging(runs, display)}"
    if system.inflow <= 0 and runs.still.is_free:
        return f"{never}: {_nothing_flows_in(runs, why, display)}"
    volume = display.text(float(system.profile.volume(np.array(rest))), "volume")
    if why == "at rest":
        return f"{never}: it rests at {display.text(system.start, 'level')}"
    if system.inflow <= 0:
        return f"{never}: {_held_back(runs)} at {display.text(rest, 'level')} with {volume}"
    return f"{never}: settles at {display.text(rest, 'level')} with {volume}"


def _nothing_flows_in(runs: Runs, why: str, display: DisplayUnits) -> str:
    system = runs.system
    heel = display.text(runs.heel, "level")
    if why == "at rest" and system.start > runs.heel + system.tolerance:
        return "nothing flows in, and no outlet lets anything out"
    if why == "at rest":
        return f"nothing flows in, and below the lowest opening at {heel} nothing flows out"
    if system.stop > system.start:
        return "nothing flows in"
    held = display.text(float(system.profile.volume(np.array(runs.heel))), "volume")
    return f"keeps a heel of {held} below the lowest opening, {heel}"


def _held_back(runs: Runs) -> str:
    space = runs.system.headspace
    if isinstance(space, ClosedHeadspace):
        return "the vacuum in the closed headspace holds the liquid"
    if any(tail != -np.inf for tail in runs.discharge.tailwaters):
        return "inside and outside come to the same height"
    return "settles"


def reason_surging(runs: Runs, display: DisplayUnits) -> str:
    """Return why no level rests: a line that flows full takes more than comes in as soon as its inlet is covered."""
    at, inflow = display.text(float(runs.rest[_TYPICAL]), "level"), display.text(runs.system.inflow, "flow")
    full = display.text(runs.leaps[_TYPICAL], "flow")
    return f"no steady level: it surges about the inlet at {at}, where {full} flows out when full and {inflow} comes in"


def reason_no_rest(runs: Runs, display: DisplayUnits) -> str:
    """Return why the level does not come to rest below overflow."""
    system = runs.system
    rest = float(runs.rest[_TYPICAL])
    inflow = display.text(system.inflow, "flow")
    over = display.text(float(runs.standing_flow_at(system.overflow)[_TYPICAL]), "flow")
    at = display.text(system.overflow, "level")
    needed = f"; a level of {display.text(rest, 'level')} would be needed" if np.isfinite(rest) else ""
    return f"{inflow} flows in and the outlets pass {over} at overflow, {at}{needed}"
