"""Measure the speed of the project and print one table a question.

    python tests/bench/run.py              everything
    python tests/bench/run.py drain sheet  the named questions alone

Questions: drain, pipe, answers, frame, start, sheet, figures. Offscreen; figures vary by a fifth from run to run, so
trust the ratios.
"""

from __future__ import annotations

import argparse
import importlib.util
import os
import sys
from collections.abc import Callable
from pathlib import Path

PROJECT = Path(__file__).resolve().parents[2]
# From a checkout the packages need not be installed.
sys.path[:0] = [str(PROJECT), str(PROJECT / "core"), str(PROJECT / "app")]
os.environ.setdefault("QT_QPA_PLATFORM", "offscreen")


def drain() -> None:
    """Time and exactness of a drain time against a general integrator."""
    from tests.bench.drain_time import print_drain_times

    print_drain_times()


def pipe() -> None:
    """Time of a drain time through a pipe, turbulent and viscous."""
    from tests.bench.pipe import print_pipes

    print_pipes()


def answers() -> None:
    """Time of all answers to a case."""
    from tests.bench.answers import print_answers

    print_answers()


def frame() -> None:
    """Time of one movement of the inflow slider."""
    from tests.bench.frame import print_frames

    print_frames()


def start() -> None:
    """Time from the start of the process to the first paint."""
    from tests.bench.processes import print_start

    print_start()


def sheet() -> None:
    """Time of a sizing sheet."""
    from tests.bench.sheet import print_sheets

    print_sheets()


def figures() -> None:
    """Time of the command ``figures``."""
    from tests.bench.processes import print_figures

    print_figures()


QUESTIONS: dict[str, tuple[Callable[[], None], str]] = {
    "drain": (drain, "headfall.solve.draw_down"),
    "pipe": (pipe, "headfall.outlet.pipe"),
    "answers": (answers, "headfall.study"),
    "frame": (frame, "headfall_app.view.page"),
    "start": (start, "headfall_app.view.page"),
    "sheet": (sheet, "headfall_app.print.sheet_pdf"),
    "figures": (figures, "headfall_app.command"),
}


def main() -> int:
    """Run the questions named on the command line, all where none is named."""
    parser = argparse.ArgumentParser(description=__doc__, formatter_class=argparse.RawDescriptionHelpFormatter)
    parser.add_argument("question", nargs="*", help=f"any of {', '.join(QUESTIONS)}")
    chosen = parser.parse_args().question or list(QUESTIONS)
    unknown = [name for name in chosen if name not in QUESTIONS]
    if unknown:
        parser.error(f"there is no question {unknown[0]}; there are {', '.join(QUESTIONS)}")
    for name in chosen:
        ask, needs = QUESTIONS[name]
        print(f"\n{ask.__doc__}")
        if importlib.util.find_spec(needs) is None:
            print(f"  not available: there is no {needs}")
        else:
            ask()
    return 0


if __name__ == "__main__":
    sys.exit(main())
