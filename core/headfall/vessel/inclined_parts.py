"""What a horizontal plane cuts from the parts of an inclined drum.

A head is treated as a low one: its tip hangs down the slope. A high head is a low one turned over, its level counted
down from the top of the vessel. Levels are heights above the lowest inside point of the vessel to which the head
belongs; t is the distance beyond the tangent line, along the axis.
"""

from __future__ import annotations

import math
from dataclasses import dataclass
from functools import lru_cache

import numpy as np

from headfall.vessel.circle import segment_area
from headfall.vessel.profile import Array

_CONE_POINTS = 14


@dataclass(frozen=True, slots=True)
class Slope:
    """The slope of a drum's axis against the horizontal."""

    sine: float
    cosine: float

    @property
    def angle(self) -> float:
        """The slope [rad]."""
        return math.atan2(self.sine, self.cosine)


@dataclass(frozen=True, slots=True)
class ShellCut:
    """The cylinder between the tangent lines; ``bottom`` [m] is the level of its invert at the low tangent line."""

    radius: float
    length: float
    slope: Slope
    bottom: float

    def area(self, level: Array) -> Array:
        """Return the level cut [m²] at each level [m], any shape.

        (1/sin b)·(S(y₁) − S(y₂)), S the segments wet at the two tangent lines: their difference is a trapezium
        and a segment, R²·(f − sin f + (k₁ + k₂)·(u₁ − u₂)) with tan(f/2) = (u₁ − u₂)/(k₁ + k₂), u = y/R − 1 and
        k = √(1 − u²), which holds for any slope. Own derivation; checked against Drum and against Monte Carlo.
        """
        scale = self.radius * self.slope.cosine
        risen = self.length * self.slope.sine
        low, high = (level - self.bottom) / scale, (level - self.bottom - risen) / scale
        whole = (low <= 2) & (high >= 0)
        low, high = np.clip(low, 0.0, 2.0), np.clip(high, 0.0, 2.0)
        apart = np.where(whole, risen / scale, low - high)
        chords = np.sqrt(low * (2 - low)) + np.sqrt(high * (2 - high))
        angle = 2 * np.arctan2(apart, chords)
        segment = segment_area(1.0, 2 * np.square(np.sin(angle / 4)))
        return np.asarray(self.radius**2 / self.slope.sine * (2 * segment + chords * apart))


@dataclass(frozen=True, slots=True)
class SpheroidCut:
    """Part of a spheroid round the axis beyond t = ``start``: an ellipsoidal head, or a crown.

    ``radius`` and ``along`` [m] are its half axes across and along the drum, ``centre`` [m] its t; ``start_radius``
    [m] is the wall's radius at the start. ``lowest`` [m] is the level of the full spheroid's lowest point and
    ``edge`` [m] that of the lowest point at the start.
    """

    slope: Slope
    radius: float
    along: float
    centre: float
    start: float
    start_radius: float
    lowest: float
    edge: float

    def area(self, level: Array) -> Array:
        """Return the level cut [m²] at each level [m], any shape: a segment of an ellipse."""
        half, middle = self._ellipse(level)
        from_start = middle - self.start
        above = (level - self.edge) / self.slope.cosine
        chord = np.maximum(above * (2 * self.start_radius - above), 0.0) / self._stretch**2
        beyond = chord / np.where(from_start < 0, half - from_start, 1.0)
        depth = np.where(from_start < 0, beyond, np.minimum(half + from_start, 2 * half))
        some = np.where(half > 0, half, 1.0)
        cut = segment_area(some, np.where(half > 0, np.minimum(depth, 2 * half), 0.0))
        return self._stretch / self.slope.cosine * cut

    def ends(self, level: float) -> tuple[float, float] | None:
        """Return from where to where [m] in t the surface at a level [m] stands in this part, or None."""
        if level < self.lowest or level > self.lowest + 2 * self._rise:
            return None
        half, middle = (float(value) for value in self._ellipse(np.asarray(level)))
        near, far = max(middle - half, self.start), middle + half
        return (near, far) if far >= near else None

    @property
    def _rise(self) -> float:
        # Half the height of the full spheroid.
        return math.hypot(self.radius * self.slope.cosine, self.along * self.slope.sine)

    @property
    def _stretch(self) -> float:
        # Half the chord over √(half² − (t − middle)²).
        return self._rise / (self.along * self.slope.cosine)

    def _ellipse(self, level: Array) -> tuple[Array, Array]:
        # The full ellipse of the cut: half its extent and its middle in t.
        above = level - self.lowest
        root = np.sqrt(np.maximum(above * (2 * self._rise - above), 0.0))
        half = self.radius * self.along * self.slope.cosine / self._rise**2 * root
        middle = self.centre + (self._rise - above) * self.slope.sine * (self.along / self._rise) ** 2
        return half, middle


