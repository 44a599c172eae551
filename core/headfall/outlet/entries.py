"""Discharge coefficients by the form of the entry, lowest, typical and highest, with their sources."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np

from headfall.resources import read_resource


@dataclass(frozen=True, slots=True)
class EntryCoefficient:
    """Discharge coefficient referred to the opening's own area; ``source`` is a key of the list of sources."""

    name: str
    low: float
    typical: float
    high: float
    source: str
    condition: str


def entry_coefficient(entry: str, smaller_size: float = 1.0, edge_radius: float = 0.0) -> EntryCoefficient:
    """Return the handbook's coefficient for an entry, for free discharge in the turbulent range.

    ``smaller_size`` [m] is the diameter of a round opening and the smaller side of a rectangle; it and ``edge_radius``
    [m] matter for a ``rounded`` entry alone, whose coefficient is read between rows of radius over diameter and stays
    that of a bell-mouth from 0.15 on. Raises KeyError for an entry that is not in the table.
    """
    row = read_resource("entries.json")[entry]
    if "rows" in row:
        rows = np.array(row["rows"])
        ratio = edge_radius / smaller_size
        low, typical, high = (float(np.interp(ratio, rows[:, 0], rows[:, column])) for column in (1, 2, 3))
    else:
        low, typical, high = row["low"], row["typical"], row["high"]
    return EntryCoefficient(row["name"], low, typical, high, row["source"], row["condition"])
