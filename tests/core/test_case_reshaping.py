"""Another shape, kind, form or liquid begins with what was there and keeps what still applies."""

from __future__ import annotations

from typing import Any

import pytest

from headfall.case.editing import (
    change_end_form,
    change_flow_limit,
    change_headspace,
    change_liquid,
    change_opening_form,
    change_outlet_kind,
    change_shape,
    change_tailwater,
    change_weir_form,
)
from headfall.case.model import Case
from headfall.case.reading import read_case_data
from headfall.case.writing import case_as_data

CYLINDER: dict[str, Any] = {"shape": "upright_cylinder", "diameter": "2 m", "height": "3 m"}
CONE: dict[str, Any] = {"shape": "cone", "top_diameter": "2 m", "bottom_diameter": "0 mm", "height": "1 m"}
BASIN: dict[str, Any] = {
    "shape": "basin",
    "base_length": "10 m",
    "base_width": "5 m",
    "side_slope": [2, 1],
    "depth": "2 m",
}
TABLE: dict[str, Any] = {"shape": "table", "column": "volume", "rows": [["0 m", "0 m³"], ["2 m", "6.28319 m³"]]}
DISPLACEMENT = [{"from": "0 m", "to": "1 m", "volume": "20 L"}]
ORIFICE: dict[str, Any] = {
    "name": "drain",
    "kind": "orifice",
    "entry": "thick_plate",
    "thickness": "5 mm",
    "opening": {"form": "round", "diameter": "2 in"},
    "elevation": "1 ft",
    "count": 2,
    "role": "overflow",
    "blocked": 0.1,
    "tailwater": "6 in",
}


def case_of(vessel: dict[str, Any] = CYLINDER, outlet: dict[str, Any] = ORIFICE, **more: Any) -> Case:
    """Return a case with this vessel and outlet."""
    levels = {"start": "0.9 m", "stop": "0.1 m"}
    return read_case_data({"headfall": 1, "vessel": vessel, "outlets": [outlet], "levels": levels, **more})


def part(case: Case, key: str = "vessel") -> Any:
    """Return a part of a case as the file holds it, having made sure that the case can be read back."""
    data = case_as_data(case)
    assert read_case_data(data) == case
    return data.get(key)


def outlet(case: Case) -> Any:
    """Return the first outlet as the file holds it."""
    return part(case, "outlets")[0]


