"""Changes to a case: every one gives back another case and leaves the former as it was."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import replace
from typing import Any

from headfall.case.contents import change_flow_limit, change_headspace, change_liquid
from headfall.case.faults import CaseError, Fault, place
from headfall.case.list_changes import insert_part, remove_part
from headfall.case.model import Case, Outlet, Path
from headfall.case.outlet_changes import change_outlet_kind, change_tailwater, change_weir_form
from headfall.case.places import attribute_of, member_of, replace_at, value_at
from headfall.case.reshaping import change_end_form, change_opening_form, change_shape
from headfall.case.values import read_plain, wanted_of
from headfall.quantities.number import NumberFault, exact, leading_number

__all__ = [
    "attribute_of",
    "change_end_form",
    "change_flow_limit",
    "change_headspace",
    "change_liquid",
    "change_opening_form",
    "change_outlet_kind",
    "change_shape",
    "change_tailwater",
    "change_weir_form",
    "insert_outlet",
    "insert_part",
    "read_entry",
    "remove_outlet",
    "remove_part",
    "replace_at",
    "value_at",
]


def read_entry(case: Case | type, path: Path, text: str) -> Any:
    """Return the value of a text typed for the attribute at a path; None for an empty text that may be left out.

    A number that may be two is typed as two with a semicolon between. Raises CaseError, with one fault at that path,
    where the text is none of its kind.
    """
    metadata = attribute_of(case, path)
    if "text" in metadata:
        return read_plain(text, metadata, path)
    if not text.strip():
        if metadata.get("required"):
            raise CaseError([Fault(path, "Nothing is typed", wanted_of(metadata))])
        return None
    if "or_pair" in metadata and text.count(";") == 1:
        first, second = (_number(part, metadata, path) for part in text.split(";"))
        return first, second
    if "number" in metadata or "integer" in metadata:
        return _number(text, metadata, path)
    if "dimension" in metadata or "choices" in metadata:
        return read_plain(text, metadata, path)
    raise LookupError(f"{place(path)} is not an entry to type into")


def insert_outlet(case: Case, index: int, outlet: Outlet) -> Case:
    """Return the case with one more outlet, which then stands at the index."""
    return replace(case, outlets=(*case.outlets[:index], outlet, *case.outlets[index:]))


def remove_outlet(case: Case, index: int) -> Case:
    """Return the case without one of its outlets.

    Raises ValueError for the only outlet, since a case needs one, and LookupError for one that is not there.
    """
    member_of(case.outlets, index, ("outlets", index))
    if len(case.outlets) == 1:
        raise ValueError("a case needs at least one outlet")
    return replace(case, outlets=case.outlets[:index] + case.outlets[index + 1 :])


def _number(text: str, metadata: Mapping[str, Any], path: Path) -> Any:
    return read_plain(_typed_number(text, metadata, path), metadata, path)


def _typed_number(text: str, metadata: Mapping[str, Any], path: Path) -> int | float:
    """Return a plain number typed in a field: the number grammar of quantities, without a unit."""
    found, tidy = leading_number(text), text.strip()
    if found is None:
        raise CaseError([Fault(path, f"{tidy} is not a number", wanted_of(metadata))])
    sign, digits, rest = found
    if rest.strip():
        raise CaseError([Fault(path, f"{tidy} is more than a plain number", wanted_of(metadata))])
    try:
        number = exact(digits) * (-1 if sign == "-" else 1)
    except NumberFault as fault:
        instead = " or ".join(f"{sign}{plain}" for plain in fault.instead) or wanted_of(metadata)
        raise CaseError([Fault(path, fault.found, instead)]) from None
    return int(number) if number.denominator == 1 and digits.isdigit() else float(number)
