"""The scale of an outlet that meets a drain time."""

from __future__ import annotations

from collections.abc import Callable

import numpy as np
import numpy.typing as npt

Array = npt.NDArray[np.float64]

_STEPS = 100
_CLOSE = 1e-7
_NARROW = 1e-11
_FLATTEST = -0.005
_TOO_SHORT = 1e-6


def scale_for_time(
    time_at: Callable[[Array], Array],
    target: float,
    first_guess: Array,
    present_time: Array,
    blocked: Array,
    time_constant: Array,
    smallest: float,
    largest: float,
) -> Array:
    """Return for each sample the scale [-] at which the drain time equals ``target`` [s]; NaN where no scale does.

    ``time_at`` maps scales of shape (samples,) to times [s]; infinite where the stop is not reached, and falling with
    the scale. Where it leaps from never to less than the target, the scale just above the leap is the answer. Looks
    between ``smallest`` and ``largest``. ``blocked`` is the square of the scale at which the stop is just not reached
    any more, nil or negative where it is reached with any; it may be too small a figure, not too large a one.
    ``time_constant`` [s] is that of the level at such a scale, infinite where nothing flows in. ``present_time`` [s] is
    the time at a scale of 1, not finite where the stop is not reached.

    The unknown is u = ln(scale² − blocked), and time is measured by y = ln(exp(t/τ) − 1). Far from the blocked scale
    t falls as exp(−u), near it as −τ·u, so that y falls with u by about 1 throughout; exactly so where nothing flows
    in and one opening faces down. A secant, kept within a bracket.
    """
    tiny = 1e-14 * np.maximum(np.square(first_guess), np.abs(blocked))
    low = np.log(np.maximum(smallest**2 - blocked, tiny))
    high = np.log(np.maximum(largest**2 - blocked, tiny))
    wanted = _measure(np.full(first_guess.shape, target), time_constant)

    def scale_of(place: Array) -> Array:
        return np.sqrt(np.clip(blocked + np.exp(place), smallest**2, largest**2))

    slope = np.full(first_guess.shape, -1.0)
    before = np.log(np.maximum(1.0 - blocked, tiny))
    excess_before = _measure(present_time, time_constant) - wanted
    trial = np.clip(np.log(np.maximum(np.square(first_guess) - blocked, tiny)), low, high)
    too_slow = too_fast = np.zeros(first_guess.shape, dtype=bool)
    for step in range(_STEPS):
        excess = _measure(time_at(scale_of(trial)), time_constant) - wanted
        with np.errstate(divide="ignore", invalid="ignore"):
            secant = (excess - excess_before) / (trial - before)
        too_slow, too_fast = too_slow | (excess > 0), too_fast | (excess < 0)
        low = np.where(excess > 0, np.maximum(low, trial), low)
        high = np.where(excess < 0, np.minimum(high, trial), high)
        trusted = np.isfinite(secant) & (secant < _FLATTEST) & (np.abs(trial - before) > _TOO_SHORT)
        slope = np.where(trusted, secant, slope)
        with np.errstate(invalid="ignore"):
            proposal = trial - excess / slope
        inside = np.isfinite(proposal) & (proposal > low) & (proposal < high)
        close = np.abs(excess) < _CLOSE
        narrow = np.exp(high) - np.exp(low) < _NARROW * np.square(scale_of(trial))
        if step > 0 and np.all(close | narrow):
            break
        before, excess_before = trial, excess
        trial = np.where(close | narrow, trial, np.where(inside, proposal, _safe_step(trial, excess, low, high, step)))
    # One more step of the secant, not evaluated again, squares what is left. Where time leaps at one scale from never
    # to less than the target, the scale just above it is the answer.
    place = np.where(close, np.where(inside, proposal, trial), high)
    found = close | (narrow & too_slow & too_fast)
    return np.asarray(np.where(found, scale_of(place), np.nan), dtype=float)


def _measure(time: Array, time_constant: Array) -> Array:
    """Return y = ln(exp(t/τ) − 1), ln t up to a constant where τ is infinite."""
    with np.errstate(divide="ignore"):
        part = time / np.where(np.isfinite(time_constant), time_constant, 1.0)
        return np.where(np.isfinite(time_constant), part + np.log(-np.expm1(-part)), np.log(time))


def _safe_step(trial: Array, excess: Array, low: Array, high: Array, step: int) -> Array:
    """A few e-folds at first, then the middle of the bracket."""
    middle = 0.5 * (low + high)
    if step > 2:
        return middle
    stride = np.where(excess > 0, trial + 1.5, trial - 1.5)
    return np.where((stride > low) & (stride < high), stride, middle)
