"""Level against time: grid, range, curve, the end of the run and the time cursor."""

from __future__ import annotations

from collections.abc import Sequence
from itertools import pairwise

import numpy as np
from PySide6.QtCore import QLineF, QPointF, QRectF, Qt
from PySide6.QtGui import QPainter

from headfall.answers import Curve
from headfall_app.paint import lettering
from headfall_app.paint.fonts import text_width
from headfall_app.paint.layout import Frame
from headfall_app.paint.scene import Scene, level_at
from headfall_app.paint.staff import grid_levels
from headfall_app.paint.strokes import fill, level_line, pen, plumb_line, polygon, ribbon
from headfall_app.paint.theme import Theme
from headfall_app.paint.ticks import mark_text

WIDTH = 2.2
_WAVE_LENGTH, _WAVE_HEIGHT = 34.0, 4.5


def paint_grid(painter: QPainter, frame: Frame, scene: Scene, theme: Theme) -> None:
    """Paint the grid at the staff's numbers and the time marks."""
    if frame.plot is None:
        return
    left, top, right, bottom = frame.plot
    grid = pen(theme.colour("grid"))
    for level in (*grid_levels(frame, scene), frame.vessel_height):
        level_line(painter, left, right, frame.row(level), grid)
    for value in frame.times.marks:
        plumb_line(painter, frame.time_x(value * frame.times.unit), round(top), bottom, grid)
    plumb_line(painter, right, round(top), bottom, grid)


def curve_points(frame: Frame, run: Curve, to_end: bool = False) -> tuple[np.ndarray, np.ndarray]:
    """Return a run on the page, carried on level to the end of the axis where asked."""
    time, level = run.time, run.level
    if to_end and run.ends == "settled" and time[-1] < frame.times.end:
        time, level = np.append(time, frame.times.end), np.append(level, level[-1])
    left, _, right, _ = frame.plot or (0.0, 0.0, 1.0, 0.0)
    return left + time * ((right - left) / frame.times.end), frame.bottom + 0.5 - level * frame.pixels_per_metre


def paint_range(painter: QPainter, frame: Frame, scene: Scene, theme: Theme) -> None:
    """Paint what lies between the runs of the lowest and the highest coefficient, and the settling strip."""
    if frame.plot is None:
        return
    if scene.settling is not None:
        low, high = scene.settling
        strip = QRectF(
            frame.flags_right, frame.y(high), frame.plot[2] - frame.flags_right, frame.y(low) - frame.y(high)
        )
        painter.fillRect(strip, theme.mixed("band", "surface", 0.6))
    slow_x, slow_y = curve_points(frame, scene.curve_low, True)
    fast_x, fast_y = curve_points(frame, scene.curve_high, True)
    shape = polygon(np.concatenate((slow_x, fast_x[::-1])), np.concatenate((slow_y, fast_y[::-1])))
    fill(painter, shape, theme.colour("band"), smooth=theme.is_paper)
    edge = theme.colour("band_edge")
    painter.setPen(pen(edge, 1.0))
    for x, y in ((slow_x, slow_y), (fast_x, fast_y)):
        painter.drawPolyline(polygon(x, y))


def paint_run(painter: QPainter, frame: Frame, scene: Scene, theme: Theme) -> None:
    """Paint the typical run, dashed where it is not to be relied on."""
    x, y = curve_points(frame, scene.curve)
    accent = theme.colour("accent")
    if not scene.loose:
        fill(painter, ribbon(x, y, WIDTH), accent)
        return
    level = 0.5 * (scene.curve.level[1:] + scene.curve.level[:-1])
    loose = np.zeros(len(level), dtype=bool)
    for part in scene.loose:
        loose |= (level >= part.low) & (level < part.high)
    turns = np.flatnonzero(np.diff(loose)) + 1
    for start, end in pairwise((0, *turns.tolist(), len(level))):
        stretch = slice(start, end + 1)
        if loose[start]:
            painter.setPen(pen(accent, WIDTH, "not_defended"))
            painter.drawPolyline(polygon(x[stretch], y[stretch]))
        else:
            fill(painter, ribbon(x[stretch], y[stretch], WIDTH), accent)


