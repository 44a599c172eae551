"""Density, viscosity and vapour pressure against temperature."""

from __future__ import annotations

import math
from dataclasses import dataclass
from typing import Any

from headfall.resources import read_resource


@dataclass(frozen=True, slots=True)
class LiquidState:
    """A liquid at one temperature: [K], [kg/m³], [Pa·s], [Pa]; ``source`` is a key of the list of sources.

    ``vapour_pressure`` is None where it is not known.
    """

    name: str
    temperature: float
    density: float
    viscosity: float
    vapour_pressure: float | None
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
        if self.low == self.high:
            return f"a temperature of {_celsius(self.low)}"
        return f"a temperature from {_celsius(self.low)} to {_celsius(self.high)}"

    @property
    def sentence(self) -> str:
        """What was found and what to type, for the person who typed it."""
        return f"{self.found[0].upper()}{self.found[1:]}. Type {self.wanted}."


@dataclass(frozen=True, slots=True)
class CardRow:
    """Density [kg/m³], viscosity [Pa·s] and, if known, vapour pressure [Pa] at a temperature [K]."""

    temperature: float
    density: float
    viscosity: float
    vapour_pressure: float | None = None


@dataclass(frozen=True, slots=True)
class LiquidCard:
    """A liquid by rows of its properties, temperatures rising.

    Between the rows density is linear in temperature, the logarithms of viscosity and vapour pressure are linear in
    1/T (source ``andrade_1930`` for viscosity); at the rows all are exact. Nothing is extrapolated.
    ``any_temperature`` says that a single row counts at every temperature.
    """

    name: str
    rows: tuple[CardRow, ...]
    source: str
    any_temperature: bool = False

    @classmethod
    def single(cls, name: str, density: float, viscosity: float, vapour_pressure: float | None) -> LiquidCard:
        """Return the card of a liquid of one's own with one density [kg/m³] and viscosity [Pa·s]."""
        return cls(name, (CardRow(293.15, density, viscosity, vapour_pressure),), "own_liquid", True)

    def at(self, temperature: float) -> LiquidState:
        """Return the liquid at a temperature [K]; raises TemperatureFault outside the rows."""
        rows, first, last = self.rows, self.rows[0], self.rows[-1]
        if self.any_temperature:
            return self._state(temperature, first.density, first.viscosity, first.vapour_pressure)
        slack = 1e-9 * last.temperature
        if not first.temperature - slack <= temperature <= last.temperature + slack:
            raise TemperatureFault(self.name, temperature, first.temperature, last.temperature)
        place = next((index for index, row in enumerate(rows) if row.temperature >= temperature - slack), 0)
        above = rows[place]
        if place == 0 or abs(above.temperature - temperature) <= slack:
            return self._state(temperature, above.density, above.viscosity, above.vapour_pressure)
        below = rows[place - 1]
        share = (temperature - below.temperature) / (above.temperature - below.temperature)
        inverse = (1 / below.temperature - 1 / temperature) / (1 / below.temperature - 1 / above.temperature)
        vapour = None
        if below.vapour_pressure and above.vapour_pressure:
            vapour = below.vapour_pressure * (above.vapour_pressure / below.vapour_pressure) ** inverse
        density = below.density + share * (above.density - below.density)
        return self._state(
            temperature, density, below.viscosity * (above.viscosity / below.viscosity) ** inverse, vapour
        )

    def _state(self, temperature: float, density: float, viscosity: float, vapour: float | None) -> LiquidState:
        return LiquidState(self.name, temperature, density, viscosity, vapour, self.source)


def built_in_liquids() -> tuple[str, ...]:
    """Return the names of the liquids whose properties are built in, water first."""
    return ("water", *read_resource("liquids.json"))


def liquid_named(name: str, temperature: float) -> LiquidState:
    """Return a built-in liquid at the temperature [K].

    Raises KeyError for a name that is not built in and TemperatureFault outside the range of its rows.
    """
    if name == "water":
        return water(temperature)
    data = read_resource("liquids.json")[name]
    rows = tuple(
        CardRow(celsius + 273.15, density, millipascal * 1e-3, None if kilopascal is None else kilopascal * 1e3)
        for celsius, density, millipascal, kilopascal in data["rows"]
    )
    return LiquidCard(name, rows, data["source"]).at(temperature)


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
