"""The faults between the sound parts of a case."""

from __future__ import annotations

from collections.abc import Mapping
from typing import Any

from headfall.case import model
from headfall.case.defaults import effective
from headfall.case.faults import CaseError, Fault
from headfall.quantities import DisplayUnits, Quantity, display_units
from headfall.system.levels import LevelFault, level_of
from headfall.system.liquid import liquid_state
from headfall.system.outlet_faults import outlet_faults
from headfall.system.profiles import vessel_profile
from headfall.system.system import LEVEL_TOLERANCE
from headfall.vessel.profile import Profile


def find_faults(parts: Mapping[str, Any]) -> list[Fault]:
    """Return the faults between the sound parts of a case: levels and outlets against the vessel, liquid's range.

    ``parts`` may hold ``vessel``, ``levels``, ``outlets`` (None where an outlet is faulty), ``liquid`` and the other
    keys of a case, and ``units`` in which limits are told; parts that are missing or None are passed over.
    """
    faults = _liquid_faults(parts.get("liquid"))
    vessel, levels = parts.get("vessel"), parts.get("levels")
    display = display_units(parts.get("units") or "metric")
    profile = None
    if vessel is not None:
        try:
            profile = vessel_profile(vessel)
            # Some shapes work out their sizes only when asked: an impossible one must come to light here.
            _ = (profile.height, profile.capacity)
        except ValueError as problem:
            faults.append(Fault(("vessel",), str(problem).rstrip("."), "sizes of a shape that closes"))
    if levels is not None:
        faults += _level_faults(levels, profile, display)
        faults += _target_faults(parts.get("target"), levels, profile, display)
    outlets = parts.get("outlets") or ()
    for index, outlet in enumerate(outlets):
        if outlet is not None:
            faults += outlet_faults(("outlets", index), outlet, vessel, profile, display)
    faults += _receiver_faults(outlets, parts.get("inflow"), parts.get("headspace"))
    return faults


def _liquid_faults(liquid: model.Liquid | None) -> list[Fault]:
    try:
        liquid_state(liquid)
    except CaseError as refusal:
        return list(refusal.faults)
    return []


def _level_faults(levels: model.Levels, profile: Profile | None, display: DisplayUnits) -> list[Fault]:
    faults: list[Fault] = []
    datum = levels.site_datum.value if levels.site_datum else None
    found: dict[str, float] = {}
    for name in ("start", "stop", "overflow", "high"):
        typed: Quantity | None = getattr(levels, name)
        if typed is None:
            continue
        try:
            found[name] = level_of(typed, profile, datum)
        except LevelFault as problem:
            faults.append(Fault(("levels", name), problem.found, problem.wanted))
            continue
        if profile is not None and found[name] > profile.height * (1 + LEVEL_TOLERANCE):
            wanted = f"a level from 0 to {display.text(profile.height, 'level')}"
            faults.append(Fault(("levels", name), f"{typed.text} is above the top of the vessel", wanted))
    if "overflow" in found and levels.overflow is not None:
        slack = LEVEL_TOLERANCE * (profile.height if profile is not None else max(found["overflow"], 0.0))
        for name in ("start", "stop"):
            if name in found and found[name] > found["overflow"] + slack:
                what = f"{getattr(levels, name).text} is above the overflow level, {levels.overflow.text}"
                faults.append(Fault(("levels", name), what, "a level at or below overflow"))
    return faults


def _target_faults(
    target: model.Target | None, levels: model.Levels, profile: Profile | None, display: DisplayUnits
) -> list[Fault]:
    if target is None:
        return []
    faults = []
    datum = levels.site_datum.value if levels.site_datum else None
    typed = [(("target", "highest_level"), target.highest_level)]
    if target.flow_at is not None:
        typed.append((("target", "flow_at", "level"), target.flow_at.level))  # type: ignore[arg-type]
    for path, level in typed:
        if level is None:
            continue
        try:
            height = level_of(level, profile, datum)
        except LevelFault as problem:
            faults.append(Fault(path, problem.found, problem.wanted))
            continue
        if profile is not None and height > profile.height * (1 + LEVEL_TOLERANCE):
            wanted = f"a level from 0 to {display.text(profile.height, 'level')}"
            faults.append(Fault(path, f"{level.text} is above the top of the vessel", wanted))
    return faults


def _receiver_faults(outlets: Any, inflow: model.SteadyInflow | None, headspace: model.Headspace | None) -> list[Fault]:
    """A receiving vessel's level follows from the volume only where nothing else comes or goes."""
    faults = []
    for index, outlet in enumerate(outlets):
        if outlet is None or not isinstance(outlet.tailwater, model.ReceivingVessel):
            continue
        place = ("outlets", index, "tailwater")
        if len(outlets) > 1:
            found = "A receiving vessel beside other outlets is not built yet"
            faults.append(Fault(place, found, "Give the level as a height, or leave the other outlets out"))
        if inflow is not None and effective(inflow, "rate") > 0:
            found = "A receiving vessel while something flows in is not built yet"
            faults.append(Fault(place, found, "Give the level as a height, or take the inflow out"))
        faults += _receiving_vessel_faults(place, outlet.tailwater)
    return faults


def _receiving_vessel_faults(place: model.Path, typed: model.ReceivingVessel) -> list[Fault]:
    try:
        height = vessel_profile(typed.vessel).height
    except ValueError as problem:
        return [Fault((*place, "vessel"), str(problem).rstrip("."), "sizes of a shape that closes")]
    if typed.level.value > typed.elevation.value + height * (1 + LEVEL_TOLERANCE):
        found = f"{typed.level.text} is above the top of the receiving vessel"
        return [Fault((*place, "level"), found, "a level inside the receiving vessel")]
    return []
