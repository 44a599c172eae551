"""The sections of a pipe run and what each loses."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np


@dataclass(frozen=True, slots=True)
class NamedLoss:
    """A loss of a section, on the velocity in its bore: ``count`` times K, K1/Re in laminar flow added.

    ``low``, ``typical`` and ``high`` [-] are K for turbulent flow; ``laminar`` is K1 [-]; ``source`` a key of the list
    of sources.
    """

    name: str
    low: float
    typical: float
    high: float
    laminar: float = 0.0
    count: int = 1
    source: str = "own_loss"


@dataclass(frozen=True, slots=True)
class PipeSection:
    """A length of pipe of one bore [m]; ``roughness`` [m] is lowest, typical, highest.

    A fixed Darcy ``friction_factor`` takes the place of the roughness. ``losses`` are those of fittings and valve.
    """

    bore: float
    length: float
    roughness: tuple[float, float, float] = (0.0, 0.0, 0.0)
    friction_factor: float | None = None
    losses: tuple[NamedLoss, ...] = ()
    bore_name: str = ""

    @property
    def area(self) -> float:
        """Area of the bore [m²]."""
        return float(np.pi / 4 * self.bore**2)

    @property
    def laminar_loss(self) -> float:
        """Sum of K1 [-]."""
        return sum(loss.count * loss.laminar for loss in self.losses)

    def loss(self, end: str) -> float:
        """Return the sum of K [-] at an end: ``low``, ``typical`` or ``high``."""
        return sum(loss.count * float(getattr(loss, end)) for loss in self.losses)


def change_of_bore(first: float, second: float) -> tuple[float, bool]:
    """Return K [-] of a sudden change from one bore [m] to the next, and whether it is on the second bore's velocity.

    Contraction 0.5·(1 − β²), enlargement (1 − β²)², both on the velocity in the smaller bore, β the ratio of bores;
    source ``borda_carnot``.
    """
    if second < first:
        return 0.5 * (1 - (second / first) ** 2), True
    return (1 - (first / second) ** 2) ** 2, False
