"""Another liquid, another headspace, a limit of the flow: what a case begins with when a person chooses one."""

from __future__ import annotations

from dataclasses import replace
from typing import Any

from headfall.case.model import (
    Case,
    ClosedHeadspace,
    FlowAt,
    Liquid,
    OpenHeadspace,
    PressurisedHeadspace,
    Target,
    VentedHeadspace,
)
from headfall.case.outlet_changes import as_bore, size_of
from headfall.case.places import replace_at
from headfall.case.typed_quantity import read_quantity
from headfall.quantities import Quantity

_OWN, _OWN_TABLE = "own", "own_table"
_OWN_NAME = "own liquid"
# About water at 20 °C, to be typed over: metric and US.
_BEGINNINGS = {"metric": ("1000 kg/m³", "1 mPa·s"), "us": ("62.4 lb/ft³", "1 cP")}
_VISCOSITY = "dynamic_viscosity|kinematic_viscosity"
_HEADSPACES = ("open", "pressurised", "closed", "vented")


def change_liquid(case: Case, liquid: str) -> Case:
    """Return the case with another liquid: a built-in one by its name, ``own`` for one state, ``own_table`` for rows.

    The temperature stays as typed; the temperatures it is also asked at stay where they can. One state becomes the
    first row and the first row becomes the one state.
    """
    former = case.liquid or Liquid()
    present = _OWN_TABLE if former.properties is not None else _OWN if former.density is not None else former.name
    if liquid == (present or "water"):
        return case
    if liquid not in (_OWN, _OWN_TABLE):
        return replace(case, liquid=Liquid(liquid, former.temperature, also_at=former.also_at))
    name = former.name if present in (_OWN, _OWN_TABLE) else _OWN_NAME
    temperature, density, viscosity, *vapour = _state(former, case.units or "metric")
    if liquid == _OWN_TABLE:
        rows = ((temperature, density, viscosity, *vapour),)
        return replace(case, liquid=Liquid(name, former.temperature, properties=rows, also_at=former.also_at))
    own = Liquid(name, former.temperature, density, viscosity, vapour[0] if vapour else None)
    return replace(case, liquid=own)


def change_headspace(case: Case, kind: str) -> Case:
    """Return the case with another headspace: ``open``, ``pressurised``, ``closed``, ``vented``; empty for undeclared.

    A pressurised one begins at nil gauge pressure, a vented one with a vent as wide as the first outlet. Raises
    LookupError for another word.
    """
    if kind and kind not in _HEADSPACES:
        raise LookupError(f"{kind} is not one of {', '.join(_HEADSPACES)}")
    if kind == (case.headspace.kind if case.headspace else ""):
        return case
    headspace: Any = None
    if kind == "pressurised":
        headspace = PressurisedHeadspace(read_quantity("0 psi" if case.units == "us" else "0 kPa", "pressure"))
    elif kind == "vented":
        headspace = VentedHeadspace(as_bore(size_of(case.outlets[0])))
    elif kind:
        headspace = OpenHeadspace() if kind == "open" else ClosedHeadspace()
    return replace(case, headspace=headspace)


def change_flow_limit(case: Case, asked: bool) -> Case:
    """Return the case with a target for the flow at a level, or without one.

    A new one is asked for at the overflow level, or at the start level where none is typed.
    """
    present = case.target.flow_at if case.target else None
    if asked == (present is not None):
        return case
    if not asked:
        return replace_at(case, ("target", "flow_at"), None)
    level = case.levels.overflow or case.levels.start
    flow = read_quantity("10 US gal/min" if case.units == "us" else "1 L/s", "flow")
    return replace(case, target=replace(case.target or Target(), flow_at=FlowAt(level, flow)))


def _state(former: Liquid, units: str) -> tuple[Quantity, ...]:
    """Return temperature, density, viscosity and, if typed, vapour pressure to begin a liquid of one's own with."""
    if former.properties:
        return former.properties[0]
    temperature = former.temperature or read_quantity("68 degF" if units == "us" else "20 degC", "temperature")
    if former.density is not None and former.viscosity is not None:
        vapour = () if former.vapour_pressure is None else (former.vapour_pressure,)
        return temperature, former.density, former.viscosity, *vapour
    density, viscosity = _BEGINNINGS[units]
    return temperature, read_quantity(density, "density"), read_quantity(viscosity, _VISCOSITY)
