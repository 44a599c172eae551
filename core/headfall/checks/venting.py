"""C1: how air gets in while liquid goes out."""

from __future__ import annotations

from headfall.checks.finding import Finding, Grade

RULE = "C1"


def check_venting(*, headspace_declared: bool) -> list[Finding]:
    """Return a stop where nobody has said how air gets in, and always that the vent's size is not checked.

    ``headspace_declared`` is true where the case says that the headspace is open. Source: ``iso_28300``.
    """
    if headspace_declared:
        declared = Finding(
            rule=RULE,
            grade=Grade.NO_CAUTION,
            subject="way in for air",
            text="The headspace is declared open; no caution is raised by this check.",
            advice="It rests on the declaration: nothing here shows that the opening is there or is kept clear.",
            source="iso_28300",
            place="headspace",
        )
    else:
        declared = Finding(
            rule=RULE,
            grade=Grade.STOP,
            subject="way in for air",
            text="It has not been said how air gets in; the headspace is computed as open.",
            advice="A closed tank stops draining after a few centimetres and can be sucked in. Declare the headspace. "
            "Venting is for the vessel's design authority to decide, with rules such as ISO 28300.",
            source="iso_28300",
            place="headspace",
        )
    vent = Finding(
        rule=RULE,
        grade=Grade.NOT_CHECKED,
        subject="vent capacity",
        text="Vent capacity is not checked: vents are not built yet.",
        advice="The pressure that the outgoing liquid needs at the vent is left out. Have the vent sized for the "
        "largest outflow, with rules such as ISO 28300.",
        source="iso_28300",
        place="headspace",
        needs="vent size",
    )
    return [declared, vent]
