"""Checks of the run: standing level, overflow, alarm level, venting, scope, order."""

from __future__ import annotations

from typing import Any

import pytest

from headfall.answers import Figure
from headfall.checks import (
    Finding,
    Grade,
    check_alarm_level,
    check_overflow,
    check_scope,
    check_standing_level,
    check_venting,
    sorted_findings,
)
from headfall.quantities import display_units

METRIC = display_units("metric")
NEVER = Figure(None, None, None)


def plain(text: str) -> str:
    """The text with ordinary spaces."""
    return text.replace("\u00a0", " ").replace("\u202f", " ").replace("\u2009", " ")


def standing(**changes: Any) -> Finding:
    """The finding for a drum that settles above its stop, with some facts changed."""
    facts: dict[str, Any] = {
        "start": 1.7,
        "stop": 0.1,
        "overflow": 1.9,
        "reaches_stop": False,
        "time": NEVER,
        "settles_at": Figure(0.347, 0.325, 0.371),
        "settled_volume": 2.17,
        "inflow": 0.008,
        "flow_at_stop": Figure(0.0043, 0.00415, 0.00445),
        "heel": 0.0,
        "display": METRIC,
    }
    (finding,) = check_standing_level(**{**facts, **changes})
    assert finding.rule == "C11"
    assert finding.source == "volume_balance"
    return finding


def overflowing(**changes: Any) -> list[Finding]:
    """The findings for an inflow that overflows, with some facts changed."""
    facts: dict[str, Any] = {
        "inflow": 0.020,
        "largest_inflow": Figure(0.0189, 0.0183, 0.0195),
        "overflow": 1.9,
        "time_to_overflow": Figure(596.0, 414.0, 1089.0),
        "room": 0.843,
        "display": METRIC,
    }
    return check_overflow(**{**facts, **changes})


def test_a_level_that_stands_above_the_stop_is_a_stop_with_its_range_and_its_volume() -> None:
    finding = standing()
    assert finding.grade is Grade.STOP
    assert plain(finding.text) == (
        "It never reaches 0.100 m: it settles at 0.347 m (0.325 to 0.371 m), with 2.17 m³ still in the vessel."
    )
    assert "Bring the inflow below 4.15 L/s, or make the outlet larger." in plain(finding.advice)
    assert (finding.value, finding.limit, finding.kind) == (0.347, 0.1, "level")


def test_where_the_outlet_passes_nothing_at_the_stop_a_larger_one_is_not_proposed() -> None:
    advice = plain(standing(stop=0.0, flow_at_stop=Figure(0.0, 0.0, 0.0)).advice)
    assert "the outlets pass nothing" in advice
    assert "larger" not in advice


def test_the_luckier_end_of_the_range_is_told() -> None:
    assert "highest coefficient alone it gets there, in 1 h 00 min" in plain(
        standing(time=Figure(None, 3600.0, None)).advice
    )


def test_a_level_that_rises_to_overflow_says_so() -> None:
    for level in (Figure(None, None, None), Figure(2.4, 2.2, 2.6)):
        finding = standing(settles_at=level, inflow=0.03)
        assert plain(finding.text) == "It never reaches 0.100 m: the level rises to overflow, 1.900 m."
        assert finding.grade is Grade.STOP


def test_without_inflow_the_heel_is_named() -> None:
    finding = standing(settles_at=Figure(0.225, 0.225, 0.225), settled_volume=0.5, inflow=0.0, heel=0.225)
    assert plain(finding.text) == "It never reaches 0.100 m: 0.500 m³ stays below the lowest outlet's edge, 0.225 m."
    assert "grows without bound" in finding.advice


def test_a_filling_that_stands_still_says_so_and_asks_for_more_than_the_highest_flow() -> None:
    finding = standing(start=0.1, stop=1.7)
    assert plain(finding.text) == "It never fills to 1.700 m: it settles at 0.347 m (0.325 to 0.371 m)."
    assert "Bring the inflow above 4.45 L/s" in plain(finding.advice)
    assert plain(standing(start=0.1, stop=1.7, inflow=0.0).text) == "It never fills to 1.700 m: nothing flows in."


def test_an_end_of_the_range_that_does_not_reach_is_an_attention() -> None:
    finding = standing(reaches_stop=True, time=Figure(2213.0, 1800.0, None), settles_at=Figure(0.097, 0.09, 0.104))
    assert finding.grade is Grade.ATTENTION
    assert plain(finding.text) == "With the lowest coefficient it never reaches 0.100 m: it settles at 0.104 m."
    assert "36 min 53 s" in plain(finding.advice)
    filling = standing(
        start=0.05, reaches_stop=True, time=Figure(600.0, 500.0, None), settles_at=Figure(0.104, 0.097, 0.11)
    )
    assert plain(filling.text) == "With the highest coefficient it never reaches 0.100 m: it settles at 0.097 m."


