"""C13: liquid leaving uncontrolled, steady inflow; and the alarm level."""

from __future__ import annotations

from collections.abc import Sequence

from headfall.checks.finding import Finding, Grade
from headfall.checks.wording import Ranged, listed, with_range
from headfall.quantities.display import DisplayUnits

RULE = "C13"
_SUBJECT = "inflow against overflow"
_SOURCE = "volume_balance"
_PLACE = "inflow.rate"


def check_overflow(
    *,
    inflow: float,
    largest_inflow: Ranged,
    overflow: float,
    time_to_overflow: Ranged,
    room: float,
    display: DisplayUnits,
    taken_by: str = "",
) -> list[Finding]:
    """Return a stop where the run overflows, an attention where it could, a note on the time with the outlets shut.

    ``inflow`` [m³/s]; ``largest_inflow`` is the inflow whose equilibrium stands at the overflow level ``overflow`` [m],
    its low end with the lowest coefficients [m³/s]; ``time_to_overflow`` of the run [s], None where it ends elsewhere;
    ``room`` is the volume between the run's highest level and overflow [m³]; ``taken_by`` names the outlets with the
    role of an overflow that take what the drains do not, empty where there are none.
    The inflow is compared with the low end of ``largest_inflow``. Source: ``volume_balance``.
    """
    grade, text, advice = _against_overflow(inflow, largest_inflow, overflow, time_to_overflow, taken_by, display)
    findings = [
        Finding(
            rule=RULE,
            grade=grade,
            subject=_SUBJECT,
            text=text,
            advice=advice,
            source=_SOURCE,
            value=inflow,
            limit=largest_inflow.low,
            kind="flow",
            place=_PLACE,
        )
    ]
    if inflow > 0.0 and room > 0.0 and time_to_overflow.typical is None and not taken_by:
        findings.append(_outlet_shut(inflow, room, display))
    return findings


def check_overflow_outlets(
    *,
    names: Sequence[str],
    crest: float,
    passed: float,
    flowing: float,
    flow_at_end: float,
    peak: float,
    overflow: float,
    top: float,
    display: DisplayUnits,
) -> list[Finding]:
    """Return what leaves by the outlets with the role of an overflow, how long, and the room that the peak leaves.

    ``names`` of those outlets; ``crest`` is the level at which the lowest of them begins to flow [m]; ``passed`` the
    volume that leaves by them on the run [m³], ``flowing`` for how long [s] and ``flow_at_end`` what still does at its
    end [m³/s]; ``peak`` the highest level, ``overflow`` the level that counts as uncontrolled and ``top`` the vessel's
    top [m]. A peak above ``overflow`` is a stop, any flow over the crest an attention. Source: ``volume_balance``.
    """
    peak_text = display.text(peak, "level")
    rooms = [f"{display.text(top - peak, 'level')} below the top"] if top > peak else []
    if top > overflow > peak:
        rooms.insert(0, f"{display.text(overflow - peak, 'level')} below overflow")
    if peak <= crest:
        grade = Grade.NO_CAUTION
        rooms.insert(0, f"{display.text(crest - peak, 'level')} below the crest")
        text = f"Nothing leaves by {listed(names)}: the peak, {peak_text}, is {listed(rooms)}; no caution is raised by "
        text += "this check."
    else:
        leaves = f"{display.text(passed, 'volume')} leaves by {listed(names)} in {display.text(flowing, 'time')}"
        if flow_at_end > 0.0:
            leaves += f", {display.text(flow_at_end, 'flow')} still at the end"
        grade = Grade.STOP if peak > overflow else Grade.ATTENTION
        over = f", above overflow, {display.text(overflow, 'level')}," if peak > overflow else ","
        text = f"{leaves}; the peak, {peak_text}{over} is {listed(rooms) or 'at the top'}."
    return [
        Finding(
            rule=RULE,
            grade=grade,
            subject="flow over the overflow",
            text=text,
            advice="It rests on the typical coefficients, on a clear overflow and on a still surface: waves, foam and "
            "wind take room. Where it may go is for the owner to decide.",
            source=_SOURCE,
            value=peak,
            limit=overflow if grade is Grade.STOP else crest,
            kind="level",
            place="levels.overflow",
        )
    ]


