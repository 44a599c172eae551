"""The faults of an outlet against its vessel and against the handbook."""

from __future__ import annotations

from headfall.case import model
from headfall.case.defaults import effective
from headfall.case.faults import Fault
from headfall.outlet.handbook_losses import fitting, fittings, material_roughness, materials
from headfall.quantities import DisplayUnits
from headfall.system.outlets import elevation_of, opening_sizes
from headfall.system.system import LEVEL_TOLERANCE
from headfall.vessel.profile import Profile


def outlet_faults(
    place: model.Path,
    outlet: model.Outlet,
    vessel: model.Vessel | None,
    profile: Profile | None,
    display: DisplayUnits,
) -> list[Fault]:
    """Return the faults of one outlet: its height and station against the vessel, its fittings and materials."""
    if isinstance(outlet, model.Weir):
        return _crest_faults(place, outlet, profile, display)
    faults = _station_faults(place, outlet, vessel)
    if profile is not None and vessel is not None and not faults:
        faults += _height_faults(place, outlet, vessel, profile, display)
    if isinstance(outlet, model.Pipe):
        faults += _pipe_faults(place, outlet)
    return faults


def _crest_faults(place: model.Path, weir: model.Weir, profile: Profile | None, display: DisplayUnits) -> list[Fault]:
    if profile is None or weir.crest.value < profile.height:
        return []
    wanted = f"a height from 0 to {display.text(profile.height, 'level')}"
    return [Fault((*place, "crest"), f"{weir.crest.text} is not below the top of the vessel", wanted)]


def _station_faults(place: model.Path, outlet: model.Orifice | model.Pipe, vessel: model.Vessel | None) -> list[Fault]:
    if outlet.station is None or vessel is None:
        return []
    if not isinstance(vessel, model.Drum):
        return [Fault((*place, "station"), "A station is given and the vessel is no drum", "Leave the station out")]
    if outlet.station.value > vessel.length.value:
        found = f"{outlet.station.text} is beyond the drum's length, {vessel.length.text}"
        return [Fault((*place, "station"), found, "a distance from the low tangent line")]
    return []


def _height_faults(
    place: model.Path,
    outlet: model.Orifice | model.Pipe,
    vessel: model.Vessel,
    profile: Profile,
    display: DisplayUnits,
) -> list[Fault]:
    slack, height = LEVEL_TOLERANCE * profile.height, profile.height
    elevation = elevation_of(outlet, vessel)
    text = outlet.elevation.text if outlet.elevation else "0 m"
    if elevation > height + slack:
        wanted = f"a height from 0 to {display.text(height, 'level')}"
        return [Fault((*place, "elevation"), f"{text} is above the top of the vessel", wanted)]
    if isinstance(outlet, model.Orifice) and effective(outlet, "facing") == "side":
        half = 0.5 * opening_sizes(outlet.opening)[2]
        if elevation - half < -slack or elevation + half > height + slack:
            found = f"A side opening with its centre at {text} reaches outside the vessel"
            lowest, highest = display.number(half, "level"), display.text(height - half, "level")
            wanted = f"a centre from {lowest} to {highest}" if 2 * half <= height else "a smaller opening"
            return [Fault((*place, "elevation"), found, wanted)]
    return []


def _pipe_faults(place: model.Path, pipe: model.Pipe) -> list[Fault]:
    faults = _run_faults(place, pipe)
    for index, section in enumerate(pipe.sections or ()):
        faults += _run_faults((*place, "sections", index), section)
    return faults


def _run_faults(place: model.Path, run: model.Pipe | model.PipeSection) -> list[Fault]:
    faults = []
    for index, typed in enumerate(run.fittings or ()):
        if typed.loss is None and fitting(typed.name or "") is None:
            known = "; ".join(known.name for known in fittings())
            found = f"{typed.name or 'a fitting without a name'} is not a fitting known here"
            where = (*place, "fittings", index, "name")
            faults.append(Fault(where, found[0].upper() + found[1:], f"Give its loss, or one of these names: {known}"))
    needed = run.material and run.roughness is None and run.friction_factor is None
    if needed and material_roughness(run.material or "") is None:
        found = f"{run.material} is not a material known here"
        wanted = f"Give the roughness, or choose from: {', '.join(materials())}"
        faults.append(Fault((*place, "material"), found, wanted))
    return faults
