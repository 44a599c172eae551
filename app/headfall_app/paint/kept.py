"""Parts of the picture that do not depend on the answers, painted once and kept as pixels."""

from __future__ import annotations

from collections.abc import Callable, Hashable

from PySide6.QtCore import QPoint, QRect, Qt
from PySide6.QtGui import QColor, QPainter, QPixmap

from headfall_app.paint.layout import Frame
from headfall_app.paint.scene import Scene
from headfall_app.paint.theme import Theme

Draw = Callable[[QPainter], None]


class Kept:
    """Pictures of parts by name, each with what it rests on; a part is painted anew when that changes."""

    def __init__(self) -> None:
        self._pictures: dict[str, tuple[Hashable, QPixmap]] = {}

    def paint(self, painter: QPainter, name: str, key: Hashable, box: QRect, draw: Draw, ground: QColor | None) -> None:
        """Put a part on the page: as kept, or painted now by ``draw`` onto ``ground``, clear where that is None."""
        ratio = painter.device().devicePixelRatio()
        if ratio != round(ratio):
            # Whole logical pixels are not whole pixels of the screen: what is kept would be drawn blurred.
            draw(painter)
            return
        key = (key, ratio, box.size().toTuple())
        held = self._pictures.get(name)
        if held is None or held[0] != key:
            held = key, _pixels(box, ratio, draw, ground)
            self._pictures[name] = held
        painter.drawPixmap(box.topLeft(), held[1])


def _pixels(box: QRect, ratio: float, draw: Draw, ground: QColor | None) -> QPixmap:
    pixels = QPixmap(box.size() * ratio)
    pixels.setDevicePixelRatio(ratio)
    pixels.fill(ground if ground is not None else QColor(Qt.GlobalColor.transparent))
    painter = QPainter(pixels)
    painter.setRenderHint(QPainter.RenderHint.Antialiasing, True)
    painter.translate(QPoint(0, 0) - box.topLeft())
    draw(painter)
    painter.end()
    return pixels


def paint_kept(
    kept: Kept | None,
    painter: QPainter,
    name: str,
    key: Hashable,
    box: QRect,
    draw: Draw,
    ground: QColor | None = None,
) -> None:
    """Paint a part through what is kept, straight onto the page where nothing is: on paper, lines stay lines."""
    if kept is None or box.isEmpty():
        draw(painter)
    else:
        kept.paint(painter, name, key, box, draw, ground)


def vessel_key(frame: Frame, scene: Scene, theme: Theme) -> Hashable:
    """Return what a picture of the empty vessel rests on."""
    outline = scene.outline
    shape = (
        outline.wall.tobytes(),
        outline.closed,
        tuple(outline.tangents),
        tuple(outline.joints),
        scene.has_axis,
        scene.notch,
    )
    return shape, frame.across, frame.pixels_per_metre, frame.bottom, frame.top, theme


def vessel_box(frame: Frame, margin: int) -> QRect:
    """Return the vessel's box on the page with a margin about it [px]."""
    left, top = int(frame.across.left) - margin, int(frame.top) - margin
    return QRect(left, top, int(frame.across.right) + margin + 1 - left, int(frame.bottom) + margin + 1 - top)
