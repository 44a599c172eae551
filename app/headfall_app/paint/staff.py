"""The levelling staff between drawing and curve."""

from __future__ import annotations

import math

from PySide6.QtCore import QPointF, QRect, QRectF
from PySide6.QtGui import QPainter

from headfall_app.paint import lettering
from headfall_app.paint.fonts import text_width
from headfall_app.paint.kept import Kept, paint_kept
from headfall_app.paint.layout import STAFF, TOP_ZONE, Frame
from headfall_app.paint.outside_levels import outside_levels
from headfall_app.paint.scene import Scene
from headfall_app.paint.strokes import pen
from headfall_app.paint.theme import Theme
from headfall_app.paint.ticks import block_step, mark_text, marks, number_step

TITLE_ROW = TOP_ZONE - 35.0


def staff_numbers(frame: Frame, scene: Scene) -> list[tuple[float, str]]:
    """Return the numbers beside the staff as (level [m], text), those struck by a level line left out."""
    factor = scene.display.factor("level")
    step = number_step(frame.pixels_per_metre * factor)
    lines = [frame.row(mark.level) for mark in scene.marks if mark.key != "now"]
    outside = [frame.row(one.level) for one in outside_levels(frame, scene)]
    numbers = [
        (level, mark_text(level / factor, step)) for level in (*depths(frame, scene), *grid_levels(frame, scene))
    ]
    numbers = [(level, text) for level, text in numbers if all(abs(frame.row(level) - row) >= 13 for row in outside)]
    return [(level, text) for level, text in numbers if all(abs(frame.row(level) - line) >= 8 for line in lines)]


def numbers_left(frame: Frame, scene: Scene) -> float:
    """Return the left side of the staff's numbers, those left out included: the section's words stay left of it."""
    factor = scene.display.factor("level")
    step = number_step(frame.pixels_per_metre * factor)
    texts = [mark_text(level / factor, step) for level in (*depths(frame, scene), *grid_levels(frame, scene))]
    texts += [one.text for one in outside_levels(frame, scene)]
    return frame.staff_left - 7.0 - max(text_width(text, 11) for text in texts)


def depths(frame: Frame, scene: Scene) -> list[float]:
    """Return the staff's numbers below the vessel [m], those left out of the drawing left out."""
    factor = scene.display.factor("level")
    step = number_step(frame.pixels_per_metre * factor)
    low, high = frame.left_out or (0.0, 0.0)
    near = 8.0 / frame.pixels_per_metre
    levels = [value * factor for value in marks(frame.lowest / factor, -step, step)] if frame.lowest < 0.0 else []
    return [level for level in levels if not low - near < level < high + near]


def grid_levels(frame: Frame, scene: Scene) -> list[float]:
    """Return the levels [m] of the plot's grid: those of the staff's numbers, and the top."""
    factor = scene.display.factor("level")
    step = number_step(frame.pixels_per_metre * factor)
    return [value * factor for value in marks(0.0, frame.vessel_height / factor, step)]


def paint_staff(painter: QPainter, frame: Frame, scene: Scene, theme: Theme, kept: Kept | None = None) -> None:
    """Paint the staff's blocks and numbers and the name of its unit."""
    step = block_step(frame.pixels_per_metre * scene.display.factor("level")) * scene.display.factor("level")
    left, top = frame.staff_left, float(frame.row(frame.vessel_height))
    key = (step, frame.pixels_per_metre, frame.bottom, frame.vessel_height, frame.lowest, frame.left_out, theme)
    box = QRect(round(left) - 4, round(top), round(STAFF) + 8, round(frame.y(frame.lowest) + 1.0 - top))

    def blocks(on: QPainter) -> None:
        _paint_blocks(on, frame, step, theme)

    paint_kept(kept, painter, "staff", key, box, blocks)
    for level, text in staff_numbers(frame, scene):
        row = max(float(frame.row(level)), top)
        lettering.write(painter, QPointF(left - 7.0, row), text, theme.colour("muted"), 11, align=lettering.RIGHT)
    name = f"Level, {scene.display.unit('level')}"
    at = QPointF(left + STAFF, TITLE_ROW + frame.origin)
    lettering.write(painter, at, name, theme.colour("muted"), 11, align=lettering.RIGHT)


def _paint_blocks(painter: QPainter, frame: Frame, step: float, theme: Theme) -> None:
    height, low, left_out = frame.vessel_height, frame.lowest, frame.left_out
    _paint_stretch(painter, frame, (0.0, height), step, theme, "wall")
    if low >= 0.0:
        return
    if left_out is None:
        _paint_stretch(painter, frame, (low, 0.0), step, theme, "edge")
        return
    for stretch in ((left_out[1], 0.0), (low, left_out[0])):
        _paint_stretch(painter, frame, stretch, step, theme, "edge")
    painter.setPen(pen(theme.colour("wall"), 1.2))
    for row in (frame.y(left_out[1]), frame.y(left_out[0])):
        painter.drawLine(QPointF(frame.staff_left - 3.0, row + 2.5), QPointF(frame.staff_left + STAFF + 3.0, row - 2.5))


def _paint_stretch(
    painter: QPainter, frame: Frame, ends: tuple[float, float], step: float, theme: Theme, role: str
) -> None:
    """Paint the blocks from one level to a higher one; every other block is blank, counted from level nil."""
    left, (low, high) = frame.staff_left, ends
    top, foot = float(frame.row(high)), float(frame.row(low))
    painter.fillRect(QRectF(left, top, STAFF, foot + 1.0 - top), theme.colour(role))
    for index in range(math.floor(low / step + 1e-9), math.ceil(high / step - 1e-9)):
        if index % 2:
            lower, upper = float(frame.row(max(index * step, low))), float(frame.row(min((index + 1) * step, high)))
            blank = QRectF(left + 1.0, upper + 1.0, STAFF - 2.0, lower - upper - 1.0)
            painter.fillRect(blank, theme.colour("surface"))
