"""The entry panel, driven with keys and mouse."""

from __future__ import annotations

from collections.abc import Callable

import pytest
from PySide6.QtCore import QPoint, QPointF, Qt
from PySide6.QtGui import QAccessible, QWheelEvent
from PySide6.QtTest import QTest
from PySide6.QtWidgets import QApplication, QLineEdit, QPushButton, QWidget

from headfall.case.model import Case, CoefficientRange, Drum, RectangularOpening, UprightCylinder
from headfall_app.document import Document
from headfall_app.entry.choice import ChoiceField
from headfall_app.entry.field import Field
from headfall_app.entry.panel import EntryPanel
from headfall_app.paint.theme import theme

DIAMETER = ("outlets", 0, "opening", "diameter")
START, STOP, OVERFLOW = ("levels", "start"), ("levels", "stop"), ("levels", "overflow")
Show, Type, Wait = Callable[[QWidget], None], Callable[..., None], Callable[[Callable[[], object]], None]


@pytest.fixture
def panel(document: Document, show: Show) -> EntryPanel:
    """The panel on the tank, tall enough to show every group."""
    made = EntryPanel(document, theme("light"))
    made.resize(300, 1200)
    show(made)
    return made


def field(panel: EntryPanel, *path: str | int) -> Field:
    found = panel.field_at(path)
    assert found is not None, path
    return found


def line(panel: EntryPanel, *path: str | int) -> QLineEdit:
    editor = field(panel, *path).editor
    assert isinstance(editor, QLineEdit)
    return editor


def choose(panel: EntryPanel, path: tuple[str | int, ...], value: str) -> None:
    """Choose with the keyboard: open the list, go down or up from where it stands, take the line."""
    chooser = field(panel, *path)
    assert isinstance(chooser, ChoiceField)
    chooser.box.setFocus()
    wanted = chooser.box.findData(value)
    QTest.keyClick(chooser.box, Qt.Key.Key_Down)
    lines = chooser.box.view()
    while lines.currentIndex().row() != wanted:
        QTest.keyClick(lines, Qt.Key.Key_Down if lines.currentIndex().row() < wanted else Qt.Key.Key_Up)
    QTest.keyClick(lines, Qt.Key.Key_Return)
    # Without a display a list that has closed keeps the activation it was given; a window system gives it back.
    QApplication.processEvents()
    panel.activateWindow()
    assert QTest.qWaitForWindowActive(panel)


def link(panel: EntryPanel, name: str) -> QPushButton:
    return next(button for button in panel.findChildren(QPushButton) if button.accessibleName() == name)


def labels(panel: EntryPanel, key: str) -> list[str]:
    box = next(box for box in panel.groups() if box.group.key == key)
    return [row.label for row in box.group.rows]


def test_a_typed_quantity_goes_into_the_case_as_typed(panel: EntryPanel, document: Document, type_into: Type) -> None:
    type_into(field(panel, *DIAMETER), "3 1/8 in")
    assert document.case.outlets[0].opening.diameter.text == "3 1/8 in"
    assert field(panel, *DIAMETER).echo == "0.079\u00a0m"
    assert document.undo_stack.count() == 1


def test_leaving_a_field_takes_in_what_was_typed_once(panel: EntryPanel, document: Document, type_into: Type) -> None:
    type_into(field(panel, *DIAMETER), "90 mm", then=Qt.Key.Key_Tab)
    assert document.case.outlets[0].opening.diameter.text == "90 mm"
    assert document.undo_stack.count() == 1


def test_a_bare_number_takes_the_unit_that_stood_there(panel: EntryPanel, document: Document, type_into: Type) -> None:
    type_into(field(panel, *DIAMETER), "85")
    assert document.case.outlets[0].opening.diameter.text == "85 mm"
    assert line(panel, *DIAMETER).text() == "85 mm"


def test_a_bare_number_in_an_empty_field_takes_a_neighbours_unit(
    panel: EntryPanel, document: Document, type_into: Type
) -> None:
    type_into(field(panel, *OVERFLOW), "2.9")
    assert document.case.levels.overflow is not None
    assert document.case.levels.overflow.text == "2.9 m"


def test_a_wrong_text_stays_with_its_reason_and_can_be_undone(
    panel: EntryPanel, document: Document, type_into: Type
) -> None:
    type_into(field(panel, *DIAMETER), "80 L")
    wrong = field(panel, *DIAMETER)
    assert line(panel, *DIAMETER).text() == "80 L"
    assert wrong.reason.startswith("80 L is a volume.")
    assert wrong.editor.property("wrong") is True
    assert document.case.outlets[0].opening.diameter.text == "80 mm"
    document.undo_stack.undo()
    assert line(panel, *DIAMETER).text() == "80 mm"
    assert wrong.reason == ""
    document.undo_stack.redo()
    assert line(panel, *DIAMETER).text() == "80 L"


