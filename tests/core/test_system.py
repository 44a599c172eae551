"""Faults between the entries of a case, each with its sentence."""

from __future__ import annotations

from typing import Any

import pytest

from headfall.case.faults import CaseError
from headfall.case.reading import build_case, read_parts
from headfall.system import build_system

TANK: dict[str, Any] = {
    "headfall": 1,
    "vessel": {"shape": "upright_cylinder", "diameter": "2 m", "height": "3 m"},
    "outlets": [{"opening": {"form": "round", "diameter": "100 mm"}}],
    "levels": {"start": "2 m", "stop": "0.5 m"},
}
SIDEWAYS = {"facing": "side", "opening": {"form": "round", "diameter": "100 mm"}}


def lines(**parts: Any) -> list[str]:
    """The faults of the tank with some parts changed, no-break spaces made plain."""
    read, faults = read_parts({**TANK, **parts})
    assert not faults
    with pytest.raises(CaseError) as refused:
        build_system(build_case(read))
    return [fault.line.replace("\N{NO-BREAK SPACE}", " ") for fault in refused.value.faults]


def test_levels_above_the_top() -> None:
    assert lines(levels={"start": "3.2 m", "stop": "0.5 m", "high": "4 m"}) == [
        "levels.start: 3.2 m is above the top of the vessel. Type a level from 0 to 3.000 m.",
        "levels.high: 4 m is above the top of the vessel. Type a level from 0 to 3.000 m.",
    ]


def test_limits_are_told_in_the_units_shown() -> None:
    (line,) = lines(levels={"start": "12 ft", "stop": "1 ft"}, units="us")
    assert line == "levels.start: 12 ft is above the top of the vessel. Type a level from 0 to 9.843 ft."


def test_a_side_opening_that_reaches_outside() -> None:
    assert lines(outlets=[SIDEWAYS | {"elevation": "20 mm"}]) == [
        "outlets[0].elevation: A side opening with its centre at 20 mm reaches outside the vessel. "
        "Type a centre from 0.050 to 2.950 m."
    ]


def test_an_opening_above_the_top() -> None:
    (line,) = lines(outlets=[TANK["outlets"][0] | {"elevation": "3.5 m"}])
    assert line == "outlets[0].elevation: 3.5 m is above the top of the vessel. Type a height from 0 to 3.000 m."


def test_a_station_belongs_to_a_drum() -> None:
    (line,) = lines(outlets=[TANK["outlets"][0] | {"station": "1 m"}])
    assert line == "outlets[0].station: A station is given and the vessel is no drum. Leave the station out."


def test_water_out_of_range() -> None:
    (line,) = lines(liquid={"temperature": "140 degC"})
    assert line == (
        "liquid.temperature: Water at 140 degC is outside the built-in range. Type a temperature from 0 °C to 100 °C."
    )


def test_levels_forgive_a_billionth_of_the_height() -> None:
    read, faults = read_parts({**TANK, "levels": {"start": "3.000000002 m", "stop": "0.5 m"}})
    assert not faults
    assert build_system(build_case(read)).start == pytest.approx(3.0, abs=3e-9)
