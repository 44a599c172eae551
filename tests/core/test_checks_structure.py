"""Checks of the loads: base pressure, weight, hoop stress."""

from __future__ import annotations

from typing import Any

import pytest

from headfall.checks import Finding, Grade, check_base_load, check_hoop_stress
from headfall.checks.limits import limit
from headfall.quantities import display_units
from headfall.resources import read_resource

METRIC = display_units("metric")


def plain(text: str) -> str:
    """The text with ordinary spaces."""
    return text.replace("\u00a0", " ").replace("\u202f", " ").replace("\u2009", " ")


def hoop(**changes: Any) -> Finding:
    """The hoop finding of a 12 m tank, 8 mm thick, 6 m of water, with some facts changed."""
    facts: dict[str, Any] = {
        "shape": "upright_cylinder",
        "diameter": 12.0,
        "pressure": 1000.0 * 9.80665 * 6.0,
        "thickness": 0.008,
        "allowable": 100e6,
        "joint_efficiency": 1.0,
        "display": METRIC,
    }
    (finding,) = check_hoop_stress(**{**facts, **changes})
    assert finding.rule == "C35"
    return finding


@pytest.mark.parametrize(
    ("allowable", "grade", "words"),
    [
        (100e6, Grade.NO_CAUTION, "no caution is raised by this check"),
        (70e6, Grade.ATTENTION, "of the allowable 70.0 MPa"),
        (40e6, Grade.ATTENTION, "above the allowable 40.0 MPa"),
    ],
)
def test_the_hoop_stress_against_the_allowable(allowable: float, grade: Grade, words: str) -> None:
    finding = hoop(allowable=allowable)
    assert finding.grade is grade
    assert words in plain(finding.text)
    assert "44.1 MPa" in plain(finding.text)
    assert finding.limit == pytest.approx(0.6 * allowable)


def test_a_sphere_carries_half_and_a_weak_joint_more() -> None:
    cylinder, sphere, joint = hoop().value, hoop(shape="sphere").value, hoop(joint_efficiency=0.5).value
    assert cylinder is not None and sphere is not None and joint is not None
    assert sphere == pytest.approx(cylinder / 2)
    assert joint == pytest.approx(cylinder * 2)


@pytest.mark.parametrize(
    ("changes", "needs"),
    [
        ({"thickness": None}, "shell thickness"),
        ({"allowable": None}, "allowable stress"),
        ({"thickness": 0.61}, "thick-shell calculation"),
        ({"shape": "box", "diameter": None}, "plate calculation"),
        ({"shape": "cone", "diameter": None}, "shell calculation"),
    ],
)
def test_what_is_missing_is_named(changes: dict[str, Any], needs: str) -> None:
    finding = hoop(**changes)
    assert finding.grade is Grade.NOT_CHECKED
    assert finding.needs == needs
    assert finding.place


def test_the_stress_is_given_even_without_an_allowable() -> None:
    finding = hoop(allowable=None)
    assert finding.value == pytest.approx(44129925.0)
    assert finding.place == "structure.allowable_stress"


def test_the_weight_with_and_without_the_vessel() -> None:
    facts: dict[str, Any] = {
        "density": 1000.0,
        "gravity": 9.80665,
        "start": 1.7,
        "overflow": 1.9,
        "overflow_volume": 20.0,
        "display": METRIC,
    }
    base, liquid = check_base_load(**facts, empty_mass=None)
    assert base.value == pytest.approx(18632.635)
    assert "18.6 kPa" in plain(base.text) and "16.7 kPa" in plain(base.text)
    assert (liquid.grade, liquid.needs) == (Grade.NOT_CHECKED, "empty mass")
    assert liquid.value == pytest.approx(196133.0)
    whole = check_base_load(**facts, empty_mass=3000.0)[1]
    assert whole.grade is Grade.NOTE
    assert whole.value == pytest.approx(9.80665 * 23000.0)
    assert plain(whole.text) == "Full to overflow the vessel weighs 226 kN, 196 kN of it liquid."


def test_every_limit_has_its_source_and_the_status_of_that_source() -> None:
    sources = read_resource("sources.json")
    for name in read_resource("limits.json"):
        found = limit(name)
        assert found.value > 0.0
        assert found.status == sources[found.source]["status"], name
