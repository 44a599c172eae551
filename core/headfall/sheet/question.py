"""What is asked, and what the answer is, in one line each."""

from __future__ import annotations

from headfall.answers import Answers, Figure, Neighbour, Sizing
from headfall.case.model import Pipe, RoundOpening, Weir
from headfall.quantities import DisplayUnits, duration
from headfall.sheet.marks import unmarked
from headfall.sheet.model import AnswerBox, Paragraph, Part
from headfall.sheet.numbers import coefficient, sentence


def question_parts(answers: Answers, display: DisplayUnits) -> tuple[Part, ...]:
    """Return the answer box and what the case's author says about purpose and basis."""
    figure, beside = _main_answer(answers, display)
    lines = [line for line in (_requirement(answers, display), *_further(answers, display)) if line]
    box = AnswerBox(_question(answers, display), figure, beside, tuple(lines))
    remarks = unmarked(answers.case.remarks or "")
    paragraphs = [Paragraph(text.strip()) for text in remarks.splitlines() if text.strip()]
    if paragraphs:
        paragraphs.insert(0, Paragraph("Purpose and basis, as given by its author", "heavy"))
    return (box, *paragraphs)


def range_text(figure: Figure, display: DisplayUnits, kind: str) -> str:
    """Return ``low to high``; an end that does not exist reads ``never``."""
    show = duration if kind == "time" else lambda value: display.text(value, kind)
    if figure.low is None and figure.high is None:
        return ""
    low = "never" if figure.low is None else show(figure.low)
    high = "never" if figure.high is None else show(figure.high)
    return f"{low} to {high}"


def coefficient_range(answers: Answers) -> str:
    """Return the words for the coefficients the range is over."""
    if any(isinstance(outlet, Pipe) for outlet in answers.case.outlets):
        return "over the ranges of losses, roughness and coefficients"
    spans = {f"{coefficient(used.low)} to {coefficient(used.high)}" for used in answers.coefficients}
    if len(spans) == 1:
        return f"over coefficients {spans.pop()}"
    return "over the ranges of all outlets"


def _question(answers: Answers, display: DisplayUnits) -> str:
    system = answers.system
    inflow = f"{display.text(system.inflow, 'flow')} flowing in" if system.inflow > 0 else "nothing flowing in"
    start, stop = display.text(system.start, "level"), display.text(system.stop, "level")
    verb = "to fill from" if system.stop > system.start else "from"
    return f"How long {verb} {start} to {stop}, with {inflow}?"


def _main_answer(answers: Answers, display: DisplayUnits) -> tuple[str, str]:
    run = answers.draw_down
    if run.reaches_stop and run.time.typical is not None:
        return duration(run.time.typical), f"{range_text(run.time, display, 'time')} {coefficient_range(answers)}"
    if run.time_to_overflow.typical is not None:
        reach = range_text(run.time_to_overflow, display, "time")
        return f"overflows after {duration(run.time_to_overflow.typical)}", f"{reach} {coefficient_range(answers)}"
    return "never reached", _rest(answers, display)


def _rest(answers: Answers, display: DisplayUnits) -> str:
    level = answers.equilibrium.level
    if level.typical is None:
        return ""
    reach = "" if level.low == level.high else f" ({range_text(level, display, 'level')})"
    volume = answers.equilibrium.volume
    left = "" if volume is None else f", with {display.text(volume, 'volume')} still in the vessel"
    return f"it settles at {display.text(level.typical, 'level')}{reach}{left}"


def _requirement(answers: Answers, display: DisplayUnits) -> str:
    target = answers.system.drain_time
    if target is None and answers.sizing:
        return ""
    if target is None:
        return "No drain time was asked for, so nothing is judged met or not met."
    time = answers.draw_down.time
    judged = f"Wanted: {wanted_time(answers)} or less. "
    size = _size_as_typed(answers)
    if time.typical is None:
        judged += f"Not met with {size}: the stop level is not reached."
    elif time.high is not None and time.high <= target:
        return f"{judged}Met with {size} over the whole range. {_just_enough(answers, display)}".rstrip()
    elif time.typical <= target:
        judged += f"Met with {size} at the typical coefficient, not met over the whole range."
    else:
        judged += f"Not met with {size}."
    return f"{judged} {_next_size(answers, display)}".rstrip()


def wanted_time(answers: Answers) -> str:
    """Return the drain time asked for, as it was typed."""
    target = answers.case.target
    return "" if target is None or target.drain_time is None else unmarked(target.drain_time.text)


def _size_as_typed(answers: Answers) -> str:
    outlet = answers.case.outlets[answers.system.first_drain]
    if isinstance(outlet, Pipe):
        return unmarked(outlet.bore.text)
    if isinstance(outlet, Weir):
        return f"{unmarked(outlet.name or 'the weir')} as it is"
    opening = outlet.opening
    if isinstance(opening, RoundOpening):
        return unmarked(opening.diameter.text)
    return f"{unmarked(opening.width.text)} × {unmarked(opening.height.text)}"


