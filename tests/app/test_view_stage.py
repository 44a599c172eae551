"""The stage and the slider in a person's hands."""

from __future__ import annotations

from collections.abc import Callable

import pytest
from PySide6.QtCore import QPoint, Qt
from PySide6.QtTest import QTest
from PySide6.QtWidgets import QWidget

from headfall.case.model import Case
from headfall.quantities import parse
from headfall_app.document import Document
from headfall_app.paint.curve import cursor_plate
from headfall_app.paint.dimensions import dimension_boxes
from headfall_app.paint.flags import placed_flags
from headfall_app.paint.slider import track_x
from headfall_app.paint.theme import theme
from headfall_app.paint.thumbnail import thumbnail_box
from headfall_app.view.page import TankPage
from headfall_app.view.time_cursor import TimeCursor, first_time

Show = Callable[[QWidget], None]
Wait = Callable[[Callable[[], object]], None]
LEFT, NONE = Qt.MouseButton.LeftButton, Qt.KeyboardModifier.NoModifier


@pytest.fixture
def page(document: Document, show: Show) -> TankPage:
    """The main page on the tank, on show."""
    made = TankPage(document, theme("light"))
    made.resize(1100, 852)
    show(made)
    return made


def flag_at(page: TankPage, key: str) -> QPoint:
    """Return the middle of a flag."""
    scene = page.stage.scene
    assert scene is not None
    for flag in placed_flags(page.stage.frame(scene), scene):
        if flag.mark.key == key:
            return flag.box.center().toPoint()
    raise AssertionError(key)


