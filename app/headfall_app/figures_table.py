"""The answers as a table a person can read in a terminal; no Qt."""

from __future__ import annotations

from collections.abc import Iterator
from textwrap import wrap

from headfall.answers import Answers, Figure, Sizing
from headfall.checks.finding import Grade
from headfall.quantities import DisplayUnits, display_units
from headfall.resources import read_resource

_LABEL, _VALUE, _LINE = 30, 20, 100


def figures_table(answers: Answers, display: DisplayUnits | None = None) -> str:
    """Return the answers as lines of text, in the case's display units unless others are given."""
    display = display or display_units(answers.case.units or "metric")
    lines = [_heading(answers), ""]
    for block in (_vessel, _draw_down, _equilibrium, _sizing, _coefficients, _beside, _stages):
        rows = list(block(answers, display))
        lines += [*rows, ""] if rows else []
    lines += _checks(answers)
    # A no-break space would not be found by somebody who searches the output with a plain one.
    return "\n".join(lines).replace("\u00a0", " ").rstrip() + "\n"


def _heading(answers: Answers) -> str:
    case = answers.case
    parts = [case.title or "Untitled case", case.tag or "", f"revision {case.revision}" if case.revision else ""]
    return "  ".join(filter(None, parts))


def _row(label: str, value: str, remark: str = "") -> str:
    return f"{label:<{_LABEL - 2}}  {value:<{_VALUE - 2}}  {remark}".rstrip()


def _range(figure: Figure, kind: str, display: DisplayUnits) -> str:
    if figure.low is None or figure.high is None:
        reached = [end for end in (figure.low, figure.high) if end is not None]
        return f"from {display.text(reached[0], kind)}" if reached and figure.typical is not None else ""
    low, high = display.text(figure.low, kind), display.text(figure.high, kind)
    return "the same over the whole range" if low == high else f"{low} to {high}"


def _vessel(answers: Answers, display: DisplayUnits) -> Iterator[str]:
    vessel, system = answers.vessel, answers.system
    yield _row("Height of the vessel", display.text(vessel.height, "level"))
    yield _row("Capacity", display.text(vessel.capacity, "volume"))
    for name, level, volume in (
        ("Start level", system.start, vessel.start_volume),
        ("Stop level", system.stop, vessel.stop_volume),
        ("Overflow level", system.overflow, vessel.overflow_volume),
    ):
        yield _row(name, display.text(level, "level"), f"{display.text(volume, 'volume')} below it")
    yield _row("Inflow", display.text(system.inflow, "flow"))


def _draw_down(answers: Answers, display: DisplayUnits) -> Iterator[str]:
    run = answers.draw_down
    if run.time.typical is None:
        yield _row("Time to the stop level", "never reached", run.reason)
    else:
        yield _row("Time to the stop level", display.text(run.time.typical, "time"), _range(run.time, "time", display))
    if run.time_to_overflow.typical is not None:
        value = display.text(run.time_to_overflow.typical, "time")
        yield _row("Time to overflow", value, _range(run.time_to_overflow, "time", display))
    if run.released is not None:
        yield _row("Released", display.text(run.released, "volume"))
    start = run.outflow_at_start
    if start.typical is not None:
        yield _row("Outflow at start", display.text(start.typical, "flow"), _range(start, "flow", display))


def _equilibrium(answers: Answers, display: DisplayUnits) -> Iterator[str]:
    rest = answers.equilibrium
    if rest.surges_at is not None:
        yield _row("Settles at", "no steady level", rest.reason)
    elif rest.level.typical is None:
        yield _row("Settles at", "above the top", rest.reason)
    else:
        remark = rest.reason or _range(rest.level, "level", display)
        yield _row("Settles at", display.text(rest.level.typical, "level"), remark)
    if rest.time_to_98_percent is not None:
        yield _row("Within 2 % of it after", display.text(rest.time_to_98_percent, "time"))
    largest = rest.largest_inflow
    if largest.typical is not None:
        value = display.text(largest.typical, "flow")
        yield _row("Largest inflow held", value, _range(largest, "flow", display))


def _sizing(answers: Answers, display: DisplayUnits) -> Iterator[str]:
    for sizing in answers.sizing:
        yield from _one_sizing(sizing, display)


