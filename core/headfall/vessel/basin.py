"""A basin with a rectangular base and sloped sides."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np

from headfall.vessel.bracketing import NO_VOLUME
from headfall.vessel.inversion import level_holding
from headfall.vessel.profile import Array, Dimension, Outline
from headfall.vessel.sizes import ImpossibleShapeError, require_not_negative, require_positive


@dataclass(frozen=True)
class Basin:
    """A basin, open at the top; ``base_length``, ``base_width`` and ``depth`` are inside sizes [m].

    Both opposite sides slope alike, ``slope_length`` along the length and ``slope_width`` along the width, each so
    many metres outwards for a metre up [1]. The base may be a line or a point where the sides make up for it.

    Raises ``ImpossibleShapeError`` where the depth is not above nil, another size is negative, or the basin would
    have no width in one direction.
    """

    base_length: float
    base_width: float
    slope_length: float
    slope_width: float
    depth: float

    def __post_init__(self) -> None:
        require_not_negative("base length of the basin", self.base_length)
        require_not_negative("base width of the basin", self.base_width)
        require_not_negative("side slope of the basin along its length", self.slope_length)
        require_not_negative("side slope of the basin along its width", self.slope_width)
        require_positive("depth of the basin", self.depth)
        for name, base, slope in (
            ("length", self.base_length, self.slope_length),
            ("width", self.base_width, self.slope_width),
        ):
            if base == slope == 0:
                raise ImpossibleShapeError(f"base {name} of the basin", 0.0, "above nil where its sides do not slope")

    @property
    def height(self) -> float:
        """Height of the inside from base to top [m]."""
        return self.depth

    @property
    def capacity(self) -> float:
        """Inside volume up to the top [m³]."""
        return float(self._volume(np.asarray(self.depth)))

    @property
    def breakpoints(self) -> tuple[float, ...]:
        """Levels [m] where plan area is not smooth: bottom and top."""
        return (0.0, self.depth)

    @property
    def outline(self) -> Outline:
        """The section along the length, across from the middle."""
        bottom = self.base_length / 2
        top = bottom + self.slope_length * self.depth
        left = [[-top, self.depth], [-bottom, 0.0]]
        right = [[bottom, 0.0], [top, self.depth]] if bottom > 0 else [[top, self.depth]]
        dimensions = (
            Dimension("base_length", (-bottom, 0.0), (bottom, 0.0)),
            Dimension("depth", (top, 0.0), (top, self.depth)),
        )
        return Outline(np.array(left + right), False, "vertical", dimensions)

    def plan_area(self, level: Array) -> Array:
        """Return the liquid's surface [m²] at each level [m], any shape: (L + 2·m₁·h)·(W + 2·m₂·h)."""
        return self._area(np.clip(level, 0.0, self.depth))

    def volume(self, level: Array) -> Array:
        """Return the volume [m³] below each level [m], any shape.

        V = L·W·h + (L·m₂ + W·m₁)·h² + (4/3)·m₁·m₂·h³. Common practice; exact for plane sides.
        """
        return self._volume(np.clip(level, 0.0, self.depth))

    def level(self, volume: Array) -> Array:
        """Return the level [m] that holds each volume [m³], any shape.

        Each of the three terms alone would need a higher level; the lowest of the three is at most three times too
        high, which is a first guess that Newton's rule never leaves.
        """
        held = np.clip(volume, 0.0, self.capacity)
        empty = held < NO_VOLUME
        target = np.where(empty, self.capacity / 2, held)
        guess = np.full_like(target, self.depth)
        for power, factor in enumerate(self._terms, start=1):
            if factor > 0:
                guess = np.minimum(guess, (target / factor) ** (1 / power))
        found = level_holding(target, guess, self._volume, self._area, (0.0, self.depth))
        return np.where(empty, 0.0, found)

    def reach(self, level: float) -> tuple[float, float]:
        """Return where the wall stands left and right [m across] at a level [m]."""
        half = self.base_length / 2 + self.slope_length * min(max(level, 0.0), self.depth)
        return -half, half

    @property
    def _terms(self) -> tuple[float, float, float]:
        return (
            self.base_length * self.base_width,
            self.base_length * self.slope_width + self.base_width * self.slope_length,
            4 / 3 * self.slope_length * self.slope_width,
        )

    def _area(self, level: Array) -> Array:
        length = self.base_length + 2 * self.slope_length * level
        return np.asarray(length * (self.base_width + 2 * self.slope_width * level))

    def _volume(self, level: Array) -> Array:
        first, second, third = self._terms
        return np.asarray(level * (first + level * (second + level * third)))
