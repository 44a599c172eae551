"""What stands at the right of a group's heading: capacity, density, or in words what is there."""

from __future__ import annotations

from dataclasses import fields
from typing import Any

from headfall_app.document import Document
from headfall_app.entry.plan_rows import Group
from headfall_app.entry.typed import value_or_none
from headfall_app.words import words


def beside(document: Document, group: Group) -> str:
    """Return the words at the right of the group's heading."""
    answers = document.answers
    if group.key == "vessel":
        return document.display.text(answers.vessel.capacity, "volume") if answers else ""
    if group.key == "liquid":
        return document.display.text(answers.system.liquid.density, "density") if answers else ""
    if group.key == "inside":
        return _inside(document.case.vessel)
    if group.key == "heading":
        return document.case.status or "draft"
    empty = words()["beside"]["empty"].get(group.key)
    if empty is not None:
        return empty if _is_empty(value_or_none(document.case, group.path)) else ""
    text: str = words()["beside"].get(group.key, "")
    return text


def _is_empty(part: Any) -> bool:
    return part is None or all(getattr(part, field.name) is None for field in fields(part))


def _inside(vessel: Any) -> str:
    """What was typed of wall, lining and internals, in a word."""
    if getattr(vessel, "displacement", None):
        return "space taken"
    if not hasattr(vessel, "sizes"):
        return "empty"
    typed = any(getattr(vessel, name, None) is not None for name in ("sizes", "wall", "lining"))
    return "as typed" if typed else "inside sizes, empty"
