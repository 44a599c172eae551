"""The program's icon: a staff, and a level that holds and then falls from a rust point."""

from __future__ import annotations

from PySide6.QtCore import QPointF, QRectF, Qt
from PySide6.QtGui import QColor, QIcon, QPainter, QPainterPath, QPen, QPixmap

_GROUND, _LIGHT, _LIQUID, _LIMIT = QColor("#0A6070"), QColor("#FDFCF9"), QColor("#B9DCE0"), QColor("#A23A12")
_SIZES = (16, 20, 24, 32, 48, 64, 128, 256)
_SMALL = 24


def icon() -> QIcon:
    """Return the icon in all sizes."""
    made = QIcon()
    for size in _SIZES:
        made.addPixmap(icon_picture(size))
    return made


def icon_picture(size: int) -> QPixmap:
    """Return the icon at one size [px]; up to 24 px it is drawn on the pixel grid, without what would blur."""
    picture = QPixmap(size, size)
    picture.fill(Qt.GlobalColor.transparent)
    painter = QPainter(picture)
    painter.setRenderHint(QPainter.RenderHint.Antialiasing)
    painter.setPen(Qt.PenStyle.NoPen)
    painter.setBrush(_GROUND)
    painter.drawRoundedRect(QRectF(0, 0, size, size), size * 0.16, size * 0.16)
    (_paint_small if size <= _SMALL else _paint_large)(painter, size)
    painter.end()
    return picture


def _falling_level(left: float, top: float, holds_to: float, right: float, bottom: float) -> QPainterPath:
    path = QPainterPath(QPointF(left, top))
    path.lineTo(holds_to, top)
    path.cubicTo(
        holds_to + (right - holds_to) * 0.12,
        top + (bottom - top) * 0.6,
        holds_to + (right - holds_to) * 0.5,
        bottom - (bottom - top) * 0.06,
        right,
        bottom,
    )
    return path


def _paint_large(painter: QPainter, size: int) -> None:
    painter.scale(size / 100, size / 100)
    staff = QRectF(15, 16, 11, 68)
    painter.fillRect(staff, _LIGHT)
    for step in range(4):
        painter.fillRect(QRectF(18, 16 + 8.5 + step * 17, 5, 8.5), _GROUND)
    level = _falling_level(34, 30, 48, 88, 76)
    liquid = QPainterPath(level)
    liquid.lineTo(88, 84)
    liquid.lineTo(34, 84)
    liquid.closeSubpath()
    painter.fillPath(liquid, _LIQUID)
    painter.strokePath(level, QPen(_LIGHT, 6, Qt.PenStyle.SolidLine, Qt.PenCapStyle.RoundCap))
    painter.setPen(QPen(_LIGHT, 4))
    painter.setBrush(_LIMIT)
    painter.drawEllipse(QPointF(48, 30), 7.5, 7.5)


def _paint_small(painter: QPainter, size: int) -> None:
    pixel = size / 16
    painter.scale(pixel, pixel)
    for row in range(3, 13, 2):
        painter.fillRect(QRectF(2, row, 2, 1), _LIGHT)
    level = _falling_level(6, 4.5, 8, 14, 12)
    liquid = QPainterPath(level)
    liquid.lineTo(14, 13)
    liquid.lineTo(6, 13)
    liquid.closeSubpath()
    painter.fillPath(liquid, _LIQUID)
    painter.strokePath(level, QPen(_LIGHT, 1.2))
    painter.setBrush(QColor("#F29A78"))
    painter.drawEllipse(QPointF(8, 4.5), 1.6, 1.6)
