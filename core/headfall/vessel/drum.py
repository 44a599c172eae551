"""A level lying drum with any two heads."""

from __future__ import annotations

import math
from functools import cached_property

import numpy as np

from headfall.vessel.circle import segment_area
from headfall.vessel.end import End
from headfall.vessel.inversion import level_holding
from headfall.vessel.profile import Array, Dimension, Outline
from headfall.vessel.sizes import require_not_negative, require_positive

# Levels over the radius at which a first guess is kept; below the first the volume follows a power of the level.
_GUESS_LEVELS = np.geomspace(1e-4, 1.0, 80)


class Drum:
    """A level lying drum; ``diameter`` and ``length`` (tangent line to tangent line) are inside sizes [m].

    The lower half is worked out; the upper half is its mirror image, so that a full drum is answered as exactly as
    an empty one. ``length`` may be nil between two heads that have depth.

    Raises ``ImpossibleShapeError`` for a diameter not above nil, a negative length, a length of nil between flat
    heads, or a head made for another diameter.
    """

    def __init__(self, diameter: float, length: float, low_head: End, high_head: End) -> None:
        require_positive("diameter of the drum", diameter)
        require_not_negative("length of the drum", length)
        if low_head.depth == high_head.depth == 0:
            require_positive("length of the drum", length)
        self.diameter = diameter
        self.length = length
        self.low_head = low_head.fitted(diameter)
        self.high_head = high_head.fitted(diameter)

    @property
    def height(self) -> float:
        """Height of the inside from lowest point to top [m]."""
        return self.diameter

    @cached_property
    def capacity(self) -> float:
        """Inside volume [m³]."""
        shell = math.pi * self.diameter**2 / 4 * self.length
        return shell + self.low_head.capacity + self.high_head.capacity

    @cached_property
    def breakpoints(self) -> tuple[float, ...]:
        """Levels [m] where plan area is not smooth: bottom, rims of crowns, the axis between cones, top."""
        radius = self.diameter / 2
        levels = {0.0, self.diameter}
        for head in (self.low_head, self.high_head):
            if head.rim:
                levels |= {radius - head.rim[1], radius + head.rim[1]}
            if head.pointed:
                levels.add(radius)
        return tuple(sorted(levels))

    @cached_property
    def outline(self) -> Outline:
        """The section along the axis, across from the low tangent line; a closed line."""
        radius = self.diameter / 2
        low, high = self.low_head.meridian(), self.high_head.meridian()
        low_wall = np.vstack((low, low[-2::-1] * (1, -1))) * (-1, 1) + np.array((0.0, radius))
        high_wall = np.vstack((high * (1, -1), high[-2::-1])) + np.array((self.length, radius))
        wall = np.vstack((low_wall, high_wall, low_wall[:1]))
        dimensions = (
            Dimension("diameter", (self.length, 0.0), (self.length, self.diameter)),
            Dimension("length", (0.0, 0.0), (self.length, 0.0)),
            *self._head_dimensions(),
        )
        tangents = (0.0, self.length)
        return Outline(wall, True, "horizontal", dimensions, uniform=tangents, tangents=tangents)

    def plan_area(self, level: Array) -> Array:
        """Return the liquid's surface [m²] at each level [m], any shape."""
        inside = np.clip(level, 0.0, self.diameter)
        return self._lower_area(np.minimum(inside, self.diameter - inside))

    def volume(self, level: Array) -> Array:
        """Return the volume [m³] below each level [m], any shape."""
        inside = np.clip(level, 0.0, self.diameter)
        lower = self._lower_volume(np.minimum(inside, self.diameter - inside))
        return np.where(inside <= self.diameter / 2, lower, self.capacity - lower)

    def level(self, volume: Array) -> Array:
        """Return the level [m] that holds each volume [m³], any shape."""
        held = np.clip(volume, 0.0, self.capacity)
        share = np.minimum(held, self.capacity - held)
        empty = share == 0
        target = np.where(empty, self.capacity / 2, share)
        found = level_holding(
            target, self._guess(target), self._lower_volume, self._lower_area, (0.0, self.diameter / 2)
        )
        lower = np.where(empty, 0.0, found)
        return np.where(held <= self.capacity / 2, lower, self.diameter - lower)

    def reach(self, level: float) -> tuple[float, float]:
        """Return where the wall stands left and right [m across] at a level [m]."""
        radius = self.diameter / 2
        from_axis = np.asarray(min(abs(radius - level), radius))
        left = -float(self.low_head.distance(from_axis))
        return left, self.length + float(self.high_head.distance(from_axis))

    def _lower_area(self, level: Array) -> Array:
        shell = 2 * self.length * np.sqrt(level * (self.diameter - level))
        heads = self.low_head.lying_area(level)
        heads = 2 * heads if self._alike else heads + self.high_head.lying_area(level)
        return np.asarray(shell + heads)

    def _lower_volume(self, level: Array) -> Array:
        shell = self.length * segment_area(self.diameter / 2, level)
        heads = self.low_head.lying_volume(level)
        heads = 2 * heads if self._alike else heads + self.high_head.lying_volume(level)
        return np.asarray(shell + heads)

    @property
    def _alike(self) -> bool:
        return self.low_head == self.high_head

    @cached_property
    def _guess_table(self) -> tuple[Array, Array]:
        levels = self.diameter / 2 * _GUESS_LEVELS
        return np.log(self._lower_volume(levels)), np.log(levels)

    def _guess(self, volume: Array) -> Array:
        volumes, levels = self._guess_table
        wanted = np.log(volume)
        power = (levels[1] - levels[0]) / (volumes[1] - volumes[0])
        below = np.minimum(wanted - volumes[0], 0.0) * power
        return np.asarray(np.exp(np.interp(wanted, volumes, levels) + below))

    def _head_dimensions(self) -> tuple[Dimension, ...]:
        radius = self.diameter / 2
        low, high = self.low_head, self.high_head
        names = ("heads.depth", "heads.depth") if self._alike else ("heads.0.depth", "heads.1.depth")
        dimensions = []
        if low.depth > 0:
            dimensions.append(Dimension(names[0], (-low.depth, radius), (0.0, radius), typed=low.typed_depth))
        if high.depth > 0:
            far = self.length + high.depth
            dimensions.append(Dimension(names[1], (self.length, radius), (far, radius), typed=high.typed_depth))
        return tuple(dimensions)
