"""A case is written as it was typed."""

from __future__ import annotations

import json
from pathlib import Path
from typing import Any

import pytest

from headfall.case.reading import read_case_data
from headfall.case.writing import canonical_text, case_as_data, case_text

EXAMPLES = sorted((Path(__file__).parents[2] / "resources" / "examples").glob("*.headfall"))
FULL: dict[str, Any] = {
    "headfall": 1,
    "title": "Füllstand 3 ½",
    "tag": "T-07",
    "revision": "",
    "status": "draft",
    "date": "2031-04-02",
    "author": "",
    "checker": "",
    "approver": "",
    "site": "",
    "remarks": "two\nlines",
    "units": "us",
    "vessel": {
        "shape": "drum",
        "diameter": " 2,4 m",
        "length": "3 m",
        "heads": [
            {"form": "cone", "depth": "1/2 ft"},
            {"form": "torispherical", "crown_ratio": 1.0, "knuckle_ratio": 0.1},
        ],
        "fall": "0 m",
        "sizes": "outside",
        "wall": "6 mm",
        "lining": "0 mm",
        "displacement": [{"from": "0 m", "to": "1 m", "volume": "20 L"}],
    },
    "liquid": {"name": "water", "temperature": "15 degC", "also_at": ["5 degC", "40 degC"]},
    "outlets": [
        {
            "name": "drain",
            "kind": "orifice",
            "entry": "thick_plate",
            "thickness": "10 mm",
            "facing": "down",
            "opening": {"form": "rectangle", "width": "50 mm", "height": "40 mm"},
            "elevation": "0 m",
            "station": "1 m",
            "coefficient": {"low": 0.6, "typical": 0.7, "high": 1},
            "count": 2,
            "role": "drain",
            "blocked": 0,
            "tailwater": "-1 m",
        },
        {
            "name": "line",
            "kind": "pipe",
            "entry_loss": {"low": 0.4, "typical": 0.5, "high": 0.6},
            "bore": "NPS 4 sch 40",
            "length": "6 m",
            "material": "commercial steel",
            "fittings": [{"name": "bend", "loss": 0.3, "laminar_loss": 800, "count": 2}],
            "valve": {"kv": 40, "opening": 0.5, "characteristic": "linear"},
            "sections": [{"bore": "50 mm", "length": "1 m", "roughness": "0.05 mm"}],
            "discharge_elevation": "-2 m",
        },
        {"name": "lip", "kind": "weir", "form": "vnotch", "angle": "90°", "crest": "2 m", "role": "overflow"},
    ],
    "inflow": {"kind": "steady", "rate": "12 L/min"},
    "headspace": {"kind": "open"},
    "levels": {"start": "2.2 m", "stop": "0.1 m", "overflow": "2.3 m", "high": "2.25 m", "site_datum": "51 m"},
    "target": {
        "drain_time": "1:23:45",
        "highest_level": "90 %",
        "flow_at": {"level": "10 m³", "flow": "3 L/s"},
    },
    "tables": {"times": ["10 min", "1 h"], "level_step": "0.1 m"},
    "structure": {
        "shell_thickness": "6 mm",
        "allowable_stress": "90 MPa",
        "joint_efficiency": 0.85,
        "empty_mass": "0 kg",
    },
    "surroundings": {"gravity": "9.81 m/s^2", "pressure": "1 bar"},
    "field_tests": [],
}


def test_every_key_comes_back_as_typed_and_in_order() -> None:
    assert json.dumps(case_as_data(read_case_data(FULL))) == json.dumps(FULL)


def test_what_was_not_typed_is_not_written() -> None:
    data = {key: FULL[key] for key in ("headfall", "vessel", "outlets", "levels")}
    assert json.dumps(case_as_data(read_case_data(data))) == json.dumps(data)


def test_the_text_is_indented_plain_and_ends_with_a_newline() -> None:
    text = case_text(read_case_data(FULL))
    assert text.startswith('{\n  "headfall": 1,\n  "title": "Füllstand 3 ½",\n')
    assert text.endswith("\n}\n")


def test_the_canonical_text_does_not_depend_on_the_order_of_keys() -> None:
    turned = dict(reversed(FULL.items()))
    assert canonical_text(read_case_data(turned)) == canonical_text(read_case_data(FULL))


@pytest.mark.parametrize("path", EXAMPLES, ids=lambda path: path.stem)
def test_an_example_is_written_just_as_it_lies_there(path: Path) -> None:
    text = path.read_text(encoding="utf-8")
    assert case_text(read_case_data(json.loads(text))) == text


def test_the_examples_are_there() -> None:
    assert {path.stem for path in EXAMPLES} >= {"day_tank_us", "header_tank", "rinse_drum"}


def test_a_row_stands_on_one_line() -> None:
    rows = [["0 m", "60 m²"], ["1 m", "80 m²"]]
    data = {**FULL, "vessel": {"shape": "table", "column": "area", "rows": rows}, "tables": {"times": ["1 h"]}}
    text = case_text(read_case_data(data))
    assert '    "rows": [\n      ["0 m", "60 m²"],\n      ["1 m", "80 m²"]\n    ]\n' in text
    assert '  "tables": {\n    "times": ["1 h"]\n  },\n' in text
    assert '  "field_tests": []\n' in text
    assert json.loads(text) == data
