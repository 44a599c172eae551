"""The inputs as they were typed, with their SI values, defaults marked."""

from __future__ import annotations

from dataclasses import fields

import numpy as np

from headfall.answers import Answers
from headfall.case.model import CoefficientRange, Orifice, RoundOpening, Structure
from headfall.quantities import Quantity
from headfall.sheet.citations import Citations
from headfall.sheet.input_row import DEFAULT, NOTHING, TYPED, Row, row
from headfall.sheet.input_vessel import vessel_rows
from headfall.sheet.marks import unmarked
from headfall.sheet.model import Column, Table
from headfall.sheet.numbers import coefficient, figures, metres

_ENTRY_WORDS = {
    "sharp_edged": "sharp-edged",
    "square_edged": "square-edged",
    "reentrant_free": "re-entrant, running free",
    "reentrant_full": "re-entrant, running full",
}

COLUMNS = (
    Column("Input", 1.25),
    Column("Typed", 1.2),
    Column("In SI", 1.0, "right"),
    Column("Basis", 0.55),
    Column("What follows from it", 1.9),
)


def inputs_table(answers: Answers, cite: Citations) -> Table:
    """Return every input and every default that the answers rest on."""
    rows = [*vessel_rows(answers), *_liquid(answers, cite)]
    for number in range(len(answers.case.outlets)):
        rows += _outlet(answers, number, cite)
    rows += [*_inflow(answers), *_levels(answers), *_rest(answers, cite)]
    return Table(COLUMNS, tuple(rows))


def entry_words(entry: str | None) -> str:
    """Return an outlet's entry as people write it; sharp-edged where none was typed."""
    return _ENTRY_WORDS.get(entry or "sharp_edged") or str(entry).replace("_", " ")


def _liquid(answers: Answers, cite: Citations) -> list[Row]:
    liquid, state = answers.case.liquid, answers.system.liquid
    temperature = None if liquid is None else liquid.temperature
    density, viscosity = figures(state.density), figures(state.viscosity * 1000, 5)
    properties = f"density {density} kg/m³, viscosity {viscosity} mPa·s {cite(state.source)}"
    return [
        ("Liquid", NOTHING, "water", DEFAULT, properties)
        if liquid is None or liquid.name is None
        else ("Liquid", unmarked(liquid.name), "", TYPED, properties),
        row("Temperature", temperature, "293.15 K"),
    ]


def _outlet(answers: Answers, number: int, cite: Citations) -> list[Row]:
    typed, outlet = answers.case.outlets[number], answers.system.outlets[number]
    used = answers.coefficients[number]
    label = f"Outlet {number + 1}"
    facing = "faces the side" if outlet.facing == "side" else "faces down"
    entry = entry_words(typed.entry)
    facing += "" if typed.facing is not None else " (default)"
    name = f"{label}, {unmarked(outlet.name)}"
    rows: list[Row] = [(name, f"{entry} orifice", "", TYPED, facing)]
    if typed.entry is None:
        rows = [(name, NOTHING, f"{entry} orifice", DEFAULT, facing)]
    rows += _opening(label, typed, outlet.area, outlet.count)
    level_of = "its centre" if outlet.facing == "side" else "its plane"
    rows.append(row(f"{label}, elevation", typed.elevation, "0 m", f"height of {level_of}"))
    further = {"station": typed.station, "plate thickness": typed.thickness, "edge radius": typed.edge_radius}
    for name, quantity in further.items():
        if quantity is not None:
            rows.append(row(f"{label}, {name}", quantity))
    spread = " / ".join(coefficient(value) for value in (used.low, used.typical, used.high))
    own = isinstance(typed.coefficient, CoefficientRange)
    follows = f"lowest / typical / highest {cite(used.source)}"
    given = "own range" if own else "handbook"
    basis = TYPED
    if typed.coefficient is None:
        given, basis, follows = NOTHING, DEFAULT, f"handbook: {follows}"
    rows.append((f"{label}, coefficient", given, spread, basis, follows))
    return rows


def _opening(label: str, typed: Orifice, area: float, count: int) -> list[Row]:
    opening = typed.opening
    alike = f"{count} alike openings, " if count > 1 else ""
    follows = f"{alike}area {figures(area, 5)} m²"
    if isinstance(opening, RoundOpening):
        return [row(f"{label}, diameter", opening.diameter, follows=follows)]
    return [
        row(f"{label}, width", opening.width),
        row(f"{label}, height", opening.height, follows=follows),
    ]


def _inflow(answers: Answers) -> list[Row]:
    inflow = answers.case.inflow
    return [row("Inflow, steady", None if inflow is None else inflow.rate, "0 m³/s")]


def _levels(answers: Answers) -> list[Row]:
    levels, system, vessel = answers.case.levels, answers.system, answers.vessel
    overflow = f"{metres(system.overflow)} m"
    top = "" if levels.overflow is not None else "the vessel's top; "
    rows = [
        row("Start level", levels.start, follows=f"volume {figures(vessel.start_volume)} m³"),
        row("Stop level", levels.stop, follows=f"volume {figures(vessel.stop_volume)} m³"),
        row("Overflow level", levels.overflow, overflow, f"{top}volume {figures(vessel.overflow_volume)} m³"),
    ]
    if levels.high is not None:
        volume = float(answers.system.profile.volume(np.array(levels.high.value)))
        rows.append(row("High level", levels.high, follows=f"volume {figures(volume)} m³"))
    return rows


def _rest(answers: Answers, cite: Citations) -> list[Row]:
    case, system = answers.case, answers.system
    declared = system.headspace_declared
    rows: list[Row] = [("Headspace", NOTHING, "", DEFAULT, "not declared: reckoned as open to the air")]
    if declared:
        rows = [("Headspace", "open", "", TYPED, "")]
    if case.target is not None and case.target.drain_time is not None:
        rows.append(row("Drain time wanted", case.target.drain_time))
    if case.structure is not None:
        rows += _structure(case.structure)
    around = case.surroundings
    gravity = None if around is None else around.gravity
    pressure = None if around is None else around.pressure
    standard = f"standard acceleration {cite('cgpm_1901')}" if gravity is None else ""
    rows.append(row("Gravity", gravity, "9.80665 m/s²", standard))
    rows.append(row("Air pressure", pressure, "101.325 kPa"))
    return rows


def _structure(structure: Structure) -> list[Row]:
    rows: list[Row] = []
    for attribute in fields(structure):
        value, default = getattr(structure, attribute.name), attribute.metadata.get("default")
        name = attribute.name.replace("_", " ").capitalize()
        if isinstance(value, Quantity):
            rows.append(row(name, value))
        elif value is not None or default is not None:
            shown = f"{default if value is None else value:g}"
            rows.append((name, NOTHING if value is None else shown, shown, DEFAULT if value is None else TYPED, ""))
    return rows
