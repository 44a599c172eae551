"""The main page: answers, notes, and what it says while an entry is wrong."""

from __future__ import annotations

import json
from collections.abc import Callable
from typing import Any

import numpy as np
import pytest
from PySide6.QtWidgets import QLabel, QWidget

from headfall.case.model import Case
from headfall.checks.finding import Grade
from headfall.files import case_from_text
from headfall_app.document import Document
from headfall_app.paint.theme import theme
from headfall_app.view.answers_row import figure_width
from headfall_app.view.note_words import path_of
from headfall_app.view.page import TankPage

Show = Callable[[QWidget], None]
Wait = Callable[[Callable[[], object]], None]
SIZES = [(1100, 852), (988, 672), (984, 592), (1600, 1032), (640, 500)]


def case_with(**more: Any) -> Case:
    """Return an upright tank of 2 m² with a sharp outlet of 50 mm."""
    content = {
        "headfall": 1,
        "vessel": {"shape": "box", "length": "2 m", "width": "1 m", "height": "2 m"},
        "outlets": [{"name": "drain", "kind": "orifice", "opening": {"form": "round", "diameter": "50 mm"}}],
        "levels": {"start": "1.5 m", "stop": "0.2 m", "overflow": "1.8 m"},
        "headspace": {"kind": "open"},
    }
    return case_from_text(json.dumps(content | more))


@pytest.fixture
def open_page(show: Show) -> Callable[..., TankPage]:
    """Open the page on a case at a size."""

    def open_now(case: Case, width: int = 1100, height: int = 852) -> TankPage:
        page = TankPage(Document(case), theme("light"))
        page.resize(width, height)
        show(page)
        return page

    return open_now


OpenPage = Callable[..., TankPage]


def test_the_row_says_the_five_answers(open_page: OpenPage, drum: Case) -> None:
    answers = open_page(drum).answers_row.answers
    assert len(answers) == 5
    assert answers[0].name.startswith("Time to the stop level, ")
    assert [answer.name for answer in answers[1:3]] == ["Settles at", "Outflow at start"]
    assert answers[3].name.startswith("Outlet for ") and answers[3].under.startswith("next size ")
    assert " to " in answers[3].aside, "the outlet shows its own range and the next size"
    assert answers[4].name == "Room below overflow"
    assert answers[4].under.endswith("above start")


def test_room_is_the_volume_between_start_and_overflow(open_page: OpenPage) -> None:
    room = open_page(case_with()).answers_row.answers[4]
    assert room.figure[0][0] == "0.600"
    assert room.under == "0.300\u00a0m above start"


def test_without_a_target_the_fourth_answer_is_the_largest_inflow(open_page: OpenPage) -> None:
    answer = open_page(case_with()).answers_row.answers[3]
    assert answer.name == "Largest inflow below overflow"
    assert answer.under.startswith("to be sure; typically ")


def test_words_replace_a_figure_that_is_none(open_page: OpenPage) -> None:
    never = open_page(case_with(inflow={"kind": "steady", "rate": "4 L/s"})).answers_row.answers
    assert never[0].figure[0][0] == "never reached"
    assert never[0].under.startswith("settles at ")
    still = open_page(case_with(levels={"start": "1 m", "stop": "1 m"})).answers_row.answers
    assert still[0].under == "starts at the stop level"
    assert still[1].name == "Settles at" and still[1].under == "nothing flows in"


def test_a_rectangle_is_sized_by_a_factor(open_page: OpenPage) -> None:
    outlet = {"kind": "orifice", "opening": {"form": "rectangle", "width": "60 mm", "height": "40 mm"}}
    answer = open_page(case_with(outlets=[outlet], target={"drain_time": "10 min"})).answers_row.answers[3]
    assert answer.figure[1][0] == "times"
    assert answer.under == "its present width and height"


@pytest.mark.parametrize("width", [600, 688, 1056])
def test_first_figures_fit_their_cells(open_page: OpenPage, drum: Case, width: int) -> None:
    page = open_page(drum, max(width + 44, 604), 700)
    for answer, box in zip(page.answers_row.answers, page.answers_row.cells(), strict=True):
        assert figure_width(answer, 17, 12) <= box.width() - 20.0


def test_the_answers_can_be_heard(open_page: OpenPage, drum: Case) -> None:
    page = open_page(drum)
    assert page.answers_row.accessibleName() == "Answers"
    assert "Settles at" in page.answers_row.accessibleDescription()
    assert page.notes.accessibleName() == "Notes"
    assert "This predicts hydraulics only." in page.notes.accessibleDescription()


# Notes ----------------------------------------------------------------------------------------------------------------


def test_notes_are_the_grades_people_must_read_worst_first(open_page: OpenPage) -> None:
    page = open_page(case_with(inflow={"kind": "steady", "rate": "4 L/s"}, headspace={"kind": "open"}))
    grades = [note.grade for note in page.notes.notes]
    assert grades == sorted(grades)
    assert grades[0] is Grade.STOP and grades[-1] is Grade.NOTE