@dataclass(frozen=True, slots=True)
class KnuckleCut:
    """The knuckle of a torispherical head, part of a torus of radii ``ring`` and ``radius`` [m].

    ``last`` [rad] is the angle at the rim from the tangent line. ``lowest`` [m] is the level of the full torus's
    lowest point and ``axis`` [m] that of the drum's axis at the tangent line.
    """

    slope: Slope
    ring: float
    radius: float
    last: float
    lowest: float
    axis: float

    def area(self, level: Array) -> Array:
        """Return the level cut [m²] at each level [m], any shape.

        With t = r·sin q the chord is 2·(r/cos b)·√((cos(q − b) − cos m)·(cos(q + b) − cos n)), whose roots are
        known. Gauss's rule on either half of the range, over the square root of the distance to the root at its
        end, be the root inside the knuckle or not. Own derivation; checked against other quadrature.
        """
        points, weights = gauss(self._count)
        bottom, top, start, end = (np.asarray(value)[..., np.newaxis] for value in self._range(level))
        spare = self._spare(np.asarray(level)[..., np.newaxis])
        middle = (start + end) / 2
        low_root = self.slope.angle - bottom
        high_root = np.minimum(self.slope.angle + bottom, top - self.slope.angle)
        total = np.zeros(np.shape(level))
        for root, near, far, sign in ((low_root, start, middle, 1.0), (high_root, end, middle, -1.0)):
            first = np.sqrt(np.maximum(sign * (near - root), 0.0))
            width = np.sqrt(np.maximum(sign * (far - root), 0.0)) - first
            v = first + width * points
            angle = root + sign * np.square(v)
            total = total + (2 * v * width * self._chord(angle, bottom, top, spare)) @ weights
        return np.asarray(2 * (self.radius / self.slope.cosine) ** 2 * total)

    def ends(self, level: float) -> tuple[float, float] | None:
        """Return from where to where [m] in t the surface at a level [m] stands in this part, or None."""
        if level < self.lowest:
            return None
        _, top, start, end = (float(value) for value in self._range(np.asarray(level)))
        if top < self.slope.angle or end < start:
            return None
        return self.radius * math.sin(start), self.radius * math.sin(end)

    @property
    def _count(self) -> int:
        # A rim that stands close to the axis brings the two roots beyond it close together.
        rim_share = (self.ring + self.radius * math.cos(self.last)) / (self.ring + self.radius)
        return min(max(16, math.ceil(8 / math.sqrt(rim_share))), 120)

    def _heights(self, level: Array) -> tuple[Array, Array]:
        # Above the lowest, below the highest point of the full torus at one side of the axis; shares of 2·radius.
        below = self.axis + self.ring * self.slope.cosine + self.radius - level
        return (level - self.lowest) / (2 * self.radius), below / (2 * self.radius)

    def _range(self, level: Array) -> tuple[Array, Array, Array, Array]:
        above, below = (np.clip(share, 0.0, 1.0) for share in self._heights(level))
        bottom, top = 2 * np.arcsin(np.sqrt(above)), 2 * np.arcsin(np.sqrt(below))
        start = np.maximum(self.slope.angle - bottom, 0.0)
        end = np.minimum(np.minimum(self.slope.angle + bottom, top - self.slope.angle), self.last)
        return bottom, top, start, np.maximum(end, start)

    def _spare(self, level: Array) -> tuple[Array, Array]:
        above, below = self._heights(level)
        return 2 * np.maximum(above - 1, 0.0), 2 * np.maximum(below - 1, 0.0)

    def _chord(self, angle: Array, bottom: Array, top: Array, spare: tuple[Array, Array]) -> Array:
        low, high = angle - self.slope.angle, angle + self.slope.angle
        under = 2 * np.sin((bottom + low) / 2) * np.sin((bottom - low) / 2) + spare[0]
        over = 2 * np.sin((top + high) / 2) * np.sin((top - high) / 2) + spare[1]
        return np.asarray(np.sqrt(np.maximum(under * over, 0.0)) * np.cos(angle))


