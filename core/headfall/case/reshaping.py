"""Another shape for the vessel, another form for an end or an opening, keeping what still applies."""

from __future__ import annotations

from dataclasses import replace
from typing import Any

from headfall.case.attributes import attributes_of
from headfall.case.faults import place
from headfall.case.model import (
    Box,
    Case,
    Cone,
    ConeEnd,
    Drum,
    EllipsoidalEnd,
    FlatEnd,
    HemisphericalEnd,
    Path,
    RectangularOpening,
    RoundOpening,
    Sphere,
    TorisphericalEnd,
    UprightCylinder,
)
from headfall.quantities import Quantity, written

# For every size of a shape: the sizes of the former shape that may stand in for it, best first.
_STANDING_IN: dict[type, dict[str, tuple[str, ...]]] = {
    UprightCylinder: {
        "diameter": ("diameter", "top_diameter", "bottom_diameter", "width"),
        "height": ("height", "length", "diameter"),
    },
    Box: {
        "length": ("length", "diameter", "top_diameter", "bottom_diameter"),
        "width": ("width", "diameter", "top_diameter", "bottom_diameter"),
        "height": ("height", "diameter"),
    },
    Cone: {
        "top_diameter": ("diameter", "width"),
        "bottom_diameter": ("diameter", "width"),
        "height": ("height", "length", "diameter"),
    },
    Drum: {
        "diameter": ("diameter", "top_diameter", "bottom_diameter", "width"),
        "length": ("length", "height", "diameter"),
    },
    Sphere: {"diameter": ("diameter", "top_diameter", "bottom_diameter", "width")},
    RoundOpening: {"diameter": ("width",)},
    RectangularOpening: {"width": ("diameter",), "height": ("diameter",)},
}
# A new cone end, and the bottom of a new cone, in parts of the diameter.
_CONE_DEPTH = 0.25
_CONE_BOTTOM = 0.5

_SHAPES = {kind.shape: kind for kind in (UprightCylinder, Box, Cone, Drum, Sphere)}
_ENDS = {kind.form: kind for kind in (FlatEnd, ConeEnd, EllipsoidalEnd, TorisphericalEnd, HemisphericalEnd)}
_OPENINGS = {kind.form: kind for kind in (RoundOpening, RectangularOpening)}


def change_shape(case: Case, shape: str) -> Case:
    """Return the case with a vessel of another shape.

    Sizes that still mean something stay as typed, ends go from floor to heads and back, levels keep their text; a
    station is dropped with the drum it belongs to. Raises LookupError for a shape that is not known.
    """
    kind, former = _known(_SHAPES, shape), case.vessel
    if type(former) is kind:
        return case
    sizes = _sizes(former, kind)
    if kind is Cone:
        bottom: Quantity = sizes["bottom_diameter"]
        sizes["bottom_diameter"] = written(bottom.value * _CONE_BOTTOM, bottom.unit, "length")
    end = former.floor if isinstance(former, UprightCylinder) else former.heads if isinstance(former, Drum) else None
    if kind is UprightCylinder:
        sizes["floor"] = end[0] if isinstance(end, tuple) else end
    elif kind is Drum:
        sizes["heads"] = end
    outlets = case.outlets
    if isinstance(former, Drum):
        outlets = tuple(replace(outlet, station=None) for outlet in outlets)
    return replace(case, vessel=kind(**sizes), outlets=outlets)


def change_end_form(case: Case, path: Path, form: str) -> Case:
    """Return the case with another form at an end of the vessel.

    ``path`` is that of a floor, of both heads or of one of them; the form ``two`` gives a drum two heads of their own,
    alike at first. Raises LookupError for a form or a path that is not known.
    """
    vessel: Any = case.vessel
    if len(path) < 2 or path[0] != "vessel" or path[1] not in ("floor", "heads") or not hasattr(vessel, str(path[1])):
        raise LookupError(f"a case has no end at {place(path)}")
    name = str(path[1])
    former = getattr(vessel, name)
    if len(path) == 3:
        pair = former if isinstance(former, tuple) else (former or FlatEnd(), former or FlatEnd())
        index = path[2]
        if name != "heads" or index not in (0, 1):
            raise LookupError(f"a case has no end at {place(path)}")
        changed = _end(vessel, pair[int(index)], form)
        return replace(case, vessel=replace(vessel, heads=(changed, pair[1]) if index == 0 else (pair[0], changed)))
    if form == "two" and name == "heads":
        pair = former if isinstance(former, tuple) else (former or FlatEnd(), former or FlatEnd())
        return replace(case, vessel=replace(vessel, heads=pair))
    single = former[0] if isinstance(former, tuple) else former
    return replace(case, vessel=replace(vessel, **{name: _end(vessel, single, form)}))


def change_opening_form(case: Case, path: Path, form: str) -> Case:
    """Return the case with another form of one opening; ``path`` is that of the opening or of anything in its outlet.

    Raises LookupError for a form or an outlet that is not known.
    """
    kind = _known(_OPENINGS, form)
    index = path[1] if len(path) > 1 and path[0] == "outlets" else None
    if not isinstance(index, int) or not 0 <= index < len(case.outlets):
        raise LookupError(f"a case has no opening at {place(path)}")
    outlet = case.outlets[index]
    if type(outlet.opening) is kind:
        return case
    outlet = replace(outlet, opening=kind(**_sizes(outlet.opening, kind)))
    return replace(case, outlets=(*case.outlets[:index], outlet, *case.outlets[index + 1 :]))


def _known(kinds: dict[str, Any], word: str) -> Any:
    if word not in kinds:
        raise LookupError(f"{word} is not one of {', '.join(kinds)}")
    return kinds[word]


def _sizes(former: Any, kind: type) -> dict[str, Any]:
    """Return the sizes of a part of another kind, each taken from the former as it was typed."""
    sizes = {}
    for name, candidates in _STANDING_IN[kind].items():
        typed = [getattr(former, candidate, None) for candidate in candidates]
        # A cone's point has a diameter of nil, which no other shape can take over.
        typed += [getattr(former, other) for other in attributes_of(type(former))]
        sizes[name] = next(size for size in typed if isinstance(size, Quantity) and size.value > 0)
    return sizes


def _end(vessel: Any, former: Any, form: str) -> Any:
    kind = _known(_ENDS, form)
    if type(former) is kind:
        return former
    if kind is ConeEnd:
        return ConeEnd(written(vessel.diameter.value * _CONE_DEPTH, vessel.diameter.unit, "length"))
    return kind()
