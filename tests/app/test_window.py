"""The window: files, questions, export, themes, folding, help; driven as a person would."""

from __future__ import annotations

import sys
from collections.abc import Callable
from pathlib import Path

import pytest
from PySide6.QtCore import QMimeData, QPoint, QPointF, Qt, QUrl
from PySide6.QtGui import QAction, QDragEnterEvent, QDropEvent
from PySide6.QtTest import QTest
from PySide6.QtWidgets import QApplication, QLineEdit, QMenu, QPushButton, QWidget

from headfall.case.model import Case
from headfall.files import read_case, write_case
from headfall_app.incidents import catch_incidents
from headfall_app.questions import LEAVE, SAVE, STAY
from headfall_app.resources import resource_path
from headfall_app.settings import Settings
from headfall_app.window import Window

from .conftest import Answering

DIAMETER = ("outlets", 0, "opening", "diameter")
Show, Type, Wait = Callable[[QWidget], None], Callable[..., None], Callable[[Callable[[], object]], None]
CONTROL, SHIFT = Qt.KeyboardModifier.ControlModifier, Qt.KeyboardModifier.ShiftModifier


@pytest.fixture
def window(tank: Case, settings: Settings, questions: Answering, show: Show) -> Window:
    """The window on the tank, which has no file yet."""
    made = Window(tank, settings, version="0.1.0", questions=questions)
    show(made)
    return made


@pytest.fixture
def bad_file(tmp_path: Path) -> Path:
    """A case file with two faults."""
    file = tmp_path / "bad.headfall"
    text = resource_path("examples/rinse_drum.headfall").read_text(encoding="utf-8")
    file.write_text(text.replace('"80 mm"', '"80 kg"').replace('"1.8 m"', '"1.8"'), encoding="utf-8")
    return file


def diameter(window: Window) -> QLineEdit:
    field = window.entry.field_at(DIAMETER)
    assert field is not None
    assert isinstance(field.editor, QLineEdit)
    return field.editor


def change(window: Window, type_into: Type, text: str = "90 mm", then: Qt.Key | None = Qt.Key.Key_Return) -> None:
    type_into(window.entry.field_at(DIAMETER), text, then)


def action(menu: QMenu, text: str) -> QAction:
    """Return the line of a menu with this text, without its key mark."""
    return next(each for each in menu.actions() if each.text().replace("&", "") == text)


def menu_of(window: Window, title: str) -> QMenu:
    return next(menu for menu in window.findChildren(QMenu) if menu.title().replace("&", "") == title)


def test_the_head_row_says_title_tag_revision_and_whether_it_is_saved(
    window: Window, questions: Answering, type_into: Type, tmp_path: Path
) -> None:
    assert window.head.saved_text == "No file yet"
    change(window, type_into)
    assert window.head.saved_text == "Not saved"
    assert window.isWindowModified()
    questions.save = tmp_path / "tank.headfall"
    QTest.keyClick(window, Qt.Key.Key_S, CONTROL)
    assert window.head.saved_text == "Saved"
    assert not window.isWindowModified()
    assert questions.asked == ["save day_tank.headfall"]


def test_saving_takes_in_what_stands_in_the_field_with_the_cursor(
    window: Window, questions: Answering, type_into: Type, tmp_path: Path
) -> None:
    questions.save = tmp_path / "tank.headfall"
    change(window, type_into, "95", then=None)
    QTest.keyClick(diameter(window), Qt.Key.Key_S, CONTROL)
    assert read_case(questions.save).outlets[0].opening.diameter.text == "95 mm"


def test_saving_is_refused_with_the_reason_while_an_entry_is_wrong(
    window: Window, questions: Answering, type_into: Type, tmp_path: Path
) -> None:
    questions.save = tmp_path / "tank.headfall"
    change(window, type_into, "80 L")
    QTest.keyClick(window, Qt.Key.Key_S, CONTROL)
    assert window.message.said.startswith("Not saved. Mend this first: Outlet 1, diameter.")
    assert not questions.save.exists()
    assert diameter(window).text() == "80 L"


def test_a_file_that_cannot_be_written_is_said(
    window: Window, questions: Answering, type_into: Type, tmp_path: Path
) -> None:
    questions.save = tmp_path / "nowhere" / "tank.headfall"
    change(window, type_into)
    QTest.keyClick(window, Qt.Key.Key_S, CONTROL | SHIFT)
    assert "was not written" in window.message.said
    assert window.head.saved_text == "Not saved"


def test_opening_a_bad_file_says_every_fault_and_keeps_the_case_in_hand(
    window: Window, questions: Answering, bad_file: Path
) -> None:
    questions.open = bad_file
    before = window.document.case
    QTest.keyClick(window, Qt.Key.Key_O, CONTROL)
    said = window.message.said
    assert said.startswith("bad.headfall was not opened. The case in hand is unchanged.")
    assert "outlets[0].opening.diameter: 80 kg is a mass." in said
    assert "levels.start: 1.8 has no unit." in said
    assert window.document.case is before
    close = next(button for button in window.message.findChildren(QPushButton))
    QTest.mouseClick(close, Qt.MouseButton.LeftButton)
    assert window.message.said == ""


