"""A field with a list of choices; the wheel does not change it by accident."""

from __future__ import annotations

from PySide6.QtCore import QPointF, QRectF, Qt, Signal
from PySide6.QtGui import QFocusEvent, QKeyEvent, QPainter, QPaintEvent, QPalette, QPen, QPolygonF, QWheelEvent
from PySide6.QtWidgets import QComboBox, QStyle, QStyleOptionComboBox, QStylePainter, QWidget

from headfall_app.document import Document
from headfall_app.entry.choices import choose, chosen, words_of
from headfall_app.entry.field import Field
from headfall_app.entry.plan_rows import Row

_ARROW = 20
_OPENING_KEYS = (
    Qt.Key.Key_Return,
    Qt.Key.Key_Enter,
    Qt.Key.Key_Space,
    Qt.Key.Key_Up,
    Qt.Key.Key_Down,
    Qt.Key.Key_PageUp,
    Qt.Key.Key_PageDown,
    Qt.Key.Key_Home,
    Qt.Key.Key_End,
)


class ChoiceBox(QComboBox):
    """A combo box whose arrow is drawn in the colour of its text and which leaves the wheel to the page."""

    entered = Signal()
    left = Signal()

    def __init__(self, parent: QWidget | None = None) -> None:
        super().__init__(parent)
        self.setFocusPolicy(Qt.FocusPolicy.StrongFocus)
        self.setSizeAdjustPolicy(QComboBox.SizeAdjustPolicy.AdjustToMinimumContentsLengthWithIcon)
        self.setMinimumContentsLength(4)

    def wheelEvent(self, event: QWheelEvent) -> None:
        event.ignore()

    def keyPressEvent(self, event: QKeyEvent) -> None:
        # Passing through a list would reshape the case at every line on the way: the list opens instead.
        if event.key() in _OPENING_KEYS:
            self.showPopup()
        else:
            super().keyPressEvent(event)

    def focusInEvent(self, event: QFocusEvent) -> None:
        super().focusInEvent(event)
        self.entered.emit()

    def focusOutEvent(self, event: QFocusEvent) -> None:
        super().focusOutEvent(event)
        if event.reason() != Qt.FocusReason.PopupFocusReason:
            self.left.emit()

    def paintEvent(self, event: QPaintEvent) -> None:
        painter, option = QStylePainter(self), QStyleOptionComboBox()
        self.initStyleOption(option)
        painter.drawComplexControl(QStyle.ComplexControl.CC_ComboBox, option)
        painter.setPen(option.palette.color(QPalette.ColorRole.Text))
        box = self.rect().adjusted(8, 0, -_ARROW - 2, 0)
        text = self.fontMetrics().elidedText(self.currentText(), Qt.TextElideMode.ElideRight, box.width())
        painter.drawText(box, Qt.AlignmentFlag.AlignVCenter, text)
        _draw_arrow(painter, QRectF(self.width() - _ARROW, 0, _ARROW - 4, self.height()))


def _draw_arrow(painter: QPainter, box: QRectF) -> None:
    painter.setRenderHint(QPainter.RenderHint.Antialiasing)
    painter.setPen(QPen(painter.pen().color(), 1.5))
    middle = box.center()
    painter.drawPolyline(QPolygonF([middle + QPointF(-4, -2), middle + QPointF(0, 2), middle + QPointF(4, -2)]))


class ChoiceField(Field):
    """A label and a list; choosing changes the case in place and keeps what still applies."""

    def __init__(self, row: Row, document: Document, parent: QWidget | None = None) -> None:
        self.box = ChoiceBox()
        for value, text in row.choices:
            self.box.addItem(text, value)
        super().__init__(row, document, self.box, parent)
        self.hide_echo()
        self.box.activated.connect(self._choose)
        self.box.entered.connect(self.point)
        self.box.left.connect(self.unpoint)

    def _choose(self, index: int) -> None:
        choose(self.document, self.row, str(self.box.itemData(index)))

    def refresh(self) -> None:
        """Show what the document holds."""
        value = chosen(self.document.case, self.row)
        for index, (choice, text) in enumerate(self.row.choices):
            self.box.setItemText(index, words_of(self.document.case, self.row, choice, text))
        place = self.box.findData(value or self.row.default)
        if place < 0 and value:
            # A word typed into the file by hand: shown as it is, so that it can be seen and changed.
            self.box.addItem(value, value)
            place = self.box.count() - 1
        self.box.setCurrentIndex(place)
        self.set_untyped(not value)
        # A level outside is typed in a row of its own at the same path.
        wrong = None if self.row.change == "tailwater" else self.document.wrong.get(self.row.path)
        self.show_reason(wrong.sentence if wrong else "")
