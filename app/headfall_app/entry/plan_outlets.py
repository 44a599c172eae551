"""The rows of one outlet: an opening, a pipe or a weir."""

from __future__ import annotations

from collections.abc import Iterator
from typing import Any

from headfall.case.attributes import attributes_of
from headfall.case.between_weirs import SIZES, TAKEN
from headfall.case.model import Case, CoefficientRange, Path, Pipe, PipeSection, ReceivingVessel, Weir
from headfall.outlet.handbook_losses import materials
from headfall_app.entry.plan_rows import Row, add_row, choice_row, part_row, plain_row, plain_rows, tip_of
from headfall_app.entry.plan_vessel import vessel_rows
from headfall_app.words import key_of, label_of, words

USUAL_MATERIAL = "commercial steel"


def outlet_rows(case: Case, index: int) -> Iterator[Row]:
    """Return the rows of an outlet, the kind first, what is seldom typed last."""
    outlet, path = case.outlets[index], ("outlets", index)
    known = attributes_of(type(outlet))
    yield from plain_row((*path, "name"), known["name"].metadata)
    yield choice_row((*path, "kind"), "outlets.kind", "kind")
    for name in words()["order"][outlet.kind]:
        here: Path = (*path, name)
        if name not in known or not _applies(case, outlet, name, key_of(here)):
            continue
        if name == "opening":
            yield choice_row(here, "outlets.opening", "opening")
            yield from plain_rows(here, outlet.opening)  # type: ignore[union-attr]
        elif name == "coefficient":
            yield choice_row(here, "outlets.coefficient", "coefficient", default="handbook")
            if isinstance(outlet.coefficient, CoefficientRange):  # type: ignore[union-attr]
                yield from plain_rows(here, outlet.coefficient)  # type: ignore[union-attr]
        elif name == "form":
            yield choice_row(here, "outlets.form", "form")
        elif name == "fittings":
            yield from _fitting_rows(path, outlet)
        elif name == "sections":
            yield from _section_rows(path, outlet)
        elif name == "tailwater":
            yield from _tailwater_rows(here, outlet.tailwater)
        elif name == "material":
            yield _material_row(here)
        else:
            yield from plain_row(here, known[name].metadata, variant=_variant(outlet))


def _variant(outlet: Any) -> str:
    return outlet.kind if outlet.kind != "orifice" else outlet.facing or "down"


def _applies(case: Case, outlet: Any, name: str, key: str) -> bool:
    if isinstance(outlet, Weir) and name in SIZES:
        return name in TAKEN[outlet.form or "rectangular"] or getattr(outlet, name) is not None
    if isinstance(outlet, Pipe) and name in ("material", "roughness", "friction_factor"):
        return _friction_shown(outlet, name)
    rule = words()["only"].get(key)
    if rule is None:
        return True
    if "vessel" in rule:
        return case.vessel.shape in rule["vessel"]
    # An attribute that is typed is shown in any case, so that it can be taken out again.
    typed = getattr(outlet, key.rsplit(".", 1)[-1]) is not None
    return typed or getattr(outlet, rule["attribute"]) in rule["values"]


def _material_row(path: Path, usual: str = USUAL_MATERIAL) -> Row:
    """Return the choice of a material; one that is typed in the file by another name is shown as it is."""
    names = tuple((name, name.capitalize()) for name in materials())
    return Row(path, "choice", label_of(path), default=usual, choices=names, tip=tip_of(key_of(path)))


def _friction_shown(part: Any, name: str) -> bool:
    """Material and roughness go together; a fixed friction factor takes the place of both."""
    if name == "material":
        return part.roughness is None and part.friction_factor is None
    return name != "roughness" or part.friction_factor is None


def _fitting_rows(path: Path, part: Any) -> Iterator[Row]:
    here = (*path, "fittings")
    for index, fitting in enumerate(part.fittings or ()):
        yield part_row((*here, index), f"Fitting {index + 1}", "fitting")
        yield from plain_rows((*here, index), fitting)
    yield add_row(here, "a fitting")
    yield choice_row((*path, "valve"), "outlets.valve", "valve")
    if part.valve is not None:
        known = attributes_of(type(part.valve))
        for name in ("kv" if part.valve.cv is None else "cv", "opening", "characteristic"):
            yield from plain_row((*path, "valve", name), known[name].metadata)


def _section_rows(path: Path, pipe: Any) -> Iterator[Row]:
    here = (*path, "sections")
    known = attributes_of(PipeSection)
    for index, section in enumerate(pipe.sections or ()):
        inner = (*here, index)
        yield part_row(inner, f"Section {index + 2}", "section")
        for name in ("bore", "length", "material", "roughness", "friction_factor"):
            if name == "material" and _friction_shown(section, name):
                yield _material_row((*inner, name), pipe.material or USUAL_MATERIAL)
            elif name in ("bore", "length") or (name != "material" and _friction_shown(section, name)):
                yield from plain_row((*inner, name), known[name].metadata)
        yield from _fitting_rows(inner, section)
    yield add_row(here, "a length of another bore")


def _tailwater_rows(path: Path, tail: Any) -> Iterator[Row]:
    yield choice_row(path, "outlets.tailwater", "tailwater")
    if isinstance(tail, ReceivingVessel):
        yield from plain_rows(path, tail)
        yield from vessel_rows((*path, "vessel"), tail.vessel)
    elif tail is not None:
        yield Row(path, "quantity", "Level outside", "length", required=True)