@pytest.mark.parametrize(
    ("vessel", "shape", "expected"),
    [
        (
            CYLINDER,
            "table",
            {"shape": "table", "column": "area", "rows": [["0 m", "3.142 m²"], ["3 m", "3.142 m²"]]},
        ),
        (
            CONE,
            "table",
            {
                "shape": "table",
                "column": "area",
                "between": "conic",
                "rows": [["0 m", "0 m²"], ["1 m", "3.142 m²"]],
            },
        ),
        (
            {"shape": "box", "length": "10 ft", "width": "4 ft", "height": "3 ft"},
            "table",
            {"shape": "table", "column": "area", "rows": [["0 ft", "40 ft²"], ["3 ft", "40 ft²"]]},
        ),
        (
            {"shape": "drum", "diameter": "2 m", "length": "5 m"},
            "table",
            {"shape": "table", "column": "area", "rows": [["0 m", "7.854 m²"], ["2 m", "7.854 m²"]]},
        ),
        (
            BASIN,
            "table",
            {
                "shape": "table",
                "column": "area",
                "between": "conic",
                "rows": [["0 m", "50 m²"], ["2 m", "162 m²"]],
            },
        ),
        (TABLE, "upright_cylinder", {**CYLINDER, "height": "2 m"}),
        (
            {
                "shape": "table",
                "column": "area",
                "rows": [["0 m", "0 m²"], ["1 m", "6.28319 m²"], ["2 m", "0 m²"]],
            },
            "upright_cylinder",
            {**CYLINDER, "height": "2 m"},
        ),
        (
            {"shape": "table", "column": "increment", "rows": [["0 m", "1 m³"], ["2 m", "5.28319 m³"]]},
            "upright_cylinder",
            {**CYLINDER, "height": "2 m"},
        ),
        (
            {"shape": "box", "length": "10 ft", "width": "4 ft", "height": "3 ft"},
            "basin",
            {"shape": "basin", "base_length": "10 ft", "base_width": "4 ft", "side_slope": 1, "depth": "3 ft"},
        ),
        (BASIN, "box", {"shape": "box", "length": "10 m", "width": "5 m", "height": "2 m"}),
        (
            {**BASIN, "base_length": "0 m"},
            "box",
            {"shape": "box", "length": "5 m", "width": "5 m", "height": "2 m"},
        ),
        (CONE, "stack", {"shape": "stack", "parts": [CONE, {**CYLINDER, "height": "1 m"}]}),
        (
            BASIN,
            "stack",
            {
                "shape": "stack",
                "parts": [BASIN, {"shape": "box", "length": "18 m", "width": "9 m", "height": "2 m"}],
            },
        ),
        (
            {"shape": "drum", "diameter": "2 m", "length": "3 m", "heads": {"form": "ellipsoidal"}},
            "stack",
            {"shape": "stack", "parts": [{**CYLINDER, "floor": {"form": "ellipsoidal"}}, CYLINDER]},
        ),
        ({"shape": "stack", "parts": [CONE, CYLINDER]}, "upright_cylinder", CYLINDER),
        ({"shape": "stack", "parts": [CONE, CYLINDER]}, "sphere", {"shape": "sphere", "diameter": "2 m"}),
    ],
)
def test_a_new_shape_begins_with_the_sizes_of_the_former(
    vessel: dict[str, Any], shape: str, expected: dict[str, Any]
) -> None:
    assert part(change_shape(case_of(vessel), shape)) == expected


def test_walls_floors_and_displacement_stay_where_they_mean_something() -> None:
    walls = {"sizes": "outside", "wall": "6 mm", "lining": "3 mm"}
    case = case_of({**CYLINDER, "floor": {"form": "sloped", "fall": "5 cm"}, **walls, "displacement": DISPLACEMENT})
    kept = {**walls, "displacement": DISPLACEMENT}
    box = part(change_shape(case, "box"))
    assert {key: box[key] for key in (*kept, "floor")} == {**kept, "floor": {"form": "sloped", "fall": "5 cm"}}
    drum = part(change_shape(case, "drum"))
    assert "heads" not in drum
    assert {key: drum[key] for key in kept} == kept
    assert part(change_shape(case, "basin"))["displacement"] == DISPLACEMENT
    stack = change_shape(case, "stack")
    assert part(stack)["displacement"] == DISPLACEMENT
    assert "displacement" not in part(stack)["parts"][0]
    assert change_shape(stack, "upright_cylinder") == case


def test_a_part_of_a_stack_and_a_receiving_vessel_change_their_shape() -> None:
    stack = case_of({"shape": "stack", "parts": [CONE, CYLINDER]})
    changed = part(change_shape(stack, "basin", ("vessel", "parts", 0)))
    assert [piece["shape"] for piece in changed["parts"]] == ["basin", "upright_cylinder"]
    for shape, path in (("drum", ("vessel", "parts", 0)), ("stack", ("vessel", "parts", 1)), ("box", ("levels",))):
        with pytest.raises(LookupError):
            change_shape(stack, shape, path)
    receiving = change_tailwater(case_of(), 0, "vessel")
    path = ("outlets", 0, "tailwater", "vessel")
    drum = change_shape(receiving, "drum", path)
    assert outlet(drum)["tailwater"]["vessel"] == {"shape": "drum", "diameter": "2 m", "length": "3 m"}
    dished = change_end_form(drum, (*path, "heads", 1), "hemispherical")
    assert outlet(dished)["tailwater"]["vessel"]["heads"] == [{"form": "flat"}, {"form": "hemispherical"}]
    floor = change_end_form(stack, ("vessel", "parts", 1, "floor"), "sloped")
    assert part(floor)["parts"][1]["floor"] == {"form": "sloped", "fall": "0.04 m"}


