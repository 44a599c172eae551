"""Upright vessels on a plane floor that slopes from one side to the other."""

from __future__ import annotations

import math
from dataclasses import dataclass

import numpy as np

from headfall.vessel.bracketing import NO_VOLUME
from headfall.vessel.circle import segment_area
from headfall.vessel.inversion import level_holding
from headfall.vessel.profile import Array, Dimension, Outline
from headfall.vessel.sizes import ImpossibleShapeError, require_not_negative, require_positive

# (3/4)·sin a + sin(3a)/12 − a·cos a in powers of a: a⁵ times these factors of a², the last first.
_WEDGE_SERIES = tuple(
    (-1) ** k * (0.75 + 3.0 ** (2 * k + 1) / 12 - (2 * k + 1)) / math.factorial(2 * k + 1) for k in range(14, 1, -1)
)


def _wedge_share(angle: Array) -> Array:
    # sin a − sin³a/3 − a·cos a: the integral of a segment's area over its depth, R = 1, a its half angle. Below one
    # radian by its series, whose first term dropped is under 1e-17 of the sum.
    square = np.minimum(angle, 1.0) ** 2
    series = np.zeros_like(square)
    for factor in _WEDGE_SERIES:
        series = series * square + factor
    sine = np.sin(angle)
    closed = sine - sine**3 / 3 - angle * np.cos(angle)
    return np.where(angle < 1.0, np.square(square) * angle * series, closed)


class SlopedCylinder:
    """An upright cylinder on a plane floor that falls across the diameter; its low side is drawn to the left.

    ``diameter`` and ``height`` [m] are inside sizes; ``height`` is the straight side alone, above the high side of
    the floor, and ``fall`` [m] is how much lower the low side lies. The property ``height`` counts the fall in.

    Raises ``ImpossibleShapeError`` where diameter or height is not above nil, or the fall is negative.
    """

    def __init__(self, diameter: float, height: float, fall: float) -> None:
        require_positive("diameter of the upright cylinder", diameter)
        require_positive("height of the upright cylinder", height)
        require_not_negative("fall of the floor", fall)
        self.diameter = diameter
        self.straight_side = height
        self.fall = fall

    @property
    def height(self) -> float:
        """Height of the inside from lowest point to top [m]."""
        return self.fall + self.straight_side

    @property
    def capacity(self) -> float:
        """Inside volume up to the top [m³]."""
        return self._shell_area * (self.fall / 2 + self.straight_side)

    @property
    def breakpoints(self) -> tuple[float, ...]:
        """Levels [m] where plan area is not smooth: bottom, high side of the floor, top."""
        return (0.0, self.fall, self.height) if self.fall > 0 else (0.0, self.height)

    @property
    def outline(self) -> Outline:
        """The section through the axis and down the floor's slope, across from the axis."""
        return _sloped_outline("diameter", self.diameter, self.height, self.fall, self.fall)

    def plan_area(self, level: Array) -> Array:
        """Return the liquid's surface [m²] at each level [m], any shape: on the floor a segment of depth D·h/fall."""
        if self.fall == 0:
            return np.full(np.shape(level), self._shell_area)
        inside = np.clip(level, 0.0, self.fall)
        return np.where(inside < self.fall, self._wedge_area(inside), self._shell_area)

    def volume(self, level: Array) -> Array:
        """Return the volume [m³] below each level [m], any shape.

        On the floor a cylindrical wedge: V = (fall/D)·R³·(sin a − sin³a/3 − a·cos a), sin²(a/2) = h/fall; above it
        π·R²·(h − fall/2). Common practice; exact.
        """
        inside = np.clip(level, 0.0, self.height)
        above = self._shell_area * (inside - self.fall / 2)
        if self.fall == 0:
            return np.asarray(above)
        return np.where(inside < self.fall, self._wedge_volume(np.minimum(inside, self.fall)), above)

    def level(self, volume: Array) -> Array:
        """Return the level [m] that holds each volume [m³], any shape."""
        held = np.clip(volume, 0.0, self.capacity)
        above = np.minimum(held / self._shell_area + self.fall / 2, self.height)
        wedge = self._shell_area * self.fall / 2
        if wedge == 0:
            return np.asarray(above)
        empty = held < NO_VOLUME
        target = np.minimum(np.where(empty, wedge / 2, held), wedge)
        # Right to one part in eight, and exactly in the power of the level near empty.
        guess = self.fall * (target / wedge * (15 * math.pi / 64)) ** 0.4
        found = level_holding(target, guess, self._wedge_volume, self._wedge_area, (0.0, self.fall))
        return np.where(empty, 0.0, np.where(held < wedge, found, above))

    def reach(self, level: float) -> tuple[float, float]:
        """Return where the wall stands left and right [m across] at a level [m]."""
        return _sloped_reach(self.diameter, self.fall, level)

    @property
    def _shell_area(self) -> float:
        return math.pi * self.diameter**2 / 4

    def _wedge_area(self, level: Array) -> Array:
        return segment_area(self.diameter / 2, level * (self.diameter / self.fall))

    def _wedge_volume(self, level: Array) -> Array:
        angle = 2 * np.arcsin(np.sqrt(np.minimum(level / self.fall, 1.0)))
        return np.asarray(self.fall * self.diameter**2 / 8 * _wedge_share(angle))


