"""Which groups and rows the entry panel shows for a case; worked out from the case's own metadata, no widgets."""

from __future__ import annotations

from collections.abc import Iterator
from typing import Any

from headfall.case.attributes import attributes_of
from headfall.case.model import Case, Levels, Liquid, SteadyInflow, Structure, Surroundings, Tables, Target
from headfall_app.entry.plan_outlets import outlet_rows
from headfall_app.entry.plan_rows import Group, Row, choice_row, plain_row, plain_rows
from headfall_app.entry.plan_vessel import beside_rows, vessel_rows
from headfall_app.words import words

__all__ = ["Group", "Row", "groups_of"]

_PARTS_OF_ROWS = ("vessel", "outlets", "liquid", "headspace", "target")


def rows_hang_on(case: Case) -> tuple[Any, ...]:
    """Return the parts of a case that its rows hang on: while they are the same objects, so are the rows."""
    return tuple(getattr(case, name) for name in _PARTS_OF_ROWS)


def groups_of(case: Case) -> tuple[Group, ...]:
    """Return the groups of the entry panel for the case, in the order they stand."""
    outlets = tuple(
        Group(f"outlets.{index}", ("outlets", index), tuple(outlet_rows(case, index)))
        for index in range(len(case.outlets))
    )
    return (
        Group("vessel", ("vessel",), tuple(vessel_rows(("vessel",), case.vessel))),
        Group("inside", ("vessel",), tuple(beside_rows(("vessel",), case.vessel)), folds=True),
        Group("liquid", ("liquid",), tuple(_liquid_rows(case))),
        *outlets,
        _part("inflow", case.inflow or SteadyInflow()),
        _part("levels", case.levels or Levels()),
        Group("headspace", ("headspace",), tuple(_headspace_rows(case))),
        Group("target", ("target",), tuple(_target_rows(case))),
        _part("tables", case.tables or Tables()),
        _part("structure", case.structure or Structure()),
        _part("surroundings", case.surroundings or Surroundings()),
        Group("heading", (), tuple(plain_rows((), case, only_text=True)), folds=True),
    )


def _part(key: str, value: Any) -> Group:
    return Group(key, (key,), tuple(plain_rows((key,), value)), folds=key in words()["folded"])


def _liquid_rows(case: Case) -> Iterator[Row]:
    liquid, known = case.liquid or Liquid(), attributes_of(Liquid)
    yield choice_row(("liquid",), "liquid", "liquid")
    own, by_table = liquid.density is not None, liquid.properties is not None
    names = ["name"] if own or by_table else []
    names.append("temperature")
    names += ["density", "viscosity", "vapour_pressure"] if own else []
    names += ["properties"] if by_table else []
    names += [] if own else ["also_at"]
    for name in names:
        yield from plain_row(("liquid", name), known[name].metadata)


def _headspace_rows(case: Case) -> Iterator[Row]:
    yield choice_row(("headspace",), "headspace", "headspace")
    if case.headspace is not None:
        yield from plain_rows(("headspace",), case.headspace)


def _target_rows(case: Case) -> Iterator[Row]:
    target = case.target or Target()
    yield from plain_rows(("target",), target)
    yield choice_row(("target", "flow_at"), "target.flow_at", "flow_limit")
    if target.flow_at is not None:
        yield from plain_rows(("target", "flow_at"), target.flow_at)
