"""The order in which findings are read."""

from __future__ import annotations

from collections.abc import Iterable

from headfall.checks.finding import Finding, Grade
from headfall.checks.overflow import RULE as OVERFLOW_RULE
from headfall.checks.scope import RULE as SCOPE_RULE


def sorted_findings(findings: Iterable[Finding]) -> tuple[Finding, ...]:
    """Return the findings worst first, equals in the order given.

    Among stops an overflow comes first, for it spills; among notes the scope comes last.
    """
    return tuple(sorted(findings, key=_weight))


def _weight(finding: Finding) -> tuple[Grade, bool, bool]:
    spills = finding.grade is Grade.STOP and finding.rule == OVERFLOW_RULE
    return finding.grade, not spills, finding.rule == SCOPE_RULE
