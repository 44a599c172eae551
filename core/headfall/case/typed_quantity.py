"""Quantities that may be typed in more than one way: a level, a viscosity of either kind, an area or a volume."""

from __future__ import annotations

import math
import re
from dataclasses import replace
from fractions import Fraction

from headfall.quantities import Quantity, QuantityFault, parse
from headfall.quantities.number import SPACES, NumberFault, exact, leading_number, misread_digits

LEVEL = "level"
_LEVEL_WANTED = "a level, such as 2.8 m, 80 %, 15 m³ or 53.1 m site"
_PERCENT_WANTED = "a percentage from 0 to 100"
_SITE = re.compile(r"(.*\S)\s+site", re.IGNORECASE | re.DOTALL)
_PERCENT = ("%", "percent", "per cent")
_SIGNS = {"positive": "above nil", "not_negative": "of nil or more"}


def read_quantity(text: str, dimension: str, sign: str = "any") -> Quantity:
    """Return the quantity a person typed for one of the model's dimensions.

    Parameters
    ----------
    text
        A number and a unit. It is kept as it is.
    dimension
        A dimension of the table of units; several that will do, joined by ``|``, of which the first that fits counts;
        or ``level``: a length, a percentage of the capacity (``80 %``: value 0.8, dimension ``percent``), a volume,
        or a height on the site's datum (``53.10 m site``: value in m as typed, dimension ``site``).
    sign
        ``positive``, ``not_negative`` or ``any``. A height on the site's datum may have any sign.

    Raises
    ------
    QuantityFault
        The text is no such quantity, is not finite, or has a sign it cannot have.
    KeyError
        There is no such dimension.
    """
    quantity = _level(text) if dimension == LEVEL else _first_that_fits(text, dimension.split("|"), dimension)
    tidy = text.strip()
    if not math.isfinite(quantity.value):
        raise QuantityFault(f"{tidy} is not finite", wanted_quantity(dimension))
    if quantity.value < 0 and sign != "any" and quantity.dimension != "site":
        raise QuantityFault(f"{tidy} is negative", wanted_quantity(dimension, sign))
    if quantity.value == 0 and sign == "positive" and quantity.dimension != "site":
        raise QuantityFault(f"{tidy} is nil", wanted_quantity(dimension, sign))
    if quantity.dimension == "percent" and quantity.value > 1:
        raise QuantityFault(f"{tidy} is more than the whole", _PERCENT_WANTED)
    return replace(quantity, text=text)


def wanted_quantity(dimension: str, sign: str = "any") -> str:
    """Return what to type for a dimension of the model: ``a length above nil, such as 80 mm or 3 1/8 in``."""
    return ", or ".join(_signed(wanted, sign) for wanted in _all_wanted(dimension))


def called(dimension: str) -> str:
    """Return what a dimension of the model is called: ``an area or a volume``."""
    return " or ".join(wanted.partition(",")[0] for wanted in _all_wanted(dimension))


def _all_wanted(dimension: str) -> list[str]:
    return [_LEVEL_WANTED if name == LEVEL else _wanted(name) for name in dimension.split("|")]


def _wanted(name: str) -> str:
    try:
        parse("", name)
    except QuantityFault as fault:
        return fault.wanted
    raise KeyError(name)


def _signed(wanted: str, sign: str) -> str:
    kind, comma, example = wanted.partition(",")
    return f"{kind} {_SIGNS[sign]}{comma}{example}" if sign in _SIGNS else wanted


def _first_that_fits(text: str, names: list[str], dimension: str) -> Quantity:
    plain: list[QuantityFault] = []
    knowing: list[QuantityFault] = []
    for name in names:
        try:
            return parse(text, name)
        except QuantityFault as fault:
            # A fault that knows better what was meant than "type a length" says so itself.
            (knowing if fault.question or fault.wanted != _wanted(name) else plain).append(fault)
    if knowing:
        raise knowing[0]
    raise QuantityFault(plain[0].found, wanted_quantity(dimension))


def _level(text: str) -> Quantity:
    tidy = " ".join(text.translate(SPACES).split()) if isinstance(text, str) else text
    if not isinstance(text, str):
        return _first_that_fits(text, ["length"], LEVEL)
    on_site = _SITE.fullmatch(tidy)
    if on_site:
        height = _first_that_fits(on_site[1], ["length"], LEVEL)
        return Quantity(text, height.value, "site", f"{height.unit} site")
    share = _percentage(tidy)
    if share is not None:
        return Quantity(text, float(share / 100), "percent", "%")
    return _first_that_fits(text, ["length", "volume"], LEVEL)


def _percentage(tidy: str) -> Fraction | None:
    """Return the number before a percent sign, or None where the text is no percentage."""
    found = leading_number(tidy)
    if found is None or not tidy.endswith(_PERCENT):
        return None
    sign, digits, rest = found
    try:
        misread = misread_digits(tidy)
        if misread is not None:
            raise misread
        number = exact(digits, " %", sign)
    except NumberFault as fault:
        raise QuantityFault(fault.found, " or ".join(fault.instead) or _LEVEL_WANTED) from None
    if rest not in _PERCENT:
        raise QuantityFault(f"{tidy} is not a number with a unit", _LEVEL_WANTED)
    return -number if sign == "-" else number
