"""Text to SI: a number of our own grammar and a unit of the dimension wanted."""

from __future__ import annotations

from dataclasses import dataclass

from headfall.quantities.compound import CLOCK, COMPOUNDS, clock, compound
from headfall.quantities.fault import QuantityFault
from headfall.quantities.number import SPACES, NumberFault, exact, leading_number, misread_digits
from headfall.quantities.units import (
    Unit,
    dimension,
    dimension_of,
    known_unit,
    meant_perhaps,
    pint_unit,
    table_dimension_of,
    unclear_unit,
)


@dataclass(frozen=True, slots=True)
class Quantity:
    """A quantity as typed: its text, its SI value, its dimension and the unit as it was typed (``mm``).

    Where several units were typed (``6 ft 2 in``) the unit names them all (``ft in``); a time by the clock
    (``1:23:45``) has the unit ``h:min:s``.
    """

    text: str
    value: float
    dimension: str
    unit: str


_LONGEST = 400
BORE = "bore"
"""A length that may also be typed as the name of a listed size, ``NPS 4 sch 40``."""
_BORE_WANTED = "a bore, such as 102.26 mm or NPS 4 sch 40"


def parse(text: str, dimension_name: str) -> Quantity:
    """Return the quantity a person typed.

    Parameters
    ----------
    text
        A number and a unit: ``2,5 m``, ``3 1/8 in``, ``6' 2"``, ``22 min 5 s``, ``1:23:45``, ``-3 degC``.
    dimension_name
        A key of the table of units: ``length``, ``flow`` and so on; or ``bore``, a length or the name of a listed size.

    Raises
    ------
    QuantityFault
        The text is no quantity of that dimension; the fault says what was found and what to type.
    KeyError
        There is no such dimension.
    """
    if dimension_name == BORE:
        return _bore(text)
    wanted = dimension(dimension_name).wanted
    if not isinstance(text, str):
        raise QuantityFault(f"{_shown(text)} is not a text with a unit", wanted)
    tidy = " ".join(text.translate(SPACES).split())
    if not tidy:
        raise QuantityFault("Nothing is typed", wanted)
    if len(tidy) > _LONGEST:
        raise QuantityFault("This text is too long for a quantity", wanted)
    try:
        value, unit = _read(tidy, dimension_name)
    except NumberFault as fault:
        raise QuantityFault(fault.found, " or ".join(fault.instead) or wanted) from None
    except OverflowError:
        raise QuantityFault(f"{tidy} is beyond the numbers used here", wanted) from None
    if dimension_name == "temperature" and value < 0.0:
        raise QuantityFault(f"{tidy} lies below absolute zero", wanted)
    return Quantity(text, value, dimension_name, unit)


def _bore(text: str) -> Quantity:
    if isinstance(text, str):
        from headfall.quantities.listed_bores import listed_bore

        size = listed_bore(text)
        if size is not None:
            return Quantity(text, size.bore, "length", "mm")
    try:
        return parse(text, "length")
    except QuantityFault as fault:
        wanted = _BORE_WANTED if fault.wanted == dimension("length").wanted else fault.wanted
        raise QuantityFault(fault.found, wanted, fault.question) from None


def is_bare_number(text: str) -> bool:
    """Return whether a text is a number of the grammar with no unit behind it."""
    found = leading_number(text.translate(SPACES)) if isinstance(text, str) else None
    return found is not None and not found[2].strip()


def _shown(value: object) -> str:
    """Return a value that is no text as it stands in a file."""
    if value is None:
        return "null"
    if isinstance(value, bool):
        return "true" if value else "false"
    if isinstance(value, int | float):
        return f"{value:.12g}"
    return {"list": "A list", "tuple": "A list", "dict": "A group of keys"}.get(type(value).__name__, "This value")


def _read(text: str, name: str) -> tuple[float, str]:
    """Return the SI value and the unit as typed of a tidy text."""
    wanted = dimension(name).wanted
    seconds = clock(text) if name == "time" else None
    if seconds is not None:
        return float(seconds), CLOCK
    found = leading_number(text)
    if found is None:
        raise QuantityFault(f"{text} is not a number with a unit", wanted)
    sign, digits, rest = found
    factor = -1 if sign == "-" else 1
    if name in COMPOUNDS and table_dimension_of(rest) is None:
        several = compound(f"{digits} {rest}", name)
        if several is not None:
            return float(factor * several[0]), several[1]
    misread = misread_digits(text)
    if misread is not None:
        raise misread
    number = exact(digits, f" {rest}" if rest else "", sign)
    if not rest:
        raise QuantityFault(f"{text} has no unit", wanted)
    return _unit(rest, name, text).to_si(factor * number), rest


def _unit(spelling: str, name: str, text: str) -> Unit:
    """Return the unit of a spelling, or say why it is none of this dimension."""
    wanted = dimension(name).wanted
    unit = known_unit(spelling, name)
    if unit is not None:
        return unit
    unclear = unclear_unit(spelling)
    if unclear is not None:
        raise QuantityFault(f"{text} has more than one meaning", f"Type {unclear[1]}", unclear[0])
    perhaps = meant_perhaps(spelling, name)
    if perhaps:
        raise QuantityFault(f"{spelling} is not a unit known here", f"Type {' or '.join(perhaps)}")
    other = dimension_of(spelling)
    if other == name:
        unit = pint_unit(spelling, name)
    elif other is not None:
        raise QuantityFault(f"{text} is {dimension(other).called}", wanted)
    if unit is None:
        raise QuantityFault(f"{spelling} is not a unit known here", wanted)
    return unit
