"""What the gas above the liquid and the liquid outside do to the outlets, with the numbers put in."""

from __future__ import annotations

import numpy as np

from headfall.answers import Answers
from headfall.discharge import Receiver
from headfall.outlet.headspace import ClosedHeadspace, PressurisedHeadspace, VentedHeadspace
from headfall.outlet.outlet import TYPICAL, Conditions
from headfall.sheet.citations import Citations
from headfall.sheet.marks import lowered, raised
from headfall.sheet.numbers import figures, metres


def conditions_at(answers: Answers, level: float) -> list[Conditions]:
    """Return what acts on each outlet at a level [m], typical coefficients."""
    discharge = answers.system.discharge
    rows = [row[:, [TYPICAL]] for row in discharge.coefficients]
    here = np.array([level])
    pressure = float(np.ravel(discharge.pressure_head(here, rows))[0])
    found = []
    for tail in discharge.tailwaters:
        outside = float(tail.tailwater(here)[0]) if isinstance(tail, Receiver) else tail
        found.append(Conditions(pressure, outside))
    return found


def headspace_lines(answers: Answers, cite: Citations) -> list[str]:
    """Return the lines for a headspace that is not open, and for a receiving vessel."""
    system, run = answers.system, answers.headspace
    space, source = system.headspace, cite("gas_over_liquid") if run is not None else ""
    lines = []
    if isinstance(space, PressurisedHeadspace):
        density = system.liquid.density
        pressure = space.pressure_head * density * system.gravity
        lines.append(
            f"Headspace {source}: p/(ρ·g) = {figures(pressure, 5)} / ({figures(density, 5)} · {system.gravity:g}) = "
            f"{metres(space.pressure_head)} m, added to every head"
        )
    elif isinstance(space, ClosedHeadspace) and run is not None:
        first, room = figures(space.first_volume, 4), figures(float(space.gas_volume(np.array(run.lowest_level))), 4)
        outside = figures(system.pressure / 1000, 5)
        lines.append(
            f"Closed headspace {source}: p·V{raised('n')} = const, n = 1; from {first} to {room} m³ of gas at "
            f"{metres(run.lowest_level)} m the pressure falls to {outside} · {first} / {room} − {outside} = "
            f"{figures(run.lowest / 1000, 4)} kPa gauge; with n = 1.4, {figures(run.lowest_if_fast / 1000, 4)} kPa"
        )
    elif isinstance(space, VentedHeadspace) and run is not None:
        air, flow = figures(space.air_density, 4), figures(run.largest_air_flow, 4)
        speed = run.largest_air_flow / (space.coefficient * space.area)
        lines.append(
            f"Vent {source}: Δp = (ρ{lowered('air')}/2)·(Q/(C·a))² = ({air}/2) · ({flow} / "
            f"({figures(space.coefficient, 3)} · {figures(space.area, 4)}))² = "
            f"{figures(space.air_density / 2 * speed**2, 4)} Pa at the largest flow, taken from every head"
        )
    tail = system.discharge.tailwaters[0]
    if isinstance(tail, Receiver) and answers.receiver_level is not None:
        lines.append(
            f"Receiving vessel: what leaves the one is in the other; at the start it stands at "
            f"{metres(float(tail.tailwater(np.array([system.start]))[0]))} m, "
            f"at the end at {metres(answers.receiver_level)} m"
        )
    return lines
