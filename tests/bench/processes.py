"""What is measured from outside: start of the window, and the command."""

from __future__ import annotations

import os
import statistics
import subprocess
import sys
import tempfile
import time
from pathlib import Path

from tests.bench.answers import EXAMPLE

PROJECT = Path(__file__).resolve().parents[2]
PAIRS = 8

# Both children end at their first paint, one turn of the event loop later, when the whole window has been painted.
WATCH = """
import os, sys, time
from PySide6.QtCore import QEvent, QObject, QTimer
from PySide6.QtWidgets import QApplication, QWidget
def report():
    print(time.monotonic(), flush=True)
    os._exit(0)
class Watch(QObject):
    def eventFilter(self, watched, event):
        if event.type() == QEvent.Type.Paint and isinstance(watched, QWidget) and watched.isWindow():
            QTimer.singleShot(0, report)
        return False
watch = Watch()
"""
BARE = """
application = QApplication(["bench"])
application.installEventFilter(watch)
window = QWidget()
window.resize(1400, 900)
window.show()
application.exec()
"""
OURS = """
original = QApplication.exec
def watched_exec(*arguments):
    QApplication.instance().installEventFilter(watch)
    return original()
QApplication.exec = watched_exec
from PySide6.QtCore import QCoreApplication
from PySide6.QtGui import QGuiApplication
QGuiApplication.exec = QCoreApplication.exec = watched_exec
main([{case!r}])
"""


def environment(folder: str) -> dict[str, str]:
    """Return the environment of a child: packages of this checkout, settings in a folder of its own."""
    paths = [str(PROJECT / "core"), str(PROJECT / "app"), os.environ.get("PYTHONPATH", "")]
    own = {"HOME": folder, "XDG_CONFIG_HOME": folder, "XDG_DATA_HOME": folder, "XDG_CACHE_HOME": folder}
    # As on a machine of a person's: compiled once, at the first start.
    own["PYTHONPYCACHEPREFIX"] = str(Path(folder) / "compiled")
    inherited = {name: value for name, value in os.environ.items() if name != "PYTHONDONTWRITEBYTECODE"}
    return {**inherited, **own, "QT_QPA_PLATFORM": "offscreen", "PYTHONPATH": os.pathsep.join(filter(None, paths))}


def first_paint(lines: str, folder: str) -> float:
    """Return the time from the start of a process to its first paint [s]."""
    started = time.monotonic()
    ran = subprocess.run(
        [sys.executable, "-c", lines], env=environment(folder), capture_output=True, text=True, timeout=60, check=False
    )
    if ran.returncode or not ran.stdout.strip():
        raise RuntimeError(f"the window did not paint: {ran.stderr.strip()[-800:]}")
    return float(ran.stdout.split()[-1]) - started


def whole_process(command: list[str], folder: str) -> float:
    """Return the time of a process from start to end [s]."""
    started = time.monotonic()
    subprocess.run(command, env=environment(folder), capture_output=True, timeout=60, check=True)
    return time.monotonic() - started


def paired(name: str, ours: list[float], other_name: str, other: list[float]) -> None:
    """Print two lists of times and the ratio of their medians."""
    a, b = statistics.median(ours), statistics.median(other)
    print(f"  {name:34}{1e3 * a:7.0f} ms   {other_name} {1e3 * b:.0f} ms   ratio {a / b:.2f}")


def print_start() -> None:
    """Print the time to the first paint against that of a bare Qt window, taken in turn."""
    ours_lines = "from headfall_app.command import main\n" + WATCH + OURS.format(case=str(EXAMPLE))
    ours, bare = [], []
    with tempfile.TemporaryDirectory() as folder:
        for turn in range(PAIRS + 1):
            pair = first_paint(WATCH + BARE, folder), first_paint(ours_lines, folder)
            # The first pair fills the disk's cache.
            if turn:
                bare.append(pair[0])
                ours.append(pair[1])
    paired("first paint with a case", ours, "bare Qt window", bare)


def print_figures() -> None:
    """Print the time of ``headfall figures`` against that of importing numpy, taken in turn."""
    ours, numpy_alone = [], []
    with tempfile.TemporaryDirectory() as folder:
        for turn in range(PAIRS + 1):
            pair = (
                whole_process([sys.executable, "-c", "import numpy"], folder),
                whole_process([sys.executable, "-m", "headfall_app", "figures", str(EXAMPLE)], folder),
            )
            if turn:
                numpy_alone.append(pair[0])
                ours.append(pair[1])
    paired("headfall figures", ours, "python -c 'import numpy'", numpy_alone)
