"""Text to SI and back."""

from __future__ import annotations

from headfall.quantities.display import DisplayUnits, display_kinds, display_units, duration, duration_parts
from headfall.quantities.fault import QuantityFault
from headfall.quantities.grammar import Quantity, is_bare_number, parse
from headfall.quantities.writing import written

__all__ = [
    "DisplayUnits",
    "Quantity",
    "QuantityFault",
    "display_kinds",
    "display_units",
    "duration",
    "duration_parts",
    "is_bare_number",
    "parse",
    "written",
]
