"""Water within its range and outside; cards at their rows, between them and outside."""

from __future__ import annotations

from itertools import pairwise

import pytest
from hypothesis import given
from hypothesis import strategies as st

from headfall.liquids import CardRow, LiquidCard, TemperatureFault, built_in_liquids, liquid_named, water
from headfall.resources import read_resource

CARDS = read_resource("liquids.json")


@pytest.mark.parametrize("temperature", [273.15, 293.15, 373.15])
def test_water_has_everything_a_liquid_has(temperature: float) -> None:
    state = water(temperature)
    assert state.name == "water"
    assert state.temperature == temperature
    assert 950.0 < state.density < 1000.0
    assert 2.7e-4 < state.viscosity < 1.8e-3
    assert 600.0 < state.vapour_pressure < 101500.0
    assert state.source in read_resource("sources.json")


def test_every_source_of_water_is_in_the_list() -> None:
    blocks = read_resource("water.json")
    named = {blocks[part]["source"] for part in ("density", "viscosity", "vapour_pressure")}
    assert named == {"kell_1975", "iapws_r12_08", "iapws_r7_97"}
    assert named <= set(read_resource("sources.json"))


@pytest.mark.parametrize("temperature", [273.14, 373.16, float("nan"), float("inf")])
def test_outside_its_range_water_is_refused(temperature: float) -> None:
    with pytest.raises(TemperatureFault, match="Type a temperature from 0\u00a0°C to 100\u00a0°C"):
        water(temperature)


def test_the_sentence_names_temperature_and_range() -> None:
    with pytest.raises(TemperatureFault) as caught:
        water(272.15)
    assert caught.value.sentence == (
        "Water at \u22121\u00a0°C is outside its range. Type a temperature from 0\u00a0°C to 100\u00a0°C."
    )


ROWS = [(name, *row) for name, card in CARDS.items() for row in card["rows"]]


@pytest.mark.parametrize(("name", "celsius", "density", "viscosity", "vapour_pressure"), ROWS)
def test_a_built_in_liquid_is_exact_at_its_rows(
    name: str, celsius: float, density: float, viscosity: float, vapour_pressure: float | None
) -> None:
    state = liquid_named(name, celsius + 273.15)
    assert (state.name, state.temperature, state.source) == (name, celsius + 273.15, CARDS[name]["source"])
    assert (state.density, state.viscosity) == (density, viscosity * 1e-3)
    assert state.vapour_pressure == (None if vapour_pressure is None else vapour_pressure * 1e3)


def test_every_built_in_liquid_is_known_at_20_degrees() -> None:
    """The temperature of a case that names none."""
    for name in built_in_liquids():
        assert 700.0 < liquid_named(name, 293.15).density < 1900.0


@given(st.sampled_from(list(CARDS)), st.floats(0.0, 1.0), st.floats(0.0, 1.0))
def test_between_rows_a_warmer_liquid_is_lighter_thinner_and_more_volatile(name: str, one: float, two: float) -> None:
    low, high = CARDS[name]["rows"][0][0] + 273.15, CARDS[name]["rows"][-1][0] + 273.15
    cold, warm = (liquid_named(name, low + share * (high - low)) for share in sorted((one, two)))
    assert warm.density <= cold.density * (1 + 1e-12)
    assert warm.viscosity <= cold.viscosity * (1 + 1e-12)
    if cold.vapour_pressure is not None and warm.vapour_pressure is not None:
        assert warm.vapour_pressure >= cold.vapour_pressure * (1 - 1e-12)


@pytest.mark.parametrize("name", CARDS)
def test_the_rows_of_a_built_in_liquid_rise(name: str) -> None:
    assert all(above[0] > below[0] for below, above in pairwise(CARDS[name]["rows"]))


def test_a_name_that_is_not_built_in_is_a_key_error() -> None:
    with pytest.raises(KeyError):
        liquid_named("ink", 293.15)


@pytest.mark.parametrize("temperature", [293.0, 333.3, float("nan"), float("inf")])
def test_nothing_is_extrapolated(temperature: float) -> None:
    with pytest.raises(
        TemperatureFault, match=r"^Caustic soda 50 % .* Type a temperature from 20\u00a0°C to 60\u00a0°C"
    ):
        liquid_named("caustic soda 50 %", temperature)


def test_the_sentence_of_a_built_in_liquid_below_its_rows() -> None:
    with pytest.raises(TemperatureFault) as caught:
        liquid_named("kerosene", 243.15)
    assert caught.value.sentence == (
        "Kerosene at \u221230\u00a0°C is outside its range. Type a temperature from \u221220\u00a0°C to 40\u00a0°C."
    )


ONE_ROW = LiquidCard("whey", (CardRow(283.15, 1025.0, 1.5e-3, 1200.0),), "own_liquid")


def test_one_row_counts_at_its_own_temperature_alone() -> None:
    assert ONE_ROW.at(283.15).vapour_pressure == 1200.0
    with pytest.raises(TemperatureFault) as caught:
        ONE_ROW.at(293.15)
    assert caught.value.sentence == ("Whey at 20\u00a0°C is outside its range. Type a temperature of 10\u00a0°C.")


def test_a_single_state_counts_at_every_temperature_and_is_ones_own() -> None:
    state = LiquidCard.single("brine", 1180.0, 2.1e-3, 1500.0).at(265.0)
    assert (state.temperature, state.density, state.viscosity, state.vapour_pressure) == (265.0, 1180.0, 2.1e-3, 1500.0)
    assert state.source == "own_liquid"
    assert state.source in read_resource("sources.json")


def test_the_vapour_pressure_is_known_only_between_two_rows_that_give_it() -> None:
    rows = (CardRow(280.0, 900.0, 2e-3), CardRow(300.0, 890.0, 1e-3, 400.0), CardRow(320.0, 880.0, 5e-4, 900.0))
    card = LiquidCard("mixture", rows, "own_liquid")
    assert [card.at(temperature).vapour_pressure for temperature in (280.0, 290.0, 300.0, 320.0)] == [
        None,
        None,
        400.0,
        900.0,
    ]
    between = card.at(310.0).vapour_pressure
    # ln p is linear in 1/T: share (1/300 − 1/310)/(1/300 − 1/320) = 16/31.
    assert between == pytest.approx(400.0 * (900.0 / 400.0) ** (16 / 31))
