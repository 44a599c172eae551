"""The jets that leave, to scale, with the opening's size and its flow beside each."""

from __future__ import annotations

import math
from collections.abc import Iterator, Sequence

import numpy as np
from PySide6.QtCore import QPointF, QRectF
from PySide6.QtGui import QBrush, QColor, QLinearGradient, QPainter

from headfall.quantities.display import NO_BREAK
from headfall_app.paint import lettering
from headfall_app.paint.around import paint_tailwater
from headfall_app.paint.fonts import text_width
from headfall_app.paint.layout import JET, Frame
from headfall_app.paint.outline_geometry import floor_under, outlet_across, surface_span
from headfall_app.paint.scene import Scene
from headfall_app.paint.scene_outlets import JET_VELOCITY_COEFFICIENT, DrawnOutlet
from headfall_app.paint.section import WALL
from headfall_app.paint.staff import numbers_left
from headfall_app.paint.strokes import fill, pen, plumb_line, polygon, ribbon
from headfall_app.paint.theme import Theme
from headfall_app.paint.waterways import Run, paint_pipe, paint_weir, pipe_run, run_boxes

LEAST_WIDTH = 3.0
_LINE = 17.0
_DROWNED_JET = 46.0
Label = tuple[tuple[QPointF, str, float], ...]


def jet_places(frame: Frame, scene: Scene) -> dict[int, float]:
    """Return where each downward outlet is drawn [px]; several at one place stand beside one another."""
    downs = [(index, outlet) for index, outlet in enumerate(scene.outlets) if outlet.facing == "down"]
    true = {index: frame.across.x(outlet_across(scene.outline, outlet.station)) for index, outlet in downs}
    places: dict[int, float] = {}
    for index, _ in downs:
        same = [other for other, _ in downs if abs(true[other] - true[index]) < 1.0]
        room = 0.8 * (frame.across.right - frame.across.left)
        pitch = min(96.0, room / len(same))
        places[index] = true[index] + pitch * (same.index(index) - 0.5 * (len(same) - 1))
    return places


def paint_jets(painter: QPainter, frame: Frame, scene: Scene, theme: Theme) -> list[tuple[int, QRectF]]:
    """Paint every outlet; return where each one's size stands, as (index, box)."""
    places = jet_places(frame, scene)
    taken: list[QRectF] = []
    boxes: list[tuple[int, QRectF]] = []
    for index, place in places.items():
        outlet = scene.outlets[index]
        wide = max(outlet.width * frame.pixels_per_metre, LEAST_WIDTH)
        floor = _opening_row(frame, scene, outlet, place)
        _paint_opening(painter, frame, outlet, place, wide, floor, theme)
        if outlet.flow > 0.0:
            _paint_falling(painter, place, wide, floor, max(frame.bottom + JET - floor, JET), theme)
        taken.append(QRectF(place - 0.5 * wide - 3.0, floor, wide + 6.0, frame.bottom + JET - floor))
    for outlet in scene.outlets:
        if outlet.facing in ("pipe", "standpipe"):
            taken += [box.adjusted(-4.0, -2.0, 4.0, 2.0) for box in run_boxes(pipe_run(frame, scene, outlet))]
    for index, place in places.items():
        wide = max(scene.outlets[index].width * frame.pixels_per_metre, LEAST_WIDTH)
        boxes.append(
            (index, _label(painter, frame, scene, index, _beside(frame, scene, index, place, wide), taken, theme))
        )
    boxes += _paint_waterways(painter, frame, scene, taken, theme)
    for index, outlet in enumerate(scene.outlets):
        if outlet.facing == "side":
            foot = _paint_sideways(painter, frame, scene, outlet, theme)
            boxes.append((index, _label(painter, frame, scene, index, _over(frame, scene, index, foot), taken, theme)))
    return boxes


def _paint_waterways(
    painter: QPainter, frame: Frame, scene: Scene, taken: list[QRectF], theme: Theme
) -> list[tuple[int, QRectF]]:
    """Paint pipes, weirs and standpipes and write their sizes and flows."""
    boxes = []
    for index, outlet in enumerate(scene.outlets):
        paint_tailwater(painter, frame, scene, outlet, theme)
        if outlet.facing in ("pipe", "standpipe"):
            ways = _along(frame, outlet, paint_pipe(painter, frame, scene, outlet, theme))
        elif outlet.facing == "weir":
            foot = paint_weir(painter, frame, scene, outlet, theme)
            ways = _over(frame, scene, index, foot)
        else:
            continue
        boxes.append((index, _label(painter, frame, scene, index, ways, taken, theme)))
    return boxes


