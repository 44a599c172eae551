"""The whole stage of the main page: section, staff, flags, curve and flow in one picture."""

from __future__ import annotations

from dataclasses import dataclass

from PySide6.QtCore import QPointF
from PySide6.QtGui import QPainter

from headfall_app.paint import curve, flow, lettering, loose
from headfall_app.paint.around import paint_bodies, paint_body_words, paint_lid, paint_receiver
from headfall_app.paint.dimensions import paint_dimensions
from headfall_app.paint.flags import paint_flags
from headfall_app.paint.fonts import text_width
from headfall_app.paint.jets import paint_jets
from headfall_app.paint.kept import Kept, paint_kept, vessel_box, vessel_key
from headfall_app.paint.layout import STAFF_NUMBERS, Frame
from headfall_app.paint.levels import paint_plot_levels, paint_section_levels
from headfall_app.paint.outside_levels import paint_outside_levels
from headfall_app.paint.scene import Scene
from headfall_app.paint.section import (
    WALL,
    paint_ground,
    paint_inner_lines,
    paint_liquid,
    paint_stream,
    paint_vessel,
)
from headfall_app.paint.staff import TITLE_ROW, paint_staff
from headfall_app.paint.theme import Theme
from headfall_app.paint.thumbnail import paint_thumbnail


@dataclass(frozen=True, slots=True)
class Attention:
    """What pointer and keyboard are on: keys of flags, ``cursor`` or ``outline``; empty where nothing is."""

    hovered: str = ""
    focused: str = ""


def paint_stage(
    painter: QPainter, frame: Frame, scene: Scene, theme: Theme, attention: Attention, kept: Kept | None = None
) -> None:
    """Paint the stage; the ground is already painted. ``kept`` holds what need not be painted again."""
    painter.setRenderHint(QPainter.RenderHint.Antialiasing, True)
    paint_section(painter, frame, scene, theme, kept)
    paint_staff(painter, frame, scene, theme, kept)
    paint_plots(painter, frame, scene, theme, attention.focused == "cursor")
    _titles(painter, frame, scene, theme)
    if frame.can_be_cut:
        paint_thumbnail(painter, frame, scene, theme, attention.hovered == "outline", kept)
    paint_flags(painter, frame, scene, theme, attention.hovered, attention.focused, kept)


def paint_section(painter: QPainter, frame: Frame, scene: Scene, theme: Theme, kept: Kept | None = None) -> None:
    """Paint the vessel with its liquid, levels, jets and dimensions."""
    key = vessel_key(frame, scene, theme)

    def vessel(on: QPainter) -> None:
        paint_vessel(on, frame, scene, theme)

    def inner_lines(on: QPainter) -> None:
        paint_inner_lines(on, frame, scene, theme)

    paint_kept(kept, painter, "vessel", key, vessel_box(frame, 12), vessel, theme.colour("surface"))
    paint_liquid(painter, frame, scene, theme)
    paint_bodies(painter, frame, scene, theme, kept)
    paint_kept(kept, painter, "inner lines", key, vessel_box(frame, 16), inner_lines)
    ground = ground_line(frame, scene)
    if ground is not None:
        paint_ground(painter, frame, theme, *ground)
    paint_stream(painter, frame, scene, theme)
    paint_section_levels(painter, frame, scene, theme)
    paint_body_words(painter, frame, scene, theme)
    paint_receiver(painter, frame, scene, theme)
    paint_outside_levels(painter, frame, scene, theme)
    paint_dimensions(painter, frame, scene, theme, kept)
    paint_jets(painter, frame, scene, theme)
    paint_lid(painter, frame, scene, theme)


def ground_line(frame: Frame, scene: Scene) -> tuple[float, float] | None:
    """Return from where to where the ground is drawn: under a standing vessel, or where a sideways jet lands."""
    if scene.farthest_reach <= 0.0 and not scene.stands:
        return None
    end = frame.across.right + max(scene.farthest_reach * frame.pixels_per_metre + 24.0, 40.0)
    end = min(end, frame.staff_left - STAFF_NUMBERS + 34.0)
    start = frame.across.left - 20.0 if scene.stands else frame.across.right + 6.0 * WALL
    return start, max(end, start + 20.0)


def paint_plots(painter: QPainter, frame: Frame, scene: Scene, theme: Theme, focused: bool = False) -> None:
    """Paint the level plot and the flow plot."""
    curve.paint_grid(painter, frame, scene, theme)
    loose.paint_loose(painter, frame, scene, theme)
    curve.paint_range(painter, frame, scene, theme)
    paint_plot_levels(painter, frame, scene, theme)
    flow.paint_flow_grid(painter, frame, scene, theme)
    flow.paint_flows(painter, frame, scene, theme)
    curve.paint_time_marks(painter, frame, theme)
    curve.paint_run(painter, frame, scene, theme)
    curve.paint_cursor(painter, frame, scene, theme)
    words = loose.paint_loose_words(painter, frame, scene, theme)
    curve.paint_remark(painter, frame, scene, theme, words)
    flow.paint_flow_title(painter, frame, scene, theme)
    curve.paint_arrival(painter, frame, scene, theme)
    curve.paint_surge(painter, frame, scene, theme)
    curve.paint_cursor_dot(painter, frame, scene, theme, focused)


def _titles(painter: QPainter, frame: Frame, scene: Scene, theme: Theme) -> None:
    ink, muted = theme.colour("ink"), theme.colour("muted")
    lettering.write(painter, QPointF(2.0, TITLE_ROW), scene.section_title, ink, 12, 600)
    if frame.plot is None:
        return
    left, _, right, _ = frame.plot
    box = lettering.write(painter, QPointF(left, TITLE_ROW), "Level against time", ink, 12, 600)
    if box.right() + 16.0 + text_width(scene.shaded_text, 11) <= right:
        lettering.write(painter, QPointF(right, TITLE_ROW), scene.shaded_text, muted, 11, align=lettering.RIGHT)
