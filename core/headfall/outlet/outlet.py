"""What every outlet answers."""

from __future__ import annotations

from dataclasses import dataclass
from typing import Protocol

import numpy as np
import numpy.typing as npt

Array = npt.NDArray[np.float64]

LOW, TYPICAL, HIGH = 0, 1, 2
"""Columns of ``Outlet.coefficients``: the end that passes least, the typical one, the end that passes most."""


@dataclass(frozen=True, slots=True)
class Conditions:
    """What acts on an outlet beside the level inside; both broadcast with the level.

    ``pressure_head`` [m] is the gauge pressure of the headspace over ρ·g; ``tailwater`` [m] is the level of the liquid
    outside above the vessel's datum, −∞ where the outlet discharges freely.
    """

    pressure_head: Array | float = 0.0
    tailwater: Array | float = -np.inf


FREE = Conditions()
"""An open headspace and a free discharge."""


@dataclass(frozen=True, slots=True)
class DoubtfulSpan:
    """Levels from ``low`` to ``high`` [m] over which an outlet's law is not to be believed.

    ``why`` is ``transition`` (neither laminar nor turbulent), ``low_reynolds`` (an orifice below the handbook's
    range), ``part_full`` (an opening or pipe that is not covered) or ``changing_control`` (a standpipe between weir and
    orifice).
    """

    low: float
    high: float
    why: str


class Outlet(Protocol):
    """One outlet, or several alike.

    ``coefficients`` is an array of shape (parameters, 3): what the flow law is not sure of, at the end that passes
    least, the typical one and the end that passes most. How many parameters there are and what they are is the kind's
    own affair. Methods take them back as an array whose first axis is the parameters and whose other axes broadcast
    with the level.
    """

    @property
    def name(self) -> str:
        """What the outlet is called."""

    @property
    def role(self) -> str:
        """``drain`` or ``overflow``."""

    @property
    def coefficients(self) -> Array:
        """The doubtful parameters, shape (parameters, 3), each in its own unit, [-] or [m]."""

    @property
    def coefficient_source(self) -> str:
        """Key of the list of sources."""

    @property
    def area(self) -> float:
        """Area [m²] that velocities refer to; of all alike openings together."""

    @property
    def elevation(self) -> float:
        """Height [m] of the opening: a centre, a plane or a crest."""

    @property
    def lower_edge(self) -> float:
        """Level [m] at and below which nothing flows out freely under an open headspace."""

    @property
    def upper_edge(self) -> float:
        """Level [m] from which the opening is wholly covered."""

    @property
    def drains_to_its_edge(self) -> bool:
        """Whether the level comes down to the lower edge in finite time when nothing flows in."""

    @property
    def size(self) -> float | None:
        """The diameter or bore [m] that sizing changes; None where it is told as a factor."""

    @property
    def fades_out(self) -> bool:
        """Whether the flow falls off in proportion to a small head, so that the last of it takes for ever."""

    def head(self, level: float, conditions: Conditions = FREE) -> float:
        """Return the head [m] that drives the flow at a level [m]; never negative."""

    def flow(
        self, level: Array, coefficients: Array, scale: Array | float = 1.0, conditions: Conditions = FREE
    ) -> Array:
        """Return the outflow [m³/s] at each level [m], negative where it flows back in.

        Never falls with the level nor with the pressure head, never rises with the tailwater. ``scale`` [-] multiplies
        the size that sizing changes (both sizes of an opening, a bore, the width of a weir); it broadcasts too.
        """

    def edges(
        self, scale: float = 1.0, coefficients: Array | None = None, conditions: Conditions = FREE
    ) -> tuple[float, ...]:
        """Return the levels [m] at which the flow is not smooth, rising, and those where its law has a root.

        ``coefficients`` has shape (parameters,), the typical ones where None; the conditions are single numbers.
        """

    def onset(self, flow: Array, coefficients: Array, scale: Array | float = 1.0) -> Array:
        """Return how far above its lower edge [m] the outlet itself passes a small ``flow`` [m³/s], roughly."""

    def discharge_coefficients(self, level: float, conditions: Conditions = FREE) -> tuple[float, float, float]:
        """Return lowest, typical and highest discharge coefficient [-] on ``area`` and ``head``, for the record."""

    def doubtful(self, coefficients: Array, conditions: Conditions = FREE) -> tuple[DoubtfulSpan, ...]:
        """Return the spans of level [m] over which the law is not to be believed; ``coefficients`` (parameters,)."""
