"""The parts of a section as strips of the page."""

from __future__ import annotations

from PySide6.QtCore import QLineF, QRectF
from PySide6.QtGui import QPainter, QPen

from headfall.sheet.model import AnswerBox, Paragraph, Section
from headfall_app.paint.theme import Theme
from headfall_app.print.blocks import Strip, held_together, kept
from headfall_app.print.page import MILLIMETRE, POINT
from headfall_app.print.text import (
    ANSWER,
    BODY,
    HEADING,
    SMALL,
    Line,
    Style,
    draw_line,
    draw_text,
    text_width,
    wrapped,
)

SECTION_GAP = 3.0 * MILLIMETRE
_INDENT = 4.0 * MILLIMETRE
_STYLES = {"body": BODY, "lead": BODY, "heavy": Style(8.5, 600), "equation": BODY, "small": SMALL}


def heading_strip(section: Section, left: float, width: float, theme: Theme) -> Strip:
    """Return the numbered heading with its rule, which stays with what follows."""
    height = HEADING.line_height + 1.1 * MILLIMETRE

    def draw(painter: QPainter, top: float, _height: float) -> None:
        draw_text(painter, str(section.number), HEADING, left, top, theme.colour("accent"))
        draw_text(painter, section.title, HEADING, left + 6.0 * MILLIMETRE, top, theme.colour("ink"))
        painter.setPen(QPen(theme.colour("ink"), 0.6 * POINT))
        under = top + HEADING.line_height + 0.35 * MILLIMETRE
        painter.drawLine(QLineF(left, under, left + width, under))

    return Strip(height, draw, gap=SECTION_GAP, widening=5.0 * MILLIMETRE, keeps=True)


def paragraph_strips(paragraph: Paragraph, left: float, width: float, theme: Theme) -> list[Strip]:
    """Return the lines of a paragraph: an equation indented and whole, a heading or a lead held to what follows."""
    style = _STYLES[paragraph.style]
    colour = theme.colour("muted" if paragraph.style == "small" else "ink")
    equation = paragraph.style == "equation"
    indent = _INDENT if equation else 0.0
    lines: list[tuple[Line, bool]] = []
    for text in paragraph.text.split("\n"):
        broken = wrapped(text, style, width - 2 * indent if equation else width)
        lines += [(line, number == 0) for number, line in enumerate(broken)]

    def strip(line: Line, starts: bool, first: bool, keeps: bool) -> Strip:
        hang = 0.0 if starts or not equation else _INDENT
        return Strip(
            style.line_height,
            lambda painter, top, _height: draw_line(painter, line, style, left + indent + hang, top, colour),
            gap=(0.2 if equation else 0.6) * MILLIMETRE if first else 0.0,
            widening=1.2 * MILLIMETRE if first else 0.0,
            keeps=keeps,
        )

    whole = equation or len(lines) <= 3
    last = len(lines) - 1
    strips = [strip(line, starts, number == 0, whole and number < last) for number, (line, starts) in enumerate(lines)]
    strips = strips if whole else held_together(strips)
    if paragraph.style == "lead" or (paragraph.style == "heavy" and len(lines) == 1):
        strips[-1] = kept(strips[-1])
    return strips


def answer_strip(box: AnswerBox, left: float, width: float, theme: Theme) -> Strip:
    """Return the box with the question, the answer and what is wanted."""
    inset, pad = 4.0 * MILLIMETRE, 1.6 * MILLIMETRE
    inner = width - 2 * inset
    question = wrapped(box.question, BODY, inner)
    figure_width = text_width(box.figure, ANSWER) + 5.0 * MILLIMETRE
    beside = wrapped(box.beside, BODY, inner - figure_width)
    on_one_line = len(beside) == 1
    below = () if on_one_line else wrapped(box.beside, BODY, inner)
    after = [*below, *(line for text in box.lines for line in wrapped(text, BODY, inner))]
    height = 2 * pad + len(question) * BODY.line_height + ANSWER.line_height + len(after) * BODY.line_height

    def draw(painter: QPainter, top: float, _height: float) -> None:
        ink = theme.colour("ink")
        painter.fillRect(QRectF(left, top, width, height), theme.colour("accent_soft"))
        painter.fillRect(QRectF(left, top, 0.8 * MILLIMETRE, height), theme.colour("accent"))
        at = top + pad
        for line in question:
            draw_line(painter, line, BODY, left + inset, at, ink)
            at += BODY.line_height
        draw_text(painter, box.figure, ANSWER, left + inset, at, ink)
        if on_one_line:
            draw_line(painter, beside[0], BODY, left + inset + figure_width, at + ANSWER.ascent - BODY.ascent, ink)
        at += ANSWER.line_height
        for line in after:
            draw_line(painter, line, BODY, left + inset, at, ink)
            at += BODY.line_height

    return Strip(height, draw, gap=1.2 * MILLIMETRE)
