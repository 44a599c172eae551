"""One note: its tag and its text."""

from __future__ import annotations

from html import escape

from PySide6.QtCore import QPointF, QRectF, Qt, Signal
from PySide6.QtGui import QPainter, QPaintEvent, QResizeEvent
from PySide6.QtWidgets import QLabel, QWidget

from headfall.checks.finding import Grade
from headfall_app.paint import lettering
from headfall_app.paint.fonts import font
from headfall_app.paint.strokes import pen
from headfall_app.paint.theme import Theme
from headfall_app.view.note_words import Note

TAG_WIDTH, TAG_HEIGHT, TAG_GAP = 88, 20, 16
WIDEST = 1100
LEAST = 22


class NoteRow(QWidget):
    """A tag, then one Semibold sentence with the number, then what it rests on and what to do."""

    entry_requested = Signal(tuple)

    def __init__(self, theme: Theme, parent: QWidget | None = None) -> None:
        super().__init__(parent)
        self._theme = theme
        self._note: Note | None = None
        self._heights: dict[int, int] = {}
        self._text = QLabel(self)
        self._text.setFont(font(13))
        self._text.setWordWrap(True)
        self._text.setTextFormat(Qt.TextFormat.RichText)
        self._text.setAlignment(Qt.AlignmentFlag.AlignTop | Qt.AlignmentFlag.AlignLeft)
        self._text.setTextInteractionFlags(
            Qt.TextInteractionFlag.TextSelectableByMouse
            | Qt.TextInteractionFlag.LinksAccessibleByMouse
            | Qt.TextInteractionFlag.LinksAccessibleByKeyboard
        )
        self._text.linkActivated.connect(self._request)

    def set_theme(self, theme: Theme) -> None:
        """Paint in another set of colours."""
        self._theme = theme
        self._write()

    def set_note(self, note: Note) -> None:
        """Show another note."""
        if note != self._note:
            self._note = note
            self._write()

    def _write(self) -> None:
        note, theme = self._note, self._theme
        if note is None:
            return
        link = ""
        if note.link:
            style = f"color: {theme.hex('accent')}; text-decoration: none"
            link = f' <a href="entry" style="{style}">{escape(note.link).replace(" ", "&nbsp;")}</a>'
        # The row stands on the page whatever style the window gives to labels.
        self._text.setText(
            f'<span style="color: {theme.hex("ink")}"><span style="font-weight: 600">{escape(note.sentence)}</span> '
            f"{escape(note.rest)}</span>{link}"
        )
        self._heights.clear()
        self.setAccessibleName(note.grade.word)
        self.setAccessibleDescription(f"{note.sentence} {note.rest}")
        self._text.setAccessibleName(f"{note.grade.word}. {note.sentence} {note.rest}")
        self.update()

    def _text_width(self, width: int) -> int:
        return max(min(width - TAG_WIDTH - TAG_GAP, WIDEST), 80)

    def height_at(self, width: int) -> int:
        """Return how tall the row stands at a width."""
        if width not in self._heights:
            if len(self._heights) > 8:
                self._heights.clear()
            self._heights[width] = max(self._text.heightForWidth(self._text_width(width)), LEAST)
        return self._heights[width]

    def resizeEvent(self, event: QResizeEvent) -> None:
        super().resizeEvent(event)
        self._text.setGeometry(TAG_WIDTH + TAG_GAP, 0, self._text_width(self.width()), self.height())

    def _request(self) -> None:
        if self._note is not None and self._note.path is not None:
            self.entry_requested.emit(self._note.path)

    def paintEvent(self, event: QPaintEvent) -> None:
        if self._note is None:
            return
        painter = QPainter(self)
        painter.setRenderHint(QPainter.RenderHint.Antialiasing, True)
        theme, grade = self._theme, self._note.grade
        box = QRectF(0.0, 0.0, TAG_WIDTH, TAG_HEIGHT)
        if grade is Grade.STOP:
            edge, width, ground, ink = theme.colour("limit"), 1.0, theme.colour("limit"), theme.colour("on_limit")
        elif grade is Grade.ATTENTION:
            ink = theme.colour("attention")
            edge, width, ground = ink, 1.5, theme.colour("attention_soft")
        else:
            edge, width, ground, ink = theme.colour("edge"), 1.0, theme.colour("surface"), theme.colour("muted")
        painter.setPen(pen(edge, width))
        painter.setBrush(ground)
        inset = 0.5 * width
        painter.drawRoundedRect(box.adjusted(inset, inset, -inset, -inset), 2.0, 2.0)
        lettering.write(painter, QPointF(box.center()), grade.word, ink, 12, 600, lettering.CENTRE)
