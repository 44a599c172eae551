"""Checks of the run: standing level and surging."""

from __future__ import annotations

from typing import Any

import pytest

from headfall.answers import Figure
from headfall.checks import Finding, Grade, check_standing_level, check_surging
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


@pytest.mark.parametrize(
    ("form", "edge", "advice"),
    [
        ("down", "the outlet's plane", "No outlet draws it."),
        ("pipe", "the pipe's inlet", "No outlet draws it."),
        ("weir", "the crest", "Near the crest the flow dies away"),
    ],
)
def test_the_heel_is_named_by_what_the_lowest_outlet_is(form: str, edge: str, advice: str) -> None:
    rest = Figure(0.225, 0.225, 0.225)
    finding = standing(settles_at=rest, settled_volume=0.5, inflow=0.0, heel=0.225, form=form)
    assert plain(finding.text) == f"It never reaches 0.100 m: 0.500 m³ stays below {edge}, 0.225 m."
    assert finding.advice.startswith(advice)


def test_a_vacuum_or_a_liquid_outside_that_holds_the_level_is_named_and_no_edge_is() -> None:
    rest: dict[str, Any] = {"settles_at": Figure(1.379, 1.379, 1.395), "settled_volume": 13.87, "inflow": 0.0}
    vacuum = standing(**rest, held_by="vacuum")
    assert plain(vacuum.text) == (
        "It never reaches 0.100 m: the vacuum above the liquid holds it at 1.379 m, with 13.9 m³ still in the vessel."
    )
    assert vacuum.advice.startswith("Open a way in for air.")
    outside = standing(**rest, held_by="tailwater")
    assert plain(outside.text) == (
        "It never reaches 0.100 m: the liquid outside holds it at 1.379 m, with 13.9 m³ still in the vessel."
    )
    kept = standing(**rest, held_by="kept_vacuum")
    assert kept.text == vacuum.text
    assert kept.advice.startswith("Let the pressure above the liquid rise")
    filling = standing(**rest, held_by="tailwater", start=1.0, stop=1.7)
    assert plain(filling.text) == "It never fills to 1.700 m: the liquid outside holds it at 1.379 m."
    with_inflow = standing(held_by="vacuum")
    assert "it settles at 0.347 m" in plain(with_inflow.text)


def test_a_vacuum_at_one_end_of_the_range_is_an_attention() -> None:
    finding = standing(
        reaches_stop=True,
        time=Figure(120.0, 118.0, None),
        settles_at=Figure(0.08, 0.08, 0.12),
        inflow=0.0,
        held_by="vacuum",
    )
    assert finding.grade is Grade.ATTENTION
    assert plain(finding.text) == (
        "At one end of the range it never reaches 0.100 m: the vacuum above the liquid holds it at 0.120 m."
    )


def test_a_level_that_surges_is_not_said_to_rise_to_overflow() -> None:
    facts: dict[str, Any] = {"settles_at": NEVER, "settled_volume": None, "surges_at": 0.2, "surging_flow": 0.022}
    finding = standing(**facts)
    assert plain(finding.text) == (
        "It never reaches 0.100 m: it surges about the inlet at 0.200 m, where 22.0 L/s goes out as soon as it is "
        "covered and 8.00 L/s comes in."
    )
    assert (finding.value, finding.advice) == (0.2, "Shut the inflow to go lower.")
    filling = standing(**facts, start=0.1, stop=1.7)
    assert filling.text.startswith("It never fills to")
    assert plain(filling.advice) == "Bring the inflow above 22.0 L/s, or throttle the outlet."


def surging(**changes: Any) -> Finding:
    """The finding for a full line that takes more than comes in, with some facts changed."""
    facts: dict[str, Any] = {"inflow": 0.00417, "surges_at": 0.003, "full_flow": 0.0222, "display": METRIC}
    (finding,) = check_surging(**{**facts, **changes})
    assert finding.rule == "C12"
    return finding


def test_a_full_line_that_takes_more_than_comes_in_surges() -> None:
    finding = surging()
    assert finding.grade is Grade.ATTENTION
    assert plain(finding.text) == (
        "Expect surging and gulping about 0.003 m, not a steady level: 4.17 L/s comes in, and 22.2 L/s goes out as "
        "soon as the inlet there is covered."
    )


def test_a_level_that_stands_and_a_run_without_inflow_do_not_surge() -> None:
    stands = surging(surges_at=None, full_flow=None)
    assert stands.grade is Grade.NO_CAUTION
    assert plain(stands.text) == (
        "No inlet takes more than comes in as soon as it is covered; no caution is raised by this check."
    )
    none = surging(surges_at=None, full_flow=None, inflow=0.0)
    assert none.grade is Grade.NO_CAUTION
    assert none.text == "Nothing flows in; no caution is raised by this check."


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


def test_the_sentences_follow_the_display_units() -> None:
    assert "ft" in standing(display=display_units("us")).text
