"""The outflow at the start, outlet by outlet, with the numbers put in."""

from __future__ import annotations

import math

import numpy as np

from headfall.answers import Answers
from headfall.outlet.orifice import OrificeOutlet
from headfall.outlet.outlet import TYPICAL, Conditions
from headfall.outlet.pipe import PipeOutlet
from headfall.outlet.standpipe import Standpipe
from headfall.outlet.weir import Weir
from headfall.sheet.citations import Citations
from headfall.sheet.hand_run import open_area
from headfall.sheet.marks import heavy, lowered, unmarked
from headfall.sheet.method_headspace import conditions_at, headspace_lines
from headfall.sheet.method_pipe import pipe_lines
from headfall.sheet.method_weir import standpipe_lines, weir_lines
from headfall.sheet.model import Paragraph, Part
from headfall.sheet.numbers import coefficient, figures, metres, rounded

_CD = f"C{lowered('d')}"
_LAW = f"Q = {_CD}·a·√(2·g·H), H from the surface to the centre of the opening, or to its plane where it faces down."


def flow_parts(answers: Answers, cite: Citations) -> list[Part]:
    """Return the laws, one paragraph an outlet, what acts on all of them, and their sum less the inflow."""
    system, level = answers.system, answers.system.start
    viscosity = system.liquid.viscosity / system.liquid.density
    parts: list[Part] = []
    openings = any(isinstance(outlet, OrificeOutlet) for outlet in system.outlets)
    heading = f"Outflow at the start {cite('torricelli_1644')}" if openings else "Outflow at the start"
    parts.append(Paragraph(heading, "heavy"))
    if openings:
        parts.append(Paragraph(_LAW, "lead"))
    parts += [Paragraph(line, "lead") for line in headspace_lines(answers, cite)]
    for outlet, conditions in zip(system.outlets, conditions_at(answers, level), strict=True):
        if isinstance(outlet, PipeOutlet):
            lines = pipe_lines(outlet, level, conditions, cite)
        elif isinstance(outlet, Weir):
            lines = weir_lines(outlet, level, conditions, cite)
        elif isinstance(outlet, Standpipe):
            lines = standpipe_lines(outlet, level, conditions, cite)
        elif isinstance(outlet, OrificeOutlet):
            lines = _opening(outlet, level, conditions, viscosity, cite)
        parts.append(Paragraph("\n".join(lines), "equation"))
    return [*parts, _sum(answers)]


def _opening(
    outlet: OrificeOutlet, start: float, conditions: Conditions, viscosity: float, cite: Citations
) -> list[str]:
    free = conditions.tailwater == -np.inf and conditions.pressure_head == 0
    if free and outlet.is_plain:
        return _outflow(outlet, start, viscosity, cite)
    row = outlet.coefficients[:, [TYPICAL]]
    flow = float(outlet.flow(np.array([start]), row, 1.0, conditions)[0])
    used = outlet.discharge_coefficients(start, conditions)[1]
    tail, pressure = float(conditions.tailwater), float(conditions.pressure_head)
    said = []
    if tail > -np.inf:
        said.append(f"against a tailwater at {metres(tail)} m {cite('drowned_opening')}")
    if pressure:
        said.append(f"under a pressure head of {metres(pressure)} m {cite('gas_over_liquid')}")
    if not outlet.is_plain:
        said.append(f"coefficient by the Reynolds number {cite('practice_low_reynolds')}")
    head = metres(outlet.head(start, conditions))
    return [
        f"{heavy(unmarked(outlet.name))}: {', '.join(said)}; H = {head} m, a = {_area(outlet)} m², "
        f"{_CD} = {figures(used, 4)} {cite(outlet.coefficient_source)}: Q = {heavy(f'{figures(flow, 5)} m³/s')}"
    ]


def _outflow(outlet: OrificeOutlet, start: float, viscosity: float, cite: Citations) -> list[str]:
    name = heavy(unmarked(outlet.name))
    flow = float(outlet.flow(np.array([start]), outlet.coefficients[:, [TYPICAL]])[0])
    if flow == 0:
        return [f"{name}: not covered at the start, Q = 0"]
    if outlet.facing == "side" and start < outlet.upper_edge:
        source = cite("opening_integral", outlet.coefficient_source)
        covered = f"{name}: partly covered at the start; integrated over the covered height {source}"
        return [f"{covered}: Q = {heavy(f'{figures(flow, 5)} m³/s')}"]
    head, used, area = start - outlet.elevation, outlet.coefficient_typical, rounded(open_area(outlet), 5)
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
    alike = f"{outlet.count} · {one}" if outlet.count > 1 else one
    return f"(1 − {outlet.blocked:g}) · {alike}" if outlet.blocked else alike


def _side(outlet: OrificeOutlet, head: float, flow: float, by_centre: float, cite: Citations) -> str:
    letter, divisor = ("d", 128) if outlet.shape == "round" else ("e", 96)
    ratio = 1 - (outlet.height / head) ** 2 / divisor
    return (
        f"integrated over its height {cite('opening_integral')}: Q = {heavy(f'{figures(flow, 5)} m³/s')}, "
        f"{figures(flow / by_centre, 4)} of the line above (nearly 1 − ({letter}/H)²/{divisor} = {figures(ratio, 4)})"
    )


def _sum(answers: Answers) -> Paragraph:
    system = answers.system
    rows = [row[:, [TYPICAL]] for row in system.discharge.coefficients]
    flows = [rounded(float(flow[0]), 5) for flow in system.discharge.each(np.array([system.start]), rows)]
    inflow, total = rounded(system.inflow, 5), rounded(sum(flows), 5)
    lines = []
    if len(flows) > 1:
        added = " + ".join(figures(flow, 5) for flow in flows)
        lines.append(f"Sum of the outlets: {added} = {figures(total, 5)} m³/s")
    lines.append(f"Net of the inflow: {figures(total, 5)} − {figures(inflow, 5)} = {figures(total - inflow, 5)} m³/s")
    return Paragraph("\n".join(lines), "equation")
