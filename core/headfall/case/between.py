"""Faults between the entries of one part of a case."""

from __future__ import annotations

from collections.abc import Callable, Collection, Mapping
from typing import Any

from headfall.case.between_liquid import liquid_faults
from headfall.case.between_outlets import orifice_faults, pipe_faults, receiving_faults, run_faults, valve_faults
from headfall.case.between_vessels import basin_faults, cone_faults, displacement_faults, table_faults
from headfall.case.between_weirs import weir_faults
from headfall.case.faults import Fault
from headfall.case.model import (
    Basin,
    CoefficientRange,
    Cone,
    Displacement,
    Levels,
    Liquid,
    LossRange,
    Orifice,
    Path,
    Pipe,
    PipeSection,
    ReceivingVessel,
    TableVessel,
    Valve,
    Weir,
)
from headfall.case.typed_quantity import wanted_quantity

Values = Mapping[str, Any]

# Levels that differ by less than this part of the overflow level count as equal here; `system` knows the vessel.
_TOLERANCE = 1e-9


def faults_between(part: type, values: Values, unsound: Collection[str], path: Path) -> list[Fault]:
    """Return the faults between the attributes of a part; those whose keys are ``unsound`` are passed over."""
    rule = _RULES.get(part)
    return rule(values, unsound, path) if rule is not None else []


def _range(values: Values, unsound: Collection[str], path: Path) -> list[Fault]:
    if unsound or len(values) < 3 or values["low"] <= values["typical"] <= values["high"]:
        return []
    found = f"{values['low']}, {values['typical']}, {values['high']} do not rise from low over typical to high"
    return [Fault(path, found, "low, typical and high in rising order")]


def _levels(values: Values, unsound: Collection[str], path: Path) -> list[Fault]:
    faults = []
    overflow = values.get("overflow")
    for name in ("start", "stop"):
        level = values.get(name)
        # Percentages, volumes and heights on the site's datum can be compared only where the vessel is known.
        if level is None or overflow is None or {level.dimension, overflow.dimension} != {"length"}:
            continue
        if level.value > overflow.value * (1 + _TOLERANCE):
            found = f"The {name} level {level.text.strip()} stands above the overflow level {overflow.text.strip()}"
            faults.append(Fault((*path, name), found, "a level not above the overflow"))
    if "site_datum" in values or "site_datum" in unsound:
        return faults
    for name in ("start", "stop", "overflow", "high"):
        level = values.get(name)
        if level is not None and level.dimension == "site":
            found = f"{level.text.strip()} counts on the site datum, which is not given"
            wanted = "Give the site datum too, or type a height above the vessel's lowest inside point"
            faults.append(Fault((*path, name), found, wanted))
    if values.get("shown") == "site":
        found = "Levels are to be shown on the site datum, which is not given"
        faults.append(Fault((*path, "site_datum"), found, wanted_quantity("length")))
    return faults


_RULES: dict[type, Callable[[Values, Collection[str], Path], list[Fault]]] = {
    Basin: basin_faults,
    CoefficientRange: _range,
    Cone: cone_faults,
    Displacement: displacement_faults,
    Levels: _levels,
    Liquid: liquid_faults,
    LossRange: _range,
    Orifice: orifice_faults,
    Pipe: pipe_faults,
    PipeSection: run_faults,
    ReceivingVessel: receiving_faults,
    TableVessel: table_faults,
    Valve: valve_faults,
    Weir: weir_faults,
}
