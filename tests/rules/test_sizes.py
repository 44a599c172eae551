"""Files and functions stay small enough to be read in one go."""

from __future__ import annotations

import ast

from tests.rules.source_files import python_files, shown, syntax

FILE_AIM, FILE_LIMIT = 300, 400
FUNCTION_AIM, FUNCTION_LIMIT = 40, 60


def file_lengths() -> dict[str, int]:
    """Lines of every Python file."""
    return {shown(file): len(file.read_text(encoding="utf-8").splitlines()) for file in python_files()}


def function_lengths() -> dict[str, int]:
    """Lines of every function, decorators and docstring included."""
    return {
        f"{shown(file)}:{node.lineno} {node.name}": (node.end_lineno or node.lineno) - node.lineno + 1
        for file in python_files()
        for node in ast.walk(syntax(file))
        if isinstance(node, ast.FunctionDef | ast.AsyncFunctionDef)
    }


def over(lengths: dict[str, int], bound: int) -> list[str]:
    """What is longer than the bound, longest first."""
    return [
        f"{length} lines: {name}"
        for name, length in sorted(lengths.items(), key=lambda item: -item[1])
        if length > bound
    ]


def test_no_file_is_longer_than_the_limit() -> None:
    lengths = file_lengths()
    print(f"over the aim of {FILE_AIM} lines:", *over(lengths, FILE_AIM), sep="\n")
    too_long = over(lengths, FILE_LIMIT)
    assert not too_long, "\n".join(too_long)


def test_no_function_is_longer_than_the_limit() -> None:
    lengths = function_lengths()
    print(f"over the aim of {FUNCTION_AIM} lines:", *over(lengths, FUNCTION_AIM), sep="\n")
    too_long = over(lengths, FUNCTION_LIMIT)
    assert not too_long, "\n".join(too_long)
