"""A drum on a slope by slices across its axis, from its heads' radii alone."""

from __future__ import annotations

import math
from collections.abc import Callable
from itertools import pairwise

import numpy as np
from scipy.integrate import quad
from scipy.optimize import brentq, minimize_scalar

from headfall.vessel import ends
from headfall.vessel.inclined_drum import InclinedDrum


class Slices:
    """The same drum by slices across its axis, from its heads' radii alone."""

    def __init__(self, drum: InclinedDrum) -> None:
        self.drum = drum
        self.sine = drum.fall / drum.length
        self.cosine = math.sqrt(1 - self.sine**2)
        self.axis = self._hanging(drum.low_head)
        self.height = self.axis + drum.fall + self._hanging(drum.high_head)

    def radius(self, along: float) -> float:
        """The inside radius at a place along the axis from the low tangent line."""
        drum = self.drum
        if along < 0:
            return float(drum.low_head.radius(np.asarray(-along)))
        if along > drum.length:
            return float(drum.high_head.radius(np.asarray(along - drum.length)))
        return drum.diameter / 2

    def holds(self, across: float, up: float) -> bool:
        """Whether a point of the middle plane lies inside."""
        raised = up - self.axis
        along = across * self.cosine + raised * self.sine
        off = raised * self.cosine - across * self.sine
        inside = -self.drum.low_head.depth <= along <= self.drum.length + self.drum.high_head.depth
        return inside and abs(off) <= self.radius(along)

    def volume(self, level: float) -> float:
        """The volume below a level."""
        return self._integral(lambda along: self._segment(along, level), level)

    def plan_area(self, level: float) -> float:
        """The level cut at a level."""
        return self._integral(lambda along: self._chord(along, level), level) / self.cosine

    def _hanging(self, head: ends.End) -> float:
        def below(distance: float) -> float:
            return distance * self.sine + float(head.radius(np.asarray(distance))) * self.cosine

        edges = [0.0, head.depth]
        if head.depth == 0:
            return below(0.0)
        found = minimize_scalar(
            lambda t: -below(t), bounds=(0.0, head.depth), method="bounded", options={"xatol": 1e-9}
        )
        return max(*(below(edge) for edge in edges), -float(found.fun))

    def _off(self, along: float, level: float) -> float:
        return (level - self.axis - along * self.sine) / self.cosine

    def _chord(self, along: float, level: float) -> float:
        return 2 * math.sqrt(max(self.radius(along) ** 2 - self._off(along, level) ** 2, 0.0))

    def _segment(self, along: float, level: float) -> float:
        radius = self.radius(along)
        if radius == 0:
            return 0.0
        share = min(max(self._off(along, level) / radius, -1.0), 1.0)
        return radius**2 * (math.pi / 2 + math.asin(share) + share * math.sqrt(1 - share**2))

    def _integral(self, of: Callable[[float], float], level: float) -> float:
        drum = self.drum
        edges = [-drum.low_head.depth, 0.0, drum.length, drum.length + drum.high_head.depth]
        if drum.low_head.rim:
            edges.append(-drum.low_head.rim[0])
        if drum.high_head.rim:
            edges.append(drum.length + drum.high_head.rim[0])
        for low, high in pairwise(sorted(edges)):
            edges += self._shores(low, high, level)
        return sum(self._graded(of, low, high) for low, high in pairwise(sorted(edges)) if high > low)

    def _shores(self, low: float, high: float, level: float) -> list[float]:
        # Where the surface meets the wall in the middle plane.
        def within(along: float) -> float:
            return self.radius(along) - abs(self._off(along, level))

        middle, half = (low + high) / 2, (high - low) / 2
        places = middle - half * np.cos(np.linspace(0.0, math.pi, 200)[1:-1])
        signs = [within(float(place)) > 0 for place in places]
        changes = [number for number in range(len(places) - 1) if signs[number] != signs[number + 1]]
        return [float(brentq(within, places[number], places[number + 1], xtol=1e-15)) for number in changes]

    def _graded(self, of: Callable[[float], float], low: float, high: float) -> float:
        # Over an angle, so that a root at either end does no harm.
        middle, half = (low + high) / 2, (high - low) / 2
        value, _ = quad(
            lambda angle: of(middle - half * math.cos(angle)) * half * math.sin(angle),
            0.0,
            math.pi,
            epsabs=1e-11 * drum_scale(self.drum),
            epsrel=1e-11,
            limit=400,
        )
        return float(value)


def drum_scale(drum: InclinedDrum) -> float:
    """A volume to measure faults by."""
    return float(drum.capacity) / drum.diameter
