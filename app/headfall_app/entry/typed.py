"""From a text in a field to a value of the case; a bare number takes the unit that stood in the field before."""

from __future__ import annotations

import re
from dataclasses import fields, is_dataclass
from typing import Any

from headfall.case.editing import read_entry, value_at
from headfall.case.faults import CaseError
from headfall.case.model import Case, LossRange, Path
from headfall.case.values import read_quantity
from headfall.quantities import Quantity, QuantityFault, is_bare_number
from headfall_app.entry.plan_rows import Row


class Refused(Exception):
    """A text that could not be read; the text of it is the sentence for the person who typed."""


def value_or_none(case: Case, path: Path) -> Any:
    """Return the value at a path; None also where the case has nothing there."""
    try:
        return value_at(case, path)
    except LookupError:
        return None


def read_typed(case: Case, row: Row, text: str) -> object:
    """Return the value of a typed text, None for an empty one that may be left out; raises ``Refused``."""
    if row.kind == "text":
        return text or None
    if row.kind == "list":
        return _read_list(case, row, text)
    if row.kind == "quantity" and is_bare_number(text):
        text = _with_unit(text.strip(), unit_for(case, row), row.dimension)
    try:
        if _may_be_range(row) and len(_cut(text)) == 3:
            return _read_range(case, row, text)
        return read_entry(case, row.path, text)
    except CaseError as refusal:
        raise Refused(refusal.faults[0].sentence) from refusal


# A comma between quantities, not the decimal comma inside one.
_COMMA = re.compile(r",(?=\s)|(?<=[^\d\s]),")
_RANGED = ("entry_loss", "loss")
_ALIKE = {"level": ("length",), "bore": ("length",)}


def _may_be_range(row: Row) -> bool:
    """Whether a loss may be typed as lowest, typical and highest."""
    return row.kind == "number" and row.path[-1] in _RANGED


def _cut(text: str) -> list[str]:
    return [part.strip() for part in text.replace("·", ";").replace(" / ", ";").split(";") if part.strip()]


def _read_range(case: Case, row: Row, text: str) -> LossRange:
    low, typical, high = (read_entry(case, row.path, part) for part in _cut(text))
    if not low <= typical <= high:
        raise Refused(f"{text.strip()} does not rise. Type lowest; typical; highest, such as 0.4; 0.5; 0.6.")
    return LossRange(low, typical, high)


def _read_list(case: Case, row: Row, text: str) -> object:
    """Return several quantities typed in one line, None for an empty one; a bare number takes the unit behind it."""
    parts = _cut(_COMMA.sub(";", text))
    if not parts:
        return None
    found: list[Quantity] = []
    unit = _unit_of_list(case, row, parts)
    try:
        for part in reversed(parts):
            typed = _with_unit(part, unit, row.dimension) if is_bare_number(part) else part
            found.append(read_quantity(typed, row.dimension))
            unit = found[-1].unit
    except QuantityFault as fault:
        raise Refused(fault.sentence) from fault
    return tuple(reversed(found))


def _unit_of_list(case: Case, row: Row, parts: list[str]) -> str:
    """Return the unit that bare numbers at the end of a list take: the last one typed, or the one that stood there."""
    for part in reversed(parts):
        if not is_bare_number(part):
            try:
                return read_quantity(part, row.dimension).unit
            except QuantityFault:
                return ""
    former = value_or_none(case, row.path)
    return former[-1].unit if former else ""


def unit_for(case: Case, row: Row) -> str:
    """Return the unit a bare number takes: the one typed here before, a neighbour's, or the default's."""
    value = value_or_none(case, row.path)
    if isinstance(value, Quantity) and value.unit:
        return value.unit
    if row.default:
        return read_quantity(row.default, row.dimension).unit
    part = value_or_none(case, row.path[:-1])
    if is_dataclass(part):
        for attribute in fields(part):
            neighbour = getattr(part, attribute.name)
            if isinstance(neighbour, Quantity) and neighbour.dimension in _ALIKE.get(row.dimension, (row.dimension,)):
                return neighbour.unit
    return ""


def _with_unit(text: str, unit: str, dimension: str) -> str:
    if not unit:
        return text
    try:
        return read_quantity(f"{text} {unit}", dimension).text
    except QuantityFault:
        return text
