"""Changes to a case give another case and keep what still applies."""

from __future__ import annotations

from typing import Any

import pytest

from headfall.case.editing import (
    attribute_of,
    change_end_form,
    change_opening_form,
    change_shape,
    insert_outlet,
    read_entry,
    remove_outlet,
    replace_at,
    value_at,
)
from headfall.case.faults import CaseError
from headfall.case.model import Case, CoefficientRange, Cone, Drum, Orifice, Path, Sphere, SteadyInflow, Target
from headfall.case.reading import read_case_data
from headfall.case.writing import case_as_data

PLAIN: dict[str, Any] = {
    "headfall": 1,
    "vessel": {
        "shape": "upright_cylinder",
        "diameter": "7 ft",
        "height": "10 ft",
        "floor": {"form": "cone", "depth": "1 ft"},
    },
    "outlets": [{"name": "drain", "opening": {"form": "round", "diameter": "2 in"}}],
    "levels": {"start": "8 ft", "stop": "6 in"},
}
CASE = read_case_data(PLAIN)


def vessel(case: Case) -> Any:
    """Return the vessel as the file holds it."""
    return case_as_data(case)["vessel"]


def test_value_at_finds_what_was_typed() -> None:
    assert value_at(CASE, ()) is CASE
    assert value_at(CASE, ("outlets", 0, "opening", "diameter")).text == "2 in"
    assert value_at(CASE, ("inflow", "rate")) is None
    assert value_at(CASE, ("outlets", 0)) is CASE.outlets[0]


@pytest.mark.parametrize(
    "path",
    [
        ("tank",),
        ("vessel", "width"),
        ("outlets", 1),
        ("outlets", -1),
        ("outlets", "first"),
        ("inflow", "speed"),
        ("title", "first"),
        ("vessel", "diameter", "text"),
        ("vessel", 0),
    ],
)
def test_a_path_to_nowhere_is_a_lookup_error(path: Path) -> None:
    for look_up in (value_at, attribute_of, lambda case, way: replace_at(case, way, 3)):
        with pytest.raises(LookupError):
            look_up(CASE, path)


@pytest.mark.parametrize(
    ("path", "text"),
    [
        (("inflow", "rate"), "3 L/s"),
        (("liquid", "temperature"), "60 degF"),
        (("target", "drain_time"), "20 min"),
        (("structure", "shell_thickness"), "5 mm"),
        (("surroundings", "gravity"), "9.81 m/s^2"),
        (("levels", "overflow"), "9 ft"),
    ],
)
def test_a_part_that_was_not_typed_is_begun(path: Path, text: str) -> None:
    changed = replace_at(CASE, path, read_entry(CASE, path, text))
    assert value_at(changed, path).text == text
    assert value_at(CASE, path) is None


def test_an_entry_typed_and_cleared_gives_back_the_former_case() -> None:
    path: Path = ("target", "drain_time")
    changed = replace_at(CASE, path, read_entry(CASE, path, "20 min"))
    assert isinstance(changed.target, Target)
    assert replace_at(changed, path, None) == CASE
    assert replace_at(CASE, path, None) is CASE


def test_a_steady_inflow_stays_declared_when_its_rate_is_cleared() -> None:
    changed = replace_at(CASE, ("inflow", "rate"), read_entry(CASE, ("inflow", "rate"), "3 L/s"))
    assert replace_at(changed, ("inflow", "rate"), None).inflow == SteadyInflow()


def test_a_part_without_a_default_must_be_put_in_as_a_whole() -> None:
    with pytest.raises(LookupError):
        replace_at(CASE, ("outlets", 0, "coefficient", "low"), 0.6)
    changed = replace_at(CASE, ("outlets", 0, "coefficient"), CoefficientRange(0.6, 0.61, 0.62))
    assert (
        value_at(replace_at(changed, ("outlets", 0, "coefficient", "low"), 0.59), ("outlets", 0, "coefficient", "low"))
        == 0.59
    )


def test_a_case_is_not_replaced_by_a_part() -> None:
    with pytest.raises(LookupError):
        replace_at(CASE, (), CASE.vessel)


