"""The document: the one draft that is open, its undo, its file and its answers."""

from __future__ import annotations

import logging
from collections.abc import Callable
from pathlib import Path as FilePath

from PySide6.QtCore import QObject, QTimer, Signal
from PySide6.QtGui import QUndoStack

from headfall.answers import Answers
from headfall.case.editing import replace_at
from headfall.case.faults import CaseError, Fault
from headfall.case.model import Case, Path
from headfall.files import read_case, write_case
from headfall.quantities import DisplayUnits, display_units
from headfall.system import build_system
from headfall_app.entry_faults import entry_faults, without_wrong
from headfall_app.undo import Draft, DraftStep, WrongEntry
from headfall_app.words import name_of

Solver = Callable[[Case], Answers]
AnyFault = Fault | WrongEntry

_STEPS_KEPT = 1000


def _solve(case: Case) -> Answers:
    # Imported where used: a window with a case that is still being typed need not have loaded the solvers.
    from headfall.study import solve

    return solve(case)


class SaveRefused(Exception):
    """The document cannot be saved as it stands; the text says why and what to do."""


class Document(QObject):
    """One draft, swapped by undo; answers are worked out when somebody asks for them."""

    changed = Signal()
    """The typed case, wrong entries, file, saved mark or display units changed."""
    answers_changed = Signal()
    """The answers are no longer what they were; at most once per turn of the event loop."""
    pointed_changed = Signal()
    """Another entry has the cursor, or is pointed at in the drawing."""
    replaced = Signal()
    """Another case was put in place as a whole: opened, or begun anew."""

    def __init__(self, case: Case, *, solver: Solver = _solve, parent: QObject | None = None) -> None:
        super().__init__(parent)
        self._solver = solver
        self._draft = Draft(case)
        self._answers: Answers | None = None
        self._tried: Case | None = None
        self._checked: Case | None = None
        self._case_faults: tuple[Fault, ...] = ()
        self._pointed: Path | None = None
        self.cursor: Path | None = None
        self._gesture_count = 0
        self._file: FilePath | None = None
        self.undo_stack = QUndoStack(self)
        self.undo_stack.setUndoLimit(_STEPS_KEPT)
        self.undo_stack.cleanChanged.connect(self.changed)
        self._announcement = QTimer(self, singleShot=True, interval=0)
        self._announcement.timeout.connect(self.answers_changed)

    # What is typed ----------------------------------------------------------------------------------------------------

    @property
    def case(self) -> Case:
        """The case as typed; a wrong entry keeps its last good value here."""
        return self._draft.case

    @property
    def wrong(self) -> dict[Path, WrongEntry]:
        """The entries whose text could not be read, by path."""
        return {entry.path: entry for entry in self._draft.wrong}

    @property
    def display(self) -> DisplayUnits:
        """The units in which answers are shown."""
        return display_units(self.case.units or "metric")

    @property
    def pointed(self) -> Path | None:
        """The entry to light: the one pointed at in the drawing, else ``cursor``, the one that has the keyboard."""
        return self._pointed

    @pointed.setter
    def pointed(self, path: Path | None) -> None:
        if path != self._pointed:
            self._pointed = path
            self.pointed_changed.emit()

    # Answers ----------------------------------------------------------------------------------------------------------

    @property
    def answers(self) -> Answers | None:
        """The last good answers; worked out now if the case has changed and can be worked out."""
        self._work_out()
        return self._answers

    @property
    def is_stale(self) -> bool:
        """Whether the answers belong to an earlier, good case."""
        self._work_out()
        return bool(self._draft.wrong) or self._answers is None or self._answers.case is not self.case

    @property
    def faults(self) -> tuple[AnyFault, ...]:
        """Entries that could not be read, then faults between entries."""
        self._work_out()
        return (*self._draft.wrong, *self._case_faults)

    def _work_out(self) -> None:
        case = self.case
        if self._tried is case:
            return
        if self._draft.wrong and self._answers is not None:
            self._check_only(case)
            return
        self._tried, self._checked, self._case_faults = case, None, entry_faults(case)
        if self._case_faults:
            return
        try:
            self._answers = self._solver(case)
        except CaseError as refusal:
            self._case_faults = tuple(refusal.faults)
        except Exception:
            # A defect in a solver must leave the window and what was typed intact: it becomes a fault of the case.
            logging.getLogger(__name__).exception("A case could not be worked out")
            self._case_faults = (Fault((), "a case that could not be worked out", "other entries"),)

    def _check_only(self, case: Case) -> None:
        """Find the faults between entries while one cannot be read: the answers wait, a mended fault does not stay."""
        if self._checked is case:
            return
        wrong = tuple(self.wrong)
        self._checked, self._tried, self._case_faults = case, None, entry_faults(case, wrong)
        if self._case_faults:
            return
        try:
            build_system(case)
        except CaseError as refusal:
            self._case_faults = without_wrong(refusal.faults, wrong)

    # Changing it ------------------------------------------------------------------------------------------------------

    def set(self, path: Path, value: object, text: str, gesture: object | None = None) -> None:
        """Replace one attribute as one step of undo named ``text``; the same gesture merges into one step."""
        self._step(Draft(replace_at(self.case, path, value), self._draft.without(path)), text, gesture)

    def set_wrong(self, path: Path, typed: str, sentence: str, text: str, gesture: object | None = None) -> None:
        """Keep a text that could not be read, with the sentence that says what was wanted."""
        entry = WrongEntry(path, typed, sentence)
        self._step(Draft(self.case, (*self._draft.without(path), entry)), text, gesture)

    def change(
        self,
        case: Case,
        text: str,
        moved: Callable[[Path], Path | None] = lambda path: path,
        found_wrong: tuple[WrongEntry, ...] = (),
    ) -> None:
        """Put another case in place as one step of undo.

        ``moved`` says where a wrong entry stands afterwards, None where its entry is gone; ``found_wrong`` are the
        entries of the other case that could not be read.
        """
        wrong = list(found_wrong)
        for entry in self._draft.wrong:
            path = moved(entry.path)
            if path is not None:
                wrong.append(WrongEntry(path, entry.text, entry.sentence))
        self._step(Draft(case, tuple(wrong)), text, None)

    def end_gesture(self) -> None:
        """Let the next change start a new step of undo, even with the same gesture."""
        self._gesture_count += 1

    def _step(self, after: Draft, text: str, gesture: object | None) -> None:
        if after == self._draft:
            return
        key = None if gesture is None else (gesture, self._gesture_count)
        self.undo_stack.push(DraftStep(self._draft, after, text, key, self._show))

    def _show(self, draft: Draft) -> None:
        self._draft = draft
        if self._pointed is not None and not self._has(self._pointed):
            self.pointed = None
        self._announcement.start()
        self.changed.emit()

    def _has(self, path: Path) -> bool:
        return path[0] != "outlets" or len(path) < 2 or int(path[1]) < len(self.case.outlets)

    # File -------------------------------------------------------------------------------------------------------------

    @property
    def file(self) -> FilePath | None:
        """The file the case was opened from or last saved to; None for a case that has no file yet."""
        return self._file

    @property
    def is_saved(self) -> bool:
        """Whether the file holds what is typed."""
        return self._file is not None and self.undo_stack.isClean()

    @property
    def has_unsaved_work(self) -> bool:
        """Whether something was changed that no file holds."""
        return not self.undo_stack.isClean()

    def begin(self, case: Case, file: FilePath | None = None) -> None:
        """Put another case in place as a whole, with nothing to undo."""
        self.pointed = None
        self._draft, self._file = Draft(case), file
        self._answers, self._tried, self._case_faults = None, None, ()
        self.end_gesture()
        self.undo_stack.clear()
        self._announcement.start()
        self.replaced.emit()
        self.changed.emit()

    def open(self, file: FilePath) -> None:
        """Open a case file; raises ``CaseError`` and then changes nothing."""
        self.begin(read_case(file), file)

    def save(self, file: FilePath) -> None:
        """Write the case to the file and mark it saved.

        Raises ``SaveRefused`` while an entry is wrong or the case cannot be read back, ``FileError`` where the file
        cannot be written; then nothing is changed on disk and nothing typed is lost.
        """
        if self.faults:
            raise SaveRefused(self.refusal("Not saved"))
        write_case(self.case, file)
        self._file = file
        self.undo_stack.setClean()
        self.end_gesture()
        self.changed.emit()

    def refusal(self, what: str) -> str:
        """Return the sentence that says why something is not done while an entry is wrong."""
        name = name_of(self.faults[0].path) or "the case"
        return f"{what}. Mend this first: {name}. Everything typed is still here."
