"""What a sizing sheet consists of. Texts may carry the marks of ``headfall.sheet.marks``."""

from __future__ import annotations

from dataclasses import dataclass


@dataclass(frozen=True, slots=True)
class Heading:
    """The block at the head of the sheet."""

    title: str
    tag: str
    revision: str
    status: str
    date: str
    site: str
    author: str
    checker: str
    approver: str
    version: str
    fingerprint: str


@dataclass(frozen=True, slots=True)
class Paragraph:
    """A paragraph; ``style`` is ``body``, ``lead`` (stays with the next), ``heavy``, ``equation`` or ``small``.

    An equation is indented and kept whole; its text may run over several lines.
    """

    text: str
    style: str = "body"


@dataclass(frozen=True, slots=True)
class AnswerBox:
    """The question, the answer in large figures, what stands beside it, and lines below."""

    question: str
    figure: str
    beside: str
    lines: tuple[str, ...]


@dataclass(frozen=True, slots=True)
class Column:
    """A column of a table; ``share`` is its part of the width.

    ``align`` is ``left``, ``right`` or ``line``: empty, to be written on.
    """

    title: str
    share: float
    align: str = "left"


@dataclass(frozen=True, slots=True)
class Table:
    """A table of texts; every row has as many cells as there are columns."""

    columns: tuple[Column, ...]
    rows: tuple[tuple[str, ...], ...]


@dataclass(frozen=True, slots=True)
class Picture:
    """A picture to be painted from the answers: ``sketch``, ``curve`` or ``flow``."""

    name: str


Part = Paragraph | AnswerBox | Table | Picture


@dataclass(frozen=True, slots=True)
class Section:
    """A numbered section."""

    number: int
    title: str
    parts: tuple[Part, ...]


@dataclass(frozen=True, slots=True)
class Sheet:
    """A whole sizing sheet as plain data; ``signatures`` are the names above the three fields at its end."""

    heading: Heading
    sections: tuple[Section, ...]
    signatures: tuple[tuple[str, str], ...]
    foot: str

    def section(self, number: int) -> Section:
        """Return the section of that number."""
        return self.sections[number - 1]
