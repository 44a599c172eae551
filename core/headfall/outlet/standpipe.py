"""Standpipes: an upright pipe whose rim is a weir at first, then an orifice, and last runs full."""

from __future__ import annotations

from dataclasses import dataclass
from functools import cached_property

import numpy as np

from headfall.outlet.outlet import FREE, TYPICAL, Array, Conditions, DoubtfulSpan
from headfall.outlet.pipe import PipeOutlet

RIM = (1.5, 1.7, 1.85)
"""Q = C_w·π·D·H^1.5 of a rim, lowest, typical, highest [m^0.5/s]; source ``practice_standpipe``."""
ORIFICE = (0.57, 0.60, 0.62)
"""Discharge coefficient of the drowned rim, lowest, typical, highest [-]; source ``practice_standpipe``."""
CHANGING = (0.2, 0.6)
"""Heads over the diameter between which control changes, and flow is uneven."""
_BISECTIONS = 60


@dataclass(frozen=True)
class Standpipe:
    """One or more alike standpipes of ``diameter`` [m], rim at ``crest`` [m].

    The flow is the smallest of three (source ``practice_standpipe``): weir over the rim, C_w·π·D·H^1.5, or with a
    coefficient of one's own (2/3)·C·√(2g)·π·D·H^1.5; orifice, C_d·a·√(2gH); and, where ``line`` is given, the pipe
    behind running full. The rim stands in the headspace: its pressure does not drive the flow over it.
    """

    name: str
    role: str
    diameter: float
    crest: float
    gravity: float
    line: PipeOutlet | None = None
    given: tuple[float, float, float] | None = None
    blocked: float = 0.0
    count: int = 1

    @property
    def coefficient_source(self) -> str:
        """Key of the list of sources."""
        return "practice_standpipe" if self.given is None else "own_coefficient"

    @cached_property
    def coefficients(self) -> Array:
        """Weir coefficient C of (2/3)·C·√(2g), orifice coefficient, then those of the line: shape (2 + …, 3)."""
        rim = self.given or tuple(1.5 * value / np.sqrt(2 * self.gravity) for value in RIM)
        rows = np.array([rim, ORIFICE])
        return rows if self.line is None else np.vstack([rows, self.line.coefficients])

    @property
    def area(self) -> float:
        """Area of the bore [m²], of all together."""
        return float(self.count * np.pi / 4 * self.diameter**2)

    @property
    def size(self) -> float | None:
        """The diameter [m], which sizing changes."""
        return self.diameter

    @property
    def elevation(self) -> float:
        """The rim [m]."""
        return self.crest

    @property
    def lower_edge(self) -> float:
        """The rim [m]."""
        return self.crest

    @property
    def upper_edge(self) -> float:
        """The rim [m]."""
        return self.crest

    @property
    def drains_to_its_edge(self) -> bool:
        """Whether the level comes down to the rim in finite time: it does not."""
        return False

    @property
    def fades_out(self) -> bool:
        """Whether the flow falls off in proportion to a small head: it falls off faster still."""
        return False

    def head(self, level: float, conditions: Conditions = FREE) -> float:
        """Return the head [m] over the rim; never negative."""
        return max(level - self.crest, 0.0)

    def flow(
        self, level: Array, coefficients: Array, scale: Array | float = 1.0, conditions: Conditions = FREE
    ) -> Array:
        """Return the outflow [m³/s] at each level [m]; nothing comes back before a tailwater stands over the rim."""
        head = np.maximum(np.asarray(level) - self.crest, 0.0)
        smallest = np.minimum(self._rim(head, coefficients, scale), self._orifice(head, coefficients, scale))
        if self.line is not None:
            full = np.maximum(self.line.flow(level, coefficients[2:], scale, conditions), 0.0)
            smallest = np.minimum(smallest, (1 - self.blocked) * self.count * full)
        elif conditions is not FREE:
            over = np.maximum(np.asarray(conditions.tailwater) - self.crest, 0.0)
            difference = head - over
            drowned = np.sign(difference) * self._orifice(np.abs(difference), coefficients, scale)
            smallest = np.where(over > 0, np.minimum(smallest, drowned), smallest)
        return np.asarray(smallest, dtype=float)

    def _rim(self, head: Array, coefficients: Array, scale: Array | float) -> Array:
        unit = 2 / 3 * np.sqrt(2 * self.gravity) * np.pi * self.diameter * self.count * (1 - self.blocked)
        return np.asarray(unit * np.asarray(coefficients[0]) * scale * head * np.sqrt(head))

    def _orifice(self, head: Array, coefficients: Array, scale: Array | float) -> Array:
        unit = np.sqrt(2 * self.gravity) * self.area * (1 - self.blocked)
        return np.asarray(unit * np.asarray(coefficients[1]) * np.square(scale) * np.sqrt(head))

    def control(self, level: float, conditions: Conditions = FREE) -> str:
        """Return what sets the typical flow at a level [m]: ``weir``, ``orifice`` or ``pipe``."""
        used, head = self.coefficients[:, TYPICAL], np.array(self.head(level))
        flows = {"weir": float(self._rim(head, used, 1.0)), "orifice": float(self._orifice(head, used, 1.0))}
        if self.line is not None:
            full = float(self.line.flow(np.array(level), used[2:], 1.0, conditions))
            flows["pipe"] = (1 - self.blocked) * self.count * max(full, 0.0)
        return min(flows, key=lambda kind: flows[kind])

    def edges(
        self, scale: float = 1.0, coefficients: Array | None = None, conditions: Conditions = FREE
    ) -> tuple[float, ...]:
        """Return the rim and the levels [m] at which control changes."""
        used = self.coefficients[:, TYPICAL] if coefficients is None else coefficients
        # Weir and orifice pass alike at H = (3/8)·(C_d/C)·D.
        levels = {self.crest, self.crest + 0.375 * float(used[1] / used[0]) * self.diameter * scale}
        if self.line is not None:
            changed = self._full_from(scale, used, conditions)
            levels |= set() if changed is None else {changed}
        return tuple(sorted(levels))

    def _full_from(self, scale: float, used: Array, conditions: Conditions) -> float | None:
        """The level from which the line runs full; None where it never does within a hundred diameters."""

        def excess(level: float) -> float:
            here, head = np.array(level), np.array(max(level - self.crest, 0.0))
            assert self.line is not None
            full = self.line.flow(here, used[2:], scale, conditions) * self.count * (1 - self.blocked)
            return float(np.minimum(self._rim(head, used, scale), self._orifice(head, used, scale)) - full)

        low, high = self.crest, self.crest + 100 * self.diameter * scale
        if excess(high) <= 0:
            return None
        for _ in range(_BISECTIONS):
            middle = 0.5 * (low + high)
            low, high = (low, middle) if excess(middle) > 0 else (middle, high)
        return high

    def onset(self, flow: Array, coefficients: Array, scale: Array | float = 1.0) -> Array:
        """Return how far above the rim [m] the standpipe itself passes a small ``flow`` [m³/s]."""
        unit = np.maximum(self._rim(np.ones(np.shape(flow)), coefficients, scale), 1e-300)
        return np.asarray(np.cbrt(np.asarray(flow) / unit) ** 2)

    def discharge_coefficients(self, level: float, conditions: Conditions = FREE) -> tuple[float, float, float]:
        """Return lowest, typical and highest C of the rim as a weir, (2/3)·C·√(2g)·π·D·H^1.5."""
        low, typical, high = (float(value) for value in self.coefficients[0])
        return low, typical, high

    def doubtful(self, coefficients: Array, conditions: Conditions = FREE) -> tuple[DoubtfulSpan, ...]:
        """Return the levels at which control changes from weir to orifice, and the flow is uneven."""
        low, high = (self.crest + part * self.diameter for part in CHANGING)
        return (DoubtfulSpan(low, high, "changing_control"),)
