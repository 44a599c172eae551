"""A row of the table of inputs: what was typed, and its value in SI."""

from __future__ import annotations

from headfall.quantities import Quantity
from headfall.sheet.marks import unmarked
from headfall.sheet.numbers import figures, fixed, metres

TYPED, DEFAULT = "as typed", "default"
NOTHING = "–"
"""In the column of what was typed, where nothing was."""
Row = tuple[str, str, str, str, str]


def si_text(quantity: Quantity) -> str:
    """Return the SI value with its unit."""
    value = quantity.value
    if quantity.dimension == "temperature":
        return f"{fixed(value, 2)} K"
    if quantity.dimension == "length":
        text = (
            "0" if value == 0 else metres(value) if abs(value) >= 1 else figures(value, 4 if abs(value) >= 0.1 else 3)
        )
        return f"{text} m"
    if quantity.dimension == "pressure":
        return f"{figures(value / 1e6, 6)} MPa" if abs(value) >= 1e6 else f"{figures(value / 1e3, 6)} kPa"
    if quantity.dimension == "time":
        return f"{value:g} s"
    units = {
        "flow": "m³/s",
        "mass": "kg",
        "acceleration": "m/s²",
        "area": "m²",
        "volume": "m³",
        "density": "kg/m³",
        "dynamic_viscosity": "Pa·s",
        "kinematic_viscosity": "m²/s",
        "angle": "rad",
    }
    return f"{figures(value, 6 if quantity.dimension == 'acceleration' else 4)} {units[quantity.dimension]}"


def row(name: str, quantity: Quantity | None, default: str = "", follows: str = "") -> Row:
    """Return the row of a quantity, or of its default in SI where none was typed."""
    if quantity is None:
        return (name, NOTHING, default, DEFAULT, follows)
    return (name, unmarked(quantity.text), si_text(quantity), TYPED, follows)
