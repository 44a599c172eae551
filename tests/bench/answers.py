"""All answers to a case, with another inflow at every call."""

from __future__ import annotations

from dataclasses import replace
from pathlib import Path
from typing import Any

import numpy as np

from headfall.case.model import Case, SteadyInflow
from headfall.case.reading import build_case, read_parts
from headfall.quantities import written
from headfall.study import solve
from tests.bench.clock import each, spread

CALLS = 200
EXAMPLE = Path(__file__).resolve().parents[2] / "resources" / "examples" / "rinse_drum.headfall"
DISHED = {"form": "torispherical", "crown_ratio": 1, "knuckle_ratio": 0.1}


def drum_case(heads: dict[str, Any]) -> Case:
    """Return a drum of 2 m by 5.6 m with an 80 mm outlet and a target."""
    parts, faults = read_parts(
        {
            "headfall": 1,
            "vessel": {"shape": "drum", "diameter": "2 m", "length": "5.6 m", "heads": heads},
            "outlets": [{"kind": "orifice", "opening": {"form": "round", "diameter": "80 mm"}}],
            "headspace": {"kind": "open"},
            "levels": {"start": "1.7 m", "stop": "0.1 m", "overflow": "1.9 m"},
            "target": {"drain_time": "25 min"},
        }
    )
    if faults:
        raise ValueError("; ".join(fault.line for fault in faults))
    return build_case(parts)


def with_inflow(case: Case, flow: float) -> Case:
    """Return the case with another steady inflow [m³/s]."""
    return replace(case, inflow=SteadyInflow(rate=written(flow, "L/s", "flow")))


def print_answers() -> None:
    """Print the time of ``headfall.study.solve`` for a drum with flat ends and one with dished heads."""
    for name, heads in (("drum, flat ends", {"form": "flat"}), ("drum, dished heads", DISHED)):
        case = drum_case(heads)
        cases = [with_inflow(case, float(flow)) for flow in np.linspace(0.0, 0.025, CALLS + 1)]
        first = each(solve, cases[:1])[0]
        times = each(solve, cases[1:])
        print(f"  {name:34}{spread(times)}   first call {1e3 * first:.1f} ms")
