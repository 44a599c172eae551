"""Levels in every way of typing them, liquids, headspaces, targets and tables in a case file."""

from __future__ import annotations

from typing import Any

import pytest

from headfall.case.reading import read_case_data, read_parts
from headfall.case.values import read_quantity
from headfall.case.writing import case_as_data
from headfall.quantities import QuantityFault

LENGTH = "a length, such as 80 mm or 3 1/8 in"
LEVEL = "a level, such as 2.8 m, 80 %, 15 m³ or 53.1 m site"
VISCOSITY = "a dynamic viscosity{0}, such as 1 mPa·s or 1 cP, or a kinematic viscosity{0}, such as 1 mm²/s or 1 cSt"
SOUND: dict[str, Any] = {
    "headfall": 1,
    "vessel": {"shape": "upright_cylinder", "diameter": "2.4 m", "height": "3 m"},
    "outlets": [{"kind": "orifice", "opening": {"form": "round", "diameter": "50 mm"}}],
    "levels": {"start": "2.8 m", "stop": "0.1 m"},
}
LEVELS: dict[str, Any] = SOUND["levels"]
ROW = ["10 degC", "900 kg/m³", "30 cSt"]


@pytest.mark.parametrize(
    ("text", "value", "dimension", "unit"),
    [
        ("2,8 m", 2.8, "length", "m"),
        ("80 %", 0.8, "percent", "%"),
        ("12.5%", 0.125, "percent", "%"),
        ("100 percent", 1.0, "percent", "%"),
        ("15 m³", 15.0, "volume", "m³"),
        ("200 L", 0.2, "volume", "L"),
        ("53.10 m site", 53.1, "site", "m site"),
        ("-3 ft 6 in site", -1.0668, "site", "ft in site"),
        ("0 m Site", 0.0, "site", "m site"),
    ],
)
def test_a_level_is_a_height_a_percentage_a_volume_or_a_site_height(
    text: str, value: float, dimension: str, unit: str
) -> None:
    found = read_quantity(text, "level", "positive")
    assert (found.text, found.dimension, found.unit) == (text, dimension, unit)
    assert found.value == pytest.approx(value, rel=1e-12)


@pytest.mark.parametrize(
    ("text", "dimension", "sentence"),
    [
        ("120 %", "level", "120 % is more than the whole. Type a percentage from 0 to 100."),
        (
            "-5 %",
            "level",
            "-5 % is negative. Type a level above nil, such as 2.8 m, 80 %, 15 m³ or 53.1 m site.",
        ),
        ("0 %", "level", "0 % is nil. Type a level above nil, such as 2.8 m, 80 %, 15 m³ or 53.1 m site."),
        ("1,000 %", "level", "1,000 can be 1000 or 1.0. Type 1000 % or 1.0 %."),
        ("2 kg", "level", f"2 kg is a mass. Type {LEVEL}."),
        ("2 kg site", "level", f"2 kg is a mass. Type {LEVEL}."),
        ("2.4", "level", f"2.4 has no unit. Type {LEVEL}."),
        ("", "level", f"Nothing is typed. Type {LEVEL}."),
        ("half", "level", f"half is not a number with a unit. Type {LEVEL}."),
        ("%", "level", f"% is not a number with a unit. Type {LEVEL}."),
        ("3 m %", "level", f"3 m % is not a number with a unit. Type {LEVEL}."),
        ("40 gal", "level", "Which gallon? Type US gal or imp gal."),
        ("3 kg", "dynamic_viscosity|kinematic_viscosity", f"3 kg is a mass. Type {VISCOSITY.format('')}."),
        (
            "0 cSt",
            "dynamic_viscosity|kinematic_viscosity",
            f"0 cSt is nil. Type {VISCOSITY.format(' above nil')}.",
        ),
        ("1,000 cSt", "dynamic_viscosity|kinematic_viscosity", "1,000 can be 1000 or 1.0. Type 1000 cSt or 1.0 cSt."),
    ],
)
def test_what_is_no_such_quantity_is_refused_with_what_is_wanted(text: str, dimension: str, sentence: str) -> None:
    with pytest.raises(QuantityFault) as refusal:
        read_quantity(text, dimension, "positive")
    assert refusal.value.sentence == sentence


def test_the_first_dimension_that_fits_counts() -> None:
    assert read_quantity("2 cP", "dynamic_viscosity|kinematic_viscosity").dimension == "dynamic_viscosity"
    assert read_quantity("2 cSt", "dynamic_viscosity|kinematic_viscosity").dimension == "kinematic_viscosity"
    assert read_quantity("2 ha", "area|volume").value == 20000


