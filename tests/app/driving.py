"""The hands and eyes of the tests that drive an entry panel."""

from __future__ import annotations

from PySide6.QtCore import Qt
from PySide6.QtTest import QTest
from PySide6.QtWidgets import QApplication, QLineEdit, QPushButton

from headfall_app.entry.choice import ChoiceField
from headfall_app.entry.field import Field
from headfall_app.entry.panel import EntryPanel
from headfall_app.entry.table_field import TableField

Step = str | int


def field(panel: EntryPanel, *path: Step) -> Field:
    """Return the field of an entry; a test in which it is not shown fails."""
    found = panel.field_at(path)
    assert found is not None, path
    return found


def line(panel: EntryPanel, *path: Step) -> QLineEdit:
    """Return the line that an entry is typed into."""
    editor = field(panel, *path).editor
    assert isinstance(editor, QLineEdit)
    return editor


def table(panel: EntryPanel, *path: Step) -> TableField:
    """Return the table of an entry."""
    found = field(panel, *path)
    assert isinstance(found, TableField)
    return found


def is_shown(panel: EntryPanel, *path: Step) -> bool:
    """Whether the panel has a field for an entry."""
    return panel.field_at(path) is not None


def type_at(panel: EntryPanel, path: tuple[Step, ...], text: str, then: Qt.Key | None = Qt.Key.Key_Return) -> None:
    """Put the cursor into a line, select what is there, type, and end with a key."""
    target = line(panel, *path)
    target.setFocus()
    QTest.keyClick(target, Qt.Key.Key_A, Qt.KeyboardModifier.ControlModifier)
    QTest.keyClick(target, Qt.Key.Key_Delete)
    QTest.keyClicks(target, text)
    completer = target.completer()
    if completer is not None and completer.popup().isVisible():
        QTest.keyClick(completer.popup(), Qt.Key.Key_Escape)
    if then is not None:
        QTest.keyClick(target, then)


def choose(panel: EntryPanel, path: tuple[Step, ...], value: str) -> None:
    """Choose with the keyboard: open the list, go down or up from where it stands, take the line."""
    fields = (each for each in panel.fields() if each.row.path == path)
    chooser = next(each for each in fields if isinstance(each, ChoiceField))
    chooser.box.setFocus()
    wanted = chooser.box.findData(value)
    assert wanted >= 0, value
    QTest.keyClick(chooser.box, Qt.Key.Key_Down)
    lines = chooser.box.view()
    while lines.currentIndex().row() != wanted:
        QTest.keyClick(lines, Qt.Key.Key_Down if lines.currentIndex().row() < wanted else Qt.Key.Key_Up)
    QTest.keyClick(lines, Qt.Key.Key_Return)
    take_back_activation(panel)


def take_back_activation(panel: EntryPanel) -> None:
    """Give the window the activation back: without a display a list that has closed keeps it."""
    for _ in range(20):
        QApplication.processEvents()
        panel.activateWindow()
        if QApplication.activeWindow() is panel.window():
            break
    assert QApplication.activeWindow() is panel.window()


def press(panel: EntryPanel, name: str) -> None:
    """Press the word that a screen reader calls by this name."""
    found = [button for button in panel.findChildren(QPushButton) if button.accessibleName() == name]
    assert len(found) == 1, (name, sorted(button.accessibleName() for button in panel.findChildren(QPushButton)))
    QTest.mouseClick(found[0], Qt.MouseButton.LeftButton)


def labels(panel: EntryPanel, key: str) -> list[str]:
    """Return the labels of a group's rows."""
    box = next(box for box in panel.groups() if box.group.key == key)
    return [row.label for row in box.group.rows]
