"""The checks through a whole case: each is handed the numbers that it is meant to see."""

from __future__ import annotations

import json
import math
from typing import Any

import pytest

from headfall.answers import Answers
from headfall.case.reading import build_case, read_parts
from headfall.checks import Finding, Grade
from headfall.study import solve
from tests.rules.source_files import PROJECT

EXAMPLES = PROJECT / "resources" / "examples"
WATER = {"name": "water of a table", "density": "998.2 kg/m^3", "viscosity": "1.002 mPa*s"}
HOLE = {"opening": {"form": "round", "diameter": "50 mm"}}
TANK: dict[str, Any] = {
    "headfall": 1,
    "vessel": {"shape": "upright_cylinder", "diameter": "2 m", "height": "2.5 m", "floor": {"form": "flat"}},
    "liquid": WATER,
    "outlets": [HOLE],
    "headspace": {"kind": "open"},
    "levels": {"start": "2 m", "stop": "0.2 m"},
}


def plain(text: str) -> str:
    """The text with ordinary spaces."""
    return text.replace("\u00a0", " ").replace("\u202f", " ").replace("\u2009", " ")


def answers(**parts: Any) -> Answers:
    """The answers to the tank with some parts changed."""
    read, faults = read_parts({**TANK, **parts})
    assert not faults
    return solve(build_case(read))


def example(name: str, **parts: Any) -> Answers:
    """The answers to an example with some parts changed."""
    return answers(**{"liquid": None, **json.loads((EXAMPLES / name).read_text(encoding="utf-8")), **parts})


def findings(found: Answers, rule: str) -> list[Finding]:
    """The findings of one rule, worst first."""
    return [finding for finding in found.findings if finding.rule == rule]


def finding(found: Answers, rule: str) -> Finding:
    """The worst finding of one rule."""
    return findings(found, rule)[0]


def test_a_plain_case_raises_no_caution_but_says_what_it_did_not_check() -> None:
    found = answers()
    raised = [(item.rule, item.grade) for item in found.findings if item.grade <= Grade.NOTE]
    assert raised == [("C28", Grade.NOTE), ("C0", Grade.NOTE)]
    unchecked = {item.rule: item.needs for item in found.findings if item.grade is Grade.NOT_CHECKED}
    assert unchecked["C2"] == "vent bore"


def test_a_closed_tank_stops_where_boyles_law_says() -> None:
    # Gas 0.5 m high over 2 m of liquid, constant area: ρ·g·y² + (p₀ − ρ·g·h₁ + ρ·g·x₀)·y − ρ·g·h₁·x₀ = 0 gives a fall
    # y of 0.1115762304 m and a vacuum of 18 485.7766 Pa; own derivation.
    found = answers(headspace={"kind": "closed"})
    closed = finding(found, "C1")
    assert closed.grade is Grade.STOP
    assert closed.value == pytest.approx(18485.7766, rel=1e-6)
    left = 0.1115762304 * math.pi
    assert plain(closed.text).startswith(
        f"A closed tank stops draining: here at 1.888 m, after {left:.3f} m³ has left, under 18.5 kPa of vacuum, or at "
    )
    never = finding(found, "C11")
    assert plain(never.text).startswith("It never reaches 0.200 m: the vacuum above the liquid holds it at 1.888 m")
    assert not findings(found, "C2")


def test_a_closed_tank_without_any_gas_is_held_by_its_own_head() -> None:
    full = finding(answers(headspace={"kind": "closed"}, levels={"start": "2.5 m", "stop": "0.2 m"}), "C1")
    # ρ·g·h of 2.5 m: 998.2·9.80665·2.5 = 24 472.5 Pa, by hand; a film of gas is reckoned with, a hair of the height.
    assert full.value == pytest.approx(24472.5, rel=1e-4)


def test_a_closed_drum_ends_under_twenty_eight_kilopascals() -> None:
    # Engineering basis of the example: a forgotten vent stops it at 1.379 m above the nozzle, after 1.47 m³.
    found = example("dump_drum.headfall", headspace={"kind": "closed"})
    closed = finding(found, "C1")
    assert closed.grade is Grade.STOP
    assert closed.value == pytest.approx(28.0e3, rel=0.01)
    assert "after 1.47 m³ has left" in plain(closed.text)
    assert finding(found, "C17").grade is Grade.NO_CAUTION


