"""The scale of an outlet that meets a drain time."""

from __future__ import annotations

from collections.abc import Callable

import numpy as np
import numpy.typing as npt

Array = npt.NDArray[np.float64]

_STEPS = 80
_CLOSE = 1e-7
_NARROW = 1e-9


def scale_for_time(
    time_at: Callable[[Array], Array],
    target: float,
    first_guess: Array,
    smallest: float,
    largest: float,
    first_slope: float = -2.0,
) -> Array:
    """Return for each sample the scale at which the drain time equals ``target`` [s]; NaN where no scale does.

    ``time_at`` maps scales of shape (samples,) to times [s]; infinite where the stop is not reached, and falling with
    the scale. Looks between ``smallest`` and ``largest``. A secant in ln(time) against ln(scale), kept within a
    bracket and started with ``first_slope``; where nothing flows in and one opening faces down, time goes with the
    scale to the power −2 and the first step is exact.
    """
    low = np.full(first_guess.shape, np.log(smallest))
    high = np.full(first_guess.shape, np.log(largest))
    trial = np.clip(np.log(first_guess), low, high)
    slope = np.full(first_guess.shape, first_slope)
    before, excess_before = trial, np.full(first_guess.shape, np.nan)
    for step in range(_STEPS):
        times = time_at(np.exp(trial))
        with np.errstate(divide="ignore", invalid="ignore"):
            excess = np.log(times / target)
            secant = (excess - excess_before) / (trial - before)
        low = np.where(excess > 0, np.maximum(low, trial), low)
        high = np.where(excess < 0, np.minimum(high, trial), high)
        slope = np.where(np.isfinite(secant) & (secant < -0.2), secant, slope)
        with np.errstate(invalid="ignore"):
            proposal = trial - excess / slope
        inside = np.isfinite(proposal) & (proposal > low) & (proposal < high)
        close = np.abs(excess) < _CLOSE
        if step > 0 and np.all(close | (high - low < _NARROW)):
            break
        before, excess_before = trial, excess
        trial = np.where(inside, proposal, _safe_step(trial, excess, low, high, step))
    # One more step of the secant, not evaluated again, squares what is left.
    return np.asarray(np.where(close, np.exp(np.where(inside, proposal, trial)), np.nan), dtype=float)


def _safe_step(trial: Array, excess: Array, low: Array, high: Array, step: int) -> Array:
    """A doubling or halving of the scale at first, then the middle of the bracket."""
    middle = 0.5 * (low + high)
    if step > 2:
        return middle
    stride = np.where(excess > 0, trial + 0.7, trial - 0.7)
    return np.where((stride > low) & (stride < high), stride, middle)
