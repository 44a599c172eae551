"""The outlets as they are drawn: where, how large, with what jet, pipe or nappe."""

from __future__ import annotations

import math
from dataclasses import dataclass

import numpy as np

from headfall.answers import Answers
from headfall.case.model import Orifice, Outlet, Path, Pipe, PipeSection, RoundOpening, Weir
from headfall.discharge import Receiver
from headfall.outlet.orifice import OrificeOutlet
from headfall.outlet.outlet import TYPICAL
from headfall.outlet.outlet import Outlet as SystemOutlet
from headfall.outlet.pipe import PipeOutlet
from headfall.outlet.standpipe import Standpipe
from headfall.quantities import DisplayUnits, Quantity

JET_VELOCITY_COEFFICIENT = 0.97
"""Share of the ideal speed in a free jet from an opening; common practice."""
_WEIR_WORDS = {"rectangular": "Notch", "vnotch": "V-notch", "broad_crested": "Broad crest", "standpipe": "Standpipe"}


@dataclass(frozen=True, slots=True)
class DrawnOutlet:
    """One outlet. Lengths [m]; ``station`` is the distance from a drum's low tangent line, None where none was typed.

    ``facing`` is ``down`` or ``side`` of an opening, else ``pipe``, ``weir`` or ``standpipe``. ``reach`` is where the
    jet lands now, ``farthest`` where it would land from a full vessel, both from the wall and nil but for a sideways
    jet. ``discharge`` is the level of a pipe's end, ``tail`` that of the water outside, None where there is none.
    ``bores`` are those of a pipe's sections, ``valve`` says whether it has one, ``fall_text`` how far its end lies
    below or above its inlet; ``speed`` is that at its end [m/s]. ``more_text`` says more of a pipe's sizes.
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
    discharge: float | None = None
    tail: float | None = None
    bores: tuple[float, ...] = ()
    valve: bool = False
    fall_text: str = ""
    speed: float = 0.0
    more_text: str = ""
    across: float = 0.0
    """Where across the vessel it sits [m], if in the floor; see ``placed``."""
    by_wall: bool = False
    """Whether a pipe leaves by the wall."""

    @property
    def is_pipe(self) -> bool:
        """Whether a pipe leads the liquid away: a pipe or a standpipe."""
        return self.facing in ("pipe", "standpipe")

    @property
    def end_level(self) -> float:
        """The level of a pipe's end [m]; of anything else that of the opening."""
        return self.elevation if self.discharge is None else self.discharge


def drawn_outlets(answers: Answers, display: DisplayUnits, level: float, lit: Path | None) -> tuple[DrawnOutlet, ...]:
    """Return the outlets at a level [m]; ``lit`` is the entry that has the cursor."""
    discharge = answers.system.discharge
    rows = [row[:, [TYPICAL]] for row in discharge.coefficients]
    flows = discharge.each(np.array([level]), rows)
    return tuple(
        _drawn(answers, index, float(flows[index][0]), display, level, lit) for index in range(len(discharge.outlets))
    )


def _drawn(
    answers: Answers, index: int, flow: float, display: DisplayUnits, level: float, lit: Path | None
) -> DrawnOutlet:
    outlet, typed = answers.system.outlets[index], answers.case.outlets[index]
    side = isinstance(outlet, OrificeOutlet) and outlet.facing == "side"
    tail = _tail(answers, index, level)
    # Reach is kept room for up to the vessel's top: the picture must not shift while a level is dragged.
    free = side and tail is None
    reach = _reach(outlet.elevation, level) if free and flow > 0.0 else 0.0
    path = _path(index, typed)
    width, height = _sizes(outlet)
    pipe = outlet if isinstance(outlet, PipeOutlet) else outlet.line if isinstance(outlet, Standpipe) else None
    goes = "out" if flow > 0 else "in"
    return DrawnOutlet(
        facing=_facing(outlet),
        station=None if isinstance(typed, Weir) or typed.station is None else typed.station.value,
        elevation=outlet.elevation,
        width=width,
        height=height,
        name=outlet.name,
        size_text=_named(answers, typed) + _size_text(typed),
        flow_text=f"{display.text(abs(flow), 'flow')} {goes}" if flow else "",
        flow=flow,
        head=max(level - outlet.elevation, 0.0),
        reach=reach,
        farthest=_reach(outlet.elevation, answers.system.profile.height) if free else 0.0,
        reach_text=f"reach {display.text(reach, 'length')}" if reach > 0.0 else "",
        path=path,
        lit=lit is not None and lit[:3] == path[:3] and lit[0] == "outlets",
        discharge=None if pipe is None else pipe.discharge_elevation,
        tail=tail,
        bores=() if pipe is None else tuple(section.bore for section in pipe.sections),
        valve=isinstance(typed, Pipe) and _has_valve(typed),
        fall_text="" if pipe is None else display.text(abs(pipe.elevation - pipe.discharge_elevation), "length"),
        speed=0.0 if pipe is None else _end_speed(flow / (typed.count or 1), pipe.sections[-1].bore),
        more_text=_more_text(typed, display) if isinstance(typed, Pipe) else "",
    )


