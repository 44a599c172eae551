"""What is to be drawn of one case: levels, runs, sizes and ready texts, in SI and without a window system."""

from __future__ import annotations

from dataclasses import dataclass, replace

import numpy as np

from headfall.answers import Answers, Curve
from headfall.case.model import Box, Case, FlatEnd, Path, SlopedFloor, TableVessel, UprightCylinder
from headfall.outlet.orifice import OrificeOutlet
from headfall.quantities import DisplayUnits, duration
from headfall.vessel.profile import Outline
from headfall_app.paint.outline_geometry import placed
from headfall_app.paint.scene_around import (
    DrawnBody,
    DrawnLid,
    DrawnReceiver,
    drawn_bodies,
    drawn_lid,
    drawn_receiver,
    lowest_drawn,
)
from headfall_app.paint.scene_dimensions import SizeLine, size_lines
from headfall_app.paint.scene_levels import LevelMark, level_marks
from headfall_app.paint.scene_loose import LoosePart, loose_parts
from headfall_app.paint.scene_outlets import DrawnOutlet, drawn_outlets

_WIDEST_TABLE = 2.2
_WIDEST_TRUE = 6.0


@dataclass(frozen=True, slots=True)
class Arrival:
    """The end of the run in the curve: a ring at ``typical`` [s], a whisker from ``low`` to ``high``, a text."""

    level: float
    typical: float
    low: float | None
    high: float | None
    text: str
    overflows: bool
    rising: bool


@dataclass(frozen=True, slots=True, eq=False)
class Scene:
    """Everything a painter needs. Lengths [m], times [s], flows [m³/s]."""

    outline: Outline
    has_axis: bool
    tilt: float
    """How much the vessel rises a length across: of a drum with a fall."""
    banked: bool
    """Whether the vessel lies in the ground, so that what leaves by its wall passes through a bank."""
    uniform: tuple[float, float] | None
    height: float
    marks: tuple[LevelMark, ...]
    outlets: tuple[DrawnOutlet, ...]
    sizes: tuple[SizeLine, ...]
    inflow: float
    inflow_text: str
    curve: Curve
    curve_low: Curve
    curve_high: Curve
    longest: float
    surface: float
    surface_low: float
    surface_high: float
    now: float | None
    now_text: str
    arrival: Arrival | None
    remark: str
    settling: tuple[float, float] | None
    settles_at: float | None
    loose: tuple[LoosePart, ...]
    receiver: DrawnReceiver | None
    bodies: tuple[DrawnBody, ...]
    lid: DrawnLid | None
    lowest: float
    section_title: str
    shaded_text: str
    display: DisplayUnits

    @property
    def stands(self) -> bool:
        """Whether the vessel stands on the ground: a jet leaves sideways and none leaves through the floor."""
        faces = {outlet.facing for outlet in self.outlets}
        return bool(faces) and faces <= {"side", "weir"}

    @property
    def drains_down(self) -> bool:
        """Whether a jet leaves through the floor."""
        return any(outlet.facing == "down" for outlet in self.outlets)

    @property
    def notch(self) -> float | None:
        """The lowest crest in the wall [m], None where no liquid leaves over one."""
        return min((outlet.elevation for outlet in self.outlets if outlet.facing == "weir"), default=None)

    @property
    def farthest_reach(self) -> float:
        """How far from the wall a jet lands at most, from a full vessel [m]."""
        return max((outlet.farthest for outlet in self.outlets), default=0.0)


def level_at(curve: Curve, time: float) -> float:
    """Return the level [m] of a run at a time [s]; its last level after its end."""
    return float(np.interp(time, curve.time, curve.level))


def scene_of(answers: Answers, display: DisplayUnits, *, now: float | None = None, lit: Path | None = None) -> Scene:
    """Return what is to be drawn of the answers.

    ``now`` [s] is the time of the cursor, None for a page without one, which shows the vessel at the start; ``lit`` is
    the entry whose dimension is drawn in accent.
    """
    time = 0.0 if now is None else min(max(now, 0.0), float(answers.curve.time[-1]))
    typical, low, high = (level_at(run, time) for run in (answers.curve, answers.curve_low, answers.curve_high))
    share, true = _share_across(answers), answers.system.profile.outline
    outline = _squeezed(true, share)
    outlets = tuple(placed(outline, outlet) for outlet in drawn_outlets(answers, display, typical, lit))
    receiver = drawn_receiver(answers, display, typical)
    settles = answers.equilibrium.level
    return Scene(
        outline=outline,
        has_axis=answers.case.vessel.shape not in ("box", "basin", "table", "stack") and not _slopes(answers.case),
        tilt=_tilt(answers.case, outline),
        banked=answers.case.vessel.shape in ("basin", "table"),
        uniform=_uniform(answers.case, outline),
        height=answers.system.profile.height,
        marks=level_marks(answers, display, typical if now is not None else None),
        outlets=outlets,
        sizes=_squeezed_sizes(size_lines(answers.case, true, display, lit), share),
        inflow=answers.system.inflow,
        inflow_text=f"{display.text(answers.system.inflow, 'flow')} in" if answers.system.inflow > 0.0 else "",
        curve=answers.curve,
        curve_low=answers.curve_low,
        curve_high=answers.curve_high,
        longest=max(float(run.time[-1]) for run in (answers.curve, answers.curve_low, answers.curve_high)),
        surface=typical,
        surface_low=min(low, high, typical),
        surface_high=max(low, high, typical),
        now=None if now is None else time,
        now_text="" if now is None else duration(time),
        arrival=_arrival(answers),
        remark=_remark(answers, display),
        settling=_settling(answers),
        settles_at=None if answers.equilibrium.overflows else settles.typical,
        loose=loose_parts(answers, display),
        receiver=receiver,
        bodies=drawn_bodies(answers, display),
        lid=drawn_lid(answers, display, time),
        lowest=lowest_drawn(outlets, receiver),
        section_title="Section, to scale" if share == 1.0 else "Section, heights to scale",
        shaded_text=_shaded(answers),
        display=display,
    )


