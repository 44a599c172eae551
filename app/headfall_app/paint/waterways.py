"""Pipes, weirs and standpipes in the section, to scale upwards, with what flows in them."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
from PySide6.QtCore import QPointF, QRectF, Qt
from PySide6.QtGui import QPainter, QPolygonF

from headfall_app.paint.layout import WEIR_ROOM, Frame
from headfall_app.paint.outline_geometry import floor_under, outlet_across, surface_span
from headfall_app.paint.scene import Scene
from headfall_app.paint.scene_outlets import DrawnOutlet
from headfall_app.paint.section import WALL
from headfall_app.paint.strokes import fill, level_line, pen, plumb_line, points, ribbon
from headfall_app.paint.theme import Theme

LEAST_BORE = 5.0
_STUB, _REACH = 40.0, 54.0
_VALVE = 6.0
_SHELL = 2.0


@dataclass(frozen=True, slots=True)
class Run:
    """A pipe on the page: its corners from inlet to end, and its bore there [px]."""

    corners: tuple[tuple[float, float], ...]
    bore: float
    end_bore: float

    @property
    def end(self) -> tuple[float, float]:
        """Where it ends."""
        return self.corners[-1]


def pipe_run(frame: Frame, scene: Scene, outlet: DrawnOutlet) -> Run:
    """Return where a pipe or a standpipe is drawn: through the floor, or through the wall from a raised inlet."""
    bores = outlet.bores or (outlet.width,)
    bore = max(bores[0] * frame.pixels_per_metre, LEAST_BORE)
    end_bore = max(bores[-1] * frame.pixels_per_metre, LEAST_BORE)
    end_level = outlet.elevation if outlet.discharge is None else outlet.discharge
    if outlet.facing == "standpipe":
        left, right = surface_span(scene.outline, outlet.elevation) or (0.0, 1.0)
        x = frame.across.x(left + 0.86 * (right - left))
        foot = frame.bottom + _STUB if outlet.discharge is None else frame.y(end_level)
        return Run(((x, frame.y(outlet.elevation)), (x, max(foot, frame.bottom + WALL))), bore, end_bore)
    across = outlet_across(scene.outline, outlet.station)
    floor = floor_under(scene.outline, across)
    end = frame.y(end_level)
    if outlet.elevation <= floor + 0.02 * scene.height and end_level <= outlet.elevation:
        x = frame.across.x(across)
        inlet = frame.y(outlet.elevation)
        turn = max(end, frame.bottom + WALL + 0.5 * end_bore + 4.0)
        return Run(((x, inlet), (x, turn), (x + _REACH, turn)), bore, end_bore)
    span = surface_span(scene.outline, max(outlet.elevation, 1e-6 * scene.height))
    wall = frame.across.x(span[1] if span else 0.0)
    row = min(frame.y(outlet.elevation), frame.bottom - 0.5 * bore)
    x = wall + 0.5 * _STUB
    if abs(end - row) < 2.0:
        return Run(((wall - 1.0, row), (wall + _REACH, row)), bore, end_bore)
    return Run(((wall - 1.0, row), (x, row), (x, end), (x + 0.6 * _REACH, end)), bore, end_bore)


def run_boxes(run: Run) -> list[QRectF]:
    """Return the boxes that a run's straight stretches take on the page."""
    half = 0.5 * max(run.bore, run.end_bore) + _SHELL
    return [
        QRectF(QPointF(min(x0, x1), min(y0, y1)), QPointF(max(x0, x1), max(y0, y1))).adjusted(-half, -half, half, half)
        for (x0, y0), (x1, y1) in zip(run.corners[:-1], run.corners[1:], strict=True)
    ]


def paint_pipe(painter: QPainter, frame: Frame, scene: Scene, outlet: DrawnOutlet, theme: Theme) -> Run:
    """Paint a pipe or standpipe with its liquid, its valve and what falls from its end."""
    run = pipe_run(frame, scene, outlet)
    if outlet.flow > 0.0 and outlet.tail is None:
        _paint_fall(painter, run, theme)
    full = outlet.flow != 0.0
    _stroke(painter, run, theme, "liquid" if full else "surface")
    if outlet.facing == "standpipe":
        _open_rim(painter, run, theme, full)
    if outlet.valve:
        _paint_valve(painter, run, theme)
    return run


