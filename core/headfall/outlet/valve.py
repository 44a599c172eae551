"""Valves by their flow coefficient, and how far they are open."""

from __future__ import annotations

import math

_BAR, _WATER = 1e5, 1000.0
_US_GALLON, _PSI = 3.785411784e-3, 6894.757293168
_RANGEABILITY = 50.0
_SHUT_BELOW = 0.03


def kv_from_cv(cv: float) -> float:
    """Return Kv [m³/h of water at 1 bar] of a Cv [US gal/min of water at 1 psi]; source ``iec_60534``."""
    return cv * _US_GALLON * 60 * math.sqrt(_BAR / _PSI)


def opened(kv: float, opening: float, characteristic: str) -> float:
    """Return the Kv [m³/h] of a valve that is partly open, nil when shut; ``opening`` is from 0 to 1.

    ``linear``: Kv·x. ``equal_percentage``: Kv·50^(x − 1), nil below an opening of 0.03. Source ``iec_60534``.
    """
    if opening <= 0:
        return 0.0
    if characteristic == "linear":
        return kv * opening
    return kv * _RANGEABILITY ** (opening - 1) if opening >= _SHUT_BELOW else 0.0


def valve_loss(kv: float, bore: float) -> float:
    """Return K [-] on the velocity in the bore [m] of a Kv [m³/h of water at 1 bar]; infinite for a shut valve.

    From its definition, Q = Kv·√(Δp/(1 bar)·1000/ρ): K = 2·a²·(10⁵/1000)/(Kv/3600)². Source ``iec_60534``.
    """
    if kv <= 0:
        return math.inf
    area = math.pi / 4 * bore**2
    return 2 * area**2 * (_BAR / _WATER) / (kv / 3600) ** 2
