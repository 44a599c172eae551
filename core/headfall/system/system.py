"""What the solvers need of a case, SI throughout."""

from __future__ import annotations

from dataclasses import dataclass, field
from functools import cached_property

import numpy as np

from headfall.discharge import Discharge, Tailwater
from headfall.liquids import LiquidState
from headfall.outlet.headspace import Headspace, OpenHeadspace
from headfall.outlet.outlet import Outlet
from headfall.vessel.profile import Profile

LEVEL_TOLERANCE = 1e-9
"""Comparisons of levels forgive this part of the vessel's height."""


@dataclass(frozen=True)
class FlowLimit:
    """A flow [m³/s] that must not be passed at a level [m]."""

    level: float
    flow: float


@dataclass(frozen=True)
class System:
    """One vessel with its outlets. ``overflow`` is always a number (the top where none was typed).

    ``tailwaters`` holds one an outlet, −∞ for a free discharge; left empty, all discharge freely.
    """

    profile: Profile
    outlets: tuple[Outlet, ...]
    inflow: float
    liquid: LiquidState
    start: float
    stop: float
    overflow: float
    high: float | None
    drain_time: float | None
    gravity: float
    pressure: float
    headspace_declared: bool
    headspace: Headspace = field(default_factory=OpenHeadspace)
    tailwaters: tuple[Tailwater, ...] = ()
    highest_level: float | None = None
    flow_limit: FlowLimit | None = None
    site_datum: float | None = None

    @property
    def tolerance(self) -> float:
        """How far apart levels may be and still count as equal [m]."""
        return LEVEL_TOLERANCE * self.profile.height

    @cached_property
    def discharge(self) -> Discharge:
        """The outlets under the headspace and against their tailwaters, less the inflow."""
        tailwaters = self.tailwaters or (-np.inf,) * len(self.outlets)
        return Discharge(self.outlets, self.headspace, tailwaters, self.inflow, self.first_drain)

    @property
    def first_drain(self) -> int:
        """Index of the outlet that sizing changes: the first that is no overflow."""
        return next((index for index, outlet in enumerate(self.outlets) if outlet.role == "drain"), 0)
