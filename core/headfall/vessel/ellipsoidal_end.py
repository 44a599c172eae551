"""Ellipsoidal and hemispherical ends."""

from __future__ import annotations

import math
from dataclasses import dataclass

import numpy as np

from headfall.vessel.circle import cap_depth, cap_volume
from headfall.vessel.end import End
from headfall.vessel.profile import Array

_ARC_POINTS = 31


@dataclass(frozen=True, slots=True)
class EllipsoidalEnd(End):
    """Half an ellipsoid of revolution; half a sphere where the depth is the radius."""

    @property
    def capacity(self) -> float:
        """Volume between tangent line and tip [m³]: π·D²·b/6."""
        return math.pi / 6 * self.diameter**2 * self.depth

    def radius(self, distance: Array) -> Array:
        """Return the inside radius [m] at each distance [m] beyond the tangent line."""
        share = np.square(np.asarray(distance) / self.depth)
        return np.asarray(self.diameter / 2 * np.sqrt(np.maximum(1 - share, 0.0)))

    def distance(self, radius: Array) -> Array:
        """Return how far beyond the tangent line [m] the wall has each inside radius [m]."""
        share = np.square(2 * np.asarray(radius) / self.diameter)
        return np.asarray(self.depth * np.sqrt(np.maximum(1 - share, 0.0)))

    def meridian(self) -> Array:
        """Return the wall from tangent line to tip: shape (31, 2), (distance, radius) [m]."""
        angle = np.linspace(0.0, math.pi / 2, _ARC_POINTS)
        wall = np.column_stack((self.depth * np.sin(angle), self.diameter / 2 * np.cos(angle)))
        wall[-1] = self.depth, 0.0
        return wall

    def plan_area(self, height: Array) -> Array:
        """Return the level cut [m²] at each height [m] above the tip."""
        return np.asarray(math.pi * self._slimness**2 * height * (2 * self.depth - height))

    def volume(self, height: Array) -> Array:
        """Return the volume [m³] below each height [m] above the tip."""
        return self._slimness**2 * cap_volume(self.depth, height)

    def height(self, volume: Array) -> Array:
        """Return the height [m] above the tip that holds each volume [m³]."""
        return cap_depth(self.depth, volume / self._slimness**2)

    def lying_area(self, level: Array) -> Array:
        """Return the level cut [m²] of a drum's head, at each level [m] up to the axis: half an ellipse."""
        return np.asarray(math.pi / 2 / self._slimness * level * (self.diameter - level))

    def lying_volume(self, level: Array) -> Array:
        """Return what a drum's head holds [m³] below each level [m]: a cap of a sphere, stretched and halved."""
        return cap_volume(self.diameter / 2, level) / (2 * self._slimness)

    @property
    def _slimness(self) -> float:
        return self.diameter / (2 * self.depth)
