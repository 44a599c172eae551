"""Which row or column each dimension line stands in."""

from __future__ import annotations

from collections.abc import Callable, Sequence
from dataclasses import dataclass

from headfall_app.paint.scene import Scene
from headfall_app.paint.scene_dimensions import SizeLine

COLUMN = 28.0
ROW = 24.0


@dataclass(frozen=True, slots=True)
class DimensionPlan:
    """Dimension lines with their column (vertical, outwards) or row (below, downwards; above, upwards)."""

    columns: tuple[tuple[SizeLine, int], ...]
    below: tuple[tuple[SizeLine, int], ...]
    above: tuple[tuple[SizeLine, int], ...]

    @staticmethod
    def _depth(placed: Sequence[tuple[SizeLine, int]]) -> int:
        return 1 + max((row for _, row in placed), default=-1)

    @property
    def column_count(self) -> int:
        """How many columns stand left of the vessel."""
        return self._depth(self.columns)

    @property
    def below_count(self) -> int:
        """How many rows lie below the vessel."""
        return self._depth(self.below)

    @property
    def above_count(self) -> int:
        """How many rows lie above the vessel."""
        return self._depth(self.above)


def plan_dimensions(scene: Scene) -> DimensionPlan:
    """Return the plan: short sizes next to the vessel, and above it only what would otherwise cross it."""
    upright = [size for size in scene.sizes if size.is_vertical]
    level = [size for size in scene.sizes if not size.is_vertical]
    over = [size for size in level if _crosses_when_below(scene, size)]
    under = [size for size in level if size not in over]
    return DimensionPlan(
        _placed(upright, lambda size: (size.start[1], size.end[1])),
        _placed(under, lambda size: (size.start[0], size.end[0])),
        _placed(over, lambda size: (size.start[0], size.end[0])),
    )


def _crosses_when_below(scene: Scene, size: SizeLine) -> bool:
    height = max(size.start[1], size.end[1])
    left, right = sorted((size.start[0], size.end[0]))
    if height < 0.75 * scene.height:
        return False
    wall = scene.outline.wall
    below = wall[wall[:, 1] < 0.7 * scene.height]
    slack = 1e-3 * max(right - left, 1e-9)
    return bool(len(below)) and (below[:, 0].min() < left - slack or below[:, 0].max() > right + slack)


def _placed(sizes: list[SizeLine], span: Callable[[SizeLine], tuple[float, float]]) -> tuple[tuple[SizeLine, int], ...]:
    taken: list[list[tuple[float, float]]] = []
    placed = []
    for size in sorted(sizes, key=lambda one: abs(span(one)[1] - span(one)[0])):
        low, high = sorted(span(size))
        slack = 1e-6 * max(high - low, 1e-9)
        row = 0
        while row < len(taken) and any(low < end - slack and high > start + slack for start, end in taken[row]):
            row += 1
        if row == len(taken):
            taken.append([])
        taken[row].append((low, high))
        placed.append((size, row))
    return tuple(placed)
