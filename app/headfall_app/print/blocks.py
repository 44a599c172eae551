"""What a page is filled with: strips of it, one below the other."""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass, replace

from PySide6.QtGui import QPainter

Draw = Callable[[QPainter, float, float], None]
"""Draw a strip with its upper edge at the given place down the page, in the given height."""


@dataclass(frozen=True, slots=True)
class Strip:
    """A strip of the page that is never cut.

    ``height`` and ``gap`` (the room above it, dropped at the head of a page) are in dots. A strip that ``keeps`` stays
    on one page with the next. So that a page comes out full, the strip may grow by ``stretch`` and the room above it by
    ``widening``. ``repeats`` is drawn again above it where
    it starts a page: the head of its table.
    """

    height: float
    draw: Draw
    gap: float = 0.0
    stretch: float = 0.0
    widening: float = 0.0
    keeps: bool = False
    repeats: Strip | None = None


def kept(strip: Strip) -> Strip:
    """Return the strip, held together with the next."""
    return replace(strip, keeps=True)


def loosened(strip: Strip, share: float) -> Strip:
    """Return the strip grown from the outset by a share of what it may grow."""
    return replace(
        strip,
        height=strip.height + share * strip.stretch,
        gap=strip.gap + share * strip.widening,
        stretch=(1 - share) * strip.stretch,
        widening=(1 - share) * strip.widening,
    )


def held_together(strips: list[Strip], least: int = 2) -> list[Strip]:
    """Return the strips so that at least ``least`` of them stand at the start and at the end of every break."""
    last = len(strips) - 1
    return [
        kept(strip) if number < last and (number < least - 1 or number >= last - (least - 1)) else strip
        for number, strip in enumerate(strips)
    ]
