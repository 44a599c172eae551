"""What the answers say where the headspace is closed, beyond the drain time."""

from __future__ import annotations

import json

import pytest

from headfall.files import case_from_text
from headfall.study import solve


def test_the_largest_inflow_of_a_closed_tank_does_not_count_on_gas_pressed_under_the_lid() -> None:
    tank = {
        "headfall": 1,
        "vessel": {"shape": "upright_cylinder", "diameter": "2 m", "height": "3 m"},
        "outlets": [{"kind": "orifice", "entry": "sharp_edged", "opening": {"form": "round", "diameter": "80 mm"}}],
        "levels": {"start": "2 m", "stop": "0.1 m"},
    }
    closed = solve(case_from_text(json.dumps(tank | {"headspace": {"kind": "closed"}})))
    opened = solve(case_from_text(json.dumps(tank | {"headspace": {"kind": "open"}})))
    inflow, other = closed.equilibrium.largest_inflow, opened.equilibrium.largest_inflow
    assert (inflow.low, inflow.typical, inflow.high) == pytest.approx((other.low, other.typical, other.high), rel=1e-12)
