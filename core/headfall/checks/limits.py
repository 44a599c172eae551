"""The limits the checks compare with, as data."""

from __future__ import annotations

from dataclasses import dataclass

from headfall.resources import read_resource


@dataclass(frozen=True, slots=True)
class Limit:
    """One limit in SI; ``source`` is a key of the list of sources, ``status`` how far it can be leant on."""

    value: float
    unit: str
    meaning: str
    source: str
    status: str


def limit(name: str) -> Limit:
    """Return the limit of that name. Raises KeyError for a name that is not in ``limits.json``."""
    return Limit(**read_resource("limits.json")[name])
