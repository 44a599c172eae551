"""Each outlet's size and flow beside it, clear of everything that is drawn."""

from __future__ import annotations

from collections.abc import Iterator, Sequence
from dataclasses import dataclass
from itertools import chain

import numpy as np
from PySide6.QtCore import QPointF, QRectF
from PySide6.QtGui import QPainter

from headfall.quantities.display import NO_BREAK
from headfall_app.paint import lettering
from headfall_app.paint.fonts import text_width
from headfall_app.paint.layout import JET, Frame
from headfall_app.paint.pipe_run import Run
from headfall_app.paint.scene import Scene
from headfall_app.paint.scene_outlets import DrawnOutlet
from headfall_app.paint.theme import Theme

LINE = 17.0
_SIZE, _MORE, _FLOW = "size", "more", "flow"


@dataclass(frozen=True, slots=True)
class Line:
    """One line of a label: ``kind`` is size, more or flow."""

    at: QPointF
    text: str
    align: float
    kind: str = _SIZE


Label = tuple[Line, ...]


def stacked(left: float, row: float, align: float, texts: Sequence[tuple[str, str]]) -> Label:
    """Return lines one under another, the first at a row; empty ones are left out."""
    kept = [(text, kind) for text, kind in texts if text]
    return tuple(Line(QPointF(left, row + LINE * index), text, align, kind) for index, (text, kind) in enumerate(kept))


def texts_of(outlet: DrawnOutlet) -> list[tuple[str, str]]:
    """Return what is to be said of an outlet, with the kind of each."""
    return [(outlet.size_text, _SIZE), (outlet.more_text, _MORE), (outlet.flow_text, _FLOW)]


def along(frame: Frame, outlet: DrawnOutlet, run: Run) -> Iterator[Label]:
    """Give the ways to label a pipe: beside its leg, right or left, then past or under its end."""
    (x, first), last = run.corners[0], run.end
    texts = texts_of(outlet)
    tall = LINE * (sum(bool(text) for text, _ in texts) - 1)
    if len(run.corners) > 2:
        x = run.corners[1][0]
    half = 0.5 * max(run.bores) + 12.0
    top = max(min(first, last[1]), frame.bottom) + 20.0
    bottom = max(first, last[1]) - tall - 16.0
    rows = [top + step for step in range(0, max(round(bottom - top), 1), 6)]
    for row in rows:
        yield stacked(x + half, row, lettering.LEFT, texts)
        yield stacked(x - half, row, lettering.RIGHT, texts)
    beyond = max(x, last[0]) + 30.0
    for row in rows:
        yield stacked(beyond, row, lettering.LEFT, texts)
    beside, align = (max(x, last[0]) + 62.0, lettering.LEFT)
    for step in (0.0, -20.0, -40.0, 20.0, 40.0):
        yield stacked(beside, last[1] + step, align, texts)
        yield stacked(min(x, last[0]) - half, last[1] + step, lettering.RIGHT, texts)
    for drop in range(22, 130, 6):
        yield stacked(0.5 * (x + last[0]), max(first, last[1]) + drop, lettering.CENTRE, texts)
    for row in rows:
        yield stacked(x + half + 40.0, row, lettering.LEFT, texts)
        yield stacked(x - half - 40.0, row, lettering.RIGHT, texts)
        yield stacked(x + half, row, lettering.LEFT, texts[:1])


def beside(frame: Frame, outlet: DrawnOutlet, place: float, wide: float) -> Iterator[Label]:
    """Give the ways to label a downward jet, best first."""
    size, flow = outlet.size_text, outlet.flow_text
    row = frame.bottom + 36.0
    left, right = place - 0.5 * wide - 10.0, place + 0.5 * wide + 10.0
    yield (
        Line(QPointF(left, row), size, lettering.RIGHT),
        Line(QPointF(right, row), flow, lettering.LEFT, _FLOW),
    )
    both = [(size, _SIZE), (flow, _FLOW)]
    for up in (0.5 * LINE, 0.8 * LINE):
        yield stacked(left, row - up, lettering.RIGHT, both)
        yield stacked(right, row - up, lettering.LEFT, both)
    below = frame.bottom + JET + 10.0
    yield stacked(place, below, lettering.CENTRE, both)
    for row in (*(below + step for step in range(0, 120, 6)), frame.bottom + 18.0):
        yield stacked(left, row, lettering.RIGHT, both)
        yield stacked(right, row, lettering.LEFT, both)
        yield stacked(place, row, lettering.CENTRE, both)
    yield stacked(place, below, lettering.CENTRE, both[:1])


