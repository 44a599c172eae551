"""Faults inside the parts of a case as it is being typed: what is missing, and entries that contradict one another."""

from __future__ import annotations

from collections.abc import Collection, Iterator
from dataclasses import is_dataclass
from typing import Any

from headfall.case.attributes import attributes_of
from headfall.case.between import faults_between
from headfall.case.faults import Fault
from headfall.case.model import Case, Path
from headfall.case.values import wanted_of
from headfall.quantities import Quantity


def entry_faults(case: Case, wrong: Collection[Path] = ()) -> tuple[Fault, ...]:
    """Return the faults inside every part of a case.

    These are the ones that reading its file would find; ``wrong`` are entries that could not be read, whose stand-ins
    are passed over.
    """
    return tuple(fault for fault in _faults(case, (), wrong) if not _is_over_wrong(fault, wrong))


def without_wrong(faults: Collection[Fault], wrong: Collection[Path]) -> tuple[Fault, ...]:
    """Return the faults that do not come of a stand-in: those at no wrong entry nor at what one stands in."""
    return tuple(fault for fault in faults if not _is_over_wrong(fault, wrong))


def _is_over_wrong(fault: Fault, wrong: Collection[Path]) -> bool:
    return any(path[: len(fault.path)] == fault.path for path in wrong)


def _faults(part: Any, path: Path, wrong: Collection[Path]) -> Iterator[Fault]:
    values: dict[str, Any] = {}
    for key, attribute in attributes_of(type(part)).items():
        value = getattr(part, attribute.name)
        if value is not None:
            values[key] = value
            yield from _faults_below(value, (*path, key), wrong)
        elif attribute.required and not attribute.variants:
            yield Fault((*path, key), "Nothing is typed", wanted_of(attribute.metadata))
    depth = len(path)
    unsound = {str(entry[depth]) for entry in wrong if entry[:depth] == path and len(entry) > depth}
    sound = {key: value for key, value in values.items() if key not in unsound}
    yield from faults_between(type(part), sound, unsound, path)


def _faults_below(value: Any, path: Path, wrong: Collection[Path]) -> Iterator[Fault]:
    if isinstance(value, Quantity):
        return
    if is_dataclass(value):
        yield from _faults(value, path, wrong)
    elif isinstance(value, tuple):
        for index, member in enumerate(value):
            yield from _faults_below(member, (*path, index), wrong)
