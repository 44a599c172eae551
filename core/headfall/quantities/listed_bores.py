"""Bores by the name of a listed size: steel pipe by schedule, hygienic tube, plastic pipe by SDR."""

from __future__ import annotations

import re
from collections.abc import Callable
from dataclasses import dataclass
from fractions import Fraction
from functools import cache, lru_cache
from typing import Any

from headfall.quantities.fault import QuantityFault
from headfall.quantities.number import VULGAR, NumberFault, exact
from headfall.resources import read_resource

_FILE = "pipe_sizes.json"
_LONGEST = 60
_MILLIMETRE = 1e-3
_PIPES = ("steel", "stainless")
_ANY = "a listed size, such as NPS 4 sch 40"

_NUMBER = r"(\d+(?:[ -]\d+ ?/ ?\d+| ?/ ?\d+|[.,]\d+)?)"
_INCH = r"(?:[ -]?(in\.?|inch|inches|[\"″”]))?"
_FLAGS = re.IGNORECASE | re.ASCII
_PIPE = re.compile(
    rf"(NPS|DN)? ?{_NUMBER}{_INCH} ?,? ?(?:(?:sch(?:edule|ed)?\.?) ?([0-9A-Z]+)|(STD|XS))(?: ?\(DN ?(\d+)\))?", _FLAGS
)
_HYGIENIC = re.compile(rf"(DN)? ?{_NUMBER}{_INCH}(?: ?OD)? ?(?:hygienic|sanitary)(?: tube)?", _FLAGS)
_PLASTIC = re.compile(
    rf"(?:PE|PVC|PP|PVDF|DN|OD)? ?{_NUMBER}(?:[ -]?mm)?{_INCH}(?: ?OD)? ?,? ?SDR ?(\d+(?:[.,]\d+)?)", _FLAGS
)
_NOMINAL = re.compile(rf"(?:NPS|DN) ?{_NUMBER}{_INCH}", _FLAGS)


@dataclass(frozen=True, slots=True)
class ListedBore:
    """A listed size: ``name`` as it is written, ``series`` a key of ``pipe_series``, outside diameter and wall [m].

    ``nominal`` is the size within its series (``4``, ``65``, ``110``), ``schedule`` what fixes its wall beside the size
    (``40``, ``10S``, ``17``, nothing for hygienic tube), ``source`` a key of the list of sources.
    """

    name: str
    series: str
    nominal: str
    schedule: str
    outside_diameter: float
    wall: float
    source: str

    @property
    def bore(self) -> float:
        """Inside diameter [m]: outside less two walls."""
        return round(self.outside_diameter - 2 * self.wall, 8)


@lru_cache(maxsize=256)
def listed_bore(text: str) -> ListedBore | None:
    """Return the listed size that a text names, None for a text that names none.

    Parameters
    ----------
    text
        ``NPS 4 sch 40``, ``4 in sch 40``, ``DN 100 sch 40``, ``DN 65 hygienic``, ``2 in OD hygienic``,
        ``110 mm SDR 17``; capitals and spaces do not matter.

    Raises
    ------
    QuantityFault
        The text reads like a listed size, but that size or schedule is not listed; NPS and DN, or the
        wall, are left open.

    Sources: ``asme_b36_10m``, ``asme_b36_19m``, ``din_11866``, ``asme_bpe``, ``iso_4065``.
    """
    tidy = " ".join(text.split())
    if len(tidy) > _LONGEST:
        return None
    plain = _plain(tidy)
    for pattern, read in _READERS:
        found = pattern.fullmatch(plain)
        if found is not None:
            return read(found, tidy)
    return None


def series_of(text: str) -> tuple[ListedBore, ...]:
    """Return all sizes of the series and schedule of a text's size, rising by bore; nothing for a text without one."""
    try:
        size = listed_bore(text)
    except QuantityFault:
        return ()
    return () if size is None else _series(size.series, size.schedule)


def pipe_series() -> tuple[tuple[str, str, str], ...]:
    """Return key, title and an example of every series that can be typed."""
    return tuple((key, block["title"], block["example"]) for key, block in read_resource(_FILE).items())


@cache
def _series(key: str, schedule: str) -> tuple[ListedBore, ...]:
    found = (size for size in _all() if (size.series, size.schedule) == (key, schedule))
    return tuple(sorted(found, key=lambda size: size.bore))


@cache
def _all() -> tuple[ListedBore, ...]:
    data = read_resource(_FILE)
    found: list[ListedBore] = []
    for key in _PIPES:
        for row in data[key]["sizes"]:
            for schedule, wall in row["walls"].items():
                name = f"NPS {row['nps']} sch {schedule} (DN {row['dn']})"
                found.append(_size(name, key, row["nps"], schedule, row["outside"], wall))
    for nominal, outside, wall in data["hygienic"]["sizes"]:
        found.append(_size(f"DN {nominal} hygienic", "hygienic", str(nominal), "", outside, wall))
    for nominal, outside, wall in data["hygienic_inch"]["sizes"]:
        found.append(_size(f"{nominal} in OD hygienic", "hygienic_inch", nominal, "", outside, wall))
    for ratio, rows in data["plastic"]["series"].items():
        for outside, wall in rows:
            found.append(_size(f"{outside} mm SDR {ratio}", "plastic", str(outside), ratio, outside, wall))
    return tuple(found)


