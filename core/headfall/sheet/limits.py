"""Limits of use, what is not covered, and who decides."""

from __future__ import annotations

from headfall.sheet.citations import Citations
from headfall.sheet.model import Column, Paragraph, Part, Table

STATEMENT = (
    "This sheet predicts hydraulics. It does not approve a vessel, a structure, a relief device, an entry, "
    "or a discharge to the environment."
)
LIMITS = (
    "The range covers discharge coefficients, losses, roughness and the bounds of the transition: not the bore, the "
    "sizes of the vessel, the datum of the level, a blocked opening or a fault of the feed.",
    "Not covered: changing inflow, moving valves, lines that run part-full or gulp air, swirl and drawn-in air beyond "
    "the checks, pressure along the line, freezing, boiling, foam and solids.",
    "Who decides: strength of the vessel and its supports, the vessel’s designer and the inspector; venting, process "
    "safety; entry, the site’s permit system; discharge, the owner and the regulator. Local codes and licensed "
    "practice come before anything printed here. The engineer who signs answers for the inputs and for the use made "
    "of the results.",
)


def limits_parts(cite: Citations) -> tuple[Part, ...]:
    """Return the closing statements and the list of all sources cited; build this section last."""
    return (
        Paragraph(STATEMENT, "heavy"),
        *(Paragraph(text) for text in LIMITS),
        Table(
            (Column("", 0.3), Column("Source", 5.2), Column("Status", 1.0)),
            cite.entries(),
        ),
        Paragraph(
            "Status: read, the value was read there; from memory, to be checked against the source or accepted by "
            "initials before issue; common practice, no single source.",
            "small",
        ),
    )
