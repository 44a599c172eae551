"""C1: how air gets in while liquid goes out; C2: how far the vent pulls the pressure down."""

from __future__ import annotations

from headfall.checks.finding import Finding, Grade
from headfall.checks.limits import limit
from headfall.quantities.display import DisplayUnits

RULE = "C1"
VENT_RULE = "C2"
_WAY_IN = "way in for air"
_PLACE = "headspace"
_GAS = "gas_over_liquid"
_GULPS = (
    "It rests on a tight headspace. Air that gulps up through the outlet lets more out, in a time not told here. "
    "Open a way in for air."
)
_DECIDES = (
    "What vacuum the vessel bears is for its design authority to decide, with rules such as ISO 28300; a "
    "pressure-equipment inspector reads the nameplate."
)


def check_open_headspace(*, declared: bool) -> list[Finding]:
    """Return a stop where nobody has said how air gets in, and that no vent is there to be checked.

    ``declared`` is true where the case says that the headspace is open. Source: ``iso_28300``.
    """
    if declared:
        grade, text = Grade.NO_CAUTION, "The headspace is declared open; no caution is raised by this check."
        advice = "It rests on the declaration: nothing here shows that the opening is there or is kept clear."
    else:
        grade, text = Grade.STOP, "It has not been said how air gets in; the headspace is computed as open."
        advice = (
            "A closed tank stops draining after a few centimetres and can be sucked in. Declare the headspace. "
            "Venting is for the vessel's design authority to decide, with rules such as ISO 28300."
        )
    vent = Finding(
        rule=VENT_RULE,
        grade=Grade.NOT_CHECKED,
        subject="vent capacity",
        text="Vent capacity is not checked: no vent bore is entered.",
        advice="The pressure that the air needs to come in is left out. Enter the headspace as vented, with the bore "
        "of the vent, to have it worked out.",
        source="iso_28300",
        place=_PLACE,
        needs="vent bore",
    )
    return [_way_in(grade, text, advice, "iso_28300"), vent]


def check_pressurised_headspace(*, gauge_pressure: float, display: DisplayUnits) -> list[Finding]:
    """Return a note on a headspace kept at a gauge pressure [Pa]; an attention where it is kept under a vacuum.

    A vacuum is compared with the indicative one of ``limits.json``. Source: ``gas_over_liquid``.
    """
    indicative = limit("vent_vacuum").value
    lost = "Where the supply of gas fails, the tank is a closed one: it stops draining and can be sucked in."
    kept = display.text(abs(gauge_pressure), "pressure")
    if -gauge_pressure > indicative:
        text = (
            f"The headspace is kept {kept} below atmospheric, more than the indicative "
            f"{display.text(indicative, 'pressure')}."
        )
        return [_vacuum(Grade.ATTENTION, text, f"{lost} {_DECIDES}", -gauge_pressure, indicative, _GAS)]
    side = "above" if gauge_pressure >= 0.0 else "below"
    text = f"The headspace is kept {kept} {side} atmospheric, and every answer rests on that."
    return [_way_in(Grade.NOTE, text, f"{lost} Say who keeps it and what happens when it is lost.", _GAS)]


def check_closed_headspace(
    *,
    ends_at: float,
    released: float,
    vacuum: float,
    fast_ends_at: float,
    fast_vacuum: float,
    stops: bool,
    display: DisplayUnits,
) -> list[Finding]:
    """Return a stop for a headspace without a way in for air, with the vacuum that it comes to.

    ``ends_at`` [m] is the level at which the run ends, ``released`` [m³] by how much the liquid is less then,
    ``vacuum`` [Pa below atmospheric] what the air is at that level where it keeps its temperature (negative: it is
    pressed together); ``fast_ends_at`` and ``fast_vacuum`` the same where it exchanges no heat. ``stops`` says that
    the vacuum holds the liquid there, short of the stop level. A vacuum that is not above the indicative one of
    ``limits.json`` is an attention. Source: ``gas_over_liquid``.
    """
    at, fast = display.text(ends_at, "level"), display.text(abs(fast_vacuum), "pressure")
    if vacuum < 0.0:
        text = (
            f"The closed tank presses its air together as it fills: at {at} to {display.text(-vacuum, 'pressure')} "
            f"above atmospheric, {fast} where the air exchanges no heat."
        )
        advice = (
            "It rests on a tight headspace. Open a way out for air. What pressure the vessel bears is for its design "
            "authority to decide, with rules such as ISO 28300."
        )
        return [_vacuum(Grade.STOP, text, advice, vacuum, None, _GAS)]
    pulled = f"under {display.text(vacuum, 'pressure')} of vacuum"
    left = display.text(max(released, 0.0), "volume")
    if stops:
        text = (
            f"A closed tank stops draining: here at {at}, after {left} has left, {pulled}, or at "
            f"{display.text(fast_ends_at, 'level')} under {fast} where the air exchanges no heat."
        )
    else:
        text = (
            f"The closed tank stands {pulled} at {at}, after {left} has left, {fast} where the air exchanges no heat."
        )
    indicative = limit("vent_vacuum").value
    grade = Grade.STOP if max(vacuum, fast_vacuum) > indicative else Grade.ATTENTION
    return [_vacuum(grade, text, f"{_GULPS} {_DECIDES}", vacuum, indicative, _GAS)]


