"""The vessels of a case, as typed."""

from __future__ import annotations

from dataclasses import dataclass, field
from typing import ClassVar

from headfall.case.metadata import choice, list_of, number, quantity, rows
from headfall.quantities import Quantity


@dataclass(frozen=True, slots=True)
class FlatEnd:
    """A flat floor or head."""

    form: ClassVar[str] = "flat"


@dataclass(frozen=True, slots=True)
class ConeEnd:
    """A conical floor or head of the given depth; a floor may be ``cut`` at a diameter, the bore of its outlet."""

    form: ClassVar[str] = "cone"
    depth: Quantity = quantity("length", required=True)
    cut: Quantity | None = quantity("length", sign="not_negative", default="0 mm")


@dataclass(frozen=True, slots=True)
class EllipsoidalEnd:
    """Half an ellipsoid; ``ratio`` is inside diameter over twice the depth (2 for a 2:1 head)."""

    form: ClassVar[str] = "ellipsoidal"
    ratio: float | None = number(default=2, above=0)


@dataclass(frozen=True, slots=True)
class TorisphericalEnd:
    """A crown and a knuckle; both radii as fractions of the inside diameter."""

    form: ClassVar[str] = "torispherical"
    crown_ratio: float | None = number(default=1, low=0.5)
    knuckle_ratio: float | None = number(default=0.06, above=0, high=0.5)


@dataclass(frozen=True, slots=True)
class HemisphericalEnd:
    """Half a sphere."""

    form: ClassVar[str] = "hemispherical"


@dataclass(frozen=True, slots=True)
class SlopedFloor:
    """A flat floor that slopes from one side of the vessel to the other, its low side lower by ``fall``."""

    form: ClassVar[str] = "sloped"
    fall: Quantity = quantity("length", sign="not_negative", required=True)


End = FlatEnd | ConeEnd | EllipsoidalEnd | TorisphericalEnd | HemisphericalEnd
Floor = FlatEnd | ConeEnd | EllipsoidalEnd | TorisphericalEnd | HemisphericalEnd | SlopedFloor
BoxFloor = FlatEnd | SlopedFloor


@dataclass(frozen=True, slots=True)
class Displacement:
    """Space taken by coils, baffles, packing or sludge: ``volume`` between two levels, even over the height."""

    from_: Quantity = quantity("length", sign="not_negative", required=True)
    to: Quantity = quantity("length", required=True)
    volume: Quantity = quantity("volume", required=True)


_SIZES = ("inside", "outside")


@dataclass(frozen=True, slots=True)
class UprightCylinder:
    """An upright cylinder: straight side on a floor. Levels count from the lowest inside point of the floor."""

    shape: ClassVar[str] = "upright_cylinder"
    diameter: Quantity = quantity("length", required=True)
    height: Quantity = quantity("length", required=True)
    floor: Floor | None = field(default=None, metadata={"end": True, "default": "flat"})
    sizes: str | None = choice(*_SIZES, default="inside")
    wall: Quantity | None = quantity("length", sign="not_negative", default="0 mm")
    lining: Quantity | None = quantity("length", sign="not_negative", default="0 mm")
    displacement: tuple[Displacement, ...] | None = list_of("displacement")


@dataclass(frozen=True, slots=True)
class Box:
    """An upright box, open at the top."""

    shape: ClassVar[str] = "box"
    length: Quantity = quantity("length", required=True)
    width: Quantity = quantity("length", required=True)
    height: Quantity = quantity("length", required=True)
    floor: BoxFloor | None = field(default=None, metadata={"end": True, "default": "flat"})
    sizes: str | None = choice(*_SIZES, default="inside")
    wall: Quantity | None = quantity("length", sign="not_negative", default="0 mm")
    lining: Quantity | None = quantity("length", sign="not_negative", default="0 mm")
    displacement: tuple[Displacement, ...] | None = list_of("displacement")


@dataclass(frozen=True, slots=True)
class Cone:
    """A cone or frustum, either way up; either diameter may be nil, not both."""

    shape: ClassVar[str] = "cone"
    top_diameter: Quantity = quantity("length", sign="not_negative", required=True)
    bottom_diameter: Quantity = quantity("length", sign="not_negative", required=True)
    height: Quantity = quantity("length", required=True)
    sizes: str | None = choice(*_SIZES, default="inside")
    wall: Quantity | None = quantity("length", sign="not_negative", default="0 mm")
    lining: Quantity | None = quantity("length", sign="not_negative", default="0 mm")
    displacement: tuple[Displacement, ...] | None = list_of("displacement")


@dataclass(frozen=True, slots=True)
class Drum:
    """A lying drum; ``length`` runs from tangent line to tangent line, ``fall`` is how much higher one end lies."""

    shape: ClassVar[str] = "drum"
    diameter: Quantity = quantity("length", required=True)
    length: Quantity = quantity("length", required=True)
    heads: End | tuple[End, End] | None = field(default=None, metadata={"end": True, "pair": True, "default": "flat"})
    fall: Quantity | None = quantity("length", sign="not_negative", default="0 m")
    sizes: str | None = choice(*_SIZES, default="inside")
    wall: Quantity | None = quantity("length", sign="not_negative", default="0 mm")
    lining: Quantity | None = quantity("length", sign="not_negative", default="0 mm")
    displacement: tuple[Displacement, ...] | None = list_of("displacement")


@dataclass(frozen=True, slots=True)
class Sphere:
    """A sphere."""

    shape: ClassVar[str] = "sphere"
    diameter: Quantity = quantity("length", required=True)
    sizes: str | None = choice(*_SIZES, default="inside")
    wall: Quantity | None = quantity("length", sign="not_negative", default="0 mm")
    lining: Quantity | None = quantity("length", sign="not_negative", default="0 mm")
    displacement: tuple[Displacement, ...] | None = list_of("displacement")


@dataclass(frozen=True, slots=True)
class Basin:
    """A basin with a rectangular base and sloped sides.

    ``side_slope`` is horizontal per vertical: one number for all four sides, or two, for the length and the width.
    """

    shape: ClassVar[str] = "basin"
    base_length: Quantity = quantity("length", sign="not_negative", required=True)
    base_width: Quantity = quantity("length", sign="not_negative", required=True)
    side_slope: float | tuple[float, float] = number(required=True, low=0, or_pair=True)
    depth: Quantity = quantity("length", required=True)
    displacement: tuple[Displacement, ...] | None = list_of("displacement")


@dataclass(frozen=True, slots=True)
class TableVessel:
    """A vessel known by a table: area or volume at levels, or the volume put in from one dip to the next."""

    shape: ClassVar[str] = "table"
    column: str | None = choice("area", "volume", "increment")
    between: str | None = choice("linear", "conic", default="linear")
    rows: tuple[tuple[Quantity, ...], ...] = rows("length", "area|volume", required=True)
    displacement: tuple[Displacement, ...] | None = list_of("displacement")


@dataclass(frozen=True, slots=True)
class Stack:
    """Vessels on top of one another, lowest first."""

    shape: ClassVar[str] = "stack"
    parts: tuple[StackPart, ...] = list_of("part of the stack", required=True)
    displacement: tuple[Displacement, ...] | None = list_of("displacement")


StackPart = UprightCylinder | Box | Cone | Sphere | Basin | TableVessel
Vessel = UprightCylinder | Box | Cone | Drum | Sphere | Basin | TableVessel | Stack
