"""The program's version."""

from __future__ import annotations

from headfall import __version__


def version() -> str:
    """Return the version of the program and its library, which are one."""
    return __version__