@dataclass(frozen=True, slots=True)
class ConeCut:
    """A conical head of ``radius`` and ``depth`` [m]; ``axis`` [m] is the level of the axis at the tangent line.

    ``bottom`` and ``tip`` [m] are the levels of the tangent line's lowest point and of the point.
    """

    slope: Slope
    radius: float
    depth: float
    axis: float
    bottom: float
    tip: float

    def area(self, level: Array) -> Array:
        """Return the level cut [m²] at each level [m], any shape: part of a hyperbola, parabola or ellipse."""
        upper, lower = self._rates
        if lower < 0:
            half, far = self._ellipse(level)
            depth = np.clip(np.minimum(far, 2 * half), 0.0, None)
            some = np.where(half > 0, half, 1.0)
            cut = segment_area(some, np.where(half > 0, depth, 0.0))
            return np.asarray(math.sqrt(-upper * lower) / self.slope.cosine * cut)
        above, below = self._heights(level)
        from_top, from_bottom = below / upper, above / lower if lower > 0 else np.full_like(above, np.inf)
        end = np.maximum(np.minimum(from_top, from_bottom), 0.0)
        at_top = from_top <= from_bottom
        rate, other = np.where(at_top, upper, lower), np.where(at_top, lower, upper)
        left = np.maximum(np.where(at_top, above - lower * end, below - upper * end), 0.0)
        return np.asarray(2 / self.slope.cosine * np.sqrt(rate) * _root_integral(end, left, other))

    def ends(self, level: float) -> tuple[float, float] | None:
        """Return from where to where [m] in t the surface at a level [m] stands in this part, or None."""
        upper, lower = self._rates
        if lower < 0:
            half, far = (float(value) for value in self._ellipse(np.asarray(level)))
            near = max(far - 2 * half, 0.0)
        else:
            above, below = (float(value) for value in self._heights(np.asarray(level)))
            near, far = 0.0, min(below / upper, above / lower if lower > 0 else math.copysign(math.inf, above))
        return (near, far) if far >= near else None

    @property
    def _rates(self) -> tuple[float, float]:
        # How fast the heights above the surface's line of wall and axis fall along t, top and bottom.
        tangent = self.slope.sine / self.slope.cosine
        return self.radius / self.depth + tangent, self.radius / self.depth - tangent

    def _heights(self, level: Array) -> tuple[Array, Array]:
        # Of the surface above the bottom and below the top of the tangent line's circle, across the axis.
        above = (level - self.bottom) / self.slope.cosine
        return above, (self.axis - level) / self.slope.cosine + self.radius

    def _ellipse(self, level: Array) -> tuple[Array, Array]:
        upper, lower = self._rates
        above_tip = np.maximum(level - self.tip, 0.0) / self.slope.cosine
        return above_tip * (-1 / lower - 1 / upper) / 2, self.depth - above_tip / upper


def _root_integral(end: Array, left: Array, rate: Array) -> Array:
    # ∫ √(u·(left + rate·u)) du from 0 to end: Gauss's rule where the second root is far, else in closed form.
    points, weights = gauss(_CONE_POINTS)
    steep = rate * end > left
    near = np.where(steep, 0.0, rate * end)[..., np.newaxis]
    root = np.sqrt(left[..., np.newaxis] + near * np.square(points))
    far_root = 2 * end * np.sqrt(end) * ((np.square(points) * root) @ weights)
    safe_rate = np.where(steep, rate, 1.0)
    gap = left / safe_rate
    share = np.where(steep, end, 0.0)
    logarithm = np.arcsinh(np.sqrt(share / np.maximum(gap, 1e-150)))
    closed = (2 * share + gap) / 4 * np.sqrt(share * (share + gap)) - np.square(gap) / 4 * logarithm
    return np.where(steep, np.sqrt(safe_rate) * closed, far_root)


@lru_cache(maxsize=8)
def gauss(count: int) -> tuple[Array, Array]:
    """Return points and weights [1] of Gauss and Legendre on 0 … 1, each of shape (count,)."""
    points, weights = np.polynomial.legendre.leggauss(count)
    return (1 + points) / 2, weights / 2
