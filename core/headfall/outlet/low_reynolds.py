"""What a handbook's orifice coefficient becomes at low Reynolds numbers, Re = d·√(2gH)/ν.

Down to Re 1000 the typical coefficient stays; below, it follows 1 = 12π·C/Re + (C/C∞)², which joins the creeping limit
C = Re/(12π) (source ``sampson_1891``) to the turbulent value and lies on the low side between. The range widens: upper
end +1 % below Re 10⁵, −5 and +12 % below 10⁴ (common practice, source ``practice_low_reynolds``).
"""

from __future__ import annotations

import numpy as np

from headfall.outlet.outlet import Array

UNCORRECTED_FROM, HANDBOOK_FROM = 1e5, 1e3
_TURBULENT = 0.611
_UPPER = np.log10([1e3, 8e3, 1e4, 9e4, 1e5]), np.array([0.12, 0.12, 0.01, 0.01, 0.0])
_LOWER = np.log10([1e3, 8e3, 1e4]), np.array([0.05, 0.05, 0.0])


def creeping_closure(reynolds: Array, turbulent: float = _TURBULENT) -> Array:
    """Return the coefficient [-] that solves 1 = 12π·C/Re + (C/C∞)²; 0 at Re 0."""
    half = 6 * np.pi / np.maximum(reynolds, 1e-12)
    return np.asarray(1 / (half + np.sqrt(half * half + 1 / turbulent**2)))


def coefficient_factor(reynolds: Array, spread: Array) -> Array:
    """Return the factor [-] on the handbook's coefficient; ``spread`` is −1 at its low end, 0 and 1 on."""
    reduced = creeping_closure(np.minimum(reynolds, HANDBOOK_FROM)) / creeping_closure(np.array(HANDBOOK_FROM))
    place = np.log10(np.maximum(reynolds, 1e-300))
    more = np.maximum(spread, 0.0) * np.interp(place, *_UPPER)
    less = np.minimum(spread, 0.0) * np.interp(place, *_LOWER)
    return np.asarray(reduced * (1 + more + less))