def paint_arrival(painter: QPainter, frame: Frame, scene: Scene, theme: Theme) -> None:
    """Paint the whisker from the shortest to the longest time, the ring at the typical one, and its text."""
    arrival = scene.arrival
    if arrival is None or frame.plot is None:
        return
    colour = theme.colour("limit" if arrival.overflows else "ink")
    row = frame.row(arrival.level) + 0.5
    ring = frame.time_x(arrival.typical)
    known = [frame.time_x(time) for time in (arrival.low, arrival.high) if time is not None]
    painter.setPen(pen(colour, 1.4))
    if len(known) == 2:
        painter.drawLine(QLineF(known[0], row, known[1], row))
        for end in known:
            painter.drawLine(QLineF(end, row - 5.0, end, row + 5.0))
    _arrival_text(painter, frame, scene, theme, ring, row)
    painter.setPen(pen(theme.colour("limit" if arrival.overflows else "accent"), 2.0))
    painter.setBrush(theme.colour("surface"))
    painter.drawEllipse(QPointF(ring, row), 4.0, 4.0)
    painter.setBrush(Qt.BrushStyle.NoBrush)


def _arrival_text(painter: QPainter, frame: Frame, scene: Scene, theme: Theme, ring: float, row: float) -> None:
    arrival = scene.arrival
    assert arrival is not None
    box = arrival_box(frame, scene)
    at = box.center().y()
    ink = theme.colour("limit" if arrival.overflows else "ink")
    painter.setPen(pen(theme.colour("limit" if arrival.overflows else "muted"), 1.0))
    painter.drawLine(QLineF(round(ring) + 0.5, row, round(ring) + 0.5, at))
    plate = theme.colour("surface")
    lettering.write(painter, box.center(), arrival.text, ink, 12, 600, lettering.CENTRE, plate=plate)


def arrival_box(frame: Frame, scene: Scene) -> QRectF:
    """Return where the time of the end of the run stands, empty without one."""
    arrival = scene.arrival
    if arrival is None or frame.plot is None:
        return QRectF()
    left, top, right, bottom = frame.plot
    row, ring = frame.row(arrival.level) + 0.5, frame.time_x(arrival.typical)
    half = 0.5 * text_width(arrival.text, 12, 600) + 4.0
    middle = min(max(ring, left + half), right - half) if right - left > 2.0 * half else 0.5 * (left + right)
    runs = (scene.curve_low, scene.curve_high, scene.curve)
    beside = [frame.y(level_at(run, frame.time(middle - half - 6.0))) for run in runs]
    lines = [frame.row(mark.level) for mark in scene.marks if mark.key != "now"]
    step = 2.0 if arrival.rising else -2.0
    at = max(row + 28.0, max(beside) + 15.0) if arrival.rising else min(row - 28.0, min(beside) - 15.0)
    while top + 10.0 < at < bottom - 10.0 and any(abs(at - line) < 11.0 for line in lines):
        at += step
    at = min(max(at, top + 10.0), bottom - 10.0)
    return lettering.text_box(QPointF(middle, at), arrival.text, 12, 600, lettering.CENTRE)


def remark_box(frame: Frame, scene: Scene, taken: Sequence[QRectF] = ()) -> QRectF:
    """Return where the remark stands: at the right, clear of curve, level lines and the words ``taken``."""
    if not scene.remark or frame.plot is None:
        return QRectF()
    left, top, right, bottom = frame.plot
    text = lettering.elided(scene.remark, right - left - 8.0, 12, 600)
    level = scene.settles_at if scene.settles_at is not None else scene.surface
    if scene.curve.ends == "surging":
        level = float(scene.curve.level[-1])
    lines = [frame.row(mark.level) for mark in scene.marks if mark.key != "now"]
    ends = [right - 12.0 - text_width(text, 12, 600), right]
    runs = (scene.curve_low, scene.curve_high, scene.curve)
    rows = [frame.y(level_at(run, frame.time(end))) for run in runs for end in ends]
    rows += [frame.y(one) for one in (level, *(scene.settling or ()))]
    words = [box.adjusted(-6.0, -3.0, 6.0, 3.0) for box in taken]

    def box(row: float) -> QRectF:
        return lettering.text_box(QPointF(right - 4.0, row), text, 12, 600, lettering.RIGHT)

    below = [max(rows) + 15.0 + step for step in range(0, 40, 2)]
    above = [min(rows) - 15.0 - step for step in range(0, 120, 2)]
    inside = [row for row in (*below, *above) if top + 8.0 < row < bottom - 6.0]
    free = [row for row in inside if not any(box(row).intersects(other) for other in words)]
    clear = [row for row in free if all(abs(row - line) > 10.0 for line in lines)]
    # A level line under the plate is borne, other words are not.
    return box((clear or free or [min(max(above[0], top + 8.0), bottom - 8.0)])[0])


