"""The sizing sheet as a PDF."""

from __future__ import annotations

import os
from itertools import product

from PySide6.QtCore import QBuffer, QByteArray, QIODevice, QMarginsF
from PySide6.QtGui import QPageLayout, QPageSize, QPainter, QPdfWriter

import headfall
from headfall.answers import Answers
from headfall.files import replace_file
from headfall.quantities import DisplayUnits, display_units
from headfall.sheet import AnswerBox, Paragraph, Section, Sheet, Table, build_sheet
from headfall_app.paint.fonts import load_fonts
from headfall_app.paint.scene import Scene, scene_of
from headfall_app.paint.theme import Theme, theme
from headfall_app.print.blocks import Strip, loosened
from headfall_app.print.frame import (
    SIGNATURE_HEIGHT,
    draw_running_foot,
    draw_running_head,
    draw_signatures,
    heading_block,
)
from headfall_app.print.page import MILLIMETRE, PAPERS, RESOLUTION, Page, page_of
from headfall_app.print.pagination import Layout, paginate
from headfall_app.print.parts import answer_strip, heading_strip, paragraph_strips
from headfall_app.print.pictures import CURVE_HEIGHTS, curve_strip, flow_strip, sketch_sizes, sketch_strip
from headfall_app.print.searchable import with_plain_spaces
from headfall_app.print.table import table_strips

_FLOW_SHARE = 0.7
LOOSENESS = (0.0, 0.3, 0.6)
SMALLER_SKETCH = 0.12
"""What one step down in the sketch's scale counts against a better use of the pages."""


def write_sheet_pdf(
    answers: Answers,
    path: str | os.PathLike[str],
    paper: str = "a4",
    *,
    fingerprint: str,
    version: str | None = None,
    display: DisplayUnits | None = None,
) -> None:
    """Write the sizing sheet of the answers to a PDF file, which appears whole or not at all.

    ``paper`` is ``a4`` or ``letter``; ``fingerprint`` is that of the inputs. Needs a running QGuiApplication. Raises
    ValueError for any other paper and FileError where the file cannot be written.
    """
    shown = display or display_units("us" if answers.case.units == "us" else "metric")
    sheet = build_sheet(answers, version=version or headfall.__version__, fingerprint=fingerprint, display=shown)
    content = sheet_bytes(sheet, scene_of(answers, shown), paper)
    replace_file(path, content)


def sheet_bytes(sheet: Sheet, scene: Scene, paper: str) -> bytes:
    """Return the PDF of a sheet, with the pictures of the scene."""
    page = page_of(paper)
    load_fonts()
    colours = theme("paper")
    layout = best_layout(sheet, scene, page, colours)
    store = QByteArray()
    buffer = QBuffer(store)
    buffer.open(QIODevice.OpenModeFlag.WriteOnly)
    writer = QPdfWriter(buffer)
    writer.setResolution(RESOLUTION)
    writer.setPageLayout(QPageLayout(QPageSize(PAPERS[paper]), QPageLayout.Orientation.Portrait, QMarginsF(0, 0, 0, 0)))
    writer.setTitle(" ".join(part for part in ("Sizing sheet", sheet.heading.tag, sheet.heading.title) if part))
    writer.setCreator(f"Headfall {sheet.heading.version}")
    painter = QPainter(writer)
    _draw(painter, writer, sheet, layout, page, colours)
    painter.end()
    buffer.close()
    return with_plain_spaces(bytes(store.data()))


def best_layout(sheet: Sheet, scene: Scene, page: Page, colours: Theme) -> Layout:
    """Return the page breaks, with the pictures so high that no page has a blank foot and the last one is not bare."""
    block = heading_block(sheet.heading, page, colours)
    strips = {section.number: _text_strips(section, page, colours) for section in sheet.sections}
    reserved = SIGNATURE_HEIGHT + 3 * MILLIMETRE
    best: tuple[float, Layout] | None = None
    sizes = sketch_sizes(scene, page.width, colours)
    for size, curve, share in product(sizes, CURVE_HEIGHTS, LOOSENESS):
        pictures = {
            "sketch": [sketch_strip(scene, size, page.left, page.width, colours)],
            "curve": [curve_strip(scene, curve, page.left, page.width, colours)],
            "flow": [flow_strip(scene, curve * _FLOW_SHARE, page.left, page.width, colours)],
        }
        flat = [block]
        for section in sheet.sections:
            for item in strips[section.number]:
                flat += pictures[item] if isinstance(item, str) else [item]
        layout = paginate(
            [loosened(strip, share) for strip in flat], page.top, page.body_top, page.body_bottom, reserved
        )
        score = layout.unevenness + SMALLER_SKETCH * sizes.index(size)
        if best is None or score < best[0]:
            best = score, layout
    if best is None:
        raise ValueError("the sheet has no sketch")
    return best[1]


def _text_strips(section: Section, page: Page, colours: Theme) -> list[Strip | str]:
    """Return the strips of a section, and the names of pictures whose height is chosen later."""
    strips: list[Strip | str] = [heading_strip(section, page.left, page.width, colours)]
    for part in section.parts:
        if isinstance(part, AnswerBox):
            strips.append(answer_strip(part, page.left, page.width, colours))
        elif isinstance(part, Paragraph):
            strips += paragraph_strips(part, page.left, page.width, colours)
        elif isinstance(part, Table):
            strips += table_strips(part, page.left, page.width, colours)
        else:
            strips.append(part.name)
    return strips


def _draw(painter: QPainter, writer: QPdfWriter, sheet: Sheet, layout: Layout, page: Page, colours: Theme) -> None:
    count = len(layout.pages)
    for number, placed_strips in enumerate(layout.pages, 1):
        if number > 1:
            writer.newPage()
            draw_running_head(painter, sheet.heading, page, colours)
        for placed in placed_strips:
            placed.strip.draw(painter, placed.top, placed.height)
        if number == count:
            draw_signatures(painter, sheet, page, colours)
        draw_running_foot(painter, sheet, page, number, count, colours)
