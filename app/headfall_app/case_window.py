"""The part of the window that opens, saves and exports its case, and asks before work is left."""

from __future__ import annotations

from pathlib import Path

from PySide6.QtWidgets import QApplication, QWidget

from headfall.case.faults import CaseError
from headfall.files import FileError, fingerprint, read_case
from headfall_app.document import Document, SaveRefused
from headfall_app.entry.line import EntryLine
from headfall_app.message import MessagePanel, Notice
from headfall_app.questions import LEAVE, SAVE, Questions
from headfall_app.resources import resource_path
from headfall_app.settings import Settings, is_own_folder

CASE_SUFFIX = ".headfall"


class CaseWindow(QWidget):
    """A widget with one document and its file."""

    document: Document
    settings: Settings
    message: MessagePanel
    notice: Notice
    _questions: Questions

    def new_case(self) -> None:
        """Begin a plain new case."""
        if self._may_leave():
            self._begin_from(resource_path("app/new_case.headfall"))

    def open_example(self, file: Path) -> None:
        """Begin a case like the example; it has no file of its own yet."""
        if self._may_leave():
            self._begin_from(file)

    def _begin_from(self, file: Path) -> bool:
        try:
            self.document.begin(read_case(file))
        except CaseError as refusal:
            self._say_not_opened(file, refusal)
            return False
        return True

    def open_case(self) -> None:
        """Ask for a case file and open it."""
        file = self._questions.file_to_open(self, self.settings.folder)
        if file:
            self.open_file(file)

    def open_file(self, file: Path) -> bool:
        """Open a case file; a file with faults is told about and the case in hand stays."""
        if not self._may_leave():
            return False
        if is_own_folder(file.parent):
            # An example, however it was opened, has no file of its own: it is not written over.
            return self._begin_from(file)
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
            write_sheet_pdf(answers, file, self.settings.paper, fingerprint=fingerprint(answers.case))
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
