"""The outflow law integrated over a side opening that is drowned in part, or under a pressure.

At a height y inside the opening the liquid flows with √(level + pressure head − y) where the outside stands lower, with
√(level + pressure head − tailwater) where it is drowned, and not at all where there is no liquid inside. Sources
``opening_integral``, ``drowned_opening``.
"""

from __future__ import annotations

import numpy as np

from headfall.outlet.outlet import Array
from headfall.outlet.side_opening import rectangular_opening, round_opening

_ORDER = 40
_abscissa, _gauss = np.polynomial.legendre.leggauss(_ORDER)
_angle = np.pi / 4 * (1 + _abscissa)
_FRACTION = np.sin(_angle) ** 2
_WEIGHT = np.pi / 4 * _gauss * np.sin(2 * _angle)


def drowned_opening(
    inside: Array, pressure: Array, outside: Array, height: Array, width: Array, is_round: bool
) -> Array:
    """Return ∫ w(y)·√(driving head) dy [m^2.5] over a side opening; flow over C_d·√(2g).

    ``inside`` and ``outside`` [m] are the levels above the opening's lowest point, ``pressure`` [m] the gauge pressure
    inside as head; ``height`` and ``width`` [m] the opening's sizes, of a round one both its diameter. The stretch up
    to the tailwater and that above it are integrated apart. Negative where it flows in.
    """
    given = np.broadcast_arrays(inside, pressure, outside, height, width)
    inside, pressure, outside, height, width = given
    # Covered and free, the opening only sees another surface: the closed form holds.
    plain = (inside >= height) & (outside <= 0) & (inside + pressure >= height)
    if not plain.any():
        return _integrated(inside, pressure, outside, height, width, is_round)
    total = np.where(plain, inside + pressure, height)
    closed = height**2.5 * round_opening(total / height) if is_round else width * rectangular_opening(total, height)
    if plain.all():
        return np.asarray(closed, dtype=float)
    inside, pressure, outside, height, width = (values[~plain] for values in given)
    found = np.array(closed, dtype=float)
    found[~plain] = _integrated(inside, pressure, outside, height, width, is_round)
    return found


def _integrated(inside: Array, pressure: Array, outside: Array, height: Array, width: Array, is_round: bool) -> Array:
    wet, tail = np.clip(inside, 0.0, height), np.clip(outside, 0.0, height)
    total = inside + pressure
    # Below the lower of the two surfaces the opening is drowned on both sides.
    both = np.minimum(wet, tail)
    difference = np.where(both > 0, total - outside, 0.0)
    drowned = _area(both, height, width, is_round) * np.sign(difference) * np.sqrt(np.abs(difference))
    out = _stretch(both, wet, total, height, width, is_round)
    back = _stretch(both, tail, outside - pressure, height, width, is_round)
    return np.asarray(drowned + out - back, dtype=float)


def _stretch(low: Array, high: Array, surface: Array, height: Array, width: Array, is_round: bool) -> Array:
    """∫ w(y)·√(surface − y) dy from low to high, nil above the surface that drives."""
    top = np.minimum(high, np.maximum(surface, low))
    if not np.any(top > low):
        return np.zeros(np.shape(low))
    length = (top - low)[..., None]
    y = low[..., None] + length * _FRACTION
    if is_round:
        chord = 2 * np.sqrt(np.maximum(y * (height[..., None] - y), 0.0))
    else:
        chord = np.broadcast_to(width[..., None], y.shape)
    head = np.maximum(surface[..., None] - y, 0.0)
    return np.asarray((chord * np.sqrt(head) * length * _WEIGHT).sum(axis=-1), dtype=float)


def _area(depth: Array, height: Array, width: Array, is_round: bool) -> Array:
    """The opening's area [m²] below a depth [m] over its lowest point."""
    if not is_round:
        return np.asarray(width * depth)
    radius = 0.5 * height
    angle = np.arccos(np.clip((radius - depth) / radius, -1.0, 1.0))
    return np.asarray(radius**2 * angle - (radius - depth) * np.sqrt(np.maximum(depth * (height - depth), 0.0)))
