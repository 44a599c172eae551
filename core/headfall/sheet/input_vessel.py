"""The vessel's rows in the table of inputs."""

from __future__ import annotations

from dataclasses import fields

from headfall.answers import Answers
from headfall.case import model
from headfall.case.model import (
    ConeEnd,
    Drum,
    EllipsoidalEnd,
    Floor,
    HemisphericalEnd,
    SlopedFloor,
    TorisphericalEnd,
    UprightCylinder,
)
from headfall.sheet.input_row import DEFAULT, NOTHING, TYPED, Row, row, si_text
from headfall.sheet.marks import unmarked
from headfall.sheet.numbers import figures, metres
from headfall.system.profiles import taken_from_sizes


def vessel_rows(answers: Answers) -> list[Row]:
    """Return one row for the shape and one for each size, floor and head."""
    vessel, sizes = answers.case.vessel, answers.vessel
    follows = f"inside height {metres(sizes.height)} m, capacity {figures(sizes.capacity)} m³"
    rows: list[Row] = [("Vessel", vessel.shape.replace("_", " "), "", TYPED, follows)]
    return [*rows, *_size_rows(vessel, ""), *_bodies(vessel)]


def _size_rows(vessel: model.Vessel, before: str) -> list[Row]:
    """The rows of a vessel's own sizes; ``before`` stands in front of their names."""
    if isinstance(vessel, model.Stack):
        rows: list[Row] = []
        for number, part in enumerate(vessel.parts, 1):
            rows.append((f"Part {number}, from below", part.shape.replace("_", " "), "", TYPED, ""))
            rows += _size_rows(part, f"Part {number}, ")
        return rows
    if isinstance(vessel, model.TableVessel):
        return _table(vessel, before)
    rows = []
    outside = getattr(vessel, "sizes", None) == "outside"
    for attribute in fields(vessel):
        value = getattr(vessel, attribute.name)
        if attribute.metadata.get("dimension") and value is not None:
            name = _name(vessel, attribute.name, "Outside" if outside else "Inside")
            rows.append(row(f"{before}{name}" if not before else f"{before}{name[0].lower()}{name[1:]}", value))
    if isinstance(vessel, model.Basin):
        slope = vessel.side_slope
        text = f"{slope:g}" if isinstance(slope, int | float) else " and ".join(f"{one:g}" for one in slope)
        rows.append((f"{before}Side slope", text, "", TYPED, "horizontal per vertical"))
    if isinstance(vessel, UprightCylinder):
        rows.append(_end(f"{before}Floor", vessel.floor, vessel.diameter.value))
    if isinstance(vessel, model.Box) and vessel.floor is not None:
        rows.append(_end(f"{before}Floor", vessel.floor, vessel.length.value))
    if isinstance(vessel, Drum):
        rows += _heads(vessel)
    taken = taken_from_sizes(vessel)
    if taken:
        rows.append(
            (f"{before}Wall and lining", "", f"{metres(taken)} m", TYPED, "taken from each size across the vessel")
        )
    return rows


def _name(vessel: model.Vessel, attribute: str, side: str) -> str:
    if isinstance(vessel, Drum) and attribute == "length":
        return "Length, tangent to tangent"
    if isinstance(vessel, UprightCylinder) and attribute == "height":
        return "Straight side"
    return _NAMES.get(attribute, f"{side} {attribute.replace('_', ' ')}")


def _table(vessel: model.TableVessel, before: str) -> list[Row]:
    kinds = {"area": "area at levels", "volume": "volume at levels", "increment": "volume put in between levels"}
    rule = "the square root of the area is linear" if vessel.between == "conic" else "the area is linear"
    follows = f"between the rows {rule}" if vessel.column == "area" else "between the rows a monotone cubic"
    rows: list[Row] = [(f"{before}Table", kinds[vessel.column or "area"], "", TYPED, follows)]
    for line in vessel.rows:
        level, value = line[0], line[1]
        rows.append((f"{before}Row", f"{unmarked(level.text)}: {unmarked(value.text)}", si_text(value), TYPED, ""))
    return rows


def _bodies(vessel: model.Vessel) -> list[Row]:
    return [
        row("Space taken", body.volume, follows=f"from {unmarked(body.from_.text)} to {unmarked(body.to.text)}, evenly")
        for body in vessel.displacement or ()
    ]


_NAMES = {"fall": "Fall of the axis", "wall": "Wall", "lining": "Lining"}


def _heads(vessel: Drum) -> list[Row]:
    diameter = vessel.diameter.value
    if isinstance(vessel.heads, tuple):
        named = zip(("Head, low end", "Head, high end"), vessel.heads, strict=True)
        return [_end(name, head, diameter) for name, head in named]
    return [_end("Heads, both", vessel.heads, diameter)]


def _end(name: str, end: Floor | None, diameter: float) -> Row:
    if isinstance(end, SlopedFloor):
        return (name, f"sloped, falls {end.fall.text}", f"{metres(end.fall.value)} m", TYPED, "fall across the vessel")
    if isinstance(end, ConeEnd):
        return (name, f"cone, {end.depth.text} deep", f"{metres(end.depth.value)} m", TYPED, "depth")
    if isinstance(end, EllipsoidalEnd):
        ratio = 2.0 if end.ratio is None else end.ratio
        typed = f"ellipsoidal, ratio {ratio:g}{_mark(end.ratio)}"
        return (name, typed, f"{metres(diameter / 2 / ratio)} m", TYPED, "depth of the head")
    if isinstance(end, TorisphericalEnd):
        return _torispherical(name, end, diameter)
    if isinstance(end, HemisphericalEnd):
        return (name, "hemispherical", f"{metres(diameter / 2)} m", TYPED, "depth of the head")
    return (name, NOTHING, "flat", DEFAULT, "") if end is None else (name, "flat", "", TYPED, "")


def _torispherical(name: str, end: TorisphericalEnd, diameter: float) -> Row:
    """Depth b = R − √((R − r)² − (D/2 − r)²) with the crown's radius R and the knuckle's r."""
    crown = 1.0 if end.crown_ratio is None else end.crown_ratio
    knuckle = 0.06 if end.knuckle_ratio is None else end.knuckle_ratio
    crown_radius, knuckle_radius = crown * diameter, knuckle * diameter
    depth = crown_radius - ((crown_radius - knuckle_radius) ** 2 - (diameter / 2 - knuckle_radius) ** 2) ** 0.5
    follows = f"depth of the head; R {metres(crown_radius)} m, r {metres(knuckle_radius)} m"
    typed = f"torispherical, {crown:g}{_mark(end.crown_ratio)} and {knuckle:g}{_mark(end.knuckle_ratio)}"
    return (name, typed, f"{metres(depth)} m", TYPED, follows)


def _mark(typed: float | None) -> str:
    return " (default)" if typed is None else ""
