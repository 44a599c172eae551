"""C28: a nominal pipe size typed where an inside diameter is wanted."""

from __future__ import annotations

from dataclasses import dataclass
from fractions import Fraction

from headfall.checks.finding import Finding, Grade
from headfall.checks.limits import limit
from headfall.quantities.display import DisplayUnits
from headfall.resources import read_resource

RULE = "C28"
_SOURCE = "asme_b36_10m"
_INCH = 0.0254


@dataclass(frozen=True, slots=True)
class NominalSize:
    """A nominal size whose own figure was typed: ``figure`` as it reads, ``name``, ``inside`` diameter [m]."""

    figure: str
    name: str
    inside: float


def nominal_size(diameter: float) -> NominalSize | None:
    """Return the nominal size of steel pipe whose figure, in mm or in inches, equals the diameter [m]; None else.

    The inside diameter is that of schedule 40, outside less two walls. Source: ``asme_b36_10m``.
    """
    near = limit("nominal_match").value
    for row in read_resource("nominal_pipe.json")["sizes"]:
        inside = (row["outside"] - 2.0 * row["wall_40"]) / 1000.0
        if abs(diameter - row["dn"] / 1000.0) <= near:
            return NominalSize(f"{row['dn']}\u00a0mm", f"DN\u00a0{row['dn']}", inside)
        inches = float(sum(Fraction(part) for part in row["nps"].split()))
        if abs(diameter - inches * _INCH) <= near:
            return NominalSize(f"{row['nps']}\u00a0in", f"NPS\u00a0{row['nps']}", inside)
    return None


def is_made_of_pipe(entry: str) -> bool:
    """Whether an orifice with that entry is commonly made of a piece of pipe: the tubes and nozzles."""
    return bool(entry in read_resource("nominal_pipe.json")["pieces_of_pipe"])


def check_nominal_size(
    *,
    outlet: str,
    made_of_pipe: bool,
    diameter: float | None,
    display: DisplayUnits,
    place: str,
    listed: str = "",
) -> list[Finding]:
    """Return a hint where an outlet's diameter or bore [m] reads like a nominal pipe size; None stands for a rectangle.

    ``outlet`` is what the sentences call it, such as ``the outlet``; ``listed`` the name of the listed size that was
    typed, empty where a figure was: a listed size brings its own bore and raises nothing.
    It is an attention for a pipe and for the entries of an orifice that are ``made_of_pipe`` (see
    ``is_made_of_pipe``), where the figure of the pipe and the bore are easily taken for one another. A hole in a plate
    is drilled or cut to its figure, and 80 mm is then just 80 mm: there it is a note. Source: ``asme_b36_10m``.
    """
    grade, text, advice = _words(outlet, made_of_pipe, diameter, listed, display)
    return [
        Finding(
            rule=RULE,
            grade=grade,
            subject=f"nominal size at {outlet}",
            text=text,
            advice=advice,
            source=_SOURCE,
            value=diameter,
            kind="" if diameter is None else "bore",
            place=place,
        )
    ]


def _words(
    outlet: str, made_of_pipe: bool, diameter: float | None, listed: str, display: DisplayUnits
) -> tuple[Grade, str, str]:
    if diameter is None:
        text = f"The opening of {outlet} is not round; no caution is raised by this check."
        return Grade.NO_CAUTION, text, "It rests on the sizes entered being those of the opening itself."
    if listed:
        inside = display.text(diameter, "bore")
        text = f"{listed} is typed for {outlet}, {inside} inside; no caution is raised by this check."
        return Grade.NO_CAUTION, text, "It rests on the listed wall: a worn or coated pipe has another bore."
    found = nominal_size(diameter)
    if found is None:
        text = f"The opening of {outlet} does not read like a nominal pipe size; no caution is raised by this check."
        return Grade.NO_CAUTION, text, "It rests on the sizes entered being those of the opening itself."
    inside = display.text(found.inside, "bore")
    article = "an" if found.name.startswith("N") else "a"
    text = f"{found.figure} is also a nominal size: {article} {found.name} pipe is {inside} inside in schedule 40."
    advice = f"Enter the measured inside diameter of {outlet}; the flow goes with its square."
    return Grade.ATTENTION if made_of_pipe else Grade.NOTE, text, advice
