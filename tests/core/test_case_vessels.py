"""Basins, tables, stacks, sloped floors and displacement in a case file, and what is refused of them."""

from __future__ import annotations

import copy
from typing import Any

import pytest

from headfall.case.model import Basin, Box, Displacement, SlopedFloor, Stack, TableVessel, UprightCylinder
from headfall.case.reading import read_case_data, read_parts
from headfall.case.writing import case_as_data

LENGTH = "a length, such as 80 mm or 3 1/8 in"
AREA_OR_VOLUME = "an area, such as 1.5 m² or 16 ft², or a volume, such as 12 m³ or 500 US gal"
CYLINDER: dict[str, Any] = {"shape": "upright_cylinder", "diameter": "2.4 m", "height": "3 m"}
BOX: dict[str, Any] = {"shape": "box", "length": "2 m", "width": "2 m", "height": "1 m"}
BASIN: dict[str, Any] = {
    "shape": "basin",
    "base_length": "10 m",
    "base_width": "5 m",
    "side_slope": 2,
    "depth": "2 m",
}
AREAS: dict[str, Any] = {
    "shape": "table",
    "column": "area",
    "rows": [["0 m", "60 m²"], ["0.25 m", "420 m²"], ["2.4 m", "1700 m²"]],
}
VOLUMES: dict[str, Any] = {"shape": "table", "column": "volume", "rows": [["0 m", "0 m³"], ["1 m", "2 m³"]]}
INCREMENTS: dict[str, Any] = {
    "shape": "table",
    "column": "increment",
    "rows": [["0 mm", "0 L"], ["100 mm", "500 L"], ["200 mm", "480 L"]],
}
STACK: dict[str, Any] = {
    "shape": "stack",
    "parts": [{"shape": "cone", "top_diameter": "2 m", "bottom_diameter": "0.2 m", "height": "1 m"}, CYLINDER],
}


def case_of(vessel: dict[str, Any]) -> dict[str, Any]:
    """Return a case with this vessel."""
    return {
        "headfall": 1,
        "vessel": copy.deepcopy(vessel),
        "outlets": [{"opening": {"form": "round", "diameter": "50 mm"}}],
        "levels": {"start": "0.9 m", "stop": "0.1 m"},
    }


def lines(vessel: dict[str, Any]) -> list[str]:
    """Return the faults of a case with this vessel, one a line."""
    return [fault.line for fault in read_parts(case_of(vessel))[1]]


def without(vessel: dict[str, Any], key: str) -> dict[str, Any]:
    """Return a vessel without one of its keys."""
    return {name: value for name, value in vessel.items() if name != key}


@pytest.mark.parametrize(
    "vessel",
    [
        BASIN,
        {**BASIN, "base_length": "0 m", "side_slope": [2, 1.5]},
        {**BASIN, "side_slope": 0},
        AREAS,
        {**AREAS, "between": "conic"},
        {**AREAS, "rows": [["0 m", "0 m²"], ["1 m", "1 acre"], ["1 m", "2 acre"], ["2 m", "1 ha"]]},
        VOLUMES,
        {**VOLUMES, "between": "linear", "rows": [["0 m", "300 L"], ["1 m", "2 m³"]]},
        INCREMENTS,
        STACK,
        {**STACK, "parts": [BASIN, AREAS, BOX, {"shape": "sphere", "diameter": "1 m"}]},
        {**CYLINDER, "floor": {"form": "sloped", "fall": "50 mm"}},
        {**CYLINDER, "floor": {"form": "cone", "depth": "0.5 m", "cut": "80 mm"}},
        {**CYLINDER, "sizes": "outside", "wall": "6 mm", "lining": "0 mm"},
        {**BOX, "floor": {"form": "sloped", "fall": "20 mm"}},
        {**CYLINDER, "displacement": []},
        {**CYLINDER, "displacement": [{"from": "0 m", "to": "1 m", "volume": "20 L"}]},
        {"shape": "drum", "diameter": "2 m", "length": "5 m", "fall": "20 mm"},
    ],
)
def test_a_vessel_is_read_and_given_back_as_typed(vessel: dict[str, Any]) -> None:
    assert lines(vessel) == []
    assert case_as_data(read_case_data(case_of(vessel)))["vessel"] == vessel


