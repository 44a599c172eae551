"""Water outside, a receiving vessel, the lid with its gas, and what takes space inside."""

from __future__ import annotations

import numpy as np
from PySide6.QtCore import QLineF, QPointF, QRectF, Qt
from PySide6.QtGui import QPainter

from headfall_app.paint import lettering
from headfall_app.paint.layout import JET, STAFF_NUMBERS, Frame
from headfall_app.paint.outline_geometry import outlet_across, surface_span
from headfall_app.paint.scene import Scene
from headfall_app.paint.scene_outlets import DrawnOutlet
from headfall_app.paint.section import WALL, wall_shape
from headfall_app.paint.strokes import fill, level_line, pen, plumb_line, polygon
from headfall_app.paint.theme import Theme
from headfall_app.paint.waterways import pipe_run

_PIT, _DEPTH = 34.0, 26.0


def paint_bodies(painter: QPainter, frame: Frame, scene: Scene, theme: Theme) -> None:
    """Hatch what takes space inside, with its volume."""
    for body in scene.bodies:
        top, bottom = frame.y(body.high), frame.y(body.low)
        painter.save()
        painter.setClipRect(QRectF(frame.across.left, top, frame.across.right - frame.across.left, bottom - top))
        painter.setPen(pen(theme.colour("edge"), 1.0))
        shape = wall_shape(frame, scene).boundingRect()
        tall = bottom - top
        lines = [QLineF(x, bottom, x + tall, top) for x in np.arange(shape.left() - tall, shape.right(), 14.0)]
        painter.drawLines(lines)
        painter.restore()
        span = surface_span(scene.outline, 0.5 * (body.low + body.high))
        if span is not None and tall > 12.0:
            at = QPointF(frame.across.x(0.5 * (span[0] + span[1])), 0.5 * (top + bottom))
            ink, plate = theme.colour("ink"), theme.colour("surface")
            lettering.write(painter, at, body.text, ink, 11, align=lettering.CENTRE, plate=plate)


def paint_tailwater(painter: QPainter, frame: Frame, scene: Scene, outlet: DrawnOutlet, theme: Theme) -> None:
    """Paint the water that an outlet discharges into: a pit at a pipe's end, else beside the vessel."""
    if outlet.tail is None or scene.receiver is not None:
        return
    row = frame.y(outlet.tail)
    if outlet.facing in ("pipe", "standpipe"):
        x, y = pipe_run(frame, scene, outlet).end
        left, right, foot = x - _PIT, x + _PIT, max(y + _DEPTH, row + 8.0)
    else:
        left = frame.across.right + WALL + 2.0
        right = min(frame.across.right + 70.0, frame.staff_left - STAFF_NUMBERS)
        foot = max(frame.bottom + _DEPTH, row + 8.0)
    painter.fillRect(QRectF(left, row, right - left, foot - row), theme.colour("liquid"))
    wall = pen(theme.colour("edge"), 1.0)
    for column in (left, right):
        plumb_line(painter, column, row - 10.0, foot, wall)
    level_line(painter, left, right, foot, wall)
    level_line(painter, left, right, row, pen(theme.colour("accent"), 2.0))


def receiver_box(frame: Frame, scene: Scene) -> QRectF:
    """Return where the receiving vessel is drawn: to scale upwards, squeezed across where it is wide."""
    receiver = scene.receiver
    if receiver is None:
        return QRectF()
    wall = receiver.outline.wall
    wide = float(wall[:, 0].max() - wall[:, 0].min()) * frame.pixels_per_metre
    room = max(frame.staff_left - STAFF_NUMBERS - 6.0 - frame.across.right - 58.0, 30.0)
    top, bottom = frame.y(receiver.elevation + receiver.height), frame.y(receiver.elevation)
    return QRectF(frame.across.right + 52.0, top, min(wide, room), bottom - top)


def paint_receiver(painter: QPainter, frame: Frame, scene: Scene, theme: Theme) -> None:
    """Paint the receiving vessel with its liquid and its level."""
    receiver = scene.receiver
    if receiver is None:
        return
    box, wall = receiver_box(frame, scene), receiver.outline.wall
    low, high = float(wall[:, 0].min()), float(wall[:, 0].max())
    x = box.left() + (wall[:, 0] - low) / (high - low) * box.width()
    shape = polygon(x, box.bottom() - wall[:, 1] * frame.pixels_per_metre)
    drawn = pen(theme.colour("wall"), 2.0 * WALL)
    drawn.setJoinStyle(Qt.PenJoinStyle.MiterJoin)
    painter.setPen(drawn)
    painter.drawPolyline(shape)
    fill(painter, shape, theme.colour("surface"))
    row = frame.y(receiver.level)
    painter.save()
    painter.setClipRect(QRectF(box.left() - 1.0, row, box.width() + 2.0, box.bottom() + 1.0 - row))
    fill(painter, shape, theme.colour("liquid"))
    painter.restore()
    level_line(painter, box.left(), box.right(), row, pen(theme.colour("accent"), 2.0))
    _paint_link(painter, frame, scene, box, theme)
    at = QPointF(box.center().x(), box.bottom() + 14.0)
    lettering.write(painter, at, receiver.text, theme.colour("ink"), 11, align=lettering.CENTRE)


def _paint_link(painter: QPainter, frame: Frame, scene: Scene, box: QRectF, theme: Theme) -> None:
    """Lead from an opening to the receiving vessel by a dashed line: its true way is not part of the case."""
    outlet = scene.outlets[0]
    if outlet.facing in ("pipe", "standpipe"):
        return
    drawn = pen(theme.colour("accent"), 1.5, "stop")
    side = outlet.facing != "down"
    x = frame.across.right + WALL if side else frame.across.x(outlet_across(scene.outline, outlet.station))
    row = frame.y(outlet.elevation) if side else frame.bottom + JET + 4.0
    entry = min(max(row, box.top() + 6.0), box.bottom() - 6.0)
    bend = box.left() - 14.0
    level_line(painter, x, bend, row, drawn)
    plumb_line(painter, bend, min(row, entry), max(row, entry), drawn)
    level_line(painter, bend, box.left() - WALL, entry, drawn)


def paint_lid(painter: QPainter, frame: Frame, scene: Scene, theme: Theme) -> None:
    """Paint the lid, its vent, and the pressure of the gas under it."""
    lid = scene.lid
    if lid is None:
        return
    span = surface_span(scene.outline, scene.height) or (0.0, 1.0)
    left, right = frame.across.x(span[0]), frame.across.x(span[1])
    wall = theme.colour("wall")
    if not scene.outline.closed:
        painter.fillRect(QRectF(left - 2.0 * WALL, frame.top - WALL, right - left + 4.0 * WALL, WALL), wall)
    middle = left + 0.78 * (right - left) if right - left > 30.0 else 0.5 * (left + right)
    if lid.vent:
        for column in (middle - 4.0, middle + 4.0):
            plumb_line(painter, column, frame.top - WALL - 15.0, frame.top - WALL, pen(wall, 2.0))
        at = QPointF(middle + 10.0, frame.top - WALL - 10.0)
        lettering.write(painter, at, lid.vent, theme.colour("ink"), 11, plate=theme.colour("surface"))
    if frame.row(scene.surface) - frame.top > 22.0:
        at = QPointF(0.5 * (frame.across.left + frame.across.right), frame.top + 13.0)
        plate = theme.colour("surface")
        lettering.write(painter, at, lid.text, theme.colour("ink"), 11, align=lettering.CENTRE, plate=plate)
