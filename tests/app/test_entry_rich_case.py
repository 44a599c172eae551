"""Walls, liquids, headspaces, levels and targets entered; names, tab order and fields that stay in a rich case."""

from __future__ import annotations

from collections.abc import Callable

import pytest
from PySide6.QtCore import Qt
from PySide6.QtTest import QTest
from PySide6.QtWidgets import QApplication, QWidget

from headfall.files import case_from_text, read_case
from headfall_app.document import Document
from headfall_app.entry.panel import EntryPanel
from headfall_app.paint.theme import theme
from headfall_app.resources import resource_path

from .driving import choose, field, line, press, type_at

OUTLET = ("outlets", 0)
Show, Wait = Callable[[QWidget], None], Callable[[Callable[[], object]], None]

RICH = """{
  "headfall": 1, "title": "Everything",
  "vessel": {"shape": "stack", "displacement": [{"from": "0.5 m", "to": "2 m", "volume": "200 L"}], "parts": [
    {"shape": "cone", "top_diameter": "2 m", "bottom_diameter": "0.4 m", "height": "1 m"},
    {"shape": "table", "column": "area", "rows": [["0 m", "3.2 m2"], ["2 m", "3.4 m2"]]},
    {"shape": "upright_cylinder", "diameter": "2 m", "height": "1 m", "wall": "6 mm"}]},
  "outlets": [
    {"kind": "pipe", "name": "line", "bore": "DN 65 hygienic", "length": "4 m", "valve": {"kv": 60, "opening": 0.8},
     "fittings": [{"name": "elbow"}, {"name": "tee branch", "count": 2}],
     "sections": [{"bore": "110 mm SDR 17", "length": "12 m", "fittings": [{"name": "elbow"}]}]},
    {"kind": "orifice", "name": "hole", "opening": {"form": "round", "diameter": "20 mm"}, "tailwater": "-1 m"},
    {"kind": "weir", "name": "pipe", "form": "standpipe", "diameter": "NPS 3 sch 40", "crest": "3.5 m"}],
  "liquid": {"name": "own", "properties": [["10 degC", "1000 kg/m3", "1.3 cP"], ["20 degC", "998 kg/m3", "1 cP"]]},
  "headspace": {"kind": "pressurised", "gauge_pressure": "2 kPa"},
  "levels": {"start": "80 %", "stop": "0.2 m"},
  "target": {"flow_at": {"level": "3 m", "flow": "5 L/s"}}
}"""


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


@pytest.fixture
def rich(panel: EntryPanel, document: Document) -> EntryPanel:
    """The panel on a case with nearly everything in it, all groups open."""
    document.begin(case_from_text(RICH))
    for box in panel.groups():
        box.heading.set_folded(False)
    # New fields can be tabbed to once they have been shown.
    QApplication.processEvents()
    return panel


def test_wall_lining_and_what_takes_space_inside(panel: EntryPanel, document: Document) -> None:
    assert not line(panel, "vessel", "wall").isVisible()
    press(panel, "Show wall and internals")
    choose(panel, ("vessel", "sizes"), "outside")
    type_at(panel, ("vessel", "wall"), "8 mm")
    type_at(panel, ("vessel", "lining"), "3 mm")
    press(panel, "Vessel: add space taken inside")
    for name, text in (("from", "0.2 m"), ("to", "1.4 m"), ("volume", "150 L")):
        type_at(panel, ("vessel", "displacement", 0, name), text)
    vessel = document.case.vessel
    assert (vessel.sizes, vessel.wall.text, vessel.lining.text) == ("outside", "8 mm", "3 mm")
    assert [part.volume.text for part in vessel.displacement] == ["150 L"]
    assert document.answers is not None
    # π/4 (2 − 2·0.008 − 2·0.003)² of the inside, 3 m high or a little less, less the body.
    assert document.answers.vessel.capacity == pytest.approx(3.14159265 / 4 * 1.978**2 * 3 - 0.15, rel=0.01)
    press(panel, "Vessel, internals 1: remove this body")
    assert document.case.vessel.displacement is None


def test_wall_and_internals_are_open_where_something_is_typed(panel: EntryPanel, document: Document) -> None:
    document.begin(case_from_text(RICH))
    QApplication.processEvents()
    assert line(panel, "vessel", "displacement", 0, "from").isVisible()


def test_sloped_floor_and_cut_cone(panel: EntryPanel, document: Document) -> None:
    choose(panel, ("vessel", "floor"), "sloped")
    type_at(panel, ("vessel", "floor", "fall"), "60 mm")
    assert document.case.vessel.floor.fall.text == "60 mm"
    choose(panel, ("vessel", "floor"), "cone")
    type_at(panel, ("vessel", "floor", "cut"), "50 mm")
    assert document.case.vessel.floor.cut.text == "50 mm"


