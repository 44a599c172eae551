"""A case, made physical: vessel profile, outlets, inflow and liquid, in SI."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass, fields
from functools import lru_cache
from typing import Any

from headfall.case import model
from headfall.case.defaults import effective
from headfall.case.faults import CaseError, Fault
from headfall.liquids import LiquidState, water
from headfall.outlet.entries import entry_coefficient
from headfall.outlet.orifice import OrificeOutlet
from headfall.quantities import DisplayUnits, display_units
from headfall.vessel import ends
from headfall.vessel.box import Box
from headfall.vessel.cone import Cone
from headfall.vessel.drum import Drum
from headfall.vessel.profile import Profile
from headfall.vessel.sphere import Sphere
from headfall.vessel.upright_cylinder import UprightCylinder

LEVEL_TOLERANCE = 1e-9
"""Comparisons of levels forgive this part of the vessel's height."""


@dataclass(frozen=True, slots=True)
class System:
    """What the solvers need, SI throughout. ``overflow`` is always a number (the top where none was typed)."""

    profile: Profile
    outlets: tuple[OrificeOutlet, ...]
    inflow: float
    liquid: LiquidState
    start: float
    stop: float
    overflow: float
    high: float | None
    drain_time: float | None
    gravity: float
    pressure: float
    headspace_declared: bool

    @property
    def tolerance(self) -> float:
        """How far apart levels may be and still count as equal [m]."""
        return LEVEL_TOLERANCE * self.profile.height


def build_system(case: model.Case) -> System:
    """Return the case in SI. Raises CaseError with every fault between its entries."""
    faults = find_faults({item.name: getattr(case, item.name) for item in fields(case)})
    if faults:
        raise CaseError(faults)
    profile = vessel_profile(case.vessel)
    surroundings = case.surroundings or model.Surroundings()
    gravity = effective(surroundings, "gravity")
    levels = case.levels
    return System(
        profile=profile,
        outlets=tuple(_outlet(outlet, gravity) for outlet in case.outlets),
        inflow=effective(case.inflow or model.SteadyInflow(), "rate"),
        liquid=water(effective(case.liquid or model.Liquid(), "temperature")),
        start=levels.start.value,
        stop=levels.stop.value,
        overflow=min(levels.overflow.value, profile.height) if levels.overflow else profile.height,
        high=levels.high.value if levels.high else None,
        drain_time=case.target.drain_time.value if case.target and case.target.drain_time else None,
        gravity=gravity,
        pressure=effective(surroundings, "pressure"),
        headspace_declared=case.headspace is not None,
    )


@lru_cache(maxsize=64)
def vessel_profile(vessel: model.Vessel) -> Profile:
    """Return the profile of a vessel, kept between calls. Raises ValueError for a shape that cannot be."""
    if isinstance(vessel, model.UprightCylinder):
        diameter = vessel.diameter.value
        return UprightCylinder(diameter, vessel.height.value, _end(vessel.floor, diameter))
    if isinstance(vessel, model.Box):
        return Box(vessel.length.value, vessel.width.value, vessel.height.value)
    if isinstance(vessel, model.Cone):
        return Cone(vessel.top_diameter.value, vessel.bottom_diameter.value, vessel.height.value)
    if isinstance(vessel, model.Drum):
        diameter = vessel.diameter.value
        low, high = vessel.heads if isinstance(vessel.heads, tuple) else (vessel.heads, vessel.heads)
        return Drum(diameter, vessel.length.value, _end(low, diameter), _end(high, diameter))
    return Sphere(vessel.diameter.value)


def _end(end: model.End | None, diameter: float) -> ends.End:
    if isinstance(end, model.ConeEnd):
        return ends.cone(end.depth.value)
    if isinstance(end, model.EllipsoidalEnd):
        return ends.ellipsoidal(diameter, effective(end, "ratio"))
    if isinstance(end, model.TorisphericalEnd):
        return ends.torispherical(diameter, effective(end, "crown_ratio"), effective(end, "knuckle_ratio"))
    if isinstance(end, model.HemisphericalEnd):
        return ends.hemispherical(diameter)
    return ends.flat()


def _sizes(opening: model.Opening) -> tuple[str, float, float]:
    """Shape, width and height of an opening [m]; a round one is as wide and high as its diameter."""
    if isinstance(opening, model.RoundOpening):
        return "round", opening.diameter.value, opening.diameter.value
    return "rectangle", opening.width.value, opening.height.value


