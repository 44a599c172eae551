"""The profile of a typed vessel."""

from __future__ import annotations

from dataclasses import replace
from functools import lru_cache

from headfall.case import model
from headfall.case.defaults import effective
from headfall.vessel import ends
from headfall.vessel.basin import Basin
from headfall.vessel.box import Box
from headfall.vessel.cone import Cone
from headfall.vessel.displaced import DisplacedVessel
from headfall.vessel.drum import Drum
from headfall.vessel.inclined_drum import InclinedDrum
from headfall.vessel.profile import Profile
from headfall.vessel.sizes import require_positive
from headfall.vessel.sloped_floor import SlopedBox, SlopedCylinder
from headfall.vessel.sphere import Sphere
from headfall.vessel.stack import Stack
from headfall.vessel.table import AreaTable, VolumeTable, volumes_from_increments
from headfall.vessel.upright_cylinder import UprightCylinder


@lru_cache(maxsize=64)
def vessel_profile(vessel: model.Vessel) -> Profile:
    """Return the profile of a vessel, kept between calls. Raises ValueError for a shape that cannot be."""
    profile = _shape(vessel)
    if vessel.displacement:
        bodies = [(body.from_.value, body.to.value, body.volume.value) for body in vessel.displacement]
        return DisplacedVessel(profile, bodies)
    return profile


def taken_from_sizes(vessel: model.Vessel) -> float:
    """Return what wall and lining take from an inside or outside size across the vessel [m], both sides together."""
    if isinstance(vessel, model.Basin | model.TableVessel | model.Stack):
        return 0.0
    lining: float = effective(vessel, "lining")
    wall: float = effective(vessel, "wall") if effective(vessel, "sizes") == "outside" else 0.0
    return 2 * (wall + lining)


def _shape(vessel: model.Vessel) -> Profile:
    taken = taken_from_sizes(vessel)
    if isinstance(vessel, model.UprightCylinder):
        return _upright_cylinder(vessel, _inside("diameter", vessel.diameter.value, taken))
    if isinstance(vessel, model.Box):
        length = _inside("length", vessel.length.value, taken)
        width = _inside("width", vessel.width.value, taken)
        if isinstance(vessel.floor, model.SlopedFloor):
            return SlopedBox(length, width, vessel.height.value, vessel.floor.fall.value)
        return Box(length, width, vessel.height.value)
    if isinstance(vessel, model.Cone):
        sizes = [
            0.0 if size.value == 0 else _inside("diameter", size.value, taken)
            for size in (vessel.top_diameter, vessel.bottom_diameter)
        ]
        return Cone(sizes[0], sizes[1], vessel.height.value)
    if isinstance(vessel, model.Drum):
        return _drum(vessel, _inside("diameter", vessel.diameter.value, taken))
    if isinstance(vessel, model.Sphere):
        return Sphere(_inside("diameter", vessel.diameter.value, taken))
    if isinstance(vessel, model.Basin):
        slope = vessel.side_slope
        along, across = slope if isinstance(slope, tuple) else (slope, slope)
        return Basin(vessel.base_length.value, vessel.base_width.value, along, across, vessel.depth.value)
    if isinstance(vessel, model.TableVessel):
        return _table(vessel)
    return Stack([vessel_profile(part) for part in vessel.parts])


def _inside(name: str, size: float, taken: float) -> float:
    """An inside size [m]; raises ImpossibleShapeError where wall and lining leave nothing."""
    if taken:
        require_positive(f"{name} inside wall and lining", size - taken)
    return size - taken


def _upright_cylinder(vessel: model.UprightCylinder, diameter: float) -> Profile:
    floor = vessel.floor
    if isinstance(floor, model.SlopedFloor):
        return SlopedCylinder(diameter, vessel.height.value, floor.fall.value)
    return UprightCylinder(diameter, vessel.height.value, _end(floor, diameter))


def _drum(vessel: model.Drum, diameter: float) -> Profile:
    low, high = vessel.heads if isinstance(vessel.heads, tuple) else (vessel.heads, vessel.heads)
    fall: float = effective(vessel, "fall")
    if fall == 0:
        return Drum(diameter, vessel.length.value, _end(low, diameter), _end(high, diameter))
    return InclinedDrum(diameter, vessel.length.value, _end(low, diameter), _end(high, diameter), fall)


def _table(vessel: model.TableVessel) -> Profile:
    levels = [row[0].value for row in vessel.rows]
    values = [row[1].value for row in vessel.rows]
    if vessel.column == "area":
        return AreaTable(levels, values, effective(vessel, "between"))
    return VolumeTable(levels, values if vessel.column == "volume" else volumes_from_increments(values))


def _end(end: model.Floor | None, diameter: float) -> ends.End:
    if isinstance(end, model.ConeEnd):
        cut: float = effective(end, "cut")
        return ends.cone(end.depth.value) if cut == 0 else ends.cone(end.depth.value, cut)
    if isinstance(end, model.EllipsoidalEnd):
        return ends.ellipsoidal(diameter, effective(end, "ratio"))
    if isinstance(end, model.TorisphericalEnd):
        return ends.torispherical(diameter, effective(end, "crown_ratio"), effective(end, "knuckle_ratio"))
    if isinstance(end, model.HemisphericalEnd):
        return ends.hemispherical(diameter)
    return ends.flat()


def invert_at(vessel: model.Vessel, station: float) -> float:
    """Return the height [m] of the shell's invert at a station of a drum that falls; nil of any other vessel."""
    if not isinstance(vessel, model.Drum) or effective(vessel, "fall") == 0:
        return 0.0
    profile = vessel_profile(replace(vessel, displacement=None))
    return profile.invert_at(station) if isinstance(profile, InclinedDrum) else 0.0
