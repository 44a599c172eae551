"""The window: one place that builds the document, the entry, the page and the menus, and connects them."""

from __future__ import annotations

from pathlib import Path
from typing import TYPE_CHECKING

from PySide6.QtCore import QSize, Qt
from PySide6.QtGui import QCloseEvent, QDragEnterEvent, QDropEvent, QGuiApplication, QResizeEvent, QShowEvent
from PySide6.QtWidgets import QHBoxLayout, QVBoxLayout

from headfall.case.model import Case
from headfall.case.model import Path as EntryPath
from headfall_app.case_window import CASE_SUFFIX, CaseWindow
from headfall_app.document import Document
from headfall_app.entry.changes import add_outlet
from headfall_app.entry.panel import WIDE_WINDOW, EntryPanel
from headfall_app.entry.strip import FOLDED_BELOW, EntryStrip
from headfall_app.head_row import HeadRow
from headfall_app.menus import Menus
from headfall_app.message import MessagePanel, Notice
from headfall_app.paint.theme import Theme, theme
from headfall_app.questions import Questions
from headfall_app.settings import Settings
from headfall_app.style import dress
from headfall_app.view.page import TankPage
from headfall_app.words import group_title

if TYPE_CHECKING:
    from headfall_app.help_window import HelpWindow
    from headfall_app.tables_window import TablesWindow

SMALLEST, FIRST = QSize(1024, 640), QSize(1400, 900)


