"""Orifices: short openings in a wall or a floor, discharging freely or drowned."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np

from headfall.outlet.drowned_opening import drowned_opening
from headfall.outlet.low_reynolds import HANDBOOK_FROM, UNCORRECTED_FROM, coefficient_factor
from headfall.outlet.outlet import FREE, TYPICAL, Array, Conditions, DoubtfulSpan
from headfall.outlet.side_opening import rectangular_opening, round_opening


@dataclass(frozen=True, slots=True)
class OrificeOutlet:
    """One or more alike openings.

    ``shape`` is ``round`` or ``rectangle``, ``facing`` is ``down`` or ``side``. A round opening has
    ``width == height ==`` its diameter [m]. ``elevation`` [m] is the centre of a side opening and the plane of a
    downward one. Coefficients refer to the opening's own area. ``blocked`` [-] is the part of the area that is.
    With a kinematic ``viscosity`` [m²/s] above nil a coefficient of the ``handbook`` follows the Reynolds number
    (``low_reynolds``); nil switches that off.
    """

    name: str
    shape: str
    facing: str
    width: float
    height: float
    elevation: float
    count: int
    coefficient_low: float
    coefficient_typical: float
    coefficient_high: float
    coefficient_source: str
    gravity: float
    role: str = "drain"
    blocked: float = 0.0
    viscosity: float = 0.0
    handbook: bool = False

    @property
    def is_plain(self) -> bool:
        """Whether the coefficient stays the same at every head."""
        return not (self.handbook and self.viscosity > 0)

    @property
    def size(self) -> float | None:
        """The diameter [m] of a round opening, which sizing changes; None for a rectangle."""
        return self.width if self.shape == "round" else None

    @property
    def fades_out(self) -> bool:
        """Whether the flow falls off in proportion to a small head: in creeping flow only."""
        return not self.is_plain

    @property
    def area(self) -> float:
        """Area of all openings together [m²]."""
        single = self.width * self.height
        return self.count * (single * np.pi / 4 if self.shape == "round" else single)

    @property
    def coefficients(self) -> Array:
        """Discharge coefficients; and, where they follow the Reynolds number, which end of the range each is."""
        rows = [[self.coefficient_low, self.coefficient_typical, self.coefficient_high]]
        return np.array(rows if self.is_plain else [*rows, [-1.0, 0.0, 1.0]])

    @property
    def lower_edge(self) -> float:
        """Level [m] below which nothing flows: the plane, or the lowest point of a side opening."""
        return self.elevation - (0.5 * self.height if self.facing == "side" else 0.0)

    @property
    def upper_edge(self) -> float:
        """Level [m] from which the opening is wholly covered."""
        return self.elevation + (0.5 * self.height if self.facing == "side" else 0.0)

    def edges(
        self, scale: float = 1.0, coefficients: Array | None = None, conditions: Conditions = FREE
    ) -> tuple[float, ...]:
        """Return the levels [m] at which the flow is not smooth, rising, with the opening's sizes times ``scale``."""
        half = 0.0 if self.facing == "down" else 0.5 * self.height * scale
        levels = {self.elevation - half, self.elevation + half}
        if conditions is not FREE:
            pressure, tail = float(np.max(conditions.pressure_head)), float(np.max(conditions.tailwater))
            levels |= {level - pressure for level in levels}
            if np.isfinite(tail):
                levels |= {tail, tail - pressure}
        if not self.is_plain:
            size = min(self.width, self.height) * scale
            knots = (HANDBOOK_FROM, 8e3, 1e4, 9e4, UNCORRECTED_FROM)
            levels |= {self.elevation + (re * self.viscosity / size) ** 2 / (2 * self.gravity) for re in knots}
        return tuple(sorted(levels))

    @property
    def drains_to_its_edge(self) -> bool:
        """Whether the level comes down to the lower edge in finite time: only through a downward opening."""
        return self.facing == "down"

    def flow(
        self, level: Array, coefficients: Array, scale: Array | float = 1.0, conditions: Conditions = FREE
    ) -> Array:
        """Return the outflow [m³/s] at each level [m]; level, coefficients and scale broadcast.

        Downward: Q = C_d·a·√(2g·(h − plane)) (source ``torricelli_1644``). Side: the law integrated over the opening's
        height, covered or partly covered (source ``opening_integral``). Nil at and below the lower edge of a free
        opening. Drowned: on the difference of the levels, negative where it flows back in (source
        ``drowned_opening``).
        """
        factor = (self.count * (1 - self.blocked) * np.sqrt(2 * self.gravity)) * np.asarray(coefficients[0])
        if not self.is_plain:
            factor = factor * self._reynolds_factor(level, coefficients[1], scale, conditions)
        if conditions is not FREE:
            return self._under(level, factor, scale, conditions)
        if self.facing == "down":
            head = np.maximum(np.asarray(level) - self.elevation, 0.0)
            return np.asarray(factor * (self.area / self.count) * np.square(scale) * np.sqrt(head), dtype=float)
        height = self.height * np.asarray(scale)
        depth = np.asarray(level) - (self.elevation - 0.5 * height)
        if self.shape == "round":
            return np.asarray(factor * height**2.5 * round_opening(depth / height), dtype=float)
        return np.asarray(factor * self.width * scale * rectangular_opening(depth, height), dtype=float)

    def _under(self, level: Array, factor: Array, scale: Array | float, conditions: Conditions) -> Array:
        """The flow under a pressure in the headspace or against a tailwater."""
        level, pressure, tail = np.asarray(level), np.asarray(conditions.pressure_head), conditions.tailwater
        if self.facing == "down":
            covered = level > self.elevation
            inside = np.where(covered, level, self.elevation) + pressure
            outside = np.maximum(tail, self.elevation)
            head = inside - outside
            runs = covered | ((head < 0) & (np.asarray(tail) > self.elevation))
            # Under a vacuum nothing but air would come in from a free outside.
            runs &= (head > 0) | (np.asarray(tail) > self.elevation)
            root = np.where(runs, np.sign(head) * np.sqrt(np.abs(head)), 0.0)
            return np.asarray(factor * (self.area / self.count) * np.square(scale) * root, dtype=float)
        height, width = self.height * np.asarray(scale), self.width * np.asarray(scale)
        foot = self.elevation - 0.5 * height
        integral = drowned_opening(level - foot, pressure, tail - foot, height, width, self.shape == "round")
        return np.asarray(factor * integral, dtype=float)

    def _reynolds_factor(self, level: Array, spread: Array, scale: Array | float, conditions: Conditions) -> Array:
        outside = np.maximum(conditions.tailwater, self.elevation)
        # A partly covered side opening is driven by what stands over its foot.
        least = 0.0 if self.facing == "down" else 0.25 * self.height
        head = np.maximum(np.abs(np.asarray(level) + conditions.pressure_head - outside), least)
        speed = np.sqrt(2 * self.gravity * head)
        return coefficient_factor(min(self.width, self.height) * np.asarray(scale) * speed / self.viscosity, spread)

    def onset(self, flow: Array, coefficients: Array, scale: Array | float = 1.0) -> Array:
        """Return how far above its lower edge [m] the outlet itself passes a small ``flow`` [m³/s].

        From the leading term of the flow at the edge, in the powers 1/2 (downward), 3/2 (rectangle) or 2 (round) of
        the depth. It is the width over which the outlet takes over from whatever else flows there.
        """
        open_part = max(1 - self.blocked, 1e-12)
        unit = open_part * self.count * np.sqrt(2 * self.gravity) * np.asarray(coefficients[0])
        if self.facing == "down":
            depth = np.square(flow / (unit * (self.area / self.count) * np.square(scale)))
        elif self.shape == "round":
            depth = np.sqrt(flow / (unit * np.pi / 4 * np.sqrt(self.height * np.asarray(scale))))
        else:
            depth = np.cbrt(1.5 * flow / (unit * self.width * np.asarray(scale))) ** 2
        return np.asarray(depth, dtype=float)

    def head(self, level: float, conditions: Conditions = FREE) -> float:
        """Return the head [m] on the plane or centre at a level [m]; never negative."""
        outside = max(self.elevation, float(np.max(conditions.tailwater)))
        return max(level + float(np.max(conditions.pressure_head)) - outside, 0.0)

    def discharge_coefficients(self, level: float, conditions: Conditions = FREE) -> tuple[float, float, float]:
        """Return lowest, typical and highest discharge coefficient [-] at a level [m]."""
        low, typical, high = self.coefficient_low, self.coefficient_typical, self.coefficient_high
        if self.is_plain:
            return low, typical, high
        factor = self._reynolds_factor(np.full(3, level), np.array([-1.0, 0.0, 1.0]), 1.0, conditions)
        return float(low * factor[0]), float(typical * factor[TYPICAL]), float(high * factor[2])

    def doubtful(self, coefficients: Array, conditions: Conditions = FREE) -> tuple[DoubtfulSpan, ...]:
        """Return the levels of a partly covered side opening, and those below the handbook's Reynolds numbers."""
        spans = []
        if self.facing == "side":
            half = 0.5 * self.height
            spans.append(DoubtfulSpan(self.elevation - half, self.elevation + half, "part_full"))
        if not self.is_plain:
            size = min(self.width, self.height)
            head = (HANDBOOK_FROM * self.viscosity / size) ** 2 / (2 * self.gravity)
            foot = self.elevation - (0.5 * self.height if self.facing == "side" else 0.0)
            spans.append(DoubtfulSpan(foot, self.elevation + head, "low_reynolds"))
        return tuple(spans)
