"""What leaves the vessel, to scale, with each outlet's size and flow beside it."""

from __future__ import annotations

import numpy as np
from PySide6.QtCore import QPointF, QRectF
from PySide6.QtGui import QPainter

from headfall_app.paint.around import outside_boxes, paint_tailwater
from headfall_app.paint.dimensions import dimension_obstacles
from headfall_app.paint.drop_line import drop_line, drop_strip, paint_drop
from headfall_app.paint.labels import along, beside, over, paint_label
from headfall_app.paint.layout import JET, Frame
from headfall_app.paint.outline_geometry import floor_under
from headfall_app.paint.pipe_run import floor_places, link_run, mouth, pipe_run
from headfall_app.paint.scene import Scene
from headfall_app.paint.scene_outlets import JET_VELOCITY_COEFFICIENT, DrawnOutlet
from headfall_app.paint.section import WALL
from headfall_app.paint.staff import numbers_left
from headfall_app.paint.strokes import fill, level_line, pen, plumb_line, ribbon
from headfall_app.paint.theme import Theme
from headfall_app.paint.waterways import paint_jet, paint_link, paint_pipe
from headfall_app.paint.weirs import paint_weir, weir_foot

LEAST_WIDTH = 3.0
_DROWNED_JET = 46.0


def jet_places(frame: Frame, scene: Scene) -> dict[int, float]:
    """Return where each downward outlet is drawn [px]; several at one place stand beside one another."""
    places = floor_places(frame, scene)
    return {index: place for index, place in places.items() if scene.outlets[index].facing == "down"}


def paint_jets(painter: QPainter, frame: Frame, scene: Scene, theme: Theme) -> list[tuple[int, QRectF]]:
    """Paint every outlet; return where each one's size stands, as (index, box)."""
    places = jet_places(frame, scene)
    _paint_outlets(painter, frame, scene, places, theme)
    taken = [*dimension_obstacles(frame, scene), *outlet_boxes(frame, scene, places)]
    for outlet in scene.outlets:
        placed = drop_line(frame, scene, outlet, taken)
        if placed is not None:
            paint_drop(painter, frame, *placed, theme)
            taken.append(drop_strip(placed[0]))
    boxes: list[tuple[int, QRectF]] = []
    # Left of the vessel stand dimensions, at the staff its numbers.
    room = (frame.across.left - 14.0 if frame.plan.columns else 0.0, numbers_left(frame, scene) - 5.0)
    for index, outlet in enumerate(scene.outlets):
        if outlet.facing == "down":
            ways = beside(frame, outlet, places[index], _width(frame, outlet))
        elif outlet.is_pipe:
            ways = along(frame, outlet, pipe_run(frame, scene, outlet))
        else:
            ways = over(frame, scene, outlet, _foot(frame, scene, outlet))
        boxes.append((index, paint_label(painter, frame, outlet, ways, room, taken, theme)))
    return boxes


def _paint_outlets(painter: QPainter, frame: Frame, scene: Scene, places: dict[int, float], theme: Theme) -> None:
    link = link_run(frame, scene)
    paint_link(painter, frame, scene, theme)
    for index, outlet in enumerate(scene.outlets):
        paint_tailwater(painter, frame, scene, outlet, theme)
        linked = link is not None and index == 0
        if outlet.facing == "down":
            _paint_down(painter, frame, scene, outlet, places[index], linked, theme)
        elif outlet.is_pipe:
            paint_pipe(painter, frame, scene, outlet, theme)
        elif outlet.facing == "weir":
            if not linked:
                paint_weir(painter, frame, scene, outlet, theme)
        else:
            _paint_sideways(painter, frame, scene, outlet, linked, theme)


def outlet_boxes(frame: Frame, scene: Scene, places: dict[int, float]) -> list[QRectF]:
    """Return what the outlets and what they discharge into take on the page."""
    taken = outside_boxes(frame, scene)
    for index, place in places.items():
        outlet = scene.outlets[index]
        wide, floor = _width(frame, outlet), _opening_row(frame, scene, place)
        taken.append(QRectF(place - 0.5 * wide - 3.0, floor, wide + 6.0, frame.bottom + JET - floor))
    runs = [pipe_run(frame, scene, outlet) for outlet in scene.outlets if outlet.is_pipe]
    link = link_run(frame, scene)
    for run in (*runs, *([link] if link is not None else [])):
        taken += [box.adjusted(-4.0, -2.0, 4.0, 2.0) for box in run.boxes]
    taken += [run.fall_box for run in runs]
    return taken


