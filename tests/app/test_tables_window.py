"""The tables beside the page: what they show, how they are asked for, copied and written."""

from __future__ import annotations

import csv
from collections.abc import Callable
from pathlib import Path

import pytest
from PySide6.QtCore import Qt
from PySide6.QtGui import QGuiApplication
from PySide6.QtTest import QTest
from PySide6.QtWidgets import QLineEdit, QPushButton, QWidget

from headfall.case.typed_quantity import read_quantity
from headfall.files import read_case
from headfall.quantities import display_units
from headfall_app.resources import resource_path
from headfall_app.settings import Settings
from headfall_app.tables_content import own_step
from headfall_app.tables_window import TablesWindow
from headfall_app.window import Window

from .conftest import Answering

CONTROL = Qt.KeyboardModifier.ControlModifier
Show, Wait = Callable[[QWidget], None], Callable[[Callable[[], object]], None]


@pytest.fixture
def window(settings: Settings, questions: Answering, show: Show) -> Window:
    """The window on the detention basin, which asks for times and a level step."""
    basin = read_case(resource_path("examples/detention_basin.headfall"))
    made = Window(basin, settings, version="0.1.0", questions=questions)
    show(made)
    return made


@pytest.fixture
def tables(window: Window) -> TablesWindow:
    """The tables of the basin, opened with their key."""
    QTest.keyClick(window, Qt.Key.Key_T, CONTROL)
    assert window.tables is not None
    return window.tables


def titles(tables: TablesWindow) -> list[str]:
    model = tables.view.model()
    return [model.headerData(column, Qt.Orientation.Horizontal) for column in range(model.columnCount())]


def row(tables: TablesWindow, index: int) -> list[str]:
    model = tables.view.model()
    return [model.index(index, column).data() for column in range(model.columnCount())]


def press(tables: TablesWindow, text: str) -> None:
    button = next(each for each in tables.findChildren(QPushButton) if each.text() == text)
    QTest.mouseClick(button, Qt.MouseButton.LeftButton)


def test_the_times_asked_for_open_first(tables: TablesWindow) -> None:
    assert tables.isVisible()
    assert titles(tables) == ["Time", "Level\nm", "On site datum\nm", "Volume\nm³", "Outflow\nL/s"]
    assert [row(tables, index)[0] for index in range(3)] == [
        "1\u00a0h\u00a000\u00a0min\u00a000\u00a0s",
        "2\u00a0h\u00a000\u00a0min\u00a000\u00a0s",
        "4\u00a0h\u00a000\u00a0min\u00a000\u00a0s",
    ]
    for index in range(3):
        level, site = float(row(tables, index)[1]), float(row(tables, index)[2])
        assert site - level == pytest.approx(41.60)


def test_stage_storage_and_discharge_at_the_step_typed(tables: TablesWindow) -> None:
    press(tables, "Level by level")
    assert tables.remark == "Level standing still, every 0.4 m."
    assert [row(tables, index)[0] for index in range(7)] == [f"{0.4 * index:.3f}" for index in range(7)]
    # The areas of the table's own rows stand at 1.5 and 2.0 m; at the top it is the last one.
    top = row(tables, 6)
    assert (top[2], top[4]) == ("1700", "100.0")
    assert float(top[6]) < float(top[5]) < float(top[7])


def test_a_step_of_its_own_is_said(window: Window, tables: TablesWindow, wait_for: Wait) -> None:
    press(tables, "Level by level")
    window.document.set(("tables", "level_step"), None, "Change the level step")
    wait_for(lambda: "chosen here" in tables.remark)
    assert tables.remark.startswith("Level standing still, every 0.1 m, a step chosen here. Type a level step under")
    assert row(tables, 1)[0] == "0.100"
    window.switch_units()
    wait_for(lambda: titles(tables)[0] == "Level\nft")
    assert row(tables, 1)[0] == "0.500"


@pytest.mark.parametrize(("height", "step"), [(2.4, 0.1), (0.3, 0.02), (11.0, 0.5), (3.0, 0.2), (24.0, 1.0)])
def test_the_own_step_is_round(height: float, step: float) -> None:
    assert own_step(height, display_units("metric")) == pytest.approx(step)


def test_an_empty_table_says_how_to_ask_and_leads_there(window: Window, tables: TablesWindow, wait_for: Wait) -> None:
    press(tables, "At other temperatures")
    assert tables.remark == "No other temperatures are asked for. Type them under Liquid, Also at, such as 5 °C; 40 °C."
    assert not tables.view.isVisible()
    assert not tables.copy.isEnabled()
    press(tables, "Go to its entry")
    field = window.entry.field_at(("liquid", "also_at"))
    assert field is not None
    wait_for(field.editor.hasFocus)
    assert isinstance(field.editor, QLineEdit)
    QTest.keyClicks(field.editor, "5 °C, 25 °C")
    QTest.keyClick(field.editor, Qt.Key.Key_Return)
    wait_for(tables.view.isVisible)
    assert [row(tables, index)[0] for index in (0, 1)] == ["5", "25"]
    # Kept in the folded group: it is unfolded when it is gone to.
    tables.show_table("times")
    press(tables, "Go to its entry")
    times = window.entry.field_at(("tables", "times"))
    assert times is not None
    wait_for(times.editor.isVisible)


def test_a_table_is_copied_with_tabs(tables: TablesWindow) -> None:
    QTest.keyClick(tables.view, Qt.Key.Key_C, CONTROL)
    lines = QGuiApplication.clipboard().text().splitlines()
    assert lines[0] == "Time, s\tLevel, m\tOn site datum, m\tVolume, m³\tOutflow, L/s"
    assert [line.split("\t")[0] for line in lines[1:]] == ["3600", "7200", "14400"]


def test_a_table_is_written_as_csv(tables: TablesWindow, questions: Answering, tmp_path: Path) -> None:
    questions.table = tmp_path / "stages.csv"
    press(tables, "Level by level")
    press(tables, "Export as CSV…")
    assert questions.asked == ["table detention_basin__plate_and_overflow_weir_stages.csv"]
    with questions.table.open(encoding="utf-8-sig", newline="") as file:
        found = list(csv.reader(file))
    assert found[0][:2] == ["Level, m", "On site datum, m"]
    assert len(found) == 8
    assert all(float(cell) >= 0 for line in found[1:] for cell in line)
    questions.table = tmp_path / "nowhere" / "stages.csv"
    press(tables, "Export as CSV…")
    assert "was not written" in tables.said


def test_last_good_answers_are_called_so(window: Window, tables: TablesWindow, wait_for: Wait) -> None:
    window.document.set_wrong(("levels", "stop"), "x", "x is not a number.", "Change the stop")
    wait_for(lambda: tables.remark.startswith("Last good answers, while an entry is wrong."))
    window.document.set(("levels", "stop"), read_quantity("0.6 m", "level"), "Change the stop")
    wait_for(lambda: tables.remark.startswith("The run with the typical"))
