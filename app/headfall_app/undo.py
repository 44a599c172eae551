"""One step of undo: the draft before, the draft after, and what the step is called."""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass
from typing import Any

from PySide6.QtGui import QUndoCommand

from headfall.case.faults import place
from headfall.case.model import Case, Path

_STEP = 1


@dataclass(frozen=True, slots=True)
class WrongEntry:
    """An entry whose text could not be read: where it stands, what was typed, and what was wanted instead."""

    path: Path
    text: str
    sentence: str

    @property
    def place(self) -> str:
        """The path as the case file's messages write it: ``outlets[1].opening.diameter``."""
        return place(self.path)


@dataclass(frozen=True, slots=True)
class Draft:
    """What a person has typed: the case as far as it could be read, and the entries that could not."""

    case: Case
    wrong: tuple[WrongEntry, ...] = ()

    def without(self, path: Path) -> tuple[WrongEntry, ...]:
        """Return the wrong entries but the ones at the path or below it."""
        return tuple(entry for entry in self.wrong if entry.path[: len(path)] != path)


class DraftStep(QUndoCommand):
    """Swap one draft for another; steps of one gesture merge."""

    def __init__(
        self, before: Draft, after: Draft, text: str, gesture: object | None, show: Callable[[Draft], None]
    ) -> None:
        super().__init__(text)
        self.before, self.after, self.gesture, self._show = before, after, gesture, show

    def id(self) -> int:
        return -1 if self.gesture is None else _STEP

    def mergeWith(self, other: Any) -> bool:
        if other.gesture != self.gesture:
            return False
        self.after = other.after
        self.setObsolete(self.after == self.before)
        return True

    def undo(self) -> None:
        self._show(self.before)

    def redo(self) -> None:
        self._show(self.after)
