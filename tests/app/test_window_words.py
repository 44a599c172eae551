"""What the window says and where it starts: notices, the line over greyed answers, names, folders, help."""

from __future__ import annotations

from collections.abc import Callable
from pathlib import Path

import pytest
from PySide6.QtCore import QPoint, Qt, QTimer
from PySide6.QtTest import QTest
from PySide6.QtWidgets import QScrollArea, QWidget

from headfall.case.editing import insert_outlet, replace_at
from headfall.case.model import Case
from headfall.files import write_case
from headfall.quantities import parse
from headfall_app.document import Document
from headfall_app.resources import resource_path
from headfall_app.settings import Settings
from headfall_app.view.page_words import entry_phrase, stale_sentence
from headfall_app.window import Window

from .conftest import Answering

DIAMETER, START, STOP = ("outlets", 0, "opening", "diameter"), ("levels", "start"), ("levels", "stop")
Show = Callable[[QWidget], None]
CONTROL = Qt.KeyboardModifier.ControlModifier


@pytest.fixture
def window(tank: Case, settings: Settings, questions: Answering, show: Show) -> Window:
    """The window on the tank, which has no file yet."""
    made = Window(tank, settings, version="0.1.0", questions=questions)
    show(made)
    return made


# Notices --------------------------------------------------------------------------------------------------------------


def test_a_success_is_told_over_the_foot_and_moves_nothing(
    window: Window, questions: Answering, tmp_path: Path
) -> None:
    questions.sheet = tmp_path / "sheet.pdf"
    before = window.entry.mapTo(window, QPoint(0, 0))
    window.export_sheet()
    assert window.notice.said == f"The sheet was written to {questions.sheet}."
    assert window.notice.isVisible()
    assert window.entry.mapTo(window, QPoint(0, 0)) == before
    assert window.rect().contains(window.notice.geometry())
    window.resize(1024, 640)
    assert window.rect().contains(window.notice.geometry())


@pytest.mark.parametrize("act", ["key", "mouse", "time"])
def test_a_success_goes_by_itself_and_with_the_next_action(window: Window, act: str) -> None:
    window.notice.tell("The sheet was written to sheet.pdf.")
    if act == "key":
        QTest.keyClick(window.page.stage, Qt.Key.Key_Right)
    elif act == "mouse":
        QTest.mouseClick(window.head, Qt.MouseButton.LeftButton)
    else:
        clock = window.notice.findChild(QTimer)
        assert clock.interval() == 6000
        clock.timeout.emit()
    assert window.notice.said == ""


def test_a_failure_stays_through_the_next_action_and_goes_with_a_success(
    window: Window, questions: Answering, tmp_path: Path
) -> None:
    window.message.say("Not saved.")
    QTest.keyClick(window.page.stage, Qt.Key.Key_Right)
    assert window.message.said == "Not saved."
    questions.sheet = tmp_path / "sheet.pdf"
    window.export_sheet()
    assert window.message.said == ""


# The line over greyed answers -----------------------------------------------------------------------------------------


def test_an_unreadable_entry_is_named_in_a_plain_sentence(document: Document) -> None:
    assert document.answers is not None
    document.set_wrong(DIAMETER, "80 L", "80 L is a volume.", "Type it")
    assert stale_sentence(document) == "Last good answers. Mend the outlet's diameter to go on."
    document.set_wrong(START, "x", "x is no level.", "Type it")
    assert stale_sentence(document) == "Last good answers. Mend the outlet's diameter and the start level to go on."
    document.set_wrong(STOP, "x", "x is no level.", "Type it")
    assert stale_sentence(document) == "Last good answers. Mend the entries that are marked to go on."


def test_a_fault_between_entries_is_from_before_the_last_change(document: Document) -> None:
    assert document.answers is not None
    document.change(replace_at(document.case, ("vessel", "height"), parse("2 m", "length")), "Change the height")
    assert document.faults[0].path == START
    assert stale_sentence(document) == "Last good answers, from before the last change. Mend the start level to go on."


def test_a_case_that_never_was_good_has_no_answers_yet(tank: Case) -> None:
    document = Document(replace_at(tank, START, parse("9 m", "length")))
    assert stale_sentence(document) == "No answers yet. Mend the start level to go on."


