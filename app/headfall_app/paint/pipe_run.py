"""Where pipes, links and what they discharge into stand on the page."""

from __future__ import annotations

import math
from collections.abc import Sequence
from dataclasses import dataclass

from PySide6.QtCore import QPointF, QRectF

from headfall_app.paint.layout import JET, PIPE_STEP, RECEIVER_EDGE, STAFF_NUMBERS, STANDPIPE_PLACE, Frame
from headfall_app.paint.outline_geometry import extent, floor_under, surface_span
from headfall_app.paint.scene import Scene
from headfall_app.paint.scene_outlets import DrawnOutlet
from headfall_app.paint.section import WALL

Point = tuple[float, float]
SHELL = 2.0
LEAST_BORE = 5.0
LINK_BORE = 5.0
_STUB, _REACH = 40.0, 54.0
PIT, PIT_DEPTH = 34.0, 26.0
_BESIDE = 70.0
_TAPER = 5.0


@dataclass(frozen=True, slots=True)
class Run:
    """A pipe on the page: its corners from inlet to end, and the bore of each of its sections [px]."""

    corners: tuple[Point, ...]
    bores: tuple[float, ...]

    @property
    def end(self) -> Point:
        """Where it ends."""
        return self.corners[-1]

    @property
    def towards(self) -> Point:
        """The direction of its last stretch."""
        (x0, y0), (x1, y1) = self.corners[-2:]
        long = math.hypot(x1 - x0, y1 - y0) or 1.0
        return (x1 - x0) / long, (y1 - y0) / long

    @property
    def stretches(self) -> list[tuple[Point, Point]]:
        """Its straight stretches."""
        return list(zip(self.corners[:-1], self.corners[1:], strict=True))

    @property
    def boxes(self) -> list[QRectF]:
        """The boxes that its straight stretches take on the page."""
        half = 0.5 * max(self.bores) + SHELL
        return [
            QRectF(QPointF(min(x0, x1), min(y0, y1)), QPointF(max(x0, x1), max(y0, y1))).adjusted(
                -half, -half, half, half
            )
            for (x0, y0), (x1, y1) in self.stretches
        ]

    @property
    def fall_box(self) -> QRectF:
        """The box that the free jet from its end takes."""
        (x, y), (ahead, _) = self.end, self.towards
        left, right = (10.0, 46.0) if ahead > 0.5 else (46.0, 10.0)
        if abs(ahead) < 0.5:
            left = right = 0.5 * self.bores[-1] + 6.0
        return QRectF(x - left, y - 6.0, left + right, 34.0)

    @property
    def parts(self) -> list[tuple[tuple[Point, ...], float]]:
        """Its sections as (corners, bore): equal parts of the way, for the drawing does not show their true lengths."""
        total = sum(math.dist(*ends) for ends in self.stretches)
        count = len(self.bores)
        cuts = [0.0, *(self._clear_of_corners(total * index / count) for index in range(1, count)), total]
        return [
            (self._between(start, end), bore)
            for start, end, bore in zip(cuts[:-1], cuts[1:], self.bores, strict=True)
            if end - start > 1.0
        ]

    def _clear_of_corners(self, along: float) -> float:
        """Move a cut off a bend: a reducer stands in a straight stretch."""
        room = 0.5 * max(self.bores) + _TAPER + 4.0
        at = 0.0
        for ends in self.stretches[:-1]:
            at += math.dist(*ends)
            if abs(along - at) < room:
                return at - room if along < at else at + room
        return along

    def _between(self, start: float, end: float) -> tuple[Point, ...]:
        found: list[Point] = []
        at = 0.0
        for (x0, y0), (x1, y1) in self.stretches:
            long = math.hypot(x1 - x0, y1 - y0)
            low, high = max(start - at, 0.0), min(end - at, long)
            if high > low:
                for along in (low, high):
                    point = (x0 + (x1 - x0) * along / long, y0 + (y1 - y0) * along / long)
                    if not found or math.dist(found[-1], point) > 1e-6:
                        found.append(point)
            at += long
        return tuple(found)


