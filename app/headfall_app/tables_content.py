"""What the tables say: the run at chosen times, level by level, and at other temperatures; no widgets."""

from __future__ import annotations

import math
from collections.abc import Iterator
from dataclasses import dataclass

from headfall.answers import Answers, Figure
from headfall.chosen import stages
from headfall.quantities import DisplayUnits, duration
from headfall.runs import Runs

TIMES, STAGES, TEMPERATURES = "times", "stages", "temperatures"
_ROWS_WANTED = 20
_STEPS, _CLOSE = (1.0, 2.0, 5.0, 10.0), 0.8


@dataclass(frozen=True, slots=True)
class Column:
    """A column: its heading, and its heading in a file, where a duration is a number of seconds."""

    title: str
    plain: str


@dataclass(frozen=True, slots=True)
class Cell:
    """A cell as it is shown, and as it stands in a file: a plain number with a point."""

    shown: str
    plain: str


@dataclass(frozen=True, slots=True)
class AnswerTable:
    """One table; without rows ``remark`` says how to ask for it."""

    key: str
    remark: str
    columns: tuple[Column, ...] = ()
    rows: tuple[tuple[Cell, ...], ...] = ()

    def as_text(self, mark: str, rows: tuple[int, ...] = ()) -> str:
        """Return heading and rows, all or some, as plain text with a mark between the columns."""
        chosen = [self.rows[row] for row in rows] or self.rows
        lines = [[column.plain for column in self.columns], *([cell.plain for cell in row] for row in chosen)]
        return "".join(mark.join(f'"{text}"' if mark in text else text for text in line) + "\n" for line in lines)


def tables_of(answers: Answers, display: DisplayUnits) -> tuple[AnswerTable, ...]:
    """Return the three tables in display units; the level table at a step of its own where none is typed."""
    return _times(answers, display), _stages(answers, display), _temperatures(answers, display)


def own_step(height: float, display: DisplayUnits) -> float:
    """Return a round step of level [m] in the display units that cuts a height [m] into about twenty."""
    unit = display.factor("level")
    wanted = height / unit / _ROWS_WANTED
    power = 10.0 ** math.floor(math.log10(wanted))
    return unit * power * next(step for step in _STEPS if step * power >= _CLOSE * wanted)


def _times(answers: Answers, display: DisplayUnits) -> AnswerTable:
    if not answers.at_times:
        return AnswerTable(TIMES, "No times are asked for. Type them under Tables, At times, such as 5 min; 1 h.")
    datum = answers.system.site_datum
    columns = [Column("Time", "Time, s"), _column("Level", "level", display)]
    columns += [_column("On site datum", "level", display)] if datum is not None else []
    columns += [_column("Volume", "volume", display), _column("Outflow", "flow", display)]
    rows = []
    for moment in answers.at_times:
        cells = [_time(moment.time), _number(moment.level, "level", display)]
        if datum is not None:
            cells.append(_number(None if moment.level is None else moment.level + datum, "level", display))
        cells += [_number(moment.volume, "volume", display), _number(moment.outflow, "flow", display)]
        rows.append(tuple(cells))
    ended = any(moment.level is None for moment in answers.at_times)
    remark = "The run with the typical coefficient."
    return AnswerTable(TIMES, f"{remark} Empty after its end." if ended else remark, tuple(columns), tuple(rows))


def _stages(answers: Answers, display: DisplayUnits) -> AnswerTable:
    tables, height = answers.case.tables, answers.vessel.height
    typed = tables.level_step if tables is not None else None
    step = typed.value if typed is not None else own_step(height, display)
    found = answers.stages or stages(Runs(answers.system), step)
    datum, capacity = answers.system.site_datum, answers.vessel.capacity
    columns = [_column("Level", "level", display)]
    columns += [_column("On site datum", "level", display)] if datum is not None else []
    columns += [_column("Surface", "area", display), _column("Volume", "volume", display)]
    columns += [Column("Of capacity, %", "Of capacity, %"), _column("Outflow", "flow", display)]
    columns += [_column("Least outflow", "flow", display), _column("Most outflow", "flow", display)]
    rows = []
    for stage in found:
        cells = [_number(stage.level, "level", display)]
        cells += [_number(stage.level + datum, "level", display)] if datum is not None else []
        cells += [_number(stage.area, "area", display), _number(stage.volume, "volume", display)]
        share = f"{100 * stage.volume / capacity:.1f}"
        cells += [Cell(share, share), *_figure(stage.outflow, display)]
        rows.append(tuple(cells))
    every = typed.text if typed is not None else f"{step / display.factor('level'):g} {display.unit('level')}"
    remark = f"Level standing still, every {every}"
    remark += "." if typed is not None else ", a step chosen here. Type a level step under Tables for another."
    return AnswerTable(STAGES, remark, tuple(columns), tuple(rows))


def _temperatures(answers: Answers, display: DisplayUnits) -> AnswerTable:
    if not answers.at_temperatures:
        wanted = "No other temperatures are asked for. Type them under Liquid, Also at, such as 5 °C; 40 °C."
        liquid = answers.case.liquid
        if liquid is not None and liquid.density is not None:
            wanted = "A liquid of one's own in one state has one temperature. Choose Own, by temperature under Liquid."
        return AnswerTable(TEMPERATURES, wanted)
    columns = [_column(*names, display) for names in _OF_TEMPERATURES]
    columns += [Column(name, f"{name}, s") for name in ("Time to stop", "Shortest", "Longest")]
    columns += [Column(name, name) for name in ("Re at start", "Re at end")]
    rows = []
    for state in answers.at_temperatures:
        cells = [_number(getattr(state, kind), kind, display) for _, kind in _OF_TEMPERATURES]
        cells += [_time(state.time.typical), _time(state.time.low), _time(state.time.high)]
        cells += [_count(state.reynolds_first), _count(state.reynolds_last)]
        rows.append(tuple(cells))
    remark = "Time from start to stop. A dash where the stop is never reached."
    return AnswerTable(TEMPERATURES, remark, tuple(columns), tuple(rows))


_OF_TEMPERATURES = (("Temperature", "temperature"), ("Density", "density"), ("Viscosity", "viscosity"))


def _column(name: str, kind: str, display: DisplayUnits) -> Column:
    title = f"{name}, {display.unit(kind)}"
    return Column(title, title)


def _figure(figure: Figure, display: DisplayUnits) -> Iterator[Cell]:
    for value in (figure.typical, figure.low, figure.high):
        yield _number(value, "flow", display)


def _number(value: float | None, kind: str, display: DisplayUnits) -> Cell:
    if value is None:
        return Cell("–", "")
    shown = display.number(value, kind)
    return Cell(shown, shown.replace("\u2212", "-"))


def _time(value: float | None) -> Cell:
    return Cell("–", "") if value is None else Cell(duration(value), f"{value:.6g}")


def _count(value: float) -> Cell:
    shown = f"{value:.3g}" if value < 1000 else f"{float(f'{value:.3g}'):.0f}"
    return Cell(shown, shown)
