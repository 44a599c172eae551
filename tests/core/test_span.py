"""Cutting and grading a span of levels; integrating along it."""

from __future__ import annotations

import numpy as np
import pytest
from scipy.integrate import quad

from headfall.solve.span import align_spans, cut_span, nodes, running_rule


def test_edges_run_from_start_to_stop_through_the_breakpoints() -> None:
    edges = cut_span(3.0, 0.5, [0.0, 1.0, 2.0, 3.0, 4.0])
    assert edges[0] == 3.0
    assert edges[-1] == 0.5
    assert {1.0, 2.0} <= set(edges)
    assert np.all(np.diff(edges) < 0)


def test_rising_span() -> None:
    edges = cut_span(0.5, 3.0, [1.0])
    assert edges[0] == 0.5
    assert edges[-1] == 3.0
    assert np.all(np.diff(edges) > 0)


@pytest.mark.parametrize("distance", [1e-1, 1e-3, 1e-6, 1e-9])
def test_pole_just_outside(distance: float) -> None:
    edges = np.array(cut_span(1.0 + distance, distance, [], [0.0]))
    level, weight = nodes(edges)
    assert -(weight / level).sum() == pytest.approx(np.log((1 + distance) / distance), rel=1e-11)


@pytest.mark.parametrize("distance", [0.0, 1e-12, 1e-6, 1e-2])
def test_square_root_at_or_just_outside_the_end(distance: float) -> None:
    edges = np.array(cut_span(1.0 + distance, distance, [0.0]))
    level, weight = nodes(edges)
    assert -(weight / np.sqrt(level)).sum() == pytest.approx(2 * (np.sqrt(1 + distance) - np.sqrt(distance)), rel=1e-11)


def test_running_rule_against_scipy() -> None:
    fractions, matrix = running_rule(12)
    level, _ = nodes(np.array([0.0, 2.0]))
    running = 2.0 * matrix @ np.exp(-level[0])
    for fraction, value in zip(fractions, running, strict=True):
        assert value == pytest.approx(quad(lambda h: np.exp(-h), 0.0, 2.0 * fraction)[0], abs=1e-8)
    assert running[-1] == pytest.approx(1 - np.exp(-2.0), rel=1e-14)


def test_aligned_spans_integrate_alike() -> None:
    edges = align_spans([[3.0, 2.0, 1.0, 0.0], [3.0, 0.0]])
    level, weight = nodes(edges)
    assert (weight * level).sum(axis=(-2, -1)) == pytest.approx([-4.5, -4.5], rel=1e-14)