def test_notes_that_have_no_room_fold_and_unfold(open_page: OpenPage, drum: Case) -> None:
    page = open_page(drum, 984, 592)
    notes = page.notes
    assert 1 <= notes.shown < len(notes.notes)
    fold = next(label for label in notes.findChildren(QLabel) if "Show all" in label.text())
    assert fold.isVisible() and fold.text().startswith("<span") and " more: " in fold.text()
    fold.linkActivated.emit("fold")
    assert notes.shown == len(notes.notes)
    assert "Show fewer" in fold.text()
    fold.linkActivated.emit("fold")
    assert notes.shown < len(notes.notes)


def test_a_missing_entry_is_one_click_away(open_page: OpenPage) -> None:
    case = case_with()
    page = open_page(
        case_from_text(
            json.dumps(
                {
                    "headfall": 1,
                    "vessel": {"shape": "sphere", "diameter": "2 m"},
                    "outlets": [{"kind": "orifice", "opening": {"form": "round", "diameter": "50 mm"}}],
                    "levels": {"start": "1.5 m", "stop": "0.2 m"},
                }
            )
        )
    )
    asked: list[object] = []
    page.entry_requested.connect(asked.append)
    first = next(label for label in page.notes.findChildren(QLabel) if 'href="entry"' in label.text())
    first.linkActivated.emit("entry")
    assert asked == [page.notes.notes[0].path]
    assert asked != [None] and case.headspace is not None


@pytest.mark.parametrize(
    ("place", "path"),
    [
        ("headspace", ("headspace",)),
        ("outlets[1].opening.diameter", ("outlets", 1, "opening", "diameter")),
        ("vessel.heads[0].depth", ("vessel", "heads", 0, "depth")),
    ],
)
def test_a_place_is_read_as_a_path(place: str, path: tuple[str | int, ...]) -> None:
    assert path_of(place) == path


# A wrong entry --------------------------------------------------------------------------------------------------------


def test_a_wrong_entry_is_told_and_the_last_good_answers_stay(open_page: OpenPage, wait_for: Wait) -> None:
    case = case_with()
    page = open_page(case)
    document = page._document
    said = page.answers_row.answers
    sentence = "80 L is a volume. Type a length, such as 80 mm or 3 1/8 in."
    document.set_wrong(("outlets", 0, "opening", "diameter"), "80 L", sentence, "Type it")
    wait_for(page.stale_line.isVisible)
    assert page.stale_line.text() == "Last good answers. Mend the outlet's diameter to go on."
    assert page.notes.notes[0].grade is Grade.STOP
    assert sentence in page.notes.notes[0].sentence
    assert page.answers_row.answers == said
    assert page.answers_row.accessibleDescription().startswith("Last good answers.")
    document.undo_stack.undo()
    wait_for(lambda: not page.stale_line.isVisible())


def test_a_fault_between_entries_greys_the_answers_too(open_page: OpenPage, wait_for: Wait) -> None:
    page = open_page(case_with())
    document = page._document
    document.set(("levels", "overflow"), document.case.levels.stop, "Type it")
    wait_for(page.stale_line.isVisible)
    assert page.notes.notes[0].grade is Grade.STOP
    assert "go on" in page.stale_line.text()


# Layout ---------------------------------------------------------------------------------------------------------------


@pytest.mark.parametrize("size", SIZES)
def test_the_parts_of_the_page_stand_under_one_another(open_page: OpenPage, drum: Case, size: tuple[int, int]) -> None:
    page = open_page(drum, *size)
    row, stage, notes = page.answers_row.geometry(), page.stage.geometry(), page.notes.geometry()
    assert row.bottom() < stage.top() < stage.bottom() < notes.top()
    assert notes.bottom() <= page.height()
    slider = page.slider.geometry()
    assert stage.height() >= slider.bottom() and slider.left() >= 0
    scene = page.stage.scene
    assert scene is not None
    frame = page.stage.frame(scene)
    assert slider.top() >= frame.bottom + frame.under - 4.0
    assert slider.right() <= frame.staff_left


def test_a_shallow_vessel_lets_the_notes_move_up(open_page: OpenPage) -> None:
    shallow = case_with(
        vessel={"shape": "cone", "top_diameter": "14 m", "bottom_diameter": "10 m", "height": "2.5 m"},
        levels={"start": "0.9 m", "stop": "0.5 m"},
    )
    page = open_page(shallow)
    assert page.stage.height() < 500
    assert page.notes.shown == len(page.notes.notes)


def test_another_theme_reaches_every_part(open_page: OpenPage, drum: Case) -> None:
    page = open_page(drum)
    page.set_theme(theme("dark"))
    ground = theme("dark").colour("surface")
    picture = page.grab().toImage()
    assert picture.pixelColor(3, 3) == ground
    for part in (page.stage, page.answers_row):
        assert picture.pixelColor(part.geometry().bottomRight()) == ground


def test_a_wide_shallow_vessel_is_squeezed_across_and_says_so(open_page: OpenPage) -> None:
    shallow = case_with(
        vessel={"shape": "cone", "top_diameter": "14 m", "bottom_diameter": "10 m", "height": "1 m"},
        levels={"start": "0.9 m", "stop": "0.5 m"},
    )
    scene = open_page(shallow).stage.scene
    assert scene is not None
    assert scene.section_title == "Section, heights to scale"
    assert np.ptp(scene.outline.wall[:, 0]) < 3.0
    assert "10 m" in {line.text for line in scene.sizes}
