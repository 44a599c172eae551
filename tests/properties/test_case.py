"""Laws of reading, writing and changing a case."""

from __future__ import annotations

import copy
import json
from typing import Any

import pytest
from hypothesis import given
from hypothesis import strategies as st

from headfall.case.attributes import attributes_of
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
    insert_part,
    remove_part,
    replace_at,
    value_at,
)
from headfall.case.faults import CaseError
from headfall.case.file_text import data_from_bytes, data_from_text
from headfall.case.model import Case, Path
from headfall.case.reading import read_case_data, read_parts
from headfall.case.writing import case_as_data, case_text
from headfall.files import case_from_text, fingerprint
from tests.properties.typed_cases import CASES, JUNK

SHAPES = ("upright_cylinder", "box", "cone", "drum", "sphere", "basin", "table", "stack")
LISTS = ("outlets", "fittings", "sections", "displacement", "rows", "properties", "also_at", "times", "parts")
KINDS = ("orifice", "pipe", "weir")
FORMS = ("rectangular", "vnotch", "broad_crested", "standpipe")


def paths(value: Any, here: Path = ()) -> list[Path]:
    """Return the paths to every attribute of a case, those of parts that were not typed included."""
    found: list[Path] = []
    if isinstance(value, tuple):
        for index, member in enumerate(value):
            found += [(*here, index), *paths(member, (*here, index))]
    elif type(value).__module__.startswith("headfall.case."):
        for key, attribute in attributes_of(type(value)).items():
            found += [(*here, key), *paths(getattr(value, attribute.name), (*here, key))]
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
    case = change_outlet_kind(read_case_data(data), 0, "orifice")
    changed = change_opening_form(case, ("outlets", 0, "opening"), form)
    assert case_as_data(changed)["outlets"][0]["opening"]["form"] == form
    assert read_case_data(case_as_data(changed)) == changed


@given(CASES, st.sampled_from(KINDS))
def test_any_outlet_can_become_any_other_kind(data: dict[str, Any], kind: str) -> None:
    case = read_case_data(data)
    changed = change_outlet_kind(case, 0, kind)
    assert case_as_data(changed)["outlets"][0]["kind"] == kind
    assert read_case_data(case_as_data(changed)) == changed
    assert changed.outlets[1:] == case.outlets[1:]


@given(CASES, st.sampled_from(FORMS), st.sampled_from(FORMS))
def test_any_weir_can_become_any_other(data: dict[str, Any], first: str, second: str) -> None:
    case = change_outlet_kind(read_case_data(data), 0, "weir")
    for form in (first, second):
        case = change_weir_form(case, 0, form)
        assert case_as_data(case)["outlets"][0]["form"] == form
        assert read_case_data(case_as_data(case)) == case


@given(CASES, st.sampled_from(["water", "glycerol", "own", "own_table"]))
def test_any_liquid_can_become_any_other(data: dict[str, Any], liquid: str) -> None:
    changed = change_liquid(read_case_data(data), liquid)
    assert read_case_data(case_as_data(changed)) == changed


@given(
    CASES,
    st.sampled_from(["none", "level", "vessel"]),
    st.sampled_from(["", "open", "pressurised", "closed", "vented"]),
    st.booleans(),
)
def test_tailwater_headspace_and_flow_limit_can_be_chosen(
    data: dict[str, Any], tailwater: str, headspace: str, asked: bool
) -> None:
    case = change_tailwater(read_case_data(data), 0, tailwater)
    case = change_flow_limit(change_headspace(case, headspace), asked)
    assert read_case_data(case_as_data(case)) == case


@given(CASES, st.data())
def test_a_part_put_into_a_list_can_be_taken_out_again(data: dict[str, Any], draw: st.DataObject) -> None:
    case = read_case_data(data)
    lists = [path for path in paths(case) if path[-1] in LISTS and not (path[-1] == "parts" and len(path) > 2)]
    path = draw.draw(st.sampled_from(lists))
    present = value_at(case, path) or ()
    index = draw.draw(st.integers(1 if path[-1] in ("rows", "outlets") else 0, len(present)))
    longer = insert_part(case, path, index)
    assert len(value_at(longer, path)) == len(present) + 1
    back = remove_part(longer, (*path, index))
    assert (value_at(back, path) or ()) == present


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
