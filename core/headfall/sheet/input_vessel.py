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
from headfall.sheet.input_row import DEFAULT, TYPED, Row, row
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
            rows.append(row(name, value, (str(attribute.metadata.get("default", "")), "0 m")))
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
        basis = DEFAULT if end.ratio is None else TYPED
        return (name, f"ellipsoidal {ratio:g}:1", f"{metres(diameter / 2 / ratio)} m", basis, "depth of the head")
    if isinstance(end, TorisphericalEnd):
        return _torispherical(name, end, diameter)
    if isinstance(end, HemisphericalEnd):
        return (name, "hemispherical", f"{metres(diameter / 2)} m", TYPED, "depth of the head")
    return (name, "flat", "", DEFAULT if end is None else TYPED, "")


def _torispherical(name: str, end: TorisphericalEnd, diameter: float) -> Row:
    """Depth b = R − √((R − r)² − (D/2 − r)²) with the crown's radius R and the knuckle's r."""
    crown = 1.0 if end.crown_ratio is None else end.crown_ratio
    knuckle = 0.06 if end.knuckle_ratio is None else end.knuckle_ratio
    basis = DEFAULT if end.crown_ratio is None or end.knuckle_ratio is None else TYPED
    crown_radius, knuckle_radius = crown * diameter, knuckle * diameter
    depth = crown_radius - ((crown_radius - knuckle_radius) ** 2 - (diameter / 2 - knuckle_radius) ** 2) ** 0.5
    follows = f"depth of the head; R {metres(crown_radius)} m, r {metres(knuckle_radius)} m"
    return (name, f"torispherical, {crown:g} and {knuckle:g}", f"{metres(depth)} m", basis, follows)
