"""C12: a line that takes more than comes in as soon as its inlet is covered."""

from __future__ import annotations

from headfall.checks.finding import Finding, Grade
from headfall.quantities.display import DisplayUnits

RULE = "C12"


def check_surging(
    *, inflow: float, surges_at: float | None, full_flow: float | None, display: DisplayUnits
) -> list[Finding]:
    """Return an attention where no level stands because a full line takes more than flows in.

    ``inflow`` [m³/s]; ``surges_at`` is the inlet's level [m], None where the level does not surge; ``full_flow`` what
    the outlets pass with that inlet just covered [m³/s]. Source: ``volume_balance``.
    """
    if surges_at is None or full_flow is None:
        grade = Grade.NO_CAUTION
        why = "Nothing flows in" if inflow <= 0.0 else "No inlet takes more than comes in as soon as it is covered"
        text = f"{why}; no caution is raised by this check."
        advice = "It rests on the inflow staying as entered."
    else:
        grade = Grade.ATTENTION
        text = (
            f"Expect surging and gulping about {display.text(surges_at, 'level')}, not a steady level: "
            f"{display.text(inflow, 'flow')} comes in, and {display.text(full_flow, 'flow')} goes out as soon as the "
            "inlet there is covered."
        )
        advice = (
            "The outlet runs full, draws the level down, takes air and breaks, over and over; times and flows are not "
            "told there. A smaller or throttled outlet, or a line so wide that air rises past the liquid, steadies the "
            "level. A process engineer decides."
        )
    return [
        Finding(
            rule=RULE,
            grade=grade,
            subject="steady level at the inflow",
            text=text,
            advice=advice,
            source="volume_balance",
            value=inflow,
            limit=full_flow,
            kind="flow",
            place="inflow.rate",
        )
    ]
