"""A vessel with bodies in it that take room from the liquid."""

from __future__ import annotations

from collections.abc import Sequence

import numpy as np

from headfall.vessel.bracketing import NO_VOLUME, bracketed_level
from headfall.vessel.profile import Array, Outline, Profile
from headfall.vessel.sizes import ImpossibleShapeError, require_not_negative

Body = tuple[float, float, float]

# Where a vessel is looked at between two of its breakpoints: close to both ends, and in between.
_SHARES = np.concatenate(([0.0], np.square(np.sin(np.linspace(1e-6, np.pi / 2 - 1e-6, 65)))))


class DisplacedVessel:
    """A vessel less the ``bodies`` in it: coils, baffles, packing, sludge.

    Each body is (from, to, volume): from level [m] to level [m] it takes the volume [m³], evenly over the height.
    Volumes and areas are net: V(h) = V_vessel(h) − Σ φ(h), A(h) = A_vessel(h) − Σ volume/(to − from). Common practice.

    Raises ``ImpossibleShapeError``, naming the body counted from 1, where its levels are outside the vessel or do not
    rise, its volume is negative, or it leaves no room for liquid at some level.
    """

    def __init__(self, vessel: Profile, bodies: Sequence[Body]) -> None:
        self.vessel = vessel
        self.bodies = tuple(bodies)
        for number, body in enumerate(self.bodies, start=1):
            _require_inside(vessel, number, body)
        inner = {level for body in self.bodies for level in body[:2]} - {0.0, vessel.height}
        knots = np.array([0.0, *sorted(inner), vessel.height])
        self._knots, self._inner = knots, knots[1:-1]
        middle = (knots[:-1] + knots[1:]) / 2
        self._taken_area = np.zeros(len(middle))
        for number, body in enumerate(self.bodies, start=1):
            low, high, volume = body
            self._taken_area += np.where((middle > low) & (middle < high), volume / (high - low), 0.0)
            self._require_room(number, body)
        taken = [volume * np.clip((knots - low) / (high - low), 0.0, 1.0) for low, high, volume in self.bodies]
        self._taken = np.sum(taken, axis=0) if taken else np.zeros(len(knots))
        self._breakpoints = np.array(sorted({*knots.tolist(), *vessel.breakpoints}))
        self._held = self.volume(self._breakpoints)
        self._held[-1] = self.capacity

    @property
    def height(self) -> float:
        """Height of the inside from lowest point to top [m]."""
        return self.vessel.height

    @property
    def capacity(self) -> float:
        """Net inside volume up to the top [m³]."""
        return self.vessel.capacity - float(self._taken[-1])

    @property
    def breakpoints(self) -> tuple[float, ...]:
        """Levels [m] where net plan area is not smooth: those of the vessel and where bodies begin and end."""
        return tuple(self._breakpoints.tolist())

    @property
    def outline(self) -> Outline:
        """The section of the vessel; bodies are not drawn."""
        return self.vessel.outline

    def plan_area(self, level: Array) -> Array:
        """Return the liquid's surface [m²] net of bodies at each level [m], any shape."""
        return np.asarray(self.vessel.plan_area(level) - self._taken_area[np.searchsorted(self._inner, level, "right")])

    def volume(self, level: Array) -> Array:
        """Return the volume of liquid [m³] below each level [m], any shape."""
        return np.asarray(self.vessel.volume(level) - np.interp(level, self._knots, self._taken))

    def level(self, volume: Array) -> Array:
        """Return the level [m] that holds each volume of liquid [m³], any shape."""
        held = np.asarray(volume, dtype=float)
        if not self.bodies:
            return self.vessel.level(held)
        piece = np.clip(np.searchsorted(self._held, held, side="right") - 1, 0, len(self._held) - 2)
        low, high = self._breakpoints[piece], self._breakpoints[piece + 1]
        found = (held > max(self._held[0], NO_VOLUME)) & (held < self._held[-1])
        target = np.where(found, held, self._held[piece + 1])
        # What the bodies take runs straight over the piece; taken as straight over the volume it gives a first guess.
        beside = np.interp(target, self._held, np.interp(self._breakpoints, self._knots, self._taken))
        guess = self.vessel.level(target + beside)
        level = bracketed_level(target, guess, (low, high), self.volume, self.plan_area)
        return np.where(found, level, np.where(held < self._held[-1], 0.0, self.height))

    def reach(self, level: float) -> tuple[float, float]:
        """Return where the wall stands left and right [m across] at a level [m]."""
        return self.vessel.reach(level)

    def _require_room(self, number: int, body: Body) -> None:
        low, high, volume = body
        edges = np.array(sorted({*self._knots.tolist(), *self.vessel.breakpoints}))
        edges = edges[(edges >= low) & (edges <= high)]
        levels = (edges[:-1, None] + np.diff(edges)[:, None] * _SHARES).ravel()
        if high == self.height:
            levels = np.append(levels, high)
        area = self.vessel.plan_area(levels)
        room = area - self._taken_area[np.searchsorted(self._inner, levels, "right")]
        if volume > 0 and np.any(room <= 0):
            place = f"volume of body {number}, from {low:g} m to {high:g} m,"
            worst = int(np.argmin(room))
            wanted = f"small enough to leave room for liquid at {levels[worst]:.4g} m"
            if area[worst] == 0:
                wanted = f"kept away from {levels[worst]:.4g} m, where the vessel has no width"
            raise ImpossibleShapeError(place, volume, wanted)


def _require_inside(vessel: Profile, number: int, body: Body) -> None:
    low, high, volume = body
    require_not_negative(f"lower level of body {number}", low)
    require_not_negative(f"upper level of body {number}", high)
    require_not_negative(f"volume of body {number}", volume)
    if high > vessel.height:
        wanted = f"inside the vessel, {vessel.height:g} or less"
        raise ImpossibleShapeError(f"upper level of body {number}", high, wanted)
    if low >= high:
        raise ImpossibleShapeError(f"lower level of body {number}", low, f"below its upper level, {high:g}")
