"""What the file format has room for and this version does not work out yet."""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass

from headfall.case.faults import Fault
from headfall.case.model import Path
from headfall.quantities import Quantity


def _always(_value: object) -> bool:
    return True


def _is(word: str) -> Callable[[object], bool]:
    return lambda value: value == word


def _is_other_than(word: str) -> Callable[[object], bool]:
    return lambda value: isinstance(value, str) and value != word


def _is_not_nil(value: object) -> bool:
    if isinstance(value, Quantity):
        return value.value != 0
    return isinstance(value, int | float) and not isinstance(value, bool) and value != 0


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
_LIQUID = "Leave it out; the properties of water follow from its temperature"

NOT_BUILT = (
    NotBuilt("vessel.shape", "basins are", "Use another shape", _is("basin")),
    NotBuilt("vessel.shape", "stacks of vessels are", "Use a single shape", _is("stack")),
    NotBuilt("vessel.shape", "vessels from a table are", "Use a shape with sizes", _is("table")),
    NotBuilt("vessel.displacement", "displacements in a vessel are", _LEAVE_OUT),
    NotBuilt("vessel.floor.form", "sloped floors are", "Use another form", _is("sloped")),
    NotBuilt("vessel.fall", "drums that fall to one end are", "Leave it out or type 0 m", _is_not_nil),
    NotBuilt("liquid.name", "liquids other than water are", "Use water", _is_other_than("water")),
    NotBuilt("liquid.density", "liquids with a density of their own are", _LIQUID),
    NotBuilt("liquid.viscosity", "liquids with a viscosity of their own are", _LIQUID),
    NotBuilt("liquid.vapour_pressure", "liquids with a vapour pressure of their own are", _LIQUID),
    NotBuilt("outlets.kind", "pipes are", "Use an orifice", _is("pipe")),
    NotBuilt("outlets.kind", "weirs are", "Use an orifice", _is("weir")),
    NotBuilt("outlets.tailwater", "tailwaters are", _LEAVE_OUT),
    NotBuilt("outlets.blocked", "blocked openings are", "Leave it out or give 0", _is_not_nil),
    NotBuilt("outlets.role", "overflow outlets are", "Use the role drain", _is("overflow")),
    NotBuilt("outlets.coefficient.from_test", "coefficients from a field test are", "Give a range instead"),
    NotBuilt("inflow.kind", "inflow schedules are", "Use a steady inflow", _is("schedule")),
    NotBuilt("headspace.kind", "pressurised headspaces are", "Use an open headspace", _is("pressurised")),
    NotBuilt("headspace.kind", "closed headspaces are", "Use an open headspace", _is("closed")),
    NotBuilt("headspace.kind", "vented headspaces are", "Use an open headspace", _is("vented")),
    NotBuilt("target.highest_level", "targets for the highest level are", _LEAVE_OUT),
    NotBuilt("target.flow_at", "targets for the flow at a level are", _LEAVE_OUT),
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
