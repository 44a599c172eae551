"""Every check, made and not made."""

from __future__ import annotations

from headfall.answers import Answers
from headfall.checks.finding import Finding, Grade
from headfall.quantities import DisplayUnits, duration
from headfall.sheet.citations import Citations
from headfall.sheet.marks import heavy
from headfall.sheet.model import Column, Table

COLUMNS = (
    Column("Grade", 0.72),
    Column("Check", 1.35),
    Column("Value", 0.8, "right"),
    Column("Limit", 0.8, "right"),
    Column("What was found, what it rests on, what to do", 3.4),
)


def checks_table(answers: Answers, display: DisplayUnits, cite: Citations) -> Table:
    """Return one row a finding, worst first as they stand in the answers."""
    return Table(COLUMNS, tuple(_row(finding, display, cite) for finding in answers.findings))


def _row(finding: Finding, display: DisplayUnits, cite: Citations) -> tuple[str, ...]:
    word = heavy(finding.grade.word) if finding.grade <= Grade.ATTENTION else finding.grade.word
    if finding.grade == Grade.NOT_CHECKED:
        needs = f"Not checked: needs {finding.needs}." if finding.needs else f"Not checked. {finding.text}"
        text = " ".join(part for part in (needs, finding.advice) if part)
    else:
        text = " ".join(part for part in (finding.text, finding.advice) if part)
    source = f" {cite(finding.source)}" if finding.source else ""
    return (
        word,
        finding.subject,
        _shown(finding.value, finding, display),
        _shown(finding.limit, finding, display),
        text + source,
    )


def _shown(value: float | None, finding: Finding, display: DisplayUnits) -> str:
    if value is None:
        return ""
    if finding.kind == "time":
        return duration(value)
    return display.text(value, finding.kind or "ratio")
