"""Tables beside that of the run: chosen times, level by level, other temperatures; and what is not to be relied on."""

from __future__ import annotations

from headfall.answers import Answers
from headfall.quantities import DisplayUnits, duration
from headfall.sheet.model import Column, Paragraph, Part, Table
from headfall.sheet.question import range_text

NO_VALUE = "–"
_WHY = {
    "dip": "air may be drawn in",
    "transition": "neither laminar nor turbulent: both bounds are in the range",
    "low_reynolds": "below the Reynolds numbers of the handbook’s coefficient",
    "part_full": "partly covered or part-full",
    "changing_control": "between weir and orifice, uneven",
}


def is_doubtful(answers: Answers, level: float) -> bool:
    """Whether the run is not to be relied on at a level [m]."""
    return any(part.low <= level < part.high for part in answers.doubtful)


def doubtful_text(answers: Answers, display: DisplayUnits) -> str:
    """Return the foot line that names the parts not to be relied on."""
    several = len(answers.system.outlets) > 1
    named = []
    for part in answers.doubtful:
        low, high = display.number(part.low, "level"), display.text(part.high, "level")
        of = f" at {part.outlet}" if several else ""
        named.append(f"{low} to {high}{of}, {_WHY[part.why]}")
    return f"* Not to be relied on (dashed in the curve): {'; '.join(named)}."


def further_tables(answers: Answers, display: DisplayUnits) -> list[Part]:
    """Return the tables asked for, each under its heading."""
    return [*_times(answers, display), *_stages(answers, display), *_temperatures(answers, display)]


def _times(answers: Answers, display: DisplayUnits) -> list[Part]:
    if not answers.at_times:
        return []
    titles = ("Time", f"Level, {display.unit('level')}", f"Volume, {display.unit('volume')}")
    columns = tuple(Column(title, 1.0, "right") for title in (*titles, f"Outflow, {display.unit('flow')}"))
    rows = [
        (
            duration(row.time),
            NO_VALUE if row.level is None else display.number(row.level, "level"),
            NO_VALUE if row.volume is None else display.number(row.volume, "volume"),
            NO_VALUE if row.outflow is None else display.number(row.outflow, "flow"),
        )
        for row in answers.at_times
    ]
    return [Paragraph("At chosen times", "heavy"), Table(columns, tuple(rows))]


def _stages(answers: Answers, display: DisplayUnits) -> list[Part]:
    if not answers.stages:
        return []
    datum, capacity = answers.system.site_datum, answers.vessel.capacity
    titles = [f"Level, {display.unit('level')}"]
    if datum is not None:
        titles.append(f"On the site datum, {display.unit('level')}")
    titles += [f"Surface, {display.unit('area')}", f"Volume, {display.unit('volume')}", "Of capacity, %"]
    titles += [f"Outflow, {display.unit('flow')}", "Its range"]
    rows = []
    for row in answers.stages:
        cells = [display.number(row.level, "level")]
        if datum is not None:
            cells.append(display.number(row.level + datum, "level"))
        cells += [display.number(row.area, "area"), display.number(row.volume, "volume")]
        cells += [f"{100 * row.volume / capacity:.1f}", display.number(row.outflow.typical or 0.0, "flow")]
        low, high = row.outflow.low or 0.0, row.outflow.high or 0.0
        cells.append(f"{display.number(low, 'flow')} to {display.number(high, 'flow')}")
        rows.append(tuple(cells))
    columns = tuple(Column(title, 1.0, "right") for title in titles)
    return [Paragraph("Stage, storage and discharge, level standing", "heavy"), Table(columns, tuple(rows))]


def _temperatures(answers: Answers, display: DisplayUnits) -> list[Part]:
    if not answers.at_temperatures:
        return []
    system = answers.system
    columns = tuple(
        Column(title, share, "right")
        for title, share in (
            ("Temperature", 0.9),
            ("Density", 1.0),
            ("Viscosity", 1.0),
            ("Time to the stop", 1.2),
            ("Its range", 1.8),
            ("Re first", 0.8),
            ("Re last", 0.8),
        )
    )
    own = (
        display.text(system.liquid.temperature, "temperature"),
        display.text(system.liquid.density, "density"),
        display.text(system.liquid.viscosity, "viscosity"),
        "never" if answers.draw_down.time.typical is None else duration(answers.draw_down.time.typical),
        range_text(answers.draw_down.time, display, "time") or "never",
        NO_VALUE,
        NO_VALUE,
    )
    rows = [own]
    for row in answers.at_temperatures:
        rows.append(
            (
                display.text(row.temperature, "temperature"),
                display.text(row.density, "density"),
                display.text(row.viscosity, "viscosity"),
                "never" if row.time.typical is None else duration(row.time.typical),
                range_text(row.time, display, "time") or "never",
                f"{row.reynolds_first:.3g}",
                f"{row.reynolds_last:.3g}",
            )
        )
    return [Paragraph("At other temperatures", "heavy"), Table(columns, tuple(rows))]
