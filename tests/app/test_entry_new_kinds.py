"""Pipes, weirs, stacks and receiving vessels entered with keys and mouse, as steps that can be undone."""

from __future__ import annotations

from collections.abc import Callable

import pytest
from PySide6.QtCore import Qt
from PySide6.QtTest import QTest
from PySide6.QtWidgets import QApplication, QWidget

from headfall.case.model import LossRange, Pipe, ReceivingVessel, Weir
from headfall.files import read_case
from headfall.quantities.listed_bores import listed_bore
from headfall.study import solve
from headfall_app.document import Document
from headfall_app.entry.changes import add_outlet
from headfall_app.entry.offers import bore_names
from headfall_app.entry.panel import EntryPanel
from headfall_app.paint.theme import theme
from headfall_app.resources import resource_path

from .driving import choose, field, is_shown, labels, line, press, take_back_activation, type_at

OUTLET = ("outlets", 0)
Show = Callable[[QWidget], None]


@pytest.fixture
def document(application: QApplication) -> Document:
    """A document on the new case."""
    return Document(read_case(resource_path("app/new_case.headfall")))


@pytest.fixture
def panel(document: Document, show: Show) -> EntryPanel:
    """The panel on the new case, tall enough to show every group."""
    made = EntryPanel(document, theme("light"))
    made.resize(300, 1600)
    show(made)
    return made


def undo_all(document: Document) -> None:
    while document.undo_stack.canUndo():
        document.undo_stack.undo()


def type_the_vessel(panel: EntryPanel) -> None:
    choose(panel, ("vessel",), "drum")
    for name, text in (("diameter", "2.000 m"), ("length", "5.600 m"), ("fall", "56 mm")):
        type_at(panel, ("vessel", name), text)
    choose(panel, ("vessel", "heads"), "torispherical")
    type_at(panel, ("vessel", "heads", "crown_ratio"), "1")
    type_at(panel, ("vessel", "heads", "knuckle_ratio"), "0.1")


def type_the_liquid(panel: EntryPanel) -> None:
    choose(panel, ("liquid",), "own")
    for name, text in (
        ("name", "caustic soda, 10 %"),
        ("temperature", "20 degC"),
        ("density", "1109 kg/m^3"),
        ("viscosity", "1.9 mPa*s"),
    ):
        type_at(panel, ("liquid", name), text)


def type_the_pipe(panel: EntryPanel) -> None:
    choose(panel, (*OUTLET, "kind"), "pipe")
    choose(panel, (*OUTLET, "entry"), "sharp_edged")
    for name, text in (
        ("name", "dump line"),
        ("entry_loss", "0.4; 0.5; 0.6"),
        ("bore", "NPS 4 sch 40"),
        ("length", "6.0 m"),
        ("roughness", "0.045 mm"),
        ("discharge_elevation", "-1.197 m"),
        ("station", "0.30 m"),
    ):
        type_at(panel, (*OUTLET, name), text)
    for index, values in enumerate((("90° elbow", "0.25; 0.3; 0.5", "2"), ("full-bore ball valve", "0.05", ""))):
        press(panel, "Outlet 1: add a fitting")
        for name, text in zip(("name", "loss", "count"), values, strict=True):
            type_at(panel, (*OUTLET, "fittings", index, name), text)


def test_the_dump_drum_is_built_by_typing_and_gives_the_same_answers(panel: EntryPanel, document: Document) -> None:
    begun = document.case
    type_the_vessel(panel)
    type_the_liquid(panel)
    type_the_pipe(panel)
    choose(panel, ("headspace",), "vented")
    type_at(panel, ("headspace", "bore"), "80 mm")
    for name, text in (("start", "80 %"), ("stop", "103 mm"), ("overflow", "1.95 m")):
        type_at(panel, ("levels", name), text)
    type_at(panel, ("target", "drain_time"), "15 min")
    example = read_case(resource_path("examples/dump_drum.headfall"))
    for part in ("vessel", "liquid", "outlets", "headspace", "levels", "target"):
        assert getattr(document.case, part) == getattr(example, part), part
    assert document.answers is not None
    wanted = solve(example)
    assert document.answers.draw_down == wanted.draw_down
    assert document.answers.sizing == wanted.sizing
    assert field(panel, "levels", "start").echo == "1.514\u00a0m"
    undo_all(document)
    assert document.case == begun


