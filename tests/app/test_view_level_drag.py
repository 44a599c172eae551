"""A level dragged in the form it was typed in: height, feet and inches, percent, volume, site height."""

from __future__ import annotations

import json
from typing import Any

import pytest
from PySide6.QtWidgets import QApplication

from headfall.files import case_from_text
from headfall_app.document import Document
from headfall_app.view.level_drag import LevelDrag

TANK: dict[str, Any] = {
    "headfall": 1,
    "vessel": {"shape": "upright_cylinder", "diameter": "2 m", "height": "4 m"},
    "outlets": [{"kind": "orifice", "entry": "sharp_edged", "opening": {"form": "round", "diameter": "80 mm"}}],
    "levels": {"stop": "0.1 m", "site_datum": "50 m"},
}


def drag_of(start: str) -> tuple[Document, LevelDrag]:
    data = TANK | {"levels": TANK["levels"] | {"start": start}}
    document = Document(case_from_text(json.dumps(data)))
    return document, LevelDrag(document, "start")


@pytest.mark.parametrize(
    ("typed", "written"),
    [("2 m", "1 m"), ("50 %", "25 %"), ("6 m3", "3.1416 m3"), ("52 m site", "51 m site"), ("2000 mm", "1000 mm")],
)
def test_a_level_keeps_the_form_it_was_typed_in(application: QApplication, typed: str, written: str) -> None:
    document, drag = drag_of(typed)
    drag.move(1.0, 0.01)
    assert document.case.levels.start.text.replace(".00", "").replace(".000", "") == written
    assert document.answers is not None
    assert document.answers.system.start == pytest.approx(1.0, abs=1e-4)


@pytest.mark.parametrize("typed", ["2 m", "50 %", "6 m3", "52 m site", "6 ft 6 in"])
def test_a_nudge_moves_by_a_small_step_and_escape_puts_it_back(application: QApplication, typed: str) -> None:
    document, drag = drag_of(typed)
    assert document.answers is not None
    before = document.answers.system.start
    drag.nudge(1)
    assert 2e-4 < document.answers.system.start - before < 4e-3
    drag.give_up()
    assert document.case.levels.start.text == typed


@pytest.mark.parametrize("typed", ["50 %", "52 m site"])
def test_no_level_is_dragged_out_of_the_vessel(application: QApplication, typed: str) -> None:
    document, drag = drag_of(typed)
    drag.move(9.0, 0.01)
    assert document.answers is not None
    assert document.answers.system.start == pytest.approx(4.0)
    drag.move(-3.0, 0.01)
    assert document.answers.system.start == pytest.approx(0.0, abs=1e-9)
