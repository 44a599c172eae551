"""What the notes say: findings of the answers, and the entries to mend first."""

from __future__ import annotations

import re
from collections import Counter
from dataclasses import dataclass

from headfall.case.model import Path
from headfall.checks.finding import Finding, Grade
from headfall_app.document import Document
from headfall_app.paint.theme import Theme
from headfall_app.words import name_of

_SHOWN = (Grade.STOP, Grade.ATTENTION, Grade.NOTE)
_STEP = re.compile(r"([^.\[\]]+)|\[(\d+)\]")


@dataclass(frozen=True, slots=True)
class Note:
    """One note: its grade, the sentence with the number, what it rests on, and the entry it leads to."""

    grade: Grade
    sentence: str
    rest: str
    path: Path | None
    link: str


def path_of(place: str) -> Path:
    """Return the path of a place such as ``outlets[1].opening.diameter``."""
    return tuple(int(number) if number else word for word, number in _STEP.findall(place))


def notes_of(document: Document) -> tuple[Note, ...]:
    """Return the notes to show, worst first; while an entry is wrong, that entry and what holds whatever is typed."""
    answers = document.answers
    findings = answers.findings if answers is not None else ()
    if not document.is_stale:
        return tuple(_note(finding) for finding in findings if finding.grade in _SHOWN)
    kept = tuple(_note(finding) for finding in findings if finding.grade is Grade.NOTE and not finding.place)
    after = "Nothing was cleared. "
    if answers is not None:
        after += "The answers in grey belong to the last good case."
    faults = tuple(
        Note(
            Grade.STOP,
            f"{name_of(fault.path) or 'The case'}: {fault.sentence}",
            after.strip(),
            fault.path or None,
            "Go to it" if fault.path else "",
        )
        for fault in document.faults
    )
    return (*faults, *kept)


def _note(finding: Finding) -> Note:
    path = path_of(finding.place) if finding.place else None
    link = ""
    if path is not None and finding.needs:
        link = f"Enter {finding.needs}"
    elif path is not None and finding.grade is not Grade.NOTE:
        link = "Go to the entry"
    return Note(finding.grade, finding.text, finding.advice, path, link)


def fold_words(notes: tuple[Note, ...], shown: int, theme: Theme) -> str:
    """Return the fold line: how many more notes there are and of which grades, with its link."""
    link = f'style="color: {theme.hex("accent")}; text-decoration: none"'
    if shown >= len(notes):
        return f'<a href="fold" {link}>Show fewer</a>'
    hidden = Counter(note.grade for note in notes[shown:])
    grades = ", ".join(
        grade.word if count == 1 else f"{count} × {grade.word}" for grade, count in sorted(hidden.items())
    )
    return (
        f'<span style="color: {theme.hex("muted")}">{len(notes) - shown} more: {grades}.</span> '
        f'<a href="fold" {link}>Show all</a>'
    )
