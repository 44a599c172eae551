"""The painters: whatever case they are given they paint, and what must be seen is there."""

from __future__ import annotations

from typing import Any

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st
from PySide6.QtCore import QRectF
from PySide6.QtGui import QColor, QImage, QPainter
from PySide6.QtWidgets import QApplication

from headfall.case.faults import CaseError
from headfall.quantities import display_units
from headfall.study import solve
from headfall_app.paint.kept import Kept
from headfall_app.paint.layout import arrange
from headfall_app.paint.paper import paint_curve, paint_flow, paint_sketch
from headfall_app.paint.scene import Scene, scene_of
from headfall_app.paint.stage_picture import Attention, paint_stage
from headfall_app.paint.theme import Theme, theme

from .test_paint_layout import CASES, SIDE, case_of, scene

WIDE, TALL = 1056, 602


def picture(shown: Scene, colours: Theme, width: int = WIDE, height: int = TALL) -> QImage:
    """Return the stage painted."""
    image = QImage(width, height, QImage.Format.Format_RGB32)
    image.fill(colours.colour("surface"))
    painter = QPainter(image)
    paint_stage(painter, arrange(width, height, shown), shown, colours, Attention("start", "cursor"))
    painter.end()
    return image


def pixels(image: QImage) -> np.ndarray:
    """Return the picture's pixels as 0xRRGGBB, shape (rows, columns)."""
    buffer = np.frombuffer(image.constBits(), dtype=np.uint32).reshape(image.height(), image.width())
    return buffer & 0xFFFFFF


def colour_of(colour: QColor) -> int:
    """Return a colour as 0xRRGGBB."""
    return int(colour.rgb()) & 0xFFFFFF


@pytest.mark.parametrize("name", CASES)
@pytest.mark.parametrize("colours", ["light", "dark"])
def test_liquid_stands_up_to_the_surface_and_no_higher(application: QApplication, name: str, colours: str) -> None:
    shown, used = scene(name), theme(colours)
    frame = arrange(WIDE, TALL, shown)
    seen = pixels(picture(shown, used))[:, : round(frame.across.right)]
    # The stream that flows in is liquid too; it is far narrower than the surface.
    rows = np.nonzero((seen == colour_of(used.colour("liquid"))).sum(axis=1) > 40)[0]
    assert abs(rows.min() - frame.row(shown.surface)) <= 6
    assert rows.max() <= frame.bottom + 1


@pytest.mark.parametrize("name", CASES)
def test_a_level_line_is_on_one_row_in_section_and_plot(application: QApplication, name: str) -> None:
    shown, used = scene(name), theme("light")
    frame = arrange(WIDE, TALL, shown)
    start = next(mark for mark in shown.marks if mark.key == "start")
    seen = pixels(picture(shown, used)) == colour_of(used.colour("ink"))
    row = frame.row(start.level)
    assert frame.plot is not None
    left, right = round(frame.lines_left) + 2, round(frame.plot[2]) - 40
    assert seen[row, left : left + 8].all()
    assert seen[row, right : right + 30].all()


def test_greyed_answers_show_neither_accent_nor_limit(application: QApplication) -> None:
    shown, used = scene("drum"), theme("light")
    seen = set(np.unique(pixels(picture(shown, used.greyed))).tolist())
    assert colour_of(used.colour("accent")) not in seen
    assert colour_of(used.colour("limit")) not in seen
    assert colour_of(used.colour("stale")) in seen


def test_a_lit_dimension_is_drawn_in_accent(application: QApplication) -> None:
    case = CASES["box"]
    answers = solve(case)
    plain, lit = (
        scene_of(answers, display_units("metric"), now=60.0, lit=path) for path in (None, ("vessel", "height"))
    )
    accent = colour_of(theme("light").colour("accent"))
    counts = [int((pixels(picture(one, theme("light"))) == accent).sum()) for one in (plain, lit)]
    assert counts[1] > counts[0] + 100
    assert [size.text for size in lit.sizes if size.lit] == ["1.4 m"]


def test_a_time_to_overflow_stands_in_the_limit_colour(application: QApplication) -> None:
    case = case_of(
        {"shape": "box", "length": "2 m", "width": "2 m", "height": "2 m"},
        {"start": "1 m", "stop": "0.5 m", "overflow": "1.8 m"},
        inflow={"kind": "steady", "rate": "40 L/s"},
    )
    shown = scene_of(solve(case), display_units("metric"), now=10.0)
    assert shown.arrival is not None and shown.arrival.overflows
    assert shown.arrival.text.startswith("over in ")


def test_a_run_that_never_ends_says_how_far_from_the_stop_it_settles() -> None:
    shown = scene("drum")
    assert shown.arrival is None
    assert shown.remark.startswith("settles 0.") and shown.remark.endswith("above the stop level")


