"""C21: pipe flow that is neither laminar nor turbulent."""

from __future__ import annotations

from collections.abc import Sequence

from headfall.checks.finding import Finding, Grade
from headfall.checks.limits import limit
from headfall.checks.wording import Ranged, capital, listed
from headfall.quantities.display import DisplayUnits

RULE = "C21"


def check_transition(
    *, outlet: str, spans: Sequence[tuple[float, float]], time: Ranged, display: DisplayUnits, place: str
) -> list[Finding]:
    """Return an attention where a pipe runs between laminar and turbulent on part of the run.

    ``outlet`` is what the sentences call it; ``spans`` are the levels [m], lower and upper, over which it does;
    ``time`` to the stop level [s], with its range. Source: ``laminar_turbulent``.
    """
    numbers = f"Re {limit('laminar_pipe').value:.0f} to {limit('turbulent_pipe').value:.0f}"
    merged = _merged(spans)
    if not merged:
        grade = Grade.NO_CAUTION
        text = f"{capital(outlet)} stays clear of {numbers} on this run; no caution is raised by this check."
        advice = "Between them the flow may be laminar or turbulent."
    else:
        grade = Grade.ATTENTION
        where = listed([f"from {display.text(low, 'level')} to {display.text(high, 'level')}" for low, high in merged])
        text = f"{capital(where)} {outlet} runs at {numbers}, neither laminar nor turbulent{_between(time, display)}."
        advice = "The typical figure goes smoothly from one law to the other; a test with the liquid itself decides."
    return [
        Finding(
            rule=RULE,
            grade=grade,
            subject=f"laminar or turbulent in {outlet}",
            text=text,
            advice=advice,
            source="laminar_turbulent",
            value=merged[-1][1] if merged else None,
            kind="level" if merged else "",
            place=place,
        )
    ]


def _between(time: Ranged, display: DisplayUnits) -> str:
    if time.low is not None and time.high is not None:
        low, high = display.text(time.low, "time"), display.text(time.high, "time")
        return f": the drain time lies between {low} and {high}"
    if time.low is not None:
        return f": the drain time is {display.text(time.low, 'time')} or more"
    return ""


def _merged(spans: Sequence[tuple[float, float]]) -> list[tuple[float, float]]:
    """The spans, lowest first, those that touch made one."""
    merged: list[tuple[float, float]] = []
    for low, high in sorted(spans):
        if merged and low <= merged[-1][1]:
            merged[-1] = (merged[-1][0], max(merged[-1][1], high))
        else:
            merged.append((low, high))
    return merged
