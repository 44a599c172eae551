"""From plain data to the parts of a case, with every fault named at its place."""

from __future__ import annotations

from collections.abc import Collection, Mapping
from typing import Any

from headfall.case.attributes import Attribute, attributes_of, discriminator
from headfall.case.between import faults_between
from headfall.case.faults import CaseError, Fault
from headfall.case.file_text import RepeatedKeys
from headfall.case.listed_values import read_pair, read_quantities, read_rows, wanted_pair, wanted_rows
from headfall.case.model import Levels, Path
from headfall.case.not_built import not_built_fault
from headfall.case.typed_quantity import called
from headfall.case.values import read_plain, shown, wanted_of
from headfall.case.word_faults import unknown_key, variant_of

# One readable level is worth checking against the vessel, even beside one that is not readable.
_KEPT_IN_PART = (Levels,)
_PLAIN_LISTS = {"rows": read_rows, "quantities": read_quantities, "or_pair": read_pair}


def repeated_faults(data: Mapping[str, Any], path: Path) -> list[Fault]:
    """Return the faults of the keys that a group of the file gives more than once."""
    repeated = data.repeated if isinstance(data, RepeatedKeys) else ()
    return [Fault((*path, key), "This key is given more than once", "Give it once") for key in repeated]


def read_values(
    data: Mapping[str, Any], part: type, path: Path, faults: list[Fault]
) -> tuple[dict[str, Any], Collection[str]]:
    """Return the readable attributes of a part by their keys, and the keys of those that have a fault."""
    known = attributes_of(part)
    values: dict[str, Any] = {}
    unsound = set()
    for key, item in data.items():
        before = len(faults)
        place = (*path, key)
        later = not_built_fault(place, item)
        if later is not None:
            faults.append(later)
        elif key not in known:
            faults.append(unknown_key(key, part, place))
        else:
            value = _read_value(item, known[key], place, faults)
            if value is not None:
                values[key] = value
        if len(faults) > before:
            unsound.add(key)
    for key, attribute in known.items():
        if attribute.required and key not in data:
            faults.append(Fault((*path, key), "This is missing", _wanted(attribute)))
            unsound.add(key)
    return values, unsound


def _read_part(data: object, attribute: Attribute, path: Path, faults: list[Fault]) -> Any:
    """Return the part, or None where it is faulty."""
    if not isinstance(data, dict):
        faults.append(Fault(path, f"{shown(data)} is not a group of keys", "a group of keys in braces"))
        return None
    faults.extend(repeated_faults(data, path))
    part = variant_of(data, attribute, path, faults)
    if part is None:
        return None
    before = len(faults)
    word = discriminator(part)
    members = {key: item for key, item in data.items() if word is None or key != word[0]}
    values, unsound = read_values(members, part, path, faults)
    faults.extend(faults_between(part, values, unsound, path))
    if len(faults) > before and part not in _KEPT_IN_PART:
        return None
    return part(**{attributes_of(part)[key].name: value for key, value in values.items()})


def _read_value(item: object, attribute: Attribute, path: Path, faults: list[Fault]) -> Any:
    """Return the value of an attribute, or None where it is faulty."""
    metadata = attribute.metadata
    if attribute.many:
        return _read_list(item, attribute, path, faults)
    if "tests" in metadata:
        return _read_tests(item, path, faults)
    if "coefficient" in metadata and item == "handbook":
        return item
    if attribute.variants:
        if "pair" in metadata and isinstance(item, list):
            return _read_two(item, attribute, path, faults)
        if isinstance(item, dict) or not ("or_part" in metadata or "coefficient" in metadata):
            return _read_built_part(item, attribute, path, faults)
        if "coefficient" in metadata:
            faults.append(Fault(path, f"{shown(item)} is not a coefficient", _wanted(attribute)))
            return None
    read = next((read for name, read in _PLAIN_LISTS.items() if name in metadata), read_plain)
    try:
        return read(item, metadata, path)
    except CaseError as refusal:
        faults.extend(refusal.faults)
        return None


def _read_built_part(item: object, attribute: Attribute, path: Path, faults: list[Fault]) -> Any:
    """Return the part; a key that turns it into a thing of later versions is its only fault."""
    if isinstance(item, dict) and ("or_part" in attribute.metadata or "coefficient" in attribute.metadata):
        later = [fault for key in item if (fault := not_built_fault((*path, key), item[key])) is not None]
        if later:
            faults.extend(later)
            return None
    return _read_part(item, attribute, path, faults)


def _read_list(item: object, attribute: Attribute, path: Path, faults: list[Fault]) -> Any:
    """Return the parts of a list; of the outlets those that are sound, with None for the others."""
    if not isinstance(item, list):
        faults.append(Fault(path, f"{shown(item)} is not a list", "a list in square brackets"))
        return None
    if not item and attribute.required:
        faults.append(Fault(path, "The list is empty", _wanted(attribute)))
        return None
    before = len(faults)
    parts = [_read_part(member, attribute, (*path, index), faults) for index, member in enumerate(item)]
    if attribute.name == "outlets":
        return parts
    return tuple(parts) if len(faults) == before else None


def _read_two(item: list[Any], attribute: Attribute, path: Path, faults: list[Fault]) -> tuple[Any, ...] | None:
    if len(item) != 2:
        found = f"A list of {len(item)} is not a pair"
        faults.append(Fault(path, found, "one head, or two: the low end, then the high end"))
        return None
    before = len(faults)
    pair = tuple(_read_part(member, attribute, (*path, index), faults) for index, member in enumerate(item))
    return pair if len(faults) == before else None


def _read_tests(item: object, path: Path, faults: list[Fault]) -> tuple[()] | None:
    if isinstance(item, list):
        return None if item else ()
    faults.append(Fault(path, f"{shown(item)} is not a list", "Leave the key out or give an empty list"))
    return None


def _wanted(attribute: Attribute) -> str:
    metadata = attribute.metadata
    if "coefficient" in metadata:
        return "handbook, or a group with low, typical and high"
    if attribute.many:
        return f"at least one {metadata.get('one', 'outlet')}"
    if "rows" in metadata:
        return wanted_rows(metadata)
    if "quantities" in metadata:
        return f"a list in square brackets, each entry {called(metadata['quantities'])}"
    if "or_pair" in metadata:
        return wanted_pair(metadata)
    if attribute.variants and "or_part" not in metadata:
        return f"a group of keys for the {attribute.key.replace('_', ' ')}"
    return wanted_of(metadata)