def check_alarm_level(*, peak: float, start: float, high: float | None, display: DisplayUnits) -> list[Finding]:
    """Return an attention where the run's highest level ``peak`` [m] stands above the alarm level ``high`` [m].

    ``start`` [m] tells a run that starts above the alarm from one that rises above it. Source: ``volume_balance``.
    """
    if high is None:
        return [_alarm(Grade.NOT_CHECKED, "No alarm level is entered; the peak is compared with none.", needs=True)]
    peak_text, high_text = display.text(peak, "level"), display.text(high, "level")
    if peak > high:
        does = "starts at" if start >= peak else "rises to"
        text = f"The level {does} {peak_text}, above the alarm level of {high_text}."
        return [_alarm(Grade.ATTENTION, text, peak=peak, high=high)]
    text = f"The peak, {peak_text}, is not above the alarm level, {high_text}; no caution is raised by this check."
    return [_alarm(Grade.NO_CAUTION, text, peak=peak, high=high)]


def _against_overflow(
    inflow: float, largest: Ranged, overflow: float, time: Ranged, taken_by: str, display: DisplayUnits
) -> tuple[Grade, str, str]:
    flows_in = f"With {display.text(inflow, 'flow')} flowing in it"
    if inflow <= 0.0:
        flows_in = "With liquid coming back in by the outlets it"
    lip = display.text(overflow, "level")
    low = largest.low or 0.0
    who = "drains" if taken_by else "outlets"
    holds = f"The {who} hold up to {display.text(low, 'flow')} below overflow, {lip}, with their lowest coefficients."
    mend = "Bring the inflow below that, or make the outlet larger. Where the spill may go is for the owner to decide."
    if time.typical is not None:
        return Grade.STOP, f"{flows_in} overflows after {with_range(time, 'time', display)}.", f"{holds} {mend}"
    ends = [end for end in (time.low, time.high) if end is not None]
    if ends:
        after = display.text(min(ends), "time")
        text = f"{flows_in} could overflow, with the lowest coefficients after {after}."
        return Grade.ATTENTION, text, f"{holds} {mend}"
    if taken_by and inflow > low:
        text = f"With {display.text(inflow, 'flow')} flowing in, the drains alone may not hold the level below {lip}"
        text += f": the rest leaves by {taken_by}."
        return Grade.ATTENTION, text, f"{holds} {mend}"
    if largest.typical is not None and inflow > largest.typical:
        text = f"{flows_in} would overflow if it ran on past its stop level: it settles above {lip}."
        return Grade.ATTENTION, text, f"{holds} Shut the inflow at the stop level. {mend}"
    if inflow > low and inflow > 0.0:
        text = f"{flows_in} could overflow: the outlets may hold no more than {display.text(low, 'flow')}."
        return Grade.ATTENTION, text, f"{holds} {mend}"
    if inflow <= 0.0:
        text = "No inflow is entered that could raise the level; no caution is raised by this check."
    else:
        text = (
            f"{display.text(inflow, 'flow')} is not above {display.text(low, 'flow')}, the most that stays below "
            "overflow; no caution is raised by this check."
        )
    return Grade.NO_CAUTION, text, f"{holds} It rests on a clean outlet and on the inflow staying as entered."


def _outlet_shut(inflow: float, room: float, display: DisplayUnits) -> Finding:
    return Finding(
        rule=RULE,
        grade=Grade.NOTE,
        subject="outlet shut or blocked",
        text=f"If the outlet is shut, {display.text(inflow, 'flow')} reaches overflow in "
        f"{display.text(room / inflow, 'time')}.",
        advice=f"It rests on {display.text(room, 'volume')} of room above the highest level of the run. See that the "
        "inflow can be shut within that time.",
        source=_SOURCE,
        value=room / inflow,
        kind="time",
        place=_PLACE,
    )


def _alarm(
    grade: Grade, text: str, *, peak: float | None = None, high: float | None = None, needs: bool = False
) -> Finding:
    advice = {
        Grade.ATTENTION: "It rests on the typical coefficients. Lower the start or the inflow, or see that the alarm "
        "is expected; whoever runs the plant decides.",
        Grade.NO_CAUTION: "It rests on the typical coefficients and on the inflow staying as entered.",
    }.get(grade, "Enter the alarm level to have the peak compared with it.")
    return Finding(
        rule=RULE,
        grade=grade,
        subject="peak against the alarm level",
        text=text,
        advice=advice,
        source=_SOURCE,
        value=peak,
        limit=high,
        kind="level" if peak is not None else "",
        place="levels.high",
        needs="alarm level" if needs else "",
    )
