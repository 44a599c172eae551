"""From a case to a system."""

from __future__ import annotations

from dataclasses import fields

import numpy as np

from headfall.case import model
from headfall.case.defaults import effective
from headfall.case.faults import CaseError
from headfall.discharge import Receiver, Tailwater
from headfall.liquids import LiquidState
from headfall.outlet.headspace import (
    ClosedHeadspace,
    Headspace,
    OpenHeadspace,
    PressurisedHeadspace,
    VentedHeadspace,
    air_density,
)
from headfall.system.faults import find_faults
from headfall.system.levels import level_of
from headfall.system.liquid import liquid_state
from headfall.system.outlets import build_outlet
from headfall.system.profiles import vessel_profile
from headfall.system.system import FlowLimit, System
from headfall.vessel.profile import Profile

_FILM_OF_GAS = 1e-9


def build_system(case: model.Case, temperature: float | None = None) -> System:
    """Return the case in SI, with its liquid at its own temperature or at another one [K].

    Raises CaseError with every fault between its entries.
    """
    faults = find_faults({item.name: getattr(case, item.name) for item in fields(case)})
    if faults:
        raise CaseError(faults)
    profile = vessel_profile(case.vessel)
    surroundings = case.surroundings or model.Surroundings()
    gravity, pressure = effective(surroundings, "gravity"), effective(surroundings, "pressure")
    liquid = liquid_state(case.liquid, temperature)
    levels, target = case.levels, case.target or model.Target()
    datum = levels.site_datum.value if levels.site_datum else None
    start = level_of(levels.start, profile, datum)
    overflow = level_of(levels.overflow, profile, datum) if levels.overflow else profile.height
    flow_at = target.flow_at
    return System(
        profile=profile,
        outlets=tuple(build_outlet(outlet, case.vessel, liquid, gravity, start) for outlet in case.outlets),
        inflow=effective(case.inflow or model.SteadyInflow(), "rate"),
        liquid=liquid,
        start=start,
        stop=level_of(levels.stop, profile, datum),
        overflow=min(overflow, profile.height),
        high=level_of(levels.high, profile, datum) if levels.high else None,
        drain_time=target.drain_time.value if target.drain_time else None,
        gravity=gravity,
        pressure=pressure,
        headspace_declared=case.headspace is not None,
        headspace=_headspace(case.headspace, profile, liquid, gravity, pressure, start),
        tailwaters=tuple(_tailwater(outlet.tailwater, profile, start) for outlet in case.outlets),
        highest_level=level_of(target.highest_level, profile, datum) if target.highest_level else None,
        flow_limit=FlowLimit(level_of(flow_at.level, profile, datum), flow_at.flow.value) if flow_at else None,
        site_datum=datum,
    )


def _headspace(
    typed: model.Headspace | None,
    profile: Profile,
    liquid: LiquidState,
    gravity: float,
    pressure: float,
    start: float,
) -> Headspace:
    weight = liquid.density * gravity
    if isinstance(typed, model.PressurisedHeadspace):
        return PressurisedHeadspace(typed.gauge_pressure.value / weight)
    if isinstance(typed, model.ClosedHeadspace):
        # A vessel that is brim-full has a film of gas all the same: its vacuum comes with the first drop that leaves.
        whole = profile.capacity * (1 + _FILM_OF_GAS)
        room = whole - float(profile.volume(np.array(start)))
        return ClosedHeadspace(lambda level: whole - profile.volume(level), room, pressure / weight)
    if isinstance(typed, model.VentedHeadspace):
        deepest = max(pressure - (liquid.vapour_pressure or 0.0), 0.0) / weight
        area = np.pi / 4 * typed.bore.value**2
        return VentedHeadspace(
            float(area), effective(typed, "coefficient"), air_density(pressure), liquid.density, gravity, deepest
        )
    return OpenHeadspace()


def _tailwater(typed: model.Tailwater | None, profile: Profile, start: float) -> Tailwater:
    if typed is None:
        return -np.inf
    if isinstance(typed, model.ReceivingVessel):
        receiver = vessel_profile(typed.vessel)
        elevation = typed.elevation.value
        held = float(receiver.volume(np.array(typed.level.value - elevation)))
        return Receiver(receiver, profile, elevation, held, start)
    return typed.value
