"""From plain data to a case, with every fault named at its place."""

from __future__ import annotations

from collections.abc import Collection, Mapping
from difflib import get_close_matches
from typing import Any

from headfall.case.attributes import Attribute, attributes_of, discriminator
from headfall.case.between import faults_between
from headfall.case.faults import CaseError, Fault
from headfall.case.file_text import RepeatedKeys
from headfall.case.model import Case, Levels, Path
from headfall.case.not_built import not_built_fault
from headfall.case.values import either, read_plain, shown, wanted_of

FORMAT = 1
"""The number of the file format that this version writes and reads."""

_FORMAT_KEY = "headfall"
# What counts where the word that tells a part from its kin was left out.
_WITHOUT_WORD = {"floor": "flat", "heads": "flat", "outlets": "orifice", "inflow": "steady"}
# One readable level is worth checking against the vessel, even beside one that is not readable.
_KEPT_IN_PART = (Levels,)
_LONGEST_LIST_OF_KEYS = 8


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
    parts, _ = _read_values({key: data[key] for key in data if key != _FORMAT_KEY}, Case, (), faults)
    faults[:0] = _repeated_faults(data, ())
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
    number = data.get(_FORMAT_KEY)
    return isinstance(number, int) and not isinstance(number, bool) and number > FORMAT


def _format_fault(data: Mapping[str, Any]) -> Fault | None:
    path: Path = (_FORMAT_KEY,)
    if _FORMAT_KEY not in data:
        return Fault(path, "The format number is missing", f"A case file begins with {_FORMAT_KEY}: {FORMAT}")
    number = data[_FORMAT_KEY]
    if _is_newer(data):
        found = f"A newer Headfall wrote this case (format {shown(number)}; this version reads {FORMAT})"
        return Fault(path, found, "Open it with that version")
    if isinstance(number, int) and not isinstance(number, bool) and number == FORMAT:
        return None
    return Fault(path, f"{shown(number)} is not a format number", f"the whole number {FORMAT}")


def _repeated_faults(data: Mapping[str, Any], path: Path) -> list[Fault]:
    repeated = data.repeated if isinstance(data, RepeatedKeys) else ()
    return [Fault((*path, key), "This key is given more than once", "Give it once") for key in repeated]


# Parts ----------------------------------------------------------------------------------------------------------------


def _read_part(data: object, attribute: Attribute, path: Path, faults: list[Fault]) -> Any:
    """Return the part, or None where it is faulty."""
    if not isinstance(data, dict):
        faults.append(Fault(path, f"{shown(data)} is not a group of keys", "a group of keys in braces"))
        return None
    faults.extend(_repeated_faults(data, path))
    part = _variant(data, attribute, path, faults)
    if part is None:
        return None
    before = len(faults)
    word = discriminator(part)
    members = {key: item for key, item in data.items() if word is None or key != word[0]}
    values, unsound = _read_values(members, part, path, faults)
    faults.extend(faults_between(part, values, unsound, path))
    return part(**values) if len(faults) == before or part in _KEPT_IN_PART else None


def _read_values(
    data: Mapping[str, Any], part: type, path: Path, faults: list[Fault]
) -> tuple[dict[str, Any], Collection[str]]:
    """Return the readable attributes of a part, and the names of those that have a fault."""
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
            faults.append(_unknown_key(key, part, place))
        else:
            value = _read_value(item, known[key], place, faults)
            later = not_built_fault(place, value)
            if later is not None:
                faults.append(later)
            elif value is not None:
                values[key] = value
        if len(faults) > before:
            unsound.add(key)
    for name, attribute in known.items():
        if attribute.required and name not in data:
            faults.append(Fault((*path, name), "This is missing", _wanted(attribute)))
            unsound.add(name)
    return values, unsound


