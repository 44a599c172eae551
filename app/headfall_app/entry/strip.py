"""The folded entry of a narrow window: the names of the groups, one below another, turned a quarter."""

from __future__ import annotations

from PySide6.QtCore import QRectF, QSize, Qt
from PySide6.QtGui import QFontMetrics, QPainter, QPaintEvent
from PySide6.QtWidgets import QAbstractButton, QVBoxLayout, QWidget

from headfall.case.model import Path
from headfall_app.entry.panel import EntryPanel
from headfall_app.paint.fonts import font, text_width
from headfall_app.paint.theme import Theme

FOLDED_BELOW, WIDTH = 1180, 40


class _GroupButton(QAbstractButton):
    def __init__(self, title: str, strip: EntryStrip) -> None:
        super().__init__(strip)
        self._strip = strip
        self.setText(title)
        self.setAccessibleName(f"Entry: {title}")
        self.setToolTip(title)
        self.setCheckable(True)
        self.setCursor(Qt.CursorShape.PointingHandCursor)

    def sizeHint(self) -> QSize:
        return QSize(WIDTH, round(text_width(self.text(), 11, 600)) + 12)

    def minimumSizeHint(self) -> QSize:
        return QSize(WIDTH, 24)

    def paintEvent(self, event: QPaintEvent) -> None:
        painter, theme = QPainter(self), self._strip.theme
        lit = self.hasFocus() or self.underMouse() or self.isChecked()
        painter.setFont(font(11, 600))
        if self.hasFocus():
            painter.fillRect(QRectF(4, 2, 2, self.height() - 4), theme.colour("accent"))
        painter.setPen(theme.colour("accent" if lit else "ink"))
        painter.translate(self.width(), 0)
        painter.rotate(90)
        painter.drawText(QRectF(0, 0, self.height(), self.width()), Qt.AlignmentFlag.AlignCenter, self._fitted())

    def _fitted(self) -> str:
        """The name, cut short where the window is too low for it."""
        return QFontMetrics(font(11, 600)).elidedText(self.text(), Qt.TextElideMode.ElideRight, self.height() - 8)


class EntryStrip(QWidget):
    """A strip of 40 px that opens the entry panel at one of its groups, and folds it again."""

    def __init__(self, panel: EntryPanel, parent: QWidget | None = None) -> None:
        super().__init__(parent)
        self.setObjectName("entry")
        self.setAttribute(Qt.WidgetAttribute.WA_StyledBackground)
        self.setFixedWidth(WIDTH)
        self._panel = panel
        self._folds = False
        self._buttons: list[_GroupButton] = []
        self._column = QVBoxLayout(self)
        self._column.setContentsMargins(0, 8, 0, 8)
        self._column.setSpacing(0)
        self.hide()

    @property
    def theme(self) -> Theme:
        """The theme of the panel it stands for."""
        return self._panel.theme

    def set_folds(self, folds: bool) -> None:
        """Stand in for the panel in a narrow window; in a wide one the panel shows by itself."""
        if folds == self._folds:
            return
        self._folds = folds
        self.setVisible(folds)
        self._panel.setVisible(not folds)
        if folds:
            self._fill()

    @property
    def buttons(self) -> tuple[QAbstractButton, ...]:
        """One button a group."""
        return tuple(self._buttons)

    def _fill(self) -> None:
        while self._column.count():
            self._column.takeAt(0)
        for button in self._buttons:
            button.deleteLater()
        self._buttons = []
        for box in self._panel.groups():
            button = _GroupButton(box.heading.title, self)
            button.clicked.connect(lambda _=False, key=box.group.key: self._open(key))
            self._buttons.append(button)
            self._column.addWidget(button)
        self._column.addStretch(1)

    def open_at(self, path: Path) -> None:
        """Open the panel for an entry where it is folded; in a wide window the panel is open in any case."""
        box = self._panel.box_of(path)
        if not self._folds or box is None:
            return
        for button, other in zip(self._buttons, self._panel.groups(), strict=True):
            button.setChecked(other is box)
        self._panel.show()

    def _open(self, key: str) -> None:
        boxes = self._panel.groups()
        chosen = next((box for box in boxes if box.group.key == key), boxes[0])
        button = self._buttons[boxes.index(chosen)]
        self._panel.setVisible(button.isChecked())
        for other in self._buttons:
            other.setChecked(other is button and button.isChecked())
        if button.isChecked():
            self._panel.open_group(chosen)
