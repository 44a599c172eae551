"""The outlets as they are drawn: where, how large, with what jet."""

from __future__ import annotations

import math
from dataclasses import dataclass

import numpy as np

from headfall.answers import Answers
from headfall.case.model import Orifice, Path, RoundOpening
from headfall.quantities import DisplayUnits

JET_VELOCITY_COEFFICIENT = 0.97
"""Share of the ideal speed in a free jet from an opening; common practice."""


@dataclass(frozen=True, slots=True)
class DrawnOutlet:
    """One outlet. Lengths [m]; ``station`` is the distance from a drum's low tangent line, None where none was typed.

    ``reach`` is where the jet lands now, ``farthest`` where it would land from a full vessel, both from the wall and
    nil for a jet that leaves downwards.
    """

    facing: str
    station: float | None
    elevation: float
    width: float
    height: float
    name: str
    size_text: str
    flow_text: str
    flow: float
    head: float
    reach: float
    farthest: float
    reach_text: str
    path: Path
    lit: bool


def drawn_outlets(answers: Answers, display: DisplayUnits, level: float, lit: Path | None) -> tuple[DrawnOutlet, ...]:
    """Return the outlets at a level [m]; ``lit`` is the entry that has the cursor."""
    system = answers.system
    # Reach is kept room for up to the vessel's top: the picture must not shift while a level is dragged.
    highest = system.profile.height
    drawn = []
    for index, (outlet, typed) in enumerate(zip(system.outlets, answers.case.outlets, strict=True)):
        flow = float(np.sum(outlet.flow(np.array([level]), outlet.coefficient_typical)))
        side = outlet.facing == "side"
        reach = _reach(outlet.elevation, level) if side and flow > 0.0 else 0.0
        path: Path = ("outlets", index, "opening", "diameter" if outlet.shape == "round" else "width")
        drawn.append(
            DrawnOutlet(
                facing=outlet.facing,
                station=None if typed.station is None else typed.station.value,
                elevation=outlet.elevation,
                width=outlet.width,
                height=outlet.height,
                name=outlet.name,
                size_text=_size_text(typed),
                flow_text=f"{display.text(flow, 'flow')} out" if flow > 0.0 else "",
                flow=flow,
                head=max(level - outlet.elevation, 0.0),
                reach=reach,
                farthest=_reach(outlet.elevation, highest) if side else 0.0,
                reach_text=f"reach {display.text(reach, 'length')}" if reach > 0.0 else "",
                path=path,
                lit=lit is not None and lit[:3] == path[:3] and lit[0] == "outlets",
            )
        )
    return tuple(drawn)


def _reach(elevation: float, level: float) -> float:
    head = level - elevation
    return 2.0 * JET_VELOCITY_COEFFICIENT * math.sqrt(head * elevation) if head > 0.0 and elevation > 0.0 else 0.0


def _size_text(outlet: Orifice) -> str:
    opening = outlet.opening
    if isinstance(opening, RoundOpening):
        size = f"Ø {opening.diameter.text}"
    else:
        size = f"{opening.width.text} × {opening.height.text}"
    count = outlet.count or 1
    return f"{count} × {size}" if count > 1 else size
