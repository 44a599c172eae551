"""The formula behind the volumes a checker finds in the strips."""

from __future__ import annotations

from headfall.case.model import (
    Basin,
    Box,
    Cone,
    Drum,
    EllipsoidalEnd,
    FlatEnd,
    HemisphericalEnd,
    SlopedFloor,
    Stack,
    TableVessel,
    UprightCylinder,
    Vessel,
)
from headfall.sheet.marks import lowered


def volume_law(vessel: Vessel) -> str:
    """Return the volume V [m³] at the level h [m] in a line; R is half the inside diameter D."""
    if isinstance(vessel, Box):
        return "V = length · width · h"
    if isinstance(vessel, Cone):
        return f"V = (π·h/3)·(r² + r·r{lowered('h')} + r{lowered('h')}²), radius r at the bottom, r{lowered('h')} at h"
    if isinstance(vessel, Basin):
        return "V = L·W·h + (L·m₂ + W·m₁)·h² + (4/3)·m₁·m₂·h³, m the side slopes along the length and the width"
    if isinstance(vessel, TableVessel):
        if vessel.column == "area":
            conic = vessel.between == "conic"
            return (
                "from the table: Δh/3·(A₁ + A₂ + √(A₁·A₂)), row by row"
                if conic
                else "from the table: Δh·(A₁ + A₂)/2, row by row"
            )
        return "from the table, between its rows a monotone cubic"
    if isinstance(vessel, Stack):
        return "V = the parts filled, lowest first, added up"
    if isinstance(vessel, Drum) and vessel.fall is not None and vessel.fall.value > 0:
        return "V = segments of circles added up along the sloping axis"
    if isinstance(vessel, Drum):
        return f"V = L·[R²·acos((R − h)/R) − (R − h)·√(2·R·h − h²)] + heads ({_heads(vessel)}), angle in radians"
    if isinstance(vessel, UprightCylinder):
        if vessel.floor is None or isinstance(vessel.floor, FlatEnd):
            return "V = (π/4)·D²·h"
        if isinstance(vessel.floor, SlopedFloor):
            return "V = (π/4)·D²·(h − fall/2) above the sloped floor, a hoof of the cylinder below it"
        return "V = volume of the floor + (π/4)·D²·(h − depth of the floor)"
    return "V = (π/3)·h²·(3·R − h)"


def _heads(vessel: Drum) -> str:
    ends = vessel.heads if isinstance(vessel.heads, tuple) else (vessel.heads,)
    words = []
    for end in ends:
        if end is None or isinstance(end, FlatEnd):
            words.append("none where flat")
        elif isinstance(end, HemisphericalEnd):
            words.append("half a sphere: (π/6)·h²·(3·R − h) each")
        elif isinstance(end, EllipsoidalEnd):
            words.append("half an ellipsoid, depth b: (b/R)·(π/6)·h²·(3·R − h) each")
        else:
            words.append(f"{end.form}: segments of circles added up along the axis")
    return "; ".join(dict.fromkeys(words))
