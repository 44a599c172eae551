"""Sizes a vessel cannot have, refused in a sentence."""

from __future__ import annotations

import math


class ImpossibleShapeError(ValueError):
    """No vessel has this size.

    ``place`` names the size (``drum diameter``), ``found`` is the number given, ``wanted`` says what would do.
    """

    def __init__(self, place: str, found: float, wanted: str) -> None:
        self.place = place
        self.found = found
        self.wanted = wanted
        super().__init__(f"The {place} is {found:g}; it must be {wanted}.")


def require_positive(place: str, size: float) -> None:
    """Refuse a size [m] that is nil, negative, infinite or not a number.

    Raises ``ImpossibleShapeError``.
    """
    if not (math.isfinite(size) and size > 0):
        raise ImpossibleShapeError(place, size, "a finite size above nil")


def require_not_negative(place: str, size: float) -> None:
    """Refuse a size [m] that is negative, infinite or not a number.

    Raises ``ImpossibleShapeError``.
    """
    if not (math.isfinite(size) and size >= 0):
        raise ImpossibleShapeError(place, size, "a finite size, nil or more")
