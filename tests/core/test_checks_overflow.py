"""Checks of the run: overflow, alarm level; and the order in which findings are read."""

from __future__ import annotations

from typing import Any

import pytest

from headfall.answers import Figure
from headfall.checks import (
    Finding,
    Grade,
    check_alarm_level,
    check_open_headspace,
    check_overflow,
    check_overflow_outlets,
    check_scope,
    check_surging,
    sorted_findings,
)
from headfall.quantities import display_units

METRIC = display_units("metric")
NEVER = Figure(None, None, None)


def plain(text: str) -> str:
    """The text with ordinary spaces."""
    return text.replace("\u00a0", " ").replace("\u202f", " ").replace("\u2009", " ")


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


def test_liquid_that_comes_back_by_the_outlets_overflows_too() -> None:
    (finding,) = overflowing(inflow=0.0)
    assert finding.text.startswith("With liquid coming back in by the outlets it overflows after")


def test_with_an_overflow_outlet_the_rest_leaves_by_it_and_no_time_to_overflow_is_told() -> None:
    (finding,) = overflowing(inflow=0.0186, time_to_overflow=NEVER, taken_by="weir")
    assert finding.grade is Grade.ATTENTION
    assert plain(finding.text) == (
        "With 18.6 L/s flowing in, the drains alone may not hold the level below 1.900 m: the rest leaves by weir."
    )
    assert finding.advice.startswith("The drains hold up to")
    (held,) = overflowing(inflow=0.003, time_to_overflow=NEVER, taken_by="weir")
    assert held.grade is Grade.NO_CAUTION


def over_the_crest(**changes: Any) -> Finding:
    """The finding for a basin whose peak stands over the weir, with some facts changed."""
    facts: dict[str, Any] = {
        "names": ["weir"],
        "crest": 1.6,
        "passed": 17.2,
        "flowing": 2590.0,
        "flow_at_end": 0.0,
        "peak": 1.621,
        "overflow": 2.1,
        "top": 2.4,
        "display": METRIC,
    }
    (finding,) = check_overflow_outlets(**{**facts, **changes})
    assert finding.rule == "C13"
    return finding


def test_what_leaves_by_an_overflow_outlet_is_told_with_its_time_and_the_room_that_is_left() -> None:
    finding = over_the_crest()
    assert finding.grade is Grade.ATTENTION
    assert plain(finding.text) == (
        "17.2 m³ leaves by weir in 43 min 10 s; the peak, 1.621 m, is 0.479 m below overflow and 0.779 m below the top."
    )
    goes_on = over_the_crest(flow_at_end=0.0193, names=["weir", "standpipe"])
    assert "leaves by weir and standpipe in 43 min 10 s, 19.3 L/s still at the end; the peak" in plain(goes_on.text)
    no_lip = over_the_crest(overflow=2.4)
    assert plain(no_lip.text).endswith("the peak, 1.621 m, is 0.779 m below the top.")


def test_a_peak_above_overflow_is_a_stop_and_one_at_the_crest_raises_no_caution() -> None:
    above = over_the_crest(peak=2.15)
    assert above.grade is Grade.STOP
    assert plain(above.text).endswith("the peak, 2.150 m, above overflow, 2.100 m, is 0.250 m below the top.")
    assert above.limit == 2.1
    below = over_the_crest(peak=1.6, passed=0.0, flowing=0.0)
    assert below.grade is Grade.NO_CAUTION
    assert plain(below.text) == (
        "Nothing leaves by weir: the peak, 1.600 m, is 0.000 m below the crest, 0.500 m below overflow and 0.800 m "
        "below the top; no caution is raised by this check."
    )


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


def test_findings_are_sorted_worst_first_a_spill_before_other_stops_and_the_scope_last_among_the_notes() -> None:
    note = overflowing(inflow=0.003, time_to_overflow=NEVER)[1]
    surges = check_surging(inflow=0.004, surges_at=0.2, full_flow=0.022, display=METRIC)
    findings = [*check_scope(), *surges, *check_open_headspace(declared=False), note, *overflowing()]
    ordered = sorted_findings(findings)
    assert [finding.grade for finding in ordered] == sorted(finding.grade for finding in findings)
    assert [finding.rule for finding in ordered if finding.grade is Grade.STOP] == ["C13", "C1"]
    assert [finding.rule for finding in ordered if finding.grade is Grade.NOTE] == ["C13", "C0"]


def test_the_sentences_follow_the_display_units() -> None:
    assert "US gal/min" in plain(overflowing(display=display_units("us"))[0].text)
