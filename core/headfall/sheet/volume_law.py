"""The formula behind the volumes a checker finds in the strips."""

from __future__ import annotations

from headfall.case.model import Box, Cone, Drum, EllipsoidalEnd, FlatEnd, HemisphericalEnd, UprightCylinder, Vessel
from headfall.sheet.marks import lowered


def volume_law(vessel: Vessel) -> str:
    """Return the volume V [m³] at the level h [m] in a line; R is half the inside diameter D."""
    if isinstance(vessel, Box):
        return "V = length · width · h"
    if isinstance(vessel, Cone):
        return f"V = (π·h/3)·(r² + r·r{lowered('h')} + r{lowered('h')}²), radius r at the bottom, r{lowered('h')} at h"
    if isinstance(vessel, Drum):
        return f"V = L·[R²·acos((R − h)/R) − (R − h)·√(2·R·h − h²)] + heads ({_heads(vessel)}), angle in radians"
    if isinstance(vessel, UprightCylinder):
        if vessel.floor is None or isinstance(vessel.floor, FlatEnd):
            return "V = (π/4)·D²·h"
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
