"""A label in the program's face, named for the style sheet."""

from __future__ import annotations

from PySide6.QtCore import Qt
from PySide6.QtWidgets import QLabel

from headfall_app.paint.fonts import font


def label(name: str = "", nominal: int = 13, weight: int = 400, *, text: str = "", wraps: bool = False) -> QLabel:
    """Return a label; its text is never read as markup, since what a person typed may stand in it."""
    made = QLabel(text)
    made.setObjectName(name)
    made.setFont(font(nominal, weight))
    made.setTextFormat(Qt.TextFormat.PlainText)
    made.setWordWrap(wraps)
    return made
