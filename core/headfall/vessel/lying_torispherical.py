"""A torispherical head on a level drum, up to the drum's axis: a table worked out once for each pair of ratios."""

from __future__ import annotations

import math
from dataclasses import dataclass
from functools import cached_property, lru_cache

import numpy as np

from headfall.vessel import series
from headfall.vessel.circle import segment_area
from headfall.vessel.profile import Array

_RESOLVED = 2e-14
_MOST_PIECES = 150
_VOLUME_POINTS = 10


def rim_angle(crown_ratio: float, knuckle_ratio: float) -> tuple[float, float]:
    """Return sine and cosine [1] of the angle from the axis at which knuckle meets crown; ratios [1] of the diameter.

    sin s = (R − r)/(L − r) for crown radius L and knuckle radius r. The cosine is taken
    without a difference of near squares, since it vanishes for a crown near a hemisphere.
    """
    span = crown_ratio - knuckle_ratio
    sine = (0.5 - knuckle_ratio) / span
    cosine = math.sqrt((crown_ratio - 0.5) * (crown_ratio + 0.5 - 2 * knuckle_ratio)) / span
    return sine, cosine


@dataclass(frozen=True)
class Section:
    """The head of a drum of radius 1, cut level at h above the drum's lowest line, 0 … 1.

    Levels are shares of the radius [1], areas of its square [1]. Own derivation; checked against slices with 30 digits.
    """

    crown_ratio: float
    knuckle_ratio: float

    @cached_property
    def rim_level(self) -> float:
        """Level of the rim's lowest point; below it the cut meets the knuckle only."""
        return self.knuckle_ratio * (2 * self.crown_ratio - 1) / (self.crown_ratio - self.knuckle_ratio)

    def plan_area(self, level: Array, above_rim: Array) -> Array:
        """Return the area of the cut at each level, any shape; ``above_rim`` is the level less ``rim_level``."""
        return self._knuckle_area(level, above_rim) + self._crown_area(above_rim)

    def _knuckle_area(self, level: Array, above_rim: Array) -> Array:
        # ∫ 2·√(ρ² − d²) dx over the knuckle, d = 1 − h, with ρ = d + h·sin²θ: both square roots, at the edge of the
        # cut and at the tangent line, vanish, and the rim merely moves the lower limit.
        knuckle = 2 * self.knuckle_ratio
        points, weights = self._gauss
        start = np.arcsin(np.sqrt(np.maximum(above_rim, 0.0) / level))
        width = math.pi / 2 - start
        theta = start[..., np.newaxis] + width[..., np.newaxis] * points
        depth = np.asarray(level)[..., np.newaxis]
        fallen = depth * np.cos(theta) ** 2
        sine = np.sin(theta) ** 2
        chord = np.sqrt(2 * (1 - depth) + depth * sine)
        integrand = sine * chord * (knuckle - fallen) / np.sqrt(2 * knuckle - fallen)
        return np.asarray(4 * level * width * (integrand @ weights))

    def _crown_area(self, above_rim: Array) -> Array:
        # A plane cuts the crown's sphere in a circle, the rim's plane cuts that circle in a segment.
        sine, cosine = rim_angle(self.crown_ratio, self.knuckle_ratio)
        crown = 2 * self.crown_ratio
        above = np.maximum(above_rim, 0.0)
        below_axis = crown * sine - above
        circle = np.sqrt((crown * cosine**2 / (1 + sine) + above) * (crown + below_axis))
        return segment_area(circle, above * (crown * sine + below_axis) / (circle + crown * cosine))

    @cached_property
    def _gauss(self) -> tuple[Array, Array]:
        # A rim that stands close to the axis brings a root close to the lower limit.
        rim_radius = 1 - self.rim_level
        count = min(max(32, math.ceil(8 / math.sqrt(rim_radius))), 200)
        return _gauss(count)


@dataclass(frozen=True)
class Table:
    """Plan area and volume of one head of a drum of radius 1, 0 … 1.

    Levels are shares of the radius [1], areas of its square [1], volumes of its cube [1]. Kept are A/h and
    V/h², which neither vanish nor grow without bound, so a film of liquid keeps its digits.
    """

    pieces: series.Pieces
    area_powers: Array
    volume_powers: Array

    def plan_area(self, level: Array) -> Array:
        """Return the level cut at each level, any shape."""
        return level * series.evaluate(self.area_powers, *self.pieces.place(level))

    def volume(self, level: Array) -> Array:
        """Return the volume below each level, any shape."""
        return level**2 * series.evaluate(self.volume_powers, *self.pieces.place(level))


@lru_cache(maxsize=64)
def table(crown_ratio: float, knuckle_ratio: float) -> Table:
    """Return the table for a pair of ratios [1], both of the inside diameter; worked out once for each pair."""
    section = Section(crown_ratio, knuckle_ratio)
    pieces: list[tuple[float, float, float, float]] = []
    areas: list[Array] = []
    volumes: list[Array] = []
    held = 0.0
    for origin, span in ((0.0, section.rim_level), (section.rim_level, 1 - section.rim_level)):
        waiting = [(0.0, 1.0)]
        while waiting:
            start, end = waiting.pop()
            middle, half = (start + end) / 2, (end - start) / 2
            s = middle + half * series.NODES
            area = _area(section, origin, span, s) / (origin + span * s**2)
            if series.unresolved(area) > _RESOLVED and len(pieces) + len(waiting) < _MOST_PIECES:
                waiting += [(middle, end), (start, middle)]
                continue
            volume = held + _risen(section, origin, span, start, np.append(s, end))
            held = float(volume[-1])
            pieces.append((origin, span, middle, half))
            areas.append(area)
            volumes.append(volume[:-1] / (origin + span * s**2) ** 2)
    kept = series.Pieces(*np.array(pieces).T)
    return Table(kept, series.powers(np.array(areas).T), series.powers(np.array(volumes).T))


def _area(section: Section, origin: float, span: float, s: Array) -> Array:
    risen = span * s**2
    return section.plan_area(origin + risen, risen if origin else np.zeros_like(risen))


def _risen(section: Section, origin: float, span: float, start: float, ends: Array) -> Array:
    # ∫ A dh from the start to each end, with dh = 2·span·s·ds.
    points, weights = _gauss(_VOLUME_POINTS)
    width = (ends - start)[:, np.newaxis]
    s = start + width * points
    return np.asarray((_area(section, origin, span, s) * 2 * span * s * width) @ weights)


@lru_cache(maxsize=8)
def _gauss(count: int) -> tuple[Array, Array]:
    # Points and weights of Gauss and Legendre on 0 … 1.
    points, weights = np.polynomial.legendre.leggauss(count)
    return (1 + points) / 2, weights / 2
