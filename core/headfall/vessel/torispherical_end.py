"""Torispherical ends: a crown, part of a sphere, joined to the shell by a knuckle, part of a torus."""

from __future__ import annotations

import math
from dataclasses import dataclass

import numpy as np

from headfall.vessel import lying_torispherical
from headfall.vessel.circle import cap_depth, cap_volume, segment_area
from headfall.vessel.end import End
from headfall.vessel.inversion import level_holding
from headfall.vessel.lying_torispherical import rim_angle
from headfall.vessel.profile import Array

_ARC_POINTS = 16


@dataclass(frozen=True, slots=True)
class TorisphericalEnd(End):
    """A crown of radius ``crown_ratio``·D on a knuckle of radius ``knuckle_ratio``·D, both inside.

    The rim, where they meet, stands at the angle s from the axis: sin s = (R − r)/(L − r); the depth is
    L − (L − r)·cos s. Common practice.
    """

    crown_ratio: float = 1.0
    knuckle_ratio: float = 0.06

    @property
    def rim(self) -> tuple[float, float]:
        """Where the knuckle meets the crown: (distance beyond the tangent line, radius) [m]."""
        sine, cosine = rim_angle(self.crown_ratio, self.knuckle_ratio)
        return self.knuckle_ratio * self.diameter * cosine, self.crown_ratio * self.diameter * sine

    @property
    def capacity(self) -> float:
        """Volume between tangent line and tip [m³]."""
        return float(self.volume(np.asarray(self.depth)))

    def radius(self, distance: Array) -> Array:
        """Return the inside radius [m] at each distance [m] beyond the tangent line."""
        height = self.depth - np.clip(distance, 0.0, self.depth)
        crown = np.sqrt(height * np.maximum(2 * self._crown - height, 0.0))
        return np.where(height < self._crown_height, crown, self._knuckle_radius(height))

    def distance(self, radius: Array) -> Array:
        """Return how far beyond the tangent line [m] the wall has each inside radius [m]."""
        crown = self.depth - self._crown + np.sqrt(np.maximum(self._crown**2 - np.square(radius), 0.0))
        # r² − (ρ − c)² as a product, which is nil at the tangent line without rounding.
        inward = np.maximum(self.diameter / 2 - np.asarray(radius), 0.0)
        knuckle = np.sqrt(inward * np.maximum(2 * self._knuckle - inward, 0.0))
        return np.where(np.asarray(radius) < self.rim[1], crown, knuckle)

    def meridian(self) -> Array:
        """Return the wall from tangent line to tip for drawing: shape (31, 2), (distance, radius) [m]."""
        sine, cosine = rim_angle(self.crown_ratio, self.knuckle_ratio)
        rim = math.atan2(sine, cosine)
        knuckle = np.linspace(math.pi / 2, rim, _ARC_POINTS)
        crown = np.linspace(rim, 0.0, _ARC_POINTS)[1:]
        across = np.concatenate((self._ring + self._knuckle * np.sin(knuckle), self._crown * np.sin(crown)))
        along = np.concatenate(
            (self._knuckle * np.cos(knuckle), self.depth - 2 * self._crown * np.square(np.sin(crown / 2)))
        )
        wall = np.column_stack((along, across))
        wall[0], wall[-1] = (0.0, self.diameter / 2), (self.depth, 0.0)
        return wall

    def plan_area(self, height: Array) -> Array:
        """Return the level cut [m²] of a floor at each height [m] above its tip."""
        crown = height * (2 * self._crown - height)
        knuckle = np.square(self._knuckle_radius(height))
        return np.asarray(math.pi * np.where(height < self._crown_height, crown, knuckle))

    def volume(self, height: Array) -> Array:
        """Return what a floor holds [m³] below each height [m] above its tip.

        With w the height above the lowest point of the knuckle's circle, the knuckle holds π·∫(c + chord(w)/2)² dw,
        c = R − r: a plate, a circle's segment carried round, and a cap of a sphere.
        """
        low = self._crown_height - self._circle_height
        above = np.clip(height - self._circle_height, low, self._knuckle)
        ring, start = self._ring, np.asarray(low)
        plate = ring**2 * (above - low)
        carried = ring * (segment_area(self._knuckle, above) - segment_area(self._knuckle, start))
        cap = cap_volume(self._knuckle, above) - cap_volume(self._knuckle, start)
        crown = cap_volume(self._crown, np.minimum(height, self._crown_height))
        return np.asarray(crown + math.pi * (plate + carried) + cap)

    def height(self, volume: Array) -> Array:
        """Return the height [m] above a floor's tip that holds each volume [m³]."""
        low, high = float(cap_volume(self._crown, np.asarray(self._crown_height))), self.capacity
        crown = cap_depth(self._crown, np.minimum(volume, low))
        target = np.clip(volume, low, high)
        first, last = math.log(low), math.log(high)
        levels = math.log(self._crown_height), math.log(self.depth)
        guess = np.exp(levels[0] + (np.log(target) - first) / (last - first) * (levels[1] - levels[0]))
        between = (self._crown_height, self.depth)
        knuckle = level_holding(target, guess, self.volume, self.plan_area, between)
        return np.where(np.asarray(volume) < low, crown, knuckle)

    def lying_area(self, level: Array) -> Array:
        """Return the level cut [m²] of a drum's head, at each level [m] up to the drum's axis."""
        table = lying_torispherical.table(self.crown_ratio, self.knuckle_ratio)
        return table.plan_area(level * (2 / self.diameter)) * (self.diameter**2 / 4)

    def lying_volume(self, level: Array) -> Array:
        """Return what a drum's head holds [m³] below each level [m] up to the drum's axis."""
        table = lying_torispherical.table(self.crown_ratio, self.knuckle_ratio)
        return table.volume(level * (2 / self.diameter)) * (self.diameter**3 / 8)

    @property
    def _crown(self) -> float:
        return self.crown_ratio * self.diameter

    @property
    def _knuckle(self) -> float:
        return self.knuckle_ratio * self.diameter

    @property
    def _ring(self) -> float:
        return (0.5 - self.knuckle_ratio) * self.diameter

    @property
    def _crown_height(self) -> float:
        sine, cosine = rim_angle(self.crown_ratio, self.knuckle_ratio)
        return self._crown * sine**2 / (1 + cosine)

    @property
    def _circle_height(self) -> float:
        # The lowest point of the knuckle's full circle, above the tip.
        sine, cosine = rim_angle(self.crown_ratio, self.knuckle_ratio)
        return (self._crown - self._knuckle) * sine**2 / (1 + cosine)

    def _knuckle_radius(self, height: Array) -> Array:
        above = np.clip(height - self._circle_height, 0.0, self._knuckle)
        return np.asarray(self._ring + np.sqrt(above * (2 * self._knuckle - above)))
