"""The case: what a person fills in, as one immutable value.

Every attribute that the file may leave out is ``None`` when it was not typed; its default stands in the
attribute's metadata (and is applied in ``headfall.system``), so that a case is written back just as it was read.

Metadata of an attribute, read by ``reading`` and by the entry panels:

``dimension``  the attribute is a text quantity of this dimension
``sign``       ``positive``, ``not_negative`` or ``any``
``default``    what counts when nothing was typed, as it would be typed
``number``     the attribute is a plain number; with ``low`` and ``high`` (both allowed) or ``above`` (not allowed)
``integer``    the attribute is a whole number
``choices``    the attribute is one of these words
``text``       the attribute is free text
``end``        the attribute is the end of a vessel; with ``pair`` it may also be two of them
``opening``    the attribute is an opening
``coefficient`` the attribute is the word ``handbook`` or a range
``tests``      the attribute is a list of field tests (empty until they are built)
``required``   it must be present
"""

from __future__ import annotations

from dataclasses import dataclass, field
from typing import Any, ClassVar

from headfall.quantities import Quantity

Path = tuple[str | int, ...]
"""Where something stands in a case: ``("outlets", 0, "opening", "diameter")``."""


def _quantity(dimension: str, *, sign: str = "positive", default: str | None = None, required: bool = False) -> Any:
    metadata = {"dimension": dimension, "sign": sign, "default": default, "required": required}
    return field(default=None, metadata=metadata)


def _number(*, default: float | None = None, required: bool = False, **bounds: float) -> Any:
    return field(default=None, metadata={"number": True, "default": default, "required": required, **bounds})


def _choice(*choices: str, default: str | None = None) -> Any:
    return field(default=None, metadata={"choices": choices, "default": default, "required": default is None})


def _text(default: str = "") -> Any:
    return field(default=None, metadata={"text": True, "default": default, "required": False})


# Ends of vessels ------------------------------------------------------------------------------------------------------


@dataclass(frozen=True, slots=True)
class FlatEnd:
    """A flat floor or head."""

    form: ClassVar[str] = "flat"


@dataclass(frozen=True, slots=True)
class ConeEnd:
    """A conical floor or head of the given depth."""

    form: ClassVar[str] = "cone"
    depth: Quantity = _quantity("length", required=True)


@dataclass(frozen=True, slots=True)
class EllipsoidalEnd:
    """Half an ellipsoid; ``ratio`` is inside diameter over twice the depth (2 for a 2:1 head)."""

    form: ClassVar[str] = "ellipsoidal"
    ratio: float | None = _number(default=2, above=0)


@dataclass(frozen=True, slots=True)
class TorisphericalEnd:
    """A crown and a knuckle; both radii as fractions of the inside diameter."""

    form: ClassVar[str] = "torispherical"
    crown_ratio: float | None = _number(default=1, low=0.5)
    knuckle_ratio: float | None = _number(default=0.06, above=0, high=0.5)


@dataclass(frozen=True, slots=True)
class HemisphericalEnd:
    """Half a sphere."""

    form: ClassVar[str] = "hemispherical"


End = FlatEnd | ConeEnd | EllipsoidalEnd | TorisphericalEnd | HemisphericalEnd

# Vessels --------------------------------------------------------------------------------------------------------------


@dataclass(frozen=True, slots=True)
class UprightCylinder:
    """An upright cylinder: straight side on a floor. Levels count from the lowest inside point of the floor."""

    shape: ClassVar[str] = "upright_cylinder"
    diameter: Quantity = _quantity("length", required=True)
    height: Quantity = _quantity("length", required=True)
    floor: End | None = field(default=None, metadata={"end": True, "default": "flat"})


@dataclass(frozen=True, slots=True)
class Box:
    """An upright box, open at the top."""

    shape: ClassVar[str] = "box"
    length: Quantity = _quantity("length", required=True)
    width: Quantity = _quantity("length", required=True)
    height: Quantity = _quantity("length", required=True)


@dataclass(frozen=True, slots=True)
class Cone:
    """A cone or frustum, either way up; either diameter may be nil, not both."""

    shape: ClassVar[str] = "cone"
    top_diameter: Quantity = _quantity("length", sign="not_negative", required=True)
    bottom_diameter: Quantity = _quantity("length", sign="not_negative", required=True)
    height: Quantity = _quantity("length", required=True)


@dataclass(frozen=True, slots=True)
class Drum:
    """A level lying drum; ``length`` runs from tangent line to tangent line."""

    shape: ClassVar[str] = "drum"
    diameter: Quantity = _quantity("length", required=True)
    length: Quantity = _quantity("length", required=True)
    heads: End | tuple[End, End] | None = field(default=None, metadata={"end": True, "pair": True, "default": "flat"})
    fall: Quantity | None = _quantity("length", sign="not_negative", default="0 m")


@dataclass(frozen=True, slots=True)
class Sphere:
    """A sphere."""

    shape: ClassVar[str] = "sphere"
    diameter: Quantity = _quantity("length", required=True)


Vessel = UprightCylinder | Box | Cone | Drum | Sphere

