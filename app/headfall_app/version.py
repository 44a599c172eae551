"""The program's version."""

from __future__ import annotations

from importlib.metadata import PackageNotFoundError
from importlib.metadata import version as installed


def version() -> str:
    """Return the installed version; the library's own where nothing is installed."""
    try:
        return installed("headfall")
    except PackageNotFoundError:
        from headfall import __version__

        return __version__
