"""What can be pointed at, dragged and reached by keyboard on the stage."""

from __future__ import annotations

from dataclasses import dataclass

from PySide6.QtCore import QPointF, QRectF

from headfall.case.model import Path
from headfall_app.paint.curve import cursor_plate
from headfall_app.paint.dimensions import dimension_boxes
from headfall_app.paint.flags import placed_flags
from headfall_app.paint.jets import jet_places, label_box
from headfall_app.paint.layout import Frame
from headfall_app.paint.pipe_run import pipe_run
from headfall_app.paint.scene import Scene
from headfall_app.paint.thumbnail import thumbnail_box
from headfall_app.paint.ticks import nice_step
from headfall_app.view.level_drag import scale_of, small_step

DRAGGED = ("overflow", "start", "stop")


@dataclass(frozen=True, slots=True)
class Target:
    """What lies under the pointer: ``kind`` is flag, time, outline, entry or empty; ``row`` is a flag's true row."""

    kind: str = ""
    key: str = ""
    row: float = 0.0
    path: Path | None = None


def target_at(at: QPointF, frame: Frame, scene: Scene) -> Target:
    """Return what lies under a point."""
    for flag in placed_flags(frame, scene):
        if flag.box.contains(at):
            if flag.mark.path is None:
                return Target()
            return Target("flag", flag.mark.key, frame.row(flag.mark.level), flag.mark.path)
    if thumbnail_box(frame, scene).contains(at):
        return Target("outline", "outline")
    for size, box in dimension_boxes(frame, scene):
        if size.path is not None and box.contains(at):
            return Target("entry", path=size.path)
    for index, place in jet_places(frame, scene).items():
        if label_box(frame, place).contains(at):
            return Target("entry", path=scene.outlets[index].path)
    for outlet in scene.outlets:
        if outlet.is_pipe and any(box.contains(at) for box in pipe_run(frame, scene, outlet).boxes):
            return Target("entry", path=outlet.path)
    if cursor_plate(frame, scene).contains(at) or _plots(frame).contains(at):
        return Target("time", "cursor")
    return Target()


def _plots(frame: Frame) -> QRectF:
    if frame.plot is None:
        return QRectF()
    left, top, right, bottom = frame.plot
    foot = frame.flow[3] if frame.flow else bottom
    return QRectF(left - 4.0, top - 4.0, right - left + 8.0, foot - top + 8.0)


def stage_items(scene: Scene | None) -> list[str]:
    """Return what the keyboard goes through: the time cursor, then the flags that move, from the top."""
    marks = scene.marks if scene is not None else ()
    return ["cursor", *(mark.key for mark in marks if mark.path is not None)]


def next_item(items: list[str], present: str, forwards: bool) -> str:
    """Return the item after or before another one, empty past the last."""
    if present not in items:
        return ""
    index = items.index(present) + (1 if forwards else -1)
    return items[index] if 0 <= index < len(items) else ""


def value_step(frame: Frame, unit: str) -> float:
    """Return the step [m] to which a dragged level is rounded: about a pixel, round in the unit typed."""
    scale = scale_of(unit)
    pixel = nice_step(0.7 / frame.pixels_per_metre / scale) * scale
    return max(pixel, small_step(unit))
