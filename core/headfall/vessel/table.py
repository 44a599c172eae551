"""Vessels known by a table: plan area at levels, or volume at levels."""

from __future__ import annotations

import math
from collections.abc import Sequence
from functools import cached_property
from itertools import pairwise
from typing import Literal

import numpy as np
import numpy.typing as npt

from headfall.vessel.bracketing import NO_VOLUME, bracketed_level
from headfall.vessel.profile import Array, Outline
from headfall.vessel.table_rows import ImpossibleRowError, checked_rows, equal_circle_outline, volumes_from_increments

__all__ = ["AreaRule", "AreaTable", "ImpossibleRowError", "VolumeTable", "rule_difference", "volumes_from_increments"]

AreaRule = Literal["linear", "conic"]

_Layers = npt.NDArray[np.intp]

# Of the section: in each layer, and about so many in all.
_LAYER_POINTS, _WALL_POINTS = 17, 256


class _Table:
    """What both tables share: layers between rows, one above the other, and the section of equal circles."""

    def __init__(self, starts: Array, ends: Array, below: Array) -> None:
        # ``starts`` and ``ends`` of the layers [m], shape (layers,); ``below`` [m³] their starts and the last end.
        self._starts, self._ends, self._below = starts, ends, below
        self._joints, self._held = starts[1:], below[1:-1]

    @property
    def height(self) -> float:
        """Level of the last row [m]."""
        return float(self._ends[-1])

    @property
    def capacity(self) -> float:
        """Volume up to the last row [m³]."""
        return float(self._below[-1])

    @property
    def breakpoints(self) -> tuple[float, ...]:
        """Levels [m] where plan area is not smooth: the rows."""
        return (*self._starts.tolist(), self.height)

    @cached_property
    def outline(self) -> Outline:
        """The section through round level cuts of the same areas, across from the middle; no size is marked."""
        points = min(max(_WALL_POINTS // len(self._starts), 2), _LAYER_POINTS)
        share = np.linspace(0.0, 1.0, points)
        layers = np.arange(len(self._starts))[:, None]
        levels = self._starts[:, None] * (1 - share) + self._ends[:, None] * share
        areas = self._area(layers, self._starts[:, None], self._ends[:, None], levels)
        levels, areas = self._ledged(levels.ravel(), areas.ravel())
        return Outline(equal_circle_outline(levels, areas), bool(areas[-1] == 0), "vertical", ())

    def plan_area(self, level: Array) -> Array:
        """Return the liquid's surface [m²] at each level [m], any shape; on a ledge that of the part above."""
        inside, layer = self._place(level)
        return self._area(layer, self._starts[layer], self._ends[layer], inside)

    def volume(self, level: Array) -> Array:
        """Return the volume [m³] below each level [m], any shape."""
        inside, layer = self._place(level)
        held = self._below[layer] + self._layer_volume(layer, self._starts[layer], self._ends[layer], inside)
        return np.where(inside < self.height, held, self.capacity)

    def level(self, volume: Array) -> Array:
        """Return the level [m] that holds each volume [m³], any shape: the inverse within the layer."""
        held = np.clip(volume, self._below[0], self.capacity)
        layer = np.searchsorted(self._held, held, side="right")
        level = self._starts[layer] + self._rise(layer, held - self._below[layer])
        return np.where(held < self.capacity, np.minimum(level, self._ends[layer]), self.height)

    def reach(self, level: float) -> tuple[float, float]:
        """Return where the wall stands left and right [m across] at a level [m]."""
        radius = math.sqrt(float(self.plan_area(np.asarray(level))) / math.pi)
        return -radius, radius

    def _place(self, level: Array) -> tuple[Array, _Layers]:
        inside = np.clip(level, 0.0, self.height)
        return inside, np.searchsorted(self._joints, inside, side="right")

    def _ledged(self, levels: Array, areas: Array) -> tuple[Array, Array]:
        return levels, areas

    def _area(self, layer: _Layers, start: Array, end: Array, level: Array) -> Array:
        raise NotImplementedError

    def _layer_volume(self, layer: _Layers, start: Array, end: Array, level: Array) -> Array:
        raise NotImplementedError

    def _rise(self, layer: _Layers, volume: Array) -> Array:
        raise NotImplementedError


class AreaTable(_Table):
    """A vessel known by its plan area [m²] at levels [m], both of shape (rows,), the lowest first.

    Between rows the area (``rule`` linear, average end area) or its square root (``rule`` conic) runs straight, with
    the volume ∫A dh that belongs to it: Δh·(A₁ + A₂)/2 or Δh·(A₁ + A₂ + √(A₁·A₂))/3. Linear is exact for prisms lying
    or standing, conic for sections that stay similar; source ``area_rules``. A level given twice is a ledge.

    Raises ``ValueError`` for another rule, ``ImpossibleShapeError`` for too few rows and ``ImpossibleRowError`` for a
    row that cannot be, an area of nil from one row to the next among them.
    """

    def __init__(self, levels: Sequence[float], areas: Sequence[float], rule: AreaRule) -> None:
        if rule not in ("linear", "conic"):
            raise ValueError(f"The rule between rows is {rule}; it must be linear or conic.")
        h, a = checked_rows("area", levels, areas, ledges=True)
        if h[-1] == 0:
            raise ImpossibleRowError(len(h), "level", 0.0, "above that of row 1")
        _refuse_no_room(h, a)
        self.rule = rule
        layer = np.diff(h) > 0
        # What runs straight: the area, or the square root of it, which goes as the width.
        straight = a if rule == "linear" else np.sqrt(a)
        depth = np.diff(h)[layer]
        self._first, self._last = straight[:-1][layer], straight[1:][layer]
        self._slope = (self._last - self._first) / depth
        self._top_area = float(a[-1])
        super().__init__(h[:-1][layer], h[1:][layer], np.concatenate(([0.0], np.cumsum(depth * self._means()))))

    def _means(self) -> Array:
        first, last = self._first, self._last
        return (first + last) / 2 if self.rule == "linear" else (first * first + first * last + last * last) / 3

    def _straight(self, layer: _Layers, start: Array, end: Array, level: Array) -> Array:
        # From both ends of the layer, so that no digit is lost where the area goes to nil.
        return np.asarray((self._first[layer] * (end - level) + self._last[layer] * (level - start)) / (end - start))

    def _area(self, layer: _Layers, start: Array, end: Array, level: Array) -> Array:
        straight = self._straight(layer, start, end, level)
        return straight if self.rule == "linear" else np.square(straight)

    def _layer_volume(self, layer: _Layers, start: Array, end: Array, level: Array) -> Array:
        first, here = self._first[layer], self._straight(layer, start, end, level)
        mean = (first + here) / 2 if self.rule == "linear" else (first * (first + here) + here * here) / 3
        return np.asarray((level - start) * mean)

    def _rise(self, layer: _Layers, volume: Array) -> Array:
        """From A² = A₁² + 2·s·V, or r³ = r₁³ + 3·s·V, and the mean area over the rise, without a difference."""
        first, slope = self._first[layer], self._slope[layer]
        if self.rule == "linear":
            here = np.sqrt(np.maximum(first * first + 2 * slope * volume, 0.0))
            mean = (first + here) / 2
        else:
            here = np.cbrt(np.maximum(first**3 + 3 * slope * volume, 0.0))
            mean = (first * (first + here) + here * here) / 3
        return np.asarray(volume / np.where(volume >= NO_VOLUME, mean, 1.0))

    def _ledged(self, levels: Array, areas: Array) -> tuple[Array, Array]:
        # A ledge at the top, a roof, is not the end of any layer.
        return np.append(levels, levels[-1]), np.append(areas, self._top_area)


class VolumeTable(_Table):
    """A vessel known by its volume [m³] at levels [m], both of shape (rows,), the lowest first.

    Between rows a cubic through both volumes, its slopes those of the parabola through three rows, lessened so that
    the volume never falls (slopes over the mean slope within a circle of radius 3): source ``fritsch_carlson_1980``.
    The plan area dV/dh is continuous and above nil between the rows. What stands below the first row's level is
    held at level 0 already. A last digit apart, every row is met.

    Raises ``ImpossibleShapeError`` for too few rows, ``ImpossibleRowError`` for a row that cannot be.
    """

    def __init__(self, levels: Sequence[float], volumes: Sequence[float]) -> None:
        h, v = checked_rows("volume", levels, volumes)
        for row, (below, volume) in enumerate(pairwise(v.tolist()), start=2):
            if volume <= below:
                raise ImpossibleRowError(row, "volume", volume, f"above that of row {row - 1}")
        self._mean = np.diff(v) / np.diff(h)
        slopes = _monotone_slopes(np.diff(h), self._mean)
        self._first, self._last = slopes[:-1], slopes[1:]
        super().__init__(h[:-1], h[1:], v)

    def _area(self, layer: _Layers, start: Array, end: Array, level: Array) -> Array:
        # The three weights of a parabola: nil areas at the rows stay nil.
        share, rest = (level - start) / (end - start), (end - level) / (end - start)
        first, last = self._first[layer], self._last[layer]
        middle = 3 * self._mean[layer] - first - last
        return np.maximum(rest * (first * rest + 2 * middle * share) + last * share * share, 0.0)

    def _layer_volume(self, layer: _Layers, start: Array, end: Array, level: Array) -> Array:
        share, rest = (level - start) / (end - start), (end - level) / (end - start)
        mean = self._mean[layer]
        weights = rest * (rest * self._first[layer] + share * (3 * mean - self._last[layer])) + share * share * mean
        return np.asarray((level - start) * weights)

    def _rise(self, layer: _Layers, volume: Array) -> Array:
        depth = self._ends[layer] - self._starts[layer]
        found = volume >= NO_VOLUME
        target = np.where(found, volume, self._mean[layer] * depth)
        nil = np.zeros_like(depth)
        guess = target / self._mean[layer]
        rise = bracketed_level(
            target,
            np.minimum(guess, depth),
            (nil, depth),
            lambda above: self._layer_volume(layer, nil, depth, above),
            lambda above: self._area(layer, nil, depth, above),
        )
        return np.where(found, rise, 0.0)


def rule_difference(levels: Sequence[float], areas: Sequence[float]) -> tuple[float, float]:
    """Return (level [m], difference [1]) at the row where the two area rules differ most in the volume below it.

    The difference is volume by the linear rule over volume by the conic rule, less one; it is never negative.
    ``levels`` [m] and ``areas`` [m²] are as for ``AreaTable``, which says what it raises.
    """
    linear, conic = AreaTable(levels, areas, "linear"), AreaTable(levels, areas, "conic")
    rows = np.array(linear.breakpoints[1:])
    differences = linear.volume(rows) / conic.volume(rows) - 1
    most = int(np.argmax(differences))
    return float(rows[most]), max(float(differences[most]), 0.0)


def _refuse_no_room(levels: Array, areas: Array) -> None:
    for row in range(2, len(levels) + 1):
        if levels[row - 1] > levels[row - 2] and areas[row - 1] == areas[row - 2] == 0:
            raise ImpossibleRowError(row, "area", 0.0, f"above nil, as that of row {row - 1} is nil")


def _monotone_slopes(depths: Array, means: Array) -> Array:
    """Slopes [m²] at the rows, shape (rows,), from depths [m] and mean slopes [m²] of the layers."""
    if len(depths) == 1:
        return np.repeat(means, 2)
    inner = (depths[:-1] * means[1:] + depths[1:] * means[:-1]) / (depths[:-1] + depths[1:])
    first = means[0] - depths[0] * (means[1] - means[0]) / (depths[0] + depths[1])
    last = means[-1] + depths[-1] * (means[-1] - means[-2]) / (depths[-1] + depths[-2])
    slopes = np.concatenate(([max(first, 0.0)], inner, [max(last, 0.0)]))
    for layer, mean in enumerate(means):
        length = math.hypot(slopes[layer], slopes[layer + 1]) / mean
        if length > 3:
            slopes[layer : layer + 2] *= 3 / length
    return np.asarray(slopes)
