"""What stands round the body: heading block, running head and foot, signature block."""

from __future__ import annotations

from PySide6.QtCore import QLineF, QRectF, Qt
from PySide6.QtGui import QPainter, QPen

from headfall.sheet.model import Heading, Sheet
from headfall_app.paint.theme import Theme
from headfall_app.print.blocks import Strip
from headfall_app.print.page import MILLIMETRE, POINT, Page
from headfall_app.print.text import BODY, LABEL, SMALL, TITLE, Style, draw_line, draw_text, elided, text_width, wrapped

_FIRST_ROW = (
    ("Title", "title", 0.46),
    ("Tag", "tag", 0.14),
    ("Revision", "revision", 0.12),
    ("Status", "status", 0.13),
    ("Date", "date", 0.15),
)
_SECOND_ROW = (
    ("Site", "site", 0.46),
    ("By", "author", 0.18),
    ("Checked", "checker", 0.18),
    ("Approved", "approver", 0.18),
)
_VALUE = Style(9.0)
_STRONG = Style(9.0, 600)
_PAD = 1.2 * MILLIMETRE
SIGNATURE_HEIGHT = 17.0 * MILLIMETRE


def heading_block(heading: Heading, page: Page, theme: Theme) -> Strip:
    """Return the sheet's title, version and fingerprint above the ruled block of names."""
    rows = [_cells(heading, page, _FIRST_ROW), _cells(heading, page, _SECOND_ROW)]
    title_height = TITLE.line_height + 2.0 * MILLIMETRE
    heights = [_row_height(row) for row in rows]

    def draw(painter: QPainter, top: float, _height: float) -> None:
        draw_text(painter, "Sizing sheet", TITLE, page.left, top, theme.colour("ink"))
        draw_text(painter, f"Headfall {heading.version}", SMALL, page.right, top, theme.colour("ink"), 1.0)
        under = top + SMALL.line_height
        draw_text(
            painter,
            f"fingerprint of the inputs {heading.fingerprint}",
            SMALL,
            page.right,
            under,
            theme.colour("muted"),
            1.0,
        )
        at = top + title_height
        for row, height in zip(rows, heights, strict=True):
            _draw_row(painter, row, at, height, theme)
            at += height

    return Strip(title_height + sum(heights), draw)


_BoxedCell = tuple[str, str, Style, float, float]


def _cells(heading: Heading, page: Page, row: tuple[tuple[str, str, float], ...]) -> list[_BoxedCell]:
    cells: list[_BoxedCell] = []
    left = page.left
    for label, attribute, share in row:
        width = share * page.width
        style = _STRONG if attribute in ("title", "tag") else _VALUE
        cells.append((label, getattr(heading, attribute), style, left, width))
        left += width
    return cells


def _row_height(row: list[_BoxedCell]) -> float:
    most = max(len(wrapped(text, style, width - 2 * _PAD)) for _, text, style, _, width in row)
    return LABEL.line_height + most * _VALUE.line_height + 1.2 * MILLIMETRE


def _draw_row(painter: QPainter, row: list[_BoxedCell], top: float, height: float, theme: Theme) -> None:
    for label, text, style, left, width in row:
        painter.setPen(QPen(theme.colour("ink"), 0.5 * POINT))
        painter.setBrush(Qt.BrushStyle.NoBrush)
        painter.drawRect(QRectF(left, top, width, height))
        draw_text(painter, label, LABEL, left + _PAD, top + 0.4 * MILLIMETRE, theme.colour("muted"))
        at = top + 0.4 * MILLIMETRE + LABEL.line_height
        for line in wrapped(text, style, width - 2 * _PAD):
            draw_line(painter, line, style, left + _PAD, at, theme.colour("ink"))
            at += style.line_height


def draw_running_head(painter: QPainter, heading: Heading, page: Page, theme: Theme) -> None:
    """Draw what stands at the head of every page but the first."""
    style = Style(9.0, 600)
    right = "  ".join(part for part in (f"rev {heading.revision}" if heading.revision else "", heading.date) if part)
    room = page.width - text_width(right, style) - 6 * MILLIMETRE
    left = elided("  ".join(part for part in (heading.tag, heading.title) if part), style, room)
    draw_text(painter, left, style, page.left, page.top, theme.colour("ink"))
    draw_text(painter, right, BODY, page.right, page.top, theme.colour("ink"), 1.0)
    painter.setPen(QPen(theme.colour("ink"), 1.0 * POINT))
    under = page.top + style.line_height + 1.0 * MILLIMETRE
    painter.drawLine(QLineF(page.left, under, page.right, under))


def draw_running_foot(painter: QPainter, sheet: Sheet, page: Page, number: int, count: int, theme: Theme) -> None:
    """Draw tag, revision, status and the page's number at the foot."""
    heading = sheet.heading
    top = page.bottom - SMALL.line_height
    painter.setPen(QPen(theme.colour("edge"), 0.5 * POINT))
    painter.drawLine(QLineF(page.left, top - 1.0 * MILLIMETRE, page.right, top - 1.0 * MILLIMETRE))
    revision = f"rev {heading.revision}" if heading.revision else "no revision"
    middle = page.left + 0.5 * page.width
    end = "  ".join(part for part in (revision, heading.status) if part)
    room = 0.5 * page.width - 0.5 * text_width(sheet.foot, SMALL) - 4 * MILLIMETRE
    name = "  ".join(part for part in (heading.tag or "no tag", end) if part)
    colour = theme.colour("muted")
    draw_text(painter, elided(name, SMALL, room), SMALL, page.left, top, theme.colour("ink"))
    draw_text(painter, sheet.foot, SMALL, middle, top, colour, 0.5)
    draw_text(painter, f"page {number} of {count}", SMALL, page.right, top, theme.colour("ink"), 1.0)


def draw_signatures(painter: QPainter, sheet: Sheet, page: Page, theme: Theme) -> None:
    """Draw the three fields to be signed at the foot of the last page."""
    top = page.body_bottom - SIGNATURE_HEIGHT
    width = page.width / len(sheet.signatures)
    for number, (title, name) in enumerate(sheet.signatures):
        left = page.left + number * width
        painter.setPen(QPen(theme.colour("ink"), 0.5 * POINT))
        painter.setBrush(Qt.BrushStyle.NoBrush)
        painter.drawRect(QRectF(left, top, width, SIGNATURE_HEIGHT))
        draw_text(painter, title, SMALL, left + _PAD, top + 0.6 * MILLIMETRE, theme.colour("ink"))
        room = width - 3 * _PAD - text_width(title, SMALL)
        shown = elided(name, SMALL, room)
        draw_text(painter, shown, SMALL, left + width - _PAD, top + 0.6 * MILLIMETRE, theme.colour("ink"), 1.0)
        line = top + SIGNATURE_HEIGHT - LABEL.line_height - 1.2 * MILLIMETRE
        split = left + 0.68 * width
        painter.setPen(QPen(theme.colour("edge"), 0.5 * POINT))
        painter.drawLine(QLineF(left + _PAD, line, split, line))
        painter.drawLine(QLineF(split + 2 * _PAD, line, left + width - _PAD, line))
        for text, at in (("name, signature", left + _PAD), ("date", split + 2 * _PAD)):
            draw_text(painter, text, LABEL, at, line + 0.3 * MILLIMETRE, theme.colour("muted"))
