"""Flow against time, under the level plot and on the same time axis."""

from __future__ import annotations

import numpy as np
from PySide6.QtCore import QPointF
from PySide6.QtGui import QPainter

from headfall.answers import Curve
from headfall_app.paint import lettering
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


def _points(frame: Frame, scene: Scene, run: Curve) -> tuple[np.ndarray, np.ndarray]:
    assert frame.flow is not None
    time, flow = run.time, run.outflow
    if run.ends == "settled" and time[-1] < frame.times.end:
        time, flow = np.append(time, frame.times.end), np.append(flow, flow[-1])
    left, _, right, bottom = frame.flow
    return left + time * ((right - left) / frame.times.end), bottom - flow * _scale(frame, scene)[1]


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
    slow_x, slow_y = _points(frame, scene, scene.curve_low)
    fast_x, fast_y = _points(frame, scene, scene.curve_high)
    shape = polygon(np.concatenate((slow_x, fast_x[::-1])), np.concatenate((slow_y, fast_y[::-1])))
    fill(painter, shape, theme.colour("band"), smooth=theme.is_paper)
    for edge_x, edge_y in ((slow_x, slow_y), (fast_x, fast_y)):
        fill(painter, ribbon(edge_x, edge_y, 1.0), theme.colour("band_edge"))
    x, y = _points(frame, scene, scene.curve)
    fill(painter, ribbon(x, y, 2.0), theme.colour("accent"))
    inward = bottom - scene.inflow * _scale(frame, scene)[1]
    if scene.inflow > 0.0:
        level_line(painter, left, right, inward, pen(theme.colour("ink"), 1.4, "inflow"))
    _words(painter, frame, scene, theme, ((x, y), (slow_x, slow_y), (fast_x, fast_y)), inward)


Runs = tuple[tuple[np.ndarray, np.ndarray], ...]


def _rows(runs: Runs, left: float, right: float) -> tuple[float, float]:
    """Return the uppermost and lowest row that the runs take between two columns."""
    columns = np.linspace(left, right, 8)
    rows = [np.interp(columns, x, y) for x, y in runs]
    return min(float(row.min()) for row in rows), max(float(row.max()) for row in rows)


def _words(painter: QPainter, frame: Frame, scene: Scene, theme: Theme, runs: Runs, inward: float) -> None:
    """Write ``out`` and ``in`` beside their lines and clear of both."""
    assert frame.flow is not None
    left, top, right, bottom = frame.flow
    plate = theme.colour("surface")
    flows = scene.inflow > 0.0
    start = left + 9.0
    cursor = frame.time_x(scene.now) if scene.now is not None else left
    if start - 4.0 < cursor < start + 26.0:
        start = cursor + 8.0
    if flows:
        lettering.write(painter, QPointF(start, inward - 9.0), "in", theme.colour("ink"), 11, plate=plate)
    at = QPointF(start, _rows(runs, start - 9.0, start + 27.0)[1] + 12.0)
    crowded = flows and (abs(inward - 9.0 - at.y()) < 14.0 or abs(inward - at.y()) < 9.0)
    crowded = crowded or at.y() > bottom - 6.0 or (flows and at.y() > inward > _rows(runs, left, left)[0])
    for column in np.arange(start, right - 30.0, 6.0) if crowded else ():
        above = _rows(runs, column - 5.0, column + 24.0)[0] - 11.0
        if above > top + 4.0 and not (flows and abs(above - inward) < 20.0):
            at = QPointF(float(column), above)
            break
    lettering.write(painter, at, "out", theme.colour("accent"), 11, plate=plate)