def test_the_handbook_says_what_counts_where_nothing_is_typed(panel: EntryPanel, document: Document) -> None:
    choose(panel, (*OUTLET, "kind"), "pipe")
    press(panel, "Outlet 1: add a fitting")
    assert line(panel, *OUTLET, "roughness").placeholderText() == "0.045\u00a0mm"
    assert line(panel, *OUTLET, "fittings", 0, "loss").placeholderText() == "0.5 · 0.75 · 0.9"
    assert line(panel, *OUTLET, "fittings", 0, "laminar_loss").placeholderText() == "800"
    assert field(panel, *OUTLET, "fittings", 0, "loss").echo == "handbook"
    type_at(panel, (*OUTLET, "fittings", 0, "name"), "globe valve")
    assert line(panel, *OUTLET, "fittings", 0, "loss").placeholderText() == "4 · 7 · 10"
    choose(panel, (*OUTLET, "material"), "concrete")
    assert line(panel, *OUTLET, "roughness").placeholderText() == "1\u00a0mm"
    type_at(panel, (*OUTLET, "roughness"), "0.2 mm")
    assert not is_shown(panel, *OUTLET, "material")


def test_a_loss_of_ones_own_is_one_number_or_three_that_rise(panel: EntryPanel, document: Document) -> None:
    choose(panel, (*OUTLET, "kind"), "pipe")
    path = (*OUTLET, "entry_loss")
    type_at(panel, path, "0,4 · 0,5 · 0,6")
    assert document.case.outlets[0].entry_loss == LossRange(0.4, 0.5, 0.6)
    type_at(panel, path, "0.6; 0.5; 0.4")
    assert "does not rise" in field(panel, *path).reason
    assert document.case.outlets[0].entry_loss == LossRange(0.4, 0.5, 0.6)
    type_at(panel, path, "0.7")
    assert document.case.outlets[0].entry_loss == 0.7


def test_a_fitting_is_chosen_from_what_is_offered(panel: EntryPanel, document: Document) -> None:
    choose(panel, (*OUTLET, "kind"), "pipe")
    press(panel, "Outlet 1: add a fitting")
    name = line(panel, *OUTLET, "fittings", 0, "name")
    assert name.hasFocus()
    steps = document.undo_stack.count()
    QTest.keyClick(name, Qt.Key.Key_A, Qt.KeyboardModifier.ControlModifier)
    QTest.keyClicks(name, "butter")
    offered = name.completer().popup()
    assert offered.isVisible()
    assert offered.model().rowCount() == 1
    QTest.keyClick(offered, Qt.Key.Key_Down)
    QApplication.processEvents()
    QTest.keyClick(offered, Qt.Key.Key_Return)
    take_back_activation(panel)
    assert document.case.outlets[0].fittings[0].name == "butterfly valve"
    assert document.undo_stack.count() == steps + 1
    assert not document.wrong


def test_escape_closes_what_is_offered_before_it_puts_back_the_text(panel: EntryPanel, document: Document) -> None:
    choose(panel, (*OUTLET, "kind"), "pipe")
    bore = line(panel, *OUTLET, "bore")
    type_at(panel, (*OUTLET, "bore"), "NPS 4", then=None)
    assert bore.text() == "NPS 4"
    QTest.keyClick(bore, Qt.Key.Key_Escape)
    assert bore.text() == "50 mm"


