"""C25: an outlet so large that the surface's own motion counts."""

from __future__ import annotations

import numpy as np
import numpy.typing as npt

from headfall.checks.finding import Finding, Grade
from headfall.checks.limits import limit
from headfall.quantities.display import DisplayUnits

Array = npt.NDArray[np.float64]

RULE = "C25"
_SOURCE = "quasi_steady"
# How much too long the plain law's time is for a cylinder started from rest and drained to 0.01 of its start, in
# per cent, from dV/dt = g − V²·(1/m² − 1)/(2·h). The rows are close to a line over m².
_RATIOS = np.array([0.0, 0.05, 0.1, 0.2, 0.3, 0.5])
_PER_CENT = np.array([0.0, 0.06, 0.23, 0.9, 2.0, 5.1])


def time_excess(ratio: Array) -> Array:
    """Return by how much the plain law's time is too long [1], the shape of ``ratio``.

    ``ratio`` is the contracted jet's area over the liquid's surface [1]. Between rows of an own integration, linear
    over the square of the ratio; from 0.5 on it stays at the last row, 0.051. Source: ``quasi_steady``.
    """
    return np.asarray(np.interp(np.square(ratio), np.square(_RATIOS), _PER_CENT) / 100.0, dtype=np.float64)


def check_large_outlet(
    *, contracted_area: float, surface: Array, level: Array, time: Array, display: DisplayUnits, place: str
) -> list[Finding]:
    """Return an attention where the jet exceeds 0.2 of the liquid's surface on the run, a stop above 0.5.

    ``contracted_area`` is the jets' area of all outlets, C_c·a summed [m²], with C_c near 0.62 for an edge in a plate
    and 1 for what runs full; ``level`` [m], ``time`` [s] and ``surface`` [m²] are the run's curve, all of shape (n,).
    Where the surface narrows to nothing, as in the tip of a cone, the stop counts as attention if less than 0.01 of
    the run's time is spent there. The effect on the time is weighted by the time spent. Source: ``quasi_steady``.
    """
    stop_at, attention_at = limit("large_outlet_stop").value, limit("large_outlet_attention").value
    ratio = contracted_area / np.maximum(surface, max(contracted_area, 1e-300))
    largest = float(ratio.max())
    spent = np.diff(time)
    middle = 0.5 * (ratio[1:] + ratio[:-1])
    whole = float(spent.sum())
    share = float(spent[middle > stop_at].sum()) / whole if whole > 0.0 else 1.0
    excess = float((spent * time_excess(middle)).sum()) / whole if whole > 0.0 else float(time_excess(ratio).max())
    if largest > stop_at and share >= limit("large_outlet_tail").value:
        grade = Grade.STOP
    elif largest > attention_at:
        grade = Grade.ATTENTION
    else:
        grade = Grade.NO_CAUTION
    effect = f"over the whole run the time comes out {_per_cent(excess)} too long"
    return [
        Finding(
            rule=RULE,
            grade=grade,
            subject="outlet against the surface",
            text=_text(grade, ratio, level, attention_at, stop_at, display),
            advice=_advice(grade, effect, largest > stop_at),
            source=_SOURCE,
            value=largest,
            limit=stop_at if grade is Grade.STOP else attention_at,
            kind="ratio",
            place=place,
        )
    ]


def _per_cent(fraction: float) -> str:
    if fraction >= 0.0505:
        return "more than 5 %"
    return "less than 0.01 %" if fraction < 0.0001 else f"about {100.0 * fraction:.2g} %"


def _text(grade: Grade, ratio: Array, level: Array, attention_at: float, stop_at: float, display: DisplayUnits) -> str:
    largest = float(ratio.max())
    share = display.text(largest, "ratio")
    if grade is Grade.NO_CAUTION:
        return (
            f"The jet is at most {share} of the liquid's surface, not above {display.text(attention_at, 'ratio')}; no "
            "caution is raised by this check."
        )
    bound = stop_at if grade is Grade.STOP else attention_at
    above = ratio > bound
    least = display.text(float(ratio.min()), "ratio")
    if bool(above.all()):
        return f"The jet is {share if share == least else f'{least} to {share}'} of the liquid's surface."
    over = display.text(bound, "ratio")
    return (
        f"The jet is up to {share} of the liquid's surface; {_where(level, ratio, above, display)} it is over {over}."
    )


def _where(level: Array, ratio: Array, above: npt.NDArray[np.bool_], display: DisplayUnits) -> str:
    # A drum or a sphere that starts full is narrow at its top as well.
    widest = level[int(np.argmin(ratio))]
    bottom, top = level[above & (level < widest)], level[above & (level > widest)]
    parts = []
    if bottom.size:
        parts.append(f"below {display.text(float(bottom.max()), 'level')}")
    if top.size:
        parts.append(f"above {display.text(float(top.min()), 'level')}")
    return " and ".join(parts)


def _advice(grade: Grade, effect: str, tail: bool) -> str:
    if grade is Grade.NO_CAUTION:
        return f"It rests on the plain outflow law, which leaves the surface's own motion out; {effect}."
    if grade is Grade.STOP:
        return f"The plain outflow law does not hold for so large an outlet; {effect}. A test or a smaller one decides."
    if tail:
        return f"The plain outflow law does not hold where the vessel is so narrow; {effect}."
    return f"The plain outflow law leaves the surface's own motion out; {effect}. A test decides where that matters."
