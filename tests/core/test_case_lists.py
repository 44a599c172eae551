"""Lists in a case grow and shrink, and what stands in them is found, read and changed at its place."""

from __future__ import annotations

from typing import Any

import pytest

from headfall.case.editing import attribute_of, insert_part, read_entry, remove_part, replace_at, value_at
from headfall.case.faults import CaseError, place_words
from headfall.case.model import Case, Fitting, LossRange, Path
from headfall.case.reading import read_case_data
from headfall.case.writing import case_as_data
from headfall.outlet.handbook_losses import fitting

DATA: dict[str, Any] = {
    "headfall": 1,
    "vessel": {
        "shape": "table",
        "column": "area",
        "rows": [["0 m", "60 m²"], ["1 m", "80 m²"], ["2 m", "120 m²"]],
        "displacement": [{"from": "0 m", "to": "1 m", "volume": "20 L"}],
    },
    "liquid": {
        "name": "oil",
        "properties": [["10 degC", "900 kg/m³", "30 cSt"], ["30 degC", "890 kg/m³", "20 cSt", "1 kPa"]],
        "also_at": ["15 degC"],
    },
    "outlets": [
        {
            "kind": "pipe",
            "bore": "100 mm",
            "fittings": [
                {"name": "bend", "loss": 0.3},
                {"name": "strainer", "loss": {"low": 1, "typical": 2, "high": 3}},
            ],
            "sections": [{"bore": "50 mm", "length": "2 m", "fittings": [{"name": "bend", "loss": 0.3}]}],
            "tailwater": {
                "vessel": {"shape": "upright_cylinder", "diameter": "5 m", "height": "3 m"},
                "elevation": "-3 m",
                "level": "-3 m",
            },
        }
    ],
    "levels": {"start": "1.9 m", "stop": "0.1 m"},
}
CASE = read_case_data(DATA)
STACK = replace_at(
    CASE,
    ("vessel",),
    read_case_data(
        {
            **DATA,
            "vessel": {
                "shape": "stack",
                "parts": [
                    {"shape": "cone", "top_diameter": "2 m", "bottom_diameter": "0.2 m", "height": "1 m"},
                    {"shape": "basin", "base_length": "2 m", "base_width": "2 m", "side_slope": [1, 2], "depth": "1 m"},
                ],
            },
        }
    ).vessel,
)


def at(case: Case, path: Path) -> Any:
    """Return what the file holds at a path, having made sure that the case can be read back."""
    here: Any = case_as_data(case)
    assert read_case_data(here) == case
    for key in path:
        here = here[key]
    return here


@pytest.mark.parametrize(
    ("case", "path", "text"),
    [
        (CASE, ("vessel", "rows", 2, 1), "130 m²"),
        (CASE, ("vessel", "rows", 1, 0), "0.5 m"),
        (CASE, ("vessel", "displacement", 0, "from"), "0.2 m"),
        (CASE, ("liquid", "properties", 1, 3), "2 kPa"),
        (CASE, ("liquid", "also_at", 0), "12 degC"),
        (CASE, ("outlets", 0, "bore"), "NPS 4 sch 40"),
        (CASE, ("outlets", 0, "sections", 0, "fittings", 0, "name"), "tee"),
        (CASE, ("outlets", 0, "tailwater", "level"), "-2 m"),
        (CASE, ("outlets", 0, "tailwater", "vessel", "diameter"), "6 m"),
        (CASE, ("levels", "start"), "80 %"),
        (STACK, ("vessel", "parts", 0, "top_diameter"), "3 m"),
    ],
)
def test_what_is_typed_deep_in_a_case_stands_there(case: Case, path: Path, text: str) -> None:
    assert attribute_of(case, path)
    former = value_at(case, path)
    changed = replace_at(case, path, read_entry(case, path, text))
    assert at(changed, path) == text
    assert replace_at(changed, path, former) == case


def test_numbers_stand_in_their_places_too() -> None:
    loss: Path = ("outlets", 0, "fittings", 1, "loss")
    assert value_at(CASE, loss) == LossRange(1, 2, 3)
    assert at(replace_at(CASE, (*loss, "high"), read_entry(CASE, (*loss, "high"), "4")), (*loss, "high")) == 4
    assert at(replace_at(CASE, loss, read_entry(CASE, loss, "0,5")), loss) == 0.5
    assert value_at(STACK, ("vessel", "parts", 1, "side_slope", 1)) == 2
    slope: Path = ("vessel", "parts", 1, "side_slope")
    assert read_entry(STACK, (*slope, 0), "1.5") == 1.5
    assert read_entry(STACK, slope, "3/2") == 1.5
    assert read_entry(STACK, slope, "1,5; 2") == (1.5, 2)
    kv: Path = ("outlets", 0, "valve", "kv")
    assert at(replace_at(CASE, kv, read_entry(CASE, kv, "40")), kv) == 40
    assert value_at(CASE, kv) is None


