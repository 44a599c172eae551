"""The whole outline, small, beside the title of a section that is drawn cut; a click switches."""

from __future__ import annotations

import numpy as np
from PySide6.QtCore import QPointF, QRectF, Qt
from PySide6.QtGui import QPainter

from headfall_app.paint import lettering
from headfall_app.paint.fonts import text_width
from headfall_app.paint.kept import Kept, paint_kept, vessel_key
from headfall_app.paint.layout import Frame
from headfall_app.paint.outline_geometry import extent
from headfall_app.paint.scene import Scene
from headfall_app.paint.staff import TITLE_ROW
from headfall_app.paint.strokes import fill, pen, polygon
from headfall_app.paint.theme import Theme

TALL, WIDE = 22.0, 110.0


def thumbnail_text(frame: Frame) -> str:
    """Return what a click on the outline does."""
    return "show whole" if frame.across.breaks else "show cut"


def thumbnail_box(frame: Frame, scene: Scene) -> QRectF:
    """Return the outline's box with its words, empty where the vessel is never cut."""
    if not frame.can_be_cut:
        return QRectF()
    scale, left, right = _fit(frame, scene)
    wide = (right - left) * scale
    words = text_width(thumbnail_text(frame), 11) + 12.0
    end = frame.across.right
    return QRectF(end - wide - words - 4.0, TITLE_ROW - 14.0, wide + words + 8.0, 28.0)


def _fit(frame: Frame, scene: Scene) -> tuple[float, float, float]:
    left, right = extent(scene.outline)
    return min(TALL / scene.height, WIDE / (right - left)), left, right


def _few_points(wall: np.ndarray, scale: float) -> np.ndarray:
    """Return the points of the wall that differ by a pixel or so at this small scale, the corners among them."""
    pixel = np.round(wall * scale / 1.5)
    moved = np.any(pixel[1:] != pixel[:-1], axis=1)
    return wall[np.concatenate(([True], moved[:-1] | moved[1:], [True]))]


def paint_thumbnail(
    painter: QPainter, frame: Frame, scene: Scene, theme: Theme, hovered: bool, kept: Kept | None = None
) -> None:
    """Paint the outline: what is shown tinted and solid, what is left out dotted."""
    box = thumbnail_box(frame, scene)

    def outline(on: QPainter) -> None:
        _paint_outline(on, frame, scene, theme, hovered)

    key = (vessel_key(frame, scene, theme), hovered)
    paint_kept(kept, painter, "outline", key, box.adjusted(-2.0, -2.0, 4.0, 2.0).toAlignedRect(), outline)
    ink = theme.colour("accent" if hovered else "muted")
    lettering.write(painter, QPointF(box.left() + 2.0, TITLE_ROW), thumbnail_text(frame), ink, 11)


def _paint_outline(painter: QPainter, frame: Frame, scene: Scene, theme: Theme, hovered: bool) -> None:
    scale, left, right = _fit(frame, scene)
    origin = frame.across.right - (right - left) * scale
    bottom = TITLE_ROW + 0.5 * scene.height * scale
    wall = _few_points(scene.outline.wall, scale)
    shape = polygon(origin + (wall[:, 0] - left) * scale, bottom - wall[:, 1] * scale)
    colour = theme.colour("accent" if hovered else "edge")
    draw = painter.drawPolygon if scene.outline.closed else painter.drawPolyline
    for start, end in frame.across.stretches:
        painter.save()
        painter.setClipRect(
            QRectF(origin + (start - left) * scale - 1.5, bottom - 40.0, (end - start) * scale + 3.0, 44.0),
            Qt.ClipOperation.IntersectClip,
        )
        fill(painter, shape, theme.colour("note_soft"))
        painter.setPen(pen(colour, 1.2))
        draw(shape)
        painter.restore()
    painter.setPen(pen(colour, 1.2, "left_out"))
    draw(shape)
