"""Flow against time, under the level plot and on the same time axis."""

from __future__ import annotations

from collections.abc import Iterator

import numpy as np
from PySide6.QtCore import QPointF, QRectF
from PySide6.QtGui import QPainter

from headfall.answers import Curve
from headfall_app.paint import lettering
from headfall_app.paint.fonts import text_width
from headfall_app.paint.layout import Frame
from headfall_app.paint.scene import Scene
from headfall_app.paint.strokes import fill, level_line, pen, plumb_line, polygon, ribbon
from headfall_app.paint.theme import Theme
from headfall_app.paint.ticks import mark_text, marks, nice_step


def _scale(frame: Frame, scene: Scene) -> tuple[float, float]:
    """Return the flow at the top of the plot [m³/s] and the pixels a unit of flow."""
    assert frame.flow is not None
    runs = (scene.curve, scene.curve_low, scene.curve_high)
    tall = frame.flow[3] - frame.flow[1]
    # The word over the inflow's line needs room of its own under the plot's name.
    headroom = tall / (tall - 18.0)
    highest = max(scene.inflow * headroom, *(float(np.max(run.outflow)) * 1.06 for run in runs))
    highest = highest if highest > 0.0 else scene.display.factor("flow")
    return highest, tall / highest


Runs = tuple[tuple[np.ndarray, np.ndarray], ...]


def _runs(frame: Frame, scene: Scene) -> Runs:
    """Return the typical run, that of the lowest and that of the highest coefficient on the page."""
    _, scale = _scale(frame, scene)
    return tuple(_points(frame, run, scale) for run in (scene.curve, scene.curve_low, scene.curve_high))


def _points(frame: Frame, run: Curve, scale: float) -> tuple[np.ndarray, np.ndarray]:
    assert frame.flow is not None
    time, flow = run.time, run.outflow
    if run.ends == "settled" and time[-1] < frame.times.end:
        time, flow = np.append(time, frame.times.end), np.append(flow, flow[-1])
    left, _, right, bottom = frame.flow
    return left + time * ((right - left) / frame.times.end), bottom - flow * scale


def paint_flow_grid(painter: QPainter, frame: Frame, scene: Scene, theme: Theme) -> None:
    """Paint the grid and its numbers."""
    if frame.flow is None:
        return
    left, top, right, bottom = frame.flow
    highest, scale = _scale(frame, scene)
    factor = scene.display.factor("flow")
    step = nice_step(20.0 / (scale * factor))
    grid = pen(theme.colour("grid"))
    for value in frame.times.marks:
        plumb_line(painter, frame.time_x(value * frame.times.unit), top, bottom, grid)
    plumb_line(painter, right, top, bottom, grid)
    for value in marks(0.0, highest / factor, step):
        row = bottom - value * factor * scale
        level_line(painter, left, right, row, grid if value else pen(theme.colour("edge")))
        at = QPointF(left - 8.0, round(row))
        lettering.write(painter, at, mark_text(value, step), theme.colour("muted"), 11, align=lettering.RIGHT)


def paint_flow_title(painter: QPainter, frame: Frame, scene: Scene, theme: Theme) -> None:
    """Write the plot's name, on a plate where the time cursor would strike it."""
    if frame.flow is None:
        return
    name = f"Flow against time, {scene.display.unit('flow')}"
    at = QPointF(frame.flow[0], frame.flow[1] - 16.0)
    lettering.write(painter, at, name, theme.colour("ink"), 12, 600, plate=theme.colour("surface"))


