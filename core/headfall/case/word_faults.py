"""Words and keys of a file that are not known, and what was perhaps meant."""

from __future__ import annotations

from collections.abc import Mapping
from difflib import get_close_matches
from typing import Any

from headfall.case.attributes import Attribute, attributes_of, discriminator
from headfall.case.faults import Fault
from headfall.case.model import Case, Path
from headfall.case.not_built import not_built_fault
from headfall.case.values import either, shown

FORMAT_KEY = "headfall"
"""The key under which a file says the number of its format."""

# What counts where the word that tells a part from its kin was left out.
_WITHOUT_WORD = {"floor": "flat", "heads": "flat", "outlets": "orifice", "inflow": "steady"}
_LONGEST_LIST_OF_KEYS = 8


def variant_of(data: Mapping[str, Any], attribute: Attribute, path: Path, faults: list[Fault]) -> type | None:
    """Return the kind of part that the data's own word names, or None where it names none."""
    words = {found[1]: variant for variant in attribute.variants if (found := discriminator(variant))}
    if not words:
        return attribute.variants[0]
    first = discriminator(attribute.variants[0])
    key = first[0] if first else ""
    place = (*path, key)
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
        faults.append(Fault(place, f"{shown(word)} is not {_kind(attribute.name, key)} known here", either([*words])))
    return None


def unknown_key(key: str, part: type, path: Path) -> Fault:
    """Return the fault of a key that a part does not have, with the key that was perhaps meant."""
    word = discriminator(part)
    keys = ([word[0]] if word else []) + list(attributes_of(part))
    if part is Case:
        keys.insert(0, FORMAT_KEY)
    close = get_close_matches(key, keys, n=1)
    if close:
        wanted = f"Did you mean {close[0]}?"
    elif len(keys) <= _LONGEST_LIST_OF_KEYS:
        wanted = f"The keys known here are {' and '.join(filter(None, (', '.join(keys[:-1]), keys[-1])))}"
        wanted = wanted if len(keys) > 1 else f"The only key known here is {keys[0]}"
    else:
        wanted = "Leave it out, or see the page on the case file for the keys known here"
    return Fault(path, f"{shown(key)} is not a key known here", wanted)


def _kind(name: str, key: str) -> str:
    """Return what a word should have named: ``a vessel shape``, ``a kind of outlet``."""
    if name == "parts":
        return f"a {key} of stack parts"
    called = "head" if name == "heads" else name
    if key == "kind":
        return f"a kind of {called.rstrip('s') if name != 'headspace' else called}"
    return f"{'an' if called[0] in 'aeiou' else 'a'} {called} {key}"
