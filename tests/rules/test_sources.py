"""Every coefficient, limit and check names a source that is on the list, and the list holds no other."""

from __future__ import annotations

import ast
import json
import re
from collections.abc import Iterator
from typing import Any

from tests.rules.source_files import PROJECT, docstring_nodes, python_files, shown, spoken_strings, syntax

DATA = PROJECT / "resources" / "core"
SOURCES: dict[str, dict[str, Any]] = json.loads((DATA / "sources.json").read_text(encoding="utf-8"))
STATUSES = {"read", "from memory", "common practice"}
IN_DOCSTRING = re.compile(r"\b[Ss]ources?:?\s+((?:``\w+``(?:,\s+|\s+and\s+)?)+)")


def data_sources(value: Any) -> Iterator[str]:
    """Every value of a key ``source`` in a data file."""
    if isinstance(value, dict):
        for key, inner in value.items():
            if key == "source":
                yield inner
            else:
                yield from data_sources(inner)
    elif isinstance(value, list):
        for inner in value:
            yield from data_sources(inner)


def named_in_data() -> dict[str, str]:
    """Source keys of the data files, and where each was met last."""
    return {
        key: shown(file)
        for file in sorted(DATA.glob("*.json"))
        if file.name != "sources.json"
        for key in data_sources(json.loads(file.read_text(encoding="utf-8")))
    }


def named_in_docstrings() -> dict[str, str]:
    """Source keys that docstrings of the core name."""
    return {
        key: shown(file)
        for file in python_files("core")
        for node in docstring_nodes(syntax(file))
        for group in IN_DOCSTRING.findall(str(node.value))
        for key in re.findall(r"``(\w+)``", group)
    }


def named_in_code() -> dict[str, str]:
    """Source keys that the code of the core names: arguments and constants called source."""
    named: dict[str, str] = {}
    for file in python_files("core"):
        for node in ast.walk(syntax(file)):
            if isinstance(node, ast.keyword):
                name, value = node.arg or "", node.value
            elif isinstance(node, ast.Assign) and isinstance(node.targets[0], ast.Name):
                name, value = node.targets[0].id, node.value
            else:
                continue
            if name.lower().strip("_").endswith("source") and isinstance(value, ast.Constant) and value.value:
                named[str(value.value)] = f"{shown(file)}:{node.value.lineno}"
    return named


def test_every_source_that_is_named_is_on_the_list() -> None:
    named = {**named_in_data(), **named_in_docstrings(), **named_in_code()}
    assert len(named) > 10
    assert {key: where for key, where in named.items() if key not in SOURCES} == {}


def test_every_source_on_the_list_is_used() -> None:
    spoken = {text for file in python_files("core") for _, text in spoken_strings(file)}
    used = spoken | named_in_data().keys() | named_in_docstrings().keys()
    assert [key for key in SOURCES if key not in used] == []


def test_every_source_says_what_it_is_and_how_far_it_was_read() -> None:
    for key, entry in SOURCES.items():
        assert entry.keys() == {"author", "year", "title", "where", "doi", "status"}, key
        assert entry["title"], key
        assert entry["status"] in STATUSES, key
