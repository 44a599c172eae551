"""The ends a vessel may have, made from typed sizes."""

from __future__ import annotations

from headfall.vessel.conical_end import ConicalEnd
from headfall.vessel.cut_conical_end import CutConicalEnd
from headfall.vessel.ellipsoidal_end import EllipsoidalEnd
from headfall.vessel.end import End
from headfall.vessel.lying_torispherical import rim_angle
from headfall.vessel.sizes import ImpossibleShapeError, require_not_negative, require_positive
from headfall.vessel.torispherical_end import TorisphericalEnd


def flat() -> End:
    """Return a flat end."""
    return End()


def cone(depth: float, cut: float = 0.0) -> End:
    """Return a conical end of the depth [m], to its point or to where its diameter is ``cut`` [m] (a floor only).

    Raises ``ImpossibleShapeError`` for a depth that is not above nil or a negative cut.
    """
    require_positive("depth of the conical end", depth)
    require_not_negative("cut of the conical end", cut)
    return ConicalEnd(depth) if cut == 0 else CutConicalEnd(depth, cut=cut)


def ellipsoidal(diameter: float, ratio: float = 2.0) -> EllipsoidalEnd:
    """Return half an ellipsoid on the diameter [m]; ``ratio`` is the diameter over twice the depth.

    Raises ``ImpossibleShapeError`` for a diameter or ratio that is not above nil.
    """
    require_positive("diameter of the ellipsoidal end", diameter)
    require_positive("ratio of the ellipsoidal end", ratio)
    return EllipsoidalEnd(diameter / (2 * ratio), diameter)


def hemispherical(diameter: float) -> EllipsoidalEnd:
    """Return half a sphere on the diameter [m].

    Raises ``ImpossibleShapeError`` for a diameter that is not above nil.
    """
    require_positive("diameter of the hemispherical end", diameter)
    return EllipsoidalEnd(diameter / 2, diameter)


def torispherical(diameter: float, crown_ratio: float = 1.0, knuckle_ratio: float = 0.06) -> End:
    """Return a torispherical end on the diameter [m]; both radii as shares of the inside diameter.

    A crown of half the diameter, or a knuckle of half the diameter, is a hemisphere and is returned as one.

    Raises ``ImpossibleShapeError`` where crown_ratio is below 0.5 or knuckle_ratio is not above nil and up to the
    lesser of 0.5 and crown_ratio.
    """
    require_positive("diameter of the torispherical end", diameter)
    require_positive("crown ratio of the torispherical end", crown_ratio)
    require_positive("knuckle ratio of the torispherical end", knuckle_ratio)
    if crown_ratio < 0.5:
        raise ImpossibleShapeError("crown ratio of the torispherical end", crown_ratio, "0.5 or more")
    if knuckle_ratio > 0.5:
        raise ImpossibleShapeError("knuckle ratio of the torispherical end", knuckle_ratio, "0.5 or less")
    if crown_ratio == 0.5 or knuckle_ratio == 0.5:
        return hemispherical(diameter)
    _, cosine = rim_angle(crown_ratio, knuckle_ratio)
    depth = diameter * (crown_ratio - (crown_ratio - knuckle_ratio) * cosine)
    return TorisphericalEnd(depth, diameter, crown_ratio, knuckle_ratio)


__all__ = [
    "ConicalEnd",
    "CutConicalEnd",
    "EllipsoidalEnd",
    "End",
    "TorisphericalEnd",
    "cone",
    "ellipsoidal",
    "flat",
    "hemispherical",
    "torispherical",
]
