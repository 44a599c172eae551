"""Where the level comes to rest, with the numbers put in."""

from __future__ import annotations

from dataclasses import replace

import numpy as np

from headfall.answers import Answers
from headfall.outlet.headspace import OpenHeadspace, VentedHeadspace
from headfall.outlet.orifice import OrificeOutlet
from headfall.outlet.outlet import TYPICAL
from headfall.sheet.hand_run import open_area
from headfall.sheet.marks import heavy, lowered
from headfall.sheet.model import Paragraph
from headfall.sheet.numbers import coefficient, figures, metres, rounded, sentence

_CD, _QIN = f"C{lowered('d')}", f"Q{lowered('in')}"


def rest_part(answers: Answers) -> Paragraph:
    """Return the level at which outflow and inflow are equal, by formula or by putting the level in."""
    system, level = answers.system, answers.equilibrium.level.typical
    only = system.outlets[0]
    one = len(system.outlets) == 1 and isinstance(only, OrificeOutlet) and only.is_plain and system.discharge.is_free
    if answers.equilibrium.surges_at is not None or (system.inflow == 0 and not system.discharge.is_free):
        text = _in_words(answers)
    elif system.inflow == 0:
        text = _heel(answers)
    elif level is None:
        text = _no_rest(answers)
    elif one and isinstance(only, OrificeOutlet) and only.facing == "down":
        text = _one_opening(only, answers)
    else:
        text = _put_in(answers, level)
    return Paragraph(text, "equation")


def _heel(answers: Answers) -> str:
    rest = answers.equilibrium
    heel = rest.level.typical or 0.0
    volume = "" if not rest.volume else f", with {figures(rest.volume)} m³ below it"
    return f"Nothing flows in: outflow ends where the lowest outlet runs dry, at {metres(heel)} m{volume}."


def _no_rest(answers: Answers) -> str:
    largest = answers.equilibrium.largest_inflow.typical
    text = f"{_QIN} = {figures(answers.system.inflow)} m³/s is more than the outlets pass at any level in the vessel."
    if largest is None:
        return text
    return f"{text} The most they hold at the overflow level is {figures(largest)} m³/s."


def _in_words(answers: Answers) -> str:
    rest = answers.equilibrium
    if rest.surges_at is not None:
        return sentence(rest.reason)
    if rest.level.typical is None:
        return "Nothing flows in; the level does not come to rest inside the vessel."
    return f"Nothing flows in: outflow ends at {heavy(f'{rest.level.typical:.4f} m')}, where no head is left."


def _one_opening(outlet: OrificeOutlet, answers: Answers) -> str:
    area, inflow = rounded(open_area(outlet), 5), rounded(answers.system.inflow, 5)
    used = outlet.coefficient_typical
    value = outlet.elevation + (inflow / (used * area)) ** 2 / (2 * outlet.gravity)
    return (
        f"h = z + ({_QIN}/({_CD}·a))²/(2g) = {metres(outlet.elevation)} + "
        f"({figures(inflow, 5)} / ({coefficient(used)} · {figures(area, 5)}))² / (2 · {outlet.gravity:g}) = "
        f"{heavy(f'{value:.4f} m')}"
    )


def _put_in(answers: Answers, level: float) -> str:
    discharge = answers.system.discharge
    rows = [row[:, [TYPICAL]] for row in discharge.coefficients]
    # A vent breathes nothing while the level stands.
    still = (
        replace(discharge, headspace=OpenHeadspace()) if isinstance(discharge.headspace, VentedHeadspace) else discharge
    )
    flows = [float(flow[0]) for flow in still.each(np.array([level]), rows)]
    total = "" if len(flows) == 1 else f" = {figures(sum(flows), 5)}"
    passed = " + ".join(figures(flow, 5) for flow in flows) + total
    inflow = figures(answers.system.inflow, 5)
    return f"At {heavy(f'{level:.4f} m')} the outlets pass {passed} m³/s, as much as flows in ({inflow} m³/s)."
