"""The flow over a weir or into a standpipe, with the numbers put in."""

from __future__ import annotations

import math

import numpy as np

from headfall.outlet.outlet import TYPICAL, Conditions
from headfall.outlet.standpipe import Standpipe
from headfall.outlet.weir import Weir
from headfall.sheet.citations import Citations
from headfall.sheet.marks import heavy, raised, unmarked
from headfall.sheet.numbers import figures, metres, rounded


def weir_lines(weir: Weir, level: float, conditions: Conditions, cite: Citations) -> list[str]:
    """Return the lines of one weir at a level [m]: head, coefficient and flow."""
    name = heavy(unmarked(weir.name))
    head = weir.head(level)
    flow = float(weir.flow(np.array([level]), weir.coefficients[:, [TYPICAL]], 1.0, conditions)[0])
    if head <= 0:
        return [f"{name}: its crest stands over the start level, Q = 0"]
    used = rounded(weir.standard_coefficient(head), 4)
    first = (
        f"{name}: H = {metres(level)} − {metres(weir.crest)} = {metres(head)} m over the crest, C = {figures(used, 4)} "
        f"{cite(weir.coefficient_source)}"
    )
    return [first, f"{_law(weir)} = {heavy(f'{figures(flow, 5)} m³/s')}{_corrections(weir, conditions, cite)}"]


def _law(weir: Weir) -> str:
    if weir.form == "vnotch":
        return f"Q = (8/15)·C·√(2g)·tan(θ/2)·H{raised('2.5')}, θ = {figures(math.degrees(weir.angle), 4)}°"
    width = f"b = {figures(weir.width, 4)} m"
    if weir.form == "broad_crested":
        return f"Q = (2/3){raised('1.5')}·√g·C·b·H{raised('1.5')}, {width}"
    return f"Q = (2/3)·C·√(2g)·b·H{raised('1.5')}, {width}"


def _corrections(weir: Weir, conditions: Conditions, cite: Citations) -> str:
    said = ""
    if weir.given is None and weir.form != "broad_crested":
        said += ", with the standard’s small additions to head and width"
    tail = float(conditions.tailwater)
    if tail > weir.crest:
        drowned = f"{metres(tail - weir.crest)} m on the crest"
        said += f", lowered by the tailwater, {drowned} {cite('villemonte_1947')}"
    return said


def standpipe_lines(pipe: Standpipe, level: float, conditions: Conditions, cite: Citations) -> list[str]:
    """Return the lines of one standpipe at a level [m]: the three controls, of which the smallest holds."""
    name = heavy(unmarked(pipe.name))
    head = pipe.head(level)
    if head <= 0:
        return [f"{name}: its rim stands over the start level, Q = 0"]
    row = pipe.coefficients[:, [TYPICAL]]
    flow = float(pipe.flow(np.array([level]), row, 1.0, conditions)[0])
    rim, hole = rounded(float(row[0, 0]), 4), rounded(float(row[1, 0]), 4)
    words = {"weir": "the rim as a weir", "orifice": "the drowned rim as an orifice", "pipe": "the full pipe"}
    return [
        f"{name}: H = {metres(level)} − {metres(pipe.crest)} = {metres(head)} m over the rim "
        f"{cite(pipe.coefficient_source)}",
        f"weir (2/3)·{figures(rim, 4)}·√(2g)·π·D·H{raised('1.5')}, orifice {figures(hole, 4)}·(π/4)·D²·√(2gH)"
        f"{', full pipe by its energy balance' if pipe.line is not None else ''}, D = {figures(pipe.diameter, 4)} m; "
        f"the smallest, {words[pipe.control(level, conditions)]}, holds: {heavy(f'{figures(flow, 5)} m³/s')}",
    ]
