"""Rows from text that was copied elsewhere, or from a file: tabs, semicolons or commas between the columns."""

from __future__ import annotations

import re

from headfall.case.values import read_quantity
from headfall.quantities import Quantity, QuantityFault, is_bare_number

_UNIT_IN_HEADING = re.compile(r"[\[(]\s*([^\])]+?)\s*[\])]|\s(\S+)$")
_UNDERSCORED = re.compile(r"_(m3|m2|m|mm|ft|in|L|ft2|ft3)$")
_SPELT = {"m2": "m²", "m3": "m³", "ft2": "ft²", "ft3": "ft³"}


class PasteRefused(Exception):
    """A text that is no table; the text of it is the sentence for the person who pasted."""


def rows_from(
    text: str, columns: tuple[str, ...], units: tuple[str, ...], least: int
) -> tuple[tuple[Quantity, ...], ...]:
    """Return the rows of a pasted text.

    ``columns`` are the dimensions, ``units`` what a bare number takes where no heading names a unit, ``least`` how many
    columns a row must have. A first line without any number is a heading. A comma is a decimal comma where tabs or
    semicolons stand between the columns. Raises PasteRefused with the line and what was wrong with it.
    """
    lines = [line for line in text.replace("\r\n", "\n").replace("\r", "\n").split("\n") if line.strip()]
    if not lines:
        raise PasteRefused("Nothing was pasted. Copy two columns, level and value, and paste them here.")
    separator = _separator(lines[-1])
    cut = [_cells(line, separator) for line in lines]
    first = 0
    if not any(_numbers(cell) for cell in cut[0]):
        units = tuple(_unit_of(cell) or unit for cell, unit in zip((*cut[0], *("",) * len(units)), units, strict=False))
        first = 1
    found = []
    for number, cells in enumerate(cut[first:], first + 1):
        cells = cells[: len(columns)]
        if len(cells) < least:
            raise PasteRefused(
                f"Line {number} has {len(cells)} columns. {least} are wanted: {_named(columns[:least])}."
            )
        found.append(
            tuple(_read(cell, column, unit, number) for cell, column, unit in zip(cells, columns, units, strict=False))
        )
    if not found:
        raise PasteRefused("There is a heading and no row under it.")
    return tuple(found)


def _separator(line: str) -> str:
    return next((mark for mark in ("\t", ";", ",") if mark in line), "\t")


def _cells(line: str, separator: str) -> list[str]:
    cells = [cell.strip().strip('"') for cell in line.split(separator)]
    while cells and not cells[-1]:
        cells.pop()
    return cells


def _numbers(cell: str) -> bool:
    return bool(re.match(r"[-+−]?[\d.,]", cell.strip()))


def _unit_of(heading: str) -> str:
    found = _UNIT_IN_HEADING.search(heading.strip())
    if found is not None:
        return (found[1] or found[2] or "").strip()
    underscored = _UNDERSCORED.search(heading.strip())
    return _SPELT.get(underscored[1], underscored[1]) if underscored else ""


def _read(cell: str, column: str, unit: str, line: int) -> Quantity:
    text = f"{cell} {unit}".strip() if is_bare_number(cell) else cell
    try:
        return read_quantity(text, column)
    except QuantityFault as fault:
        raise PasteRefused(f"Line {line}: {fault.sentence}") from None


def _named(columns: tuple[str, ...]) -> str:
    return ", ".join(column.split("|")[0].replace("_", " ") for column in columns)
