"""The flow through a pipe run, with the numbers put in: what a checker redoes on a pocket calculator."""

from __future__ import annotations

import math

from headfall.outlet.outlet import Conditions
from headfall.outlet.pipe import PipeOutlet
from headfall.outlet.pipe_breakdown import PipeBreakdown, SectionBreakdown, breakdown
from headfall.sheet.citations import Citations
from headfall.sheet.marks import heavy, lowered, raised, unmarked
from headfall.sheet.numbers import figures, metres, rounded

_LOG = f"log{lowered('10')}"
_DIGITS = 5


def pipe_lines(pipe: PipeOutlet, level: float, conditions: Conditions, cite: Citations) -> list[str]:
    """Return the lines of one pipe run at a level [m]: head, velocity, friction, losses, and their sum."""
    name = heavy(unmarked(pipe.name))
    found = breakdown(pipe, level, conditions)
    if found is None:
        return [f"{name}: passes nothing at the start, Q = 0"]
    several = len(found.sections) > 1
    lines = [f"{name}: flows full {cite(pipe.coefficient_source)}. {_head(pipe, level, conditions, found)}"]
    spent = 0.0
    for number, section in enumerate(found.sections, 1):
        last = number == len(found.sections)
        mark = lowered(str(number)) if several else ""
        lines += _velocity(section, pipe, mark)
        lines.append(_friction(section, mark, cite))
        lines.append(_losses(section, mark, found.kinetic if last else None, found.drowned, cite))
        spent += _sum(section, found.kinetic if last else 0.0)
        lines.append(_spent(section, found.kinetic if last else None, mark, pipe.gravity))
    if several:
        lines.append(f"Sum of the heads: {figures(spent / (2 * pipe.gravity), 4)} m, the head above.")
    lines.append(_flow(pipe, found))
    return lines


def _head(pipe: PipeOutlet, level: float, conditions: Conditions, found: PipeBreakdown) -> str:
    tail, pressure = float(conditions.tailwater), float(conditions.pressure_head)
    lower, what = (tail, "tailwater") if found.drowned else (pipe.discharge_elevation, "discharging end")
    taken = f"− ({metres(lower)})" if lower < 0 else f"− {metres(lower)}"
    pushed = f" + {metres(pressure)}" if pressure > 0 else f" − {metres(-pressure)}" if pressure < 0 else ""
    return f"Head down to the {what}: H = {metres(level)} {taken}{pushed} = {metres(found.head)} m"


def _velocity(section: SectionBreakdown, pipe: PipeOutlet, mark: str) -> list[str]:
    bore, viscosity = section.section.bore, pipe.viscosity
    speed = rounded(section.velocity, _DIGITS)
    first = (
        f"v{mark} = {figures(speed, _DIGITS)} m/s in {figures(bore, 5)} m, found so that the heads below add up to H"
    )
    if viscosity <= 0 or pipe.has_fixed_friction:
        return [first]
    reynolds = speed * bore / viscosity
    return [
        f"{first}; Re{mark} = v·d/ν = {figures(speed, _DIGITS)} · {figures(bore, 5)} / ({figures(viscosity, 5)}) = "
        f"{_thousands(reynolds)}"
    ]


def _thousands(value: float) -> str:
    kept = round(value, 3 - math.floor(math.log10(value))) if value > 0 else 0.0
    return f"{kept:,.0f}".replace(",", "\u202f") if kept >= 1000 else figures(kept, 4)


def _friction(section: SectionBreakdown, mark: str, cite: Citations) -> str:
    part = section.section
    if part.length == 0:
        return f"No length: f{mark}·L/d = 0"
    factor = rounded(section.friction_factor, 4)
    ratio = f"f{mark}·L/d = {figures(factor, 4)} · {figures(part.length, 4)} / {figures(part.bore, 5)} = " + figures(
        factor * part.length / part.bore, 4
    )
    if part.friction_factor is not None:
        return f"f{mark} = {figures(factor, 4)} as given; {ratio}"
    if section.turbulent_share == 0:
        text = f"laminar {cite('hagen_poiseuille')}: f{mark} = 64/Re = 64 / {_thousands(section.reynolds)}"
        return f"{text} = {figures(factor, 4)}; {ratio}"
    if section.turbulent_share < 1:
        return (
            f"Re between 2100 and 4000, neither laminar nor turbulent: f{mark} = {figures(factor, 4)}, a blend of "
            f"64/Re and Colebrook’s {cite('colebrook_1939')}, the range holds both; {ratio}"
        )
    rough = part.roughness[1] / (3.7 * part.bore)
    smooth = 2.51 / (section.reynolds * math.sqrt(factor))
    right = -2 * math.log10(rough + smooth)
    return (
        f"Colebrook {cite('colebrook_1939')}: 1/√f = −2·{_LOG}(ε/(3.7·d) + 2.51/(Re·√f)) = −2·{_LOG}("
        f"{figures(rough, 3)} + {figures(smooth, 3)}) = {figures(right, 4)}, f{mark} = {figures(factor, 4)}; {ratio}"
    )


def _losses(section: SectionBreakdown, mark: str, kinetic: float | None, drowned: bool, cite: Citations) -> str:
    terms, sources = [], []
    for loss in section.losses:
        count = f"{loss.count} · " if loss.count > 1 else ""
        value = figures(loss.typical, 3)
        if loss.laminar:
            value = f"({value} + {loss.laminar:g}/Re)"
        terms.append(f"{count}{value} {unmarked(loss.name)}")
        sources.append(loss.source)
    if section.change:
        terms.append(f"{figures(section.change, 3)} change of bore")
        sources.append("borda_carnot")
    if any(loss.laminar for loss in section.losses):
        sources.append("hooper_1981")
    total = section.loss + section.change
    listed = " + ".join(terms) or "none"
    text = f"ΣK{mark} = {listed} = {figures(total, 4)} {cite(*dict.fromkeys(sources))}".rstrip()
    if kinetic is None:
        return text
    word = "exit loss of the drowned end" if drowned else "kinetic term α of the free end"
    return f"{text}; {word} {figures(kinetic, 3)}"


def _sum(section: SectionBreakdown, kinetic: float) -> float:
    return (kinetic + section.loss + section.change + section.friction) * section.velocity**2


def _spent(section: SectionBreakdown, kinetic: float | None, mark: str, gravity: float) -> str:
    speed = rounded(section.velocity, _DIGITS)
    loss, friction = rounded(section.loss + section.change, 4), rounded(section.friction, 4)
    total = rounded((kinetic or 0.0) + loss + friction, 5)
    added = f"{figures(kinetic, 3)} + " if kinetic is not None else ""
    head = total * speed**2 / (2 * gravity)
    return (
        f"({added}{figures(loss, 4)} + {figures(friction, 4)})·v{mark}{raised('2')}/(2g) = {figures(total, 5)} · "
        f"{figures(speed, _DIGITS)}{raised('2')} / (2 · {gravity:g}) = {heavy(f'{figures(head, 4)} m')}"
    )


def _flow(pipe: PipeOutlet, found: PipeBreakdown) -> str:
    first = found.sections[0]
    area, speed = rounded(pipe.area, 5), rounded(first.velocity, _DIGITS)
    alike = f"{pipe.count} · " if pipe.count > 1 else ""
    flow = heavy(f"{figures(area * speed, 5)} m³/s")
    return (
        f"Q = {alike}(π/4)·d²·v = {figures(area, 5)} · {figures(speed, _DIGITS)} = {flow}; on the whole head that is "
        f"C = {figures(speed / math.sqrt(2 * pipe.gravity * found.head), 3)}"
    )
