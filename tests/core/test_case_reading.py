"""Every kind of fault in a case file has its sentence, at its place."""

from __future__ import annotations

import copy
from typing import Any

import pytest

from headfall.case.faults import CaseError
from headfall.case.model import CoefficientRange, ConeEnd, Drum, FlatEnd, Levels, Orifice, SteadyInflow
from headfall.case.reading import build_case, read_case_data, read_parts

LENGTH = "a length, such as 80 mm or 3 1/8 in"
LEVEL = "a level, such as 2.8 m, 80 %, 15 m³ or 53.1 m site"
SHAPES = "upright_cylinder, box, cone, drum, sphere, basin, table or stack"
SOUND: dict[str, Any] = {
    "headfall": 1,
    "vessel": {"shape": "upright_cylinder", "diameter": "2.4 m", "height": "3 m"},
    "outlets": [{"opening": {"form": "round", "diameter": "50 mm"}}],
    "levels": {"start": "2.8 m", "stop": "0.1 m"},
}
CONE = {"shape": "cone", "top_diameter": "2 m", "bottom_diameter": "0 m", "height": "1 m"}
DRUM = {"shape": "drum", "diameter": "2 m", "length": "5 m"}
ABSENT = object()


def with_value(place: str, value: object, sound: dict[str, Any] = SOUND) -> dict[str, Any]:
    """Return the sound case with another value at a place such as ``outlets.0.opening``; ABSENT takes the key out."""
    data = copy.deepcopy(sound)
    here: Any = data
    *way, last = [int(key) if key.isdigit() else key for key in place.split(".")]
    for key in way:
        if isinstance(here, dict):
            here.setdefault(key, {})
        here = here[key]
    if value is ABSENT:
        del here[last]
    else:
        here[last] = value
    return data


def lines(data: object) -> list[str]:
    """Return the faults of some data, one a line."""
    return [fault.line for fault in read_parts(data)[1]]


def test_the_sound_case_has_no_fault_and_takes_nothing_for_granted() -> None:
    case = read_case_data(SOUND)
    assert case.outlets[0].entry is None
    assert case.inflow is None
    assert case.headspace is None
    assert case.levels.start.value == 2.8


