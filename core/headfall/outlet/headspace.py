"""What the gas above the liquid does to the outflow: open, pressurised, closed or vented."""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass

import numpy as np

from headfall.outlet.outlet import Array

SLOW, FAST = 1.0, 1.4
"""Exponent of p·Vⁿ for a gas that keeps its temperature, and for air that exchanges no heat."""
_GAS_CONSTANT = 287.05
_AIR_TEMPERATURE = 293.15


@dataclass(frozen=True, slots=True)
class OpenHeadspace:
    """Air comes in freely."""

    @property
    def coefficients(self) -> Array:
        """Nothing is doubtful: shape (0, 3) [-]."""
        return np.empty((0, 3))


@dataclass(frozen=True, slots=True)
class PressurisedHeadspace:
    """A headspace kept at a gauge pressure, told as head [m] of the liquid, p/(ρ·g); source ``gas_over_liquid``."""

    pressure_head: float

    @property
    def coefficients(self) -> Array:
        """Nothing is doubtful: shape (0, 3)."""
        return np.empty((0, 3))


@dataclass(frozen=True, slots=True)
class ClosedHeadspace:
    """A headspace without a way in for air: p·Vⁿ stays what it was at the start.

    ``gas_volume`` maps levels to the room [m³] above the liquid, ``first_volume`` is that at the start, where the gas
    stands at ``atmospheric_head``, the ambient pressure as head [m] of the liquid. Source ``gas_over_liquid``; the gas
    is ideal and none of it dissolves.
    """

    gas_volume: Callable[[Array], Array]
    first_volume: float
    atmospheric_head: float

    @property
    def coefficients(self) -> Array:
        """The exponent n, shape (1, 3): air that exchanges no heat passes least, constant temperature else."""
        return np.array([[FAST, SLOW, SLOW]])

    def pressure_head(self, level: Array, coefficients: Array) -> Array:
        """Return the gauge pressure [m of liquid] at each level; ``coefficients`` holds n and broadcasts with it."""
        room = np.maximum(self.gas_volume(level), 1e-12 * max(self.first_volume, 1e-300))
        with np.errstate(over="ignore"):
            ratio = (self.first_volume / room) ** coefficients[0]
        return np.asarray(self.atmospheric_head * (np.minimum(ratio, 1e6) - 1.0))


@dataclass(frozen=True, slots=True)
class VentedHeadspace:
    """A headspace with one opening to the air, quasi-steady, the air at ambient density.

    Δp = (ρ_air/2)·(Q_air/(C·a))² (source ``gas_over_liquid``). ``area`` [m²] is that of the vent, ``coefficient`` its
    C, ``air_density`` and ``liquid_density`` in kg/m³; ``deepest_head`` [m] is the vacuum that cannot be passed.
    """

    area: float
    coefficient: float
    air_density: float
    liquid_density: float
    gravity: float
    deepest_head: float

    @property
    def coefficients(self) -> Array:
        """Nothing is doubtful: shape (0, 3)."""
        return np.empty((0, 3))

    def pressure_head(self, air_flow: Array) -> Array:
        """Return the gauge pressure [m of liquid] at each flow of air [m³/s] into the vessel, below nil then."""
        speed = np.asarray(air_flow) / (self.coefficient * self.area)
        return np.asarray(-self.air_density / (2 * self.liquid_density * self.gravity) * speed * np.abs(speed))

    @property
    def largest_air_flow(self) -> float:
        """The flow of air [m³/s] at the deepest vacuum."""
        head = 2 * self.liquid_density * self.gravity * self.deepest_head / self.air_density
        return float(self.coefficient * self.area * np.sqrt(head))


Headspace = OpenHeadspace | PressurisedHeadspace | ClosedHeadspace | VentedHeadspace


def air_density(pressure: float) -> float:
    """Return the density [kg/m³] of dry air at 20 °C and an absolute pressure [Pa], as an ideal gas."""
    return pressure / (_GAS_CONSTANT * _AIR_TEMPERATURE)
