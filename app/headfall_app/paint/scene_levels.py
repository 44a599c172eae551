"""The levels that are drawn as lines through section, staff and plot."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass

from headfall.answers import Answers
from headfall.case.model import Path
from headfall.quantities import DisplayUnits


@dataclass(frozen=True, slots=True)
class LevelMark:
    """One level line and its flag.

    ``key`` is one of overflow, start, now, settles, stop, outlet; ``path`` is the entry that a drag of the flag
    changes, None where the flag only shows.
    """

    key: str
    name: str
    level: float
    text: str
    path: Path | None = None


def level_marks(answers: Answers, display: DisplayUnits, now: float | None) -> tuple[LevelMark, ...]:
    """Return the lines to draw, highest first; ``now`` is the level at the time cursor [m], None without one."""
    system = answers.system

    def mark(key: str, name: str, level: float, path: Path | None = None) -> LevelMark:
        return LevelMark(key, name, level, display.number(level, "level"), path)

    found = [
        mark("overflow", "Overflow", system.overflow, ("levels", "overflow")),
        mark("start", "Start", system.start, ("levels", "start")),
        mark("stop", "Stop", system.stop, ("levels", "stop")),
    ]
    if now is not None:
        found.append(mark("now", "Now", now))
    settles = answers.equilibrium.level.typical
    flows = system.inflow > 0.0
    if settles is not None and 0.0 <= settles <= system.profile.height and (flows or settles > 1e-6):
        found.append(mark("settles", "Settles" if flows else "Rests", settles))
    found.extend(mark("outlet", name, level) for name, level in _outlet_levels(answers))
    order = {"overflow": 0, "start": 1, "now": 2, "stop": 3, "settles": 4, "outlet": 5}
    return tuple(sorted(found, key=lambda one: (-one.level, order[one.key])))


def _outlet_levels(answers: Answers) -> Iterator[tuple[str, float]]:
    outlets = answers.system.outlets
    near = 1e-6 * answers.system.profile.height
    seen: list[float] = []
    for outlet in outlets:
        if outlet.elevation <= near or any(abs(outlet.elevation - level) <= near for level in seen):
            continue
        seen.append(outlet.elevation)
        same = [one for one in outlets if abs(one.elevation - outlet.elevation) <= near]
        if len(outlets) == 1:
            yield "Outlet", outlet.elevation
        elif len(same) > 1:
            yield "Outlets", outlet.elevation
        else:
            yield outlet.name[:1].upper() + outlet.name[1:] if outlet.name else "Outlet", outlet.elevation
