"""The outflow at the start, outlet by outlet, with the numbers put in."""

from __future__ import annotations

import math

import numpy as np

from headfall.answers import Answers
from headfall.outlet.orifice import OrificeOutlet
from headfall.sheet.citations import Citations
from headfall.sheet.marks import heavy, lowered, unmarked
from headfall.sheet.model import Paragraph, Part
from headfall.sheet.numbers import coefficient, figures, metres, rounded

_CD = f"C{lowered('d')}"
_LAW = f"Q = {_CD}·a·√(2·g·H), H from the surface to the centre of the opening, or to its plane where it faces down."


def flow_parts(answers: Answers, cite: Citations) -> list[Part]:
    """Return the law, one paragraph an outlet, and their sum less the inflow."""
    liquid = answers.system.liquid
    viscosity = liquid.viscosity / liquid.density
    parts: list[Part] = [
        Paragraph(f"Outflow at the start {cite('torricelli_1644')}", "heavy"),
        Paragraph(_LAW, "lead"),
    ]
    for outlet in answers.system.outlets:
        lines = _outflow(outlet, answers.system.start, viscosity, cite)
        parts.append(Paragraph("\n".join(lines), "equation"))
    return [*parts, _sum(answers)]


def _outflow(outlet: OrificeOutlet, start: float, viscosity: float, cite: Citations) -> list[str]:
    name = heavy(unmarked(outlet.name))
    flow = float(outlet.flow(np.array([start]), outlet.coefficient_typical)[0])
    if flow == 0:
        return [f"{name}: not covered at the start, Q = 0"]
    if outlet.facing == "side" and start < outlet.upper_edge:
        source = cite("opening_integral", outlet.coefficient_source)
        covered = f"{name}: partly covered at the start; integrated over the covered height {source}"
        return [f"{covered}: Q = {heavy(f'{figures(flow, 5)} m³/s')}"]
    head, used, area = start - outlet.elevation, outlet.coefficient_typical, rounded(outlet.area, 5)
    root = rounded(math.sqrt(2 * outlet.gravity * head), 5)
    by_centre = used * area * root
    lines = [
        f"{name}: H = {metres(start)} − {metres(outlet.elevation)} = {metres(head)} m, "
        f"a = {_area(outlet)} = {figures(area, 5)} m², {_CD} = {coefficient(used)} {cite(outlet.coefficient_source)}",
        f"Q = {coefficient(used)} · {figures(area, 5)} · √(2 · {outlet.gravity:g} · {metres(head)}) = "
        f"{coefficient(used)} · {figures(area, 5)} · {figures(root, 5)} = {heavy(f'{figures(by_centre, 5)} m³/s')}",
    ]
    if outlet.facing == "side":
        lines.append(_side(outlet, head, flow, by_centre, cite))
    size = min(outlet.width, outlet.height)
    reynolds = _thousands(size * root / viscosity)
    lines.append(
        f"Jet √(2·g·H) = {figures(root, 3)} m/s; Reynolds number d·√(2·g·H)/ν = "
        f"{figures(size, 4)} · {figures(root, 5)} / ({figures(viscosity, 4)}) = {reynolds}"
    )
    return lines


def _thousands(value: float) -> str:
    """Return three significant digits, with narrow gaps between thousands."""
    kept = round(value, 2 - math.floor(math.log10(value)))
    return f"{kept:,.0f}".replace(",", "\u202f")


def _area(outlet: OrificeOutlet) -> str:
    one = (
        f"π/4 · {figures(outlet.width, 4)}²"
        if outlet.shape == "round"
        else f"{figures(outlet.width, 4)} · {figures(outlet.height, 4)}"
    )
    return f"{outlet.count} · {one}" if outlet.count > 1 else one


def _side(outlet: OrificeOutlet, head: float, flow: float, by_centre: float, cite: Citations) -> str:
    letter, divisor = ("d", 128) if outlet.shape == "round" else ("e", 96)
    ratio = 1 - (outlet.height / head) ** 2 / divisor
    return (
        f"integrated over its height {cite('opening_integral')}: Q = {heavy(f'{figures(flow, 5)} m³/s')}, "
        f"{figures(flow / by_centre, 4)} of the line above (nearly 1 − ({letter}/H)²/{divisor} = {figures(ratio, 4)})"
    )


def _sum(answers: Answers) -> Paragraph:
    system = answers.system
    here = np.array([system.start])
    flows = [rounded(float(outlet.flow(here, outlet.coefficient_typical)[0]), 5) for outlet in system.outlets]
    inflow, total = rounded(system.inflow, 5), rounded(sum(flows), 5)
    lines = []
    if len(flows) > 1:
        added = " + ".join(figures(flow, 5) for flow in flows)
        lines.append(f"Sum of the outlets: {added} = {figures(total, 5)} m³/s")
    lines.append(f"Net of the inflow: {figures(total, 5)} − {figures(inflow, 5)} = {figures(total - inflow, 5)} m³/s")
    return Paragraph("\n".join(lines), "equation")
