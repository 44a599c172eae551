"""C11: a level at which the run comes to rest before its stop."""

from __future__ import annotations

from dataclasses import dataclass

from headfall.checks.finding import Finding, Grade
from headfall.checks.wording import Ranged, edge_words, with_range
from headfall.quantities.display import DisplayUnits

RULE = "C11"
_SUBJECT = "stop level reached"
_SOURCE = "volume_balance"
_PLACE = "levels.stop"
_HELD = {
    "": "",
    "vacuum": "the vacuum above the liquid holds it at",
    "kept_vacuum": "the vacuum above the liquid holds it at",
    "tailwater": "the liquid outside holds it at",
}
_RELEASE = {
    "vacuum": "Open a way in for air. Air that gulps up through the outlet lets more out, in a time not told here.",
    "kept_vacuum": "Let the pressure above the liquid rise, or choose a stop level above that.",
    "tailwater": "The level outside decides: change it, or choose a stop level on this side of it.",
}


@dataclass(frozen=True, slots=True)
class _Run:
    start: float
    stop: float
    overflow: float
    time: Ranged
    settles_at: Ranged
    volume: float | None
    inflow: float
    flow_at_stop: Ranged
    heel: float
    form: str
    held_by: str
    surges_at: float | None
    surging_flow: float | None
    display: DisplayUnits

    @property
    def fills(self) -> bool:
        return self.stop > self.start

    @property
    def held(self) -> str:
        """What brings the level to rest where nothing flows in and no outlet runs dry; empty else."""
        return _HELD[self.held_by] if self.inflow <= 0.0 else ""

    @property
    def still_in(self) -> str:
        if self.volume is None or self.fills:
            return ""
        return f", with {self.display.text(self.volume, 'volume')} still in the vessel"

    @property
    def goal(self) -> str:
        reaches = "fills to" if self.fills else "reaches"
        return f"It never {reaches} {self.display.text(self.stop, 'level')}"


def check_standing_level(
    *,
    start: float,
    stop: float,
    overflow: float,
    reaches_stop: bool,
    time: Ranged,
    settles_at: Ranged,
    settled_volume: float | None,
    inflow: float,
    flow_at_stop: Ranged,
    heel: float,
    display: DisplayUnits,
    form: str = "side",
    held_by: str = "",
    surges_at: float | None = None,
    surging_flow: float | None = None,
) -> list[Finding]:
    """Return a stop where the run never reaches its stop level, an attention where one end of the range does not.

    ``start``, ``stop``, ``overflow`` (where the run would end) and ``heel`` (the level below which no outlet draws)
    [m]; ``time`` to the stop [s]; ``settles_at`` is the equilibrium [m] and ``settled_volume`` what it holds [m³];
    ``inflow`` [m³/s]; ``flow_at_stop`` what the outlets pass at the stop level [m³/s], its low end with the lowest
    coefficients; ``form`` what the lowest outlet is, as for ``check_heel``. ``held_by`` says what holds the liquid
    where nothing flows in: the ``vacuum`` of a closed headspace, a ``kept_vacuum``, the ``tailwater``, or nothing where
    the outlets run dry. ``surges_at`` [m] is the inlet that takes ``surging_flow`` [m³/s] as soon as it is covered,
    more than comes in; None where none does.
    The level rests where the outlets pass what comes in. Source: ``volume_balance``.
    """
    run = _Run(
        start, stop, overflow, time, settles_at, settled_volume, inflow, flow_at_stop, heel,
        form, held_by, surges_at, surging_flow, display,
    )  # fmt: skip
    if reaches_stop and time.high is not None:
        return [_reached(run)]
    if reaches_stop:
        return [_doubtful(run)]
    return [_never(run)]


def _reached(run: _Run) -> Finding:
    stop = run.display.text(run.stop, "level")
    if run.start == run.stop:
        text = f"The run starts at its stop level, {stop}; no caution is raised by this check."
    else:
        text = f"It reaches {stop} over the whole range of the coefficients; no caution is raised by this check."
    return Finding(
        rule=RULE,
        grade=Grade.NO_CAUTION,
        subject=_SUBJECT,
        text=text,
        advice="It rests on the inflow staying as entered.",
        source=_SOURCE,
        value=run.settles_at.typical,
        limit=run.stop,
        kind="level",
        place=_PLACE,
    )


