"""A vectorised bracketing root finder."""

from __future__ import annotations

from collections.abc import Callable

import numpy as np
import numpy.typing as npt

Array = npt.NDArray[np.float64]

_STEPS = 200


def bracketed_root(function: Callable[[Array], Array], low: Array, high: Array, relative: float = 4e-16) -> Array:
    """Return a root of ``function`` in each interval [low, high].

    ``low`` and ``high`` have one shape; ``function`` maps an array of that shape to values of that shape, each with
    opposite signs (or nil) at the two ends. The root is right to a part ``relative`` [-] of itself. Chandrupatla's
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
        tolerance = 2 * relative * np.abs(best) + 1e-300
        width = np.abs(b - a)
        limit = tolerance / np.where(width > 0, width, 1.0)
        if np.all((limit > 0.5) | (best_value == 0) | (width == 0)):
            return best
        fraction = np.clip(_next_fraction(a, b, c, fa, fb, fc), np.minimum(limit, 0.5), 1 - np.minimum(limit, 0.5))
    return best


def _next_fraction(a: Array, b: Array, c: Array, fa: Array, fb: Array, fc: Array) -> Array:
    with np.errstate(divide="ignore", invalid="ignore"):
        xi = (a - b) / (c - b)
        phi = (fa - fb) / (fc - fb)
        trusted = (phi**2 < xi) & ((1 - phi) ** 2 < 1 - xi)
        inverse = fa / (fb - fa) * fc / (fb - fc) + (c - a) / (b - a) * fa / (fc - fa) * fb / (fc - fb)
    return np.where(trusted & np.isfinite(inverse), inverse, 0.5)
