"""A strapping table typed, pasted and read from a file: wrong cells keep their text and say why."""

from __future__ import annotations

from collections.abc import Callable
from pathlib import Path

import pytest
from PySide6.QtCore import Qt
from PySide6.QtGui import QGuiApplication
from PySide6.QtTest import QTest
from PySide6.QtWidgets import QApplication, QLineEdit, QWidget

from headfall.case.typed_quantity import read_quantity
from headfall.files import case_from_text
from headfall_app.document import Document, SaveRefused
from headfall_app.entry.panel import EntryPanel
from headfall_app.entry.table_field import TableField
from headfall_app.entry.table_model import WRONG
from headfall_app.paint.theme import theme

from .conftest import TANK
from .driving import choose, field, is_shown, labels, line, press, table

ROWS, PROPERTIES = ("vessel", "rows"), ("liquid", "properties")
Show, Wait = Callable[[QWidget], None], Callable[[Callable[[], object]], None]
POOL = TANK.replace(
    '{"shape": "upright_cylinder", "diameter": "2400 mm", "height": "3 m"}',
    '{"shape": "table", "column": "area", "rows": [["0 m", "4 m2"], ["1 m", "4.5 m2"], ["3 m", "5 m2"]]}',
)


@pytest.fixture
def document(application: QApplication) -> Document:
    """A document on a tank known by areas at three levels."""
    return Document(case_from_text(POOL))


@pytest.fixture
def panel(document: Document, show: Show) -> EntryPanel:
    """The panel on it."""
    made = EntryPanel(document, theme("light"))
    made.resize(300, 1400)
    show(made)
    return made


@pytest.fixture
def rows(panel: EntryPanel) -> TableField:
    """The table of the vessel, with the cursor in it."""
    found = table(panel, *ROWS)
    found.view.setFocus()
    return found


def texts(document: Document) -> list[list[str]]:
    return [[cell.text for cell in row] for row in document.case.vessel.rows]


def shown(of: TableField) -> list[list[str]]:
    model = of.model
    return [
        [model.index(row, column).data() for column in range(model.columnCount())] for row in range(model.rowCount())
    ]


def go_to_cell(of: TableField, row: int, column: int) -> None:
    of.view.setCurrentIndex(of.model.index(row, column))


def type_cell(of: TableField, row: int, column: int, text: str) -> None:
    """Open a cell with F2, type over what is there, and take it in."""
    go_to_cell(of, row, column)
    QTest.keyClick(of.view, Qt.Key.Key_F2)
    editor = QApplication.focusWidget()
    assert isinstance(editor, QLineEdit)
    editor.selectAll()
    QTest.keyClicks(editor, text)
    QTest.keyClick(editor, Qt.Key.Key_Return)
    QApplication.processEvents()


def paste(of: TableField, text: str) -> None:
    """Copy a text elsewhere and press the keys that paste it over the table."""
    QGuiApplication.clipboard().setText(text)
    QTest.keyClick(of.view, Qt.Key.Key_V, Qt.KeyboardModifier.ControlModifier)


def test_units_stand_in_the_heading_and_numbers_in_the_cells(rows: TableField) -> None:
    heading = [rows.model.headerData(column, Qt.Orientation.Horizontal) for column in (0, 1)]
    assert heading == ["Level\nm", "Area\nm2"]
    assert shown(rows) == [["0", "4"], ["1", "4.5"], ["3", "5"]]


def test_a_cell_takes_a_unit_of_its_own_or_that_of_its_column(rows: TableField, document: Document) -> None:
    type_cell(rows, 1, 0, "1.2")
    type_cell(rows, 2, 1, "54 ft2")
    assert texts(document) == [["0 m", "4 m2"], ["1.2 m", "4.5 m2"], ["3 m", "54 ft2"]]
    assert shown(rows)[2] == ["3", "54 ft2"]
    assert document.undo_stack.count() == 2
    document.undo_stack.undo()
    assert shown(rows)[2] == ["3", "5"]


