"""What the window says of its own accord: what was not done and why, and what went well; neither blocks anything."""

from __future__ import annotations

from collections.abc import Sequence

from PySide6.QtCore import QCoreApplication, QEvent, QObject, Qt, QTimer
from PySide6.QtWidgets import QHBoxLayout, QLabel, QPushButton, QVBoxLayout, QWidget

from headfall_app.label import label
from headfall_app.paint.fonts import font

_SHOWN = 6
_STAYS = 6000
_ACTIONS = (QEvent.Type.MouseButtonPress, QEvent.Type.KeyPress)
_FROM_EDGE, _FRAME = 16, 34


class MessagePanel(QWidget):
    """One heading and a few sentences on what was not done; it stays until it is closed."""

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
        self.hide()

    def say(self, title: str, sentences: Sequence[str] = ()) -> None:
        """Show a heading and sentences below it; of many the first few, with how many are left."""
        shown = list(sentences[:_SHOWN])
        if len(sentences) > _SHOWN:
            shown.append(f"And {len(sentences) - _SHOWN} more.")
        self._title.setText(title)
        self._text.setText("\n".join(shown))
        self._text.setVisible(bool(shown))
        self.setAccessibleName(title)
        self.show()

    @property
    def said(self) -> str:
        """What is on show; empty while hidden."""
        return "\n".join(filter(None, (self._title.text(), self._text.text()))) if not self.isHidden() else ""


class Notice(QLabel):
    """One calm line over the foot of its window; it moves nothing and goes after a while, or with the next action."""

    def __init__(self, window: QWidget) -> None:
        super().__init__(window)
        self.setObjectName("notice")
        self.setFont(font(13))
        self.setTextFormat(Qt.TextFormat.PlainText)
        self.setAttribute(Qt.WidgetAttribute.WA_TransparentForMouseEvents)
        self._sentence = ""
        self._leaving = QTimer(self, singleShot=True, interval=_STAYS)
        self._leaving.timeout.connect(self.leave)
        self.hide()

    def tell(self, sentence: str) -> None:
        """Show that something went well."""
        self._sentence = sentence
        self.setAccessibleName(sentence)
        self.show()
        self.place()
        self.raise_()
        self._leaving.start()
        # Installed only while something is on show: it sees every event of the program.
        application = QCoreApplication.instance()
        if application is not None:
            application.installEventFilter(self)

    def leave(self) -> None:
        """Go."""
        application = QCoreApplication.instance()
        if application is not None:
            application.removeEventFilter(self)
        self._leaving.stop()
        self.hide()

    def place(self) -> None:
        """Stand at the foot of the window, at the right; of a long path the middle is left out."""
        window = self.parentWidget()
        if self.isHidden() or window is None:
            return
        widest = window.width() - 2 * _FROM_EDGE - _FRAME
        self.setText(self.fontMetrics().elidedText(self._sentence, Qt.TextElideMode.ElideMiddle, widest))
        self.adjustSize()
        self.move(window.width() - self.width() - _FROM_EDGE, window.height() - self.height() - _FROM_EDGE)

    def eventFilter(self, watched: QObject, event: QEvent) -> bool:
        if event.type() in _ACTIONS:
            self.leave()
        return False

    @property
    def said(self) -> str:
        """What is on show, whole; empty while hidden."""
        return "" if self.isHidden() else self._sentence
