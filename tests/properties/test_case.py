"""Laws of reading, writing and changing a case."""

from __future__ import annotations

import copy
import json
from typing import Any

import pytest
from hypothesis import given
from hypothesis import strategies as st

from headfall.case.attributes import attributes_of
from headfall.case.editing import change_end_form, change_opening_form, change_shape, replace_at, value_at
from headfall.case.faults import CaseError
from headfall.case.file_text import data_from_bytes, data_from_text
from headfall.case.model import Case, Path
from headfall.case.reading import read_case_data, read_parts
from headfall.case.writing import case_as_data, case_text
from headfall.files import case_from_text, fingerprint

SHAPES = ("upright_cylinder", "box", "cone", "drum", "sphere")


def quantities(units: list[str], low: float = 0.1, high: float = 50) -> st.SearchStrategy[str]:
    numbers = st.floats(low, high).map(lambda value: f"{value:.4g}") | st.sampled_from(["1/2", "3 1/8", "2,5", "7"])
    return st.builds(
        lambda number, gap, unit: f"{number}{gap}{unit}", numbers, st.sampled_from([" ", "  "]), st.sampled_from(units)
    )


LENGTHS = quantities(["m", "mm", "ft", "in", "cm"])
TEXTS = st.text(st.characters(exclude_categories=["Cs"]), max_size=20)
ENDS = st.one_of(
    st.just({"form": "flat"}),
    st.fixed_dictionaries({"form": st.just("cone"), "depth": LENGTHS}),
    st.fixed_dictionaries({"form": st.just("ellipsoidal")}, optional={"ratio": st.integers(1, 4) | st.floats(1, 4)}),
    st.fixed_dictionaries(
        {"form": st.just("torispherical")},
        optional={"crown_ratio": st.floats(0.6, 2), "knuckle_ratio": st.floats(0.02, 0.5)},
    ),
    st.just({"form": "hemispherical"}),
)


def sized(shape: str, *names: str, **optional: st.SearchStrategy[Any]) -> st.SearchStrategy[dict[str, Any]]:
    sizes: dict[str, st.SearchStrategy[Any]] = {"shape": st.just(shape), **dict.fromkeys(names, LENGTHS)}
    return st.fixed_dictionaries(sizes, optional=optional)


VESSELS = st.one_of(
    sized("upright_cylinder", "diameter", "height", floor=ENDS),
    sized("box", "length", "width", "height"),
    sized("cone", "top_diameter", "bottom_diameter", "height"),
    sized("drum", "diameter", "length", heads=ENDS | st.lists(ENDS, min_size=2, max_size=2), fall=st.just("0 mm")),
    sized("sphere", "diameter"),
)
COEFFICIENTS = st.just("handbook") | st.lists(st.floats(0.1, 1.5), min_size=3, max_size=3).map(
    lambda range_: dict(zip(("low", "typical", "high"), sorted(range_), strict=True))
)
OUTLETS = st.fixed_dictionaries(
    {
        "kind": st.just("orifice"),
        "opening": st.fixed_dictionaries({"form": st.just("round"), "diameter": LENGTHS})
        | st.fixed_dictionaries({"form": st.just("rectangle"), "width": LENGTHS, "height": LENGTHS}),
    },
    optional={
        "name": TEXTS,
        "entry": st.sampled_from(["sharp_edged", "square_edged", "bellmouth", "reentrant_free"]),
        "facing": st.sampled_from(["down", "side"]),
        "elevation": LENGTHS,
        "coefficient": COEFFICIENTS,
        "count": st.integers(1, 10000),
        "blocked": st.just(0),
    },
)
CASES = st.fixed_dictionaries(
    {
        "headfall": st.just(1),
        "vessel": VESSELS,
        "outlets": st.lists(OUTLETS, min_size=1, max_size=3),
        "levels": st.fixed_dictionaries({"start": LENGTHS, "stop": LENGTHS}, optional={"high": LENGTHS}),
    },
    optional={
        "title": TEXTS,
        "remarks": TEXTS,
        "units": st.sampled_from(["metric", "us"]),
        "liquid": st.fixed_dictionaries({}, optional={"name": st.just("water"), "temperature": st.just("60 degF")}),
        "inflow": st.fixed_dictionaries(
            {"kind": st.just("steady")}, optional={"rate": quantities(["L/s", "US gal/min"])}
        ),
        "headspace": st.just({"kind": "open"}),
        "target": st.fixed_dictionaries({}, optional={"drain_time": quantities(["min", "s", "h"])}),
        "structure": st.fixed_dictionaries(
            {}, optional={"shell_thickness": LENGTHS, "joint_efficiency": st.floats(0.1, 1)}
        ),
        "surroundings": st.fixed_dictionaries({}, optional={"gravity": quantities(["m/s^2"])}),
        "field_tests": st.just([]),
    },
)
JUNK = st.recursive(
    st.none() | st.booleans() | st.integers() | st.floats() | st.text(max_size=12) | LENGTHS,
    lambda inner: st.lists(inner, max_size=3) | st.dictionaries(st.text(max_size=8), inner, max_size=4),
    max_leaves=12,
)


