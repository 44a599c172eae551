"""Pipes, standpipes and links in the section, to scale upwards, with what flows in them."""

from __future__ import annotations

import math
from itertools import pairwise

import numpy as np
from PySide6.QtCore import QPointF, Qt
from PySide6.QtGui import QBrush, QColor, QLinearGradient, QPainter, QPolygonF

from headfall_app.paint.layout import Frame
from headfall_app.paint.pipe_run import PIT, SHELL, Point, Run, link_run, pipe_run, receiver_box
from headfall_app.paint.scene import Scene
from headfall_app.paint.scene_outlets import DrawnOutlet
from headfall_app.paint.strokes import Array, fill, level_line, pen, points, polygon, ribbon
from headfall_app.paint.theme import Theme

_VALVE = 6.0
_TAPER = 5.0
_FALL, _FAR = 26.0, 44.0
_GRAVITY = 9.81


def paint_pipe(painter: QPainter, frame: Frame, scene: Scene, outlet: DrawnOutlet, theme: Theme) -> None:
    """Paint a pipe or standpipe with its liquid, its valve and what falls from its end."""
    run = pipe_run(frame, scene, outlet)
    if outlet.flow > 0.0 and not is_drowned(frame, run, outlet):
        room = receiver_box(frame, scene).width() * 0.5 if scene.receiver is not None else PIT - 6.0
        _paint_fall(painter, frame, run, outlet, room, theme)
    full = outlet.flow != 0.0
    _paint_run(painter, run, theme, "wall", "liquid" if full else "surface")
    if outlet.facing == "standpipe":
        _open_rim(painter, run, theme, full)
    if outlet.valve:
        _paint_valve(painter, frame, run, theme)
    _paint_break(painter, frame, run, theme)


def paint_link(painter: QPainter, frame: Frame, scene: Scene, theme: Theme) -> None:
    """Paint the way from an opening to the receiving vessel: light, since it is no part of the case."""
    run = link_run(frame, scene)
    if run is not None:
        _paint_run(painter, run, theme, "edge", "liquid" if scene.outlets[0].flow != 0.0 else "surface", 1.0)


def is_drowned(frame: Frame, run: Run, outlet: DrawnOutlet) -> bool:
    """Return whether a pipe's end lies under the water outside."""
    return outlet.tail is not None and frame.y(outlet.tail) < run.end[1] + 0.5 * run.bores[-1]


def _paint_run(painter: QPainter, run: Run, theme: Theme, wall: str, inside: str, shell: float = SHELL) -> None:
    """The pipe's wall and what is in it, tapered from one section to the next."""
    parts = run.parts
    for role, extra in ((wall, 2.0 * shell), (inside, 0.0)):
        colour = theme.colour(role)
        for corners, bore in parts:
            drawn = pen(colour, bore + extra)
            drawn.setJoinStyle(Qt.PenJoinStyle.MiterJoin)
            painter.setPen(drawn)
            painter.drawPolyline(QPolygonF([QPointF(x, y) for x, y in corners]))
        for (before, wide), (after, narrow) in pairwise(parts):
            fill(painter, _taper(before[-2], after[0], wide + extra, narrow + extra), colour)


def _taper(before: Point, at: Point, width: float, after: float) -> QPolygonF:
    """The reducer at a place, on the side of its narrower part."""
    long = math.dist(before, at) or 1.0
    x, y = (at[0] - before[0]) / long, (at[1] - before[1]) / long
    along = _TAPER if width > after else -_TAPER
    far = (at[0] + along * x, at[1] + along * y)
    one, two = 0.5 * max(width, after), 0.5 * min(width, after)
    return points(
        [
            (at[0] - y * one, at[1] + x * one),
            (at[0] + y * one, at[1] - x * one),
            (far[0] + y * two, far[1] - x * two),
            (far[0] - y * two, far[1] + x * two),
        ]
    )


def _open_rim(painter: QPainter, run: Run, theme: Theme, full: bool) -> None:
    x, row = run.corners[0]
    half = 0.5 * run.bores[0] + SHELL
    level_line(painter, x - half, x + half, row, pen(theme.colour("accent" if full else "edge"), 1.0))


def valve_place(frame: Frame, run: Run) -> tuple[Point, bool]:
    """Return where the valve stands, on the longest straight stretch clear of dimension lines, and if that is level."""
    (x0, y0), (x1, y1) = max(run.stretches, key=lambda ends: math.dist(*ends))
    lies = abs(x1 - x0) > abs(y1 - y0)
    shares = [0.5, 0.35, 0.65, 0.25, 0.75]
    rows = frame.dimension_rows
    places = [(x0 + share * (x1 - x0), y0 + share * (y1 - y0)) for share in shares]
    clear = [at for at in places if lies or all(abs(at[1] - row) > 16.0 for row in rows)]
    clear = [at for at in clear if at[1] > frame.bottom + 14.0] or clear
    return (clear or places)[0], lies


