"""Outlets added up."""

from __future__ import annotations

from collections.abc import Sequence

import numpy as np
import numpy.typing as npt

from headfall.outlet.orifice import OrificeOutlet

Array = npt.NDArray[np.float64]

LOW, TYPICAL, HIGH = 0, 1, 2


def coefficient_rows(outlets: Sequence[OrificeOutlet]) -> Array:
    """Return the coefficients [-] as an array of shape (outlets, 3): lowest, typical, highest."""
    return np.array([outlet.coefficients for outlet in outlets])


def total_flow(
    outlets: Sequence[OrificeOutlet],
    level: Array,
    coefficients: Sequence[Array | float],
    first_scale: Array | float = 1.0,
) -> Array:
    """Return the flow of all outlets [m³/s] at each level [m].

    ``coefficients`` holds one entry an outlet; each broadcasts with ``level``. ``first_scale`` multiplies the sizes of
    the first outlet (the one that sizing changes).
    """
    total = outlets[0].flow(level, coefficients[0], first_scale)
    for outlet, coefficient in zip(outlets[1:], coefficients[1:], strict=True):
        total = total + outlet.flow(level, coefficient)
    return total


def onset_poles(
    outlets: Sequence[OrificeOutlet], coefficients: Sequence[Array], inflow: float, first_scale: Array
) -> Array:
    """Return levels just below the outlets' lower edges [m], shape (outlets, samples): poles for ``cut_span``.

    Where an outlet begins to flow, the net flow n + b·(h − edge)^p has its zeros about (n/b)^(1/p) away from the edge,
    n being what else flows there. ``coefficients`` holds one array (samples,) an outlet, ``inflow`` is [m³/s].
    """
    scales = [first_scale, *(np.ones_like(first_scale),) * (len(outlets) - 1)]
    edges = np.array(
        [
            o.elevation - (0.5 * o.height * s if o.facing == "side" else 0 * s)
            for o, s in zip(outlets, scales, strict=True)
        ]
    )
    net = np.abs(total_flow(outlets, edges, coefficients, first_scale) - inflow)
    rows = zip(outlets, net, coefficients, scales, strict=True)
    onsets = [outlet.onset(flow, coefficient, scale) for outlet, flow, coefficient, scale in rows]
    return np.asarray(edges - np.array(onsets), dtype=float)


def flow_breakpoints(outlets: Sequence[OrificeOutlet], first_scale: float = 1.0) -> list[float]:
    """Return the levels [m] at which the total flow is not smooth."""
    levels = list(outlets[0].edges(first_scale))
    for outlet in outlets[1:]:
        levels.extend(outlet.edges(1.0))
    return levels
