"""A span of levels, cut where the integrand is not smooth.

With a steady inflow time is a quadrature over level. The span from start to stop is cut at every breakpoint, and
graded towards singular points that lie just outside a piece: a pole (the level at which the net flow vanishes) or a
branch point (the plane of an opening just below the stop). Each piece is mapped by h = a + (b − a)·sin²θ, which makes
square-root ends smooth, and integrated in θ by a fixed Gauss–Legendre rule.
"""

from __future__ import annotations

from collections.abc import Callable, Iterable, Sequence
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

_HALVINGS, _AGREEMENT = 24, 1e-11
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


def refine_span(edges: Sequence[float], integrand: Callable[[Array], Array]) -> list[float]:
    """Return the edges [m] with pieces halved until the rule on a piece agrees with the rule on its halves.

    ``integrand`` maps levels (pieces, ``ORDER``) to values of that shape. For flows whose kinks are not all known
    beforehand: agreement to 1e-11 of the whole, or 24 halvings, which leaves a kink in a piece too short to matter.
    """
    done: list[Array] = []
    first, last = np.array(edges[:-1]), np.array(edges[1:])
    whole, settled = _over(first, last, integrand), 0.0
    for _ in range(_HALVINGS):
        middle = 0.5 * (first + last)
        lower, upper = _over(first, middle, integrand), _over(middle, last, integrand)
        parts = lower + upper
        with np.errstate(invalid="ignore"):
            off = ~(np.abs(whole - parts) <= _AGREEMENT * (settled + float(np.abs(parts).sum())))
        settled += float(np.abs(parts[~off]).sum())
        done.append(first[~off])
        if not off.any():
            first = first[:0]
            break
        first, last = np.concatenate([first[off], middle[off]]), np.concatenate([middle[off], last[off]])
        whole = np.concatenate([lower[off], upper[off]])
    found = np.sort(np.concatenate([*done, first, [edges[-1]]]))
    return [float(level) for level in (found if edges[0] < edges[-1] else found[::-1])]


def _over(first: Array, last: Array, integrand: Callable[[Array], Array]) -> Array:
    """The rule's sum over each of several pieces, (pieces,)."""
    length = (last - first)[:, None]
    return np.asarray((length * WEIGHT * integrand(first[:, None] + length * FRACTION)).sum(axis=-1), dtype=float)


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
