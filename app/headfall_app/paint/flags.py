"""Flags: each level's name and value beside the staff, with a lead to the true level."""

from __future__ import annotations

from dataclasses import dataclass

from PySide6.QtCore import QLineF, QPointF, QRectF, Qt
from PySide6.QtGui import QPainter

from headfall_app.paint import lettering
from headfall_app.paint.fonts import text_width
from headfall_app.paint.kept import Kept, paint_kept
from headfall_app.paint.layout import STAFF, Frame
from headfall_app.paint.levels import STYLES
from headfall_app.paint.scene import Scene
from headfall_app.paint.scene_levels import LevelMark
from headfall_app.paint.strokes import pen
from headfall_app.paint.theme import Theme

TALL = 19.0
GAP = 2.0


@dataclass(frozen=True, slots=True)
class Flag:
    """One flag on the page."""

    mark: LevelMark
    box: QRectF


def spread(wanted: list[float], pitch: float, low: float, high: float) -> list[float]:
    """Return positions at least ``pitch`` apart and as near as can be to the rising wanted ones, between two ends."""
    groups: list[tuple[float, int]] = []
    for index, place in enumerate(wanted):
        mean, count = place - index * pitch, 1
        while groups and groups[-1][0] > mean:
            before, weight = groups.pop()
            mean, count = (before * weight + mean * count) / (weight + count), weight + count
        groups.append((mean, count))
    flat = [mean for mean, count in groups for _ in range(count)]
    ceiling = high - (len(flat) - 1) * pitch
    return [min(max(place, low), max(ceiling, low)) + index * pitch for index, place in enumerate(flat)]


def placed_flags(frame: Frame, scene: Scene) -> list[Flag]:
    """Return the flags, highest first, pushed apart where they would overlap."""
    rows = [float(frame.row(mark.level)) for mark in scene.marks]
    centres = spread(rows, TALL + GAP, frame.origin + 0.5 * TALL, frame.height - 0.5 * TALL - 1.0)
    return [
        Flag(mark, QRectF(frame.flags_left, round(centre - 0.5 * TALL), frame.flag, TALL))
        for mark, centre in zip(scene.marks, centres, strict=True)
    ]


def paint_flags(
    painter: QPainter,
    frame: Frame,
    scene: Scene,
    theme: Theme,
    hovered: str = "",
    focused: str = "",
    kept: Kept | None = None,
) -> None:
    """Paint the leads and flags; ``hovered`` and ``focused`` are the keys of the flags under pointer and keyboard."""
    flags = placed_flags(frame, scene)
    for flag in flags:
        _lead(painter, frame, flag, theme)
    for flag in flags:
        _flag(painter, flag, theme, flag.mark.path is not None and flag.mark.key == hovered, kept)
        if flag.mark.path is not None and flag.mark.key == focused:
            painter.setPen(pen(theme.colour("accent"), 2.0))
            painter.drawRoundedRect(flag.box.adjusted(-3.0, -3.0, 3.0, 3.0), 4.0, 4.0)


def _lead(painter: QPainter, frame: Frame, flag: Flag, theme: Theme) -> None:
    role = STYLES[flag.mark.key][0]
    row = frame.row(flag.mark.level) + 0.5
    centre = flag.box.center().y()
    level = abs(centre - row) < 2.0
    painter.setRenderHint(QPainter.RenderHint.Antialiasing, not level)
    painter.setPen(pen(theme.colour(role), 1.0))
    end = row if level else centre
    painter.drawLine(
        QLineF(frame.staff_left + STAFF, int(row) if level else row, flag.box.left(), int(end) if level else end)
    )
    painter.setRenderHint(QPainter.RenderHint.Antialiasing, True)


def _flag(painter: QPainter, flag: Flag, theme: Theme, hovered: bool, kept: Kept | None) -> None:
    filled = flag.mark.key == "now"
    role = STYLES[flag.mark.key][0]

    def frame(on: QPainter) -> None:
        _paint_frame(on, flag.box, theme, role, filled, hovered)

    name = f"flag {role} {filled} {hovered}"
    paint_kept(kept, painter, name, theme, flag.box.toAlignedRect(), frame)
    ink = theme.colour("on_accent") if filled else theme.colour("ink" if role == "muted" else role)
    middle = flag.box.center().y()
    weight = 600 if filled else 400
    room = flag.box.width() - 17.0 - text_width(flag.mark.text, 12, 600)
    second = flag.mark.second
    if second and text_width(second, 11) + 8.0 + text_width(flag.mark.name, 11, weight) > room:
        second = ""
    if second:
        room -= text_width(second, 11) + 8.0
    size = 12 if text_width(flag.mark.name, 12, weight) <= room else 11
    called = lettering.elided(flag.mark.name, room, size, weight)
    lettering.write(painter, QPointF(flag.box.left() + 7.0, middle), called, ink, size, weight)
    at = QPointF(flag.box.right() - 6.0, middle)
    figure = lettering.write(painter, at, flag.mark.text, ink, 12, 600, lettering.RIGHT)
    if second:
        quiet = ink if filled else theme.colour("muted")
        lettering.write(painter, QPointF(figure.left() - 8.0, middle), second, quiet, 11, align=lettering.RIGHT)


def _paint_frame(painter: QPainter, box: QRectF, theme: Theme, role: str, filled: bool, hovered: bool) -> None:
    colour = theme.colour(role)
    width = 2.0 if hovered else 1.0
    painter.setPen(pen(colour, width) if not filled else Qt.PenStyle.NoPen)
    painter.setBrush(colour if filled else theme.colour("surface"))
    inset = 0.0 if filled else 0.5 * width
    painter.drawRoundedRect(box.adjusted(inset, inset, -inset, -inset), 2.0, 2.0)
    painter.setBrush(Qt.BrushStyle.NoBrush)
