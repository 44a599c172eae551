"""The dimension of how far a pipe's end lies below or above its inlet."""

from __future__ import annotations

from dataclasses import dataclass

from PySide6.QtCore import QPointF, QRectF
from PySide6.QtGui import QPainter

from headfall_app.paint.around import outside_words
from headfall_app.paint.dimensions import Line, paint_line, write_line
from headfall_app.paint.fonts import text_width
from headfall_app.paint.layout import Frame
from headfall_app.paint.pipe_run import Run, pipe_run, receiver_box
from headfall_app.paint.scene import Scene
from headfall_app.paint.scene_outlets import DrawnOutlet
from headfall_app.paint.staff import numbers_left
from headfall_app.paint.strokes import level_line, pen
from headfall_app.paint.theme import Theme

_LEAST = 16.0
_CLEARANCE, _OVER = 5.0, 4.0


def drop_line(frame: Frame, scene: Scene, outlet: DrawnOutlet, taken: list[QRectF]) -> tuple[Line, Run] | None:
    """Return a pipe's dimension with the pipe's run, beside its leg and clear of what is taken; None where it
    has no room, for the staff tells the level of the end too."""
    if outlet.facing != "pipe" or outlet.discharge is None:
        return None
    upper, lower = sorted((frame.y(outlet.elevation), frame.y(outlet.discharge)))
    if lower - upper < _LEAST:
        return None
    run = pipe_run(frame, scene, outlet)
    leg, end = run.corners[-2][0], run.end[0]
    side = 1.0 if end >= leg else -1.0
    near = 0.5 * max(run.bores) + (20.0 if outlet.valve else 15.0)
    steps = [*((-side, near + gap) for gap in (0, 6, 12)), *((side, near + gap) for gap in range(0, 40, 6))]
    steps += [(side, abs(end - leg) + gap) for gap in range(10, 70, 6)]
    steps += [(-side, near + gap) for gap in range(18, 120, 6)]
    lines = [_line(leg + way * gap, upper, lower, outlet, share) for way, gap in steps for share in (0.5, 0.32, 0.68)]
    room = _Room(
        frame,
        numbers_left(frame, scene) - 12.0,
        receiver_box(frame, scene).adjusted(-5.0, 0.0, 5.0, 0.0),
        [frame.across.x(at[0]) for size, _ in frame.plan.below for at in (size.start, size.end)],
        run.boxes,
        taken,
        outside_words(frame, scene),
    )
    line = next((one for one in lines if _is_clear(one, room)), None)
    return None if line is None else (line, run)


def _line(column: float, upper: float, lower: float, outlet: DrawnOutlet, share: float) -> Line:
    return Line((-lower, -upper), 0.0, outlet.fall_text, outlet.lit, -1.0, float(round(column)), share)


def _text_box(line: Line) -> QRectF:
    assert line.column is not None
    half = 0.5 * text_width(line.text, 12, line.weight) + 2.0
    lower = -line.ends[0]
    middle = -line.middle if line.is_gapped else lower + 9.0 + half
    return QRectF(line.column - 9.0, middle - half, 18.0, 2.0 * half)


@dataclass(frozen=True, slots=True)
class _Room:
    """What the dimension keeps clear of: the staff's numbers from ``right`` on, witness lines, boxes."""

    frame: Frame
    right: float
    receiver: QRectF
    witnesses: list[float]
    own: list[QRectF]
    taken: list[QRectF]
    words: list[QRectF]


def _is_clear(line: Line, room: _Room) -> bool:
    text, strip, across = _text_box(line), _strip(line), room.frame.across
    column = line.column or 0.0
    if not across.left - 30.0 < column < room.right:
        return False
    if strip.top() < room.frame.bottom - 4.0 and across.left - 4.0 < column < across.right + 14.0:
        return False
    if any(abs(column - witness) < 7.0 for witness in room.witnesses) or room.receiver.intersects(strip):
        return False
    if any(strip.adjusted(6.0, 0.0, -6.0, 0.0).intersects(other) for other in room.words):
        return False
    inner = strip.adjusted(5.0, 12.0, -5.0, -12.0)
    return not any(inner.intersects(other) for other in room.own) and not any(
        text.intersects(other) for other in room.taken
    )


def _strip(line: Line) -> QRectF:
    assert line.column is not None
    return QRectF(QPointF(line.column - 9.0, -line.ends[1]), QPointF(line.column + 9.0, -line.ends[0]))


def drop_strip(line: Line) -> QRectF:
    """Return what the dimension takes on the page."""
    return _strip(line).united(_text_box(line))


def paint_drop(painter: QPainter, frame: Frame, line: Line, run: Run, theme: Theme) -> None:
    """Paint the dimension and its witness lines, which begin at the pipe."""
    assert line.column is not None
    witness = pen(theme.colour("edge"), 0.8)
    half = 0.5 * max(run.bores) + _CLEARANCE
    for corner in ((run.corners[0], run.corners[1]), (run.corners[-2], run.corners[-1])):
        row = corner[0][1] if corner[0] is run.corners[0] else corner[1][1]
        if abs(row - frame.bottom) < 5.0:
            # The floor itself is the line to measure from.
            continue
        left, right = sorted((corner[0][0], corner[1][0]))
        if line.column > right:
            level_line(painter, right + half, line.column + _OVER, row, witness)
        elif line.column < left:
            level_line(painter, left - half, line.column - _OVER, row, witness)
    paint_line(painter, line, theme)
    write_line(painter, line, theme)
