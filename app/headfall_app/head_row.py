"""The row at the head of the window: the menus at the left, the case's names and its saved mark at the right."""

from __future__ import annotations

from PySide6.QtCore import Qt
from PySide6.QtWidgets import QHBoxLayout, QMenuBar, QSizePolicy, QWidget

from headfall_app.document import Document
from headfall_app.label import label
from headfall_app.paint.fonts import font

HEIGHT = 48


class HeadRow(QWidget):
    """Menus, title, tag, revision, and whether the file holds what is typed."""

    def __init__(self, document: Document, menus: QMenuBar, parent: QWidget | None = None) -> None:
        super().__init__(parent)
        self.setObjectName("head")
        self.setAttribute(Qt.WidgetAttribute.WA_StyledBackground)
        self.setFixedHeight(HEIGHT)
        self._document = document
        menus.setNativeMenuBar(False)
        menus.setFont(font(13))
        menus.setSizePolicy(QSizePolicy.Policy.Fixed, QSizePolicy.Policy.Fixed)
        self._names = [label(weight=600) for _ in range(3)]
        self._saved = label("saved", 12)
        row = QHBoxLayout(self)
        row.setContentsMargins(12, 0, 20, 0)
        row.setSpacing(10)
        row.addWidget(menus)
        row.addStretch(1)
        for name in self._names:
            row.addWidget(name)
        row.addSpacing(10)
        row.addWidget(self._saved)
        document.changed.connect(self._follow)
        self._follow()

    @property
    def saved_text(self) -> str:
        """The words that say whether the file holds what is typed."""
        return self._saved.text()

    def _follow(self) -> None:
        case = self._document.case
        file = self._document.file
        title = case.title or (file.stem if file else "Untitled case")
        names = (title, case.tag or "", f"rev {case.revision}" if case.revision else "")
        for place, name in zip(self._names, names, strict=True):
            # A title may be long: it must not push the menus out of the row.
            place.setText(place.fontMetrics().elidedText(name, Qt.TextElideMode.ElideRight, 420))
            place.setToolTip(name)
            place.setVisible(bool(name))
        self._saved.setText(self._saved_words())
        self._saved.setToolTip(str(self._document.file or "This case has no file yet."))

    def _saved_words(self) -> str:
        if self._document.is_saved:
            return "Saved"
        return "Not saved" if self._document.has_unsaved_work else "No file yet"
