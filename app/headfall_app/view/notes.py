"""The notes: what to beware of, worst first."""

from __future__ import annotations

from PySide6.QtCore import Signal
from PySide6.QtGui import QResizeEvent
from PySide6.QtWidgets import QFrame, QLabel, QScrollArea, QWidget

from headfall_app.document import Document
from headfall_app.paint.fonts import font
from headfall_app.paint.theme import Theme
from headfall_app.view.note_row import NoteRow
from headfall_app.view.note_words import Note, fold_words, notes_of

GAP = 8
FOLD = 24


class Notes(QWidget):
    """Findings of the grades that people must read, folded to what the page has room for."""

    entry_requested = Signal(tuple)
    """Somebody wants to go to an entry; its path."""
    rows_changed = Signal()
    """There are other notes, or another number of them is wanted: the page has to be laid out anew."""

    def __init__(self, document: Document, theme: Theme, parent: QWidget | None = None) -> None:
        super().__init__(parent)
        self._document, self._theme = document, theme
        self._notes: tuple[Note, ...] = ()
        self._rows: list[NoteRow] = []
        self._shown = 0
        self.is_unfolded = False
        self._area = QScrollArea(self)
        self._area.setFrameShape(QFrame.Shape.NoFrame)
        self._area.setWidgetResizable(False)
        self._inner = QWidget()
        self._area.setWidget(self._inner)
        self._fold = QLabel(self)
        self._fold.setFont(font(12))
        self._fold.linkActivated.connect(self._switch)
        self.setAccessibleName("Notes")
        self.set_theme(theme)
        document.answers_changed.connect(self.refresh)
        self.refresh()

    def set_theme(self, theme: Theme) -> None:
        """Paint in another set of colours."""
        self._theme = theme
        ground = f"background: {theme.hex('surface')};"
        self._area.setStyleSheet(f"QScrollArea, QScrollArea > QWidget > QWidget {{ {ground} }}")
        for row in self._rows:
            row.set_theme(theme)
        self._lay_out()

    @property
    def notes(self) -> tuple[Note, ...]:
        """The notes, worst first, the folded ones included."""
        return self._notes

    @property
    def shown(self) -> int:
        """How many notes are not folded away."""
        return self._shown

    def refresh(self) -> None:
        """Show the notes of the present answers."""
        notes = notes_of(self._document)
        if notes == self._notes:
            return
        count = len(self._notes)
        self._notes = notes
        while len(self._rows) > len(notes):
            self._rows.pop().deleteLater()
        while len(self._rows) < len(notes):
            row = NoteRow(self._theme, self._inner)
            row.entry_requested.connect(self.entry_requested)
            row.show()
            self._rows.append(row)
        for row, note in zip(self._rows, notes, strict=True):
            row.set_note(note)
        self.setAccessibleDescription(" ".join(note.sentence for note in notes))
        if len(notes) != count:
            self.is_unfolded = False
        self._lay_out()
        self.rows_changed.emit()

    def height_of(self, width: int, count: int | None = None) -> int:
        """Return how tall the first ``count`` notes stand at a width, all of them by default, a fold line included."""
        rows = self._rows if count is None else self._rows[:count]
        tall = sum(row.height_at(width) for row in rows) + GAP * max(len(rows) - 1, 0)
        return tall + (FOLD if len(rows) < len(self._rows) else 0)

    def fitting(self, width: int, height: int) -> int:
        """Return how many notes fit into a height, at least one."""
        for count in range(len(self._rows), 1, -1):
            if self.height_of(width, count) <= height:
                return count
        return min(1, len(self._rows))

    def resizeEvent(self, event: QResizeEvent) -> None:
        super().resizeEvent(event)
        self._lay_out()

    def _switch(self) -> None:
        self.is_unfolded = not self.is_unfolded
        self._lay_out()
        self.rows_changed.emit()

    def _lay_out(self) -> None:
        width, height = self.width(), self.height()
        self._shown = len(self._rows) if self.is_unfolded else self.fitting(width, height)
        folds = self.is_unfolded or self._shown < len(self._rows)
        top = 0
        inner = width - (14 if self.is_unfolded and self.height_of(width) + FOLD > height else 0)
        for index, row in enumerate(self._rows):
            row.setVisible(index < self._shown)
            if index < self._shown:
                tall = row.height_at(inner)
                row.setGeometry(0, top, inner, tall)
                top += tall + GAP
        self._inner.resize(inner, max(top - GAP, 0))
        self._area.setGeometry(0, 0, width, max(height - FOLD, 0) if folds else height)
        self._fold.setVisible(folds)
        self._fold.setText(fold_words(self._notes, self._shown, self._theme))
        if folds:
            self._fold.setGeometry(0, min(top - GAP + 4, height - FOLD + 2), width, 20)
