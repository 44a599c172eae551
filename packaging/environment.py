"""The Python environment of a checkout, made in ``.venv`` from the pinned releases; standard library only.

Untried on Windows and macOS, though nothing here calls for Linux alone but the search for shared libraries,
which is left out elsewhere.
"""

from __future__ import annotations

import hashlib
import importlib.util
import json
import os
import platform
import shutil
import subprocess
import sys
from pathlib import Path

import system_libraries

PROJECT = Path(__file__).resolve().parents[1]
ENVIRONMENT = PROJECT / ".venv"
CONSTRAINTS = PROJECT / "packaging" / "constraints.txt"
STAMP = ENVIRONMENT / "headfall-environment.json"
OLDEST_PYTHON = (3, 11)


class NotReadyError(Exception):
    """The environment cannot be made; the text says what is lacking and how to get it."""


def say(text: str) -> None:
    """Print one line at once, so that it stands before the output of the command it announces."""
    print(text, flush=True)


def prepare(with_tests: bool) -> Path:
    """Make the environment, or bring it up to date, and return its Python.

    Nothing is done when the stamp of the last time still holds.
    Raises NotReadyError when something is lacking that cannot be installed from here.
    """
    _require_python()
    fingerprint = _fingerprint()
    stamp = _read_stamp()
    current = stamp.get("fingerprint") == fingerprint and environment_python().exists()
    if current and (stamp.get("with_tests") or not with_tests):
        return environment_python()
    if not current:
        _create()
    _install("project[test]" if with_tests else "project")
    STAMP.write_text(json.dumps({"fingerprint": fingerprint, "with_tests": with_tests}), encoding="utf-8")
    return environment_python()


def environment_python() -> Path:
    """Return the path of the environment's Python, whether it is there or not."""
    return ENVIRONMENT / "Scripts" / "python.exe" if os.name == "nt" else ENVIRONMENT / "bin" / "python"


def environment_command(name: str) -> Path:
    """Return the path of a command that a distribution brought into the environment."""
    return environment_python().with_name(name + ".exe" if os.name == "nt" else name)


def require_display_libraries(*platforms: str) -> None:
    """See that the shared libraries are there that Qt needs for these platforms of its own ("offscreen", "xcb", …).

    Raises NotReadyError when some are lacking and cannot be installed from here.
    """
    lacking = system_libraries.lacking(ENVIRONMENT, platforms)
    if not lacking:
        return
    packages = system_libraries.packages_of(lacking)
    say(f"Qt lacks shared libraries of the system: {', '.join(lacking)}.")
    if packages:
        _install_system_packages(packages)
    still = system_libraries.lacking(ENVIRONMENT, platforms)
    if still:
        raise NotReadyError(
            f"These shared libraries are still lacking; install them and start again: {', '.join(still)}."
        )


def _require_python() -> None:
    if sys.version_info < OLDEST_PYTHON:
        raise NotReadyError(f"This is Python {platform.python_version()}; Headfall needs Python 3.11 or later.")
    if importlib.util.find_spec("venv") is None or importlib.util.find_spec("ensurepip") is None:
        say("This Python has no means to make an environment (its modules venv and ensurepip are lacking).")
        _install_system_packages([f"python{sys.version_info[0]}.{sys.version_info[1]}-venv"])
        importlib.invalidate_caches()
        if importlib.util.find_spec("ensurepip") is None:
            raise NotReadyError("The module ensurepip is still lacking.")


def _install_system_packages(packages: list[str]) -> None:
    """Install packages of Debian or Ubuntu when that is allowed, or say the line that does it."""
    line = f"apt-get install -y --no-install-recommends {' '.join(packages)}"
    if not system_libraries.is_debian():
        raise NotReadyError(f"Install what is lacking with the system's own installer. On Debian that is: {line}")
    if os.geteuid() != 0:
        raise NotReadyError(f"Install it with this line, then start again:\n    sudo {line}")
    say(f"Installing: {line}")
    silent = {**os.environ, "DEBIAN_FRONTEND": "noninteractive"}
    for command in ("apt-get update", line):
        if subprocess.run(command.split(), env=silent, stdout=subprocess.DEVNULL).returncode:
            raise NotReadyError(f"This command failed: {command}")


def _create() -> None:
    if Path(sys.prefix).resolve() == ENVIRONMENT.resolve():
        raise NotReadyError("The environment must be made anew: start this with the system's Python, not with its own.")
    say(f"Making the environment in {ENVIRONMENT.name} with Python {platform.python_version()}")
    # Made anew rather than mended: what an older list of releases brought must not stay behind.
    try:
        if ENVIRONMENT.exists():
            shutil.rmtree(ENVIRONMENT)
    except OSError as refusal:
        raise NotReadyError(f"The old environment cannot be removed: {refusal}") from refusal
    _run([sys.executable, "-m", "venv", str(ENVIRONMENT)])


def _install(what: str) -> None:
    say("Installing the pinned releases")
    pip = [str(environment_python()), "-m", "pip", "install", "--quiet", "--disable-pip-version-check"]
    pinned = ["--constraint", str(CONSTRAINTS)]
    # The build backend comes first and from the same pins: an isolated build would take whatever is newest.
    _run([*pip, *pinned, "hatchling"])
    _run([*pip, *pinned, "--no-build-isolation", "--editable", what.replace("project", str(PROJECT))])


def _run(command: list[str]) -> None:
    if subprocess.run(command, cwd=PROJECT).returncode:
        raise NotReadyError(f"This command failed: {' '.join(command)}")


def _fingerprint() -> str:
    """Return a text that changes with anything that would make another environment, the project's folder included."""
    import tomllib

    settings = tomllib.loads((PROJECT / "pyproject.toml").read_text(encoding="utf-8"))
    parts = {
        "build": settings["build-system"],
        "project": settings["project"],
        "hatch": settings["tool"]["hatch"],
        "constraints": CONSTRAINTS.read_text(encoding="utf-8"),
        "python": sys.version,
        "machine": platform.machine(),
        "folder": str(PROJECT),
    }
    return hashlib.sha256(json.dumps(parts, sort_keys=True).encode()).hexdigest()


def _read_stamp() -> dict[str, object]:
    try:
        stamp = json.loads(STAMP.read_text(encoding="utf-8"))
    except (OSError, ValueError):
        return {}
    return stamp if isinstance(stamp, dict) else {}
