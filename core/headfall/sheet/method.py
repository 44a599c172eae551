"""The equations with their sources and with the numbers put in."""

from __future__ import annotations

import math

from headfall.answers import Answers
from headfall.outlet.orifice import OrificeOutlet
from headfall.quantities import DisplayUnits, duration
from headfall.sheet.citations import Citations
from headfall.sheet.hand_closed import closed_form
from headfall.sheet.hand_run import HandCalculation, HandRun, hand_run
from headfall.sheet.hand_sizing import sizing_parts
from headfall.sheet.hand_strips import strips
from headfall.sheet.marks import lowered
from headfall.sheet.method_flow import flow_parts
from headfall.sheet.method_rest import rest_part
from headfall.sheet.model import Paragraph, Part
from headfall.sheet.numbers import coefficient, metres, seconds
from headfall.sheet.volume_law import volume_law

_CD, _QIN = f"C{lowered('d')}", f"Q{lowered('in')}"
_CLASSES = (0.05, 0.1, 0.2, 0.5, 1.0, 2.0, 5.0)


def method_parts(answers: Answers, display: DisplayUnits, cite: Citations) -> tuple[Part, ...]:
    """Return the flow at the start, the level of rest, the time and the size, each in printed figures in SI."""
    parts: list[Part] = [*flow_parts(answers, cite)]
    parts += [Paragraph("Where the level comes to rest", "heavy"), rest_part(answers)]
    run = hand_run(answers)
    if run is None:
        parts.append(Paragraph("There is no time to reckon: the answer is the level at which the run comes to rest."))
        return tuple(parts)
    goal = "to the stop level" if run.goal == "stop" else "to the overflow level"
    parts.append(Paragraph(f"Time {goal}, typical coefficient {cite('volume_balance')}", "heavy"))
    calculation = hand_calculation(answers, run)
    if calculation is None:
        parts.append(Paragraph(f"{seconds(run.time)} s by the program’s integral; too long to be redone by hand."))
        return tuple(parts)
    parts += _time(run, calculation, cite)
    parts += _range(answers, run)
    parts += sizing_parts(answers, run, calculation, display)
    return tuple(parts)


def hand_calculation(answers: Answers, run: HandRun) -> HandCalculation | None:
    """Return the closed form where one holds and agrees, else the sum over strips; None where it takes too many."""
    closed = closed_form(run)
    if closed is not None and abs(closed.seconds - run.time) <= 0.002 * run.time:
        return closed
    return strips(run, answers.curve)


def agreement(hand: float, solved: float) -> float:
    """Return the smallest of a few round percentages that covers the difference."""
    difference = abs(hand - solved) / solved * 100
    return next((share for share in _CLASSES if difference <= share), math.ceil(difference))


def _time(run: HandRun, calculation: HandCalculation, cite: Citations) -> list[Part]:
    parts: list[Part] = [
        Paragraph(f"t = ∫ A(h) / (Q(h) − {_QIN}) dh, from {metres(run.first)} m to {metres(run.last)} m", "lead")
    ]
    if calculation.table is not None:
        parts.append(Paragraph(f"Volume {volume_law(run.case.vessel)}", "lead"))
        if any(isinstance(outlet, OrificeOutlet) and outlet.facing == "side" for outlet in run.outlets):
            near = f"Outflow of a side opening by the integral {cite('opening_integral')}, which counts near its edge."
            parts.append(Paragraph(near, "lead"))
        parts += [Paragraph(calculation.lines[0], "lead"), calculation.table]
        parts += [Paragraph(line, "equation") for line in calculation.lines[1:]]
    else:
        parts.append(Paragraph("\n".join(calculation.lines), "equation"))
    share = agreement(calculation.seconds, run.time)
    parts.append(
        Paragraph(
            f"Redo by hand: {seconds(calculation.seconds)} s from the figures printed here; the program’s integral "
            f"gives {seconds(run.time)} s = {duration(run.time)}. They agree within {share:g} %.",
            "heavy",
        )
    )
    return parts


def _range(answers: Answers, run: HandRun) -> list[Part]:
    time = answers.draw_down.time if run.goal == "stop" else answers.draw_down.time_to_overflow
    if time.low is None or time.high is None:
        return []
    reach = f"{seconds(time.low)} s to {seconds(time.high)} s"
    over = "the coefficient range" if run.plain_openings else "the ranges of coefficients, losses and roughness"
    text = f"Range: {reach}, the same with the other ends of {over}"
    used = answers.coefficients
    if run.inflow == 0 and len(used) == 1 and run.plain_openings:
        low, typical, high = (coefficient(value) for value in (used[0].low, used[0].typical, used[0].high))
        text += f": t · {typical}/{high} and t · {typical}/{low}, since with no inflow the time goes with 1/{_CD}"
    return [Paragraph(f"{text}.")]
