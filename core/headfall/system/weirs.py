"""The weirs of a case in SI."""

from __future__ import annotations

from headfall.case import model
from headfall.case.defaults import effective
from headfall.liquids import LiquidState
from headfall.outlet.outlet import Outlet
from headfall.outlet.pipe import PipeOutlet
from headfall.outlet.pipe_sections import NamedLoss, PipeSection
from headfall.outlet.standpipe import Standpipe
from headfall.outlet.weir import Weir

_SHARP = NamedLoss("entry", 0.4, 0.5, 0.6, 160.0, 1, "idelchik_losses")
_ROUGHNESS = (0.03e-3, 0.045e-3, 0.09e-3)


def build_weir(weir: model.Weir, liquid: LiquidState, gravity: float) -> Outlet:
    """Return a weir or a standpipe in SI; ``gravity`` in m/s² [m/s²]."""
    if weir.form == "standpipe":
        return _standpipe(weir, liquid, gravity)
    return Weir(
        name=effective(weir, "name"),
        role=effective(weir, "role"),
        form=weir.form or "",
        crest=weir.crest.value,
        gravity=gravity,
        width=weir.width.value if weir.width else 0.0,
        angle=weir.angle.value if weir.angle else 0.0,
        channel_width=weir.channel_width.value if weir.channel_width else None,
        given=_given(weir),
        blocked=effective(weir, "blocked"),
        count=effective(weir, "count"),
    )


def _standpipe(weir: model.Weir, liquid: LiquidState, gravity: float) -> Standpipe:
    diameter = weir.diameter.value if weir.diameter else 0.0
    line = None
    if weir.discharge_elevation is not None:
        end, crest = weir.discharge_elevation.value, weir.crest.value
        rough = (weir.roughness.value,) * 3 if weir.roughness else _ROUGHNESS
        section = PipeSection(diameter, crest - end, rough, bore_name=weir.diameter.text if weir.diameter else "")
        viscosity = liquid.viscosity / liquid.density
        line = PipeOutlet(effective(weir, "name"), "drain", crest, end, (section,), _SHARP, gravity, viscosity)
    return Standpipe(
        name=effective(weir, "name"),
        role=effective(weir, "role"),
        diameter=diameter,
        crest=weir.crest.value,
        gravity=gravity,
        line=line,
        given=_given(weir),
        blocked=effective(weir, "blocked"),
        count=effective(weir, "count"),
    )


def _given(weir: model.Weir) -> tuple[float, float, float] | None:
    own = weir.coefficient
    if not isinstance(own, model.CoefficientRange):
        return None
    return float(own.low or 0.0), float(own.typical or 0.0), float(own.high or 0.0)
