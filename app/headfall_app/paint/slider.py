"""The inflow slider: track, value, the largest inflow that stays below overflow, and what lies past it."""

from __future__ import annotations

from dataclasses import dataclass

from PySide6.QtCore import QPointF, QRectF, Qt
from PySide6.QtGui import QPainter

from headfall_app.paint import lettering
from headfall_app.paint.fonts import text_width
from headfall_app.paint.strokes import fill, pen, points
from headfall_app.paint.theme import Theme

_TITLE, _TRACK, _FOOT = 12.0, 48.0, 70.0
_INSET = 10.0


@dataclass(frozen=True, slots=True)
class SliderState:
    """A slider's numbers [m³/s] and words; ``mark`` is None where no inflow is the largest."""

    value: float
    end: float
    mark: float | None
    value_text: str
    mark_text: str


def track_x(value: float, end: float, width: float) -> float:
    """Return where an inflow stands on a slider of some width [px]."""
    return _INSET + (width - 2.0 * _INSET) * min(max(value / end, 0.0), 1.0)


def track_value(x: float, end: float, width: float) -> float:
    """Return the inflow [m³/s] at a place on the slider."""
    return min(max((x - _INSET) / max(width - 2.0 * _INSET, 1.0), 0.0), 1.0) * end


def paint_slider(
    painter: QPainter, width: float, state: SliderState, theme: Theme, hovered: bool = False, focused: bool = False
) -> None:
    """Paint the slider into 80 px of height."""
    painter.setRenderHint(QPainter.RenderHint.Antialiasing, True)
    ink, accent, limit = theme.colour("ink"), theme.colour("accent"), theme.colour("limit")
    box = lettering.write(painter, QPointF(2.0, _TITLE), "Inflow", ink, 12, 600)
    lettering.write(painter, QPointF(box.right() + 8.0, _TITLE), state.value_text, accent, 12, 600)
    place = track_x(state.value, state.end, width)
    mark = None if state.mark is None else track_x(state.mark, state.end, width)
    end = width - _INSET
    solid = end if mark is None else mark
    painter.setPen(Qt.PenStyle.NoPen)
    painter.setBrush(theme.colour("hair"))
    painter.drawRoundedRect(QRectF(_INSET, _TRACK - 3.0, solid - _INSET, 6.0), 2.0, 2.0)
    painter.setBrush(accent)
    if place > _INSET + 12.0:
        painter.drawRoundedRect(QRectF(_INSET, _TRACK - 3.0, min(place, solid) - _INSET, 6.0), 2.0, 2.0)
    painter.setBrush(Qt.BrushStyle.NoBrush)
    if mark is not None:
        column = mark + 5.0
        while column < end:
            painter.fillRect(QRectF(round(column), _TRACK - 3.0, 2.0, 6.0), limit)
            column += 5.0
        painter.fillRect(QRectF(round(mark) - 1.0, _TRACK - 11.0, 2.0, 22.0), limit)
    _foot(painter, width, state, theme, mark)
    _handle(painter, place, theme, hovered, focused)


def _foot(painter: QPainter, width: float, state: SliderState, theme: Theme, mark: float | None) -> None:
    nil = lettering.write(painter, QPointF(2.0, _FOOT), "nil", theme.colour("muted"), 11)
    if mark is None or not state.mark_text:
        return
    room = width - nil.right() - 16.0
    text = lettering.elided(state.mark_text, room, 11, 600)
    wide = text_width(text, 11, 600)
    left = min(max(mark - 0.5 * wide, nil.right() + 16.0), width - wide)
    lettering.write(painter, QPointF(left, _FOOT), text, theme.colour("limit"), 11, 600)


def _handle(painter: QPainter, place: float, theme: Theme, hovered: bool, focused: bool) -> None:
    """A small house that points up at the drawing."""
    top, foot, half = _TRACK - 13.0, _TRACK + 10.0, 8.0
    around = points(
        [(place - half, foot), (place - half, top + 8.0), (place, top), (place + half, top + 8.0), (place + half, foot)]
    )
    painter.setPen(pen(theme.colour("surface"), 4.0))
    painter.setBrush(Qt.BrushStyle.NoBrush)
    painter.drawPolygon(around)
    fill(painter, around, theme.colour("ink" if hovered else "accent"))
    if focused:
        painter.setPen(pen(theme.colour("accent"), 2.0))
        painter.drawRoundedRect(QRectF(place - half - 5.0, top - 5.0, 2.0 * half + 10.0, foot - top + 10.0), 3.0, 3.0)
