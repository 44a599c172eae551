"""Closed forms of the drain time, with the numbers put in."""

from __future__ import annotations

import math
from collections.abc import Callable

import numpy as np

from headfall.case.model import Cone, Drum, EllipsoidalEnd, End, FlatEnd, HemisphericalEnd, Sphere
from headfall.sheet.hand_run import HandCalculation, HandRun, open_area
from headfall.sheet.marks import lowered, raised
from headfall.sheet.numbers import figures, metres, rounded, seconds

_H0, _H1 = f"H{lowered('0')}", f"H{lowered('1')}"
_QIN = f"Q{lowered('in')}"
_TWO_AND_A_HALF = f"m{raised('2.5')}/s"


def closed_form(run: HandRun) -> HandCalculation | None:
    """Return the time by a closed form where one holds: all outlets facing down in one plane, and

    a constant plan area (with or without inflow); or a sphere, a cone, a level drum with flat, ellipsoidal or
    hemispherical heads, emptied by an opening at its lowest point with nothing flowing in.
    """
    plane = run.plane
    if plane is None or run.discharge == 0:
        return None
    area = _constant_area(run)
    if area is not None:
        return _prism_with_inflow(run, area, plane) if run.inflow > 0 else _prism(run, area, plane)
    if run.inflow > 0 or plane != 0 or run.first <= run.last:
        return None
    return _shaped(run)


def discharge_line(run: HandRun) -> tuple[str, float]:
    """Return the line for c = Σ C_d·a·√(2g) and its value as printed [m^2.5/s]."""
    root = rounded(math.sqrt(2 * run.gravity), 6)
    terms = [(outlet.coefficient_typical, rounded(open_area(outlet), 6)) for outlet in run.plain_openings]
    value = rounded(sum(coefficient * area for coefficient, area in terms) * root, 6)
    added = " + ".join(f"{coefficient:g} · {figures(area, 6)}" for coefficient, area in terms)
    if len(terms) > 1:
        added = f"({added})"
    name = f"C{lowered('d')}·a" if len(terms) == 1 else f"(Σ C{lowered('d')}·a)"
    text = f"c = {name}·√(2g) = {added} · {figures(root, 6)} = {figures(value, 6)} {_TWO_AND_A_HALF}"
    return text, value


def _constant_area(run: HandRun) -> float | None:
    low, high = sorted((run.first, run.last))
    inside = low + (high - low) * np.linspace(0.0005, 0.9995, 41)
    areas = run.profile.plan_area(inside)
    largest = float(areas.max())
    return largest if float(areas.min()) > largest * (1 - 1e-9) else None


def _heads(run: HandRun, plane: float) -> tuple[str, float, float]:
    first, last = run.first - plane, run.last - plane
    roots = rounded(math.sqrt(first), 6), rounded(math.sqrt(last), 6)
    text = (
        f"{_H0} = {metres(first)} m, √{_H0} = {figures(roots[0], 6)}; "
        f"{_H1} = {metres(last)} m, √{_H1} = {figures(roots[1], 6)}"
    )
    return text, *roots


def _prism(run: HandRun, area: float, plane: float) -> HandCalculation:
    line, discharge = discharge_line(run)
    heads, root_first, root_last = _heads(run, plane)
    surface = rounded(area, 6)
    time = 2 * surface * (root_first - root_last) / discharge
    return HandCalculation(
        (
            f"Constant surface A, no inflow: t = 2·A·(√{_H0} − √{_H1})/c",
            line,
            heads,
            f"t = 2 · {figures(surface, 6)} · ({figures(root_first, 6)} − {figures(root_last, 6)}) / "
            f"{figures(discharge, 6)} = {seconds(time)} s",
        ),
        time,
    )


def _prism_with_inflow(run: HandRun, area: float, plane: float) -> HandCalculation | None:
    line, discharge = discharge_line(run)
    heads, root_first, root_last = _heads(run, plane)
    surface, inflow = rounded(area, 6), rounded(run.inflow, 6)
    nets = [rounded(discharge * root - inflow, 6) for root in (root_first, root_last)]
    if nets[0] * nets[1] <= 0:
        return None
    logarithm = rounded(math.log(nets[0] / nets[1]), 6)
    time = 2 * surface / discharge * (root_first - root_last + inflow / discharge * logarithm)
    net_names = [f"c·√{head} − {_QIN} = {figures(net, 6)} m³/s" for head, net in zip((_H0, _H1), nets, strict=True)]
    return HandCalculation(
        (
            f"Constant surface A, steady inflow: t = (2·A/c)·[√{_H0} − √{_H1} + "
            f"({_QIN}/c)·ln((c·√{_H0} − {_QIN})/(c·√{_H1} − {_QIN}))]",
            line,
            heads,
            f"{net_names[0]}; {net_names[1]}; ln of their ratio = {figures(logarithm, 6)}",
            f"t = (2 · {figures(surface, 6)} / {figures(discharge, 6)}) · "
            f"[{figures(root_first, 6)} − {figures(root_last, 6)} + ({figures(inflow, 6)} / {figures(discharge, 6)}) · "
            f"{_bracketed(logarithm)}] = {seconds(time)} s",
        ),
        time,
    )


