"""What the row of answers says: five names, figures and ranges."""

from __future__ import annotations

from dataclasses import dataclass

from headfall.answers import Answers, Figure
from headfall.outlet.headspace import ClosedHeadspace
from headfall.outlet.orifice import OrificeOutlet
from headfall.outlet.pipe import PipeOutlet
from headfall.quantities import DisplayUnits, duration, duration_parts


@dataclass(frozen=True, slots=True)
class Answer:
    """One answer: ``figure`` is a row of (text, is a number) pieces, ``aside`` a range that may stand beside it."""

    name: str
    figure: tuple[tuple[str, bool], ...]
    under: str
    aside: str = ""

    @property
    def sentence(self) -> str:
        """The answer in words, for a tooltip and for those who listen."""
        figure = " ".join(text for text, _ in self.figure)
        parts = [f"{self.name}: {figure}", self.aside, self.under]
        return "; ".join(part for part in parts if part) + "."


def answers_of(answers: Answers, display: DisplayUnits) -> tuple[Answer, ...]:
    """Return the five answers, the run first."""
    return (
        _run(answers, display),
        _rest(answers, display),
        _outflow(answers, display),
        _outlet_or_inflow(answers, display),
        _room(answers, display),
    )


def _time(seconds: float) -> tuple[tuple[str, bool], ...]:
    return tuple(piece for number, unit in duration_parts(seconds) for piece in ((number, True), (unit, False)))


def _value(value: float, kind: str, display: DisplayUnits) -> tuple[tuple[str, bool], ...]:
    number, unit = display.parts(value, kind)
    return ((number, True), (unit, False)) if unit else ((number, True),)


def _between(low: str, high: str, unit: str = "") -> str:
    return f"{low} to {high}{unit}" if low != high else ""


def _range(figure: Figure, kind: str, display: DisplayUnits) -> str:
    if figure.low is None or figure.high is None:
        return ""
    unit = display.unit(kind)
    return _between(
        display.number(figure.low, kind), display.number(figure.high, kind), f"\u00a0{unit}" if unit else ""
    )


def _time_range(figure: Figure, otherwise: str) -> str:
    if figure.low is not None and figure.high is not None:
        return _between(duration(figure.low), duration(figure.high)) or "the same over the whole range"
    if figure.low is not None:
        return f"from {duration(figure.low)}; {otherwise}"
    return otherwise


def _run(answers: Answers, display: DisplayUnits) -> Answer:
    run, system = answers.draw_down, answers.system
    stop = f"Time to the stop level, {display.text(system.stop, 'level')}"
    if run.reaches_stop and run.time.typical is not None:
        if run.time.typical <= 0.0:
            return Answer(stop, _time(0.0), "starts at the stop level")
        return Answer(stop, _time(run.time.typical), _time_range(run.time, "at worst it never gets there"))
    over = run.time_to_overflow
    if over.typical is not None:
        name = f"Time to overflow, {display.text(system.overflow, 'level')}"
        return Answer(name, _time(over.typical), _time_range(over, "at best it never overflows"))
    level = answers.equilibrium.level.typical
    if level is None:
        under = run.reason
    elif system.inflow > 0.0:
        under = f"settles at {display.text(level, 'level')} first"
    else:
        under = f"settles at {display.text(level, 'level')}"
    return Answer(stop, (("never reached", True),), under)


def _rest(answers: Answers, display: DisplayUnits) -> Answer:
    rest, system = answers.equilibrium, answers.system
    if rest.surges_at is not None:
        full = display.text(rest.surging_flow or 0.0, "flow")
        return Answer("Settles at", (("no steady level", True),), f"surges; full it passes {full}")
    if rest.overflows or rest.level.typical is None:
        needed = rest.needed_level
        words = "above overflow" if needed is not None and needed <= system.profile.height else "above the top"
        under = f"would need {display.text(needed, 'level')}" if needed is not None else rest.reason
        return Answer("Settles at", ((words, True),), under)
    figure = _value(rest.level.typical, "level", display)
    if system.inflow > 0.0:
        return Answer("Settles at", figure, _range(rest.level, "level", display) or "the same over the whole range")
    return Answer("Settles at", figure, _held_by(answers, display))


