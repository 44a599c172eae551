"""Whatever is typed is painted and stays on the page and on the sheet."""

from __future__ import annotations

from typing import Any

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st
from PySide6.QtCore import QRectF
from PySide6.QtGui import QImage, QPainter
from PySide6.QtWidgets import QApplication

from headfall.case.faults import CaseError
from headfall.quantities import display_units
from headfall.study import solve
from headfall_app.paint.jets import jet_places, outlet_boxes
from headfall_app.paint.kept import Kept
from headfall_app.paint.layout import arrange
from headfall_app.paint.paper import paint_sketch, sketch_height, sketch_scale
from headfall_app.paint.scene import scene_of
from headfall_app.paint.stage_picture import Attention, paint_stage
from headfall_app.paint.theme import theme

from .new_kinds import (
    CASES,
    DRUM,
    HOLE,
    NOTCH,
    PIPE,
    STANDPIPE,
    TANK,
    shown,
)
from .test_paint_layout import case_of
from .test_paint_pictures import colour_of, image_bytes, picture, pixels

# Paper ----------------------------------------------------------------------------------------------------------------


@pytest.mark.parametrize("name", CASES)
def test_on_paper_all_that_is_drawn_has_room_in_the_sketch(application: QApplication, name: str) -> None:
    answers = solve(CASES[name])
    scene, paper = scene_of(answers, display_units("metric")), theme("paper")
    image = QImage(900, 460, QImage.Format.Format_RGB32)
    image.fill(paper.colour("surface"))
    painter = QPainter(image)
    scale = paint_sketch(painter, QRectF(20, 20, 860, 400), scene, paper)
    painter.end()
    assert scale == pytest.approx(sketch_scale(860, 400, scene))
    assert sketch_height(scene, scale) <= 400.5
    seen = pixels(image) != colour_of(paper.colour("surface"))
    rows, columns = np.nonzero(seen)
    assert rows.min() >= 12 and rows.max() <= 422
    assert columns.min() >= 16 and columns.max() <= 884


# Whatever is typed ----------------------------------------------------------------------------------------------------


VESSELS = (
    TANK,
    DRUM,
    {"shape": "box", "length": "6 m", "width": "2 m", "height": "2 m", "floor": {"form": "sloped", "fall": "0.2 m"}},
    {"shape": "basin", "base_length": "8 m", "base_width": "5 m", "side_slope": 1.5, "depth": "2 m"},
    {"shape": "sphere", "diameter": "3 m"},
    {"shape": "table", "column": "area", "rows": [["0 m", "20 m2"], ["0.5 m", "60 m2"], ["2 m", "200 m2"]]},
    {
        "shape": "stack",
        "parts": [
            {"shape": "cone", "top_diameter": "2 m", "bottom_diameter": "0.2 m", "height": "1 m"},
            {"shape": "upright_cylinder", "diameter": "2 m", "height": "1.5 m"},
        ],
    },
)
RECEIVERS = ({"shape": "sphere", "diameter": "3 m"}, DRUM, TANK, VESSELS[3])


@st.composite
def contents(draw: st.DrawFn) -> dict[str, Any]:
    """Draw a vessel with outlets of every kind, water outside, a headspace and levels in several forms."""
    heights = st.floats(-6.0, 1.5).map(lambda value: f"{value:.3f} m")
    inside = st.floats(0.0, 1.6).map(lambda value: f"{value:.3f} m")
    outlets = []
    for _ in range(draw(st.integers(1, 3))):
        outlet = dict(draw(st.sampled_from([PIPE, HOLE, HOLE | {"facing": "side"}, NOTCH, STANDPIPE])))
        outlet |= {"crest": draw(inside)} if outlet["kind"] == "weir" else {"elevation": draw(inside)}
        if outlet["kind"] == "pipe" or outlet.get("form") == "standpipe":
            outlet["discharge_elevation"] = draw(heights)
        if draw(st.booleans()):
            outlet["tailwater"] = draw(heights)
        outlets.append(outlet)
    if len(outlets) == 1 and draw(st.booleans()):
        foot = draw(st.floats(-8.0, 0.5))
        vessel = draw(st.sampled_from(RECEIVERS))
        outlets[0]["tailwater"] = {"vessel": vessel, "elevation": f"{foot:.2f} m", "level": f"{foot + 0.3:.2f} m"}
    gas = st.sampled_from([{"kind": "open"}, {"kind": "closed"}, {"kind": "vented", "bore": "30 mm"}])
    levels = {"start": draw(st.sampled_from(["90 %", "1.8 m"])), "stop": draw(st.sampled_from(["10 %", "0.2 m"]))}
    return {"vessel": draw(st.sampled_from(VESSELS)), "levels": levels, "outlets": outlets, "headspace": draw(gas)}


@settings(max_examples=60)
@given(contents(), st.floats(0.0, 1.0), st.sampled_from([(1056, 602), (900, 330), (1576, 760)]))
def test_every_case_that_is_answered_is_painted_and_stays_on_the_page(
    application: QApplication, content: dict[str, Any], share: float, size: tuple[int, int]
) -> None:
    try:
        answers = solve(case_of(content.pop("vessel"), content.pop("levels"), **content))
    except CaseError:
        return
    scene = scene_of(answers, display_units("metric"), now=share * float(answers.curve.time[-1]))
    frame = arrange(*size, scene)
    assert len(np.unique(pixels(picture(scene, theme("dark"), *size)))) > 10
    for box in outlet_boxes(frame, scene, jet_places(frame, scene)):
        assert box.right() <= frame.staff_left
        assert box.bottom() <= frame.bottom + frame.under + 20.0


@pytest.mark.parametrize("name", CASES)
def test_what_is_kept_of_the_new_kinds_looks_as_if_it_were_painted_anew(application: QApplication, name: str) -> None:
    used, kept = theme("dark"), Kept()
    images = []
    for keeps in (kept, kept, None):
        image = QImage(1056, 602, QImage.Format.Format_RGB32)
        image.fill(used.colour("surface"))
        painter = QPainter(image)
        scene = shown(name)
        paint_stage(painter, arrange(1056, 602, scene), scene, used, Attention(), keeps)
        painter.end()
        images.append(image_bytes(image))
    for image in images[:2]:
        difference = np.abs(image - images[2])
        assert difference.max() <= 60
        assert (difference > 4).mean() < 1e-4
