"""The sheet of paper: sizes, margins, and how marks and fonts are measured on it."""

from __future__ import annotations

from dataclasses import dataclass

from PySide6.QtGui import QPageSize

RESOLUTION = 1200
POINT = RESOLUTION / 72
MILLIMETRE = RESOLUTION / 25.4
PICTURE_PIXEL = 0.6 * POINT
"""One logical pixel of a picture, in dots."""

PAPERS = {"a4": QPageSize.PageSizeId.A4, "letter": QPageSize.PageSizeId.Letter}
_MILLIMETRES = {"a4": (210.0, 297.0), "letter": (215.9, 279.4)}
_SIDE, _END = 19.0, 16.0
_RUNNING_HEAD, _RUNNING_FOOT = 9.0, 8.0


@dataclass(frozen=True, slots=True)
class Page:
    """The page in dots from its upper left corner; the body lies between the running head and the running foot."""

    paper: str
    left: float
    width: float
    top: float
    bottom: float

    @property
    def right(self) -> float:
        """Right end of the text."""
        return self.left + self.width

    @property
    def body_top(self) -> float:
        """Where the body starts on every page but the first."""
        return self.top + _RUNNING_HEAD * MILLIMETRE

    @property
    def body_bottom(self) -> float:
        """Where the body ends."""
        return self.bottom - _RUNNING_FOOT * MILLIMETRE


def page_of(paper: str) -> Page:
    """Return the page of a paper, ``a4`` or ``letter``; raises ValueError for any other."""
    if paper not in PAPERS:
        raise ValueError(f"there is no paper {paper}; there are {' and '.join(PAPERS)}")
    width, height = _MILLIMETRES[paper]
    return Page(
        paper,
        left=_SIDE * MILLIMETRE,
        width=(width - 2 * _SIDE) * MILLIMETRE,
        top=_END * MILLIMETRE,
        bottom=(height - _END) * MILLIMETRE,
    )
