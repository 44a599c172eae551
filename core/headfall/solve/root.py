"""A vectorised bracketing root finder."""

from __future__ import annotations

from collections.abc import Callable

import numpy as np
import numpy.typing as npt

Array = npt.NDArray[np.float64]

_STEPS = 200
_STRAIGHT_STEPS = 5


def bracketed_root(
    function: Callable[[Array], Array], low: Array, high: Array, relative: float = 4e-16, absolute: float = 1e-300
) -> Array:
    """Return a root of ``function`` in each interval [low, high].

    ``low`` and ``high`` have one shape; ``function`` maps an array of that shape to values of that shape, each with
    opposite signs (or nil) at the two ends. The root is right to a part ``relative`` [-] of itself
    or to ``absolute``, in its own unit. Chandrupatla's
    method (Adv. Eng. Software 28, 145–149, 1997, from memory): inverse quadratic interpolation where it is trusted,
    bisection else. Raises ValueError where the ends do not bracket.
    """
    b = np.array(low, dtype=float)
    a = np.array(high, dtype=float)
    fa, fb = function(a), function(b)
    if np.any(fa * fb > 0):
        raise ValueError("the two ends do not bracket a root")
    c, fc = a.copy(), fa.copy()
    fraction = np.full_like(a, 0.5)
    for _ in range(_STEPS):
        trial = a + fraction * (b - a)
        value = function(trial)
        same = np.sign(value) == np.sign(fa)
        c, fc = np.where(same, a, b), np.where(same, fa, fb)
        b, fb = np.where(same, b, a), np.where(same, fb, fa)
        a, fa = trial, value
        best = np.where(np.abs(fa) < np.abs(fb), a, b)
        best_value = np.where(np.abs(fa) < np.abs(fb), fa, fb)
        tolerance = 2 * relative * np.abs(best) + absolute
        width = np.abs(b - a)
        limit = tolerance / np.where(width > 0, width, 1.0)
        if np.all((limit > 0.5) | (best_value == 0) | (width == 0)):
            return best
        fraction = np.clip(_next_fraction(a, b, c, fa, fb, fc), np.minimum(limit, 0.5), 1 - np.minimum(limit, 0.5))
    return best


def straight_root(
    function: Callable[[Array], Array], low: Array, high: Array, at_low: Array, at_high: Array, relative: float = 1e-12
) -> Array:
    """Return a root of a nearly straight ``function`` between ``low`` and ``high``, at which its values are known.

    All have one shape; the values at the two ends have opposite signs or are nil. Right to a part ``relative`` [-] of
    the bracket's larger end. False position with Anderson and Björck's weights (BIT 13, 253–264, 1973, from memory):
    two or three values do where the function is nearly straight; where they do not, ``bracketed_root`` takes over.
    """
    a, b, fa, fb = low, high, at_low, at_high
    width = relative * np.maximum(np.abs(low), np.abs(high)) + 1e-300
    for _ in range(_STRAIGHT_STEPS):
        gap = fb - fa
        with np.errstate(divide="ignore", invalid="ignore"):
            trial = np.where(gap != 0, b - fb * (b - a) / gap, b)
        value = function(trial)
        if np.all((np.abs(trial - b) <= width) | (value == 0) | (fb == 0)):
            return np.where(fb == 0, b, trial)
        crossed = np.sign(value) != np.sign(fb)
        with np.errstate(divide="ignore", invalid="ignore"):
            weight = 1 - value / fb
        weight = np.where(np.isfinite(weight) & (weight > 0), weight, 0.5)
        a, fa = np.where(crossed, b, a), np.where(crossed, fb, fa * weight)
        b, fb = trial, value
    return bracketed_root(function, low, high, relative, float(np.min(width)))


def _next_fraction(a: Array, b: Array, c: Array, fa: Array, fb: Array, fc: Array) -> Array:
    with np.errstate(divide="ignore", invalid="ignore"):
        xi = (a - b) / (c - b)
        phi = (fa - fb) / (fc - fb)
        trusted = (phi**2 < xi) & ((1 - phi) ** 2 < 1 - xi)
        inverse = fa / (fb - fa) * fc / (fb - fc) + (c - a) / (b - a) * fa / (fc - fa) * fb / (fc - fb)
    return np.where(trusted & np.isfinite(inverse), inverse, 0.5)