def test_a_run_that_reaches_its_stop_raises_no_caution() -> None:
    finding = standing(reaches_stop=True, time=Figure(2213.0, 2100.0, 2300.0), settles_at=Figure(0.02, 0.02, 0.02))
    assert finding.grade is Grade.NO_CAUTION
    assert "no caution is raised by this check" in finding.text
    assert "starts at its stop" in standing(start=0.1, reaches_stop=True, time=Figure(0.0, 0.0, 0.0)).text


def test_overflow_is_a_stop_with_its_time_and_the_largest_inflow_as_its_limit() -> None:
    (finding,) = overflowing()
    assert finding.grade is Grade.STOP
    assert plain(finding.text) == "With 20.0 L/s flowing in it overflows after 9 min 56 s (6 min 54 s to 18 min 09 s)."
    assert (finding.value, finding.limit, finding.kind) == (0.020, 0.0183, "flow")
    assert "18.3 L/s" in plain(finding.advice)


@pytest.mark.parametrize(
    ("changes", "words"),
    [
        ({"inflow": 0.0186, "time_to_overflow": Figure(None, 414.0, None)}, "could overflow, with the lowest"),
        ({"inflow": 0.0186, "time_to_overflow": NEVER}, "could overflow: the outlets may hold no more than 18.3 L/s"),
        ({"inflow": 0.020, "time_to_overflow": NEVER}, "would overflow if it ran on past its stop"),
    ],
)
def test_what_could_overflow_is_an_attention(changes: dict[str, Any], words: str) -> None:
    finding = overflowing(**changes)[0]
    assert finding.grade is Grade.ATTENTION
    assert words in plain(finding.text)


def test_with_the_outlet_shut_the_time_to_overflow_is_noted() -> None:
    held, note = overflowing(inflow=0.003, time_to_overflow=NEVER)
    assert held.grade is Grade.NO_CAUTION
    assert note.grade is Grade.NOTE
    assert plain(note.text) == "If the outlet is shut, 3.00 L/s reaches overflow in 4 min 41 s."
    assert note.value == pytest.approx(281.0)


def test_with_nothing_flowing_in_no_caution_and_no_note() -> None:
    (finding,) = overflowing(inflow=0.0, time_to_overflow=NEVER)
    assert finding.grade is Grade.NO_CAUTION


def test_the_limit_itself_is_not_exceeded() -> None:
    assert overflowing(inflow=0.0183, time_to_overflow=NEVER)[0].grade is Grade.NO_CAUTION


def test_the_alarm_level_is_compared_with_the_peak() -> None:
    (above,) = check_alarm_level(peak=1.85, start=1.7, high=1.8, display=METRIC)
    assert above.grade is Grade.ATTENTION
    assert plain(above.text) == "The level rises to 1.850 m, above the alarm level of 1.800 m."
    assert "starts at" in check_alarm_level(peak=1.85, start=1.85, high=1.8, display=METRIC)[0].text
    assert check_alarm_level(peak=1.8, start=1.7, high=1.8, display=METRIC)[0].grade is Grade.NO_CAUTION
    (unknown,) = check_alarm_level(peak=1.8, start=1.7, high=None, display=METRIC)
    assert (unknown.grade, unknown.needs, unknown.place) == (Grade.NOT_CHECKED, "alarm level", "levels.high")


def test_an_undeclared_headspace_is_a_stop_and_the_vent_is_never_checked() -> None:
    undeclared, vent = check_venting(headspace_declared=False)
    assert undeclared.grade is Grade.STOP
    assert "It has not been said how air gets in" in undeclared.text
    assert "such as ISO 28300" in undeclared.advice
    assert (vent.grade, vent.needs) == (Grade.NOT_CHECKED, "vent size")
    declared, vent = check_venting(headspace_declared=True)
    assert declared.grade is Grade.NO_CAUTION
    assert vent.grade is Grade.NOT_CHECKED


def test_findings_are_sorted_worst_first_a_spill_before_other_stops_and_the_scope_last_among_the_notes() -> None:
    note = overflowing(inflow=0.003, time_to_overflow=NEVER)[1]
    findings = [*check_scope(), *check_venting(headspace_declared=False), note, standing(), *overflowing()]
    ordered = sorted_findings(findings)
    assert [finding.grade for finding in ordered] == sorted(finding.grade for finding in findings)
    assert [finding.rule for finding in ordered if finding.grade is Grade.STOP] == ["C13", "C1", "C11"]
    assert [finding.rule for finding in ordered if finding.grade is Grade.NOTE] == ["C13", "C0"]


def test_the_sentences_follow_the_display_units() -> None:
    assert "ft" in standing(display=display_units("us")).text
    assert "US gal/min" in plain(overflowing(display=display_units("us"))[0].text)
