"""From a case to plain data and text, as it was typed."""

from __future__ import annotations

import json
from dataclasses import is_dataclass
from typing import Any

from headfall.case.attributes import attributes_of, discriminator
from headfall.case.file_text import text_from_data
from headfall.case.model import Case
from headfall.case.reading import FORMAT
from headfall.quantities import Quantity

_ORDER = (
    "title",
    "tag",
    "revision",
    "status",
    "date",
    "author",
    "checker",
    "approver",
    "site",
    "remarks",
    "units",
    "vessel",
    "liquid",
    "outlets",
    "inflow",
    "headspace",
    "levels",
    "target",
    "tables",
    "structure",
    "surroundings",
    "field_tests",
)


def case_as_data(case: Case) -> dict[str, Any]:
    """Return a case as the file holds it: what was not typed is left out, texts stay as they were typed."""
    data = _as_data(case)
    return {"headfall": FORMAT, **{key: data[key] for key in _ORDER if key in data}}


def case_text(case: Case) -> str:
    """Return the text of a case file."""
    return text_from_data(case_as_data(case))


def canonical_text(case: Case) -> str:
    """Return the same text for equal cases, whatever the order of their keys: what a fingerprint is taken of."""
    return json.dumps(case_as_data(case), sort_keys=True, separators=(",", ":"), ensure_ascii=False, allow_nan=False)


def _as_data(value: Any) -> Any:
    if isinstance(value, Quantity):
        return value.text
    if isinstance(value, tuple):
        return [_as_data(member) for member in value]
    if not is_dataclass(value):
        return value
    data: dict[str, Any] = {}
    for key, attribute in attributes_of(type(value)).items():
        member = getattr(value, attribute.name)
        if member is not None:
            data[key] = _as_data(member)
    word = discriminator(type(value))
    if word is None:
        return data
    # An outlet is known by its name first, everything else by its shape, form or kind.
    named = {"name": data.pop("name")} if "name" in data else {}
    return {**named, word[0]: word[1], **data}
