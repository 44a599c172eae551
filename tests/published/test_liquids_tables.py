"""Built-in liquids between their rows, against equations of state, relations of others and the limits of standards."""

from __future__ import annotations

import math

import iapws
import pytest

from headfall.liquids import LiquidState, liquid_named, water

# Density [kg/m³], viscosity [mPa·s] and vapour pressure [kPa] at 101.325 kPa between the rows of the cards: equations
# of state and reference correlations of the library CoolProp 8.0.0, of chemicals 1.5.2 for acetone.
REFERENCE = [
    ("ethanol", 10, 797.9, 1.4646, 3.148),
    ("ethanol", 30, 780.8, 0.9840, 10.467),
    ("ethanol", 45, 767.7, 0.7506, 23.034),
    ("methanol", 10, 800.4, 0.6832, 7.438),
    ("methanol", 30, 781.6, 0.5062, 21.914),
    ("methanol", 45, 767.4, 0.4137, 44.649),
    ("toluene", 10, 876.2, 0.6687, 1.666),
    ("toluene", 30, 857.6, 0.5205, 4.894),
    ("toluene", 45, 843.5, 0.4412, 9.889),
    ("acetone", 10, 801.3, 0.3662, 15.454),
    ("acetone", 30, 779.1, 0.3015, 37.960),
    ("acetone", 45, 761.9, 0.2638, 68.325),
]
# Correlations of chemicals 1.5.2; what is published about glycols lies apart by a tenth in viscosity.
GLYCOLS = [
    ("ethylene glycol", 30, 1106.4, 13.8134),
    ("ethylene glycol", 60, 1085.0, 5.2213),
    ("ethylene glycol", 85, 1066.8, 2.8267),
    ("propylene glycol", 10, 1043.8, 113.5841),
    ("propylene glycol", 30, 1028.8, 32.0032),
    ("propylene glycol", 45, 1017.2, 15.2340),
]
# Model of Laliberté (2007, 2009) for electrolytes in water, as the library thermo 0.6.1 carries it.
CAUSTIC = [
    ("caustic soda 10 %", 20, 1108.5, 1.778),
    ("caustic soda 10 %", 40, 1101.1, 1.081),
    ("caustic soda 10 %", 60, 1090.4, 0.741),
    ("caustic soda 50 %", 20, 1516.3, 81.55),
    ("caustic soda 50 %", 40, 1514.7, 23.75),
    ("caustic soda 50 %", 60, 1509.7, 10.11),
]


def at(name: str, celsius: float) -> LiquidState:
    return liquid_named(name, celsius + 273.15)


def kinematic(name: str, celsius: float) -> float:
    """Kinematic viscosity in mm²/s."""
    state = at(name, celsius)
    return state.viscosity / state.density * 1e6


@pytest.mark.parametrize(("name", "celsius", "density", "viscosity", "vapour_pressure"), REFERENCE)
def test_solvents(name: str, celsius: float, density: float, viscosity: float, vapour_pressure: float) -> None:
    state = at(name, celsius)
    assert state.density == pytest.approx(density, rel=5e-4)
    assert state.viscosity * 1e3 == pytest.approx(viscosity, rel=0.035)
    assert state.vapour_pressure == pytest.approx(vapour_pressure * 1e3, rel=0.012)


@pytest.mark.parametrize(("name", "celsius", "density", "viscosity"), GLYCOLS)
def test_glycols(name: str, celsius: float, density: float, viscosity: float) -> None:
    state = at(name, celsius)
    assert state.density == pytest.approx(density, rel=5e-4)
    assert state.viscosity * 1e3 == pytest.approx(viscosity, rel=0.06)


@pytest.mark.parametrize(("name", "celsius", "density", "viscosity"), CAUSTIC)
def test_caustic_soda(name: str, celsius: float, density: float, viscosity: float) -> None:
    state = at(name, celsius)
    assert state.density == pytest.approx(density, rel=0.01)
    assert state.viscosity * 1e3 == pytest.approx(viscosity, rel=0.08)


@pytest.mark.parametrize("celsius", [5, 15, 20, 25, 35])
def test_seawater(celsius: float) -> None:
    """Density: IAPWS-08 at the absolute salinity 35.165 g/kg of the practical salinity 35, by the library iapws.

    Viscosity: Sharqawy, Lienhard and Zubair (2010) (from memory), on that of pure water by the library.
    """
    salt = 0.035165
    first = 1.541 + 1.998e-2 * celsius - 9.52e-5 * celsius**2
    second = 7.974 - 7.561e-2 * celsius + 4.724e-4 * celsius**2
    pure = iapws.IAPWS95(T=celsius + 273.15, P=0.101325)
    state = at("seawater", celsius)
    library = iapws.SeaWater(T=celsius + 273.15, P=0.101325, S=salt)
    assert state.density == pytest.approx(library.rho, rel=3e-4)
    assert state.viscosity == pytest.approx(pure.mu * (1 + first * salt + second * salt**2), rel=5e-3)


