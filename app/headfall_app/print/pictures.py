"""The sketch and the curves on the page, the sketch at a named scale."""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass

from PySide6.QtCore import QRectF
from PySide6.QtGui import QPainter, QPicture

from headfall_app.paint.paper import paint_curve, paint_flow, paint_sketch
from headfall_app.paint.scene import Scene
from headfall_app.paint.theme import Theme
from headfall_app.print.blocks import Strip
from headfall_app.print.page import MILLIMETRE, PICTURE_PIXEL
from headfall_app.print.text import SMALL, draw_text

_SCALES = (1, 2, 5, 10, 20, 25, 30, 40, 50, 60, 75, 100, 150, 200, 250, 500, 750, 1000, 2000, 5000)
_SKETCH_HEIGHTS = tuple(range(54, 126, 3))
_SMALLEST = 0.55
CURVE_HEIGHTS = (44, 48, 52, 58, 64, 72)
_GAP = 1.0 * MILLIMETRE


@dataclass(frozen=True, slots=True)
class SketchSize:
    """A scale 1 : ``scale`` and the least height [mm] at which the whole vessel is drawn at it."""

    scale: int
    height: float


def sketch_sizes(scene: Scene, width: float, theme: Theme) -> tuple[SketchSize, ...]:
    """Return the named scales the sketch can have on a page of that width [dots], largest scale first,
    none much smaller than that one."""
    sizes: dict[int, SketchSize] = {}
    for height in _SKETCH_HEIGHTS:
        most = _pixels_per_metre_that_fit(scene, width, height, theme)
        scale = next((scale for scale in _SCALES if pixels_per_metre(scale) <= most * 1.0001), _SCALES[-1])
        sizes.setdefault(scale, SketchSize(scale, height))
    largest = min(sizes)
    return tuple(sizes[scale] for scale in sorted(sizes) if scale * _SMALLEST <= largest)


def pixels_per_metre(scale: int) -> float:
    """Return the picture's pixels per metre at 1 : ``scale``."""
    return 1000 * MILLIMETRE / PICTURE_PIXEL / scale


def _pixels_per_metre_that_fit(scene: Scene, width: float, height: float, theme: Theme) -> float:
    record = QPicture()
    painter = QPainter(record)
    try:
        return paint_sketch(painter, _rectangle(width, height * MILLIMETRE), scene, theme)
    finally:
        painter.end()


def sketch_strip(scene: Scene, size: SketchSize, left: float, width: float, theme: Theme) -> Strip:
    """Return the sketch with its scale named in the upper right corner."""
    height = size.height * MILLIMETRE

    def draw(painter: QPainter, top: float, _height: float) -> None:
        rectangle, scale = _rectangle(width, height), pixels_per_metre(size.scale)
        _in_pixels(painter, left, top, lambda: paint_sketch(painter, rectangle, scene, theme, scale))
        draw_text(painter, f"scale 1 : {size.scale}", SMALL, left + width, top, theme.colour("ink"), 1.0)

    return Strip(height, draw, gap=_GAP)


def curve_strip(scene: Scene, millimetres: float, left: float, width: float, theme: Theme) -> Strip:
    """Return the level against time."""

    def draw(painter: QPainter, top: float, height: float) -> None:
        _in_pixels(painter, left, top, lambda: paint_curve(painter, _rectangle(width, height), scene, theme))

    return Strip(millimetres * MILLIMETRE, draw, gap=_GAP, stretch=16 * MILLIMETRE, keeps=True)


def flow_strip(scene: Scene, millimetres: float, left: float, width: float, theme: Theme) -> Strip:
    """Return the outflow against time."""

    def draw(painter: QPainter, top: float, height: float) -> None:
        _in_pixels(painter, left, top, lambda: paint_flow(painter, _rectangle(width, height), scene, theme))

    return Strip(millimetres * MILLIMETRE, draw, gap=_GAP, stretch=8 * MILLIMETRE)


def _rectangle(width: float, height: float) -> QRectF:
    return QRectF(0, 0, width / PICTURE_PIXEL, height / PICTURE_PIXEL)


def _in_pixels(painter: QPainter, left: float, top: float, paint: Callable[[], object]) -> None:
    painter.save()
    painter.translate(left, top)
    painter.scale(PICTURE_PIXEL, PICTURE_PIXEL)
    paint()
    painter.restore()
