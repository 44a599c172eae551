"""Draw-down and filling at a steady inflow: time as a quadrature over level, source ``volume_balance``."""

from __future__ import annotations

from collections.abc import Callable

import numpy as np
import numpy.typing as npt

from headfall.solve.span import nodes, running_rule

Array = npt.NDArray[np.float64]

AreaOfLevel = Callable[[Array], Array]
FlowOfLevel = Callable[[Array], Array]

_AIMED_AT, _MOST = 300, 2000


def run_time(edges: Array, plan_area: AreaOfLevel, net_outflow: FlowOfLevel) -> Array:
    """Return the time [s] along each span of levels, t = ∫ A(h) / (Q_in − Q_out(h)) dh.

    ``edges`` (…, pieces + 1) [m] come from ``cut_span``; ``plan_area`` [m²] and ``net_outflow`` [m³/s] (out less in)
    take levels of shape (…, pieces, nodes). The net flow must keep its sign over the span and drive the level from the
    first edge to the last; the time is then positive. Right to 1e-10 and better up to 1e-6 of the span from an
    equilibrium, whose level must be among the poles given to ``cut_span``.
    """
    level, weight = nodes(edges)
    return np.asarray(-(weight * plan_area(level) / net_outflow(level)).sum(axis=(-2, -1)), dtype=float)


def run_curve(edges: Array, plan_area: AreaOfLevel, net_outflow: FlowOfLevel) -> tuple[Array, Array]:
    """Return (times [s], levels [m]) of shape (…, points) along each span, every piece's ends among them.

    Between 200 and 2,000 points a span; dense where pieces are short, and so dense in time near an equilibrium.
    Arguments as for ``run_time``.
    """
    level, _ = nodes(edges)
    pieces = level.shape[-2]
    points = int(np.clip(-(-_AIMED_AT // pieces), 8, _MOST // pieces))
    rate = -plan_area(level) / net_outflow(level)
    fractions, matrix = running_rule(points)
    length = edges[..., 1:, None] - edges[..., :-1, None]
    within = (rate @ matrix.T) * length
    before = np.zeros_like(within[..., :1])
    before[..., 1:, 0] = np.cumsum(within[..., :-1, -1], axis=-1)
    levels = edges[..., :-1, None] + length * fractions
    levels[..., -1] = edges[..., 1:]
    flat = (*edges.shape[:-1], pieces * points)
    start = np.zeros((*edges.shape[:-1], 1))
    times = np.concatenate([start, (before + within).reshape(flat)], axis=-1)
    return times, np.concatenate([edges[..., :1], levels.reshape(flat)], axis=-1)