def test_enter_goes_on_to_the_next_cell_and_tab_leaves_the_table(rows: TableField) -> None:
    type_cell(rows, 0, 1, "4.2")
    assert (rows.view.currentIndex().row(), rows.view.currentIndex().column()) == (1, 0)
    QTest.keyClick(rows.view, Qt.Key.Key_Tab)
    assert QApplication.focusWidget() is rows.links[0]
    assert rows.links[0].accessibleName() == "Add a row to vessel, rows"


def test_a_wrong_cell_keeps_its_text_and_its_reason(rows: TableField, document: Document) -> None:
    type_cell(rows, 1, 1, "4.5 L")
    assert shown(rows)[1][1] == "4.5 L"
    assert rows.reason.startswith("Row 2, column 2: 4.5 L is a volume.")
    assert rows.model.index(1, 1).data(WRONG) is True
    assert texts(document)[1][1] == "4.5 m2"
    type_cell(rows, 1, 1, "4.6")
    assert rows.reason == ""
    assert not document.wrong


def test_rows_are_added_and_removed_and_wrong_cells_go_along(
    panel: EntryPanel, rows: TableField, document: Document
) -> None:
    type_cell(rows, 2, 1, "five")
    go_to_cell(rows, 0, 0)
    press(panel, "Add a row to vessel, rows")
    assert [row[0] for row in texts(document)] == ["0 m", "0.5 m", "1 m", "3 m"]
    assert shown(rows)[3][1] == "five"
    go_to_cell(rows, 1, 0)
    press(panel, "Remove the row in hand of vessel, rows")
    assert shown(rows)[2][1] == "five"
    go_to_cell(rows, 2, 0)
    press(panel, "Remove the row in hand of vessel, rows")
    assert not document.wrong
    press(panel, "Remove the row in hand of vessel, rows")
    assert len(texts(document)) == 2


def test_a_strapping_table_is_pasted_as_one_step(rows: TableField, document: Document) -> None:
    before = texts(document)
    paste(rows, "level m;area m2\n0;4,0\n0,5;4,25\n1,125;4,5\n2,5;5,75\n")
    assert texts(document) == [["0 m", "4.0 m2"], ["0.5 m", "4.25 m2"], ["1.125 m", "4.5 m2"], ["2.5 m", "5.75 m2"]]
    assert document.undo_stack.count() == 1
    assert document.undo_stack.undoText() == "Paste rows"
    document.undo_stack.undo()
    assert texts(document) == before


def test_wrong_cells_of_a_paste_are_marked_and_nothing_is_lost(
    rows: TableField, document: Document, wait_for: Wait
) -> None:
    paste(rows, "0\t4\n0.5\t4x25\n\t4.5\n2\t5\t9\n")
    assert shown(rows) == [["0", "4"], ["0.5", "4x25"], ["", "4.5"], ["2", "5"]]
    assert {path[2:]: entry.text for path, entry in document.wrong.items()} == {(1, 1): "4x25", (2, 0): ""}
    assert rows.reason.startswith("Row 2, column 2:")
    assert rows.reason.endswith("1 more to mend.")
    assert document.is_stale
    with pytest.raises(SaveRefused):
        document.save(Path("nowhere.headfall"))
    # The stand-ins of the wrong cells give no faults of their own; the start does stand above the new top.
    assert [fault.path for fault in document.faults] == [(*ROWS, 1, 1), (*ROWS, 2, 0), ("levels", "start")]
    document.set(("levels", "start"), read_quantity("1.8 m", "level"), "Change the start")
    type_cell(rows, 1, 1, "4.25")
    type_cell(rows, 2, 0, "1")
    wait_for(lambda: not document.is_stale)
    assert document.answers is not None
    assert document.answers.vessel.height == 2.0
    for _ in range(3):
        document.undo_stack.undo()
    assert shown(rows)[1][1] == "4x25"
    document.undo_stack.undo()
    assert shown(rows) == [["0", "4"], ["1", "4.5"], ["3", "5"]]


def test_one_value_is_pasted_into_the_cell_in_hand(rows: TableField, document: Document) -> None:
    go_to_cell(rows, 2, 0)
    paste(rows, "3,25")
    assert texts(document)[2] == ["3,25 m", "5 m2"]


