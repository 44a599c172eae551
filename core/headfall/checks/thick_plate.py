"""C26: a square-edged opening in a plate so thick that the jet may cling to it or not."""

from __future__ import annotations

from headfall.checks.finding import Finding, Grade
from headfall.checks.limits import limit
from headfall.checks.wording import Ranged, capital
from headfall.quantities.display import DisplayUnits

RULE = "C26"
_ALIKE = 1e-9


def check_thick_plate(
    *,
    outlet: str,
    thickness: float | None,
    size: float,
    low: float,
    high: float,
    time: Ranged | None,
    display: DisplayUnits,
    place: str,
) -> list[Finding]:
    """Return an attention for a thick plate: its two coefficients and times, or which entry would fit it.

    ``thickness`` [m] of the plate, None where it was not entered; ``size`` [m] is the diameter or the smaller side of
    the opening; ``low`` and ``high`` [-] are the coefficients of a jet that springs clear and of one that clings;
    ``time`` to the stop level [s] over that range, None where other outlets have a part in it; ``place`` the entry of
    the thickness. Source: ``practice_thick_plate``.
    """
    if thickness is None:
        text = f"The thickness of the plate at {outlet} is not entered."
        advice = (
            "Between a third of the opening and one and a half of it the jet may cling to the plate or spring clear."
        )
        return [_finding(outlet, Grade.NOT_CHECKED, text, advice, None, place, needs="plate thickness")]
    thin, long = limit("thick_plate_low").value, limit("thick_plate_high").value
    ratio = thickness / size
    plate = f"the plate is {display.text(thickness, 'bore')} thick on an opening of {display.text(size, 'bore')}"
    if thin * (1 + _ALIKE) < ratio < long * (1 - _ALIKE):
        numbers = f"{display.text(low, 'ratio')} or at {display.text(high, 'ratio')}"
        text = f"{outlet} can run at {numbers} and may switch{_times(time, display)}: {plate}."
        advice = "The jet clings to the plate or springs clear of it, and a knock can turn one into the other. Test it."
    else:
        entry = "sharp-edged plate" if ratio <= thin else "short tube"
        text = f"{outlet} is no thick plate: {plate}, and the entry of a {entry} fits it better."
        bounds = f"{display.text(thin, 'ratio')} to {display.text(long, 'ratio')}"
        advice = f"The coefficients of a thick plate belong to a thickness of {bounds} of the opening."
    return [_finding(outlet, Grade.ATTENTION, capital(text), advice, ratio, place)]


def _times(time: Ranged | None, display: DisplayUnits) -> str:
    if time is None or time.low is None or time.high is None:
        return ""
    return f", for a time of {display.text(time.high, 'time')} or {display.text(time.low, 'time')}"


def _finding(
    outlet: str, grade: Grade, text: str, advice: str, ratio: float | None, place: str, needs: str = ""
) -> Finding:
    return Finding(
        rule=RULE,
        grade=grade,
        subject=f"thick plate at {outlet}",
        text=text,
        advice=advice,
        source="practice_thick_plate",
        value=ratio,
        limit=None if ratio is None else limit("thick_plate_high").value,
        kind="" if ratio is None else "ratio",
        place=place,
        needs=needs,
    )