def _paint_valve(painter: QPainter, frame: Frame, run: Run, theme: Theme) -> None:
    """Two triangles that meet."""
    (x, y), lies = valve_place(frame, run)
    wide = max(0.5 * run.bores[0] + SHELL + 2.0, _VALVE)
    along = (wide * 1.2, 0.0) if lies else (0.0, wide * 1.2)
    shift = (0.0, wide) if lies else (wide, 0.0)
    for side in (-1.0, 1.0):
        base = (x + side * along[0], y + side * along[1])
        shape = points([(x, y), (base[0] + shift[0], base[1] + shift[1]), (base[0] - shift[0], base[1] - shift[1])])
        painter.setBrush(theme.colour("surface"))
        painter.setPen(pen(theme.colour("wall"), 1.4))
        painter.drawPolygon(shape)
        painter.setBrush(Qt.BrushStyle.NoBrush)


def _paint_break(painter: QPainter, frame: Frame, run: Run, theme: Theme) -> None:
    """Interrupt a leg where levels below the vessel are left out."""
    if frame.left_out is None:
        return
    upper, lower = frame.y(frame.left_out[1]), frame.y(frame.left_out[0])
    half = 0.5 * max(run.bores) + SHELL + 5.0
    for (x0, y0), (x1, y1) in run.stretches:
        if abs(x1 - x0) > 1.0 or not min(y0, y1) < upper < lower < max(y0, y1):
            continue
        gap = points(
            [(x0 - half, upper + 3.0), (x0 + half, upper - 3.0), (x0 + half, lower - 3.0), (x0 - half, lower + 3.0)]
        )
        fill(painter, gap, theme.colour("surface"))
        painter.setPen(pen(theme.colour("wall"), 1.2))
        for row in (upper, lower):
            painter.drawLine(QPointF(x0 - half, row + 3.0), QPointF(x0 + half, row - 3.0))


def _paint_fall(painter: QPainter, frame: Frame, run: Run, outlet: DrawnOutlet, room: float, theme: Theme) -> None:
    """The free jet from a pipe's end: a true parabola at the speed that the flow gives it, cut short.

    Into water outside it falls wholly, and no farther out than the ``room`` [px] that is drawn of that.
    """
    (x1, y1), (ahead, down) = run.end, run.towards
    drop = _FALL
    if outlet.tail is not None:
        drop = max(frame.y(outlet.tail) - y1, 4.0)
    scale, wide = frame.pixels_per_metre, 0.86 * run.bores[-1]
    if abs(ahead) < 0.5:
        along = np.linspace(0.0, 1.0, 4)
        paint_jet(painter, np.full(4, x1), y1 + down * drop * along, np.full(4, wide), theme)
        return
    speed = max(outlet.speed, 1e-6) * scale
    time = math.sqrt(2.0 * drop / (_GRAVITY * scale))
    if speed * time > _FAR and outlet.tail is None:
        time = _FAR / speed
    if outlet.tail is not None:
        speed = min(speed, room / time)
    along = np.linspace(0.0, time, 20)
    x, y = x1 + math.copysign(1.0, ahead) * speed * along, y1 + 0.5 * _GRAVITY * scale * along**2
    paint_jet(painter, x, y, np.full(20, wide), theme, fades=outlet.tail is None)


def paint_jet(painter: QPainter, x: Array, y: Array, wide: Array, theme: Theme, fades: bool = True) -> None:
    """Paint a jet along a line, as wide as told; its end fades out, but not on paper."""
    shape = band(x, y, wide)
    accent = theme.colour("accent")
    if theme.is_paper or not fades:
        fill(painter, shape, accent)
        return
    fade = QLinearGradient(QPointF(x[0], y[0]), QPointF(x[-1], y[-1]))
    clear = QColor(accent)
    clear.setAlpha(0)
    fade.setColorAt(0.0, accent)
    fade.setColorAt(0.55, accent)
    fade.setColorAt(1.0, clear)
    fill(painter, shape, QBrush(fade))


def band(x: Array, y: Array, wide: Array) -> QPolygonF:
    """Return a line's outline whose width changes along it."""
    if np.ptp(wide) < 1e-9:
        return ribbon(x, y, float(wide[0]))
    step_x, step_y = np.gradient(x), np.gradient(y)
    scale = 0.5 * wide / np.maximum(np.hypot(step_x, step_y), 1e-12)
    over_x, over_y = -step_y * scale, step_x * scale
    return polygon(np.concatenate((x + over_x, (x - over_x)[::-1])), np.concatenate((y + over_y, (y - over_y)[::-1])))
