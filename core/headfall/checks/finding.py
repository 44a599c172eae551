"""What a check says."""

from __future__ import annotations

from dataclasses import dataclass
from enum import IntEnum


class Grade(IntEnum):
    """How much a finding weighs, worst first."""

    STOP = 0
    ATTENTION = 1
    NOTE = 2
    NO_CAUTION = 3
    NOT_CHECKED = 4

    @property
    def word(self) -> str:
        """The word people see."""
        return ("Stop", "Attention", "Note", "no caution", "not checked")[self]


@dataclass(frozen=True, slots=True)
class Finding:
    """One check's result.

    ``rule`` is the caution's id, kept in the code and the file; ``subject`` says in a few words what was checked.
    ``value`` and ``limit`` are SI, ``kind`` is their display kind (see ``headfall.quantities.display``); None where
    there is no number. ``text`` is one sentence with the number in it, ``advice`` what it rests on and what to do, and
    who decides. ``source`` is a key of the list of sources. ``place`` is the entry it hangs on or would need.
    ``needs`` names the missing input of a check that was not made.
    """

    rule: str
    grade: Grade
    subject: str
    text: str
    advice: str
    source: str
    value: float | None = None
    limit: float | None = None
    kind: str = ""
    place: str = ""
    needs: str = ""
