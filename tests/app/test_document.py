"""The document: one draft, undo of everything, answers on demand, a file."""

from __future__ import annotations

from collections.abc import Callable
from pathlib import Path

import pytest
from PySide6.QtTest import QSignalSpy

from headfall.answers import Answers
from headfall.case.editing import change_shape
from headfall.case.faults import CaseError
from headfall.case.model import Case, RoundOpening
from headfall.files import FileError, read_case
from headfall.quantities import parse
from headfall.study import solve
from headfall_app.document import Document, SaveRefused

DIAMETER = ("outlets", 0, "opening", "diameter")
START = ("levels", "start")


def length(text: str) -> object:
    return parse(text, "length")


def bore(document: Document) -> str:
    opening = document.case.outlets[0].opening
    assert isinstance(opening, RoundOpening)
    return opening.diameter.text


def test_set_replaces_one_entry_and_can_be_undone(document: Document) -> None:
    document.set(DIAMETER, length("90 mm"), "change of diameter")
    assert bore(document) == "90 mm"
    assert document.undo_stack.undoText() == "change of diameter"
    document.undo_stack.undo()
    assert bore(document) == "80 mm"
    document.undo_stack.redo()
    assert bore(document) == "90 mm"


def test_one_gesture_is_one_step_and_the_next_gesture_another(document: Document) -> None:
    for size in range(81, 120):
        document.set(DIAMETER, length(f"{size} mm"), "drag", gesture="drag")
    document.end_gesture()
    document.set(DIAMETER, length("200 mm"), "drag", gesture="drag")
    assert document.undo_stack.count() == 2
    document.undo_stack.undo()
    assert bore(document) == "119 mm"
    document.undo_stack.undo()
    assert bore(document) == "80 mm"


def test_a_gesture_that_comes_back_to_where_it_began_leaves_no_step(document: Document) -> None:
    document.set(DIAMETER, length("90 mm"), "drag", gesture="drag")
    document.set(DIAMETER, length("80 mm"), "drag", gesture="drag")
    assert document.undo_stack.count() == 0
    assert not document.has_unsaved_work


def test_setting_what_is_there_is_no_step(document: Document) -> None:
    document.set(DIAMETER, length("80 mm"), "change of diameter")
    assert document.undo_stack.count() == 0


def test_answers_are_worked_out_only_when_asked_for(tank: Case) -> None:
    solved: list[Case] = []

    def counting(case: Case) -> Answers:
        solved.append(case)
        return solve(case)

    document = Document(tank, solver=counting)
    for size in range(81, 90):
        document.set(DIAMETER, length(f"{size} mm"), "drag", gesture="drag")
    assert solved == []
    assert document.answers is not None
    assert document.answers.case is document.case
    assert not document.is_stale
    assert len(solved) == 1


def test_answers_changed_is_said_once_a_turn_of_the_event_loop(
    document: Document, wait_for: Callable[..., None]
) -> None:
    spy = QSignalSpy(document.answers_changed)
    changes = QSignalSpy(document.changed)
    for size in range(81, 90):
        document.set(DIAMETER, length(f"{size} mm"), "drag", gesture="drag")
    assert spy.count() == 0
    assert changes.count() >= 9
    wait_for(lambda: spy.count() > 0)
    assert spy.count() == 1


def test_a_wrong_entry_keeps_text_and_last_good_answers_and_undoes(document: Document) -> None:
    good = document.answers
    document.set_wrong(DIAMETER, "80 L", "80 L is a volume. Type a length.", "change of diameter")
    assert document.wrong[DIAMETER].text == "80 L"
    assert document.wrong[DIAMETER].place == "outlets[0].opening.diameter"
    assert document.is_stale
    assert document.answers is good
    assert [fault.path for fault in document.faults] == [DIAMETER]
    document.undo_stack.undo()
    assert not document.wrong
    assert not document.is_stale
    document.undo_stack.redo()
    assert document.wrong[DIAMETER].text == "80 L"
    document.set(DIAMETER, length("80 mm"), "change of diameter")
    assert not document.wrong
    assert not document.is_stale


def test_a_fault_between_entries_keeps_the_last_good_answers(document: Document) -> None:
    good = document.answers
    document.set(START, length("4 m"), "change of start")
    assert document.is_stale
    assert document.answers is good
    assert START in [fault.path for fault in document.faults]
    document.set(START, length("2 m"), "change of start")
    assert not document.is_stale
    assert document.faults == ()


