"""Worked scenarios whose numbers were computed apart from this program, in a general-purpose language with its own

quadrature, root finding and friction solver; they stand as examples among the program's cases.
"""

from __future__ import annotations

from dataclasses import replace
from pathlib import Path

import pytest

from headfall.answers import Answers
from headfall.case.model import (
    Case,
    ClosedHeadspace,
    Fitting,
    OpenHeadspace,
    Pipe,
    SteadyInflow,
    VentedHeadspace,
)
from headfall.files import read_case
from headfall.outlet.pipe import PipeOutlet
from headfall.quantities import parse
from headfall.study import solve
from headfall.system.profiles import invert_at

EXAMPLES = Path(__file__).parents[2] / "resources" / "examples"


def with_bore(case: Case, bore: str) -> Case:
    pipe = case.outlets[0]
    assert isinstance(pipe, Pipe)
    return replace(case, outlets=(replace(pipe, bore=parse(bore, "bore")),))


def minutes(answers: Answers) -> tuple[float, float, float]:
    time = answers.draw_down.time
    assert time.low is not None and time.typical is not None and time.high is not None
    return time.low / 60, time.typical / 60, time.high / 60


def hours(answers: Answers) -> float:
    return (answers.draw_down.time.typical or 0.0) / 3600


# The drum that is dumped through a line of 4 in ---------------------------------------------------------------------


@pytest.fixture
def drum() -> Case:
    """The example with an open headspace: the printed times leave the vent's small vacuum out."""
    return replace(read_case(EXAMPLES / "dump_drum.headfall"), headspace=OpenHeadspace())


def above_the_nozzle(case: Case, level: float) -> float:
    """The printed levels count from the nozzle's invert, 0.30 m from the low tangent line."""
    return level - invert_at(case.vessel, 0.30)


def test_drum_volumes_and_levels(drum: Case) -> None:
    answers = solve(drum)
    assert answers.vessel.capacity == pytest.approx(19.176, abs=0.0006)
    assert answers.vessel.start_volume == pytest.approx(15.341, abs=0.0006)
    assert above_the_nozzle(drum, answers.system.start) == pytest.approx(1.511, abs=0.0006)
    assert answers.vessel.stop_volume == pytest.approx(0.226, abs=0.0006)
    assert above_the_nozzle(drum, answers.system.stop) == pytest.approx(0.100, abs=0.0002)


@pytest.mark.parametrize(
    ("bore", "low", "typical", "high"), [("NPS 3 sch 40", 15.7, 16.1, 17.2), ("NPS 4 sch 40", 8.5, 8.8, 9.5)]
)
def test_drum_emptying_time(drum: Case, bore: str, low: float, typical: float, high: float) -> None:
    assert minutes(solve(with_bore(drum, bore))) == pytest.approx((low, typical, high), abs=0.051)


def test_drum_emptying_time_through_six_inches_and_through_100_mm_taken_for_it(drum: Case) -> None:
    assert minutes(solve(with_bore(drum, "NPS 6 sch 40")))[1] == pytest.approx(3.6, abs=0.051)
    assert minutes(solve(with_bore(drum, "100 mm")))[1] == pytest.approx(9.23, abs=0.006)


def test_drum_with_a_dirty_strainer(drum: Case) -> None:
    pipe = drum.outlets[0]
    assert isinstance(pipe, Pipe)
    dirty = replace(pipe, fittings=(*(pipe.fittings or ()), Fitting("dirty strainer", 10.0)))
    assert minutes(solve(replace(drum, outlets=(dirty,))))[1] == pytest.approx(17.8, abs=0.051)


