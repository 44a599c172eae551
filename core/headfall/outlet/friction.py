"""Darcy's friction factor of a full pipe against the Reynolds number and the relative roughness."""

from __future__ import annotations

import numpy as np

from headfall.outlet.outlet import Array

LAMINAR_UP_TO, TURBULENT_FROM = 2100.0, 4000.0
"""Reynolds numbers between which it is not determined how the flow runs."""
EARLIEST, LATEST = 2300.0, 3800.0
"""Where turbulence is complete at the earliest, and where it sets in at the latest, within those."""
_NEWTON_STEPS = 3
_LN10 = float(np.log(10.0))


def laminar(reynolds: Array) -> Array:
    """Return the friction factor [-] of laminar flow, 64/Re (source ``hagen_poiseuille``)."""
    return np.asarray(64.0 / np.asarray(reynolds))


def colebrook(reynolds: Array, relative_roughness: Array | float) -> Array:
    """Return the friction factor [-] of turbulent flow, right to 1e-12 of itself.

    1/√f = −2·log₁₀(ε/(3.7·d) + 2.51/(Re·√f)), source ``colebrook_1939``, valid from Re 4000; ``relative_roughness`` is
    ε/d [-]. An explicit approximation (source ``haaland_1983``) and Newton's rule on 1/√f.
    """
    rough, slope = np.asarray(relative_roughness) / 3.7, 2.51 / np.asarray(reynolds)
    x = -1.8 * np.log10(rough**1.11 + 2.7490 * slope)
    for _ in range(_NEWTON_STEPS):
        inner = rough + slope * x
        x = x - (x + (2 / _LN10) * np.log(inner)) / (1 + (2 / _LN10) * slope / inner)
    return np.asarray(1 / (x * x))


def turbulent_share(reynolds: Array, transition: Array | float = 0.0) -> Array:
    """Return how far the flow counts as turbulent at each Reynolds number [-], 0 up to 1 [-].

    ``transition`` from −1 to 1: at 0 the share rises smoothly, in ln Re, from Re 2100 to 4000; at −1 (turbulent as soon
    as possible) from 2100 to 2300, at 1 (laminar as long as possible) from 3800 to 4000.
    """
    first = LAMINAR_UP_TO + np.maximum(transition, 0.0) * (LATEST - LAMINAR_UP_TO)
    last = TURBULENT_FROM + np.minimum(transition, 0.0) * (TURBULENT_FROM - EARLIEST)
    share = np.clip(np.log(reynolds / first) / np.log(last / first), 0.0, 1.0)
    return np.asarray(share * share * (3 - 2 * share))


def friction_factor(reynolds: Array, relative_roughness: Array | float, transition: Array | float = 0.0) -> Array:
    """Return the friction factor [-]: 64/Re up to Re 2100, Colebrook's from 4000, their geometric blend between.

    What happens between is not determined; ``transition`` (see ``turbulent_share``) gives the two bounds at −1 and 1.
    """
    return blended_factor(np.asarray(reynolds), relative_roughness, plain_share(np.asarray(reynolds), transition))


def plain_share(reynolds: Array, transition: Array | float) -> Array | float:
    """Return the turbulent share [-] at each Reynolds number [-]; the plain number 0 or 1 where it is that at all."""
    if reynolds.size == 0 or reynolds.min() >= TURBULENT_FROM:
        return 1.0
    if reynolds.max() <= LAMINAR_UP_TO:
        return 0.0
    return turbulent_share(reynolds, transition)


def blended_factor(reynolds: Array, relative_roughness: Array | float, share: Array | float) -> Array:
    """Return the friction factor [-] at a turbulent share: the geometric blend of 64/Re and Colebrook's."""
    if isinstance(share, float):
        return colebrook(reynolds, relative_roughness) if share else laminar(reynolds)
    turbulent = colebrook(np.maximum(reynolds, 0.5 * LAMINAR_UP_TO), relative_roughness)
    return np.asarray(laminar(reynolds) ** (1 - share) * turbulent**share)
