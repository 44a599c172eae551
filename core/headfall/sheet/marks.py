"""How raised, lowered and heavy letters are marked inside a line of text."""

from __future__ import annotations

from dataclasses import dataclass

_RAISED, _LOWERED, _HEAVY, _END = "\ue000", "\ue001", "\ue002", "\ue003"
_STARTS = {_RAISED: "raised", _LOWERED: "lowered", _HEAVY: "heavy"}


@dataclass(frozen=True, slots=True)
class Run:
    """A stretch of text in one manner; ``shift`` is 1 for raised, −1 for lowered, 0 for neither."""

    text: str
    shift: int = 0
    heavy: bool = False


def raised(text: str) -> str:
    """Mark the text as raised, such as a power."""
    return f"{_RAISED}{text}{_END}"


def lowered(text: str) -> str:
    """Mark the text as lowered, such as an index."""
    return f"{_LOWERED}{text}{_END}"


def heavy(text: str) -> str:
    """Mark the text as heavy; it may hold raised and lowered text."""
    return f"{_HEAVY}{text}{_END}"


def unmarked(text: str) -> str:
    """Return the text as it reads without marks; typed text goes through here before it joins marked text."""
    return "".join(letter for letter in text if letter not in _STARTS and letter != _END)


def runs(text: str) -> tuple[Run, ...]:
    """Split marked text into its runs, in order."""
    found: list[Run] = []
    open_marks: list[str] = []
    letters: list[str] = []

    def close() -> None:
        if letters:
            shift = ("raised" in open_marks) - ("lowered" in open_marks)
            found.append(Run("".join(letters), shift, "heavy" in open_marks))
            letters.clear()

    for letter in text:
        if letter in _STARTS:
            close()
            open_marks.append(_STARTS[letter])
        elif letter == _END:
            close()
            open_marks.pop()
        else:
            letters.append(letter)
    close()
    return tuple(found)
