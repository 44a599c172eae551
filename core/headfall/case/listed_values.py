"""Reading what is typed as a list of plain values: rows of a table, several quantities, a pair of numbers."""

from __future__ import annotations

from collections.abc import Mapping
from typing import Any

from headfall.case.faults import CaseError, Fault
from headfall.case.model import Path
from headfall.case.typed_quantity import called
from headfall.case.values import read_plain, shown, wanted_of
from headfall.quantities import Quantity

# In a table only these may be below nil, and these may not be nil.
_ANY_SIGN = ("temperature",)
_ABOVE_NIL = ("density", "dynamic_viscosity|kinematic_viscosity")


def read_rows(item: object, metadata: Mapping[str, Any], path: Path) -> tuple[tuple[Quantity, ...], ...]:
    """Return the rows of a table. Raises CaseError with the fault of every row and every cell."""
    if not isinstance(item, list):
        raise CaseError([Fault(path, f"{shown(item)} is not a list", wanted_rows(metadata))])
    faults: list[Fault] = []
    rows = [_row(row, metadata, (*path, index), faults) for index, row in enumerate(item)]
    if faults:
        raise CaseError(faults)
    return tuple(rows)


def read_quantities(item: object, metadata: Mapping[str, Any], path: Path) -> tuple[Quantity, ...]:
    """Return several quantities of one dimension. Raises CaseError with the fault of every one."""
    if not isinstance(item, list):
        wanted = f"a list in square brackets, each entry {called(metadata['quantities'])}"
        raise CaseError([Fault(path, f"{shown(item)} is not a list", wanted)])
    faults: list[Fault] = []
    found = [_plain(member, entry_metadata(metadata), (*path, at), faults) for at, member in enumerate(item)]
    if faults:
        raise CaseError(faults)
    return tuple(found)


def read_pair(item: object, metadata: Mapping[str, Any], path: Path) -> Any:
    """Return a plain number, or a pair of them. Raises CaseError with the fault of each."""
    if not isinstance(item, list):
        return read_plain(item, metadata, path)
    if len(item) != 2:
        raise CaseError([Fault(path, f"A list of {len(item)} is not a pair", wanted_pair(metadata))])
    faults: list[Fault] = []
    pair = tuple(_plain(member, metadata, (*path, index), faults) for index, member in enumerate(item))
    if faults:
        raise CaseError(faults)
    return pair


def wanted_rows(metadata: Mapping[str, Any]) -> str:
    """Return what to type for rows: ``a list of rows in square brackets, each a length and an area or a volume``."""
    return f"a list of rows in square brackets, each {_columns(metadata)}"


def wanted_pair(metadata: Mapping[str, Any]) -> str:
    """Return what to type for a number or a pair of them."""
    return f"{wanted_of(metadata)}, or two: for the length, then for the width"


def cell_metadata(metadata: Mapping[str, Any], column: int) -> Mapping[str, Any]:
    """Return what a cell of a row says about itself. Raises LookupError for a column that is not there."""
    columns = metadata["rows"]
    if not 0 <= column < len(columns):
        raise LookupError(f"a row has no column {column + 1}")
    return {"dimension": columns[column], "sign": _sign(columns[column]), "required": column < metadata["least"]}


def entry_metadata(metadata: Mapping[str, Any]) -> Mapping[str, Any]:
    """Return what one of several quantities says about itself."""
    dimension = metadata["quantities"]
    return {"dimension": dimension, "sign": _sign(dimension), "required": True}


def _sign(dimension: str) -> str:
    return "any" if dimension in _ANY_SIGN else "positive" if dimension in _ABOVE_NIL else "not_negative"


def _row(item: object, metadata: Mapping[str, Any], path: Path, faults: list[Fault]) -> tuple[Any, ...]:
    if not isinstance(item, list):
        faults.append(Fault(path, f"{shown(item)} is not a row", f"a row in square brackets: {_columns(metadata)}"))
        return ()
    most, least = len(metadata["rows"]), metadata["least"]
    if not least <= len(item) <= most:
        much = "few" if len(item) < least else "many"
        faults.append(Fault(path, f"A row of {len(item)} has too {much} columns", _columns(metadata)))
        return ()
    return tuple(
        _plain(member, cell_metadata(metadata, column), (*path, column), faults) for column, member in enumerate(item)
    )


def _columns(metadata: Mapping[str, Any]) -> str:
    names = [called(column) for column in metadata["rows"]]
    *first, last = names[: metadata["least"]]
    said = f"{', '.join(first)} and {last}" if first else last
    known = names[metadata["least"] :]
    return f"{said}, and if known {' and '.join(known)}" if known else said


def _plain(item: object, metadata: Mapping[str, Any], path: Path, faults: list[Fault]) -> Any:
    try:
        return read_plain(item, metadata, path)
    except CaseError as refusal:
        faults.extend(refusal.faults)
        return None
