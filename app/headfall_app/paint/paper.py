"""The parts of the picture that a page of its own shows: sketch, curve and flow."""

from __future__ import annotations

from dataclasses import replace

from PySide6.QtCore import QPointF, QRectF
from PySide6.QtGui import QPainter

from headfall_app.paint import curve, flow, lettering, loose
from headfall_app.paint.cut import Across
from headfall_app.paint.flags import paint_flags
from headfall_app.paint.layout import (
    AXIS_ZONE,
    LEAD,
    RIGHT_EDGE,
    STAFF,
    STAFF_NUMBERS,
    TAIL,
    Frame,
    aside,
    flag_width,
    receiver_gap,
    room_about,
    room_aside,
)
from headfall_app.paint.level_axis import drawn_depth, left_out
from headfall_app.paint.levels import paint_plot_levels
from headfall_app.paint.outline_geometry import extent
from headfall_app.paint.scene import Scene
from headfall_app.paint.staff import paint_staff
from headfall_app.paint.stage_picture import paint_section
from headfall_app.paint.theme import Theme
from headfall_app.paint.ticks import time_axis

_HEAD = 44.0
_AFTER = STAFF + LEAD


def sketch_scale(width: float, height: float, scene: Scene) -> float:
    """Return the largest scale [px/m] at which the whole sketch fits into a rectangle."""
    room = room_about(scene)
    left, right = extent(scene.outline)
    wide = width - room.left - STAFF_NUMBERS - _AFTER - flag_width(scene) - aside(scene) - 2.0
    depth, gap = drawn_depth(scene)
    tall = height - (room.top - 54.0 + _HEAD) - room.under - gap
    return max(min(wide / (right - left + scene.farthest_reach), tall / (scene.height + depth)), 1e-3)


def sketch_height(scene: Scene, pixels_per_metre: float) -> float:
    """Return how tall a sketch is at a scale [px]."""
    room = room_about(scene)
    depth, gap = drawn_depth(scene)
    return room.top - 54.0 + _HEAD + (scene.height + depth) * pixels_per_metre + gap + room.under


def paint_sketch(
    painter: QPainter, rectangle: QRectF, scene: Scene, theme: Theme, pixels_per_metre: float | None = None
) -> float:
    """Paint the whole vessel with dimensions, levels, staff, flags and jets; return the scale used [px/m].

    The sketch is never cut. Without ``pixels_per_metre`` it is as large as the rectangle allows; the staff and its
    flags then stand to the right of what is drawn.
    """
    room = room_about(scene)
    scale = pixels_per_metre or sketch_scale(rectangle.width(), rectangle.height(), scene)
    left, right = extent(scene.outline)
    flag = flag_width(scene)
    drawn = (right - left + scene.farthest_reach) * scale
    free = rectangle.width() - room.left - drawn - STAFF_NUMBERS - _AFTER - flag - 2.0
    beside = room_aside(scene, scale, free - aside(scene))
    spare = max(free - beside, 0.0)
    start = room.left + 0.5 * spare
    bottom = float(round(room.top - 54.0 + _HEAD + scene.height * scale))
    depth, gap = drawn_depth(scene)
    under = room.under + depth * scale + gap
    frame = Frame(
        width=rectangle.width(),
        height=max(rectangle.height(), bottom + 20.0),
        pixels_per_metre=scale,
        bottom=bottom,
        vessel_height=scene.height,
        across=Across(((left, right),), start, scale),
        plan=room.plan,
        lines_left=start - 18.0,
        staff_left=float(round(start + drawn + beside + STAFF_NUMBERS + 0.25 * spare)),
        plot=None,
        flow=None,
        times=time_axis(scene.longest, 100.0),
        first_row=room.first_row,
        can_be_cut=False,
        needed=bottom + under,
        under=under,
        flag=flag,
        lowest=scene.lowest,
        left_out=left_out(scene),
        receiver_gap=receiver_gap(scene),
        origin=-6.0,
    )
    painter.save()
    painter.translate(rectangle.topLeft())
    paint_section(painter, frame, scene, theme)
    paint_staff(painter, frame, scene, theme)
    paint_flags(painter, frame, scene, theme)
    painter.restore()
    return scale


def _plot_frame(rectangle: QRectF, scene: Scene) -> Frame:
    """Return a frame with staff, flags and the level plot alone."""
    bottom = float(round(rectangle.height() - AXIS_ZONE))
    scale = (bottom - _HEAD) / scene.height
    left, right = extent(scene.outline)
    staff_left = 36.0
    flag = flag_width(scene)
    plot_left = staff_left + STAFF + LEAD + flag + TAIL
    plot = (plot_left, bottom - scene.height * scale, rectangle.width() - RIGHT_EDGE, bottom)
    return Frame(
        width=rectangle.width(),
        height=rectangle.height(),
        pixels_per_metre=scale,
        bottom=bottom,
        vessel_height=scene.height,
        across=Across(((left, right),), 0.0, scale),
        plan=room_about(scene).plan,
        lines_left=staff_left,
        staff_left=staff_left,
        plot=plot,
        flow=None,
        times=time_axis(scene.longest, plot[2] - plot[0]),
        first_row=0.0,
        can_be_cut=False,
        needed=rectangle.height(),
        flag=flag,
        origin=-6.0,
    )


def paint_curve(painter: QPainter, rectangle: QRectF, scene: Scene, theme: Theme) -> None:
    """Paint the staff, its flags and level against time with the range, the end of the run and the time axis."""
    frame = _plot_frame(rectangle, scene)
    painter.save()
    painter.translate(rectangle.topLeft())
    paint_staff(painter, frame, scene, theme)
    curve.paint_grid(painter, frame, scene, theme)
    loose.paint_loose(painter, frame, scene, theme)
    curve.paint_range(painter, frame, scene, theme)
    paint_plot_levels(painter, frame, scene, theme)
    curve.paint_time_marks(painter, frame, theme)
    curve.paint_run(painter, frame, scene, theme)
    curve.paint_cursor(painter, frame, scene, theme)
    words = loose.paint_loose_words(painter, frame, scene, theme)
    curve.paint_remark(painter, frame, scene, theme, words)
    curve.paint_arrival(painter, frame, scene, theme)
    curve.paint_surge(painter, frame, scene, theme)
    curve.paint_cursor_dot(painter, frame, scene, theme)
    paint_flags(painter, frame, scene, theme)
    _, _, right, _ = frame.plot or (0.0, 0.0, 0.0, 0.0)
    title_row = 13.0
    left = frame.plot[0] if frame.plot else 0.0
    lettering.write(painter, QPointF(left, title_row), "Level against time", theme.colour("ink"), 12, 600)
    muted = theme.colour("muted")
    lettering.write(painter, QPointF(right, title_row), scene.shaded_text, muted, 11, align=lettering.RIGHT)
    painter.restore()


def paint_flow(painter: QPainter, rectangle: QRectF, scene: Scene, theme: Theme) -> None:
    """Paint flow against time on the time axis that ``paint_curve`` has in a rectangle of the same width."""
    frame = _plot_frame(rectangle, scene)
    assert frame.plot is not None
    left, _, right, _ = frame.plot
    frame = replace(frame, flow=(left, 30.0, right, float(round(rectangle.height() - AXIS_ZONE))))
    painter.save()
    painter.translate(rectangle.topLeft())
    flow.paint_flow_grid(painter, frame, scene, theme)
    flow.paint_flow_title(painter, frame, scene, theme)
    flow.paint_flows(painter, frame, scene, theme)
    curve.paint_time_marks(painter, frame, theme)
    painter.restore()