def paths(value: Any, here: Path = ()) -> list[Path]:
    """Return the paths to every attribute of a case, those of parts that were not typed included."""
    found: list[Path] = []
    if isinstance(value, tuple):
        for index, member in enumerate(value):
            found += [(*here, index), *paths(member, (*here, index))]
    elif value is not None and type(value).__module__ == "headfall.case.model":
        for name in attributes_of(type(value)):
            found += [(*here, name), *paths(getattr(value, name), (*here, name))]
    return found


def without_empty_parts(data: dict[str, Any]) -> dict[str, Any]:
    """Return the data of a case without the groups at its top that hold nothing."""
    return {key: value for key, value in data.items() if value != {}}


def places(data: Any, here: tuple[Any, ...] = ()) -> list[tuple[Any, ...]]:
    """Return the place of everything in some plain data."""
    members = data.items() if isinstance(data, dict) else enumerate(data) if isinstance(data, list) else ()
    return [place for key, member in members for place in ((*here, key), *places(member, (*here, key)))]


@given(CASES)
def test_a_case_is_given_back_as_it_was_read(data: dict[str, Any]) -> None:
    case = read_case_data(data)
    assert case_as_data(case) == data
    again = read_case_data(data_from_text(case_text(case)))
    assert again == case
    assert case_text(again) == case_text(case)
    assert fingerprint(again) == fingerprint(case)


@given(CASES, st.data())
def test_what_is_put_in_stands_there_and_putting_back_undoes(data: dict[str, Any], draw: st.DataObject) -> None:
    case = read_case_data(data)
    path = draw.draw(st.sampled_from(paths(case)))
    former = value_at(case, path)
    marker = "marker"
    changed = replace_at(case, path, marker)
    assert value_at(changed, path) == marker
    assert replace_at(case, path, former) == case
    # A part that was given with nothing in it is taken out when its only entry is cleared: it says the same.
    back = case_as_data(replace_at(changed, path, former))
    assert without_empty_parts(back) == without_empty_parts(data)


@given(CASES, st.sampled_from(SHAPES))
def test_any_shape_can_become_any_other_and_can_be_written(data: dict[str, Any], shape: str) -> None:
    case = read_case_data(data)
    changed = change_shape(case, shape)
    assert changed.levels == case.levels
    assert case_as_data(changed)["vessel"]["shape"] == shape
    assert read_case_data(case_as_data(changed)) == changed
    assert case_as_data(case) == data


@given(CASES, st.sampled_from(["flat", "cone", "ellipsoidal", "torispherical", "hemispherical", "two"]))
def test_any_end_can_become_any_other(data: dict[str, Any], form: str) -> None:
    case = change_shape(read_case_data(data), "drum")
    changed = change_end_form(case, ("vessel", "heads"), form)
    assert read_case_data(case_as_data(changed)) == changed


@given(CASES, st.sampled_from(["round", "rectangle"]))
def test_any_opening_can_become_any_other(data: dict[str, Any], form: str) -> None:
    case = read_case_data(data)
    changed = change_opening_form(case, ("outlets", 0, "opening"), form)
    assert case_as_data(changed)["outlets"][0]["opening"]["form"] == form
    assert read_case_data(case_as_data(changed)) == changed


@given(JUNK)
def test_junk_is_refused_with_sentences(junk: Any) -> None:
    _, faults = read_parts(junk)
    assert faults
    assert all("\n" not in fault.line and fault.line.endswith((".", "?")) for fault in faults)


@given(CASES, st.data(), JUNK)
def test_junk_anywhere_in_a_sound_case_is_read_or_refused(data: dict[str, Any], draw: st.DataObject, junk: Any) -> None:
    spoilt = copy.deepcopy(data)
    *way, last = draw.draw(st.sampled_from(places(spoilt)))
    here: Any = spoilt
    for key in way:
        here = here[key]
    here[last] = junk
    parts, faults = read_parts(spoilt)
    if not faults:
        assert Case(**{**parts, "outlets": tuple(parts["outlets"])}) == read_case_data(spoilt)
    try:
        case_from_text(json.dumps(spoilt))
    except CaseError as refusal:
        assert refusal.faults


@given(st.binary(max_size=60))
def test_any_bytes_are_data_or_a_case_error(content: bytes) -> None:
    try:
        data = data_from_bytes(content)
    except CaseError as refusal:
        assert len(refusal.faults) == 1
    else:
        with pytest.raises(CaseError):
            read_case_data(data)
