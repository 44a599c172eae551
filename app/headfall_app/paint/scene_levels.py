"""The levels that are drawn as lines through section, staff and plot."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass

import numpy as np

from headfall.answers import Answers
from headfall.case.model import Path
from headfall.quantities import DisplayUnits
from headfall.quantities.display import NO_BREAK


@dataclass(frozen=True, slots=True)
class LevelMark:
    """One level line and its flag.

    ``key`` is one of overflow, start, now, settles, stop, outlet; ``path`` is the entry that a drag of the flag
    changes, None where the flag only shows. ``second`` tells the level in another form beside: its height where
    ``text`` is no height, else what was typed where that is no height.
    """

    key: str
    name: str
    level: float
    text: str
    path: Path | None = None
    second: str = ""


def level_marks(answers: Answers, display: DisplayUnits, now: float | None) -> tuple[LevelMark, ...]:
    """Return the lines to draw, highest first; ``now`` is the level at the time cursor [m], None without one."""
    system = answers.system

    def mark(key: str, name: str, level: float, path: Path | None = None) -> LevelMark:
        second = _second(answers, display, key if path else "", level)
        return LevelMark(key, name, level, _shown(answers, display, level), path, second)

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


def _shown(answers: Answers, display: DisplayUnits, level: float) -> str:
    """A level as the case wants it shown: a height, a part of the capacity, a volume, a height on the site datum."""
    system, how = answers.system, answers.case.levels.shown
    if how == "site" and system.site_datum is not None:
        return display.number(level + system.site_datum, "level")
    if how in ("percent", "volume"):
        volume = float(system.profile.volume(np.array(level)))
        if how == "volume":
            return display.text(volume, "volume")
        return f"{100.0 * volume / system.profile.capacity:.1f}{NO_BREAK}%"
    return display.number(level, "level")


def _second(answers: Answers, display: DisplayUnits, key: str, level: float) -> str:
    """The height beside another form; beside a height the text of a level that was typed in another form."""
    if _shown(answers, display, level) != display.number(level, "level"):
        return display.text(level, "level")
    typed = getattr(answers.case.levels, key) if key else None
    return "" if typed is None or typed.dimension == "length" else str(typed.text)


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
