"""Level lines: one line a level, from left of the vessel to the end of the plot."""

from __future__ import annotations

from PySide6.QtGui import QPainter

from headfall_app.paint.layout import Frame
from headfall_app.paint.scene import Scene
from headfall_app.paint.strokes import level_line, pen
from headfall_app.paint.theme import Theme

STYLES: dict[str, tuple[str, float, str]] = {
    "overflow": ("limit", 1.4, "overflow"),
    "start": ("ink", 1.0, ""),
    "stop": ("ink", 1.4, "stop"),
    "settles": ("accent", 1.0, "settles"),
    "outlet": ("muted", 1.0, "centre"),
    "now": ("accent", 1.0, ""),
}
"""Role, width [px] and dash of each level's line."""


def paint_section_levels(painter: QPainter, frame: Frame, scene: Scene, theme: Theme) -> None:
    """Paint the lines from left of the vessel to the staff."""
    for mark in reversed(scene.marks):
        if mark.key != "now":
            role, width, dash = STYLES[mark.key]
            row = frame.row(mark.level)
            level_line(painter, frame.lines_left, frame.staff_left, row, pen(theme.colour(role), width, dash))


def paint_plot_levels(painter: QPainter, frame: Frame, scene: Scene, theme: Theme) -> None:
    """Paint the same lines from the flags to the end of the plot."""
    if frame.plot is None:
        return
    for mark in reversed(scene.marks):
        if mark.key != "now":
            role, width, dash = STYLES[mark.key]
            row = frame.row(mark.level)
            level_line(painter, frame.flags_right, frame.plot[2], row, pen(theme.colour(role), width, dash))
