"""What stands about the vessel: a receiving vessel, the gas above, what takes space inside; how deep it all goes."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np

from headfall.answers import Answers
from headfall.case.model import VentedHeadspace
from headfall.discharge import Receiver
from headfall.outlet.headspace import OpenHeadspace
from headfall.quantities import DisplayUnits
from headfall.vessel.profile import Outline
from headfall_app.paint.scene_outlets import DrawnOutlet


@dataclass(frozen=True, slots=True, eq=False)
class DrawnReceiver:
    """A receiving vessel: its outline, its lowest point above the datum [m], and its level on it now [m]."""

    outline: Outline
    elevation: float
    height: float
    level: float
    text: str


@dataclass(frozen=True, slots=True)
class DrawnBody:
    """Space taken inside, between two levels [m]."""

    low: float
    high: float
    text: str


@dataclass(frozen=True, slots=True)
class DrawnLid:
    """A lid on the vessel: ``vent`` is the text of its vent's bore, empty without one; ``text`` the gas's pressure."""

    vent: str
    text: str


def drawn_receiver(answers: Answers, display: DisplayUnits, level: float) -> DrawnReceiver | None:
    """Return the receiving vessel of the first outlet at a level [m] of the draining one, or None."""
    tail = answers.system.discharge.tailwaters[0]
    if not isinstance(tail, Receiver):
        return None
    now = float(tail.tailwater(np.array([level]))[0])
    now = now if np.isfinite(now) else tail.elevation
    return DrawnReceiver(
        tail.profile.outline, tail.elevation, tail.profile.height, now, f"receiving, {display.text(now, 'level')}"
    )


def drawn_bodies(answers: Answers, display: DisplayUnits) -> tuple[DrawnBody, ...]:
    """Return what takes space inside."""
    return tuple(
        DrawnBody(body.from_.value, body.to.value, f"takes {display.text(body.volume.value, 'volume')}")
        for body in answers.case.vessel.displacement or ()
    )


def drawn_lid(answers: Answers, display: DisplayUnits, time: float) -> DrawnLid | None:
    """Return the lid with the gas's gauge pressure at a time [s] of the run; None for an open headspace."""
    if isinstance(answers.system.headspace, OpenHeadspace) or answers.headspace is None:
        return None
    pressure = float(np.interp(time, answers.curve.time, answers.headspace.pressure))
    typed = answers.case.headspace
    vent = f"vent {typed.bore.text}" if isinstance(typed, VentedHeadspace) else ""
    return DrawnLid(vent, f"{display.text(pressure, 'pressure')} gauge")


def lowest_drawn(outlets: tuple[DrawnOutlet, ...], receiver: DrawnReceiver | None) -> float:
    """Return the lowest level that is drawn [m], nil or below: a pipe's end, the water outside, a receiving vessel."""
    levels = [0.0]
    for outlet in outlets:
        levels += [level for level in (outlet.discharge, outlet.tail) if level is not None]
    if receiver is not None:
        levels.append(receiver.elevation)
    return min(levels)
