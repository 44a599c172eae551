"""Texts set on a drawing."""

from __future__ import annotations

from PySide6.QtCore import QPointF, QRectF, Qt
from PySide6.QtGui import QColor, QPainter

from headfall_app.paint.fonts import cap_height, font, metrics, text_width

LEFT, CENTRE, RIGHT = 0.0, 0.5, 1.0


def text_box(at: QPointF, text: str, nominal: int = 12, weight: int = 400, align: float = LEFT) -> QRectF:
    """Return the box a text takes whose middle height is at a point."""
    width = text_width(text, nominal, weight)
    height = cap_height(nominal, weight) + 8.0
    return QRectF(at.x() - align * width, at.y() - 0.5 * height, width, height)


def write(
    painter: QPainter,
    at: QPointF,
    text: str,
    colour: QColor,
    nominal: int = 12,
    weight: int = 400,
    align: float = LEFT,
    plate: QColor | None = None,
) -> QRectF:
    """Write a text whose capitals' middle is at a point, on a plate where one is given; return its box."""
    box = text_box(at, text, nominal, weight, align)
    if plate is not None:
        painter.fillRect(box.adjusted(-4.0, -1.0, 4.0, 1.0), plate)
    painter.setFont(font(nominal, weight))
    painter.setPen(colour)
    baseline = at.y() + 0.5 * cap_height(nominal, weight)
    painter.drawText(QPointF(box.left(), baseline), text)
    return box


def elided(text: str, width: float, nominal: int = 12, weight: int = 400) -> str:
    """Return a text, cut short with an ellipsis where it is wider than it may be."""
    if text_width(text, nominal, weight) <= width:
        return text
    return metrics(nominal, weight).elidedText(text, Qt.TextElideMode.ElideRight, max(width, 0.0))