def pipe_run(frame: Frame, scene: Scene, outlet: DrawnOutlet) -> Run:
    """Return where a pipe or a standpipe is drawn: through the floor, or through the wall from a raised inlet."""
    bores = tuple(max(bore * frame.pixels_per_metre, LEAST_BORE) for bore in outlet.bores or (outlet.width,))
    end = frame.y(outlet.end_level)
    if outlet.facing == "standpipe":
        left, right = surface_span(scene.outline, outlet.elevation) or (0.0, 1.0)
        share = STANDPIPE_PLACE - 0.2 * _rank(outlet, [one for one in scene.outlets if one.facing == "standpipe"])
        x = frame.across.x(left + share * (right - left))
        foot = frame.bottom + _STUB if outlet.discharge is None else max(end, frame.bottom + WALL)
        if _is_received(scene, outlet):
            turn = _entry_row(frame, scene, foot)
            return Run(((x, frame.y(outlet.elevation)), (x, turn), (_entry_x(frame, scene, turn), turn)), bores)
        return Run(((x, frame.y(outlet.elevation)), (x, foot)), bores)
    if outlet.by_wall:
        return Run(_by_wall(frame, scene, outlet, bores, end), bores)
    x = floor_places(frame, scene)[_rank(outlet, scene.outlets)]
    turn = max(end, frame.bottom + WALL + 0.5 * bores[-1] + 4.0)
    away = x + _side(frame, x) * _REACH
    if _is_received(scene, outlet):
        away = _entry_x(frame, scene, turn)
    return Run(((x, frame.y(outlet.elevation)), (x, turn), (away, turn)), bores)


def _by_wall(
    frame: Frame, scene: Scene, outlet: DrawnOutlet, bores: tuple[float, ...], end: float
) -> tuple[Point, ...]:
    span = surface_span(scene.outline, max(outlet.elevation, 1e-6 * scene.height))
    wall = frame.across.x(span[1] if span else 0.0)
    row = min(frame.y(outlet.elevation), frame.bottom - 0.5 * bores[0])
    # What is under an overhanging wall leads out from under it first.
    turn = max(wall, frame.across.right if end < row else wall) + 0.5 * _STUB
    beside = [one for one in scene.outlets if one.facing == "pipe" and one.by_wall]
    turn += PIPE_STEP * _rank(outlet, beside)
    away = _entry_x(frame, scene, end) if _is_received(scene, outlet) else turn + 0.6 * _REACH
    if abs(end - row) < 2.0:
        return (wall - 1.0, row), (away, row)
    return (wall - 1.0, row), (turn, row), (turn, end), (away, end)


def floor_places(frame: Frame, scene: Scene) -> dict[int, float]:
    """Return where each outlet in the floor is drawn [px]; several at one place stand beside one another."""
    inside = [
        (index, outlet)
        for index, outlet in enumerate(scene.outlets)
        if outlet.facing == "down" or (outlet.facing == "pipe" and not outlet.by_wall)
    ]
    true = {index: frame.across.x(outlet.across) for index, outlet in inside}
    places: dict[int, float] = {}
    for index, _ in inside:
        same = [other for other, _ in inside if abs(true[other] - true[index]) < 1.0]
        room = 0.8 * (frame.across.right - frame.across.left)
        pitch = min(112.0 if any(scene.outlets[other].is_pipe for other in same) else 96.0, room / len(same))
        places[index] = true[index] + pitch * (same.index(index) - 0.5 * (len(same) - 1))
    return places


def _rank(outlet: DrawnOutlet, among: Sequence[DrawnOutlet]) -> int:
    """Return an outlet's place among others; two that are alike are still two."""
    return next((index for index, one in enumerate(among) if one is outlet), 0)


def _side(frame: Frame, x: float) -> float:
    """Return to which side a pipe turns away under the vessel: to the right where there is room."""
    right = frame.staff_left - STAFF_NUMBERS
    return 1.0 if x + _REACH + PIT + 10.0 <= right or x - _REACH - PIT < frame.across.left else -1.0


def _is_received(scene: Scene, outlet: DrawnOutlet) -> bool:
    return scene.receiver is not None and outlet is scene.outlets[0]


def receiver_box(frame: Frame, scene: Scene) -> QRectF:
    """Return where the receiving vessel is drawn: to scale upwards, squeezed across where it is wide."""
    receiver = scene.receiver
    if receiver is None:
        return QRectF()
    low, high = extent(receiver.outline)
    left = frame.across.right + frame.receiver_gap - 2.0 * WALL
    room = max(frame.staff_left - STAFF_NUMBERS - RECEIVER_EDGE - left, 30.0)
    top, bottom = frame.y(receiver.elevation + receiver.height), frame.y(receiver.elevation)
    return QRectF(left, top, min((high - low) * frame.pixels_per_metre, room), bottom - top)


