"""Dimension lines: a thin line, strokes at 45 degrees, witness lines and the text as typed in a gap."""

from __future__ import annotations

from collections.abc import Iterator

from PySide6.QtCore import QLineF, QPointF, QRectF
from PySide6.QtGui import QPainter

from headfall_app.paint import lettering
from headfall_app.paint.dimension_plan import COLUMN, ROW
from headfall_app.paint.fonts import text_width
from headfall_app.paint.jets import landing
from headfall_app.paint.layout import Frame
from headfall_app.paint.outline_geometry import surface_span
from headfall_app.paint.scene import Scene
from headfall_app.paint.scene_dimensions import SizeLine
from headfall_app.paint.strokes import level_line, pen, plumb_line
from headfall_app.paint.theme import Theme

_CLEARANCE = 5.0
_STROKE = 3.5
_OVERSHOOT = 4.0


def dimension_boxes(frame: Frame, scene: Scene) -> Iterator[tuple[SizeLine, QRectF]]:
    """Give each dimension with the strip in which it can be pointed at."""
    for size, column in frame.plan.columns:
        place = frame.across.left - 26.0 - COLUMN * column
        upper, lower = sorted((frame.y(size.start[1]), frame.y(size.end[1])))
        yield size, QRectF(place - 10.0, upper, 20.0, lower - upper)
    for row_of, entries in ((below_row, frame.plan.below), (above_row, frame.plan.above)):
        for size, index in entries:
            y = row_of(frame, index)
            left, right = sorted((frame.across.x(size.start[0]), frame.across.x(size.end[0])))
            yield size, QRectF(left, y - 10.0, right - left, 20.0)


def below_row(frame: Frame, index: int) -> float:
    """Return the height of a row of dimensions below the vessel."""
    return frame.bottom + frame.first_row + ROW * index


def above_row(frame: Frame, index: int) -> float:
    """Return the height of a row of dimensions above the vessel."""
    return float(round(frame.top)) - 16.0 - ROW * index


def paint_dimensions(painter: QPainter, frame: Frame, scene: Scene, theme: Theme) -> None:
    """Paint the vessel's dimension lines and the reach of a sideways jet."""
    for size, column in frame.plan.columns:
        _vertical(painter, frame, scene, size, frame.across.left - 26.0 - COLUMN * column, theme)
    for size, index in frame.plan.below:
        _horizontal(painter, frame, scene, size, below_row(frame, index), theme)
    for size, index in frame.plan.above:
        _horizontal(painter, frame, scene, size, above_row(frame, index), theme)
    reach = landing(frame, scene)
    if reach is not None and reach[1] - reach[0] > 14.0:
        row = below_row(frame, 0)
        witness = pen(theme.colour("edge"), 0.8)
        for end in reach[:2]:
            plumb_line(painter, end, frame.bottom + 9.0, row + _OVERSHOOT, witness)
        _line_with_text(painter, reach[:2], row, reach[2], theme, False, 1.0)


def _vertical(painter: QPainter, frame: Frame, scene: Scene, size: SizeLine, place: float, theme: Theme) -> None:
    place = float(round(place))
    low, high = sorted((size.start, size.end), key=lambda point: point[1])
    witness = pen(theme.colour("edge"), 0.8)
    for across, up in (low, high):
        span = surface_span(scene.outline, up)
        foot = frame.across.x(min(across, span[0]) if span else across)
        level_line(painter, place - _OVERSHOOT, foot - _CLEARANCE, frame.row(up), witness)
    painter.save()
    painter.translate(place, 0.0)
    painter.rotate(-90.0)
    ends = (-float(frame.row(low[1])), -float(frame.row(high[1])))
    outwards = -1.0 if low[1] + high[1] < scene.height else 1.0
    _line_with_text(painter, ends, 0.0, size.text, theme, size.lit, outwards)
    painter.restore()


def _horizontal(painter: QPainter, frame: Frame, scene: Scene, size: SizeLine, row: float, theme: Theme) -> None:
    witness = pen(theme.colour("edge"), 0.8)
    side = 1.0 if row > frame.bottom else -1.0
    for across, up in (size.start, size.end):
        column = frame.across.x(across)
        plumb_line(painter, column, frame.y(up) + side * (_CLEARANCE + 3.0), row + side * _OVERSHOOT, witness)
    left, right = sorted((frame.across.x(size.start[0]), frame.across.x(size.end[0])))
    outwards = -1.0 if left + right < frame.across.left + frame.across.right - 1.0 else 1.0
    _line_with_text(painter, (left, right), row, shown_text(frame, scene, size), theme, size.lit, outwards)


def shown_text(frame: Frame, scene: Scene, size: SizeLine) -> str:
    """Return a size's text, with what is left out where the line runs over a break."""
    left, right = sorted((size.start[0], size.end[0]))
    out = sum(
        after[0] - before[1]
        for before, after in zip(frame.across.stretches[:-1], frame.across.stretches[1:], strict=True)
        if left <= before[1] and right >= after[0]
    )
    return f"{size.text}, {scene.display.text(out, 'length')} left out" if out > 0.0 else size.text


def _line_with_text(
    painter: QPainter, ends: tuple[float, float], row: float, text: str, theme: Theme, lit: bool, outwards: float
) -> None:
    """Draw the line with its text in a gap, or past the outer end where the gap would leave no line."""
    colour = theme.colour("accent" if lit else "muted")
    weight = 600 if lit else 400
    width = 1.6 if lit else 1.0
    left, right = round(ends[0]), round(ends[1])
    wide = text_width(text, 12, weight) + 12.0
    inside = wide <= right - left - 12.0
    middle = 0.5 * (left + right)
    drawn = pen(colour, width)
    if inside:
        level_line(painter, left, middle - 0.5 * wide, row, drawn)
        level_line(painter, middle + 0.5 * wide, right, row, drawn)
    else:
        level_line(painter, left, right, row, drawn)
    painter.setPen(pen(colour, width if lit else 1.2))
    for end in (left, right):
        painter.drawLine(QLineF(end - _STROKE, row + _STROKE, end + _STROKE, row - _STROKE))
    if inside:
        at, align = QPointF(middle, row), lettering.CENTRE
    elif outwards > 0.0:
        at, align = QPointF(right + 9.0, row), lettering.LEFT
    else:
        at, align = QPointF(left - 9.0, row), lettering.RIGHT
    ink = theme.colour("accent" if lit else "ink")
    lettering.write(painter, at, text, ink, 12, weight, align, plate=theme.colour("surface"))
