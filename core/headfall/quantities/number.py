"""The numbers a person may type: our own grammar, since general parsers are silently wrong on everyday input."""

from __future__ import annotations

import re
from fractions import Fraction

MINUS = "\u2212"
# No-break, figure, thin and narrow no-break spaces come with pasted text.
SPACES = str.maketrans(dict.fromkeys("\u00a0\u2007\u2009\u202f\t", " "))
VULGAR = {
    "½": "1/2", "⅓": "1/3", "⅔": "2/3", "¼": "1/4", "¾": "3/4", "⅕": "1/5", "⅖": "2/5", "⅗": "3/5", "⅘": "4/5",
    "⅙": "1/6", "⅚": "5/6", "⅐": "1/7", "⅛": "1/8", "⅜": "3/8", "⅝": "5/8", "⅞": "7/8", "⅑": "1/9", "⅒": "1/10",
}  # fmt: skip
_VULGAR = "".join(VULGAR)

# A mixed number may be joined by a space or, as on drawings, by a hyphen: 1-1/2. Fractions come before plain numbers
# so that 3/4 is not read as 3 followed by a unit /4.
_UNSIGNED = (
    rf"(?:(?:[0-9]+(?:\s+|-))?[0-9]+\s*[/\u2044]\s*[0-9]+"
    rf"|[0-9]*(?:\s+|-)?[{_VULGAR}]"
    rf"|(?:[0-9]+(?:\.[0-9]*|,[0-9]+)?|[.,][0-9]+)(?:[eE][-+{MINUS}]?[0-9]+)?)"
)
_NUMBER = re.compile(rf"\s*([-+{MINUS}]?)\s*({_UNSIGNED})\s*")
_COMMA_OF_THOUSANDS = re.compile(r"[1-9][0-9]{0,2},[0-9]{3}")
_DIGITS = re.compile(rf"([-+{MINUS}]?)\s*([0-9](?:[0-9 .,'’_/]*[0-9])?)\s*(.*)")
_GROUPS = re.compile(r"[0-9]{1,3}(?:([ .,'’_])[0-9]{3})(?:\1[0-9]{3})*(?:[.,][0-9]+)?")
_LARGEST_EXPONENT = 300
_LONGEST = 320


class NumberFault(ValueError):
    """Digits that are no number here: what was found, and what could be typed instead (nothing, one text or two)."""

    def __init__(self, found: str, instead: tuple[str, ...] = ()) -> None:
        self.found = found
        self.instead = instead
        super().__init__(found)


def leading_number(text: str) -> tuple[str, str, str] | None:
    """Return sign, digits and the rest of a text that starts with a number, or None where it does not."""
    match = _NUMBER.match(text)
    if match is None:
        return None
    return match[1].replace(MINUS, "-"), match[2].strip(), text[match.end() :].strip()


def exact(digits: str, behind: str = "", sign: str = "") -> Fraction:
    """Return the exact value of unsigned digits that ``leading_number`` found; sign and what is behind serve the fault.

    Raises NumberFault for a division by nil, a number beyond the range of a float, and a comma that may have been
    meant to group thousands.
    """
    if len(digits) > _LONGEST:
        raise NumberFault("This number has too many digits")
    digits = digits.replace("\u2044", "/")
    for vulgar, fraction in VULGAR.items():
        digits = digits.replace(vulgar, f" {fraction}")
    if "/" in digits:
        return _exact_fraction(digits)
    if _COMMA_OF_THOUSANDS.fullmatch(digits):
        whole, _, rest = digits.partition(",")
        readings = (whole + rest, f"{whole}.{rest.rstrip('0') or '0'}")
        instead = tuple(f"{sign}{reading}{behind}" for reading in readings)
        raise NumberFault(f"{digits} can be {' or '.join(readings)}", instead)
    mantissa, _, exponent = digits.replace(",", ".").lower().replace(MINUS, "-").partition("e")
    if exponent and (len(exponent) > 5 or abs(int(exponent)) > _LARGEST_EXPONENT):
        raise NumberFault(f"{digits} is beyond the numbers used here")
    # A point at the end is typed, but Fraction does not know it.
    return Fraction(mantissa.rstrip(".")) * Fraction(10) ** int(exponent or 0)


def _exact_fraction(digits: str) -> Fraction:
    """Return the value of ``3/4``, ``1 1/2`` or ``1-1/2``."""
    left, _, below = digits.partition("/")
    whole, above = (["0", *left.replace("-", " ").split()])[-2:]
    if int(below) == 0:
        raise NumberFault(f"{' '.join(digits.split())} divides by 0")
    return int(whole) + Fraction(int(above), int(below))


def misread_digits(text: str) -> NumberFault | None:
    """Return what is wrong with digits that one number does not use up: ``1 000 mm``, ``1,000.5 mm``, ``2.5.3 m``.

    None where nothing is wrong with them. Digits are not grouped here, because 1,000 and 1.000 differ by country.
    """
    match = _DIGITS.match(text)
    found = leading_number(text)
    if match is None or found is None or not re.match(r"[.,'’_/]?\s*[0-9]", found[2]):
        return None
    sign, digits, unit = match.groups()
    grouped = _GROUPS.fullmatch(digits)
    if grouped is None:
        return NumberFault(f"{digits} is not a number")
    joined = digits.replace(grouped[1], "").replace(",", ".")
    return NumberFault(f"{digits} has its digits in groups", (f"{sign.replace(MINUS, '-')}{joined} {unit}".strip(),))
