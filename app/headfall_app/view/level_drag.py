"""Moving a level of the case from the drawing, in the form it was typed in: height, volume, percent or site height."""

from __future__ import annotations

import math

import numpy as np

from headfall.case.model import Case, Path
from headfall.case.typed_quantity import read_quantity
from headfall.quantities import Quantity, parse, written
from headfall.system.levels import LevelFault, level_of
from headfall_app.document import Document
from headfall_app.paint.ticks import nice_step

_WORDS = {"start": "Move the start level", "stop": "Move the stop level", "overflow": "Move the overflow level"}


def typed_level(case: Case, key: str) -> Quantity | None:
    """Return a level as typed, None where it was left out."""
    value: Quantity | None = getattr(case.levels, key)
    return value


def unit_of(case: Case, key: str) -> str:
    """Return the unit of height a level was typed in: of a level left out that of the start, of a volume the metre."""
    typed = typed_level(case, key) or case.levels.start
    if typed.dimension not in ("length", "site"):
        return "m"
    return (typed.unit or "m").removesuffix(" site")


def scale_of(unit: str) -> float:
    """Return the size [m] of the last unit of a text quantity: of the inch in ``ft in``."""
    return parse(f"1 {unit.split()[-1]}", "length").value if unit else 1.0


def small_step(unit: str) -> float:
    """Return the step [m] of an arrow key: 1 mm, or the nearest round part of a unit that has no such."""
    scale = scale_of(unit)
    return nice_step(0.001 / scale * (1.0 - 1e-9)) * scale


class LevelDrag:
    """One drag of one level: merges into one step of undo, and can be given up."""

    def __init__(self, document: Document, key: str) -> None:
        self._document, self.key = document, key
        self.path: Path = ("levels", key)
        self._former = typed_level(document.case, key)
        self._unit = unit_of(document.case, key)
        self._gesture = f"drag {key}"
        document.end_gesture()

    def move(self, level: float, step: float) -> None:
        """Set the level [m], rounded to a step, within what the other levels allow."""
        level = min(max(round(level / step) * step, 0.0), self._highest())
        level = max(level, self._lowest())
        self._document.set(self.path, self._written(level), _WORDS[self.key], self._gesture)

    def nudge(self, count: int) -> None:
        """Move the level by so many small steps."""
        step = small_step(self._unit)
        self.move(self._present() + count * step, step)

    def finish(self) -> None:
        """Close the drag's step of undo."""
        self._document.end_gesture()

    def give_up(self) -> None:
        """Put the level back as it was typed before the drag."""
        self._document.set(self.path, self._former, _WORDS[self.key], self._gesture)
        self._document.end_gesture()

    def _written(self, level: float) -> Quantity:
        typed = self._former or self._document.case.levels.start
        answers = self._document.answers
        if answers is None or typed.dimension == "length":
            return self._as_height(level)
        system = answers.system
        if typed.dimension == "site":
            return read_quantity(f"{self._as_height(level + (system.site_datum or 0.0)).text} site", "level")
        volume = float(system.profile.volume(np.array(level)))
        if typed.dimension == "percent":
            return read_quantity(f"{100.0 * volume / system.profile.capacity:.4g} %", "level")
        return read_quantity(written(volume, typed.unit, "volume", 5).text, "level")

    def _as_height(self, level: float) -> Quantity:
        # A level is told to the millimetre, however many figures that takes.
        whole = max(abs(level) / scale_of(self._unit), 1e-12)
        step = small_step(self._unit) / scale_of(self._unit)
        digits = max(3, math.floor(math.log10(whole)) + 2 - math.floor(math.log10(step)))
        return written(level, self._unit, "length", digits)

    def _present(self) -> float:
        present = self._height(self.key)
        return self._top() if present is None else present

    def _height(self, key: str) -> float | None:
        """Return a level [m] above the lowest inside point, None where it was left out or cannot be told."""
        typed = typed_level(self._document.case, key)
        if typed is None or typed.dimension == "length":
            return None if typed is None else typed.value
        answers = self._document.answers
        if answers is None:
            return None
        try:
            return level_of(typed, answers.system.profile, answers.system.site_datum)
        except LevelFault:
            return None

    def _top(self) -> float:
        answers = self._document.answers
        return answers.system.profile.height if answers is not None else math.inf

    def _highest(self) -> float:
        overflow = None if self.key == "overflow" else self._height("overflow")
        return self._top() if overflow is None else min(overflow, self._top())

    def _lowest(self) -> float:
        if self.key != "overflow":
            return 0.0
        return max(self._height("start") or 0.0, self._height("stop") or 0.0)
