"""Rows of a table of a vessel: what they must be, and volumes from what was put in between two of them."""

from __future__ import annotations

import math
from collections.abc import Sequence
from itertools import pairwise

import numpy as np

from headfall.vessel.profile import Array
from headfall.vessel.sizes import ImpossibleShapeError


class ImpossibleRowError(ImpossibleShapeError):
    """No vessel has this row in its table.

    ``row`` is counted from 1; ``place`` names the column (``level``), ``found`` and ``wanted`` are as for any size.
    """

    def __init__(self, row: int, column: str, found: float, wanted: str) -> None:
        super().__init__(column, found, wanted)
        self.row = row
        self.args = (f"Row {row} of the table: the {column} is {found:g}; it must be {wanted}.",)


def checked_rows(
    column: str, levels: Sequence[float], values: Sequence[float], ledges: bool = False
) -> tuple[Array, Array]:
    """Return levels [m] and values (``column`` says of what, [m²] or [m³]) as arrays of shape (rows,).

    Raises ``ImpossibleShapeError`` where the columns differ in length or there are fewer than two rows;
    ``ImpossibleRowError`` for a number that is not finite, a first level other than nil, a level that does not rise
    (with ``ledges`` two rows may share one), or a negative value.
    """
    if len(levels) != len(values):
        raise ImpossibleShapeError(f"number of {column}s in the table", len(values), f"that of levels, {len(levels)}")
    if len(levels) < 2:
        raise ImpossibleShapeError("number of rows of the table", len(levels), "two or more")
    for row, (level, value) in enumerate(zip(levels, values, strict=True), start=1):
        if not math.isfinite(level):
            raise ImpossibleRowError(row, "level", level, "a finite number")
        if not (math.isfinite(value) and value >= 0):
            raise ImpossibleRowError(row, column, value, "a finite number, nil or more")
    if levels[0] != 0:
        raise ImpossibleRowError(1, "level", levels[0], "nil, the lowest point of the inside")
    for row, (below, level) in enumerate(pairwise(levels), start=2):
        # A ledge has two rows, its lower side and its upper side; a third would go unheard.
        ledge = level == below and ledges and not (row > 2 and levels[row - 3] == level)
        if level <= below and not ledge:
            raise ImpossibleRowError(row, "level", level, f"above that of row {row - 1}")
    return np.array(levels, dtype=float), np.array(values, dtype=float)


def volumes_from_increments(increments: Sequence[float]) -> tuple[float, ...]:
    """Return the volume [m³] up to each row from what was put in [m³] from each row to the next, shape (rows,).

    The first increment is what stands at the first row's level already; it may be nil.

    Raises ``ImpossibleRowError`` for an increment that is not finite or not above nil.
    """
    for row, increment in enumerate(increments, start=1):
        if not (math.isfinite(increment) and (increment > 0 or (increment == 0 and row == 1))):
            raise ImpossibleRowError(row, "increment", increment, "a finite number above nil")
    return tuple(float(volume) for volume in np.cumsum(increments))


def equal_circle_outline(levels: Array, areas: Array) -> Array:
    """Return the wall, shape (n, 2) [m], of round level cuts with areas [m²] at levels [m], both of shape (points,).

    A level met twice with different areas gives a level ledge; the line closes where the last area is nil.
    """
    right = np.column_stack((np.sqrt(areas / math.pi), levels))
    left = right[::-1] * (-1.0, 1.0)
    wall = np.vstack((left, right))
    moves = np.hypot(*np.diff(wall, axis=0).T) > 1e-12 * np.abs(wall).max()
    return np.asarray(wall[np.concatenate(([True], moves))])
