"""The window: one place that builds the document, the entry, the page and the menus, and connects them."""

from __future__ import annotations

from pathlib import Path
from typing import TYPE_CHECKING

from PySide6.QtCore import QSize, Qt
from PySide6.QtGui import QCloseEvent, QDragEnterEvent, QDropEvent, QGuiApplication, QResizeEvent, QShowEvent
from PySide6.QtWidgets import QApplication, QHBoxLayout, QVBoxLayout, QWidget

from headfall.case.faults import CaseError
from headfall.case.model import Case
from headfall.case.model import Path as EntryPath
from headfall.files import FileError, fingerprint, read_case
from headfall_app.document import Document, SaveRefused
from headfall_app.entry.changes import add_outlet
from headfall_app.entry.line import EntryLine
from headfall_app.entry.panel import WIDE_WINDOW, EntryPanel
from headfall_app.entry.strip import FOLDED_BELOW, EntryStrip
from headfall_app.head_row import HeadRow
from headfall_app.menus import Menus
from headfall_app.message import MessagePanel, Notice
from headfall_app.paint.theme import Theme, theme
from headfall_app.questions import LEAVE, SAVE, Questions
from headfall_app.resources import resource_path
from headfall_app.settings import Settings, is_own_folder
from headfall_app.style import dress
from headfall_app.view.page import TankPage
from headfall_app.words import group_title

if TYPE_CHECKING:
    from headfall_app.help_window import HelpWindow

SMALLEST, FIRST = QSize(1024, 640), QSize(1400, 900)
CASE_SUFFIX = ".headfall"


class Window(QWidget):
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

    # Files ------------------------------------------------------------------------------------------------------------

    def new_case(self) -> None:
        """Begin a plain new case."""
        if self._may_leave():
            self._begin_from(resource_path("app/new_case.headfall"))

    def open_example(self, file: Path) -> None:
        """Begin a case like the example; it has no file of its own yet."""
        if self._may_leave():
            self._begin_from(file)

    def _begin_from(self, file: Path) -> None:
        try:
            self.document.begin(read_case(file))
        except CaseError as refusal:
            self._say_not_opened(file, refusal)

    def open_case(self) -> None:
        """Ask for a case file and open it."""
        file = self._questions.file_to_open(self, self.settings.folder)
        if file:
            self.open_file(file)

    def open_file(self, file: Path) -> bool:
        """Open a case file; a file with faults is told about and the case in hand stays."""
        if not self._may_leave():
            return False
        try:
            self.document.open(file)
        except CaseError as refusal:
            self._say_not_opened(file, refusal)
            return False
        self.settings.remember(file)
        return True

    def _say_not_opened(self, file: Path, refusal: CaseError) -> None:
        lines = [fault.line for fault in refusal.faults]
        self.message.say(f"{file.name} was not opened. The case in hand is unchanged.", lines)

    def save(self) -> bool:
        """Save to the case's file, asking for one where it has none or is an example; returns whether it was saved."""
        file = self.document.file
        return self.save_as() if file is None or is_own_folder(file.parent) else self._save_to(file)

    def save_as(self) -> bool:
        """Ask where to save, and save; returns whether it was saved."""
        self._take_in()
        if self.document.faults:
            self.message.say(self.document.refusal("Not saved"))
            return False
        file = self._questions.file_to_save(self, str(self._suggested(CASE_SUFFIX)))
        return bool(file) and self._save_to(file)

    def _save_to(self, file: Path | None) -> bool:
        self._take_in()
        if file is None:
            return False
        try:
            self.document.save(file)
        except SaveRefused as refusal:
            self.message.say(str(refusal))
        except FileError as trouble:
            self.message.say(trouble.sentence)
        else:
            self.settings.remember(file)
            self.message.hide()
            return True
        return False

    def export_sheet(self) -> None:
        """Ask where to write the sizing sheet, and write it."""
        self._take_in()
        answers = self.document.answers
        if self.document.faults or answers is None:
            self.message.say(self.document.refusal("No sheet was written"))
            return
        file = self._questions.sheet_to_write(self, str(self._suggested(".pdf")))
        if file is None:
            return
        # Imported where used: the printer is no part of the first paint.
        from headfall_app.print.sheet_pdf import write_sheet_pdf

        try:
            write_sheet_pdf(answers, file, self.paper, fingerprint=fingerprint(answers.case))
        except FileError as trouble:
            self.message.say(trouble.sentence)
        else:
            self.message.hide()
            self.notice.tell(f"The sheet was written to {file}.")

    def _suggested(self, suffix: str) -> Path:
        file = self.document.file
        if file and not is_own_folder(file.parent):
            return file.with_suffix(suffix)
        name = self.document.case.title or (file.stem if file else "untitled")
        plain = "".join(letter if letter.isalnum() else "_" for letter in name.lower()).strip("_")
        return Path(self.settings.folder) / ((plain or "untitled") + suffix)

    def _take_in(self) -> None:
        """Take in what stands in the field that has the cursor: a key press reaches a menu before the field."""
        line = QApplication.focusWidget()
        if isinstance(line, EntryLine) and self.isAncestorOf(line):
            line.finish()

    def _may_leave(self) -> bool:
        self._take_in()
        if not self.document.has_unsaved_work:
            return True
        file = self.document.file
        name = self.document.case.title or (file.stem if file else "This case")
        answer = self._questions.unsaved(self, name)
        return answer == LEAVE or (answer == SAVE and self.save())

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

    def add_outlet(self) -> None:
        """Add an outlet after the last one and put the cursor into it."""
        add_outlet(self.document, len(self.document.case.outlets) - 1)
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
        if self.help is not None:
            self.help.close()
        event.accept()


def _dropped(event: QDropEvent) -> Path | None:
    urls = event.mimeData().urls()
    files = [Path(url.toLocalFile()) for url in urls if url.isLocalFile()]
    return files[0] if len(files) == 1 and files[0].suffix.lower() == CASE_SUFFIX else None
