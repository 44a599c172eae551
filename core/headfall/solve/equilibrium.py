"""Where the level comes to rest at a steady inflow."""

from __future__ import annotations

from collections.abc import Callable

import numpy as np
import numpy.typing as npt

from headfall.solve.root import bracketed_root

Array = npt.NDArray[np.float64]

_DOUBLINGS = 60


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
