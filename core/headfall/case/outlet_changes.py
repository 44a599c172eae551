"""Another kind of outlet, another form of weir, another tailwater, keeping what still applies."""

from __future__ import annotations

from dataclasses import replace
from typing import Any

from headfall.case.attributes import attributes_of
from headfall.case.between_weirs import NEEDED, SIZES, TAKEN
from headfall.case.model import (
    Case,
    CoefficientRange,
    Orifice,
    Outlet,
    Pipe,
    ReceivingVessel,
    RectangularOpening,
    RoundOpening,
    UprightCylinder,
    Weir,
)
from headfall.case.places import replace_at, value_at
from headfall.case.stand_ins import sizes_of
from headfall.case.typed_quantity import read_quantity
from headfall.quantities import Quantity, QuantityFault, written

_KINDS: dict[str, type] = {"orifice": Orifice, "pipe": Pipe, "weir": Weir}
_TAILWATERS = ("none", "level", "vessel")
# A pipe has no plate: these entries mean nothing to it.
_OF_PLATES = ("thick_plate", "short_tube")
_RIGHT_ANGLE = "90 deg"
# The width [m] of a crest where the notch before had none.
_CREST_WIDTH = 0.3
_DIGITS = 5


def change_outlet_kind(case: Case, index: int, kind: str) -> Case:
    """Return the case with an outlet of another kind: ``orifice``, ``pipe`` or ``weir``.

    Name, count, role, blocked part, tailwater and, where both have them, entry and station stay as typed; elevation
    becomes crest and crest elevation; diameter or width becomes bore or width and back. A new weir is rectangular.
    Raises LookupError for another word and for an outlet that is not there.
    """
    if kind not in _KINDS:
        raise LookupError(f"{kind} is not one of {', '.join(_KINDS)}")
    former: Outlet = value_at(case, ("outlets", index))
    if former.kind == kind:
        return case
    known = attributes_of(_KINDS[kind])
    values: dict[str, Any] = {
        name: getattr(former, name)
        for name in ("name", "entry", "edge_radius", "station", "count", "role", "blocked", "tailwater", "roughness")
        if name in known and hasattr(former, name)
    }
    size, height = size_of(former), _height(former)
    if kind == "weir":
        opening = getattr(former, "opening", None)
        width = opening.width if isinstance(opening, RectangularOpening) else _as_length(size)
        values |= {"form": "rectangular", "width": width, "crest": height or read_quantity("0 m", "length")}
        values.pop("roughness", None)
        return _with_outlet(case, index, Weir(**values))
    values["elevation"] = height
    if kind == "orifice":
        values["opening"] = RoundOpening(_as_length(size))
        return _with_outlet(case, index, Orifice(**values))
    values["discharge_elevation"] = getattr(former, "discharge_elevation", None)
    if values.get("entry") in _OF_PLATES:
        values["entry"] = None
    return _with_outlet(case, index, Pipe(bore=as_bore(size), **values))


def change_weir_form(case: Case, index: int, form: str) -> Case:
    """Return the case with another form of one weir.

    Sizes that the new form takes stay as typed, a width becomes a diameter and back; a coefficient of one's own is
    dropped, since it belongs to the form. Raises LookupError for another word and where no weir stands.
    """
    former = value_at(case, ("outlets", index))
    if not isinstance(former, Weir):
        raise LookupError(f"outlet {index + 1} is no weir")
    if form not in NEEDED:
        raise LookupError(f"{form} is not one of {', '.join(NEEDED)}")
    if former.form == form:
        return case
    sizes: dict[str, Any] = {name: getattr(former, name) if name in TAKEN[form] else None for name in SIZES}
    for name in NEEDED[form]:
        if sizes[name] is None:
            sizes[name] = {"angle": _angle, "width": _width, "diameter": _diameter}[name](former)
    coefficient = None if isinstance(former.coefficient, CoefficientRange) else former.coefficient
    return _with_outlet(case, index, replace(former, form=form, coefficient=coefficient, **sizes))


def change_tailwater(case: Case, index: int, kind: str) -> Case:
    """Return the case with another tailwater of one outlet: ``none``, a ``level``, or a ``vessel`` that fills.

    A new level stands at the outlet; a new vessel is an upright cylinder about as large as the draining vessel, empty,
    its top at the draining vessel's lowest point, or its lowest point at the level typed before. Raises LookupError
    for another word and for an outlet that is not there.
    """
    outlet: Outlet = value_at(case, ("outlets", index))
    former = outlet.tailwater
    if kind not in _TAILWATERS:
        raise LookupError(f"{kind} is not one of {', '.join(_TAILWATERS)}")
    present = "vessel" if isinstance(former, ReceivingVessel) else "none" if former is None else "level"
    if kind == present:
        return case
    path = ("outlets", index, "tailwater")
    if kind == "none":
        return replace_at(case, path, None)
    if isinstance(former, ReceivingVessel):
        return replace_at(case, path, former.level)
    if kind == "level":
        lower = getattr(outlet, "discharge_elevation", None)
        return replace_at(case, path, lower or _height(outlet) or read_quantity("0 m", "length"))
    vessel = UprightCylinder(**sizes_of(case.vessel, UprightCylinder))
    lowest = former or written(-vessel.height.value, vessel.height.unit, "length")
    return replace_at(case, path, ReceivingVessel(vessel, lowest, lowest))


def size_of(outlet: Outlet) -> Quantity:
    """Return the one size of an outlet that another kind can take over, as typed: diameter, bore or width."""
    if isinstance(outlet, Orifice):
        opening = outlet.opening
        if isinstance(opening, RoundOpening):
            return opening.diameter
        return min(opening.width, opening.height, key=lambda side: side.value)
    if isinstance(outlet, Pipe):
        return outlet.bore
    return outlet.diameter if outlet.form == "standpipe" and outlet.diameter else _width(outlet)


def as_bore(size: Quantity) -> Quantity:
    """Return a diameter or width as a bore, as typed."""
    return read_quantity(size.text, "bore")


def _as_length(size: Quantity) -> Quantity:
    """Return a bore as a length, as typed, or in mm where a listed size was typed."""
    try:
        return read_quantity(size.text, "length")
    except QuantityFault:
        return written(size.value, "mm", "length", _DIGITS)


def _angle(_weir: Weir) -> Quantity:
    return read_quantity(_RIGHT_ANGLE, "angle")


def _width(weir: Weir) -> Quantity:
    if weir.width is not None:
        return weir.width
    if weir.diameter is not None:
        return _as_length(weir.diameter)
    return written(_CREST_WIDTH, weir.crest.unit, "length")


def _diameter(weir: Weir) -> Quantity:
    return as_bore(_width(weir))


def _height(outlet: Outlet) -> Quantity | None:
    return outlet.crest if isinstance(outlet, Weir) else outlet.elevation


def _with_outlet(case: Case, index: int, outlet: Outlet) -> Case:
    return replace_at(case, ("outlets", index), outlet)
