"""What the import contracts cannot see: what a fresh interpreter loads, and a core that works where Qt is not."""

from __future__ import annotations

import subprocess
import sys
from pathlib import Path

import pytest

PROJECT = Path(__file__).resolve().parents[2]
EXAMPLES = sorted((PROJECT / "resources" / "examples").glob("*.headfall"))

# Only distributions count: the standard library and what the interpreter loads by itself before the first line do not.
REPORT = """
import sys
before = set(sys.modules)
{body}
loaded = {{name.partition(".")[0] for name in set(sys.modules) - before}} - set(sys.stdlib_module_names)
print(" ".join(sorted(loaded)))
"""

WITHOUT_QT = """
import importlib.abc
class Absent(importlib.abc.MetaPathFinder):
    def find_spec(self, name, path=None, target=None):
        if name.partition(".")[0] in {"PySide6", "shiboken6", "pyqtgraph"}:
            raise ModuleNotFoundError(name)
sys.meta_path.insert(0, Absent())
"""

SOLVE = """
from headfall.files import read_case
from headfall.study import solve
solve(read_case(r"%s"))
"""


def modules_loaded_by(body: str) -> set[str]:
    """Return the top-level modules, the standard library's left out, that a fresh interpreter loads for these lines."""
    paths = f"import sys; sys.path[:0] = [r'{PROJECT / 'core'}', r'{PROJECT / 'app'}']"
    ran = subprocess.run(
        [sys.executable, "-c", f"{paths}\n{REPORT.format(body=body)}"], capture_output=True, text=True, check=False
    )
    assert ran.returncode == 0, ran.stderr
    return set(ran.stdout.split())


def test_a_fresh_import_of_the_core_loads_numpy_alone() -> None:
    loaded = modules_loaded_by("import headfall")
    assert "headfall" in loaded
    assert loaded <= {"headfall", "numpy"}


@pytest.mark.parametrize("case_file", EXAMPLES, ids=lambda file: file.stem)
def test_the_main_path_loads_numpy_alone(case_file: Path) -> None:
    loaded = modules_loaded_by(SOLVE % case_file)
    assert loaded == {"headfall", "numpy"}


def test_the_whole_core_imports_where_qt_is_not() -> None:
    rooms = sorted(
        file.relative_to(PROJECT / "core").with_suffix("").as_posix().replace("/", ".").removesuffix(".__init__")
        for file in (PROJECT / "core" / "headfall").rglob("*.py")
    )
    loaded = modules_loaded_by(WITHOUT_QT + "\n".join(f"import {room}" for room in rooms))
    assert "headfall" in loaded
    assert loaded <= {"headfall", "numpy"}


def test_the_command_imports_without_what_is_slow_to_load() -> None:
    loaded = modules_loaded_by("import headfall_app.command")
    assert "headfall_app" in loaded
    assert not loaded & {"scipy", "pint", "pyqtgraph"}