def _held_by(answers: Answers, display: DisplayUnits) -> str:
    """What keeps the level up where nothing flows in."""
    if isinstance(answers.system.headspace, ClosedHeadspace) and answers.headspace is not None:
        return f"held by {display.text(abs(answers.headspace.lowest), 'pressure')} of vacuum"
    if answers.receiver_level is not None:
        return "level with the receiver"
    return "nothing flows in"


def _outflow(answers: Answers, display: DisplayUnits) -> Answer:
    flow = answers.draw_down.outflow_at_start
    figure = _value(flow.typical or 0.0, "flow", display)
    return Answer("Outflow at start", figure, _range(flow, "flow", display) or "the same over the whole range")


def _outlet_or_inflow(answers: Answers, display: DisplayUnits) -> Answer:
    overflows = answers.curve.ends == "overflow"
    if answers.sizing and not (overflows and answers.sizing[0].target == "drain_time"):
        return _outlet(answers, _asked(answers, display), display)
    largest = answers.equilibrium.largest_inflow
    name = "Largest inflow below overflow"
    if not largest.low:
        return Answer(name, (("none", True),), "no outlet drains at that level")
    under = "the same over the whole range"
    if largest.typical is not None and largest.typical != largest.low:
        under = f"to be sure; typically {display.text(largest.typical, 'flow')}"
    return Answer(name, _value(largest.low, "flow", display), under)


def _asked(answers: Answers, display: DisplayUnits) -> str:
    """The name of the size that is wanted: the outlet, pipe or weir for the first target."""
    target, outlet = answers.case.target, answers.system.outlets[answers.system.first_drain]
    kind = "Pipe" if isinstance(outlet, PipeOutlet) else "Outlet" if isinstance(outlet, OrificeOutlet) else "Weir"
    wanted = answers.sizing[0].target
    if target is None:
        return f"{kind} for the target"
    if wanted == "drain_time" and target.drain_time is not None:
        return f"{kind} for {target.drain_time.text}"
    if wanted == "highest_level" and target.highest_level is not None:
        return f"{kind} for {target.highest_level.text} at most"
    flow = target.flow_at.flow.text if target.flow_at is not None else ""
    return f"{kind} for {flow} at most"


def _outlet(answers: Answers, name: str, display: DisplayUnits) -> Answer:
    sizing = answers.sizing[0]
    if sizing.diameter.typical is None:
        if sizing.scale is None:
            return Answer(name, (("no size", True),), sizing.reason)
        return Answer(name, ((f"{sizing.scale:.3g}", True), ("times", False)), "its present width and height")
    return Answer(
        name,
        _value(sizing.diameter.typical, "bore", display),
        _next_size(answers, display) or sizing.reason,
        _range(sizing.diameter, "bore", display),
    )


def _next_size(answers: Answers, display: DisplayUnits) -> str:
    sizing = answers.sizing[0]
    chosen = [one for one in sizing.neighbours if one.standard == sizing.standard]
    typical = sizing.diameter.typical or 0.0
    beyond = [one for one in sizing.neighbours if (one.diameter >= typical) == (sizing.target != "flow_at")]
    is_pipe = isinstance(answers.system.outlets[answers.system.first_drain], PipeOutlet)
    for one in (chosen or beyond)[:1]:
        if one.achieved.typical is not None:
            kind = _ACHIEVED[sizing.target]
            text = duration(one.achieved.typical) if kind == "time" else display.text(one.achieved.typical, kind)
            size = one.standard if is_pipe else f"next size {display.text(one.diameter, 'bore')}"
            return f"{size}: {text}"
    return f"next size {display.text(sizing.standard_diameter, 'bore')}" if sizing.standard_diameter else ""


_ACHIEVED = {"drain_time": "time", "highest_level": "level", "flow_at": "flow"}


def _room(answers: Answers, display: DisplayUnits) -> Answer:
    room = answers.vessel.overflow_volume - answers.vessel.start_volume
    gap = answers.system.overflow - answers.system.start
    figure = _value(max(room, 0.0), "volume", display)
    return Answer("Room below overflow", figure, f"{display.text(max(gap, 0.0), 'level')} above start")