def paint_remark(painter: QPainter, frame: Frame, scene: Scene, theme: Theme, taken: Sequence[QRectF] = ()) -> None:
    """Write what happens instead of an arrival."""
    box = remark_box(frame, scene, taken)
    if box.isNull() or frame.plot is None:
        return
    text = lettering.elided(scene.remark, frame.plot[2] - frame.plot[0] - 8.0, 12, 600)
    plate = theme.colour("surface")
    at = QPointF(box.right(), box.center().y())
    lettering.write(painter, at, text, theme.colour("ink"), 12, 600, lettering.RIGHT, plate=plate)


def paint_surge(painter: QPainter, frame: Frame, scene: Scene, theme: Theme) -> None:
    """Mark the end of a run that surges: a small wave about the level it ends at."""
    if scene.curve.ends != "surging" or frame.plot is None:
        return
    x = frame.time_x(float(scene.curve.time[-1]))
    row = frame.row(float(scene.curve.level[-1])) + 0.5
    along = np.linspace(0.0, 1.0, 33)
    wave = polygon(x + _WAVE_LENGTH * (along - 0.5), row + _WAVE_HEIGHT * np.sin(4.0 * np.pi * along))
    painter.setPen(pen(theme.colour("surface"), 5.0))
    painter.drawPolyline(wave)
    painter.setPen(pen(theme.colour("accent"), 1.8))
    painter.drawPolyline(wave)


def paint_cursor_dot(painter: QPainter, frame: Frame, scene: Scene, theme: Theme, focused: bool = False) -> None:
    """Paint the point of the curve that the time cursor stands at."""
    if scene.now is None or frame.plot is None:
        return
    at = QPointF(frame.time_x(scene.now), frame.row(scene.surface) + 0.5)
    if focused:
        painter.setPen(pen(theme.colour("accent"), 2.0))
        painter.drawEllipse(at, 10.0, 10.0)
    painter.setPen(pen(theme.colour("surface"), 2.0))
    painter.setBrush(theme.colour("accent"))
    painter.drawEllipse(at, 6.0, 6.0)
    painter.setBrush(Qt.BrushStyle.NoBrush)


def cursor_plate(frame: Frame, scene: Scene) -> QRectF:
    """Return the plate with the cursor's time, over the plot."""
    if scene.now is None or frame.plot is None:
        return QRectF()
    wide = text_width(scene.now_text, 12, 600) + 14.0
    left = min(max(frame.time_x(scene.now) - 0.5 * wide, frame.plot[0] - 10.0), frame.width - wide - 1.0)
    return QRectF(round(left), round(frame.top) - 23.0, wide, 19.0)


def paint_cursor(painter: QPainter, frame: Frame, scene: Scene, theme: Theme) -> None:
    """Paint the time cursor through both plots, with its time on a plate."""
    if scene.now is None or frame.plot is None:
        return
    accent = theme.colour("accent")
    plate = cursor_plate(frame, scene)
    foot = frame.flow[3] if frame.flow else frame.plot[3]
    plumb_line(painter, frame.time_x(scene.now), plate.bottom(), foot, pen(accent))
    painter.setPen(Qt.PenStyle.NoPen)
    painter.setBrush(accent)
    painter.drawRoundedRect(plate, 2.0, 2.0)
    painter.setBrush(Qt.BrushStyle.NoBrush)
    ink = theme.colour("on_accent")
    lettering.write(painter, plate.center(), scene.now_text, ink, 12, 600, lettering.CENTRE)


def paint_time_marks(painter: QPainter, frame: Frame, theme: Theme) -> None:
    """Write the time marks under the lowest plot, and their unit."""
    lowest = frame.flow or frame.plot
    if lowest is None:
        return
    for value in frame.times.marks:
        at = QPointF(frame.time_x(value * frame.times.unit), lowest[3] + 13.0)
        text = mark_text(value, frame.times.step)
        lettering.write(painter, at, text, theme.colour("muted"), 11, align=lettering.CENTRE)
    at = QPointF(lowest[2], lowest[3] + 27.0)
    word = f"{frame.times.word} from start"
    lettering.write(painter, at, word, theme.colour("muted"), 11, align=lettering.RIGHT)
