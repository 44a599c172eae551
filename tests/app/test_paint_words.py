"""Words in the picture of the newer kinds: on nothing else, and saying what the answers say."""

from __future__ import annotations

from collections.abc import Sequence
from itertools import combinations, pairwise
from typing import Any

import numpy as np
import pytest
from PySide6.QtCore import QPointF, QRectF
from PySide6.QtGui import QImage, QPainter
from PySide6.QtWidgets import QApplication

from headfall.quantities import display_units
from headfall.study import solve
from headfall_app.paint import lettering
from headfall_app.paint.curve import remark_box
from headfall_app.paint.dimensions import dimension_obstacles
from headfall_app.paint.drop_line import drop_line
from headfall_app.paint.flags import placed_flags
from headfall_app.paint.jets import jet_places, outlet_boxes, paint_jets
from headfall_app.paint.layout import FLAG, arrange
from headfall_app.paint.loose import placed_words
from headfall_app.paint.scene import scene_of
from headfall_app.paint.theme import theme

from .new_kinds import (
    CASES,
    HOLE,
    PIPE,
    PIPED,
    SIZES,
    shown,
    tank,
)
from .test_paint_pictures import colour_of, picture, pixels

# Nothing on top of anything else --------------------------------------------------------------------------------------


def overlaps(boxes: Sequence[QRectF], others: Sequence[QRectF]) -> list[tuple[QRectF, QRectF]]:
    return [(one, other) for one in boxes for other in others if one.intersects(other)]


@pytest.mark.parametrize("name", CASES)
@pytest.mark.parametrize("size", SIZES[:3])
def test_the_words_of_the_outlets_meet_nothing(
    application: QApplication, monkeypatch: pytest.MonkeyPatch, name: str, size: tuple[int, int]
) -> None:
    scene = shown(name)
    frame = arrange(*size, scene)
    said = {text for one in scene.outlets for text in (one.size_text, one.more_text, one.flow_text) if text}
    written: list[QRectF] = []
    write = lettering.write

    def keep(painter: QPainter, at: QPointF, text: str, *rest: Any, **options: Any) -> QRectF:
        box = write(painter, at, text, *rest, **options)
        if text in said:
            written.append(box)
        return box

    monkeypatch.setattr(lettering, "write", keep)
    image = QImage(*size, QImage.Format.Format_RGB32)
    painter = QPainter(image)
    paint_jets(painter, frame, scene, theme("light"))
    painter.end()
    assert len(written) >= len(scene.outlets)
    assert overlaps(written, outlet_boxes(frame, scene, jet_places(frame, scene))) == []
    assert overlaps(written, dimension_obstacles(frame, scene)) == []
    assert not any(one.intersects(other) for one, other in combinations(written, 2))
    assert all(box.right() < frame.staff_left and box.left() > 0.0 for box in written)
    assert all(box.bottom() < min(frame.bottom + frame.under + 72.0, size[1]) for box in written)


@pytest.mark.parametrize("name", [name for name in PIPED if name != "several"])
@pytest.mark.parametrize("size", SIZES[:3])
def test_a_drop_has_a_dimension_from_inlet_to_discharge(name: str, size: tuple[int, int]) -> None:
    scene = shown(name)
    frame = arrange(*size, scene)
    for outlet in scene.outlets:
        if outlet.facing != "pipe":
            continue
        placed = drop_line(frame, scene, outlet, dimension_obstacles(frame, scene))
        assert placed is not None and outlet.discharge is not None
        rows = sorted(-end for end in placed[0].ends)
        assert rows == pytest.approx(sorted((frame.y(outlet.elevation), frame.y(outlet.discharge))))
        assert placed[0].text == display_units("metric").text(abs(outlet.elevation - outlet.discharge), "length")


# The curve ------------------------------------------------------------------------------------------------------------


