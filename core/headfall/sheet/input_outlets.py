"""The outlets' rows in the table of inputs."""

from __future__ import annotations

import math

from headfall.answers import Answers, CoefficientUsed
from headfall.case import model
from headfall.outlet.orifice import OrificeOutlet
from headfall.outlet.pipe import PipeOutlet
from headfall.outlet.pipe_sections import NamedLoss, PipeSection
from headfall.sheet.citations import Citations
from headfall.sheet.input_row import DEFAULT, NOTHING, TYPED, Row, row
from headfall.sheet.marks import unmarked
from headfall.sheet.numbers import coefficient, figures, metres

_ENTRY_WORDS = {
    "sharp_edged": "sharp-edged",
    "square_edged": "square-edged",
    "reentrant_free": "re-entrant, running free",
    "reentrant_full": "re-entrant, running full",
}
_WEIR_WORDS = {
    "rectangular": "rectangular weir",
    "vnotch": "V-notch",
    "broad_crested": "broad-crested weir",
    "standpipe": "standpipe",
}


def entry_words(entry: str | None) -> str:
    """Return an outlet's entry as people write it; sharp-edged where none was typed."""
    return _ENTRY_WORDS.get(entry or "sharp_edged") or str(entry).replace("_", " ")


def outlet_rows(answers: Answers, number: int, cite: Citations) -> list[Row]:
    """Return the rows of one outlet, counted from nil."""
    typed, outlet, used = answers.case.outlets[number], answers.system.outlets[number], answers.coefficients[number]
    label = f"Outlet {number + 1}"
    if isinstance(typed, model.Pipe) and isinstance(outlet, PipeOutlet):
        rows = _pipe(label, typed, outlet, cite)
    elif isinstance(typed, model.Weir):
        rows = [*_weir(label, typed), _coefficient(label, typed.coefficient, used, cite)]
    elif isinstance(typed, model.Orifice) and isinstance(outlet, OrificeOutlet):
        rows = [*_orifice(label, typed, outlet), _coefficient(label, typed.coefficient, used, cite)]
    return [*rows, *_beside(label, typed)]


def _orifice(label: str, typed: model.Orifice, outlet: OrificeOutlet) -> list[Row]:
    facing = "faces the side" if outlet.facing == "side" else "faces down"
    entry = entry_words(typed.entry)
    facing += "" if typed.facing is not None else " (default)"
    name = f"{label}, {unmarked(outlet.name)}"
    rows: list[Row] = [(name, f"{entry} orifice", "", TYPED, facing)]
    if typed.entry is None:
        rows = [(name, NOTHING, f"{entry} orifice", DEFAULT, facing)]
    rows += _opening(label, typed, outlet.area, outlet.count)
    level_of = "its centre" if outlet.facing == "side" else "its plane"
    rows.append(row(f"{label}, elevation", typed.elevation, f"{metres(outlet.elevation)} m", f"height of {level_of}"))
    further = {"station": typed.station, "plate thickness": typed.thickness, "edge radius": typed.edge_radius}
    return rows + [row(f"{label}, {what}", value) for what, value in further.items() if value is not None]


def _opening(label: str, typed: model.Orifice, area: float, count: int) -> list[Row]:
    opening = typed.opening
    alike = f"{count} alike openings, " if count > 1 else ""
    follows = f"{alike}area {figures(area, 5)} m²"
    if isinstance(opening, model.RoundOpening):
        return [row(f"{label}, diameter", opening.diameter, follows=follows)]
    return [row(f"{label}, width", opening.width), row(f"{label}, height", opening.height, follows=follows)]


def _coefficient(label: str, typed: str | model.CoefficientRange | None, used: CoefficientUsed, cite: Citations) -> Row:
    spread = " / ".join(coefficient(float(f"{value:.4g}")) for value in (used.low, used.typical, used.high))
    given = "own range" if isinstance(typed, model.CoefficientRange) else "handbook"
    follows = f"lowest / typical / highest {cite(used.source)}"
    if typed is None:
        return (f"{label}, coefficient", NOTHING, spread, DEFAULT, f"handbook: {follows}")
    return (f"{label}, coefficient", given, spread, TYPED, follows)