@pytest.mark.parametrize("celsius", [0, 5, 15, 20, 35, 50, 70, 90, 100])
def test_glycerol(celsius: float) -> None:
    """Cheng (2008), Ind. Eng. Chem. Res. 47, 3285: μ = 12.1·exp(t·(t − 1233)/(9900 + 70·t)) Pa·s (from memory)."""
    state = at("glycerol", celsius)
    expected = 12.1 * math.exp(celsius * (celsius - 1233) / (9900 + 70 * celsius))
    assert state.viscosity == pytest.approx(expected, rel=0.08)
    assert state.density == pytest.approx(1277 - 0.654 * celsius, rel=4e-3)


@pytest.mark.parametrize(("celsius", "viscosity"), [(20, 4.0), (40, 2.2)])
def test_half_ethylene_glycol(celsius: float, viscosity: float) -> None:
    """Viscosity [mPa·s] about as makers of coolants print it (from memory).

    Density: the two contract on mixing by up to 1.5 %.
    """
    name = "ethylene glycol 50 % in water"
    apart = 2 / (1 / water(celsius + 273.15).density + 1 / at("ethylene glycol", celsius).density)
    assert apart < at(name, celsius).density < 1.015 * apart
    assert at(name, celsius).viscosity * 1e3 == pytest.approx(viscosity, rel=0.1)


def test_diesel_fuel_lies_within_the_limits_of_its_standard() -> None:
    """EN 590 (from memory): 820 to 845 kg/m³ at 15 °C, 2.0 to 4.5 mm²/s at 40 °C."""
    assert 820 <= at("diesel fuel", 15).density <= 845
    assert 2.0 <= kinematic("diesel fuel", 40) <= 4.5


def test_kerosene_lies_within_the_limits_of_jet_fuel() -> None:
    """ASTM D1655, Jet A-1 (from memory): 775 to 840 kg/m³ at 15 °C, at most 8.0 mm²/s at −20 °C."""
    assert 775 <= at("kerosene", 15).density <= 840
    assert 1.0 < kinematic("kerosene", 20) < kinematic("kerosene", -20) <= 8.0


def test_the_viscosity_class_of_the_lubricating_oil() -> None:
    """ISO 3448 (from memory): VG 46 is 46 mm²/s at 40 °C, and a tenth more or less."""
    assert kinematic("lubricating oil ISO VG 46", 40) == pytest.approx(46, rel=2e-3)


@pytest.mark.parametrize(
    ("name", "ends"), [("lubricating oil ISO VG 46", (40, 100)), ("diesel fuel", (20, 60)), ("kerosene", (-20, 40))]
)
def test_oils_follow_the_line_of_walther(name: str, ends: tuple[float, float]) -> None:
    """ASTM D341 (from memory): log log(ν + 0.7) is linear in log T, ν in mm²/s; the line goes through the two ends."""

    def height(viscosity: float) -> float:
        return math.log10(math.log10(viscosity + 0.7))

    cold, warm = ends
    fall = (height(kinematic(name, cold)) - height(kinematic(name, warm))) / math.log10(
        (warm + 273.15) / (cold + 273.15)
    )
    lowest = 0 if cold >= 0 else cold
    for celsius in range(int(lowest), int(warm) + 1, 5):
        line = height(kinematic(name, cold)) - fall * math.log10((celsius + 273.15) / (cold + 273.15))
        assert kinematic(name, celsius) == pytest.approx(10 ** (10**line) - 0.7, rel=0.035)


@pytest.mark.parametrize("celsius", [5, 10, 20, 30, 40])
def test_whole_milk(celsius: float) -> None:
    """Density from its parts by Choi and Okos (1986), within 1 %; viscosity about twice that of water (from memory)."""
    t = celsius
    parts = [
        (0.877, 997.18 + 3.1439e-3 * t - 3.7574e-3 * t**2),
        (0.034, 1329.9 - 0.5184 * t),
        (0.036, 925.59 - 0.41757 * t),
        (0.046, 1599.1 - 0.31046 * t),
        (0.007, 2423.8 - 0.28063 * t),
    ]
    state = at("whole milk", celsius)
    assert state.density == pytest.approx(1 / sum(share / density for share, density in parts), rel=0.01)
    assert 1.75 < state.viscosity / water(celsius + 273.15).viscosity < 2.25