@pytest.mark.parametrize(
    ("place", "value", "line"),
    [
        # Quantities
        ("vessel.diameter", "2 kg", f"vessel.diameter: 2 kg is a mass. Type {LENGTH}."),
        ("vessel.diameter", "2.4", f"vessel.diameter: 2.4 has no unit. Type {LENGTH}."),
        ("vessel.diameter", 2.4, f"vessel.diameter: 2.4 has no unit. Type {LENGTH}."),
        ("vessel.diameter", "", f"vessel.diameter: Nothing is typed. Type {LENGTH}."),
        ("vessel.diameter", None, f"vessel.diameter: null is not a quantity with its unit. Type {LENGTH}."),
        ("vessel.diameter", True, f"vessel.diameter: true is not a quantity with its unit. Type {LENGTH}."),
        ("vessel.diameter", [], f"vessel.diameter: A list is not a quantity with its unit. Type {LENGTH}."),
        ("vessel.diameter", float("nan"), f"vessel.diameter: NaN is not a quantity with its unit. Type {LENGTH}."),
        (
            "vessel.diameter",
            "-2 m",
            "vessel.diameter: -2 m is negative. Type a length above nil, such as 80 mm or 3 1/8 in.",
        ),
        (
            "vessel.diameter",
            "0 mm",
            "vessel.diameter: 0 mm is nil. Type a length above nil, such as 80 mm or 3 1/8 in.",
        ),
        (
            "levels.stop",
            "-1 in",
            "levels.stop: -1 in is negative. Type a level of nil or more, such as 2.8 m, 80 %, 15 m³ or 53.1 m site.",
        ),
        ("vessel.diameter", ABSENT, f"vessel.diameter: This is missing. Type {LENGTH}."),
        ("inflow.rate", "3 m", "inflow.rate: 3 m is a length. Type a flow, such as 12 L/min or 40 US gal/min."),
        # Plain numbers
        (
            "structure.joint_efficiency",
            "0.85",
            'structure.joint_efficiency: "0.85" is text. Type a number above 0 and up to 1, without quotation marks.',
        ),
        (
            "structure.joint_efficiency",
            None,
            "structure.joint_efficiency: null is not a number. Type a number above 0 and up to 1.",
        ),
        (
            "structure.joint_efficiency",
            False,
            "structure.joint_efficiency: false is not a number. Type a number above 0 and up to 1.",
        ),
        (
            "structure.joint_efficiency",
            float("inf"),
            "structure.joint_efficiency: Infinity is not a finite number. Type a number above 0 and up to 1.",
        ),
        (
            "structure.joint_efficiency",
            0,
            "structure.joint_efficiency: 0 is not above 0. Type a number above 0 and up to 1.",
        ),
        (
            "structure.joint_efficiency",
            1.2,
            "structure.joint_efficiency: 1.2 is above 1. Type a number above 0 and up to 1.",
        ),
        ("outlets.0.count", 1.5, "outlets[0].count: 1.5 is not a whole number. Type a whole number from 1 to 10000."),
        ("outlets.0.count", 0, "outlets[0].count: 0 is below 1. Type a whole number from 1 to 10000."),
        # Words and texts
        ("outlets.0.facing", "up", 'outlets[0].facing: "up" is not a word known here. Type down or side.'),
        ("outlets.0.facing", None, "outlets[0].facing: null is not text. Type down or side."),
        ("units", "imperial", 'units: "imperial" is not a word known here. Type metric or us.'),
        ("title", 7, "title: 7 is not text. Type text in quotation marks."),
        ("title", None, "title: null is not text. Type text in quotation marks."),
        (
            "remarks",
            "\ud800",
            "remarks: This text holds half a character that no file can keep. Type text in quotation marks.",
        ),
        # Groups, kinds and keys
        ("vessel", "drum", 'vessel: "drum" is not a group of keys. Type a group of keys in braces.'),
        ("vessel", ABSENT, "vessel: This is missing. Type a group of keys for the vessel."),
        (
            "vessel.shape",
            ABSENT,
            f"vessel.shape: The shape is missing. Type {SHAPES}.",
        ),
        (
            "vessel.shape",
            "pyramid",
            f'vessel.shape: "pyramid" is not a vessel shape known here. Type {SHAPES}.',
        ),
        ("vessel.shape", 3, f"vessel.shape: 3 is not text. Type {SHAPES}."),
        (
            "vessel.floor",
            {"form": "dished"},
            'vessel.floor.form: "dished" is not a floor form known here. '
            "Type flat, cone, ellipsoidal, torispherical, hemispherical or sloped.",
        ),
        (
            "outlets.0.opening.form",
            "oval",
            'outlets[0].opening.form: "oval" is not an opening form known here. Type round or rectangle.',
        ),
        (
            "outlets.0.kind",
            "siphon",
            'outlets[0].kind: "siphon" is not a kind of outlet known here. Type orifice, pipe or weir.',
        ),
        ("inflow.kind", "tidal", 'inflow.kind: "tidal" is not a kind of inflow known here. Type steady.'),
        ("headspace", {}, "headspace.kind: The kind is missing. Type open, pressurised, closed or vented."),
        ("vessel.diametre", "2 m", 'vessel.diametre: "diametre" is not a key known here. Did you mean diameter?'),
        (
            "levels.zzz",
            "2 m",
            'levels.zzz: "zzz" is not a key known here. The keys known here are start, stop, overflow, high, '
            "site_datum and shown.",
        ),
        (
            "headspace",
            {"kind": "open", "q": 1},
            'headspace.q: "q" is not a key known here. The only key known here is kind.',
        ),
        (
            "qqqq",
            1,
            'qqqq: "qqqq" is not a key known here. '
            "Leave it out, or see the page on the case file for the keys known here.",
        ),
        # Outlets
        ("outlets", [], "outlets: The list is empty. Type at least one outlet."),
        ("outlets", {}, "outlets: A group in braces is not a list. Type a list in square brackets."),
        ("outlets", ABSENT, "outlets: This is missing. Type at least one outlet."),
        ("outlets.0.opening", ABSENT, "outlets[0].opening: This is missing. Type a group of keys for the opening."),
        (
            "outlets.0.coefficient",
            0.61,
            "outlets[0].coefficient: 0.61 is not a coefficient. Type handbook, or a group with low, typical and high.",
        ),
        (
            "outlets.0.coefficient",
            {"low": 0.63, "typical": 0.61, "high": 0.6},
            "outlets[0].coefficient: 0.63, 0.61, 0.6 do not rise from low over typical to high. "
            "Type low, typical and high in rising order.",
        ),
        (
            "outlets.0.coefficient",
            {"low": 0.6, "typical": 0.61},
            "outlets[0].coefficient.high: This is missing. Type a number above 0 and up to 1.5.",
        ),
        (
            "outlets.0.entry",
            "thick_plate",
            f"outlets[0].thickness: The entry thick_plate needs its thickness. Type {LENGTH}.",
        ),
        (
            "outlets.0.entry",
            "short_tube",
            f"outlets[0].thickness: The entry short_tube needs its thickness. Type {LENGTH}.",
        ),
        (
            "outlets.0.entry",
            "rounded",
            f"outlets[0].edge_radius: The entry rounded needs its edge radius. Type {LENGTH}.",
        ),
        (
            "outlets.0.thickness",
            "6 mm",
            "outlets[0].thickness: The entry sharp_edged takes no thickness. "
            "Leave it out, or choose the entry thick_plate or short_tube.",
        ),
        (
            "outlets.0.edge_radius",
            "6 mm",
            "outlets[0].edge_radius: The entry sharp_edged takes no edge radius. "
            "Leave it out, or choose the entry rounded.",
        ),
        # Shapes that do not close
        (
            "vessel",
            {**CONE, "top_diameter": "0 m"},
            "vessel.top_diameter: Both diameters of the cone are nil. Type one of them above nil.",
        ),
        (
            "vessel",
            {**DRUM, "heads": {"form": "torispherical", "crown_ratio": 0.4}},
            "vessel.heads.crown_ratio: 0.4 is below 0.5. Type a number of 0.5 or more.",
        ),
        (
            "vessel",
            {**DRUM, "heads": [{"form": "flat"}, {"form": "torispherical", "knuckle_ratio": 0.6}]},
            "vessel.heads[1].knuckle_ratio: 0.6 is above 0.5. Type a number above 0 and up to 0.5.",
        ),
        (
            "vessel",
            {**DRUM, "heads": [{"form": "flat"}]},
            "vessel.heads: A list of 1 is not a pair. Type one head, or two: the low end, then the high end.",
        ),
        (
            "vessel",
            {**DRUM, "heads": {"form": "oval"}},
            'vessel.heads.form: "oval" is not a head form known here. '
            "Type flat, cone, ellipsoidal, torispherical or hemispherical.",
        ),
        # Levels
        (
            "levels.overflow",
            "2.7 m",
            "levels.start: The start level 2.8 m stands above the overflow level 2.7 m. "
            "Type a level not above the overflow.",
        ),
        ("levels.stop", ABSENT, f"levels.stop: This is missing. Type {LEVEL}."),
        # The format number
        (
            "headfall",
            2,
            "headfall: A newer Headfall wrote this case (format 2; this version reads 1). Open it with that version.",
        ),
        ("headfall", ABSENT, "headfall: The format number is missing. A case file begins with headfall: 1."),
        ("headfall", "1", 'headfall: "1" is not a format number. Type the whole number 1.'),
        ("headfall", True, "headfall: true is not a format number. Type the whole number 1."),
        ("headfall", 1.0, "headfall: 1.0 is not a format number. Type the whole number 1."),
        ("headfall", 0, "headfall: 0 is not a format number. Type the whole number 1."),
        ("field_tests", {}, "field_tests: A group in braces is not a list. Leave the key out or give an empty list."),
    ],
)
def test_a_fault_has_its_sentence(place: str, value: object, line: str) -> None:
    assert lines(with_value(place, value)) == [line]


