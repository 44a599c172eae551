"""Faults between the entries of one weir."""

from __future__ import annotations

import math
from collections.abc import Collection, Mapping
from typing import Any

from headfall.case.faults import Fault
from headfall.case.model import Path, Weir
from headfall.case.values import either, wanted_of

Values = Mapping[str, Any]

NEEDED = {
    "rectangular": ("width",),
    "vnotch": ("angle",),
    "broad_crested": ("width",),
    "standpipe": ("diameter",),
}
"""The sizes that each form of a weir needs."""

TAKEN = {
    "rectangular": ("width", "channel_width"),
    "vnotch": ("angle",),
    "broad_crested": ("width",),
    "standpipe": ("diameter", "discharge_elevation", "roughness"),
}
"""The sizes that each form of a weir takes; all others are refused."""

SIZES = ("width", "channel_width", "angle", "diameter", "discharge_elevation", "roughness")
"""The sizes that some forms of a weir take and others do not."""


def weir_faults(values: Values, unsound: Collection[str], path: Path) -> list[Fault]:
    """Return the faults of sizes that a weir's form needs or does not take, and of sizes that do not fit each other."""
    form = values.get("form")
    if form is None:
        return []
    faults = []
    for name in SIZES:
        words = name.replace("_", " ")
        if name in NEEDED[form] and name not in values and name not in unsound:
            metadata = Weir.__dataclass_fields__[name].metadata
            faults.append(Fault((*path, name), f"The form {form} needs its {words}", wanted_of(metadata)))
        elif name not in TAKEN[form] and name in values:
            takers = [other for other in TAKEN if name in TAKEN[other]]
            instead = f"Leave it out, or choose the form {either(takers)}"
            faults.append(Fault((*path, name), f"The form {form} takes no {words}", instead))
    return faults or _fit_faults(values, path)


def _fit_faults(values: Values, path: Path) -> list[Fault]:
    faults = []
    said = {name: value.text.strip() for name, value in values.items() if hasattr(value, "text")}
    width, channel = values.get("width"), values.get("channel_width")
    if width is not None and channel is not None and channel.value < width.value:
        found = f"A channel of {said['channel_width']} is narrower than the crest, {said['width']}"
        faults.append(Fault((*path, "channel_width"), found, "a width at least that of the crest"))
    angle = values.get("angle")
    if angle is not None and angle.value >= math.pi * (1 - 1e-12):
        faults.append(Fault((*path, "angle"), f"{said['angle']} is no notch", "an angle below 180°, such as 90°"))
    crest, lower = values.get("crest"), values.get("discharge_elevation")
    if crest is not None and lower is not None and lower.value >= crest.value:
        found = f"The lower end at {said['discharge_elevation']} is not below the crest, {said['crest']}"
        faults.append(Fault((*path, "discharge_elevation"), found, "a height below the crest"))
    return faults
