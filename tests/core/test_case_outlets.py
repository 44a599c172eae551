"""Pipes, weirs and receiving vessels in a case file, and what is refused of them."""

from __future__ import annotations

import copy
from typing import Any

import pytest

from headfall.case.model import LossRange, Pipe, ReceivingVessel, Weir
from headfall.case.reading import read_case_data, read_parts
from headfall.case.writing import case_as_data

LENGTH = "a length, such as 80 mm or 3 1/8 in"
BORE = "a bore, such as 102.26 mm or NPS 4 sch 40"
RANGE = {"low": 1, "typical": 2, "high": 3}
ORIFICE: dict[str, Any] = {"kind": "orifice", "opening": {"form": "round", "diameter": "50 mm"}}
PIPE: dict[str, Any] = {"kind": "pipe", "bore": "NPS 4 sch 40", "length": "6 m"}
WEIR: dict[str, Any] = {"kind": "weir", "form": "rectangular", "width": "1 m", "crest": "2 m"}
NOTCH: dict[str, Any] = {"kind": "weir", "form": "vnotch", "angle": "90°", "crest": "2 m"}
STANDPIPE: dict[str, Any] = {"kind": "weir", "form": "standpipe", "diameter": "DN 100 sch 40", "crest": "2 m"}
RECEIVER: dict[str, Any] = {
    "vessel": {"shape": "box", "length": "2 m", "width": "2 m", "height": "2 m"},
    "elevation": "-2 m",
    "level": "-2 m",
}


def case_of(outlet: dict[str, Any]) -> dict[str, Any]:
    """Return a case with this outlet."""
    return {
        "headfall": 1,
        "vessel": {"shape": "upright_cylinder", "diameter": "2.4 m", "height": "3 m"},
        "outlets": [copy.deepcopy(outlet)],
        "levels": {"start": "2.8 m", "stop": "0.1 m"},
    }


def lines(outlet: dict[str, Any]) -> list[str]:
    """Return the faults of a case with this outlet, one a line."""
    return [fault.line for fault in read_parts(case_of(outlet))[1]]


def without(outlet: dict[str, Any], key: str) -> dict[str, Any]:
    """Return an outlet without one of its keys."""
    return {name: value for name, value in outlet.items() if name != key}


@pytest.mark.parametrize(
    "outlet",
    [
        {**ORIFICE, "role": "overflow", "blocked": 0.3, "tailwater": "-1 m"},
        {**ORIFICE, "tailwater": RECEIVER},
        PIPE,
        without(PIPE, "length"),
        {
            **PIPE,
            "name": "line",
            "entry_loss": RANGE,
            "material": "commercial steel",
            "fittings": [
                {"name": "bend", "loss": 0.3, "count": 2},
                {"name": "strainer", "loss": RANGE, "laminar_loss": 300},
                {"name": "gate valve"},
            ],
            "valve": {"kv": 40, "opening": 0.5, "characteristic": "equal_percentage"},
            "sections": [
                {"bore": "50 mm", "length": "0 m", "fittings": []},
                {"bore": "2 in", "length": "3 ft", "valve": {"cv": 12}, "friction_factor": 0.02},
            ],
            "elevation": "0.1 m",
            "discharge_elevation": "-2 m",
            "station": "1 m",
            "count": 2,
            "role": "drain",
            "blocked": 0,
            "tailwater": RECEIVER,
        },
        {**PIPE, "entry": "rounded", "edge_radius": "5 mm", "roughness": "0 mm"},
        {**PIPE, "entry": "rounded", "entry_loss": 0.1},
        {**PIPE, "entry": "thick_plate"},
        WEIR,
        {**WEIR, "channel_width": "1 m", "coefficient": {"low": 0.6, "typical": 0.61, "high": 0.63}, "count": 2},
        NOTCH,
        {**WEIR, "form": "broad_crested", "name": "spillway", "role": "overflow", "blocked": 0.5},
        STANDPIPE,
        {**STANDPIPE, "discharge_elevation": "-1 m", "roughness": "0.1 mm", "coefficient": "handbook"},
    ],
)
def test_an_outlet_is_read_and_given_back_as_typed(outlet: dict[str, Any]) -> None:
    assert lines(outlet) == []
    assert case_as_data(read_case_data(case_of(outlet)))["outlets"] == [outlet]


def test_what_was_typed_becomes_the_parts_of_the_model() -> None:
    typed = {**PIPE, "fittings": [{"name": "bend", "loss": RANGE}], "tailwater": RECEIVER}
    pipe = read_case_data(case_of(typed)).outlets[0]
    assert isinstance(pipe, Pipe)
    assert pipe.bore.text == "NPS 4 sch 40"
    assert pipe.bore.value == pytest.approx(0.10226, abs=1e-5)
    assert pipe.fittings is not None
    assert pipe.fittings[0].loss == LossRange(1, 2, 3)
    assert isinstance(pipe.tailwater, ReceivingVessel)
    weir = read_case_data(case_of(WEIR)).outlets[0]
    assert isinstance(weir, Weir)
    assert weir.crest.value == 2


