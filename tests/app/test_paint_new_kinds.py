"""Pipes, weirs, water outside and receiving vessels: where they stand on the one level axis."""

from __future__ import annotations

from dataclasses import replace
from itertools import pairwise

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st
from PySide6.QtCore import QPointF
from PySide6.QtWidgets import QApplication

from headfall.discharge import Receiver
from headfall.quantities import display_units
from headfall.study import solve
from headfall_app.paint.jets import jet_places, outlet_boxes
from headfall_app.paint.layout import arrange
from headfall_app.paint.level_axis import BREAK_HEIGHT, drawn_depth, left_out
from headfall_app.paint.outside_levels import outside_levels
from headfall_app.paint.pipe_run import Run, link_run, mouth, pipe_run, pit_box, receiver_box
from headfall_app.paint.scene import scene_of
from headfall_app.paint.staff import staff_numbers
from headfall_app.paint.theme import theme
from headfall_app.paint.waterways import is_drowned, valve_place

from .new_kinds import (
    CASES,
    HOLE,
    LEVELS,
    PIPED,
    RECEIVED,
    SIZES,
    TANK,
    pipes,
    shown,
)
from .test_paint_layout import case_of
from .test_paint_pictures import colour_of, picture, pixels

# The level axis -------------------------------------------------------------------------------------------------------


@pytest.mark.parametrize("name", PIPED)
@pytest.mark.parametrize("size", SIZES)
def test_a_pipe_ends_at_the_row_of_its_discharge_level(name: str, size: tuple[int, int]) -> None:
    scene = shown(name)
    frame = arrange(*size, scene)
    for outlet in scene.outlets:
        if outlet.facing == "pipe":
            run = pipe_run(frame, scene, outlet)
            assert outlet.discharge is not None
            assert run.end[1] == pytest.approx(frame.y(outlet.discharge))
            assert run.corners[0][1] == pytest.approx(frame.y(outlet.elevation), abs=1.0)


@pytest.mark.parametrize("name", CASES)
@pytest.mark.parametrize("size", SIZES)
def test_all_that_is_outside_stands_on_the_page_left_of_the_staff(name: str, size: tuple[int, int]) -> None:
    scene = shown(name)
    frame = arrange(*size, scene)
    assert max(frame.needed, frame.bottom + frame.under) <= size[1] + 1
    for box in outlet_boxes(frame, scene, jet_places(frame, scene)):
        assert box.right() <= frame.staff_left
        assert box.bottom() <= frame.bottom + frame.under


def test_levels_below_the_vessel_keep_the_scale_of_the_section() -> None:
    scene = shown("pipe that falls")
    frame = arrange(1056, 602, scene)
    assert frame.left_out is None
    assert frame.y(-1.1) - frame.y(0.0) == pytest.approx(1.1 * frame.pixels_per_metre)
    assert any(level == pytest.approx(-0.5) and text == "−0.5" for level, text in staff_numbers(frame, scene))


def test_a_long_drop_is_cut_where_nothing_stands_and_its_dimension_stays_true() -> None:
    scene = shown("long drop")
    frame = arrange(1056, 602, scene)
    assert frame.left_out is not None
    low, high = frame.left_out
    assert -24.0 < low < high < 0.0
    assert frame.y(low) - frame.y(high) == pytest.approx(BREAK_HEIGHT, abs=1e-6)
    assert frame.y(-25.0) - frame.y(-24.0) == pytest.approx(frame.pixels_per_metre)
    assert frame.y(-25.0) < 602.0
    assert scene.outlets[0].fall_text == "25.0\u00a0m"
    assert all(not low <= level <= high for level, _ in staff_numbers(frame, scene))


@given(st.floats(0.05, 60.0), st.floats(0.0, 1.0))
def test_what_is_drawn_below_the_vessel_is_never_much_deeper_than_the_vessel_is_tall(drop: float, share: float) -> None:
    scene = PLAIN
    outlet = replace(scene.outlets[0], discharge=-drop, tail=-drop * share)
    scene = replace(scene, outlets=(outlet,), lowest=-drop)
    depth, gap = drawn_depth(scene)
    out = left_out(scene)
    assert depth <= max(1.2 * scene.height, 0.8 * drop) + 1e-9
    assert (gap > 0.0) == (out is not None)
    if out is not None:
        assert not any(out[0] - 1e-9 <= level <= out[1] + 1e-9 for level in (0.0, -drop, -drop * share))


PLAIN = shown("pipe that falls")


def test_a_level_outside_is_told_at_the_staff_and_no_number_stands_on_it() -> None:
    scene = shown("pipe under water")
    frame = arrange(1056, 602, scene)
    told = {one.text for one in outside_levels(frame, scene)}
    assert told == {"−1.400", "−2.000"}
    rows = [frame.row(one.level) for one in outside_levels(frame, scene)]
    assert all(abs(frame.row(level) - row) >= 13 for level, _ in staff_numbers(frame, scene) for row in rows)


