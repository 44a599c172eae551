"""The inputs as they were typed, with their SI values, defaults marked."""

from __future__ import annotations

from dataclasses import fields

import numpy as np

from headfall.answers import Answers
from headfall.case import model
from headfall.case.defaults import effective
from headfall.case.model import Structure
from headfall.quantities import Quantity
from headfall.sheet.citations import Citations
from headfall.sheet.input_outlets import outlet_rows
from headfall.sheet.input_row import DEFAULT, NOTHING, TYPED, Row, row, si_text
from headfall.sheet.input_vessel import vessel_rows
from headfall.sheet.marks import unmarked
from headfall.sheet.model import Column, Table
from headfall.sheet.numbers import figures, metres

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
        rows += outlet_rows(answers, number, cite)
    rows += [*_inflow(answers), *_levels(answers), *_rest(answers, cite)]
    return Table(COLUMNS, tuple(rows))


def _liquid(answers: Answers, cite: Citations) -> list[Row]:
    liquid, state = answers.case.liquid, answers.system.liquid
    density, viscosity = figures(state.density), figures(state.viscosity * 1000, 5)
    properties = f"density {density} kg/m³, viscosity {viscosity} mPa·s {cite(state.source)}"
    if liquid is None or liquid.name is None:
        rows: list[Row] = [("Liquid", NOTHING, "water", DEFAULT, properties)]
    else:
        rows = [("Liquid", unmarked(liquid.name), "", TYPED, properties)]
    if liquid is None:
        return [*rows, row("Temperature", None, "293.15 K")]
    rows.append(row("Temperature", liquid.temperature, "293.15 K"))
    own = {"Density": liquid.density, "Viscosity": liquid.viscosity, "Vapour pressure": liquid.vapour_pressure}
    rows += [row(name, value) for name, value in own.items() if value is not None]
    for properties_row in liquid.properties or ():
        cells = ", ".join(unmarked(cell.text) for cell in properties_row)
        rows.append(
            ("Liquid, card", cells, "", TYPED, "temperature, density, viscosity and, if given, vapour pressure")
        )
    if liquid.also_at:
        rows.append(("Also worked out at", ", ".join(unmarked(t.text) for t in liquid.also_at), "", TYPED, ""))
    return rows


def _inflow(answers: Answers) -> list[Row]:
    inflow = answers.case.inflow
    return [row("Inflow, steady", None if inflow is None else inflow.rate, "0 m³/s")]


def _levels(answers: Answers) -> list[Row]:
    levels, system, vessel = answers.case.levels, answers.system, answers.vessel
    overflow = f"{metres(system.overflow)} m"
    top = "" if levels.overflow is not None else "the vessel's top; "
    rows = [
        _level("Start level", levels.start, system.start, vessel.start_volume),
        _level("Stop level", levels.stop, system.stop, vessel.stop_volume),
    ]
    if levels.overflow is None:
        follows = f"{top}volume {figures(vessel.overflow_volume)} m³"
        rows.append(row("Overflow level", None, overflow, follows))
    else:
        rows.append(_level("Overflow level", levels.overflow, system.overflow, vessel.overflow_volume))
    if levels.high is not None and system.high is not None:
        volume = float(system.profile.volume(np.array(system.high)))
        rows.append(_level("High level", levels.high, system.high, volume))
    if levels.site_datum is not None:
        rows.append(row("Site datum", levels.site_datum, follows="where the lowest inside point stands on it"))
    return rows


def _level(name: str, typed: Quantity, height: float, volume: float) -> Row:
    """A level as typed, a height, a percentage, a volume or on the site datum, and its height."""
    text = f"{metres(height)} m" if typed.dimension != "length" else si_text(typed)
    return (name, unmarked(typed.text), text, TYPED, f"volume {figures(volume)} m³")


def _rest(answers: Answers, cite: Citations) -> list[Row]:
    case, system = answers.case, answers.system
    rows = _headspace(case.headspace)
    target = case.target or model.Target()
    if target.drain_time is not None:
        rows.append(row("Drain time wanted", target.drain_time))
    if target.highest_level is not None and system.highest_level is not None:
        volume = float(system.profile.volume(np.array(system.highest_level)))
        rows.append(_level("Highest level wanted", target.highest_level, system.highest_level, volume))
    if target.flow_at is not None and system.flow_limit is not None:
        at = f"at {unmarked(target.flow_at.level.text)} ({metres(system.flow_limit.level)} m)"
        rows.append(row("Largest flow wanted", target.flow_at.flow, follows=at))
    if case.structure is not None:
        rows += _structure(case.structure)
    around = case.surroundings
    gravity = None if around is None else around.gravity
    pressure = None if around is None else around.pressure
    standard = f"standard acceleration {cite('cgpm_1901')}" if gravity is None else ""
    rows.append(row("Gravity", gravity, "9.80665 m/s²", standard))
    rows.append(row("Air pressure", pressure, "101.325 kPa"))
    return rows


def _headspace(headspace: model.Headspace | None) -> list[Row]:
    if headspace is None:
        return [("Headspace", NOTHING, "", DEFAULT, "not declared: reckoned as open to the air")]
    rows: list[Row] = [("Headspace", headspace.kind, "", TYPED, "")]
    if isinstance(headspace, model.PressurisedHeadspace):
        rows.append(row("Gauge pressure", headspace.gauge_pressure))
    if isinstance(headspace, model.VentedHeadspace):
        rows.append(row("Vent, bore", headspace.bore))
        given = "" if headspace.coefficient is None else f"{headspace.coefficient:g}"
        used = f"{effective(headspace, 'coefficient'):g}"
        rows.append(("Vent, coefficient", given or NOTHING, used, TYPED if given else DEFAULT, ""))
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
