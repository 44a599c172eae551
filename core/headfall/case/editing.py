"""Changes to a case: every one gives back another case and leaves the former as it was."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import is_dataclass, replace
from typing import Any

from headfall.case.attributes import attributes_of, discriminator
from headfall.case.faults import CaseError, Fault, place
from headfall.case.model import Case, Orifice, Path
from headfall.case.reshaping import change_end_form, change_opening_form, change_shape
from headfall.case.values import read_plain, wanted_of
from headfall.quantities import Quantity
from headfall.quantities.number import NumberFault, exact, leading_number

__all__ = [
    "attribute_of",
    "change_end_form",
    "change_opening_form",
    "change_shape",
    "insert_outlet",
    "read_entry",
    "remove_outlet",
    "replace_at",
    "value_at",
]


def value_at(case: Case, path: Path) -> Any:
    """Return what stands at a path; None also where the part it belongs to was not typed.

    Raises LookupError where a case has nothing at that path.
    """
    value: Any = case
    for depth, key in enumerate(path):
        if value is None:
            attribute_of(case, path)
            return None
        value = _member(value, key, path[: depth + 1])
    return value


def replace_at(case: Case, path: Path, value: object) -> Case:
    """Return the case with another value at a path.

    A part that was not typed is begun with its default; a part without kin in which nothing is left is taken out
    again, so that an entry that is typed and cleared gives back the former case. Raises LookupError where a case has
    nothing at that path.
    """
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
    metadata: Mapping[str, Any] = {}
    for depth, key in enumerate(path):
        if isinstance(key, int):
            here = _member(here, key, path[: depth + 1]) if here is not None else None
            kinds = (type(here),) if here is not None else kinds
            continue
        found = [attribute for kind in kinds if (attribute := attributes_of(kind).get(key))] if _parts(kinds) else []
        if not found:
            raise LookupError(f"a case has nothing at {place(path)}")
        metadata = found[0].metadata
        here = getattr(here, key) if here is not None else None
        kinds = (type(here),) if here is not None else tuple(kind for item in found for kind in item.variants)
    return metadata


def read_entry(case: Case | type, path: Path, text: str) -> Quantity | int | float | str | None:
    """Return the value of a text typed for the attribute at a path; None for an empty text that may be left out.

    Raises CaseError, with one fault at that path, where the text is none of its kind.
    """
    metadata = attribute_of(case, path)
    if "text" in metadata:
        return read_plain(text, metadata, path)
    if not text.strip():
        if metadata.get("required"):
            raise CaseError([Fault(path, "Nothing is typed", wanted_of(metadata))])
        return None
    if "number" in metadata or "integer" in metadata:
        return read_plain(_typed_number(text, metadata, path), metadata, path)
    if "dimension" in metadata or "choices" in metadata:
        return read_plain(text, metadata, path)
    raise LookupError(f"{place(path)} is not an entry to type into")


def insert_outlet(case: Case, index: int, outlet: Orifice) -> Case:
    """Return the case with one more outlet, which then stands at the index."""
    return replace(case, outlets=(*case.outlets[:index], outlet, *case.outlets[index:]))


def remove_outlet(case: Case, index: int) -> Case:
    """Return the case without one of its outlets.

    Raises ValueError for the only outlet, since a case needs one, and LookupError for one that is not there.
    """
    _member(case.outlets, index, ("outlets", index))
    if len(case.outlets) == 1:
        raise ValueError("a case needs at least one outlet")
    return replace(case, outlets=case.outlets[:index] + case.outlets[index + 1 :])


def _parts(kinds: tuple[type, ...]) -> bool:
    return all(is_dataclass(kind) and kind is not Quantity for kind in kinds)


def _member(value: Any, key: str | int, path: Path) -> Any:
    """Return a member of a part or of a list of parts."""
    if isinstance(key, int):
        if isinstance(value, tuple) and 0 <= key < len(value):
            return value[key]
    elif _parts((type(value),)) and key in attributes_of(type(value)):
        return getattr(value, key)
    raise LookupError(f"a case has nothing at {place(path)}")


def _replaced(node: Any, path: Path, depth: int, value: object) -> Any:
    if depth == len(path):
        return value
    key = path[depth]
    former = _member(node, key, path[: depth + 1])
    if isinstance(key, int):
        member = _replaced(former, path, depth + 1, value)
        return (*node[:key], member, *node[key + 1 :])
    begun = former
    if former is None and depth + 1 < len(path):
        begun = attributes_of(type(node))[key].default_part()
    member = _replaced(begun, path, depth + 1, value)
    if value is None and depth + 1 < len(path):
        if former is None:
            return node
        if member != former and _is_empty(member):
            member = None
    return node if member is former else replace(node, **{key: member})


def _is_empty(part: Any) -> bool:
    if not is_dataclass(part) or discriminator(type(part)) is not None:
        return False
    return all(getattr(part, name) is None for name in attributes_of(type(part)))


def _typed_number(text: str, metadata: Mapping[str, Any], path: Path) -> int | float:
    """Return a plain number typed in a field: the number grammar of quantities, without a unit."""
    found, tidy = leading_number(text), text.strip()
    if found is None:
        raise CaseError([Fault(path, f"{tidy} is not a number", wanted_of(metadata))])
    sign, digits, rest = found
    if rest.strip():
        raise CaseError([Fault(path, f"{tidy} is more than a plain number", wanted_of(metadata))])
    try:
        number = exact(digits) * (-1 if sign == "-" else 1)
    except NumberFault as fault:
        instead = " or ".join(f"{sign}{plain}" for plain in fault.instead) or wanted_of(metadata)
        raise CaseError([Fault(path, fault.found, instead)]) from None
    return int(number) if number.denominator == 1 and digits.isdigit() else float(number)
