"""Checks of the air above the liquid: open, kept at a pressure, closed, vented."""

from __future__ import annotations

from typing import Any

import pytest

from headfall.checks import (
    Finding,
    Grade,
    check_closed_headspace,
    check_open_headspace,
    check_pressurised_headspace,
    check_vented_headspace,
)
from headfall.quantities import display_units

METRIC = display_units("metric")


def plain(text: str) -> str:
    """The text with ordinary spaces."""
    return text.replace("\u00a0", " ").replace("\u202f", " ").replace("\u2009", " ")


def test_an_undeclared_headspace_is_a_stop_and_no_vent_is_there_to_be_checked() -> None:
    undeclared, vent = check_open_headspace(declared=False)
    assert (undeclared.rule, undeclared.grade) == ("C1", Grade.STOP)
    assert undeclared.text == "It has not been said how air gets in; the headspace is computed as open."
    assert "such as ISO 28300" in undeclared.advice
    assert (vent.rule, vent.grade, vent.needs, vent.place) == ("C2", Grade.NOT_CHECKED, "vent bore", "headspace")
    assert vent.text == "Vent capacity is not checked: no vent bore is entered."


def test_a_declared_headspace_raises_no_caution_and_its_vent_is_still_not_checked() -> None:
    declared, vent = check_open_headspace(declared=True)
    assert declared.grade is Grade.NO_CAUTION
    assert vent.grade is Grade.NOT_CHECKED


def pressurised(pressure: float) -> Finding:
    """The finding for a headspace kept at a gauge pressure [Pa]."""
    (finding,) = check_pressurised_headspace(gauge_pressure=pressure, display=METRIC)
    assert finding.rule == "C1"
    return finding


def test_a_pressurised_headspace_is_a_note_on_the_loss_of_its_gas() -> None:
    kept = pressurised(20000.0)
    assert kept.grade is Grade.NOTE
    assert kept.text == "The headspace is kept 20.0\u00a0kPa above atmospheric, and every answer rests on that."
    assert kept.advice.startswith("Where the supply of gas fails, the tank is a closed one")


def test_a_headspace_kept_below_atmospheric_is_an_attention_above_the_indicative_vacuum() -> None:
    assert pressurised(-250.0).grade is Grade.NOTE
    assert "0.250\u00a0kPa below atmospheric" in pressurised(-250.0).text
    deep = pressurised(-251.0)
    assert deep.grade is Grade.ATTENTION
    assert plain(deep.text) == (
        "The headspace is kept 0.251 kPa below atmospheric, more than the indicative 0.250 kPa."
    )


def closed(**changes: Any) -> Finding:
    """The finding for a sealed drum that stops draining, with some facts changed."""
    facts: dict[str, Any] = {
        "ends_at": 1.379,
        "released": 1.47,
        "vacuum": 28050.0,
        "fast_ends_at": 1.411,
        "fast_vacuum": 28400.0,
        "stops": True,
        "display": METRIC,
    }
    (finding,) = check_closed_headspace(**{**facts, **changes})
    assert (finding.rule, finding.source) == ("C1", "gas_over_liquid")
    return finding


def test_a_closed_tank_stops_draining_under_the_vacuum_it_reaches() -> None:
    finding = closed()
    assert finding.grade is Grade.STOP
    assert plain(finding.text) == (
        "A closed tank stops draining: here at 1.379 m, after 1.47 m³ has left, under 28.1 kPa of vacuum, or at "
        "1.411 m under 28.4 kPa where the air exchanges no heat."
    )
    assert (finding.value, finding.limit, finding.kind) == (28050.0, 250.0, "pressure")


def test_a_closed_tank_that_reaches_its_stop_is_still_a_stop_unless_the_vacuum_is_slight() -> None:
    there = closed(stops=False, vacuum=5000.0, fast_vacuum=6800.0)
    assert there.grade is Grade.STOP
    assert plain(there.text) == (
        "The closed tank stands under 5.00 kPa of vacuum at 1.379 m, after 1.47 m³ has left, 6.80 kPa where the air "
        "exchanges no heat."
    )
    assert closed(stops=False, vacuum=180.0, fast_vacuum=250.0).grade is Grade.ATTENTION
    assert closed(stops=False, vacuum=180.0, fast_vacuum=251.0).grade is Grade.STOP


