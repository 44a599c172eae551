"""The inflow's slider, under the drawing."""

from __future__ import annotations

import math
import re

from PySide6.QtCore import QEvent, QSize, Qt, QTimer, Signal
from PySide6.QtGui import QEnterEvent, QFocusEvent, QKeyEvent, QMouseEvent, QPainter, QPaintEvent
from PySide6.QtWidgets import QWidget

from headfall.quantities import Quantity, parse, written
from headfall_app.document import Document
from headfall_app.paint.slider import SliderState, paint_slider, track_value, track_x
from headfall_app.paint.theme import Theme
from headfall_app.paint.ticks import nice_step

_TEXT = "Change the inflow"
_PAST_MARK = 1.31
_METRIC = re.compile(r"[mcdhkM]?L\b|[mcdk]?m³|[a-z]*(liter|litre|meter|metre)")
"""The beginning of a metric flow: a volume in litres or cubic metres, as written by the table or out of it."""
_STEPS = {
    Qt.Key.Key_Up: 1,
    Qt.Key.Key_Right: 1,
    Qt.Key.Key_Down: -1,
    Qt.Key.Key_Left: -1,
    Qt.Key.Key_PageUp: 10,
    Qt.Key.Key_PageDown: -10,
}


def is_of_system(unit: str, system: str) -> bool:
    """Return whether a unit of flow is one of the display's own system, ``metric`` or ``us``; imperial is neither."""
    if unit.startswith("imp"):
        return False
    return (_METRIC.match(unit) is not None) == (system == "metric")


