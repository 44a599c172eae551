"""What is wrong in a case, where it stands, and what is wanted there."""

from __future__ import annotations

import re
from collections.abc import Iterable
from dataclasses import dataclass

from headfall.case.model import Path

_PLAIN_KEY = re.compile(r"[A-Za-z_][A-Za-z0-9_-]*")

_PLACES = {
    "levels.start": "Start level",
    "levels.stop": "Stop level",
    "levels.overflow": "Overflow level",
    "levels.high": "High alarm level",
    "inflow.rate": "Inflow",
    "levels.site_datum": "Site datum",
    "target.drain_time": "Time to drain",
    "target.highest_level": "Highest level",
    "liquid.name": "Liquid",
}
_ENDS_OF_DRUM = {0: "low head", 1: "high head"}
_ONE_OF = {
    "outlets": "outlet",
    "fittings": "fitting",
    "sections": "section",
    "parts": "part",
    "rows": "row",
    "properties": "properties, row",
    "displacement": "displacement",
    "times": "time",
    "also_at": "also at",
}


@dataclass(frozen=True, slots=True)
class Fault:
    """One fault: where it stands, what was found and what is wanted.

    ``found`` is a clause that can begin a sentence (``2 kg is a mass``). ``wanted`` is what to type (``a length, such
    as 80 mm``), or, where it begins with a capital letter, a sentence of its own (``Leave it out``). Neither ends with
    a full stop.
    """

    path: Path
    found: str
    wanted: str

    @property
    def place(self) -> str:
        """Where it stands, as in ``outlets[1].opening.diameter``; empty for the file as a whole."""
        return place(self.path)

    @property
    def sentence(self) -> str:
        """What was found and what is wanted, in words and on one line, without the place."""
        wanted = self.wanted if not self.wanted or self.wanted[0].isupper() else f"Type {self.wanted}"
        said = (part.strip().rstrip(".") for part in (self.found, wanted) if part.strip())
        return " ".join(" ".join(f"{part}{'' if part.endswith('?') else '.'}" for part in said).split())

    @property
    def line(self) -> str:
        """Place and sentence on one line."""
        return f"{self.place}: {self.sentence}" if self.path else self.sentence


class CaseError(ValueError):
    """A case that cannot be read or worked out; ``faults`` holds one or more."""

    def __init__(self, faults: Iterable[Fault]) -> None:
        self.faults = tuple(faults)
        super().__init__("\n".join(fault.line for fault in self.faults))

    @property
    def sentence(self) -> str:
        """The sentences of all faults, without their places."""
        return " ".join(fault.sentence for fault in self.faults)


def place(path: Path) -> str:
    """Return where something stands, as in ``outlets[1].opening.diameter``."""
    words = ""
    for key in path:
        if isinstance(key, int):
            words += f"[{key}]"
            continue
        shown = key if _PLAIN_KEY.fullmatch(key) else f'"{" ".join(key.split())}"'
        words += f".{shown}" if words else shown
    return words


def place_words(path: Path) -> str:
    """Return where something stands in plain words, as in ``Outlet 2, diameter``."""
    known = _PLACES.get(place(path))
    if known is not None:
        return known
    words: list[str] = []
    for before, key in zip(("", *path), path, strict=False):
        if not isinstance(key, int):
            words.append(key.replace("_", " "))
        elif before in _ONE_OF:
            words[-1] = f"{_ONE_OF[before]} {key + 1}"
        elif before == "heads":
            words[-1] = _ENDS_OF_DRUM.get(key, f"head {key + 1}")
        else:
            words.append(f"column {key + 1}" if isinstance(before, int) else str(key + 1))
    if "opening" in words[:-1]:
        words.remove("opening")
    said = ", ".join(words) or "the case"
    return said[0].upper() + said[1:]
