"""All answers to one case, as plain values in SI."""

from __future__ import annotations

from dataclasses import dataclass
from typing import Any

import numpy as np
import numpy.typing as npt

from headfall.case.model import Case
from headfall.checks.finding import Finding
from headfall.system import System

Array = npt.NDArray[np.float64]


@dataclass(frozen=True, slots=True)
class Figure:
    """A figure with its range over the coefficients: ``low`` ≤ ``typical`` ≤ ``high``; None where there is none."""

    typical: float | None
    low: float | None
    high: float | None


@dataclass(frozen=True, slots=True)
class VesselFigures:
    """Sizes of the vessel [m, m³]."""

    height: float
    capacity: float
    start_volume: float
    stop_volume: float
    overflow_volume: float


@dataclass(frozen=True, slots=True)
class DrawDown:
    """The run from start to stop. ``reason`` is empty where the stop is reached."""

    reaches_stop: bool
    reason: str
    time: Figure
    """Time to the stop level [s]."""
    time_to_overflow: Figure
    """Time to the overflow level [s], where it comes before everything else; else None."""
    released: float | None
    """What left by the outlets until the stop [m³], typical coefficient."""
    outflow_at_start: Figure
    """[m³/s]."""


@dataclass(frozen=True, slots=True)
class Equilibrium:
    """Where the level comes to rest with the inflow running."""

    level: Figure
    """[m]; ``low`` belongs to the high coefficients."""
    volume: float | None
    overflows: bool
    reason: str
    needed_level: float | None
    """The level [m] at which the outlets would pass the inflow, also where it lies above the vessel's top."""
    largest_inflow: Figure
    """The inflow whose equilibrium stands at overflow with the drains alone [m³/s]."""
    time_to_98_percent: float | None
    surges_at: float | None = None
    """The inlet level [m] about which the level surges, where a line that flows full takes more than comes in."""
    surging_flow: float | None = None
    """What all outlets pass with that inlet just covered [m³/s]."""


@dataclass(frozen=True, slots=True)
class Peak:
    """The highest level of the run."""

    level: float
    time: float
    overflowed: float | None
    time_above_overflow: float | None


@dataclass(frozen=True, slots=True)
class Neighbour:
    """A listed size and what it achieves: a time [s], a level [m] or a flow [m³/s], by the target; None for never.

    ``meets`` says whether it meets the target over the whole range.
    """

    standard: str
    diameter: float
    achieved: Figure
    meets: bool


@dataclass(frozen=True, slots=True)
class Sizing:
    """The size of the first drain that meets the target. ``reason`` is filled where there is none."""

    target: str
    """``drain_time``, ``highest_level`` or ``flow_at``."""
    outlet: str
    diameter: Figure
    """[m]; ``low`` is the size for the high coefficient. None for a rectangle."""
    scale: float | None
    """Factor on the opening's present sizes, typical coefficient."""
    standard: str
    """The smallest listed size that meets the target over the whole range (the largest for ``flow_at``), or empty."""
    standard_diameter: float | None
    neighbours: tuple[Neighbour, ...]
    reason: str


@dataclass(frozen=True, slots=True)
class CoefficientUsed:
    """The discharge coefficient of one outlet; ``source`` is a key of the list of sources."""

    outlet: str
    low: float
    typical: float
    high: float
    source: str


@dataclass(frozen=True, slots=True)
class Curve:
    """A run as arrays of one length, times strictly rising: s, m, m³, m³/s. ``ends`` says at what it ends:
    ``stop``, ``overflow``, ``settled``, ``surging`` or ``at rest`` (the level never moves)."""

    time: Array
    level: Array
    volume: Array
    outflow: Array
    ends: str


@dataclass(frozen=True, slots=True)
class DoubtfulPart:
    """Levels from ``low`` to ``high`` [m] of the run over which an outlet's law is not to be believed.

    ``why`` is ``dip``, or as for ``headfall.outlet.outlet.DoubtfulSpan``.
    """

    outlet: str
    low: float
    high: float
    why: str


@dataclass(frozen=True, slots=True)
class HeadspaceRun:
    """The gauge pressure of a headspace that is not open [Pa] along the typical curve, and its lowest point."""

    pressure: Array
    lowest: float
    lowest_level: float
    largest_air_flow: float
    """The largest flow of air drawn in [m³/s]; nil where none can."""
    lowest_if_fast: float
    """The lowest pressure [Pa] where a closed gas exchanges no heat; the same as ``lowest`` else."""


@dataclass(frozen=True, slots=True)
class AtTime:
    """The typical run at a chosen time [s]; level [m], volume [m³] and outflow [m³/s] are None after its end."""

    time: float
    level: float | None
    volume: float | None
    outflow: float | None


@dataclass(frozen=True, slots=True)
class Stage:
    """Surface [m²], volume [m³] and outflow [m³/s] of a level [m] that stands still."""

    level: float
    area: float
    volume: float
    outflow: Figure


@dataclass(frozen=True, slots=True)
class AtTemperature:
    """The run at another temperature [K]: density [kg/m³], viscosity [Pa·s] and time [s].

    ``reynolds_first`` and ``reynolds_last`` [-] are the first outlet's at the start and at the end of the run.
    """

    temperature: float
    density: float
    viscosity: float
    time: Figure
    reynolds_first: float
    reynolds_last: float


@dataclass(frozen=True, slots=True)
class Answers:
    """Everything that is said about one case.

    ``curve`` is the typical run; ``curve_low`` and ``curve_high`` those of the low and high coefficients (the
    edges of the band). ``findings`` are sorted worst first, made and not made.
    """

    case: Case
    system: System
    vessel: VesselFigures
    draw_down: DrawDown
    equilibrium: Equilibrium
    peak: Peak
    sizing: tuple[Sizing, ...]
    coefficients: tuple[CoefficientUsed, ...]
    findings: tuple[Finding, ...]
    curve: Curve
    curve_low: Curve
    curve_high: Curve
    doubtful: tuple[DoubtfulPart, ...] = ()
    headspace: HeadspaceRun | None = None
    receiver_level: float | None = None
    """The level [m above the vessel's datum] of a receiving vessel at the end of the typical run."""
    at_times: tuple[AtTime, ...] = ()
    stages: tuple[Stage, ...] = ()
    at_temperatures: tuple[AtTemperature, ...] = ()

    def as_dict(self) -> dict[str, Any]:
        """Return what ``figures --json`` prints: SI floats, the unit in the key, None where there is no answer."""
        from headfall.figures import as_dict

        return as_dict(self)
