"""What stands beside a typed quantity: the same value in the units of the answers."""

from __future__ import annotations

from headfall.case.model import Path
from headfall.quantities import DisplayUnits, Quantity
from headfall.quantities.units import known_unit
from headfall_app.document import Document
from headfall_app.entry.plan_rows import Row
from headfall_app.words import key_of, words

_ECHOED = (
    "length",
    "area",
    "volume",
    "flow",
    "temperature",
    "pressure",
    "density",
    "dynamic_viscosity",
    "acceleration",
    "mass",
    "velocity",
    "force",
)


def kind_of(path: Path, dimension: str) -> str:
    """Return the display kind of an entry."""
    kinds = words()["kinds"]
    kind: str = kinds.get(key_of(path)) or kinds.get(dimension, dimension)
    return kind


def echo_of(value: Quantity, row: Row, display: DisplayUnits) -> str:
    """Return the value in the units of the answers; empty where it was typed in them."""
    if value.dimension == "time":
        return "" if value.unit == "s" else f"{value.value:.6g}\u00a0s"
    if (value.value == 0.0 and value.dimension != "temperature") or value.dimension not in _ECHOED:
        return ""
    kind = kind_of(row.path, value.dimension)
    # A listed size is a name: its unit does not stand in the text.
    is_named = not value.text.strip().endswith(value.unit)
    if known_unit(value.unit, value.dimension) == known_unit(display.unit(kind), value.dimension) and not is_named:
        return ""
    return display.text(value.value, kind)


def level_echo(document: Document, path: Path) -> str:
    """Return the height of a level typed as a percentage, a volume or on the site datum; empty without answers."""
    answers = document.answers
    if answers is None or document.is_stale:
        return ""
    system = answers.system
    levels = {"start": system.start, "stop": system.stop, "overflow": system.overflow, "high": system.high}
    levels["highest_level"] = system.highest_level
    height = levels.get(str(path[-1]))
    return "" if height is None else document.display.text(height, "level")
