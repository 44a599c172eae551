"""Weirs: rectangular and V-notches in a thin plate, and broad crests."""

from __future__ import annotations

from dataclasses import dataclass
from functools import cached_property

import numpy as np

from headfall.outlet.outlet import FREE, TYPICAL, Array, Conditions, DoubtfulSpan
from headfall.outlet.weir_coefficients import (
    FULL_WIDTH_CORRECTION,
    HEAD_CORRECTION,
    contracted_coefficient,
    full_width_coefficient,
    notch_coefficient,
)

STANDARD_DOUBT = 0.03
"""Half the range of a thin-plate weir's standard coefficient, as a part of it; common practice for field use."""
BROAD_CREST = (0.85, 0.93, 1.0)
_SUBMERGED_POWER = 0.385


@dataclass(frozen=True)
class Weir:
    """One or more alike crests. ``form`` is ``rectangular``, ``vnotch`` or ``broad_crested``.

    ``width`` [m] belongs to the first and the last, ``angle`` [rad] to the second; ``channel_width`` [m], if known, is
    that of the channel towards a rectangular notch. ``given`` is a coefficient of one's own, lowest, typical, highest,
    which takes the place of the standard's coefficient and its corrections. The crest stands ``crest`` [m] above the
    vessel's lowest point, which counts as the distance P to the floor.

    Rectangular: Q = (2/3)·C·√(2g)·b·H^1.5 (sources ``iso_1438``, ``rehbock_1929``); V-notch: (8/15)·C·√(2g)·tan(θ/2)·
    H^2.5 (``iso_1438``); broad crest: (2/3)^1.5·√g·C·b·H^1.5 (``iso_3846``). A tailwater above the crest lowers the
    flow by (1 − (h₂/h₁)ⁿ)^0.385, n the power of the free weir (source ``villemonte_1947``). The crest stands in the
    headspace: its pressure does not drive the flow.
    """

    name: str
    role: str
    form: str
    crest: float
    gravity: float
    width: float = 0.0
    angle: float = 0.0
    channel_width: float | None = None
    given: tuple[float, float, float] | None = None
    blocked: float = 0.0
    count: int = 1

    @property
    def coefficient_source(self) -> str:
        """Key of the list of sources."""
        if self.given is not None:
            return "own_coefficient"
        if self.form == "broad_crested":
            return "iso_3846"
        return "rehbock_1929" if self.is_full_width else "iso_1438"

    @property
    def is_full_width(self) -> bool:
        """Whether the notch is as wide as the channel."""
        return self.channel_width is not None and self.width >= self.channel_width * (1 - 1e-9)

    @property
    def power(self) -> float:
        """The power of the head in the free weir's law [-]."""
        return 2.5 if self.form == "vnotch" else 1.5

    @cached_property
    def coefficients(self) -> Array:
        """The coefficient itself where it is one's own or a broad crest's, else a factor on the standard's: (1, 3)."""
        if self.given is not None:
            return np.array([self.given])
        if self.form == "broad_crested":
            return np.array([BROAD_CREST])
        return np.array([[1 - STANDARD_DOUBT, 1.0, 1 + STANDARD_DOUBT]])

    @property
    def area(self) -> float:
        """No fixed area: nil."""
        return 0.0

    @property
    def size(self) -> float | None:
        """No diameter."""
        return None

    @property
    def elevation(self) -> float:
        """The crest [m]."""
        return self.crest

    @property
    def lower_edge(self) -> float:
        """The crest [m]."""
        return self.crest

    @property
    def upper_edge(self) -> float:
        """The crest [m]: a weir is never covered."""
        return self.crest

    @property
    def drains_to_its_edge(self) -> bool:
        """Whether the level comes down to the crest in finite time: it does not."""
        return False

    @property
    def fades_out(self) -> bool:
        """Whether the flow falls off in proportion to a small head: it falls off faster still."""
        return False

    def head(self, level: float, conditions: Conditions = FREE) -> float:
        """Return the head [m] over the crest; never negative."""
        return max(level - self.crest, 0.0)

    def flow(
        self, level: Array, coefficients: Array, scale: Array | float = 1.0, conditions: Conditions = FREE
    ) -> Array:
        """Return the outflow [m³/s] at each level [m]; ``scale`` multiplies the width, of a V-notch tan(θ/2)."""
        head = np.maximum(np.asarray(level) - self.crest, 0.0)
        if conditions is FREE:
            return self._free(head, coefficients, scale)
        tail = np.maximum(np.asarray(conditions.tailwater) - self.crest, 0.0)
        higher, lower = np.maximum(head, tail), np.minimum(head, tail)
        ratio = lower / np.where(higher > 0, higher, 1.0)
        reduced = (1 - ratio**self.power) ** _SUBMERGED_POWER
        return np.asarray(np.where(head >= tail, 1.0, -1.0) * reduced * self._free(higher, coefficients, scale))

    def _free(self, head: Array, coefficients: Array, scale: Array | float) -> Array:
        root = np.sqrt(2 * self.gravity) * self.count * (1 - self.blocked) * np.asarray(coefficients[0])
        if self.form == "broad_crested":
            factor = (2 / 3) ** 1.5 / np.sqrt(2) * root * self.width
            return np.asarray(factor * scale * head * np.sqrt(head))
        if self.form == "vnotch":
            notch, added = (1.0, 0.0) if self.given is not None else notch_coefficient(self.angle)
            counted = _raised(head, added) if added > 0 else head
            return np.asarray(8 / 15 * root * notch * np.tan(0.5 * self.angle) * scale * counted**2 * np.sqrt(counted))
        constant, width, counted = self._rectangular(head)
        return np.asarray(2 / 3 * root * constant * width * scale * counted * np.sqrt(counted))

    def _rectangular(self, head: Array) -> tuple[Array | float, float, Array]:
        """Coefficient, width [m] and head [m] that count."""
        if self.given is not None:
            return 1.0, self.width, head
        if self.is_full_width:
            return full_width_coefficient(head, self.crest), self.width, _raised(head, FULL_WIDTH_CORRECTION)
        ratio = 0.0 if self.channel_width is None else self.width / self.channel_width
        constant, added = contracted_coefficient(head, self.crest, ratio)
        return constant, self.width + added, _raised(head, HEAD_CORRECTION)

    def standard_coefficient(self, head: float) -> float:
        """Return the typical coefficient [-] at a head [m]: one's own, or the standard's."""
        typical = float(self.coefficients[0, TYPICAL])
        if self.given is not None or self.form == "broad_crested":
            return typical
        if self.form == "vnotch":
            return notch_coefficient(self.angle)[0]
        return float(np.asarray(self._rectangular(np.array(head))[0]))

    def edges(
        self, scale: float = 1.0, coefficients: Array | None = None, conditions: Conditions = FREE
    ) -> tuple[float, ...]:
        """Return the crest, where H/P reaches the end of the formula, and the tailwater [m]."""
        levels = {self.crest}
        if self.form == "rectangular" and self.given is None and self.crest > 0:
            levels.add(3.5 * self.crest)
        tail = float(np.max(conditions.tailwater))
        if np.isfinite(tail) and tail > self.crest:
            levels.add(tail)
        return tuple(sorted(levels))

    def onset(self, flow: Array, coefficients: Array, scale: Array | float = 1.0) -> Array:
        """Return how far above the crest [m] the weir itself passes a small ``flow`` [m³/s], roughly."""
        unit = np.maximum(self._free(np.ones(np.shape(flow)), coefficients, scale), 1e-300)
        return np.asarray((np.asarray(flow) / unit) ** (1 / self.power))

    def discharge_coefficients(self, level: float, conditions: Conditions = FREE) -> tuple[float, float, float]:
        """Return lowest, typical and highest coefficient [-] at the head of a level [m]."""
        low, typical, high = (float(value) for value in self.coefficients[0])
        if self.given is not None or self.form == "broad_crested":
            return low, typical, high
        standard = self.standard_coefficient(self.head(level))
        return low * standard, typical * standard, high * standard

    def doubtful(self, coefficients: Array, conditions: Conditions = FREE) -> tuple[DoubtfulSpan, ...]:
        """Return nothing: the law holds down to a film."""
        return ()


def _raised(head: Array, added: float) -> Array:
    """The head with the standard's correction, which fades out below some times its own size: no flow at no head."""
    return np.asarray(head + added * -np.expm1(-head / added))
