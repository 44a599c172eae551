"""C0: what the program's answers are not."""

from __future__ import annotations

from headfall.checks.finding import Finding, Grade

RULE = "C0"


def check_scope() -> list[Finding]:
    """Return the note that stands with every case. Source: ``scope``."""
    return [
        Finding(
            rule=RULE,
            grade=Grade.NOTE,
            subject="scope",
            text="This predicts hydraulics only.",
            advice="It does not approve a vessel, a structure, a relief device, an entry into a vessel or a discharge "
            "to the environment. The engineer who signs decides.",
            source="scope",
        )
    ]