def _bracketed(value: float) -> str:
    return f"({figures(value, 6)})" if value < 0 else figures(value, 6)


# Vessels whose closed form is a difference of one expression at two levels --------------------------------------------

Term = Callable[[float], float]


def _shaped(run: HandRun) -> HandCalculation | None:
    vessel = run.case.vessel
    if isinstance(vessel, Sphere):
        radius = rounded(vessel.diameter.value / 2, 6)
        return _between(
            run,
            f"Sphere, no inflow: t = [F({_H0}) − F({_H1})]/c with "
            f"F(h) = π·(4/3·R·h{raised('3/2')} − 2/5·h{raised('5/2')}), R = {figures(radius, 6)} m",
            lambda h: math.pi * (4 / 3 * radius * h**1.5 - 0.4 * h**2.5),
        )
    if isinstance(vessel, Cone):
        return _cone(run, vessel)
    if isinstance(vessel, Drum) and (vessel.fall is None or vessel.fall.value == 0):
        return _drum(run, vessel)
    return None


def _cone(run: HandRun, vessel: Cone) -> HandCalculation:
    bottom = rounded(vessel.bottom_diameter.value / 2, 6)
    slope = rounded((vessel.top_diameter.value - vessel.bottom_diameter.value) / (2 * vessel.height.value), 6)
    sizes = f"r = {figures(bottom, 6)} m at the bottom, k = {figures(slope, 6)} (radius per height)"
    if bottom == 0:
        formula = f"F(h) = 2/5·π·k²·h{raised('5/2')}, k = {figures(slope, 6)} (radius per height)"
    else:
        formula = f"F(h) = 2π·(r²·h{raised('1/2')} + 2/3·r·k·h{raised('3/2')} + 1/5·k²·h{raised('5/2')}), {sizes}"
    return _between(
        run,
        f"Cone, no inflow: t = [F({_H0}) − F({_H1})]/c with {formula}",
        lambda h: 2 * math.pi * (bottom**2 * h**0.5 + 2 / 3 * bottom * slope * h**1.5 + 0.2 * slope**2 * h**2.5),
    )


def _drum(run: HandRun, vessel: Drum) -> HandCalculation | None:
    pair = vessel.heads if isinstance(vessel.heads, tuple) else (vessel.heads, vessel.heads)
    flatness = [_depth_over_radius(head) for head in pair]
    if any(part is None for part in flatness):
        return None
    bulge = rounded(sum(part for part in flatness if part is not None) / 2, 6)
    diameter, length = rounded(vessel.diameter.value, 6), rounded(vessel.length.value, 6)
    formula = f"F(h) = −4/3·L·(D − h){raised('3/2')}"
    sizes = f"L = {figures(length, 6)} m, D = {figures(diameter, 6)} m"
    if bulge > 0:
        formula += f" + q·π·(2/3·D·h{raised('3/2')} − 2/5·h{raised('5/2')})"
        sizes += f", q = {figures(bulge, 6)} (mean depth of the heads over the radius)"
    return _between(
        run,
        f"Level drum, no inflow: t = [F({_H0}) − F({_H1})]/c with {formula}, {sizes}",
        lambda h: (
            -4 / 3 * length * max(0.0, diameter - h) ** 1.5
            + bulge * math.pi * (2 / 3 * diameter * h**1.5 - 0.4 * h**2.5)
        ),
    )


def _depth_over_radius(head: End | None) -> float | None:
    if head is None or isinstance(head, FlatEnd):
        return 0.0
    if isinstance(head, HemisphericalEnd):
        return 1.0
    if isinstance(head, EllipsoidalEnd):
        return 1 / (2.0 if head.ratio is None else head.ratio)
    return None


def _between(run: HandRun, formula: str, term: Term) -> HandCalculation:
    line, discharge = discharge_line(run)
    first, last = rounded(term(run.first), 7), rounded(term(run.last), 7)
    time = (first - last) / discharge
    unit = f"m{raised('7/2')}"
    return HandCalculation(
        (
            formula,
            line,
            f"{_H0} = {metres(run.first)} m, F = {figures(first, 7)} {unit}; "
            f"{_H1} = {metres(run.last)} m, F = {figures(last, 7)} {unit}",
            f"t = ({figures(first, 7)} − {_bracketed(last)}) / {figures(discharge, 6)} = {seconds(time)} s",
        ),
        time,
    )