@pytest.mark.parametrize(
    ("place", "value"),
    [
        ("vessel", {**DRUM, "fall": "0 mm"}),
        ("outlets.0.blocked", 0),
        ("outlets.0.role", "drain"),
        ("field_tests", []),
        ("liquid", {}),
        ("liquid.name", "water"),
        ("target", {}),
        ("vessel.floor", {}),
        ("levels.start", "0 m"),
        ("vessel", CONE),
        ("outlets.0.count", 3),
        ("outlets.0.coefficient", {"low": 0.6, "typical": 0.6, "high": 0.6}),
        ("levels.overflow", "2.8 m"),
    ],
)
def test_what_may_be_given_is_taken(place: str, value: object) -> None:
    assert lines(with_value(place, value)) == []


def test_the_words_that_may_be_left_out_take_their_defaults() -> None:
    case = read_case_data({**SOUND, "inflow": {"rate": "1 L/s"}, "vessel": {**DRUM, "heads": {}}})
    assert isinstance(case.vessel, Drum)
    assert isinstance(case.inflow, SteadyInflow)
    assert isinstance(case.outlets[0], Orifice)
    assert case.vessel.heads == FlatEnd()


def test_heads_are_one_form_or_a_pair() -> None:
    pair = [{"form": "flat"}, {"form": "cone", "depth": "300 mm"}]
    drum = read_case_data({**SOUND, "vessel": {**DRUM, "heads": pair}}).vessel
    assert isinstance(drum, Drum)
    assert isinstance(drum.heads, tuple)
    assert isinstance(drum.heads[1], ConeEnd)
    assert drum.heads[1].depth.value == pytest.approx(0.3)


