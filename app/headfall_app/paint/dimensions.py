"""Dimension lines: a thin line, strokes at 45 degrees, witness lines and the text as typed in a gap."""

from __future__ import annotations

from collections.abc import Iterator
from contextlib import contextmanager
from dataclasses import dataclass, replace

from PySide6.QtCore import QLineF, QPointF, QRectF
from PySide6.QtGui import QPainter

from headfall_app.paint import lettering
from headfall_app.paint.dimension_plan import COLUMN, ROW
from headfall_app.paint.fonts import text_width
from headfall_app.paint.kept import Kept, paint_kept, vessel_box, vessel_key
from headfall_app.paint.layout import Frame
from headfall_app.paint.outline_geometry import floor_under, surface_span
from headfall_app.paint.pipe_run import landing, pipe_run, pit_box, receiver_box
from headfall_app.paint.scene import Scene
from headfall_app.paint.scene_dimensions import SizeLine
from headfall_app.paint.strokes import level_line, pen, plumb_line
from headfall_app.paint.theme import Theme

_CLEARANCE = 5.0
_STROKE = 3.5
_OVERSHOOT = 4.0
_PAST = 0.0
"""A share at which no text has room in the line: it stands past an end."""
_MARGIN = 100
"""How far about the vessel its first dimension lines may reach [px]."""


def dimension_boxes(frame: Frame, scene: Scene) -> Iterator[tuple[SizeLine, QRectF]]:
    """Give each dimension with the strip in which it can be pointed at."""
    for size, column in frame.plan.columns:
        place = frame.across.left - 26.0 - COLUMN * column
        upper, lower = sorted((frame.y(size.start[1]), frame.y(size.end[1])))
        yield size, QRectF(place - 10.0, upper, 20.0, lower - upper)
    for row_of, entries in ((below_row, frame.plan.below), (above_row, frame.plan.above)):
        for size, index in entries:
            y = row_of(frame, index)
            left, right = sorted((frame.across.x(size.start[0]), frame.across.x(size.end[0])))
            yield size, QRectF(left, y - 10.0, right - left, 20.0)


def below_row(frame: Frame, index: int) -> float:
    """Return the height of a row of dimensions below the vessel."""
    return frame.bottom + frame.first_row + ROW * index


def above_row(frame: Frame, index: int) -> float:
    """Return the height of a row of dimensions above the vessel."""
    return float(round(frame.top)) - 16.0 - ROW * index


@dataclass(frozen=True, slots=True)
class Line:
    """A dimension line on the page: along its row, or turned upwards about ``column``."""

    ends: tuple[float, float]
    row: float
    text: str
    lit: bool
    outwards: float
    column: float | None = None
    share: float = 0.5
    """How far along the line its text stands."""

    @property
    def middle(self) -> float:
        """Where its text stands along the line."""
        left, right = round(self.ends[0]), round(self.ends[1])
        return left + self.share * (right - left)

    @property
    def weight(self) -> int:
        """The weight of its text."""
        return 600 if self.lit else 400

    @property
    def room(self) -> float:
        """How wide the gap for its text is [px]."""
        return text_width(self.text, 12, self.weight) + 12.0

    @property
    def is_gapped(self) -> bool:
        """Whether the text stands in a gap of the line, not past its outer end."""
        return self.room <= 2.0 * min(self.share, 1.0 - self.share) * (round(self.ends[1]) - round(self.ends[0])) - 12.0


