"""Cases written as plain data, solved."""

from __future__ import annotations

from collections.abc import Callable
from typing import Any

import pytest

from headfall.answers import Answers
from headfall.case.reading import build_case, read_parts
from headfall.study import solve

Solver = Callable[..., Answers]


def own(value: float) -> dict[str, float]:
    """A coefficient of one value, low, typical and high alike."""
    return {"low": value, "typical": value, "high": value}


def round_hole(diameter: str, coefficient: float, **more: Any) -> dict[str, Any]:
    """A round orifice with a coefficient of its own."""
    opening = {"form": "round", "diameter": diameter}
    return {"kind": "orifice", "opening": opening, "coefficient": own(coefficient), **more}


@pytest.fixture
def answers_to() -> Solver:
    """Return a function that solves a case given by vessel, outlet, levels and the rest."""

    def solved(vessel: dict[str, Any], outlet: Any, start: str, stop: str, **more: Any) -> Answers:
        outlets = outlet if isinstance(outlet, list) else [outlet]
        levels = {"start": start, "stop": stop, **more.pop("levels", {})}
        data = {"headfall": 1, "vessel": vessel, "outlets": outlets, "levels": levels, **more}
        parts, faults = read_parts(data)
        assert not faults, [fault.line for fault in faults]
        return solve(build_case(parts))

    return solved