def test_what_was_typed_becomes_the_parts_of_the_model() -> None:
    stack = read_case_data(case_of({**STACK, "parts": [BASIN, INCREMENTS, {**BOX, "floor": {}}]})).vessel
    assert isinstance(stack, Stack)
    basin, table, box = stack.parts
    assert isinstance(basin, Basin)
    assert basin.side_slope == 2
    assert isinstance(table, TableVessel)
    assert [cell.value for row in table.rows for cell in row] == pytest.approx([0, 0, 0.1, 0.5, 0.2, 0.48])
    assert isinstance(box, Box)
    cylinder = {
        **CYLINDER,
        "floor": {"form": "sloped", "fall": "50 mm"},
        "displacement": [{"from": "0 m", "to": "1 m", "volume": "20 L"}],
    }
    vessel = read_case_data(case_of(cylinder)).vessel
    assert isinstance(vessel, UprightCylinder)
    assert isinstance(vessel.floor, SlopedFloor)
    assert vessel.displacement is not None
    assert isinstance(vessel.displacement[0], Displacement)
    assert vessel.displacement[0].from_.text == "0 m"


@pytest.mark.parametrize(
    ("vessel", "expected"),
    [
        # Basins
        (
            {**BASIN, "base_length": "0 m", "side_slope": [0, 1]},
            [
                "vessel.base_length: The base length is nil and the sides there do not slope. "
                "Type a length above nil, such as 80 mm or 3 1/8 in, or a side slope."
            ],
        ),
        (
            {**BASIN, "side_slope": [1, 2, 3]},
            [
                "vessel.side_slope: A list of 3 is not a pair. "
                "Type a number of 0 or more, or two: for the length, then for the width."
            ],
        ),
        (
            {**BASIN, "side_slope": [-1, "2"]},
            [
                "vessel.side_slope[0]: -1 is below 0. Type a number of 0 or more.",
                'vessel.side_slope[1]: "2" is text. Type a number of 0 or more, without quotation marks.',
            ],
        ),
        (
            without(BASIN, "side_slope"),
            [
                "vessel.side_slope: This is missing. "
                "Type a number of 0 or more, or two: for the length, then for the width."
            ],
        ),
        # Rows as such
        ({**AREAS, "rows": []}, ["vessel.rows: The table has no rows. Type at least two rows."]),
        (
            {**AREAS, "rows": [["0 m", "1 m²"]]},
            ["vessel.rows: A table of one row is no vessel. Type at least two rows."],
        ),
        (
            {**AREAS, "rows": {}},
            [
                "vessel.rows: A group in braces is not a list. "
                "Type a list of rows in square brackets, each a length and an area or a volume."
            ],
        ),
        (
            without(AREAS, "rows"),
            [
                "vessel.rows: This is missing. "
                "Type a list of rows in square brackets, each a length and an area or a volume."
            ],
        ),
        (
            {**AREAS, "rows": ["x", ["0 m"], ["1 m", "2 m²", "3 m²"], [0, "3 kg"], ["-1 m", "-1 m²"]]},
            [
                'vessel.rows[0]: "x" is not a row. Type a row in square brackets: a length and an area or a volume.',
                "vessel.rows[1]: A row of 1 has too few columns. Type a length and an area or a volume.",
                "vessel.rows[2]: A row of 3 has too many columns. Type a length and an area or a volume.",
                f"vessel.rows[3][0]: 0 has no unit. Type {LENGTH}.",
                f"vessel.rows[3][1]: 3 kg is a mass. Type {AREA_OR_VOLUME}.",
                "vessel.rows[4][0]: -1 m is negative. Type a length of nil or more, such as 80 mm or 3 1/8 in.",
                "vessel.rows[4][1]: -1 m² is negative. Type an area of nil or more, such as 1.5 m² or 16 ft², "
                "or a volume of nil or more, such as 12 m³ or 500 US gal.",
            ],
        ),
        # Rows against each other and against the column
        (without(AREAS, "column"), ["vessel.column: This is missing. Type area, volume or increment."]),
        (
            {**AREAS, "rows": [["0.1 m", "1 m²"], ["1 m", "2 m3"], ["0.5 m", "3 m²"]]},
            [
                "vessel.rows[0][0]: The table begins at 0.1 m. Type the first row at level 0, the lowest inside point.",
                "vessel.rows[2][0]: 0.5 m is not above 1 m, the level before it. "
                "Type levels that rise from row to row.",
                "vessel.rows[1][1]: 2 m3 is a volume, and the column is area. Type an area, such as 1.5 m² or 16 ft².",
            ],
        ),
        (
            {**AREAS, "rows": [["0 m", "0 m²"], ["1 m", "0 m²"], ["1 m", "3 m²"], ["1 m", "4 m²"]]},
            [
                "vessel.rows[3][0]: A third row stands at 1 m. Type at most two rows at one level, a ledge.",
                "vessel.rows[1][1]: The areas at 0 m and at 1 m are both nil. "
                "Type an area above nil, such as 1.5 m² or 16 ft².",
            ],
        ),
        (
            {**AREAS, "rows": [["0 m", "1 m²"], ["0 m", "2 m²"]]},
            ["vessel.rows[1][0]: All levels of the table are 0 m. Type levels that rise from row to row."],
        ),
        (
            {**VOLUMES, "between": "conic"},
            ["vessel.between: The rule conic is one for areas. Type linear, or leave it out."],
        ),
        (
            {**VOLUMES, "rows": [["0 m", "2 m³"], ["1 m", "2 m³"], ["1 m", "3 m²"]]},
            [
                "vessel.rows[2][0]: 1 m is not above 1 m, the level before it. Type levels that rise from row to row.",
                "vessel.rows[2][1]: 3 m² is an area, and the column is volume. "
                "Type a volume, such as 12 m³ or 500 US gal.",
            ],
        ),
        (
            {**VOLUMES, "rows": [["0 m", "2 m³"], ["1 m", "2000 L"]]},
            [
                "vessel.rows[1][1]: 2000 L is not above 2 m³, the volume before it. "
                "Type volumes that rise from row to row."
            ],
        ),
        (
            {**INCREMENTS, "rows": [["0 m", "0 L"], ["1 m", "0 L"]]},
            ["vessel.rows[1][1]: 0 L puts nothing in. Type a volume above nil, such as 12 m³ or 500 US gal."],
        ),
        # Stacks
        ({**STACK, "parts": []}, ["vessel.parts: The list is empty. Type at least one part of the stack."]),
        (without(STACK, "parts"), ["vessel.parts: This is missing. Type at least one part of the stack."]),
        (
            {**STACK, "parts": [STACK]},
            [
                'vessel.parts[0].shape: "stack" is not a shape of stack parts known here. '
                "Type upright_cylinder, box, cone, sphere, basin or table."
            ],
        ),
        (
            {**STACK, "parts": [CYLINDER, without(BOX, "width")]},
            [f"vessel.parts[1].width: This is missing. Type {LENGTH}."],
        ),
        # Floors and displacement
        (
            {"shape": "drum", "diameter": "2 m", "length": "5 m", "heads": {"form": "sloped", "fall": "1 m"}},
            [
                'vessel.heads.form: "sloped" is not a head form known here. '
                "Type flat, cone, ellipsoidal, torispherical or hemispherical."
            ],
        ),
        (
            {**BOX, "floor": {"form": "cone", "depth": "1 m"}},
            ['vessel.floor.form: "cone" is not a floor form known here. Type flat or sloped.'],
        ),
        (
            {**CYLINDER, "displacement": [{"from": "1 m", "to": "100 cm", "volume": "20 L"}]},
            [
                "vessel.displacement[0].to: 100 cm is not above 1 m, where the displacement begins. "
                "Type a level above that."
            ],
        ),
        (
            {**CYLINDER, "displacement": [{"form": "0 m", "to": "1 m", "volume": "20 L"}]},
            [
                'vessel.displacement[0].form: "form" is not a key known here. Did you mean from?',
                f"vessel.displacement[0].from: This is missing. Type {LENGTH}.",
            ],
        ),
        (
            {**CYLINDER, "displacement": "20 L"},
            ['vessel.displacement: "20 L" is not a list. Type a list in square brackets.'],
        ),
        ({**CYLINDER, "sizes": "inner"}, ['vessel.sizes: "inner" is not a word known here. Type inside or outside.']),
    ],
)
def test_a_fault_has_its_sentence(vessel: dict[str, Any], expected: list[str]) -> None:
    assert lines(vessel) == expected
