"""An upright box."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np

from headfall.vessel.profile import Array, Dimension, Outline
from headfall.vessel.sizes import require_positive


@dataclass(frozen=True)
class Box:
    """An upright box, open at the top; ``length``, ``width`` and ``height`` are inside sizes [m].

    Raises ``ImpossibleShapeError`` for a size that is not above nil.
    """

    length: float
    width: float
    height: float

    def __post_init__(self) -> None:
        require_positive("length of the box", self.length)
        require_positive("width of the box", self.width)
        require_positive("height of the box", self.height)

    @property
    def capacity(self) -> float:
        """Inside volume up to the top [m³]."""
        return self.length * self.width * self.height

    @property
    def breakpoints(self) -> tuple[float, ...]:
        """Levels [m] where plan area is not smooth: bottom and top."""
        return (0.0, self.height)

    @property
    def outline(self) -> Outline:
        """The section along the length, across from the middle."""
        half = self.length / 2
        wall = np.array([[-half, self.height], [-half, 0.0], [half, 0.0], [half, self.height]])
        dimensions = (
            Dimension("length", (-half, 0.0), (half, 0.0)),
            Dimension("height", (half, 0.0), (half, self.height)),
        )
        return Outline(wall, False, "vertical", dimensions)

    def plan_area(self, level: Array) -> Array:
        """Return the liquid's surface [m²] at each level [m], any shape."""
        return np.full(np.shape(level), self.length * self.width)

    def volume(self, level: Array) -> Array:
        """Return the volume [m³] below each level [m], any shape."""
        return np.asarray(self.length * self.width * np.clip(level, 0.0, self.height))

    def level(self, volume: Array) -> Array:
        """Return the level [m] that holds each volume [m³], any shape."""
        return np.asarray(np.clip(np.asarray(volume) / (self.length * self.width), 0.0, self.height))

    def reach(self, level: float) -> tuple[float, float]:
        """Return where the wall stands left and right [m across] at a level [m]."""
        return -self.length / 2, self.length / 2