def _size(name: str, key: str, nominal: str, schedule: str, outside: float, wall: float) -> ListedBore:
    source = read_resource(_FILE)[key]["source"]
    return ListedBore(name, key, nominal, schedule, outside * _MILLIMETRE, wall * _MILLIMETRE, source)


def _plain(text: str) -> str:
    """Return a text with the fraction signs of type written out: ``1½ in`` is ``1 1/2 in``."""
    for sign, fraction in VULGAR.items():
        text = text.replace(sign, f" {fraction}")
    return " ".join(text.replace("\u2044", "/").split())


def _number(digits: str) -> Fraction:
    try:
        return exact(digits)
    except NumberFault as fault:
        raise QuantityFault(fault.found, _ANY) from None


def _pipe(found: re.Match[str], text: str) -> ListedBore:
    kind, digits, inch, schedule, plain_schedule, beside = found.groups()
    schedule = (schedule or plain_schedule).upper()
    number = _number(digits)
    if not kind and not inch and "/" not in digits:
        raise _left_open(text, [name for name in ("NPS", "DN") if _rows(name, number)], f"{digits} sch {schedule}")
    name = "DN" if (kind or "").upper() == "DN" and not inch else "NPS"
    rows = _rows(name, number)
    if not rows:
        listed = ", ".join(str(row[name.lower()]) for row in read_resource(_FILE)["steel"]["sizes"])
        raise QuantityFault(f"{text} is not a listed pipe size", f"one of {name} {listed}")
    row = rows[0]
    if beside is not None and int(beside) != row["dn"]:
        wanted = f"Type NPS {row['nps']} sch {schedule} or DN {beside} sch {schedule}"
        raise QuantityFault(f"NPS {row['nps']} is DN {row['dn']}, not DN {beside}", wanted)
    for candidate in rows:
        if schedule in candidate["walls"]:
            return _named(f"NPS {row['nps']} sch {schedule} (DN {row['dn']})")
    listed = ", ".join(schedule for candidate in rows for schedule in candidate["walls"])
    raise QuantityFault(f"{text} is not a listed schedule", f"a schedule of NPS {row['nps']}: {listed}")


def _rows(name: str, number: Fraction) -> list[dict[str, Any]]:
    """Return the rows of a nominal size, NPS or DN: that of the plain schedules, then that of the S schedules."""
    data = read_resource(_FILE)
    return [row for key in _PIPES for row in data[key]["sizes"] if exact(str(row[name.lower()])) == number]


def _hygienic(found: re.Match[str], text: str) -> ListedBore:
    kind, digits, inch = found.groups()
    number = _number(digits)
    by_inch = [size for size in _series("hygienic_inch", "") if exact(size.nominal) == number]
    by_dn = [size for size in _series("hygienic", "") if exact(size.nominal) == number]
    if kind and inch:
        raise QuantityFault(f"{text} is both a DN and in inches", "Type DN 65 hygienic or 2 in OD hygienic")
    if not kind and not inch and "/" not in digits:
        raise _left_open(text, [size.name for size in by_inch + by_dn], "")
    sizes = by_dn if kind else by_inch
    if sizes:
        return sizes[0]
    listed = ", ".join(size.nominal for size in _series("hygienic" if kind else "hygienic_inch", ""))
    wanted = f"one of DN {listed} hygienic" if kind else f"one of {listed} in OD hygienic"
    raise QuantityFault(f"{text} is not a listed size", wanted)


def _plastic(found: re.Match[str], text: str) -> ListedBore:
    digits, inch, ratio = found.groups()
    if inch or "/" in digits:
        raise QuantityFault(f"{text} is in inches", "an outside diameter in mm, such as 110 mm SDR 17")
    ratios = read_resource(_FILE)["plastic"]["series"]
    wanted_ratio = next((key for key in ratios if exact(key) == _number(ratio)), None)
    if wanted_ratio is None:
        raise QuantityFault(f"{text} is not a listed series", f"one of SDR {', '.join(ratios)}")
    number = _number(digits)
    sizes = _series("plastic", wanted_ratio)
    size = next((size for size in sizes if exact(size.nominal) == number), None)
    if size is None:
        listed = ", ".join(size.nominal for size in sizes)
        raise QuantityFault(f"{text} is not a listed size", f"one of {listed} mm SDR {wanted_ratio}")
    return size


def _nominal(found: re.Match[str], text: str) -> ListedBore:
    wanted = f"its schedule too, such as {text} sch 40, or the bore itself, such as 102.26 mm"
    raise QuantityFault(f"{text} leaves the wall open", wanted)


def _left_open(text: str, names: list[str], rest: str) -> QuantityFault:
    """Return the fault of a plain number that can be inches or a DN, with the names that are listed."""
    named = " or ".join(f"{name} {rest}".strip() for name in names)
    wanted = f"Type {named}" if named else _ANY
    return QuantityFault(f"{text} does not say whether it goes by inches or by DN", wanted)


def _named(name: str) -> ListedBore:
    return next(size for size in _all() if size.name == name)


_READERS: tuple[tuple[re.Pattern[str], Callable[[re.Match[str], str], ListedBore]], ...] = (
    (_PIPE, _pipe),
    (_HYGIENIC, _hygienic),
    (_PLASTIC, _plastic),
    (_NOMINAL, _nominal),
)
