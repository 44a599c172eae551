"""A span of levels, cut where the integrand is not smooth.

With a steady inflow time is a quadrature over level. The span from start to stop is cut at every breakpoint, and
graded towards singular points that lie just outside a piece: a pole (the level at which the net flow vanishes) or a
branch point (the plane of an opening just below the stop). Each piece is mapped by h = a + (b − a)·sin²θ, which makes
square-root ends smooth, and integrated in θ by a fixed Gauss–Legendre rule.
"""

from __future__ import annotations

from collections.abc import Iterable, Sequence
from functools import cache
from itertools import pairwise

import numpy as np
import numpy.typing as npt

Array = npt.NDArray[np.float64]

ORDER = 16
_abscissa, _gauss_weight = np.polynomial.legendre.leggauss(ORDER)
_angle = np.pi / 4 * (1 + _abscissa)
FRACTION = np.sin(_angle) ** 2
"""Where the nodes lie in a piece, 0 to 1."""
WEIGHT = np.pi / 4 * _gauss_weight * np.sin(2 * _angle)
"""Weights of the nodes; they add up to 1."""

_GROWTH = 2.0
"""A piece may be this many times as long as its distance to a singular point outside it."""


def cut_span(start: float, stop: float, breakpoints: Iterable[float], poles: Iterable[float] = ()) -> list[float]:
    """Return the edges of the pieces from ``start`` to ``stop`` (either may be the higher) [m].

    ``breakpoints`` are levels where area or flow are not smooth, inside or outside the span; ``poles`` are levels
    outside the span where the integrand grows without bound.
    """
    length = abs(stop - start)
    nearly = 1e-13 * max(abs(start), abs(stop))
    low, high = min(start, stop) + nearly, max(start, stop) - nearly
    breaks = sorted(breakpoints)
    inner = [level for level in breaks if low < level < high]
    if stop < start:
        inner.reverse()
    edges = [start, *inner, stop]
    singular = sorted([*breaks, *poles])
    pieces = [start]
    for a, b in pairwise(edges):
        pieces.extend(_graded(a, b, singular, nearly + 1e-14 * length))
    return pieces


def _graded(a: float, b: float, singular: Sequence[float], nearly: float) -> list[float]:
    """Return the edges after ``a`` of one piece, shortened where a singular point lies just outside of it."""
    low, high = min(a, b), max(a, b)
    below = [low - level for level in singular if level < low - nearly]
    above = [level - high for level in singular if level > high + nearly]
    low_end = _growing(min(below, default=np.inf), high - low)
    high_end = _growing(min(above, default=np.inf), high - low)
    cuts = [low + step for step in low_end if step <= 0.5 * (high - low)]
    cuts += [high - step for step in high_end if step < 0.5 * (high - low)]
    cuts = sorted({*cuts, high} if a < b else {*cuts, low})
    if a > b:
        cuts.reverse()
    return cuts


def _growing(distance: float, length: float) -> list[float]:
    """Return steps from an end at ``distance`` from a singular point, each piece ``_GROWTH`` distances long."""
    steps: list[float] = []
    reached = 0.0
    while _GROWTH * (distance + reached) < length - reached:
        reached += _GROWTH * (distance + reached)
        steps.append(reached)
    return steps


def align_spans(spans: Sequence[Sequence[float]]) -> Array:
    """Return several lists of edges [m] as one array (spans, edges); short lists have their longest pieces halved."""
    most = max(len(edges) for edges in spans)
    aligned = []
    for edges in spans:
        row = list(edges)
        while len(row) < most:
            longest = max(range(len(row) - 1), key=lambda index: abs(row[index + 1] - row[index]))
            row.insert(longest + 1, 0.5 * (row[longest] + row[longest + 1]))
        aligned.append(row)
    return np.array(aligned)


def nodes(edges: Array) -> tuple[Array, Array]:
    """Return levels and weights of shape (…, pieces, ORDER) for edges of shape (…, pieces + 1) [m].

    Σ weight·f(level) is ∫ f dh along the edges; a falling span gives negative weights.
    """
    first = edges[..., :-1, None]
    length = edges[..., 1:, None] - first
    return first + length * FRACTION, length * WEIGHT


@cache
def running_rule(points: int) -> tuple[Array, Array]:
    """Return (fractions, matrix) that give a running integral at ``points`` places of every piece.

    ``fractions`` [-], shape (points,), say where in the piece, the last at its end; ``matrix`` (points, ORDER) holds
    the weights: values at the nodes times length·matrix give ∫ from the piece's first edge. The integrand counts as
    the polynomial in θ through its nodes: good to about 1e-8 inside a piece; the last row is the Gauss rule itself.
    """
    ends = np.pi / 2 * np.arange(1, points + 1) / points
    local = 4 / np.pi * ends - 1
    vandermonde = np.polynomial.legendre.legvander(_abscissa, ORDER - 1)
    to_series = (vandermonde * _gauss_weight[:, None]).T * (np.arange(ORDER) + 0.5)[:, None]
    integrals = np.empty((points, ORDER))
    high_degree = np.polynomial.legendre.legvander(local, ORDER)
    integrals[:, 0] = local + 1
    for degree in range(1, ORDER):
        integrals[:, degree] = (high_degree[:, degree + 1] - high_degree[:, degree - 1]) / (2 * degree + 1)
    matrix = np.pi / 4 * (integrals @ to_series) * np.sin(2 * _angle)
    matrix[-1] = WEIGHT
    return np.sin(ends) ** 2, matrix
