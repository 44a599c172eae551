"""From the answers to the sheet."""

from __future__ import annotations

from dataclasses import replace

from headfall.answers import Answers
from headfall.quantities import DisplayUnits, display_units
from headfall.sheet.assumptions import assumptions_table
from headfall.sheet.checks_table import checks_table
from headfall.sheet.citations import Citations
from headfall.sheet.inputs import inputs_table
from headfall.sheet.limits import limits_parts
from headfall.sheet.marks import unmarked
from headfall.sheet.method import method_parts
from headfall.sheet.model import AnswerBox, Heading, Paragraph, Part, Picture, Section, Sheet, Table
from headfall.sheet.numbers import bound
from headfall.sheet.question import coefficient_range, question_parts
from headfall.sheet.results import results_parts, sizes_parts

FOOT = "Decimal mark: point. SI values stand beside what was typed."


def build_sheet(answers: Answers, *, version: str, fingerprint: str, display: DisplayUnits | None = None) -> Sheet:
    """Return the sizing sheet of one case as plain data.

    ``version`` is the program's, ``fingerprint`` that of the inputs; ``display`` defaults to the case's own units.
    The method is in SI whatever the display.
    """
    shown = display or display_units("us" if answers.case.units == "us" else "metric")
    cite = Citations()
    titles_and_parts = (
        ("Question and answer", question_parts(answers, shown)),
        ("Sketch, lengths as typed, levels above the lowest inside point", (Picture("sketch"),)),
        ("Inputs, as typed and in SI", (inputs_table(answers, cite),)),
        ("Method in SI units, with the numbers put in", method_parts(answers, shown, cite)),
        ("Results, typical coefficient", results_parts(answers, shown)),
        (f"Curve and its range {coefficient_range(answers)}", (Picture("curve"), Picture("flow"))),
        ("Checks", (checks_table(answers, shown, cite),)),
        ("Listed sizes on both sides", sizes_parts(answers, shown)),
        ("Assumptions, and who confirms them", (assumptions_table(answers, shown),)),
        ("Limits of use, who decides, sources", limits_parts(cite)),
    )
    sections = tuple(
        Section(number, title, tuple(_bound(part) for part in parts))
        for number, (title, parts) in enumerate(titles_and_parts, 1)
    )
    heading = _heading(answers, version, fingerprint)
    signatures = (("Prepared", heading.author), ("Checked", heading.checker), ("Approved", heading.approver))
    return Sheet(heading, sections, signatures, FOOT)


def _bound(part: Part) -> Part:
    """Return the part with its numbers held to their units."""
    if isinstance(part, Paragraph):
        return replace(part, text=bound(part.text))
    if isinstance(part, Table):
        return replace(part, rows=tuple(tuple(bound(cell) for cell in row) for row in part.rows))
    if isinstance(part, AnswerBox):
        return replace(part, lines=tuple(bound(line) for line in part.lines))
    return part


def _heading(answers: Answers, version: str, fingerprint: str) -> Heading:
    case = answers.case

    def typed(text: str | None, default: str = "") -> str:
        return " ".join(unmarked(text or default).split())

    return Heading(
        title=typed(case.title, "Untitled case"),
        tag=typed(case.tag),
        revision=typed(case.revision),
        status=typed(case.status, "draft"),
        date=typed(case.date),
        site=typed(case.site),
        author=typed(case.author),
        checker=typed(case.checker),
        approver=typed(case.approver),
        version=version,
        fingerprint=fingerprint,
    )
