"""The parts of the run that are not to be relied on, as the curve names them."""

from __future__ import annotations

from dataclasses import dataclass

from headfall.answers import Answers
from headfall.quantities import DisplayUnits

_WORDS = {
    "dip": "air may enter",
    "transition": "laminar or turbulent",
    "low_reynolds": "below the coefficient’s range",
    "part_full": "partly covered",
    "changing_control": "weir or orifice",
}


@dataclass(frozen=True, slots=True)
class LoosePart:
    """Levels from ``low`` to ``high`` [m] over which the curve is not to be relied on, and why in a few words."""

    low: float
    high: float
    text: str


def loose_parts(answers: Answers, display: DisplayUnits) -> tuple[LoosePart, ...]:
    """Return the parts, overlapping ones as one, lowest first."""
    merged: list[tuple[float, float, list[str]]] = []
    for part in answers.doubtful:
        word = _WORDS[part.why]
        if merged and part.low <= merged[-1][1]:
            low, high, words = merged[-1]
            merged[-1] = (low, max(high, part.high), words if word in words else [*words, word])
        else:
            merged.append((part.low, part.high, [word]))
    lowest = float(answers.curve.level.min())
    found = []
    for low, high, words in merged:
        where = f"below {display.text(high, 'level')}"
        if low > lowest + 1e-9:
            where = f"from {display.number(low, 'level')} to {display.text(high, 'level')}"
        found.append(LoosePart(low, high, f"not to be relied on {where}: {', '.join(words)}"))
    return tuple(found)