def test_escape_puts_back_first_the_text_then_the_last_good_value(
    panel: EntryPanel, document: Document, type_into: Type
) -> None:
    type_into(field(panel, *DIAMETER), "80 L")
    type_into(field(panel, *DIAMETER), "7 kg", then=Qt.Key.Key_Escape)
    assert line(panel, *DIAMETER).text() == "80 L"
    QTest.keyClick(line(panel, *DIAMETER), Qt.Key.Key_Escape)
    assert line(panel, *DIAMETER).text() == "80 mm"
    assert not document.wrong


def test_an_entry_that_must_be_there_cannot_be_emptied(panel: EntryPanel, document: Document, type_into: Type) -> None:
    type_into(field(panel, *START), "")
    assert field(panel, *START).reason.startswith("Nothing is typed.")
    assert document.case.levels.start.text == "2.5 m"


def test_an_entry_with_a_default_can_be_emptied_and_says_so(
    panel: EntryPanel, document: Document, type_into: Type
) -> None:
    rate = ("inflow", "rate")
    type_into(field(panel, *rate), "")
    assert document.case.inflow is None or document.case.inflow.rate is None
    assert field(panel, *rate).echo == "default"
    assert line(panel, *rate).placeholderText() == "0 L/s"
    assert line(panel, *rate).property("untyped") is True


def test_what_is_being_typed_survives_a_change_elsewhere(
    panel: EntryPanel, document: Document, type_into: Type
) -> None:
    type_into(field(panel, *DIAMETER), "12", then=None)
    document.set(("title",), "Another title", "change of title")
    assert line(panel, *DIAMETER).text() == "12"
    assert line(panel, "title").text() == "Another title"


@pytest.mark.parametrize(
    ("key", "text"),
    [
        (Qt.Key.Key_Up, "81 mm"),
        (Qt.Key.Key_Down, "79 mm"),
        (Qt.Key.Key_PageUp, "90 mm"),
        (Qt.Key.Key_PageDown, "70 mm"),
    ],
)
def test_keys_step_the_second_digit(panel: EntryPanel, key: Qt.Key, text: str) -> None:
    line(panel, *DIAMETER).setFocus()
    QTest.keyClick(line(panel, *DIAMETER), key)
    assert line(panel, *DIAMETER).text() == text


def test_stepping_is_one_step_of_undo_while_the_cursor_stays(panel: EntryPanel, document: Document) -> None:
    target = line(panel, *DIAMETER)
    target.setFocus()
    for _ in range(5):
        QTest.keyClick(target, Qt.Key.Key_Up)
    line(panel, *START).setFocus()
    target.setFocus()
    QTest.keyClick(target, Qt.Key.Key_Up)
    assert document.case.outlets[0].opening.diameter.text == "86 mm"
    assert document.undo_stack.count() == 2


def test_stepping_stops_at_nil(panel: EntryPanel, document: Document, type_into: Type) -> None:
    rate = ("inflow", "rate")
    type_into(field(panel, *rate), "0 L/s")
    QTest.keyClick(line(panel, *rate), Qt.Key.Key_Down)
    assert line(panel, *rate).text() == "0 L/s"
    assert not document.wrong


def test_the_undo_key_belongs_to_the_document_once_a_text_is_taken_in(panel: EntryPanel, type_into: Type) -> None:
    type_into(field(panel, *DIAMETER), "90 mm")
    assert not line(panel, *DIAMETER).isModified()
    QTest.keyClicks(line(panel, *DIAMETER), "5")
    assert line(panel, *DIAMETER).isModified()


def test_the_cursor_points_at_the_entry_and_pointing_lights_the_field(panel: EntryPanel, document: Document) -> None:
    QTest.mouseClick(line(panel, *STOP), Qt.MouseButton.LeftButton)
    assert document.pointed == STOP
    document.pointed = START
    assert line(panel, *START).property("lit") is True
    assert line(panel, *STOP).property("lit") is False
    assert line(panel, *STOP).hasFocus()


