"""Sizes of a vessel told as those of another shape, as a beginning that a person then changes."""

from __future__ import annotations

import math
from dataclasses import replace
from itertools import pairwise
from typing import Any

from headfall.case.attributes import attributes_of
from headfall.case.model import (
    Basin,
    Box,
    Cone,
    Drum,
    RectangularOpening,
    RoundOpening,
    Sphere,
    Stack,
    TableVessel,
    UprightCylinder,
)
from headfall.quantities import Quantity, written

# For every size of a shape: the sizes of the former shape that may stand in for it, best first.
_STANDING_IN: dict[type, dict[str, tuple[str, ...]]] = {
    UprightCylinder: {
        "diameter": ("diameter", "top_diameter", "bottom_diameter", "width", "base_width"),
        "height": ("height", "length", "depth", "diameter"),
    },
    Box: {
        "length": ("length", "diameter", "top_diameter", "bottom_diameter", "base_length", "base_width"),
        "width": ("width", "diameter", "top_diameter", "bottom_diameter", "base_width", "base_length"),
        "height": ("height", "depth", "diameter"),
    },
    Cone: {
        "top_diameter": ("diameter", "width", "base_width"),
        "bottom_diameter": ("diameter", "width", "base_width"),
        "height": ("height", "length", "depth", "diameter"),
    },
    Drum: {
        "diameter": ("diameter", "top_diameter", "bottom_diameter", "width", "base_width"),
        "length": ("length", "height", "base_length", "diameter"),
    },
    Sphere: {"diameter": ("diameter", "top_diameter", "bottom_diameter", "width", "base_width")},
    Basin: {
        "base_length": ("length", "diameter", "bottom_diameter", "top_diameter"),
        "base_width": ("width", "diameter", "bottom_diameter", "top_diameter"),
        "depth": ("height", "diameter"),
    },
    RoundOpening: {"diameter": ("width",)},
    RectangularOpening: {"width": ("diameter",), "height": ("diameter",)},
}
_FEET = ("ft", "foot", "feet", "in", "'", '"')
_DIGITS = 4


def sizes_of(former: Any, kind: type) -> dict[str, Any]:
    """Return the sizes of a part of another kind, each taken from the former as it was typed."""
    former = _with_sizes(former)
    sizes = {}
    for name, candidates in _STANDING_IN[kind].items():
        typed = [getattr(former, candidate, None) for candidate in candidates]
        # A cone's point has a diameter of nil, which no other shape can take over.
        typed += [getattr(former, attribute.name) for attribute in attributes_of(type(former)).values()]
        sizes[name] = next(size for size in typed if isinstance(size, Quantity) and size.value > 0)
    return sizes


def table_of(former: Any) -> TableVessel:
    """Return a table of two rows, the bottom and the top, for a vessel with sizes."""
    former = _with_sizes(former)
    height = _height(former)
    bottom, top = _areas(former)
    unit = "ft²" if height.unit.startswith(_FEET) else "m²"
    level = written(0.0, height.unit, "length")
    rows = tuple((at, written(area, unit, "area", _DIGITS)) for at, area in ((level, bottom), (height, top)))
    return TableVessel(column="area", between="conic" if bottom != top else None, rows=rows)


def stack_of(former: Any) -> Stack:
    """Return a stack of a vessel with another on top of the same width; its displacement counts for the whole."""
    displacement = former.displacement
    first = replace(former, displacement=None)
    return Stack(parts=(first, on_top_of(first)), displacement=displacement)


def on_top_of(part: Any) -> Any:
    """Return a vessel with straight walls that fits on top of a part of a stack and is as wide and as high."""
    height = _height(_with_sizes(part))
    if isinstance(part, Basin):
        slope = part.side_slope if isinstance(part.side_slope, tuple) else (part.side_slope, part.side_slope)
        length, width = (
            written(base.value + 2 * part.depth.value * across, part.depth.unit, "length", _DIGITS)
            for base, across in zip((part.base_length, part.base_width), slope, strict=True)
        )
        return Box(length=length, width=width, height=height)
    walls: dict[str, Any] = {name: getattr(part, name, None) for name in ("sizes", "wall", "lining")}
    if isinstance(part, Box):
        return Box(length=part.length, width=part.width, height=height, **walls)
    return UprightCylinder(diameter=sizes_of(part, UprightCylinder)["diameter"], height=height, **walls)


def _with_sizes(former: Any) -> Any:
    """Return a vessel that has sizes of its own: the first of a stack, or the upright cylinder like a table."""
    if isinstance(former, Stack):
        return _with_sizes(former.parts[0])
    if not isinstance(former, TableVessel):
        return former
    height = former.rows[-1][0]
    diameter = math.sqrt(4 * _held(former) / (math.pi * height.value))
    unit = height.unit
    return UprightCylinder(diameter=written(diameter, unit, "length", _DIGITS), height=height)


def _held(table: TableVessel) -> float:
    """Return about how much a table's vessel holds [m³]."""
    values = [row[1].value for row in table.rows]
    if table.column == "volume":
        return values[-1]
    if table.column == "increment":
        return sum(values)
    return sum(
        0.5 * (low[1].value + high[1].value) * (high[0].value - low[0].value) for low, high in pairwise(table.rows)
    )


def _height(former: Any) -> Quantity:
    height: Quantity = sizes_of(former, UprightCylinder)["height"]
    return former.diameter if isinstance(former, Drum) else height


def _areas(former: Any) -> tuple[float, float]:
    """Return the plan areas [m²] at the bottom and the top of a vessel with sizes; of a drum their mean."""
    if isinstance(former, Box):
        area = former.length.value * former.width.value
        return area, area
    if isinstance(former, Basin):
        top = on_top_of(former)
        return former.base_length.value * former.base_width.value, top.length.value * top.width.value
    if isinstance(former, Cone):
        return _circle(former.bottom_diameter.value), _circle(former.top_diameter.value)
    area = _circle(former.diameter.value)
    if isinstance(former, Drum):
        area *= former.length.value / former.diameter.value
    return area, area


def _circle(diameter: float) -> float:
    return math.pi / 4 * diameter**2
