"""The geometry of the picture: one level scale, nothing on top of anything else, nothing outside."""

from __future__ import annotations

import json
from itertools import pairwise
from typing import Any

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st
from PySide6.QtCore import QRectF
from PySide6.QtGui import QImage, QPainter
from PySide6.QtWidgets import QApplication

from headfall.case.model import Case
from headfall.files import case_from_text
from headfall.quantities import display_units
from headfall.study import solve
from headfall_app.paint import labels, lettering
from headfall_app.paint.curve import curve_points, remark_box
from headfall_app.paint.cut import Across, shown_stretches
from headfall_app.paint.flags import GAP, TALL, placed_flags, spread
from headfall_app.paint.flow import word_boxes
from headfall_app.paint.jets import jet_places, paint_jets
from headfall_app.paint.layout import arrange
from headfall_app.paint.loose import placed_words
from headfall_app.paint.scene import Scene, scene_of
from headfall_app.paint.section import wall_shape
from headfall_app.paint.staff import numbers_left, staff_numbers
from headfall_app.paint.theme import theme
from headfall_app.paint.ticks import block_step, mark_text, marks, nice_step, number_step, time_axis

SIZES = ((1056, 602), (944, 430), (1576, 760), (896, 400), (2216, 1150))


def case_of(vessel: dict[str, Any], levels: dict[str, str], **more: Any) -> Case:
    """Return a case with one outlet of 60 mm in the floor unless others are given."""
    outlet = {"kind": "orifice", "opening": {"form": "round", "diameter": "60 mm"}}
    content = {"headfall": 1, "vessel": vessel, "outlets": [outlet], "levels": levels, "headspace": {"kind": "open"}}
    return case_from_text(json.dumps(content | more))


SIDE = {"name": "draw-off", "kind": "orifice", "facing": "side", "elevation": "0.4 m"}
CASES = {
    "tank": case_of(
        {"shape": "upright_cylinder", "diameter": "1.6 m", "height": "4.8 m"},
        {"start": "4.2 m", "stop": "0.5 m"},
        outlets=[SIDE | {"opening": {"form": "round", "diameter": "50 mm"}}],
        inflow={"kind": "steady", "rate": "60 L/min"},
    ),
    "drum": case_of(
        {"shape": "drum", "diameter": "2 m", "length": "9 m", "heads": {"form": "ellipsoidal"}},
        {"start": "1.8 m", "stop": "0.1 m", "overflow": "1.95 m"},
        inflow={"kind": "steady", "rate": "8 L/s"},
    ),
    "box": case_of(
        {"shape": "box", "length": "14 m", "width": "5 m", "height": "1.4 m"}, {"start": "1.2 m", "stop": "0.2 m"}
    ),
    "cone": case_of(
        {"shape": "cone", "top_diameter": "3 m", "bottom_diameter": "0.4 m", "height": "2.5 m"},
        {"start": "2.2 m", "stop": "0 m"},
    ),
    "sphere": case_of({"shape": "sphere", "diameter": "12 ft"}, {"start": "10 ft", "stop": "1 ft"}, units="us"),
}


def scene(name: str, now: float | None = 60.0) -> Scene:
    """Return the scene of one of the cases."""
    case = CASES[name]
    return scene_of(solve(case), display_units(case.units or "metric"), now=now)


@pytest.mark.parametrize("name", CASES)
@pytest.mark.parametrize("size", SIZES)
def test_section_staff_and_plot_share_one_level_scale(name: str, size: tuple[int, int]) -> None:
    shown = scene(name)
    frame = arrange(*size, shown)
    wall = wall_shape(frame, shown)
    rows = np.array([wall.at(index).y() for index in range(wall.size())])
    assert rows.max() == pytest.approx(frame.y(0.0))
    assert rows.min() == pytest.approx(frame.y(shown.height))
    _, curve = curve_points(frame, shown.curve)
    assert curve - 0.5 == pytest.approx(frame.bottom - shown.curve.level * frame.pixels_per_metre)
    assert frame.plot is not None
    assert frame.plot[3] - frame.plot[1] == pytest.approx(shown.height * frame.pixels_per_metre)
    for flag in placed_flags(frame, shown):
        assert frame.row(flag.mark.level) == round(frame.y(flag.mark.level))


