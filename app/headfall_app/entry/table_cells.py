"""From the texts of a table's cells to its rows; a cell that cannot be read has its reason and a stand-in."""

from __future__ import annotations

from collections.abc import Mapping, Sequence
from dataclasses import replace
from typing import Any

from headfall.case.editing import attribute_of, replace_at
from headfall.case.faults import CaseError, Fault
from headfall.case.listed_values import cell_metadata
from headfall.case.model import Case, Path, TableVessel
from headfall.case.values import read_plain, read_quantity, wanted_of
from headfall.quantities import Quantity, QuantityFault
from headfall.quantities.units import known_unit
from headfall_app.entry.typed import value_or_none
from headfall_app.undo import WrongEntry
from headfall_app.words import words

Rows = tuple[tuple[Quantity, ...], ...]


def columns_at(case: Case, path: Path) -> tuple[str, ...]:
    """Return the dimension of each column of a table."""
    columns: tuple[str, ...] = attribute_of(case, path)["rows"]
    return columns


def least_columns(case: Case, path: Path) -> int:
    """Return how many columns every row must have."""
    least: int = attribute_of(case, path)["least"]
    return least


def units_at(case: Case, path: Path) -> tuple[str, ...]:
    """Return the unit that a bare number takes in each column: that of its first row which has it, else the usual."""
    rows: Rows = value_or_none(case, path) or ()
    usual: dict[str, str] = words()["usual_units"]
    found = []
    for at, column in enumerate(columns_at(case, path)):
        typed = (row[at].unit for row in rows if at < len(row) and row[at].unit)
        found.append(next(typed, usual.get(column, "")))
    return tuple(found)


def read_cells(case: Case, path: Path, cells: Sequence[Sequence[str]]) -> tuple[Case, tuple[WrongEntry, ...]]:
    """Return the case with these cells as its rows, and the cells that could not be read with their reasons."""
    metadata = attribute_of(case, path)
    values: list[list[Quantity | None]] = []
    wrong: list[WrongEntry] = []
    for row, texts in enumerate(cells):
        values.append([])
        for column, text in enumerate(texts):
            here = cell_metadata(metadata, column)
            if not text and not here["required"]:
                break
            value, sentence = _read(text, here, (*path, row, column))
            values[-1].append(value)
            if sentence:
                wrong.append(WrongEntry((*path, row, column), text, sentence))
    units = [_unit(values, at, unit) for at, unit in enumerate(units_at(case, path))]
    return replace_at(case, path, _filled(values, units, metadata["rows"])), tuple(wrong)


def change_column(case: Case, path: Path, column: str) -> Case:
    """Return the case with another meaning of a table's values; the numbers stay, areas become volumes and back."""
    table = value_or_none(case, path)
    if not isinstance(table, TableVessel):
        raise LookupError("there is no table here")
    wanted = "area" if column == "area" else "volume"
    rows = tuple((level, _as(value, wanted)) for level, value in table.rows)
    # Only areas are joined by a rule.
    between = table.between if column == "area" else None
    return replace_at(case, path, replace(table, column=column, between=between, rows=rows))


def _as(value: Quantity, dimension: str) -> Quantity:
    if value.dimension == dimension:
        return value
    powers = {"area": ("³", "²", "3", "2"), "volume": ("²", "³", "2", "3")}[dimension]
    unit = value.unit.replace(powers[0], powers[1]).replace(powers[2], powers[3])
    unit = unit if known_unit(unit, dimension) else words()["usual_units"][dimension]
    try:
        return read_quantity(f"{value.text.removesuffix(value.unit).strip()} {unit}", dimension)
    except QuantityFault:
        return read_quantity(f"{value.value:.6g} {words()['usual_units'][dimension]}", dimension)


def _read(text: str, metadata: Mapping[str, Any], path: Path) -> tuple[Quantity | None, str]:
    if not text:
        return None, Fault(path, "Nothing is typed", wanted_of(metadata)).sentence
    try:
        value = read_plain(text, metadata, path)
    except CaseError as refusal:
        return None, refusal.faults[0].sentence
    assert isinstance(value, Quantity)
    return value, ""


def _unit(values: list[list[Quantity | None]], at: int, usual: str) -> str:
    typed = (row[at] for row in values if at < len(row))
    return next((value.unit for value in typed if value is not None), usual)


def _filled(values: list[list[Quantity | None]], units: list[str], columns: Sequence[str]) -> Rows:
    """Put a stand-in where a cell could not be read: rising levels, and what stands above else."""
    found = []
    for number, row in enumerate(values):
        cells = []
        for at, value in enumerate(row):
            known = {index: cell for index, other in enumerate(values) if (cell := (other[at : at + 1] or [None])[0])}
            cells.append(value or _stand_in(number, at, known, units[at], columns[at]))
        found.append(tuple(cells))
    return tuple(found)


def _stand_in(number: int, at: int, known: dict[int, Quantity], unit: str, column: str) -> Quantity:
    before = max((index for index in known if index < number), default=None)
    after = min((index for index in known if index > number), default=None)
    if at:
        near = before if before is not None else after
        return known[near] if near is not None else read_quantity(f"{number + 1} {unit}", column)
    scale = known_unit(unit, column)
    low = scale.from_si(known[before].value) if scale and before is not None else 0.0
    if scale is None or after is None:
        return read_quantity(f"{low + (number - (before or 0)):.6g} {unit}", column)
    part = (number - (before or 0)) / (after - (before or 0))
    level = low + part * (scale.from_si(known[after].value) - low)
    return read_quantity(f"{0.0 if number == 0 else level:.6g} {unit}", column)
