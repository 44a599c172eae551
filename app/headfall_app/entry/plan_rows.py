"""Rows of the entry panel and how one attribute of the case becomes one; no widgets."""

from __future__ import annotations

from collections.abc import Iterator, Mapping
from dataclasses import dataclass
from typing import Any

from headfall.case.attributes import attributes_of
from headfall.case.model import Path
from headfall_app.words import choices_of, key_of, label_of, lowered, name_of, words


@dataclass(frozen=True, slots=True)
class Row:
    """One row: where its value stands, which widget it takes, and what that widget needs to know.

    ``kind`` is ``quantity``, ``number``, ``text``, ``choice``, ``list`` (quantities in one line), ``action`` (a word
    that does something to a list) or ``table``; ``change`` says what choosing does: ``set`` replaces the value, the
    others (``shape``, ``end``, ``opening``, ``coefficient``, ``headspace`` and so on) reshape the case in place.
    ``untyped`` is what an empty line says where there is no default.
    """

    path: Path
    kind: str
    label: str
    dimension: str = ""
    default: str = ""
    required: bool = False
    choices: tuple[tuple[str, str], ...] = ()
    change: str = "set"
    whole: bool = False
    tip: str = ""
    untyped: str = ""

    @property
    def name(self) -> str:
        """The row's name apart from its group: ``Outlet 1, level of plane``."""
        name, label = name_of(self.path), lowered(label_of(self.path))
        if self.change == "shape" and len(self.path) > 1:
            return f"{name}, shape"
        if self.label and name.endswith(f", {label}"):
            return name.removesuffix(label) + lowered(self.label)
        return name or self.label

    @property
    def rank(self) -> int:
        """Which of two rows at one path stands for it: that which holds its value, before a choice, before a word."""
        return ("action", "choice").index(self.kind) if self.kind in ("action", "choice") else 2


@dataclass(frozen=True, slots=True)
class Group:
    """One group of rows under a heading."""

    key: str
    path: Path
    rows: tuple[Row, ...]
    folds: bool = False


def plain_rows(path: Path, value: Any, only_text: bool = False) -> Iterator[Row]:
    """Return the rows of a part's plain attributes, in the order of the file; lists and parts are left out."""
    for key, attribute in attributes_of(type(value)).items():
        if only_text and "text" not in attribute.metadata:
            continue
        if not attribute.variants or attribute.metadata.get("or_part"):
            yield from plain_row((*path, key), attribute.metadata)


def plain_row(path: Path, facts: Mapping[str, Any], variant: str = "") -> Iterator[Row]:
    """Return the row of one attribute; none for an attribute that needs more than a line."""
    key = key_of(path)
    if key in words()["hidden"]:
        return
    label, tip = label_of(path, variant), tip_of(key, variant)
    default, required = as_typed(facts.get("default")), bool(facts.get("required"))
    untyped = untyped_of(key, variant)
    if key in words()["choices"]:
        yield choice_row(path, key, "set", default=default)
    elif "rows" in facts:
        yield Row(path, "table", label, required=required, tip=tip)
    elif "quantities" in facts:
        yield Row(path, "list", label, str(facts["quantities"]), default, tip=tip, untyped=untyped)
    elif "dimension" in facts:
        yield Row(path, "quantity", label, facts["dimension"], default, required, tip=tip, untyped=untyped)
    elif "number" in facts or "integer" in facts:
        whole = "integer" in facts
        yield Row(path, "number", label, default=default, required=required, whole=whole, tip=tip, untyped=untyped)
    elif "text" in facts:
        yield Row(path, "text", label, default=default, tip=tip, untyped=untyped)


def choice_row(path: Path, key: str, change: str, *, label: str = "", default: str = "") -> Row:
    """Return a row with the choices of an entry."""
    return Row(
        path,
        "choice",
        label or label_of(path),
        default=default,
        choices=choices_of(key),
        change=change,
        tip=tip_of(key),
    )


def add_row(path: Path, what: str) -> Row:
    """Return the word that adds a part to a list."""
    return Row(path, "action", "", choices=(("add", f"add {what}"),), change="add")


def part_row(path: Path, label: str, what: str) -> Row:
    """Return the line over one part of a list, with the word that takes it out."""
    return Row(path, "action", label, choices=(("remove", f"remove this {what}"),), change="remove")


def tip_of(key: str, variant: str = "") -> str:
    """Return what is said of an entry while it is pointed at."""
    tips = words()["tips"]
    tip: str = tips.get(f"{key}.{variant}") or tips.get(key, "")
    return tip


def untyped_of(key: str, variant: str = "") -> str:
    """Return what an empty line of an entry says."""
    said = words()["untyped"]
    found: str = said.get(f"{key}.{variant}") or said.get(key, "")
    return found


def as_typed(default: Any) -> str:
    """Return a default as it would be typed."""
    return "" if default is None else f"{default:g}" if isinstance(default, (int, float)) else str(default)
