"""Reading one plain value of a case: a quantity, a number, a word, a text."""

from __future__ import annotations

import json
import math
from collections.abc import Mapping
from typing import Any

from headfall.case.faults import CaseError, Fault
from headfall.case.model import Path
from headfall.case.typed_quantity import read_quantity, wanted_quantity
from headfall.quantities import Quantity, QuantityFault

__all__ = ["either", "read_plain", "read_quantity", "shown", "wanted_of"]

_LONGEST_SHOWN = 60


def shown(value: object) -> str:
    """Return a value of a file as a sentence shows it."""
    if isinstance(value, dict):
        return "A group in braces"
    if isinstance(value, list):
        return "A list"
    if isinstance(value, float) and not math.isfinite(value):
        return "NaN" if math.isnan(value) else "Infinity" if value > 0 else "-Infinity"
    if isinstance(value, int) and abs(value) >= 10**16:
        return f"{value:.6e}" if abs(value) < 10**300 else "A number without end"
    text = json.dumps(value, ensure_ascii=False, default=str)
    return text if len(text) <= _LONGEST_SHOWN else f"{text[: _LONGEST_SHOWN - 2]}…{text[-1]}"


def read_plain(value: object, metadata: Mapping[str, Any], path: Path) -> Quantity | int | float | str:
    """Return the value as the model holds it. Raises CaseError where it is none of its kind."""
    if "dimension" in metadata:
        return _quantity(value, metadata, path)
    if "number" in metadata or "integer" in metadata:
        return _number(value, metadata, path)
    wanted = wanted_of(metadata)
    if not isinstance(value, str):
        raise CaseError([Fault(path, f"{shown(value)} is not text", wanted)])
    if "choices" in metadata and value not in metadata["choices"]:
        raise CaseError([Fault(path, f"{shown(value)} is not a word known here", wanted)])
    if any("\ud800" <= letter <= "\udfff" for letter in value):
        raise CaseError([Fault(path, "This text holds half a character that no file can keep", wanted)])
    return value


def wanted_of(metadata: Mapping[str, Any]) -> str:
    """Return what to type for an attribute: ``a length, such as 80 mm``."""
    if "dimension" in metadata:
        return wanted_quantity(metadata["dimension"])
    if "choices" in metadata:
        return either(metadata["choices"])
    if "text" in metadata:
        return "text in quotation marks"
    return ("a whole number" if "integer" in metadata else "a number") + _bounds(metadata)


def either(words: tuple[str, ...] | list[str]) -> str:
    """Return words as a choice: ``a, b or c``."""
    return " or ".join(part for part in (", ".join(words[:-1]), words[-1]) if part)


def _quantity(value: object, metadata: Mapping[str, Any], path: Path) -> Quantity:
    wanted = wanted_of(metadata)
    if isinstance(value, int | float) and not isinstance(value, bool) and math.isfinite(value):
        raise CaseError([Fault(path, f"{shown(value)} has no unit", wanted)])
    if not isinstance(value, str):
        raise CaseError([Fault(path, f"{shown(value)} is not a quantity with its unit", wanted)])
    try:
        return read_quantity(value, metadata["dimension"], metadata.get("sign", "any"))
    except QuantityFault as fault:
        raise CaseError([Fault(path, fault.question or fault.found, fault.wanted)]) from None


def _number(value: object, metadata: Mapping[str, Any], path: Path) -> int | float:
    wanted = wanted_of(metadata)
    if isinstance(value, bool) or not isinstance(value, int | float):
        if isinstance(value, str):
            raise CaseError([Fault(path, f"{shown(value)} is text", f"{wanted}, without quotation marks")])
        raise CaseError([Fault(path, f"{shown(value)} is not a number", wanted)])
    if isinstance(value, float) and not math.isfinite(value):
        raise CaseError([Fault(path, f"{shown(value)} is not a finite number", wanted)])
    if "integer" in metadata and isinstance(value, float):
        if not value.is_integer():
            raise CaseError([Fault(path, f"{shown(value)} is not a whole number", wanted)])
        value = int(value)
    if "above" in metadata and value <= metadata["above"]:
        raise CaseError([Fault(path, f"{shown(value)} is not above {metadata['above']}", wanted)])
    if "low" in metadata and value < metadata["low"]:
        raise CaseError([Fault(path, f"{shown(value)} is below {metadata['low']}", wanted)])
    if "high" in metadata and value > metadata["high"]:
        raise CaseError([Fault(path, f"{shown(value)} is above {metadata['high']}", wanted)])
    return value


def _bounds(metadata: Mapping[str, Any]) -> str:
    low, above, high = (metadata.get(name) for name in ("low", "above", "high"))
    if low is not None:
        return f" of {low} or more" if high is None else f" from {low} to {high}"
    if above is not None:
        return f" above {above}" if high is None else f" above {above} and up to {high}"
    return ""