def test_drum_line_at_the_start_by_hand(drum: Case) -> None:
    answers = solve(drum)
    line = answers.system.outlets[0]
    assert isinstance(line, PipeOutlet)
    flow = answers.draw_down.outflow_at_start.typical or 0.0
    speed = flow / line.area
    assert speed == pytest.approx(4.066, abs=0.0006)
    assert flow * 3600 == pytest.approx(120, abs=0.5)
    assert 1109 * speed * 0.10226 / 0.0019 == pytest.approx(2.43e5, rel=0.002)
    head = line.head(answers.system.start)
    assert head == pytest.approx(2.711, abs=0.0006)
    assert head * 2 * 9.80665 / speed**2 == pytest.approx(3.217, abs=0.003)


def test_drum_surges_with_the_feed_on(drum: Case) -> None:
    answers = solve(replace(drum, inflow=SteadyInflow(parse("15 m³/h", "flow"))))
    rest = answers.equilibrium
    assert rest.level.typical is None and not rest.overflows
    assert above_the_nozzle(drum, rest.surges_at or -1.0) == pytest.approx(0.0, abs=1e-6)
    assert (rest.surging_flow or 0.0) * 3600 == pytest.approx(80, abs=0.7)
    assert "surges" in rest.reason


def test_drum_with_its_vent_shut(drum: Case) -> None:
    answers = solve(replace(drum, headspace=ClosedHeadspace()))
    assert not answers.draw_down.reaches_stop
    level = answers.equilibrium.level.typical or 0.0
    assert above_the_nozzle(drum, level) == pytest.approx(1.379, abs=0.0006)
    assert answers.vessel.start_volume - (answers.equilibrium.volume or 0.0) == pytest.approx(1.47, abs=0.006)
    # The curve ends a thousandth short of the level of rest, and of its vacuum.
    assert answers.headspace is not None
    assert answers.headspace.lowest == pytest.approx(-28_000, abs=500)


@pytest.mark.parametrize(("bore", "vacuum"), [("50 mm", 480.0), ("80 mm", 70.0)])
def test_drum_vacuum_at_an_open_vent(drum: Case, bore: str, vacuum: float) -> None:
    answers = solve(replace(drum, headspace=VentedHeadspace(parse(bore, "bore"))))
    assert answers.headspace is not None
    assert -answers.headspace.lowest == pytest.approx(vacuum, abs=6.0)


def test_drum_of_the_example_meets_its_fifteen_minutes() -> None:
    answers = solve(read_case(EXAMPLES / "dump_drum.headfall"))
    assert minutes(answers)[2] < 15
    (sizing,) = answers.sizing
    assert [neighbour.standard[:5] for neighbour in sizing.neighbours] == ["NPS 3", "NPS 3"]
    assert [neighbour.meets for neighbour in sizing.neighbours] == [False, True]


# Glycerine through a long line --------------------------------------------------------------------------------------


def test_glycerine_at_three_temperatures() -> None:
    answers = solve(read_case(EXAMPLES / "glycerine_tank.headfall"))
    warm, hot = answers.at_temperatures
    assert hours(answers) == pytest.approx(1.74, abs=0.006)
    assert (warm.time.typical or 0.0) / 3600 == pytest.approx(0.42, abs=0.006)
    assert (warm.reynolds_first, warm.reynolds_last) == pytest.approx((730, 272), abs=1)
    # In the transition the printed 0.25 h is one of the two bounds, within the digits given.
    assert hot.time.low is not None and hot.time.high is not None
    assert hot.time.low / 3600 < 0.25 and hot.time.high / 3600 == pytest.approx(0.25, abs=0.006)
    assert hot.reynolds_first == pytest.approx(3726, rel=0.02) and hot.reynolds_last == pytest.approx(2040, rel=0.02)


def test_glycerine_through_the_next_bore() -> None:
    answers = solve(with_bore(read_case(EXAMPLES / "glycerine_tank.headfall"), "NPS 4 sch 40"))
    assert hours(answers) == pytest.approx(0.65, abs=0.006)
    assert (answers.at_temperatures[0].time.typical or 0.0) / 3600 == pytest.approx(0.18, abs=0.006)
