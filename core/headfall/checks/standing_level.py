"""C11: a level at which the run comes to rest before its stop."""

from __future__ import annotations

from dataclasses import dataclass

from headfall.checks.finding import Finding, Grade
from headfall.checks.wording import Ranged, with_range
from headfall.quantities.display import DisplayUnits

RULE = "C11"
_SUBJECT = "stop level reached"
_SOURCE = "volume_balance"
_PLACE = "levels.stop"


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
    display: DisplayUnits

    @property
    def fills(self) -> bool:
        return self.stop > self.start

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
) -> list[Finding]:
    """Return a stop where the run never reaches its stop level, an attention where one end of the range does not.

    ``start``, ``stop``, ``overflow`` and ``heel`` (the level below which no outlet draws) [m]; ``time`` to the stop
    [s]; ``settles_at`` is the equilibrium [m] and ``settled_volume`` what it holds [m³]; ``inflow`` [m³/s];
    ``flow_at_stop`` what the outlets pass at the stop level [m³/s], its low end with the lowest coefficients.
    The level rests where the outlets pass what comes in. Source: ``volume_balance``.
    """
    run = _Run(start, stop, overflow, time, settles_at, settled_volume, inflow, flow_at_stop, heel, display)
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
    return Finding(
        rule=RULE,
        grade=Grade.ATTENTION,
        subject=_SUBJECT,
        text=f"With the {end} coefficient it never reaches {stop}{settles}.",
        advice=f"With the typical one it takes {run.display.text(run.time.typical or 0.0, 'time')}; there is no upper "
        f"end to that time. {_remedy(run)}",
        source=_SOURCE,
        value=rests,
        limit=run.stop,
        kind="level",
        place=_PLACE,
    )


def _never(run: _Run) -> Finding:
    rests = run.settles_at.typical
    if rests is None or rests > run.overflow:
        text = f"{run.goal}: the level rises to overflow, {run.display.text(run.overflow, 'level')}."
        advice = _remedy(run)
    elif run.inflow <= 0.0 and not run.fills:
        left = "liquid" if run.volume is None else run.display.text(run.volume, "volume")
        text = f"{run.goal}: {left} stays below the lowest outlet's edge, {run.display.text(run.heel, 'level')}."
        advice = (
            "Near the lower edge of a side opening the flow dies away and the time grows without bound. Choose a stop "
            "level above it, or take the rest out another way."
        )
    elif run.inflow <= 0.0:
        text = f"{run.goal}: nothing flows in."
        advice = "Enter an inflow, or a stop level below the start."
    else:
        still = "" if run.volume is None else f", with {run.display.text(run.volume, 'volume')} still in the vessel"
        still = "" if run.fills else still
        text = f"{run.goal}: it settles at {with_range(run.settles_at, 'level', run.display)}{still}."
        advice = _remedy(run)
    return Finding(
        rule=RULE,
        grade=Grade.STOP,
        subject=_SUBJECT,
        text=text,
        advice=advice + _luckier_end(run),
        source=_SOURCE,
        value=rests,
        limit=run.stop,
        kind="level",
        place=_PLACE,
    )


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