class Window(CaseWindow):
    """Head row, message, entry at the left, page at the right."""

    def __init__(
        self, case: Case, settings: Settings, *, version: str = "", questions: Questions | None = None
    ) -> None:
        super().__init__()
        self.settings, self._questions, self._version = settings, questions or Questions(), version
        self.document = Document(case, parent=self)
        self._theme = self._wanted_theme()
        self.entry = EntryPanel(self.document, self._theme, self)
        self.strip = EntryStrip(self.entry, self)
        self.page = TankPage(self.document, self._theme)
        self.message, self.notice = MessagePanel(self), Notice(self)
        self.head = HeadRow(self.document, Menus(self, self), self)
        self.help: HelpWindow | None = None
        self.tables: TablesWindow | None = None
        self._lay_out()
        self.setAcceptDrops(True)
        self.setMinimumSize(SMALLEST)
        self.resize(FIRST)
        self.restoreGeometry(settings.geometry)
        dress(self, self._theme)
        self.document.changed.connect(self._name_window)
        self.document.replaced.connect(self._show_from_the_top)
        self.page.entry_requested.connect(self.go_to_entry)
        QGuiApplication.styleHints().colorSchemeChanged.connect(self._dress)
        self._name_window()

    def _lay_out(self) -> None:
        row = QHBoxLayout()
        row.setSpacing(0)
        row.addWidget(self.strip)
        row.addWidget(self.entry)
        row.addWidget(self.page, 1)
        column = QVBoxLayout(self)
        column.setContentsMargins(0, 0, 0, 0)
        column.setSpacing(0)
        column.addWidget(self.head)
        column.addWidget(self.message)
        column.addLayout(row, 1)

    def _show_from_the_top(self) -> None:
        self.message.hide()
        # The cursor would stay in a field that may be far down, or gone.
        self.page.setFocus(Qt.FocusReason.OtherFocusReason)

    def _name_window(self) -> None:
        file = self.document.file
        name = file.name if file else self.document.case.title or "Untitled case"
        self.setWindowTitle(f"{name}[*] – Headfall")
        self.setWindowModified(self.document.has_unsaved_work)

    # Showing ----------------------------------------------------------------------------------------------------------

    @property
    def units(self) -> str:
        """The display units: ``metric`` or ``us``."""
        return self.document.case.units or "metric"

    @property
    def paper(self) -> str:
        """The sheet's paper: ``a4`` or ``letter``."""
        return self.settings.paper

    @property
    def theme(self) -> Theme:
        """The theme on show."""
        return self._theme

    def choose_paper(self, name: str) -> None:
        """Keep the paper of the sheet."""
        self.settings.paper = name

    def choose_units(self, units: str) -> None:
        """Show answers in metric or US units; what was typed keeps its own."""
        if units != self.units:
            self.document.set(("units",), units, "Change the display units")

    def switch_units(self) -> None:
        """Show answers in the other display units."""
        self.choose_units("us" if self.units == "metric" else "metric")

    def choose_theme(self, name: str) -> None:
        """Keep and show a theme: ``system``, ``light`` or ``dark``."""
        self.settings.theme = name
        self._dress()

    def switch_whole(self) -> None:
        """Show the whole vessel, or cut it so that more of it can be seen."""
        self.page.stage.switch_cut()

    def _wanted_theme(self) -> Theme:
        name = self.settings.theme
        if name == "system":
            dark = QGuiApplication.styleHints().colorScheme() == Qt.ColorScheme.Dark
            name = "dark" if dark else "light"
        return theme(name)

    def _dress(self) -> None:
        wanted = self._wanted_theme()
        if wanted is self._theme:
            return
        self._theme = wanted
        dress(self, wanted)
        for part in (self.entry, self.page):
            part.set_theme(wanted)

    # Entries and help -------------------------------------------------------------------------------------------------

    def show_tables(self) -> None:
        """Show the tables beside the window."""
        self._take_in()
        if self.tables is None:
            from headfall_app.tables_window import TablesWindow

            self.tables = TablesWindow(self.document, self._questions, self.settings.folder, self)
            self.tables.entry_requested.connect(self._go_from_tables)
        self.tables.show_table()

    def _go_from_tables(self, path: EntryPath) -> None:
        self.activateWindow()
        self.go_to_entry(path)

    def add_outlet(self, kind: str = "") -> None:
        """Add an outlet after the last one and put the cursor into it; a kind asks for an opening, a pipe or a weir."""
        add_outlet(self.document, len(self.document.case.outlets) - 1, kind=kind)
        self.entry.go_to(("outlets", len(self.document.case.outlets) - 1, "name"))

    def go_to_entry(self, path: EntryPath) -> None:
        """Put the cursor into an entry, opening the entry panel where it is folded."""
        self.strip.open_at(path)
        self.entry.go_to(path)

    def show_help(self, page: str, heading: str = "") -> None:
        """Show a page of the help beside the window."""
        if self.help is None:
            from headfall_app.help_window import HelpWindow

            self.help = HelpWindow(self._version, self)
        self.help.show_page(page, heading)

    def help_in_hand(self) -> None:
        """Show the help at the entry that has the cursor."""
        entry = self.document.cursor or self.document.pointed
        self.show_help("tour", group_title(entry[:1]) if entry else "")

    # Events -----------------------------------------------------------------------------------------------------------

    def resizeEvent(self, event: QResizeEvent) -> None:
        super().resizeEvent(event)
        self.entry.set_narrow(self.width() < WIDE_WINDOW)
        self.strip.set_folds(self.width() < FOLDED_BELOW)
        self.notice.place()

    def showEvent(self, event: QShowEvent) -> None:
        super().showEvent(event)
        self.page.setFocus(Qt.FocusReason.OtherFocusReason)

    def dragEnterEvent(self, event: QDragEnterEvent) -> None:
        if _dropped(event):
            event.acceptProposedAction()

    def dropEvent(self, event: QDropEvent) -> None:
        file = _dropped(event)
        if file:
            event.acceptProposedAction()
            self.open_file(file)

    def closeEvent(self, event: QCloseEvent) -> None:
        if not self._may_leave():
            event.ignore()
            return
        self.settings.geometry = self.saveGeometry()
        self.settings.sync()
        for beside in (self.help, self.tables):
            if beside is not None:
                beside.close()
        event.accept()


def _dropped(event: QDropEvent) -> Path | None:
    urls = event.mimeData().urls()
    files = [Path(url.toLocalFile()) for url in urls if url.isLocalFile()]
    return files[0] if len(files) == 1 and files[0].suffix.lower() == CASE_SUFFIX else None
