"""Where the level comes to rest at a steady inflow."""

from __future__ import annotations

from collections.abc import Callable

import numpy as np
import numpy.typing as npt

from headfall.solve.root import bracketed_root

Array = npt.NDArray[np.float64]

_DOUBLINGS = 60
_NIL = 1e-14


def rest_level(flow: Callable[[Array], Array], inflow: float, lowest: float, height: float, samples: int) -> Array:
    """Return the levels [m], shape (samples,), at which the outflow equals the inflow.

    ``flow`` maps levels of shape (samples,) [m] to outflow [m³/s], nil at and below ``lowest`` [m] and rising above it.
    With no inflow the level comes to rest at ``lowest``. The answer may lie above the vessel's ``height`` [m] (it then
    says what level would be needed); it is infinite where even 2⁶⁰ heights would not do.
    """
    low = np.full(samples, lowest)
    if inflow <= 0:
        return low
    step = np.full(samples, height if height > lowest else 1.0)
    high = np.full(samples, max(height, lowest))
    for _ in range(_DOUBLINGS):
        short = flow(high) < inflow
        if not short.any():
            return bracketed_root(lambda level: flow(level) - inflow, low, high)
        low = np.where(short, high, low)
        high = np.where(short, high + step, high)
        step = 2 * step
    return np.full(samples, np.inf)


def still_level(flow: Callable[[Array], Array], height: float, fills: npt.NDArray[np.bool_]) -> Array:
    """Return the levels [m] at which nothing flows out, with nothing flowing in; of the shape of ``fills``.

    ``flow`` maps levels of that shape [m] to outflow [m³/s], which never falls with the level and may be negative
    (liquid comes back in) or nil over a stretch: of that the lower end counts where the vessel ``fills``, else the
    upper one. The answer may lie above the vessel's ``height`` [m]; it is infinite where even 2⁶⁰ heights would not do.
    """
    low, high, step = np.zeros(fills.shape), np.full(fills.shape, height), height
    nil = np.where(fills, 1.0, -1.0) * np.finfo(float).tiny

    def signed(level: Array) -> Array:
        found = flow(level)
        return np.where(found == 0, nil, found)

    for _ in range(_DOUBLINGS):
        still = signed(high) < 0
        if not still.any():
            return _crossing(signed, low, high, _NIL * height)
        low, high = np.where(still, high, low), np.where(still, high + step, high)
        step = 2 * step
    return np.full(fills.shape, np.inf)


def _crossing(signed: Callable[[Array], Array], low: Array, high: Array, absolute: float) -> Array:
    """Where the sign changes; ``low`` itself where it has changed there already."""
    there = signed(low) >= 0
    found = bracketed_root(lambda level: np.where(there, level - low, signed(level)), low, high, absolute=absolute)
    return np.where(there, low, found)
