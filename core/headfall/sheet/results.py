"""The run at about ten round levels, and the listed sizes."""

from __future__ import annotations

import math

import numpy as np

from headfall.answers import Answers, Curve, Neighbour, Sizing
from headfall.outlet.orifice import OrificeOutlet
from headfall.outlet.outlet import TYPICAL, Outlet
from headfall.outlet.pipe import PipeOutlet
from headfall.quantities import DisplayUnits, duration
from headfall.sheet.further_tables import doubtful_text, further_tables, is_doubtful
from headfall.sheet.marks import unmarked
from headfall.sheet.method_headspace import conditions_at
from headfall.sheet.model import Column, Paragraph, Part, Table
from headfall.sheet.numbers import figures, fixed, sentence
from headfall.sheet.question import ACHIEVED, range_text, wanted_time

NO_VALUE = "–"


def results_parts(answers: Answers, display: DisplayUnits) -> tuple[Part, ...]:
    """Return the table of the run, and beside it what else was asked for: times, stages, temperatures."""
    outlet = answers.system.outlets[0]
    several = len(answers.system.outlets) > 1
    units = {kind: display.unit(kind) for kind in ("level", "volume", "area", "flow", "velocity")}
    columns = tuple(
        Column(title, share, "right")
        for title, share in (
            (f"Level, {units['level']}", 0.9),
            (f"Volume, {units['volume']}", 1.1),
            (f"Surface, {units['area']}", 1.0),
            (f"Head, {units['level']}", 0.9),
            (f"Outflow, {units['flow']}", 1.15),
            (f"Net, {units['flow']}", 1.0),
            (f"Velocity, {units['velocity']}", 1.1),
            ("Time, s", 0.95),
            ("Time", 1.35),
            ("Range, s", 1.6),
        )
    )
    rows = tuple(_row(answers, display, level) for level in round_levels(answers, display))
    which = f" of {outlet.name}, the first outlet" if several else ""
    note = (
        f"Typical coefficient. Head{which}: {_head_words(outlet)}. Net: outflow less inflow. "
        f"Velocity: {_velocity_words(outlet)}. Range: {_range_words(answers)}."
    )
    parts: list[Part] = [Table(columns, rows), Paragraph(note, "small")]
    if answers.doubtful:
        parts.append(Paragraph(doubtful_text(answers, display), "small"))
    return (*parts, *further_tables(answers, display))


def _head_words(outlet: Outlet) -> str:
    if isinstance(outlet, OrificeOutlet):
        return f"level above its {'centre' if outlet.facing == 'side' else 'plane'}"
    return "down to its discharging end" if isinstance(outlet, PipeOutlet) else "level above its crest"


def _velocity_words(outlet: Outlet) -> str:
    if isinstance(outlet, PipeOutlet):
        return "in the first bore"
    return "flow over the full area of the opening" if outlet.area else "none for a weir"


def _range_words(answers: Answers) -> str:
    pipes = any(isinstance(outlet, PipeOutlet) for outlet in answers.system.outlets)
    return "over losses, roughness and coefficients" if pipes else "over the coefficients"


def round_levels(answers: Answers, display: DisplayUnits) -> tuple[float, ...]:
    """Return about ten levels [m] in the order of the run: its ends, and round ones between them."""
    first, last = float(answers.curve.level[0]), float(answers.curve.level[-1])
    factor = display.factor("level")
    low, high = sorted((first / factor, last / factor))
    if high - low <= 0:
        return (first,)
    step = _round_step((high - low) / 9)
    marks = np.arange(math.ceil(low / step), math.floor(high / step) + 1) * step
    inner = [float(mark) * factor for mark in marks if low + 0.25 * step < mark < high - 0.25 * step]
    ordered = inner[::-1] if first > last else inner
    return (first, *ordered, last)


def _round_step(least: float) -> float:
    power = 10.0 ** math.floor(math.log10(least))
    return next(step * power for step in (1.0, 2.0, 2.5, 5.0, 10.0) if step * power >= least * 0.85)