# Receiving vessels and the water outside ------------------------------------------------------------------------------


@pytest.mark.parametrize("name", RECEIVED)
@pytest.mark.parametrize("share", [0.0, 0.3, 1.0])
def test_the_receiving_vessel_stands_at_its_levels_and_holds_what_has_left(name: str, share: float) -> None:
    answers = solve(CASES[name])
    tail = answers.system.discharge.tailwaters[0]
    assert isinstance(tail, Receiver)
    scene = scene_of(answers, display_units("metric"), now=share * float(answers.curve.time[-1]))
    assert scene.receiver is not None
    source, below = answers.system.profile, tail.profile
    left = float(source.volume(np.array(answers.system.start)) - source.volume(np.array(scene.surface)))
    held = float(below.volume(np.array(scene.receiver.level - scene.receiver.elevation)))
    assert held - tail.first_volume == pytest.approx(left, abs=1e-6)
    frame = arrange(1056, 602, scene)
    box = receiver_box(frame, scene)
    assert box.bottom() == pytest.approx(frame.y(scene.receiver.elevation))
    assert box.height() == pytest.approx(below.height * frame.pixels_per_metre)
    assert frame.across.right + 20.0 < box.left() and box.right() < frame.staff_left - 40.0


@pytest.mark.parametrize("name", RECEIVED)
def test_the_receiving_vessels_surface_is_painted_at_its_levels_row(application: QApplication, name: str) -> None:
    scene, used = shown(name), theme("light")
    frame = arrange(1056, 602, scene)
    assert scene.receiver is not None
    box = receiver_box(frame, scene)
    seen = pixels(picture(scene, used))[:, round(box.center().x()) + 12]
    row = frame.row(scene.receiver.level)
    assert (seen[row - 1 : row + 1] == colour_of(used.colour("accent"))).any()
    assert seen[row + 4] == colour_of(used.colour("liquid"))
    assert seen[row - 4] == colour_of(used.colour("surface"))


@pytest.mark.parametrize("name", RECEIVED)
@pytest.mark.parametrize("size", SIZES)
def test_what_leaves_is_led_to_the_receiving_vessel(name: str, size: tuple[int, int]) -> None:
    scene = shown(name)
    frame = arrange(*size, scene)
    run = link_run(frame, scene) or pipes(frame, scene)[0]
    box = receiver_box(frame, scene)
    assert run.end[0] == pytest.approx(box.left(), abs=4.0)
    assert box.top() <= run.end[1] <= box.bottom()


def test_a_pipe_that_ends_under_water_is_drowned_and_one_above_it_is_not() -> None:
    scene = shown("pipe under water")
    frame = arrange(1056, 602, scene)
    outlet = scene.outlets[0]
    box = pit_box(frame, scene, outlet)
    assert box.top() == pytest.approx(frame.y(-1.4))
    assert box.contains(QPointF(*pipe_run(frame, scene, outlet).end))
    assert is_drowned(frame, pipe_run(frame, scene, outlet), outlet)
    dry = replace(outlet, tail=-2.5)
    assert not is_drowned(frame, pipe_run(frame, scene, dry), dry)


def test_an_outlet_in_a_bank_comes_into_the_open_past_the_bank() -> None:
    vessel = {"shape": "basin", "base_length": "8 m", "base_width": "5 m", "side_slope": 1.5, "depth": "1.4 m"}
    outlet = HOLE | {"facing": "side", "elevation": "0.2 m"}
    case = case_of(vessel, {"start": "1.2 m", "stop": "0.5 m"}, outlets=[outlet])
    scene = scene_of(solve(case), display_units("metric"), now=60.0)
    frame = arrange(1056, 602, scene)
    (wall, _), open_at = mouth(frame, scene, scene.outlets[0])
    assert wall < frame.across.right - 14.0 < frame.across.right < open_at
    tall = shown("side under water")
    (wall, _), open_at = mouth(arrange(1056, 602, tall), tall, tall.outlets[0])
    assert wall == open_at


# Pipes ----------------------------------------------------------------------------------------------------------------


def test_a_reducer_steps_from_one_bore_to_the_next_in_a_straight_stretch() -> None:
    scene = shown("pipe of two bores")
    frame = arrange(1576, 760, scene)
    run = pipe_run(frame, scene, scene.outlets[0])
    (wide, first), (narrow, second) = run.parts
    assert first == pytest.approx(0.150 * frame.pixels_per_metre)
    assert second == pytest.approx(0.080 * frame.pixels_per_metre)
    assert wide[-1] == pytest.approx(narrow[0])
    assert all(np.hypot(narrow[0][0] - x, narrow[0][1] - y) > 0.5 * first for x, y in run.corners)