def test_one_of_several_outlets_is_named_by_its_number(tank: Case) -> None:
    document = Document(insert_outlet(tank, 1, tank.outlets[0]))
    assert document.answers is not None
    document.set_wrong(("outlets", 1, "elevation"), "x", "x is no level.", "Type it")
    assert stale_sentence(document) == "Last good answers. Mend outlet 2's level to go on."


@pytest.mark.parametrize(
    ("path", "phrase"),
    [
        (("vessel", "diameter"), "the vessel's diameter"),
        (("vessel", "floor", "depth"), "the vessel's floor depth"),
        (("vessel", "heads", 1, "knuckle_ratio"), "the knuckle ÷ Ø of the vessel's high end"),
        (("inflow", "rate"), "the inflow's rate"),
        (("inflow",), "the inflow"),
        (("outlets", 0), "the outlet"),
        (("headspace",), "the headspace"),
        (("target", "drain_time"), "the target's drain time"),
        (("title",), "the title"),
    ],
)
def test_entries_as_a_sentence_names_them(path: tuple[str | int, ...], phrase: str) -> None:
    assert entry_phrase(path) == phrase


# Names, folders, whole cases ------------------------------------------------------------------------------------------


def test_a_case_without_a_title_goes_by_its_files_name(
    window: Window, tank: Case, questions: Answering, tmp_path: Path
) -> None:
    file = tmp_path / "north_tank.headfall"
    write_case(replace_at(tank, ("title",), None), file)
    window.open_file(file)
    shown = [label.text() for label in window.head.findChildren(QWidget) if hasattr(label, "text")]
    assert "north_tank" in shown
    window.document.set(("tag",), "T-1", "Change the tag")
    assert not window.close()
    assert questions.asked == ["unsaved north_tank"]
    window.document.undo_stack.undo()


def test_files_are_asked_for_in_the_folder_last_used_never_among_the_programs_own(
    window: Window, settings: Settings, tank: Case, tmp_path: Path
) -> None:
    own = resource_path("examples")
    window.open_file(own / "rinse_drum.headfall")
    assert not Path(settings.folder).is_relative_to(own.parent)
    assert Path(settings.folder).is_dir()
    assert window._suggested(".pdf") == Path(settings.folder) / "rinse_drum.pdf"
    write_case(tank, tmp_path / "tank.headfall")
    window.open_file(tmp_path / "tank.headfall")
    assert Path(settings.folder) == tmp_path
    assert window._suggested(".pdf") == tmp_path / "tank.pdf"


@pytest.mark.parametrize("kept", ["gone", "own"])
def test_a_folder_kept_that_is_gone_or_the_programs_own_is_not_used(tmp_path: Path, kept: str) -> None:
    folder = tmp_path / "gone" if kept == "gone" else resource_path("examples")
    file = tmp_path / "settings.ini"
    file.write_text(f"[General]\nfolder={folder.as_posix()}\n", encoding="utf-8")
    used = Path(Settings(file).folder)
    assert used != folder
    assert used.is_dir()


def test_a_new_case_is_shown_from_its_top_with_the_cursor_out_of_the_fields(window: Window) -> None:
    window.entry.go_to(("remarks",))
    QTest.keyClick(window, Qt.Key.Key_N, CONTROL)
    assert window.entry.findChild(QScrollArea).verticalScrollBar().value() == 0
    assert window.page.stage.hasFocus()


# Help -----------------------------------------------------------------------------------------------------------------


@pytest.mark.parametrize(
    ("path", "heading"),
    [
        (("vessel", "diameter"), "Vessel"),
        (DIAMETER, "Outlet"),
        (STOP, "Levels"),
        (("target", "drain_time"), "Target"),
        (("surroundings", "gravity"), "Surroundings"),
        (("remarks",), "Sheet heading"),
    ],
)
def test_help_has_the_groups_heading_on_top(window: Window, path: tuple[str | int, ...], heading: str) -> None:
    window.go_to_entry(path)
    window.help_in_hand()
    assert window.help is not None
    assert window.help.heading_on_top == heading
    assert "Ctrl+Q" in window.help.text
    window.help.close()
