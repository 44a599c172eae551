"""Where the data files lie that this package reads at run time."""

from __future__ import annotations

import json
from functools import cache
from pathlib import Path
from typing import Any


def resource_path(name: str) -> Path:
    """Return the path of a data file: beside this package in a wheel, in ``resources`` of a checkout."""
    installed = Path(__file__).parent / "data" / name
    if installed.exists():
        return installed
    return Path(__file__).parents[2] / "resources" / "core" / name


@cache
def read_resource(name: str) -> Any:
    """Return the content of a JSON data file, read once."""
    return json.loads(resource_path(name).read_text(encoding="utf-8"))