def _one_sizing(sizing: Sizing, display: DisplayUnits) -> Iterator[str]:
    label = f"Outlet for the target, {sizing.outlet}"
    if sizing.diameter.typical is not None:
        value = display.text(sizing.diameter.typical, "bore")
        yield _row(label, value, _range(sizing.diameter, "bore", display))
    elif sizing.scale is not None:
        yield _row(label, f"{sizing.scale:.3g} of its size")
    else:
        yield _row(label, "none", sizing.reason)
    kind = _ACHIEVED[sizing.target]
    for neighbour in sizing.neighbours:
        found = neighbour.achieved
        value = "never reaches it" if found.typical is None else display.text(found.typical, kind)
        best = "largest" if sizing.target == "flow_at" else "smallest"
        chosen = f"{best} that meets it" if neighbour.standard == sizing.standard else ""
        yield _row(
            f"  with {neighbour.standard}", value, "  ".join(filter(None, (_range(found, kind, display), chosen)))
        )


_ACHIEVED = {"drain_time": "time", "highest_level": "level", "flow_at": "flow"}
_WHY = {
    "dip": "air may be drawn in",
    "transition": "neither laminar nor turbulent",
    "low_reynolds": "below the coefficient's Reynolds numbers",
    "part_full": "partly covered or part-full",
    "changing_control": "between weir and orifice",
}


def _beside(answers: Answers, display: DisplayUnits) -> Iterator[str]:
    """What acts on the outlets, and the tables asked for."""
    if answers.headspace is not None:
        lowest = display.text(answers.headspace.lowest, "pressure")
        yield _row("Lowest gauge pressure", lowest, f"at {display.text(answers.headspace.lowest_level, 'level')}")
    if answers.receiver_level is not None:
        yield _row("Receiving vessel, at the end", display.text(answers.receiver_level, "level"))
    for part in answers.doubtful:
        span = f"{display.number(part.low, 'level')} to {display.text(part.high, 'level')}"
        yield _row("Not to be relied on", span, f"{part.outlet}: {_WHY[part.why]}")
    for moment in answers.at_times:
        level = "the run has ended" if moment.level is None else display.text(moment.level, "level")
        flow = "" if moment.outflow is None else f"{display.text(moment.outflow, 'flow')} out"
        yield _row(f"After {display.text(moment.time, 'time')}", level, flow)
    for state in answers.at_temperatures:
        time = "never" if state.time.typical is None else display.text(state.time.typical, "time")
        viscosity = display.text(state.viscosity, "viscosity")
        remark = "  ".join(filter(None, (_range(state.time, "time", display), viscosity)))
        yield _row(f"At {display.text(state.temperature, 'temperature')}", time, remark)


def _stages(answers: Answers, display: DisplayUnits) -> Iterator[str]:
    if answers.stages:
        yield f"{'Level':>12}{'Surface':>14}{'Volume':>14}{'Outflow':>14}   its range"
    for stage in answers.stages:
        cells = (
            display.text(stage.level, "level"),
            display.text(stage.area, "area"),
            display.text(stage.volume, "volume"),
            display.text(stage.outflow.typical or 0.0, "flow"),
        )
        yield f"{cells[0]:>12}{cells[1]:>14}{cells[2]:>14}{cells[3]:>14}   {_range(stage.outflow, 'flow', display)}"


def _coefficients(answers: Answers, display: DisplayUnits) -> Iterator[str]:
    for used in answers.coefficients:
        value = f"{used.low:.3g} · {used.typical:.3g} · {used.high:.3g}"
        yield _row(f"Coefficient, {used.outlet}", value, _source(used.source))


def _checks(answers: Answers) -> list[str]:
    lines = ["Checks"]
    for finding in answers.findings:
        if finding.grade <= Grade.NOTE:
            said = wrap(f"{finding.text} {finding.advice}", _LINE - 12)
            lines += [f"{finding.grade.word:<12}{said[0]}", *(f"{'':<12}{line}" for line in said[1:])]
    for grade in (Grade.NO_CAUTION, Grade.NOT_CHECKED):
        named = [finding.subject for finding in answers.findings if finding.grade == grade]
        if named:
            said = wrap(f"{grade.word}: {'; '.join(named)}.", _LINE)
            lines += said
    return lines


def _source(key: str) -> str:
    """Return a source in a few words: author and year, or its title, and whether the value was read there."""
    source = read_resource("sources.json")[key]
    name = f"{source['author']} {source['year'] or ''}".strip() or source["title"]
    return f"{name}, {source['status']}"