@pytest.mark.parametrize("start", [CASE, Case])
def test_metadata_are_found_for_a_case_and_for_the_model(start: Any) -> None:
    assert attribute_of(start, ("outlets", 0, "opening", "diameter"))["dimension"] == "length"
    assert attribute_of(start, ("inflow", "rate"))["default"] == "0 L/s"
    assert attribute_of(start, ("levels", "start"))["required"] is True
    assert attribute_of(start, ("vessel", "floor", "depth"))["sign"] == "positive"
    assert attribute_of(start, ("outlets", 0, "facing"))["choices"] == ("down", "side")


@pytest.mark.parametrize(
    ("path", "text", "value"),
    [
        (("outlets", 0, "count"), "3", 3),
        (("structure", "joint_efficiency"), "0,85", 0.85),
        (("structure", "joint_efficiency"), " 1 ", 1),
        (("structure", "joint_efficiency"), "3/4", 0.75),
        (("outlets", 0, "facing"), "side", "side"),
        (("title",), "  Day tank", "  Day tank"),
        (("title",), "", ""),
        (("inflow", "rate"), " ", None),
    ],
)
def test_an_entry_is_read_by_its_kind(path: Path, text: str, value: object) -> None:
    assert read_entry(CASE, path, text) == value


def test_whole_numbers_stay_whole() -> None:
    assert isinstance(read_entry(CASE, ("structure", "joint_efficiency"), "1"), int)
    assert isinstance(read_entry(CASE, ("structure", "joint_efficiency"), "1.0"), float)


@pytest.mark.parametrize(
    ("path", "text", "sentence"),
    [
        (("vessel", "diameter"), "2 kg", "2 kg is a mass. Type a length, such as 80 mm or 3 1/8 in."),
        (("vessel", "diameter"), "", "Nothing is typed. Type a length, such as 80 mm or 3 1/8 in."),
        (("vessel", "diameter"), "-2 ft", "-2 ft is negative. Type a length above nil, such as 80 mm or 3 1/8 in."),
        (("outlets", 0, "count"), "two", "two is not a number. Type a whole number from 1 to 10000."),
        (("outlets", 0, "count"), "2 off", "2 off is more than a plain number. Type a whole number from 1 to 10000."),
        (("outlets", 0, "count"), "2.5", "2.5 is not a whole number. Type a whole number from 1 to 10000."),
        (("outlets", 0, "count"), "1,000", "1,000 can be 1000 or 1.0. Type 1000 or 1.0."),
        (("structure", "joint_efficiency"), "1/0", "1/0 divides by 0. Type a number above 0 and up to 1."),
        (("outlets", 0, "facing"), "up", '"up" is not a word known here. Type down or side.'),
    ],
)
def test_a_wrong_entry_says_what_is_wanted(path: Path, text: str, sentence: str) -> None:
    with pytest.raises(CaseError) as refusal:
        read_entry(CASE, path, text)
    assert [(fault.path, fault.sentence) for fault in refusal.value.faults] == [(path, sentence)]


def test_a_part_is_not_an_entry_to_type_into() -> None:
    with pytest.raises(LookupError):
        read_entry(CASE, ("vessel",), "drum")


def test_outlets_come_and_go() -> None:
    second = replace_at(CASE, ("outlets", 0, "name"), "second").outlets[0]
    two = insert_outlet(CASE, 1, second)
    assert [outlet.name for outlet in two.outlets] == ["drain", "second"]
    assert [outlet.name for outlet in insert_outlet(CASE, 0, second).outlets] == ["second", "drain"]
    assert remove_outlet(two, 1) == CASE
    assert remove_outlet(two, 0).outlets == (second,)
    with pytest.raises(ValueError, match="at least one outlet"):
        remove_outlet(CASE, 0)
    with pytest.raises(LookupError):
        remove_outlet(two, 2)


def test_a_shape_keeps_what_still_applies() -> None:
    cone_end = {"form": "cone", "depth": "1 ft"}
    assert vessel(change_shape(CASE, "drum")) == {
        "shape": "drum",
        "diameter": "7 ft",
        "length": "10 ft",
        "heads": cone_end,
    }
    assert vessel(change_shape(CASE, "sphere")) == {"shape": "sphere", "diameter": "7 ft"}
    assert vessel(change_shape(CASE, "box")) == {"shape": "box", "length": "7 ft", "width": "7 ft", "height": "10 ft"}
    assert vessel(change_shape(CASE, "cone")) == {
        "shape": "cone",
        "top_diameter": "7 ft",
        "bottom_diameter": "3.5 ft",
        "height": "10 ft",
    }
    assert change_shape(CASE, "upright_cylinder") is CASE
    assert change_shape(CASE, "drum").levels == CASE.levels


