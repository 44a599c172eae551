"""The rows of a vessel: that of the case, a part of a stack, or a receiving vessel."""

from __future__ import annotations

from collections.abc import Iterator
from typing import Any

from headfall.case.attributes import attributes_of
from headfall.case.model import Path, Stack, TableVessel
from headfall_app.entry.plan_rows import Row, add_row, choice_row, part_row, plain_row, plain_rows
from headfall_app.words import choices_of, label_of

_BESIDE = ("sizes", "wall", "lining", "displacement")


def vessel_rows(path: Path, vessel: Any) -> Iterator[Row]:
    """Return shape, sizes, ends and parts of a vessel; wall, lining and internals stand in rows of their own."""
    within = len(path) > 1
    key = "vessel.parts.shape" if "parts" in path else "vessel.shape"
    yield choice_row(path, key, "shape", label=label_of(("vessel", "shape")))
    for name, attribute in attributes_of(type(vessel)).items():
        here = (*path, name)
        if name in _BESIDE:
            continue
        if "end" in attribute.metadata:
            yield from _end_rows(here, vessel, name, attribute.metadata)
        elif name == "parts" and isinstance(vessel, Stack):
            yield from _stack_rows(here, vessel)
        elif name == "column":
            yield choice_row(here, "vessel.column", "column")
        elif name == "between" and not _holds_areas(vessel):
            continue
        else:
            yield from plain_row(here, attribute.metadata)
    if within:
        yield from beside_rows(path, vessel, only_typed=True)


def has_inside(vessel: Any) -> bool:
    """Whether anything was typed of the wall, the lining and what takes space inside."""
    return any(getattr(vessel, name, None) is not None for name in _BESIDE)


def beside_rows(path: Path, vessel: Any, only_typed: bool = False) -> Iterator[Row]:
    """Return the rows for wall and lining, and for what takes space inside.

    With ``only_typed`` a word stands for a wall and lining that are not.
    """
    known = attributes_of(type(vessel))
    wall = [name for name in ("sizes", "wall", "lining") if name in known]
    if only_typed and all(getattr(vessel, name) is None for name in wall):
        if wall:
            yield Row((*path, "sizes"), "action", "", choices=(("inside", "wall and lining"),), change="begin")
        wall = []
    for name in wall:
        yield from plain_row((*path, name), known[name].metadata)
    for index, body in enumerate(vessel.displacement or ()):
        here = (*path, "displacement", index)
        yield part_row(here, f"Internals {index + 1}", "body")
        yield from plain_rows(here, body)
    if not only_typed:
        yield add_row((*path, "displacement"), "space taken inside")


def _holds_areas(table: TableVessel) -> bool:
    """Whether a rule between the rows means anything: only areas are joined by one."""
    return table.column == "area" or (table.column is None and table.rows[0][1].dimension == "area")


def _stack_rows(path: Path, stack: Stack) -> Iterator[Row]:
    for index, part in enumerate(stack.parts):
        here = (*path, index)
        yield part_row(here, f"Part {index + 1}{', lowest' if index == 0 else ''}", "part")
        yield from vessel_rows(here, part)
    yield add_row(path, "a part on top")


def _end_rows(path: Path, vessel: Any, name: str, metadata: Any) -> Iterator[Row]:
    value = getattr(vessel, name)
    key = "floor.box" if vessel.shape == "box" else "floor" if name == "floor" else "end"
    choices = choices_of(key) + (choices_of("pair") if metadata.get("pair") else ())
    yield Row(path, "choice", label_of(path), default=metadata["default"], choices=choices, change="end")
    if isinstance(value, tuple):
        for index, end in enumerate(value):
            yield Row((*path, index), "choice", label_of((*path, index)), choices=choices_of("end"), change="end")
            yield from _sizes((*path, index), end, name)
    elif value is not None:
        yield from _sizes(path, value, name)


def _sizes(path: Path, end: Any, name: str) -> Iterator[Row]:
    # Only a floor is cut off at the bore of its outlet.
    return (row for row in plain_rows(path, end) if row.path[-1] != "cut" or name == "floor")