def test_opening_a_good_file_remembers_it(
    window: Window, questions: Answering, settings: Settings, drum: Case, tmp_path: Path
) -> None:
    questions.open = tmp_path / "drum.headfall"
    write_case(drum, questions.open)
    QTest.keyClick(window, Qt.Key.Key_O, CONTROL)
    assert window.document.case == drum
    assert window.head.saved_text == "Saved"
    assert [file.name for file in settings.recent] == ["drum.headfall"]
    menu_of(window, "Open a recent case").aboutToShow.emit()
    window.open_example(resource_path("examples/header_tank.headfall"))
    action(menu_of(window, "Open a recent case"), "drum.headfall").trigger()
    assert window.document.file == questions.open


@pytest.mark.parametrize(("answer", "stays"), [(STAY, True), (LEAVE, False), (SAVE, False)])
def test_unsaved_work_is_asked_about_before_another_case(
    window: Window, questions: Answering, type_into: Type, tmp_path: Path, answer: str, stays: bool
) -> None:
    questions.leaving, questions.save = answer, tmp_path / "tank.headfall"
    change(window, type_into)
    QTest.keyClick(window, Qt.Key.Key_N, CONTROL)
    assert questions.asked[0] == "unsaved Day tank"
    assert (window.document.case.title == "Day tank") == stays
    assert questions.save.exists() == (answer == SAVE)


def test_saving_before_leaving_that_comes_to_nothing_stays(
    window: Window, questions: Answering, type_into: Type
) -> None:
    questions.leaving, questions.save = SAVE, None
    change(window, type_into)
    assert not window.close()
    assert window.isVisible()
    questions.leaving = LEAVE
    assert window.close()


def test_nothing_is_asked_where_nothing_was_changed(window: Window, questions: Answering) -> None:
    QTest.keyClick(window, Qt.Key.Key_N, CONTROL)
    assert questions.asked == []
    assert window.document.case.title is None


def test_undo_and_redo_by_key_from_inside_a_field(window: Window, type_into: Type) -> None:
    change(window, type_into)
    QTest.keyClick(diameter(window), Qt.Key.Key_Z, CONTROL)
    assert diameter(window).text() == "80 mm"
    QTest.keyClick(diameter(window), Qt.Key.Key_Z, CONTROL | SHIFT)
    assert diameter(window).text() == "90 mm"
    assert action(menu_of(window, "Edit"), "Undo Change the diameter").isEnabled()


def test_an_example_is_opened_without_a_file_of_its_own(window: Window) -> None:
    action(menu_of(window, "Open an example"), "Rinse drum").trigger()
    assert window.document.case.title == "Rinse drum"
    assert window.document.file is None
    assert window.head.saved_text == "No file yet"


def test_every_example_opens(window: Window) -> None:
    menu = menu_of(window, "Open an example")
    assert menu.actions()
    for each in menu.actions():
        each.trigger()
        assert window.message.said == ""
        assert window.document.faults == ()


def test_units_are_switched_by_key(window: Window) -> None:
    QTest.keyClick(window, Qt.Key.Key_U, CONTROL)
    assert window.document.display.system == "us"
    QTest.keyClick(window, Qt.Key.Key_U, CONTROL)
    assert window.document.display.system == "metric"


def test_a_theme_is_kept_and_shown(window: Window, settings: Settings, tmp_path: Path) -> None:
    light = window.entry.grab().toImage().pixelColor(2, 2)
    action(menu_of(window, "Colours"), "Dark").trigger()
    assert window.theme.name == "dark"
    assert window.entry.grab().toImage().pixelColor(2, 2).lightness() < 60 < light.lightness()
    settings.sync()
    assert Settings(tmp_path / "settings.ini").theme == "dark"


def test_the_sheet_is_written_on_the_paper_chosen(window: Window, questions: Answering, tmp_path: Path) -> None:
    questions.sheet = tmp_path / "sheet.pdf"
    action(menu_of(window, "Paper of the sheet"), "Letter").trigger()
    QTest.keyClick(window, Qt.Key.Key_E, CONTROL)
    assert questions.asked == ["sheet day_tank.pdf"]
    assert questions.sheet.read_bytes().startswith(b"%PDF")
    assert window.notice.said == f"The sheet was written to {questions.sheet}."
    assert window.message.said == ""


def test_no_sheet_is_written_while_an_entry_is_wrong(
    window: Window, questions: Answering, type_into: Type, tmp_path: Path
) -> None:
    questions.sheet = tmp_path / "sheet.pdf"
    change(window, type_into, "80 L")
    QTest.keyClick(window, Qt.Key.Key_E, CONTROL)
    assert questions.asked == []
    assert not questions.sheet.exists()
    assert window.message.said.startswith("No sheet was written. Mend this first: Outlet 1, diameter.")