def _along(frame: Frame, outlet: DrawnOutlet, run: Run) -> Iterator[Label]:
    """Give the ways to label a pipe: beside its leg, left or right, then under its end."""
    (x, first), last = run.corners[0], run.corners[-1]
    size, flow = outlet.size_text, outlet.flow_text
    half = 0.5 * run.bore + 12.0
    low = max(first, frame.bottom) + 26.0
    for row in (low, low + 14.0, last[1] - 22.0, last[1] + 24.0, last[1] + 40.0):
        upper, lower = row - 0.5 * _LINE, row + 0.5 * _LINE
        for at, align in ((x - half, lettering.RIGHT), (last[0] + 12.0, lettering.LEFT), (x + half, lettering.LEFT)):
            yield (QPointF(at, upper), size, align), (QPointF(at, lower), flow, align)
    for row in (last[1] + 24.0, last[1] + 60.0):
        yield (QPointF(x, row), size, lettering.CENTRE), (QPointF(x, row + _LINE), flow, lettering.CENTRE)


def _opening_row(frame: Frame, scene: Scene, outlet: DrawnOutlet, place: float) -> float:
    metres, pixels = frame.across.knots
    across = float(np.interp(place, pixels, metres))
    return frame.y(min(floor_under(scene.outline, across), frame.vessel_height))


def _paint_opening(
    painter: QPainter, frame: Frame, outlet: DrawnOutlet, place: float, wide: float, floor: float, theme: Theme
) -> None:
    """Paint the gap in the floor, and the stand of an opening whose plane is raised above it."""
    painter.fillRect(QRectF(place - 0.5 * wide, floor, wide, WALL + 0.5), theme.colour("surface"))
    plane = frame.y(outlet.elevation)
    if floor - plane > 2.0:
        for column in (place - 0.5 * wide - 1.0, place + 0.5 * wide):
            plumb_line(painter, column, plane, floor, pen(theme.colour("wall"), 2.0))


def _paint_falling(painter: QPainter, place: float, wide: float, floor: float, length: float, theme: Theme) -> None:
    neck = 0.78 * wide
    down = np.linspace(0.0, 1.0, 12)
    contraction = 0.5 * wide
    half = 0.5 * (neck + (wide - neck) * (1.0 - down) ** 2)
    rows = np.concatenate((floor + contraction * down, [floor + length]))
    half = np.concatenate((half, [0.5 * max(neck, 2.0)]))
    shape = polygon(np.concatenate((place - half, (place + half)[::-1])), np.concatenate((rows, rows[::-1])))
    accent = theme.colour("accent")
    if theme.is_paper:
        fill(painter, shape, accent)
        return
    fade = QLinearGradient(0.0, floor, 0.0, floor + length)
    clear = QColor(accent)
    clear.setAlpha(0)
    fade.setColorAt(0.0, accent)
    fade.setColorAt(0.55, accent)
    fade.setColorAt(1.0, clear)
    fill(painter, shape, QBrush(fade))


def _paint_sideways(painter: QPainter, frame: Frame, scene: Scene, outlet: DrawnOutlet, theme: Theme) -> QPointF:
    """Paint the opening and the true parabola down to the ground; return where the jet leaves the wall."""
    span = surface_span(scene.outline, outlet.elevation)
    wall = frame.across.x(span[1] if span else 0.0)
    row = frame.y(outlet.elevation)
    tall = max(outlet.height * frame.pixels_per_metre, LEAST_WIDTH)
    painter.fillRect(QRectF(wall - 0.5, row - 0.5 * tall, WALL + 1.5, tall), theme.colour("surface"))
    if outlet.flow > 0.0 and outlet.head > 0.0:
        fall = np.linspace(0.0, 1.0, 40) ** 2 * outlet.elevation
        reach = 2.0 * JET_VELOCITY_COEFFICIENT * np.sqrt(outlet.head * fall)
        thick = max(0.8 * tall, LEAST_WIDTH)
        rows = row + fall * frame.pixels_per_metre
        painter.save()
        if outlet.tail is not None:
            painter.setClipRect(QRectF(wall - 2.0, 0.0, _DROWNED_JET, frame.bottom))
        fill(painter, ribbon(wall + reach * frame.pixels_per_metre, rows, thick), theme.colour("accent"))
        painter.restore()
    return QPointF(wall, row)


def _beside(frame: Frame, scene: Scene, index: int, place: float, wide: float) -> Iterator[Label]:
    """Give the ways to label a downward jet, best first."""
    outlet = scene.outlets[index]
    size, flow = outlet.size_text, outlet.flow_text
    row = frame.bottom + 36.0
    left, right = place - 0.5 * wide - 10.0, place + 0.5 * wide + 10.0
    yield (QPointF(left, row), size, lettering.RIGHT), (QPointF(right, row), flow, lettering.LEFT)
    for at, align in ((left, lettering.RIGHT), (right, lettering.LEFT)):
        yield (QPointF(at, row - 0.5 * _LINE), size, align), (QPointF(at, row + 0.5 * _LINE), flow, align)
    below = frame.bottom + JET + 10.0
    yield (QPointF(place, below), size, lettering.CENTRE), (QPointF(place, below + _LINE), flow, lettering.CENTRE)
    yield (QPointF(place, below), size, lettering.CENTRE), (QPointF(place, below), "", lettering.CENTRE)