def test_the_last_column_of_a_row_comes_and_goes() -> None:
    path: Path = ("liquid", "properties", 0, 3)
    assert value_at(CASE, path) is None
    longer = replace_at(CASE, path, read_entry(CASE, path, "500 Pa"))
    assert at(longer, path[:-1]) == ["10 degC", "900 kg/m³", "30 cSt", "500 Pa"]
    assert read_entry(longer, path, " ") is None
    assert replace_at(longer, path, None) == CASE
    for outside in (("liquid", "properties", 0, 4), ("liquid", "properties", 2, 0), ("vessel", "rows", 0, 2)):
        with pytest.raises(LookupError):
            value_at(CASE, outside)
        with pytest.raises(LookupError):
            replace_at(CASE, outside, None)


@pytest.mark.parametrize(
    "path",
    [
        ("vessel", "rows", 3),
        ("vessel", "rows", "first"),
        ("vessel", "displacement", 1, "from"),
        ("vessel", "displacement", 0, "from_"),
        ("liquid", "also_at", 1),
        ("outlets", 0, "fittings", 0, "loss", "low"),
        ("outlets", 0, "bore", 0),
        ("inflow", 0),
        ("levels", "start", "value"),
    ],
)
def test_a_place_that_is_not_there_is_a_lookup_error(path: Path) -> None:
    for look_up in (value_at, attribute_of, lambda case, way: replace_at(case, way, 3)):
        with pytest.raises(LookupError):
            look_up(CASE, path)


def test_the_model_itself_says_what_stands_where() -> None:
    assert attribute_of(Case, ("vessel", "rows", 0, 1))["dimension"] == "area|volume"
    assert attribute_of(CASE, ("vessel", "rows", 0, 1))["dimension"] == "area"
    assert attribute_of(Case, ("outlets", 0, "fittings", 0, "loss"))["low"] == 0
    assert attribute_of(Case, ("outlets", 0, "tailwater", "vessel", "diameter"))["dimension"] == "length"
    assert attribute_of(Case, ("vessel", "displacement", 0, "from"))["sign"] == "not_negative"
    assert attribute_of(Case, ("tables", "times", 0))["dimension"] == "time"


@pytest.mark.parametrize(
    ("path", "text", "sentence"),
    [
        (
            ("vessel", "rows", 1, 1),
            "3 m³",
            "3 m³ is a volume. Type an area, such as 1.5 m² or 16 ft².",
        ),
        (("vessel", "rows", 1, 1), "", "Nothing is typed. Type an area, such as 1.5 m² or 16 ft²."),
        (
            ("levels", "start"),
            "half",
            "half is not a number with a unit. Type a level, such as 2.8 m, 80 %, 15 m³ or 53.1 m site.",
        ),
        (("outlets", 0, "fittings", 0, "loss"), "-1", "-1 is below 0. Type a number of 0 or more."),
    ],
)
def test_a_wrong_entry_says_what_is_wanted(path: Path, text: str, sentence: str) -> None:
    with pytest.raises(CaseError) as refusal:
        read_entry(CASE, path, text)
    assert [(fault.path, fault.sentence) for fault in refusal.value.faults] == [(path, sentence)]


def test_a_list_is_no_entry_to_type_into() -> None:
    for path in (("vessel", "rows"), ("vessel", "rows", 0), ("liquid", "also_at"), ("outlets", 0, "fittings")):
        with pytest.raises(LookupError):
            read_entry(CASE, path, "3")


def test_a_part_that_lacks_what_it_needs_is_not_begun() -> None:
    for path in (("target", "flow_at", "level"), ("outlets", 0, "entry_loss", "low")):
        with pytest.raises(LookupError):
            replace_at(CASE, path, 1)


@pytest.mark.parametrize(
    ("case", "path", "index", "part"),
    [
        (CASE, ("vessel", "rows"), 1, ["0.5 m", "70 m²"]),
        (CASE, ("vessel", "rows"), 3, ["3 m", "120 m²"]),
        (CASE, ("vessel", "displacement"), 1, {"from": "0 m", "to": "1 m", "volume": "20 L"}),
        (CASE, ("liquid", "properties"), 1, ["20 degC", "900 kg/m³", "30 cSt"]),
        (CASE, ("liquid", "properties"), 2, ["40 degC", "890 kg/m³", "20 cSt", "1 kPa"]),
        (CASE, ("liquid", "properties"), 0, ["0 degC", "900 kg/m³", "30 cSt"]),
        (CASE, ("liquid", "also_at"), 1, "25 degC"),
        (CASE, ("outlets", 0, "fittings"), 1, {"name": "bend", "loss": 0.3}),
        (CASE, ("outlets", 0, "fittings"), 0, {"name": "90° elbow"}),
        (CASE, ("outlets", 0, "sections"), 0, {"bore": "100 mm", "length": "1 m"}),
        (CASE, ("outlets", 0, "sections"), 1, {"bore": "50 mm", "length": "2 m"}),
        (CASE, ("tables", "times"), 0, "10 min"),
        (STACK, ("vessel", "parts"), 1, {"shape": "upright_cylinder", "diameter": "2 m", "height": "1 m"}),
        (STACK, ("vessel", "parts"), 2, {"shape": "box", "length": "4 m", "width": "6 m", "height": "1 m"}),
        (STACK, ("vessel", "displacement"), 0, {"from": "0 m", "to": "1.9 m", "volume": "10 L"}),
    ],
)
def test_a_new_part_is_begun_from_its_neighbours(case: Case, path: Path, index: int, part: Any) -> None:
    longer = insert_part(case, path, index)
    assert at(longer, (*path, index)) == part
    assert remove_part(longer, (*path, index)) == case


