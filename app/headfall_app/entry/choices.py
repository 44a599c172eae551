"""What choosing in a list does: the case is changed in place and keeps what still applies."""

from __future__ import annotations

from dataclasses import replace
from typing import Any

from headfall.case import editing
from headfall.case.model import (
    Case,
    CoefficientRange,
    Orifice,
    Path,
    ReceivingVessel,
    Valve,
    Weir,
)
from headfall.outlet.entries import entry_coefficient
from headfall_app.document import Document
from headfall_app.entry.plan_rows import Row
from headfall_app.entry.table_cells import change_column
from headfall_app.entry.typed import value_or_none
from headfall_app.words import lowered, words

_FIRST_KV = 100.0


def chosen(case: Case, row: Row) -> str:
    """Return the choice that is typed; empty where none is."""
    value: Any = value_or_none(case, row.path)
    finder = _CHOSEN.get(row.change)
    if finder is not None:
        return finder(case, row, value)
    return value or ""


def _end(_case: Case, _row: Row, value: Any) -> str:
    return "two" if isinstance(value, tuple) else "" if value is None else str(value.form)


def _liquid(_case: Case, _row: Row, value: Any) -> str:
    if value is None:
        return "water"
    return (
        "own_table" if value.properties is not None else "own" if value.density is not None else value.name or "water"
    )


def _tailwater(_case: Case, _row: Row, value: Any) -> str:
    return "none" if value is None else "vessel" if isinstance(value, ReceivingVessel) else "level"


def _valve(_case: Case, _row: Row, value: Any) -> str:
    return "none" if value is None else "cv" if value.cv is not None else "kv"


def _column(case: Case, row: Row, value: Any) -> str:
    # A table that does not say what it holds is known by its units.
    return str(value or value_or_none(case, (*row.path[:-1], "rows"))[0][1].dimension)


_CHOSEN = {
    "shape": lambda _case, _row, value: str(value.shape),
    "end": _end,
    "opening": lambda _case, _row, value: str(value.form),
    "form": lambda _case, _row, value: str(value or ""),
    "kind": lambda case, row, _value: str(case.outlets[int(row.path[1])].kind),
    "coefficient": lambda _case, _row, value: "own" if isinstance(value, CoefficientRange) else value or "",
    "headspace": lambda _case, _row, value: "" if value is None else str(value.kind),
    "liquid": _liquid,
    "tailwater": _tailwater,
    "valve": _valve,
    "column": _column,
    "flow_limit": lambda _case, _row, value: "none" if value is None else "asked",
}


def words_of(case: Case, row: Row, choice: str, text: str) -> str:
    """Return the words of a choice; the handbook's coefficient of an opening says its numbers."""
    if row.change != "coefficient" or choice != "handbook":
        return text
    found = handbook(case, int(row.path[1]))
    return text if found is None else " · ".join(f"{value:.3g}" for value in found)


def handbook(case: Case, index: int) -> tuple[float, float, float] | None:
    """Return the handbook's coefficient for an opening's entry, lowest, typical, highest; None for another outlet."""
    outlet = case.outlets[index]
    if not isinstance(outlet, Orifice):
        return None
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
        document.set(row.path, _coefficient(case, int(row.path[1]), choice), what)
    elif row.change == "valve":
        document.set(row.path, _chosen_valve(value_or_none(case, row.path), choice), what)
    else:
        document.change(_reshaped(case, row, choice), what, lambda path: _still(path, row.path))


def _coefficient(case: Case, index: int, choice: str) -> Any:
    if choice != "own":
        return choice
    found = handbook(case, index)
    # Of a weir the standard's coefficient, about the middle of all of them.
    return CoefficientRange(*(found or ((0.85, 0.93, 1.0) if _is_broad(case, index) else (0.58, 0.61, 0.64))))


def _is_broad(case: Case, index: int) -> bool:
    outlet = case.outlets[index]
    return isinstance(outlet, Weir) and outlet.form == "broad_crested"


def _chosen_valve(former: Valve | None, choice: str) -> Valve | None:
    if choice == "none":
        return None
    kept = former or Valve()
    full = kept.kv or kept.cv or _FIRST_KV
    return replace(kept, kv=full if choice == "kv" else None, cv=full if choice == "cv" else None)


def _reshaped(case: Case, row: Row, choice: str) -> Case:
    index = int(row.path[1]) if row.path[0] == "outlets" else 0
    if row.change == "shape":
        return editing.change_shape(case, choice, row.path)
    if row.change == "opening":
        return editing.change_opening_form(case, row.path, choice)
    if row.change == "kind":
        return editing.change_outlet_kind(case, index, choice)
    if row.change == "form":
        return editing.change_weir_form(case, index, choice)
    if row.change == "tailwater":
        return editing.change_tailwater(case, index, choice)
    if row.change == "headspace":
        return editing.change_headspace(case, choice)
    if row.change == "liquid":
        return editing.change_liquid(case, choice)
    if row.change == "column":
        return change_column(case, row.path[:-1], choice)
    if row.change == "flow_limit":
        return editing.change_flow_limit(case, choice == "asked")
    return editing.change_end_form(case, row.path, choice)


def _with_entry(case: Case, index: int, entry: str) -> Case:
    # A size that belongs to another entry has no meaning any more, and would be refused.
    outlet = case.outlets[index]
    dropped: dict[str, Any] = {
        name: None
        for key, rule in words()["only"].items()
        if rule.get("attribute") == "entry"
        and entry not in rule["values"]
        and hasattr(outlet, name := key.rsplit(".", 1)[-1])
    }
    assert not isinstance(outlet, Weir)
    return editing.replace_at(case, ("outlets", index), replace(outlet, entry=entry, **dropped))


def _still(path: Path, changed: Path) -> Path | None:
    # What was typed wrongly below a part that changes its form has no field any more.
    if changed[-1:] in (("kind",), ("column",)):
        changed = changed[:-1]
    return None if path[: len(changed)] == changed else path
