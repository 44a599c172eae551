"""What is said when a text cannot be read as a quantity."""

from __future__ import annotations


class QuantityFault(ValueError):
    """A text that is no quantity of the dimension wanted.

    ``found`` is a clause that says what was found (``80 L is a volume``). ``wanted`` is what to type (``a length,
    such as 80 mm or 3 1/8 in``) or, where it begins with a capital letter, a sentence of its own (``Type US gal or
    imp gal``). ``question`` stands instead of ``found`` where the text has more than one meaning. None ends with a
    full stop.
    """

    def __init__(self, found: str, wanted: str, question: str | None = None) -> None:
        self.found = found
        self.wanted = wanted
        self.question = question
        super().__init__(self.sentence)

    @property
    def sentence(self) -> str:
        """What was found and what to type, as sentences for the person who typed it."""
        opening = self.question or f"{self.found}."
        return f"{opening} {self.wanted}." if self.wanted[:1].isupper() else f"{opening} Type {self.wanted}."
