"""What every row of the entry panel has: a label, an editor, an echo and a place for a reason."""

from __future__ import annotations

from PySide6.QtCore import Qt
from PySide6.QtGui import QResizeEvent
from PySide6.QtWidgets import QGridLayout, QSizePolicy, QWidget

from headfall.case.model import Path
from headfall_app.document import Document
from headfall_app.entry.plan import Row
from headfall_app.label import label
from headfall_app.paint.fonts import font

LABEL_WIDTH, ECHO_WIDTH, ROW_HEIGHT, FIELD_HEIGHT, GAP = 92, 64, 30, 26, 8


class Field(QWidget):
    """One row; it shows what the document holds at its path and changes nothing else."""

    def __init__(self, row: Row, document: Document, editor: QWidget, parent: QWidget | None = None) -> None:
        super().__init__(parent)
        self.row, self.document, self.editor = row, document, editor
        self._label = label(text=row.label)
        self._label.setFixedWidth(LABEL_WIDTH)
        self._label.setBuddy(editor)
        self._echo = label("echo", 12)
        self._echo.setFixedWidth(ECHO_WIDTH)
        self._reason = label("reason", 12, wraps=True)
        self._reason.setSizePolicy(QSizePolicy.Policy.Ignored, QSizePolicy.Policy.Minimum)
        self._reason.hide()
        self._below = label("echo", 12)
        self._below.hide()
        editor.setFont(font(13))
        editor.setFixedHeight(FIELD_HEIGHT)
        editor.setMinimumWidth(40)
        editor.setAccessibleName(row.name)
        editor.setToolTip(row.tip)
        editor.setAccessibleDescription(row.tip)
        self.setFocusProxy(editor)
        self._lay_out()

    def _lay_out(self) -> None:
        grid = self._grid = QGridLayout(self)
        grid.setContentsMargins(0, 0, 0, ROW_HEIGHT - FIELD_HEIGHT)
        grid.setHorizontalSpacing(GAP)
        grid.setVerticalSpacing(2)
        grid.addWidget(self._label, 0, 0, Qt.AlignmentFlag.AlignVCenter)
        grid.addWidget(self.editor, 0, 1)
        grid.addWidget(self._echo, 0, 2, Qt.AlignmentFlag.AlignVCenter)
        grid.addWidget(self._reason, 1, 0, 1, 3)
        grid.addWidget(self._below, 2, 1, 1, 2)
        grid.setColumnStretch(1, 1)

    def refresh(self) -> None:
        """Show what the document holds."""
        raise NotImplementedError

    def point(self) -> None:
        """Tell the document that this entry has the cursor."""
        self.document.cursor = self.document.pointed = self.row.path

    def unpoint(self) -> None:
        """Tell the document that this entry has the cursor no more."""
        if self.document.cursor == self.row.path:
            self.document.cursor = None
        if self.document.pointed == self.row.path:
            self.document.pointed = None

    def set_echo(self, text: str) -> None:
        """Say something beside the editor."""
        if self._echo.text() != text:
            self._echo.setText(text)
            self.editor.setAccessibleDescription(" ".join(filter(None, (self.row.tip, text))))
        self.share_width()

    def share_width(self) -> None:
        """Give editor and echo the width that what stands in them needs; an editor of choices has it all."""

    def resizeEvent(self, event: QResizeEvent) -> None:
        super().resizeEvent(event)
        self.share_width()

    def room(self) -> int:
        """Return what editor, echo and the gap between them have together [px]."""
        return self.width() - LABEL_WIDTH - GAP

    def set_echo_width(self, width: int) -> None:
        """Give the echo some width beside the editor; with none of it the echo stands in the tooltip."""
        self.hide_echo(width <= 0)
        self._echo.setFixedWidth(max(width, 0))
        aside = self._echo.text() if width <= 0 else ""
        self.editor.setToolTip("\n".join(filter(None, (self.row.tip, aside))))

    def go_to(self, path: Path) -> None:
        """Put the cursor here; ``path`` may be that of a value inside this entry."""
        self.editor.setFocus(Qt.FocusReason.OtherFocusReason)

    def say_below(self, text: str) -> None:
        """Say something under the editor; an empty text takes the place away."""
        self._below.setText(text)
        self._below.setVisible(bool(text))

    def label_need(self) -> int:
        """Return the width that the label's words take [px]."""
        return self._label.fontMetrics().horizontalAdvance(self._label.text())

    def label_room(self) -> int:
        """Return the width that the label has [px]."""
        return self._label.width()

    def echo_need(self) -> int:
        """Return the width that the echo's words take [px]."""
        return self._echo.fontMetrics().horizontalAdvance(self._echo.text())

    def hide_echo(self, hidden: bool = True) -> None:
        """Give the echo's width to the editor, or take it back."""
        if (self._grid.indexOf(self._echo) < 0) == hidden:
            return
        self._echo.setVisible(not hidden)
        for widget in (self.editor, self._echo):
            self._grid.removeWidget(widget)
        self._grid.addWidget(self.editor, 0, 1, 1, 2 if hidden else 1)
        if not hidden:
            self._grid.addWidget(self._echo, 0, 2, Qt.AlignmentFlag.AlignVCenter)

    def tab_stops(self) -> tuple[QWidget, ...]:
        """What the Tab key stops at in this row."""
        return (self.editor,)

    def show_faults(self, faults: dict[Path, str]) -> None:
        """Show the fault at this entry, if there is one; at one that holds several values the first of theirs."""
        own = faults.get(self.row.path, "")
        if not own and self.row.kind in ("list", "number"):
            depth = len(self.row.path)
            own = next((sentence for path, sentence in faults.items() if path[:depth] == self.row.path), "")
        self.show_reason(own)

    def show_reason(self, sentence: str) -> None:
        """Mark the row as wrong and say why under it; an empty sentence takes the mark away."""
        self._mark("wrong", bool(sentence))
        if self._reason.text() != sentence:
            self._reason.setText(sentence)
            self._reason.setVisible(bool(sentence))
            self.editor.setAccessibleDescription(sentence or self.row.tip)

    @property
    def reason(self) -> str:
        """The sentence under the row; empty where there is none."""
        return self._reason.text()

    @property
    def echo(self) -> str:
        """The words beside the editor."""
        return self._echo.text()

    def set_lit(self, lit: bool) -> None:
        """Mark the row as the one pointed at in the drawing."""
        self._mark("lit", lit)

    def set_untyped(self, untyped: bool) -> None:
        """Mark the row as one where nothing was typed."""
        self._mark("untyped", untyped)

    def _mark(self, name: str, on: bool) -> None:
        if bool(self.editor.property(name)) != on:
            self.editor.setProperty(name, on)
            self.editor.style().unpolish(self.editor)
            self.editor.style().polish(self.editor)
            self.editor.update()