@given(st.lists(st.floats(5.0, 30.0), min_size=1, max_size=5), st.floats(60.0, 400.0), st.floats(40.0, 200.0))
def test_the_sections_of_a_pipe_take_its_whole_way(bores: list[float], down: float, along: float) -> None:
    run = Run(((0.0, 0.0), (0.0, down), (along, down)), tuple(bores))
    parts = run.parts
    assert parts[0][0][0] == (0.0, 0.0) and parts[-1][0][-1] == pytest.approx((along, down))
    long = sum(np.hypot(*np.subtract(end, start)) for corners, _ in parts for start, end in pairwise(corners))
    assert long == pytest.approx(down + along, rel=0.05)


def test_a_valve_keeps_off_the_dimension_lines_and_below_the_floor() -> None:
    scene = shown("pipe that falls")
    for size in SIZES[:3]:
        frame = arrange(*size, scene)
        (_, row), lies = valve_place(frame, pipe_run(frame, scene, scene.outlets[0]))
        assert row > frame.bottom
        assert lies or all(abs(row - line) > 12.0 for line in frame.dimension_rows)


def test_pipes_at_one_place_stand_beside_one_another_and_are_named() -> None:
    scene = shown("several")
    frame = arrange(1056, 602, scene)
    legs = sorted(run.corners[0][0] for run in pipes(frame, scene))
    assert legs[1] - legs[0] > 30.0
    assert [outlet.size_text.split(":")[0] for outlet in scene.outlets[:2]] == ["north", "south"]


def test_a_listed_bore_is_told_as_typed_and_as_measured() -> None:
    outlet = shown("drum with a fall").outlets[0]
    assert outlet.size_text == "NPS 4 sch 40"
    assert outlet.more_text == "8 m, 102.26 mm"


# Weirs and lids -------------------------------------------------------------------------------------------------------


def test_a_notch_opens_the_wall_from_its_crest_up(application: QApplication) -> None:
    scene, used = shown("notch"), theme("light")
    frame = arrange(1056, 602, scene)
    seen = pixels(picture(scene, used))
    columns = slice(round(frame.across.right), round(frame.across.right) + 2)
    wall = colour_of(used.colour("wall"))
    above, below = (frame.row(level) for level in (2.0 + 0.5, 2.0 - 0.7))
    assert not (seen[above - 3 : above + 3, columns] == wall).any()
    assert (seen[below, columns] == wall).all()


def test_a_standpipe_has_its_rim_at_the_crest_and_goes_through_the_floor() -> None:
    for name in ("standpipe", "standpipe that runs down"):
        scene = shown(name)
        frame = arrange(1056, 602, scene)
        outlet = next(one for one in scene.outlets if one.facing == "standpipe")
        run = pipe_run(frame, scene, outlet)
        assert run.corners[0][1] == pytest.approx(frame.y(outlet.elevation))
        assert run.end[1] > frame.bottom
        assert frame.across.left < run.end[0] < frame.across.right


def test_the_pressure_of_a_closed_gas_is_that_of_the_cursors_time() -> None:
    answers = solve(CASES["closed"])
    assert answers.headspace is not None
    for index in (0, len(answers.curve.time) // 2, -1):
        scene = scene_of(answers, display_units("metric"), now=float(answers.curve.time[index]))
        assert scene.lid is not None and scene.lid.vent == ""
        pressure = display_units("metric").text(float(answers.headspace.pressure[index]), "pressure")
        assert scene.lid.text == f"{pressure} gauge"
    vented = shown("drum with a fall").lid
    assert vented is not None and vented.vent == "vent 80 mm"
    assert shown("standpipe").lid is None


def test_a_drum_with_a_fall_has_a_tilted_axis() -> None:
    scene = shown("drum with a fall")
    assert scene.has_axis
    assert scene.tilt == pytest.approx(0.15 / np.sqrt(5.6**2 - 0.15**2))
    assert shown("closed").tilt == 0.0


def test_what_takes_space_inside_says_how_much(application: QApplication) -> None:
    body = {"from": "0.5 m", "to": "1.5 m", "volume": "0.4 m3"}
    case = case_of(TANK | {"displacement": [body]}, LEVELS)
    scene = scene_of(solve(case), display_units("metric"), now=0.0)
    assert [one.text for one in scene.bodies] == ["takes 0.400\u00a0m³"]
    frame = arrange(1056, 602, scene)
    left = round(frame.across.left) + 4
    seen = pixels(picture(scene, theme("light")))[:, left : left + 60]
    liquid = colour_of(theme("light").colour("liquid"))
    hatched, plain = (seen[frame.row(high) + 4 : frame.row(low) - 4] for low, high in ((0.6, 1.4), (1.6, 2.3)))
    assert 0.05 < (hatched != liquid).mean() < 0.4
    assert (plain == liquid).all()
