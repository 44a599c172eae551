"""The main page: answers on top, then the picture, then what to beware of."""

from __future__ import annotations

from PySide6.QtCore import QRect, Signal
from PySide6.QtGui import QPainter, QPaintEvent, QResizeEvent
from PySide6.QtWidgets import QLabel, QWidget

from headfall.case.model import Path
from headfall_app.document import Document
from headfall_app.paint.fonts import font
from headfall_app.paint.theme import Theme
from headfall_app.view.answers_row import TALL, AnswersRow
from headfall_app.view.inflow_slider import InflowSlider
from headfall_app.view.notes import Notes
from headfall_app.view.page_words import stale_sentence
from headfall_app.view.stage import LEAST_HEIGHT, LEAST_WIDTH, Stage

LEFT, RIGHT, TOP, BOTTOM = 24, 20, 14, 12
STALE = 30
_LOW = 620
_STAGE_SHARE = 0.76


class TankPage(QWidget):
    """Answers, stage with the inflow's slider, and notes."""

    entry_requested = Signal(tuple)
    """Somebody wants to go to an entry; its path."""

    def __init__(self, document: Document, theme: Theme, parent: QWidget | None = None) -> None:
        super().__init__(parent)
        self._document, self._theme = document, theme
        self.stale_line = QLabel(self)
        self.stale_line.setFont(font(13))
        self.answers_row = AnswersRow(document, theme, self)
        self.stage = Stage(document, theme, self)
        self.slider = InflowSlider(document, theme, self.stage)
        self.notes = Notes(document, theme, self)
        self._rules: list[int] = []
        self.setMinimumSize(LEAST_WIDTH + LEFT + RIGHT, TOP + TALL + LEAST_HEIGHT + 70)
        self.setAccessibleName("Tank")
        self.setFocusProxy(self.stage)
        self.stage.frame_changed.connect(self._place_slider)
        self.notes.rows_changed.connect(self._lay_out)
        self.notes.entry_requested.connect(self._request)
        document.answers_changed.connect(self._refresh)
        self.stage.released.connect(self._lay_out)
        self.slider.released.connect(self._lay_out)
        self.set_theme(theme)
        self._refresh()

    def set_theme(self, theme: Theme) -> None:
        """Paint in another set of colours."""
        self._theme = theme
        for part in (self.answers_row, self.stage, self.slider, self.notes):
            part.set_theme(theme)
        self.stale_line.setStyleSheet(f"color: {theme.hex('limit')}; background: transparent;")
        self.update()

    def _request(self, path: Path) -> None:
        self._document.pointed = path
        self.entry_requested.emit(path)

    def _refresh(self) -> None:
        self._say_stale()
        self._lay_out()

    def _say_stale(self) -> None:
        sentence = stale_sentence(self._document)
        if sentence != self.stale_line.text():
            self.stale_line.setText(sentence)
            self.stale_line.setToolTip(sentence)

    def resizeEvent(self, event: QResizeEvent) -> None:
        super().resizeEvent(event)
        self._lay_out()

    def paintEvent(self, event: QPaintEvent) -> None:
        painter = QPainter(self)
        painter.fillRect(self.rect(), self._theme.colour("surface"))
        for row in self._rules:
            painter.fillRect(QRect(LEFT, row, self.width() - LEFT - RIGHT, 1), self._theme.colour("hair"))

    def _lay_out(self) -> None:
        width = self.width() - LEFT - RIGHT
        stale = bool(self.stale_line.text())
        top = TOP if self.height() >= _LOW else 8
        self.stale_line.setVisible(stale)
        if stale:
            self.stale_line.setGeometry(LEFT, top, width, 22)
            top += STALE
        self.answers_row.setGeometry(LEFT, top, width, TALL)
        rule = top + TALL + 9
        first = rule + 8
        stage, notes = self._shares(width, self.height() - first - BOTTOM)
        self.stage.setGeometry(LEFT, first, width, stage)
        second = first + stage + 4
        self._rules = [rule, second]
        self.notes.setGeometry(LEFT, second + 13, width, max(notes, 0))
        self._place_slider()
        self.update()

    def _shares(self, width: int, available: int) -> tuple[int, int]:
        """Return the heights of stage and notes."""
        room = available - 17
        # Notes come and go while something is dragged: the picture must not move under the pointer.
        if self.stage.is_dragged or self.slider.is_dragged:
            return self.stage.height(), room - self.stage.height()
        if self.notes.is_unfolded:
            wanted = min(self.notes.height_of(width) + 24, max(room // 2, 60))
        elif self.height() < _LOW:
            wanted = self.notes.height_of(width, 1)
        else:
            wanted = min(self.notes.height_of(width), self._most_notes(width, room))
        stage = max(min(room - wanted, self.stage.needed_height(width, max(room - wanted, LEAST_HEIGHT))), LEAST_HEIGHT)
        return stage, room - stage

    def _most_notes(self, width: int, room: int) -> int:
        least = self.notes.height_of(width, min(2, len(self.notes.notes)))
        most = max(round((1.0 - _STAGE_SHARE) * room), least)
        return self.notes.height_of(width, self.notes.fitting(width, most))

    def _place_slider(self) -> None:
        self.slider.setGeometry(self.stage.slider_box().toRect())
