"""Where the window's data files lie."""

from __future__ import annotations

from pathlib import Path


def resource_path(name: str) -> Path:
    """Return the path of a data file: beside this package in a wheel, in ``resources`` of a checkout."""
    installed = Path(__file__).parent / "data" / name
    if installed.exists():
        return installed
    return Path(__file__).parents[2] / "resources" / name