def anywhere(frame: Frame, outlet: DrawnOutlet) -> Iterator[Label]:
    """Give the last places for words that find no room at what they say: under the vessel, the nearest first."""
    lowest = frame.bottom + frame.under + 40.0
    for row in np.arange(frame.bottom + 20.0, lowest, 8.0):
        for column in np.arange(frame.across.left - 10.0, frame.staff_left - 40.0, 10.0):
            yield stacked(float(column), float(row), lettering.LEFT, texts_of(outlet))


def over(frame: Frame, scene: Scene, outlet: DrawnOutlet, foot: QPointF) -> Iterator[Label]:
    """Give the ways to label what leaves sideways: above it, clear of the level lines."""
    rows = [frame.row(mark.level) for mark in scene.marks if mark.key != "now"]
    left = foot.x() + 15.0
    tall = 0.5 * outlet.height * frame.pixels_per_metre if outlet.facing == "side" else 0.0
    gap = text_width(outlet.size_text, 12) + 14.0
    size, flows = outlet.size_text, (outlet.flow_text, outlet.flow_text.removesuffix(" out"))

    def clear(row: float, lines: int = 1) -> bool:
        return all(abs(row + LINE * index - line) > 10.0 for line in rows for index in range(lines))

    lifts = [foot.y() - tall - lift for lift in range(14, 120, 2)]
    for flow in flows:
        for row in lifts:
            if clear(row):
                first = Line(QPointF(left, row), size, lettering.LEFT)
                yield first, Line(QPointF(left + gap, row), flow, lettering.LEFT, _FLOW)
        for row in (lift - LINE for lift in lifts):
            if clear(row, 2):
                yield stacked(left, row, lettering.LEFT, [(size, _SIZE), (flow, _FLOW)])
    number, _, unit = flows[-1].partition(NO_BREAK)
    for row in (lift - 2.0 * LINE for lift in lifts):
        if clear(row, 3):
            yield stacked(left, row, lettering.LEFT, [(size, _SIZE), (number, _FLOW), (unit, _FLOW)])
    for row in lifts:
        if clear(row):
            yield stacked(left, row, lettering.LEFT, [(size, _SIZE)])
    # Where even the size alone finds no room, the label goes into the vessel.
    yield stacked(foot.x() - 8.0, lifts[0] - LINE, lettering.RIGHT, [(size, _SIZE), (flows[-1], _FLOW)])


def paint_label(
    painter: QPainter, frame: Frame, outlet: DrawnOutlet, ways: Iterator[Label], room: tuple[float, float],
    taken: list[QRectF], theme: Theme,
) -> QRectF:  # fmt: skip
    """Write the first way that meets nothing and stays in ``room``, (left, right); return the box of the size."""
    weight = 600 if outlet.lit else 400
    least, most = room
    lowest = min(frame.bottom + frame.under + 64.0, frame.height - 1.0)

    def fits(label: Label) -> bool:
        boxes = boxes_of(label, weight)
        inside = all(box.left() >= least and box.right() <= most and box.bottom() <= lowest for box in boxes)
        return inside and not any(box.intersects(other) for box in boxes for other in taken)

    first = next(ways)
    last = anywhere(frame, outlet) if outlet.is_pipe or outlet.facing == "down" else iter(())
    chosen = next((label for label in chain([first], ways, last) if fits(label)), first)
    taken.extend(boxes_of(chosen, weight))
    size_box = QRectF()
    plate = theme.colour("surface")
    for line in chosen:
        if not line.text:
            continue
        role = "accent" if line.kind == _FLOW or outlet.lit else "ink"
        box = lettering.write(
            painter, line.at, line.text, theme.colour(role), 12, _weight(line, weight), line.align, plate=plate
        )
        size_box = box if line.kind == _SIZE else size_box
    return size_box


def _weight(line: Line, lit: int) -> int:
    return 400 if line.kind == _FLOW else lit


def boxes_of(label: Label, lit: int = 400) -> list[QRectF]:
    """Return where a label's lines stand."""
    return [lettering.text_box(one.at, one.text, 12, _weight(one, lit), one.align) for one in label if one.text]