def _outlet(outlet: model.Orifice, gravity: float) -> OrificeOutlet:
    shape, width, height = _sizes(outlet.opening)
    if isinstance(outlet.coefficient, model.CoefficientRange):
        given = outlet.coefficient
        low, typical, high, source = given.low, given.typical, given.high, "own_coefficient"
    else:
        radius = outlet.edge_radius.value if outlet.edge_radius else 0.0
        found = entry_coefficient(effective(outlet, "entry"), min(width, height), radius)
        low, typical, high, source = found.low, found.typical, found.high, found.source
    return OrificeOutlet(
        name=effective(outlet, "name"),
        shape=shape,
        facing=effective(outlet, "facing"),
        width=width,
        height=height,
        elevation=effective(outlet, "elevation"),
        count=effective(outlet, "count"),
        coefficient_low=float(low or 0.0),
        coefficient_typical=float(typical or 0.0),
        coefficient_high=float(high or 0.0),
        coefficient_source=source,
        gravity=gravity,
    )


# Faults between entries -----------------------------------------------------------------------------------------------


def find_faults(parts: Mapping[str, Any]) -> list[Fault]:
    """Return the faults between the sound parts of a case: levels and openings against the vessel, liquid's range.

    ``parts`` may hold ``vessel``, ``levels``, ``outlets`` (None where an outlet is faulty), ``liquid``, and ``units``
    in which limits are told; parts that are missing or None are passed over.
    """
    faults = _liquid_faults(parts.get("liquid"))
    vessel, levels = parts.get("vessel"), parts.get("levels")
    display = display_units(parts.get("units") or "metric")
    height = None
    if vessel is not None:
        try:
            height = vessel_profile(vessel).height
        except ValueError as problem:
            faults.append(Fault(("vessel",), str(problem).rstrip("."), "sizes of a shape that closes"))
    if levels is not None:
        faults += _level_faults(levels, height, display)
    for index, outlet in enumerate(parts.get("outlets") or ()):
        if outlet is not None:
            faults += _outlet_faults(("outlets", index), outlet, vessel, height, display)
    return faults


def _liquid_faults(liquid: model.Liquid | None) -> list[Fault]:
    if liquid is None or liquid.temperature is None:
        return []
    try:
        water(liquid.temperature.value)
    except ValueError:
        return [
            Fault(
                ("liquid", "temperature"),
                f"Water at {liquid.temperature.text} is outside the built-in range",
                "a temperature from 0 to 100 °C",
            )
        ]
    return []


def _level_faults(levels: model.Levels, height: float | None, display: DisplayUnits) -> list[Fault]:
    faults = []
    slack = LEVEL_TOLERANCE * (height or max(levels.start.value if levels.start else 0.0, 0.0))
    typed = [(name, getattr(levels, name)) for name in ("start", "stop", "overflow", "high")]
    for name, level in typed:
        if level is not None and height is not None and level.value > height + slack:
            found = f"{level.text} is above the top of the vessel"
            faults.append(Fault(("levels", name), found, f"a level from 0 to {display.text(height, 'level')}"))
    if levels.overflow is not None:
        for name in ("start", "stop"):
            level = getattr(levels, name)
            if level is not None and level.value > levels.overflow.value + slack:
                found = f"{level.text} is above the overflow level, {levels.overflow.text}"
                faults.append(Fault(("levels", name), found, "a level at or below overflow"))
    return faults


def _outlet_faults(
    place: model.Path,
    outlet: model.Orifice,
    vessel: model.Vessel | None,
    height: float | None,
    display: DisplayUnits,
) -> list[Fault]:
    faults = []
    slack = LEVEL_TOLERANCE * (height or 0.0)
    elevation = effective(outlet, "elevation")
    text = outlet.elevation.text if outlet.elevation else "0 m"
    if height is not None and elevation > height + slack:
        wanted = f"a height from 0 to {display.text(height, 'level')}"
        faults.append(Fault((*place, "elevation"), f"{text} is above the top of the vessel", wanted))
    elif height is not None and effective(outlet, "facing") == "side":
        half = 0.5 * _sizes(outlet.opening)[2]
        if elevation - half < -slack or elevation + half > height + slack:
            found = f"A side opening with its centre at {text} reaches outside the vessel"
            lowest, highest = display.number(half, "level"), display.text(height - half, "level")
            wanted = f"a centre from {lowest} to {highest}" if 2 * half <= height else "a smaller opening"
            faults.append(Fault((*place, "elevation"), found, wanted))
    if outlet.station is not None and vessel is not None:
        if not isinstance(vessel, model.Drum):
            faults.append(
                Fault((*place, "station"), "A station is given and the vessel is no drum", "Leave the station out")
            )
        elif outlet.station.value > vessel.length.value:
            found = f"{outlet.station.text} is beyond the drum's length, {vessel.length.text}"
            faults.append(Fault((*place, "station"), found, "a distance from the low tangent line"))
    return faults
