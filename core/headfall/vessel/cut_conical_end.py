"""A conical floor cut off at the bore of its outlet."""

from __future__ import annotations

import math
from dataclasses import dataclass

import numpy as np

from headfall.vessel.end import End
from headfall.vessel.profile import Array
from headfall.vessel.sizes import ImpossibleShapeError


@dataclass(frozen=True, slots=True)
class CutConicalEnd(End):
    """A cone from the tangent line to where its inside diameter is ``cut`` [m]; ``depth`` counts to the cut.

    A floor only: as a drum's head it has no closed form here and is refused when the drum is made.
    """

    cut: float = 0.0

    @property
    def typed_depth(self) -> bool:
        """Whether the depth is a size of its own: it is."""
        return True

    @property
    def _slope(self) -> float:
        """Radius gained per height."""
        return (self.diameter - self.cut) / (2 * self.depth)

    @property
    def capacity(self) -> float:
        """Volume between tangent line and cut [m³]: π·b·(D² + D·c + c²)/12."""
        return math.pi / 12 * self.depth * (self.diameter**2 + self.diameter * self.cut + self.cut**2)

    def fitted(self, diameter: float) -> CutConicalEnd:
        """Return this end on a vessel of the diameter [m].

        Raises ``ImpossibleShapeError`` where the cut is not narrower than the vessel.
        """
        if self.cut >= diameter:
            raise ImpossibleShapeError(
                "cut of the conical floor", self.cut, f"below the vessel's diameter, {diameter:g}"
            )
        return CutConicalEnd(self.depth, diameter, self.cut)

    def radius(self, distance: Array) -> Array:
        """Return the inside radius [m] at each distance [m] beyond the tangent line."""
        return np.asarray(self.diameter / 2 - self._slope * np.asarray(distance))

    def distance(self, radius: Array) -> Array:
        """Return how far beyond the tangent line [m] the wall has each inside radius [m]."""
        return np.asarray((self.diameter / 2 - np.asarray(radius)) / self._slope)

    def meridian(self) -> Array:
        """Return the wall from tangent line to the middle of the cut: shape (3, 2), (distance, radius) [m]."""
        return np.array([[0.0, self.diameter / 2], [self.depth, self.cut / 2], [self.depth, 0.0]])

    def plan_area(self, height: Array) -> Array:
        """Return the level cut [m²] at each height [m] above the cut."""
        return np.asarray(math.pi * np.square(self.cut / 2 + self._slope * np.asarray(height)))

    def volume(self, height: Array) -> Array:
        """Return the volume [m³] below each height [m] above the cut."""
        low, wide = self.cut / 2, self.cut / 2 + self._slope * np.asarray(height)
        return np.asarray(math.pi / 3 * height * (low**2 + low * wide + wide**2))

    def height(self, volume: Array) -> Array:
        """Return the height [m] above the cut that holds each volume [m³]."""
        low = self.cut / 2
        return np.asarray((np.cbrt(low**3 + 3 * self._slope * np.asarray(volume) / math.pi) - low) / self._slope)
