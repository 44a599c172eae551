"""How the size for the drain time wanted was found."""

from __future__ import annotations

import math
from dataclasses import replace

from headfall.answers import Answers, Sizing
from headfall.quantities import DisplayUnits
from headfall.sheet.hand_closed import closed_form
from headfall.sheet.hand_run import HandCalculation, HandRun
from headfall.sheet.marks import heavy, lowered
from headfall.sheet.model import Paragraph, Part, Table
from headfall.sheet.numbers import figures, read_figure, rounded, seconds, sentence

_D0, _T0 = f"d{lowered('0')}", f"t{lowered('0')}"
_MEAN_COLUMNS = 7
_DIGITS = 5
"""Of the sizes: enough that the time redone from print is the time wanted."""


def sizing_parts(answers: Answers, run: HandRun, calculation: HandCalculation, display: DisplayUnits) -> list[Part]:
    """Return the lines for the size, or none where no drain time was asked for."""
    target = answers.system.drain_time
    sizing = next((sizing for sizing in answers.sizing if sizing.target == "drain_time"), None)
    if target is None or sizing is None or run.goal != "stop":
        return []
    parts: list[Part] = [Paragraph("Size for the drain time wanted, typical coefficient", "heavy")]
    if sizing.reason or sizing.scale is None:
        return [*parts, Paragraph(sentence(sizing.reason) or "No size was found.")]
    parts.append(Paragraph(_line(run, sizing, target, calculation), "equation"))
    if sizing.diameter.low is not None and sizing.diameter.high is not None:
        low, high = display.text(sizing.diameter.low, "bore"), display.text(sizing.diameter.high, "bore")
        parts.append(Paragraph(f"With the highest coefficient {low} is enough, with the lowest it takes {high}."))
    return parts


def _line(run: HandRun, sizing: Sizing, target: float, calculation: HandCalculation) -> str:
    scale = sizing.scale or 1.0
    if not run.plain_openings:
        return _searched(sizing, target)
    outlet = run.plain_openings[0]
    simple = len(run.outlets) == 1 and outlet.facing == "down"
    name, before = ("d", _D0) if outlet.shape == "round" else ("width", f"width{lowered('0')}")
    present, found = outlet.width, outlet.width * scale
    result = heavy(f"{figures(found, _DIGITS)} m")
    if simple and run.inflow == 0:
        root = math.sqrt(rounded(calculation.seconds, 5) / target)
        return (
            f"{name} = {before}·√({_T0}/t) = {figures(present, _DIGITS)} · √({seconds(calculation.seconds)} / "
            f"{seconds(target)}) = {figures(rounded(present, _DIGITS) * root, _DIGITS)} m; found {result}"
        )
    text = f"{name} = {result}, found by trying sizes until the run takes {seconds(target)} s."
    return f"{text} {_redone(run, calculation, scale)}" if simple else text


def _searched(sizing: Sizing, target: float) -> str:
    """The size of what is not a plain opening: searched for, not redone here."""
    if sizing.diameter.typical is None:
        return f"Its size times {sizing.scale or 1.0:.4g}, found by trying until the run takes {seconds(target)} s."
    bore = heavy(f"{figures(sizing.diameter.typical, _DIGITS)} m")
    return f"d = {bore}, found by trying bores, lengths and losses kept, until the run takes {seconds(target)} s."


def _redone(run: HandRun, calculation: HandCalculation, scale: float) -> str:
    """Return the check of the size found: the same calculation with every outflow times the square of the scale."""
    present, found = (rounded(run.plain_openings[0].width * times, _DIGITS) for times in (1.0, scale))
    factor = rounded((found / present) ** 2, 5)
    squared = f"({figures(found, _DIGITS)}/{figures(present, _DIGITS)})² = {figures(factor, 5)}"
    if calculation.table is not None:
        again = summed_again(calculation.table, factor, rounded(run.inflow, 5))
        return f"Redo by hand: the strips above with every outflow times {squared} come to {seconds(again)} s."
    outlet = run.plain_openings[0]
    larger = replace(outlet, width=outlet.width * found / present, height=outlet.height * found / present)
    closed = closed_form(replace(run, flows=replace(run.flows, outlets=(larger,))))
    if closed is None:
        return ""
    return f"Redo by hand: the lines above with c times {squared} come to {seconds(closed.seconds)} s."


def summed_again(table: Table, factor: float, inflow: float) -> float:
    """Return the time [s] the printed strips come to with every printed outflow times ``factor``."""
    total = 0.0
    for before, here in zip(table.rows[:-1], table.rows[1:], strict=True):
        first, last = (read_figure(row[2]) * factor - inflow for row in (before, here))
        volume = read_figure(here[4])
        if len(table.columns) == _MEAN_COLUMNS or here[6] == "–":
            total += volume / ((first + last) / 2)
        else:
            middle = (read_figure(here[6]) + inflow) * factor - inflow
            total += volume / 6 * (1 / first + 4 / middle + 1 / last)
    return total