def test_the_first_row_of_a_table_stays_the_first() -> None:
    longer = insert_part(CASE, ("vessel", "rows"), 0)
    assert at(longer, ("vessel", "rows", 0)) == ["0 m", "60 m²"]
    assert at(longer, ("vessel", "rows", 1)) == ["0.5 m", "70 m²"]


def test_rows_of_volumes_and_of_increments_go_on_as_they_began() -> None:
    rows = [["0 m", "0 L"], ["1 m", "300 L"], ["2 m", "500 L"]]
    for column, between, behind in (("volume", "400 L", "700 L"), ("increment", "250 L", "500 L")):
        case = read_case_data({**DATA, "vessel": {"shape": "table", "column": column, "rows": rows}})
        assert at(insert_part(case, ("vessel", "rows"), 2), ("vessel", "rows", 2)) == ["1.5 m", between]
        assert at(insert_part(case, ("vessel", "rows"), 3), ("vessel", "rows", 3)) == ["3 m", behind]


def test_times_go_on_by_the_last_step() -> None:
    case = CASE
    for index in range(3):
        case = insert_part(case, ("tables", "times"), index)
    assert at(case, ("tables", "times")) == ["10 min", "20 min", "30 min"]


def test_the_first_fitting_of_a_pipe_is_one_of_the_handbook() -> None:
    bare = remove_part(remove_part(CASE, ("outlets", 0, "fittings", 0)), ("outlets", 0, "fittings", 0))
    begun = value_at(insert_part(bare, ("outlets", 0, "fittings"), 0), ("outlets", 0, "fittings", 0))
    assert fitting(begun.name) is not None


def test_a_part_that_is_given_is_put_in_as_it_is() -> None:
    gate = Fitting("gate valve")
    longer = insert_part(CASE, ("outlets", 0, "sections", 0, "fittings"), 1, gate)
    assert value_at(longer, ("outlets", 0, "sections", 0, "fittings", 1)) is gate


def test_an_emptied_list_is_left_out() -> None:
    assert "also_at" not in at(remove_part(CASE, ("liquid", "also_at", 0)), ("liquid",))
    assert remove_part(insert_part(CASE, ("tables", "times"), 0), ("tables", "times", 0)).tables is None


def test_what_a_case_needs_is_not_taken_out() -> None:
    two_rows = remove_part(CASE, ("vessel", "rows", 2))
    for case, path in (
        (two_rows, ("vessel", "rows", 1)),
        (remove_part(STACK, ("vessel", "parts", 1)), ("vessel", "parts", 0)),
        (CASE, ("outlets", 0)),
    ):
        with pytest.raises(ValueError, match="must not be shorter"):
            remove_part(case, path)


def test_a_list_or_an_index_that_is_not_there_is_a_lookup_error() -> None:
    for path, index in ((("vessel", "parts"), 0), (("vessel", "rows"), 4), (("title",), 0), ((), 0)):
        with pytest.raises(LookupError):
            insert_part(CASE, path, index)
    for path in (("vessel", "rows", 3), ("vessel", "rows"), ("levels", "start", 0), ("outlets", 1)):
        with pytest.raises(LookupError):
            remove_part(CASE, path)


@pytest.mark.parametrize(
    ("path", "words"),
    [
        (("vessel", "rows", 3, 1), "Vessel, row 4, column 2"),
        (("vessel", "parts", 0, "floor", "depth"), "Vessel, part 1, floor, depth"),
        (("vessel", "displacement", 0, "from"), "Vessel, displacement 1, from"),
        (("outlets", 0, "fittings", 1, "loss", "low"), "Outlet 1, fitting 2, loss, low"),
        (("outlets", 1, "sections", 0, "bore"), "Outlet 2, section 1, bore"),
        (("outlets", 0, "tailwater", "vessel", "heads", 1), "Outlet 1, tailwater, vessel, high head"),
        (("liquid", "properties", 1, 0), "Liquid, properties, row 2, column 1"),
        (("liquid", "also_at", 0), "Liquid, also at 1"),
        (("tables", "times", 2), "Tables, time 3"),
    ],
)
def test_a_deep_place_has_plain_words(path: Path, words: str) -> None:
    assert place_words(path) == words
