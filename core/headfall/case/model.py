"""The case: what a person fills in, as one immutable value. ``metadata`` says what its attributes say of themselves."""

from __future__ import annotations

from dataclasses import dataclass, field
from typing import ClassVar

from headfall.case.metadata import Path, choice, number, quantities, quantity, rows, text
from headfall.case.outlets import (
    ENTRIES,
    ROLES,
    WEIRS,
    CoefficientRange,
    Fitting,
    LossRange,
    Opening,
    Orifice,
    Outlet,
    Pipe,
    PipeSection,
    ReceivingVessel,
    RectangularOpening,
    RoundOpening,
    Tailwater,
    Valve,
    Weir,
)
from headfall.case.vessels import (
    Basin,
    Box,
    BoxFloor,
    Cone,
    ConeEnd,
    Displacement,
    Drum,
    EllipsoidalEnd,
    End,
    FlatEnd,
    Floor,
    HemisphericalEnd,
    SlopedFloor,
    Sphere,
    Stack,
    StackPart,
    TableVessel,
    TorisphericalEnd,
    UprightCylinder,
    Vessel,
)
from headfall.quantities import Quantity

__all__ = [
    "ENTRIES",
    "ROLES",
    "WEIRS",
    "Basin",
    "Box",
    "BoxFloor",
    "Case",
    "ClosedHeadspace",
    "CoefficientRange",
    "Cone",
    "ConeEnd",
    "Displacement",
    "Drum",
    "EllipsoidalEnd",
    "End",
    "Fitting",
    "FlatEnd",
    "Floor",
    "FlowAt",
    "Headspace",
    "HemisphericalEnd",
    "Levels",
    "Liquid",
    "LossRange",
    "OpenHeadspace",
    "Opening",
    "Orifice",
    "Outlet",
    "Path",
    "Pipe",
    "PipeSection",
    "PressurisedHeadspace",
    "ReceivingVessel",
    "RectangularOpening",
    "RoundOpening",
    "SlopedFloor",
    "Sphere",
    "Stack",
    "StackPart",
    "SteadyInflow",
    "Structure",
    "Surroundings",
    "TableVessel",
    "Tables",
    "Tailwater",
    "Target",
    "TorisphericalEnd",
    "UprightCylinder",
    "Valve",
    "VentedHeadspace",
    "Vessel",
    "Weir",
]


@dataclass(frozen=True, slots=True)
class Liquid:
    """The liquid: a built-in one by its name, or one of one's own.

    ``density`` and ``viscosity`` (dynamic or kinematic) describe one state; ``properties`` are rows of temperature,
    density, viscosity and, if known, vapour pressure. ``also_at`` names temperatures at which the time is worked out
    beside.
    """

    name: str | None = text("water")
    temperature: Quantity | None = quantity("temperature", sign="any", default="20 degC")
    density: Quantity | None = quantity("density")
    viscosity: Quantity | None = quantity("dynamic_viscosity|kinematic_viscosity")
    vapour_pressure: Quantity | None = quantity("pressure", sign="not_negative")
    properties: tuple[tuple[Quantity, ...], ...] | None = rows(
        "temperature", "density", "dynamic_viscosity|kinematic_viscosity", "pressure", least=3
    )
    also_at: tuple[Quantity, ...] | None = quantities("temperature")


@dataclass(frozen=True, slots=True)
class SteadyInflow:
    """An inflow that does not change."""

    kind: ClassVar[str] = "steady"
    rate: Quantity | None = quantity("flow", sign="not_negative", default="0 L/s")


@dataclass(frozen=True, slots=True)
class OpenHeadspace:
    """A headspace open to the air. Leaving the headspace out counts as not declared."""

    kind: ClassVar[str] = "open"


@dataclass(frozen=True, slots=True)
class PressurisedHeadspace:
    """A headspace kept at a gauge pressure; negative below atmospheric."""

    kind: ClassVar[str] = "pressurised"
    gauge_pressure: Quantity = quantity("pressure", sign="any", required=True)


@dataclass(frozen=True, slots=True)
class ClosedHeadspace:
    """A headspace without a way in for air; it is at atmospheric pressure at the start."""

    kind: ClassVar[str] = "closed"


@dataclass(frozen=True, slots=True)
class VentedHeadspace:
    """A headspace with one opening to the air."""

    kind: ClassVar[str] = "vented"
    bore: Quantity = quantity("bore", required=True)
    coefficient: float | None = number(default=0.6, above=0, high=1)


Headspace = OpenHeadspace | PressurisedHeadspace | ClosedHeadspace | VentedHeadspace


@dataclass(frozen=True, slots=True)
class Levels:
    """Levels above the lowest inside point of the vessel. ``overflow`` defaults to the vessel's top.

    A level may be typed as a height, as a percentage of the capacity, as a volume, or with the word ``site`` behind it
    as a height on the site's datum, on which the lowest inside point stands at ``site_datum``. ``shown`` is how levels
    are told beside their heights.
    """

    start: Quantity = quantity("level", sign="not_negative", required=True)
    stop: Quantity = quantity("level", sign="not_negative", required=True)
    overflow: Quantity | None = quantity("level", sign="positive")
    high: Quantity | None = quantity("level", sign="positive")
    site_datum: Quantity | None = quantity("length", sign="any")
    shown: str | None = choice("height", "percent", "volume", "site", default="height")


@dataclass(frozen=True, slots=True)
class FlowAt:
    """A flow that must not be passed at a level."""

    level: Quantity = quantity("level", sign="positive", required=True)
    flow: Quantity = quantity("flow", required=True)


@dataclass(frozen=True, slots=True)
class Target:
    """What is asked for."""

    drain_time: Quantity | None = quantity("time")
    highest_level: Quantity | None = quantity("level")
    flow_at: FlowAt | None = None


@dataclass(frozen=True, slots=True)
class Tables:
    """Tables asked for: the run at chosen times, and level, surface, volume and outflow at steps of level."""

    times: tuple[Quantity, ...] | None = quantities("time")
    level_step: Quantity | None = quantity("length")


@dataclass(frozen=True, slots=True)
class Structure:
    """What the shell and base screens need."""

    shell_thickness: Quantity | None = quantity("length")
    allowable_stress: Quantity | None = quantity("pressure")
    joint_efficiency: float | None = number(default=1, above=0, high=1)
    empty_mass: Quantity | None = quantity("mass", sign="not_negative")


@dataclass(frozen=True, slots=True)
class Surroundings:
    """Gravity and ambient pressure."""

    gravity: Quantity | None = quantity("acceleration", default="9.80665 m/s^2")
    pressure: Quantity | None = quantity("pressure", default="101.325 kPa")


@dataclass(frozen=True, slots=True)
class Case:
    """One case. ``headspace`` left out counts as not declared."""

    vessel: Vessel
    outlets: tuple[Outlet, ...]
    levels: Levels
    title: str | None = text()
    tag: str | None = text()
    revision: str | None = text()
    status: str | None = text("draft")
    date: str | None = text()
    author: str | None = text()
    checker: str | None = text()
    approver: str | None = text()
    site: str | None = text()
    remarks: str | None = text()
    units: str | None = choice("metric", "us", default="metric")
    liquid: Liquid | None = None
    inflow: SteadyInflow | None = None
    headspace: Headspace | None = None
    target: Target | None = None
    tables: Tables | None = None
    structure: Structure | None = None
    surroundings: Surroundings | None = None
    field_tests: tuple[()] | None = field(default=None, metadata={"tests": True})
