"""The level axis below the vessel: how deep it goes, and what of it is left out."""

from __future__ import annotations

from headfall_app.paint.scene import Scene

BREAK_HEIGHT = 12.0
"""Blank between the two strokes where levels below the vessel are left out [px]."""
_DEEP, _KEPT = 1.2, 0.7
"""Depths over the first, told in the vessel's height, are cut until the second remains."""


def left_out(scene: Scene) -> tuple[float, float] | None:
    """Return the levels (low, high) [m] below the vessel that are left out of the drawing, None where all is drawn.

    Only a stretch in which nothing stands is left out: a long drop would make a dot of the vessel.
    """
    depth = -scene.lowest
    if depth <= _DEEP * scene.height:
        return None
    upper, lower = _largest_gap(scene)
    spare = min(depth - _KEPT * scene.height, (upper - lower) - 0.3 * scene.height)
    if spare < 0.25 * depth:
        return None
    high = 0.5 * (upper + lower) + 0.5 * spare
    return high - spare, high


def _largest_gap(scene: Scene) -> tuple[float, float]:
    """Return the upper and the lower end of the largest stretch below the vessel in which nothing stands."""
    taken = [(0.0, scene.height)]
    for outlet in scene.outlets:
        taken += [(level, level) for level in (outlet.discharge, outlet.tail) if level is not None and level < 0.0]
    if scene.receiver is not None:
        foot = scene.receiver.elevation
        taken = [(low, high) for low, high in taken if not foot <= low <= foot + scene.receiver.height or low == 0.0]
        taken.append((foot, foot + scene.receiver.height))
    taken.sort(reverse=True)
    gaps, floor = [(0.0, 0.0)], 0.0
    for low, high in taken:
        if high < floor:
            gaps.append((floor, high))
        floor = min(floor, low)
    return max(gaps, key=lambda gap: gap[0] - gap[1])


def drawn_depth(scene: Scene) -> tuple[float, float]:
    """Return how deep it is drawn below the vessel: what goes to scale [m], and the break in it [px]."""
    out = left_out(scene)
    if out is None:
        return -scene.lowest, 0.0
    return -scene.lowest - (out[1] - out[0]), BREAK_HEIGHT