@pytest.mark.parametrize("name", CASES)
@pytest.mark.parametrize("size", SIZES)
def test_nothing_stands_outside_and_columns_do_not_overlap(name: str, size: tuple[int, int]) -> None:
    shown = scene(name)
    frame = arrange(*size, shown)
    assert frame.across.left >= 20.0
    assert frame.across.right + shown.farthest_reach * frame.pixels_per_metre <= frame.staff_left
    assert frame.plot is not None and frame.flags_right < frame.plot[0] < frame.plot[2] <= size[0]
    assert frame.plot[2] - frame.plot[0] >= 200.0
    assert max(frame.needed, frame.bottom + frame.under) <= size[1] + 1
    assert frame.top >= 50.0


@pytest.mark.parametrize("name", CASES)
def test_a_shape_is_never_stretched(name: str) -> None:
    shown = scene(name)
    frame = arrange(1056, 602, shown)
    for start, end in frame.across.stretches:
        drawn = frame.across.x(end) - frame.across.x(start)
        assert drawn == pytest.approx((end - start) * frame.pixels_per_metre)


@pytest.mark.parametrize("name", CASES)
def test_flags_do_not_overlap_and_stay_on_the_page(name: str) -> None:
    shown = scene(name)
    frame = arrange(944, 430, shown)
    boxes = [flag.box for flag in placed_flags(frame, shown)]
    for upper, lower in pairwise(boxes):
        assert lower.top() - upper.bottom() >= GAP - 1.0
    assert all(box.top() >= 0.0 and box.bottom() <= 430.0 for box in boxes)


@given(st.lists(st.floats(0.0, 400.0), min_size=1, max_size=8))
def test_flags_are_pushed_apart_no_further_than_needed(wanted: list[float]) -> None:
    pitch = TALL + GAP
    placed = spread(sorted(wanted), pitch, -200.0, 600.0)
    assert all(after - before >= pitch - 1e-6 for before, after in pairwise(placed))
    assert sum(placed) == pytest.approx(sum(wanted), abs=1e-6)
    if all(after - before >= pitch for before, after in pairwise(sorted(wanted))):
        assert placed == pytest.approx(sorted(wanted))


def test_a_number_of_the_staff_is_left_out_where_a_level_line_strikes_it() -> None:
    shown = scene("drum")
    frame = arrange(1056, 602, shown)
    lines = [frame.row(mark.level) for mark in shown.marks if mark.key != "now"]
    for level, _ in staff_numbers(frame, shown):
        assert min(abs(frame.row(level) - line) for line in lines) >= 8


def test_a_long_drum_is_drawn_cut_and_can_be_shown_whole() -> None:
    shown = scene("drum")
    cut, whole = arrange(1056, 602, shown), arrange(1056, 602, shown, "whole")
    assert cut.can_be_cut and cut.across.breaks and cut.across.left_out > 1.0
    assert not whole.across.breaks and whole.can_be_cut
    assert cut.pixels_per_metre > 2.0 * whole.pixels_per_metre


def test_a_large_window_shows_the_drum_whole() -> None:
    assert not arrange(3200, 1400, scene("drum")).across.breaks


@given(st.floats(4.0, 30.0), st.lists(st.floats(0.0, 30.0), max_size=4), st.floats(1.0, 12.0))
def test_what_is_kept_of_a_cut_vessel_holds_both_ends_and_every_outlet(
    length: float, places: list[float], shown: float
) -> None:
    places = [place for place in places if place <= length]
    kept = shown_stretches((-0.5, length + 0.5), (0.0, length), places, shown, 0.3)
    assert kept[0][0] == -0.5 and kept[-1][1] == length + 0.5
    assert all(any(start <= place <= end for start, end in kept) for place in places)
    assert all(before[1] < after[0] for before, after in pairwise(kept))
    if len(kept) > 1:
        assert sum(end - start for start, end in kept) == pytest.approx(shown)