class InflowSlider(QWidget):
    """The inflow, from nil to past the largest that the outlets hold below overflow. One drag is one step of undo."""

    released = Signal()
    """The handle is let go."""

    def __init__(self, document: Document, theme: Theme, parent: QWidget | None = None) -> None:
        super().__init__(parent)
        self._document, self._theme = document, theme
        self._hovered = False
        self._dragged = False
        self._wanted: float | None = None
        self._former: Quantity | None = None
        self._held_end = 0.0
        # Mouse moves only store a value: it is set once a turn of the event loop, so once a paint.
        self._setting = QTimer(self, singleShot=True, interval=0)
        self._setting.timeout.connect(self._set_wanted)
        # Not marked opaque: Qt would cut it out of the stage's paint, and a stage with a hole in it is painted slowly.
        self.setFocusPolicy(Qt.FocusPolicy.StrongFocus)
        self.setMinimumSize(240, 80)
        self.setCursor(Qt.CursorShape.PointingHandCursor)
        self.setAccessibleName("Inflow")
        document.answers_changed.connect(self.refresh)
        self.refresh()

    def set_theme(self, theme: Theme) -> None:
        """Paint in another set of colours."""
        self._theme = theme
        self.update()

    def sizeHint(self) -> QSize:
        return QSize(420, 80)

    # Numbers ----------------------------------------------------------------------------------------------------------

    @property
    def typed(self) -> Quantity | None:
        """The inflow as typed, None where none was."""
        inflow = self._document.case.inflow
        return inflow.rate if inflow is not None else None

    @property
    def unit(self) -> str:
        """The unit in which the slider writes: that of a flow typed in the display's own system, else the display's."""
        typed, display = self.typed, self._document.display
        return typed.unit if typed is not None and is_of_system(typed.unit, display.system) else display.unit("flow")

    @property
    def value(self) -> float:
        """The inflow now [m³/s], a dragged one that is not set yet included."""
        if self._wanted is not None:
            return self._wanted
        return self.typed.value if self.typed is not None else 0.0

    @property
    def mark(self) -> float | None:
        """The largest inflow that stays below overflow [m³/s]."""
        answers = self._document.answers
        low = answers.equilibrium.largest_inflow.low if answers is not None else None
        return low if low is not None and low > 0.0 else None

    @property
    def end(self) -> float:
        """The inflow at the end of the track [m³/s]; it holds still while it is dragged."""
        if self._dragged:
            return self._held_end
        mark, answers = self.mark, self._document.answers
        start = answers.draw_down.outflow_at_start.typical if answers is not None else None
        reach = mark * _PAST_MARK if mark is not None else 1.5 * (start or 0.0)
        return max(reach, self.value * 1.08) or 0.01

    @property
    def state(self) -> SliderState:
        """What is painted."""
        mark, typed = self.mark, self.typed
        text = f"{self._shown(mark)}: largest that stays below overflow" if mark else ""
        if self._wanted is not None:
            shown = self._written(self._wanted).text
        elif typed is None or typed.value <= 0.0:
            shown = "nil"
        else:
            shown = typed.text if typed.unit == self.unit else self._shown(typed.value)
        return SliderState(self.value, self.end, mark, shown, text)

    def _shown(self, value: float) -> str:
        """Return a flow as the answers show it, or in the unit typed."""
        display = self._document.display
        return display.text(value, "flow") if self.unit == display.unit("flow") else self._written(value).text

    def _written(self, value: float) -> Quantity:
        return written(value, self.unit, "flow")

    def _step(self) -> float:
        """Return the step of an arrow key: about a hundredth of the track, round in the unit written."""
        scale = parse(f"1 {self.unit}", "flow").value
        return nice_step(self.end / scale / 120.0) * scale

    # Changing it ------------------------------------------------------------------------------------------------------

    def _want(self, value: float) -> None:
        self._wanted = max(value, 0.0)
        self.update()
        self._setting.start()

    def _set_wanted(self) -> None:
        self._setting.stop()
        if self._wanted is not None:
            value, self._wanted = self._wanted, None
            self._set(self._written(value))

    def _set(self, rate: Quantity | None) -> None:
        self._document.set(("inflow", "rate"), rate, _TEXT, "drag inflow")

    def refresh(self) -> None:
        """Say and paint the value anew."""
        state = self.state
        said = f"{state.value_text}. {state.mark_text}." if state.mark_text else f"{state.value_text}."
        if said != self.accessibleDescription():
            self.setAccessibleDescription(said)
        self.update()

    # Pointer and keyboard ---------------------------------------------------------------------------------------------

    def _value_at(self, event: QMouseEvent) -> float:
        value = track_value(event.position().x(), self.end, self.width())
        step = self._step() / 5.0
        return round(value / step) * step

    def mousePressEvent(self, event: QMouseEvent) -> None:
        if event.button() == Qt.MouseButton.LeftButton and 20.0 <= event.position().y() <= 64.0:
            self._held_end, self._dragged, self._former = self.end, True, self.typed
            self._document.end_gesture()
            if abs(event.position().x() - track_x(self.value, self.end, self.width())) > 9.0:
                self._want(self._value_at(event))

    def mouseMoveEvent(self, event: QMouseEvent) -> None:
        if self._dragged:
            self._want(self._value_at(event))

    def mouseReleaseEvent(self, event: QMouseEvent) -> None:
        self._finish()

    def mouseDoubleClickEvent(self, event: QMouseEvent) -> None:
        self._document.end_gesture()
        self._want(0.0)
        self._finish()

    def _finish(self) -> None:
        self._set_wanted()
        self._dragged = False
        self._document.end_gesture()
        self.refresh()
        self.released.emit()

    @property
    def is_dragged(self) -> bool:
        """Whether the handle is being dragged."""
        return self._dragged

    def keyPressEvent(self, event: QKeyEvent) -> None:
        key = Qt.Key(event.key())
        if key == Qt.Key.Key_Escape and self._dragged:
            self._wanted = None
            self._set(self._former)
            self._finish()
            return
        step = self._step()
        ends = {Qt.Key.Key_Home: 0.0, Qt.Key.Key_End: self.mark or self.end}
        if key in _STEPS:
            count = self.value / step
            whole = round(count) if abs(count - round(count)) < 1e-6 else math.floor(count + (_STEPS[key] < 0))
            self._want((whole + _STEPS[key]) * step)
        elif key in ends:
            self._want(ends[key])
        else:
            super().keyPressEvent(event)
            return
        self._document.end_gesture()
        self._set_wanted()

    def focusInEvent(self, event: QFocusEvent) -> None:
        super().focusInEvent(event)
        self.update()

    def enterEvent(self, event: QEnterEvent) -> None:
        self._hovered = True
        self.update()

    def leaveEvent(self, event: QEvent) -> None:
        self._hovered = False
        self.update()

    def paintEvent(self, event: QPaintEvent) -> None:
        painter = QPainter(self)
        painter.fillRect(self.rect(), self._theme.colour("surface"))
        theme = self._theme.greyed if self._document.is_stale else self._theme
        paint_slider(painter, self.width(), self.state, theme, self._hovered or self._dragged, self.hasFocus())
