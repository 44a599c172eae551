"""Parts of the curve that are not to be relied on: hatched, and named once each."""

from __future__ import annotations

from collections.abc import Callable

import numpy as np
from PySide6.QtCore import QLineF, QPointF, QRectF, Qt
from PySide6.QtGui import QPainter

from headfall_app.paint import lettering
from headfall_app.paint.curve import arrival_box
from headfall_app.paint.fonts import text_width
from headfall_app.paint.layout import Frame
from headfall_app.paint.scene import Scene
from headfall_app.paint.scene_loose import LoosePart
from headfall_app.paint.strokes import pen
from headfall_app.paint.theme import Theme

_SMALL = 11


def paint_loose(painter: QPainter, frame: Frame, scene: Scene, theme: Theme) -> None:
    """Hatch the levels over which the curve is not to be relied on."""
    if frame.plot is None:
        return
    left, _, right, _ = frame.plot
    for part in scene.loose:
        top, bottom = frame.y(part.high), frame.y(part.low)
        painter.save()
        painter.setClipRect(QRectF(left, top, right - left, bottom - top), Qt.ClipOperation.IntersectClip)
        painter.setPen(pen(theme.mixed("edge", "surface", 0.55), 1.0))
        tall = bottom - top
        painter.drawLines([QLineF(x, bottom, x + tall, top) for x in np.arange(left - tall, right, 8.0)])
        painter.restore()


def paint_loose_words(painter: QPainter, frame: Frame, scene: Scene, theme: Theme) -> list[QRectF]:
    """Name each part, without a plate where that would cut a curve; return the boxes written in."""
    boxes: list[QRectF] = []
    for part, box, clear in placed_words(frame, scene):
        at = QPointF(box.left(), box.center().y())
        plate = theme.colour("surface") if clear else None
        lettering.write(painter, at, part.text, theme.colour("ink"), _SMALL, plate=plate)
        boxes.append(box)
    return boxes


def placed_words(frame: Frame, scene: Scene) -> list[tuple[LoosePart, QRectF, bool]]:
    """Return each part's words with their box, and whether it is clear of every curve."""
    placed: list[tuple[LoosePart, QRectF, bool]] = []
    if frame.plot is None:
        return placed
    for part in scene.loose:
        box, clear = _place(frame, scene, part, [one for _, one, _ in placed])
        placed.append((part, box, clear))
    return placed


def _place(frame: Frame, scene: Scene, part: LoosePart, taken: list[QRectF]) -> tuple[QRectF, bool]:
    left, top, right, bottom = frame.plot or (0.0, 0.0, 1.0, 0.0)
    edge = frame.row(part.high)
    wide = text_width(part.text, _SMALL)
    columns = [float(column) for column in np.arange(left + 9.0, max(right - wide - 6.0, left + 10.0), 12.0)]
    below = [edge + 13.0 + step for step in range(0, 100, 4)]
    above = [edge - 11.0 - step for step in range(0, 200, 4)]
    rows = [row for row in (*below, *above) if top + 10.0 < row < bottom - 8.0]
    boxes = [lettering.text_box(QPointF(column, row), part.text, _SMALL) for row in rows for column in columns]
    levels = [frame.row(mark.level) for mark in scene.marks if mark.key != "now"]
    cursor = frame.time_x(scene.now) if scene.now is not None else None
    arrival = arrival_box(frame, scene)

    def keeps_clear(box: QRectF) -> bool:
        struck = cursor is not None and box.left() - 8.0 < cursor < box.right() + 8.0
        return not struck and all(abs(box.center().y() - row) > 9.0 for row in levels)

    def free(box: QRectF) -> bool:
        return not any(box.intersects(other) for other in taken) and not _meets_curve(frame, scene, box, arrival)

    # Nothing struck at all is best; a level line or the cursor under the plate is borne, a curve is not.
    wishes: tuple[Callable[[QRectF], bool], ...] = (keeps_clear, lambda box: not keeps_clear(box))
    for wanted in wishes:
        for box in boxes:
            if wanted(box) and free(box):
                return box, True
    return lettering.text_box(QPointF(left + 9.0, edge - 11.0 - 16.0 * len(taken)), part.text, _SMALL), False


def _meets_curve(frame: Frame, scene: Scene, box: QRectF, arrival: QRectF) -> bool:
    """Return whether a run or the time of its end comes within a few pixels of a box."""
    if arrival.intersects(box):
        return True
    times = np.linspace(frame.time(box.left() - 6.0), frame.time(box.right() + 6.0), 16)
    for run in (scene.curve_low, scene.curve, scene.curve_high):
        within = times[times <= run.time[-1]] if run.ends != "settled" else times
        rows = frame.bottom - np.interp(within, run.time, run.level) * frame.pixels_per_metre
        if len(rows) and rows.min() < box.bottom() + 3.0 and rows.max() > box.top() - 3.0:
            return True
    return False