def test_a_floor_slopes_only_where_it_fits() -> None:
    box = change_shape(case_of(), "box")
    assert part(change_end_form(box, ("vessel", "floor"), "sloped"))["floor"] == {"form": "sloped", "fall": "0.04 m"}
    with pytest.raises(LookupError, match="cone is not one of flat, sloped"):
        change_end_form(box, ("vessel", "floor"), "cone")
    with pytest.raises(LookupError):
        change_end_form(change_shape(case_of(), "drum"), ("vessel", "heads"), "sloped")


def test_an_outlet_becomes_another_kind_and_keeps_what_it_can() -> None:
    kept = {key: ORIFICE[key] for key in ("name", "count", "role", "blocked", "tailwater")}
    pipe = change_outlet_kind(case_of(), 0, "pipe")
    assert outlet(pipe) == {**kept, "kind": "pipe", "bore": "2 in", "elevation": "1 ft"}
    weir = change_outlet_kind(pipe, 0, "weir")
    assert outlet(weir) == {**kept, "kind": "weir", "form": "rectangular", "width": "2 in", "crest": "1 ft"}
    opening = {"form": "round", "diameter": "2 in"}
    assert outlet(change_outlet_kind(weir, 0, "orifice")) == {
        **kept,
        "kind": "orifice",
        "opening": opening,
        "elevation": "1 ft",
    }
    assert change_outlet_kind(pipe, 0, "pipe") is pipe
    for index, kind in ((0, "siphon"), (1, "pipe")):
        with pytest.raises(LookupError):
            change_outlet_kind(pipe, index, kind)
    with pytest.raises(LookupError):
        change_opening_form(pipe, ("outlets", 0, "opening"), "round")


def test_a_listed_bore_stays_a_bore_and_becomes_a_plain_diameter() -> None:
    standpipe = {
        "kind": "weir",
        "form": "standpipe",
        "diameter": "NPS 4 sch 40",
        "crest": "1 m",
        "discharge_elevation": "-1 m",
    }
    case = case_of(outlet=standpipe)
    pipe = {"kind": "pipe", "bore": "NPS 4 sch 40", "elevation": "1 m", "discharge_elevation": "-1 m"}
    assert outlet(change_outlet_kind(case, 0, "pipe")) == pipe
    opening = outlet(change_outlet_kind(case, 0, "orifice"))["opening"]
    assert opening == {"form": "round", "diameter": "102.26 mm"}


def test_a_rectangle_gives_a_pipe_its_smaller_side_and_a_weir_its_width() -> None:
    case = case_of(outlet={"opening": {"form": "rectangle", "width": "300 mm", "height": "100 mm"}})
    assert outlet(change_outlet_kind(case, 0, "pipe")) == {"kind": "pipe", "bore": "100 mm"}
    assert outlet(change_outlet_kind(case, 0, "weir")) == {
        "kind": "weir",
        "form": "rectangular",
        "width": "300 mm",
        "crest": "0 m",
    }


def test_a_weir_takes_the_sizes_of_its_new_form() -> None:
    own = {"low": 0.6, "typical": 0.61, "high": 0.63}
    weir = {"kind": "weir", "form": "rectangular", "width": "1 ft", "channel_width": "2 ft", "crest": "2 ft"}
    case = case_of(outlet={**weir, "coefficient": own})
    notch = change_weir_form(case, 0, "vnotch")
    assert outlet(notch) == {"kind": "weir", "form": "vnotch", "angle": "90 deg", "crest": "2 ft"}
    broad = {"kind": "weir", "form": "broad_crested", "width": "1 ft", "crest": "2 ft"}
    assert outlet(change_weir_form(case, 0, "broad_crested")) == broad
    standpipe = change_weir_form(case, 0, "standpipe")
    assert outlet(standpipe) == {"kind": "weir", "form": "standpipe", "diameter": "1 ft", "crest": "2 ft"}
    assert outlet(change_weir_form(standpipe, 0, "broad_crested")) == broad
    assert outlet(change_weir_form(notch, 0, "rectangular"))["width"] == "0.984 ft"
    assert change_weir_form(notch, 0, "vnotch") is notch
    for case_, form in ((notch, "round"), (case_of(), "vnotch")):
        with pytest.raises(LookupError):
            change_weir_form(case_, 0, form)