def _pipe(label: str, typed: model.Pipe, outlet: PipeOutlet, cite: Citations) -> list[Row]:
    name = f"{label}, {unmarked(outlet.name)}"
    alike = f"{outlet.count} alike runs" if outlet.count > 1 else "flows full"
    rows: list[Row] = [(name, "pipe", "", TYPED, alike), _entry(label, typed, outlet.entry, cite)]
    typed_sections: list[model.Pipe | model.PipeSection] = [typed, *(typed.sections or ())]
    for place, (part, section) in enumerate(zip(typed_sections, outlet.sections, strict=True)):
        rows += _section(label if place == 0 else f"{label}, section {place + 1}", part, section, cite)
    rows.append(row(f"{label}, inlet", typed.elevation, f"{metres(outlet.elevation)} m", "height of its centre"))
    follows = f"falls {metres(outlet.elevation - outlet.discharge_elevation)} m"
    if outlet.discharge_elevation > outlet.elevation:
        follows = f"rises {metres(outlet.discharge_elevation - outlet.elevation)} m"
    default = f"{metres(outlet.discharge_elevation)} m"
    rows.append(
        row(f"{label}, discharging end", typed.discharge_elevation, default, f"height of its centre; {follows}")
    )
    if typed.station is not None:
        rows.append(row(f"{label}, station", typed.station))
    return rows


def _entry(label: str, typed: model.Pipe, entry: NamedLoss, cite: Citations) -> Row:
    spread = _spread(entry)
    if typed.entry_loss is not None:
        return (f"{label}, entry loss", "own", spread, TYPED, f"lowest / typical / highest K {cite(entry.source)}")
    follows = f"lowest / typical / highest K {cite(entry.source)}, K1 {entry.laminar:g}"
    words = entry_words(typed.entry)
    if typed.entry is None:
        return (f"{label}, entry", NOTHING, spread, DEFAULT, f"{words}: {follows}")
    return (f"{label}, entry", words, spread, TYPED, follows)


def _section(label: str, typed: model.Pipe | model.PipeSection, section: PipeSection, cite: Citations) -> list[Row]:
    rows: list[Row] = [row(f"{label}, bore", typed.bore, follows=f"area {figures(section.area, 5)} m²")]
    rows.append(row(f"{label}, length", typed.length, "0 m"))
    rows.append(_wall(label, typed, section, cite))
    for fitting in section.losses:
        laminar = f", K1 {fitting.laminar:g}" if fitting.laminar else ""
        count = f"{fitting.count} × " if fitting.count > 1 else ""
        follows = f"lowest / typical / highest K{laminar} {cite(fitting.source)}"
        rows.append((f"{label}, fitting", f"{count}{unmarked(fitting.name)}", _spread(fitting), TYPED, follows))
    return rows


def _wall(label: str, typed: model.Pipe | model.PipeSection, section: PipeSection, cite: Citations) -> Row:
    if section.friction_factor is not None:
        return (
            f"{label}, friction factor",
            f"{section.friction_factor:g}",
            "",
            TYPED,
            "Darcy’s, the same at every flow",
        )
    if typed.roughness is not None:
        return row(f"{label}, roughness", typed.roughness)
    spread = " / ".join(f"{value * 1000:g}" for value in section.roughness) + " mm"
    follows = f"roughness, lowest / typical / highest {cite('moody_1944')}"
    if typed.material:
        return (f"{label}, material", unmarked(typed.material), spread, TYPED, follows)
    return (f"{label}, material", NOTHING, spread, DEFAULT, f"commercial steel: {follows}")


def _spread(loss: NamedLoss) -> str:
    if math.isinf(loss.typical):
        return "shut"
    if loss.low == loss.high:
        return figures(loss.typical, 3) if loss.typical else "0"
    return " / ".join(f"{value:g}" for value in (loss.low, loss.typical, loss.high))


def _weir(label: str, typed: model.Weir) -> list[Row]:
    name = f"{label}, {unmarked(typed.name or 'weir')}"
    rows: list[Row] = [(name, _WEIR_WORDS[typed.form or "rectangular"], "", TYPED, "")]
    sizes = {
        "width": typed.width,
        "width of the channel": typed.channel_width,
        "angle": typed.angle,
        "diameter": typed.diameter,
        "crest": typed.crest,
        "discharging end": typed.discharge_elevation,
        "roughness": typed.roughness,
    }
    return rows + [row(f"{label}, {what}", value) for what, value in sizes.items() if value is not None]


def _beside(label: str, typed: model.Outlet) -> list[Row]:
    """Role, blocked part and tailwater."""
    rows: list[Row] = []
    if typed.role is not None:
        rows.append((f"{label}, role", typed.role, "", TYPED, ""))
    if typed.blocked is not None:
        rows.append((f"{label}, blocked", f"{typed.blocked:g}", "", TYPED, "part of the opening’s area"))
    tail = typed.tailwater
    if isinstance(tail, model.ReceivingVessel):
        shape = tail.vessel.shape.replace("_", " ")
        rows.append(
            (f"{label}, discharges into", f"a {shape} that fills", "", TYPED, "its heights on this vessel’s datum")
        )
        rows.append(row(f"{label}, its lowest point", tail.elevation))
        rows.append(row(f"{label}, its level at the start", tail.level))
    elif tail is not None:
        rows.append(row(f"{label}, tailwater", tail, follows="level outside, on this vessel’s datum"))
    return rows