def _next_size(answers: Answers, display: DisplayUnits) -> str:
    for sizing in answers.sizing:
        if sizing.target == "drain_time":
            return _sized(sizing, display)
    return ""


def _just_enough(answers: Answers, display: DisplayUnits) -> str:
    """Return the bore that would do, where the one there is more than enough."""
    sizing = next((sizing for sizing in answers.sizing if sizing.target == "drain_time"), None)
    if sizing is None or sizing.diameter.typical is None or sizing.diameter.high is None:
        return ""
    typical, largest = (display.text(size, "bore") for size in (sizing.diameter.typical, sizing.diameter.high))
    return f"A bore of {typical} would do at the typical coefficient, {largest} over the whole range."


def _sized(sizing: Sizing, display: DisplayUnits) -> str:
    if sizing.reason:
        return sentence(sizing.reason)
    listed = listed_neighbour(sizing)
    exact = "" if sizing.diameter.typical is None else f"Bore for it: {display.text(sizing.diameter.typical, 'bore')}"
    if sizing.standard and listed is not None and listed.achieved.typical is not None:
        reach = range_text(listed.achieved, display, ACHIEVED[sizing.target])
        most = "largest" if sizing.target == "flow_at" else "smallest"
        verb = {"drain_time": "takes", "highest_level": "rests at", "flow_at": "passes"}[sizing.target]
        return (
            f"{exact}. The {most} listed size that meets it over the whole range, {sizing.standard}, {verb} "
            f"{_achieved(listed.achieved.typical, sizing.target, display)} ({reach})."
        )
    if exact and sizing.standard:
        return f"{exact}; listed: {sizing.standard}."
    if exact:
        return f"{exact}; no listed size meets it over the whole range."
    if sizing.scale is not None:
        return f"Both sides of the opening times {sizing.scale:.3f} would meet it at the typical coefficient."
    return ""


ACHIEVED = {"drain_time": "time", "highest_level": "level", "flow_at": "flow"}
"""The display kind of what a size achieves, by the target."""


def _achieved(value: float, target: str, display: DisplayUnits) -> str:
    return duration(value) if target == "drain_time" else display.text(value, ACHIEVED[target])


def listed_neighbour(sizing: Sizing) -> Neighbour | None:
    """Return the neighbour that is the listed size chosen."""
    return next((size for size in sizing.neighbours if size.standard == sizing.standard), None)


def _further(answers: Answers, display: DisplayUnits) -> list[str]:
    run, rest = answers.draw_down, answers.equilibrium
    lines = []
    if not run.reaches_stop and run.reason:
        lines.append(sentence(run.reason))
    outflow = run.outflow_at_start
    if outflow.typical is not None:
        flow = f"Outflow at the start {display.text(outflow.typical, 'flow')} ({range_text(outflow, display, 'flow')})"
        lines.append(
            f"{flow}; released until the stop {display.text(run.released, 'volume')}." if run.released else f"{flow}."
        )
    lines += _other_targets(answers, display)
    if rest.surges_at is not None and run.reaches_stop:
        lines.append(f"With the inflow kept up there is {rest.reason}.")
    lines += _gas_and_receiver(answers, display)
    if rest.overflows:
        lines.append(sentence(rest.reason) or "With this inflow the vessel overflows.")
    elif rest.level.typical is not None and run.reaches_stop and answers.system.inflow > 0:
        text = display.text(rest.level.typical, "level")
        lines.append(f"With the inflow kept up it would settle at {text} ({range_text(rest.level, display, 'level')}).")
    return lines


def _other_targets(answers: Answers, display: DisplayUnits) -> list[str]:
    """The targets for the highest level and for the flow at a level."""
    lines = []
    target = answers.case.target
    for sizing in answers.sizing:
        if target is None or sizing.target == "drain_time":
            continue
        if sizing.target == "highest_level" and target.highest_level is not None:
            wanted = f"Wanted: no level above {unmarked(target.highest_level.text)}."
        elif target.flow_at is not None:
            limit = target.flow_at
            wanted = f"Wanted: no more than {unmarked(limit.flow.text)} at {unmarked(limit.level.text)}."
        lines.append(f"{wanted} {_sized(sizing, display)}".rstrip())
    return lines


def _gas_and_receiver(answers: Answers, display: DisplayUnits) -> list[str]:
    lines = []
    if answers.headspace is not None and answers.headspace.lowest < 0:
        vacuum = display.text(-answers.headspace.lowest, "pressure")
        level = display.text(answers.headspace.lowest_level, "level")
        lines.append(f"The headspace falls to {vacuum} below atmospheric, at {level}.")
    if answers.receiver_level is not None:
        lines.append(f"The receiving vessel then stands at {display.text(answers.receiver_level, 'level')}.")
    for warm in answers.at_temperatures:
        at = display.text(warm.temperature, "temperature")
        took = (
            "the stop level is not reached" if warm.time.typical is None else f"it takes {duration(warm.time.typical)}"
        )
        lines.append(f"At {at} {took}.")
    return lines
