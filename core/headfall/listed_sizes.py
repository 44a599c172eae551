"""The listed sizes that an outlet can be had in."""

from __future__ import annotations

from dataclasses import dataclass
from functools import cache

from headfall.outlet.orifice import OrificeOutlet
from headfall.outlet.outlet import Outlet
from headfall.outlet.pipe import PipeOutlet
from headfall.quantities.listed_bores import series_of
from headfall.resources import read_resource

_USUAL_SERIES = "NPS 4 sch 40"


@dataclass(frozen=True, slots=True)
class ListedSize:
    """A diameter or bore [m] that can be bought, and its name."""

    size: float
    name: str


@cache
def opening_sizes() -> tuple[ListedSize, ...]:
    """Return the listed drill and plate sizes with their names, rising."""
    data = read_resource("opening_sizes.json")
    return tuple(
        ListedSize(size * 1e-3, group["name"].format(size=f"{size:g}"))
        for group in data["groups"]
        for size in group["sizes_mm"]
    )


@cache
def pipe_sizes(typed: str) -> tuple[ListedSize, ...]:
    """Return the bores of the series that a typed bore belongs to, steel pipe of schedule 40 where it names none."""
    series = series_of(typed) or series_of(_USUAL_SERIES)
    return tuple(ListedSize(bore.bore, bore.name) for bore in series)


def listed_sizes_for(outlet: Outlet) -> tuple[ListedSize, ...]:
    """Return the sizes in which an outlet can be had; none for a weir."""
    if isinstance(outlet, PipeOutlet):
        return pipe_sizes(outlet.bore_name)
    return opening_sizes() if isinstance(outlet, OrificeOutlet) else ()
