"""Faults between the entries of one part of a case."""

from __future__ import annotations

from collections.abc import Callable, Collection, Mapping
from dataclasses import fields
from typing import Any

from headfall.case.faults import Fault
from headfall.case.model import CoefficientRange, Cone, Levels, Orifice, Path
from headfall.case.values import either, wanted_of

Values = Mapping[str, Any]

# Levels that differ by less than this part of the overflow level count as equal here; `system` knows the vessel.
_TOLERANCE = 1e-9

_TAKEN_BY = {"thickness": ("thick_plate", "short_tube"), "edge_radius": ("rounded",)}


def faults_between(part: type, values: Values, unsound: Collection[str], path: Path) -> list[Fault]:
    """Return the faults between the attributes of a part; those whose names are ``unsound`` are passed over."""
    rule = _RULES.get(part)
    return rule(values, unsound, path) if rule is not None else []


def _cone(values: Values, _unsound: Collection[str], path: Path) -> list[Fault]:
    diameters = [values.get("top_diameter"), values.get("bottom_diameter")]
    if any(diameter is None or diameter.value != 0 for diameter in diameters):
        return []
    return [Fault((*path, "top_diameter"), "Both diameters of the cone are nil", "one of them above nil")]


def _coefficient(values: Values, unsound: Collection[str], path: Path) -> list[Fault]:
    if unsound or len(values) < 3 or values["low"] <= values["typical"] <= values["high"]:
        return []
    found = f"{values['low']}, {values['typical']}, {values['high']} do not rise from low over typical to high"
    return [Fault(path, found, "low, typical and high in rising order")]


def _orifice(values: Values, unsound: Collection[str], path: Path) -> list[Fault]:
    if "entry" in unsound:
        return []
    entry = values.get("entry") or "sharp_edged"
    faults = []
    for name, takers in _TAKEN_BY.items():
        words = name.replace("_", " ")
        if name in unsound:
            continue
        if entry in takers and name not in values:
            metadata = next(item.metadata for item in fields(Orifice) if item.name == name)
            faults.append(Fault((*path, name), f"The entry {entry} needs its {words}", wanted_of(metadata)))
        elif entry not in takers and name in values:
            instead = f"Leave it out, or choose the entry {either(takers)}"
            faults.append(Fault((*path, name), f"The entry {entry} takes no {words}", instead))
    return faults


def _levels(values: Values, _unsound: Collection[str], path: Path) -> list[Fault]:
    overflow = values.get("overflow")
    if overflow is None:
        return []
    faults = []
    for name in ("start", "stop"):
        level = values.get(name)
        if level is not None and level.value > overflow.value * (1 + _TOLERANCE):
            found = f"The {name} level {level.text.strip()} stands above the overflow level {overflow.text.strip()}"
            faults.append(Fault((*path, name), found, "a level not above the overflow"))
    return faults


_RULES: dict[type, Callable[[Values, Collection[str], Path], list[Fault]]] = {
    Cone: _cone,
    CoefficientRange: _coefficient,
    Orifice: _orifice,
    Levels: _levels,
}
