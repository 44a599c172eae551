"""A checker redoes the main answer from what is printed: here a small calculator reads the printed figures."""

from __future__ import annotations

import math
import re

import pytest

from headfall.sheet import Paragraph, Sheet, Table, build_sheet
from headfall.sheet.marks import unmarked
from headfall.sheet.numbers import read_figure
from tests.core.sheet_cases import CASES, WITHOUT_A_TIME, answers_to

TIMED = [name for name in CASES if name not in WITHOUT_A_TIME]
CLOSED = {
    "drum with flat heads",
    "drum with two heads",
    "cylinder",
    "cylinder with inflow",
    "cylinder close to rest",
    "cylinder to its floor",
    "box with two drains",
    "cone",
    "frustum, wide below",
    "sphere",
    "US units",
    "least typed",
}
FIGURE = r"[−]?[0-9]+(?:\.[0-9]+)?(?:·10[−]?[0-9]+)?"


def sheet_of(name: str) -> Sheet:
    return build_sheet(answers_to(name), version="0.1.0", fingerprint="7c1e 40b2 9ad3")


def method_lines(sheet: Sheet) -> list[str]:
    """The printed lines of the method, no-break spaces as spaces."""
    texts = [part.text for part in sheet.section(4).parts if isinstance(part, Paragraph)]
    return [unmarked(line).replace("\u00a0", " ") for text in texts for line in text.split("\n")]


def strips(sheet: Sheet) -> Table | None:
    tables = [part for part in sheet.section(4).parts if isinstance(part, Table)]
    return tables[0] if tables else None


def calculated(expression: str) -> float:
    """Work out a printed expression as typed into a pocket calculator."""
    keys = re.sub(rf"({FIGURE})", lambda found: f"({read_figure(found[1])!r})", expression)
    keys = keys.replace("·", "*").replace("−", "-").replace("[", "(").replace("]", ")").replace("√", "math.sqrt")
    assert not set(re.sub(r"math\.sqrt|e-", "", keys)) - set("0123456789.()+-*/ "), keys
    return float(eval(keys, {"math": math}))


def summed(table: Table) -> float:
    """Redo the strips from level, volume and net flow as printed, not from their printed results."""
    total = 0.0
    for before, here in zip(table.rows[:-1], table.rows[1:], strict=True):
        volume = read_figure(before[1]) - read_figure(here[1])
        first, last = read_figure(before[3]), read_figure(here[3])
        assert volume == pytest.approx(read_figure(here[4]), rel=1e-9, abs=1e-9)
        if len(table.columns) == 7 or here[6] == "–":
            total += volume / ((first + last) / 2)
        else:
            total += volume / 6 * (1 / first + 4 / read_figure(here[6]) + 1 / last)
    return total


@pytest.mark.parametrize("name", TIMED)
def test_the_printed_figures_give_the_main_answer_again(name: str) -> None:
    sheet, run = sheet_of(name), answers_to(name).draw_down
    solved = run.time.typical if run.reaches_stop else run.time_to_overflow.typical
    assert solved is not None
    lines = method_lines(sheet)
    said = next(line for line in lines if line.startswith("Redo by hand"))
    found = re.search(rf"({FIGURE}) s from .* gives ({FIGURE}) s .* within ({FIGURE}) %", said)
    assert found is not None
    by_hand, program, share = (read_figure(text) for text in found.groups())
    table = strips(sheet)
    if table is None:
        line = next(line for line in lines if line.startswith("t = ") and re.search(rf"= {FIGURE} s$", line))
        redone = calculated(line.split(" = ")[1])
    else:
        redone = summed(table)
    assert program == pytest.approx(solved, rel=6e-5)
    assert redone == pytest.approx(by_hand, rel=2e-4)
    assert share <= 0.5
    assert abs(redone - solved) / solved * 100 <= share * 1.05 + 0.01


def test_a_closed_form_is_printed_where_one_holds_and_strips_elsewhere() -> None:
    assert {name for name in TIMED if strips(sheet_of(name)) is None} == CLOSED


