"""The drain time as a sum over level strips, for what has no closed form."""

from __future__ import annotations

import math
from collections.abc import Callable
from dataclasses import dataclass
from itertools import pairwise

import numpy as np

from headfall.answers import Curve
from headfall.sheet.hand_run import HandCalculation, HandRun
from headfall.sheet.marks import lowered
from headfall.sheet.model import Column, Table
from headfall.sheet.numbers import decimals, figures, fixed, rounded, seconds

FEWEST, MOST = 6, 18
WANTED_AGREEMENT = 0.002
_DIGITS = 5


@dataclass(frozen=True, slots=True)
class Station:
    """One printed level: its volume, outflow and net flow as printed."""

    level: float
    volume: float
    outflow: float
    net: float


@dataclass(frozen=True, slots=True)
class Strip:
    """Between two printed levels: the volume [m³] and the time [s] as printed, and the level half-way where it counts.

    ``places`` is how many decimal places volumes are printed with.
    """

    above: Station
    below: Station
    volume: float
    middle: Station | None
    mean: float
    time: float
    places: int


Rule = Callable[[HandRun, Station, Station, int], Strip | None]


def strips(run: HandRun, curve: Curve) -> HandCalculation | None:
    """Return the sum Σ ΔV / net over few strips that agrees with the solver's time within 0.2 %.

    Two rules are tried: the mean of the net flows at a strip's ends (exact for upright walls without inflow), and
    Simpson's rule for 1/net with the level at half the strip's volume (close to an equilibrium). The shorter one is
    printed. None where so few strips cannot carry it.
    """
    trials: list[tuple[bool, float, HandCalculation]] = []
    for rule, printed in ((_mean_strip, _mean_table), (_simpson_strip, _simpson_table)):
        found = _refined(run, curve, rule)
        if found is not None:
            total = sum(strip.time for strip in found)
            off = abs(total - run.time) / run.time
            length = len(found) + (2 if rule is _simpson_strip else 0)
            worth = length if off <= WANTED_AGREEMENT else off
            trials.append((off > WANTED_AGREEMENT, worth, printed(run, found)))
    return min(trials, key=lambda trial: trial[:2])[2] if trials else None


def _refined(run: HandRun, curve: Curve, rule: Rule) -> list[Strip] | None:
    """Halve, in time, the strip that is farthest off until the whole agrees; None where the rule cannot be used."""
    levels, times = curve.level, curve.time
    rising = bool(levels[-1] > levels[0])
    at = (levels, times) if rising else (levels[::-1], times[::-1])
    ends = [0.0, run.time]
    while True:
        marks = _rounded([float(np.interp(time, times, levels)) for time in ends], run)
        places = _volume_places(run, marks)
        stations = [_station(run, level, places) for level in marks]
        found = [rule(run, above, below, places) for above, below in pairwise(stations)]
        whole = [strip for strip in found if strip is not None]
        true = [float(np.interp(level, *at)) for level in marks]
        off = [
            math.inf if strip is None else abs(strip.time - (end - start))
            for strip, start, end in zip(found, true[:-1], true[1:], strict=True)
        ]
        if len(whole) == len(found) and len(found) >= FEWEST:
            total = abs(sum(strip.time for strip in whole) - run.time)
            near = total <= WANTED_AGREEMENT * run.time and sum(off) <= 2 * WANTED_AGREEMENT * run.time
            if near or len(found) == MOST:
                return whole
        if len(found) >= MOST:
            return None
        worst = off.index(max(off))
        ends.insert(worst + 1, (ends[worst] + ends[worst + 1]) / 2)


def _rounded(levels: list[float], run: HandRun) -> list[float]:
    """Round the levels between the ends as far as their distance from one another allows."""
    inner = []
    for before, level, after in zip(levels[:-2], levels[1:-1], levels[2:], strict=True):
        room = max(min(abs(level - before), abs(level - after)), 1e-6)
        inner.append(round(level, min(6, max(3, 1 - math.floor(math.log10(room))))))
    return [run.first, *inner, run.last]


def _volume_places(run: HandRun, levels: list[float]) -> int:
    """Return the places that show the whole with six digits and the least strip with four, but not without end."""
    volumes = [run.volume(level) for level in levels]
    least = min(abs(after - before) for before, after in pairwise(volumes))
    whole = decimals(abs(volumes[0] - volumes[-1]), 6)
    return min(whole + 4, max(whole, decimals(least, 4)))


