"""Colours by role, read from the themes' data file."""

from __future__ import annotations

import json
from collections.abc import Mapping
from dataclasses import dataclass
from functools import lru_cache

from PySide6.QtGui import QColor

from headfall_app.resources import resource_path

_GREYED = {
    "ink": "stale",
    "muted": "stale",
    "wall": "stale",
    "accent": "stale",
    "limit": "stale",
    "attention": "stale",
    "on_accent": "surface",
    "on_limit": "surface",
    "liquid": "note_soft",
    "band": "note_soft",
    "band_edge": "hair",
    "limit_soft": "note_soft",
    "attention_soft": "note_soft",
    "accent_soft": "note_soft",
}


@dataclass(frozen=True, slots=True, eq=False)
class Theme:
    """One set of colours; ``roles`` gives each role's colour as ``#RRGGBB``."""

    name: str
    roles: Mapping[str, str]

    def hex(self, role: str) -> str:
        """Return a role's colour as ``#RRGGBB``."""
        return self.roles[role]

    def colour(self, role: str) -> QColor:
        """Return a role's colour. Treat it as frozen: it is the same object every time."""
        return _colour(self.roles[role])

    def mixed(self, role: str, other: str, share: float) -> QColor:
        """Return ``share`` of a role over another one, opaque, since a printed page knows no transparency."""
        one, two = self.colour(role), self.colour(other)
        pairs = ((one.red(), two.red()), (one.green(), two.green()), (one.blue(), two.blue()))
        red, green, blue = (round(share * above + (1.0 - share) * below) for above, below in pairs)
        return QColor(red, green, blue)

    @property
    def is_paper(self) -> bool:
        """Whether this is the printed page's set."""
        return self.name == "paper"

    @property
    def is_dark(self) -> bool:
        """Whether light ink stands on a dark ground."""
        return self.colour("surface").lightnessF() < 0.5

    @property
    def greyed(self) -> Theme:
        """The same set for answers that belong to an earlier case."""
        return _greyed(self.name)


@lru_cache(maxsize=1)
def _themes() -> dict[str, dict[str, str]]:
    table: dict[str, dict[str, str]] = json.loads(resource_path("app/themes.json").read_text(encoding="utf-8"))
    return table


@lru_cache(maxsize=8)
def theme(name: str) -> Theme:
    """Return the set called ``light``, ``dark`` or ``paper``."""
    return Theme(name, _themes()[name])


@lru_cache(maxsize=256)
def _colour(name: str) -> QColor:
    return QColor(name)


@lru_cache(maxsize=8)
def _greyed(name: str) -> Theme:
    roles = _themes()[name]
    return Theme(name, {role: roles[_GREYED.get(role, role)] for role in roles})
