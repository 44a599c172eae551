"""Checks of how the liquid flows: transition, low Reynolds numbers, laminar losses, temperature, thick plate, table."""

from __future__ import annotations

from typing import Any

import numpy as np
import pytest

from headfall.answers import Figure
from headfall.checks import (
    Finding,
    Grade,
    check_laminar_losses,
    check_low_reynolds,
    check_table_end,
    check_table_rule,
    check_temperature,
    check_thick_plate,
    check_transition,
)
from headfall.quantities import display_units

METRIC = display_units("metric")


def plain(text: str) -> str:
    """The text with ordinary spaces."""
    return text.replace("\u00a0", " ").replace("\u202f", " ").replace("\u2009", " ")


def transition(**changes: Any) -> Finding:
    """The finding for a line in transition on part of its run, with some facts changed."""
    facts: dict[str, Any] = {
        "outlet": "product line",
        "spans": [(0.31, 0.87)],
        "time": Figure(890.0, 860.0, 930.0),
        "display": METRIC,
        "place": "outlets[0].bore",
    }
    (finding,) = check_transition(**{**facts, **changes})
    assert (finding.rule, finding.source) == ("C21", "laminar_turbulent")
    return finding


def test_a_line_between_laminar_and_turbulent_is_an_attention_with_the_range_of_its_time() -> None:
    finding = transition()
    assert finding.grade is Grade.ATTENTION
    assert plain(finding.text) == (
        "From 0.310 m to 0.870 m product line runs at Re 2100 to 4000, neither laminar nor turbulent: the drain time "
        "lies between 14 min 20 s and 15 min 30 s."
    )


def test_spans_that_touch_are_one_and_a_time_without_an_end_is_told_so() -> None:
    finding = transition(spans=[(0.9, 1.2), (0.1, 0.5), (0.4, 0.6)], time=Figure(890.0, 860.0, None))
    assert plain(finding.text) == (
        "From 0.100 m to 0.600 m and from 0.900 m to 1.200 m product line runs at Re 2100 to 4000, neither laminar nor "
        "turbulent: the drain time is 14 min 20 s or more."
    )
    nothing = transition(time=Figure(None, None, None))
    assert nothing.text.endswith("neither laminar nor turbulent.")


def test_a_line_clear_of_the_transition_raises_no_caution() -> None:
    finding = transition(spans=[])
    assert finding.grade is Grade.NO_CAUTION
    assert (
        finding.text == "Product line stays clear of Re 2100 to 4000 on this run; no caution is raised by this check."
    )


LEVELS = np.linspace(1.0, 0.0, 201)


def low_reynolds(at_start: float, defended_above: float = 0.0) -> Finding:
    """The finding for an opening in the floor, drained from 1 m, with so high a number at the start."""
    (finding,) = check_low_reynolds(
        outlet="the outlet",
        level=LEVELS,
        reynolds=at_start * np.sqrt(LEVELS),
        counted=np.greater_equal(LEVELS, defended_above),
        display=METRIC,
        place="outlets[0].coefficient",
    )
    assert (finding.rule, finding.kind) == ("C22", "reynolds")
    return finding


def test_numbers_below_ten_thousand_are_an_attention() -> None:
    # √0.25 = 1/2: the number at the dip is half of that at the start.
    finding = low_reynolds(19800.0, defended_above=0.25)
    assert finding.grade is Grade.ATTENTION
    assert plain(finding.text) == (
        "The handbook coefficient of the outlet was measured at Reynolds numbers above 10000: d·√(2gH)/ν is 19800 at "
        "the start and 0 at the end of the run."
    )
    assert finding.value == pytest.approx(9900.0)
    near_miss = low_reynolds(20200.0, defended_above=0.25)
    assert near_miss.grade is Grade.NO_CAUTION
    assert plain(near_miss.text) == (
        "At the outlet d·√(2gH)/ν is 20200 at the start and 0 at the end of the run; no caution is raised by this "
        "check."
    )


