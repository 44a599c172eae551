"""Faults between the entries of one vessel."""

from __future__ import annotations

from collections.abc import Collection, Mapping
from itertools import pairwise
from typing import Any

from headfall.case.faults import Fault
from headfall.case.model import Path
from headfall.case.typed_quantity import wanted_quantity
from headfall.quantities import Quantity

Values = Mapping[str, Any]
Rows = tuple[tuple[Quantity, ...], ...]


def cone_faults(values: Values, _unsound: Collection[str], path: Path) -> list[Fault]:
    """Return the fault of a cone of two nil diameters."""
    diameters = [values.get("top_diameter"), values.get("bottom_diameter")]
    if any(diameter is None or diameter.value != 0 for diameter in diameters):
        return []
    return [Fault((*path, "top_diameter"), "Both diameters of the cone are nil", "one of them above nil")]


def basin_faults(values: Values, _unsound: Collection[str], path: Path) -> list[Fault]:
    """Return the faults of a basin that would have no width in one direction."""
    slope = values.get("side_slope")
    slopes = slope if isinstance(slope, tuple) else (slope, slope)
    faults = []
    for key, across in zip(("base_length", "base_width"), slopes, strict=True):
        base = values.get(key)
        if base is not None and base.value == 0 and across == 0:
            found = f"The {key.replace('_', ' ')} is nil and the sides there do not slope"
            faults.append(Fault((*path, key), found, f"{wanted_quantity('length', 'positive')}, or a side slope"))
    return faults


def displacement_faults(values: Values, _unsound: Collection[str], path: Path) -> list[Fault]:
    """Return the fault of a displacement that ends no higher than it begins."""
    low, high = values.get("from"), values.get("to")
    if low is None or high is None or low.value < high.value:
        return []
    found = f"{_said(high)} is not above {_said(low)}, where the displacement begins"
    return [Fault((*path, "to"), found, "a level above that")]


def table_faults(values: Values, _unsound: Collection[str], path: Path) -> list[Fault]:
    """Return the faults of a table: its rule, its levels, and its areas, volumes or increments."""
    column, rows = values.get("column"), values.get("rows")
    faults = []
    if values.get("between") == "conic" and column in ("volume", "increment"):
        faults.append(Fault((*path, "between"), "The rule conic is one for areas", "linear, or leave it out"))
    if rows is None:
        return faults
    place = (*path, "rows")
    if len(rows) < 2:
        found = "The table has no rows" if not rows else "A table of one row is no vessel"
        return [*faults, Fault(place, found, "at least two rows")]
    if column is None:
        return faults
    return faults + _level_faults(rows, column, place) + _column_faults(rows, column, place)


def _level_faults(rows: Rows, column: str, place: Path) -> list[Fault]:
    first, last = rows[0][0], rows[-1][0]
    faults = []
    if first.value != 0:
        wanted = "Type the first row at level 0, the lowest inside point"
        faults.append(Fault((*place, 0, 0), f"The table begins at {_said(first)}", wanted))
    for index, (below, row) in enumerate(pairwise(rows), start=1):
        if row[0].value < below[0].value or (row[0].value == below[0].value and column != "area"):
            found = f"{_said(row[0])} is not above {_said(below[0])}, the level before it"
            faults.append(Fault((*place, index, 0), found, "levels that rise from row to row"))
        elif index > 1 and row[0].value == rows[index - 2][0].value:
            found = f"A third row stands at {_said(row[0])}"
            faults.append(Fault((*place, index, 0), found, "at most two rows at one level, a ledge"))
    if not faults and last.value == first.value:
        found = f"All levels of the table are {_said(first)}"
        faults.append(Fault((*place, len(rows) - 1, 0), found, "levels that rise from row to row"))
    return faults


def _column_faults(rows: Rows, column: str, place: Path) -> list[Fault]:
    wanted = "area" if column == "area" else "volume"
    faults = []
    for index, row in enumerate(rows):
        if row[1].dimension != wanted:
            found = f"{_said(row[1])} is {'a volume' if wanted == 'area' else 'an area'}, and the column is {column}"
            faults.append(Fault((*place, index, 1), found, wanted_quantity(wanted)))
    if faults:
        return faults
    for index, (below, row) in enumerate(pairwise(rows), start=1):
        where = (*place, index, 1)
        if column == "area":
            if row[1].value == below[1].value == 0 and row[0].value > below[0].value:
                found = f"The areas at {_said(below[0])} and at {_said(row[0])} are both nil"
                faults.append(Fault(where, found, wanted_quantity("area", "positive")))
        elif column == "volume" and row[1].value <= below[1].value:
            found = f"{_said(row[1])} is not above {_said(below[1])}, the volume before it"
            faults.append(Fault(where, found, "volumes that rise from row to row"))
        elif column == "increment" and row[1].value == 0:
            faults.append(Fault(where, f"{_said(row[1])} puts nothing in", wanted_quantity("volume", "positive")))
    return faults


def _said(quantity: Quantity) -> str:
    return quantity.text.strip()
