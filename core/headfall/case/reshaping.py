"""Another shape for the vessel, another form for an end or an opening, keeping what still applies."""

from __future__ import annotations

from dataclasses import replace
from typing import Any

from headfall.case.attributes import attributes_of
from headfall.case.faults import place
from headfall.case.model import (
    Basin,
    Box,
    Case,
    Cone,
    ConeEnd,
    Drum,
    EllipsoidalEnd,
    FlatEnd,
    HemisphericalEnd,
    Orifice,
    Path,
    Pipe,
    RectangularOpening,
    RoundOpening,
    SlopedFloor,
    Sphere,
    Stack,
    TableVessel,
    TorisphericalEnd,
    UprightCylinder,
)
from headfall.case.places import attribute_of, replace_at, value_at
from headfall.case.stand_ins import sizes_of, stack_of, table_of
from headfall.quantities import Quantity, written

# A new cone end, and the bottom of a new cone, in parts of the diameter; the fall of a new sloped floor likewise.
_CONE_DEPTH = 0.25
_CONE_BOTTOM = 0.5
_FLOOR_FALL = 0.02
# The sides of a new basin, horizontal per vertical.
_SIDE_SLOPE = 1

_SHAPES = {kind.shape: kind for kind in (UprightCylinder, Box, Cone, Drum, Sphere, Basin, TableVessel, Stack)}
_ENDS = {
    kind.form: kind for kind in (FlatEnd, ConeEnd, EllipsoidalEnd, TorisphericalEnd, HemisphericalEnd, SlopedFloor)
}
_OPENINGS = {kind.form: kind for kind in (RoundOpening, RectangularOpening)}
_KEPT = ("sizes", "wall", "lining", "displacement")


def change_shape(case: Case, shape: str, path: Path = ("vessel",)) -> Case:
    """Return the case with a vessel of another shape; ``path`` may be that of a part of a stack or a receiving vessel.

    Sizes that still mean something stay as typed, ends go from floor to heads and back, levels keep their text; a
    station is dropped with the drum it belongs to. A table begins with the plan areas at bottom and top, a stack with
    the present vessel and another on top. A stack that is left gives its first part of the new shape, or else its
    first part as a beginning. Raises LookupError for a shape that is not known, or not allowed there.
    """
    former: Any = value_at(case, path)
    allowed = _vessels_at(case, path)
    kind = _known({word: known for word, known in _SHAPES.items() if known in allowed}, shape)
    if type(former) is kind:
        return case
    changed = replace_at(case, path, _reshaped(former, kind))
    if path == ("vessel",) and isinstance(former, Drum):
        outlets = tuple(
            replace(outlet, station=None) if isinstance(outlet, Orifice | Pipe) else outlet for outlet in case.outlets
        )
        changed = replace(changed, outlets=outlets)
    return changed


def change_end_form(case: Case, path: Path, form: str) -> Case:
    """Return the case with another form at an end of a vessel.

    ``path`` is that of a floor, of both heads or of one of them; the form ``two`` gives a drum two heads of their own,
    alike at first. Raises LookupError for a form or a path that is not known, and a form that does not fit there.
    """
    at = len(path) - (1 if path and isinstance(path[-1], str) else 2)
    vessel: Any = value_at(case, path[:at]) if at > 0 else None
    if type(vessel) not in _SHAPES.values() or path[at] not in ("floor", "heads") or not hasattr(vessel, str(path[at])):
        raise LookupError(f"a case has no end at {place(path)}")
    name, index = str(path[at]), path[at + 1] if len(path) > at + 1 else None
    former = getattr(vessel, name)
    pair = former if isinstance(former, tuple) else (former or FlatEnd(), former or FlatEnd())
    if index is not None:
        if name != "heads" or index not in (0, 1):
            raise LookupError(f"a case has no end at {place(path)}")
        changed = _end(vessel, name, pair[int(index)], form)
        return replace_at(case, path[: at + 1], (changed, pair[1]) if index == 0 else (pair[0], changed))
    if form == "two" and name == "heads":
        return replace_at(case, path, pair)
    single = former[0] if isinstance(former, tuple) else former
    return replace_at(case, path, _end(vessel, name, single, form))


def change_opening_form(case: Case, path: Path, form: str) -> Case:
    """Return the case with another form of one opening; ``path`` is that of the opening or of anything in its outlet.

    Raises LookupError for a form that is not known and for an outlet without an opening.
    """
    kind = _known(_OPENINGS, form)
    index = path[1] if len(path) > 1 and path[0] == "outlets" else None
    outlet = case.outlets[index] if isinstance(index, int) and 0 <= index < len(case.outlets) else None
    if not isinstance(index, int) or not isinstance(outlet, Orifice):
        raise LookupError(f"a case has no opening at {place(path)}")
    if type(outlet.opening) is kind:
        return case
    return replace_at(case, ("outlets", index, "opening"), kind(**sizes_of(outlet.opening, kind)))


def _vessels_at(case: Case, path: Path) -> tuple[type, ...]:
    """Return the kinds of vessel that may stand at a path. Raises LookupError where none may."""
    above = value_at(case, path[:-1]) if path and isinstance(path[-1], str) else value_at(case, path[:-2])
    key = next((step for step in reversed(path) if isinstance(step, str)), "")
    attribute_of(case, path)
    found = attributes_of(type(above))[key].variants
    if Sphere not in found:
        raise LookupError(f"a case has no vessel at {place(path)}")
    return found


def _reshaped(former: Any, kind: type) -> Any:
    displacement = former.displacement
    if isinstance(former, Stack):
        # A stack of vessels is left for the part that has the shape wanted, if there is one.
        alike: Any = next((part for part in former.parts if type(part) is kind), None)
        first: Any = former.parts[0]
        if alike is not None:
            return replace(alike, displacement=displacement or alike.displacement)
        former, displacement = first, displacement or first.displacement
    if kind is Stack:
        # A drum cannot be part of a stack.
        return stack_of(_reshaped(former, UprightCylinder) if isinstance(former, Drum) else former)
    if kind is TableVessel:
        return replace(table_of(former), displacement=displacement)
    values: dict[str, Any] = dict(sizes_of(former, kind))
    if kind is Cone:
        bottom: Quantity = values["bottom_diameter"]
        values["bottom_diameter"] = written(bottom.value * _CONE_BOTTOM, bottom.unit, "length")
    if kind is Basin:
        values["side_slope"] = _SIDE_SLOPE
    known = attributes_of(kind)
    values.update({name: getattr(former, name) for name in _KEPT if name in known and hasattr(former, name)})
    end = getattr(former, "floor", None) or getattr(former, "heads", None)
    single = end[0] if isinstance(end, tuple) else end
    for name in ("floor", "heads"):
        if name in known and type(single) in known[name].variants:
            values[name] = end if name == "heads" else single
    return kind(**{**values, "displacement": displacement})


def _known(kinds: dict[str, Any], word: str) -> Any:
    if word not in kinds:
        raise LookupError(f"{word} is not one of {', '.join(kinds)}")
    return kinds[word]


def _end(vessel: Any, name: str, former: Any, form: str) -> Any:
    allowed = attributes_of(type(vessel))[name].variants
    kind = _known({word: known for word, known in _ENDS.items() if known in allowed}, form)
    if type(former) is kind:
        return former
    across: Quantity = vessel.length if isinstance(vessel, Box) else vessel.diameter
    if kind is ConeEnd:
        return ConeEnd(written(across.value * _CONE_DEPTH, across.unit, "length"))
    if kind is SlopedFloor:
        return SlopedFloor(written(across.value * _FLOOR_FALL, across.unit, "length"))
    return kind()