# Outlets --------------------------------------------------------------------------------------------------------------


@dataclass(frozen=True, slots=True)
class RoundOpening:
    """A round opening."""

    form: ClassVar[str] = "round"
    diameter: Quantity = _quantity("length", required=True)


@dataclass(frozen=True, slots=True)
class RectangularOpening:
    """A rectangular opening; on a downward opening ``height`` is simply the other side."""

    form: ClassVar[str] = "rectangle"
    width: Quantity = _quantity("length", required=True)
    height: Quantity = _quantity("length", required=True)


Opening = RoundOpening | RectangularOpening


@dataclass(frozen=True, slots=True)
class CoefficientRange:
    """A discharge coefficient of one's own: lowest, typical and highest."""

    low: float | None = _number(required=True, above=0, high=1.5)
    typical: float | None = _number(required=True, above=0, high=1.5)
    high: float | None = _number(required=True, above=0, high=1.5)


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
class Orifice:
    """One or more alike openings in the wall (``side``) or in a horizontal plate (``down``).

    ``elevation`` is the centre of a side opening and the plane of a downward one. ``thickness`` belongs to the
    entries ``thick_plate`` and ``short_tube``, ``edge_radius`` to ``rounded``; no other entry takes them.
    ``station`` is the distance from the low tangent line of a drum. ``blocked`` must be nil so far.
    """

    kind: ClassVar[str] = "orifice"
    name: str | None = _text("drain")
    entry: str | None = _choice(*ENTRIES, default="sharp_edged")
    thickness: Quantity | None = _quantity("length")
    edge_radius: Quantity | None = _quantity("length")
    facing: str | None = _choice("down", "side", default="down")
    opening: Opening = field(default=None, metadata={"opening": True, "required": True})  # type: ignore[assignment]
    elevation: Quantity | None = _quantity("length", sign="not_negative", default="0 m")
    station: Quantity | None = _quantity("length", sign="not_negative")
    coefficient: str | CoefficientRange | None = field(
        default=None, metadata={"coefficient": True, "default": "handbook"}
    )
    count: int | None = field(default=None, metadata={"integer": True, "low": 1, "high": 10000, "default": 1})
    role: str | None = _choice("drain", default="drain")
    blocked: float | None = _number(default=0, low=0, high=1)


Outlet = Orifice

# The rest -------------------------------------------------------------------------------------------------------------


@dataclass(frozen=True, slots=True)
class Liquid:
    """The liquid; only water is built so far."""

    name: str | None = _text("water")
    temperature: Quantity | None = _quantity("temperature", sign="any", default="20 degC")


@dataclass(frozen=True, slots=True)
class SteadyInflow:
    """An inflow that does not change."""

    kind: ClassVar[str] = "steady"
    rate: Quantity | None = _quantity("flow", sign="not_negative", default="0 L/s")


@dataclass(frozen=True, slots=True)
class OpenHeadspace:
    """A headspace open to the air. Leaving the headspace out counts as not declared."""

    kind: ClassVar[str] = "open"


@dataclass(frozen=True, slots=True)
class Levels:
    """Levels above the lowest inside point of the vessel. ``overflow`` defaults to the vessel's top."""

    start: Quantity = _quantity("length", sign="not_negative", required=True)
    stop: Quantity = _quantity("length", sign="not_negative", required=True)
    overflow: Quantity | None = _quantity("length", sign="positive")
    high: Quantity | None = _quantity("length", sign="positive")


@dataclass(frozen=True, slots=True)
class Target:
    """What is asked for."""

    drain_time: Quantity | None = _quantity("time")


@dataclass(frozen=True, slots=True)
class Structure:
    """What the shell and base screens need."""

    shell_thickness: Quantity | None = _quantity("length")
    allowable_stress: Quantity | None = _quantity("pressure")
    joint_efficiency: float | None = _number(default=1, above=0, high=1)
    empty_mass: Quantity | None = _quantity("mass", sign="not_negative")


@dataclass(frozen=True, slots=True)
class Surroundings:
    """Gravity and ambient pressure."""

    gravity: Quantity | None = _quantity("acceleration", default="9.80665 m/s^2")
    pressure: Quantity | None = _quantity("pressure", default="101.325 kPa")


@dataclass(frozen=True, slots=True)
class Case:
    """One case. ``headspace`` left out counts as not declared."""

    vessel: Vessel
    outlets: tuple[Outlet, ...]
    levels: Levels
    title: str | None = _text()
    tag: str | None = _text()
    revision: str | None = _text()
    status: str | None = _text("draft")
    date: str | None = _text()
    author: str | None = _text()
    checker: str | None = _text()
    approver: str | None = _text()
    site: str | None = _text()
    remarks: str | None = _text()
    units: str | None = _choice("metric", "us", default="metric")
    liquid: Liquid | None = None
    inflow: SteadyInflow | None = None
    headspace: OpenHeadspace | None = None
    target: Target | None = None
    structure: Structure | None = None
    surroundings: Surroundings | None = None
    field_tests: tuple[()] | None = field(default=None, metadata={"tests": True})
