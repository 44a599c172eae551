"""A sphere."""

from __future__ import annotations

import math
from dataclasses import dataclass
from functools import cached_property

import numpy as np

from headfall.vessel.circle import cap_depth, cap_volume
from headfall.vessel.profile import Array, Dimension, Outline
from headfall.vessel.sizes import require_positive

_ARC_POINTS = 121


@dataclass(frozen=True)
class Sphere:
    """A sphere of the inside ``diameter`` [m].

    Raises ``ImpossibleShapeError`` for a diameter that is not above nil.
    """

    diameter: float

    def __post_init__(self) -> None:
        require_positive("diameter of the sphere", self.diameter)

    @property
    def height(self) -> float:
        """Height of the inside from lowest point to top [m]."""
        return self.diameter

    @property
    def capacity(self) -> float:
        """Inside volume [m³]."""
        return math.pi / 6 * self.diameter**3

    @property
    def breakpoints(self) -> tuple[float, ...]:
        """Levels [m] where plan area is not smooth: bottom and top."""
        return (0.0, self.diameter)

    @cached_property
    def outline(self) -> Outline:
        """The section through the middle, across from the middle; a closed line from the top round by the left."""
        radius = self.diameter / 2
        angle = np.linspace(0.0, 2 * math.pi, _ARC_POINTS)
        wall = np.column_stack((-radius * np.sin(angle), radius * (1 + np.cos(angle))))
        wall[-1] = wall[0]
        dimensions = (Dimension("diameter", (-radius, radius), (radius, radius)),)
        return Outline(wall, True, "vertical", dimensions)

    def plan_area(self, level: Array) -> Array:
        """Return the liquid's surface [m²] at each level [m], any shape: π·h·(D − h)."""
        inside = np.clip(level, 0.0, self.diameter)
        return np.asarray(math.pi * inside * (self.diameter - inside))

    def volume(self, level: Array) -> Array:
        """Return the volume [m³] below each level [m], any shape."""
        return cap_volume(self.diameter / 2, np.clip(level, 0.0, self.diameter))

    def level(self, volume: Array) -> Array:
        """Return the level [m] that holds each volume [m³], any shape."""
        return cap_depth(self.diameter / 2, np.asarray(volume))

    def reach(self, level: float) -> tuple[float, float]:
        """Return where the wall stands left and right [m across] at a level [m]."""
        inside = min(max(level, 0.0), self.diameter)
        half_chord = math.sqrt(inside * (self.diameter - inside))
        return -half_chord, half_chord