def test_a_tight_vent_pulls_more_than_the_indicative_vacuum_and_a_wider_one_less() -> None:
    tight = findings(example("dump_drum.headfall", headspace={"kind": "vented", "bore": "50 mm"}), "C2")
    # 120 m³/h through 50 mm, C 0.6: 0.48 kPa.
    assert tight[0].grade is Grade.STOP
    assert max(item.value or 0.0 for item in tight[:2]) == pytest.approx(25.0 * 480.0, rel=0.02)
    wide = findings(example("dump_drum.headfall"), "C2")
    assert [item.grade for item in wide] == [Grade.ATTENTION, Grade.NO_CAUTION]
    assert wide[1].value == pytest.approx(73.0, rel=0.03)


def test_a_kept_pressure_is_a_note() -> None:
    kept = finding(answers(headspace={"kind": "pressurised", "gauge_pressure": "20 kPa"}), "C1")
    assert kept.grade is Grade.NOTE
    assert "20.0\u00a0kPa above atmospheric" in kept.text


def test_a_feed_less_than_the_full_line_takes_surges() -> None:
    found = example("dump_drum.headfall", inflow={"kind": "steady", "rate": "15 m^3/h"})
    surging = finding(found, "C12")
    assert surging.grade is Grade.ATTENTION
    assert surging.value == pytest.approx(15.0 / 3600.0)
    # Engineering basis of the example: the full line takes 80 m³/h at nil level.
    assert surging.limit == pytest.approx(80.0 / 3600.0, rel=0.02)
    lower = example(
        "dump_drum.headfall",
        inflow={"kind": "steady", "rate": "15 m^3/h"},
        levels={"start": "80 %", "stop": "2 mm", "overflow": "1.95 m"},
    )
    assert "it surges about the inlet at 0.003\u00a0m, where" in finding(lower, "C11").text
    assert finding(example("dump_drum.headfall"), "C12").text == "Nothing flows in; no caution is raised by this check."


def test_a_closed_tank_that_runs_dry_is_not_said_to_be_stopped_by_its_vacuum() -> None:
    pipe = {"kind": "pipe", "bore": "50.1 mm", "length": "2 m", "elevation": "0.1 m", "discharge_elevation": "-8 m"}
    found = answers(headspace={"kind": "closed"}, levels={"start": "0.3 m", "stop": "0 m"}, outlets=[pipe])
    # 2.2 m of gas becomes 2.4 m: 101.325·(1 − 2.2/2.4) = 8.44 kPa, by hand.
    assert plain(finding(found, "C1").text).startswith("The closed tank stands under 8.44 kPa of vacuum at 0.100 m")
    assert plain(finding(found, "C11").text).endswith("stays below the pipe's inlet, 0.100 m.")


def test_the_liquid_outside_holds_the_level() -> None:
    found = answers(outlets=[{**HOLE, "tailwater": "0.6 m"}])
    # Water that comes to rest has any Reynolds number in the end: that is no matter of its viscosity.
    assert finding(found, "C22").grade is Grade.NO_CAUTION
    assert plain(finding(found, "C11").text).startswith(
        "It never reaches 0.200 m: the liquid outside holds it at 0.600 m"
    )


GLYCERINE = "glycerine_tank.headfall"


def test_a_warm_line_in_transition_and_a_cold_one_clear_of_it() -> None:
    card = json.loads((EXAMPLES / GLYCERINE).read_text(encoding="utf-8"))["liquid"]
    warm = finding(example(GLYCERINE, liquid={**card, "temperature": "60 degC", "also_at": ["20 degC"]}), "C21")
    assert warm.grade is Grade.ATTENTION
    assert "neither laminar nor turbulent: the drain time lies between" in warm.text
    assert finding(example(GLYCERINE), "C21").grade is Grade.NO_CAUTION


def test_laminar_losses_left_out_are_an_attention() -> None:
    typed = json.loads((EXAMPLES / GLYCERINE).read_text(encoding="utf-8"))
    (line,) = typed["outlets"]
    own = {**line, "fittings": [{"name": "strainer", "loss": 2.0, "count": 1}]}
    lacking = finding(example(GLYCERINE, outlets=[own]), "C23")
    assert lacking.grade is Grade.ATTENTION
    assert "and strainer has no laminar loss." in lacking.text
    assert finding(example(GLYCERINE), "C23").grade is Grade.NO_CAUTION
    turbulent = finding(example(GLYCERINE, outlets=[own], liquid=WATER), "C23")
    assert turbulent.grade is Grade.NO_CAUTION
    assert "does not run laminar" in turbulent.text


