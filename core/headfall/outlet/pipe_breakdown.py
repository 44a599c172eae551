"""Where the head of a pipe run goes, section by section, typical coefficients."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np

from headfall.outlet.friction import blended_factor, plain_share
from headfall.outlet.outlet import FREE, TYPICAL, Conditions
from headfall.outlet.pipe import PipeOutlet
from headfall.outlet.pipe_sections import NamedLoss, PipeSection, change_of_bore


@dataclass(frozen=True, slots=True)
class SectionBreakdown:
    """One section at one velocity [m/s]: Reynolds number [-], friction factor [-] and losses on its own velocity [-].

    ``turbulent_share`` [-] is 1 in turbulent flow, 0 in laminar; ``change`` is the loss to the next section's bore on
    this section's velocity, nil for the last.
    """

    section: PipeSection
    velocity: float
    reynolds: float
    friction_factor: float
    turbulent_share: float
    losses: tuple[NamedLoss, ...]
    change: float

    @property
    def friction(self) -> float:
        """f·L/d [-]."""
        return self.friction_factor * self.section.length / self.section.bore

    @property
    def loss(self) -> float:
        """ΣK, K1/Re counted in [-]."""
        laminar = sum(one.count * one.laminar for one in self.losses)
        return sum(one.count * one.typical for one in self.losses) + laminar / self.reynolds


@dataclass(frozen=True, slots=True)
class PipeBreakdown:
    """A run at one level: ``head`` [m], ``flow`` [m³/s] of one of the alike runs, and the sections.

    ``kinetic`` [-] is α of a free end or the exit loss of a drowned one, on the last section's velocity.
    """

    head: float
    flow: float
    drowned: bool
    kinetic: float
    sections: tuple[SectionBreakdown, ...]


def breakdown(pipe: PipeOutlet, level: float, conditions: Conditions = FREE) -> PipeBreakdown | None:
    """Return where the head goes at a level [m]; None where nothing flows out."""
    rows = pipe.coefficients[:, [TYPICAL]]
    flow = float(pipe.flow(np.array([level]), rows, 1.0, conditions)[0]) / pipe.count
    if flow <= 0:
        return None
    found = []
    for index, section in enumerate(pipe.sections):
        velocity = flow / section.area
        reynolds = velocity * section.bore / pipe.viscosity if pipe.viscosity > 0 else 1e12
        share = float(np.asarray(plain_share(np.array([reynolds]), 0.0)).reshape(-1)[0])
        factor = section.friction_factor
        if factor is None:
            rough = section.roughness[TYPICAL] / section.bore
            plain: float | np.ndarray = share if share in (0.0, 1.0) else np.array([share])
            factor = float(np.asarray(blended_factor(np.array([reynolds]), rough, plain)).reshape(-1)[0])
        losses = section.losses if index else (_entry(pipe), *section.losses)
        found.append(SectionBreakdown(section, velocity, reynolds, factor, share, losses, _change(pipe, index)))
    drowned = float(np.max(conditions.tailwater)) > pipe.discharge_elevation
    kinetic = 1.0 if drowned or pipe.has_fixed_friction else 2.0 - found[-1].turbulent_share
    return PipeBreakdown(pipe.head(level, conditions), flow, drowned, kinetic, tuple(found))


def _entry(pipe: PipeOutlet) -> NamedLoss:
    """The entry as it counts, a blocked part of it included."""
    typical = float(pipe.coefficients[0, TYPICAL])
    return NamedLoss(pipe.entry.name, typical, typical, typical, pipe.entry.laminar, 1, pipe.entry.source)


def _change(pipe: PipeOutlet, index: int) -> float:
    if index + 1 == len(pipe.sections):
        return 0.0
    here, following = pipe.sections[index], pipe.sections[index + 1]
    loss, on_next = change_of_bore(here.bore, following.bore)
    return loss * (here.bore / following.bore) ** 4 if on_next else loss