def paint_dimensions(painter: QPainter, frame: Frame, scene: Scene, theme: Theme, kept: Kept | None = None) -> None:
    """Paint the vessel's dimension lines and the reach of a sideways jet."""
    lines = [*_upright_lines(frame, scene), *_level_lines(frame, scene)]

    def all_lines(on: QPainter) -> None:
        for size, column in frame.plan.columns:
            _upright_witness(on, frame, scene, size, _column(frame, column), theme)
        for size, row in _rows(frame):
            _level_witness(on, frame, scene, size, row, theme)
        for line in lines:
            paint_line(on, line, theme)

    box = vessel_box(
        frame, _MARGIN + round(COLUMN) * max(frame.plan.column_count, frame.plan.below_count, frame.plan.above_count)
    )
    paint_kept(kept, painter, "dimensions", (tuple(lines), vessel_key(frame, scene, theme)), box, all_lines)
    for line in lines:
        write_line(painter, line, theme)
    reach = landing(frame, scene)
    if reach is not None and reach[1] - reach[0] > 14.0:
        row = below_row(frame, 0)
        witness = pen(theme.colour("edge"), 0.8)
        for end in reach[:2]:
            plumb_line(painter, end, frame.bottom + 9.0, row + _OVERSHOOT, witness)
        room = frame.flags_left - 6.0 - reach[1] - 9.0
        text = reach[2] if text_width(reach[2], 12) <= room else reach[2].removeprefix("reach ")
        line = Line(reach[:2], row, text, False, 1.0)
        paint_line(painter, line, theme)
        write_line(painter, line, theme)


def _column(frame: Frame, column: int) -> float:
    return float(round(frame.across.left - 26.0 - COLUMN * column))


def _rows(frame: Frame) -> Iterator[tuple[SizeLine, float]]:
    yield from ((size, below_row(frame, index)) for size, index in frame.plan.below)
    yield from ((size, above_row(frame, index)) for size, index in frame.plan.above)


def _upright_lines(frame: Frame, scene: Scene) -> Iterator[Line]:
    for size, column in frame.plan.columns:
        low, high = sorted((size.start[1], size.end[1]))
        ends = (-float(frame.row(low)), -float(frame.row(high)))
        outwards = -1.0 if low + high < scene.height else 1.0
        yield Line(ends, 0.0, size.text, size.lit, outwards, _column(frame, column))


def _level_lines(frame: Frame, scene: Scene) -> Iterator[Line]:
    for size, row in _rows(frame):
        left, right = sorted((frame.across.x(size.start[0]), frame.across.x(size.end[0])))
        outwards = -1.0 if left + right < frame.across.left + frame.across.right - 1.0 else 1.0
        text = shown_text(frame, scene, size)
        line = Line((left, right), row, text, size.lit, outwards)
        yield _clear_of_pipes(frame, scene, line) if row > frame.bottom else line


def _clear_of_pipes(frame: Frame, scene: Scene, line: Line) -> Line:
    """Move a text off the pipes that run down past its line: to a quarter, else past an end."""
    runs = [pipe_run(frame, scene, one) for one in scene.outlets if one.is_pipe]
    boxes = [box for run in runs for box in (*run.boxes, run.fall_box)]
    boxes += [pit_box(frame, scene, one) for one in scene.outlets] + [receiver_box(frame, scene)]
    struck = [box for box in boxes if box.top() - 10.0 < line.row < box.bottom() + 10.0]
    (left, right), room = line.ends, line.room
    ways = [replace(line, share=share) for share in (0.5, 0.25, 0.75, 0.3, 0.7)] if line.is_gapped else []
    ways += [replace(line, outwards=side, share=_PAST) for side in (line.outwards, -line.outwards)]
    for way in ways:
        start = way.middle - 0.5 * room if way.is_gapped else right if way.outwards > 0.0 else left - room
        if not any(box.left() < start + room + 3.0 and box.right() > start - 3.0 for box in struck):
            return way
    return line


def _upright_witness(painter: QPainter, frame: Frame, scene: Scene, size: SizeLine, place: float, theme: Theme) -> None:
    witness = pen(theme.colour("edge"), 0.8)
    for across, up in sorted((size.start, size.end), key=lambda point: point[1]):
        span = surface_span(scene.outline, up)
        foot = frame.across.x(min(across, span[0]) if span else across)
        level_line(painter, place - _OVERSHOOT, foot - _CLEARANCE, frame.row(up), witness)


