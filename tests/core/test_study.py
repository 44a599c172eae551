"""All answers to a case: what is reached, what is not, and why."""

from __future__ import annotations

import json
import math
from typing import Any

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from headfall.answers import Answers
from headfall.case.reading import build_case, read_parts
from headfall.study import solve

TANK: dict[str, Any] = {
    "headfall": 1,
    "vessel": {"shape": "upright_cylinder", "diameter": "2.4 m", "height": "3 m", "floor": {"form": "flat"}},
    "outlets": [{"opening": {"form": "round", "diameter": "50 mm"}}],
    "headspace": {"kind": "open"},
    "levels": {"start": "2.8 m", "stop": "0.1 m", "overflow": "2.9 m"},
}
SIDE = {"facing": "side", "opening": {"form": "round", "diameter": "100 mm"}, "elevation": "0.4 m"}


def answers(**parts: Any) -> Answers:
    read, faults = read_parts({**TANK, **parts})
    assert not faults
    return solve(build_case(read))


def inflow(rate: str) -> dict[str, str]:
    return {"kind": "steady", "rate": rate}


def by_hand(start: float, stop: float, coefficient: float, diameter: float = 0.05) -> float:
    """2·A/(C_d·a·√(2g))·(√H0 − √H1), worked out here."""
    area, hole = math.pi * 1.2**2, math.pi * diameter**2 / 4
    return 2 * area / (coefficient * hole * math.sqrt(2 * 9.80665)) * (math.sqrt(start) - math.sqrt(stop))


def test_plain_draw_down_with_its_range() -> None:
    run = answers().draw_down
    assert run.reaches_stop
    assert run.time.typical == pytest.approx(by_hand(2.8, 0.1, 0.61), rel=1e-12)
    assert run.time.low == pytest.approx(by_hand(2.8, 0.1, 0.63), rel=1e-12)
    assert run.time.high == pytest.approx(by_hand(2.8, 0.1, 0.59), rel=1e-12)
    assert run.released == pytest.approx(math.pi * 1.2**2 * 2.7, rel=1e-12)


def test_to_the_plane_of_a_downward_opening_in_finite_time() -> None:
    run = answers(levels={"start": "2.8 m", "stop": "0 m"})
    assert run.draw_down.time.typical == pytest.approx(by_hand(2.8, 0.0, 0.61), rel=1e-12)
    assert run.curve.level[-1] == 0.0


def test_never_to_the_lower_edge_of_a_side_opening() -> None:
    run = answers(outlets=[SIDE], levels={"start": "2 m", "stop": "0.35 m"})
    assert not run.draw_down.reaches_stop
    assert run.draw_down.time.typical is None
    assert "keeps a heel of 1.58\N{NO-BREAK SPACE}m³" in run.draw_down.reason
    assert run.equilibrium.level.typical == pytest.approx(0.35)
    # The run is shown until 0.1 % of what will leave is left.
    left = run.curve.volume[-1] - (run.equilibrium.volume or 0.0)
    assert left == pytest.approx(0.001 * (run.vessel.start_volume - (run.equilibrium.volume or 0.0)), rel=1e-6)


def test_settles_above_the_stop() -> None:
    run = answers(inflow=inflow("4 L/s"))
    rest = (0.004 / (0.61 * math.pi * 0.025**2)) ** 2 / (2 * 9.80665)
    assert run.equilibrium.level.typical == pytest.approx(rest, rel=1e-12)
    assert not run.draw_down.reaches_stop
    assert "settles at" in run.draw_down.reason
    assert run.curve.ends == "settled"
    assert run.findings[0].rule == "C11"


def test_overflows() -> None:
    run = answers(inflow=inflow("30 L/s"))
    assert run.curve.ends == "overflow"
    assert run.curve.level[-1] == pytest.approx(2.9)
    assert run.equilibrium.level.typical is None
    assert run.equilibrium.overflows
    assert run.peak.overflowed is None
    assert run.peak.time == run.curve.time[-1]
    assert run.findings[0].rule == "C13"


def test_filling() -> None:
    run = answers(levels={"start": "0.5 m", "stop": "2 m"}, inflow=inflow("12 L/s"))
    time = run.draw_down.time
    assert run.draw_down.reaches_stop
    assert time.low is not None and time.typical is not None and time.high is not None
    assert time.low < time.typical < time.high
    assert run.curve.level[-1] == 2.0


def test_filling_with_nothing_flowing_in() -> None:
    run = answers(levels={"start": "0.5 m", "stop": "2 m"})
    assert not run.draw_down.reaches_stop
    assert run.draw_down.reason.endswith("nothing flows in")


def test_no_time_from_a_level_to_itself() -> None:
    run = answers(levels={"start": "2 m", "stop": "2 m"})
    assert run.draw_down.reaches_stop
    assert run.draw_down.time.typical == 0.0


def test_a_level_below_every_opening_stays() -> None:
    run = answers(outlets=[SIDE], levels={"start": "0.3 m", "stop": "0.1 m"})
    assert run.curve.ends == "at rest"
    assert set(run.curve.level) == {0.3}


def test_largest_inflow_is_the_outflow_at_overflow() -> None:
    largest = answers().equilibrium.largest_inflow
    flow = math.pi * 0.025**2 * math.sqrt(2 * 9.80665 * 2.9)
    assert (largest.low, largest.typical) == pytest.approx((0.59 * flow, 0.61 * flow), rel=1e-12)
    assert not answers(inflow=inflow(f"{0.58 * flow * 1000:.9f} L/s")).equilibrium.overflows
    assert answers(inflow=inflow(f"{0.62 * flow * 1000:.9f} L/s")).equilibrium.overflows