@pytest.mark.parametrize("name", [name for name in TIMED if name not in CLOSED])
def test_the_strips_run_from_the_start_to_the_end_without_a_gap(name: str) -> None:
    table, answers = strips(sheet_of(name)), answers_to(name)
    assert table is not None
    last = answers.system.stop if answers.draw_down.reaches_stop else answers.system.overflow
    levels = [read_figure(row[0]) for row in table.rows]
    assert levels[0] == pytest.approx(answers.system.start, abs=1e-4)
    assert levels[-1] == pytest.approx(last, abs=1e-4)
    assert levels == sorted(levels, reverse=levels[0] > levels[-1])
    assert len(levels) <= 19


@pytest.mark.parametrize("name", list(CASES))
def test_the_flow_at_the_start_follows_from_its_printed_line(name: str) -> None:
    answers = answers_to(name)
    lines = [line for line in method_lines(sheet_of(name)) if re.match(r"Q = [0-9]", line)]
    assert len(lines) == sum(1 for outlet in answers.system.outlets if outlet.lower_edge < answers.system.start)
    total = 0.0
    for line in lines:
        expression, middle, result = line.removeprefix("Q = ").removesuffix(" m³/s").split(" = ")
        assert calculated(expression) == pytest.approx(read_figure(result), rel=2e-4)
        assert calculated(middle) == pytest.approx(read_figure(result), rel=5.1e-5)
        total += read_figure(result)
    assert total == pytest.approx(answers.draw_down.outflow_at_start.typical, rel=2e-3)


def test_the_settling_level_follows_from_its_printed_line() -> None:
    line = next(line for line in method_lines(sheet_of("drum with inflow")) if line.startswith("h = z"))
    expression, result = line.split(" = ")[2:4]
    squared = expression.replace("²", " ** 2")
    figures = [read_figure(text) for text in re.findall(FIGURE, expression)]
    elevation, inflow, coefficient, area, two, gravity = figures
    assert squared.count("**") == 1
    level = elevation + (inflow / (coefficient * area)) ** 2 / (two * gravity)
    assert level == pytest.approx(read_figure(result.removesuffix(" m")), abs=6e-5)
    assert level == pytest.approx(answers_to("drum with inflow").equilibrium.level.typical, abs=1e-4)


@pytest.mark.parametrize("name", ["cylinder", "cone", "drum with flat heads", "drum"])
def test_without_inflow_the_size_follows_from_the_root_of_the_times(name: str) -> None:
    line = next(line for line in method_lines(sheet_of(name)) if line.startswith("d = d0"))
    found = re.search(rf"= ({FIGURE}) · √\(({FIGURE}) / ({FIGURE})\) = ({FIGURE}) m; found ({FIGURE}) m", line)
    assert found is not None
    present, time, wanted, size, solved = (read_figure(text) for text in found.groups())
    assert present * math.sqrt(time / wanted) == pytest.approx(size, rel=2e-4)
    assert size == pytest.approx(solved, rel=2e-3)
    assert solved == pytest.approx(answers_to(name).sizing[0].diameter.typical, rel=2e-4)


@pytest.mark.parametrize("name", ["drum with inflow", "cylinder with inflow", "frustum with inflow", "US units"])
def test_with_inflow_the_size_found_is_checked_by_the_same_calculation(name: str) -> None:
    line = next(line for line in method_lines(sheet_of(name)) if "found by trying sizes" in line)
    again = re.search(rf"come to ({FIGURE}) s", line)
    assert again is not None
    assert read_figure(again[1]) == pytest.approx(answers_to(name).system.drain_time, rel=0.01)


def test_a_run_that_strips_cannot_carry_is_said_to_be_too_long(monkeypatch: pytest.MonkeyPatch) -> None:
    monkeypatch.setattr("headfall.sheet.hand_strips.MOST", 1)
    monkeypatch.setattr("headfall.sheet.hand_strips.FEWEST", 2)
    lines = method_lines(sheet_of("drum with inflow"))
    assert lines[-1] == "2212.7 s by the program’s integral; too long to be redone by hand."


def test_the_square_of_the_size_found_follows_from_what_is_printed() -> None:
    found = 0
    for name in CASES:
        text = " ".join(method_lines(sheet_of(name)))
        for large, small, square in re.findall(r"\(([0-9.]+)/([0-9.]+)\)² = ([0-9.]+)", text):
            digits = len(square.partition(".")[2])
            assert float(square) == pytest.approx((float(large) / float(small)) ** 2, abs=0.51 * 10**-digits)
            found += 1
    assert found >= 2
