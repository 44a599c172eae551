"""Built-in liquids against values printed in handbooks (from memory) and a general-purpose library."""

from __future__ import annotations

import pytest
from iapws import SeaWater

from headfall.liquids import CardRow, LiquidCard, TemperatureFault, built_in_liquids, liquid_named, water
from headfall.resources import read_resource


@pytest.mark.parametrize("celsius", [0.0, 10.0, 20.0, 30.0, 40.0])
def test_density_of_seawater(celsius: float) -> None:
    """IAPWS-08 for a salinity of 35 g/kg, by the library."""
    library = SeaWater(T=max(celsius, 0.01) + 273.15, P=0.101325, S=0.035)
    assert liquid_named("seawater", celsius + 273.15).density == pytest.approx(library.rho, rel=5e-4)


@pytest.mark.parametrize(
    ("name", "celsius", "density", "viscosity"),
    [
        ("ethanol", 20, 789.3, 1.20),
        ("methanol", 20, 791.4, 0.59),
        ("acetone", 20, 790.0, 0.32),
        ("toluene", 20, 866.9, 0.59),
        ("ethylene glycol", 20, 1113.0, 21.0),
        ("glycerol", 20, 1261.0, 1410.0),
        ("glycerol", 25, 1258.0, 945.0),
    ],
)
def test_handbook_values(name: str, celsius: float, density: float, viscosity: float) -> None:
    """Density [kg/m³] and viscosity [mPa·s] of pure liquids as chemists' handbooks print them (from memory)."""
    state = liquid_named(name, celsius + 273.15)
    assert state.density == pytest.approx(density, rel=2e-3)
    assert state.viscosity * 1000 == pytest.approx(viscosity, rel=0.03)


def test_vapour_pressure_of_ethanol_and_acetone_by_antoine() -> None:
    """Antoine's equation in mmHg and °C: ethanol 8.20417, 1642.89, 230.3; acetone 7.11714, 1210.595, 229.664

    (constants from memory).
    """
    for name, a, b, c in (("ethanol", 8.20417, 1642.89, 230.3), ("acetone", 7.11714, 1210.595, 229.664)):
        for celsius in (25.0, 40.0):
            expected = 10 ** (a - b / (celsius + c)) * 133.322
            assert liquid_named(name, celsius + 273.15).vapour_pressure == pytest.approx(expected, rel=0.03)


def test_water_is_the_first_of_the_list() -> None:
    assert built_in_liquids()[0] == "water"
    assert liquid_named("water", 293.15) == water(293.15)
    assert all(read_resource("liquids.json")[name]["source"] for name in built_in_liquids()[1:])


CARD = LiquidCard("syrup", (CardRow(293.15, 1261.0, 1.30, 10.0), CardRow(313.15, 1248.0, 0.27, 40.0)), "own_liquid")


def test_a_card_is_exact_at_its_rows_and_andrade_between() -> None:
    assert (CARD.at(293.15).density, CARD.at(293.15).viscosity) == (1261.0, 1.30)
    assert (CARD.at(313.15).density, CARD.at(313.15).viscosity) == (1248.0, 0.27)
    middle = CARD.at(303.15)
    assert middle.density == pytest.approx(1254.5)
    # ln μ linear in 1/T, by hand: share (1/293.15 − 1/303.15)/(1/293.15 − 1/313.15) = 0.516494.
    assert middle.viscosity == pytest.approx(1.30 * (0.27 / 1.30) ** 0.516494, rel=1e-5)
    assert middle.vapour_pressure == pytest.approx(10 * 4**0.516494, rel=1e-5)


def test_a_card_is_never_extrapolated() -> None:
    with pytest.raises(TemperatureFault) as fault:
        CARD.at(320.0)
    said = fault.value.sentence.replace("\u00a0", " ")
    assert said == "Syrup at 46.9 °C is outside its range. Type a temperature from 20 °C to 40 °C."


def test_one_state_counts_at_every_temperature() -> None:
    card = LiquidCard.single("brine", 1180.0, 0.0021, None)
    assert card.at(280.0).density == card.at(350.0).density == 1180.0
    assert card.at(280.0).vapour_pressure is None