def test_time_to_within_two_per_cent() -> None:
    # From twice the equilibrium's volume 4.13 time constants of 2V/Q, by the closed form in V (own derivation).
    rate, area = 0.004, math.pi * 1.2**2
    rest = (rate / (0.61 * math.pi * 0.025**2)) ** 2 / (2 * 9.80665)
    run = answers(inflow=inflow("4 L/s"), levels={"start": f"{2 * rest:.12f} m", "stop": "0.1 m"})
    root, near = math.sqrt(2), math.sqrt(1.02)
    exact = 2 * area * rest / rate * ((root - near) + math.log((root - 1) / (near - 1)))
    assert run.equilibrium.time_to_98_percent == pytest.approx(exact, rel=1e-9)
    assert exact / (2 * area * rest / rate) == pytest.approx(4.13, abs=0.02)


def test_size_for_a_drain_time_with_its_neighbours() -> None:
    run = answers(target={"drain_time": "20 min"})
    (sizing,) = run.sizing
    exact = 0.05 * math.sqrt(by_hand(2.8, 0.1, 0.61) / 1200)
    assert sizing.diameter.typical == pytest.approx(exact, rel=1e-9)
    assert sizing.diameter.low == pytest.approx(exact * math.sqrt(0.61 / 0.63), rel=1e-9)
    assert [neighbour.diameter for neighbour in sizing.neighbours] == pytest.approx([0.063, 0.071])
    assert sizing.neighbours[1].achieved.typical == pytest.approx(by_hand(2.8, 0.1, 0.61, 0.071), rel=1e-9)
    assert sizing.standard == "plate opening 71 mm"
    assert all((neighbour.achieved.high or 0) > 0 for neighbour in sizing.neighbours)


def test_no_size_for_a_filling() -> None:
    parts = {"levels": {"start": "0.5 m", "stop": "2 m"}, "target": {"drain_time": "20 min"}}
    (sizing,) = answers(inflow=inflow("12 L/s"), **parts).sizing
    assert sizing.diameter.typical is None
    assert "below the start" in sizing.reason


def test_other_outlets_alone_are_quick_enough() -> None:
    outlets = [TANK["outlets"][0], {"name": "large", "opening": {"form": "round", "diameter": "200 mm"}}]
    (sizing,) = answers(outlets=outlets, target={"drain_time": "1 h"}).sizing
    assert sizing.reason.startswith("the other outlets alone drain it in")


def test_a_side_opening_cannot_grow_out_of_the_vessel() -> None:
    (sizing,) = answers(outlets=[SIDE], levels={"start": "2 m", "stop": "1 m"}, target={"drain_time": "1 s"}).sizing
    assert sizing.diameter.typical is None
    assert sizing.reason.startswith("even 800\N{NO-BREAK SPACE}mm, the largest that fits at its height, takes")


def test_figures_are_plain_json_without_infinities() -> None:
    for parts in ({}, {"inflow": inflow("30 L/s")}, {"outlets": [SIDE]}, {"target": {"drain_time": "1 s"}}):
        figures = json.loads(json.dumps(answers(**parts).as_dict(), allow_nan=False))
        assert set(figures["draw_down"]) >= {"reaches_stop", "reason", "time_s", "time_low_s", "time_high_s"}
        assert 200 <= len(figures["curve"]["time_s"]) <= 2000


@given(
    minutes=st.floats(1.0, 300.0),
    rate=st.floats(0.0, 10.0),
    facing=st.sampled_from(["down", "side"]),
    shape=st.sampled_from(["cylinder", "cone", "drum"]),
)
@settings(max_examples=60, deadline=None)
def test_the_size_found_meets_the_target(minutes: float, rate: float, facing: str, shape: str) -> None:
    vessel = {
        "cylinder": TANK["vessel"],
        "cone": {"shape": "cone", "top_diameter": "2.4 m", "bottom_diameter": "0.4 m", "height": "3 m"},
        "drum": {"shape": "drum", "diameter": "3 m", "length": "2 m", "heads": {"form": "torispherical"}},
    }[shape]
    outlet = {"facing": facing, "elevation": "0.3 m" if facing == "side" else "0 m"}
    hole = {"form": "round", "diameter": "80 mm"}
    parts = {"vessel": vessel, "inflow": inflow(f"{rate:.6f} L/s"), "target": {"drain_time": f"{minutes:.9f} min"}}
    levels = {"start": "2.6 m", "stop": "0.8 m"}
    (sizing,) = answers(outlets=[outlet | {"opening": hole}], levels=levels, **parts).sizing
    if sizing.diameter.typical is None:
        assert sizing.reason
        return

    def time_with(factor: float) -> float:
        opening = {"form": "round", "diameter": f"{factor * (sizing.diameter.typical or 0):.15g} m"}
        return (
            answers(outlets=[outlet | {"opening": opening}], levels=levels, **parts).draw_down.time.typical or math.inf
        )

    # Near the size that just holds the stop level time is a matter of the last digit; the size is not.
    assert time_with(1 + 1e-7) <= 60 * minutes <= time_with(1 - 1e-7)
