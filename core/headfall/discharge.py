"""All outlets of one vessel together: under its headspace, against their tailwaters, less the inflow."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass
from functools import cached_property

import numpy as np
import numpy.typing as npt

from headfall.outlet.headspace import (
    ClosedHeadspace,
    Headspace,
    OpenHeadspace,
    PressurisedHeadspace,
    VentedHeadspace,
)
from headfall.outlet.outlet import FREE, Conditions, Outlet
from headfall.solve.root import straight_root
from headfall.vessel.profile import Profile

Array = npt.NDArray[np.float64]
Rows = Sequence[Array]
"""The doubtful parameters of each outlet, then those of the headspace; the first axis of each is the parameters."""


@dataclass(frozen=True)
class Receiver:
    """A vessel that the only outlet discharges into, with nothing else flowing: its level follows from the volume.

    ``elevation`` [m] is its lowest point above the draining vessel's datum, ``first_volume`` [m³] what it holds at the
    start, ``start`` [m] the draining vessel's level then. It spills at its top; empty, it holds nothing back.
    """

    profile: Profile
    source: Profile
    elevation: float
    first_volume: float
    start: float

    @cached_property
    def _whole(self) -> float:
        return self.first_volume + float(self.source.volume(np.array(self.start)))

    def held(self, level: Array) -> Array:
        """Return what it holds [m³] when the draining vessel stands at each level [m]; never more than its capacity."""
        return np.asarray(np.clip(self._whole - self.source.volume(level), 0.0, self.profile.capacity))

    def tailwater(self, level: Array) -> Array:
        """Return its level [m above the draining vessel's datum]; −∞ where it is empty."""
        held = self.held(level)
        return np.where(held > 0, self.elevation + self.profile.level(held), -np.inf)

    def level_when(self, heights: Sequence[float]) -> list[float]:
        """Return the draining vessel's levels [m] at which the receiver stands at heights above the datum [m]."""
        wanted = [height for height in heights if 0 <= height - self.elevation <= self.profile.height]
        held = self.profile.volume(np.array(wanted) - self.elevation)
        volumes = self._whole - held
        inside = (volumes >= 0) & (volumes <= self.source.capacity)
        return [float(level) for level in self.source.level(volumes[inside])]

    @property
    def breakpoints(self) -> list[float]:
        """The draining vessel's levels [m] at which the receiver's level is not smooth."""
        return self.level_when([self.elevation + level for level in self.profile.breakpoints])


Tailwater = float | Receiver


@dataclass(frozen=True)
class Discharge:
    """The outlets under one headspace. ``tailwaters`` holds one an outlet: a level [m], −∞ for a free discharge, or a
    receiver. ``inflow`` [m³/s] is steady; a vented headspace breathes the difference. ``scaled`` is the index of the
    outlet whose size sizing changes.
    """

    outlets: tuple[Outlet, ...]
    headspace: Headspace
    tailwaters: tuple[Tailwater, ...]
    inflow: float
    scaled: int = 0

    @cached_property
    def coefficients(self) -> list[Array]:
        """The doubtful parameters, one array (parameters, 3) an outlet and a last one of the headspace."""
        return [*(outlet.coefficients for outlet in self.outlets), self.headspace.coefficients]

    @cached_property
    def is_free(self) -> bool:
        """Whether the headspace is open and every outlet discharges freely."""
        return isinstance(self.headspace, OpenHeadspace) and all(
            not isinstance(tail, Receiver) and tail == -np.inf for tail in self.tailwaters
        )

    def flow(self, level: Array, rows: Rows, scale: Array | float = 1.0) -> Array:
        """Return the flow of all outlets [m³/s] at each level [m]; negative where more flows back in.

        ``scale`` [-] multiplies the size of the outlet that sizing changes.
        """
        if isinstance(self.headspace, VentedHeadspace):
            return self._breathed(level, rows, scale) + self.inflow
        flows = self.each(level, rows, scale)
        total = flows[0]
        for other in flows[1:]:
            total = total + other
        return total

    def each(self, level: Array, rows: Rows, scale: Array | float = 1.0) -> list[Array]:
        """Return the flow of each outlet [m³/s] at each level [m]."""
        return self._under(self.pressure_head(level, rows, scale), level, rows, scale)

    def pressure_head(self, level: Array, rows: Rows, scale: Array | float = 1.0) -> Array | float:
        """Return the gauge pressure of the headspace [m of liquid] at each level [m]."""
        headspace = self.headspace
        if isinstance(headspace, PressurisedHeadspace):
            return headspace.pressure_head
        if isinstance(headspace, ClosedHeadspace):
            return headspace.pressure_head(level, rows[-1])
        if isinstance(headspace, VentedHeadspace):
            return headspace.pressure_head(self._breathed(level, rows, scale))
        return 0.0

    def _under(self, pressure: Array | float, level: Array, rows: Rows, scale: Array | float) -> list[Array]:
        flows = []
        for index, (outlet, tail) in enumerate(zip(self.outlets, self.tailwaters, strict=True)):
            own_scale = scale if index == self.scaled else 1.0
            if self.is_free:
                flows.append(outlet.flow(level, rows[index], own_scale))
                continue
            outside = tail.tailwater(level) if isinstance(tail, Receiver) else tail
            flows.append(outlet.flow(level, rows[index], own_scale, Conditions(pressure, outside)))
        return flows

    def _breathed(self, level: Array, rows: Rows, scale: Array | float) -> Array:
        """Return the air [m³/s] that a vented headspace takes in: as much as leaves, less the inflow."""
        headspace = self.headspace
        assert isinstance(headspace, VentedHeadspace)

        def surplus(air: Array) -> Array:
            flows = self._under(headspace.pressure_head(air), level, rows, scale)
            return np.asarray(sum(flows) - self.inflow - air, dtype=float)

        most = headspace.largest_air_flow
        nothing = np.zeros(np.broadcast_shapes(np.shape(level), *(row.shape[1:] for row in rows), np.shape(scale)))
        at_nil = surplus(nothing)
        free = np.clip(at_nil, -most, most)
        at_free = surplus(free)
        # Where even the deepest vacuum does not hold the liquid back, the vent is what limits the flow.
        limited = at_free * np.sign(free) > 0
        at_free = np.where(limited, 0.0, at_free)
        return straight_root(
            lambda air: np.where(limited, air - free, surplus(air)),
            nothing,
            free,
            np.where(limited, -free, at_nil),
            at_free,
        )

    def edges(self, index: int, scale: float = 1.0) -> list[float]:
        """Return the levels [m] at which the flow is not smooth, for one end of the coefficients (0, 1 or 2)."""
        levels: list[float] = []
        pressure = self.headspace.pressure_head if isinstance(self.headspace, PressurisedHeadspace) else 0.0
        for place, (outlet, tail) in enumerate(zip(self.outlets, self.tailwaters, strict=True)):
            own_scale = scale if place == self.scaled else 1.0
            free = isinstance(tail, Receiver)
            conditions = FREE if self.is_free else Conditions(pressure, -np.inf if free else tail)  # type: ignore[arg-type]
            found = outlet.edges(own_scale, outlet.coefficients[:, index], conditions)
            levels.extend(found)
            if isinstance(tail, Receiver):
                levels += tail.breakpoints + tail.level_when(found)
        return levels

    def onsets(self, rows: Rows, scale: Array) -> Array:
        """Return levels just below the outlets' lower edges [m], shape (outlets, samples): poles for ``cut_span``.

        Where an outlet begins to flow, the net flow n + b·(h − edge)^p has its zeros about (n/b)^(1/p) away from the
        edge, n being what else flows there.
        """
        one = np.ones_like(scale)
        scales = [scale if place == self.scaled else one for place in range(len(self.outlets))]
        edges = np.array([
            [outlet.edges(float(s))[0] for s in own] for outlet, own in zip(self.outlets, scales, strict=True)
        ])  # fmt: skip
        net = np.abs(np.stack([self.flow(edge, rows, scale) for edge in edges]) - self.inflow)
        depth = [o.onset(n, row, s) for o, n, row, s in zip(self.outlets, net, rows[:-1], scales, strict=True)]
        return np.asarray(edges - np.array(depth), dtype=float)
