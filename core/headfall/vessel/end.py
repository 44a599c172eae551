"""What every end of a round vessel answers: the floor of an upright cylinder or the head of a drum."""

from __future__ import annotations

import math
from dataclasses import dataclass, replace
from typing import Self

import numpy as np

from headfall.vessel.profile import Array
from headfall.vessel.sizes import ImpossibleShapeError


@dataclass(frozen=True, slots=True)
class End:
    """An end of a round vessel; this plain one is flat.

    ``depth`` [m] runs from the tangent line to the tip. ``diameter`` [m] is the vessel's; a flat or conical end has
    none (nil) until ``fitted`` to a vessel. Every method takes and returns arrays of any shape.
    """

    depth: float = 0.0
    diameter: float = 0.0

    @property
    def typed_depth(self) -> bool:
        """Whether the depth is a size of its own rather than following from the diameter."""
        return False

    @property
    def rim(self) -> tuple[float, float] | None:
        """Where the wall changes its curve between tangent line and tip: (distance, radius) [m], or None."""
        return None

    @property
    def pointed(self) -> bool:
        """Whether the wall comes to a point, which leaves a kink at half depth of a drum."""
        return False

    @property
    def capacity(self) -> float:
        """Volume between tangent line and tip [m³]."""
        return 0.0

    def fitted(self, diameter: float) -> Self:
        """Return this end on a vessel of the diameter [m].

        Raises ``ImpossibleShapeError`` where the end was made for another diameter.
        """
        if self.diameter in (0.0, diameter):
            return replace(self, diameter=diameter)
        raise ImpossibleShapeError("diameter of the end", self.diameter, f"the vessel's, {diameter:g}")

    def radius(self, distance: Array) -> Array:
        """Return the inside radius [m] at each distance [m] beyond the tangent line."""
        return np.full_like(distance, self.diameter / 2)

    def distance(self, radius: Array) -> Array:
        """Return how far beyond the tangent line [m] the wall has each inside radius [m]."""
        return np.zeros_like(radius)

    def meridian(self) -> Array:
        """Return the wall from tangent line to tip for drawing: shape (n, 2), (distance, radius) [m]."""
        return np.array([[0.0, self.diameter / 2], [0.0, 0.0]])

    def plan_area(self, height: Array) -> Array:
        """Return the level cut [m²] of a floor at each height [m] above its tip."""
        return np.full_like(height, math.pi * self.diameter**2 / 4)

    def volume(self, height: Array) -> Array:
        """Return what a floor holds [m³] below each height [m] above its tip."""
        return np.zeros_like(height)

    def height(self, volume: Array) -> Array:
        """Return the height [m] above a floor's tip that holds each volume [m³]."""
        return np.zeros_like(volume)

    def lying_area(self, level: Array) -> Array:
        """Return the level cut [m²] of a drum's head, at each level [m] up to the drum's axis."""
        return np.zeros_like(level)

    def lying_volume(self, level: Array) -> Array:
        """Return what a drum's head holds [m³] below each level [m] up to the drum's axis."""
        return np.zeros_like(level)
