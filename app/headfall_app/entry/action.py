"""A line of the panel that adds a part to a list, or stands over one and takes it out."""

from __future__ import annotations

from PySide6.QtCore import Qt, Signal
from PySide6.QtWidgets import QGridLayout, QWidget

from headfall_app.document import Document
from headfall_app.entry.changes import add_part, remove_part
from headfall_app.entry.field import GAP, Field
from headfall_app.entry.heading import Link
from headfall_app.entry.plan_rows import Row
from headfall_app.paint.fonts import font
from headfall_app.words import lowered, name_of


class ActionField(Field):
    """A small heading with a word that can be pressed."""

    added = Signal(object)
    """The path of a part that was added."""

    def __init__(self, row: Row, document: Document, parent: QWidget | None = None) -> None:
        _, words = row.choices[0]
        self.link = Link(words, words)
        super().__init__(row, document, self.link, parent)
        self.link.setFont(font(12))
        owner = name_of(row.path if row.change == "remove" else row.path[:-1])
        self.link.setAccessibleName(f"{owner}: {words}" if owner else words)
        self.link.clicked.connect(self._act)

    def _lay_out(self) -> None:
        grid = self._grid = QGridLayout(self)
        grid.setContentsMargins(0, 4, 0, 2)
        grid.setHorizontalSpacing(GAP)
        self._label.setMinimumWidth(0)
        self._label.setMaximumWidth(16777215)
        weight = self._label.font()
        weight.setWeight(weight.Weight.DemiBold)
        self._label.setFont(weight)
        middle, left, right = Qt.AlignmentFlag.AlignVCenter, Qt.AlignmentFlag.AlignLeft, Qt.AlignmentFlag.AlignRight
        if self.row.label:
            grid.addWidget(self._label, 0, 0, middle)
            grid.addWidget(self.editor, 0, 1, right | middle)
        else:
            grid.addWidget(self.editor, 0, 0, 1, 2, left | middle)
            self._label.hide()
        grid.addWidget(self._reason, 1, 0, 1, 2)
        grid.setColumnStretch(1, 1)
        self._echo.hide()

    def _act(self) -> None:
        _, words = self.row.choices[0]
        if self.row.change == "begin":
            self.document.set(self.row.path, self.row.choices[0][0], "Type wall and lining")
            self.added.emit(self.row.path)
        elif self.row.change == "add":
            self.added.emit(add_part(self.document, self.row.path, words))
        else:
            self.show_reason(remove_part(self.document, self.row.path, f"remove {lowered(name_of(self.row.path))}"))

    def refresh(self) -> None:
        """Nothing hangs on what the document holds."""

    def set_echo_width(self, width: int) -> None:
        """It has no echo."""

    def hide_echo(self, hidden: bool = True) -> None:
        """It has no echo."""
