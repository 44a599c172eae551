"""C32: a vessel known by a table: where it ends, and what the rule between its rows is worth."""

from __future__ import annotations

from headfall.checks.finding import Finding, Grade
from headfall.checks.limits import limit
from headfall.quantities.display import DisplayUnits

RULE = "C32"
_RULES = {"linear": ("average end area", "conic rule"), "conic": ("conic rule", "average end area")}


def check_table_end(*, end: float, highest: float, display: DisplayUnits) -> list[Finding]:
    """Return that a run stays within its table: nothing is read beyond the last row.

    ``end`` is the level of the last row [m], ``highest`` the highest level of the run [m]. Source: ``volume_balance``.
    """
    last, reached = display.text(end, "level"), display.text(highest, "level")
    text = (
        f"The table ends at {last}, and the run stays within it, up to {reached}; no caution is raised by this check."
    )
    return [
        Finding(
            rule=RULE,
            grade=Grade.NO_CAUTION,
            subject="end of the table",
            text=text,
            advice="Nothing is read beyond the last row. It rests on the survey that the table comes from.",
            source="volume_balance",
            value=highest,
            limit=end,
            kind="level",
            place="vessel.rows",
        )
    ]


def check_table_rule(*, rule: str, level: float, difference: float, display: DisplayUnits) -> list[Finding]:
    """Return a note on how far the volume would be off with the other rule between the rows of an area table.

    ``rule`` is ``linear`` or ``conic``; ``difference`` [1] is the volume by the linear rule over that by the conic
    one, less one, at the row where it is largest, ``level`` [m]. Raises KeyError for another rule.
    Source: ``area_rules``.
    """
    own, other = _RULES[rule]
    share = difference if rule == "conic" else difference / (1.0 + difference)
    bound = limit("rules_alike").value
    between = f"Between the rows the area goes by the {own}"
    if share <= bound:
        grade = Grade.NO_CAUTION
        text = f"{between}, and the {other} would give the same volumes within {100 * bound:g}\u00a0%; no caution is "
        text += "raised by this check."
    else:
        grade = Grade.NOTE
        more = "more" if rule == "conic" else "less"
        text = (
            f"{between}; below {display.text(level, 'level')} the {other} would give {100 * share:.2g}\u00a0% {more}."
        )
    return [
        Finding(
            rule=RULE,
            grade=grade,
            subject="rule between the rows",
            text=text,
            advice="The range does not hold this. More rows bring the two together; the conic rule is exact for "
            "sections that stay alike, average end area for prisms.",
            source="area_rules",
            value=share,
            limit=bound,
            kind="ratio",
            place="vessel.between",
        )
    ]
