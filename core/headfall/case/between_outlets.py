"""Faults between the entries of one orifice or pipe, and of what it discharges into."""

from __future__ import annotations

from collections.abc import Collection, Mapping
from typing import Any

from headfall.case.faults import Fault
from headfall.case.model import Path
from headfall.case.typed_quantity import wanted_quantity
from headfall.case.values import either

Values = Mapping[str, Any]

_TAKEN_BY = {"thickness": ("thick_plate", "short_tube"), "edge_radius": ("rounded",)}


def orifice_faults(values: Values, unsound: Collection[str], path: Path) -> list[Fault]:
    """Return the faults of sizes that an orifice's entry needs or does not take."""
    return _entry_faults(values, unsound, path, tuple(_TAKEN_BY))


def pipe_faults(values: Values, unsound: Collection[str], path: Path) -> list[Fault]:
    """Return the faults of a pipe: an edge radius its entry needs or does not take, and two kinds of friction."""
    needless = "entry_loss" in values or "entry_loss" in unsound
    return _entry_faults(values, unsound, path, ("edge_radius",), needless) + run_faults(values, unsound, path)


def run_faults(values: Values, _unsound: Collection[str], path: Path) -> list[Fault]:
    """Return the fault of a length of pipe with a roughness and a friction factor."""
    if "roughness" not in values or "friction_factor" not in values:
        return []
    found = "A friction factor is given beside a roughness"
    return [Fault((*path, "friction_factor"), found, "Leave one of the two out")]


def valve_faults(values: Values, unsound: Collection[str], path: Path) -> list[Fault]:
    """Return the fault of a valve without its flow coefficient or with two."""
    if "kv" in unsound or "cv" in unsound:
        return []
    given = [key for key in ("kv", "cv") if key in values]
    if not given:
        return [Fault(path, "The valve has no flow coefficient", "Give its kv or its cv")]
    if len(given) == 2:
        return [Fault((*path, "cv"), "A cv is given beside a kv", "Leave one of the two out")]
    return []


def receiving_faults(values: Values, _unsound: Collection[str], path: Path) -> list[Fault]:
    """Return the fault of a receiving vessel that starts below its lowest point."""
    elevation, level = values.get("elevation"), values.get("level")
    if elevation is None or level is None or level.value >= elevation.value:
        return []
    found = f"{level.text.strip()} is below the receiving vessel's lowest point, {elevation.text.strip()}"
    return [Fault((*path, "level"), found, "a height at that point or above it")]


def _entry_faults(
    values: Values, unsound: Collection[str], path: Path, names: tuple[str, ...], needless: bool = False
) -> list[Fault]:
    """Return the faults of sizes against the entry; ``needless`` where another entry makes them needless."""
    if "entry" in unsound:
        return []
    entry = values.get("entry") or "sharp_edged"
    faults = []
    for name in names:
        takers, words = _TAKEN_BY[name], name.replace("_", " ")
        if name in unsound:
            continue
        if entry in takers and name not in values and not needless:
            faults.append(Fault((*path, name), f"The entry {entry} needs its {words}", wanted_quantity("length")))
        elif entry not in takers and name in values:
            instead = f"Leave it out, or choose the entry {either(takers)}"
            faults.append(Fault((*path, name), f"The entry {entry} takes no {words}", instead))
    return faults
