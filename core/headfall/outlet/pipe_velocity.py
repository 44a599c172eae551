"""The velocity at which a pipe run takes a given head."""

from __future__ import annotations

from collections.abc import Callable

import numpy as np

from headfall.outlet.outlet import Array

_STEPS = 60
_NEAR = 1e-7
_STEEPEST, _FLATTEST = 40.0, 0.5


def velocity_for(
    head_loss: Callable[[Array], Array], head: Array, constant: Array, inverse: Array, gravity: float, exact: bool
) -> Array:
    """Return the velocity [m/s] at which ``head_loss`` [m] equals each head [m]; nil where the head is.

    ``head_loss`` rises with the velocity. (``constant`` + ``inverse``/v)·v²/2g is about what it is, for a first guess;
    ``exact`` says that it is just that. A secant on ln(head loss) against ln(velocity), whose slope lies between 1
    (laminar) and 2 (rough) but where the one turns into the other, kept within a bracket.
    """
    shape = np.broadcast_shapes(np.shape(head), np.shape(constant), np.shape(inverse))
    flows = np.broadcast_to(head, shape) > 0
    wanted = np.where(flows, np.broadcast_to(head, shape), 1.0)
    root = np.sqrt(inverse * inverse + 8 * gravity * constant * wanted)
    guess = 4 * gravity * wanted / (inverse + root)
    if exact:
        return np.where(flows, guess, 0.0)
    x = np.log(guess)
    target = np.log(wanted)
    low, high = np.full(shape, -np.inf), np.full(shape, np.inf)
    slope = 2 - inverse / (inverse + constant * guess)
    before_x, before = x, np.zeros(shape)
    for step in range(_STEPS):
        off = np.log(head_loss(np.exp(x))) - target
        if step:
            with np.errstate(divide="ignore", invalid="ignore"):
                secant = (off - before) / (x - before_x)
            slope = np.where(np.isfinite(secant) & (secant > _FLATTEST) & (secant < _STEEPEST), secant, slope)
        if step > 1 and float(np.max(np.abs(off))) <= _NEAR:
            # One more step of the secant, not evaluated again, squares what is left.
            x = x - off / slope
            break
        low, high = np.where(off < 0, np.maximum(low, x), low), np.where(off > 0, np.minimum(high, x), high)
        before_x, before = x, off
        proposal = x - off / slope
        inside = (proposal > low) & (proposal < high)
        with np.errstate(invalid="ignore"):
            middle = 0.5 * (low + high)
        x = np.where(off == 0, x, np.where(inside | ~np.isfinite(middle), proposal, middle))
        if np.all(np.abs(x - before_x) <= 2e-16 * np.abs(x) + 1e-16):
            break
    return np.where(flows, np.exp(x), 0.0)
