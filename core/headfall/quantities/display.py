"""SI to what a person reads: two sets of display units, and durations."""

from __future__ import annotations

import math
from dataclasses import dataclass
from functools import cache
from typing import Literal

from headfall.quantities.units import Unit, known_unit
from headfall.resources import read_resource

MINUS = "\u2212"
NO_BREAK = "\u00a0"

MINUTE, HOUR, DAY = 60, 3600, 86400
# Above these a duration drops its seconds, then its minutes, then its hours: three figures are enough.
SECONDS_UNTIL, MINUTES_UNTIL, HOURS_UNTIL = 10 * HOUR, 48 * HOUR, 100 * DAY
_RAISED = str.maketrans("0123456789-", "⁰¹²³⁴⁵⁶⁷⁸⁹⁻")


@dataclass(frozen=True, slots=True)
class DisplayUnits:
    """One of the two sets of units an answer is shown in; ``system`` is ``metric`` or ``us``.

    Every method takes an SI value and the kind of quantity, a key of the list of display kinds (``level``, ``bore``,
    ``flow`` and so on), and raises KeyError for a kind that is not in the list and ValueError for a value that is
    not finite.
    """

    system: str

    def text(self, value: float, kind: str) -> str:
        """Return number and unit with a no-break space between: ``0.347 m``."""
        number, unit = self.parts(value, kind)
        return f"{number}{NO_BREAK}{unit}" if unit else number

    def number(self, value: float, kind: str) -> str:
        """Return the number alone, with a true minus; of a duration in seconds the number of seconds."""
        _finite(value)
        style = _kinds()[kind]["style"]
        unit = _unit(self.system, kind)
        # A level within a nanometre of nil is a rounding of floats, not a level.
        shown = unit.from_si(0.0 if style == "level" and abs(value) < 1e-9 else value) if unit else value
        text = _styled(abs(shown), style, self.system)
        return text if shown >= 0.0 or not text.strip("0.") else MINUS + text

    def unit(self, kind: str) -> str:
        """Return the unit as it is shown; empty for a plain number."""
        return str(_kinds()[kind][self.system])

    def factor(self, kind: str) -> float:
        """Return how many SI units one display unit is; of a temperature the size of one degree."""
        unit = _unit(self.system, kind)
        return float(unit.factor) if unit else 1.0

    def parts(self, value: float, kind: str) -> tuple[str, str]:
        """Return number and unit apart, for a large figure with a small unit; of a duration the last unit is apart."""
        if _kinds()[kind]["style"] == "duration":
            *before, last = duration_parts(value)
            return NO_BREAK.join([*(f"{number}{NO_BREAK}{unit}" for number, unit in before), last[0]]), last[1]
        return self.number(value, kind), self.unit(kind)


@cache
def display_units(system: Literal["metric", "us"] | str) -> DisplayUnits:
    """Return the set of display units; raises ValueError for a name other than ``metric`` or ``us``."""
    if system not in ("metric", "us"):
        raise ValueError(f"there are no display units {system}; there are metric and us")
    return DisplayUnits(system)


def display_kinds() -> tuple[str, ...]:
    """Return the kinds of quantity that can be shown."""
    return tuple(_kinds())


def duration(seconds: float) -> str:
    """Return a time [s] as a person says it: ``9.4 s``, ``36 min 53 s``, ``1 h 37 min 05 s``, ``3 d 4 h``.

    Raises ValueError for a time that is not finite.
    """
    return NO_BREAK.join(f"{number}{NO_BREAK}{unit}" for number, unit in duration_parts(seconds))


def duration_parts(seconds: float) -> list[tuple[str, str]]:
    """Return the numbers and units of a duration [s]: ``[("36", "min"), ("53", "s")]``.

    Raises ValueError for a time that is not finite.
    """
    _finite(seconds)
    size = abs(seconds)
    parts = _short_parts(size) or _long_parts(size)
    number, unit = parts[0]
    return [(MINUS + number, unit), *parts[1:]] if seconds < 0.0 else parts


def _short_parts(size: float) -> list[tuple[str, str]]:
    """Return the parts of less than a minute; nothing where rounding makes a minute of it."""
    if size == 0.0:
        return [("0", "s")]
    if size < 1.0:
        return [(significant(size, 2), "s")]
    text = f"{size:.1f}"
    return [(text, "s")] if float(text) < MINUTE else []


def _long_parts(size: float) -> list[tuple[str, str]]:
    """Return the parts of a minute and more, rounded to the last unit shown before they are split."""
    whole = round(size)
    if whole < SECONDS_UNTIL:
        minutes, seconds = divmod(whole, MINUTE)
        hours, minutes = divmod(minutes, 60)
        if not hours:
            return [(str(minutes), "min"), (f"{seconds:02d}", "s")]
        return [(str(hours), "h"), (f"{minutes:02d}", "min"), (f"{seconds:02d}", "s")]
    whole = round(size / MINUTE)
    if whole * MINUTE < MINUTES_UNTIL:
        hours, minutes = divmod(whole, 60)
        return [(str(hours), "h"), (f"{minutes:02d}", "min")]
    whole = round(size / HOUR)
    if whole * HOUR < HOURS_UNTIL:
        days, hours = divmod(whole, 24)
        return [(str(days), "d"), (str(hours), "h")]
    return [(significant(size / DAY, 3), "d")]


def significant(size: float, digits: int) -> str:
    """Return a number that is not negative with so many significant figures, in decimals as far as one can read them.

    Outside a billionth and a billion it takes a power of ten.
    """
    if size == 0.0:
        return "0"
    # Rounding first: 9.996 has the exponent of 10.0.
    mantissa, _, power = f"{size:.{digits - 1}e}".partition("e")
    exponent = int(power)
    if not -9 <= exponent <= 9:
        return f"{mantissa}×10{str(exponent).translate(_RAISED)}"
    return f"{round(size, digits - 1 - exponent):.{max(0, digits - 1 - exponent)}f}"


def _styled(size: float, style: str, system: str) -> str:
    """Return the digits of a size in its display unit."""
    if style == "level":
        # A thousandth of a foot is a third of a millimetre. What is not nil never shows as nil.
        return f"{size:.3f}" if size >= 0.0005 or size == 0.0 else significant(size, 1)
    if style == "bore":
        # A bore is told to a tenth of a millimetre; in inches the fourth figure does the same.
        return _without_zeros(significant(size, 3 if system == "metric" else 4) if size < 1000.0 else f"{size:.0f}")
    if style == "temperature":
        return _without_zeros(f"{size:.1f}")
    if style == "ratio":
        return _without_zeros(significant(size, 3))
    return significant(size, 3)


def _without_zeros(text: str) -> str:
    return text.rstrip("0").rstrip(".") if "." in text and "×" not in text else text


def _finite(value: float) -> None:
    if not math.isfinite(value):
        raise ValueError("only a finite value can be shown")


@cache
def _kinds() -> dict[str, dict[str, str]]:
    kinds: dict[str, dict[str, str]] = read_resource("display.json")
    return kinds


@cache
def _unit(system: str, kind: str) -> Unit | None:
    """Return the display unit of a kind; None for a plain number. Its conversion is that of the table of units."""
    entry = _kinds()[kind]
    if not entry["dimension"]:
        return None
    unit = known_unit(entry[system], entry["dimension"])
    if unit is None:
        raise KeyError(f"{entry[system]} is not in the table of units")
    return unit
