"""An upright cylinder on a flat, conical or dished floor."""

from __future__ import annotations

import math
from functools import cached_property

import numpy as np

from headfall.vessel.end import End
from headfall.vessel.profile import Array, Dimension, Outline
from headfall.vessel.sizes import require_positive


class UprightCylinder:
    """An upright cylinder: a straight side on a floor.

    ``diameter`` and ``height`` [m] are inside sizes; ``height`` is the straight side alone, above the floor's tangent
    line. The property ``height`` counts the floor's depth in.

    Raises ``ImpossibleShapeError`` for a size that is not above nil or a floor made for another diameter.
    """

    def __init__(self, diameter: float, height: float, floor: End) -> None:
        require_positive("diameter of the upright cylinder", diameter)
        require_positive("height of the upright cylinder", height)
        self.diameter = diameter
        self.straight_side = height
        self.floor = floor.fitted(diameter)

    @property
    def height(self) -> float:
        """Height of the inside from lowest point to top [m]."""
        return self.floor.depth + self.straight_side

    @property
    def capacity(self) -> float:
        """Inside volume up to the top [m³]."""
        return self.floor.capacity + self._shell_area * self.straight_side

    @property
    def breakpoints(self) -> tuple[float, ...]:
        """Levels [m] where plan area is not smooth: bottom, joints of the floor, tangent line, top."""
        depth, rim = self.floor.depth, self.floor.rim
        joints = {0.0, depth, self.height} | ({depth - rim[0]} if rim else set())
        return tuple(sorted(joints))

    @cached_property
    def outline(self) -> Outline:
        """The section through the axis, across from the axis."""
        radius, depth, top = self.diameter / 2, self.floor.depth, self.height
        meridian = self.floor.meridian()
        left = np.column_stack((-meridian[:, 1], depth - meridian[:, 0]))
        right = np.column_stack((meridian[-2::-1, 1], depth - meridian[-2::-1, 0]))
        wall = np.vstack(([[-radius, top]], left, right, [[radius, top]]))
        dimensions = [
            Dimension("diameter", (-radius, top), (radius, top)),
            Dimension("height", (radius, depth), (radius, top)),
        ]
        if depth > 0:
            dimensions.append(Dimension("floor.depth", (radius, 0.0), (radius, depth), typed=self.floor.typed_depth))
        joints = (depth,) if depth > 0 else ()
        return Outline(wall, False, "vertical", tuple(dimensions), joints=joints)

    def plan_area(self, level: Array) -> Array:
        """Return the liquid's surface [m²] at each level [m], any shape."""
        if self.floor.depth == 0:
            return np.full(np.shape(level), self._shell_area)
        inside = np.clip(level, 0.0, self.floor.depth)
        return np.where(inside < self.floor.depth, self.floor.plan_area(inside), self._shell_area)

    def volume(self, level: Array) -> Array:
        """Return the volume [m³] below each level [m], any shape."""
        inside = np.clip(level, 0.0, self.height)
        depth = self.floor.depth
        above = self.floor.capacity + self._shell_area * (inside - depth)
        if depth == 0:
            return np.asarray(above)
        return np.where(inside < depth, self.floor.volume(np.minimum(inside, depth)), above)

    def level(self, volume: Array) -> Array:
        """Return the level [m] that holds each volume [m³], any shape."""
        held = np.clip(volume, 0.0, self.capacity)
        depth, below = self.floor.depth, self.floor.capacity
        above = np.minimum(depth + (held - below) / self._shell_area, self.height)
        if depth == 0:
            return np.asarray(above)
        return np.where(held < below, self.floor.height(np.minimum(held, below)), above)

    def reach(self, level: float) -> tuple[float, float]:
        """Return where the wall stands left and right [m across] at a level [m]."""
        below = max(self.floor.depth - max(level, 0.0), 0.0)
        radius = float(self.floor.radius(np.asarray(below)))
        return -radius, radius

    @property
    def _shell_area(self) -> float:
        return math.pi * self.diameter**2 / 4