def test_a_file_dropped_on_the_window_is_opened(window: Window, drum: Case, tmp_path: Path) -> None:
    file = tmp_path / "drum.headfall"
    write_case(drum, file)
    data = QMimeData()
    data.setUrls([QUrl.fromLocalFile(str(file))])
    copy, held, plain = Qt.DropAction.CopyAction, Qt.MouseButton.LeftButton, Qt.KeyboardModifier.NoModifier
    QApplication.sendEvent(window, QDragEnterEvent(QPoint(500, 300), copy, data, held, plain))
    QApplication.sendEvent(window, QDropEvent(QPointF(500, 300), copy, data, held, plain))
    assert window.document.file == file


def test_an_outlet_is_added_by_key_and_gets_the_cursor(window: Window) -> None:
    QTest.keyClick(window, Qt.Key.Key_A, CONTROL | SHIFT)
    assert len(window.document.case.outlets) == 2
    assert window.document.pointed == ("outlets", 1, "name")


def test_a_narrow_window_folds_the_entry_to_a_strip(window: Window, wait_for: Wait) -> None:
    window.resize(1024, 640)
    wait_for(window.strip.isVisible)
    assert not window.entry.isVisible()
    levels = next(button for button in window.strip.buttons if button.text() == "Levels")
    QTest.mouseClick(levels, Qt.MouseButton.LeftButton)
    assert window.entry.isVisible()
    assert window.document.pointed == ("levels", "start")
    QTest.mouseClick(levels, Qt.MouseButton.LeftButton)
    assert not window.entry.isVisible()
    window.resize(1400, 900)
    wait_for(window.entry.isVisible)
    assert not window.strip.isVisible()


def test_help_opens_at_the_entry_in_hand(window: Window) -> None:
    stop = window.entry.field_at(("levels", "stop"))
    assert stop is not None
    QTest.mouseClick(stop.editor, Qt.MouseButton.LeftButton)
    QTest.keyClick(stop.editor, Qt.Key.Key_F1)
    assert window.help is not None
    assert window.help.isVisible()
    assert "Five minutes with Headfall" in window.help.text
    assert window.help.heading_on_top == "Levels"
    for page, words in (("The case file", "headfall"), ("About Headfall", "Source Sans Pro")):
        link = next(button for button in window.help.findChildren(QPushButton) if button.text() == page)
        QTest.mouseClick(link, Qt.MouseButton.LeftButton)
        assert words in window.help.text
    window.help.close()


def test_an_incident_is_said_in_a_sentence_and_logged(
    window: Window, tmp_path: Path, monkeypatch: pytest.MonkeyPatch, capsys: pytest.CaptureFixture[str]
) -> None:
    monkeypatch.setattr(sys, "excepthook", sys.excepthook)
    log = tmp_path / "data" / "headfall.log"
    catch_incidents(log, window.message.say)
    try:
        raise ZeroDivisionError("a defect")
    except ZeroDivisionError as incident:
        sys.excepthook(type(incident), incident, incident.__traceback__)
    assert window.message.said.startswith("Something in Headfall itself failed.")
    assert "ZeroDivisionError: a defect" in log.read_text(encoding="utf-8")
    assert "Traceback" not in capsys.readouterr().err


def test_the_window_stands_where_it_stood(
    window: Window, questions: Answering, settings: Settings, tank: Case, show: Show
) -> None:
    # No larger than the screen of the platform without a display, which it is fitted to.
    window.resize(1024, 700)
    window.close()
    again = Window(tank, settings, version="0.1.0", questions=questions)
    show(again)
    assert (again.width(), again.height()) == (1024, 700)


def test_settings_that_make_no_sense_count_as_not_set(tmp_path: Path) -> None:
    file = tmp_path / "settings.ini"
    file.write_text("[General]\ntheme=plaid\npaper=a0\ngeometry=7\n", encoding="utf-8")
    settings = Settings(file)
    assert (settings.theme, settings.paper, settings.recent) == ("system", "a4", [])
    assert settings.geometry.isEmpty()


def test_an_example_opened_as_a_file_has_no_file_of_its_own(window: Window) -> None:
    assert window.open_file(resource_path("examples/header_tank.headfall"))
    assert window.document.file is None
    assert window.head.saved_text == "No file yet"
    assert window.settings.recent == []


def test_pipes_and_weirs_are_added_from_the_menu(window: Window, wait_for: Wait) -> None:
    edit = menu_of(window, "Edit")
    action(edit, "Add a pipe").trigger()
    action(edit, "Add a weir").trigger()
    assert [outlet.kind for outlet in window.document.case.outlets] == ["orifice", "pipe", "weir"]
    name = window.entry.field_at(("outlets", 2, "name"))
    assert name is not None
    wait_for(name.editor.hasFocus)


def test_an_example_is_not_written_over(window: Window, questions: Answering, type_into: Type, tmp_path: Path) -> None:
    example = resource_path("examples/header_tank.headfall")
    before = example.read_bytes()
    assert window.open_file(example)
    change(window, type_into)
    questions.save = tmp_path / "mine.headfall"
    QTest.keyClick(window, Qt.Key.Key_S, CONTROL)
    assert questions.asked == ["save header_tank.headfall"]
    assert questions.save.exists()
    assert example.read_bytes() == before
