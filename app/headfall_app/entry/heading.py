"""The heading of a group: its title at the left, a value or what can be done at the right, a hairline below."""

from __future__ import annotations

from PySide6.QtCore import Qt, Signal
from PySide6.QtWidgets import QFrame, QHBoxLayout, QPushButton, QVBoxLayout, QWidget

from headfall_app.label import label
from headfall_app.paint.fonts import font

_ABOVE = 10


class Link(QPushButton):
    """A button that looks like a word."""

    def __init__(self, text: str, name: str, parent: QWidget | None = None) -> None:
        super().__init__(text, parent)
        self.setObjectName("link")
        self.setFlat(True)
        self.setFont(font(12))
        self.setAccessibleName(name)
        self.setCursor(Qt.CursorShape.PointingHandCursor)
        self.setFocusPolicy(Qt.FocusPolicy.TabFocus)


class GroupHeading(QWidget):
    """Title, value and links of one group; a group that folds has its fold as a link."""

    folded_changed = Signal(bool)

    def __init__(self, title: str, folds: bool, parent: QWidget | None = None) -> None:
        super().__init__(parent)
        self.title = title
        self.links: list[Link] = []
        self._title = label("group", 13, 600, text=title)
        self._beside = label("beside", 12)
        self._row = QHBoxLayout()
        self._row.setContentsMargins(0, 0, 0, 0)
        self._row.setSpacing(8)
        self._row.addWidget(self._title)
        self._row.addStretch(1)
        self._row.addWidget(self._beside)
        self.is_folded = folds
        self._fold = self.add_link("show", f"Show {title.lower()}") if folds else None
        if self._fold:
            self._fold.clicked.connect(self.toggle)
        rule = QFrame()
        rule.setObjectName("rule")
        rule.setFixedHeight(1)
        column = QVBoxLayout(self)
        column.setContentsMargins(0, _ABOVE, 0, 4)
        column.setSpacing(4)
        column.addLayout(self._row)
        column.addWidget(rule)

    def add_link(self, text: str, name: str) -> Link:
        """Add something that can be done at the right end."""
        link = Link(text, name, self)
        self._row.addWidget(link)
        self.links.append(link)
        return link

    def set_beside(self, text: str) -> None:
        """Say a value at the right end."""
        self._beside.setText(text)

    @property
    def beside(self) -> str:
        """The value at the right end."""
        return self._beside.text()

    def toggle(self) -> None:
        """Fold or unfold the group."""
        self.set_folded(not self.is_folded)

    def set_folded(self, folded: bool) -> None:
        """Fold or unfold the group; only a group that folds listens."""
        if self._fold is None or folded == self.is_folded:
            return
        self.is_folded = folded
        self._fold.setText("show" if folded else "hide")
        self._fold.setAccessibleName(f"{'Show' if folded else 'Hide'} {self.title.lower()}")
        self.folded_changed.emit(folded)
