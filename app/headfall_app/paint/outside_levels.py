"""Levels outside the vessel on the one level axis: where pipes end, the water outside, a receiving vessel's surface."""

from __future__ import annotations

from dataclasses import dataclass

from PySide6.QtCore import QPointF
from PySide6.QtGui import QPainter

from headfall_app.paint import lettering
from headfall_app.paint.fonts import text_width
from headfall_app.paint.layout import Frame
from headfall_app.paint.pipe_run import pipe_run, pit_box, receiver_box
from headfall_app.paint.scene import Scene
from headfall_app.paint.strokes import level_line, pen
from headfall_app.paint.theme import Theme

_KEEP = 12
"""Rows between two numbers at the staff."""


@dataclass(frozen=True, slots=True)
class OutsideLevel:
    """A level [m] whose line begins at ``left`` [px] and whose number stands at the staff; ``role`` is its colour."""

    level: float
    left: float
    text: str
    role: str


def outside_levels(frame: Frame, scene: Scene) -> tuple[OutsideLevel, ...]:
    """Return the levels outside that are not lines of the vessel already, those of the water first."""
    found: list[OutsideLevel] = []
    if scene.receiver is not None:
        found.append(_level(scene, scene.receiver.level, receiver_box(frame, scene).right(), "accent"))
    for index, outlet in enumerate(scene.outlets):
        box = pit_box(frame, scene, outlet)
        if outlet.tail is not None and not box.isNull():
            found.append(_level(scene, outlet.tail, box.right(), "accent"))
        if outlet.discharge is not None and abs(outlet.discharge - outlet.elevation) > 1e-9:
            run = pipe_run(frame, scene, outlet)
            received = receiver_box(frame, scene).right() + 3.0 if index == 0 and scene.receiver is not None else 0.0
            right = max(run.end[0] + 4.0, box.right(), received, run.corners[-2][0] + 10.0)
            found.append(_level(scene, outlet.discharge, right, "muted"))
    lines = [frame.row(mark.level) for mark in scene.marks if mark.key != "now"]
    kept: list[OutsideLevel] = []
    for one in found:
        row = frame.row(one.level)
        if all(abs(row - line) >= _KEEP for line in (*lines, *(frame.row(other.level) for other in kept))):
            kept.append(one)
    return tuple(kept)


def _level(scene: Scene, level: float, left: float, role: str) -> OutsideLevel:
    return OutsideLevel(level, left, scene.display.number(level, "level"), role)


def paint_outside_levels(painter: QPainter, frame: Frame, scene: Scene, theme: Theme) -> None:
    """Lead each level outside to the staff, and write its number there."""
    for one in outside_levels(frame, scene):
        row = frame.row(one.level)
        number = frame.staff_left - 7.0 - text_width(one.text, 11)
        dotted = pen(theme.colour(one.role), 1.0, "centre")
        level_line(painter, min(one.left + 3.0, number - 8.0), number - 5.0, row, dotted)
        at = QPointF(frame.staff_left - 7.0, float(row))
        lettering.write(painter, at, one.text, theme.colour(one.role), 11, align=lettering.RIGHT)
