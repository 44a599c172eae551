"""C23: laminar flow through fittings whose loss was measured in turbulent flow."""

from __future__ import annotations

from collections.abc import Sequence

from headfall.checks.finding import Finding, Grade
from headfall.checks.limits import limit
from headfall.checks.wording import capital, listed
from headfall.quantities.display import DisplayUnits

RULE = "C23"


def check_laminar_losses(
    *, outlet: str, least_reynolds: float, fittings: Sequence[str], display: DisplayUnits, place: str
) -> list[Finding]:
    """Return an attention where a pipe runs laminar and some of its losses have no laminar term.

    ``least_reynolds`` [-] is the lowest Reynolds number of the run in the bores that hold the ``fittings``, the names
    of those with a loss and no laminar term; ``outlet`` is what the sentences call the pipe.
    Source: ``laminar_turbulent``.
    """
    bound = limit("laminar_pipe").value
    number = display.text(least_reynolds, "reynolds")
    if not fittings:
        text = f"No fitting of {outlet} lacks a laminar loss"
    elif least_reynolds >= bound:
        text = f"{capital(outlet)} does not run laminar: the lowest Re of the run is {number}"
    else:
        text = ""
    if text:
        grade, text = Grade.NO_CAUTION, f"{text}; no caution is raised by this check."
        advice = f"Below Re {bound:.0f} a fitting costs more than its turbulent loss."
    else:
        grade = Grade.ATTENTION
        lacks = "has" if len(fittings) == 1 else "have"
        text = f"{capital(outlet)} runs laminar, down to Re {number}, and {listed(fittings)} {lacks} no laminar loss."
        advice = (
            "Fittings cost more than the table says when the flow is laminar, so the time comes out too short. Enter "
            "their laminar loss, K1 in K1/Re."
        )
    return [
        Finding(
            rule=RULE,
            grade=grade,
            subject=f"fittings in laminar flow, {outlet}",
            text=text,
            advice=advice,
            source="laminar_turbulent",
            value=least_reynolds,
            limit=bound,
            kind="reynolds",
            place=place,
        )
    ]
