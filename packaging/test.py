"""Run every check of the project, from the layout of the text to the tests.

    python packaging/test.py                 everything
    python packaging/test.py -- -k drum      the tests are narrowed by pytest's own arguments, in one process

The environment is made in ``.venv`` beside the project when it is not there or no longer current. On Debian and
Ubuntu, and as root, packages of the system that are lacking are installed; else the line that installs them is said.
Untried on Windows and macOS.
"""

from __future__ import annotations

import argparse
import os
import subprocess
import sys
import time
from dataclasses import dataclass

from environment import PROJECT, NotReadyError, environment_command, prepare, require_display_libraries, say


@dataclass(frozen=True)
class Step:
    """One check: its name, its command, and whether its output is shown as it comes or only on a fault."""

    name: str
    command: list[str]
    shown: bool = False


def main() -> int:
    """Run the checks and return the exit status: 0 when all held, 1 when one did not, 2 when they could not start."""
    arguments = _arguments()
    try:
        prepare(with_tests=True)
        require_display_libraries("offscreen")
    except NotReadyError as lack:
        say(str(lack))
        return 2
    failed = [step.name for step in _steps(arguments) if not _holds(step)]
    if failed:
        say(f"Did not hold: {', '.join(failed)}.")
        return 1
    say("Every check held.")
    return 0


def _arguments() -> list[str]:
    parser = argparse.ArgumentParser(description=__doc__, formatter_class=argparse.RawDescriptionHelpFormatter)
    parser.add_argument("pytest", nargs="*", metavar="-- ARGUMENT", help="arguments handed on to pytest")
    return list(parser.parse_args().pytest)


def _steps(arguments: list[str]) -> list[Step]:
    ruff = str(environment_command("ruff"))
    # A file of tests stays in one process, so that its slow fixtures are made once.
    spread = arguments or ["-n", "2", "--dist", "loadfile"]
    return [
        Step("ruff check", [ruff, "check", "--quiet", "."]),
        Step("ruff format", [ruff, "format", "--quiet", "--diff", "."]),
        Step("mypy", [str(environment_command("mypy"))]),
        Step("import contracts", [str(environment_command("lint-imports"))]),
        Step("pytest", [str(environment_command("pytest")), *spread], shown=True),
    ]


def _holds(step: Step) -> bool:
    """Run one check, say its line, and tell whether it held."""
    begun = time.monotonic()
    surroundings = {**os.environ, "QT_QPA_PLATFORM": "offscreen"}
    # A path set for another checkout would have the checks look at that one.
    surroundings.pop("PYTHONPATH", None)
    if step.shown:
        say(f"{step.name} …")
    ran = subprocess.run(
        step.command,
        cwd=PROJECT,
        env=surroundings,
        stdout=None if step.shown else subprocess.PIPE,
        stderr=None if step.shown else subprocess.STDOUT,
        text=True,
        encoding="utf-8",
        errors="replace",
    )
    if ran.returncode and ran.stdout:
        say(ran.stdout.rstrip())
    say(f"{step.name:<18}{time.monotonic() - begun:7.1f} s   {'did not hold' if ran.returncode else 'held'}")
    return ran.returncode == 0


if __name__ == "__main__":
    sys.exit(main())