def test_a_fault_between_entries_is_said_at_its_field(
    panel: EntryPanel, document: Document, type_into: Type, wait_for: Wait
) -> None:
    type_into(field(panel, *START), "4 m")
    wait_for(lambda: field(panel, *START).reason)
    assert document.case.levels.start.text == "4 m"
    type_into(field(panel, *START), "2 m")
    wait_for(lambda: not field(panel, *START).reason)


def test_the_headings_say_capacity_and_density(panel: EntryPanel, wait_for: Wait) -> None:
    beside = {box.group.key: box.heading.beside for box in panel.groups()}
    assert beside["vessel"] == "13.6\u00a0m³"
    assert beside["liquid"] == "998\u00a0kg/m³"
    assert beside["inflow"] == "steady"
    assert beside["levels"] == "above lowest point"
    assert beside["target"] == "none"
    assert beside["structure"] == "not entered"


def test_display_units_change_what_is_said_and_not_what_was_typed(
    panel: EntryPanel, document: Document, wait_for: Wait
) -> None:
    document.set(("units",), "us", "change of display units")
    assert field(panel, *STOP).echo == "0.656\u00a0ft"
    assert line(panel, *STOP).text() == "200 mm"
    wait_for(lambda: "US gal" in panel.groups()[0].heading.beside)


def test_another_shape_keeps_what_still_applies(panel: EntryPanel, document: Document) -> None:
    choose(panel, ("vessel",), "drum")
    assert isinstance(document.case.vessel, Drum)
    assert document.case.vessel.diameter.text == "2400 mm"
    assert labels(panel, "vessel") == ["Shape", "Diameter", "Length", "Heads", "Fall"]
    assert "From low end" in labels(panel, "outlets.0")
    assert document.undo_stack.count() == 1
    document.undo_stack.undo()
    assert isinstance(document.case.vessel, UprightCylinder)
    assert labels(panel, "vessel") == ["Shape", "Diameter", "Height", "Floor"]


def test_the_cursor_stays_in_the_list_that_changed_the_shape(panel: EntryPanel, wait_for: Wait) -> None:
    choose(panel, ("vessel",), "drum")
    wait_for(field(panel, "vessel").editor.hasFocus)


def test_two_different_heads(panel: EntryPanel, document: Document) -> None:
    choose(panel, ("vessel",), "drum")
    choose(panel, ("vessel", "heads"), "two")
    choose(panel, ("vessel", "heads", 1), "torispherical")
    assert labels(panel, "vessel")[3:] == ["Heads", "Low end", "High end", "Crown ÷ Ø", "Knuckle ÷ Ø", "Fall"]
    forms = [end.form for end in document.case.vessel.heads]
    assert forms[1] == "torispherical"
    ratio = field(panel, "vessel", "heads", 1, "knuckle_ratio")
    assert ratio.editor.accessibleName() == "Vessel, high end, knuckle ÷ Ø"


def test_a_rectangular_opening(panel: EntryPanel, document: Document) -> None:
    choose(panel, ("outlets", 0, "opening"), "rectangle")
    assert isinstance(document.case.outlets[0].opening, RectangularOpening)
    assert field(panel, "outlets", 0, "opening", "width")


def test_a_coefficient_of_ones_own_begins_at_the_handbooks(
    panel: EntryPanel, document: Document, type_into: Type
) -> None:
    path = ("outlets", 0, "coefficient")
    chooser = field(panel, *path)
    assert isinstance(chooser, ChoiceField)
    assert chooser.box.currentText() == "0.59 · 0.61 · 0.63"
    choose(panel, path, "own")
    assert document.case.outlets[0].coefficient == CoefficientRange(0.59, 0.61, 0.63)
    type_into(field(panel, *path, "typical"), "0,62")
    assert document.case.outlets[0].coefficient == CoefficientRange(0.59, 0.62, 0.63)
    choose(panel, path, "handbook")
    assert document.case.outlets[0].coefficient == "handbook"


def test_another_entry_drops_the_size_that_went_with_the_former(
    panel: EntryPanel, document: Document, type_into: Type
) -> None:
    path = ("outlets", 0, "entry")
    choose(panel, path, "thick_plate")
    type_into(field(panel, "outlets", 0, "thickness"), "40 mm")
    choose(panel, path, "sharp_edged")
    assert document.case.outlets[0].thickness is None
    assert "Thickness" not in labels(panel, "outlets.0")


def test_the_headspace_can_be_declared_and_not(panel: EntryPanel, document: Document) -> None:
    choose(panel, ("headspace",), "")
    assert document.case.headspace is None
    choose(panel, ("headspace",), "open")
    assert document.case.headspace is not None


