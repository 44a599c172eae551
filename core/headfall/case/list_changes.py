"""One more part in a list of a case, or one less."""

from __future__ import annotations

from collections.abc import Callable
from typing import Any

from headfall.case.faults import place
from headfall.case.model import Case, Displacement, Fitting, Orifice, Path, Pipe, PipeSection, RoundOpening
from headfall.case.places import attribute_of, member_of, replace_at, value_at
from headfall.case.stand_ins import on_top_of
from headfall.case.typed_quantity import read_quantity
from headfall.quantities import Quantity, written
from headfall.quantities.units import known_unit

# How many of a list a case cannot do without.
_FEWEST = {"outlets": 1, "parts": 1, "rows": 2}
_DIGITS = 4
# A name of the handbook, which then gives the loss.
_FIRST_FITTING = "90° elbow"


def insert_part(case: Case, path: Path, index: int, part: Any = None) -> Case:
    """Return the case with one more part in the list at a path, which then stands at the index.

    Lists are outlets, fittings, sections, parts of a stack, displacement, rows of a table, rows of properties,
    ``also_at`` and ``times``. Without a ``part``, one is begun from its neighbours; the first row of a table, which
    must stand at level 0, is then kept in its place. Raises LookupError where there is no such list or index.
    """
    present = _list_at(case, path)
    if not 0 <= index <= len(present):
        raise LookupError(f"a case has nothing at {place((*path, index))}")
    if part is None:
        if path[-1] == "rows":
            index = max(index, min(1, len(present)))
        part = _BEGUN[str(path[-1])](case, path, present, index)
    return replace_at(case, path, (*present[:index], part, *present[index:]))


def remove_part(case: Case, path: Path) -> Case:
    """Return the case without one part of a list; ``path`` ends with its index.

    A list that may be left out is left out when its last part goes. Raises ValueError for a part that a case cannot do
    without and LookupError for one that is not there.
    """
    if len(path) < 2 or not isinstance(path[-1], int):
        raise LookupError(f"{place(path)} is not a part of a list")
    present, index = _list_at(case, path[:-1]), path[-1]
    member_of(present, index, path)
    if len(present) <= _FEWEST.get(str(path[-2]), 0):
        raise ValueError(f"{place(path[:-1])} must not be shorter")
    return replace_at(case, path[:-1], (*present[:index], *present[index + 1 :]) or None)


def _list_at(case: Case, path: Path) -> tuple[Any, ...]:
    if not path or path[-1] not in _BEGUN:
        raise LookupError(f"a case has no list at {place(path)}")
    attribute_of(case, path)
    return value_at(case, path) or ()


def _outlet(case: Case, _path: Path, present: tuple[Any, ...], index: int) -> Any:
    return present[max(index - 1, 0)] if present else Orifice(opening=RoundOpening(read_quantity("50 mm", "length")))


def _fitting(_case: Case, _path: Path, present: tuple[Any, ...], index: int) -> Any:
    return present[index - 1] if index else Fitting(_FIRST_FITTING)


def _section(case: Case, path: Path, present: tuple[Any, ...], index: int) -> PipeSection:
    before: Pipe | PipeSection = present[index - 1] if index else value_at(case, path[:-1])
    length = read_quantity("3 ft" if case.units == "us" else "1 m", "length")
    return PipeSection(bore=before.bore, length=before.length or length)


def _stack_part(_case: Case, _path: Path, present: tuple[Any, ...], index: int) -> Any:
    return on_top_of(present[max(index - 1, 0)])


def _displacement(case: Case, _path: Path, present: tuple[Any, ...], index: int) -> Any:
    if index:
        return present[index - 1]
    start = case.levels.start
    lowest = written(0.0, start.unit if start.dimension == "length" else "m", "length")
    top = start if start.dimension == "length" and start.value > 0 else written(1.0, lowest.unit, "length")
    return Displacement(lowest, top, read_quantity("1 US gal" if case.units == "us" else "10 L", "volume"))


def _row(case: Case, path: Path, present: tuple[Any, ...], index: int) -> tuple[Quantity, ...]:
    """Return a row halfway between its neighbours, or as far above the last as that is above the one before."""
    column = value_at(case, (*path[:-1], "column"))
    if index == len(present):
        low, high, part = present[index - 2], present[index - 1], 2.0
    else:
        low, high, part = present[index - 1], present[index], 0.5
    level = _along(low[0], high[0], part)
    if column == "volume":
        return level, _along(low[1], high[1], part)
    if index == len(present):
        return level, high[1]
    # Half of what was put in between the two, or the area halfway.
    nil = written(0.0, high[1].unit, high[1].dimension)
    return level, _along(low[1] if column == "area" else nil, high[1], part)


def _properties(case: Case, _path: Path, present: tuple[Any, ...], index: int) -> tuple[Quantity, ...]:
    if not present:
        temperature = case.liquid.temperature if case.liquid and case.liquid.temperature else None
        density, viscosity = read_quantity("1000 kg/m³", "density"), read_quantity("1 mPa·s", "dynamic_viscosity")
        return temperature or read_quantity("20 degC", "temperature"), density, viscosity
    like = present[max(index - 1, 0)]
    if 0 < index < len(present):
        return _along(like[0], present[index][0], 0.5), *like[1:]
    return _warmer(like[0], 10.0 if index else -10.0), *like[1:]


def _temperature(case: Case, _path: Path, present: tuple[Any, ...], index: int) -> Quantity:
    own = case.liquid.temperature if case.liquid and case.liquid.temperature else None
    before = present[index - 1] if index else own or read_quantity("20 degC", "temperature")
    return _warmer(before, 10.0)


def _time(_case: Case, _path: Path, present: tuple[Any, ...], index: int) -> Quantity:
    if not index:
        return read_quantity("10 min", "time")
    low = present[index - 2].value if index > 1 else 0.0
    last = present[index - 1]
    return written(2 * last.value - low if last.value > low else last.value + 600.0, last.unit, "time", _DIGITS)


def _along(low: Quantity, high: Quantity, part: float) -> Quantity:
    value = low.value + part * (high.value - low.value)
    if high.dimension == "temperature":
        return _temperature_in(value, high.unit)
    return written(value, high.unit, high.dimension, _DIGITS)


def _warmer(temperature: Quantity, kelvins: float) -> Quantity:
    return _temperature_in(max(temperature.value + kelvins, 1.0), temperature.unit)


def _temperature_in(value: float, unit: str) -> Quantity:
    """Return a temperature [K] in a unit, to a hundredth of a degree, which keeps residues of the offset away."""
    known = known_unit(unit, "temperature")
    if known is None:
        return written(value, unit, "temperature", _DIGITS)
    return read_quantity(f"{round(known.from_si(value), 2) + 0.0:g} {unit}", "temperature")


_BEGUN: dict[str, Callable[[Case, Path, tuple[Any, ...], int], Any]] = {
    "outlets": _outlet,
    "fittings": _fitting,
    "sections": _section,
    "parts": _stack_part,
    "displacement": _displacement,
    "rows": _row,
    "properties": _properties,
    "also_at": _temperature,
    "times": _time,
}
