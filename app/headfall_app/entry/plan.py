"""Which groups and rows the entry panel shows for a case; worked out from the case's own metadata, no widgets."""

from __future__ import annotations

from collections.abc import Iterator, Mapping
from dataclasses import Field, dataclass, fields
from typing import Any

from headfall.case.model import (
    Case,
    CoefficientRange,
    Levels,
    Liquid,
    Path,
    SteadyInflow,
    Structure,
    Surroundings,
    Target,
)
from headfall_app.words import choices_of, key_of, label_of, words


@dataclass(frozen=True, slots=True)
class Row:
    """One row: where its value stands, which widget it takes, and what that widget needs to know.

    ``kind`` is ``quantity``, ``number``, ``text`` or ``choice``; ``change`` says what choosing does: ``set`` replaces
    the value, the others (``shape``, ``end``, ``opening``, ``coefficient``, ``headspace``) reshape the case in place.
    """

    path: Path
    kind: str
    label: str
    dimension: str = ""
    default: str = ""
    required: bool = False
    choices: tuple[tuple[str, str], ...] = ()
    change: str = "set"
    whole: bool = False
    tip: str = ""


@dataclass(frozen=True, slots=True)
class Group:
    """One group of rows under a heading."""

    key: str
    path: Path
    rows: tuple[Row, ...]
    folds: bool = False


def groups_of(case: Case) -> tuple[Group, ...]:
    """Return the groups of the entry panel for the case, in the order they stand."""
    outlets = tuple(
        Group(f"outlets.{index}", ("outlets", index), tuple(_outlet_rows(case, index)))
        for index in range(len(case.outlets))
    )
    return (
        Group("vessel", ("vessel",), tuple(_vessel_rows(case))),
        _part("liquid", case.liquid or Liquid()),
        *outlets,
        _part("inflow", case.inflow or SteadyInflow()),
        _part("levels", case.levels or Levels()),
        Group("headspace", ("headspace",), (_choice(("headspace",), "headspace", "headspace"),)),
        _part("target", case.target or Target()),
        _part("structure", case.structure or Structure()),
        _part("surroundings", case.surroundings or Surroundings()),
        Group("heading", (), tuple(_plain_rows((), case, only_text=True)), folds=True),
    )


def _part(key: str, value: Any) -> Group:
    return Group(key, (key,), tuple(_plain_rows((key,), value)), folds=key in words()["folded"])


def _vessel_rows(case: Case) -> Iterator[Row]:
    yield _choice(("vessel",), "vessel.shape", "shape", label=label_of(("vessel", "shape")))
    for attribute in fields(case.vessel):
        path = ("vessel", attribute.name)
        if "end" in attribute.metadata:
            yield from _end_rows(path, getattr(case.vessel, attribute.name), attribute.metadata)
        elif key_of(path) not in words()["hidden"]:
            yield from _plain_row(path, attribute)


def _end_rows(path: Path, value: Any, metadata: Mapping[str, Any]) -> Iterator[Row]:
    choices = choices_of("end") + (choices_of("pair") if metadata.get("pair") else ())
    yield Row(path, "choice", label_of(path), default=metadata["default"], choices=choices, change="end")
    if isinstance(value, tuple):
        for index, end in enumerate(value):
            yield Row((*path, index), "choice", label_of((*path, index)), choices=choices_of("end"), change="end")
            yield from _plain_rows((*path, index), end)
    elif value is not None:
        yield from _plain_rows(path, value)


def _outlet_rows(case: Case, index: int) -> Iterator[Row]:
    outlet = case.outlets[index]
    attributes = {attribute.name: attribute for attribute in fields(outlet)}
    for name in words()["order"]["outlets"]:
        path: Path = ("outlets", index, name)
        if key_of(path) in words()["hidden"] or not _applies(case, outlet, key_of(path)):
            continue
        if name == "opening":
            yield _choice(path, "outlets.opening", "opening")
            yield from _plain_rows(path, outlet.opening)
        elif name == "coefficient":
            yield _choice(path, "outlets.coefficient", "coefficient", default="handbook")
            if isinstance(outlet.coefficient, CoefficientRange):
                yield from _plain_rows(path, outlet.coefficient)
        else:
            yield from _plain_row(path, attributes[name], variant=outlet.facing or "down")


def _applies(case: Case, outlet: Any, key: str) -> bool:
    rule = words()["only"].get(key)
    if rule is None:
        return True
    if "vessel" in rule:
        return case.vessel.shape in rule["vessel"]
    # An attribute that is typed is shown in any case, so that it can be taken out again.
    typed = getattr(outlet, key.rsplit(".", 1)[-1]) is not None
    return typed or getattr(outlet, rule["attribute"]) in rule["values"]


def _plain_rows(path: Path, value: Any, only_text: bool = False) -> Iterator[Row]:
    for attribute in fields(value):
        if not only_text or "text" in attribute.metadata:
            yield from _plain_row((*path, attribute.name), attribute)


def _plain_row(path: Path, attribute: Field[Any], variant: str = "") -> Iterator[Row]:
    facts, key = attribute.metadata, key_of(path)
    label, tip = label_of(path, variant), _tip(key, variant)
    default, required = _as_typed(facts.get("default")), bool(facts.get("required"))
    if key in words()["choices"]:
        yield _choice(path, key, "set", default=default)
    elif "dimension" in facts:
        yield Row(path, "quantity", label, facts["dimension"], default, required, tip=tip)
    elif "number" in facts or "integer" in facts:
        yield Row(path, "number", label, default=default, required=required, whole="integer" in facts, tip=tip)
    elif "text" in facts:
        yield Row(path, "text", label, default=default, tip=tip)


def _choice(path: Path, key: str, change: str, *, label: str = "", default: str = "") -> Row:
    return Row(
        path, "choice", label or label_of(path), default=default, choices=choices_of(key), change=change, tip=_tip(key)
    )


def _tip(key: str, variant: str = "") -> str:
    tips = words()["tips"]
    tip: str = tips.get(f"{key}.{variant}") or tips.get(key, "")
    return tip


def _as_typed(default: Any) -> str:
    return "" if default is None else f"{default:g}" if isinstance(default, (int, float)) else str(default)
