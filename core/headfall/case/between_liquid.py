"""Faults between the entries of the liquid."""

from __future__ import annotations

from collections.abc import Collection, Mapping
from itertools import pairwise
from typing import Any

from headfall.case.faults import Fault
from headfall.case.model import Path
from headfall.case.typed_quantity import wanted_quantity

Values = Mapping[str, Any]

_STATE = {"density": "density", "viscosity": "dynamic_viscosity|kinematic_viscosity"}


def liquid_faults(values: Values, unsound: Collection[str], path: Path) -> list[Fault]:
    """Return the faults of a liquid that is described in part, twice, or not where it is asked about."""
    given = {key for key in (*_STATE, "vapour_pressure", "properties", "also_at") if key in values or key in unsound}
    state = [key for key in (*_STATE, "vapour_pressure") if key in given]
    faults = _property_faults(values.get("properties"), (*path, "properties"))
    if "properties" in given:
        if state:
            found = f"A {state[0].replace('_', ' ')} is given beside rows of properties"
            faults.append(Fault((*path, state[0]), found, "Leave it out, or leave the rows out"))
        return faults
    missing = [key for key in _STATE if key not in given]
    if len(missing) == 1:
        other = next(key for key in _STATE if key in given)
        found = f"A liquid with its own {other} needs its {missing[0]}"
        faults.append(Fault((*path, missing[0]), found, wanted_quantity(_STATE[missing[0]], "positive")))
    elif missing and state:
        found = "A vapour pressure alone describes no liquid"
        faults.append(Fault((*path, "vapour_pressure"), found, "Give a density and a viscosity too, or leave it out"))
    elif not missing and values.get("also_at"):
        found = "A liquid with one density and one viscosity is known at one temperature alone"
        faults.append(Fault((*path, "also_at"), found, "Leave it out, or give rows of properties instead"))
    return faults


def _property_faults(rows: Any, place: Path) -> list[Fault]:
    if rows is None:
        return []
    if not rows:
        return [Fault(place, "The list is empty", "at least one row of properties, or leave it out")]
    faults = []
    for index, (below, row) in enumerate(pairwise(rows), start=1):
        if row[0].value <= below[0].value:
            found = f"{row[0].text.strip()} is not above {below[0].text.strip()}, the temperature before it"
            faults.append(Fault((*place, index, 0), found, "temperatures that rise from row to row"))
    return faults
