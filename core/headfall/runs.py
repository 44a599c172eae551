"""One run of the level at a steady inflow, for the lowest, typical and highest coefficients at once."""

from __future__ import annotations

from dataclasses import dataclass
from functools import cached_property

import numpy as np
import numpy.typing as npt

from headfall.answers import Curve
from headfall.outlet.discharge import coefficient_rows, flow_breakpoints, onset_poles, total_flow
from headfall.solve.draw_down import run_curve, run_time
from headfall.solve.equilibrium import rest_level
from headfall.solve.span import align_spans, cut_span
from headfall.system import System

Array = npt.NDArray[np.float64]

SETTLED_PART = 0.001
"""A run that does not reach its stop ends when this part of the way to the equilibrium's volume is left."""
NEAR_PART = 0.02
"""«Within 2 %» of the equilibrium's volume."""
REST_SHOWN = 3600.0
"""How long a level that never moves is drawn [s]."""
_REST_POINTS = 200


@dataclass(frozen=True)
class Runs:
    """The runs of one system. Arrays of three: lowest, typical, highest coefficients."""

    system: System

    @cached_property
    def coefficients(self) -> list[Array]:
        """Discharge coefficients [-], one array of three an outlet."""
        return list(coefficient_rows(self.system.outlets))

    @cached_property
    def breakpoints(self) -> list[float]:
        """Levels where area or flow are not smooth [m]."""
        return [*self.system.profile.breakpoints, *flow_breakpoints(self.system.outlets)]

    @cached_property
    def heel(self) -> float:
        """The level below which nothing flows [m]."""
        return min(outlet.lower_edge for outlet in self.system.outlets)

    @cached_property
    def drains_to_heel(self) -> bool:
        """Whether the level comes down to the heel in finite time when nothing flows in."""
        slack = self.system.tolerance
        return any(o.drains_to_its_edge and o.lower_edge <= self.heel + slack for o in self.system.outlets)

    def flow(self, level: Array, extra_axes: int = 0) -> Array:
        """Return the outflow [m³/s] at levels of shape (3, …); ``extra_axes`` is the number of axes after the first."""
        shape = (3,) + (1,) * extra_axes
        return total_flow(self.system.outlets, level, [row.reshape(shape) for row in self.coefficients])

    def flow_at(self, level: float) -> Array:
        """Return the outflow [m³/s] at one level [m] for the three coefficients."""
        return self.flow(np.full(3, level))

    @cached_property
    def rest(self) -> Array:
        """Levels at which the outlets pass the inflow [m]; may lie above the vessel's top."""
        system = self.system
        only = system.outlets[0]
        if len(system.outlets) == 1 and only.facing == "down":
            return only.elevation + only.onset(np.array(system.inflow), self.coefficients[0])
        return rest_level(self.flow, system.inflow, self.heel, system.profile.height, 3)

    @cached_property
    def reaches(self) -> tuple[bool, bool, bool]:
        """Whether the run comes to the stop level."""
        system, slack = self.system, self.system.tolerance
        if abs(system.start - system.stop) <= slack:
            return True, True, True
        if system.stop > system.start:
            low, typical, high = (system.inflow > 0 and bool(level > system.stop + slack) for level in self.rest)
        elif system.inflow <= 0 and self.drains_to_heel:
            low = typical = high = system.start > self.heel + slack and system.stop >= self.heel - slack
        else:
            low, typical, high = (bool(level < system.stop - slack) for level in self.rest)
        return low, typical, high

    @cached_property
    def ends(self) -> list[tuple[float, str]]:
        """The level [m] at which each run ends and why: ``stop``, ``overflow``, ``settled`` or ``at rest``."""
        return [self._end(index) for index in range(3)]

    def _end(self, index: int) -> tuple[float, str]:
        system, rest = self.system, float(self.rest[index])
        if abs(system.start - system.stop) <= system.tolerance:
            return system.start, "stop"
        if self.reaches[index]:
            return system.stop, "stop"
        if system.inflow <= 0 and system.start <= self.heel + system.tolerance:
            return system.start, "at rest"
        if rest > system.overflow + system.tolerance and system.start < rest:
            return max(system.start, system.overflow), "overflow"
        end = float(self._nearly_settled[index])
        if abs(rest - system.start) <= system.tolerance or end in (system.start, rest):
            return system.start, "at rest"
        return end, "settled"

    @cached_property
    def _nearly_settled(self) -> Array:
        """Levels [m] with 0.1 % of the way to the resting level left, by volume."""
        volumes = self.system.profile.volume(np.concatenate([[self.system.start], self.rest]))
        return self.system.profile.level(volumes[1:] + SETTLED_PART * (volumes[0] - volumes[1:]))

    @cached_property
    def _onsets(self) -> Array:
        return onset_poles(self.system.outlets, self.coefficients, self.system.inflow, np.ones(3))

    def edges_to(self, end: float, index: int) -> list[float]:
        """Return the pieces of the span from the start to a level [m]."""
        poles = self._onsets[:, index].tolist()
        if self.system.inflow > 0 and np.isfinite(self.rest[index]):
            poles.append(float(self.rest[index]))
        return cut_span(self.system.start, end, self.breakpoints, poles)

    def time_to(self, end: float, index: int) -> float:
        """Return the time [s] from the start to a level on the way of the run with the indexed coefficients."""
        if end == self.system.start:
            return 0.0
        edges = np.array(self.edges_to(end, index))
        row = [coefficients[index] for coefficients in self.coefficients]
        return float(run_time(edges, self.system.profile.plan_area, lambda level: self._net(level, row)))

    def _net(self, level: Array, row: list[Array]) -> Array:
        return total_flow(self.system.outlets, level, row) - self.system.inflow

    @cached_property
    def curves(self) -> tuple[Curve, Curve, Curve]:
        """The runs as curves, lowest, typical and highest coefficients."""
        moving = [index for index in range(3) if self.ends[index][0] != self.system.start]
        found: dict[int, Curve] = {}
        if moving:
            edges = align_spans([self.edges_to(self.ends[index][0], index) for index in moving])
            rows = [coefficients[moving].reshape(-1, 1, 1) for coefficients in self.coefficients]
            times, levels = run_curve(edges, self.system.profile.plan_area, lambda level: self._net(level, rows))
            volumes = self.system.profile.volume(levels)
            flows = total_flow(self.system.outlets, levels, [row[..., 0] for row in rows])
            for place, index in enumerate(moving):
                keep = _rising(times[place])
                arrays = (times[place, keep], levels[place, keep], volumes[place, keep], flows[place, keep])
                found[index] = Curve(*arrays, ends=self.ends[index][1])
        low, typical, high = (found.get(index) or self._still(index) for index in range(3))
        return low, typical, high

    def _still(self, index: int) -> Curve:
        """A run that takes no time is one point; a level that never moves is a flat line."""
        why = self.ends[index][1]
        points = _REST_POINTS if why == "at rest" else 1
        time = np.linspace(0.0, REST_SHOWN, points) if points > 1 else np.zeros(1)
        level = np.full(points, self.system.start)
        flow = np.full(points, self.flow_at(self.system.start)[index])
        return Curve(time, level, self.system.profile.volume(level), flow, ends=why)


def _rising(times: Array) -> npt.NDArray[np.intp]:
    """Return the indices of strictly rising times, the last one always among them.

    Where the surface narrows to nothing the last steps in time are lost in round-off.
    """
    highest = np.concatenate([[-np.inf], np.maximum.accumulate(times)[:-1]])
    kept = (times > highest) & (times < times[-1])
    kept[-1] = True
    return np.flatnonzero(kept)
