"""C24: a viscous liquid whose time is worked out at one temperature alone."""

from __future__ import annotations

from collections.abc import Sequence

from headfall.checks.finding import Finding, Grade
from headfall.checks.limits import limit
from headfall.quantities.display import DisplayUnits

RULE = "C24"


def check_temperature(
    *,
    liquid: str,
    density: float,
    viscosity: float,
    worked_out: Sequence[tuple[float, float | None]],
    described_once: bool,
    display: DisplayUnits,
) -> list[Finding]:
    """Return an attention where a viscous liquid is described at one temperature, a note where it is used at one.

    ``density`` [kg/m³] and ``viscosity`` [Pa·s] of the case; ``worked_out`` are the temperatures [K] and drain times
    [s], the case's own first; a time is None where the stop is not reached, or is not known. ``described_once`` says
    that the liquid is described at that one temperature only. Viscous is a liquid whose kinematic viscosity is above
    the one of ``limits.json``. Source: ``practice_viscous``.
    """
    bound = limit("viscous_liquid").value
    own = worked_out[0][0]
    at = display.text(own, "temperature")
    thick = f"{display.text(viscosity, 'viscosity')} at {at}"
    if viscosity / density <= bound:
        text = f"{liquid}, {thick}, is a thin liquid; no caution is raised by this check."
        return [_finding(Grade.NO_CAUTION, text, "Its viscosity hardly enters the time.", viscosity)]
    if len(worked_out) > 1:
        text = f"{_compared(worked_out, display)}; no caution is raised by this check."
        return [_finding(Grade.NO_CAUTION, text, "It rests on the liquid being as warm as that throughout.", viscosity)]
    if described_once:
        text = f"{liquid}, {thick}, is described at that one temperature; colder, it is thicker and the time is longer."
        advice = (
            "Enter rows of temperature, density and viscosity, and the temperatures at which to work out the time. How "
            "cold the liquid gets is for operations to say."
        )
        return [_finding(Grade.ATTENTION, text, advice, viscosity)]
    text = f"{liquid}, {thick}: the time is worked out at that temperature alone."
    advice = (
        "Enter the coldest and the warmest temperature to have the time at both. Operations decides which they are."
    )
    return [_finding(Grade.NOTE, text, advice, viscosity, "liquid.also_at")]


def _compared(worked_out: Sequence[tuple[float, float | None]], display: DisplayUnits) -> str:
    coldest, warmest = min(worked_out, key=_temperature), max(worked_out, key=_temperature)
    cold, warm = (display.text(end[0], "temperature") for end in (coldest, warmest))
    if coldest[1] is None or warmest[1] is None:
        return f"The run is worked out from {cold} to {warm}"
    slow, fast = display.text(coldest[1], "time"), display.text(warmest[1], "time")
    return f"At {cold} the drain takes {slow}, at {warm} {fast}"


def _temperature(end: tuple[float, float | None]) -> float:
    return end[0]


def _finding(grade: Grade, text: str, advice: str, viscosity: float, place: str = "liquid") -> Finding:
    return Finding(
        rule=RULE,
        grade=grade,
        subject="viscosity and temperature",
        text=text[:1].upper() + text[1:],
        advice=advice,
        source="practice_viscous",
        value=viscosity,
        kind="viscosity",
        place=place,
    )
