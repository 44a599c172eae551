"""The heads of an inclined drum and its level cut as a whole."""

from __future__ import annotations

import math
from dataclasses import dataclass

import numpy as np

from headfall.vessel.conical_end import ConicalEnd
from headfall.vessel.ellipsoidal_end import EllipsoidalEnd
from headfall.vessel.end import End
from headfall.vessel.inclined_parts import ConeCut, KnuckleCut, ShellCut, Slope, SpheroidCut
from headfall.vessel.lying_torispherical import rim_angle
from headfall.vessel.profile import Array
from headfall.vessel.torispherical_end import TorisphericalEnd

Part = SpheroidCut | KnuckleCut | ConeCut


@dataclass(frozen=True, slots=True)
class InclinedHead:
    """A low head of an inclined drum (a high one is a low one turned over).

    ``hang`` [m] is how far its lowest point lies below the lowest point of the tangent line, and ``lowest`` that
    point as (t, radius) [m]. ``power`` [1] is that with which the cut grows with a film's level. ``turns`` [m] are
    the levels above the vessel's lowest point where the cut is not smooth.
    """

    hang: float
    lowest: tuple[float, float]
    power: float
    parts: tuple[Part, ...]
    turns: tuple[float, ...]

    def area(self, level: Array) -> Array:
        """Return the level cut [m²] at each level [m], any shape."""
        total = np.zeros(np.shape(level))
        for part in self.parts:
            total = total + part.area(level)
        return total

    def ends(self, level: float) -> tuple[float, float] | None:
        """Return from where to where [m] beyond the tangent line the surface at a level [m] stands, or None."""
        found = [ends for part in self.parts if (ends := part.ends(level)) is not None]
        return (min(near for near, _ in found), max(far for _, far in found)) if found else None


@dataclass(frozen=True, slots=True)
class InclinedSection:
    """The level cut of an inclined drum; ``height`` [m] is that of the vessel."""

    shell: ShellCut
    low: InclinedHead
    high: InclinedHead
    height: float

    def area(self, level: Array) -> Array:
        """Return the level cut [m²] at each level [m], any shape, 0 … height."""
        return self.shell.area(level) + self.low.area(level) + self.high.area(self.height - level)

    @property
    def turns(self) -> tuple[float, ...]:
        """Levels [m] where the cut is not smooth, 0 and the height among them, rising; near ones are one."""
        levels = sorted({*self.low.turns, *(self.height - turn for turn in self.high.turns)})
        kept = [0.0]
        for level in levels:
            if level - kept[-1] > 1e-13 * self.height and self.height - level > 1e-13 * self.height:
                kept.append(level)
        return (*kept, self.height)


def inclined_section(length: float, slope: Slope, low_head: End, high_head: End) -> InclinedSection:
    """Return the section of a drum of the length [m] between two fitted heads."""
    low, high = inclined_head(low_head, slope), inclined_head(high_head, slope)
    radius = low_head.diameter / 2
    height = length * slope.sine + 2 * radius * slope.cosine + low.hang + high.hang
    return InclinedSection(ShellCut(radius, length, slope, low.hang), low, high, height)


def inclined_head(head: End, slope: Slope) -> InclinedHead:
    """Return the inclined cut of a fitted head, taken as a low one."""
    if isinstance(head, EllipsoidalEnd):
        return _ellipsoidal(head, slope)
    if isinstance(head, TorisphericalEnd):
        return _torispherical(head, slope)
    if isinstance(head, ConicalEnd):
        return _conical(head, slope)
    radius = head.diameter / 2
    return InclinedHead(0.0, (0.0, radius), 1.5, (), (0.0, 2 * radius * slope.cosine))


def _ellipsoidal(head: EllipsoidalEnd, slope: Slope) -> InclinedHead:
    radius, depth = head.diameter / 2, head.depth
    rise = math.hypot(radius * slope.cosine, depth * slope.sine)
    hang = (depth * slope.sine) ** 2 / (rise + radius * slope.cosine)
    part = SpheroidCut(slope, radius, depth, 0.0, 0.0, radius, lowest=0.0, edge=hang)
    lowest = (depth**2 * slope.sine / rise, radius**2 * slope.cosine / rise)
    return InclinedHead(hang, lowest, 1.0, (part,), (hang, hang + 2 * radius * slope.cosine))


def _torispherical(head: TorisphericalEnd, slope: Slope) -> InclinedHead:
    radius, sine, cosine = head.diameter / 2, slope.sine, slope.cosine
    knuckle, crown = head.knuckle_ratio * head.diameter, head.crown_ratio * head.diameter
    ring, centre = radius - knuckle, head.depth - crown
    rim_along, rim_radius = head.rim
    rim_sine, rim_cosine = rim_angle(head.crown_ratio, head.knuckle_ratio)
    in_knuckle = sine <= rim_cosine
    if in_knuckle:
        hang = knuckle * sine**2 / (1 + cosine)
        lowest = (knuckle * sine, ring + knuckle * cosine)
    else:
        hang = sine * centre + crown - radius * cosine
        lowest = (centre + crown * sine, crown * cosine)
    axis = hang + radius * cosine
    torus_bottom = 0.0 if in_knuckle else axis - ring * cosine - knuckle
    sphere_bottom = axis - sine * centre - crown if in_knuckle else 0.0
    edge = axis - sine * rim_along - rim_radius * cosine
    parts = (
        KnuckleCut(slope, ring, knuckle, math.atan2(rim_cosine, rim_sine), torus_bottom, axis),
        SpheroidCut(slope, crown, crown, centre, rim_along, rim_radius, sphere_bottom, edge),
    )
    turns = (hang, hang + 2 * radius * cosine, edge, edge + 2 * rim_radius * cosine)
    return InclinedHead(hang, lowest, 1.0, parts, turns)


def _conical(head: ConicalEnd, slope: Slope) -> InclinedHead:
    radius, depth = head.diameter / 2, head.depth
    across, down = radius * slope.cosine, depth * slope.sine
    hang = max(down - across, 0.0)
    axis = hang + across
    tip = 0.0 if hang > 0 else axis - down
    power = 0.5 if abs(down - across) <= 1e-12 * (down + across) else 2.0 if hang > 0 else 1.5
    lowest = (depth, 0.0) if hang > 0 else (0.0, radius)
    part = ConeCut(slope, radius, depth, axis, hang, tip)
    return InclinedHead(hang, lowest, power, (part,), (hang, hang + 2 * across, tip))
