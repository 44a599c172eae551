"""Quantities of several parts: feet and inches, hours and minutes, times by the clock."""

from __future__ import annotations

import re
from dataclasses import dataclass
from fractions import Fraction
from itertools import pairwise

from headfall.quantities.number import VULGAR, NumberFault, exact, leading_number
from headfall.quantities.units import Unit, known_unit

CLOCK = "h:min:s"
# The units of the parts in falling order, as the table of units names them.
COMPOUNDS: dict[str, tuple[str, ...]] = {"length": ("ft", "in"), "time": ("d", "h", "min", "s")}

_CLOCK = re.compile(r"([0-9]+):([0-9]{1,2}):([0-9]{1,2}(?:[.,][0-9]+)?)", re.ASCII)
_HALF_CLOCK = re.compile(r"([0-9]+):([0-9]{1,2})", re.ASCII)
_STARTS_NUMBER = "0-9.," + "".join(VULGAR)
_NEXT_PART = re.compile(rf"([^{_STARTS_NUMBER}]*?)(\s*-?\s*[{_STARTS_NUMBER}].*)")


@dataclass(frozen=True, slots=True)
class _Part:
    """One part: its number, its unit, and both as typed."""

    number: Fraction
    unit: Unit
    spelling: str
    text: str


def clock(text: str) -> Fraction | None:
    """Return the seconds of ``1:23:45``, or None where the text is no time by the clock.

    Raises NumberFault for 60 minutes or seconds and for two numbers alone, which can be hours or minutes.
    """
    half = _HALF_CLOCK.fullmatch(text)
    if half is not None:
        left, right = half.groups()
        raise NumberFault(f"{text} can be minutes or hours", (f"{left} min {right} s", f"{left} h {right} min"))
    whole = _CLOCK.fullmatch(text)
    if whole is None:
        return None
    hours, minutes, seconds = whole.groups()
    if len(hours) > 9:
        raise NumberFault(f"{text} is beyond the numbers used here")
    rest = Fraction(seconds.replace(",", "."))
    if int(minutes) > 59 or rest >= 60:
        raise NumberFault(f"{text} counts 60 or more in its minutes or seconds")
    return Fraction(int(hours) * 3600 + int(minutes) * 60) + rest


def compound(text: str, dimension: str) -> tuple[Fraction, str] | None:
    """Return the SI value and the units as typed of ``6 ft 2 in`` or ``1 h 20 min``, without a sign before it.

    None where the text is not of several parts with units of their own. Raises NumberFault where the parts do not
    fall in size, one before the last has a fraction, or one fills the part before it.
    """
    parts = _parts(text, dimension)
    if parts is None or len(parts) < 2:
        return None
    order = COMPOUNDS[dimension]
    for larger, smaller in pairwise(parts):
        if order.index(smaller.unit.name) <= order.index(larger.unit.name):
            raise NumberFault(f"{text} does not go from large to small units")
        if larger.number.denominator != 1:
            raise NumberFault(f"{larger.text} in {text} has a fraction before the last part")
        if smaller.number * smaller.unit.factor >= larger.unit.factor:
            raise NumberFault(f"{smaller.text} in {text} is 1 {larger.unit.name} or more")
    total = sum((part.number * part.unit.factor for part in parts), Fraction(0))
    return total, " ".join(part.spelling for part in parts)


def _parts(text: str, dimension: str) -> list[_Part] | None:
    """Return the parts of a text, or None where a piece of it is no part."""
    parts: list[_Part] = []
    remaining = text
    while remaining:
        # On drawings a hyphen stands between feet and inches: 6'-2". It is no sign.
        hyphen = remaining.startswith("-") and bool(parts) and dimension == "length"
        found = leading_number(remaining[1:] if hyphen else remaining)
        if found is None or found[0]:
            return None
        following = _NEXT_PART.fullmatch(found[2])
        spelling = (following[1] if following else found[2]).strip()
        remaining = following[2].strip() if following else ""
        if not spelling and parts and not remaining:
            raise NumberFault(f"{found[1]} in {text} has no unit")
        unit = known_unit(spelling, dimension) if spelling else None
        if unit is None or unit.name not in COMPOUNDS[dimension]:
            return None
        parts.append(_Part(exact(found[1]), unit, spelling, f"{found[1]} {spelling}"))
    return parts
