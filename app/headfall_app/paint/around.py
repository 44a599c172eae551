"""Water outside, a receiving vessel, the lid with its gas, and what takes space inside."""

from __future__ import annotations

import numpy as np
from PySide6.QtCore import QLineF, QPointF, QRectF, Qt
from PySide6.QtGui import QPainter, QPainterPath

from headfall_app.paint import lettering
from headfall_app.paint.fonts import text_width
from headfall_app.paint.kept import Kept, paint_kept, vessel_box, vessel_key
from headfall_app.paint.layout import Frame
from headfall_app.paint.outline_geometry import extent, roof_over, surface_span, top_span
from headfall_app.paint.pipe_run import outside_text, pipe_run, pit_box, receiver_box, receiver_x
from headfall_app.paint.scene import Scene
from headfall_app.paint.scene_around import DrawnBody
from headfall_app.paint.scene_outlets import DrawnOutlet
from headfall_app.paint.section import WALL, wall_shape
from headfall_app.paint.strokes import fill, level_line, pen, plumb_line, polygon
from headfall_app.paint.theme import Theme

_HATCH = 9.0
_NECK, _NECK_RISE = 9.0, 13.0


def paint_bodies(painter: QPainter, frame: Frame, scene: Scene, theme: Theme, kept: Kept | None = None) -> None:
    """Hatch what takes space inside between its levels."""
    if not scene.bodies:
        return

    def hatched(on: QPainter) -> None:
        for body in scene.bodies:
            _paint_hatch(on, frame, scene, body, theme)

    key = (vessel_key(frame, scene, theme), scene.bodies)
    paint_kept(kept, painter, "bodies", key, vessel_box(frame, 2), hatched)


def _paint_hatch(painter: QPainter, frame: Frame, scene: Scene, body: DrawnBody, theme: Theme) -> None:
    top, bottom = frame.y(body.high), frame.y(body.low)
    left, right = frame.across.left, frame.across.right
    inside = QPainterPath()
    inside.addPolygon(wall_shape(frame, scene))
    inside.closeSubpath()
    band = QPainterPath()
    band.addRect(QRectF(left, top, right - left, bottom - top))
    painter.save()
    painter.setClipPath(inside.intersected(band))
    painter.setPen(pen(theme.mixed("edge", "surface", 0.75), 1.0))
    tall = bottom - top
    painter.drawLines([QLineF(x, bottom, x + tall, top) for x in np.arange(left - tall, right, _HATCH)])
    painter.restore()
    for level in (body.low, body.high):
        span = surface_span(scene.outline, level)
        if span is not None:
            drawn = pen(theme.colour("edge"), 1.0)
            level_line(painter, frame.across.x(span[0]), frame.across.x(span[1]), frame.y(level), drawn)


def paint_body_words(painter: QPainter, frame: Frame, scene: Scene, theme: Theme) -> None:
    """Write how much each takes, over every line of the section."""
    for body in scene.bodies:
        top, bottom = frame.y(body.high), frame.y(body.low)
        span = surface_span(scene.outline, 0.5 * (body.low + body.high))
        if span is None or bottom - top < 14.0:
            continue
        at = QPointF(frame.across.x(span[0] + 0.5 * (span[1] - span[0])), 0.5 * (top + bottom))
        ink, plate = theme.colour("ink"), theme.colour("surface")
        lettering.write(painter, at, body.text, ink, 11, align=lettering.CENTRE, plate=plate)


def paint_tailwater(painter: QPainter, frame: Frame, scene: Scene, outlet: DrawnOutlet, theme: Theme) -> None:
    """Paint the water that an outlet discharges into: a pit at a pipe's end, else beside the vessel."""
    box = pit_box(frame, scene, outlet)
    if box.isNull():
        return
    painter.fillRect(box, theme.colour("liquid"))
    wall = pen(theme.colour("edge"), 1.0)
    for column in (box.left(), box.right()):
        plumb_line(painter, column, box.top() - 10.0, box.bottom(), wall)
    level_line(painter, box.left(), box.right(), box.bottom(), wall)
    level_line(painter, box.left(), box.right(), box.top(), pen(theme.colour("accent"), 2.0))
    ink = theme.colour("ink")
    at, text = _outside_place(frame, scene, outlet, box)
    plate = theme.colour("surface")
    lettering.write(painter, at, text, ink, 11, align=lettering.CENTRE, plate=plate)


def _outside_place(frame: Frame, scene: Scene, outlet: DrawnOutlet, box: QRectF) -> tuple[QPointF, str]:
    """Return where the level of the water outside stands: under it; short, beside a pipe that rises to it."""
    text = outside_text(scene, outlet)
    run = pipe_run(frame, scene, outlet) if outlet.is_pipe else None
    if run is None or run.end[1] >= run.corners[0][1]:
        return _under(frame, box, text), text
    # Between leg and text stands the dimension of the rise.
    text = text.partition(" ")[2]
    at = _under(frame, box, text)
    at.setX(max(at.x(), run.corners[-2][0] + 0.5 * max(run.bores) + 32.0 + 0.5 * text_width(text, 11)))
    return at, text


def _under(frame: Frame, box: QRectF, text: str) -> QPointF:
    """Return where a text stands under a box, kept left of the staff."""
    half = 0.5 * text_width(text, 11)
    return QPointF(min(box.center().x(), frame.staff_left - 8.0 - half), box.bottom() + 14.0)


