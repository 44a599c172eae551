"""From plain data to a case, with every fault named at its place."""

from __future__ import annotations

from collections.abc import Mapping
from typing import Any

from headfall.case.faults import CaseError, Fault
from headfall.case.model import Case, Path
from headfall.case.part_reading import read_values, repeated_faults
from headfall.case.values import shown
from headfall.case.word_faults import FORMAT_KEY

FORMAT = 1
"""The number of the file format that this version writes and reads."""


def read_case_data(data: object) -> Case:
    """Return the case. Raises CaseError with every fault within its parts."""
    parts, faults = read_parts(data)
    if faults:
        raise CaseError(faults)
    return build_case(parts)


def read_parts(data: object) -> tuple[dict[str, Any], list[Fault]]:
    """Return the sound parts of a case by their keys, and every fault.

    ``outlets`` is a list with None where an outlet is faulty; ``levels`` holds None for a level that is faulty; any
    other part that is faulty is missing.
    """
    if not isinstance(data, dict):
        found = f"{shown(data)} is no case" if not isinstance(data, dict | list) else "The file holds a list, no case"
        return {}, [Fault((), found, "A case file holds one group in braces")]
    version = _format_fault(data)
    if version is not None and _is_newer(data):
        return {}, [version]
    faults = [] if version is None else [version]
    parts, _ = read_values({key: data[key] for key in data if key != FORMAT_KEY}, Case, (), faults)
    faults[:0] = repeated_faults(data, ())
    return parts, faults


def build_case(parts: Mapping[str, Any]) -> Case:
    """Return the case made of its parts. Raises CaseError where a part it cannot do without is not sound."""
    faults = []
    outlets, levels = parts.get("outlets") or [], parts.get("levels")
    if parts.get("vessel") is None:
        faults.append(Fault(("vessel",), "The vessel is missing", "a vessel"))
    if not outlets or None in outlets:
        faults.append(Fault(("outlets",), "An outlet is missing", "at least one outlet"))
    for name in ("start", "stop"):
        if getattr(levels, name, None) is None:
            faults.append(Fault(("levels", name), f"The {name} level is missing", "a level"))
    if faults:
        raise CaseError(faults)
    return Case(**{**parts, "outlets": tuple(outlets)})


def _is_newer(data: Mapping[str, Any]) -> bool:
    number = data.get(FORMAT_KEY)
    return isinstance(number, int) and not isinstance(number, bool) and number > FORMAT


def _format_fault(data: Mapping[str, Any]) -> Fault | None:
    path: Path = (FORMAT_KEY,)
    if FORMAT_KEY not in data:
        return Fault(path, "The format number is missing", f"A case file begins with {FORMAT_KEY}: {FORMAT}")
    number = data[FORMAT_KEY]
    if _is_newer(data):
        found = f"A newer Headfall wrote this case (format {shown(number)}; this version reads {FORMAT})"
        return Fault(path, found, "Open it with that version")
    if isinstance(number, int) and not isinstance(number, bool) and number == FORMAT:
        return None
    return Fault(path, f"{shown(number)} is not a format number", f"the whole number {FORMAT}")