@dataclass(frozen=True)
class SlopedBox:
    """A box whose plane floor falls along its length; the deep end is drawn to the left.

    ``length``, ``width`` and ``height`` are inside sizes [m]; ``height`` counts from the floor of the deep end. The
    floor rises by ``fall`` [m] towards the other end.

    Raises ``ImpossibleShapeError`` where a size is not above nil, or the fall is negative or not below the height.
    """

    length: float
    width: float
    height: float
    fall: float

    def __post_init__(self) -> None:
        require_positive("length of the box", self.length)
        require_positive("width of the box", self.width)
        require_positive("height of the box", self.height)
        require_not_negative("fall of the floor", self.fall)
        if self.fall >= self.height:
            raise ImpossibleShapeError("fall of the floor", self.fall, f"below the height of the box, {self.height:g}")

    @property
    def capacity(self) -> float:
        """Inside volume up to the top [m³]."""
        return self.length * self.width * (self.height - self.fall / 2)

    @property
    def breakpoints(self) -> tuple[float, ...]:
        """Levels [m] where plan area is not smooth: bottom, high end of the floor, top."""
        return (0.0, self.fall, self.height) if self.fall > 0 else (0.0, self.height)

    @property
    def outline(self) -> Outline:
        """The section along the length, across from the middle."""
        return _sloped_outline("length", self.length, self.height, self.fall, 0.0)

    def plan_area(self, level: Array) -> Array:
        """Return the liquid's surface [m²] at each level [m], any shape: L·W·h/fall on the floor, L·W above."""
        if self.fall == 0:
            return np.full(np.shape(level), self.length * self.width)
        return np.asarray(self.length * self.width * (np.clip(level, 0.0, self.fall) / self.fall))

    def volume(self, level: Array) -> Array:
        """Return the volume [m³] below each level [m], any shape: L·W·h²/(2·fall), then L·W·(h − fall/2)."""
        inside = np.clip(level, 0.0, self.height)
        if self.fall == 0:
            return np.asarray(self.length * self.width * inside)
        wet = np.minimum(inside, self.fall)
        return np.asarray(self.length * self.width * (wet * (wet / (2 * self.fall)) + (inside - wet)))

    def level(self, volume: Array) -> Array:
        """Return the level [m] that holds each volume [m³], any shape."""
        depth = np.clip(np.asarray(volume) / (self.length * self.width), 0.0, self.height - self.fall / 2)
        if self.fall == 0:
            return np.asarray(depth)
        wedge = np.sqrt(2 * self.fall * depth)
        return np.where(depth < self.fall / 2, wedge, np.minimum(depth + self.fall / 2, self.height))

    def reach(self, level: float) -> tuple[float, float]:
        """Return where the wall stands left and right [m across] at a level [m]."""
        return _sloped_reach(self.length, self.fall, level)


def _sloped_outline(width_field: str, width: float, top: float, fall: float, height_from: float) -> Outline:
    half = width / 2
    wall = np.array([[-half, top], [-half, 0.0], [half, fall], [half, top]])
    dimensions = [
        Dimension(width_field, (-half, top), (half, top)),
        Dimension("height", (half, height_from), (half, top)),
    ]
    if fall > 0:
        dimensions.append(Dimension("floor.fall", (half, 0.0), (half, fall)))
    return Outline(wall, False, "vertical", tuple(dimensions))


def _sloped_reach(width: float, fall: float, level: float) -> tuple[float, float]:
    share = min(max(level, 0.0) / fall, 1.0) if fall > 0 else 1.0
    return -width / 2, width * (share - 0.5)
