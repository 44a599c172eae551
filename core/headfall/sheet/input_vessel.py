"""The vessel's rows in the table of inputs."""

from __future__ import annotations

from dataclasses import fields

from headfall.answers import Answers
from headfall.case.model import (
    ConeEnd,
    Drum,
    EllipsoidalEnd,
    End,
    HemisphericalEnd,
    TorisphericalEnd,
    UprightCylinder,
)
from headfall.quantities import Quantity
from headfall.sheet.input_row import DEFAULT, NOTHING, TYPED, Row, row
from headfall.sheet.numbers import figures, metres


def vessel_rows(answers: Answers) -> list[Row]:
    """Return one row for the shape and one for each size, floor and head."""
    vessel, sizes = answers.case.vessel, answers.vessel
    follows = f"inside height {metres(sizes.height)} m, capacity {figures(sizes.capacity)} m³"
    rows: list[Row] = [("Vessel", vessel.shape.replace("_", " "), "", TYPED, follows)]
    for attribute in fields(vessel):
        if attribute.metadata.get("dimension"):
            value: Quantity | None = getattr(vessel, attribute.name)
            name = _NAMES.get(attribute.name, f"Inside {attribute.name.replace('_', ' ')}")
            if isinstance(vessel, Drum) and attribute.name == "length":
                name = "Length, tangent to tangent"
            if isinstance(vessel, UprightCylinder) and attribute.name == "height":
                name = "Straight side"
            if value is not None:
                rows.append(row(name, value))
    if isinstance(vessel, UprightCylinder):
        rows.append(_end("Floor", vessel.floor, vessel.diameter.value))
    if isinstance(vessel, Drum):
        rows += _heads(vessel)
    return rows


_NAMES = {"fall": "Fall of the axis"}


def _heads(vessel: Drum) -> list[Row]:
    diameter = vessel.diameter.value
    if isinstance(vessel.heads, tuple):
        named = zip(("Head, low end", "Head, high end"), vessel.heads, strict=True)
        return [_end(name, head, diameter) for name, head in named]
    return [_end("Heads, both", vessel.heads, diameter)]


def _end(name: str, end: End | None, diameter: float) -> Row:
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
