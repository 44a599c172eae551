"""Tables: widths of the columns, heads, shaded rows."""

from __future__ import annotations

from dataclasses import dataclass

from PySide6.QtCore import QLineF, QRectF
from PySide6.QtGui import QColor, QPainter, QPen

from headfall.sheet.model import Table
from headfall_app.paint.theme import Theme
from headfall_app.print.blocks import Strip, held_together
from headfall_app.print.page import MILLIMETRE, POINT
from headfall_app.print.text import CELL, Line, Style, draw_line, line_width, text_width, widest_word, wrapped

SHADE = QColor("#F3F3EF")
_HEAD = Style(7.5, leading=1.2)
_BETWEEN = 3.0 * MILLIMETRE
_EDGE = 0.8 * MILLIMETRE
_ABOVE = 0.3 * MILLIMETRE
_LOOSER = 1.0 * MILLIMETRE


@dataclass(frozen=True, slots=True)
class _Cell:
    lines: tuple[Line, ...]
    left: float
    width: float
    align: float


def table_strips(table: Table, left: float, width: float, theme: Theme) -> list[Strip]:
    """Return the head and the rows; the head stays with the first rows and is repeated on a new page."""
    widths = column_widths(table, width)
    head = _head(table, left, widths, width, theme)
    rows = [
        _row(table, cells, left, widths, width, SHADE if number % 2 else None, theme, head)
        for number, cells in enumerate(table.rows)
    ]
    if not any(column.title for column in table.columns):
        return held_together(rows)
    return [head, *held_together(rows, 3 if len(rows) > 6 else 2)]


def column_widths(table: Table, width: float) -> list[float]:
    """Return the width of each column [dots]: what its texts need, the rest by its share."""
    count = len(table.columns)
    room = width - 2 * _EDGE - (count - 1) * _BETWEEN
    texts = [[row[number] for row in table.rows] for number in range(count)]
    titles = [column.title for column in table.columns]
    needed = [
        max([text_width(title, _HEAD), *(text_width(text, CELL) for text in column)])
        for title, column in zip(titles, texts, strict=True)
    ]
    shares = [column.share for column in table.columns]
    if sum(needed) <= room:
        spare = room - sum(needed)
        return [need + spare * share / sum(shares) for need, share in zip(needed, shares, strict=True)]
    least = [
        max([widest_word(title, _HEAD), *(widest_word(text, CELL) for text in column)])
        for title, column in zip(titles, texts, strict=True)
    ]
    return _shared(room, shares, needed, [min(value, room / 3) for value in least])


def _shared(room: float, shares: list[float], needed: list[float], least: list[float]) -> list[float]:
    """Share the room out, fixing in turn the columns that need less than their share, or more at the least."""
    fixed: dict[int, float] = {}
    while len(fixed) < len(shares):
        free = [number for number in range(len(shares)) if number not in fixed]
        rest = room - sum(fixed.values())
        part = rest / sum(shares[number] for number in free)
        tight = {number: least[number] for number in free if least[number] > shares[number] * part + 0.5}
        easy = {number: needed[number] for number in free if needed[number] < shares[number] * part - 0.5}
        if not tight and not easy:
            fixed.update({number: shares[number] * part for number in free})
        else:
            fixed.update(tight or easy)
    return [fixed[number] for number in range(len(shares))]


def _cells(table: Table, texts: list[str], left: float, widths: list[float], style: Style) -> list[_Cell]:
    cells, at = [], left + _EDGE
    for column, text, width in zip(table.columns, texts, widths, strict=True):
        lines = wrapped(text, style, width) if text else ()
        cells.append(_Cell(lines, at, width, 1.0 if column.align == "right" else 0.0))
        at += width + _BETWEEN
    return cells


def _draw_cells(painter: QPainter, cells: list[_Cell], style: Style, top: float, colour: QColor) -> None:
    for cell in cells:
        for number, line in enumerate(cell.lines):
            left = cell.left + cell.align * (cell.width - line_width(line, style))
            draw_line(painter, line, style, left, top + number * style.line_height, colour)


def _head(table: Table, left: float, widths: list[float], width: float, theme: Theme) -> Strip:
    cells = _cells(table, [column.title for column in table.columns], left, widths, _HEAD)
    text_height = max(len(cell.lines) for cell in cells) * _HEAD.line_height
    height = text_height + 2.2 * _ABOVE

    def draw(painter: QPainter, top: float, _height: float) -> None:
        for cell in cells:
            drop = text_height - len(cell.lines) * _HEAD.line_height
            _draw_cells(painter, [cell], _HEAD, top + _ABOVE + drop, theme.colour("muted"))
        painter.setPen(QPen(theme.colour("edge"), 0.5 * POINT))
        painter.drawLine(QLineF(left, top + height, left + width, top + height))

    return Strip(height, draw, gap=0.6 * MILLIMETRE, keeps=True)


def _row(
    table: Table,
    texts: tuple[str, ...],
    left: float,
    widths: list[float],
    width: float,
    shade: QColor | None,
    theme: Theme,
    head: Strip,
) -> Strip:
    cells = _cells(table, list(texts), left, widths, CELL)
    height = max(1, *(len(cell.lines) for cell in cells)) * CELL.line_height + 2 * _ABOVE

    def draw(painter: QPainter, top: float, given: float) -> None:
        if shade is not None:
            painter.fillRect(QRectF(left, top, width, given), shade)
        _draw_cells(painter, cells, CELL, top + _ABOVE + (given - height) / 2, theme.colour("ink"))
        painter.setPen(QPen(theme.colour("edge"), 0.4 * POINT))
        for column, cell in zip(table.columns, cells, strict=True):
            if column.align == "line":
                foot = top + given - 0.7 * MILLIMETRE
                painter.drawLine(QLineF(cell.left, foot, cell.left + cell.width, foot))

    return Strip(height, draw, stretch=_LOOSER, repeats=head if any(column.title for column in table.columns) else None)