def test_the_wheel_changes_no_choice(panel: EntryPanel, document: Document) -> None:
    box = field(panel, "vessel").editor
    box.setFocus()
    place = QPointF(box.rect().center())
    event = QWheelEvent(
        place,
        box.mapToGlobal(place),
        QPoint(),
        QPoint(0, -120),
        Qt.MouseButton.NoButton,
        Qt.KeyboardModifier.NoModifier,
        Qt.ScrollPhase.NoScrollPhase,
        False,
    )
    QApplication.sendEvent(box, event)
    assert isinstance(document.case.vessel, UprightCylinder)


def test_outlets_are_added_copied_renamed_and_removed(panel: EntryPanel, document: Document, type_into: Type) -> None:
    QTest.mouseClick(link(panel, "Copy outlet 1"), Qt.MouseButton.LeftButton)
    QTest.mouseClick(link(panel, "Add an outlet after outlet 2"), Qt.MouseButton.LeftButton)
    assert [outlet.name for outlet in document.case.outlets] == ["drain", "drain 2", "drain 3"]
    type_into(field(panel, "outlets", 1, "name"), "side drain")
    QTest.mouseClick(link(panel, "Remove outlet 1"), Qt.MouseButton.LeftButton)
    assert [outlet.name for outlet in document.case.outlets] == ["side drain", "drain 3"]
    assert line(panel, "outlets", 0, "name").text() == "side drain"


def test_a_wrong_text_moves_with_its_outlet(panel: EntryPanel, document: Document, type_into: Type) -> None:
    QTest.mouseClick(link(panel, "Copy outlet 1"), Qt.MouseButton.LeftButton)
    type_into(field(panel, "outlets", 1, "opening", "diameter"), "80 L")
    QTest.mouseClick(link(panel, "Remove outlet 1"), Qt.MouseButton.LeftButton)
    assert line(panel, *DIAMETER).text() == "80 L"
    assert DIAMETER in document.wrong


def test_the_only_outlet_stays_and_the_panel_says_why(panel: EntryPanel, document: Document) -> None:
    QTest.mouseClick(link(panel, "Remove outlet 1"), Qt.MouseButton.LeftButton)
    assert len(document.case.outlets) == 1
    box = next(box for box in panel.groups() if box.group.key == "outlets.0")
    assert box.remark.startswith("This is the only outlet.")


def test_tab_goes_from_field_to_field_down_the_panel(panel: EntryPanel) -> None:
    line(panel, *START).setFocus()
    visited = []
    for _ in range(3):
        QTest.keyClick(QApplication.focusWidget(), Qt.Key.Key_Tab)
        visited.append(QApplication.focusWidget().accessibleName())
    assert visited == ["Levels, stop", "Levels, overflow", "Levels, high alarm"]


def test_tab_follows_the_rows_after_another_shape(panel: EntryPanel, wait_for: Wait) -> None:
    choose(panel, ("vessel",), "drum")
    wait_for(line(panel, "vessel", "length").isVisible)
    wait_for(field(panel, "vessel").editor.hasFocus)
    visited = []
    for _ in range(3):
        QTest.keyClick(QApplication.focusWidget(), Qt.Key.Key_Tab)
        visited.append(QApplication.focusWidget().accessibleName())
    assert visited == ["Vessel, diameter", "Vessel, length", "Vessel, heads"]


def test_a_folded_group_opens_with_its_link(panel: EntryPanel) -> None:
    thickness = field(panel, "structure", "shell_thickness")
    assert not thickness.isVisible()
    QTest.mouseClick(link(panel, "Show structure"), Qt.MouseButton.LeftButton)
    assert thickness.isVisible()


def test_every_field_tells_a_screen_reader_its_name(panel: EntryPanel) -> None:
    names = []
    for each in panel.fields():
        interface = QAccessible.queryAccessibleInterface(each.editor)
        names.append(interface.text(QAccessible.Text.Name))
    assert all(names)
    assert len(set(names)) == len(names)
    assert "Outlet 1, diameter" in names


def test_every_default_of_the_case_is_shown_as_it_would_be_typed(panel: EntryPanel) -> None:
    assert line(panel, "liquid", "temperature").placeholderText() == "20 °C"
    assert line(panel, "outlets", 0, "count").placeholderText() == "1"


def test_the_panel_follows_a_case_that_is_put_in_place_as_a_whole(
    panel: EntryPanel, document: Document, drum: Case
) -> None:
    document.begin(drum)
    assert line(panel, "vessel", "length").text() == "5600 mm"
    assert line(panel, "outlets", 0, "station").text() == "5200 mm"
