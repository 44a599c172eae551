"""The line over greyed answers."""

from __future__ import annotations

from typing import Any

from headfall.case.editing import value_at
from headfall.quantities import Quantity
from headfall_app.document import Document
from headfall_app.words import name_of


def stale_sentence(document: Document) -> str:
    """Return whose answers are shown and which entry to mend; empty while the answers are those of the case."""
    if not document.is_stale or not document.faults:
        return ""
    path = document.faults[0].path
    name = name_of(path)
    if not name:
        return "Last good answers. Mend the entries that are marked to go on."
    last = name.rsplit(", ", 1)[-1].lower()
    low = name[:1].lower() + name[1:]
    if document.answers is None:
        return f"No answers yet. Mend {low}, to go on."
    former = _former(document, path) if path in document.wrong else None
    if former is None:
        return f"Last good answers, from before the last change. Mend {low}, to go on."
    return f"Last good answers, for {low} {former.text}. Mend the {last} to go on."


def _former(document: Document, path: Any) -> Quantity | None:
    try:
        value = value_at(document.answers.case, path) if document.answers is not None else None
    except (AttributeError, IndexError, TypeError, KeyError, ValueError):
        return None
    return value if isinstance(value, Quantity) else None
