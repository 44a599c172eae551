"""What stands at a place of a case, what the place says about itself, and another value put there."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import is_dataclass, replace
from typing import Any

from headfall.case.attributes import Attribute, attributes_of, discriminator, field_of
from headfall.case.faults import place
from headfall.case.listed_values import cell_metadata, entry_metadata
from headfall.case.model import Case, Path, TableVessel
from headfall.quantities import Quantity


def value_at(case: Case, path: Path) -> Any:
    """Return what stands at a path; None also where the part it belongs to was not typed.

    Raises LookupError where a case has nothing at that path.
    """
    value: Any = case
    for depth, key in enumerate(path):
        if value is None or _is_left_out(value, key):
            attribute_of(case, path)
            return None
        value = member_of(value, key, path[: depth + 1])
    return value


def replace_at(case: Case, path: Path, value: object) -> Case:
    """Return the case with another value at a path.

    A part that was not typed is begun with its default; a part without kin in which nothing is left is taken out
    again, so that an entry that is typed and cleared gives back the former case. The last columns of a row, where
    they may be left out, come and go likewise. Raises LookupError where a case has nothing at that path.
    """
    if path and isinstance(path[-1], int):
        metadata = attribute_of(case, path)
        if "dimension" in metadata and not metadata["required"]:
            row, column = value_at(case, path[:-1]), path[-1]
            path, value = path[:-1], (*row[:column], *(() if value is None else (value,)))
    changed = _replaced(case, path, 0, value)
    if not isinstance(changed, Case):
        raise LookupError("a case cannot be replaced by one of its parts")
    return changed


def attribute_of(case: Case | type, path: Path) -> Mapping[str, Any]:
    """Return the metadata of the attribute at a path: its dimension, sign, default and the like.

    Given a case, parts that were not typed count as their defaults. Given a class of the model, the first kind of
    part that has the attribute answers. Raises LookupError where there is no such attribute.
    """
    here: Any = None if isinstance(case, type) else case
    kinds: tuple[type, ...] = (case,) if isinstance(case, type) else (type(case),)
    attribute: Attribute | None = None
    metadata: Mapping[str, Any] = {}
    for depth, key in enumerate(path):
        where = path[: depth + 1]
        if isinstance(key, int):
            metadata = _listed(attribute, metadata, key, where)
            here = _listed_member(here, key, metadata, where)
            kinds = (type(here),) if here is not None else kinds
            continue
        found = [item for kind in kinds if (item := attributes_of(kind).get(key))] if _parts(kinds) else []
        if not found:
            raise LookupError(f"a case has nothing at {place(path)}")
        attribute = found[0]
        metadata = _narrowed(attribute.metadata, here)
        here = getattr(here, attribute.name) if here is not None else None
        kinds = (type(here),) if here is not None else tuple(kind for item in found for kind in item.variants)
    return metadata


def member_of(value: Any, key: str | int, path: Path) -> Any:
    """Return a member of a part or of a list. Raises LookupError, naming the path, where there is none."""
    if isinstance(key, int):
        if isinstance(value, tuple) and 0 <= key < len(value):
            return value[key]
    elif _parts((type(value),)) and key in attributes_of(type(value)):
        return getattr(value, field_of(key))
    raise LookupError(f"a case has nothing at {place(path)}")


def _parts(kinds: tuple[type, ...]) -> bool:
    return bool(kinds) and all(is_dataclass(kind) and kind is not Quantity for kind in kinds)


def _narrowed(metadata: Mapping[str, Any], part: Any) -> Mapping[str, Any]:
    """Return the metadata of a table's rows with the one dimension that its column has."""
    if "rows" not in metadata or not isinstance(part, TableVessel) or part.column is None:
        return metadata
    return {**metadata, "rows": (metadata["rows"][0], "area" if part.column == "area" else "volume")}


def _listed(attribute: Attribute | None, metadata: Mapping[str, Any], key: int, path: Path) -> Mapping[str, Any]:
    """Return what a member of a list says about itself."""
    if "rows" in metadata:
        return {"row": metadata}
    if "row" in metadata:
        return cell_metadata(metadata["row"], key)
    if "quantities" in metadata:
        return entry_metadata(metadata)
    if "or_pair" in metadata and key in (0, 1):
        return {name: fact for name, fact in metadata.items() if name != "or_pair"}
    if attribute is None or not (attribute.many or "pair" in metadata):
        raise LookupError(f"a case has nothing at {place(path)}")
    return metadata


def _listed_member(here: Any, key: int, metadata: Mapping[str, Any], path: Path) -> Any:
    if here is None or (_is_left_out(here, key) and metadata.get("required") is False):
        return None
    return member_of(here, key, path)


def _is_left_out(node: Any, key: str | int) -> bool:
    """Whether a key is that of a column which a row does not have."""
    is_row = isinstance(node, tuple) and bool(node) and all(isinstance(cell, Quantity) for cell in node)
    return is_row and isinstance(key, int) and key >= len(node)


def _replaced(node: Any, path: Path, depth: int, value: object) -> Any:
    if depth == len(path):
        return value
    key = path[depth]
    if isinstance(key, int):
        member = _replaced(member_of(node, key, path[: depth + 1]), path, depth + 1, value)
        return (*node[:key], member, *node[key + 1 :])
    former = member_of(node, key, path[: depth + 1])
    begun = former
    if former is None and depth + 1 < len(path):
        begun = attributes_of(type(node))[key].default_part()
    member = _replaced(begun, path, depth + 1, value)
    if value is None and depth + 1 < len(path):
        if former is None:
            return node
        if member != former and _is_empty(member):
            member = None
    return node if member is former else replace(node, **{field_of(key): member})


def _is_empty(part: Any) -> bool:
    if not is_dataclass(part) or discriminator(type(part)) is not None:
        return False
    return all(getattr(part, attribute.name) is None for attribute in attributes_of(type(part)).values())
