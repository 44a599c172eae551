"""The pipes of a case in SI."""

from __future__ import annotations

from headfall.case import model
from headfall.case.defaults import effective
from headfall.liquids import LiquidState
from headfall.outlet.handbook_losses import entry_loss, fitting, material_roughness
from headfall.outlet.pipe import PipeOutlet
from headfall.outlet.pipe_sections import NamedLoss, PipeSection
from headfall.outlet.valve import kv_from_cv, opened, valve_loss

_USUAL_MATERIAL = "commercial steel"
OWN_LOSS = "own_loss"


def build_pipe(pipe: model.Pipe, elevation: float, liquid: LiquidState, gravity: float) -> PipeOutlet:
    """Return a pipe run in SI; ``elevation`` [m] is that of its inlet."""
    end = pipe.discharge_elevation
    sections: tuple[model.Pipe | model.PipeSection, ...] = (pipe, *(pipe.sections or ()))
    return PipeOutlet(
        name=effective(pipe, "name"),
        role=effective(pipe, "role"),
        elevation=elevation,
        discharge_elevation=elevation if end is None else end.value,
        sections=tuple(_section(section, pipe) for section in sections),
        entry=_entry(pipe),
        gravity=gravity,
        viscosity=liquid.viscosity / liquid.density,
        blocked=effective(pipe, "blocked"),
        count=effective(pipe, "count"),
    )


def _entry(pipe: model.Pipe) -> NamedLoss:
    if pipe.entry_loss is not None:
        low, typical, high = _range(pipe.entry_loss)
        return NamedLoss("entry", low, typical, high, 0.0, 1, OWN_LOSS)
    radius = pipe.edge_radius.value if pipe.edge_radius else 0.0
    found = entry_loss(effective(pipe, "entry"), pipe.bore.value, radius)
    return NamedLoss("entry", found.low, found.typical, found.high, found.laminar, 1, found.source)


def _section(section: model.Pipe | model.PipeSection, pipe: model.Pipe) -> PipeSection:
    losses = [_fitting(typed) for typed in section.fittings or ()]
    if section.valve is not None:
        losses.append(_valve(section.valve, section.bore.value))
    return PipeSection(
        bore=section.bore.value,
        length=section.length.value if section.length is not None else 0.0,
        roughness=_roughness(section, pipe),
        friction_factor=section.friction_factor,
        losses=tuple(losses),
        bore_name=section.bore.text,
    )


def _roughness(section: model.Pipe | model.PipeSection, pipe: model.Pipe) -> tuple[float, float, float]:
    if section.roughness is not None:
        value = section.roughness.value
        return value, value, value
    found = material_roughness(section.material or pipe.material or _USUAL_MATERIAL)
    return found or (0.0, 0.0, 0.0)


def _fitting(typed: model.Fitting) -> NamedLoss:
    """A fitting: its own loss where one is typed, the handbook's for its name else."""
    known = fitting(typed.name or "")
    laminar = typed.laminar_loss
    if laminar is None:
        laminar = known.laminar if known is not None and typed.loss is None else 0.0
    count = effective(typed, "count")
    if typed.loss is not None or known is None:
        low, typical, high = _range(typed.loss if typed.loss is not None else 0.0)
        return NamedLoss(typed.name or "", low, typical, high, laminar, count, OWN_LOSS)
    return NamedLoss(known.name, known.low, known.typical, known.high, laminar, count, known.source)


def _range(loss: float | model.LossRange) -> tuple[float, float, float]:
    if isinstance(loss, model.LossRange):
        return float(loss.low or 0.0), float(loss.typical or 0.0), float(loss.high or 0.0)
    return loss, loss, loss


def _valve(valve: model.Valve, bore: float) -> NamedLoss:
    full = valve.kv if valve.kv is not None else kv_from_cv(valve.cv or 0.0)
    kv = opened(full, effective(valve, "opening"), effective(valve, "characteristic"))
    loss = valve_loss(kv, bore)
    return NamedLoss("valve", loss, loss, loss, 0.0, 1, "iec_60534")
