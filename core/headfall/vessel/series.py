"""A smooth quantity kept as short polynomials over pieces of its range."""

from __future__ import annotations

import math
from dataclasses import dataclass
from functools import lru_cache

import numpy as np

from headfall.vessel.profile import Array

TERMS = 14
"""Coefficients of each piece."""

NODES = np.cos(math.pi * (np.arange(TERMS) + 0.5) / TERMS)
"""Where each piece is sampled, −1 … 1: the zeros of a Chebyshev polynomial. Shape (TERMS,)."""

_TO_CHEBYSHEV = np.array([np.cos(k * np.arccos(NODES)) * (2 if k else 1) / TERMS for k in range(TERMS)])


def unresolved(samples: Array) -> float:
    """Return what samples at ``NODES`` leave unresolved, as a share [1] of the largest: the last two coefficients."""
    tail = _TO_CHEBYSHEV[-2:] @ samples
    return float(np.abs(tail).sum() / np.abs(samples).max())


@dataclass(frozen=True)
class Pieces:
    """Pieces of a range over which one quantity, or several, are kept.

    Within each piece the quantity is smooth in s, where h = origin + span·s²; ``middle`` and ``half`` are the piece's
    centre and half width in s. All have shape (pieces,); the pieces follow one another from h = 0 up.
    """

    origin: Array
    span: Array
    middle: Array
    half: Array

    def place(self, argument: Array) -> tuple[Array, Array]:
        """Return for each argument [1], any shape, its piece and its place in it, −1 … 1."""
        lower = self.origin + self.span * (self.middle - self.half) ** 2
        piece = np.maximum(np.searchsorted(lower, argument, side="right") - 1, 0)
        s = np.sqrt(np.maximum(argument - self.origin[piece], 0.0) / self.span[piece])
        return piece, np.clip((s - self.middle[piece]) / self.half[piece], -1.0, 1.0)


def powers(samples: Array) -> Array:
    """Return polynomial coefficients, shape (TERMS, pieces), from samples [any] at ``NODES``, same shape and unit."""
    return np.asarray(_chebyshev_powers() @ (_TO_CHEBYSHEV @ samples))


def evaluate(coefficients: Array, piece: Array, place: Array) -> Array:
    """Return the polynomial of each piece [its samples' unit] at each place; ``coefficients`` as from ``powers``."""
    total = coefficients[-1][piece]
    for row in coefficients[-2::-1]:
        total = total * place + row[piece]
    return np.asarray(total)


@lru_cache(maxsize=1)
def _chebyshev_powers() -> Array:
    # Column k: the powers of the k-th Chebyshev polynomial, by T(k+1) = 2x·T(k) − T(k−1).
    table = np.eye(TERMS)
    for k in range(1, TERMS - 1):
        table[1:, k + 1] = 2 * table[:-1, k]
        table[:, k + 1] -= table[:, k - 1]
    return table
