"""Where the pages break."""

from __future__ import annotations

from dataclasses import dataclass

from headfall_app.print.blocks import Strip

LEAST_LAST = 0.45
"""A last page filled less than this looks like an afterthought."""
LAST_STRETCH = 0.4
"""How far the strips of the last page grow, of what they may."""


@dataclass(frozen=True, slots=True)
class Placed:
    """A strip, how far down the page it is drawn, and in what height."""

    strip: Strip
    top: float
    height: float


@dataclass(frozen=True, slots=True)
class Layout:
    """The strips of each page, and how full each page is (0 to 1)."""

    pages: tuple[tuple[Placed, ...], ...]
    fill: tuple[float, ...]

    @property
    def unevenness(self) -> float:
        """How bad it looks: blank feet of pages count with their square, a nearly empty last page most."""
        blanks = sum((1 - part) ** 2 for part in self.fill[:-1])
        empty = max(0.0, LEAST_LAST - self.fill[-1]) * 10
        return len(self.pages) * 0.3 + blanks * 4 + empty


def paginate(strips: list[Strip], first_top: float, top: float, bottom: float, reserved: float) -> Layout:
    """Place the strips on pages from ``top`` (``first_top`` on the first) to ``bottom``, all in dots.

    The last page keeps ``reserved`` free at its foot; the others are stretched until they are full.
    """
    pages: list[list[Placed]] = [[]]
    at = first_top
    for group in _groups(strips):
        height = sum(strip.gap + strip.height for strip in group)
        starts = not pages[-1] and len(pages) > 1
        if at + height - (group[0].gap if starts else 0.0) > bottom and pages[-1]:
            pages.append([])
            at = top
        for strip in group:
            if not pages[-1] and len(pages) > 1:
                if strip.repeats is not None:
                    pages[-1].append(Placed(strip.repeats, at, strip.repeats.height))
                    at += strip.repeats.height
            else:
                at += strip.gap
            pages[-1].append(Placed(strip, at, strip.height))
            at += strip.height
    if at > bottom - reserved:
        _carry_over(pages, top, bottom - reserved)
    starts_at = [first_top, *[top] * (len(pages) - 1)]
    ends_at = [*[bottom] * (len(pages) - 1), bottom - reserved]
    most = [*[1.0] * (len(pages) - 1), LAST_STRETCH]
    full = [_stretched(page, end, share) for page, end, share in zip(pages, ends_at, most, strict=True)]
    fill = tuple(
        ((page[-1].top + page[-1].height if page else start) - start) / (end - start)
        for page, start, end in zip(full, starts_at, ends_at, strict=True)
    )
    return Layout(tuple(full), fill)


def _stretched(page: list[Placed], bottom: float, most: float) -> tuple[Placed, ...]:
    """Let the strips of a page grow, and the room between them, by ``most`` of what they may, to fill the page."""
    if not page:
        return ()
    spare = bottom - (page[-1].top + page[-1].height)
    room = sum(placed.strip.stretch for placed in page) + sum(placed.strip.widening for placed in page[1:])
    share = min(most, spare / room) if room > 0 else 0.0
    moved, down = [], 0.0
    for number, placed in enumerate(page):
        down += share * placed.strip.widening if number else 0.0
        grown = share * placed.strip.stretch
        moved.append(Placed(placed.strip, placed.top + down, placed.height + grown))
        down += grown
    return tuple(moved)


def _groups(strips: list[Strip]) -> list[list[Strip]]:
    groups: list[list[Strip]] = [[]]
    for strip in strips:
        groups[-1].append(strip)
        if not strip.keeps:
            groups.append([])
    return [group for group in groups if group]


def _carry_over(pages: list[list[Placed]], top: float, limit: float) -> None:
    """Move from the last page to a new one what would lie under the signatures, with what it must stay with."""
    page = pages[-1]
    cut = next(number for number, placed in enumerate(page) if placed.top + placed.strip.height > limit)
    while cut > 1 and page[cut - 1].strip.keeps:
        cut -= 1
    moved = [placed.strip for placed in page[cut:]]
    if cut == 0 or not moved:
        return
    pages[-1] = page[:cut]
    pages.append([])
    at = top
    for number, strip in enumerate(moved):
        if number == 0 and strip.repeats is not None:
            pages[-1].append(Placed(strip.repeats, at, strip.repeats.height))
            at += strip.repeats.height
        elif number:
            at += strip.gap
        pages[-1].append(Placed(strip, at, strip.height))
        at += strip.height
