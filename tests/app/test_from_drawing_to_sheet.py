"""The main job from end to end: a tank typed, seen, dragged, saved, reopened and printed, and the print read back."""

from __future__ import annotations

import math
from collections.abc import Callable
from pathlib import Path

from pypdf import PdfReader
from PySide6.QtCore import QPoint, Qt
from PySide6.QtTest import QTest
from PySide6.QtWidgets import QWidget

from headfall.case.model import Case
from headfall.files import read_case
from headfall.quantities import duration
from headfall_app.paint.slider import track_x
from headfall_app.settings import Settings
from headfall_app.window import Window

from .conftest import Answering

CONTROL = Qt.KeyboardModifier.ControlModifier
LEFT = Qt.MouseButton.LeftButton


def test_from_typed_sizes_to_a_sheet_that_can_be_read(
    tank: Case,
    settings: Settings,
    questions: Answering,
    show: Callable[[QWidget], None],
    type_into: Callable[..., None],
    wait_for: Callable[[Callable[[], object]], None],
    tmp_path: Path,
) -> None:
    window = Window(tank, settings, version="0.1.0", questions=questions)
    show(window)
    typed = {
        ("vessel", "diameter"): "3 m",
        ("outlets", 0, "opening", "diameter"): "100 mm",
        ("levels", "start"): "2500 mm",
        ("levels", "stop"): "0.2 m",
        ("inflow", "rate"): "0 L/s",
        ("tag",): "T-44",
    }
    for path, text in typed.items():
        window.entry.go_to(path)
        type_into(window.entry.field_at(path), text)

    def answers() -> str:
        return window.page.answers_row.accessibleDescription().replace("\N{NO-BREAK SPACE}", " ")

    wait_for(lambda: "Settles at: 0.000 m" in answers())

    # One drag of the inflow is one step, and undoing it gives back what was typed.
    slider, steps = window.page.slider, window.document.undo_stack.count()
    handle = QPoint(round(track_x(slider.value, slider.end, slider.width())), 42)
    QTest.mousePress(slider, LEFT, pos=handle)
    for step in range(1, 7):
        QTest.mouseMove(slider, handle + QPoint(12 * step, 0))
    QTest.mouseRelease(slider, LEFT, pos=handle + QPoint(72, 0))
    wait_for(lambda: window.document.case.inflow and window.document.case.inflow.rate.value > 0)
    assert window.document.undo_stack.count() == steps + 1
    wait_for(lambda: "Settles at: 0.000 m" not in answers())
    QTest.keyClick(window, Qt.Key.Key_Z, CONTROL)
    assert window.document.case.inflow.rate.text == "0 L/s"

    questions.save, questions.sheet = tmp_path / "t44.headfall", tmp_path / "t44.pdf"
    QTest.keyClick(window, Qt.Key.Key_S, CONTROL)
    assert read_case(questions.save).levels.start.text == "2500 mm"
    assert window.open_file(questions.save)
    QTest.keyClick(window, Qt.Key.Key_E, CONTROL)

    # The main number by hand: 2·A/(C_d·a·√(2g))·(√H0 − √H1).
    hole = math.pi * 0.05**2
    seconds = 2 * math.pi * 1.5**2 / (0.61 * hole * math.sqrt(2 * 9.80665)) * (math.sqrt(2.5) - math.sqrt(0.2))
    pages = PdfReader(questions.sheet).pages
    text = " ".join(" ".join(page.extract_text().split()) for page in pages)
    assert duration(seconds).replace("\N{NO-BREAK SPACE}", " ") in text
    assert f"{seconds:.2f} s" in text
    assert "T-44" in pages[-1].extract_text()
    assert f"page {len(pages)} of {len(pages)}" in text
    for written in ("3 m", "100 mm", "2500 mm"):
        assert written in text
