"""Adding, copying and taking out outlets and the parts of lists, each as one step of undo."""

from __future__ import annotations

from dataclasses import replace

from headfall.case import editing
from headfall.case.model import Case, Orifice, Outlet, Path
from headfall_app.document import Document


def add_outlet(document: Document, after: int, copy: bool = False, kind: str = "") -> None:
    """Add an outlet after another one: a copy under another name, or of an opening one with all else default.

    ``kind`` asks for an ``orifice``, a ``pipe`` or a ``weir``: like the last of its kind, or else one as large as the
    outlet before, a weir with its crest at the overflow level.
    """
    case = document.case
    model = case.outlets[after]
    if kind and kind != model.kind:
        model = next((outlet for outlet in reversed(case.outlets) if outlet.kind == kind), model)
    name = _free_name(case, model.name or _FIRST_NAMES[model.kind])
    if copy or not isinstance(model, Orifice):
        outlet: Outlet = replace(model, name=name)
    else:
        outlet = Orifice(name=name, opening=model.opening, facing=model.facing, elevation=model.elevation)
    changed = editing.insert_outlet(case, after + 1, outlet)
    if kind and kind != model.kind:
        changed = _of_kind(changed, after + 1, kind)
    what = f"{'Copy' if copy else 'Add'} {_CALLED.get(kind, 'an outlet')}"
    document.change(changed, what, lambda path: shifted(path, ("outlets",), after + 1, 1))


_FIRST_NAMES = {"orifice": "drain", "pipe": "line", "weir": "weir"}
_CALLED = {"orifice": "an opening", "pipe": "a pipe", "weir": "a weir"}


def _of_kind(case: Case, index: int, kind: str) -> Case:
    case = editing.change_outlet_kind(case, index, kind)
    path: Path = ("outlets", index)
    brim = case.levels.overflow or case.levels.start
    if kind == "weir" and brim.dimension == "length":
        case = editing.replace_at(case, (*path, "crest"), brim)
        case = editing.replace_at(case, (*path, "role"), "overflow")
    taken = {outlet.name for at, outlet in enumerate(case.outlets) if at != index}
    name = _FIRST_NAMES[kind]
    return editing.replace_at(case, (*path, "name"), _free_name(case, name) if name in taken else name)


def remove_outlet(document: Document, index: int) -> str:
    """Take an outlet out; returns the sentence that says why not for the last one, else an empty text."""
    if len(document.case.outlets) == 1:
        return "This is the only outlet. A case needs one: add another before you remove it."
    document.change(
        editing.remove_outlet(document.case, index),
        "Remove an outlet",
        lambda path: left(path, ("outlets",), index),
    )
    return ""


def add_part(document: Document, path: Path, what: str) -> Path:
    """Add one more part to the end of a list; returns its path."""
    present = editing.value_at(document.case, path) or ()
    document.change(editing.insert_part(document.case, path, len(present)), what[0].upper() + what[1:])
    return (*path, len(present))


def remove_part(document: Document, path: Path, what: str) -> str:
    """Take a part out of a list; returns the sentence that says why not, else an empty text."""
    index = int(path[-1])
    try:
        changed = editing.remove_part(document.case, path)
    except ValueError:
        return "This one cannot be left out: the case needs it."
    document.change(changed, what[0].upper() + what[1:], lambda one: left(one, path[:-1], index))
    return ""


def left(path: Path, where: Path, index: int) -> Path | None:
    """Where an entry stands once a part of a list is taken out; None where it went with it."""
    return None if path[: len(where) + 1] == (*where, index) else shifted(path, where, index, -1)


def shifted(path: Path, where: Path, first: int, by: int) -> Path:
    depth = len(where)
    if path[:depth] != where or len(path) <= depth or int(path[depth]) < first:
        return path
    return (*where, int(path[depth]) + by, *path[depth + 1 :])


def _free_name(case: Case, like: str) -> str:
    taken = {outlet.name or "drain" for outlet in case.outlets}
    stem = like.rstrip("0123456789").rstrip()
    number = 2
    while f"{stem} {number}" in taken:
        number += 1
    return f"{stem} {number}"
