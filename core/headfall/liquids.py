"""Density, viscosity and vapour pressure against temperature."""

from __future__ import annotations

import math
from dataclasses import dataclass
from typing import Any

from headfall.resources import read_resource


@dataclass(frozen=True, slots=True)
class LiquidState:
    """A liquid at one temperature: [K], [kg/m³], [Pa·s], [Pa]; ``source`` is a key of the list of sources."""

    name: str
    temperature: float
    density: float
    viscosity: float
    vapour_pressure: float
    source: str


class TemperatureFault(ValueError):
    """A temperature [K] outside the range [K] in which a liquid is described here."""

    def __init__(self, liquid: str, temperature: float, low: float, high: float) -> None:
        self.liquid = liquid
        self.temperature = temperature
        self.low = low
        self.high = high
        super().__init__(self.sentence)

    @property
    def found(self) -> str:
        """What was found, as the start of a sentence."""
        return f"{self.liquid} at {_celsius(self.temperature)} is outside its range"

    @property
    def wanted(self) -> str:
        """What is wanted, as the end of a sentence."""
        return f"a temperature from {_celsius(self.low)} to {_celsius(self.high)}"

    @property
    def sentence(self) -> str:
        """What was found and what to type, for the person who typed it."""
        return f"{self.found[0].upper()}{self.found[1:]}. Type {self.wanted}."


def water(temperature: float) -> LiquidState:
    """Return water at the temperature [K], liquid, at atmospheric pressure.

    Density by ``kell_1975``, viscosity by ``iapws_r12_08`` at that density, vapour pressure by ``iapws_r7_97``.
    Valid from 0 to 100 °C; raises TemperatureFault outside.
    """
    span = read_resource("water.json")["range"]
    if not span["low"] <= temperature <= span["high"]:
        raise TemperatureFault("water", temperature, span["low"], span["high"])
    density = water_density(temperature)
    return LiquidState(
        name="water",
        temperature=temperature,
        density=density,
        viscosity=water_viscosity(temperature, density),
        vapour_pressure=water_vapour_pressure(temperature),
        source=read_resource("water.json")["density"]["source"],
    )


def water_density(temperature: float) -> float:
    """Return the density [kg/m³] of liquid water at 101.325 kPa and the temperature [K].

    ρ = Σ aᵢ·tⁱ / (1 + b·t), valid from 0 to 100 °C. Source ``kell_1975``, whose t counts on the scale of 1968:
    t₆₈ = 1.00024·t₉₀.
    """
    terms = read_resource("water.json")["density"]
    celsius = (temperature - 273.15) * terms["scale"]
    return _polynomial(terms["numerator"], celsius) / _polynomial(terms["denominator"], celsius)


def water_viscosity(temperature: float, density: float) -> float:
    """Return the dynamic viscosity [Pa·s] of water at the temperature [K] and density [kg/m³].

    µ = µ₀(T)·µ₁(T, ρ); the critical enhancement µ₂ is left out, it is 1 far from the critical point.
    Source ``iapws_r12_08``.
    """
    terms = read_resource("water.json")["viscosity"]
    reduced = temperature / terms["temperature"]
    dilute = 100.0 * math.sqrt(reduced) / _polynomial(terms["dilute"], 1.0 / reduced)
    column = density / terms["density"] - 1.0
    row = 1.0 / reduced - 1.0
    residual = _polynomial([_polynomial(powers, column) for powers in terms["residual"]], row)
    return float(dilute * math.exp(density / terms["density"] * residual) * terms["viscosity"])


def water_vapour_pressure(temperature: float) -> float:
    """Return the vapour pressure [Pa] of water at the temperature [K].

    Saturation line, region 4, valid from 273.15 K to 647.096 K. Source ``iapws_r7_97``.
    """
    terms: dict[str, Any] = read_resource("water.json")["vapour_pressure"]
    n1, n2, n3, n4, n5, n6, n7, n8, n9, n10 = terms["coefficients"]
    theta = temperature + n9 / (temperature - n10)
    a = theta * theta + n1 * theta + n2
    b = n3 * theta * theta + n4 * theta + n5
    c = n6 * theta * theta + n7 * theta + n8
    return float(terms["pressure"] * (2.0 * c / (math.sqrt(b * b - 4.0 * a * c) - b)) ** 4)


def _polynomial(coefficients: list[float], variable: float) -> float:
    """Return Σ cᵢ·xⁱ."""
    total = 0.0
    for coefficient in reversed(coefficients):
        total = total * variable + coefficient
    return total


def _celsius(temperature: float) -> str:
    return f"{temperature - 273.15:.1f}".removesuffix(".0").replace("-", "\u2212") + "\u00a0°C"
