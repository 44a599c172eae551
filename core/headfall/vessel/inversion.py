"""The level that holds a volume, where there is no closed form."""

from __future__ import annotations

from collections.abc import Callable

import numpy as np

from headfall.vessel.profile import Array

_ROUNDS = 60
# The rule squares what is left, so a last step of this size leaves nothing that a float could hold.
_LAST_STEP = 1e-8


def level_holding(
    target: Array,
    guess: Array,
    volume: Callable[[Array], Array],
    plan_area: Callable[[Array], Array],
    between: tuple[float, float],
) -> Array:
    """Return the level [m] at which ``volume`` [m³] meets each target, any shape.

    Newton's rule on ln V against ln h, which is nearly straight for every vessel that closes to a point or a line
    below, so a film of liquid is found to the same number of digits as a full vessel. ``guess`` [m] and ``target``
    must be above nil; the answer stays ``between`` the two levels.
    """
    level = np.clip(guess, *between)
    for _ in range(_ROUNDS):
        held = volume(level)
        step = np.log(target / held) * held / (plan_area(level) * level)
        level = np.clip(level * np.exp(step), *between)
        if np.all(np.abs(step) < _LAST_STEP):
            break
    return np.asarray(level)