@pytest.mark.parametrize(
    ("key", "value"),
    [
        ("levels", {"start": "80 %", "stop": "2 m³", "overflow": "55 m site", "high": "1.9 m", "site_datum": "-3 m"}),
        ("levels", {"start": "90 %", "stop": "0 %", "overflow": "2 m", "shown": "percent"}),
        ("levels", {**LEVELS, "site_datum": "51 m", "shown": "site"}),
        ("liquid", {"name": "glycerol", "also_at": []}),
        ("liquid", {"also_at": ["5 degC", "60 degF"]}),
        ("liquid", {"name": "oil", "density": "0.9 kg/L", "viscosity": "30 cSt", "temperature": "40 degC"}),
        ("liquid", {"density": "900 kg/m³", "viscosity": "2 cP", "vapour_pressure": "0 Pa", "also_at": []}),
        ("liquid", {"name": "oil", "properties": [ROW, ["40 degC", "880 kg/m³", "10 cP", "1 kPa"]]}),
        ("liquid", {"name": "oil", "properties": [["-10 degC", "1 kg/L", "1 cP"]], "also_at": ["-10 degC"]}),
        ("headspace", {"kind": "pressurised", "gauge_pressure": "-1 kPa"}),
        ("headspace", {"kind": "closed"}),
        ("headspace", {"kind": "vented", "bore": "DN 50 sch 40", "coefficient": 0.6}),
        ("target", {"highest_level": "80 %", "flow_at": {"level": "1 m", "flow": "2 L/s"}}),
        ("tables", {"times": ["0 s", "1:00:00"], "level_step": "0.1 m"}),
        ("tables", {}),
    ],
)
def test_a_part_is_read_and_given_back_as_typed(key: str, value: dict[str, Any]) -> None:
    data = {**SOUND, key: value}
    assert [fault.line for fault in read_parts(data)[1]] == []
    assert case_as_data(read_case_data(data)) == data


@pytest.mark.parametrize(
    ("key", "value", "expected"),
    [
        (
            "levels",
            {**LEVELS, "start": "53 m site", "high": "54 m site"},
            [
                f"levels.{name}: {text} m site counts on the site datum, which is not given. "
                "Give the site datum too, or type a height above the vessel's lowest inside point."
                for name, text in (("start", 53), ("high", 54))
            ],
        ),
        (
            "levels",
            {**LEVELS, "shown": "site"},
            [f"levels.site_datum: Levels are to be shown on the site datum, which is not given. Type {LENGTH}."],
        ),
        (
            "levels",
            {**LEVELS, "site_datum": "x"},
            [f"levels.site_datum: x is not a number with a unit. Type {LENGTH}."],
        ),
        ("levels", {**LEVELS, "start": 0.8}, [f"levels.start: 0.8 has no unit. Type {LEVEL}."]),
        (
            "liquid",
            {"density": "900 kg/m³"},
            [
                "liquid.viscosity: A liquid with its own density needs its viscosity. "
                f"Type {VISCOSITY.format(' above nil')}."
            ],
        ),
        (
            "liquid",
            {"viscosity": "1 cP", "vapour_pressure": "1 kPa"},
            [
                "liquid.density: A liquid with its own viscosity needs its density. "
                "Type a density above nil, such as 998 kg/m³ or 62.3 lb/ft³."
            ],
        ),
        (
            "liquid",
            {"vapour_pressure": "1 kPa"},
            [
                "liquid.vapour_pressure: A vapour pressure alone describes no liquid. "
                "Give a density and a viscosity too, or leave it out."
            ],
        ),
        (
            "liquid",
            {"density": "900 kg/m³", "viscosity": "1 cP", "also_at": ["1 degC"]},
            [
                "liquid.also_at: A liquid with one density and one viscosity is known at one temperature alone. "
                "Leave it out, or give rows of properties instead."
            ],
        ),
        (
            "liquid",
            {"properties": []},
            ["liquid.properties: The list is empty. Type at least one row of properties, or leave it out."],
        ),
        (
            "liquid",
            {"properties": [ROW], "viscosity": "1 cP"},
            ["liquid.viscosity: A viscosity is given beside rows of properties. Leave it out, or leave the rows out."],
        ),
        (
            "liquid",
            {"properties": [ROW, ROW]},
            [
                "liquid.properties[1][0]: 10 degC is not above 10 degC, the temperature before it. "
                "Type temperatures that rise from row to row."
            ],
        ),
        (
            "liquid",
            {"properties": [["0 degC", "0 kg/m³"], ["0 degC", "0 kg/m³", "1 cP"]]},
            [
                "liquid.properties[0]: A row of 2 has too few columns. Type a temperature, a density and "
                "a dynamic viscosity or a kinematic viscosity, and if known a pressure.",
                "liquid.properties[1][1]: 0 kg/m³ is nil. Type a density above nil, such as 998 kg/m³ or 62.3 lb/ft³.",
            ],
        ),
        (
            "liquid",
            {"also_at": ["2 m", 3]},
            [
                "liquid.also_at[0]: 2 m is a length. Type a temperature, such as 15 °C or 59 °F.",
                "liquid.also_at[1]: 3 has no unit. Type a temperature, such as 15 °C or 59 °F.",
            ],
        ),
        (
            "liquid",
            {"also_at": "2 degC"},
            ['liquid.also_at: "2 degC" is not a list. Type a list in square brackets, each entry a temperature.'],
        ),
        (
            "target",
            {"flow_at": {"level": "1 m"}},
            ["target.flow_at.flow: This is missing. Type a flow, such as 12 L/min or 40 US gal/min."],
        ),
        (
            "tables",
            {"times": ["-1 s"]},
            ["tables.times[0]: -1 s is negative. Type a time of nil or more, such as 22 min 5 s or 1:23:45."],
        ),
        (
            "headspace",
            {"kind": "vacuum"},
            [
                'headspace.kind: "vacuum" is not a kind of headspace known here. '
                "Type open, pressurised, closed or vented."
            ],
        ),
    ],
)
def test_a_fault_has_its_sentence(key: str, value: dict[str, Any], expected: list[str]) -> None:
    assert [fault.line for fault in read_parts({**SOUND, key: value})[1]] == expected
