"""An upright cone or frustum, either way up."""

from __future__ import annotations

import math
from dataclasses import dataclass

import numpy as np

from headfall.vessel.profile import Array, Dimension, Outline
from headfall.vessel.sizes import ImpossibleShapeError, require_not_negative, require_positive


@dataclass(frozen=True)
class Cone:
    """A cone or frustum; ``top_diameter``, ``bottom_diameter`` and ``height`` are inside sizes [m].

    Raises ``ImpossibleShapeError`` where the height is not above nil, a diameter is negative or both are nil.
    """

    top_diameter: float
    bottom_diameter: float
    height: float

    def __post_init__(self) -> None:
        require_not_negative("top diameter of the cone", self.top_diameter)
        require_not_negative("bottom diameter of the cone", self.bottom_diameter)
        require_positive("height of the cone", self.height)
        if self.top_diameter == self.bottom_diameter == 0:
            raise ImpossibleShapeError("top diameter of the cone", 0.0, "above nil where the bottom comes to a point")

    @property
    def capacity(self) -> float:
        """Inside volume up to the top [m³]."""
        return float(self.volume(np.asarray(self.height)))

    @property
    def breakpoints(self) -> tuple[float, ...]:
        """Levels [m] where plan area is not smooth: bottom and top."""
        return (0.0, self.height)

    @property
    def outline(self) -> Outline:
        """The section through the axis, across from the axis. Pointed at the top it is a closed line."""
        top, bottom = self.top_diameter / 2, self.bottom_diameter / 2
        left = [[-top, self.height], [-bottom, 0.0]]
        right = [[bottom, 0.0], [top, self.height]] if bottom > 0 else [[top, self.height]]
        side = max(top, bottom)
        dimensions = (
            Dimension("top_diameter", (-top, self.height), (top, self.height)),
            Dimension("bottom_diameter", (-bottom, 0.0), (bottom, 0.0)),
            Dimension("height", (side, 0.0), (side, self.height)),
        )
        return Outline(np.array(left + right), top == 0, "vertical", dimensions)

    def plan_area(self, level: Array) -> Array:
        """Return the liquid's surface [m²] at each level [m], any shape."""
        return np.asarray(math.pi * np.square(self._radius(np.clip(level, 0.0, self.height))))

    def volume(self, level: Array) -> Array:
        """Return the volume [m³] below each level [m], any shape: π·h·(r₁² + r₁·r + r²)/3."""
        inside = np.clip(level, 0.0, self.height)
        bottom, radius = self.bottom_diameter / 2, self._radius(inside)
        return np.asarray(math.pi / 3 * inside * (bottom**2 + bottom * radius + radius**2))

    def level(self, volume: Array) -> Array:
        """Return the level [m] that holds each volume [m³], any shape.

        The cubes of the radii rise or fall evenly with volume; the volume is then divided by the mean plan area, so
        that no difference of near numbers is taken.
        """
        held = np.clip(volume, 0.0, self.capacity)
        bottom = self.bottom_diameter / 2
        slope = (self.top_diameter - self.bottom_diameter) / (2 * self.height)
        radius = np.cbrt(np.maximum(bottom**3 + 3 / math.pi * slope * held, 0.0))
        mean_area = math.pi / 3 * (bottom**2 + bottom * radius + radius**2)
        empty = held == 0
        level = np.where(empty, 0.0, held / np.where(empty, 1.0, mean_area))
        # At a point on top the cube root would make much of the last digit; full is full.
        return np.where(held >= self.capacity, self.height, np.minimum(level, self.height))

    def reach(self, level: float) -> tuple[float, float]:
        """Return where the wall stands left and right [m across] at a level [m]."""
        radius = float(self._radius(np.clip(level, 0.0, self.height)))
        return -radius, radius

    def _radius(self, level: Array) -> Array:
        share = np.asarray(level) / self.height
        return np.asarray(self.top_diameter / 2 * share + self.bottom_diameter / 2 * (1 - share))
