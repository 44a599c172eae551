"""A panel under the head row that says what was not done and why; it blocks nothing."""

from __future__ import annotations

from collections.abc import Sequence

from PySide6.QtCore import Qt, QTimer
from PySide6.QtWidgets import QHBoxLayout, QPushButton, QVBoxLayout, QWidget

from headfall_app.label import label

_SHOWN = 6
_STAYS = 8000


class MessagePanel(QWidget):
    """One heading and a few sentences; hidden until there is something to say."""

    def __init__(self, parent: QWidget | None = None) -> None:
        super().__init__(parent)
        self.setObjectName("message")
        self.setAttribute(Qt.WidgetAttribute.WA_StyledBackground)
        self._title = label("message_title", weight=600, wraps=True)
        self._text = label("message_text", wraps=True)
        self._text.setTextInteractionFlags(Qt.TextInteractionFlag.TextSelectableByMouse)
        close = QPushButton("Close", self)
        close.setAccessibleName("Close the message")
        close.clicked.connect(self.hide)
        words = QVBoxLayout()
        words.addWidget(self._title)
        words.addWidget(self._text)
        row = QHBoxLayout(self)
        row.setContentsMargins(20, 10, 20, 10)
        row.addLayout(words, 1)
        row.addWidget(close, 0, Qt.AlignmentFlag.AlignTop)
        self._leaving = QTimer(self)
        self._leaving.setSingleShot(True)
        self._leaving.setInterval(_STAYS)
        self._leaving.timeout.connect(self.hide)
        self.hide()

    def tell(self, title: str) -> None:
        """Show that something went well; it goes by itself."""
        self.say(title)
        self._mark("calm")
        self._leaving.start()

    def say(self, title: str, sentences: Sequence[str] = ()) -> None:
        """Show a heading and sentences below it; of many the first few, with how many are left."""
        shown = list(sentences[:_SHOWN])
        if len(sentences) > _SHOWN:
            shown.append(f"And {len(sentences) - _SHOWN} more.")
        self._leaving.stop()
        self._mark("")
        self._title.setText(title)
        self._text.setText("\n".join(shown))
        self._text.setVisible(bool(shown))
        self.setAccessibleName(title)
        self.show()

    def _mark(self, mood: str) -> None:
        if self._title.property("mood") != mood:
            self._title.setProperty("mood", mood)
            self._title.style().unpolish(self._title)
            self._title.style().polish(self._title)

    @property
    def said(self) -> str:
        """What is on show; empty while hidden."""
        return "\n".join(filter(None, (self._title.text(), self._text.text()))) if not self.isHidden() else ""
