"""Pipe runs that flow full: entry, friction, fittings, valve, sections in series, a free or a drowned end."""

from __future__ import annotations

from dataclasses import dataclass
from functools import cached_property

import numpy as np
import numpy.typing as npt

from headfall.outlet.friction import LAMINAR_UP_TO, TURBULENT_FROM, blended_factor, plain_share
from headfall.outlet.outlet import FREE, HIGH, LOW, TYPICAL, Array, Conditions, DoubtfulSpan
from headfall.outlet.pipe_sections import NamedLoss, PipeSection, change_of_bore
from headfall.outlet.pipe_velocity import velocity_for

Flags = npt.NDArray[np.bool_] | bool
_ENDS = ("high", "typical", "low")
"""Which end of a loss goes with the columns of the coefficients: the highest loss passes least."""


@dataclass(frozen=True)
class PipeOutlet:
    """One or more alike pipe runs that flow full wherever their inlet is covered.

    ``elevation`` and ``discharge_elevation`` [m] are the centres of inlet and discharging end, ``viscosity`` is
    kinematic [m²/s], ``blocked`` [-] the part of the inlet's area that is. The entry's loss counts in the first bore.

    Energy, source ``bernoulli_losses``: level + pressure head − (discharge or tailwater, the higher) = Σ v²/2g·(ΣK +
    K1/Re + f·L/d) + α·v²/2g at a free end (α 1 in turbulent, 2 in laminar flow) or v²/2g lost at a drowned end, never
    both. Liquid that comes back loses as much. Full bore is assumed down to the inlet's centre, where the flow leaps
    to nil if the line falls from there.
    """

    name: str
    role: str
    elevation: float
    discharge_elevation: float
    sections: tuple[PipeSection, ...]
    entry: NamedLoss
    gravity: float
    viscosity: float
    blocked: float = 0.0
    count: int = 1
    coefficient_source: str = "bernoulli_losses"

    @cached_property
    def coefficients(self) -> Array:
        """Entry loss, then loss and roughness (or fixed friction factor) of each section, then the transition."""
        rows = [[self._entry_loss(end) for end in _ENDS]]
        for section in self.sections:
            rows.append([section.loss(end) for end in _ENDS])
            fixed = section.friction_factor
            rough = section.roughness[::-1] if fixed is None else (fixed, fixed, fixed)
            rows.append(list(rough))
        rows.append([-1.0, 0.0, 1.0])
        return np.array(rows, dtype=float)

    def _entry_loss(self, end: str) -> float:
        """The entry's K; a part of the inlet that is blocked speeds the rest up and loses it again behind."""
        loss, open_part = float(getattr(self.entry, end)), 1 - self.blocked
        if open_part <= 0:
            return np.inf
        return loss / open_part**2 + (self.blocked / open_part) ** 2

    @property
    def area(self) -> float:
        """Area of the first bore [m²], of all alike runs together."""
        return self.count * self.sections[0].area

    @property
    def size(self) -> float | None:
        """The bore [m] that sizing changes: the first."""
        return self.sections[0].bore

    @property
    def bore_name(self) -> str:
        """The first bore as it was typed."""
        return self.sections[0].bore_name

    @property
    def lower_edge(self) -> float:
        """Level [m] at and below which nothing flows out: the inlet's centre, or the discharge where that is higher."""
        return max(self.elevation, self.discharge_elevation)

    @property
    def upper_edge(self) -> float:
        """Level [m] from which the inlet is wholly covered."""
        return self.elevation + 0.5 * self.sections[0].bore

    @property
    def drains_to_its_edge(self) -> bool:
        """Whether the level comes down to the lower edge in finite time: it does."""
        return True

    @property
    def has_fixed_friction(self) -> bool:
        """Whether friction and losses go with the square of the velocity alone."""
        fixed = all(s.friction_factor is not None or s.length == 0 for s in self.sections)
        return fixed and not any(s.laminar_loss for s in self.sections) and not self.entry.laminar

    @property
    def fades_out(self) -> bool:
        """Whether the last of the flow is laminar, at a head that comes to nil above the inlet."""
        return self.discharge_elevation >= self.elevation and not self.has_fixed_friction

    def head(self, level: float, conditions: Conditions = FREE) -> float:
        """Return the head [m] that drives the flow at a level [m]; never negative."""
        outside = max(self.discharge_elevation, float(np.max(conditions.tailwater)))
        return max(level + float(np.max(conditions.pressure_head)) - outside, 0.0)

    def flow(
        self, level: Array, coefficients: Array, scale: Array | float = 1.0, conditions: Conditions = FREE
    ) -> Array:
        """Return the outflow [m³/s] at each level [m]; negative where a drowned end lets liquid back in."""
        level = np.asarray(level)
        if conditions is FREE:
            head = np.where(level > self.elevation, level - self.discharge_elevation, 0.0)
            drowned: Flags = False
            reverse: Flags = False
        else:
            outside = np.maximum(conditions.tailwater, self.discharge_elevation)
            covered = level > self.elevation
            inside = np.where(covered, level, self.elevation) + conditions.pressure_head
            drowned = np.asarray(conditions.tailwater) > self.discharge_elevation
            head = inside - outside
            reverse = (head < 0) & drowned
            head = np.where(reverse, -head, np.where(covered, head, 0.0))
        head = np.maximum(head, 0.0)
        speed = self.velocity(head, coefficients, scale, drowned)
        found = self.area * np.square(scale) * speed
        return np.asarray(np.where(reverse, -found, found) if reverse is not False else found, dtype=float)

    def velocity(self, head: Array, coefficients: Array, scale: Array | float = 1.0, drowned: Flags = False) -> Array:
        """Return the velocity in the first bore [m/s] at each head [m]; nil where a loss has no end."""
        shut = ~np.isfinite(coefficients[0] + sum(coefficients[1 + 2 * i] for i in range(len(self.sections))))
        if np.any(shut):
            coefficients = np.where(np.isfinite(coefficients), coefficients, 0.0)
        start, bend = self._rough_terms(coefficients, scale)
        speed = velocity_for(
            lambda v: self.head_loss(v, coefficients, scale, drowned), head, start, bend, self.gravity,
            exact=self.has_fixed_friction,
        )  # fmt: skip
        return np.where(shut, 0.0, speed) if np.any(shut) else speed

    def _rough_terms(self, coefficients: Array, scale: Array | float) -> tuple[Array, Array]:
        """The losses on the first bore's velocity as a constant K, and as a part that goes with 1/v: a first guess."""
        first = self.sections[0].bore
        constant = np.asarray(coefficients[0], dtype=float)
        inverse = np.zeros(()) + self.entry.laminar * self.viscosity / (first * np.asarray(scale))
        for index, section in enumerate(self.sections):
            ratio = (first / section.bore) ** 2
            bore = section.bore * np.asarray(scale)
            friction = section.friction_factor if section.friction_factor is not None else 0.02
            constant = constant + ratio**2 * (coefficients[1 + 2 * index] + friction * section.length / bore)
            per = 64 * section.length / bore if section.friction_factor is None else 0.0
            inverse = inverse + ratio * (per + section.laminar_loss) * self.viscosity / bore
            if index + 1 < len(self.sections):
                loss, on_next = change_of_bore(section.bore, self.sections[index + 1].bore)
                smaller = self.sections[index + 1].bore if on_next else section.bore
                constant = constant + loss * (first / smaller) ** 4
        return constant + (first / self.sections[-1].bore) ** 4, inverse

    def head_loss(
        self, velocity: Array, coefficients: Array, scale: Array | float = 1.0, drowned: Flags = False
    ) -> Array:
        """Return the head [m] that a velocity in the first bore [m/s] takes, kinetic term or exit loss included."""
        first = self.sections[0].bore
        transition = coefficients[-1]
        total: Array | float = 0.0
        for index, section in enumerate(self.sections):
            ratio = (first / section.bore) ** 2
            own, bore = velocity * ratio, section.bore * np.asarray(scale)
            share: Array | float = 1.0
            reynolds = own
            if not self.has_fixed_friction:
                reynolds = own * (bore / self.viscosity)
                share = plain_share(reynolds, transition)
            factor = self._factor(section, reynolds, coefficients[2 + 2 * index], bore, share)
            losses = coefficients[1 + 2 * index] + factor * section.length / bore
            laminar = section.laminar_loss
            if index == 0:
                losses, laminar = losses + coefficients[0], laminar + self.entry.laminar
            if laminar:
                losses = losses + laminar / np.asarray(reynolds)
            total = total + losses * own * own
            if index + 1 < len(self.sections):
                loss, on_next = change_of_bore(section.bore, self.sections[index + 1].bore)
                speed = velocity * (first / self.sections[index + 1].bore) ** 2 if on_next else own
                total = total + loss * speed * speed
        # A free end keeps the kinetic energy, twice as much in laminar flow; a drowned one loses the velocity head.
        # The kinetic term turns over the whole window whatever the bound: sooner, it would fall as the flow rises.
        free = 1.0 if self.has_fixed_friction or drowned is True else 2.0 - plain_share(reynolds, 0.0)
        kinetic = free if isinstance(drowned, bool) else np.where(drowned, 1.0, free)
        return np.asarray((total + kinetic * own * own) / (2 * self.gravity))

    @staticmethod
    def _factor(
        section: PipeSection, reynolds: Array, given: Array, bore: Array, share: Array | float
    ) -> Array | float:
        if section.length == 0:
            return 0.0
        return given if section.friction_factor is not None else blended_factor(reynolds, given / bore, share)

    def edges(
        self, scale: float = 1.0, coefficients: Array | None = None, conditions: Conditions = FREE
    ) -> tuple[float, ...]:
        """Return the inlet, the level of nil head and those at which a section turns laminar or turbulent [m]."""
        used = self.coefficients[:, TYPICAL] if coefficients is None else coefficients
        tail, pressure = float(np.max(conditions.tailwater)), float(np.max(conditions.pressure_head))
        nil = max(self.discharge_elevation, tail) - pressure
        levels = {self.elevation, nil}
        if np.isfinite(used).all() and not self.has_fixed_friction and self.viscosity > 0:
            speeds = np.array(self._speeds_at((LAMINAR_UP_TO, TURBULENT_FROM, *self._window(float(used[-1]))), scale))
            drowned = bool(tail > self.discharge_elevation)
            heads = self.head_loss(speeds, used[:, None], scale, drowned)
            levels |= {nil + float(head) for head in heads}
        return tuple(sorted(levels))

    @staticmethod
    def _window(transition: float) -> tuple[float, ...]:
        low = LAMINAR_UP_TO + max(transition, 0.0) * 1700.0
        high = TURBULENT_FROM + min(transition, 0.0) * 1700.0
        return low, high

    def _speeds_at(self, reynolds: tuple[float, ...], scale: float) -> list[float]:
        """The velocities in the first bore [m/s] at which a section has each Reynolds number."""
        first = self.sections[0].bore
        return [
            number * self.viscosity / (section.bore * scale) * (section.bore / first) ** 2
            for section in self.sections
            for number in sorted(set(reynolds))
        ]

    def onset(self, flow: Array, coefficients: Array, scale: Array | float = 1.0) -> Array:
        """Return how far above its nil head [m] the run itself passes a small ``flow`` [m³/s]."""
        speed = np.maximum(np.asarray(flow) / (self.area * np.square(scale)), 1e-300)
        return self.head_loss(speed, np.where(np.isfinite(coefficients), coefficients, 1e9), scale)

    def full_bore_flow_at_inlet(self, coefficients: Array, conditions: Conditions = FREE) -> Array:
        """Return the outflow [m³/s] with the inlet just covered."""
        return self.flow(np.array(np.nextafter(self.lower_edge, np.inf)), coefficients, 1.0, conditions)

    def discharge_coefficients(self, level: float, conditions: Conditions = FREE) -> tuple[float, float, float]:
        """Return lowest, typical and highest C = Q/(a·√(2gH)) on the whole head, 1/√(α + ΣK + f·L/d)."""
        head = self.head(level, conditions)
        rows = self.coefficients
        drowned = bool(float(np.max(conditions.tailwater)) > self.discharge_elevation)
        speeds = self.velocity(np.full(3, max(head, 1e-6)), rows, 1.0, drowned)
        low, typical, high = (float(v) for v in speeds / np.sqrt(2 * self.gravity * max(head, 1e-6)))
        return low, typical, high

    def doubtful(self, coefficients: Array, conditions: Conditions = FREE) -> tuple[DoubtfulSpan, ...]:
        """Return the levels with a flow neither laminar nor turbulent, and those with the inlet part covered."""
        spans = (
            [DoubtfulSpan(self.lower_edge, self.upper_edge, "part_full")] if self.upper_edge > self.lower_edge else []
        )
        if self.has_fixed_friction or self.viscosity <= 0 or not np.isfinite(coefficients).all():
            return tuple(spans)
        tail, pressure = float(np.max(conditions.tailwater)), float(np.max(conditions.pressure_head))
        nil = max(self.discharge_elevation, tail) - pressure
        speeds = np.array(self._speeds_at((LAMINAR_UP_TO, TURBULENT_FROM), 1.0))
        heads = self.head_loss(speeds, coefficients[:, None], 1.0, bool(tail > self.discharge_elevation))
        for low, high in heads.reshape(-1, 2):
            if nil + high > self.lower_edge:
                spans.append(DoubtfulSpan(max(nil + float(low), self.lower_edge), nil + float(high), "transition"))
        return tuple(spans)


__all__ = ["HIGH", "LOW", "NamedLoss", "PipeOutlet", "PipeSection"]
