"""Timing."""

from __future__ import annotations

import statistics
import time
from collections.abc import Callable, Iterable
from typing import Any


def best(call: Callable[[], Any], repeats: int = 7, seconds: float = 0.05) -> float:
    """Return the time of one call [s], the best of several rounds; a round lasts about ``seconds``."""
    started = time.perf_counter()
    call()
    once = max(time.perf_counter() - started, 1e-9)
    calls = max(1, int(seconds / once))
    rounds = []
    for _ in range(repeats):
        started = time.perf_counter()
        for _ in range(calls):
            call()
        rounds.append((time.perf_counter() - started) / calls)
    return min(rounds)


def each(call: Callable[[Any], Any], values: Iterable[Any]) -> list[float]:
    """Return the time of a call with each value [s]."""
    times = []
    for value in values:
        started = time.perf_counter()
        call(value)
        times.append(time.perf_counter() - started)
    return times


def spread(times: list[float]) -> str:
    """Return median and 95th percentile as they stand in a table."""
    ordered = sorted(times)
    return (
        f"p50 {1e3 * statistics.median(ordered):7.2f} ms   p95 {1e3 * ordered[int(0.95 * (len(ordered) - 1))]:7.2f} ms"
    )