def _read_value(item: object, attribute: Attribute, path: Path, faults: list[Fault]) -> Any:
    """Return the value of an attribute, or None where it is faulty."""
    metadata = attribute.metadata
    if attribute.many:
        return _read_list(item, attribute, path, faults)
    if "tests" in metadata:
        return _read_tests(item, path, faults)
    if "coefficient" in metadata:
        return _read_coefficient(item, attribute, path, faults)
    if attribute.variants:
        if "pair" in metadata and isinstance(item, list):
            return _read_pair(item, attribute, path, faults)
        return _read_part(item, attribute, path, faults)
    try:
        return read_plain(item, metadata, path)
    except CaseError as refusal:
        faults.extend(refusal.faults)
        return None


def _read_list(item: object, attribute: Attribute, path: Path, faults: list[Fault]) -> list[Any] | None:
    if not isinstance(item, list):
        faults.append(Fault(path, f"{shown(item)} is not a list", "a list in square brackets"))
        return None
    if not item:
        faults.append(Fault(path, "The list is empty", "at least one outlet"))
        return None
    return [_read_part(member, attribute, (*path, index), faults) for index, member in enumerate(item)]


def _read_pair(item: list[Any], attribute: Attribute, path: Path, faults: list[Fault]) -> tuple[Any, ...] | None:
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


def _read_coefficient(item: object, attribute: Attribute, path: Path, faults: list[Fault]) -> Any:
    if item == "handbook":
        return item
    if not isinstance(item, dict):
        faults.append(Fault(path, f"{shown(item)} is not a coefficient", _wanted(attribute)))
        return None
    if "from_test" in item:
        later = not_built_fault((*path, "from_test"), item["from_test"])
        faults.extend([] if later is None else [later])
        return None
    return _read_part(item, attribute, path, faults)


# Words ----------------------------------------------------------------------------------------------------------------


def _variant(data: Mapping[str, Any], attribute: Attribute, path: Path, faults: list[Fault]) -> type | None:
    """Return the kind of part that the data's own word names."""
    words = {found[1]: variant for variant in attribute.variants if (found := discriminator(variant))}
    if not words:
        return attribute.variants[0]
    first = discriminator(attribute.variants[0])
    key = first[0] if first else ""
    place = (*path, key)
    name = attribute.name if attribute.name != "heads" else "head"
    if key not in data and attribute.name in _WITHOUT_WORD:
        return words[_WITHOUT_WORD[attribute.name]]
    if key not in data:
        faults.append(Fault(place, f"The {key} is missing", either(tuple(words))))
        return None
    word = data[key]
    later = not_built_fault(place, word)
    if later is not None:
        faults.append(later)
    elif not isinstance(word, str):
        faults.append(Fault(place, f"{shown(word)} is not text", either(tuple(words))))
    elif word in words:
        return words[word]
    else:
        article = "an" if name[0] in "aeiou" else "a"
        kind = f"a kind of {name.rstrip('s')}" if key == "kind" else f"{article} {name} {key}"
        faults.append(Fault(place, f"{shown(word)} is not {kind} known here", either(tuple(words))))
    return None


def _unknown_key(key: str, part: type, path: Path) -> Fault:
    word = discriminator(part)
    keys = ([word[0]] if word else []) + list(attributes_of(part))
    if part is Case:
        keys.insert(0, _FORMAT_KEY)
    close = get_close_matches(key, keys, n=1)
    if close:
        wanted = f"Did you mean {close[0]}?"
    elif len(keys) <= _LONGEST_LIST_OF_KEYS:
        wanted = f"The keys known here are {' and '.join(filter(None, (', '.join(keys[:-1]), keys[-1])))}"
        wanted = wanted if len(keys) > 1 else f"The only key known here is {keys[0]}"
    else:
        wanted = "Leave it out, or see the page on the case file for the keys known here"
    return Fault(path, f"{shown(key)} is not a key known here", wanted)


def _wanted(attribute: Attribute) -> str:
    if "coefficient" in attribute.metadata:
        return "handbook, or a group with low, typical and high"
    if attribute.many:
        return "at least one outlet"
    return f"a group of keys for the {attribute.name}" if attribute.variants else wanted_of(attribute.metadata)
