"""The units a person may type: a closed table for each dimension, and pint for whatever stands outside it."""

from __future__ import annotations

import re
from dataclasses import dataclass
from fractions import Fraction
from functools import cache
from typing import Any

from headfall.resources import read_resource


@dataclass(frozen=True, slots=True)
class Unit:
    """A unit: how it is written, and SI value = factor·value + offset, both exact."""

    name: str
    dimension: str
    factor: Fraction
    offset: Fraction

    def to_si(self, number: Fraction) -> float:
        """Return the SI value of a number in this unit."""
        return float(number * self.factor + self.offset)

    def from_si(self, value: float) -> float:
        """Return the number in this unit of an SI value."""
        return float((Fraction(value) - self.offset) / self.factor)


@dataclass(frozen=True, slots=True)
class Dimension:
    """A dimension: its name, what it is called with its article, and an example to type."""

    name: str
    called: str
    example: str

    @property
    def wanted(self) -> str:
        """What to type, as the end of a sentence."""
        return f"{self.called}, such as {self.example}"


_ALIKE = str.maketrans(
    {"²": "2", "³": "3", "·": " ", "⋅": " ", "∙": " ", "*": " ", "µ": "u", "μ": "u", "º": "°", "℃": "°C", "℉": "°F",
     "′": "'", "’": "'", "‘": "'", "″": '"', "”": '"', "“": '"', "⁻": "-", "¹": "1", "−": "-"}
)  # fmt: skip


def plain(spelling: str) -> str:
    """Return a spelling without the differences that do not matter: ``m^3 / h`` and ``m³/h`` are both ``m3/h``."""
    text = spelling.replace("**", "^").translate(_ALIKE).replace("^", "").replace("''", '"')
    text = text.replace("U.S.", "US").replace(" per ", "/")
    text = re.sub(r"(?<=Pa)[.-]s\b", " s", text)
    return re.sub(r"\s*/\s*", "/", " ".join(text.split()))


@cache
def dimension(name: str) -> Dimension:
    """Return the dimension of this name; raises KeyError where there is none."""
    block = read_resource("units.json")[name]
    return Dimension(name, block["called"], block["example"])


@cache
def dimensions() -> tuple[str, ...]:
    """Return the names of all dimensions."""
    return tuple(read_resource("units.json"))


@cache
def spellings(name: str) -> dict[str, Unit]:
    """Return the units of a dimension by every plain spelling."""
    found: dict[str, Unit] = {}
    for entry in read_resource("units.json")[name]["units"]:
        unit = Unit(entry["unit"], name, Fraction(entry["factor"]), Fraction(entry.get("offset", "0")))
        for spelling in (entry["unit"], *entry["spellings"]):
            found[plain(spelling)] = unit
    return found


@cache
def _any_case(name: str) -> dict[str, set[str]]:
    """Return the exact spellings of a dimension by their lower case."""
    found: dict[str, set[str]] = {}
    for spelling in spellings(name):
        found.setdefault(spelling.lower(), set()).add(spelling)
    return found


def known_unit(spelling: str, name: str) -> Unit | None:
    """Return the unit of the closed table for a spelling, or None.

    Capitals do not matter where only one unit can be meant, so ``MM`` is mm and ``GPM`` is as unclear as ``gpm``.
    ``MPA`` stays unknown, and so does ``Mm``, which read strictly would be a megametre.
    """
    key = plain(spelling)
    unit = spellings(name).get(key)
    if unit is not None:
        return unit
    alike = {spellings(name)[exact].name for exact in _any_case(name).get(key.lower(), ())}
    if len(alike) != 1 or re.fullmatch(r"M[a-z]", key):
        return None
    return spellings(name)[next(iter(_any_case(name)[key.lower()]))]


def meant_perhaps(spelling: str, name: str) -> tuple[str, ...]:
    """Return the units of a dimension that differ from a spelling only in capitals."""
    key = plain(spelling).lower()
    return tuple(sorted({spellings(name)[exact].name for exact in _any_case(name).get(key, ())}))


def table_dimension_of(spelling: str) -> str | None:
    """Return the dimension in whose closed table a spelling stands, or None."""
    return next((name for name in dimensions() if known_unit(spelling, name) is not None), None)


def dimension_of(spelling: str) -> str | None:
    """Return the dimension a spelling belongs to, or None where nobody knows it or capitals leave it open."""
    known = table_dimension_of(spelling)
    if known is not None or any(meant_perhaps(spelling, name) for name in dimensions()):
        return known
    return next((name for name in dimensions() if pint_unit(spelling, name) is not None), None)


