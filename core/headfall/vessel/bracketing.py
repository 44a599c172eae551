"""The level that holds a volume, for vessels whose volume follows no power of the level."""

from __future__ import annotations

from collections.abc import Callable

import numpy as np

from headfall.vessel.profile import Array

NO_VOLUME = 1e-280
"""Less than this [m³] is nothing: still smaller floats have fewer digits, and their quotients leave the range."""

_ROUNDS = 100
_LAST_STEP = 4e-16


def bracketed_level(
    target: Array,
    guess: Array,
    between: tuple[Array, Array],
    volume: Callable[[Array], Array],
    plan_area: Callable[[Array], Array],
) -> Array:
    """Return the level [m] at which ``volume`` [m³] meets each target [m³], any shape.

    ``between`` are arrays of levels [m], below and above the answer, one pair for each target; ``volume`` rises over
    them. Newton's rule on ln V against ln h; a step that would leave the bracket, which closes in round by round,
    halves the bracket instead. Guesses [m] must be above nil and targets ``NO_VOLUME`` or more. Common practice.
    """
    low, high = np.array(between[0]), np.array(between[1])
    level = np.clip(guess, low, high)
    for _ in range(_ROUNDS):
        held, area = volume(level), plan_area(level)
        low, high = np.where(held <= target, level, low), np.where(held >= target, level, high)
        with np.errstate(divide="ignore", invalid="ignore", over="ignore"):
            stepped = level * np.exp(np.log(target / held) * held / (area * level))
        inside = (stepped > low) & (stepped < high)
        # A step too small to matter ends the search; it may well fall on the bracket's own edge.
        there = np.abs(stepped - level) <= _LAST_STEP * level
        moved = np.where(there, level, np.where(inside, stepped, 0.5 * (low + high)))
        done = np.abs(moved - level) <= _LAST_STEP * level
        level = moved
        if np.all(done):
            break
    return np.asarray(level)
