"""Text that was copied elsewhere, or a file's: tabs, semicolons or commas between the columns, cut into cells."""

from __future__ import annotations

import csv
import re
from dataclasses import dataclass

from headfall.quantities import is_bare_number
from headfall.quantities.units import known_unit

_KINDS_TRIED = ("length", "area", "volume", "temperature", "density", "dynamic_viscosity", "pressure", "flow", "time")
_PARTS = re.compile(r"[\s,()\[\]_]+")
_BRACKETS = re.compile(r"[\[(]([^\])]+)[\])]")


class PasteRefused(Exception):
    """A text that is no table; the text of it is the sentence for the person who pasted."""


@dataclass(frozen=True, slots=True)
class Pasted:
    """The cells of a pasted text, each with its unit, missing ones empty; and how many columns were too many."""

    cells: tuple[tuple[str, ...], ...]
    columns_left_out: int


def cells_from(text: str, columns: tuple[str, ...], units: tuple[str, ...], least: int) -> Pasted:
    """Return the cells of a pasted text.

    ``columns`` are the dimensions, ``units`` what a bare number takes where no heading names a unit, ``least`` how many
    columns a row must have. A first line without any number is a heading. A comma is a decimal comma where it stands
    inside a cell and no cell has a decimal point. Raises PasteRefused where there are no rows of so many columns.
    """
    lines = [line for line in text.replace("\r\n", "\n").replace("\r", "\n").split("\n") if line.strip()]
    if not lines:
        raise PasteRefused(f"Nothing was pasted. Copy {_named(columns[:least])} elsewhere and paste them here.")
    rows = _cut(lines)
    if len(rows) > 1 and not any(_begins_with_number(cell) for row in rows for cell in row):
        raise PasteRefused(f"There is no number in it. Copy {_named(columns[:least])} elsewhere and paste them here.")
    heading: list[str] = []
    if not any(_begins_with_number(cell) for cell in rows[0]):
        heading, rows = rows[0], rows[1:]
    if not rows:
        raise PasteRefused("There is a heading and no row under it. Copy the rows too.")
    if max(map(len, rows)) < least:
        raise PasteRefused(f"No row has {least} columns. Copy {_named(columns[:least])} side by side.")
    units = _units(heading, columns, units)
    with_comma = not any("." in cell for row in rows for cell in row)
    found = tuple(
        tuple(_with_unit(row[at] if at < len(row) else "", unit, with_comma) for at, unit in enumerate(units))
        for row in rows
    )
    return Pasted(found, max(0, max(map(len, rows)) - len(columns)))


def is_one_cell(text: str) -> bool:
    """Whether a text is the value of one cell and no table."""
    return not any(mark in text.strip() for mark in "\t\n\r;")


def _cut(lines: list[str]) -> list[list[str]]:
    for mark in ("\t", ";", ","):
        if any(mark in line for line in lines):
            rows = [[cell.strip() for cell in row] for row in csv.reader(lines, delimiter=mark, skipinitialspace=True)]
            break
    else:
        # Columns under one another with blanks between them.
        rows = [line.split() if all(map(is_bare_number, line.split())) else [line.strip()] for line in lines]
    for row in rows:
        while row and not row[-1]:
            row.pop()
    return [row for row in rows if row]


def _begins_with_number(cell: str) -> bool:
    return bool(re.match(r"[-+−]?[\d.,]", cell))


def _units(heading: list[str], columns: tuple[str, ...], usual: tuple[str, ...]) -> tuple[str, ...]:
    """Return the unit of every column: the heading's, where it names one."""
    found = list(usual)
    for at, (title, column) in enumerate(zip(heading, columns, strict=False)):
        for unit in _candidates(title):
            if any(known_unit(unit, dimension) for dimension in column.split("|")):
                found[at] = unit
                break
            if any(known_unit(unit, dimension) for dimension in _KINDS_TRIED):
                kind = _named((column,))
                raise PasteRefused(f"The heading names {unit}; the column is for {kind}. Choose what it holds first.")
    return tuple(found)


def _candidates(title: str) -> list[str]:
    """Return what may be the unit in a heading, likeliest first: in brackets, or its last words."""
    words = [part for part in _PARTS.split(title) if part]
    last = [" ".join(words[-2:]), words[-1]] if len(words) > 1 else []
    return [*(inside.strip() for inside in _BRACKETS.findall(title)), *last]


def _with_unit(cell: str, unit: str, with_comma: bool) -> str:
    number = cell
    if with_comma and cell.count(",") == 1:
        # What comes from a table has no commas between thousands beside decimal ones: the comma is a decimal comma.
        number = cell.replace(",", ".")
    return f"{number} {unit}".strip() if is_bare_number(number) else cell


def _named(columns: tuple[str, ...]) -> str:
    names = [column.split("|")[0].replace("_", " ").removeprefix("dynamic ") for column in columns]
    names = ["level" if name == "length" else name for name in names]
    return " and ".join(filter(None, (", ".join(names[:-1]), names[-1])))
