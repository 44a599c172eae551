"""The vessel: wall, liquid, surface, axis, tangents, breaks and the stream that flows in."""

from __future__ import annotations

import math

import numpy as np
from PySide6.QtCore import QPointF, QRectF, Qt
from PySide6.QtGui import QColor, QPainter, QPolygonF

from headfall_app.paint import lettering
from headfall_app.paint.dimension_plan import ROW
from headfall_app.paint.layout import Frame
from headfall_app.paint.outline_geometry import extent, floor_under, roof_over, surface_span, top_span
from headfall_app.paint.scene import Scene
from headfall_app.paint.strokes import fill, level_line, pen, plumb_line, points, polygon
from headfall_app.paint.theme import Theme

WALL = 3.0
_WAVE = 4.5


def wall_shape(frame: Frame, scene: Scene) -> QPolygonF:
    """Return the inside wall on the page."""
    wall = scene.outline.wall
    return polygon(frame.across.all_x(wall[:, 0]), frame.bottom - wall[:, 1] * frame.pixels_per_metre)


def paint_vessel(painter: QPainter, frame: Frame, scene: Scene, theme: Theme) -> None:
    """Paint the empty vessel: its inside face stands on the line, the wall outside it."""
    shape = wall_shape(frame, scene)
    drawn = pen(theme.colour("wall"), 2.0 * WALL)
    drawn.setJoinStyle(Qt.PenJoinStyle.MiterJoin)
    painter.setRenderHint(QPainter.RenderHint.Antialiasing, True)
    painter.setPen(drawn)
    beyond: QPolygonF | None = None
    if scene.outline.closed:
        painter.drawPolygon(shape)
    else:
        cut, beyond = _cut_wall(frame, scene)
        painter.drawPolyline(cut)
    fill(painter, shape, theme.colour("surface"))
    if beyond is not None:
        # The wall behind the notch is seen, not cut.
        painter.setPen(pen(theme.colour("edge"), 1.0))
        painter.drawPolyline(beyond)


def _cut_wall(frame: Frame, scene: Scene) -> tuple[QPolygonF, QPolygonF | None]:
    """Return the wall that the section cuts, and the wall behind the notch of a weir in its right side."""
    wall, crest = scene.outline.wall, scene.notch
    if crest is None:
        return wall_shape(frame, scene), None
    below = np.flatnonzero(wall[:, 1] < crest)
    if not len(below) or below[-1] == len(wall) - 1:
        return wall_shape(frame, scene), None
    last = below[-1]
    share = (crest - wall[last, 1]) / (wall[last + 1, 1] - wall[last, 1])
    foot = wall[last] + share * (wall[last + 1] - wall[last])

    def shape(part: np.ndarray) -> QPolygonF:
        return polygon(frame.across.all_x(part[:, 0]), frame.bottom - part[:, 1] * frame.pixels_per_metre)

    return shape(np.vstack((wall[: last + 1], foot))), shape(np.vstack((foot, wall[last + 1 :])))


def paint_liquid(painter: QPainter, frame: Frame, scene: Scene, theme: Theme) -> None:
    """Paint the liquid up to its surface, with a strip where the range of the coefficient puts that."""
    shape = wall_shape(frame, scene)
    row = frame.row(scene.surface)
    _fill_between(painter, frame, shape, row, frame.bottom + 1.0, theme.colour("liquid"))
    upper, lower = frame.row(scene.surface_high), frame.row(scene.surface_low)
    if scene.now is not None and lower - upper > 2:
        _fill_between(painter, frame, shape, upper, row, theme.colour("band"))
        _fill_between(painter, frame, shape, row, lower, theme.mixed("band_edge", "liquid", 0.45))
    span = surface_span(scene.outline, scene.surface)
    if span is not None and scene.surface > 0.0:
        left, right = frame.across.x(span[0]), frame.across.x(span[1])
        painter.fillRect(QRectF(left, row - 1.0, right - left, 2.0), theme.colour("accent"))


def _fill_between(painter: QPainter, frame: Frame, shape: QPolygonF, top: float, bottom: float, colour: QColor) -> None:
    if bottom <= top:
        return
    painter.save()
    box = shape.boundingRect()
    painter.setClipRect(QRectF(box.left() - 1.0, top, box.width() + 2.0, bottom - top), Qt.ClipOperation.IntersectClip)
    fill(painter, shape, colour)
    painter.restore()


def paint_inner_lines(painter: QPainter, frame: Frame, scene: Scene, theme: Theme) -> None:
    """Paint tangent lines, joints, the axis and the breaks where the middle is left out."""
    thin = pen(theme.colour("edge"), 1.0)
    if scene.tilt:
        _paint_tilted(painter, frame, scene, theme)
    for tangent in scene.outline.tangents if not scene.tilt else ():
        plumb_line(painter, frame.across.x(tangent), frame.top, frame.bottom, thin)
    for joint in scene.outline.joints:
        span = surface_span(scene.outline, joint)
        if span is not None:
            level_line(painter, frame.across.x(span[0]), frame.across.x(span[1]), frame.row(joint), thin)
    dashed = pen(theme.colour("edge"), 1.0, "axis")
    left, right = extent(scene.outline)
    if scene.has_axis and scene.outline.axis == "horizontal" and not scene.tilt:
        level_line(painter, frame.across.left - 12.0, frame.across.right + 12.0, frame.row(0.5 * scene.height), dashed)
    elif scene.has_axis and not scene.tilt:
        plumb_line(painter, frame.across.x(0.5 * (left + right)), frame.top - 12.0, frame.bottom + 12.0, dashed)
    for start, end in frame.across.breaks:
        _paint_break(painter, frame, start, end, theme)


