"""What is public in the core says what it is, and in which units its numbers are."""

from __future__ import annotations

import ast
import re
from collections.abc import Iterator
from pathlib import Path

from tests.rules.source_files import Documented, Function, python_files, shown, syntax

UNIT = re.compile(r"\[[^\[\]]+\]")
NUMBER = re.compile(r"\b(float|Array|Figure)\b")
# Typed text and print carry their unit with them: a function there takes a number of any kind.
UNITS_OF_ANY_KIND = ("core/headfall/quantities/", "core/headfall/case/", "core/headfall/sheet/")


def public_nodes(tree: ast.Module) -> Iterator[tuple[str, Documented, ast.ClassDef | None]]:
    """Every public module, class, function and method: its name, node and the class it belongs to."""
    yield "module", tree, None
    for node in tree.body:
        if isinstance(node, ast.FunctionDef | ast.ClassDef) and not node.name.startswith("_"):
            yield node.name, node, None
            if isinstance(node, ast.ClassDef):
                for member in node.body:
                    if isinstance(member, ast.FunctionDef) and not member.name.startswith("_"):
                        yield f"{node.name}.{member.name}", member, node


def core_nodes() -> Iterator[tuple[Path, str, Documented, ast.ClassDef | None]]:
    """The public nodes of the whole core."""
    for file in python_files("core"):
        for name, node, owner in public_nodes(syntax(file)):
            yield file, name, node, owner


def handles_numbers(function: Function) -> bool:
    """Whether a function takes or gives a number with a possible unit."""
    arguments = [*function.args.posonlyargs, *function.args.args, *function.args.kwonlyargs]
    annotations = [argument.annotation for argument in arguments] + [function.returns]
    return any(annotation is not None and NUMBER.search(ast.unparse(annotation)) for annotation in annotations)


def test_everything_public_in_the_core_has_a_docstring() -> None:
    silent = [f"{shown(file)}: {name}" for file, name, node, _ in core_nodes() if not ast.get_docstring(node)]
    assert not silent, "\n".join(silent)


def test_every_public_function_of_numbers_names_its_units() -> None:
    silent = []
    for file, name, node, owner in core_nodes():
        if not isinstance(node, Function) or shown(file).startswith(UNITS_OF_ANY_KIND) or not handles_numbers(node):
            continue
        told = (ast.get_docstring(node) or "") + (ast.get_docstring(owner) or "" if owner else "")
        if not UNIT.search(told):
            silent.append(f"{shown(file)}:{node.lineno} {name}")
    assert not silent, "\n".join(silent)


def test_the_rule_itself_sees_a_missing_unit() -> None:
    told = ast.parse('def area(level: float) -> float:\n    """Return the area [m²] at a level [m]."""').body[0]
    silent = ast.parse('def area(level: float) -> float:\n    """Return the area."""').body[0]
    assert isinstance(told, ast.FunctionDef) and isinstance(silent, ast.FunctionDef)
    assert handles_numbers(told) and handles_numbers(silent)
    assert UNIT.search(ast.get_docstring(told) or "")
    assert not UNIT.search(ast.get_docstring(silent) or "")
