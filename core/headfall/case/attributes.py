"""What the dataclasses of the model say about themselves, for reading, writing and changing a case."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass, fields, is_dataclass
from types import UnionType
from typing import Any, get_args, get_origin, get_type_hints

_DISCRIMINATORS = ("shape", "form", "kind")


@dataclass(frozen=True, slots=True)
class Attribute:
    """One attribute of a part: its name, its metadata, and the kinds of part it may hold (none for a plain value).

    ``key`` is its key in the file, which differs from the name where Python keeps the word for itself. ``many`` is
    true for a list of parts.
    """

    name: str
    key: str
    metadata: Mapping[str, Any]
    variants: tuple[type, ...]
    many: bool
    required: bool

    def default_part(self) -> Any:
        """Return the part that counts when nothing was typed; raises ``LookupError`` where there is none."""
        wanted = self.metadata.get("default")
        for variant in self.variants:
            known = discriminator(variant)
            if any(item.required for item in attributes_of(variant).values()):
                continue
            if len(self.variants) == 1 or (known is not None and known[1] == wanted):
                return variant()
        raise LookupError(f"{self.key} has no part to begin with")


_READ: dict[type, Mapping[str, Attribute]] = {}


def attributes_of(part: type) -> Mapping[str, Attribute]:
    """Return the attributes of a dataclass of the model by their keys, in the order of the file."""
    if part not in _READ:
        _READ[part] = _attributes(part)
    return _READ[part]


def field_of(key: str) -> str:
    """Return the name of the dataclass's field for a key of the file: ``from_`` for ``from``, else the key itself."""
    return f"{key}_" if key in _KEPT_BY_PYTHON else key


def discriminator(part: type) -> tuple[str, str] | None:
    """Return the key and the word by which the file tells this part from its kin, or None for a part without kin."""
    for key in _DISCRIMINATORS:
        word = vars(part).get(key)
        if isinstance(word, str):
            return key, word
    return None


_KEPT_BY_PYTHON = ("from",)


def _attributes(part: type) -> Mapping[str, Attribute]:
    hints = get_type_hints(part)
    found = {}
    for item in fields(part):
        key = next((word for word in _KEPT_BY_PYTHON if field_of(word) == item.name), item.name)
        variants = _variants(hints[item.name])
        # The three parts without metadata and without a default are the ones that Case cannot do without.
        required = bool(item.metadata.get("required", item.default is not None))
        many = bool(variants) and _is_list(hints[item.name])
        found[key] = Attribute(item.name, key, item.metadata, variants, many, required)
    return found


def _is_list(hint: object) -> bool:
    if isinstance(hint, UnionType):
        return any(_is_list(member) for member in get_args(hint))
    return get_origin(hint) is tuple and Ellipsis in get_args(hint)


def _variants(hint: object) -> tuple[type, ...]:
    if isinstance(hint, type) and is_dataclass(hint):
        return () if hint.__name__ == "Quantity" else (hint,)
    if isinstance(hint, UnionType) or get_origin(hint) is tuple:
        found: list[type] = []
        for member in get_args(hint):
            found.extend(variant for variant in _variants(member) if variant not in found)
        return tuple(found)
    return ()
