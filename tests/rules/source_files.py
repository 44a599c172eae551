"""The project's own files, as the tests of house rules read them."""

from __future__ import annotations

import ast
from collections.abc import Iterator
from functools import cache
from pathlib import Path

PROJECT = Path(__file__).resolve().parents[2]
ROOMS = ("core", "app", "packaging", "tests")
TEXT_SUFFIXES = {".py", ".json", ".md", ".toml", ".headfall", ".txt", ".svg", ".yml", ".yaml", ".sh", ".in", ".cfg"}

Function = ast.FunctionDef | ast.AsyncFunctionDef
Documented = ast.Module | ast.ClassDef | Function


def python_files(*rooms: str) -> list[Path]:
    """Return the Python files of the rooms, all rooms where none is named; never an empty list."""
    files = [file for room in rooms or ROOMS for file in sorted((PROJECT / room).rglob("*.py"))]
    if not files:
        raise FileNotFoundError(f"no Python file in {rooms or ROOMS}")
    return files


def text_files() -> list[Path]:
    """Return every text file of the project that people read or programs load."""
    rooms = [PROJECT / name for name in (*ROOMS, "resources")]
    inside = [file for room in rooms for file in sorted(room.rglob("*")) if file.suffix in TEXT_SUFFIXES]
    return inside + [file for file in sorted(PROJECT.iterdir()) if file.suffix in TEXT_SUFFIXES]


def shown(file: Path) -> str:
    """Return the path as it stands in a list of faults."""
    return file.relative_to(PROJECT).as_posix()


@cache
def syntax(file: Path) -> ast.Module:
    """Return the syntax tree of a file."""
    return ast.parse(file.read_text(encoding="utf-8"), str(file))


def docstring_nodes(tree: ast.Module) -> set[ast.Constant]:
    """Return the strings that stand alone as a statement: docstrings of modules, classes, functions and attributes."""
    return {
        node.value
        for node in ast.walk(tree)
        if isinstance(node, ast.Expr) and isinstance(node.value, ast.Constant) and isinstance(node.value.value, str)
    }


def spoken_strings(file: Path) -> Iterator[tuple[int, str]]:
    """Yield line and text of every string of a Python file that is not a docstring."""
    tree = syntax(file)
    silent = docstring_nodes(tree)
    for node in ast.walk(tree):
        if isinstance(node, ast.Constant) and isinstance(node.value, str) and node not in silent:
            yield node.lineno, node.value
