"""A lying drum whose axis slopes, with any two heads."""

from __future__ import annotations

import math
from functools import cached_property

import numpy as np
import numpy.typing as npt

from headfall.vessel import plan_curve
from headfall.vessel.end import End
from headfall.vessel.inclined_parts import Slope
from headfall.vessel.inclined_section import InclinedSection, inclined_section
from headfall.vessel.inversion import level_holding
from headfall.vessel.plan_curve import Numbers, PlanCurve
from headfall.vessel.profile import Array, Dimension, Outline
from headfall.vessel.sizes import ImpossibleShapeError, require_positive

Flags = npt.NDArray[np.bool_]

# A share of the capacity below this is none: its level's powers would leave the range of a float.
_LEAST_SHARE = 1e-250


class InclinedDrum:
    """A lying drum whose axis rises by ``fall`` [m] from the low tangent line to the high one: sin b = fall/length.

    ``diameter`` and ``length`` (tangent line to tangent line, along the axis) are inside sizes [m]. Levels are heights
    above the lowest inside point, which may lie in the low head. Plan area and volume are worked out once, when first
    asked for, and kept as polynomials: A = (1/cos b)·∫ chord dx along the axis, V = ∫ A dh. The lower half is kept
    from the bottom and the upper half from the top, so that a full drum is answered as exactly as an empty one.
    Volumes hold to 1e-11, areas to 1e-10. Own derivation; checked against Drum, slices and Monte Carlo.

    Raises ``ImpossibleShapeError`` for a size not above nil, a fall not below the length, or a head made for another
    diameter.
    """

    def __init__(self, diameter: float, length: float, low_head: End, high_head: End, fall: float) -> None:
        require_positive("diameter of the drum", diameter)
        require_positive("length of the drum", length)
        require_positive("fall of the drum", fall)
        if fall >= length:
            raise ImpossibleShapeError("fall of the drum", fall, f"below the length of the drum, {length:g}")
        self.diameter = diameter
        self.length = length
        self.fall = fall
        self.low_head = low_head.fitted(diameter)
        self.high_head = high_head.fitted(diameter)
        sine = fall / length
        self._slope = Slope(sine, math.sqrt((1 - sine) * (1 + sine)))

    @property
    def height(self) -> float:
        """Height of the inside from lowest point to top [m]."""
        return self._section.height

    @cached_property
    def capacity(self) -> float:
        """Inside volume [m³]."""
        shell = math.pi * self.diameter**2 / 4 * self.length
        return shell + self.low_head.capacity + self.high_head.capacity

    @property
    def breakpoints(self) -> tuple[float, ...]:
        """Levels [m] where plan area is not smooth: bottom, ends of the shell's lines, rims, points of cones, top."""
        return self._section.turns

    @cached_property
    def outline(self) -> Outline:
        """The section along the axis, across from the axis at the low tangent line; a closed line."""
        low, high = self.low_head.meridian(), self.high_head.meridian()
        low_lower = _with_point(low, self._section.low.lowest)
        high_upper = _with_point(high, self._section.high.lowest)
        low_wall = np.vstack((low, low_lower[-2::-1] * (1, -1))) * (-1, 1)
        high_wall = np.vstack((high * (1, -1), high_upper[-2::-1])) + np.array((self.length, 0.0))
        wall = self._turned(np.vstack((low_wall, high_wall, low_wall[:1])))
        tangents = (0.0, self.length * self._slope.cosine)
        return Outline(wall, True, "horizontal", self._dimensions(), tangents=tangents)

    def plan_area(self, level: Array) -> Array:
        """Return the liquid's surface [m²] at each level [m], any shape."""
        depth, upper = self._from_near_end(level)
        return self._curve.plan_area(depth, self._piece(depth, upper))

    def volume(self, level: Array) -> Array:
        """Return the volume [m³] below each level [m], any shape."""
        depth, upper = self._from_near_end(level)
        part = self._curve.volume(depth, self._piece(depth, upper))
        return np.where(upper, self.capacity - part, part)

    def level(self, volume: Array) -> Array:
        """Return the level [m] that holds each volume [m³], any shape."""
        held = np.clip(volume, 0.0, self.capacity)
        upper = np.asarray(held > self._half_volume)
        share = np.where(upper, self.capacity - held, held)
        empty = share <= _LEAST_SHARE * self.capacity
        target = np.where(empty, self._half_volume, share)
        guess = np.exp(self._log_guess(np.log(target), upper))
        found = level_holding(
            target,
            guess,
            lambda depth: self._curve.volume(depth, self._piece(depth, upper)),
            lambda depth: self._curve.plan_area(depth, self._piece(depth, upper)),
            (0.0, self.height / 2),
        )
        depth = np.where(empty, 0.0, found)
        return np.where(upper, self.height - depth, depth)

    def reach(self, level: float) -> tuple[float, float]:
        """Return where the wall stands left and right [m across] at a level [m]."""
        section, sine = self._section, self._slope.sine
        inside = min(max(level, 0.0), self.height)
        radius, axis = self.diameter / 2 * self._slope.cosine, self._axis_level
        low, high = section.low.ends(inside), section.high.ends(self.height - inside)
        # Where the surface's plane leaves the shell's top line and its bottom line, along the axis.
        first, last = (inside - axis - radius) / sine, (inside - axis + radius) / sine
        left, right = min(max(first, 0.0), self.length), min(max(last, 0.0), self.length)
        if low is not None:
            left = -low[1]
            right = right if last > 0 else -low[0]
        if high is not None:
            right = self.length + high[1]
            left = left if first < self.length else self.length + high[0]
        return self._across(left, inside), self._across(right, inside)

    def invert_at(self, station: float) -> float:
        """Return the height [m] of the shell's lowest line above the vessel's lowest point.

        ``station`` [m] is measured along the axis from the low tangent line, 0 … length.

        Raises ``ImpossibleShapeError`` for a station beyond the shell.
        """
        return self._axis_at(station) - self.diameter / 2 * self._slope.cosine

    def soffit_at(self, station: float) -> float:
        """Return the height [m] of the shell's highest line above the vessel's lowest point.

        ``station`` [m] is measured along the axis from the low tangent line, 0 … length.

        Raises ``ImpossibleShapeError`` for a station beyond the shell.
        """
        return self._axis_at(station) + self.diameter / 2 * self._slope.cosine

    @cached_property
    def _section(self) -> InclinedSection:
        return inclined_section(self.length, self._slope, self.low_head, self.high_head)

    @cached_property
    def _lower_curve(self) -> PlanCurve:
        return _half_curve(self._section)

    @cached_property
    def _curve(self) -> PlanCurve:
        # The lower half's pieces, then those of the upper half, from the top down, where they differ.
        if self._alike:
            return self._lower_curve
        turned = inclined_section(self.length, self._slope, self.high_head, self.low_head)
        return self._lower_curve.joined(_half_curve(turned))

    @property
    def _alike(self) -> bool:
        return self.low_head == self.high_head

    @property
    def _axis_level(self) -> float:
        # Of the axis at the low tangent line.
        return self._section.low.hang + self.diameter / 2 * self._slope.cosine

    @cached_property
    def _half_volume(self) -> float:
        return float(self.volume(np.asarray(self.height / 2)))

    @cached_property
    def _guesses(self) -> tuple[tuple[Array, Array], ...]:
        count = len(self._lower_curve.lower)
        halves = (slice(0, count),) if self._alike else (slice(0, count), slice(count, None))
        samples = [self._curve.taken(half).samples() for half in halves]
        return tuple((np.log(volumes), np.log(levels)) for levels, volumes in samples)

    def _log_guess(self, wanted: Array, upper: Flags) -> Array:
        found = []
        for volumes, levels in self._guesses:
            rate = (levels[1] - levels[0]) / (volumes[1] - volumes[0])
            found.append(np.interp(wanted, volumes, levels) + np.minimum(wanted - volumes[0], 0.0) * rate)
        return np.asarray(np.where(upper, found[-1], found[0]))

    def _from_near_end(self, level: Array) -> tuple[Array, Flags]:
        # The depth below the top where that is nearer than the bottom, else the level; and which of them.
        inside = np.clip(level, 0.0, self.height)
        upper = np.asarray(inside > self.height / 2)
        return np.where(upper, self.height - inside, inside), upper

    def _piece(self, depth: Array, upper: Flags) -> Numbers:
        lower = self._lower_curve.piece(depth)
        if self._alike:
            return lower
        count = len(self._lower_curve.lower)
        above = np.searchsorted(self._curve.lower[count:], depth, side="right") - 1 + count
        return np.where(upper, np.maximum(above, count), lower)

    def _axis_at(self, station: float) -> float:
        if not 0 <= station <= self.length:
            raise ImpossibleShapeError("station along the drum", station, f"0 to its length, {self.length:g}")
        return self._axis_level + station * self._slope.sine

    def _across(self, along: float, level: float) -> float:
        return (along - (level - self._axis_level) * self._slope.sine) / self._slope.cosine

    def _turned(self, points: Array) -> Array:
        # From (along the axis, off the axis) to (across, up).
        sine, cosine = self._slope.sine, self._slope.cosine
        turned = points @ np.array(((cosine, sine), (-sine, cosine))) + np.array((0.0, self._axis_level))
        # The lowest point is a point of the wall; what rounding leaves there is taken off.
        turned[:, 1] = np.maximum(turned[:, 1], 0.0)
        return np.asarray(turned)

    def _dimensions(self) -> tuple[Dimension, ...]:
        radius, length = self.diameter / 2, self.length
        low, high = self.low_head, self.high_head
        names = ("heads.depth", "heads.depth") if self._alike else ("heads.0.depth", "heads.1.depth")
        dimensions = [
            self._dimension("diameter", (length, -radius), (length, radius)),
            self._dimension("length", (0.0, -radius), (length, -radius)),
        ]
        if low.depth > 0:
            dimensions.append(self._dimension(names[0], (-low.depth, 0.0), (0.0, 0.0), low.typed_depth))
        if high.depth > 0:
            dimensions.append(self._dimension(names[1], (length, 0.0), (length + high.depth, 0.0), high.typed_depth))
        across, up = self._point(length, -radius)
        dimensions.append(Dimension("fall", (across, up - self.fall), (across, up)))
        return tuple(dimensions)

    def _dimension(
        self, field: str, start: tuple[float, float], end: tuple[float, float], typed: bool = True
    ) -> Dimension:
        return Dimension(field, self._point(*start), self._point(*end), typed=typed)

    def _point(self, along: float, off: float) -> tuple[float, float]:
        sine, cosine = self._slope.sine, self._slope.cosine
        return along * cosine - off * sine, along * sine + off * cosine + self._axis_level


def _half_curve(section: InclinedSection) -> PlanCurve:
    # To the first turn at or above half height, so that a turn just above it is seen.
    turns = section.turns
    last = next(number for number, turn in enumerate(turns) if turn >= section.height / 2)
    return plan_curve.fitted(section.area, turns[: last + 1], section.low.power, section.height / 2)


def _with_point(meridian: Array, point: tuple[float, float]) -> Array:
    # The meridian, from tangent line to tip, with the point (distance, radius) among its points.
    number = int(np.searchsorted(meridian[:, 0], point[0]))
    if any(np.allclose(row, point, rtol=0, atol=1e-12 * meridian[0, 1]) for row in meridian):
        return meridian
    return np.insert(meridian, number, point, axis=0)
