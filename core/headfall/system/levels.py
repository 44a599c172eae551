"""A typed level as a height above the vessel's lowest inside point."""

from __future__ import annotations

import numpy as np

from headfall.quantities import Quantity
from headfall.vessel.profile import Profile


class LevelFault(ValueError):
    """A level that cannot be told as a height: ``found`` is what was found, ``wanted`` what would do."""

    def __init__(self, found: str, wanted: str) -> None:
        self.found, self.wanted = found, wanted
        super().__init__(f"{found}. Type {wanted}.")


def level_of(typed: Quantity, profile: Profile | None, site_datum: float | None) -> float:
    """Return the height [m] of a typed level: a height, a part of the capacity, a volume, a height on the site datum.

    ``site_datum`` [m] is where the vessel's lowest inside point stands on the site's datum. Raises LevelFault where a
    volume is more than the vessel holds, a site height lies below the vessel, or what is needed is missing.
    """
    if typed.dimension == "site":
        if site_datum is None:
            raise LevelFault(
                f"{typed.text} counts on the site datum, which is not given", "the site datum, or a height"
            )
        if typed.value < site_datum:
            raise LevelFault(f"{typed.text} lies below the vessel's lowest inside point", "a level inside the vessel")
        return typed.value - site_datum
    if typed.dimension == "length":
        return typed.value
    if profile is None:
        raise LevelFault(f"{typed.text} needs a vessel that can be worked out", "a height")
    volume = typed.value * profile.capacity if typed.dimension == "percent" else typed.value
    if volume > profile.capacity * (1 + 1e-9):
        raise LevelFault(f"{typed.text} is more than the vessel holds", "a level inside the vessel")
    return float(profile.level(np.array(volume)))