def test_places_across_keep_their_order_over_a_break() -> None:
    across = Across(((0.0, 1.0), (3.0, 4.0)), 100.0, 50.0)
    assert across.x(1.0) == 150.0
    assert across.x(3.0) > 150.0
    assert across.x(4.0) - across.x(3.0) == pytest.approx(50.0)
    assert across.left_out == pytest.approx(2.0)


@pytest.mark.parametrize("size", SIZES)
def test_words_in_the_plot_keep_clear_of_one_another_and_of_the_curve(size: tuple[int, int]) -> None:
    outlets = [
        {"name": "drain", "kind": "orifice", "opening": {"form": "round", "diameter": "200 mm"}},
        SIDE | {"elevation": "1.2 m", "opening": {"form": "rectangle", "width": "60 mm", "height": "40 mm"}},
    ]
    case = case_of(
        {"shape": "upright_cylinder", "diameter": "2.4 m", "height": "3.6 m"},
        {"start": "3.2 m", "stop": "0.02 m"},
        outlets=outlets,
        inflow={"kind": "steady", "rate": "22 L/s"},
    )
    shown = scene_of(solve(case), display_units("metric"), now=60.0)
    frame = arrange(*size, shown)
    placed = placed_words(frame, shown)
    assert placed and all(clear for _, _, clear in placed)
    taken = [box for _, box, _ in placed]
    remark = remark_box(frame, shown, taken)
    assert not remark.isNull()
    for box in taken:
        assert not remark.intersects(box)
    for x, y in zip(*curve_points(frame, shown.curve), strict=True):
        assert not any(box.contains(x, y) for box in (remark, *taken))
    assert placed[0][0].text.startswith("not to be relied on ")


def test_several_outlets_at_one_place_stand_beside_one_another(application: QApplication) -> None:
    outlets = [
        {"name": name, "kind": "orifice", "opening": {"form": "round", "diameter": "40 mm"}}
        for name in ("north", "middle", "south")
    ]
    case = case_of(
        {"shape": "upright_cylinder", "diameter": "2.4 m", "height": "3 m"},
        {"start": "2.8 m", "stop": "0.1 m"},
        outlets=outlets,
    )
    shown = scene_of(solve(case), display_units("metric"), now=60.0)
    frame = arrange(1056, 602, shown)
    places = sorted(jet_places(frame, shown).values())
    assert min(after - before for before, after in pairwise(places)) > 20.0
    assert frame.across.left < places[0] and places[-1] < frame.across.right
    image = QImage(1056, 602, QImage.Format.Format_RGB32)
    painter = QPainter(image)
    boxes = [box for _, box in paint_jets(painter, frame, shown, theme("light"))]
    painter.end()
    assert not any(a.intersects(b) for i, a in enumerate(boxes) for b in boxes[i + 1 :])


def side_tank(diameter: str, elevation: str, units: str = "us") -> Scene:
    """Return an upright tank with a hole in its side."""
    outlet = SIDE | {"elevation": elevation, "opening": {"form": "round", "diameter": "3 in"}}
    vessel = {"shape": "upright_cylinder", "diameter": diameter, "height": "12 ft"}
    case = case_of(vessel, {"start": "11 ft", "stop": "1 ft"}, outlets=[outlet], units=units)
    return scene_of(solve(case), display_units(units), now=60.0)


