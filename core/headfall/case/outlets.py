"""The outlets of a case, as typed."""

from __future__ import annotations

from dataclasses import dataclass, field
from typing import ClassVar

from headfall.case.metadata import choice, list_of, number, quantity, text, whole
from headfall.case.vessels import Vessel
from headfall.quantities import Quantity


@dataclass(frozen=True, slots=True)
class RoundOpening:
    """A round opening."""

    form: ClassVar[str] = "round"
    diameter: Quantity = quantity("length", required=True)


@dataclass(frozen=True, slots=True)
class RectangularOpening:
    """A rectangular opening; on a downward opening ``height`` is simply the other side."""

    form: ClassVar[str] = "rectangle"
    width: Quantity = quantity("length", required=True)
    height: Quantity = quantity("length", required=True)


Opening = RoundOpening | RectangularOpening


@dataclass(frozen=True, slots=True)
class CoefficientRange:
    """A discharge coefficient of one's own: lowest, typical and highest."""

    low: float | None = number(required=True, above=0, high=1.5)
    typical: float | None = number(required=True, above=0, high=1.5)
    high: float | None = number(required=True, above=0, high=1.5)


ROLES = ("drain", "overflow")
WEIRS = ("rectangular", "vnotch", "broad_crested", "standpipe")
ENTRIES = (
    "sharp_edged",
    "square_edged",
    "thick_plate",
    "rounded",
    "bellmouth",
    "short_tube",
    "reentrant_free",
    "reentrant_full",
)


@dataclass(frozen=True, slots=True)
class ReceivingVessel:
    """A vessel that an outlet discharges into and that fills; all heights are above the draining vessel's datum.

    ``elevation`` is its lowest point, ``level`` the level that it starts at.
    """

    vessel: Vessel = field(default=None, metadata={"required": True})  # type: ignore[assignment]
    elevation: Quantity = quantity("length", sign="any", required=True)
    level: Quantity = quantity("length", sign="any", required=True)


Tailwater = Quantity | ReceivingVessel


@dataclass(frozen=True, slots=True)
class Orifice:
    """One or more alike openings in the wall (``side``) or in a horizontal plate (``down``).

    ``elevation`` is the centre of a side opening and the plane of a downward one. ``thickness`` belongs to the
    entries ``thick_plate`` and ``short_tube``, ``edge_radius`` to ``rounded``; no other entry takes them.
    ``station`` is the distance from the low tangent line of a drum. ``blocked`` is the part of the area that is.
    """

    kind: ClassVar[str] = "orifice"
    name: str | None = text("drain")
    entry: str | None = choice(*ENTRIES, default="sharp_edged")
    thickness: Quantity | None = quantity("length")
    edge_radius: Quantity | None = quantity("length")
    facing: str | None = choice("down", "side", default="down")
    opening: Opening = field(default=None, metadata={"opening": True, "required": True})  # type: ignore[assignment]
    elevation: Quantity | None = quantity("length", sign="not_negative", default="0 m")
    station: Quantity | None = quantity("length", sign="not_negative")
    coefficient: str | CoefficientRange | None = field(
        default=None, metadata={"coefficient": True, "default": "handbook"}
    )
    count: int | None = whole(low=1, high=10000, default=1)
    role: str | None = choice(*ROLES, default="drain")
    blocked: float | None = number(default=0, low=0, high=1)
    tailwater: Tailwater | None = quantity("length", sign="any", or_part=True)


@dataclass(frozen=True, slots=True)
class LossRange:
    """A loss coefficient of one's own: lowest, typical and highest."""

    low: float | None = number(required=True, low=0)
    typical: float | None = number(required=True, low=0)
    high: float | None = number(required=True, low=0)


@dataclass(frozen=True, slots=True)
class Fitting:
    """A fitting of a pipe.

    Without a ``loss`` of its own the handbook's range for its name counts. ``laminar_loss`` is K1 in K1/Re.
    """

    name: str | None = field(default=None, metadata={"text": True, "default": "", "required": True})
    loss: float | LossRange | None = number(low=0, or_part=True)
    laminar_loss: float | None = number(low=0)
    count: int | None = whole(low=1, high=1000, default=1)


