"""From a text in a field to a value of the case; a bare number takes the unit that stood in the field before."""

from __future__ import annotations

from dataclasses import fields, is_dataclass
from typing import Any

from headfall.case.editing import read_entry, value_at
from headfall.case.faults import CaseError
from headfall.case.model import Case, Path
from headfall.quantities import Quantity, QuantityFault, is_bare_number, parse
from headfall_app.entry.plan import Row


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
    if row.kind == "quantity" and is_bare_number(text):
        text = _with_unit(text.strip(), unit_for(case, row), row.dimension)
    try:
        return read_entry(case, row.path, text)
    except CaseError as refusal:
        raise Refused(refusal.faults[0].sentence) from refusal


def unit_for(case: Case, row: Row) -> str:
    """Return the unit a bare number takes: the one typed here before, a neighbour's, or the default's."""
    value = value_or_none(case, row.path)
    if isinstance(value, Quantity) and value.unit:
        return value.unit
    if row.default:
        return parse(row.default, row.dimension).unit
    part = value_or_none(case, row.path[:-1])
    if is_dataclass(part):
        for attribute in fields(part):
            neighbour = getattr(part, attribute.name)
            if isinstance(neighbour, Quantity) and neighbour.dimension == row.dimension and neighbour.unit:
                return neighbour.unit
    return ""


def _with_unit(text: str, unit: str, dimension: str) -> str:
    if not unit:
        return text
    try:
        return parse(f"{text} {unit}", dimension).text
    except QuantityFault:
        return text
