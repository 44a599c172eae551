"""A case, made physical: vessel, outlets, headspace, inflow and liquid in SI; and its faults between entries."""

from __future__ import annotations

from headfall.system.build import build_system
from headfall.system.faults import find_faults
from headfall.system.levels import level_of
from headfall.system.profiles import vessel_profile
from headfall.system.system import FlowLimit, System

__all__ = ["FlowLimit", "System", "build_system", "find_faults", "level_of", "vessel_profile"]