def test_liquids_and_the_temperatures_beside(panel: EntryPanel, document: Document) -> None:
    choose(panel, ("liquid",), "glycerol")
    type_at(panel, ("liquid", "also_at"), "30 °C, 40 °C;50")
    assert [one.value for one in document.case.liquid.also_at] == pytest.approx([303.15, 313.15, 323.15])
    assert document.answers is not None
    assert len(document.answers.at_temperatures) == 3
    type_at(panel, ("liquid", "also_at"), "30 °C, x")
    assert field(panel, "liquid", "also_at").reason
    assert line(panel, "liquid", "also_at").text() == "30 °C, x"
    type_at(panel, ("liquid", "also_at"), "")
    assert document.case.liquid.also_at is None


def test_a_decimal_comma_is_no_comma_between_two(panel: EntryPanel, document: Document) -> None:
    type_at(panel, ("tables", "times"), "2,5 min, 0,5 h,1 h")
    assert [one.value for one in document.case.tables.times] == [150.0, 1800.0, 3600.0]


@pytest.mark.parametrize(
    ("kind", "entries"),
    [("open", []), ("vented", ["bore", "coefficient"]), ("closed", []), ("pressurised", ["gauge_pressure"])],
)
def test_headspaces(panel: EntryPanel, document: Document, kind: str, entries: list[str]) -> None:
    choose(panel, ("headspace",), kind)
    assert document.case.headspace.kind == kind
    box = next(box for box in panel.groups() if box.group.key == "headspace")
    assert [row.path[-1] for row in box.group.rows[1:]] == entries


def test_levels_targets_and_times(panel: EntryPanel, document: Document, wait_for: Wait) -> None:
    type_at(panel, ("levels", "site_datum"), "50 m")
    type_at(panel, ("levels", "start"), "52.5 m site")
    type_at(panel, ("levels", "overflow"), "9 m³")
    choose(panel, ("levels", "shown"), "site")
    type_at(panel, ("target", "highest_level"), "95 %")
    choose(panel, ("target", "flow_at"), "asked")
    type_at(panel, ("target", "flow_at", "level"), "2.6 m")
    type_at(panel, ("target", "flow_at", "flow"), "12 L/s")
    type_at(panel, ("tables", "times"), "5 min, 1 h")
    type_at(panel, ("tables", "level_step"), "0.5 m")
    wait_for(lambda: field(panel, "levels", "start").echo == "2.500\u00a0m")
    levels, target = document.case.levels, document.case.target
    assert (levels.start.dimension, levels.overflow.dimension, levels.shown) == ("site", "volume", "site")
    assert (target.highest_level.dimension, target.flow_at.flow.text) == ("percent", "12 L/s")
    assert not document.faults
    assert document.answers is not None
    assert [moment.time for moment in document.answers.at_times] == [300.0, 3600.0]
    type_at(panel, ("levels", "start"), "52")
    assert document.case.levels.start.text == "52 m site"


def test_every_field_has_a_name_of_its_own(rich: EntryPanel) -> None:
    names = [stop.accessibleName() for each in rich.fields() for stop in each.tab_stops()]
    assert all(names)
    assert [name for name in names if names.count(name) > 1] == []
    for wanted in ("Outlet 1, section 2, fitting 1, loss K", "Vessel, part 2, rows", "Outlet 2, level outside"):
        assert wanted in names


def test_tab_visits_every_field_in_order(rich: EntryPanel) -> None:
    stops = [stop for box in rich.groups() for stop in box.tab_stops()]
    stops[0].setFocus()
    for wanted in stops[1:]:
        QTest.keyClick(QApplication.focusWidget(), Qt.Key.Key_Tab)
        assert QApplication.focusWidget() is wanted, wanted.accessibleName()


def test_a_change_of_a_size_keeps_every_field(rich: EntryPanel) -> None:
    before = list(rich.fields())
    type_at(rich, (*OUTLET, "length"), "5 m")
    assert all(one is other for one, other in zip(before, rich.fields(), strict=True))
    press(rich, "Outlet 1: add a fitting")
    kept = [each for each in rich.fields() if each in before]
    assert kept == before
    # A heading with its word, name, loss, laminar loss and number.
    assert len(list(rich.fields())) == len(before) + 5


def test_no_label_is_cut(rich: EntryPanel) -> None:
    shown = [each for each in rich.fields() if each.row.label and each.row.kind not in ("action", "table")]
    cut = [each.row.label for each in shown if each.label_need() > each.label_room()]
    assert cut == []


def test_entries_that_contradict_are_said_while_typing(rich: EntryPanel, document: Document, wait_for: Wait) -> None:
    path = ("vessel", "displacement", 0, "to")
    type_at(rich, path, "0.4 m")
    wait_for(lambda: field(rich, *path).reason)
    assert "is not above 0.5 m" in field(rich, *path).reason
    assert document.is_stale
    type_at(rich, (*OUTLET, "fittings", 0, "name"), "")
    wait_for(lambda: field(rich, *OUTLET, "fittings", 0, "name").reason)
    document.undo_stack.undo()
    document.undo_stack.undo()
    wait_for(lambda: not field(rich, *path).reason)
    assert not document.faults
