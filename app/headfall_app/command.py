"""The command ``headfall``: the window, the figures, the sheet, a picture of the window."""

from __future__ import annotations

import argparse
import gc
import json
import os
import sys
from collections.abc import Callable, Sequence
from pathlib import Path
from typing import TYPE_CHECKING, NoReturn

from headfall.answers import Answers
from headfall.case.faults import CaseError
from headfall_app.version import version

DONE, FAILED, BAD_INPUT = 0, 1, 2
_LATER = {"record": "the record of a case's field tests", "register": "one line a case for a whole folder"}


def main(arguments: Sequence[str] | None = None) -> int:
    """Run the command and return its exit status: 0 done, 2 bad usage or bad input, 1 anything else."""
    # What a start makes is kept: collecting in between only costs time. The window lets the collector run after its
    # first paint.
    gc.disable()
    try:
        return _run(list(sys.argv[1:] if arguments is None else arguments))
    finally:
        gc.enable()


def _run(given: list[str]) -> int:
    for stream in (sys.stdout, sys.stderr):
        # A figure carries m³ and a true minus; a console of another code page must not end the run.
        if hasattr(stream, "reconfigure"):
            stream.reconfigure(encoding="utf-8", errors="replace")
    if given and given[0] in _LATER:
        return _refuse(f"{given[0]} is not built yet.")
    parsed = _parser(given).parse_args(given)
    run: Callable[[argparse.Namespace], int] = parsed.run
    try:
        return run(parsed)
    except CaseError as refusal:
        for fault in refusal.faults:
            _say(fault.line)
        return BAD_INPUT
    except BrokenPipeError:
        # Whoever read the output has had enough of it; what is left in the buffer must not raise again at the end.
        os.dup2(os.open(os.devnull, os.O_WRONLY), sys.stdout.fileno())
        return FAILED
    except OSError as trouble:
        _say(getattr(trouble, "sentence", "") or f"{trouble.strerror or trouble}.")
        return FAILED
    except Exception as defect:
        # No traceback ever reaches a person; the kind and the text are what a report of it needs.
        _say(f"Headfall itself failed here: {type(defect).__name__}: {' '.join(str(defect).split())}.")
        return FAILED


def _say(line: str) -> None:
    print(line, file=sys.stderr)


def _refuse(line: str) -> int:
    _say(line)
    return BAD_INPUT


# The parsers ----------------------------------------------------------------------------------------------------------


class _Parser(argparse.ArgumentParser):
    """A parser whose refusals are plain sentences."""

    def error(self, message: str) -> NoReturn:
        self.print_usage(sys.stderr)
        self.exit(BAD_INPUT, f"{message[:1].upper()}{message[1:]}.\n")


def _parser(given: Sequence[str]) -> argparse.ArgumentParser:
    parser = _Parser(
        prog="headfall",
        description="Drain times, resting levels and outlets of gravity-drained tanks.",
        epilog="headfall [CASE] opens the window. Exit status: 0 done, 2 bad usage or bad input, 1 anything else.",
    )
    parser.add_argument("--version", action="version", version=f"headfall {version()}")
    commands = {"figures": _figures_parser, "sheet": _sheet_parser, "picture": _picture_parser}
    named = next((word for word in given if not word.startswith("-")), "")
    if named in commands or any(word in ("-h", "--help") for word in given):
        below = parser.add_subparsers(title="commands", metavar="COMMAND", required=True)
        for add in commands.values():
            add(below)
        for name, what in _LATER.items():
            below.add_parser(name, help=f"{what} (not built yet)")
    else:
        parser.add_argument("case", nargs="?", type=Path, metavar="CASE", help="a case file to open in the window")
        parser.set_defaults(run=_open_window)
    return parser


if TYPE_CHECKING:
    _Commands = argparse._SubParsersAction[_Parser]


def _figures_parser(commands: _Commands) -> None:
    parser = commands.add_parser("figures", help="the answers, as a table or as JSON")
    parser.add_argument("case", type=Path, metavar="CASE")
    parser.add_argument("--json", action="store_true", help="print JSON, SI throughout, the unit in each key")
    parser.set_defaults(run=_figures)


def _sheet_parser(commands: _Commands) -> None:
    parser = commands.add_parser("sheet", help="the sizing sheet as PDF")
    parser.add_argument("case", type=Path, metavar="CASE")
    parser.add_argument("-o", "--output", type=Path, required=True, metavar="OUT.pdf")
    parser.add_argument("--paper", choices=("a4", "letter"), default="a4")
    parser.set_defaults(run=_sheet)


def _picture_parser(commands: _Commands) -> None:
    parser = commands.add_parser("picture", help="a picture of the window as PNG")
    parser.add_argument("case", type=Path, metavar="CASE")
    parser.add_argument("-o", "--output", type=Path, required=True, metavar="OUT.png")
    parser.add_argument("--theme", choices=("light", "dark"), default="light")
    parser.add_argument("--size", type=_size, default=(1400, 900), metavar="WIDTHxHEIGHT", help="default 1400x900")
    parser.add_argument("--scale", type=float, default=1.0, choices=(1.0, 1.25, 1.5, 1.75, 2.0), help="default 1")
    parser.set_defaults(run=_picture)


def _size(text: str) -> tuple[int, int]:
    try:
        width, height = (int(part) for part in text.lower().split("x"))
    except ValueError:
        raise argparse.ArgumentTypeError(
            f"{text} is not a size. Type width x height in pixels, such as 1400x900"
        ) from None
    if not (1024 <= width <= 7680 and 640 <= height <= 4320):
        raise argparse.ArgumentTypeError(f"{text} is not between 1024x640 and 7680x4320")
    return width, height


# The commands ---------------------------------------------------------------------------------------------------------


def _solved(file: Path) -> Answers:
    from headfall.files import read_case
    from headfall.study import solve

    return solve(read_case(file))


def _figures(parsed: argparse.Namespace) -> int:
    answers = _solved(parsed.case)
    if parsed.json:
        text = json.dumps(answers.as_dict(), ensure_ascii=False, indent=1, allow_nan=False) + "\n"
    else:
        from headfall_app.figures_table import figures_table

        text = figures_table(answers)
    sys.stdout.write(text)
    sys.stdout.flush()
    return DONE


def _sheet(parsed: argparse.Namespace) -> int:
    answers = _solved(parsed.case)
    os.environ["QT_QPA_PLATFORM"] = "offscreen"
    from PySide6.QtGui import QGuiApplication

    from headfall.files import fingerprint
    from headfall_app.print.sheet_pdf import write_sheet_pdf

    application = QGuiApplication.instance() or QGuiApplication(["headfall"])
    write_sheet_pdf(answers, parsed.output, parsed.paper, fingerprint=fingerprint(answers.case))
    del application
    return DONE


def _picture(parsed: argparse.Namespace) -> int:
    _solved(parsed.case)
    os.environ["QT_QPA_PLATFORM"] = "offscreen"
    os.environ["QT_SCALE_FACTOR"] = f"{parsed.scale:g}"
    from headfall_app.start import write_picture

    write_picture(parsed.case, parsed.output, parsed.theme, parsed.size)
    return DONE


def _open_window(parsed: argparse.Namespace) -> int:
    if parsed.case is not None and not parsed.case.exists():
        return _refuse(f"{parsed.case}: There is no such file, and no such command. Type headfall --help.")
    from headfall_app.start import run_window

    return run_window(parsed.case)