def _share_across(answers: Answers) -> float:
    """Return how much the section is squeezed across, 1 where it is to scale.

    A table says nothing of widths, and a wide shallow vessel would leave its levels no height; a vessel that may be
    cut is cut instead.
    """
    outline = answers.system.profile.outline
    across = float(outline.wall[:, 0].max() - outline.wall[:, 0].min()) / answers.system.profile.height
    if isinstance(answers.case.vessel, TableVessel):
        return min(1.0, _WIDEST_TABLE / across)
    if across <= _WIDEST_TRUE or outline.axis != "vertical" or _uniform(answers.case, outline) is not None:
        return 1.0
    return _WIDEST_TABLE / across


def _squeezed(outline: Outline, share: float) -> Outline:
    tangents = tuple(share * place for place in outline.tangents)
    return outline if share == 1.0 else replace(outline, wall=outline.wall * np.array([share, 1.0]), tangents=tangents)


def _squeezed_sizes(lines: tuple[SizeLine, ...], share: float) -> tuple[SizeLine, ...]:
    """Move the dimension lines with the section; what they say stays true."""
    return tuple(
        replace(one, start=(share * one.start[0], one.start[1]), end=(share * one.end[0], one.end[1])) for one in lines
    )


def _slopes(case: Case) -> bool:
    """Whether the vessel's floor slopes, so that it has no axis to draw."""
    return isinstance(getattr(case.vessel, "floor", None), SlopedFloor)


def _tilt(case: Case, outline: Outline) -> float:
    fall = getattr(case.vessel, "fall", None)
    along = next((one for one in outline.dimensions if one.field == "length"), None)
    if fall is None or fall.value <= 0.0 or along is None:
        return 0.0
    return (along.end[1] - along.start[1]) / (along.end[0] - along.start[0])


def _uniform(case: Case, outline: Outline) -> tuple[float, float] | None:
    """Return the stretch across that may be left out of a drawing: that of the outline, or between upright walls."""
    vessel = case.vessel
    if outline.uniform is not None:
        return outline.uniform
    flat = isinstance(vessel, UprightCylinder) and (vessel.floor is None or isinstance(vessel.floor, FlatEnd))
    if (isinstance(vessel, Box) and not _slopes(case)) or flat:
        return float(outline.wall[:, 0].min()), float(outline.wall[:, 0].max())
    return None


def _arrival(answers: Answers) -> Arrival | None:
    run, system = answers.draw_down, answers.system
    if run.reaches_stop and run.time.typical is not None:
        if run.time.typical <= 0.0:
            return None
        rising = system.stop > system.start
        text = duration(run.time.typical)
        return Arrival(system.stop, run.time.typical, run.time.low, run.time.high, text, False, rising)
    over = run.time_to_overflow
    if over.typical is not None and answers.curve.ends == "overflow":
        text = f"over in {duration(over.typical)}"
        return Arrival(system.overflow, over.typical, over.low, over.high, text, True, True)
    return None


def _remark(answers: Answers, display: DisplayUnits) -> str:
    system, settles = answers.system, answers.equilibrium.level.typical
    if answers.draw_down.reaches_stop:
        return "starts at the stop level" if abs(system.start - system.stop) < 1e-9 * system.profile.height else ""
    if answers.curve.ends == "surging" or answers.equilibrium.surges_at is not None:
        return "surges about the inlet"
    if answers.curve.ends == "overflow" or settles is None:
        return ""
    gap = settles - system.stop
    side = "above" if gap >= 0.0 else "below"
    word = "settles" if system.inflow > 0.0 else "rests"
    if abs(gap) < 5e-4:
        return f"{word} at the stop level, which it only nears"
    return f"{word} {display.text(abs(gap), 'level')} {side} the stop level"


def _settling(answers: Answers) -> tuple[float, float] | None:
    level = answers.equilibrium.level
    if answers.curve.ends != "settled" or level.low is None or level.high is None:
        return None
    return min(level.low, level.high), max(level.low, level.high)


def _shaded(answers: Answers) -> str:
    if any(not isinstance(outlet, OrificeOutlet) for outlet in answers.system.outlets):
        return "shaded: the range of losses and coefficients"
    ranges = {(used.low, used.high) for used in answers.coefficients}
    if len(ranges) != 1:
        return "shaded: the coefficients’ ranges"
    ((low, high),) = ranges
    return "" if low == high else f"shaded: coefficient {low:.3g} to {high:.3g}"
