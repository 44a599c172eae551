"""The outlets of a case in SI."""

from __future__ import annotations

import math

from headfall.case import model
from headfall.case.defaults import effective
from headfall.liquids import LiquidState
from headfall.outlet.entries import entry_coefficient
from headfall.outlet.orifice import OrificeOutlet
from headfall.outlet.outlet import Outlet
from headfall.system.pipes import build_pipe
from headfall.system.profiles import invert_at
from headfall.system.weirs import build_weir

_FULLY_TURBULENT = 1e5
"""From this Reynolds number d·√(2gH)/ν on, a handbook coefficient needs no correction."""


def opening_sizes(opening: model.Opening) -> tuple[str, float, float]:
    """Return shape, width and height of an opening [m]; a round one is as wide and high as its diameter."""
    if isinstance(opening, model.RoundOpening):
        return "round", opening.diameter.value, opening.diameter.value
    return "rectangle", opening.width.value, opening.height.value


def elevation_of(outlet: model.Orifice | model.Pipe, vessel: model.Vessel) -> float:
    """Return the height [m] of an opening or inlet: as typed, or a falling drum's invert at the outlet's station."""
    if outlet.elevation is None and outlet.station is not None:
        return invert_at(vessel, outlet.station.value)
    return float(effective(outlet, "elevation"))


def build_outlet(
    outlet: model.Outlet, vessel: model.Vessel, liquid: LiquidState, gravity: float, start: float
) -> Outlet:
    """Return an outlet in SI; ``start`` [m] is the level from which it is first used."""
    if isinstance(outlet, model.Pipe):
        return build_pipe(outlet, elevation_of(outlet, vessel), liquid, gravity)
    if isinstance(outlet, model.Weir):
        return build_weir(outlet, liquid, gravity)
    return _orifice(outlet, vessel, liquid, gravity, start)


def _orifice(
    outlet: model.Orifice, vessel: model.Vessel, liquid: LiquidState, gravity: float, start: float
) -> OrificeOutlet:
    shape, width, height = opening_sizes(outlet.opening)
    elevation = elevation_of(outlet, vessel)
    given = isinstance(outlet.coefficient, model.CoefficientRange)
    if isinstance(outlet.coefficient, model.CoefficientRange):
        own = outlet.coefficient
        low, typical, high, source = own.low, own.typical, own.high, "own_coefficient"
    else:
        radius = outlet.edge_radius.value if outlet.edge_radius else 0.0
        found = entry_coefficient(effective(outlet, "entry"), min(width, height), radius)
        low, typical, high, source = found.low, found.typical, found.high, found.source
    kinematic = liquid.viscosity / liquid.density
    fastest = math.sqrt(2 * gravity * max(start - elevation, 0.0))
    slow = not given and min(width, height) * fastest < _FULLY_TURBULENT * kinematic
    return OrificeOutlet(
        name=effective(outlet, "name"),
        shape=shape,
        facing=effective(outlet, "facing"),
        width=width,
        height=height,
        elevation=elevation,
        count=effective(outlet, "count"),
        coefficient_low=float(low or 0.0),
        coefficient_typical=float(typical or 0.0),
        coefficient_high=float(high or 0.0),
        coefficient_source=source,
        gravity=gravity,
        role=effective(outlet, "role"),
        blocked=effective(outlet, "blocked"),
        viscosity=kinematic if slow else 0.0,
        handbook=not given,
    )
