"""Numbers and names as the findings' sentences print them."""

from __future__ import annotations

from collections.abc import Sequence
from typing import Protocol

from headfall.quantities.display import DisplayUnits

_EDGES = {
    "down": "the outlet's plane",
    "side": "the outlet's lower edge",
    "pipe": "the pipe's inlet",
    "rising_pipe": "the pipe's discharging end",
    "weir": "the crest",
}


class Ranged(Protocol):
    """A figure with its range over the coefficients; None where that end has no answer."""

    @property
    def typical(self) -> float | None:
        """With the typical coefficients [SI]."""

    @property
    def low(self) -> float | None:
        """The lower end [SI]."""

    @property
    def high(self) -> float | None:
        """The upper end [SI]."""


def with_range(figure: Ranged, kind: str, display: DisplayUnits) -> str:
    """Return ``0.347 m (0.325 to 0.371 m)``; the range is left out where an end is missing or reads like the figure.

    ``kind`` is the display kind of the figure's SI values [m, m³, s …]. Raises ValueError without a typical value.
    """
    if figure.typical is None:
        raise ValueError("a figure without a typical value cannot be printed")
    text = display.text(figure.typical, kind)
    if figure.low is None or figure.high is None:
        return text
    low, high = display.text(figure.low, kind), display.text(figure.high, kind)
    if low == high == text:
        return text
    if kind != "time" and display.unit(kind):
        low = display.number(figure.low, kind)
    return f"{text} ({low} to {high})"


def capital(sentence: str) -> str:
    """Return the sentence with a capital first letter, the rest untouched."""
    return sentence[:1].upper() + sentence[1:]


def listed(names: Sequence[str]) -> str:
    """Return ``a``, ``a and b`` or ``a, b and c``."""
    return " and ".join(part for part in (", ".join(names[:-1]), *names[-1:]) if part)


def edge_words(form: str) -> str:
    """Return what the level stands at when an outlet runs dry.

    ``form`` is ``down`` or ``side`` of an orifice, ``pipe``, ``rising_pipe`` (its discharging end is the higher one) or
    ``weir``. Raises KeyError for another one.
    """
    return _EDGES[form]