def receiver_texts(frame: Frame, scene: Scene) -> list[tuple[QPointF, str]]:
    """Return the lines under the receiving vessel: its level, and whether it is squeezed across."""
    receiver = scene.receiver
    if receiver is None:
        return []
    box, (low, high) = receiver_box(frame, scene), extent(receiver.outline)
    texts = [receiver.text]
    if box.width() < (high - low) * frame.pixels_per_metre - 1.0:
        texts.append("width not to scale")
    return [
        (QPointF(_under(frame, box, text).x(), box.bottom() + 15.0 + 15.0 * index), text)
        for index, text in enumerate(texts)
    ]


def outside_words(frame: Frame, scene: Scene) -> list[QRectF]:
    """Return where the words of what is outside stand."""
    words = list(receiver_texts(frame, scene))
    for outlet in scene.outlets:
        box = pit_box(frame, scene, outlet)
        if not box.isNull():
            words.append(_outside_place(frame, scene, outlet, box))
    return [lettering.text_box(at, text, 11, 400, lettering.CENTRE) for at, text in words]


def outside_boxes(frame: Frame, scene: Scene) -> list[QRectF]:
    """Return what stands outside on the page with its words."""
    pits = [pit_box(frame, scene, outlet) for outlet in scene.outlets]
    found = [box.adjusted(-3.0, -11.0, 3.0, 2.0) for box in pits if not box.isNull()]
    if scene.receiver is not None:
        found.append(receiver_box(frame, scene).adjusted(-WALL - 2.0, -2.0, WALL + 2.0, WALL + 2.0))
    return found + outside_words(frame, scene)


def paint_receiver(painter: QPainter, frame: Frame, scene: Scene, theme: Theme) -> None:
    """Paint the receiving vessel with its liquid and its level."""
    receiver = scene.receiver
    if receiver is None:
        return
    box, wall = receiver_box(frame, scene), receiver.outline.wall
    low, high = extent(receiver.outline)
    share = box.width() / (high - low)
    shape = polygon(box.left() + (wall[:, 0] - low) * share, box.bottom() - wall[:, 1] * frame.pixels_per_metre)
    drawn = pen(theme.colour("wall"), 2.0 * WALL)
    drawn.setJoinStyle(Qt.PenJoinStyle.MiterJoin)
    painter.setPen(drawn)
    painter.drawPolyline(shape)
    fill(painter, shape, theme.colour("surface"))
    row = frame.row(receiver.level)
    painter.save()
    painter.setClipRect(QRectF(box.left() - 1.0, row, box.width() + 2.0, box.bottom() + 1.0 - row))
    fill(painter, shape, theme.colour("liquid"))
    painter.restore()
    span = surface_span(receiver.outline, receiver.level - receiver.elevation)
    if span is not None and receiver.level > receiver.elevation:
        left, right = (receiver_x(frame, scene, across) for across in span)
        painter.fillRect(QRectF(left, row - 1.0, right - left, 2.0), theme.colour("accent"))
    for at, text in receiver_texts(frame, scene):
        ink = theme.colour("ink" if text == receiver.text else "muted")
        lettering.write(painter, at, text, ink, 11, align=lettering.CENTRE, plate=theme.colour("surface"))


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
    if lid.vent:
        place, row = _vent_place(frame, scene, left, right)
        _paint_goose_neck(painter, place, row, theme)
        at = QPointF(place + _NECK + 9.0, row - WALL - 10.0)
        lettering.write(painter, at, lid.vent, theme.colour("ink"), 11, plate=theme.colour("surface"))
    at, ink = _pressure_place(frame, scene), theme.colour("ink")
    lettering.write(painter, at, lid.text, ink, 11, align=lettering.CENTRE, plate=theme.colour("surface"))


def _pressure_place(frame: Frame, scene: Scene) -> QPointF:
    """Return where the gas's pressure stands: under the lid clear of the level lines; over a vessel that is full."""
    lines = [frame.row(mark.level) for mark in scene.marks if mark.key != "now"]
    foot = frame.row(scene.surface_high) - 10.0
    rows = [row for row in np.arange(frame.top + 13.0, max(foot, frame.top), 2.0) if row < foot]
    clear = [row for row in rows if all(abs(row - line) > 10.0 for line in lines)]
    row = (clear or rows or [frame.top - WALL - 11.0])[0]
    return QPointF(0.5 * (frame.across.left + frame.across.right), float(row))


def _vent_place(frame: Frame, scene: Scene, left: float, right: float) -> tuple[float, float]:
    """Return where the vent stands on the roof."""
    if scene.outline.closed:
        low, high = top_span(scene.outline)
        left, right = frame.across.x(low), frame.across.x(high)
    place = left + 0.78 * (right - left) if right - left > 30.0 else 0.5 * (left + right)
    metres, pixels = frame.across.knots
    return place, frame.y(roof_over(scene.outline, float(np.interp(place, pixels, metres))))


def _paint_goose_neck(painter: QPainter, place: float, row: float, theme: Theme) -> None:
    """A pipe that rises from the roof and bends over, so that rain stays out."""
    path = QPainterPath(QPointF(place, row))
    path.lineTo(place, row - _NECK_RISE)
    path.arcTo(QRectF(place, row - _NECK_RISE - 0.5 * _NECK, _NECK, _NECK), 180.0, -180.0)
    path.lineTo(place + _NECK, row - _NECK_RISE + 4.0)
    for role, wide in (("wall", 6.0), ("surface", 3.0)):
        painter.setPen(pen(theme.colour(role), wide))
        painter.drawPath(path)
