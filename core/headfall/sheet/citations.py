"""The sheet's own numbering of its sources, in order of first use."""

from __future__ import annotations

import re
from typing import Any

from headfall.resources import read_resource
from headfall.sheet.marks import lowered, raised


class Citations:
    """Give each source its number when it is first named."""

    def __init__(self) -> None:
        self._keys: list[str] = []

    def __call__(self, *keys: str) -> str:
        """Return ``[n]`` for each source key, raising ``KeyError`` for one that is not in the list of sources."""
        return " ".join(f"[{self._number(key)}]" for key in keys)

    def _number(self, key: str) -> int:
        if key not in read_resource("sources.json"):
            raise KeyError(key)
        if key not in self._keys:
            self._keys.append(key)
        return self._keys.index(key) + 1

    def entries(self) -> tuple[tuple[str, str, str], ...]:
        """Return number, description and status of each source used so far."""
        sources = read_resource("sources.json")
        return tuple(
            (f"[{n}]", _described(sources[key]), sources[key]["status"]) for n, key in enumerate(self._keys, 1)
        )


def _described(source: dict[str, Any]) -> str:
    who = " ".join(str(part) for part in (source["author"], source["year"]) if part)
    what = ": ".join(part for part in (source["title"], source["where"]) if part)
    parts = [who, what, f"doi {source['doi']}" if source["doi"] else ""]
    return _set(". ".join(part for part in parts if part) + ".")


def _set(text: str) -> str:
    """Set the indices and powers of a formula in a source's words."""
    text = re.sub(r"(?<=[A-Za-z])_([a-z]+)", lambda found: lowered(found[1]), text)
    return re.sub(r"\^([0-9.]*[0-9])", lambda found: raised(found[1]), text)
