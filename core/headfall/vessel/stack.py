"""Vessels stacked on one another."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import replace
from functools import cached_property

import numpy as np

from headfall.vessel.profile import Array, Dimension, Outline, Profile
from headfall.vessel.sizes import ImpossibleShapeError


class Stack:
    """Upright vessels stacked on one another, the lowest first, each centred on the one below.

    A part is open to the next over the whole of the smaller plan area; where the widths differ there is a level
    ledge.

    Raises ``ImpossibleShapeError`` for a stack without parts, or a part above another that holds something at its
    own level nil (a table whose first volume is above nil).
    """

    def __init__(self, parts: Sequence[Profile]) -> None:
        if not parts:
            raise ImpossibleShapeError("number of parts in the stack", 0, "one or more")
        for number, part in enumerate(parts[1:], start=2):
            dead = float(part.volume(np.asarray(0.0)))
            if dead > 0:
                raise ImpossibleShapeError(f"volume at level 0 of part {number} of the stack", dead, "nil")
        self.parts = tuple(parts)
        joints, below = [0.0], [0.0]
        for part in self.parts:
            joints.append(joints[-1] + part.height)
            below.append(below[-1] + part.capacity)
        self._joints = tuple(joints)
        self._below = tuple(below)

    @property
    def height(self) -> float:
        """Height of the inside from lowest point to top [m]."""
        return self._joints[-1]

    @property
    def capacity(self) -> float:
        """Inside volume of all parts [m³]."""
        return self._below[-1]

    @cached_property
    def breakpoints(self) -> tuple[float, ...]:
        """Levels [m] where plan area is not smooth: those of the parts, joints among them."""
        levels = set(self._joints)
        for part, base, top in zip(self.parts, self._joints[:-1], self._joints[1:], strict=True):
            levels |= {min(base + level, top) for level in part.breakpoints[:-1]}
        return tuple(sorted(levels))

    @cached_property
    def outline(self) -> Outline:
        """The sections of the parts in one, across from the middle.

        Fields of the dimensions begin with ``parts.<index>.``, counted from nil.
        """
        left, right = np.zeros((0, 2)), np.zeros((0, 2))
        dimensions: list[Dimension] = []
        joints: set[float] = set(self._joints[1:-1])
        for index, (part, base) in enumerate(zip(self.parts, self._joints[:-1], strict=True)):
            outline, shift = part.outline, (_centre(part), -base)
            wall = outline.wall - np.array(shift)
            lowest = np.flatnonzero(outline.wall[:, 1] == outline.wall[:, 1].min())
            first, last = int(lowest[0]), int(lowest[-1])
            # The floor between is the vessel's own at the lowest part alone; higher up it stands open.
            left = np.vstack((wall[: first + 1], left))
            right = np.vstack((right, wall[last:] if index else wall[first + 1 :]))
            dimensions += [_moved(dimension, f"parts.{index}.", shift) for dimension in outline.dimensions]
            joints |= {base + level for level in outline.joints}
        wall = _without_repeats(np.vstack((left, right)), 1e-12 * self.height)
        wall[0, 1] = wall[-1, 1] = self.height
        closed = self.parts[-1].outline.closed
        return Outline(wall, closed, "vertical", tuple(dimensions), joints=tuple(sorted(joints)))

    def plan_area(self, level: Array) -> Array:
        """Return the liquid's surface [m²] at each level [m], any shape; at a joint that of the part above."""
        area = self.parts[0].plan_area(self._within(0, level))
        for index in range(1, len(self.parts)):
            here = self.parts[index].plan_area(self._within(index, level))
            area = np.where(np.asarray(level) >= self._joints[index], here, area)
        return area

    def volume(self, level: Array) -> Array:
        """Return the volume [m³] below each level [m], any shape: the sum over the parts."""
        total = self.parts[0].volume(self._within(0, level))
        for index in range(1, len(self.parts)):
            held = self._below[index] + self.parts[index].volume(self._within(index, level))
            total = np.where(np.asarray(level) >= self._joints[index], held, total)
        return total

    def level(self, volume: Array) -> Array:
        """Return the level [m] that holds each volume [m³], any shape."""
        level = self.parts[0].level(volume)
        for index in range(1, len(self.parts)):
            above = np.asarray(volume) - self._below[index]
            level = np.where(above >= 0, self._joints[index] + self.parts[index].level(above), level)
        return np.where(np.asarray(volume) < self.capacity, np.minimum(level, self.height), self.height)

    def reach(self, level: float) -> tuple[float, float]:
        """Return where the wall stands left and right [m across] at a level [m]; at a joint in the part above."""
        inside = min(max(level, 0.0), self.height)
        index = min(sum(inside >= joint for joint in self._joints[1:]), len(self.parts) - 1)
        left, right = self.parts[index].reach(inside - self._joints[index])
        centre = _centre(self.parts[index])
        return left - centre, right - centre

    def _within(self, index: int, level: Array) -> Array:
        # A part is full from the next joint up, whatever the rounding of its base.
        part, base, top = self.parts[index], self._joints[index], self._joints[index + 1]
        return np.where(np.asarray(level) < top, np.asarray(level) - base, part.height)


def _centre(part: Profile) -> float:
    across = part.outline.wall[:, 0]
    return float(across.min() + across.max()) / 2


def _moved(dimension: Dimension, prefix: str, shift: tuple[float, float]) -> Dimension:
    start = (dimension.start[0] - shift[0], dimension.start[1] - shift[1])
    end = (dimension.end[0] - shift[0], dimension.end[1] - shift[1])
    return replace(dimension, field=prefix + dimension.field, start=start, end=end)


def _without_repeats(wall: Array, nearly: float) -> Array:
    apart = np.hypot(*np.diff(wall, axis=0).T) > nearly
    return wall[np.concatenate(([True], apart))]