def drag(widget: QWidget, start: QPoint, by: QPoint, steps: int = 8) -> None:
    """Drag with the left button, in steps, without letting go."""
    QTest.mousePress(widget, LEFT, NONE, start)
    for step in range(1, steps + 1):
        QTest.mouseMove(widget, start + QPoint(by.x() * step // steps, by.y() * step // steps))


def test_a_drag_of_the_start_flag_is_one_step_in_the_unit_typed(page: TankPage, document: Document) -> None:
    before = document.case.levels.start
    scene = page.stage.scene
    assert scene is not None
    frame = page.stage.frame(scene)
    at = flag_at(page, "start")
    drag(page.stage, at, QPoint(0, 60))
    QTest.mouseRelease(page.stage, LEFT, NONE, at + QPoint(0, 60))
    after = document.case.levels.start
    assert after.value == pytest.approx(before.value - 60.0 / frame.pixels_per_metre, abs=0.01)
    assert after.unit == "m"
    assert document.undo_stack.count() == 1
    assert document.undo_stack.undoText() == "Move the start level"
    document.undo_stack.undo()
    assert document.case.levels.start == before


def test_a_stop_typed_in_millimetres_stays_in_millimetres(page: TankPage, document: Document) -> None:
    at = flag_at(page, "stop")
    drag(page.stage, at, QPoint(0, -40))
    QTest.mouseRelease(page.stage, LEFT, NONE, at + QPoint(0, -40))
    assert document.case.levels.stop.text.endswith(" mm")
    assert document.case.levels.stop.value > 0.25
    assert document.answers is not None and not document.is_stale


def test_two_drags_are_two_steps(page: TankPage, document: Document) -> None:
    for _ in range(2):
        at = flag_at(page, "start")
        drag(page.stage, at, QPoint(0, 20))
        QTest.mouseRelease(page.stage, LEFT, NONE, at + QPoint(0, 20))
    assert document.undo_stack.count() == 2


def test_a_level_cannot_be_dragged_past_overflow_or_bottom(page: TankPage, document: Document) -> None:
    for by, wanted in ((-900, 3.0), (2000, 0.0)):
        at = flag_at(page, "start")
        drag(page.stage, at, QPoint(0, by))
        QTest.mouseRelease(page.stage, LEFT, NONE, at + QPoint(0, by))
        assert document.case.levels.start.value == pytest.approx(wanted)
        assert not document.is_stale


def test_escape_gives_a_dragged_level_back(page: TankPage, document: Document) -> None:
    before = document.case
    at = flag_at(page, "stop")
    drag(page.stage, at, QPoint(0, -50))
    assert document.case != before
    QTest.keyClick(page.stage, Qt.Key.Key_Escape)
    QTest.mouseRelease(page.stage, LEFT, NONE, at)
    assert document.case == before
    assert not document.undo_stack.canUndo()


def test_an_overflow_that_was_not_typed_can_be_dragged_and_put_back(page: TankPage, document: Document) -> None:
    at = flag_at(page, "overflow")
    drag(page.stage, at, QPoint(0, 25))
    QTest.mouseRelease(page.stage, LEFT, NONE, at + QPoint(0, 25))
    assert document.case.levels.overflow is not None
    assert document.case.levels.overflow.value < 3.0
    QTest.mouseDClick(page.stage, LEFT, NONE, flag_at(page, "overflow"))
    assert document.case.levels.overflow is None


def test_the_keyboard_reaches_every_handle_and_moves_a_level_by_a_millimetre(
    page: TankPage, document: Document
) -> None:
    page.stage.setFocus(Qt.FocusReason.TabFocusReason)
    QTest.keyClick(page.stage, Qt.Key.Key_Tab)
    QTest.keyClick(page.stage, Qt.Key.Key_Tab)
    assert page.stage.accessibleDescription().startswith("Start level")
    QTest.keyClick(page.stage, Qt.Key.Key_Down)
    assert document.case.levels.start.value == pytest.approx(2.499)
    QTest.keyClick(page.stage, Qt.Key.Key_PageUp)
    assert document.case.levels.start.value == pytest.approx(2.509)
    QTest.keyClick(page.stage, Qt.Key.Key_Tab)
    QTest.keyClick(page.stage, Qt.Key.Key_Up)
    assert document.case.levels.stop.value == pytest.approx(0.201)


def test_tab_leaves_the_stage_after_its_last_handle(page: TankPage) -> None:
    page.stage.setFocus(Qt.FocusReason.TabFocusReason)
    for _ in range(4):
        assert page.stage.hasFocus()
        QTest.keyClick(page.stage, Qt.Key.Key_Tab)
    assert not page.stage.hasFocus()


def test_the_time_cursor_follows_mouse_and_keys(page: TankPage, document: Document) -> None:
    stage = page.stage
    scene = stage.scene
    assert scene is not None
    frame = stage.frame(scene)
    assert frame.plot is not None and document.answers is not None
    at = QPoint(round(frame.time_x(600.0)), round(frame.plot[1]) + 100)
    QTest.mouseClick(stage, LEFT, NONE, at)
    assert stage.time == pytest.approx(600.0, abs=15.0)
    before = stage.time
    QTest.keyClick(stage, Qt.Key.Key_Right)
    assert stage.time > before
    QTest.keyClick(stage, Qt.Key.Key_End)
    assert stage.time == document.answers.curve.time[-1]
    QTest.keyClick(stage, Qt.Key.Key_Home)
    assert stage.time == 0.0
    assert document.undo_stack.count() == 0


def test_escape_gives_the_time_back(page: TankPage) -> None:
    stage = page.stage
    scene = stage.scene
    assert scene is not None
    before = stage.time
    drag(stage, cursor_plate(stage.frame(scene), scene).center().toPoint(), QPoint(80, 0))
    assert stage.time != before
    QTest.keyClick(stage, Qt.Key.Key_Escape)
    assert stage.time == pytest.approx(before)


def test_pointing_at_a_dimension_points_at_its_entry_and_leaving_gives_back(page: TankPage, document: Document) -> None:
    document.cursor = document.pointed = ("levels", "start")
    scene = page.stage.scene
    assert scene is not None
    boxes = {size.path: box for size, box in dimension_boxes(page.stage.frame(scene), scene)}
    QTest.mouseMove(page.stage, boxes[("vessel", "diameter")].center().toPoint())
    assert document.pointed == ("vessel", "diameter")
    shown = page.stage.scene
    assert shown is not None and [size.text for size in shown.sizes if size.lit] == ["2400 mm"]
    QTest.mouseMove(page.stage, QPoint(5, 5))
    assert document.pointed == ("levels", "start")


def test_a_click_on_the_outline_shows_a_drum_whole(drum: Case, show: Show) -> None:
    page = TankPage(Document(drum), theme("dark"))
    page.resize(1100, 852)
    show(page)
    scene = page.stage.scene
    assert scene is not None
    assert page.stage.frame(scene).across.breaks
    QTest.mouseClick(page.stage, LEFT, NONE, thumbnail_box(page.stage.frame(scene), scene).center().toPoint())
    assert not page.stage.frame(scene).across.breaks
    QTest.mouseClick(page.stage, LEFT, NONE, thumbnail_box(page.stage.frame(scene), scene).center().toPoint())
    assert page.stage.frame(scene).across.breaks


def test_the_stage_says_what_it_shows(page: TankPage, document: Document, wait_for: Wait) -> None:
    stage = page.stage
    assert stage.accessibleName() == "Section and level against time"
    said = stage.accessibleDescription()
    assert "Start 2.500" in said and "overflow 3.000" in said and "the level stands at" in said
    document.set_wrong(("levels", "start"), "abc", "abc is no length.", "Type it")
    wait_for(lambda: "Last good answers." in stage.accessibleDescription())


# The slider -----------------------------------------------------------------------------------------------------------


def test_a_drag_of_the_slider_is_one_step_in_the_unit_typed(page: TankPage, document: Document, wait_for: Wait) -> None:
    slider = page.slider
    before = document.answers
    at = QPoint(round(track_x(slider.value, slider.end, slider.width())), 48)
    drag(slider, at, QPoint(90, 0))
    end = slider.end
    wait_for(lambda: document.answers is not before)
    assert slider.end == end, "the track holds still while it is dragged"
    QTest.mouseRelease(slider, LEFT, NONE, at + QPoint(90, 0))
    assert document.case.inflow is not None and document.case.inflow.rate is not None
    assert document.case.inflow.rate.value > 2e-3
    assert document.case.inflow.rate.text.endswith(" L/s")
    assert document.undo_stack.count() == 1
    document.undo_stack.undo()
    assert document.case.inflow.rate.text == "1 L/s"


def test_escape_gives_the_dragged_inflow_back(page: TankPage, document: Document, wait_for: Wait) -> None:
    slider = page.slider
    at = QPoint(round(track_x(slider.value, slider.end, slider.width())), 48)
    drag(slider, at, QPoint(60, 0))
    wait_for(lambda: document.undo_stack.count() == 1)
    QTest.keyClick(slider, Qt.Key.Key_Escape)
    QTest.mouseRelease(slider, LEFT, NONE, at)
    assert document.case.inflow is not None and document.case.inflow.rate is not None
    assert document.case.inflow.rate.text == "1 L/s"
    assert not document.undo_stack.canUndo()


def test_keys_move_the_inflow_and_end_goes_to_the_mark(page: TankPage, document: Document) -> None:
    slider = page.slider
    slider.setFocus()
    values = []
    for key in (Qt.Key.Key_Right, Qt.Key.Key_PageUp, Qt.Key.Key_Left, Qt.Key.Key_End, Qt.Key.Key_Home):
        QTest.keyClick(slider, key)
        values.append(slider.value)
    first, second, third, end, home = values
    assert 1e-3 < first < second and third < second
    assert slider.mark is not None
    assert end == pytest.approx(slider.mark, rel=0.01)
    assert home == 0.0
    assert document.undo_stack.count() == 5


def test_past_the_mark_the_answer_is_the_time_to_overflow(page: TankPage, document: Document, wait_for: Wait) -> None:
    slider = page.slider
    at = QPoint(round(track_x(slider.value, slider.end, slider.width())), 48)
    QTest.mousePress(slider, LEFT, NONE, at)
    QTest.mouseMove(slider, QPoint(slider.width() - 2, 48))
    QTest.mouseRelease(slider, LEFT, NONE, QPoint(slider.width() - 2, 48))
    wait_for(lambda: page.answers_row.answers[0].name.startswith("Time to overflow"))
    assert page.answers_row.answers[1].figure[0][0].startswith("above the")


def test_the_slider_says_its_value_and_its_mark(page: TankPage) -> None:
    assert page.slider.accessibleName() == "Inflow"
    assert page.slider.accessibleDescription().startswith("1 L/s. ")
    assert "largest that stays below overflow" in page.slider.accessibleDescription()


@pytest.mark.parametrize(
    ("units", "typed", "value", "unit"),
    [
        ("us", "2 L/s", "31.7", "US gal/min"),
        ("us", "0 L/s", "nil", "US gal/min"),
        ("us", "40 ft³/h", "40 ft³/h", "ft³/h"),
        ("us", "40 US gal/min", "40 US gal/min", "US gal/min"),
        ("metric", "40 L/min", "40 L/min", "L/min"),
        ("metric", "7.2 m³/h", "7.2 m³/h", "m³/h"),
        ("metric", "40 US gal/min", "2.52", "L/s"),
        ("metric", "40 imp gal/min", "3.03", "L/s"),
    ],
)
def test_the_slider_writes_in_the_units_of_the_answers(
    page: TankPage, document: Document, units: str, typed: str, value: str, unit: str
) -> None:
    document.set(("units",), units, "Change the units")
    document.set(("inflow", "rate"), parse(typed, "flow"), "Type it")
    state = page.slider.state
    assert state.value_text.startswith(value)
    assert unit in state.mark_text
    page.slider.setFocus()
    QTest.keyClick(page.slider, Qt.Key.Key_Right)
    assert document.case.inflow is not None and document.case.inflow.rate is not None
    assert document.case.inflow.rate.unit == unit


# The time cursor ------------------------------------------------------------------------------------------------------


@pytest.mark.parametrize(("end", "wanted"), [(2213.0, 600.0), (100.0, 30.0), (1.0, 0.27), (40_000.0, 10_800.0)])
def test_the_cursor_begins_at_a_round_time(end: float, wanted: float) -> None:
    assert first_time(end) == pytest.approx(wanted)


def test_the_cursor_keeps_its_time_while_the_run_changes_a_little() -> None:
    cursor = TimeCursor()
    assert cursor.time(2213.0) == cursor.time(2400.0) == cursor.time(1500.0) == 600.0
    assert cursor.time(100.0) == 30.0
    cursor.put(50.0, 100.0)
    assert cursor.time(30.0) == 30.0
    assert cursor.time(200.0) == 50.0
