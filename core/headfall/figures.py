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
        **_beside(answers),
        "curve": {
            "time_s": curve.time.tolist(),
            "level_m": curve.level.tolist(),
            "volume_m3": curve.volume.tolist(),
            "outflow_m3_s": curve.outflow.tolist(),
        },
    }


def _beside(answers: Answers) -> dict[str, Any]:
    """What stands beside the run: doubtful parts, headspace, receiver, tables."""
    return {
        "doubtful": [
            {"outlet": part.outlet, "from_level_m": part.low, "to_level_m": part.high, "why": part.why}
            for part in answers.doubtful
        ],
        "headspace": _headspace(answers),
        "receiver": {"level_m": answers.receiver_level},
        "at_times": [
            {"time_s": row.time, "level_m": row.level, "volume_m3": row.volume, "outflow_m3_s": row.outflow}
            for row in answers.at_times
        ],
        "stages": [
            {
                "level_m": row.level,
                "area_m2": row.area,
                "volume_m3": row.volume,
                "outflow_m3_s": row.outflow.typical,
                "outflow_low_m3_s": row.outflow.low,
                "outflow_high_m3_s": row.outflow.high,
            }
            for row in answers.stages
        ],
        "at_temperatures": [
            {
                "temperature_K": row.temperature,
                "density_kg_m3": row.density,
                "viscosity_Pa_s": row.viscosity,
                **_figure("time", "s", row.time),
                "reynolds_first": row.reynolds_first,
                "reynolds_last": row.reynolds_last,
            }
            for row in answers.at_temperatures
        ],
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
        "surges_at_m": rest.surges_at,
        "surging_flow_m3_s": rest.surging_flow,
    }


def _headspace(answers: Answers) -> dict[str, Any]:
    run = answers.headspace
    if run is None:
        return {"lowest_gauge_pressure_Pa": 0.0, "lowest_gauge_pressure_fast_Pa": 0.0, "at_level_m": None}
    return {
        "lowest_gauge_pressure_Pa": run.lowest,
        "lowest_gauge_pressure_fast_Pa": run.lowest_if_fast,
        "at_level_m": run.lowest_level,
    }


_ACHIEVED = {
    "drain_time": ("achieved_time", "s"),
    "highest_level": ("achieved_level", "m"),
    "flow_at": ("achieved_flow", "m3_s"),
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
                **_figure(*_ACHIEVED[sizing.target], neighbour.achieved),
                "meets_target": neighbour.meets,
            }
            for neighbour in sizing.neighbours
        ],
    }


def _figure(name: str, unit: str, figure: Figure) -> dict[str, float | None]:
    return {f"{name}_{unit}": figure.typical, f"{name}_low_{unit}": figure.low, f"{name}_high_{unit}": figure.high}