def test_a_tailwater_is_a_level_or_a_vessel_or_none() -> None:
    plain = {key: value for key, value in ORIFICE.items() if key != "tailwater"}
    case = case_of(outlet=plain)
    level = change_tailwater(case, 0, "level")
    assert outlet(level)["tailwater"] == "1 ft"
    vessel = change_tailwater(case, 0, "vessel")
    assert outlet(vessel)["tailwater"] == {"vessel": CYLINDER, "elevation": "-3 m", "level": "-3 m"}
    assert outlet(change_tailwater(level, 0, "vessel"))["tailwater"]["elevation"] == "1 ft"
    assert outlet(change_tailwater(vessel, 0, "level"))["tailwater"] == "-3 m"
    assert change_tailwater(vessel, 0, "none") == case
    assert change_tailwater(case, 0, "none") is case
    for index, kind in ((0, "sea"), (2, "level")):
        with pytest.raises(LookupError):
            change_tailwater(case, index, kind)


def test_a_headspace_begins_without_changing_the_answer_much() -> None:
    case = case_of()
    assert change_headspace(case, "") is case
    assert part(change_headspace(case, "open"), "headspace") == {"kind": "open"}
    assert part(change_headspace(case, "closed"), "headspace") == {"kind": "closed"}
    pressurised = change_headspace(case, "pressurised")
    assert part(pressurised, "headspace") == {"kind": "pressurised", "gauge_pressure": "0 kPa"}
    american = change_headspace(case_of(units="us"), "pressurised")
    assert part(american, "headspace") == {"kind": "pressurised", "gauge_pressure": "0 psi"}
    assert part(change_headspace(case, "vented"), "headspace") == {"kind": "vented", "bore": "2 in"}
    assert change_headspace(pressurised, "pressurised") is pressurised
    assert change_headspace(pressurised, "") == case
    with pytest.raises(LookupError):
        change_headspace(case, "vacuum")


def test_a_liquid_of_ones_own_keeps_its_state_between_one_and_rows() -> None:
    typed = {"temperature": "5 degC", "also_at": ["30 degC"]}
    water = case_of(liquid=typed)
    assert change_liquid(case_of(), "water") == case_of()
    assert part(change_liquid(water, "glycerol"), "liquid") == {"name": "glycerol", **typed}
    own = change_liquid(water, "own")
    state = {"density": "1000 kg/m³", "viscosity": "1 mPa·s"}
    assert part(own, "liquid") == {"name": "own liquid", "temperature": "5 degC", **state}
    assert change_liquid(own, "own") is own
    oil = case_of(liquid={"name": "oil", "density": "0.9 kg/L", "viscosity": "30 cSt", "vapour_pressure": "1 Pa"})
    rows = {"name": "oil", "properties": [["20 degC", "0.9 kg/L", "30 cSt", "1 Pa"]]}
    assert part(change_liquid(oil, "own_table"), "liquid") == rows
    assert change_liquid(change_liquid(oil, "own_table"), "own") == oil
    assert part(change_liquid(oil, "water"), "liquid") == {"name": "water"}


def test_a_limit_of_the_flow_begins_whole_and_goes_whole() -> None:
    case = case_of()
    asked = change_flow_limit(case, True)
    assert part(asked, "target") == {"flow_at": {"level": "0.9 m", "flow": "1 L/s"}}
    assert change_flow_limit(asked, True) is asked
    assert change_flow_limit(asked, False) == case
    both = case_of(target={"drain_time": "20 min"})
    assert change_flow_limit(change_flow_limit(both, True), False) == both