def test_numbers_below_a_thousand_are_a_stop_below_their_level() -> None:
    # 2000·√h = 1000 at h = 0.25 m.
    finding = low_reynolds(2000.0, defended_above=0.1)
    assert finding.grade is Grade.STOP
    assert plain(finding.text) == (
        "Below 0.250 m the handbook coefficient of the outlet does not hold: d·√(2gH)/ν is 2000 at the start and 0 at "
        "the end of the run."
    )
    assert low_reynolds(2000.0, defended_above=0.26).grade is Grade.ATTENTION


def test_a_run_wholly_below_a_thousand_is_a_stop_throughout() -> None:
    assert low_reynolds(900.0, defended_above=0.1).text.startswith("The handbook coefficient of the outlet does not")
    assert low_reynolds(900.0, defended_above=2.0).grade is Grade.STOP


def laminar(**changes: Any) -> Finding:
    """The finding for a line of glycerine, with some facts changed."""
    facts: dict[str, Any] = {
        "outlet": "product line",
        "least_reynolds": 13.1,
        "fittings": ["90° elbow", "gate valve"],
        "display": METRIC,
        "place": "outlets[0].fittings",
    }
    (finding,) = check_laminar_losses(**{**facts, **changes})
    assert finding.rule == "C23"
    return finding


def test_a_laminar_line_with_turbulent_losses_is_an_attention() -> None:
    finding = laminar()
    assert finding.grade is Grade.ATTENTION
    assert plain(finding.text) == (
        "Product line runs laminar, down to Re 13.1, and 90° elbow and gate valve have no laminar loss."
    )
    assert "gate valve has no laminar loss." in laminar(fittings=["gate valve"]).text
    assert laminar(least_reynolds=2099.0).grade is Grade.ATTENTION


def test_a_turbulent_line_or_one_with_laminar_losses_raises_no_caution() -> None:
    turbulent = laminar(least_reynolds=2100.0)
    assert turbulent.grade is Grade.NO_CAUTION
    assert plain(turbulent.text) == (
        "Product line does not run laminar: the lowest Re of the run is 2100; no caution is raised by this check."
    )
    told = laminar(fittings=[])
    assert told.grade is Grade.NO_CAUTION
    assert told.text == "No fitting of product line lacks a laminar loss; no caution is raised by this check."


WARM = 293.15


def temperature(**changes: Any) -> Finding:
    """The finding for glycerine at 20 °C, with some facts changed."""
    facts: dict[str, Any] = {
        "liquid": "glycerine",
        "density": 1261.0,
        "viscosity": 1.30,
        "worked_out": [(WARM, 6264.0)],
        "described_once": True,
        "display": METRIC,
    }
    (finding,) = check_temperature(**{**facts, **changes})
    assert (finding.rule, finding.kind) == ("C24", "viscosity")
    return finding


def test_a_viscous_liquid_described_at_one_temperature_is_an_attention() -> None:
    finding = temperature()
    assert finding.grade is Grade.ATTENTION
    assert plain(finding.text) == (
        "Glycerine, 1300 mPa·s at 20 °C, is described at that one temperature; colder, it is thicker and the time is "
        "longer."
    )
    assert finding.advice.startswith("Enter rows of temperature, density and viscosity")


def test_a_card_of_several_temperatures_used_at_one_is_a_note() -> None:
    finding = temperature(described_once=False)
    assert (finding.grade, finding.place) == (Grade.NOTE, "liquid.also_at")
    assert plain(finding.text) == "Glycerine, 1300 mPa·s at 20 °C: the time is worked out at that temperature alone."


def test_with_other_temperatures_the_coldest_and_the_warmest_are_quoted() -> None:
    beside = [(WARM, 6264.0), (313.15, 1512.0), (333.15, 900.0)]
    finding = temperature(worked_out=beside)
    assert finding.grade is Grade.NO_CAUTION
    assert plain(finding.text) == (
        "At 20 °C the drain takes 1 h 44 min 24 s, at 60 °C 15 min 00 s; no caution is raised by this check."
    )
    unknown = temperature(worked_out=[(WARM, 6264.0), (333.15, None)])
    assert plain(unknown.text) == ("The run is worked out from 20 °C to 60 °C; no caution is raised by this check.")


