"""Why there is no answer, in a sentence."""

from __future__ import annotations

import numpy as np

from headfall.quantities import DisplayUnits
from headfall.runs import Runs

_TYPICAL = 1


def reason_stop_not_reached(runs: Runs, display: DisplayUnits) -> str:
    """Return why the run with typical coefficients does not come to its stop level."""
    system = runs.system
    stop = display.text(system.stop, "level")
    rest = float(runs.rest[_TYPICAL])
    why = runs.ends[_TYPICAL][1]
    volume = display.text(float(system.profile.volume(np.array(rest))), "volume")
    if why == "overflow":
        return f"never reaches {stop}: it rises to overflow, {display.text(system.overflow, 'level')}"
    if system.inflow <= 0:
        heel = display.text(runs.heel, "level")
        held = display.text(float(system.profile.volume(np.array(runs.heel))), "volume")
        if why == "at rest":
            return f"never reaches {stop}: nothing flows in, and below the lowest opening at {heel} nothing flows out"
        if system.stop > system.start:
            return f"never reaches {stop}: nothing flows in"
        return f"never reaches {stop}: keeps a heel of {held} below the lowest opening, {heel}"
    return f"never reaches {stop}: settles at {display.text(rest, 'level')} with {volume}"


def reason_no_rest(runs: Runs, display: DisplayUnits) -> str:
    """Return why the level does not come to rest below overflow."""
    system = runs.system
    rest = float(runs.rest[_TYPICAL])
    inflow = display.text(system.inflow, "flow")
    over = display.text(float(runs.flow_at(system.overflow)[_TYPICAL]), "flow")
    at = display.text(system.overflow, "level")
    needed = f"; a level of {display.text(rest, 'level')} would be needed" if np.isfinite(rest) else ""
    return f"{inflow} flows in and the outlets pass {over} at overflow, {at}{needed}"
