"""The sizing sheet, from answers to file."""

from __future__ import annotations

import tempfile
from pathlib import Path

from PySide6.QtWidgets import QApplication

from headfall.files import fingerprint, read_case
from headfall.study import solve
from headfall_app.print.sheet_pdf import write_sheet_pdf
from tests.bench.answers import EXAMPLE
from tests.bench.clock import each, spread

SHEETS = 9


def print_sheets() -> None:
    """Print the time of writing the PDF of an example, the first one apart."""
    application = QApplication.instance() or QApplication(["bench"])
    answers = solve(read_case(EXAMPLE))
    mark = fingerprint(answers.case)
    with tempfile.TemporaryDirectory() as folder:
        file = Path(folder) / "sheet.pdf"
        first, *times = each(lambda _: write_sheet_pdf(answers, file, "a4", fingerprint=mark), range(SHEETS + 1))
        size = file.stat().st_size / 1000
    print(f"  {'sheet of ' + EXAMPLE.stem:34}{spread(times)}   first {1e3 * first:.0f} ms, {size:.0f} kB")
    del application
