"""Plan area and volume kept as short polynomials, where both ends of a stretch may hold square roots."""

from __future__ import annotations

from collections.abc import Callable, Sequence
from dataclasses import dataclass
from functools import lru_cache

import numpy as np
import numpy.typing as npt

from headfall.vessel import series
from headfall.vessel.profile import Array

Numbers = npt.NDArray[np.intp]

_RESOLVED = 1e-12
_MOST_PIECES = 600
_ROUNDS = 60
_GUESS_PLACES = np.linspace(-1.0, 1.0, 4)


@dataclass(frozen=True)
class PlanCurve:
    """Pieces that follow one another from level 0 up.

    Within each, h = origin + span·s², place = (s − middle)/half runs −1 … 1 upward. Kept are A/h^p and V/h^(p+1),
    p the piece's ``power``, which neither vanish nor grow without bound, so a film of liquid keeps its digits.
    ``area_powers`` and ``volume_powers`` have shape (pieces, TERMS), the rest (pieces,).
    """

    lower: Array
    origin: Array
    span: Array
    middle: Array
    half: Array
    power: Array
    area_powers: Array
    volume_powers: Array

    def piece(self, level: Array) -> Numbers:
        """Return for each level [m], any shape, the number of its piece."""
        return np.asarray(np.maximum(np.searchsorted(self.lower, level, side="right") - 1, 0))

    def plan_area(self, level: Array, piece: Numbers) -> Array:
        """Return the plan area [m²] at each level [m] of the piece given, both any shape."""
        return self._evaluate(self.area_powers, level, piece) * level ** self.power[piece]

    def volume(self, level: Array, piece: Numbers) -> Array:
        """Return the volume [m³] below each level [m] of the piece given, both any shape."""
        return self._evaluate(self.volume_powers, level, piece) * level ** (self.power[piece] + 1)

    def joined(self, other: PlanCurve) -> PlanCurve:
        """Return the pieces of this curve and then those of another."""
        pairs = zip(vars(self).values(), vars(other).values(), strict=True)
        return PlanCurve(*(np.concatenate(pair) for pair in pairs))

    def taken(self, pieces: slice) -> PlanCurve:
        """Return some of the pieces."""
        return PlanCurve(*(value[pieces] for value in vars(self).values()))

    def samples(self) -> tuple[Array, Array]:
        """Return levels [m] and volumes [m³], rising, from which to guess a level."""
        s = (self.middle[:, np.newaxis] + self.half[:, np.newaxis] * _GUESS_PLACES[1:]).ravel()
        piece = np.repeat(np.arange(len(self.lower)), len(_GUESS_PLACES) - 1)
        levels = self.origin[piece] + self.span[piece] * s**2
        return levels, self.volume(levels, piece)

    def _evaluate(self, powers: Array, level: Array, piece: Numbers) -> Array:
        s = np.sqrt(np.maximum((level - self.origin[piece]) / self.span[piece], 0.0))
        place = np.clip((s - self.middle[piece]) / self.half[piece], -1.0, 1.0)
        rows = powers[piece]
        total = rows[..., -1]
        for k in range(series.TERMS - 2, -1, -1):
            total = total * place + rows[..., k]
        return np.asarray(total)


def fitted(area: Callable[[Array], Array], turns: Sequence[float], power: float, top: float) -> PlanCurve:
    """Return the curve of a plan area [m²] over levels [m] from nil to ``top`` [m] at least.

    The area is not smooth at ``turns`` [m], which rise from nil to the top or above it; ``power`` [1] is that of the
    level with which the area grows from nil. A stretch between two turns is halved, so that a square root stands at
    one end of a piece only, then halved further until it is resolved. Common practice.
    """
    pieces, areas = _resolved(area, turns, power, top)
    origin, span, first, last = pieces
    middle, half = (first + last) / 2, (last - first) / 2
    s = middle[:, np.newaxis] + half[:, np.newaxis] * series.NODES
    levels = origin[:, np.newaxis] + span[:, np.newaxis] * s**2
    densities = areas / levels**power
    matrix, total = _integration()
    rates = areas * 2 * s * (span * half)[:, np.newaxis]
    gained = rates @ total
    film = _film_integration(power) @ densities[0]
    gained[0] = film[-1] * (span[0] * last[0] ** 2) ** (power + 1)
    held = np.concatenate(([0.0], np.cumsum(gained)[:-1]))
    volumes = (held[:, np.newaxis] + rates @ matrix.T) / levels ** (power + 1)
    volumes[0] = film[:-1]
    return PlanCurve(
        origin + span * first**2,
        origin,
        span,
        middle,
        half,
        np.full_like(origin, power),
        series.powers(densities.T).T.copy(),
        series.powers(volumes.T).T.copy(),
    )


