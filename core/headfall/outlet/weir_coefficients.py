"""Coefficients and head corrections of thin-plate weirs, as in the standard on them; source ``iso_1438``.

Kindsvater and Carter for the rectangular notch, Rehbock for the full width, Kindsvater and Shen for the V-notch; the
numbers are from memory.
"""

from __future__ import annotations

import numpy as np

from headfall.outlet.outlet import Array

HEAD_CORRECTION = 0.001
"""Added to the head over a rectangular notch [m]."""
FULL_WIDTH_CORRECTION = 0.0012
"""Added to the head over a full-width weir [m]."""
_LARGEST_RATIO = 2.5
# Width of the notch over that of the channel; the constant and the part with H/P of the coefficient; the width added.
_CONTRACTED = np.array(
    [
        [0.0, 0.587, -0.0023, 0.0024],
        [0.2, 0.589, -0.0018, 0.0024],
        [0.4, 0.591, 0.0058, 0.0027],
        [0.5, 0.592, 0.010, 0.0030],
        [0.6, 0.593, 0.018, 0.0036],
        [0.7, 0.594, 0.030, 0.0041],
        [0.8, 0.596, 0.045, 0.0042],
        [0.9, 0.598, 0.064, 0.0037],
        [1.0, 0.602, 0.075, -0.0009],
    ]
)
# Angle of the notch [°], coefficient, and what is added to the head [mm].
_NOTCH = np.array(
    [
        [20.0, 0.592, 2.9],
        [30.0, 0.586, 2.2],
        [40.0, 0.582, 1.7],
        [60.0, 0.577, 1.2],
        [90.0, 0.578, 0.85],
        [100.0, 0.581, 0.82],
    ]
)


def full_width_coefficient(head: Array, floor_distance: float) -> Array:
    """Return C [-] of a full-width weir, 0.602 + 0.083·H/P, ``floor_distance`` [m] being P; H/P counts up to 2.5."""
    return np.asarray(0.602 + 0.083 * _ratio(head, floor_distance))


def contracted_coefficient(head: Array, floor_distance: float, width_ratio: float) -> tuple[Array, float]:
    """Return C [-] of a rectangular notch, and the width [m] added to its own.

    ``width_ratio`` is its width over that of the channel, nil for a wide one; ``floor_distance`` [m] as above.
    """
    constant, slope, added = (float(np.interp(width_ratio, _CONTRACTED[:, 0], _CONTRACTED[:, k])) for k in (1, 2, 3))
    return np.asarray(constant + slope * _ratio(head, floor_distance)), added


def notch_coefficient(angle: float) -> tuple[float, float]:
    """Return C [-] of a fully contracted V-notch of an angle [rad], and the head [m] added; ends beyond 20° to 100°."""
    degrees = np.degrees(angle)
    constant, added = (float(np.interp(degrees, _NOTCH[:, 0], _NOTCH[:, k])) for k in (1, 2))
    return constant, added * 1e-3


def _ratio(head: Array, floor_distance: float) -> Array:
    if floor_distance <= 0:
        return np.where(np.asarray(head) > 0, _LARGEST_RATIO, 0.0)
    return np.clip(np.asarray(head) / floor_distance, 0.0, _LARGEST_RATIO)
