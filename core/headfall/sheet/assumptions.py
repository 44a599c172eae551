"""What the answers assume, on what basis, and what it does to them if it is wrong."""

from __future__ import annotations

from headfall.answers import Answers
from headfall.case import model
from headfall.outlet.headspace import OpenHeadspace
from headfall.quantities import DisplayUnits
from headfall.sheet.input_outlets import entry_words
from headfall.sheet.marks import unmarked
from headfall.sheet.model import Column, Table
from headfall.sheet.numbers import sentence

COLUMNS = (
    Column("", 0.18),
    Column("Assumption", 1.9),
    Column("Basis", 1.35),
    Column("If it is wrong", 2.4),
    Column("Confirmed by", 0.8, "line"),
)


def assumptions_table(answers: Answers, display: DisplayUnits) -> Table:
    """Return the numbered register, with an empty column for initials."""
    rows = [_liquid(answers, display), _air(answers), *_vessel(answers), *_outlets(answers), *_flows(answers, display)]
    return Table(COLUMNS, tuple((str(number), *row, "") for number, row in enumerate(rows, 1)))


Row = tuple[str, str, str]


def _liquid(answers: Answers, display: DisplayUnits) -> Row:
    liquid = answers.case.liquid
    typed = liquid is not None and liquid.temperature is not None
    state = answers.system.liquid
    temperature = display.text(state.temperature, "temperature")
    return (
        f"The liquid is clean {unmarked(state.name)} at {temperature}, free of gas and solids.",
        "as typed" if typed else "default",
        "Gas or solids in it lower the coefficient and lengthen the time; so does a colder, thicker liquid.",
    )


def _air(answers: Answers) -> Row:
    effect = "A shut or small vent stops the flow after a fall of centimetres and can pull the vessel in."
    if not isinstance(answers.system.headspace, OpenHeadspace):
        claim = "The headspace is as entered, its gas is ideal, and air comes in by nothing but what is entered."
        return (claim, "stated in the case", effect)
    if answers.system.headspace_declared:
        return ("The headspace is open to the air and stays open.", "stated in the case", effect)
    claim = "The headspace is reckoned as open to the air; it was not declared."
    return (claim, "not declared: must be confirmed", effect)


def _vessel(answers: Answers) -> list[Row]:
    return [
        (
            _SIZES[bool(answers.case.vessel.displacement)],
            "drawing, as typed",
            "The time goes with the volume: 1 % on a diameter is about 2 % on the time.",
        ),
        _how_it_stands(answers.case.vessel),
        (
            "Levels are above the lowest inside point of the vessel.",
            "datum of the case",
            "A shifted zero shifts the head; it counts most near the end of the run.",
        ),
    ]


_SIZES = {
    False: "The sizes are those of the inside as entered, free of coils, baffles and deposit.",
    True: "The sizes are those of the inside as entered, and nothing takes space but what is entered.",
}


def _how_it_stands(vessel: model.Vessel) -> Row:
    if isinstance(vessel, model.Drum):
        return _FALLING if vessel.fall is not None and vessel.fall.value > 0 else _LYING
    return _TABLE if isinstance(vessel, model.TableVessel) else _STANDING


_TABLE = (
    "The table holds for the vessel as it is, between its rows as stated.",
    "survey or strapping, as typed",
    "Silt, a moved datum or the other rule between the rows changes volume and time.",
)
_FALLING = (
    "The drum falls as entered, and levels count from its lowest inside point.",
    "drawing, not surveyed",
    "Another fall moves liquid from end to end: small for the time, large for what stays.",
)
_LYING = (
    "The drum lies level and is built to drawing.",
    "drawing, not surveyed",
    "A fall of 1 in 100 moves liquid from end to end: small for the time, large for what stays.",
)
_STANDING = (
    "The vessel stands plumb and is built to drawing.",
    "drawing, not surveyed",
    "Out of plumb by 1 in 100 moves a level by 1 % of the distance from the gauge to the outlet.",
)
_FREE = (
    "Each opening discharges freely into air and is not blocked.",
    "scope of the case",
    "A drowned or partly blocked opening passes less, and the time grows.",
)
_DROWNED = (
    "The level outside is as entered, and a blocked part is as entered.",
    "as typed",
    "A higher tailwater or a blocked opening passes less, and the time grows.",
)
_APART = (
    "Openings stand three diameters apart or more.",
    "not checked against the drawing",
    "Closer openings disturb each other and pass less than their sum.",
)


def _outlets(answers: Answers) -> list[Row]:
    alike: dict[tuple[str, str, str], list[str]] = {}
    for outlet, used in zip(answers.case.outlets, answers.coefficients, strict=True):
        if isinstance(outlet, model.Pipe):
            claim = (
                "the line runs full from inlet to end, is built as entered and is clean; the ranges fit its fittings."
            )
            basis = "as typed and by handbook"
            effect = "Losses not entered lengthen the run; a line that draws air or runs part-full passes less."
        elif isinstance(outlet.coefficient, model.CoefficientRange):
            claim = "the coefficient range given fits the outlet as built."
            basis, effect = "given with the case", "The time goes with 1 over the coefficient."
        elif isinstance(outlet, model.Weir):
            claim = "the crest is level, sharp or broad as stated, clean, and air gets under the nappe."
            basis, effect = "as typed", "A rough or drowned crest passes less, and the level stands higher."
        else:
            claim = f"the entry edge is {entry_words(outlet.entry)} as stated, clean, nothing fitted behind it."
            basis = "as typed" if outlet.entry is not None else "default"
            effect = "An edge rounder than stated passes more, up to a third; a pipe or hose behind it changes the law."
        alike.setdefault((claim, basis, effect), []).append(unmarked(used.outlet))
    rows = [
        (sentence(f"{', '.join(names)}: {claim}"), basis, effect) for (claim, basis, effect), names in alike.items()
    ]
    several = len(answers.case.outlets) > 1 or any((outlet.count or 1) > 1 for outlet in answers.case.outlets)
    drowned = any(outlet.tailwater is not None for outlet in answers.case.outlets)
    return [*rows, _DROWNED if drowned else _FREE, *([_APART] if several else [])]


def _flows(answers: Answers, display: DisplayUnits) -> list[Row]:
    inflow = answers.system.inflow
    typed = answers.case.inflow is not None and answers.case.inflow.rate is not None
    basis = "as typed" if typed else "default"
    if inflow > 0:
        name = f"The inflow is steady at {display.text(inflow, 'flow')} throughout."
        largest = answers.equilibrium.largest_inflow.low
        effect = "More inflow lengthens the run and raises the level of rest."
        if largest is not None:
            effect += f" Above {display.text(largest, 'flow')} the level may reach overflow."
    else:
        name, effect = "Nothing flows in during the run.", "Any inflow lengthens the run, and may keep it from its end."
    steady = (
        "The flow follows the level at once (quasi-steady).",
        "common practice for a small opening",
        "An opening that is large against the surface runs a little slower; see the checks.",
    )
    return [(name, basis, effect), steady]