def test_a_viscous_liquid_at_one_temperature_is_an_attention() -> None:
    oil = {"name": "gear oil", "density": "880 kg/m^3", "viscosity": "200 mPa*s"}
    found = answers(liquid=oil)
    assert finding(found, "C24").grade is Grade.ATTENTION
    low = finding(found, "C22")
    assert low.grade is Grade.STOP
    # d·√(2gH)/ν with 50 mm, 2 m and 0.2 Pa·s over 880 kg/m³ is 1378, and 1000 where H is 2 m·(1000/1378)².
    number = 0.05 * math.sqrt(2 * 9.80665 * 2.0) / (0.2 / 880.0)
    assert plain(low.text).startswith(
        f"Below {2.0 * (1000.0 / number) ** 2:.3f} m the handbook coefficient of the outlet"
    )
    assert "is 1380 at the start and 436 at the end" in low.text
    assert finding(example(GLYCERINE), "C24").grade is Grade.NO_CAUTION


def test_a_given_coefficient_is_no_handbook_coefficient() -> None:
    oil = {"name": "gear oil", "density": "880 kg/m^3", "viscosity": "200 mPa*s"}
    own = {**HOLE, "coefficient": {"low": 0.5, "typical": 0.55, "high": 0.6}}
    assert not findings(answers(liquid=oil, outlets=[own]), "C22")


def test_a_thick_plate_names_both_ends_of_its_own_time() -> None:
    found = answers(outlets=[{**HOLE, "entry": "thick_plate", "thickness": "20 mm"}])
    thick = finding(found, "C26")
    tank, hole = math.pi, math.pi * 0.025**2
    slow = 2 * tank / (0.60 * hole * math.sqrt(2 * 9.80665)) * (math.sqrt(2.0) - math.sqrt(0.2))
    minutes, seconds = divmod(round(slow), 60)
    assert f"for a time of {minutes} min {seconds:02d} s or" in plain(thick.text)
    assert not findings(answers(), "C26")


def test_an_area_table_says_what_its_rule_is_worth() -> None:
    found = example("detention_basin.headfall")
    note, end = findings(found, "C32")
    # By hand, 0 to 0.25 m: 60.0 m³ by average end area, (60 + 420 + √(60·420))·0.25/3 = 53.2 m³ by the conic rule.
    assert note.value == pytest.approx(60.0 / ((480.0 + math.sqrt(25200.0)) * 0.25 / 3.0) - 1.0)
    assert plain(note.text).endswith("below 0.250 m the average end area would give 13 % more.")
    assert plain(end.text).startswith("The table ends at 2.400 m, and the run stays within it, up to 1.400 m")


def test_an_overflow_weir_is_told_with_its_room_and_has_no_dip_and_no_nominal_size() -> None:
    found = example("detention_basin.headfall", levels={"start": "1.7 m", "stop": "0.5 m", "overflow": "2.1 m"})
    over = next(item for item in findings(found, "C13") if item.subject == "flow over the overflow")
    assert over.grade is Grade.ATTENTION
    assert plain(over.text).endswith("; the peak, 1.700 m, is 0.400 m below overflow and 0.700 m below the top.")
    assert over.value == pytest.approx(1.7)
    below = example("detention_basin.headfall")
    quiet = next(item for item in findings(below, "C13") if item.subject == "flow over the overflow")
    assert plain(quiet.text).startswith("Nothing leaves by weir: the peak, 1.400 m, is 0.200 m below the crest")
    assert len(findings(found, "C17")) == 1
    assert not any("weir" in item.subject for item in found.findings if item.rule in ("C17", "C28"))


def test_a_bore_typed_by_name_is_no_nominal_size_and_a_figure_is() -> None:
    by_name = finding(example("dump_drum.headfall"), "C28")
    assert by_name.grade is Grade.NO_CAUTION
    typed = json.loads((EXAMPLES / "dump_drum.headfall").read_text(encoding="utf-8"))
    (line,) = typed["outlets"]
    by_figure = finding(example("dump_drum.headfall", outlets=[{**line, "bore": "100 mm"}]), "C28")
    assert by_figure.grade is Grade.ATTENTION
    assert by_figure.place == "outlets[0].bore"


def test_the_inlet_of_a_pipe_is_not_contracted_against_the_surface() -> None:
    pipe = {"kind": "pipe", "bore": "50.1 mm", "length": "1 m", "discharge_elevation": "-1 m"}
    found = answers(outlets=[pipe])
    assert finding(found, "C25").value == pytest.approx(math.pi / 4 * 0.0501**2 / math.pi, rel=1e-6)
    assert finding(answers(), "C25").value == pytest.approx(0.62 * 0.025**2, rel=1e-6)