def _level_witness(painter: QPainter, frame: Frame, scene: Scene, size: SizeLine, row: float, theme: Theme) -> None:
    witness = pen(theme.colour("edge"), 0.8)
    side = 1.0 if row > frame.bottom else -1.0
    for across, up in (size.start, size.end):
        column = frame.across.x(across)
        if side > 0.0:
            # Along an upright wall the line would only blur it: it begins where the wall ends.
            up = min(up, floor_under(scene.outline, across))
        plumb_line(painter, column, frame.y(up) + side * (_CLEARANCE + 3.0), row + side * _OVERSHOOT, witness)


def dimension_obstacles(frame: Frame, scene: Scene) -> list[QRectF]:
    """Return what no other word may stand on: the texts of the dimensions, and the lines themselves."""
    found = []
    for line in (*_upright_lines(frame, scene), *_level_lines(frame, scene)):
        low, high = line.ends
        middle, half = line.middle, 0.5 * line.room
        strips = [(low, high, 3.0), (middle - half, middle + half, 9.0)]
        if not line.is_gapped:
            strips[1] = (high, high + 2.0 * half, 9.0) if line.outwards > 0.0 else (low - 2.0 * half, low, 9.0)
        for start, end, tall in strips:
            if line.column is None:
                found.append(QRectF(start, line.row - tall, end - start, 2.0 * tall))
            else:
                found.append(QRectF(line.column - tall, -end, 2.0 * tall, end - start))
    return found


def shown_text(frame: Frame, scene: Scene, size: SizeLine) -> str:
    """Return a size's text, with what is left out where the line runs over a break."""
    left, right = sorted((size.start[0], size.end[0]))
    out = sum(
        after[0] - before[1]
        for before, after in zip(frame.across.stretches[:-1], frame.across.stretches[1:], strict=True)
        if left <= before[1] and right >= after[0]
    )
    return f"{size.text}, {scene.display.text(out, 'length')} left out" if out > 0.0 else size.text


@contextmanager
def _turned(painter: QPainter, line: Line) -> Iterator[None]:
    """Turn the page for an upright line."""
    if line.column is None:
        yield
        return
    painter.save()
    painter.translate(line.column, 0.0)
    painter.rotate(-90.0)
    yield
    painter.restore()


def paint_line(painter: QPainter, line: Line, theme: Theme) -> None:
    """Draw the line with a gap for its text, whole where the gap would leave no line."""
    colour = theme.colour("accent" if line.lit else "muted")
    width = 1.6 if line.lit else 1.0
    left, right = round(line.ends[0]), round(line.ends[1])
    middle, half = line.middle, 0.5 * line.room
    drawn = pen(colour, width)
    with _turned(painter, line):
        if line.is_gapped:
            level_line(painter, left, middle - half, line.row, drawn)
            level_line(painter, middle + half, right, line.row, drawn)
        else:
            level_line(painter, left, right, line.row, drawn)
        painter.setPen(pen(colour, width if line.lit else 1.2))
        for end in (left, right):
            painter.drawLine(QLineF(end - _STROKE, line.row + _STROKE, end + _STROKE, line.row - _STROKE))


def write_line(painter: QPainter, line: Line, theme: Theme) -> None:
    """Write the line's text in its gap, or past its outer end."""
    left, right = round(line.ends[0]), round(line.ends[1])
    if line.is_gapped:
        at, align = QPointF(line.middle, line.row), lettering.CENTRE
    elif line.outwards > 0.0:
        at, align = QPointF(right + 9.0, line.row), lettering.LEFT
    else:
        at, align = QPointF(left - 9.0, line.row), lettering.RIGHT
    ink = theme.colour("accent" if line.lit else "ink")
    with _turned(painter, line):
        lettering.write(painter, at, line.text, ink, 12, line.weight, align, plate=theme.colour("surface"))