def _stroke(painter: QPainter, run: Run, theme: Theme, inside: str) -> None:
    """The pipe's wall and what is in it; a last section of another bore begins at the last corner."""
    parts = [(run.corners, run.bore)]
    if abs(run.end_bore - run.bore) > 0.5 and len(run.corners) > 2:
        parts = [(run.corners[:-1], run.bore), (run.corners[-2:], run.end_bore)]
    for colour, extra in (("wall", 2.0 * _SHELL), (inside, 0.0)):
        for corners, bore in parts:
            drawn = pen(theme.colour(colour), bore + extra)
            drawn.setJoinStyle(Qt.PenJoinStyle.MiterJoin)
            painter.setPen(drawn)
            painter.drawPolyline(QPolygonF([QPointF(x, y) for x, y in corners]))


def _open_rim(painter: QPainter, run: Run, theme: Theme, full: bool) -> None:
    x, row = run.corners[0]
    half = 0.5 * run.bore + _SHELL
    colour = theme.colour("accent" if full else "wall")
    level_line(painter, x - half, x + half, row, pen(colour, 1.0))


def _paint_valve(painter: QPainter, run: Run, theme: Theme) -> None:
    """Two triangles that meet, on the longest straight stretch."""
    stretches = list(zip(run.corners[:-1], run.corners[1:], strict=True))
    (x0, y0), (x1, y1) = max(stretches, key=lambda ends: abs(ends[1][0] - ends[0][0]) + abs(ends[1][1] - ends[0][1]))
    x, y = 0.5 * (x0 + x1), 0.5 * (y0 + y1)
    wide = max(0.5 * run.bore + _SHELL + 2.0, _VALVE)
    along = (wide * 1.2, 0.0) if abs(x1 - x0) > abs(y1 - y0) else (0.0, wide * 1.2)
    for side in (-1.0, 1.0):
        tip = (x, y)
        base = (x + side * along[0], y + side * along[1])
        shift = (0.0, wide) if along[0] else (wide, 0.0)
        shape = points([tip, (base[0] + shift[0], base[1] + shift[1]), (base[0] - shift[0], base[1] - shift[1])])
        painter.setBrush(theme.colour("surface"))
        painter.setPen(pen(theme.colour("wall"), 1.4))
        painter.drawPolygon(shape)
        painter.setBrush(Qt.BrushStyle.NoBrush)


def _paint_fall(painter: QPainter, run: Run, theme: Theme) -> None:
    """A short free jet from the end, falling as it leaves."""
    (x0, y0), (x1, y1) = run.corners[-2], run.corners[-1]
    if abs(x1 - x0) > abs(y1 - y0):
        along = np.linspace(0.0, 1.0, 16)
        x, y = x1 + 22.0 * along, y1 + 20.0 * along**2
    else:
        along = np.linspace(0.0, 1.0, 4)
        x, y = np.full(4, x1), y1 + 26.0 * along
    fill(painter, ribbon(x, y, 0.8 * run.end_bore), theme.colour("accent"))


def weir_foot(frame: Frame, scene: Scene, outlet: DrawnOutlet) -> QPointF:
    """Return where the crest meets the wall."""
    span = surface_span(scene.outline, outlet.elevation)
    return QPointF(frame.across.x(span[1] if span else 0.0), frame.y(outlet.elevation))


def paint_weir(painter: QPainter, frame: Frame, scene: Scene, outlet: DrawnOutlet, theme: Theme) -> QPointF:
    """Paint the notch in the wall down to its crest, and the nappe; return where the crest meets the wall."""
    foot = weir_foot(frame, scene, outlet)
    top = frame.top - WALL - 1.0
    painter.fillRect(QRectF(foot.x() - 0.5, top, 2.0 * WALL + 2.0, foot.y() - top), theme.colour("surface"))
    plumb_line(painter, foot.x() + 0.5 * WALL, foot.y(), foot.y() + 10.0, pen(theme.colour("wall"), WALL))
    if outlet.flow > 0.0 and outlet.head > 0.0:
        thick = min(max(outlet.head * frame.pixels_per_metre * 0.7, 2.5), WEIR_ROOM)
        fall = min(0.5 * (frame.bottom - foot.y()) + 24.0, 90.0)
        along = np.linspace(0.0, 1.0, 20)
        x = foot.x() - 6.0 + min(10.0 + 0.35 * fall, WEIR_ROOM - 0.5 * thick) * along
        y = foot.y() - 0.5 * thick + fall * along**2
        fill(painter, ribbon(x, y, thick), theme.colour("accent"))
    return foot