def test_there_and_back_is_the_former_vessel_where_nothing_was_lost() -> None:
    assert change_shape(change_shape(CASE, "drum"), "upright_cylinder") == CASE
    round_and_back = change_opening_form(CASE, ("outlets", 0, "opening"), "rectangle")
    assert change_opening_form(round_and_back, ("outlets", 0, "opening"), "round") == CASE


def test_the_point_of_a_cone_is_taken_over_by_no_other_shape() -> None:
    top: Any = read_entry(Case, ("vessel", "top_diameter"), "7 ft")
    nil: Any = read_entry(Case, ("vessel", "top_diameter"), "0 in")
    case = replace_at(CASE, ("vessel",), Cone(nil, top, top))
    assert vessel(change_shape(case, "sphere")) == {"shape": "sphere", "diameter": "7 ft"}
    both = replace_at(CASE, ("vessel",), Cone(nil, nil, top))
    assert vessel(change_shape(both, "sphere")) == {"shape": "sphere", "diameter": "7 ft"}


def test_a_station_goes_with_its_drum() -> None:
    drum = change_shape(CASE, "drum")
    drum = replace_at(drum, ("outlets", 0, "station"), read_entry(drum, ("outlets", 0, "station"), "3 ft"))
    assert change_shape(drum, "sphere").outlets[0].station is None
    assert isinstance(change_shape(drum, "sphere").vessel, Sphere)


def test_ends_change_their_form() -> None:
    flat = change_end_form(CASE, ("vessel", "floor"), "flat")
    assert vessel(flat)["floor"] == {"form": "flat"}
    assert vessel(change_end_form(flat, ("vessel", "floor"), "cone"))["floor"] == {"form": "cone", "depth": "1.75 ft"}
    assert change_end_form(CASE, ("vessel", "floor"), "cone") == CASE
    drum = change_end_form(change_shape(CASE, "drum"), ("vessel", "heads"), "ellipsoidal")
    pair = change_end_form(drum, ("vessel", "heads", 1), "flat")
    assert vessel(pair)["heads"] == [{"form": "ellipsoidal"}, {"form": "flat"}]
    assert vessel(change_end_form(pair, ("vessel", "heads", 0), "flat"))["heads"] == [
        {"form": "flat"},
        {"form": "flat"},
    ]
    assert vessel(change_end_form(pair, ("vessel", "heads"), "ellipsoidal"))["heads"] == {"form": "ellipsoidal"}
    two = change_end_form(drum, ("vessel", "heads"), "two")
    assert vessel(two)["heads"] == [{"form": "ellipsoidal"}, {"form": "ellipsoidal"}]
    assert change_end_form(two, ("vessel", "heads"), "two") == two
    assert isinstance(two.vessel, Drum)


@pytest.mark.parametrize(
    "path",
    [("vessel",), ("vessel", "heads"), ("levels", "floor"), ("vessel", "floor", 0), ("vessel", "diameter")],
)
def test_an_end_that_is_not_there_is_a_lookup_error(path: Path) -> None:
    with pytest.raises(LookupError):
        change_end_form(CASE, path, "flat")


def test_an_opening_changes_its_form() -> None:
    changed = change_opening_form(CASE, ("outlets", 0, "opening"), "rectangle")
    assert case_as_data(changed)["outlets"][0]["opening"] == {"form": "rectangle", "width": "2 in", "height": "2 in"}
    assert change_opening_form(CASE, ("outlets", 0), "round") is CASE
    with pytest.raises(LookupError):
        change_opening_form(CASE, ("outlets", 1), "round")


def test_a_shape_that_is_not_known_is_a_lookup_error() -> None:
    with pytest.raises(LookupError, match="pyramid is not one of"):
        change_shape(CASE, "pyramid")


def test_the_former_case_stays_as_it_was() -> None:
    before = case_as_data(CASE)
    change_shape(CASE, "box")
    replace_at(CASE, ("title",), "another")
    insert_outlet(CASE, 0, Orifice())
    assert (
        case_as_data(CASE)
        == before
        == {**PLAIN, "outlets": [{"name": "drain", "kind": "orifice", **PLAIN["outlets"][0]}]}
    )
