"""Water within its range and outside."""

from __future__ import annotations

import pytest

from headfall.liquids import TemperatureFault, water
from headfall.resources import read_resource


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
