"""Lines and filled runs, drawn cheaply and sharp."""

from __future__ import annotations

from collections.abc import Sequence
from functools import lru_cache
from typing import Any, cast

import numpy as np
import numpy.typing as npt
from PySide6.QtCore import QLineF, QPointF, Qt
from PySide6.QtGui import QBrush, QColor, QPainter, QPen, QPolygonF
from shiboken6 import VoidPtr

Array = npt.NDArray[np.float64]

DASHES: dict[str, tuple[float, ...]] = {
    "overflow": (9.0, 3.0),
    "stop": (4.0, 3.0),
    "settles": (8.0, 3.0, 1.5, 3.0, 1.5, 3.0),
    "centre": (1.5, 3.0),
    "axis": (8.0, 3.0, 1.5, 3.0),
    "inflow": (2.0, 2.5),
    "not_defended": (3.0, 3.0),
    "left_out": (2.0, 2.0),
}


def pen(colour: QColor, width: float = 1.0, dash: str = "") -> QPen:
    """Return a pen; a dash's lengths are pixels, whatever the width."""
    # A copy of a kept pen shares its data, and may be changed freely.
    return QPen(_pen(colour.rgba(), width, dash))


@lru_cache(maxsize=128)
def _pen(colour: int, width: float, dash: str) -> QPen:
    made = QPen(QColor.fromRgba(colour), width)
    made.setCapStyle(Qt.PenCapStyle.FlatCap)
    if dash:
        made.setDashPattern([length / width for length in DASHES[dash]])
    return made


def level_line(painter: QPainter, left: float, right: float, row: float, drawn: QPen) -> None:
    """Draw a horizontal line on whole pixels."""
    painter.setRenderHint(QPainter.RenderHint.Antialiasing, False)
    painter.setPen(drawn)
    painter.drawLine(QLineF(round(left), round(row), round(right), round(row)))
    painter.setRenderHint(QPainter.RenderHint.Antialiasing, True)


def plumb_line(painter: QPainter, column: float, top: float, bottom: float, drawn: QPen) -> None:
    """Draw a vertical line on whole pixels."""
    painter.setRenderHint(QPainter.RenderHint.Antialiasing, False)
    painter.setPen(drawn)
    painter.drawLine(QLineF(round(column), round(top), round(column), round(bottom)))
    painter.setRenderHint(QPainter.RenderHint.Antialiasing, True)


def polygon(x: Array, y: Array) -> QPolygonF:
    """Return the points as a polygon, filled through its buffer: a call a point would cost a hundred times as much."""
    made = QPolygonF()
    made.resize(len(x))
    if len(x):
        # The stubs of Qt know neither what ``data`` gives nor that a pointer is a buffer.
        memory: Any = VoidPtr(cast(Any, made.data()), len(x) * 16, True)  # type: ignore[call-arg]
        buffer = np.frombuffer(memory, dtype=np.float64).reshape(-1, 2)
        buffer[:, 0] = x
        buffer[:, 1] = y
    return made


def points(pairs: Sequence[tuple[float, float]]) -> QPolygonF:
    """Return a few points as a polygon."""
    return QPolygonF([QPointF(x, y) for x, y in pairs])


def ribbon(x: Array, y: Array, width: float) -> QPolygonF:
    """Return the outline of a line of some width through the points; to fill it costs far less than a wide pen."""
    step_x, step_y = np.diff(x), np.diff(y)
    length = np.hypot(step_x, step_y)
    kept = np.concatenate(([True], length > 1e-6))
    x, y = x[kept], y[kept]
    if len(x) < 2:
        return QPolygonF()
    tangent_x, tangent_y = _steps(x), _steps(y)
    scale = 0.5 * width / np.maximum(np.hypot(tangent_x, tangent_y), 1e-12)
    across_x, across_y = -tangent_y * scale, tangent_x * scale
    return polygon(
        np.concatenate((x + across_x, (x - across_x)[::-1])), np.concatenate((y + across_y, (y - across_y)[::-1]))
    )


def _steps(values: Array) -> Array:
    """Return the step from the point before to the point after each one."""
    steps = np.empty_like(values)
    steps[1:-1] = values[2:] - values[:-2]
    steps[0], steps[-1] = values[1] - values[0], values[-1] - values[-2]
    return steps


def fill(painter: QPainter, shape: QPolygonF, colour: QColor | QBrush, smooth: bool = True) -> None:
    """Fill a shape, without an edge."""
    painter.setRenderHint(QPainter.RenderHint.Antialiasing, smooth)
    painter.setPen(Qt.PenStyle.NoPen)
    painter.setBrush(colour)
    painter.drawPolygon(shape)
    painter.setBrush(Qt.BrushStyle.NoBrush)
    painter.setRenderHint(QPainter.RenderHint.Antialiasing, True)
