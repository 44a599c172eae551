"""Orifices: short openings in a wall or a floor that discharge freely."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
import numpy.typing as npt

from headfall.outlet.side_opening import rectangular_opening, round_opening

Array = npt.NDArray[np.float64]


@dataclass(frozen=True, slots=True)
class OrificeOutlet:
    """One or more alike openings that discharge freely.

    ``shape`` is ``round`` or ``rectangle``, ``facing`` is ``down`` or ``side``. A round opening has
    ``width == height ==`` its diameter [m]. ``elevation`` [m] is the centre of a side opening and the plane of a
    downward one. Coefficients refer to the opening's own area.
    """

    name: str
    shape: str
    facing: str
    width: float
    height: float
    elevation: float
    count: int
    coefficient_low: float
    coefficient_typical: float
    coefficient_high: float
    coefficient_source: str
    gravity: float

    @property
    def area(self) -> float:
        """Area of all openings together [m²]."""
        single = self.width * self.height
        return self.count * (single * np.pi / 4 if self.shape == "round" else single)

    @property
    def coefficients(self) -> tuple[float, float, float]:
        """Lowest, typical and highest discharge coefficient."""
        return self.coefficient_low, self.coefficient_typical, self.coefficient_high

    @property
    def lower_edge(self) -> float:
        """Level [m] below which nothing flows: the plane, or the lowest point of a side opening."""
        return self.edges(1.0)[0]

    @property
    def upper_edge(self) -> float:
        """Level [m] from which the opening is wholly covered."""
        return self.edges(1.0)[-1]

    def edges(self, scale: float) -> tuple[float, ...]:
        """Return the levels [m] at which the flow is not smooth, rising, with the opening's sizes times ``scale``."""
        if self.facing == "down":
            return (self.elevation,)
        half = 0.5 * self.height * scale
        return (self.elevation - half, self.elevation + half)

    @property
    def drains_to_its_edge(self) -> bool:
        """Whether the level comes down to the lower edge in finite time: only through a downward opening."""
        return self.facing == "down"

    def flow(self, level: Array, coefficient: Array | float, scale: Array | float = 1.0) -> Array:
        """Return the outflow [m³/s] at each level [m]; level, coefficient and scale broadcast.

        Downward: Q = C_d·a·√(2g·(h − plane)) (source ``torricelli_1644``). Side: the law integrated over the opening's
        height, covered or partly covered (source ``opening_integral``). Nil at and below the lower edge. Valid for
        free discharge of a liquid at high Reynolds number.
        """
        speed = np.sqrt(2 * self.gravity)
        factor = self.count * speed * np.asarray(coefficient)
        if self.facing == "down":
            head = np.maximum(np.asarray(level) - self.elevation, 0.0)
            return np.asarray(factor * (self.area / self.count) * np.square(scale) * np.sqrt(head), dtype=float)
        height = self.height * np.asarray(scale)
        depth = np.asarray(level) - (self.elevation - 0.5 * height)
        if self.shape == "round":
            return np.asarray(factor * height**2.5 * round_opening(depth / height), dtype=float)
        return np.asarray(factor * self.width * scale * rectangular_opening(depth, height), dtype=float)

    def onset(self, flow: Array, coefficient: Array | float, scale: Array | float = 1.0) -> Array:
        """Return how far above its lower edge [m] the outlet itself passes a small ``flow`` [m³/s].

        From the leading term of the flow at the edge, in the powers 1/2 (downward), 3/2 (rectangle) or 2 (round) of
        the depth. It is the width over which the outlet takes over from whatever else flows there.
        """
        unit = self.count * np.sqrt(2 * self.gravity) * np.asarray(coefficient)
        if self.facing == "down":
            depth = np.square(flow / (unit * (self.area / self.count) * np.square(scale)))
        elif self.shape == "round":
            depth = np.sqrt(flow / (unit * np.pi / 4 * np.sqrt(self.height * np.asarray(scale))))
        else:
            depth = np.cbrt(1.5 * flow / (unit * self.width * np.asarray(scale))) ** 2
        return np.asarray(depth, dtype=float)

    def head(self, level: float) -> float:
        """Return the head [m] on the plane or centre at a level [m]; never negative."""
        return max(level - self.elevation, 0.0)
