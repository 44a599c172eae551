"""Steps of axes and staffs that people read without thinking."""

from __future__ import annotations

import math
from collections.abc import Iterable, Sequence
from dataclasses import dataclass

_BLOCKS = (0.05, 0.1, 0.2, 0.5, 1.0)
_NUMBERS = (0.1, 0.2, 0.5, 1.0, 2.0, 5.0)

_SHORTEST = 1e-6
"""Below this a run takes no time that could be drawn [s]."""

_SECOND_STEPS = (1.0, 2.0, 5.0, 10.0, 15.0, 20.0, 30.0, 60.0)
_MINUTE_STEPS = (0.5, 1.0, 2.0, 5.0, 10.0, 15.0, 20.0, 30.0, 60.0)
_HOUR_STEPS = (0.5, 1.0, 2.0, 3.0, 4.0, 6.0, 12.0, 24.0)
_DAY_STEPS = (0.5, 1.0, 2.0, 5.0, 7.0, 14.0, 28.0)


def nice_step(least: float) -> float:
    """Return the smallest of 1, 2, 5 times a power of ten that is not below ``least``."""
    if not (least > 0.0 and math.isfinite(least)):
        return 1.0
    power = 10.0 ** math.floor(math.log10(least))
    for factor in (1.0, 2.0, 5.0, 10.0):
        if factor * power >= least * (1.0 - 1e-9):
            return factor * power
    return 10.0 * power


def _first(choices: Iterable[float], least: float) -> float:
    for choice in choices:
        if choice >= least * (1.0 - 1e-9):
            return choice
    return nice_step(least)


def block_step(pixels_per_unit: float) -> float:
    """Return how much one block of the staff stands for: at least 9 px tall."""
    least = 9.0 / pixels_per_unit
    return _first(_BLOCKS if least > 0.005 else (), least)


def number_step(pixels_per_unit: float) -> float:
    """Return the step of the staff's numbers: at least 30 px apart."""
    least = 30.0 / pixels_per_unit
    return _first(_NUMBERS if least > 0.02 else (), least)


def marks(low: float, high: float, step: float) -> list[float]:
    """Return the multiples of a step from ``low`` to ``high``, both included."""
    first, last = math.ceil(low / step - 1e-6), math.floor(high / step + 1e-6)
    return [index * step for index in range(first, last + 1)]


def mark_text(value: float, step: float) -> str:
    """Return a mark's number with as many decimals as its step needs, minus as U+2212."""
    decimals = 0
    while decimals < 6 and abs(round(step, decimals) - step) > 1e-9 * step:
        decimals += 1
    return f"{value + 0.0:.{decimals}f}".replace("-", "−")


@dataclass(frozen=True, slots=True)
class TimeAxis:
    """A time axis from nil to ``end`` [s]: ``unit`` [s], its word, and the marks in that unit."""

    end: float
    unit: float
    word: str
    step: float
    marks: Sequence[float]


def time_axis(longest: float, width: float) -> TimeAxis:
    """Return the axis for a run that takes ``longest`` [s], drawn ``width`` [px] wide."""
    end = longest * 1.03 if longest > _SHORTEST else 60.0
    steps: tuple[float, ...]
    if end <= 150.0:
        unit, word, steps = 1.0, "seconds", _SECOND_STEPS
    elif end <= 3.0 * 3600.0:
        unit, word, steps = 60.0, "minutes", _MINUTE_STEPS
    elif end <= 4.0 * 86400.0:
        unit, word, steps = 3600.0, "hours", _HOUR_STEPS
    else:
        unit, word, steps = 86400.0, "days", _DAY_STEPS
    span = end / unit
    least = span * 58.0 / max(width, 58.0)
    step = _first(steps if least > 0.5 * steps[0] else (), least)
    upper = math.ceil(span / step - 1e-9) * step
    # A last mark just past the run rounds the axis off; one far past it would only leave paper blank.
    if upper * unit <= end * 1.06:
        end = upper * unit
    return TimeAxis(end, unit, word, step, tuple(marks(0.0, end / unit, step)))