def test_a_text_that_is_no_table_changes_nothing(rows: TableField, document: Document) -> None:
    before = document.case
    paste(rows, "first line\nsecond line")
    assert rows.reason == "There is no number in it. Copy level and area elsewhere and paste them here."
    assert document.case is before
    assert document.undo_stack.count() == 0


def test_rows_are_read_from_a_file(rows: TableField, document: Document, tmp_path: Path) -> None:
    file = tmp_path / "strapping.csv"
    file.write_bytes('\ufeff"Dip (ft)","Area (ft2)"\r\n0,40\r\n2.5,"45.5"\r\n'.encode())
    rows.read_file(file)
    assert texts(document) == [["0 ft", "40 ft2"], ["2.5 ft", "45.5 ft2"]]
    assert document.undo_stack.undoText() == "Rows from strapping.csv"
    file.write_bytes(b"\xff\xfe0\x00")
    rows.read_file(file)
    assert rows.reason.startswith("strapping.csv was not read. It is not text in UTF-8")
    rows.read_file(tmp_path / "none.csv")
    assert rows.reason.startswith("none.csv was not read")
    assert document.undo_stack.count() == 1


def test_rows_that_contradict_one_another_are_marked(rows: TableField, document: Document, wait_for: Wait) -> None:
    type_cell(rows, 1, 0, "3.5")
    wait_for(lambda: rows.reason)
    assert "is not above" in rows.reason
    assert rows.model.index(2, 0).data(WRONG) is True
    type_cell(rows, 1, 0, "1.5")
    wait_for(lambda: not rows.reason)
    assert rows.model.index(2, 0).data(WRONG) is False


def test_what_the_column_holds_can_be_chosen(panel: EntryPanel, rows: TableField, document: Document) -> None:
    assert labels(panel, "vessel") == ["Shape", "Column", "Between rows", "Rows"]
    choose(panel, ("vessel", "between"), "conic")
    choose(panel, ("vessel", "column"), "increment")
    assert texts(document) == [["0 m", "4 m3"], ["1 m", "4.5 m3"], ["3 m", "5 m3"]]
    assert document.case.vessel.between is None
    assert not is_shown(panel, "vessel", "between")
    paste(rows, "level m;area m2\n0;0\n1;2")
    assert rows.reason == "The heading names m2; the column is for volume. Choose what it holds first."
    document.undo_stack.undo()
    assert texts(document)[1] == ["1 m", "4.5 m2"]


def test_a_fault_said_elsewhere_leads_to_its_cell(panel: EntryPanel, rows: TableField) -> None:
    type_cell(rows, 2, 1, "5 kg")
    line(panel, "levels", "stop").setFocus()
    panel.go_to((*ROWS, 2, 1))
    assert rows.view.hasFocus()
    assert (rows.view.currentIndex().row(), rows.view.currentIndex().column()) == (2, 1)


def test_a_liquid_by_temperature_has_an_optional_last_column(panel: EntryPanel, document: Document) -> None:
    choose(panel, ("liquid",), "own_table")
    properties = table(panel, *PROPERTIES)
    paste(properties, "T (°C)\tdensity (kg/m3)\tviscosity (mPa·s)\n20\t1261\t1300\n40\t1248\t270\n60\t1235\t77")
    assert [[cell.text for cell in row] for row in document.case.liquid.properties] == [
        ["20 °C", "1261 kg/m3", "1300 mPa·s"],
        ["40 °C", "1248 kg/m3", "270 mPa·s"],
        ["60 °C", "1235 kg/m3", "77 mPa·s"],
    ]
    type_cell(properties, 1, 3, "0.2")
    assert document.case.liquid.properties[1][3].text == "0.2 kPa"
    go_to_cell(properties, 1, 3)
    QTest.keyClick(properties.view, Qt.Key.Key_Delete)
    assert len(document.case.liquid.properties[1]) == 3
    assert document.answers is not None
    assert not document.faults
    assert field(panel, *PROPERTIES).editor.accessibleName() == "Liquid, by temperature"