def _end_speed(flow: float, bore: float) -> float:
    return max(flow, 0.0) / (math.pi / 4.0 * bore**2)


def _facing(outlet: SystemOutlet) -> str:
    if isinstance(outlet, OrificeOutlet):
        return outlet.facing
    return "pipe" if isinstance(outlet, PipeOutlet) else "standpipe" if isinstance(outlet, Standpipe) else "weir"


def _sizes(outlet: SystemOutlet) -> tuple[float, float]:
    if isinstance(outlet, OrificeOutlet):
        return outlet.width, outlet.height
    size = outlet.size or 0.0
    return size, size


def _tail(answers: Answers, index: int, level: float) -> float | None:
    tail = answers.system.discharge.tailwaters[index]
    found = float(tail.tailwater(np.array([level]))[0]) if isinstance(tail, Receiver) else tail
    return found if math.isfinite(found) else None


def _has_valve(pipe: Pipe) -> bool:
    parts: tuple[Pipe | PipeSection, ...] = (pipe, *(pipe.sections or ()))
    named = any("valve" in (one.name or "").lower() for part in parts for one in part.fittings or ())
    return named or any(part.valve is not None for part in parts)


def _path(index: int, outlet: Outlet) -> Path:
    if isinstance(outlet, Pipe):
        return ("outlets", index, "bore")
    if isinstance(outlet, Weir):
        return ("outlets", index, "crest")
    size = "diameter" if isinstance(outlet.opening, RoundOpening) else "width"
    return ("outlets", index, "opening", size)


def _reach(elevation: float, level: float) -> float:
    head = level - elevation
    return 2.0 * JET_VELOCITY_COEFFICIENT * math.sqrt(head * elevation) if head > 0.0 and elevation > 0.0 else 0.0


def _named(answers: Answers, outlet: Outlet) -> str:
    """The name of a pipe among several, whose words may stand far from it."""
    piped = [one for one in answers.case.outlets if _is_pipe(one)]
    return f"{outlet.name}: " if len(piped) > 1 and _is_pipe(outlet) and outlet.name else ""


def _is_pipe(outlet: Outlet) -> bool:
    return isinstance(outlet, Pipe) or (isinstance(outlet, Weir) and outlet.form == "standpipe")


def _size_text(outlet: Outlet) -> str:
    size = _one_size(outlet)
    count = outlet.count or 1
    return f"{count} × {size}" if count > 1 else size


def _one_size(outlet: Outlet) -> str:
    if isinstance(outlet, Pipe):
        length = f", {outlet.length.text}" if outlet.length is not None and not _is_listed(outlet.bore) else ""
        return f"{outlet.bore.text}{length}"
    if isinstance(outlet, Weir):
        size = outlet.width or outlet.angle or outlet.diameter
        return f"{_WEIR_WORDS[outlet.form or 'rectangular']} {size.text if size else ''}".strip()
    return _opening_text(outlet)


def _is_listed(bore: Quantity) -> bool:
    """Whether a bore was typed as a listed size, whose measure its text does not tell."""
    return not bore.text.rstrip().endswith(bore.unit.split()[-1] if bore.unit else "")


def _more_text(pipe: Pipe, display: DisplayUnits) -> str:
    """The length and the bore behind a listed size; the further sections."""
    listed = _is_listed(pipe.bore)
    if pipe.sections:
        own = pipe.length.text if listed and pipe.length is not None else ""
        return " + ".join([own, *(f"{one.bore.text}, {one.length.text}" for one in pipe.sections)]).strip()
    if not listed:
        return ""
    bore = f"{pipe.bore.value * 1000.0:.2f} mm" if display.system == "metric" else display.text(pipe.bore.value, "bore")
    return f"{pipe.length.text}, {bore}" if pipe.length is not None else bore


def _opening_text(outlet: Orifice) -> str:
    opening = outlet.opening
    if isinstance(opening, RoundOpening):
        return f"Ø {opening.diameter.text}"
    return f"{opening.width.text} × {opening.height.text}"