def test_a_closed_tank_that_fills_presses_its_air_together() -> None:
    finding = closed(ends_at=1.8, released=-2.0, vacuum=-40000.0, fast_vacuum=-60000.0, stops=False)
    assert finding.grade is Grade.STOP
    assert plain(finding.text) == (
        "The closed tank presses its air together as it fills: at 1.800 m to 40.0 kPa above atmospheric, 60.0 kPa "
        "where the air exchanges no heat."
    )


def vented(**changes: Any) -> list[Finding]:
    """The findings for a vent, with some facts changed."""
    facts: dict[str, Any] = {"vacuum": 73.5, "air_flow": 120.0 / 3600.0, "ambient": 101325.0, "display": METRIC}
    return check_vented_headspace(**{**facts, **changes})


def test_a_small_vent_pulls_more_than_the_indicative_vacuum() -> None:
    # 50 mm, C 0.6, 120 m³/h of air at 1.204 kg/m³: (1.204/2)·(0.033333/(0.6·0.0019635))² = 482 Pa, by hand.
    declared, clean, blocked = vented(vacuum=482.0)
    assert (declared.rule, declared.grade) == ("C1", Grade.NO_CAUTION)
    assert declared.text == "The headspace is declared vented; no caution is raised by this check."
    assert (clean.rule, clean.grade) == ("C2", Grade.STOP)
    assert plain(clean.text) == (
        "At the highest drain rate, with 33.3 L/s of air drawn in, the vent pulls 0.482 kPa below atmospheric, above "
        "the indicative 0.250 kPa."
    )
    assert clean.advice.startswith("The nameplate's vacuum is not entered.")
    # A fifth of the area: 25 times the pressure.
    assert blocked.value == pytest.approx(25.0 * 482.0)


def test_a_vent_that_serves_clean_is_an_attention_where_it_does_not_when_blocked() -> None:
    _, clean, blocked = vented()
    assert clean.grade is Grade.NO_CAUTION
    assert plain(clean.text) == (
        "At the highest drain rate, with 33.3 L/s of air drawn in, the vent pulls 0.0735 kPa below atmospheric, not "
        "above the indicative 0.250 kPa; no caution is raised by this check."
    )
    assert (blocked.rule, blocked.grade) == ("C2", Grade.ATTENTION)
    assert plain(blocked.text) == (
        "With 80 % of the vent blocked the same rate would take 1.84 kPa, above the indicative 0.250 kPa."
    )


def test_the_limit_itself_is_not_exceeded_and_a_wide_vent_raises_nothing() -> None:
    assert vented(vacuum=250.0)[1].grade is Grade.NO_CAUTION
    assert vented(vacuum=250.1)[1].grade is Grade.STOP
    assert vented(vacuum=9.9)[2].grade is Grade.NO_CAUTION
    assert vented(vacuum=10.1)[2].grade is Grade.ATTENTION


def test_a_blocked_vent_never_takes_more_than_the_air_outside_can_give() -> None:
    blocked = vented(vacuum=4060.0)[2]
    assert (blocked.grade, blocked.value) == (Grade.ATTENTION, 101325.0)
    assert plain(blocked.text) == (
        "With 80 % of the vent blocked the same rate is out of reach: it would take more than the 101 kPa of the air "
        "outside."
    )
    assert vented(vacuum=4050.0)[2].value == pytest.approx(101250.0)


def test_a_stated_vacuum_takes_the_place_of_the_indicative_one() -> None:
    _, clean, blocked = vented(vacuum=482.0, design_vacuum=500.0)
    assert clean.grade is Grade.NO_CAUTION
    assert "not above the 0.500\u00a0kPa that the nameplate states" in clean.text
    assert "not entered" not in clean.advice
    assert blocked.grade is Grade.ATTENTION
    assert vented(vacuum=482.0, design_vacuum=400.0)[1].grade is Grade.STOP


def test_a_filling_draws_no_air_in() -> None:
    _, vent = vented(vacuum=-80.0, air_flow=0.0)
    assert vent.text == "No air is drawn in on this run; no caution is raised by this check."
    assert (vent.rule, vent.grade) == ("C2", Grade.NO_CAUTION)