def _resolved(area: Callable[[Array], Array], turns: Sequence[float], power: float, top: float) -> tuple[Array, Array]:
    # Pieces (origin, span, s at the lower end, s at the upper end), shape (4, pieces), and their samples, sorted.
    edges = np.asarray(turns)
    half = np.diff(edges) / 2
    ones, nils = np.ones_like(half), np.zeros_like(half)
    up, down = np.array((edges[:-1], half, nils, ones)), np.array((edges[1:], -half, ones, nils))
    waiting = np.concatenate((up, down), axis=1)
    kept, samples = [], []
    count = 0
    for _ in range(_ROUNDS):
        waiting = waiting[:, waiting[0] + waiting[1] * waiting[2] ** 2 <= top]
        origin, span, first, last = waiting[..., np.newaxis]
        s = (first + last) / 2 + (last - first) / 2 * series.NODES
        levels = origin + span * s**2
        areas = area(levels)
        film = (waiting[0] == 0) & (waiting[2] == 0)
        rough = _unresolved(areas / levels**power) > _RESOLVED
        rough |= ~film & (_unresolved(areas * s) > _RESOLVED)
        if count + 2 * len(film) > _MOST_PIECES:
            rough[:] = False
        kept.append(waiting[:, ~rough])
        samples.append(areas[~rough])
        count += int(np.sum(~rough))
        waiting = waiting[:, rough]
        if not waiting.size:
            break
        centre = (waiting[2] + waiting[3]) / 2
        waiting = np.concatenate(
            (
                np.array((waiting[0], waiting[1], waiting[2], centre)),
                np.array((waiting[0], waiting[1], centre, waiting[3])),
            ),
            axis=1,
        )
    pieces = np.concatenate(kept, axis=1)
    order = np.argsort(pieces[0] + pieces[1] * pieces[2] ** 2)
    return pieces[:, order], np.concatenate(samples)[order]


def _unresolved(samples: Array) -> Array:
    # What each row leaves unresolved, as a share of its largest: its last two coefficients.
    tail = samples @ _tail().T
    return np.asarray(np.abs(tail).sum(axis=-1) / np.maximum(np.abs(samples).max(axis=-1), 1e-300))


@lru_cache(maxsize=1)
def _tail() -> Array:
    degrees = np.arange(series.TERMS - 2, series.TERMS)[:, np.newaxis]
    return np.asarray(np.cos(degrees * np.arccos(series.NODES)) * (2 / series.TERMS))


@lru_cache(maxsize=1)
def _integration() -> tuple[Array, Array]:
    # From samples at the nodes to their integral from −1 to each node, and to 1.
    chebyshev = np.polynomial.chebyshev
    to_series = np.linalg.inv(chebyshev.chebvander(series.NODES, series.TERMS - 1))
    integrals = np.array([chebyshev.chebint(row, lbnd=-1) for row in np.eye(series.TERMS)]).T
    ends = np.append(series.NODES, 1.0)
    both = chebyshev.chebvander(ends, series.TERMS) @ integrals @ to_series
    return both[:-1], both[-1]


@lru_cache(maxsize=8)
def _film_integration(power: float) -> Array:
    # From A/h^p at the nodes of a piece that starts at nil to V/h^(p+1) at the nodes and at its end:
    # 2·∫ u^(2p+1)·q(s·u) du over 0 … 1.
    chebyshev = np.polynomial.chebyshev
    points, weights = np.polynomial.legendre.leggauss(series.TERMS)
    u, share = (1 + points) / 2, weights * ((1 + points) / 2) ** (2 * power + 1)
    s = (1 + np.append(series.NODES, 1.0)) / 2
    values = chebyshev.chebvander(2 * s[:, np.newaxis] * u - 1, series.TERMS - 1)
    to_series = np.linalg.inv(chebyshev.chebvander(series.NODES, series.TERMS - 1))
    return np.asarray(np.tensordot(values, share, axes=(1, 0)) @ to_series)