def _entry_row(frame: Frame, scene: Scene, row: float) -> float:
    """Return the row nearest to another at which a link can enter the receiving vessel."""
    box = receiver_box(frame, scene)
    return min(max(row, box.top() + 8.0), box.bottom() - 8.0)


def _entry_x(frame: Frame, scene: Scene, row: float) -> float:
    """Return where a pipe at a row ends: at the receiving vessel's wall, over its mouth where it comes from above."""
    box = receiver_box(frame, scene)
    receiver = scene.receiver
    assert receiver is not None
    if row < box.top():
        return box.left() + 0.3 * box.width()
    if row > box.bottom():
        return box.left() - WALL
    level = (box.bottom() - row) / frame.pixels_per_metre
    span = surface_span(receiver.outline, level)
    return receiver_x(frame, scene, span[0]) if span else box.left()


def receiver_x(frame: Frame, scene: Scene, across: float) -> float:
    """Return where a place across the receiving vessel [m] stands on the page."""
    assert scene.receiver is not None
    box, (low, high) = receiver_box(frame, scene), extent(scene.receiver.outline)
    return box.left() + (across - low) / (high - low) * box.width()


def link_run(frame: Frame, scene: Scene) -> Run | None:
    """Return the link from an opening to the receiving vessel; its true way is no part of the case."""
    if scene.receiver is None or scene.outlets[0].is_pipe:
        return None
    outlet = scene.outlets[0]
    if outlet.facing == "down":
        across = outlet.across
        x, low = frame.across.x(across), receiver_box(frame, scene).bottom() - 8.0
        row = min(frame.bottom + JET - 6.0, max(low, frame.bottom + 16.0))
        start: tuple[Point, ...] = ((x, frame.y(floor_under(scene.outline, across))), (x, row))
    else:
        span = surface_span(scene.outline, outlet.elevation)
        x, row = frame.across.x(span[1] if span else 0.0), frame.y(outlet.elevation)
        start = ((x, row),)
    entry = _entry_row(frame, scene, row)
    end = (_entry_x(frame, scene, entry), entry)
    bend = receiver_box(frame, scene).left() - 16.0
    between: tuple[Point, ...] = ((bend, row), (bend, entry)) if abs(entry - row) > 1.0 else ()
    return Run((*start, *between, end), (LINK_BORE,))


def pit_box(frame: Frame, scene: Scene, outlet: DrawnOutlet) -> QRectF:
    """Return the water that an outlet discharges into: about a pipe's end, else beside the vessel; empty without."""
    if outlet.tail is None or scene.receiver is not None:
        return QRectF()
    row = frame.y(outlet.tail)
    if outlet.is_pipe:
        x, y = pipe_run(frame, scene, outlet).end
        foot = max(y + PIT_DEPTH, row + 8.0)
        return QRectF(QPointF(x - PIT, row), QPointF(x + PIT, foot))
    left = frame.across.right + WALL + 2.0
    right = min(left + _BESIDE - 5.0, frame.staff_left - STAFF_NUMBERS)
    return QRectF(QPointF(left, row), QPointF(right, max(frame.bottom + PIT_DEPTH, row + 8.0)))


def mouth(frame: Frame, scene: Scene, outlet: DrawnOutlet) -> tuple[Point, float]:
    """Return where a sideways opening stands in the wall, and how far right what leaves it comes into the open."""
    span = surface_span(scene.outline, outlet.elevation)
    wall = frame.across.x(span[1] if span else 0.0)
    open_at = frame.across.right + WALL if scene.banked and frame.across.right - wall > 14.0 else wall
    return (wall, frame.y(outlet.elevation)), open_at


def landing(frame: Frame, scene: Scene) -> tuple[float, float, str] | None:
    """Return the farthest jet's reach on the page: from where it begins, to where it lands, its text; or None."""
    far = max((one for one in scene.outlets if one.reach > 0.0), key=lambda one: one.reach, default=None)
    if far is None or not math.isfinite(far.reach):
        return None
    _, start = mouth(frame, scene, far)
    return start, start + far.reach * frame.pixels_per_metre, far.reach_text


def outside_text(scene: Scene, outlet: DrawnOutlet) -> str:
    """Return what is written under the water outside."""
    return "" if outlet.tail is None else f"outside, {scene.display.text(outlet.tail, 'level')}"
