"""Questions to a vessel's outline: where its wall is at a level, its floor under a place."""

from __future__ import annotations

from dataclasses import replace

import numpy as np

from headfall.vessel.profile import Outline
from headfall_app.paint.scene_outlets import DrawnOutlet

_ON_THE_FLOOR = 0.02
"""How much of the vessel's height an inlet may stand over the floor and still leave by it."""


def extent(outline: Outline) -> tuple[float, float]:
    """Return how far the wall goes to the left and right [m]."""
    return float(outline.wall[:, 0].min()), float(outline.wall[:, 0].max())


def _crossings(along: np.ndarray, across: np.ndarray, value: float) -> np.ndarray:
    """Return ``across`` where a polyline's ``along`` passes a value, ends of flat pieces included."""
    before, after = along[:-1], along[1:]
    touched = (np.minimum(before, after) <= value) & (np.maximum(before, after) >= value)
    rise = after - before
    flat = touched & (np.abs(rise) < 1e-12)
    sloped = touched & ~flat
    share = (value - before[sloped]) / rise[sloped]
    met = across[:-1][sloped] + share * (across[1:] - across[:-1])[sloped]
    return np.concatenate((met, across[:-1][flat], across[1:][flat]))


def surface_span(outline: Outline, level: float) -> tuple[float, float] | None:
    """Return where a liquid's surface meets the wall at a level [m], None outside the vessel."""
    low, high = float(outline.wall[:, 1].min()), float(outline.wall[:, 1].max())
    level = min(max(level, low + 1e-9 * (high - low)), high - 1e-9 * (high - low))
    met = _crossings(outline.wall[:, 1], outline.wall[:, 0], level)
    return (float(met.min()), float(met.max())) if len(met) else None


def floor_under(outline: Outline, place: float) -> float:
    """Return the lowest wall under a place across [m]; nil beside the vessel."""
    met = _crossings(outline.wall[:, 0], outline.wall[:, 1], place)
    return float(met.min()) if len(met) else 0.0


def roof_over(outline: Outline, place: float) -> float:
    """Return the highest wall over a place [m] of a closed vessel, its top for an open one."""
    top = float(outline.wall[:, 1].max())
    if not outline.closed:
        return top
    met = _crossings(outline.wall[:, 0], outline.wall[:, 1], place)
    return float(met.max()) if len(met) else top


def top_span(outline: Outline) -> tuple[float, float]:
    """Return the stretch across [m] through which a stream can enter from above."""
    if outline.closed and outline.tangents:
        return outline.tangents[0], outline.tangents[-1]
    left, right = extent(outline)
    if outline.closed:
        centre = 0.5 * (left + right)
        return centre, centre
    return surface_span(outline, float(outline.wall[:, 1].max())) or (left, right)


def _lowest_across(outline: Outline) -> float:
    """Return the middle, or beside the lowest corner where an upright vessel's floor or a drum falls to one side."""
    left, right = extent(outline)
    middle = 0.5 * (left + right)
    if floor_under(outline, middle) < 1e-9:
        return middle
    if outline.axis != "vertical":
        return float(outline.wall[np.argmin(outline.wall[:, 1]), 0])
    corner = float(outline.wall[np.argmin(outline.wall[:, 1]), 0])
    return corner + 0.12 * (right - left) * float(np.sign(middle - corner))


def outlet_across(outline: Outline, station: float | None) -> float:
    """Return where a downward outlet sits across [m]: at its station from the low end, else at the lowest place."""
    left, right = extent(outline)
    if station is None:
        return _lowest_across(outline)
    origin = outline.tangents[0] if outline.tangents else left
    return min(max(origin + station, left), right)


def placed(outline: Outline, outlet: DrawnOutlet) -> DrawnOutlet:
    """Return an outlet with its place in a section: across the floor, or by the wall.

    A pipe leaves by the wall where its inlet stands over the floor, or where it rises to its end.
    """
    across = outlet_across(outline, outlet.station)
    if outlet.facing != "pipe":
        return replace(outlet, across=across)
    over = outlet.elevation - floor_under(outline, across) > _ON_THE_FLOOR * float(outline.wall[:, 1].max())
    return replace(outlet, across=across, by_wall=over or outlet.end_level > outlet.elevation)
