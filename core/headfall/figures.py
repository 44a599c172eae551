"""The answers as plain data: what ``figures --json`` prints."""

from __future__ import annotations

from typing import Any

from headfall.answers import Answers, Figure, Sizing


def as_dict(answers: Answers) -> dict[str, Any]:
    """Return the answers as nested dicts and lists: SI floats, the unit in the key, None where there is no answer."""
    case, vessel, curve = answers.case, answers.vessel, answers.curve
    return {
        "headfall": 1,
        "title": case.title or "",
        "tag": case.tag or "",
        "vessel": {
            "height_m": vessel.height,
            "capacity_m3": vessel.capacity,
            "start_volume_m3": vessel.start_volume,
            "stop_volume_m3": vessel.stop_volume,
        },
        "draw_down": _draw_down(answers),
        "equilibrium": _equilibrium(answers),
        "peak": {
            "level_m": answers.peak.level,
            "time_s": answers.peak.time,
            "overflowed_m3": answers.peak.overflowed,
            "time_above_overflow_s": answers.peak.time_above_overflow,
        },
        "sizing": [_sizing(sizing) for sizing in answers.sizing],
        "coefficient": [
            {"outlet": used.outlet, "low": used.low, "typical": used.typical, "high": used.high, "source": used.source}
            for used in answers.coefficients
        ],
        "checks": [
            {
                "rule": finding.rule,
                "grade": finding.grade.word,
                "value": finding.value,
                "limit": finding.limit,
                "text": finding.text,
            }
            for finding in answers.findings
        ],
        "field_tests": [],
        "curve": {
            "time_s": curve.time.tolist(),
            "level_m": curve.level.tolist(),
            "volume_m3": curve.volume.tolist(),
            "outflow_m3_s": curve.outflow.tolist(),
        },
    }


def _draw_down(answers: Answers) -> dict[str, Any]:
    run = answers.draw_down
    return {
        "reaches_stop": run.reaches_stop,
        "reason": run.reason,
        **_figure("time", "s", run.time),
        **_figure("time_to_overflow", "s", run.time_to_overflow),
        "released_m3": run.released,
        "outflow_at_start_m3_s": run.outflow_at_start.typical,
    }


def _equilibrium(answers: Answers) -> dict[str, Any]:
    rest = answers.equilibrium
    return {
        **_figure("level", "m", rest.level),
        "volume_m3": rest.volume,
        "overflows": rest.overflows,
        "reason": rest.reason,
        "largest_inflow_m3_s": rest.largest_inflow.typical,
        "largest_inflow_low_m3_s": rest.largest_inflow.low,
        "time_to_98_percent_s": rest.time_to_98_percent,
    }


def _sizing(sizing: Sizing) -> dict[str, Any]:
    return {
        "target": sizing.target,
        "outlet": sizing.outlet,
        **_figure("diameter", "m", sizing.diameter),
        "scale": sizing.scale,
        "standard": sizing.standard,
        "reason": sizing.reason,
        "neighbours": [
            {
                "standard": neighbour.standard,
                "diameter_m": neighbour.diameter,
                **_figure("achieved_time", "s", neighbour.achieved_time),
            }
            for neighbour in sizing.neighbours
        ],
    }


def _figure(name: str, unit: str, figure: Figure) -> dict[str, float | None]:
    return {f"{name}_{unit}": figure.typical, f"{name}_low_{unit}": figure.low, f"{name}_high_{unit}": figure.high}
