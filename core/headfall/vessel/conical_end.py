"""Conical ends."""

from __future__ import annotations

import math
from dataclasses import dataclass

import numpy as np

from headfall.vessel import lying_cone
from headfall.vessel.end import End
from headfall.vessel.profile import Array


@dataclass(frozen=True, slots=True)
class ConicalEnd(End):
    """A cone from the tangent line to its point."""

    @property
    def typed_depth(self) -> bool:
        """Whether the depth is a size of its own: it is."""
        return True

    @property
    def pointed(self) -> bool:
        """Whether the wall comes to a point: it does."""
        return True

    @property
    def capacity(self) -> float:
        """Volume between tangent line and point [m³]: π·D²·b/12."""
        return math.pi / 12 * self.diameter**2 * self.depth

    def radius(self, distance: Array) -> Array:
        """Return the inside radius [m] at each distance [m] beyond the tangent line."""
        return self.diameter / 2 * (1 - np.asarray(distance) / self.depth)

    def distance(self, radius: Array) -> Array:
        """Return how far beyond the tangent line [m] the wall has each inside radius [m]."""
        return self.depth * (1 - 2 * np.asarray(radius) / self.diameter)

    def meridian(self) -> Array:
        """Return the wall from tangent line to point: shape (2, 2), (distance, radius) [m]."""
        return np.array([[0.0, self.diameter / 2], [self.depth, 0.0]])

    def plan_area(self, height: Array) -> Array:
        """Return the level cut [m²] at each height [m] above the point."""
        return np.asarray(math.pi * np.square(height * (self.diameter / (2 * self.depth))))

    def volume(self, height: Array) -> Array:
        """Return the volume [m³] below each height [m] above the point."""
        return self.plan_area(height) * height / 3

    def height(self, volume: Array) -> Array:
        """Return the height [m] above the point that holds each volume [m³]."""
        return self.depth * np.cbrt(volume / self.capacity)

    def lying_area(self, level: Array) -> Array:
        """Return the level cut [m²] of a drum's head, at each level [m] up to the axis."""
        return lying_cone.plan_area(self.diameter / 2, self.depth, level)

    def lying_volume(self, level: Array) -> Array:
        """Return what a drum's head holds [m³] below each level [m] up to the axis."""
        return lying_cone.volume(self.diameter / 2, self.depth, level)
