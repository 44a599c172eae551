"""What the handbook says where nothing is typed: losses of fittings and entries, roughness of materials."""

from __future__ import annotations

from typing import Any

from headfall.case.model import Pipe
from headfall.outlet.handbook_losses import HandbookLoss, entry_loss, fitting, material_roughness
from headfall_app.document import Document
from headfall_app.entry.plan_outlets import USUAL_MATERIAL
from headfall_app.entry.plan_rows import Row
from headfall_app.entry.typed import value_or_none


def handbook_says(document: Document, row: Row) -> str:
    """Return what counts for an entry in which nothing is typed, from the handbook; empty where it says nothing."""
    part: Any = value_or_none(document.case, row.path[:-1])
    name = row.path[-1]
    if part is None or row.path[0] != "outlets":
        return ""
    if name == "entry_loss" and isinstance(part, Pipe):
        return _range(_entry(part))
    if name == "loss":
        known = fitting(part.name or "")
        return _range(known) if known else ""
    if name == "laminar_loss":
        known = fitting(part.name or "")
        return f"{known.laminar:.4g}" if known else ""
    if name == "roughness":
        found = material_roughness(_material(document, row, part))
        return _roughness(found[1], document) if found else ""
    return ""


def _material(document: Document, row: Row, part: Any) -> str:
    """Return the material of a pipe; of a further section the pipe's where it has none of its own."""
    pipe: Any = value_or_none(document.case, row.path[:2])
    return getattr(part, "material", None) or getattr(pipe, "material", None) or USUAL_MATERIAL


def _entry(pipe: Pipe) -> HandbookLoss:
    radius = pipe.edge_radius.value if pipe.edge_radius else 0.0
    return entry_loss(pipe.entry or "sharp_edged", pipe.bore.value, radius)


def _range(loss: HandbookLoss) -> str:
    return " · ".join(f"{value:.3g}" for value in (loss.low, loss.typical, loss.high))


def _roughness(value: float, document: Document) -> str:
    unit = document.display.unit("bore")
    return f"{value / document.display.factor('bore'):.3g}\u00a0{unit}"
