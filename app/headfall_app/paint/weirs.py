"""A notch in the wall and the nappe that falls from its crest."""

from __future__ import annotations

import math

import numpy as np
from PySide6.QtCore import QPointF, QRectF
from PySide6.QtGui import QPainter

from headfall_app.paint.layout import WEIR_ROOM, Frame
from headfall_app.paint.outline_geometry import surface_span
from headfall_app.paint.scene import Scene
from headfall_app.paint.scene_outlets import DrawnOutlet
from headfall_app.paint.section import WALL
from headfall_app.paint.theme import Theme
from headfall_app.paint.waterways import paint_jet

_SPEED = 2.6
"""Speed over a crest for a head H, about 2.6·√H in SI: what a notch passes, over the depth at its crest."""
_DEPTH = 0.7
_LONGEST = 110.0
_GRAVITY = 9.81


def weir_foot(frame: Frame, scene: Scene, outlet: DrawnOutlet) -> QPointF:
    """Return where the crest meets the wall."""
    span = surface_span(scene.outline, outlet.elevation)
    return QPointF(frame.across.x(span[1] if span else 0.0), frame.y(outlet.elevation))


def paint_weir(painter: QPainter, frame: Frame, scene: Scene, outlet: DrawnOutlet, theme: Theme) -> None:
    """Paint what falls over a crest."""
    foot = weir_foot(frame, scene, outlet)
    if scene.outline.closed:
        tall = max(outlet.head * frame.pixels_per_metre, 8.0)
        painter.fillRect(QRectF(foot.x() - 1.0, foot.y() - tall, WALL + 2.0, tall), theme.colour("surface"))
    if outlet.flow <= 0.0 or outlet.head <= 0.0:
        return
    scale = frame.pixels_per_metre
    thick = max(_DEPTH * outlet.head * scale, 2.0)
    speed = _SPEED * math.sqrt(outlet.head) * scale
    ground = frame.bottom + WALL - foot.y()
    time = math.sqrt(2.0 * min(ground, _LONGEST) / (_GRAVITY * scale))
    time = min(time, max(WEIR_ROOM - 0.5 * thick, 6.0) / speed)
    along = np.linspace(0.0, time, 24)
    x = foot.x() - 1.0 + speed * along
    fallen = _GRAVITY * scale * along
    y = foot.y() - 0.5 * thick + 0.5 * fallen * along
    # The same flow at a greater speed is a thinner nappe.
    wide = np.maximum(thick * speed / np.hypot(speed, fallen), 2.0)
    paint_jet(painter, x, y, wide, theme)