def test_a_defect_of_a_solver_becomes_a_fault(
    application: object, tank: Case, caplog: pytest.LogCaptureFixture
) -> None:
    def failing(case: Case) -> Answers:
        raise ZeroDivisionError("a defect")

    document = Document(tank, solver=failing)
    assert document.answers is None
    assert document.is_stale
    assert len(document.faults) == 1
    assert "could not be worked out" in caplog.text


def test_a_wrong_entry_goes_with_the_part_it_stood_in(document: Document) -> None:
    document.set_wrong(("vessel", "height"), "tall", "tall is not a number.", "change of height")
    document.change(change_shape(document.case, "sphere"), "change of shape", lambda path: None)
    assert not document.wrong
    document.undo_stack.undo()
    assert document.wrong[("vessel", "height")].text == "tall"


def test_save_and_open_give_back_what_was_typed(document: Document, tmp_path: Path) -> None:
    file = tmp_path / "tank.headfall"
    assert document.file is None
    assert not document.is_saved
    document.set(DIAMETER, length("3 1/8 in"), "change of diameter")
    document.save(file)
    assert document.is_saved
    assert read_case(file) == document.case
    document.set(DIAMETER, length("90 mm"), "change of diameter")
    assert document.has_unsaved_work
    document.undo_stack.undo()
    assert document.is_saved
    document.open(file)
    assert bore(document) == "3 1/8 in"
    assert document.undo_stack.count() == 0


def test_a_step_after_saving_does_not_merge_into_what_was_saved(document: Document, tmp_path: Path) -> None:
    document.set(DIAMETER, length("90 mm"), "drag", gesture="drag")
    document.save(tmp_path / "tank.headfall")
    document.set(DIAMETER, length("91 mm"), "drag", gesture="drag")
    assert not document.is_saved
    document.undo_stack.undo()
    assert document.is_saved
    assert bore(document) == "90 mm"


def test_saving_is_refused_while_an_entry_is_wrong(document: Document, tmp_path: Path) -> None:
    file = tmp_path / "tank.headfall"
    document.set_wrong(DIAMETER, "80 L", "80 L is a volume.", "change of diameter")
    with pytest.raises(SaveRefused, match=r"^Not saved\. Mend this first: Outlet 1, diameter\."):
        document.save(file)
    assert not file.exists()
    assert document.wrong[DIAMETER].text == "80 L"


def test_a_file_that_cannot_be_written_leaves_the_document_unsaved(document: Document, tmp_path: Path) -> None:
    document.set(DIAMETER, length("90 mm"), "change of diameter")
    with pytest.raises(FileError):
        document.save(tmp_path / "no such folder" / "tank.headfall")
    assert document.has_unsaved_work
    assert document.file is None


def test_a_bad_file_changes_nothing(document: Document, tmp_path: Path) -> None:
    file = tmp_path / "bad.headfall"
    file.write_text('{"headfall": 1}', encoding="utf-8")
    before = document.case
    document.set(DIAMETER, length("90 mm"), "change of diameter")
    with pytest.raises(CaseError):
        document.open(file)
    assert bore(document) == "90 mm"
    document.undo_stack.undo()
    assert document.case == before


def test_pointed_is_said_once_and_forgotten_with_its_outlet(document: Document, tank: Case) -> None:
    spy = QSignalSpy(document.pointed_changed)
    document.pointed = DIAMETER
    document.pointed = DIAMETER
    assert spy.count() == 1
    document.begin(tank)
    assert document.pointed is None


def test_display_units_are_part_of_the_case_and_undo(document: Document) -> None:
    assert document.display.system == "metric"
    document.set(("units",), "us", "change of display units")
    assert document.display.system == "us"
    document.undo_stack.undo()
    assert document.display.system == "metric"


def test_a_mended_fault_between_entries_goes_while_another_entry_cannot_be_read(document: Document) -> None:
    start, diameter = ("levels", "start"), ("outlets", 0, "opening", "diameter")
    high, good = parse("9 m", "length"), document.case.levels.start
    document.set(start, high, "Raise the start")
    document.set_wrong(diameter, "80 L", "80 L is a volume.", "Type it")
    assert {fault.path for fault in document.faults} == {start, diameter}
    document.set(start, good, "Lower the start")
    assert {fault.path for fault in document.faults} == {diameter}
    document.undo_stack.undo()
    assert {fault.path for fault in document.faults} == {start, diameter}
    document.undo_stack.undo()
    assert {fault.path for fault in document.faults} == {start}
