"""What every vessel answers."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass
from typing import Protocol

import numpy as np
import numpy.typing as npt

Array = npt.NDArray[np.float64]


@dataclass(frozen=True, slots=True)
class Dimension:
    """A dimension line of the outline: the named size runs from one point to the other.

    ``field`` is the case's own word for the size (``diameter``, ``height``, ``floor.depth``, ``heads.depth`` where
    both heads are alike, else ``heads.0.depth`` …);
    points are (across, up) [m] in the outline's own axes. ``typed`` is False for a derived size (the depth of a
    dished head), whose value the drawing prints itself.
    """

    field: str
    start: tuple[float, float]
    end: tuple[float, float]
    typed: bool = True


@dataclass(frozen=True, slots=True)
class Outline:
    """The inside wall in a vertical section, to scale, for drawing.

    ``wall`` is a polyline of shape (n, 2) [m], (across, up), from the upper left end down round the bottom to the
    upper right end; the lowest point is at up = 0. A closed vessel (drum, sphere) gives a closed line: the last point
    repeats the first. ``uniform`` is the stretch (from, to) across over which the section does not change and may be
    left out of a drawing, or None. ``tangents`` are the positions across of a drum's tangent lines (empty otherwise);
    ``joints`` are the levels [m] where a floor meets a shell. ``axis`` is ``vertical`` or ``horizontal``.
    """

    wall: Array
    closed: bool
    axis: str
    dimensions: tuple[Dimension, ...]
    uniform: tuple[float, float] | None = None
    tangents: tuple[float, ...] = ()
    joints: tuple[float, ...] = ()


class Profile(Protocol):
    """Plan area and volume of a vessel at a level above its lowest inside point.

    Levels outside 0 … height are clipped: area and volume never extrapolate.
    """

    @property
    def height(self) -> float:
        """Height of the inside from lowest point to top [m]."""

    @property
    def capacity(self) -> float:
        """Inside volume up to the top [m³]."""

    @property
    def breakpoints(self) -> Sequence[float]:
        """Levels [m] where plan area is not smooth, 0 and the top among them, rising."""

    @property
    def outline(self) -> Outline:
        """The section to draw."""

    def plan_area(self, level: Array) -> Array:
        """Return the liquid's surface [m²] at each level [m], any shape."""

    def volume(self, level: Array) -> Array:
        """Return the volume [m³] below each level [m], any shape."""

    def level(self, volume: Array) -> Array:
        """Return the level [m] that holds each volume [m³], any shape; the inverse of ``volume``."""

    def reach(self, level: float) -> tuple[float, float]:
        """Return where the wall stands left and right [m across, as in ``outline``] at a level [m]."""
