"""From the bytes of a case file to plain data, and back to text."""

from __future__ import annotations

import json
from typing import Any

from headfall.case.faults import CaseError, Fault

# Longer whole numbers are read as floats, which makes them infinite: the reader then refuses them at their place.
_LONGEST_INTEGER = 300
_MEND = "Mend the file there, or open another"


class RepeatedKeys(dict[str, Any]):
    """A JSON object in which some keys stood more than once; the last value of each is kept."""

    def __init__(self, pairs: list[tuple[str, Any]]) -> None:
        super().__init__(pairs)
        keys = [key for key, _ in pairs]
        self.repeated = tuple(key for key in self if keys.count(key) > 1)


def data_from_bytes(content: bytes) -> object:
    """Return the data of a case file. Raises CaseError where it is no UTF-8 text or no JSON."""
    try:
        # Some editors put a byte order mark in front of UTF-8.
        text = content.decode("utf-8-sig")
    except UnicodeDecodeError as problem:
        found = f"The file is not UTF-8 text: byte {problem.start + 1} does not belong there"
        raise CaseError([Fault((), found, "Save it as UTF-8, or open another file")]) from None
    return data_from_text(text)


def data_from_text(text: str) -> object:
    """Return the data of a case's text. Raises CaseError where it is no JSON.

    NaN, infinities and numbers beyond the range of a float come back as floats that are not finite, and repeated keys
    as ``RepeatedKeys``, so that ``read_parts`` can name their places.
    """
    if not text.strip():
        raise CaseError([Fault((), "The file is empty", "Open another file")])
    try:
        return json.loads(text, parse_int=_integer, object_pairs_hook=_object)
    except json.JSONDecodeError as problem:
        found = f"The file is not JSON: it cannot be read from line {problem.lineno}, column {problem.colno}"
        raise CaseError([Fault((), found, _MEND)]) from None
    except RecursionError:
        raise CaseError([Fault((), "The file has brackets within brackets without end", _MEND)]) from None


def text_from_data(data: dict[str, Any]) -> str:
    """Return the text of a case file: two spaces of indent, letters as they are, a newline at the end.

    A list of plain values, such as a row of a table, stands on one line.
    """
    return _laid_out(data, "\n") + "\n"


def _laid_out(value: Any, line: str) -> str:
    """Return the text of a value; ``line`` begins a line with the indent that the value stands at."""
    inner = f"{line}  "
    if isinstance(value, dict) and value:
        members = [f"{_plain(key)}: {_laid_out(member, inner)}" for key, member in value.items()]
        return "{" + inner + f",{inner}".join(members) + line + "}"
    if isinstance(value, list) and any(isinstance(member, dict | list) for member in value):
        return "[" + inner + f",{inner}".join(_laid_out(member, inner) for member in value) + line + "]"
    return _plain(value)


def _plain(value: Any) -> str:
    return json.dumps(value, ensure_ascii=False, allow_nan=False)


def _integer(digits: str) -> int | float:
    return int(digits) if len(digits) <= _LONGEST_INTEGER else float(digits)


def _object(pairs: list[tuple[str, Any]]) -> dict[str, Any]:
    plain = dict(pairs)
    return plain if len(plain) == len(pairs) else RepeatedKeys(pairs)