def paint_flows(painter: QPainter, frame: Frame, scene: Scene, theme: Theme) -> None:
    """Paint outflow with its range, inflow, and the words at their lines."""
    if frame.flow is None:
        return
    left, _, right, bottom = frame.flow
    runs = _runs(frame, scene)
    (x, y), (slow_x, slow_y), (fast_x, fast_y) = runs
    shape = polygon(np.concatenate((slow_x, fast_x[::-1])), np.concatenate((slow_y, fast_y[::-1])))
    fill(painter, shape, theme.colour("band"), smooth=theme.is_paper)
    painter.setPen(pen(theme.colour("band_edge"), 1.0))
    for edge_x, edge_y in ((slow_x, slow_y), (fast_x, fast_y)):
        painter.drawPolyline(polygon(edge_x, edge_y))
    fill(painter, ribbon(x, y, 2.0), theme.colour("accent"))
    if scene.inflow > 0.0:
        inward = bottom - scene.inflow * _scale(frame, scene)[1]
        level_line(painter, left, right, inward, pen(theme.colour("ink"), 1.4, "inflow"))
    for word, box in word_boxes(frame, scene, runs).items():
        at = QPointF(box.left(), box.center().y())
        ink = theme.colour("accent" if word == _OUT else "ink")
        lettering.write(painter, at, word, ink, 11, plate=theme.colour("surface"))


_OUT, _IN = "out", "in"
_KEEP = 3.0
"""Blank between a word and a line [px]."""


def _meets(box: QRectF, runs: Runs) -> bool:
    """Return whether a run passes through a box."""
    columns = np.linspace(box.left() - _KEEP, box.right() + _KEEP, 8)
    for x, y in runs:
        over = columns[(columns >= x[0]) & (columns <= x[-1])]
        rows = np.interp(over, x, y)
        if len(rows) and rows.min() <= box.bottom() - _KEEP and rows.max() >= box.top() + _KEEP:
            return True
    return False


def word_boxes(frame: Frame, scene: Scene, runs: Runs | None = None) -> dict[str, QRectF]:
    """Return where ``out`` and ``in`` stand: at the left end, at the right where the time cursor is in the way."""
    if frame.flow is None:
        return {}
    runs = runs or _runs(frame, scene)
    inward = frame.flow[3] - scene.inflow * _scale(frame, scene)[1] if scene.inflow > 0.0 else None
    boxes: dict[str, QRectF] = {}
    if inward is not None:
        columns = _columns(frame, frame.flow[2], _IN)
        ways = (QPointF(column, inward + rise) for column in columns for rise in (-9.0, 10.0))
        boxes[_IN] = _first_clear(frame, scene, _IN, ways, runs, inward, [])
    columns = _columns(frame, min(float(runs[0][0][-1]), frame.flow[2]), _OUT)
    boxes[_OUT] = _first_clear(frame, scene, _OUT, _beside(columns, runs), runs, inward, list(boxes.values()))
    return boxes


def _beside(columns: list[float], runs: Runs) -> Iterator[QPointF]:
    """Give the places for ``out`` under and over the runs."""
    for column in columns:
        over = np.linspace(column - _KEEP, column + text_width(_OUT, 11) + _KEEP, 6)
        rows = [np.interp(over, x, y) for x, y in runs]
        yield QPointF(column, float(max(row.max() for row in rows)) + 12.0)
        yield QPointF(column, float(min(row.min() for row in rows)) - 11.0)


def _columns(frame: Frame, end: float, word: str) -> list[float]:
    """Return where a word may begin, best first: at the left, at the right end of its line, then from there back."""
    assert frame.flow is not None
    first = frame.flow[0] + 9.0
    last = end - 9.0 - text_width(word, 11)
    return [first, *(float(column) for column in np.arange(last, first, -12.0))]


def _first_clear(
    frame: Frame,
    scene: Scene,
    word: str,
    ways: Iterator[QPointF],
    runs: Runs,
    inward: float | None,
    taken: list[QRectF],
) -> QRectF:
    """Return the first place that meets neither the time cursor nor a line nor another word, else the first of all."""
    assert frame.flow is not None
    _, top, _, bottom = frame.flow
    cursor = frame.time_x(scene.now) if scene.now is not None else None
    first: QRectF | None = None
    for at in ways:
        box = lettering.text_box(at, word, 11)
        first = first or box
        middle = box.center().y()
        if (
            top + 4.0 < middle < bottom - 6.0
            and (cursor is None or not box.left() - 7.0 < cursor < box.right() + 7.0)
            and (inward is None or abs(middle - inward) >= 9.0)
            and not any(box.intersects(other) for other in taken)
            and not _meets(box, runs)
        ):
            return box
    return first or QRectF()
