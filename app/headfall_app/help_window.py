"""Help: a short tour, the case file's page, and what this program is and rests on."""

from __future__ import annotations

from collections.abc import Iterator
from math import ceil

from PySide6.QtCore import QPoint, QSize, Qt
from PySide6.QtGui import QTextBlock, QTextCursor
from PySide6.QtWidgets import QDialog, QHBoxLayout, QTextBrowser, QVBoxLayout, QWidget

from headfall.resources import read_resource
from headfall_app.entry.heading import Link
from headfall_app.paint.fonts import font
from headfall_app.resources import resource_path

TOUR, CASE_FILE, ABOUT = "tour", "case-format", "about"
_PAGES = {TOUR: "Five-minute tour", CASE_FILE: "The case file", ABOUT: "About Headfall"}


class HelpWindow(QDialog):
    """A window beside the main one; it blocks nothing."""

    def __init__(self, version: str, parent: QWidget | None = None) -> None:
        super().__init__(parent)
        self.setWindowTitle("Headfall help")
        self._version = version
        self._browser = QTextBrowser(self)
        self._browser.setOpenLinks(False)
        self._browser.setFont(font(13))
        self._browser.document().setDocumentMargin(16)
        row = QHBoxLayout()
        row.setContentsMargins(14, 10, 14, 6)
        for name, title in _PAGES.items():
            link = Link(title, title, self)
            link.setAutoDefault(False)
            link.clicked.connect(lambda _=False, page=name: self.show_page(page))
            row.addWidget(link)
        row.addStretch(1)
        column = QVBoxLayout(self)
        column.setContentsMargins(0, 0, 0, 0)
        column.addLayout(row)
        column.addWidget(self._browser)

    def sizeHint(self) -> QSize:
        return QSize(720, 640)

    def show_page(self, name: str, heading: str = "") -> None:
        """Show a page, at the heading where one is named and found."""
        self._browser.setMarkdown(_about(self._version) if name == ABOUT else _page(name))
        self._space_out()
        self.show()
        self.activateWindow()
        self._browser.setFocus(Qt.FocusReason.OtherFocusReason)
        self._scroll_to(heading)

    def _blocks(self) -> Iterator[QTextBlock]:
        block = self._browser.document().begin()
        while block.isValid():
            yield block
            block = block.next()

    def _space_out(self) -> None:
        for block in self._blocks():
            spacing = block.blockFormat()
            spacing.setTopMargin(14 if spacing.headingLevel() else 2)
            spacing.setBottomMargin(6)
            QTextCursor(block).setBlockFormat(spacing)

    def _scroll_to(self, heading: str) -> None:
        if not heading:
            self._browser.verticalScrollBar().setValue(0)
            return
        found = (block for block in self._blocks() if block.blockFormat().headingLevel() and block.text() == heading)
        block = next(found, self._browser.document().begin())
        layout = self._browser.document().documentLayout()
        top = layout.blockBoundingRect(block).top()
        # The last groups are shorter than the window: without room below them they could not come to its top.
        self._lengthen(ceil(top + self._browser.viewport().height() - layout.documentSize().height()))
        self._browser.verticalScrollBar().setValue(round(top))

    def _lengthen(self, by: int) -> None:
        if by > 0:
            root = self._browser.document().rootFrame()
            shape = root.frameFormat()
            shape.setBottomMargin(shape.bottomMargin() + by)
            root.setFrameFormat(shape)

    @property
    def heading_on_top(self) -> str:
        """The text of the block at the upper edge of what is on show."""
        return self._browser.cursorForPosition(QPoint(40, 12)).block().text()

    @property
    def text(self) -> str:
        """What the page says, as plain text."""
        return self._browser.toPlainText()


def _page(name: str) -> str:
    return resource_path(f"app/pages/{name}.md").read_text(encoding="utf-8")


def _about(version: str) -> str:
    lines = [_page(ABOUT).replace("VERSION", version), "", "## Sources", ""]
    for source in read_resource("sources.json").values():
        year = f" ({source['year']})" if source["year"] else ""
        parts = [f"{source['author']}{year}".strip(), source["title"], source["where"], source["doi"]]
        lines.append(f"- {'. '.join(part for part in parts if part)} [{source['status']}]")
    return "\n".join(lines)
