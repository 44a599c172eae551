"""Segments of a circle and caps of a sphere, kept exact down to a film of liquid."""

from __future__ import annotations

import math

import numpy as np

from headfall.vessel.profile import Array


def segment_area(radius: Array | float, depth: Array) -> Array:
    """Return the area [m²] of a circle's segment of the given depth [m], any shape, depth 0 … 2·radius.

    S = R²·(t − sin t)/2 with sin²(t/4) = y/(2R). The usual arccosine form loses every digit near empty; this one
    keeps them. Common practice.
    """
    quarter = np.sqrt(depth / (2 * np.asarray(radius)))
    angle = 4 * np.arcsin(np.minimum(quarter, 1.0))
    return np.asarray(0.5 * np.square(radius) * _angle_less_sine(angle))


def _angle_less_sine(angle: Array) -> Array:
    # t − sin t; below one radian by its series, whose first term dropped is under 1e-16 of the sum.
    square = np.minimum(angle, 1.0) ** 2
    series = np.ones_like(square)
    for factor in (210.0, 156.0, 110.0, 72.0, 42.0, 20.0):
        series = 1 - square / factor * series
    return np.where(angle < 1.0, angle * square / 6 * series, angle - np.sin(angle))


def cap_volume(radius: float, depth: Array) -> Array:
    """Return the volume [m³] of a sphere's cap of the given depth [m], any shape: π·h²·(3R − h)/3. Common practice."""
    return np.asarray(math.pi / 3 * np.square(depth) * (3 * radius - depth))


def cap_depth(radius: float, volume: Array) -> Array:
    """Return the depth [m] of the cap that holds each volume [m³], any shape; the inverse of ``cap_volume``.

    The cubic's middle root in half angles, which keeps every digit of a small depth:
    h = 4R·cos(π/6 − f/6)·sin(f/6) with sin²(f/2) = V/(4πR³/3).
    """
    share = np.clip(volume / (4 * math.pi / 3 * radius**3), 0.0, 1.0)
    sixth = np.arcsin(np.sqrt(share)) / 3
    return np.asarray(4 * radius * np.cos(math.pi / 6 - sixth) * np.sin(sixth))
