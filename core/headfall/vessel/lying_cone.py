"""A conical head on a level drum, up to the drum's axis, in closed form."""

from __future__ import annotations

import math

import numpy as np

from headfall.vessel.profile import Array

# With u the half chord over the radius, the closed forms cancel as u³ and u⁵; up to this u their series are used.
_SERIES_BELOW = 0.4
_TERMS = 21


def plan_area(radius: float, depth: float, level: Array) -> Array:
    """Return the level cut [m²] at each level [m], any shape, 0 … radius.

    A = b·R·(u − m²·arcosh(1/m)) with m = 1 − h/R and u = √(1 − m²): the hyperbola that a level plane cuts from the
    cone, integrated. Own derivation; checked against independent quadrature.
    """
    below_axis, half_chord = _cut(radius, level)
    closed = half_chord - below_axis**2 * _area_hyperbolic(below_axis, half_chord)
    small = np.minimum(half_chord, _SERIES_BELOW)
    series = small**3 * _horner(_AREA_SERIES, small**2)
    return np.asarray(depth * radius * np.where(half_chord < _SERIES_BELOW, series, closed))


def volume(radius: float, depth: float, level: Array) -> Array:
    """Return the volume [m³] below each level [m], any shape, 0 … radius.

    V = b·R²·(arccos m + m³·arcosh(1/m) − 2·u·m)/3. Own derivation; checked against independent quadrature.
    """
    below_axis, half_chord = _cut(radius, level)
    angle = 2 * np.arcsin(np.sqrt(level / (2 * radius)))
    cubic = below_axis**3 * _area_hyperbolic(below_axis, half_chord)
    closed = (angle + cubic - 2 * half_chord * below_axis) / 3
    small = np.minimum(half_chord, _SERIES_BELOW)
    series = small**5 * _horner(_VOLUME_SERIES, small**2)
    return np.asarray(depth * radius**2 * np.where(half_chord < _SERIES_BELOW, series, closed))


def _cut(radius: float, level: Array) -> tuple[Array, Array]:
    below_axis = (radius - level) / radius
    return below_axis, np.sqrt(level * (2 * radius - level)) / radius


def _area_hyperbolic(below_axis: Array, half_chord: Array) -> Array:
    # At the axis the factor before this vanishes faster than the logarithm grows.
    return np.asarray(np.log((1 + half_chord) / np.maximum(below_axis, 1e-150)))


def _horner(coefficients: tuple[float, ...], square: Array) -> Array:
    total = np.full_like(square, coefficients[-1])
    for coefficient in reversed(coefficients[:-1]):
        total = total * square + coefficient
    return total


def _area_series() -> tuple[float, ...]:
    return tuple(2 / (4 * k * k - 1) for k in range(1, _TERMS + 1))


def _volume_series() -> tuple[float, ...]:
    # dV/du = A·u/√(1 − u²), term by term.
    binomial = [math.comb(2 * j, j) / 4**j for j in range(_TERMS)]
    product = np.convolve(_area_series(), binomial)[:_TERMS]
    return tuple(float(value) / (2 * n + 5) for n, value in enumerate(product))


_AREA_SERIES = _area_series()
_VOLUME_SERIES = _volume_series()
