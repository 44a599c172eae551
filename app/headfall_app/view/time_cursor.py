"""Where the time cursor stands when nobody has moved it."""

from __future__ import annotations

_UNITS = (1.0, 60.0, 3600.0, 86400.0)
_COUNTS = (1.0, 2.0, 3.0, 5.0, 6.0, 10.0, 15.0, 20.0, 25.0, 30.0, 40.0, 50.0)


def first_time(end: float) -> float:
    """Return a round time [s] in the first third of a run that takes ``end`` [s]."""
    wanted = 0.3 * end
    round_times = [count * unit for unit in _UNITS for count in _COUNTS if count * unit <= wanted]
    nearest = max(round_times, default=0.0)
    return nearest if nearest >= 0.1 * end else 0.27 * end


class TimeCursor:
    """The time cursor [s]: it stays where it was put, and finds a place of its own where that is outside the run."""

    def __init__(self) -> None:
        self._put: float | None = None
        self._own: float | None = None

    def time(self, end: float) -> float:
        """Return the cursor's time [s] in a run that takes ``end`` [s]."""
        if self._put is not None:
            return min(self._put, end)
        # It keeps its place while the run grows and shrinks a little, so that a drag of the inflow shows one moment.
        if self._own is None or not 0.02 * end <= self._own <= 0.8 * end:
            self._own = first_time(end)
        return self._own

    def put(self, time: float, end: float) -> None:
        """Put the cursor at a time [s]."""
        self._put = min(max(time, 0.0), end)

    def release(self) -> None:
        """Let the cursor find a place of its own."""
        self._put = self._own = None
