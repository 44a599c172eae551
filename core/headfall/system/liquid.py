"""The state of a typed liquid."""

from __future__ import annotations

from headfall.case import model
from headfall.case.defaults import effective
from headfall.case.faults import CaseError, Fault
from headfall.liquids import CardRow, LiquidCard, LiquidState, TemperatureFault, built_in_liquids, liquid_named
from headfall.quantities import Quantity


def liquid_state(liquid: model.Liquid | None, temperature: float | None = None) -> LiquidState:
    """Return the liquid at its own temperature, or at another one [K].

    Raises CaseError, at the entry that is wrong, for a name that is not known or a temperature out of range.
    """
    liquid = liquid or model.Liquid()
    try:
        return _state(liquid, effective(liquid, "temperature") if temperature is None else temperature)
    except TemperatureFault as fault:
        typed = liquid.temperature.text if liquid.temperature is not None else "20 °C"
        name = fault.liquid[:1].upper() + fault.liquid[1:]
        raise CaseError(
            [Fault(("liquid", "temperature"), f"{name} at {typed} is outside the built-in range", fault.wanted)]
        ) from None


def is_own(liquid: model.Liquid) -> bool:
    """Whether the liquid is described by figures of one's own."""
    return liquid.density is not None or liquid.properties is not None


def _state(liquid: model.Liquid, temperature: float) -> LiquidState:
    name: str = effective(liquid, "name")
    if liquid.properties:
        rows = [_row(row) for row in liquid.properties]
        return LiquidCard(name, tuple(rows), "own_liquid").at(temperature)
    if liquid.density is not None and liquid.viscosity is not None:
        vapour = liquid.vapour_pressure.value if liquid.vapour_pressure else None
        density = liquid.density.value
        return LiquidCard.single(name, density, dynamic(liquid.viscosity, density), vapour).at(temperature)
    if name not in built_in_liquids():
        wanted = f"one of {', '.join(built_in_liquids())}, or a density and a viscosity"
        raise CaseError([Fault(("liquid", "name"), f"{name} is not a liquid known here", wanted)])
    return liquid_named(name, temperature)


def _row(row: tuple[Quantity, ...]) -> CardRow:
    density = row[1].value
    vapour = row[3].value if len(row) > 3 else None
    return CardRow(row[0].value, density, dynamic(row[2], density), vapour)


def dynamic(viscosity: Quantity, density: float) -> float:
    """Return the dynamic viscosity [Pa·s] of a typed dynamic or kinematic one, with the density [kg/m³]."""
    return viscosity.value * density if viscosity.dimension == "kinematic_viscosity" else viscosity.value
