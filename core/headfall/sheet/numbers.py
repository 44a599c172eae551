"""Numbers as the sheet prints them, and as a checker then reads them."""

from __future__ import annotations

import math
import re

from headfall.sheet.marks import raised, unmarked

MINUS = "\u2212"
SPACE = "\u00a0"
_BEFORE_UNIT = re.compile(r"(?<=[0-9]) (?=(m|m²|m³|m³/s|m/s|mm|s|kg|kg/m³|%|L/s|kPa|MPa|mPa·s)(?![0-9A-Za-z²³/·]))")


def decimals(value: float, digits: int) -> int:
    """Return how many decimal places show the value with so many significant digits, never fewer than none."""
    if value == 0 or not math.isfinite(value):
        return 0
    return max(0, digits - 1 - math.floor(math.log10(abs(value))))


def fixed(value: float, places: int) -> str:
    """Return the value with so many decimal places and a true minus."""
    text = f"{value:.{places}f}"
    if float(text) == 0:
        text = text.removeprefix("-")
    return text.replace("-", MINUS)


def figures(value: float, digits: int = 4) -> str:
    """Return the value with so many significant digits; powers of ten, raised, below a hundred-thousandth."""
    if value != 0 and not 1e-5 <= abs(value) < 1e9:
        mantissa, exponent = f"{value:.{digits - 1}e}".split("e")
        return f"{mantissa}·10{raised(str(int(exponent)).replace('-', MINUS))}".replace("-", MINUS)
    return fixed(value, decimals(value, digits))


def rounded(value: float, digits: int) -> float:
    """Return the value as a checker reads it after ``figures`` has printed it."""
    if value == 0:
        return 0.0
    places = digits - 1 - math.floor(math.log10(abs(value)))
    return round(value, places if abs(value) < 1e-5 else max(0, places))


def metres(value: float) -> str:
    """Return a length in metres, to the millimetre, finer where it was typed finer."""
    return fixed(value, level_places(value))


def level_places(value: float) -> int:
    """Return the decimal places that show a length: three, or four where millimetres do not hold it."""
    return 3 if abs(value * 1000 - round(value * 1000)) < 1e-6 else 4


def coefficient(value: float) -> str:
    """Return a discharge coefficient with the digits it has: two decimals at least, six digits at most."""
    return max(f"{value:.2f}", f"{value:.6g}", key=len)


def seconds(value: float) -> str:
    """Return a time in seconds with five significant digits, for a sum that a checker redoes."""
    return figures(value, 5)


def sentence(text: str) -> str:
    """Return the text with a capital at its start and a full stop at its end."""
    text = text.strip()
    if not text:
        return ""
    return text[0].upper() + text[1:] + ("" if text[-1] in ".?" else ".")


def read_figure(text: str) -> float:
    """Return the value of a printed figure, powers of ten included."""
    mantissa, _, power = unmarked(text).replace(MINUS, "-").partition("·10")
    return float(mantissa) * 10.0 ** (int(power) if power else 0)


def bound(text: str) -> str:
    """Return the text with a number held to the unit after it by a no-break space."""
    return _BEFORE_UNIT.sub(SPACE, text)