@pytest.mark.parametrize("key", [Qt.Key.Key_Tab, Qt.Key.Key_Return])
def test_a_name_typed_to_its_end_is_taken_in_with_the_list_open(
    panel: EntryPanel, document: Document, key: Qt.Key
) -> None:
    choose(panel, (*OUTLET, "kind"), "pipe")
    bore = line(panel, *OUTLET, "bore")
    bore.setFocus()
    bore.selectAll()
    QTest.keyClicks(bore, "NPS 3 sch 40")
    assert bore.completer().popup().isVisible()
    QTest.keyClick(bore.completer().popup(), key)
    take_back_activation(panel)
    assert document.case.outlets[0].bore.text == "NPS 3 sch 40"
    assert not bore.completer().popup().isVisible()


def test_every_offered_bore_can_be_typed_and_says_its_inside(panel: EntryPanel, document: Document) -> None:
    assert len(bore_names()) > 150
    assert [name for name in bore_names() if listed_bore(name) is None] == []
    choose(panel, (*OUTLET, "kind"), "pipe")
    type_at(panel, (*OUTLET, "bore"), "NPS 4 sch 40")
    assert field(panel, *OUTLET, "bore").echo == "102\u00a0mm"
    type_at(panel, (*OUTLET, "bore"), "NPS 4")
    assert "leaves the wall open" in field(panel, *OUTLET, "bore").reason


def test_a_valve_and_a_section_of_another_bore(panel: EntryPanel, document: Document) -> None:
    choose(panel, (*OUTLET, "kind"), "pipe")
    choose(panel, (*OUTLET, "valve"), "kv")
    type_at(panel, (*OUTLET, "valve", "kv"), "63")
    type_at(panel, (*OUTLET, "valve", "opening"), "0,5")
    choose(panel, (*OUTLET, "valve", "characteristic"), "equal_percentage")
    valve = document.case.outlets[0].valve
    assert (valve.kv, valve.cv, valve.opening, valve.characteristic) == (63, None, 0.5, "equal_percentage")
    press(panel, "Outlet 1: add a length of another bore")
    assert line(panel, *OUTLET, "sections", 0, "bore").hasFocus()
    type_at(panel, (*OUTLET, "sections", 0, "bore"), "110 mm SDR 17")
    type_at(panel, (*OUTLET, "sections", 0, "length"), "12 m")
    press(panel, "Outlet 1, section 2: add a fitting")
    type_at(panel, (*OUTLET, "sections", 0, "fittings", 0, "name"), "tee branch")
    section = document.case.outlets[0].sections[0]
    assert (section.bore.text, section.length.text, section.fittings[0].name) == ("110 mm SDR 17", "12 m", "tee branch")
    assert document.answers is not None
    assert not document.faults
    press(panel, "Outlet 1, section 2: remove this section")
    assert document.case.outlets[0].sections is None


def test_an_outlet_runs_into_a_vessel_that_fills(panel: EntryPanel, document: Document) -> None:
    path = (*OUTLET, "tailwater")
    choose(panel, path, "vessel")
    type_at(panel, (*path, "elevation"), "-2 m")
    type_at(panel, (*path, "level"), "-1.5 m")
    choose(panel, (*path, "vessel"), "box")
    for name, text in (("length", "3 m"), ("width", "2 m"), ("height", "1.5 m")):
        type_at(panel, (*path, "vessel", name), text)
    tail = document.case.outlets[0].tailwater
    assert isinstance(tail, ReceivingVessel)
    assert (tail.elevation.text, tail.level.text, tail.vessel.shape) == ("-2 m", "-1.5 m", "box")
    assert document.answers is not None
    assert document.answers.receiver_level is not None
    assert line(panel, *path, "vessel", "length").accessibleName() == "Outlet 1, receiving vessel, length"


