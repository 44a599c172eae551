"""SI to text that can be typed again."""

from __future__ import annotations

import math
from fractions import Fraction

from headfall.quantities.compound import CLOCK, COMPOUNDS
from headfall.quantities.grammar import Quantity, parse
from headfall.quantities.units import Unit, dimension, known_unit, pint_unit

_TIGHT = ('"', "'", "°", "′", "″", "’", "”")

# Below this many metres or seconds nobody writes in parts.
_SHORTEST = 1e-6
# Below this a float is nil; the grammar does not read its exponent.
_NIL = 1e-250


def plain_number(number: float, digits: int) -> str:
    """Return a number with at least so many significant digits, no exponent, no zeros at the end of a fraction."""
    if number == 0.0:
        return "0"
    exponent = math.floor(math.log10(abs(number)))
    if not -12 <= exponent <= 15:
        return f"{number:.{digits - 1}e}"
    text = f"{number:.{max(0, digits - 1 - exponent)}f}"
    return text.rstrip("0").rstrip(".") if "." in text else text


def written(value: float, unit: str, dimension_name: str, digits: int = 3) -> Quantity:
    """Return an SI value as a text quantity in the unit given, with at least ``digits`` significant digits.

    Figures before the point are never rounded away. ``unit`` may be any unit that ``parse`` gives back. The value
    of the quantity is that of its text, so text and value agree exactly.

    Raises ValueError for a value that is not finite and for a unit that does not belong to the dimension.
    """
    if not math.isfinite(value):
        raise ValueError("only a finite value can be written as a quantity")
    if abs(value) < _NIL:
        value = 0.0
    if unit == CLOCK and dimension_name == "time":
        return parse(_by_the_clock(value, digits), dimension_name)
    names = unit.split()
    known = _find(unit, dimension_name)
    if known is None and len(names) > 1 and dimension_name in COMPOUNDS:
        return parse(_in_parts(value, names, dimension_name, digits), dimension_name)
    if known is None:
        raise ValueError(f"{unit} is not a unit of {dimension(dimension_name).called}")
    number = plain_number(known.from_si(value), digits)
    return parse(f"{number}{_gap(unit)}{unit}", dimension_name)


def _find(unit: str, name: str) -> Unit | None:
    return known_unit(unit, name) or pint_unit(unit, name)


def _gap(unit: str) -> str:
    """Return what stands between a number and its unit."""
    return "" if unit.startswith(_TIGHT) and len(unit) < 3 and unit[-1] not in "CF" else " "


def _in_parts(value: float, names: list[str], name: str, digits: int) -> str:
    """Return a value as ``6 ft 2.13 in``, with decimals on the last part alone."""
    units = [known_unit(each, name) for each in names]
    parts = [unit for unit in units if unit is not None]
    if len(parts) != len(names):
        raise ValueError(f"{' '.join(names)} is not a unit of {dimension(name).called}")
    # One digit more than a plain number has: the parts before it use up one or two.
    number = plain_number(abs(value) / float(parts[-1].factor), digits + 1)
    if abs(value) < _SHORTEST:
        return f"{'-' if value < 0.0 else ''}{number}{_gap(names[-1])}{names[-1]}"
    smallest = Fraction(number)
    remaining = smallest * parts[-1].factor
    pieces: list[str] = []
    for part, spelled in zip(parts, names, strict=True):
        count = remaining / part.factor
        if part is not parts[-1]:
            count = Fraction(math.floor(count))
            remaining -= count * part.factor
        if count or (part is parts[-1] and not pieces):
            pieces.append(f"{_decimal(count)}{_gap(spelled)}{spelled}")
    return ("-" if value < 0.0 else "") + " ".join(pieces)


def _decimal(number: Fraction) -> str:
    """Return a fraction of a power of ten as decimals, exactly."""
    text = f"{float(number):.12f}"
    return text.rstrip("0").rstrip(".")


def _by_the_clock(value: float, digits: int) -> str:
    """Return seconds as ``1:23:45``; a clock shows no negative time and none too short to write without an exponent."""
    if value < _SHORTEST:
        return f"{plain_number(value, digits)} s"
    whole = value >= 10 ** (digits - 1)
    seconds = Fraction(round(value)) if whole else Fraction(plain_number(value, digits))
    minutes, rest = divmod(seconds, 60)
    hours, minutes = divmod(minutes, 60)
    text = f"{int(rest):02d}" if rest.denominator == 1 else _decimal(rest)
    return f"{hours}:{int(minutes):02d}:{text}"