def test_a_thin_liquid_raises_no_caution() -> None:
    # 5 mm²/s at 1000 kg/m³ is 5 mPa·s.
    assert temperature(density=1000.0, viscosity=0.005).grade is Grade.NO_CAUTION
    assert temperature(density=1000.0, viscosity=0.00501).grade is Grade.ATTENTION


def thick_plate(**changes: Any) -> Finding:
    """The finding for a 50 mm hole in a 20 mm plate, with some facts changed."""
    facts: dict[str, Any] = {
        "outlet": "the outlet",
        "thickness": 0.020,
        "size": 0.050,
        "low": 0.60,
        "high": 0.82,
        "time": Figure(1450.0, 1275.0, 1742.0),
        "display": METRIC,
        "place": "outlets[0].thickness",
    }
    (finding,) = check_thick_plate(**{**facts, **changes})
    assert finding.rule == "C26"
    return finding


def test_a_thick_plate_is_an_attention_with_both_coefficients_and_both_times() -> None:
    finding = thick_plate()
    assert finding.grade is Grade.ATTENTION
    assert plain(finding.text) == (
        "The outlet can run at 0.6 or at 0.82 and may switch, for a time of 29 min 02 s or 21 min 15 s: the plate is "
        "20 mm thick on an opening of 50 mm."
    )
    among_others = thick_plate(time=None)
    assert plain(among_others.text).startswith("The outlet can run at 0.6 or at 0.82 and may switch: the plate is")


@pytest.mark.parametrize(("thickness", "entry"), [(0.015, "sharp-edged plate"), (0.075, "short tube")])
def test_a_thickness_outside_the_range_names_the_entry_that_fits(thickness: float, entry: str) -> None:
    finding = thick_plate(thickness=thickness)
    assert finding.grade is Grade.ATTENTION
    assert plain(finding.text) == (
        f"The outlet is no thick plate: the plate is {1000 * thickness:g} mm thick on an opening of 50 mm, and the "
        f"entry of a {entry} fits it better."
    )


def test_a_plate_without_its_thickness_is_not_checked() -> None:
    finding = thick_plate(thickness=None)
    assert (finding.grade, finding.needs) == (Grade.NOT_CHECKED, "plate thickness")


def table(rule: str, difference: float) -> Finding:
    """The finding for an area table whose two rules differ so much at half a metre."""
    (finding,) = check_table_rule(rule=rule, level=0.5, difference=difference, display=METRIC)
    assert (finding.rule, finding.source) == ("C32", "area_rules")
    return finding


def test_the_other_rule_between_the_rows_is_a_note_with_its_difference() -> None:
    # 188.8 m³ by the linear rule, 181.2 m³ by the conic one: 4.2 % more, or 4.0 % less the other way round.
    conic = table("conic", 188.8 / 181.2 - 1.0)
    assert conic.grade is Grade.NOTE
    assert plain(conic.text) == (
        "Between the rows the area goes by the conic rule; below 0.500 m the average end area would give 4.2 % more."
    )
    linear = table("linear", 188.8 / 181.2 - 1.0)
    assert plain(linear.text) == (
        "Between the rows the area goes by the average end area; below 0.500 m the conic rule would give 4 % less."
    )


def test_rules_that_agree_raise_no_caution() -> None:
    assert table("conic", 0.001).grade is Grade.NO_CAUTION
    assert table("conic", 0.00101).grade is Grade.NOTE
    assert "would give the same volumes within 0.1\u00a0%" in table("linear", 0.0).text


def test_a_run_does_not_leave_its_table() -> None:
    (finding,) = check_table_end(end=2.4, highest=1.4, display=METRIC)
    assert (finding.rule, finding.grade) == ("C32", Grade.NO_CAUTION)
    assert plain(finding.text) == (
        "The table ends at 2.400 m, and the run stays within it, up to 1.400 m; no caution is raised by this check."
    )
