"""Losses of fittings and entries and roughness of pipes, by name, with their ranges and sources."""

from __future__ import annotations

import re
from dataclasses import dataclass
from functools import cache

import numpy as np

from headfall.resources import read_resource

_FILE = "losses.json"


@dataclass(frozen=True, slots=True)
class HandbookLoss:
    """A loss on the velocity in the bore: K [-] in turbulent flow, and K1 [-] of K1/Re; ``source`` is K's."""

    name: str
    low: float
    typical: float
    high: float
    laminar: float
    source: str


@cache
def fittings() -> tuple[HandbookLoss, ...]:
    """Return all fittings of the handbook; K1 by source ``hooper_1981``."""
    return tuple(
        HandbookLoss(row["name"], row["low"], row["typical"], row["high"], row["laminar"], row["source"])
        for row in read_resource(_FILE)["fittings"]
    )


@cache
def fitting(name: str) -> HandbookLoss | None:
    """Return the fitting of a name, or None; case, hyphens, degree signs and the order of words do not matter."""
    wanted = _plain(name)
    for row, known in zip(read_resource(_FILE)["fittings"], fittings(), strict=True):
        if any(_plain(spelling) == wanted for spelling in (row["name"], *row["also"])):
            return known
    return None


def entry_loss(entry: str, bore: float, edge_radius: float = 0.0) -> HandbookLoss:
    """Return the loss of a pipe's entry; ``edge_radius`` [m] over ``bore`` [m] counts for a ``rounded`` one.

    Raises KeyError for an entry that is not in the table.
    """
    data = read_resource(_FILE)
    if entry == "rounded":
        rows = np.array(data["rounded_rows"])
        low, typical, high = (float(np.interp(edge_radius / bore, rows[:, 0], rows[:, place])) for place in (1, 2, 3))
    else:
        row = data["entries"][entry]
        low, typical, high = row["low"], row["typical"], row["high"]
    return HandbookLoss("entry", low, typical, high, data["entry_laminar"], data["entry_source"])


def materials() -> tuple[str, ...]:
    """Return the names of the materials whose roughness is listed."""
    return tuple(row["name"] for row in read_resource(_FILE)["materials"])


def material_roughness(name: str) -> tuple[float, float, float] | None:
    """Return the roughness [m] of a pipe by its material, lowest, typical, highest; None for one that is not listed.

    Source: ``moody_1944``.
    """
    wanted = _plain(name)
    for row in read_resource(_FILE)["materials"]:
        if any(_plain(spelling) == wanted for spelling in (row["name"], *row["also"])):
            return row["low"] * 1e-3, row["typical"] * 1e-3, row["high"] * 1e-3
    return None


def roughness_source() -> str:
    """Return the key of the source of the listed roughness."""
    source: str = read_resource(_FILE)["material_source"]
    return source


def _plain(name: str) -> tuple[str, ...]:
    words = re.findall(r"[a-z]+|\d+", name.lower().replace("°", " ").replace("º", " "))
    return tuple(sorted(word for word in words if word not in ("deg", "degree", "degrees", "fully", "open")))
