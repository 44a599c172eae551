"""The outflow law integrated over the height of a side opening, covered or partly covered.

Both functions return Q / (C_d·√(2g)) for an ideal opening of one size; multiply by C_d·√(2g) and by the size.
Source: ``opening_integral``. The round opening needs complete elliptic integrals where the level stands near its
crown; they come from the arithmetic–geometric mean, so that no special-function library is on the way.
"""

from __future__ import annotations

import numpy as np
import numpy.typing as npt

Array = npt.NDArray[np.float64]

_ORDER = 16
_abscissa, _weight = np.polynomial.legendre.leggauss(_ORDER)
_ANGLE = np.pi / 4 * (1 + _abscissa)
_SINE_SQUARED = np.sin(_ANGLE) ** 2
_PARTLY_COVERED_WEIGHT = np.pi / 4 * _weight * 4 * _SINE_SQUARED * np.cos(_ANGLE) ** 2
_second_kind_angle = np.arange(1, _ORDER + 1) * np.pi / (_ORDER + 1)
_SECOND_KIND_NODE = 0.5 * (1 + np.cos(_second_kind_angle))
_SECOND_KIND_WEIGHT = 0.5 * np.pi / (_ORDER + 1) * np.sin(_second_kind_angle) ** 2
_AGM_STEPS = 9


def round_opening(covered: Array) -> Array:
    """Return J(s) = ∫₀^min(s, 1) 2·√(y·(1 − y))·√(s − y) dy for a round side opening.

    ``covered`` [-], any shape, is s: the depth of the level above the opening's lowest point over its diameter.
    J is 0 for s ≤ 0, J(1) = 8/15, and tends to (π/4)·√(s − 1/2) for large s. Q = C_d·√(2g)·d^2.5·J.
    Below 0.5 and above 1.5 a fixed Gauss rule gives 14 digits; between, where the integrand's singular points meet,
    J = (4/15)·[2·(1 − m + m²)·E(m) − (1 − m)·(2 − m)·K(m)] with m = s and its continuation for s > 1.
    """
    covered = np.asarray(covered, dtype=float)
    result = np.zeros_like(covered)
    small = (covered > 0) & (covered < 0.5)
    middle = (covered >= 0.5) & (covered < 1.5)
    large = covered >= 1.5
    if small.any():
        s = covered[small]
        result[small] = s * s * (np.sqrt(1 - s[:, None] * _SINE_SQUARED) @ _PARTLY_COVERED_WEIGHT)
    if middle.any():
        result[middle] = _by_elliptic_integrals(covered[middle])
    if large.any():
        result[large] = np.sqrt(covered[large][:, None] - _SECOND_KIND_NODE) @ _SECOND_KIND_WEIGHT
    return result


def _by_elliptic_integrals(s: Array) -> Array:
    above = s > 1
    modulus = np.where(above, 1 / s, s)
    first, second = _complete_elliptic(modulus)
    root = np.sqrt(s)
    first_here = np.where(above, first / root, first)
    second_here = np.where(above, root * (second - (1 - modulus) * first), second)
    value = 4 / 15 * (2 * (1 - s + s * s) * second_here - (1 - s) * (2 - s) * first_here)
    return np.asarray(value, dtype=float)


def _complete_elliptic(parameter: Array) -> tuple[Array, Array]:
    """Return K(m) and E(m) by the arithmetic–geometric mean, 0 ≤ m ≤ 1; at m = 1, K is large instead of infinite."""
    mean = np.ones_like(parameter)
    other = np.sqrt(np.maximum(1 - parameter, 1e-30))
    total = 0.5 * parameter
    power = 1.0
    for _ in range(_AGM_STEPS):
        difference = 0.5 * (mean - other)
        mean, other = 0.5 * (mean + other), np.sqrt(mean * other)
        total = total + power * difference * difference
        power *= 2
    first = np.pi / (2 * mean)
    return first, first * (1 - total)


def rectangular_opening(bottom_depth: Array, height: float | Array) -> Array:
    """Return (2/3)·(H₁^1.5 − H₂^1.5) [m^1.5], the flow of a rectangular side opening over C_d·√(2g)·width.

    ``bottom_depth`` [m], any shape, is H₁, the depth of the level above the lower edge; H₂ = H₁ − height, nil where
    the opening is partly covered.
    """
    lower = np.maximum(bottom_depth, 0.0)
    upper = np.maximum(lower - height, 0.0)
    return np.asarray(2 / 3 * (lower * np.sqrt(lower) - upper * np.sqrt(upper)), dtype=float)
