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
DRUM = {"shape": "drum", "diameter": "2 m", "length": "5 m"}


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


LATER: list[tuple[str, object, str]] = [
    ("vessel", {"shape": "basin", "base_length": "3 m"}, "vessel.shape: Basins are not built yet. Use another shape."),
    (
        "vessel",
        {"shape": "stack", "parts": []},
        "vessel.shape: Stacks of vessels are not built yet. Use a single shape.",
    ),
    ("vessel.shape", "table", "vessel.shape: Vessels from a table are not built yet. Use a shape with sizes."),
    ("vessel.displacement", [], "vessel.displacement: Displacements in a vessel are not built yet. Leave it out."),
    (
        "vessel.floor",
        {"form": "sloped", "fall": "5 mm"},
        "vessel.floor.form: Sloped floors are not built yet. Use another form.",
    ),
    (
        "vessel",
        {**DRUM, "fall": "20 mm"},
        "vessel.fall: Drums that fall to one end are not built yet. Leave it out or type 0 m.",
    ),
    ("liquid.name", "glycerine", "liquid.name: Liquids other than water are not built yet. Use water."),
    (
        "liquid.density",
        "1100 kg/m3",
        "liquid.density: Liquids with a density of their own are not built yet. "
        "Leave it out; the properties of water follow from its temperature.",
    ),
    (
        "liquid.viscosity",
        "2 mPa s",
        "liquid.viscosity: Liquids with a viscosity of their own are not built yet. "
        "Leave it out; the properties of water follow from its temperature.",
    ),
    (
        "liquid.vapour_pressure",
        "2 kPa",
        "liquid.vapour_pressure: Liquids with a vapour pressure of their own are not built yet. "
        "Leave it out; the properties of water follow from its temperature.",
    ),
    ("outlets.0", {"kind": "pipe", "bore": "50 mm"}, "outlets[0].kind: Pipes are not built yet. Use an orifice."),
    ("outlets.0", {"kind": "weir", "form": "vnotch"}, "outlets[0].kind: Weirs are not built yet. Use an orifice."),
    ("outlets.0.tailwater", "1 m", "outlets[0].tailwater: Tailwaters are not built yet. Leave it out."),
    ("outlets.0.blocked", 0.3, "outlets[0].blocked: Blocked openings are not built yet. Leave it out or give 0."),
    ("outlets.0.role", "overflow", "outlets[0].role: Overflow outlets are not built yet. Use the role drain."),
    (
        "outlets.0.coefficient",
        {"from_test": "run A"},
        "outlets[0].coefficient.from_test: Coefficients from a field test are not built yet. Give a range instead.",
    ),
    (
        "inflow",
        {"kind": "schedule", "rows": []},
        "inflow.kind: Inflow schedules are not built yet. Use a steady inflow.",
    ),
    (
        "headspace",
        {"kind": "pressurised", "gauge_pressure": "1 kPa"},
        "headspace.kind: Pressurised headspaces are not built yet. Use an open headspace.",
    ),
    ("headspace.kind", "closed", "headspace.kind: Closed headspaces are not built yet. Use an open headspace."),
    ("headspace.kind", "vented", "headspace.kind: Vented headspaces are not built yet. Use an open headspace."),
    (
        "target.highest_level",
        "2 m",
        "target.highest_level: Targets for the highest level are not built yet. Leave it out.",
    ),
    ("target.flow_at", {}, "target.flow_at: Targets for the flow at a level are not built yet. Leave it out."),
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