def test_a_level_outside_has_a_row_of_its_own(panel: EntryPanel, document: Document) -> None:
    path = (*OUTLET, "tailwater")
    choose(panel, path, "level")
    type_at(panel, path, "0.4 L")
    assert field(panel, *path).reason.startswith("0.4 L is a volume.")
    chooser = next(each for each in panel.fields() if each.row.path == path and each.row.kind == "choice")
    assert chooser.reason == ""
    type_at(panel, path, "0.4 m")
    assert document.case.outlets[0].tailwater.text == "0.4 m"
    choose(panel, path, "none")
    assert document.case.outlets[0].tailwater is None


@pytest.mark.parametrize(
    ("form", "sizes"),
    [
        ("rectangular", ["Width", "Channel width"]),
        ("vnotch", ["Angle"]),
        ("broad_crested", ["Width"]),
        ("standpipe", ["Diameter"]),
    ],
)
def test_a_weir_shows_the_sizes_of_its_form(panel: EntryPanel, document: Document, form: str, sizes: list[str]) -> None:
    choose(panel, (*OUTLET, "kind"), "weir")
    choose(panel, (*OUTLET, "form"), form)
    type_at(panel, (*OUTLET, "crest"), "1.2 m")
    assert labels(panel, "outlets.0")[: 3 + len(sizes)] == ["Name", "Kind", "Form", *sizes]
    assert document.case.outlets[0].form == form
    assert document.answers is not None
    assert not document.faults


def test_role_and_blocked_part(panel: EntryPanel, document: Document) -> None:
    choose(panel, (*OUTLET, "role"), "overflow")
    type_at(panel, (*OUTLET, "blocked"), "1.2")
    assert field(panel, *OUTLET, "blocked").reason
    type_at(panel, (*OUTLET, "blocked"), "0.25")
    outlet = document.case.outlets[0]
    assert (outlet.role, outlet.blocked) == ("overflow", 0.25)


def test_parts_of_a_stack_are_added_shaped_and_removed(panel: EntryPanel, document: Document) -> None:
    before = document.case
    choose(panel, ("vessel",), "stack")
    assert labels(panel, "vessel")[:2] == ["Shape", "Part 1, lowest"]
    choose(panel, ("vessel", "parts", 0), "cone")
    type_at(panel, ("vessel", "parts", 0, "bottom_diameter"), "300 mm")
    press(panel, "Vessel: add a part on top")
    choose(panel, ("vessel", "parts", 2), "basin")
    type_at(panel, ("vessel", "parts", 2, "side_slope"), "1.5; 2")
    assert document.case.vessel.parts[2].side_slope == (1.5, 2.0)
    press(panel, "Vessel, part 2: wall and lining")
    choose(panel, ("vessel", "parts", 1, "sizes"), "outside")
    type_at(panel, ("vessel", "parts", 1, "wall"), "6 mm")
    assert (document.case.vessel.parts[1].sizes, document.case.vessel.parts[1].wall.text) == ("outside", "6 mm")
    press(panel, "Vessel, part 3: remove this part")
    assert [part.shape for part in document.case.vessel.parts] == ["cone", "upright_cylinder"]
    undo_all(document)
    assert document.case == before


def test_a_pipe_and_a_weir_are_added_beside_the_opening(panel: EntryPanel, document: Document) -> None:
    add_outlet(document, 0, kind="pipe")
    add_outlet(document, 1, kind="weir")
    add_outlet(document, 2, kind="pipe")
    assert [(outlet.kind, outlet.name) for outlet in document.case.outlets[1:]] == [
        ("pipe", "line"),
        ("weir", "weir"),
        ("pipe", "line 2"),
    ]
    assert isinstance(document.case.outlets[1], Pipe)
    weir = document.case.outlets[2]
    assert isinstance(weir, Weir)
    assert (weir.crest.text, weir.role) == ("2.5 m", "overflow")
    assert document.answers is not None
    assert not document.faults
    assert [document.undo_stack.text(step) for step in range(3)] == ["Add a pipe", "Add a weir", "Add a pipe"]
