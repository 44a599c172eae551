"""What the entry panel shows: texts whole, one ring, and a new case from its top."""

from __future__ import annotations

from collections.abc import Callable

import pytest
from PySide6.QtCore import Qt
from PySide6.QtGui import QColor
from PySide6.QtTest import QTest
from PySide6.QtWidgets import QApplication, QLineEdit, QPushButton, QScrollArea, QVBoxLayout, QWidget

from headfall.case.model import Case
from headfall_app.document import Document
from headfall_app.entry.field import Field
from headfall_app.entry.panel import EntryPanel
from headfall_app.paint.theme import theme
from headfall_app.style import dress

RATE, START, STOP = ("inflow", "rate"), ("levels", "start"), ("levels", "stop")
Show, Type, Wait = Callable[[QWidget], None], Callable[..., None], Callable[[Callable[[], object]], None]


@pytest.fixture
def panel(document: Document, show: Show) -> EntryPanel:
    """The dressed panel on the tank in US units, too low to show every group."""
    document.set(("units",), "us", "Change the display units")
    home = QWidget()
    made = EntryPanel(document, theme("light"))
    QVBoxLayout(home).addWidget(made)
    dress(home, theme("light"))
    home.resize(340, 500)
    show(home)
    return made


def field(panel: EntryPanel, path: tuple[str | int, ...]) -> Field:
    found = panel.field_at(path)
    assert found is not None, path
    return found


def line(panel: EntryPanel, path: tuple[str | int, ...]) -> QLineEdit:
    editor = field(panel, path).editor
    assert isinstance(editor, QLineEdit)
    return editor


def room(of: QLineEdit) -> int:
    """Return what a line has for its text: its width without border, paddings and Qt's own margins [px]."""
    return of.width() - 16


@pytest.mark.parametrize("narrow", [False, True])
@pytest.mark.parametrize("text", ["453.6 US gal/min", "12345.67 US gal/min", "40 US gal/min", "12 L/s"])
def test_a_rate_is_shown_whole_at_both_widths(
    panel: EntryPanel, type_into: Type, wait_for: Wait, narrow: bool, text: str
) -> None:
    panel.set_narrow(narrow)
    type_into(field(panel, RATE), text)
    rate = line(panel, RATE)
    wait_for(lambda: room(rate) >= rate.fontMetrics().horizontalAdvance(text))


def test_a_text_shows_its_beginning_once_the_cursor_has_left(panel: EntryPanel, type_into: Type) -> None:
    type_into(field(panel, RATE), "453.6 US gal/min", then=Qt.Key.Key_Tab)
    assert not line(panel, RATE).hasFocus()
    assert line(panel, RATE).cursorPosition() == 0


def test_an_echo_without_room_stands_in_the_tooltip(panel: EntryPanel, type_into: Type, wait_for: Wait) -> None:
    type_into(field(panel, RATE), "0.123456789 m3/min")
    rate = field(panel, RATE)
    assert rate.echo.endswith("US gal/min")
    wait_for(lambda: rate.echo in rate.editor.toolTip())
    type_into(field(panel, RATE), "28.6 L/s")
    wait_for(lambda: rate.editor.toolTip() == rate.row.tip)
    assert rate.echo.startswith("453")


def ringed(of: QWidget) -> bool:
    """Whether the accent runs along the right edge too, as only a ring does."""
    picture, accent = of.grab().toImage(), QColor(theme("light").hex("accent"))
    ratio = picture.devicePixelRatio()
    return picture.pixelColor(picture.width() - 1, round(of.height() * ratio / 2)) == accent


def test_a_field_that_is_only_pointed_at_has_no_ring(panel: EntryPanel, document: Document) -> None:
    QTest.mouseClick(line(panel, STOP), Qt.MouseButton.LeftButton)
    assert ringed(line(panel, STOP))
    document.pointed = START
    assert line(panel, START).property("lit") is True
    assert not ringed(line(panel, START))
    assert ringed(line(panel, STOP))


def test_tabbing_to_a_link_takes_the_ring_along(panel: EntryPanel, document: Document) -> None:
    former = line(panel, ("liquid", "temperature"))
    QTest.mouseClick(former, Qt.MouseButton.LeftButton)
    while isinstance(QApplication.focusWidget(), QLineEdit):
        former = QApplication.focusWidget()
        QTest.keyClick(former, Qt.Key.Key_Tab)
    link = QApplication.focusWidget()
    assert isinstance(link, QPushButton)
    assert link.accessibleName() == "Add an outlet after outlet 1"
    assert ringed(link)
    assert not ringed(former)
    assert former.property("lit") is not True
    assert document.pointed is None
    assert document.cursor is None


def test_pointing_elsewhere_leaves_the_cursor_where_it_is(panel: EntryPanel, document: Document) -> None:
    QTest.mouseClick(line(panel, STOP), Qt.MouseButton.LeftButton)
    document.pointed = START
    assert document.cursor == STOP
    panel.setFocusPolicy(Qt.FocusPolicy.StrongFocus)
    panel.setFocus()
    assert document.cursor is None
    assert document.pointed == START


def test_a_case_put_in_place_as_a_whole_is_shown_from_its_top(
    panel: EntryPanel, document: Document, drum: Case, application: QApplication
) -> None:
    panel.go_to(("remarks",))
    area = panel.findChild(QScrollArea)
    assert area.verticalScrollBar().value() > 0
    document.begin(drum)
    assert area.verticalScrollBar().value() == 0
    application.processEvents()
    assert area.verticalScrollBar().value() == 0
