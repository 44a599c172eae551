"""The words people see for entries, groups and choices; they stand in ``words.json``."""

from __future__ import annotations

import json
from functools import cache
from typing import Any

from headfall.case.model import Path
from headfall_app.resources import resource_path


@cache
def words() -> dict[str, Any]:
    """Return the whole table, read once."""
    table: dict[str, Any] = json.loads(resource_path("app/words.json").read_text(encoding="utf-8"))
    return table


def key_of(path: Path) -> str:
    """Return an entry's key in the table: its path without places in a list, but for the two ends of a drum."""
    ends = path[-2:-1] == ("heads",) and isinstance(path[-1], int)
    return ".".join(str(step) for step in path if ends or isinstance(step, str))


def label_of(path: Path, variant: str = "") -> str:
    """Return the label of an entry's field; a variant (``down``) may have a label of its own."""
    fields = words()["fields"]
    key = key_of(path)
    label: str = fields.get(f"{key}.{variant}") or fields.get(key) or str(path[-1]).replace("_", " ").capitalize()
    return label


def lowered(name: str) -> str:
    """Return a name as it stands inside a sentence; signs such as Ø keep their case."""
    return name[:1].lower() + name[1:]


def group_title(path: Path) -> str:
    """Return the title of the group an entry stands in: ``Outlet 1``, ``Vessel``."""
    groups = words()["groups"]
    title: str = groups.get(path[0], groups["heading"])
    if path[0] == "outlets" and len(path) > 1:
        return f"{title} {int(path[1]) + 1}"
    return title


def name_of(path: Path) -> str:
    """Return an entry's name in a sentence: ``Outlet 1, fitting 2, loss K``; empty for the case as a whole."""
    if not path:
        return ""
    title = group_title(path)
    if len(path) == 1 or (path[0] == "outlets" and len(path) == 2):
        return label_of(path) if path[0] not in words()["groups"] else title
    named = words()["fields"]
    within = [_part_name(path, depth) for depth in range(2, len(path)) if isinstance(path[depth], int)]
    whole = label_of(path) if isinstance(path[-1], str) or key_of(path) in named else ""
    if isinstance(path[-1], int) and isinstance(path[-2], int):
        whole = f"column {path[-1] + 1}"
    return ", ".join([title, *map(lowered, filter(None, (_receiver(path), *within, whole)))])


def _receiver(path: Path) -> str:
    return "receiving vessel" if path[2:4] == ("tailwater", "vessel") and len(path) > 4 else ""


def _part_name(path: Path, depth: int) -> str:
    """Return what one member of a list is called: ``fitting 2``; of the ends of a drum the end's own label."""
    name, index = str(path[depth - 1]), int(path[depth])
    if name == "heads":
        return label_of(path[: depth + 1]) if depth + 1 < len(path) else ""
    called = words()["parts"].get(name, "")
    # The pipe itself is the first of its sections.
    return f"{called} {index + (2 if name == 'sections' else 1)}" if called else ""


def choices_of(key: str) -> tuple[tuple[str, str], ...]:
    """Return (value, words) of every choice of an entry."""
    return tuple(words()["choices"][key].items())
