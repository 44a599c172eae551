"""The scale that meets a drain time."""

from __future__ import annotations

import numpy as np
import pytest

from headfall.solve.sizing import scale_for_time


def test_power_law() -> None:
    scale = scale_for_time(
        lambda s: 900.0 / s**2, 100.0, np.ones(3), np.full(3, 900.0), np.zeros(3), np.full(3, np.inf), 1e-4, 1e4
    )
    assert scale == pytest.approx(np.full(3, 3.0), rel=1e-12)


@pytest.mark.parametrize("constant", [5.0, 50.0, np.inf])
@pytest.mark.parametrize("share", [-0.5, 0.0, 0.7, 1.0])
def test_blocked_below_a_smallest_scale(share: float, constant: float) -> None:
    blocked = np.array([0.9, 1.0, 1.1])

    def time_at(scale: np.ndarray) -> np.ndarray:
        with np.errstate(divide="ignore", invalid="ignore"):
            return np.where(scale > blocked, np.log1p(1 / (scale / blocked - 1)) * 50, np.inf)

    scale = scale_for_time(
        time_at, 100.0, np.full(3, 0.3), np.full(3, np.inf), share * blocked**2, np.full(3, constant), 1e-4, 1e4
    )
    assert time_at(scale) == pytest.approx(np.full(3, 100.0), rel=1e-9)


def test_no_scale_does() -> None:
    assert np.isnan(
        scale_for_time(
            lambda s: 900.0 / s**2, 100.0, np.ones(3), np.full(3, 900.0), np.zeros(3), np.full(3, np.inf), 1e-4, 2.0
        )
    ).all()
    assert np.isnan(
        scale_for_time(
            lambda s: 900.0 / (s**2 + 100),
            100.0,
            np.ones(3),
            np.full(3, 900.0),
            np.zeros(3),
            np.full(3, np.inf),
            1e-4,
            2.0,
        )
    ).all()