@pytest.mark.parametrize("name", CASES)
def test_paper_shows_the_whole_vessel_at_one_scale(application: QApplication, name: str) -> None:
    shown, paper = scene(name, None), theme("paper")
    image = QImage(860, 700, QImage.Format.Format_RGB32)
    image.fill(paper.colour("surface"))
    painter = QPainter(image)
    scale = paint_sketch(painter, QRectF(0, 0, 860, 260), shown, paper)
    assert paint_sketch(painter, QRectF(0, 0, 860, 260), shown, paper, 0.5 * scale) == 0.5 * scale
    paint_curve(painter, QRectF(0, 280, 860, 220), shown, paper)
    paint_flow(painter, QRectF(0, 520, 860, 150), shown, paper)
    painter.end()
    assert scale > 5.0
    seen = pixels(image)
    assert (seen == colour_of(paper.colour("liquid"))).any()
    assert not any(mark.key == "now" for mark in shown.marks)


@pytest.mark.parametrize("ratio", [1.0, 2.0])
@pytest.mark.parametrize("name", CASES)
def test_what_is_kept_looks_as_if_it_were_painted_anew(application: QApplication, name: str, ratio: float) -> None:
    shown, used, kept = scene(name), theme("dark"), Kept()

    def painted(shown: Scene, keeps: Kept | None) -> np.ndarray:
        image = QImage(round(WIDE * ratio), round(TALL * ratio), QImage.Format.Format_RGB32)
        image.setDevicePixelRatio(ratio)
        image.fill(used.colour("surface"))
        painter = QPainter(image)
        paint_stage(painter, arrange(WIDE, TALL, shown), shown, used, Attention(), keeps)
        painter.end()
        return image_bytes(image)

    other = scene("box" if name != "box" else "cone")
    for each in (shown, shown, other, shown):
        difference = np.abs(painted(each, kept) - painted(each, None))
        assert difference.max() <= 40
        assert (difference > 4).mean() < 1e-4


def image_bytes(image: QImage) -> np.ndarray:
    """Return the picture's colours, shape (rows, columns, 4)."""
    buffer = np.frombuffer(image.constBits(), dtype=np.uint8)
    return buffer.reshape(image.height(), image.width(), 4)[:, :, :3].astype(int)


LENGTHS = st.floats(0.3, 12.0)
SHARES = st.floats(0.0, 1.0)


@st.composite
def contents(draw: st.DrawFn) -> dict[str, Any]:
    """Draw a vessel with levels, outlets and an inflow."""
    across, along, tall = draw(LENGTHS), draw(LENGTHS), draw(LENGTHS)
    vessel: dict[str, Any] = draw(
        st.sampled_from(
            [
                {"shape": "upright_cylinder", "diameter": f"{across:.3f} m", "height": f"{tall:.3f} m"},
                {"shape": "box", "length": f"{along:.3f} m", "width": f"{across:.3f} m", "height": f"{tall:.3f} m"},
                {
                    "shape": "cone",
                    "top_diameter": f"{across:.3f} m",
                    "bottom_diameter": "0 m",
                    "height": f"{tall:.3f} m",
                },
                {
                    "shape": "cone",
                    "top_diameter": "0.1 m",
                    "bottom_diameter": f"{across:.3f} m",
                    "height": f"{tall:.3f} m",
                },
                {"shape": "drum", "diameter": f"{tall:.3f} m", "length": f"{along:.3f} m"},
                {"shape": "sphere", "diameter": f"{tall:.3f} m"},
            ]
        )
    )
    tall = float(f"{tall:.3f}")
    opening = {"form": "round", "diameter": f"{draw(st.floats(0.02, 0.2)) * min(tall, across):.4f} m"}
    outlets: list[dict[str, Any]] = [{"name": "drain", "kind": "orifice", "opening": opening}]
    if draw(st.booleans()):
        outlets.append(SIDE | {"opening": opening, "elevation": f"{0.4 * tall:.4f} m"})
    return {
        "vessel": vessel,
        "levels": {"start": f"{draw(SHARES) * tall:.4f} m", "stop": f"{draw(SHARES) * tall:.4f} m"},
        "outlets": outlets,
        "inflow": {"kind": "steady", "rate": f"{draw(st.sampled_from([0.0, 0.5, 10.0, 200.0]))} L/s"},
        "units": draw(st.sampled_from(["metric", "us"])),
    }


@settings(max_examples=40)
@given(contents(), SHARES, st.sampled_from([(1056, 602), (900, 330), (2216, 1150)]))
def test_every_case_that_is_answered_is_painted(
    application: QApplication, content: dict[str, Any], share: float, size: tuple[int, int]
) -> None:
    try:
        answers = solve(case_of(content.pop("vessel"), content.pop("levels"), **content))
    except CaseError:
        return
    end = float(answers.curve.time[-1])
    shown = scene_of(answers, display_units(content["units"]), now=share * end)
    image = picture(shown, theme("light"), *size)
    assert len(np.unique(pixels(image))) > 10
