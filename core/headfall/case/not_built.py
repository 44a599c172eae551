"""What the file format has room for and this version does not work out yet."""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass

from headfall.case.faults import Fault
from headfall.case.model import Path


def _always(_value: object) -> bool:
    return True


def _is(word: str) -> Callable[[object], bool]:
    return lambda value: value == word


def _is_a_list(value: object) -> bool:
    return isinstance(value, list)


def _is_not_empty(value: object) -> bool:
    return isinstance(value, list) and len(value) > 0


@dataclass(frozen=True, slots=True)
class NotBuilt:
    """One thing that comes later: its place without counting numbers, its name, what to do instead, and when."""

    place: str
    what: str
    instead: str
    when: Callable[[object], bool] = _always


_LEAVE_OUT = "Leave it out"

NOT_BUILT = (
    NotBuilt("outlets.coefficient.from_test", "coefficients from a field test are", "Give a range instead"),
    NotBuilt("outlets.tailwater.schedule", "tailwaters by a schedule are", "Give one level"),
    NotBuilt("outlets.valve.opening", "valves that open by a schedule are", "Give one fraction", _is_a_list),
    NotBuilt("outlets.sections.valve.opening", "valves that open by a schedule are", "Give one fraction", _is_a_list),
    NotBuilt("inflow.kind", "inflow schedules are", "Use a steady inflow", _is("schedule")),
    NotBuilt("structure.youngs_modulus", "checks of the shell against vacuum are", _LEAVE_OUT),
    NotBuilt("structure.design_vacuum", "checks of the shell against vacuum are", _LEAVE_OUT),
    NotBuilt("structure.design_level", "design levels of the structure are", _LEAVE_OUT),
    NotBuilt("structure.design_density", "design densities of the structure are", _LEAVE_OUT),
    NotBuilt("structure.support", "supports are", _LEAVE_OUT),
    NotBuilt("receiver", "receivers are", _LEAVE_OUT),
    NotBuilt("field_tests", "field tests are", "Leave them out or give an empty list", _is_not_empty),
)


def not_built_fault(path: Path, value: object) -> Fault | None:
    """Return the fault of a value that only a later version works out, or None."""
    words = [key for key in path if isinstance(key, str)]
    place = ".".join(words)
    for item in NOT_BUILT:
        if item.place == place and item.when(value):
            what = item.what[0].upper() + item.what[1:]
            return Fault(path, f"{what} not built yet", item.instead)
    return None