def check_vented_headspace(
    *,
    vacuum: float,
    air_flow: float,
    ambient: float,
    display: DisplayUnits,
    design_vacuum: float | None = None,
) -> list[Finding]:
    """Return how far a vent pulls the pressure down at the highest drain rate, clean and blocked in part.

    ``vacuum`` [Pa below atmospheric] and ``air_flow`` [m³/s] at that rate; ``ambient`` is the absolute pressure
    outside [Pa]; ``design_vacuum`` [Pa] what the nameplate states, None where it is not entered: the indicative one of
    ``limits.json`` stands in. A clean vent above
    it is a stop, one that is above it only when blocked an attention. With a part b of its area blocked the same flow
    takes 1/(1 − b)² of the pressure. Sources: ``iso_28300``, ``gas_over_liquid``.
    """
    indicative = limit("vent_vacuum").value
    bound = indicative if design_vacuum is None else design_vacuum
    shown = display.text(bound, "pressure")
    what = f"the {shown} that the nameplate states" if design_vacuum is not None else f"the indicative {shown}"
    basis = "" if design_vacuum is not None else "The nameplate's vacuum is not entered. "
    declared = _way_in(
        Grade.NO_CAUTION,
        "The headspace is declared vented; no caution is raised by this check.",
        "It rests on the declaration: nothing here shows that the vent is there or is kept clear.",
        "iso_28300",
    )
    advice = (
        f"{basis}It rests on one plain opening; a screen, a flame arrester or a line takes more, and breathing by heat "
        f"and cold is not in it. {_DECIDES}"
    )
    if air_flow <= 0.0 or vacuum <= 0.0:
        text = "No air is drawn in on this run; no caution is raised by this check."
        return [declared, _vacuum(Grade.NO_CAUTION, text, advice, 0.0, bound, "iso_28300")]
    return [
        declared,
        _clean_vent(vacuum, air_flow, bound, what, advice, display),
        _blocked_vent(vacuum, ambient, bound, what, advice, display),
    ]


def _clean_vent(vacuum: float, air_flow: float, bound: float, what: str, advice: str, display: DisplayUnits) -> Finding:
    pulls = (
        f"At the highest drain rate, with {display.text(air_flow, 'flow')} of air drawn in, the vent pulls "
        f"{display.text(vacuum, 'pressure')} below atmospheric"
    )
    if vacuum > bound:
        return _vacuum(Grade.STOP, f"{pulls}, above {what}.", advice, vacuum, bound, "iso_28300")
    text = f"{pulls}, not above {what}; no caution is raised by this check."
    return _vacuum(Grade.NO_CAUTION, text, advice, vacuum, bound, "iso_28300")


def _blocked_vent(
    vacuum: float, ambient: float, bound: float, what: str, advice: str, display: DisplayUnits
) -> Finding:
    blocked = limit("vent_blocked").value
    pulled = vacuum / (1.0 - blocked) ** 2
    pulls = (
        f"With {100 * blocked:.0f}\u00a0% of the vent blocked the same rate would take "
        f"{display.text(pulled, 'pressure')}"
    )
    subject = "vent blocked in part"
    if pulled > ambient:
        text = (
            f"With {100 * blocked:.0f}\u00a0% of the vent blocked the same rate is out of reach: it would take more "
            f"than the {display.text(ambient, 'pressure')} of the air outside."
        )
        return _vacuum(Grade.ATTENTION, text, advice, ambient, bound, "iso_28300", subject)
    if pulled > bound:
        return _vacuum(Grade.ATTENTION, f"{pulls}, above {what}.", advice, pulled, bound, "iso_28300", subject)
    text = f"{pulls}, not above {what}; no caution is raised by this check."
    return _vacuum(Grade.NO_CAUTION, text, advice, pulled, bound, "iso_28300", subject)


def _way_in(grade: Grade, text: str, advice: str, source: str) -> Finding:
    return Finding(rule=RULE, grade=grade, subject=_WAY_IN, text=text, advice=advice, source=source, place=_PLACE)


def _vacuum(
    grade: Grade,
    text: str,
    advice: str,
    vacuum: float,
    bound: float | None,
    source: str,
    subject: str = "",
) -> Finding:
    vented = source == "iso_28300"
    return Finding(
        rule=VENT_RULE if vented else RULE,
        grade=grade,
        subject=subject or ("vacuum at the vent" if vented else "vacuum above the liquid"),
        text=text,
        advice=advice,
        source=source,
        value=vacuum,
        limit=bound,
        kind="pressure",
        place=_PLACE,
    )
