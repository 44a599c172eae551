"""Open Headfall's window on the example, a gravity rinse drum.

    python packaging/run.py                  the example
    python packaging/run.py FILE.headfall    a case of your own

The environment is made in ``.venv`` beside the project when it is not there or no longer current. Where there is no
display, the sheet (PDF) and a picture of the window (PNG) are written into ``build`` instead.
Untried on Windows and macOS.
"""

from __future__ import annotations

import argparse
import os
import subprocess
import sys
from pathlib import Path

from environment import PROJECT, NotReadyError, prepare, require_display_libraries, say

EXAMPLE = PROJECT / "resources" / "examples" / "rinse_drum.headfall"
OUTPUT = PROJECT / "build"
OPEN_DISPLAY = "from PySide6.QtGui import QGuiApplication; QGuiApplication([])"


def main() -> int:
    """Open the window, or write the two files, and return the exit status."""
    case = _case_file()
    try:
        python = prepare(with_tests=False)
        reason = _why_no_window(python)
        if reason is None:
            return _headfall(python, case).returncode
        say(f"{reason} The sheet and a picture of the window are written instead.")
        require_display_libraries("offscreen")
    except NotReadyError as lack:
        say(str(lack))
        return 2
    return _write_files(python, case)


def _case_file() -> Path:
    parser = argparse.ArgumentParser(description=__doc__, formatter_class=argparse.RawDescriptionHelpFormatter)
    parser.add_argument("case", nargs="?", type=Path, default=EXAMPLE, metavar="FILE", help="a case file")
    case: Path = parser.parse_args().case
    return case.resolve()


def _why_no_window(python: Path) -> str | None:
    """Return the reason why no window can be shown, or None where one can."""
    if not sys.platform.startswith("linux"):
        return None
    displays = {name: os.environ.get(name) for name in ("DISPLAY", "WAYLAND_DISPLAY")}
    if not any(displays.values()):
        return "There is no display: neither DISPLAY nor WAYLAND_DISPLAY is set."
    require_display_libraries("wayland" if displays["WAYLAND_DISPLAY"] else "xcb")
    # Qt ends the process when it cannot reach the display, so another process tries it first.
    trial = subprocess.run([str(python), "-c", OPEN_DISPLAY], capture_output=True)
    if trial.returncode:
        return f"The display {displays['WAYLAND_DISPLAY'] or displays['DISPLAY']} cannot be opened."
    return None


def _write_files(python: Path, case: Path) -> int:
    """Write the sheet and the picture without a display, say where they are, and return the exit status."""
    OUTPUT.mkdir(exist_ok=True)
    for command, suffix, what in (("sheet", ".pdf", "Sheet"), ("picture", ".png", "Picture of the window")):
        target = OUTPUT / (case.stem + suffix)
        written = _headfall(python, command, case, "--output", target, QT_QPA_PLATFORM="offscreen")
        if written.returncode:
            say(f"{what}: not written.")
            return written.returncode
        say(f"{what}: {target.relative_to(PROJECT).as_posix()}")
    return 0


def _headfall(python: Path, *arguments: str | Path, **surroundings: str) -> subprocess.CompletedProcess[bytes]:
    command = [str(python), "-m", "headfall_app", *map(str, arguments)]
    return subprocess.run(command, env={**os.environ, **surroundings})


if __name__ == "__main__":
    sys.exit(main())
