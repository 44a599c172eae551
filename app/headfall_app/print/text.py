"""Lines of text with raised, lowered and heavy letters, broken to a width."""

from __future__ import annotations

from dataclasses import dataclass
from functools import lru_cache

from PySide6.QtCore import QPointF
from PySide6.QtGui import QColor, QFont, QFontMetricsF, QPainter

from headfall.sheet.marks import Run, runs
from headfall_app.paint.fonts import font as named_font
from headfall_app.print.page import POINT

_SMALLER, _RAISE, _LOWER = 0.70, 0.34, -0.16


@dataclass(frozen=True, slots=True)
class Style:
    """Size [pt], weight and leading (line height over size) of a text."""

    points: float
    weight: int = 400
    leading: float = 1.30

    @property
    def line_height(self) -> float:
        """Height of a line in dots."""
        return self.points * POINT * self.leading

    @property
    def ascent(self) -> float:
        """How far below the top of its line the baseline lies, in dots."""
        return self.points * POINT * (self.leading / 2 + 0.33)


TITLE = Style(17, 600, 1.2)
ANSWER = Style(17, 600, 1.25)
HEADING = Style(9.5, 600, 1.3)
BODY = Style(8.5)
CELL = Style(8, leading=1.25)
SMALL = Style(7.5)
LABEL = Style(6.5)

Piece = tuple[str, int, bool]
"""Letters in one manner: text, shift, heavy."""
Line = tuple[Piece, ...]


@lru_cache(maxsize=64)
def font(points: float, weight: int, shifted: bool = False) -> QFont:
    """Return the face sized in dots of the page."""
    made = QFont(named_font(13, weight))
    made.setPixelSize(max(1, round(points * POINT * (_SMALLER if shifted else 1.0))))
    return made


@lru_cache(maxsize=64)
def _metrics(points: float, weight: int, shifted: bool) -> QFontMetricsF:
    return QFontMetricsF(font(points, weight, shifted))


@lru_cache(maxsize=20000)
def _advance(text: str, points: float, weight: int, shifted: bool) -> float:
    return _metrics(points, weight, shifted).horizontalAdvance(text)


def line_width(line: Line, style: Style) -> float:
    """Return how wide a line is set, in dots."""
    return sum(_advance(text, style.points, _weight(style, heavy), shift != 0) for text, shift, heavy in line)


def text_width(text: str, style: Style) -> float:
    """Return how wide a marked text is on one line, in dots."""
    return line_width(_whole(text), style)


def widest_word(text: str, style: Style) -> float:
    """Return the width of the widest part that is not broken, in dots."""
    return max((line_width(word, style) for word in _words(runs(text))), default=0.0)


def wrapped(text: str, style: Style, width: float) -> tuple[Line, ...]:
    """Break a marked text into lines no wider than ``width`` dots, at spaces, and within a word that is wider."""
    lines: list[Line] = []
    line: list[Piece] = []
    used, space = 0.0, _advance(" ", style.points, style.weight, False)
    for word in _words(runs(text)):
        for part in _fitting(word, style, width):
            size = line_width(part, style)
            if line and used + space + size > width + 0.5:
                lines.append(tuple(line))
                line, used = [], 0.0
            if line:
                line.append((" ", 0, line[-1][2] and part[0][2]))
                used += space
            line.extend(part)
            used += size
    lines.append(tuple(line))
    return tuple(_joined(each) for each in lines)


def elided(text: str, style: Style, width: float) -> str:
    """Return the text, cut short with an ellipsis where it is wider than ``width`` dots."""
    if text_width(text, style) <= width:
        return text
    kept = text
    while kept and text_width(f"{kept.rstrip()}…", style) > width:
        kept = kept[:-1]
    return f"{kept.rstrip()}…"


def draw_line(painter: QPainter, line: Line, style: Style, left: float, top: float, colour: QColor) -> None:
    """Draw one line whose box has its upper left corner at (left, top)."""
    painter.setPen(colour)
    baseline = top + style.ascent
    for text, shift, heavy in line:
        weight = _weight(style, heavy)
        painter.setFont(font(style.points, weight, shift != 0))
        lift = (_RAISE if shift > 0 else _LOWER if shift < 0 else 0.0) * style.points * POINT
        painter.drawText(QPointF(left, baseline - lift), text)
        left += _advance(text, style.points, weight, shift != 0)


def draw_text(
    painter: QPainter, text: str, style: Style, left: float, top: float, colour: QColor, align: float = 0.0
) -> None:
    """Draw a marked text on one line; ``align`` 0, 0.5, 1 sets its left end, middle or right end at ``left``."""
    line = _whole(text)
    draw_line(painter, line, style, left - align * line_width(line, style), top, colour)


def _weight(style: Style, heavy: bool) -> int:
    return 600 if heavy else style.weight


def _whole(text: str) -> Line:
    return tuple((run.text, run.shift, run.heavy) for run in runs(text))


def _words(of: tuple[Run, ...]) -> list[Line]:
    """Split at plain spaces; a no-break space holds its neighbours together."""
    words: list[list[Piece]] = [[]]
    for run in of:
        for number, text in enumerate(run.text.split(" ")):
            if number:
                words.append([])
            if text:
                words[-1].append((text, run.shift, run.heavy))
    return [tuple(word) for word in words if word]


def _fitting(word: Line, style: Style, width: float) -> list[Line]:
    """Return the word in parts that each fit the width."""
    if line_width(word, style) <= width:
        return [word]
    parts: list[Line] = []
    part: list[Piece] = []
    for text, shift, heavy in word:
        for letter in text:
            grown = (*part, (letter, shift, heavy))
            if part and line_width(grown, style) > width:
                parts.append(_joined(part))
                part = []
            part.append((letter, shift, heavy))
    parts.append(_joined(part))
    return parts


def _joined(pieces: list[Piece] | Line) -> Line:
    """Join neighbours of one manner, so that a line is drawn, and found again, as whole stretches."""
    joined: list[Piece] = []
    for text, shift, heavy in pieces:
        if joined and joined[-1][1:] == (shift, heavy):
            joined[-1] = (joined[-1][0] + text, shift, heavy)
        else:
            joined.append((text, shift, heavy))
    return tuple(joined)