# What has more than one size in the trade, with the question and what to type instead. The pattern meets the plain
# spelling in lower case. Only these are asked about: US gal and imp gal stand in the table and never come here.
_UNCLEAR: tuple[tuple[str, str, str], ...] = (
    (r"(gallons?|gals?)( ?/ ?(min|minute|m))|gpm", "Which gallon?", "US gal/min or imp gal/min"),
    (r"(gallons?|gals?)/(h|hr|hour)|gph", "Which gallon?", "US gal/h or imp gal/h"),
    (r"(gallons?|gals?)/(s|sec|second)|gps", "Which gallon?", "US gal/s or imp gal/s"),
    (r"(gallons?|gals?)/(d|day)|gpd", "Which gallon?", "US gal/d or imp gal/d"),
    (r"mgd|mgal/d(ay)?", "Which gallon?", "US mgd or imp mgd"),
    (r"lb/(gal|gallon)|ppg", "Which gallon?", "lb/US gal or lb/imp gal"),
    (r".*\b(gallons?|gals?)\b.*", "Which gallon?", "US gal or imp gal"),
    (r".*\b(bbls?|barrels?)/.*|bpd|bph", "Which barrel?", "oil bbl/h or oil bbl/d for barrels of 42 US gal"),
    (r".*\b(bbls?|barrels?)\b.*", "Which barrel?", "oil bbl for one of 42 US gal, or imp bbl for one of 36 imp gal"),
    (r"(us |imp )?(fl ?oz|fluid ounces?|oz|ounces?|pints?|pt|quarts?|qt|cups?|gills?|bushels?|bu|pecks?|dra?ms?|tsp"
     r"|tbsp|teaspoons?|tablespoons?|cwt|hundredweights?)(/.*)?", "Which measure?",
     "a volume in L or in US gal, a mass in kg or in lb"),
    (r".*\btons?\b.*", "Which ton?", "t for one of 1000 kg, US ton or imp ton"),
    (r"mils?", "Which mil?", "mm or thou"),
)  # fmt: skip
_CLEAR = re.compile(r"(us|imp|uk|imperial|oil) ?\(?(gal|bbl|gallons?|barrels?)")


def unclear_unit(spelling: str) -> tuple[str, str] | None:
    """Return the question and what to type instead for a spelling that has more than one size, or None."""
    key = plain(spelling).lower()
    if _CLEAR.search(key):
        return None
    for pattern, question, instead in _UNCLEAR:
        if re.fullmatch(pattern, key):
            return question, instead
    return None


# pint takes any prefix before any unit, so that Min is a mega-inch; only these take one in the trade.
_PREFIXED = {"meter", "gram", "liter", "second", "pascal", "newton", "bar", "poise", "stokes", "radian", "kelvin"}
# These are no units of the trade: a difference of temperature, a constant of nature that pint lists among the units.
_NO_UNIT = {"delta_degree_Celsius", "delta_degree_Fahrenheit", "delta_degree_Reaumur", "speed_of_light"}
_FOR_PINT = re.compile(r"[A-Za-z°_]+(?:(?:\^|\*\*)?-?[1-4])?(?:[ */·()]+[A-Za-z°_]+(?:(?:\^|\*\*)?-?[1-4])?)*\)?")


@cache
def _registry() -> Any:
    import pint

    return pint.UnitRegistry(cache_folder=None)


def _is_unit_of_the_trade(registry: Any, word: str, name: str) -> bool:
    """Return whether a word is a unit with a dimension, with no prefix or with one where the trade has it."""
    readings = registry.parse_unit_name(word)
    if not any(not prefix or unit in _PREFIXED for prefix, unit, _ in readings):
        return False
    if {unit for _, unit, _ in readings} & _NO_UNIT:
        return False
    # A dozen or a percent beside a metre would change its size unseen.
    return name == "angle" or not registry.parse_units(word).dimensionless


@cache
def pint_unit(spelling: str, name: str) -> Unit | None:
    """Return the unit that pint knows by this spelling, where its dimension fits, else None.

    Only the spelling is given to pint, never a number, and a prefix counts only on a unit of the metric system.
    """
    key = re.sub(r"(?<=[A-Za-z)])(?=-?[1-4](?![0-9]))", "^", plain(spelling)).replace(" ", "*")
    if len(key) > 60 or not _FOR_PINT.fullmatch(plain(spelling)):
        return None
    registry = _registry()
    si = read_resource("units.json")[name]["si"]
    try:
        if not all(_is_unit_of_the_trade(registry, word, name) for word in re.findall(r"[A-Za-z°_]+", key)):
            return None
        unit = registry.parse_units(key)
        if not unit.is_compatible_with(registry.parse_units(si)):
            return None
        factor = float(registry.Quantity(1.0, unit).to(si).magnitude)
        nil = float(registry.Quantity(0.0, unit).to(si).magnitude)
    except Exception:  # pint raises a wide family for what it cannot read, down to errors of the tokenizer
        return None
    # A scale with an offset stands in the table or nowhere.
    if nil != 0.0 or not 0.0 < factor < float("inf"):
        return None
    return Unit(spelling, name, Fraction(factor), Fraction(0))