def _station(run: HandRun, level: float, places: int) -> Station:
    outflow = rounded(run.outflow(level), _DIGITS)
    net = outflow - rounded(run.inflow, _DIGITS)
    return Station(level, round(run.volume(level), places), outflow, rounded(net, _DIGITS))


def _step_places(run: HandRun) -> int:
    return decimals(run.time / 10, 5)


def _mean_strip(run: HandRun, above: Station, below: Station, places: int) -> Strip | None:
    volume = round(above.volume - below.volume, places)
    mean = rounded((above.net + below.net) / 2, _DIGITS)
    if mean == 0 or volume / mean <= 0:
        return None
    return Strip(above, below, volume, None, mean, round(volume / mean, _step_places(run)), places)


def _simpson_strip(run: HandRun, above: Station, below: Station, places: int) -> Strip | None:
    if below.net == 0 and run.inflow == 0:
        return _mean_strip(run, above, below, places)
    volume = round(above.volume - below.volume, places)
    level = float(run.profile.level(np.array([(above.volume + below.volume) / 2]))[0])
    room = max(abs(above.level - below.level), 1e-6)
    middle = _station(run, round(level, min(6, max(3, 2 - math.floor(math.log10(room))))), places)
    nets = (above.net, middle.net, below.net)
    if any(net * volume <= 0 for net in nets):
        return None
    time = volume / 6 * (1 / nets[0] + 4 / nets[1] + 1 / nets[2])
    return Strip(above, below, volume, middle, 0.0, round(time, _step_places(run)), places)


# As printed -----------------------------------------------------------------------------------------------------------

_LEADING = (
    Column("Level, m", 0.8, "right"),
    Column("Volume, m³", 1.0, "right"),
    Column("Outflow, m³/s", 1.1, "right"),
    Column("Net, m³/s", 1.0, "right"),
    Column("ΔV, m³", 1.0, "right"),
)
_TIME = Column("Δt, s", 0.8, "right")


def _level_text(level: float) -> str:
    for places in (3, 4, 5):
        if abs(level - round(level, places)) < 1e-9:
            return fixed(level, places)
    return fixed(level, 6)


def _leading(station: Station, places: int) -> tuple[str, ...]:
    return (
        _level_text(station.level),
        fixed(station.volume, places),
        figures(station.outflow, _DIGITS),
        figures(station.net, _DIGITS),
    )


def _mean_table(run: HandRun, found: list[Strip]) -> HandCalculation:
    rows = [(*_leading(found[0].above, found[0].places), "", "", "")]
    for strip in found:
        volume, time = fixed(strip.volume, strip.places), fixed(strip.time, _step_places(run))
        rows.append((*_leading(strip.below, strip.places), volume, figures(strip.mean, _DIGITS), time))
    columns = (*_LEADING, Column("Mean net, m³/s", 1.2, "right"), _TIME)
    rule = "Each strip: Δt = ΔV / mean of the net flows at its two ends."
    return _summed(rule, Table(columns, tuple(rows)), found)


def _simpson_table(run: HandRun, found: list[Strip]) -> HandCalculation:
    rows = [(*_leading(found[0].above, found[0].places), "", "", "", "")]
    for strip in found:
        middle = strip.middle
        half = ("–", "–") if middle is None else (_level_text(middle.level), figures(middle.net, _DIGITS))
        volume, time = fixed(strip.volume, strip.places), fixed(strip.time, _step_places(run))
        rows.append((*_leading(strip.below, strip.places), volume, *half, time))
    columns = (*_LEADING, Column("Half-way, m", 1.0, "right"), Column("Net there, m³/s", 1.1, "right"), _TIME)
    names = [f"n{lowered(mark)}" for mark in ("0", "m", "1")]
    rule = (
        f"Each strip: Δt = (ΔV/6)·(1/{names[0]} + 4/{names[1]} + 1/{names[2]}), with the net flows n at its two ends "
        "and at the level that halves its volume (Simpson’s rule)."
    )
    if any(strip.middle is None for strip in found):
        rule += " The last strip ends without flow: Δt = 2·ΔV/n" + lowered("0") + "."
    return _summed(rule, Table(columns, tuple(rows)), found)


def _summed(rule: str, table: Table, found: list[Strip]) -> HandCalculation:
    total = sum(strip.time for strip in found)
    return HandCalculation((rule, f"Sum of the strips: t = {seconds(total)} s"), total, table)
