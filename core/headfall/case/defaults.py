"""What counts where nothing was typed."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import fields
from typing import Any

from headfall.case.typed_quantity import read_quantity

_known: dict[type[Any], dict[str, Any]] = {}


def default_of(kind: type[Any], attribute: str) -> Any:
    """Return the default of an attribute of one of the case's dataclasses, in SI where it is a quantity; or None."""
    if kind not in _known:
        _known[kind] = {item.name: _default(item.metadata) for item in fields(kind)}
    return _known[kind][attribute]


def _default(metadata: Mapping[str, Any]) -> Any:
    default = metadata.get("default")
    if default is not None and "dimension" in metadata:
        return read_quantity(default, metadata["dimension"]).value
    return default


def effective(part: Any, attribute: str) -> Any:
    """Return what an attribute of a part of a case counts as: as typed (SI where it is a quantity), or its default."""
    value = getattr(part, attribute)
    if value is None:
        return default_of(type(part), attribute)
    return getattr(value, "value", value)