DOUBTFUL = {
    "thin": tank(
        HOLE, levels={"stop": "0.1 m"}, liquid={"name": "oil", "density": "950 kg/m^3", "viscosity": "300 mPa*s"}
    ),
    "side": tank(
        HOLE | {"facing": "side", "elevation": "0.2 m"},
        levels={"stop": "0.2 m"},
        headspace={"kind": "pressurised", "gauge_pressure": "0.3 bar"},
    ),
    "standpipe": CASES["standpipe that runs down"],
}


@pytest.mark.parametrize("name", DOUBTFUL)
def test_the_dashed_spans_cover_the_doubtful_levels_and_no_others(name: str) -> None:
    answers = solve(DOUBTFUL[name])
    scene = scene_of(answers, display_units("metric"), now=0.0)
    assert answers.doubtful and scene.loose
    for level in np.linspace(0.0, 3.0, 3001):
        doubtful = any(part.low <= level <= part.high for part in answers.doubtful)
        assert doubtful == any(part.low <= level <= part.high for part in scene.loose)
    for before, after in pairwise(scene.loose):
        assert before.high < after.low


@pytest.mark.parametrize("name", DOUBTFUL)
@pytest.mark.parametrize("size", SIZES)
def test_the_names_of_doubtful_parts_meet_neither_one_another_nor_the_remark(name: str, size: tuple[int, int]) -> None:
    answers = solve(DOUBTFUL[name])
    scene = scene_of(answers, display_units("metric"), now=0.4 * float(answers.curve.time[-1]))
    frame = arrange(*size, scene)
    boxes = [box for _, box, _ in placed_words(frame, scene)]
    remark = remark_box(frame, scene, boxes)
    assert not any(one.intersects(other) for one, other in combinations([*boxes, remark], 2))
    assert frame.plot is not None
    assert all(frame.plot[0] < box.left() and box.right() < size[0] for box in boxes)


@pytest.mark.parametrize("size", SIZES)
def test_a_run_that_surges_ends_in_a_wave_and_says_so(application: QApplication, size: tuple[int, int]) -> None:
    line = PIPE | {"elevation": "0.6 m", "discharge_elevation": "-2 m"}
    answers = solve(tank(line, levels={"stop": "0.1 m"}, inflow={"kind": "steady", "rate": "8 L/s"}))
    assert answers.curve.ends == "surging"
    scene = scene_of(answers, display_units("metric"), now=60.0)
    assert scene.remark == "surges about the inlet"
    frame = arrange(*size, scene)
    boxes = [box for _, box, _ in placed_words(frame, scene)]
    assert not any(remark_box(frame, scene, boxes).intersects(box) for box in boxes)
    x, row = round(frame.time_x(float(answers.curve.time[-1]))), frame.row(float(answers.curve.level[-1]))
    seen = pixels(picture(scene, theme("light"), *size)) == colour_of(theme("light").colour("accent"))
    above, below = seen[row - 5 : row - 2, x - 17 : x + 17], seen[row + 3 : row + 6, x - 17 : x + 17]
    assert above.any() and below.any()


# Flags ----------------------------------------------------------------------------------------------------------------


def test_a_level_typed_in_another_form_is_told_in_both(application: QApplication) -> None:
    scene = shown("drum with a fall")
    told = {mark.key: (mark.text, mark.second) for mark in scene.marks}
    assert told["start"][1] == "80 %" and told["start"][0].startswith("1.")
    assert told["stop"] == ("0.103", "")
    frame = arrange(1056, 602, scene)
    assert frame.flag > FLAG or all(not mark.second for mark in scene.marks)
    assert all(flag.box.width() == frame.flag for flag in placed_flags(frame, scene))
    assert frame.plot is not None and frame.flags_right < frame.plot[0]


@pytest.mark.parametrize("form", ["percent", "volume", "site"])
def test_a_level_shown_in_another_form_is_told_as_a_height_too(form: str) -> None:
    case = tank(HOLE, levels={"shown": form, "site_datum": "50 m"})
    scene = scene_of(solve(case), display_units("metric"), now=0.0)
    seconds = {mark.key: mark.second for mark in scene.marks}
    assert seconds["start"] == "2.500\u00a0m" and seconds["now"] == "2.500\u00a0m"
