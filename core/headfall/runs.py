"""One run of the level at a steady inflow, for the lowest, typical and highest coefficients at once."""

from __future__ import annotations

from dataclasses import dataclass, replace
from functools import cached_property

import numpy as np
import numpy.typing as npt

from headfall.answers import Curve
from headfall.discharge import Discharge, Receiver
from headfall.outlet.headspace import OpenHeadspace, VentedHeadspace
from headfall.outlet.orifice import OrificeOutlet
from headfall.solve.draw_down import run_curve, run_time
from headfall.solve.equilibrium import rest_level, still_level
from headfall.solve.span import align_spans, cut_span, nodes, refine_span
from headfall.system import System

Array = npt.NDArray[np.float64]

SETTLED_PART = 0.001
"""A run that does not reach its stop ends when this part of the way to the equilibrium's volume is left."""
NEAR_PART = 0.02
"""«Within 2 %» of the equilibrium's volume."""
REST_SHOWN = 3600.0
"""How long a level that never moves is drawn [s]."""
_REST_POINTS = 200
_LEAP = 1e-3
_TYPICAL = 1
_JUST = 1e-13


@dataclass(frozen=True)
class Runs:
    """The runs of one system. Arrays of three: lowest, typical, highest coefficients."""

    system: System

    @property
    def discharge(self) -> Discharge:
        """The outlets together."""
        return self.system.discharge

    @cached_property
    def still(self) -> Discharge:
        """The outlets as they are when the level stands: a vent then breathes nothing."""
        vented = isinstance(self.system.headspace, VentedHeadspace)
        return replace(self.discharge, headspace=OpenHeadspace()) if vented else self.discharge

    @property
    def coefficients(self) -> list[Array]:
        """The doubtful parameters [-, m], one array (parameters, 3) an outlet and one of the headspace."""
        return self.discharge.coefficients

    def rows(self, indices: slice | list[int] = slice(None), extra_axes: int = 0) -> list[Array]:
        """Return the parameters [-, m] for some of the three ends, with axes of one behind, to go with levels."""
        picked = [row[:, indices] for row in self.coefficients]
        return [row.reshape(*row.shape, *(1,) * extra_axes) for row in picked]

    def row(self, index: int) -> list[Array]:
        """Return the parameters [-, m] of one end, each of shape (parameters,)."""
        return [row[:, index] for row in self.coefficients]

    @cached_property
    def heel(self) -> float:
        """The level below which no outlet takes anything out [m]; one that is blocked or shut does not count."""
        far = np.array([2 * self.system.profile.height])
        open_ones = [o for o in self.system.outlets if float(o.flow(far, o.coefficients[:, [_TYPICAL]])[0]) > 0]
        return min(outlet.lower_edge for outlet in open_ones or self.system.outlets)

    def flow(self, level: Array, extra_axes: int = 0) -> Array:
        """Return the outflow [m³/s] at levels of shape (3, …); ``extra_axes`` is the number of axes after the first."""
        return self.discharge.flow(level, self.rows(extra_axes=extra_axes))

    def flow_at(self, level: float) -> Array:
        """Return the outflow [m³/s] at one level [m] for the three coefficients."""
        return self.flow(np.full(3, level))

    def standing_flow_at(self, level: float) -> Array:
        """Return the outflow [m³/s] at one level [m] that stands still, for the three coefficients."""
        return self.still.flow(np.full(3, level), self.rows())

    @cached_property
    def rest(self) -> Array:
        """Levels at which the outlets pass the inflow [m]; may lie above the vessel's top."""
        system, still = self.system, self.still
        only, rows = system.outlets[0], self.rows()
        if (
            len(system.outlets) == 1
            and isinstance(only, OrificeOutlet)
            and only.is_plain
            and only.facing == "down"
            and still.is_free
        ):
            return only.elevation + only.onset(np.array(system.inflow), rows[0])
        if system.inflow <= 0:
            return self._rest_without_inflow
        lowest = self.heel if still.is_free else 0.0
        return rest_level(lambda level: still.flow(level, rows), system.inflow, lowest, system.profile.height, 3)

    @cached_property
    def _rest_without_inflow(self) -> Array:
        """The heel, or the level at which something else holds the liquid; the start where no outlet lets any out."""
        system, still = self.system, self.still
        if not np.any(self.standing_flow_at(system.profile.height)) and not np.any(self.first_net):
            return np.full(3, system.start)
        if still.is_free:
            return np.full(3, self.heel)
        return still_level(lambda level: still.flow(level, self.rows()), system.profile.height, self.first_net < 0)

    @cached_property
    def first_net(self) -> Array:
        """Outflow less inflow at the start [m³/s]: the level falls where it is above nil."""
        return self.standing_flow_at(self.system.start) - self.system.inflow

    @cached_property
    def leaps(self) -> tuple[float, float, float]:
        """The flow [m³/s] that sets in at once at the resting level; nil where the flow is continuous there.

        A line that flows full takes more than comes in as soon as its inlet is covered: no level rests there.
        """
        found = [0.0, 0.0, 0.0]
        if self.system.inflow > 0 or not self.still.is_free:
            for index in range(3):
                found[index] = self._leap(index)
        return found[0], found[1], found[2]

    def _leap(self, index: int) -> float:
        system, rest = self.system, float(self.rest[index])
        height = system.profile.height
        for place, outlet in enumerate(system.outlets):
            if abs(outlet.lower_edge - rest) > system.tolerance:
                continue
            edge = outlet.lower_edge
            above, far = self.still.each(np.array([edge + _JUST * height, edge + height]), self._column(index))[place]
            if above > _LEAP * far:
                return float(self.still.flow(np.array([edge + _JUST * height]), self._column(index))[0])
        return 0.0

    def _column(self, index: int) -> list[Array]:
        return self.rows([index])

    @cached_property
    def surging(self) -> tuple[bool, bool, bool]:
        """Whether the level ends at an inlet that takes more than flows in as soon as it is covered."""
        low, typical, high = (leap > self.system.inflow > 0 for leap in self.leaps)
        return low, typical, high

    def comes_to_rest_in_time(self, index: int) -> bool:
        """Whether the level comes to the resting level in finite time, not ever more slowly."""
        if self.system.inflow > 0:
            return self.surging[index]
        rest, slack = float(self.rest[index]), self.system.tolerance
        each = self.still.each(np.array([rest + 2 * slack]), self._column(index))
        for outlet, tail, flow in zip(self.system.outlets, self.discharge.tailwaters, each, strict=True):
            drowned = not isinstance(tail, Receiver) and tail > outlet.lower_edge + slack
            at_edge = abs(outlet.lower_edge - rest) <= slack and not drowned
            if float(flow[0]) != 0 and (outlet.drains_to_its_edge or not at_edge):
                return True
        return False

    @cached_property
    def reaches(self) -> tuple[bool, bool, bool]:
        """Whether the run comes to the stop level."""
        low, typical, high = (self._reaches(index) for index in range(3))
        return low, typical, high

    def _reaches(self, index: int) -> bool:
        system, slack, rest = self.system, self.system.tolerance, float(self.rest[index])
        if abs(system.start - system.stop) <= slack:
            return True
        net = float(self.first_net[index])
        falls = system.stop < system.start
        if net == 0 or (net > 0) != falls:
            return False
        beyond = system.stop - rest if falls else rest - system.stop
        return beyond > slack or (beyond >= -slack and self.comes_to_rest_in_time(index))

    @cached_property
    def ends(self) -> list[tuple[float, str]]:
        """The level [m] at which each run ends and why:

        ``stop``, ``overflow``, ``settled``, ``surging`` (at an inlet that takes more than flows in) or ``at rest``.
        """
        return [self._end(index) for index in range(3)]

    def _end(self, index: int) -> tuple[float, str]:
        system, rest, slack = self.system, float(self.rest[index]), self.system.tolerance
        if abs(system.start - system.stop) <= slack:
            return system.start, "stop"
        if self.reaches[index]:
            return self._reached_stop(index), "stop"
        if float(self.first_net[index]) == 0:
            return system.start, "at rest"
        brim = system.profile.height if self.has_overflow_outlet else system.overflow
        if rest > brim + slack and self.first_net[index] < 0:
            return max(system.start, brim), "overflow"
        if abs(rest - system.start) <= slack:
            return system.start, "at rest"
        if self.surging[index]:
            return rest, "surging"
        end = float(self._nearly_settled[index])
        return (system.start, "at rest") if end in (system.start, rest) else (end, "settled")

    def _reached_stop(self, index: int) -> float:
        """The stop level, or as near above it as counts where the last of a laminar flow takes for ever."""
        system = self.system
        fades = any(outlet.fades_out for outlet in system.outlets)
        if fades and abs(float(self.rest[index]) - system.stop) <= system.tolerance and system.stop < system.start:
            return max(system.stop, float(self.rest[index])) + system.tolerance
        return system.stop

    @property
    def has_overflow_outlet(self) -> bool:
        """Whether an outlet with the role of an overflow stands in the vessel."""
        return any(outlet.role == "overflow" for outlet in self.system.outlets)

    @cached_property
    def _nearly_settled(self) -> Array:
        """Levels [m] with 0.1 % of the way to the resting level left, by volume."""
        volumes = self.system.profile.volume(np.concatenate([[self.system.start], self.rest]))
        return self.system.profile.level(volumes[1:] + SETTLED_PART * (volumes[0] - volumes[1:]))

    @cached_property
    def _onsets(self) -> Array:
        return self.discharge.onsets(self.rows(), np.ones(3))

    def breakpoints(self, index: int) -> list[float]:
        """Return the levels where area or flow are not smooth [m]."""
        return [*self.system.profile.breakpoints, *self.discharge.edges(index)]

    @cached_property
    def _pieces(self) -> dict[tuple[float, int], list[float]]:
        """The spans cut so far."""
        return {}

    def edges_to(self, end: float, index: int) -> list[float]:
        """Return the pieces of the span from the start to a level [m]."""
        if (end, index) not in self._pieces:
            self._pieces[end, index] = self._cut_to(end, index)
        return self._pieces[end, index]

    def _cut_to(self, end: float, index: int) -> list[float]:
        system, free = self.system, self.discharge.is_free
        poles = self._onsets[:, index].tolist() if free else []
        if (system.inflow > 0 or not free) and np.isfinite(self.rest[index]):
            poles.append(float(self.rest[index]))
        edges = cut_span(system.start, end, self.breakpoints(index), poles)
        if free:
            return edges
        row = self.rows([index], extra_axes=1)
        return refine_span(edges, lambda level: system.profile.plan_area(level) / self._net(level, row))

    def time_to(self, end: float, index: int) -> float:
        """Return the time [s] from the start to a level on the way of the run with the indexed coefficients."""
        if end == self.system.start:
            return 0.0
        edges, row = np.array(self.edges_to(end, index)), self.rows([index], extra_axes=1)
        return float(run_time(edges, self.system.profile.plan_area, lambda level: self._net(level, row)))

    def passed_by_overflow(self, end: float, index: int) -> float:
        """Return what leaves by the outlets with the role of an overflow [m³] on the way from the start to a level."""
        if end == self.system.start or not self.has_overflow_outlet:
            return 0.0
        level, weight = nodes(np.array(self.edges_to(end, index)))
        row = self.rows([index], extra_axes=1)
        each = self.discharge.each(level, row)
        over = sum(flow for outlet, flow in zip(self.system.outlets, each, strict=True) if outlet.role == "overflow")
        rate = self.system.profile.plan_area(level) / self._net(level, row)
        return float(-(weight * rate * over).sum())

    def _net(self, level: Array, row: list[Array]) -> Array:
        return self.discharge.flow(level, row) - self.system.inflow

    @cached_property
    def curves(self) -> tuple[Curve, Curve, Curve]:
        """The runs as curves, lowest, typical and highest coefficients."""
        moving = [index for index in range(3) if self.ends[index][0] != self.system.start]
        found: dict[int, Curve] = {}
        if moving:
            edges = align_spans([self.edges_to(self.ends[index][0], index) for index in moving])
            rows = self.rows(moving, extra_axes=2)
            times, levels = run_curve(edges, self.system.profile.plan_area, lambda level: self._net(level, rows))
            volumes = self.system.profile.volume(levels)
            flows = self.discharge.flow(levels, self.rows(moving, extra_axes=1))
            for place, index in enumerate(moving):
                keep = _rising(times[place])
                arrays = (times[place, keep], levels[place, keep], volumes[place, keep], flows[place, keep])
                found[index] = Curve(*arrays, ends=self.ends[index][1])
        low, typical, high = (found.get(index) or self._still_curve(index) for index in range(3))
        return low, typical, high

    def _still_curve(self, index: int) -> Curve:
        """A run that takes no time is one point; a level that never moves is a flat line."""
        why = self.ends[index][1]
        points = _REST_POINTS if why == "at rest" else 1
        time = np.linspace(0.0, REST_SHOWN, points) if points > 1 else np.zeros(1)
        level = np.full(points, self.system.start)
        # About an inlet that takes more than flows in, what goes out is on the whole what comes in.
        surges = why == "at rest" and self.surging[index]
        flow = np.full(points, self.system.inflow if surges else self.standing_flow_at(self.system.start)[index])
        return Curve(time, level, self.system.profile.volume(level), flow, ends=why)


def _rising(times: Array) -> npt.NDArray[np.intp]:
    """Return the indices of strictly rising times, the last one always among them.

    Where the surface narrows to nothing the last steps in time are lost in round-off.
    """
    highest = np.concatenate([[-np.inf], np.maximum.accumulate(times)[:-1]])
    kept = (times > highest) & (times < times[-1])
    kept[-1] = True
    return np.flatnonzero(kept)
