"""A line of the panel that adds a part to a list, or stands over one and takes it out."""

from __future__ import annotations

from PySide6.QtCore import Qt
from PySide6.QtWidgets import QGridLayout, QWidget

from headfall_app.document import Document
from headfall_app.entry.changes import add_part, remove_part
from headfall_app.entry.field import GAP, Field
from headfall_app.entry.heading import Link
from headfall_app.entry.plan_rows import Row


class ActionField(Field):
    """A small heading with a word that can be pressed."""

    def __init__(self, row: Row, document: Document, parent: QWidget | None = None) -> None:
        _, words = row.choices[0]
        name = f"{row.label}, {words}" if row.label else words
        self.link = Link(words, name)
        super().__init__(row, document, self.link, parent)
        self.link.setAccessibleName(name[0].upper() + name[1:])
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
        grid.addWidget(self._label, 0, 0, Qt.AlignmentFlag.AlignVCenter)
        side = Qt.AlignmentFlag.AlignRight if self.row.label else Qt.AlignmentFlag.AlignLeft
        grid.addWidget(self.editor, 0, 1, side | Qt.AlignmentFlag.AlignVCenter)
        grid.addWidget(self._reason, 1, 0, 1, 2)
        grid.setColumnStretch(1, 1)
        if not self.row.label:
            self._label.hide()
        self._echo.hide()

    def _act(self) -> None:
        _, words = self.row.choices[0]
        if self.row.change == "add":
            add_part(self.document, self.row.path, words)
        else:
            self.show_reason(remove_part(self.document, self.row.path, f"remove {self.row.label.lower()}"))

    def refresh(self) -> None:
        """Nothing hangs on what the document holds."""

    def set_echo_width(self, width: int) -> None:
        """It has no echo."""

    def hide_echo(self, hidden: bool = True) -> None:
        """It has no echo."""
