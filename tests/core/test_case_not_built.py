"""What comes later is refused by its name, never as a mere unknown key."""

from __future__ import annotations

import copy
from typing import Any

import pytest

from headfall.case.not_built import NOT_BUILT
from headfall.case.reading import read_parts

SOUND: dict[str, Any] = {
    "headfall": 1,
    "vessel": {"shape": "upright_cylinder", "diameter": "2.4 m", "height": "3 m"},
    "outlets": [{"opening": {"form": "round", "diameter": "50 mm"}}],
    "levels": {"start": "2.8 m", "stop": "0.1 m"},
}


def with_value(place: str, value: object, sound: dict[str, Any] = SOUND) -> dict[str, Any]:
    """Return the sound case with another value at a place such as ``outlets.0.opening``."""
    data = copy.deepcopy(sound)
    here: Any = data
    *way, last = [int(key) if key.isdigit() else key for key in place.split(".")]
    for key in way:
        if isinstance(here, dict):
            here.setdefault(key, {})
        here = here[key]
    here[last] = value
    return data


def lines(data: object) -> list[str]:
    """Return the faults of some data, one a line."""
    return [fault.line for fault in read_parts(data)[1]]


PIPE = {"kind": "pipe", "bore": "50 mm"}
OPENING = "Valves that open by a schedule are not built yet. Give one fraction."
LATER: list[tuple[str, object, str]] = [
    (
        "outlets.0.coefficient",
        {"from_test": "run A"},
        "outlets[0].coefficient.from_test: Coefficients from a field test are not built yet. Give a range instead.",
    ),
    (
        "outlets.0.tailwater",
        {"schedule": [["0 min", "1 m"]]},
        "outlets[0].tailwater.schedule: Tailwaters by a schedule are not built yet. Give one level.",
    ),
    (
        "outlets.0",
        {**PIPE, "valve": {"kv": 40, "opening": [["0 s", 0], ["60 s", 1]]}},
        f"outlets[0].valve.opening: {OPENING}",
    ),
    (
        "outlets.0",
        {**PIPE, "sections": [{"bore": "40 mm", "length": "1 m", "valve": {"cv": 40, "opening": []}}]},
        f"outlets[0].sections[0].valve.opening: {OPENING}",
    ),
    (
        "inflow",
        {"kind": "schedule", "rows": []},
        "inflow.kind: Inflow schedules are not built yet. Use a steady inflow.",
    ),
    (
        "structure.youngs_modulus",
        "200 GPa",
        "structure.youngs_modulus: Checks of the shell against vacuum are not built yet. Leave it out.",
    ),
    (
        "structure.design_vacuum",
        "5 kPa",
        "structure.design_vacuum: Checks of the shell against vacuum are not built yet. Leave it out.",
    ),
    (
        "structure.design_level",
        "3 m",
        "structure.design_level: Design levels of the structure are not built yet. Leave it out.",
    ),
    (
        "structure.design_density",
        "1100 kg/m3",
        "structure.design_density: Design densities of the structure are not built yet. Leave it out.",
    ),
    ("structure.support", {"kind": "legs"}, "structure.support: Supports are not built yet. Leave it out."),
    ("receiver", {"free_volume": "1 m3"}, "receiver: Receivers are not built yet. Leave it out."),
    (
        "field_tests",
        [{"id": "run A"}],
        "field_tests: Field tests are not built yet. Leave them out or give an empty list.",
    ),
]


@pytest.mark.parametrize(("place", "value", "line"), LATER)
def test_what_comes_later_is_refused_by_name(place: str, value: object, line: str) -> None:
    assert lines(with_value(place, value)) == [line]


def test_everything_on_the_list_of_later_things_is_tested() -> None:
    tested = " ".join(line for _, _, line in LATER).lower()
    assert [item.what for item in NOT_BUILT if item.what not in tested] == []
    assert len(LATER) == len(NOT_BUILT)
