"""The levelling staff between drawing and curve."""

from __future__ import annotations

from PySide6.QtCore import QPointF, QRect, QRectF
from PySide6.QtGui import QPainter

from headfall_app.paint import lettering
from headfall_app.paint.fonts import text_width
from headfall_app.paint.kept import Kept, paint_kept
from headfall_app.paint.layout import STAFF, TOP_ZONE, Frame
from headfall_app.paint.scene import Scene
from headfall_app.paint.theme import Theme
from headfall_app.paint.ticks import block_step, mark_text, marks, number_step

TITLE_ROW = TOP_ZONE - 35.0


def staff_numbers(frame: Frame, scene: Scene) -> list[tuple[float, str]]:
    """Return the numbers beside the staff as (level [m], text), those struck by a level line left out."""
    factor = scene.display.factor("level")
    step = number_step(frame.pixels_per_metre * factor)
    lines = [frame.row(mark.level) for mark in scene.marks if mark.key != "now"]
    numbers = [(level, mark_text(level / factor, step)) for level in grid_levels(frame, scene)]
    return [(level, text) for level, text in numbers if all(abs(frame.row(level) - line) >= 8 for line in lines)]


def numbers_left(frame: Frame, scene: Scene) -> float:
    """Return the left side of the staff's numbers, those left out included: the section's words stay left of it."""
    factor = scene.display.factor("level")
    step = number_step(frame.pixels_per_metre * factor)
    widest = max(text_width(mark_text(level / factor, step), 11) for level in grid_levels(frame, scene))
    return frame.staff_left - 7.0 - widest


def grid_levels(frame: Frame, scene: Scene) -> list[float]:
    """Return the levels [m] of the plot's grid: those of the staff's numbers, and the top."""
    factor = scene.display.factor("level")
    step = number_step(frame.pixels_per_metre * factor)
    return [value * factor for value in marks(0.0, frame.vessel_height / factor, step)]


def paint_staff(painter: QPainter, frame: Frame, scene: Scene, theme: Theme, kept: Kept | None = None) -> None:
    """Paint the staff's blocks and numbers and the name of its unit."""
    step = block_step(frame.pixels_per_metre * scene.display.factor("level")) * scene.display.factor("level")
    left, top = frame.staff_left, float(frame.row(frame.vessel_height))
    key = (step, frame.pixels_per_metre, frame.bottom, frame.vessel_height, theme)
    box = QRect(round(left), round(top), round(STAFF), round(frame.bottom + 1.0 - top))

    def blocks(on: QPainter) -> None:
        _paint_blocks(on, frame, step, theme)

    paint_kept(kept, painter, "staff", key, box, blocks, theme.colour("surface"))
    for level, text in staff_numbers(frame, scene):
        row = min(max(float(frame.row(level)), top), frame.bottom)
        lettering.write(painter, QPointF(left - 7.0, row), text, theme.colour("muted"), 11, align=lettering.RIGHT)
    name = f"Level, {scene.display.unit('level')}"
    at = QPointF(left + STAFF, TITLE_ROW + frame.origin)
    lettering.write(painter, at, name, theme.colour("muted"), 11, align=lettering.RIGHT)


def _paint_blocks(painter: QPainter, frame: Frame, step: float, theme: Theme) -> None:
    left, top = frame.staff_left, float(frame.row(frame.vessel_height))
    wall = theme.colour("wall")
    painter.fillRect(QRectF(left, top, STAFF, frame.bottom + 1.0 - top), wall)
    level, dark = 0.0, True
    while level < frame.vessel_height * (1.0 - 1e-9):
        above = min(level + step, frame.vessel_height)
        lower, upper = float(frame.row(level)), float(frame.row(above))
        if not dark:
            painter.fillRect(QRectF(left + 1.0, upper + 1.0, STAFF - 2.0, lower - upper - 1.0), theme.colour("surface"))
        level, dark = level + step, not dark
