"""The root finder, held to scipy."""

from __future__ import annotations

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st
from scipy.optimize import brentq

from headfall.solve.root import bracketed_root


@given(st.lists(st.floats(0.01, 50.0), min_size=1, max_size=6), st.sampled_from([0.5, 1.0, 1.5, 2.5]))
def test_agrees_with_scipy(targets: list[float], power: float) -> None:
    wanted = np.array(targets)
    found = bracketed_root(lambda x: x**power - wanted, np.zeros_like(wanted), np.full_like(wanted, 1e4))
    for root, target in zip(found, targets, strict=True):
        reference = brentq(lambda x, t=target: x**power - t, 0.0, 1e4, xtol=1e-300, rtol=1e-15)
        assert root == pytest.approx(reference, rel=1e-13)


def test_samples_do_not_disturb_one_another() -> None:
    both = bracketed_root(lambda x: np.cos(x) - np.array([0.0, 0.9]), np.zeros(2), np.full(2, 3.0))
    assert both == pytest.approx([np.pi / 2, np.arccos(0.9)], rel=1e-14)


def test_ends_that_do_not_bracket() -> None:
    with pytest.raises(ValueError, match="bracket"):
        bracketed_root(lambda x: x * x + 1, np.array([-1.0]), np.array([1.0]))
