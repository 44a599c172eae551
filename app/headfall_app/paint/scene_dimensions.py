"""The vessel's dimension lines with their texts."""

from __future__ import annotations

import math
from dataclasses import dataclass
from typing import Any

from headfall.case.model import Case, Path
from headfall.quantities import DisplayUnits, Quantity
from headfall.vessel.profile import Outline


@dataclass(frozen=True, slots=True)
class SizeLine:
    """One dimension line from ``start`` to ``end``, (across, up) [m]; ``path`` is its entry, None for a derived one."""

    start: tuple[float, float]
    end: tuple[float, float]
    text: str
    path: Path | None
    lit: bool

    @property
    def is_vertical(self) -> bool:
        """Whether it measures a height."""
        return abs(self.end[1] - self.start[1]) > abs(self.end[0] - self.start[0])


def size_lines(case: Case, outline: Outline, display: DisplayUnits, lit: Path | None) -> tuple[SizeLine, ...]:
    """Return the vessel's dimension lines; a typed size shows its text as it was typed, a derived one its value."""
    lines = []
    for dimension in outline.dimensions:
        words = dimension.field.split(".")
        path: Path = ("vessel", *(int(word) if word.isdigit() else word for word in words))
        typed = _typed(case, path) if dimension.typed else None
        if typed is None:
            length = math.dist(dimension.start, dimension.end)
            lines.append(SizeLine(dimension.start, dimension.end, display.text(length, "length"), None, False))
        else:
            lines.append(SizeLine(dimension.start, dimension.end, typed.text, path, lit == path))
    return _once(lines)


def _once(lines: list[SizeLine]) -> tuple[SizeLine, ...]:
    """Leave out a size that says the same again: of a cylinder on its cone, or of a second head that is alike."""
    kept: dict[object, SizeLine] = {}
    for line in lines:
        key: object = line
        if line.path is None:
            key = line.text, line.is_vertical
        elif not line.is_vertical:
            key = line.text, line.start[0], line.end[0]
        if key not in kept or line.lit:
            kept[key] = line
    return tuple(kept.values())


def _member(value: Any, part: str | int) -> Any:
    if isinstance(part, int):
        return value[part] if isinstance(value, tuple) and part < len(value) else None
    return getattr(value, part, None)


def _typed(case: Case, path: Path) -> Quantity | None:
    value: Any = case
    for part in path:
        value = _member(value, part)
    return value if isinstance(value, Quantity) else None