@pytest.mark.parametrize("size", [(944, 430), (928, 420), (700, 300), (1056, 602)])
@pytest.mark.parametrize("elevation", ["1.5 in", "2 in", "6 in", "3 ft", "9 ft", "11 ft"])
@pytest.mark.parametrize("diameter", ["2 ft", "10 ft", "60 ft"])
def test_the_words_of_a_side_outlet_stay_left_of_the_staffs_numbers(
    application: QApplication, monkeypatch: pytest.MonkeyPatch, size: tuple[int, int], elevation: str, diameter: str
) -> None:
    shown = side_tank(diameter, elevation)
    frame = arrange(*size, shown)
    written = []

    def write(*arguments: Any, **options: Any) -> QRectF:
        _, at, text, _, *more = arguments
        align = options.get("align", more[2] if len(more) > 2 else lettering.LEFT)
        written.append((text, lettering.text_box(at, text, 12, 400, align)))
        return written[-1][1]

    monkeypatch.setattr(labels.lettering, "write", write)
    image = QImage(*size, QImage.Format.Format_RGB32)
    painter = QPainter(image)
    paint_jets(painter, frame, shown, theme("light"))
    painter.end()
    assert "Ø 3 in" in [text for text, _ in written]
    assert all(box.right() < numbers_left(frame, shown) for _, box in written)
    assert all(box.right() < frame.staff_left for _, box in written)


@pytest.mark.parametrize("name", ["tank", "drum", "cone"])
@pytest.mark.parametrize("share", [0.0, 0.01, 0.03, 0.06, 0.5, 0.97, 1.0])
def test_the_time_cursor_does_not_strike_the_words_of_the_flow_plot(name: str, share: float) -> None:
    answers = solve(CASES[name])
    shown = scene_of(answers, display_units("metric"), now=share * float(answers.curve.time[-1]))
    frame = arrange(1056, 602, shown)
    assert frame.flow is not None
    boxes = word_boxes(frame, shown)
    assert ("in" in boxes) == (shown.inflow > 0.0) and "out" in boxes
    cursor = frame.time_x(shown.now or 0.0)
    for box in boxes.values():
        assert not box.left() - 2.0 < cursor < box.right() + 2.0
        assert frame.flow[0] < box.left() and box.right() < frame.flow[2]
    assert len(boxes) < 2 or not boxes["in"].intersects(boxes["out"])


def test_the_words_of_the_flow_plot_go_to_the_right_while_the_cursor_is_at_the_left() -> None:
    answers = solve(CASES["cone"])
    late = scene_of(answers, display_units("metric"), now=0.8 * float(answers.curve.time[-1]))
    frame = arrange(1056, 602, late)
    assert frame.flow is not None
    early = scene_of(answers, display_units("metric"), now=frame.time(frame.flow[0] + 14.0))
    middle = 0.5 * (frame.flow[0] + frame.flow[2])
    assert word_boxes(frame, late)["out"].right() < middle < word_boxes(frame, early)["out"].left()


@given(st.floats(1e-6, 1e6))
def test_a_nice_step_is_one_two_or_five_and_not_below_what_is_asked(least: float) -> None:
    step = nice_step(least)
    assert least * (1.0 - 1e-6) <= step <= 2.6 * least
    assert f"{step:.0e}"[0] in "125"


@given(st.floats(0.5, 5000.0))
def test_blocks_and_numbers_of_the_staff_keep_their_least_distance(pixels: float) -> None:
    assert block_step(pixels) * pixels >= 9.0 * (1.0 - 1e-9)
    assert number_step(pixels) * pixels >= 30.0 * (1.0 - 1e-9)


@given(st.floats(0.0, 1e8), st.floats(120.0, 1500.0))
def test_a_time_axis_holds_the_run_with_marks_that_can_be_read(longest: float, width: float) -> None:
    axis = time_axis(longest, width)
    assert axis.end >= longest
    assert axis.end <= max(longest * 1.1, 60.0)
    assert axis.step * axis.unit / axis.end * width >= 50.0
    assert (axis.marks[0] == 0.0 and len(axis.marks) >= 2) or width < 200.0


def test_numbers_of_an_axis_show_the_decimals_of_their_step() -> None:
    assert [mark_text(value, 0.5) for value in marks(0.0, 1.0, 0.5)] == ["0.0", "0.5", "1.0"]
    assert mark_text(20.0, 10.0) == "20"
    assert mark_text(-5.0, 5.0) == "−5"
