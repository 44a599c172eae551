"""The order in which findings are read."""

from __future__ import annotations

from collections.abc import Iterable

from headfall.checks.finding import Finding
from headfall.checks.scope import RULE as SCOPE_RULE


def sorted_findings(findings: Iterable[Finding]) -> tuple[Finding, ...]:
    """Return the findings worst first, equals in the order given, the scope note last among the notes."""
    return tuple(sorted(findings, key=lambda finding: (finding.grade, finding.rule == SCOPE_RULE)))
