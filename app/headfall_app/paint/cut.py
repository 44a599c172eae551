"""Leaving out the middle of a long vessel, so that its ends can be drawn large and true."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass

import numpy as np
import numpy.typing as npt

BREAK_WIDTH = 11.0
"""Blank between the two wavy lines of a break [px]."""


@dataclass(frozen=True, slots=True)
class Across:
    """Position across [m] to position on the drawing [px]: the same scale in every stretch that is shown."""

    stretches: tuple[tuple[float, float], ...]
    left: float
    scale: float

    @property
    def knots(self) -> tuple[list[float], list[float]]:
        """The ends of the stretches [m] and where they are drawn [px]."""
        metres: list[float] = []
        pixels: list[float] = []
        at = self.left
        for start, end in self.stretches:
            metres += [start, end]
            pixels += [at, at + (end - start) * self.scale]
            at = pixels[-1] + BREAK_WIDTH
        return metres, pixels

    def x(self, across: float) -> float:
        """Return where a place is drawn [px]; places beside the vessel keep the scale."""
        metres, pixels = self.knots
        if across < metres[0]:
            return pixels[0] - (metres[0] - across) * self.scale
        if across > metres[-1]:
            return pixels[-1] + (across - metres[-1]) * self.scale
        return float(np.interp(across, metres, pixels))

    def all_x(self, across: npt.NDArray[np.float64]) -> npt.NDArray[np.float64]:
        """Return where places on the vessel are drawn [px]."""
        metres, pixels = self.knots
        return np.interp(across, metres, pixels)

    @property
    def breaks(self) -> tuple[tuple[float, float], ...]:
        """The blanks of the breaks, (left, right) [px]."""
        _, pixels = self.knots
        return tuple(zip(pixels[1:-1:2], pixels[2::2], strict=True))

    @property
    def left_out(self) -> float:
        """How much is left out [m]."""
        return sum(after[0] - before[1] for before, after in zip(self.stretches[:-1], self.stretches[1:], strict=True))

    @property
    def right(self) -> float:
        """The right end [px]."""
        return self.knots[1][-1]


def shown_stretches(
    extent: tuple[float, float], uniform: tuple[float, float], places: Sequence[float], shown: float, margin: float
) -> tuple[tuple[float, float], ...]:
    """Return the stretches to keep so that about ``shown`` [m] remains.

    Both ends and every outlet keep at least ``margin`` [m] about them; the rest is left out of the uniform stretch,
    the largest gaps first. The whole extent comes back where nothing can be left out.
    """
    kept = [[extent[0], uniform[0] + margin], [uniform[1] - margin, extent[1]]]
    kept += [[place - margin, place + margin] for place in places if uniform[0] <= place <= uniform[1]]
    merged: list[list[float]] = []
    for start, end in sorted(kept):
        if merged and start <= merged[-1][1]:
            merged[-1][1] = max(merged[-1][1], end)
        else:
            merged.append([start, end])
    spare = shown - sum(end - start for start, end in merged)
    if spare <= 0.0:
        return (extent,)
    gaps = sorted(range(len(merged) - 1), key=lambda index: merged[index + 1][0] - merged[index][1])
    left = len(gaps)
    for index in gaps:
        gap = merged[index + 1][0] - merged[index][1]
        share = min(gap, spare / left if gap > spare or left == 1 else gap)
        merged[index][1] += 0.5 * share
        merged[index + 1][0] -= 0.5 * share
        spare -= share
        left -= 1
    whole: list[tuple[float, float]] = []
    for start, end in merged:
        if whole and start - whole[-1][1] < 1e-9:
            whole[-1] = (whole[-1][0], end)
        else:
            whole.append((start, end))
    return tuple(whole)