def test_several_faults_are_reported_together_and_sound_parts_are_kept() -> None:
    data = with_value("vessel.diameter", "2 kg")
    data["outlets"].append({"opening": {"form": "round", "diameter": None}, "facing": "up"})
    data["levels"] = {"start": "2.8 m", "stop": "soon", "overflow": "2 m"}
    parts, faults = read_parts(data)
    assert [fault.place for fault in faults] == [
        "vessel.diameter",
        "outlets[1].opening.diameter",
        "outlets[1].facing",
        "levels.stop",
        "levels.start",
    ]
    assert "vessel" not in parts
    assert isinstance(parts["outlets"][0], Orifice)
    assert parts["outlets"][1] is None
    assert isinstance(parts["levels"], Levels)
    assert parts["levels"].start.value == 2.8
    assert parts["levels"].stop is None


def test_a_faulty_entry_is_not_blamed_for_its_thickness() -> None:
    outlet = {**SOUND["outlets"][0], "entry": "thickplate", "thickness": "6 mm"}
    assert len(lines({**SOUND, "outlets": [outlet]})) == 1


def test_a_newer_format_is_read_no_further() -> None:
    assert len(lines({"headfall": 3, "vessel": None, "tank": 1})) == 1


def test_build_case_names_what_it_cannot_do_without() -> None:
    with pytest.raises(CaseError) as refusal:
        build_case({"outlets": [None], "levels": Levels()})
    assert [fault.place for fault in refusal.value.faults] == ["vessel", "outlets", "levels.start", "levels.stop"]


@pytest.mark.parametrize(
    ("data", "line"),
    [
        ([], "The file holds a list, no case. A case file holds one group in braces."),
        ("tank", '"tank" is no case. A case file holds one group in braces.'),
        (None, "null is no case. A case file holds one group in braces."),
    ],
)
def test_a_file_that_holds_no_group_is_no_case(data: object, line: str) -> None:
    assert lines(data) == [line]


def test_numbers_are_kept_as_typed() -> None:
    given = {"low": 0.6, "typical": 0.61, "high": 1}
    coefficient = read_case_data(with_value("outlets.0.coefficient", given)).outlets[0].coefficient
    assert isinstance(coefficient, CoefficientRange)
    assert isinstance(coefficient.high, int)
    assert isinstance(coefficient.low, float)
