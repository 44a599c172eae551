"""Choosing a shape, a form, a coefficient: the case is changed in place and keeps what still applies."""

from __future__ import annotations

from dataclasses import replace
from typing import Any

from headfall.case import editing
from headfall.case.model import Case, CoefficientRange, OpenHeadspace, Orifice, Path
from headfall.outlet.entries import entry_coefficient
from headfall_app.document import Document
from headfall_app.entry.plan import Row
from headfall_app.entry.typed import value_or_none
from headfall_app.words import lowered, words


def chosen(case: Case, row: Row) -> str:
    """Return the choice that is typed; empty where none is."""
    value: Any = value_or_none(case, row.path)
    if row.change == "shape":
        return str(value.shape)
    if row.change == "end":
        return "two" if isinstance(value, tuple) else "" if value is None else str(value.form)
    if row.change == "opening":
        return str(value.form)
    if row.change == "coefficient":
        return "own" if isinstance(value, CoefficientRange) else value or ""
    if row.change == "headspace":
        return "" if value is None else "open"
    return value or ""


def words_of(case: Case, row: Row, choice: str, text: str) -> str:
    """Return the words of a choice; the handbook's coefficient says its numbers."""
    if row.change != "coefficient" or choice != "handbook":
        return text
    low, typical, high = handbook(case, int(row.path[1]))
    return f"{low:.3g} · {typical:.3g} · {high:.3g}"


def handbook(case: Case, index: int) -> tuple[float, float, float]:
    """Return the handbook's coefficient for an outlet's entry: lowest, typical, highest."""
    outlet = case.outlets[index]
    sizes = [
        getattr(outlet.opening, name).value for name in ("diameter", "width", "height") if hasattr(outlet.opening, name)
    ]
    radius = outlet.edge_radius.value if outlet.edge_radius else 0.0
    found = entry_coefficient(outlet.entry or "sharp_edged", min(sizes), radius)
    return found.low, found.typical, found.high


def choose(document: Document, row: Row, choice: str) -> None:
    """Put a choice into the document as one step of undo."""
    case, what = document.case, f"Change the {lowered(row.label)}"
    if choice == chosen(case, row):
        return
    if row.change == "set" and row.path[-1] == "entry":
        document.change(_with_entry(case, int(row.path[1]), choice), what)
    elif row.change == "set":
        document.set(row.path, choice, what)
    elif row.change == "coefficient":
        value = CoefficientRange(*handbook(case, int(row.path[1]))) if choice == "own" else choice
        document.set(row.path, value, what)
    elif row.change == "headspace":
        document.set(row.path, OpenHeadspace() if choice else None, what)
    else:
        document.change(_reshaped(case, row, choice), what, lambda path: _still(path, row.path))


def _reshaped(case: Case, row: Row, choice: str) -> Case:
    if row.change == "shape":
        return editing.change_shape(case, choice)
    if row.change == "opening":
        return editing.change_opening_form(case, row.path, choice)
    return editing.change_end_form(case, row.path, choice)


def _with_entry(case: Case, index: int, entry: str) -> Case:
    # A size that belongs to another entry has no meaning any more, and would be refused.
    dropped: dict[str, Any] = {
        key.rsplit(".", 1)[-1]: None
        for key, rule in words()["only"].items()
        if rule.get("attribute") == "entry" and entry not in rule["values"]
    }
    return editing.replace_at(case, ("outlets", index), replace(case.outlets[index], entry=entry, **dropped))


def _still(path: Path, changed: Path) -> Path | None:
    # What was typed wrongly below a part that changes its form has no field any more.
    return None if path[: len(changed)] == changed else path


def add_outlet(document: Document, after: int, copy: bool = False) -> None:
    """Add an outlet after another one: a copy under another name, or one of the same opening with all else default."""
    case = document.case
    model = case.outlets[after]
    name = _free_name(case, model.name or "drain")
    if copy:
        outlet = replace(model, name=name)
    else:
        outlet = Orifice(name=name, opening=model.opening, facing=model.facing, elevation=model.elevation)
    document.change(
        editing.insert_outlet(case, after + 1, outlet),
        "Copy an outlet" if copy else "Add an outlet",
        lambda path: _shifted(path, after + 1, 1),
    )


def remove_outlet(document: Document, index: int) -> str:
    """Take an outlet out; returns the sentence that says why not for the last one, else an empty text."""
    if len(document.case.outlets) == 1:
        return "This is the only outlet. A case needs one: add another before you remove it."
    document.change(
        editing.remove_outlet(document.case, index),
        "Remove an outlet",
        lambda path: None if path[:2] == ("outlets", index) else _shifted(path, index, -1),
    )
    return ""


def _shifted(path: Path, first: int, by: int) -> Path:
    if path[0] != "outlets" or len(path) < 2 or int(path[1]) < first:
        return path
    return ("outlets", int(path[1]) + by, *path[2:])


def _free_name(case: Case, like: str) -> str:
    taken = {outlet.name or "drain" for outlet in case.outlets}
    stem = like.rstrip("0123456789").rstrip()
    number = 2
    while f"{stem} {number}" in taken:
        number += 1
    return f"{stem} {number}"
