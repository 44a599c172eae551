"""Dimension lines: a thin line, strokes at 45 degrees, witness lines and the text as typed in a gap."""

from __future__ import annotations

from collections.abc import Iterator
from contextlib import contextmanager
from dataclasses import dataclass

from PySide6.QtCore import QLineF, QPointF, QRectF
from PySide6.QtGui import QPainter

from headfall_app.paint import lettering
from headfall_app.paint.dimension_plan import COLUMN, ROW
from headfall_app.paint.fonts import text_width
from headfall_app.paint.jets import landing
from headfall_app.paint.kept import Kept, paint_kept, vessel_box, vessel_key
from headfall_app.paint.layout import Frame
from headfall_app.paint.outline_geometry import surface_span
from headfall_app.paint.scene import Scene
from headfall_app.paint.scene_dimensions import SizeLine
from headfall_app.paint.strokes import level_line, pen, plumb_line
from headfall_app.paint.theme import Theme
from headfall_app.paint.waterways import pipe_run, run_boxes

_CLEARANCE = 5.0
_STROKE = 3.5
_OVERSHOOT = 4.0
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
class _Line:
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
            _level_witness(on, frame, size, row, theme)
        for line in lines:
            _paint_line(on, line, theme)

    box = vessel_box(
        frame, _MARGIN + round(COLUMN) * max(frame.plan.column_count, frame.plan.below_count, frame.plan.above_count)
    )
    paint_kept(kept, painter, "dimensions", (tuple(lines), vessel_key(frame, scene, theme)), box, all_lines)
    for line in lines:
        _write(painter, line, theme)
    reach = landing(frame, scene)
    if reach is not None and reach[1] - reach[0] > 14.0:
        row = below_row(frame, 0)
        witness = pen(theme.colour("edge"), 0.8)
        for end in reach[:2]:
            plumb_line(painter, end, frame.bottom + 9.0, row + _OVERSHOOT, witness)
        room = frame.flags_left - 6.0 - reach[1] - 9.0
        text = reach[2] if text_width(reach[2], 12) <= room else reach[2].removeprefix("reach ")
        line = _Line(reach[:2], row, text, False, 1.0)
        _paint_line(painter, line, theme)
        _write(painter, line, theme)


def _column(frame: Frame, column: int) -> float:
    return float(round(frame.across.left - 26.0 - COLUMN * column))


def _rows(frame: Frame) -> Iterator[tuple[SizeLine, float]]:
    yield from ((size, below_row(frame, index)) for size, index in frame.plan.below)
    yield from ((size, above_row(frame, index)) for size, index in frame.plan.above)


def _upright_lines(frame: Frame, scene: Scene) -> Iterator[_Line]:
    for size, column in frame.plan.columns:
        low, high = sorted((size.start[1], size.end[1]))
        ends = (-float(frame.row(low)), -float(frame.row(high)))
        outwards = -1.0 if low + high < scene.height else 1.0
        yield _Line(ends, 0.0, size.text, size.lit, outwards, _column(frame, column))


def _level_lines(frame: Frame, scene: Scene) -> Iterator[_Line]:
    for size, row in _rows(frame):
        left, right = sorted((frame.across.x(size.start[0]), frame.across.x(size.end[0])))
        outwards = -1.0 if left + right < frame.across.left + frame.across.right - 1.0 else 1.0
        text = shown_text(frame, scene, size)
        yield _Line(
            (left, right), row, text, size.lit, outwards, share=_clear_share(frame, scene, left, right, row, text)
        )


def _clear_share(frame: Frame, scene: Scene, left: float, right: float, row: float, text: str) -> float:
    """Where a text stands clear of the pipes that run down past its line: in the middle, else at a quarter."""
    half = 0.5 * text_width(text, 12) + 8.0
    boxes = [box for one in scene.outlets if one.bores for box in run_boxes(pipe_run(frame, scene, one))]
    struck = [box for box in boxes if box.top() - 10.0 < row < box.bottom() + 10.0]
    for share in (0.5, 0.25, 0.75):
        middle = left + share * (right - left)
        if not any(box.left() < middle + half and box.right() > middle - half for box in struck):
            return share
    return 0.5


def _upright_witness(painter: QPainter, frame: Frame, scene: Scene, size: SizeLine, place: float, theme: Theme) -> None:
    witness = pen(theme.colour("edge"), 0.8)
    for across, up in sorted((size.start, size.end), key=lambda point: point[1]):
        span = surface_span(scene.outline, up)
        foot = frame.across.x(min(across, span[0]) if span else across)
        level_line(painter, place - _OVERSHOOT, foot - _CLEARANCE, frame.row(up), witness)


def _level_witness(painter: QPainter, frame: Frame, size: SizeLine, row: float, theme: Theme) -> None:
    witness = pen(theme.colour("edge"), 0.8)
    side = 1.0 if row > frame.bottom else -1.0
    for across, up in (size.start, size.end):
        column = frame.across.x(across)
        plumb_line(painter, column, frame.y(up) + side * (_CLEARANCE + 3.0), row + side * _OVERSHOOT, witness)


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
def _turned(painter: QPainter, line: _Line) -> Iterator[None]:
    """Turn the page for an upright line."""
    if line.column is None:
        yield
        return
    painter.save()
    painter.translate(line.column, 0.0)
    painter.rotate(-90.0)
    yield
    painter.restore()


def _paint_line(painter: QPainter, line: _Line, theme: Theme) -> None:
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


def _write(painter: QPainter, line: _Line, theme: Theme) -> None:
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