def _width(frame: Frame, outlet: DrawnOutlet) -> float:
    return max(outlet.width * frame.pixels_per_metre, LEAST_WIDTH)


def _foot(frame: Frame, scene: Scene, outlet: DrawnOutlet) -> QPointF:
    """Return where what leaves sideways comes into the open."""
    if outlet.facing == "weir":
        return weir_foot(frame, scene, outlet)
    (_, row), open_at = mouth(frame, scene, outlet)
    return QPointF(open_at, row)


def _opening_row(frame: Frame, scene: Scene, place: float) -> float:
    metres, pixels = frame.across.knots
    across = float(np.interp(place, pixels, metres))
    return frame.y(min(floor_under(scene.outline, across), frame.vessel_height))


def _paint_down(
    painter: QPainter, frame: Frame, scene: Scene, outlet: DrawnOutlet, place: float, linked: bool, theme: Theme
) -> None:
    """Paint the gap in the floor, the stand of an opening raised above it, and what falls."""
    wide, floor = _width(frame, outlet), _opening_row(frame, scene, place)
    ground = "liquid" if linked and outlet.flow else "surface"
    painter.fillRect(QRectF(place - 0.5 * wide, floor, wide, WALL + 0.5), theme.colour(ground))
    plane = frame.y(outlet.elevation)
    if floor - plane > 2.0:
        for column in (place - 0.5 * wide - 1.0, place + 0.5 * wide):
            plumb_line(painter, column, plane, floor, pen(theme.colour("wall"), 2.0))
    if outlet.flow > 0.0 and not linked:
        _paint_falling(painter, place, wide, floor, max(frame.bottom + JET - floor, JET), theme)


def _paint_falling(painter: QPainter, place: float, wide: float, floor: float, length: float, theme: Theme) -> None:
    neck = 0.78 * wide
    down = np.linspace(0.0, 1.0, 12)
    widths = np.append(neck + (wide - neck) * (1.0 - down) ** 2, max(neck, 2.0))
    rows = np.append(floor + 0.5 * wide * down, floor + max(length, 0.5 * wide + 1.0))
    paint_jet(painter, np.full(len(rows), place), rows, widths, theme)


def _paint_sideways(
    painter: QPainter, frame: Frame, scene: Scene, outlet: DrawnOutlet, linked: bool, theme: Theme
) -> None:
    """Paint the opening and the true parabola down to the ground; from under a bank the way out comes first."""
    (wall, row), open_at = mouth(frame, scene, outlet)
    tall = max(outlet.height * frame.pixels_per_metre, LEAST_WIDTH)
    inside = theme.colour("liquid" if outlet.flow and (linked or open_at > wall) else "surface")
    painter.fillRect(QRectF(wall - 0.5, row - 0.5 * tall, WALL + 1.5, tall), inside)
    if open_at > wall:
        painter.fillRect(QRectF(wall, row - 0.5 * tall, open_at - wall, tall), inside)
        for side in (row - 0.5 * tall, row + 0.5 * tall):
            level_line(painter, wall + WALL, open_at, side, pen(theme.colour("edge"), 1.0))
    if linked or outlet.flow <= 0.0 or outlet.head <= 0.0:
        return
    fall = np.linspace(0.0, 1.0, 40) ** 2 * outlet.elevation
    reach = 2.0 * JET_VELOCITY_COEFFICIENT * np.sqrt(outlet.head * fall)
    rows = row + fall * frame.pixels_per_metre
    painter.save()
    if outlet.tail is not None:
        painter.setClipRect(QRectF(open_at - 2.0, 0.0, _DROWNED_JET, frame.bottom))
    shape = ribbon(open_at + reach * frame.pixels_per_metre, rows, max(0.8 * tall, LEAST_WIDTH))
    fill(painter, shape, theme.colour("accent"))
    painter.restore()


def label_box(frame: Frame, place: float) -> QRectF:
    """Return the strip about a downward jet in which its size can be pointed at."""
    return QRectF(place - 70.0, frame.bottom + 6.0, 140.0, JET)