@pytest.mark.parametrize(
    ("outlet", "expected"),
    [
        # Pipes
        ({**PIPE, "bore": "2 kg"}, [f"outlets[0].bore: 2 kg is a mass. Type {BORE}."]),
        (without(PIPE, "bore"), [f"outlets[0].bore: This is missing. Type {BORE}."]),
        (
            {**PIPE, "roughness": "0.1 mm", "friction_factor": 0.02},
            ["outlets[0].friction_factor: A friction factor is given beside a roughness. Leave one of the two out."],
        ),
        (
            {**PIPE, "sections": [{"bore": "2 in", "length": "1 m", "roughness": "1 mm", "friction_factor": 0.02}]},
            [
                "outlets[0].sections[0].friction_factor: A friction factor is given beside a roughness. "
                "Leave one of the two out."
            ],
        ),
        (
            {**PIPE, "edge_radius": "3 mm"},
            [
                "outlets[0].edge_radius: The entry sharp_edged takes no edge radius. "
                "Leave it out, or choose the entry rounded."
            ],
        ),
        (
            {**PIPE, "entry": "rounded"},
            [f"outlets[0].edge_radius: The entry rounded needs its edge radius. Type {LENGTH}."],
        ),
        ({**PIPE, "valve": {}}, ["outlets[0].valve: The valve has no flow coefficient. Give its kv or its cv."]),
        (
            {**PIPE, "valve": {"kv": 1, "cv": 2}},
            ["outlets[0].valve.cv: A cv is given beside a kv. Leave one of the two out."],
        ),
        (
            {**PIPE, "valve": {"kv": 0}},
            ["outlets[0].valve.kv: 0 is not above 0. Type a number above 0."],
        ),
        (
            {**PIPE, "fittings": [{"loss": {"low": 3, "typical": 2, "high": 4}}]},
            [
                "outlets[0].fittings[0].loss: 3, 2, 4 do not rise from low over typical to high. "
                "Type low, typical and high in rising order.",
                "outlets[0].fittings[0].name: This is missing. Type text in quotation marks.",
            ],
        ),
        (
            {**PIPE, "fittings": [{"name": "bend", "loss": {"low": 1}}]},
            [
                "outlets[0].fittings[0].loss.typical: This is missing. Type a number of 0 or more.",
                "outlets[0].fittings[0].loss.high: This is missing. Type a number of 0 or more.",
            ],
        ),
        (
            {**PIPE, "entry_loss": "0.5"},
            ['outlets[0].entry_loss: "0.5" is text. Type a number of 0 or more, without quotation marks.'],
        ),
        (
            {**PIPE, "fittings": {"name": "bend"}},
            ["outlets[0].fittings: A group in braces is not a list. Type a list in square brackets."],
        ),
        # Weirs
        (
            {**WEIR, "form": "vnotch"},
            [
                "outlets[0].width: The form vnotch takes no width. "
                "Leave it out, or choose the form rectangular or broad_crested.",
                "outlets[0].angle: The form vnotch needs its angle. Type an angle, such as 30° or 0.52 rad.",
            ],
        ),
        (
            {**NOTCH, "angle": "180 deg"},
            ["outlets[0].angle: 180 deg is no notch. Type an angle below 180°, such as 90°."],
        ),
        (
            {**WEIR, "channel_width": "0.5 m"},
            [
                "outlets[0].channel_width: A channel of 0.5 m is narrower than the crest, 1 m. "
                "Type a width at least that of the crest."
            ],
        ),
        (
            {**WEIR, "form": "broad_crested", "channel_width": "2 m"},
            [
                "outlets[0].channel_width: The form broad_crested takes no channel width. "
                "Leave it out, or choose the form rectangular."
            ],
        ),
        (
            {**STANDPIPE, "discharge_elevation": "2 m"},
            [
                "outlets[0].discharge_elevation: The lower end at 2 m is not below the crest, 2 m. "
                "Type a height below the crest."
            ],
        ),
        (
            without(STANDPIPE, "diameter"),
            [f"outlets[0].diameter: The form standpipe needs its diameter. Type {BORE}."],
        ),
        (
            without(WEIR, "form"),
            ["outlets[0].form: This is missing. Type rectangular, vnotch, broad_crested or standpipe."],
        ),
        (without(WEIR, "crest"), [f"outlets[0].crest: This is missing. Type {LENGTH}."]),
        # What they discharge into
        (
            {**ORIFICE, "tailwater": {**RECEIVER, "level": "-3 m"}},
            [
                "outlets[0].tailwater.level: -3 m is below the receiving vessel's lowest point, -2 m. "
                "Type a height at that point or above it."
            ],
        ),
        (
            {**ORIFICE, "tailwater": {"elevation": "0 m"}},
            [
                "outlets[0].tailwater.vessel: This is missing. Type a group of keys for the vessel.",
                f"outlets[0].tailwater.level: This is missing. Type {LENGTH}.",
            ],
        ),
        ({**ORIFICE, "tailwater": 3}, [f"outlets[0].tailwater: 3 has no unit. Type {LENGTH}."]),
        ({**ORIFICE, "blocked": 1.2}, ["outlets[0].blocked: 1.2 is above 1. Type a number from 0 to 1."]),
    ],
)
def test_a_fault_has_its_sentence(outlet: dict[str, Any], expected: list[str]) -> None:
    assert lines(outlet) == expected
