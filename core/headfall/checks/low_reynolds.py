"""C22: a handbook coefficient at a Reynolds number below those it was measured at."""

from __future__ import annotations

import numpy as np
import numpy.typing as npt

from headfall.checks.finding import Finding, Grade
from headfall.checks.limits import limit
from headfall.checks.wording import capital
from headfall.quantities.display import DisplayUnits

Array = npt.NDArray[np.float64]

RULE = "C22"


def check_low_reynolds(
    *,
    outlet: str,
    level: Array,
    reynolds: Array,
    counted: npt.NDArray[np.bool_],
    display: DisplayUnits,
    place: str,
) -> list[Finding]:
    """Return a stop where d·√(2gH)/ν of an opening falls below 1000 on the run, an attention below 10 000.

    ``level`` [m] and ``reynolds`` [-], both of shape (n,), along the run; ``reynolds`` rises with the level.
    ``outlet`` is what the sentences call it. Where ``counted``, of the same shape, is false the number does not count:
    where air may be drawn in anyway, and in the last of an approach to rest. If that is so of the whole run, its
    highest number counts. Source: ``practice_low_reynolds``.
    """
    least = float(reynolds[counted].min()) if counted.any() else float(reynolds.max())
    grade, text, advice = _words(outlet, level, reynolds, least, display)
    return [
        Finding(
            rule=RULE,
            grade=grade,
            subject=f"Reynolds number at {outlet}",
            text=capital(text),
            advice=advice,
            source="practice_low_reynolds",
            value=least,
            limit=limit("low_reynolds_stop" if grade is Grade.STOP else "low_reynolds_attention").value,
            kind="reynolds",
            place=place,
        )
    ]


def _words(outlet: str, level: Array, reynolds: Array, least: float, display: DisplayUnits) -> tuple[Grade, str, str]:
    attention_at, stop_at = limit("low_reynolds_attention").value, limit("low_reynolds_stop").value
    first, last = (display.text(float(end), "reynolds") for end in (reynolds[0], reynolds[-1]))
    numbers = f"d·√(2gH)/ν is {first} at the start and {last} at the end of the run"
    name = f"the handbook coefficient of {outlet}"
    advice = "The handbook's coefficients were measured with water. A test with the liquid itself decides."
    if least < stop_at:
        text = f"{_where(level, reynolds, stop_at, display)}{name} does not hold: {numbers}."
        return Grade.STOP, text, f"{advice} Do not rely on that part of the run."
    if least < attention_at:
        text = f"{name} was measured at Reynolds numbers above {attention_at:.0f}: {numbers}."
        return Grade.ATTENTION, text, advice
    where = "above the dip level and before the last of an approach to rest"
    text = f"at {outlet} {numbers}; no caution is raised by this check."
    return Grade.NO_CAUTION, text, f"It is not below {attention_at:.0f} where it counts: {where}."


def _where(level: Array, reynolds: Array, bound: float, display: DisplayUnits) -> str:
    """``Below 0.412 m``, or nothing where the whole run is below the bound."""
    if float(reynolds.max()) < bound:
        return ""
    order = np.argsort(reynolds, kind="stable")
    return f"below {display.text(float(np.interp(bound, reynolds[order], level[order])), 'level')} "