def _row(answers: Answers, display: DisplayUnits, level: float) -> tuple[str, ...]:
    system = answers.system
    here = np.array([level])
    rows = [row[:, [TYPICAL]] for row in system.discharge.coefficients]
    flows = [float(flow[0]) for flow in system.discharge.each(here, rows)]
    first = system.outlets[0]
    head = first.head(level, conditions_at(answers, level)[0])
    mark = " *" if is_doubtful(answers, level) else ""
    time = _time_at(answers.curve, level)
    reached = [_time_at(curve, level) for curve in (answers.curve_high, answers.curve_low)]
    ends = [fixed(end, 0) for end in sorted(end for end in reached if end is not None)]
    reach = " to ".join([*ends, "never", "never"][:2])
    return (
        display.number(level, "level") + mark,
        display.number(float(system.profile.volume(here)[0]), "volume"),
        display.number(float(system.profile.plan_area(here)[0]), "area"),
        display.number(head, "level"),
        display.number(sum(flows), "flow"),
        display.number(sum(flows) - system.inflow, "flow"),
        display.number(flows[0] / first.area, "velocity") if first.area else NO_VALUE,
        NO_VALUE if time is None else "0" if time == 0 else _whole_seconds(time),
        NO_VALUE if time is None else duration(time),
        reach,
    )


def _whole_seconds(time: float) -> str:
    return fixed(time, 0) if time >= 100 else figures(time, 3)


def _time_at(curve: Curve, level: float) -> float | None:
    levels, times = curve.level, curve.time
    low, high = float(levels.min()), float(levels.max())
    margin = 1e-9 * max(1.0, high)
    if not low - margin <= level <= high + margin:
        return None
    if levels[0] > levels[-1]:
        levels, times = levels[::-1], times[::-1]
    return float(np.interp(level, levels, times))


def sizes_parts(answers: Answers, display: DisplayUnits) -> tuple[Part, ...]:
    """Return the listed sizes on both sides of the one wanted, with what each achieves, for every target."""
    if not answers.sizing:
        return (Paragraph("No drain time was asked for, so no size was looked for."),)
    parts: list[Part] = []
    for sizing in answers.sizing:
        if sizing.reason:
            parts.append(Paragraph(sentence(sizing.reason)))
        kind = ACHIEVED[sizing.target]
        rows = []
        for size in sizing.neighbours:
            found = size.achieved
            typical = found.typical
            shown = "never" if typical is None else duration(typical) if kind == "time" else display.text(typical, kind)
            rows.append(
                (
                    size.standard,
                    display.text(size.diameter, "bore"),
                    shown,
                    range_text(found, display, kind) or "never",
                    _met(answers, sizing, size),
                )
            )
        if rows:
            columns = (
                Column("Listed size", 1.5),
                Column("Bore", 0.9, "right"),
                Column(_ACHIEVED_WORDS[sizing.target], 1.2, "right"),
                Column("Its range", 1.8, "right"),
                Column(f"Meets {_wanted(answers, sizing)}", 1.6),
            )
            parts.append(Table(columns, tuple(rows)))
    return tuple(parts) or (Paragraph("No listed size was looked for."),)


_ACHIEVED_WORDS = {"drain_time": "Time to the stop", "highest_level": "Level of rest", "flow_at": "Flow there"}


def _met(answers: Answers, sizing: Sizing, size: Neighbour) -> str:
    if size.meets:
        return "yes, over the whole range"
    target, typical = answers.system.drain_time, size.achieved.typical
    partly = sizing.target == "drain_time" and target is not None and typical is not None and typical <= target
    return "at the typical coefficient only" if partly else "no"


def _wanted(answers: Answers, sizing: Sizing) -> str:
    target = answers.case.target
    if sizing.target == "drain_time" or target is None:
        return wanted_time(answers)
    if sizing.target == "highest_level" and target.highest_level is not None:
        return unmarked(target.highest_level.text)
    return "" if target.flow_at is None else unmarked(target.flow_at.flow.text)