@dataclass(frozen=True, slots=True)
class Valve:
    """A valve by its flow coefficient wide open, Kv or Cv, and how far it is open."""

    kv: float | None = number(above=0)
    cv: float | None = number(above=0)
    opening: float | None = number(default=1, low=0, high=1)
    characteristic: str | None = choice("linear", "equal_percentage", default="linear")


@dataclass(frozen=True, slots=True)
class PipeSection:
    """A further length of pipe, of another bore, behind the ones before it."""

    bore: Quantity = quantity("bore", required=True)
    length: Quantity = quantity("length", sign="not_negative", required=True)
    material: str | None = text()
    roughness: Quantity | None = quantity("length", sign="not_negative")
    friction_factor: float | None = number(above=0, high=1)
    fittings: tuple[Fitting, ...] | None = list_of("fitting")
    valve: Valve | None = None


@dataclass(frozen=True, slots=True)
class Pipe:
    """A pipe run that flows full: entry, pipe, fittings, valve, further sections in series, free or drowned end.

    ``elevation`` is the centre of the inlet, ``discharge_elevation`` the centre of the discharging end. ``entry_loss``
    takes the place of the entry's handbook loss. Roughness comes from ``roughness``, else from ``material``.
    """

    kind: ClassVar[str] = "pipe"
    name: str | None = text("drain")
    entry: str | None = choice(*ENTRIES, default="sharp_edged")
    edge_radius: Quantity | None = quantity("length")
    entry_loss: float | LossRange | None = number(low=0, or_part=True)
    bore: Quantity = quantity("bore", required=True)
    length: Quantity | None = quantity("length", sign="not_negative", default="0 m")
    material: str | None = text("commercial steel")
    roughness: Quantity | None = quantity("length", sign="not_negative")
    friction_factor: float | None = number(above=0, high=1)
    fittings: tuple[Fitting, ...] | None = list_of("fitting")
    valve: Valve | None = None
    sections: tuple[PipeSection, ...] | None = list_of("section")
    elevation: Quantity | None = quantity("length", sign="not_negative", default="0 m")
    discharge_elevation: Quantity | None = quantity("length", sign="any")
    station: Quantity | None = quantity("length", sign="not_negative")
    count: int | None = whole(low=1, high=10000, default=1)
    role: str | None = choice(*ROLES, default="drain")
    blocked: float | None = number(default=0, low=0, high=1)
    tailwater: Tailwater | None = quantity("length", sign="any", or_part=True)


@dataclass(frozen=True, slots=True)
class Weir:
    """A crest that the liquid runs over: a rectangular or V-notch, a broad crest, or the rim of a standpipe.

    ``width`` belongs to ``rectangular`` and ``broad_crested``, ``channel_width`` to ``rectangular``, ``angle`` to
    ``vnotch``; ``diameter``, ``discharge_elevation`` and ``roughness`` belong to ``standpipe``.
    """

    kind: ClassVar[str] = "weir"
    name: str | None = text("weir")
    form: str | None = choice(*WEIRS)
    width: Quantity | None = quantity("length")
    channel_width: Quantity | None = quantity("length")
    angle: Quantity | None = quantity("angle")
    diameter: Quantity | None = quantity("bore")
    crest: Quantity = quantity("length", sign="not_negative", required=True)
    discharge_elevation: Quantity | None = quantity("length", sign="any")
    roughness: Quantity | None = quantity("length", sign="not_negative")
    coefficient: str | CoefficientRange | None = field(
        default=None, metadata={"coefficient": True, "default": "handbook"}
    )
    count: int | None = whole(low=1, high=10000, default=1)
    role: str | None = choice(*ROLES, default="drain")
    blocked: float | None = number(default=0, low=0, high=1)
    tailwater: Tailwater | None = quantity("length", sign="any", or_part=True)


Outlet = Orifice | Pipe | Weir
