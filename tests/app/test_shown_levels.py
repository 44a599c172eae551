"""Flags that show levels as the case wants them; the tables beside the page."""

from __future__ import annotations

import json
from collections.abc import Callable

import pytest
from PySide6.QtWidgets import QApplication, QTableView, QWidget

from headfall.files import case_from_text
from headfall.quantities import display_units
from headfall.study import solve
from headfall_app.document import Document
from headfall_app.paint.scene import scene_of
from headfall_app.questions import Questions
from headfall_app.tables_content import STAGES, TIMES
from headfall_app.tables_window import TablesWindow

TANK = {
    "headfall": 1,
    "vessel": {"shape": "upright_cylinder", "diameter": "2 m", "height": "4 m"},
    "outlets": [{"kind": "orifice", "entry": "sharp_edged", "opening": {"form": "round", "diameter": "80 mm"}}],
    "levels": {"start": "3 m", "stop": "1 m", "site_datum": "50 m"},
    "tables": {"times": ["1 min", "2 min"], "level_step": "0.5 m"},
}


@pytest.mark.parametrize(
    ("shown", "start", "stop"),
    [("height", "3.000", "1.000"), ("percent", "75.0 %", "25.0 %"), ("volume", "9.42 m³", "3.14 m³"),
     ("site", "53.000", "51.000")],
)  # fmt: skip
def test_flags_show_levels_as_asked(application: QApplication, shown: str, start: str, stop: str) -> None:
    data = TANK | {"levels": TANK["levels"] | {"shown": shown}}
    marks = scene_of(solve(case_from_text(json.dumps(data))), display_units("metric")).marks
    texts = {mark.key: mark.text.replace("\u00a0", " ") for mark in marks}
    assert (texts["start"], texts["stop"]) == (start, stop)


def test_the_tables_stand_in_a_window_of_their_own(show: Callable[[QWidget], None]) -> None:
    document = Document(case_from_text(json.dumps(TANK)))
    tables = TablesWindow(document, Questions(), "")
    show(tables)
    tables.show_table(STAGES)
    view = tables.findChild(QTableView)
    assert view is not None
    assert view.model().rowCount() >= 5
    assert tables.table.key == STAGES
    tables.show_table(TIMES)
    assert view.model().rowCount() == 2
    shown = [view.model().index(row, 0).data().replace("\u00a0", " ") for row in range(2)]
    assert shown == ["1 min 00 s", "2 min 00 s"]