def _over(frame: Frame, scene: Scene, index: int, foot: QPointF) -> Iterator[Label]:
    """Give the ways to label a sideways jet: above it, clear of the level lines."""
    outlet = scene.outlets[index]
    rows = [frame.row(mark.level) for mark in scene.marks if mark.key != "now"]
    left = foot.x() + 15.0
    tall = 0.5 * outlet.height * frame.pixels_per_metre

    gap = text_width(outlet.size_text, 12) + 14.0
    flows = (outlet.flow_text, outlet.flow_text.removesuffix(" out"))

    def beside(row: float, flow: str) -> Label:
        at = QPointF(left + gap, row)
        return (QPointF(left, row), outlet.size_text, lettering.LEFT), (at, flow, lettering.LEFT)

    def stacked(row: float, flow: str) -> Label:
        upper, lower = QPointF(left, row - _LINE), QPointF(left, row)
        return (upper, outlet.size_text, lettering.LEFT), (lower, flow, lettering.LEFT)

    def clear(row: float) -> bool:
        return all(abs(row - line) > 10.0 for line in rows)

    def wrapped(row: float, flow: str) -> Label:
        number, _, unit = flow.partition(NO_BREAK)
        upper, middle = QPointF(left, row - 2.0 * _LINE), QPointF(left, row - _LINE)
        lower = QPointF(left, row)
        return (
            (upper, outlet.size_text, lettering.LEFT),
            (middle, number, lettering.LEFT),
            (lower, unit, lettering.LEFT),
        )

    lifts = [foot.y() - tall - lift for lift in range(14, 120, 2)]
    for flow in flows:
        yield from (beside(row, flow) for row in lifts if clear(row))
        yield from (stacked(row, flow) for row in lifts if clear(row) and clear(row - _LINE))
    yield from (wrapped(row, flows[-1]) for row in lifts if all(clear(row - _LINE * line) for line in range(3)))
    yield from (((QPointF(left, row), outlet.size_text, lettering.LEFT),) for row in lifts if clear(row))
    # Where even the size alone finds no room, the label goes into the vessel.
    inside = foot.x() - 8.0
    yield (
        (QPointF(inside, lifts[0] - _LINE), outlet.size_text, lettering.RIGHT),
        (QPointF(inside, lifts[0]), flows[-1], lettering.RIGHT),
    )


def _label(
    painter: QPainter, frame: Frame, scene: Scene, index: int, ways: Iterator[Label], taken: list[QRectF], theme: Theme
) -> QRectF:
    """Write the first way that meets nothing; return the box of the size."""
    outlet = scene.outlets[index]
    weight = 600 if outlet.lit else 400
    # Left of the vessel stand dimensions.
    least = frame.across.left - 14.0 if frame.plan.columns else 0.0
    most = numbers_left(frame, scene) - 5.0
    chosen: Label | None = None
    boxes: Sequence[QRectF] = ()
    for chosen in ways:
        boxes = [lettering.text_box(at, text, 12, weight, align) for at, text, align in chosen if text]
        if not any(box.intersects(other) for box in boxes for other in taken) and all(
            box.left() >= least and box.right() <= most for box in boxes
        ):
            break
    taken.extend(boxes)
    if chosen is None:
        return QRectF()
    (size_at, size, size_align), *flows = chosen
    ground = theme.colour("surface")
    ink = theme.colour("accent" if outlet.lit else "ink")
    box = lettering.write(painter, size_at, size, ink, 12, weight, size_align, plate=ground)
    for at, flow, align in flows:
        if flow:
            lettering.write(painter, at, flow, theme.colour("accent"), align=align, plate=ground)
    return box


def landing(frame: Frame, scene: Scene) -> tuple[float, float, str] | None:
    """Return the farthest jet's reach on the page: from the wall, to where it lands, its text; None without one."""
    far = max((one for one in scene.outlets if one.reach > 0.0), key=lambda one: one.reach, default=None)
    if far is None or not math.isfinite(far.reach):
        return None
    span = surface_span(scene.outline, far.elevation)
    wall = frame.across.x(span[1] if span else 0.0)
    return wall, wall + far.reach * frame.pixels_per_metre, far.reach_text


def label_box(frame: Frame, place: float) -> QRectF:
    """Return the strip about a downward jet in which its size can be pointed at."""
    return QRectF(place - 70.0, frame.bottom + 6.0, 140.0, JET)