def _paint_tilted(painter: QPainter, frame: Frame, scene: Scene, theme: Theme) -> None:
    """The tangent lines and the axis of a drum with a fall."""
    long = math.hypot(1.0, scene.tilt)
    ahead, up = 1.0 / long, scene.tilt / long
    bore = max(math.dist(one.start, one.end) for one in scene.outline.dimensions if one.field == "diameter")

    def at(across: float, level: float) -> QPointF:
        return QPointF(frame.across.x(across), frame.y(level))

    painter.setRenderHint(QPainter.RenderHint.Antialiasing, True)
    painter.setPen(pen(theme.colour("edge"), 1.0))
    middles = []
    for tangent in scene.outline.tangents:
        middle = (tangent, 0.5 * (floor_under(scene.outline, tangent) + roof_over(scene.outline, tangent)))
        middles.append(middle)
        half = 0.5 * bore
        painter.drawLine(
            at(middle[0] + half * up, middle[1] - half * ahead), at(middle[0] - half * up, middle[1] + half * ahead)
        )
    left, right = extent(scene.outline)
    over = 12.0 / frame.pixels_per_metre
    across, level = middles[0]
    painter.setPen(pen(theme.colour("edge"), 1.0, "axis"))
    painter.drawLine(
        at(left - over, level + (left - over - across) * scene.tilt),
        at(right + over, level + (right + over - across) * scene.tilt),
    )


def _paint_break(painter: QPainter, frame: Frame, left: float, right: float, theme: Theme) -> None:
    rows = np.linspace(frame.top - 11.0, frame.bottom + 12.0, 60)
    length = max(min(0.9 * (rows[-1] - rows[0]), 340.0), 40.0)
    wave = _WAVE * np.sin(2.0 * math.pi * (rows - rows[0]) / length)
    fill(
        painter,
        polygon(np.concatenate((left + wave, (right + wave)[::-1])), np.concatenate((rows, rows[::-1]))),
        theme.colour("surface"),
    )
    painter.setPen(pen(theme.colour("wall"), 1.2))
    for side in (left, right):
        painter.drawPolyline(polygon(side + wave, rows))


def stream_place(frame: Frame, scene: Scene) -> float:
    """Return where the inflow enters on the page: in the upper left, clear of a break."""
    start, end = (frame.across.x(place) for place in top_span(scene.outline))
    place = start + 0.36 * (end - start)
    for left, right in frame.across.breaks:
        if left - 26.0 < place < right + 26.0:
            place = left - 26.0
    return place


def paint_stream(painter: QPainter, frame: Frame, scene: Scene, theme: Theme) -> None:
    """Paint the stream that flows in, as wide as its rate, and write the rate beside it."""
    if scene.inflow <= 0.0:
        return
    place = stream_place(frame, scene)
    wide = min(max(3.2 * math.sqrt(scene.inflow * 1000.0), 3.0), 44.0)
    across = _across_of(frame, scene, place)
    roof = frame.y(roof_over(scene.outline, across))
    head = frame.top - 20.0 - ROW * frame.plan.above_count
    foot = min(float(frame.row(scene.surface)) - 1.0, frame.y(floor_under(scene.outline, across)))
    if scene.outline.closed:
        painter.fillRect(
            QRectF(place - 0.5 * wide - 2.0, roof - WALL - 1.0, wide + 4.0, WALL + 2.0), theme.colour("surface")
        )
    if foot > head:
        painter.fillRect(QRectF(place - 0.5 * wide, head, wide, foot - head), theme.colour("liquid"))
        side = pen(theme.colour("accent"), 1.0)
        for column in (place - 0.5 * wide, place + 0.5 * wide - 1.0):
            plumb_line(painter, column, head, foot, side)
    lettering.write(
        painter,
        QPointF(place + 0.5 * wide + 9.0, head + 3.0),
        scene.inflow_text,
        theme.colour("accent"),
        plate=theme.colour("surface"),
    )


def _across_of(frame: Frame, scene: Scene, place: float) -> float:
    metres, pixels = frame.across.knots
    return float(np.interp(place, pixels, metres))


def paint_ground(painter: QPainter, frame: Frame, theme: Theme, left: float, right: float) -> None:
    """Paint the ground line with its strokes."""
    row = frame.bottom + WALL
    level_line(painter, left, right, row, pen(theme.colour("edge"), 1.0))
    painter.setPen(pen(theme.colour("edge"), 1.0))
    column = left + 4.0
    while column < right - 2.0:
        painter.drawPolyline(points([(column + 5.0, row + 1.0), (column, row + 6.0)]))
        column += 9.0