def _doubtful(run: _Run) -> Finding:
    end = "highest" if run.fills else "lowest"
    rests = run.settles_at.low if run.fills else run.settles_at.high
    settles = "" if rests is None else f": it settles at {run.display.text(rests, 'level')}"
    stop = run.display.text(run.stop, "level")
    text = f"With the {end} coefficient it never reaches {stop}{settles}."
    remedy = _remedy(run)
    if run.held and rests is not None:
        text = f"At one end of the range it never reaches {stop}: {run.held} {run.display.text(rests, 'level')}."
        remedy = _RELEASE[run.held_by]
    return Finding(
        rule=RULE,
        grade=Grade.ATTENTION,
        subject=_SUBJECT,
        text=text,
        advice=f"With the typical one it takes {run.display.text(run.time.typical or 0.0, 'time')}; there is no upper "
        f"end to that time. {remedy}",
        source=_SOURCE,
        value=rests,
        limit=run.stop,
        kind="level",
        place=_PLACE,
    )


def _never(run: _Run) -> Finding:
    rests = run.settles_at.typical
    why, advice = _surges(run) or _rises(run) or _held(run) or _runs_dry(run) or _settles(run)
    return Finding(
        rule=RULE,
        grade=Grade.STOP,
        subject=_SUBJECT,
        text=f"{run.goal}: {why}.",
        advice=advice + _luckier_end(run),
        source=_SOURCE,
        value=run.surges_at if rests is None else rests,
        limit=run.stop,
        kind="level",
        place=_PLACE,
    )


def _surges(run: _Run) -> tuple[str, str] | None:
    if run.surges_at is None or run.surging_flow is None:
        return None
    flow, inflow = run.display.text(run.surging_flow, "flow"), run.display.text(run.inflow, "flow")
    why = (
        f"it surges about the inlet at {run.display.text(run.surges_at, 'level')}, where {flow} goes out as soon as it "
        f"is covered and {inflow} comes in"
    )
    advice = f"Bring the inflow above {flow}, or throttle the outlet." if run.fills else "Shut the inflow to go lower."
    return why, advice


def _rises(run: _Run) -> tuple[str, str] | None:
    rests = run.settles_at.typical
    if rests is not None and rests <= run.overflow:
        return None
    return f"the level rises to overflow, {run.display.text(run.overflow, 'level')}", _remedy(run)


def _held(run: _Run) -> tuple[str, str] | None:
    rests = run.settles_at.typical
    if not run.held or rests is None:
        return None
    return f"{run.held} {run.display.text(rests, 'level')}{run.still_in}", _RELEASE[run.held_by]


def _runs_dry(run: _Run) -> tuple[str, str] | None:
    if run.inflow > 0.0:
        return None
    if run.fills:
        return "nothing flows in", "Enter an inflow, or a stop level below the start."
    left = "liquid" if run.volume is None else run.display.text(run.volume, "volume")
    edge = "the lowest outlet's edge" if run.form == "side" else edge_words(run.form)
    why = f"{left} stays below {edge}, {run.display.text(run.heel, 'level')}"
    if run.form in ("down", "pipe", "rising_pipe"):
        return why, "No outlet draws it. Choose a stop level above it, or take the rest out another way."
    near = "the crest" if run.form == "weir" else "the lower edge of a side opening"
    advice = (
        f"Near {near} the flow dies away and the time grows without bound. Choose a stop level above it, or take the "
        "rest out another way."
    )
    return why, advice


def _settles(run: _Run) -> tuple[str, str]:
    return f"it settles at {with_range(run.settles_at, 'level', run.display)}{run.still_in}", _remedy(run)


def _remedy(run: _Run) -> str:
    needed = (run.flow_at_stop.high if run.fills else run.flow_at_stop.low) or 0.0
    flow = run.display.text(needed, "flow")
    inflow = run.display.text(run.inflow, "flow")
    stop = run.display.text(run.stop, "level")
    if run.fills:
        return (
            f"At {stop} the outlets pass up to {flow} and {inflow} flows in. Bring the inflow above {flow}, or shut an "
            "outlet."
        )
    if needed <= 0.0:
        return f"At {stop} the outlets pass nothing and {inflow} flows in. Shut it, or choose a higher stop level."
    return (
        f"At {stop} the outlets pass {flow} with their lowest coefficients and {inflow} flows in. Bring the inflow "
        f"below {flow}, or make the outlet larger."
    )


def _luckier_end(run: _Run) -> str:
    if run.time.low is None:
        return ""
    end = "lowest" if run.fills else "highest"
    return f" With the {end} coefficient alone it gets there, in {run.display.text(run.time.low, 'time')}."
