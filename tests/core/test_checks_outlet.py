"""Checks of the outlets: dip, size against the surface, nominal size, heel."""

from __future__ import annotations

from collections.abc import Callable
from itertools import pairwise
from typing import Any

import numpy as np
import pytest
from scipy.integrate import quad

from headfall.checks import (
    Finding,
    Grade,
    check_dip,
    check_heel,
    check_large_outlet,
    check_nominal_size,
    dip_level,
    is_made_of_pipe,
)
from headfall.checks.large_outlet import time_excess
from headfall.checks.nominal_size import nominal_size
from headfall.quantities import display_units
from headfall.resources import read_resource

METRIC = display_units("metric")
G = 9.80665


def plain(text: str) -> str:
    """The text with ordinary spaces."""
    return text.replace("\u00a0", " ").replace("\u202f", " ").replace("\u2009", " ")


def orifice(strength: float, elevation: float = 0.0) -> Callable[[Any], Any]:
    """Flow of an opening whose C_d·a·√(2g) is ``strength``."""
    return lambda level: strength * np.sqrt(np.maximum(level - elevation, 0.0))


STRENGTH_80 = 0.61 * np.pi / 4 * 0.08**2 * np.sqrt(2 * G)


@pytest.mark.parametrize("elevation", [0.0, 0.4])
def test_the_dip_level_solves_its_own_equation(elevation: float) -> None:
    level = dip_level(orifice(STRENGTH_80, elevation), facing="down", elevation=elevation, top=2.0, gravity=G)
    # H = k·(c²·H/g)^0.2 solved by hand for H.
    assert level - elevation == pytest.approx((0.69 * (STRENGTH_80**2 / G) ** 0.2) ** 1.25, abs=2e-6)


def test_the_dip_at_three_metres_a_second_is_eight_centimetres() -> None:
    # 80 mm, 3 m/s: 0.08 m, worked by hand from h = 0.69·(Q²/g)^0.2; Lubin and Springer (1967), factor from memory.
    flow = np.pi / 4 * 0.08**2 * 3.0
    level = dip_level(lambda level: np.full_like(level, flow), facing="down", elevation=0.0, top=2.0, gravity=G)
    assert level == pytest.approx(0.0816, abs=5e-5)


def test_a_dip_that_reaches_beyond_the_top_is_the_top() -> None:
    assert dip_level(lambda level: np.full_like(level, 50.0), facing="side", elevation=0.1, top=2.0, gravity=G) == 2.0


def dip(lowest: float, facing: str = "down") -> Finding:
    """The dip finding of the 80 mm outlet."""
    level = dip_level(orifice(STRENGTH_80), facing=facing, elevation=0.0, top=2.0, gravity=G)
    (finding,) = check_dip(outlet="the outlet", level=level, lowest=lowest, tolerance=2e-9, display=METRIC)
    return finding


def test_a_run_below_the_dip_is_not_defended() -> None:
    finding = dip(0.0)
    assert finding.grade is Grade.STOP
    assert finding.limit == pytest.approx((0.69 * (STRENGTH_80**2 / G) ** 0.2) ** 1.25, abs=2e-6)
    assert finding.value == 0.0
    below = f"Below {finding.limit:.3f} m"
    assert plain(finding.text) == f"{below} air may be drawn into the outlet; the run's lowest level is 0.000 m."
    assert "do not rely on the run below" in finding.advice


def test_a_run_above_the_dip_raises_no_caution_and_a_side_opening_dips_deeper() -> None:
    assert dip(0.1).grade is Grade.NO_CAUTION
    down, side = dip(0.0).limit, dip(0.0, "side").limit
    assert down is not None and side is not None
    assert side > down


def test_an_upper_outlet_that_runs_dry_over_a_lower_one_is_an_attention() -> None:
    facts: dict[str, Any] = {"outlet": "side draw", "level": 1.02, "tolerance": 2e-9, "display": METRIC}
    (passed,) = check_dip(**facts, lowest=0.1, runs_dry=True)
    assert passed.grade is Grade.ATTENTION
    assert plain(passed.text) == "From 1.020 m down until side draw runs dry, air may be drawn into it."
    (wet,) = check_dip(**facts, lowest=0.92)
    assert wet.grade is Grade.STOP


def test_a_run_that_ends_at_the_dip_is_defended() -> None:
    facts: dict[str, Any] = {"outlet": "the outlet", "level": 0.1, "tolerance": 2e-9, "display": METRIC}
    assert check_dip(**facts, lowest=0.1 - 1e-9)[0].grade is Grade.NO_CAUTION
    assert check_dip(**facts, lowest=0.1 - 1e-8)[0].grade is Grade.STOP


def large(contracted: float, surface: Any, time: Any, level: Any | None = None) -> Finding:
    """The finding for a run whose curve has these surfaces."""
    surface, time = np.array(surface, dtype=float), np.array(time, dtype=float)
    levels = np.linspace(1.0, 0.1, surface.size) if level is None else np.array(level, dtype=float)
    (finding,) = check_large_outlet(
        contracted_area=contracted, surface=surface, level=levels, time=time, display=METRIC, place="outlets[0].opening"
    )
    return finding


@pytest.mark.parametrize(
    ("ratio", "grade"),
    [(0.19, Grade.NO_CAUTION), (0.21, Grade.ATTENTION), (0.49, Grade.ATTENTION), (0.51, Grade.STOP)],
)
def test_grades_of_a_large_outlet(ratio: float, grade: Grade) -> None:
    finding = large(ratio * 2.0, [2.0, 2.0, 2.0], [0.0, 1.0, 2.0])
    assert finding.grade is grade
    assert finding.value == pytest.approx(ratio)


def test_the_share_of_the_time_is_told() -> None:
    assert "about 2 % too long" in plain(large(0.3, [1.0, 1.0], [0.0, 10.0]).advice)
    assert "more than 5 %" in plain(large(0.7, [1.0, 1.0], [0.0, 10.0]).advice)


def test_a_vessel_that_narrows_to_nothing_at_the_end_is_an_attention_below_its_level() -> None:
    finding = large(0.01, [1.0, 0.1, 0.03, 0.0], [0.0, 900.0, 999.0, 1000.0], [1.0, 0.2, 0.05, 0.0])
    assert finding.grade is Grade.ATTENTION
    assert finding.value == 1.0
    assert "below 0.050 m" in plain(finding.text)
    slow = large(0.01, [1.0, 0.1, 0.015, 0.0], [0.0, 500.0, 900.0, 1000.0], [1.0, 0.2, 0.05, 0.0])
    assert slow.grade is Grade.STOP


def test_a_vessel_that_narrows_at_its_top_says_above() -> None:
    finding = large(0.01, [0.03, 1.0, 1.0], [0.0, 1.0, 1000.0], [2.0, 1.5, 0.5])
    assert "above 2.000 m" in plain(finding.text)


def test_a_run_that_takes_no_time_is_still_compared() -> None:
    assert large(0.3, [1.0], [0.0]).grade is Grade.ATTENTION


@pytest.mark.parametrize("ratio", [0.05, 0.1, 0.2, 0.3, 0.5])
def test_the_excess_is_that_of_a_cylinder_started_from_rest(ratio: float) -> None:
    # dV/dt = g − V²·(1/m² − 1)/(2h) as an equation for V² over h has the solution V² = c·h·(1 − h^(n−1)) with
    # n = 1/m² − 1 and c = 2g/(n − 1), for a start from rest at h = 1; own derivation.
    n = 1.0 / ratio**2 - 1.0
    c = 2.0 * G / (n - 1.0)

    def slowness(root: float) -> float:
        return float(2.0 * root / np.sqrt(c * (1.0 - root**2) * -np.expm1((n - 1.0) * np.log1p(-(root**2)))))

    ends = [1e-9, 0.05, 0.2, 0.5, float(np.sqrt(0.99))]
    true = sum(quad(slowness, a, b)[0] for a, b in pairwise(ends))
    plain_law = 2.0 * 0.9 / (ratio * np.sqrt(2.0 * G))
    assert float(time_excess(np.array(ratio))) == pytest.approx(plain_law / true - 1.0, abs=5e-4)


def nominal(**changes: Any) -> Finding:
    """The finding for an 80 mm tube, with some facts changed."""
    facts: dict[str, Any] = {
        "outlet": "the outlet",
        "made_of_pipe": True,
        "diameter": 0.08,
        "display": METRIC,
        "place": "outlets[0].opening.diameter",
    }
    (finding,) = check_nominal_size(**{**facts, **changes})
    assert finding.rule == "C28"
    return finding


@pytest.mark.parametrize(
    ("entry", "grade"), [("sharp_edged", Grade.NOTE), ("short_tube", Grade.ATTENTION), ("bellmouth", Grade.ATTENTION)]
)
def test_a_nominal_size_is_an_attention_where_pipe_is_used(entry: str, grade: Grade) -> None:
    finding = nominal(made_of_pipe=is_made_of_pipe(entry))
    assert finding.grade is grade
    assert plain(finding.text) == "80 mm is also a nominal size: a DN 80 pipe is 77.9 mm inside in schedule 40."


def test_a_bore_typed_by_its_listed_name_never_raises_a_caution() -> None:
    # DN 100 of another list may well be 100.0 mm inside.
    by_name = nominal(outlet="dump line", diameter=0.1, listed="DN 100 SDR 11")
    assert by_name.grade is Grade.NO_CAUTION
    assert plain(by_name.text) == (
        "DN 100 SDR 11 is typed for dump line, 100 mm inside; no caution is raised by this check."
    )
    by_figure = nominal(outlet="dump line", diameter=0.1)
    assert by_figure.grade is Grade.ATTENTION
    assert plain(by_figure.text) == "100 mm is also a nominal size: a DN 100 pipe is 102 mm inside in schedule 40."
    assert by_figure.advice.startswith("Enter the measured inside diameter of dump line")


def test_the_article_fits_the_name() -> None:
    finding = nominal(diameter=0.0635, display=display_units("us"))
    assert (
        plain(finding.text) == "2 1/2 in is also a nominal size: an NPS 2 1/2 pipe is 2.468 in inside in schedule 40."
    )


def test_nominal_sizes_in_inches_and_sizes_that_are_none() -> None:
    inches = nominal_size(0.0381)
    assert inches is not None
    assert (plain(inches.figure), plain(inches.name)) == ("1 1/2 in", "NPS 1 1/2")
    assert nominal_size(0.081) is None
    assert nominal_size(0.0779) is None
    for diameter in (None, 0.081):
        assert nominal(diameter=diameter).grade is Grade.NO_CAUTION


def test_the_pipe_table_rises_and_its_bores_are_near_their_names() -> None:
    rows = read_resource("nominal_pipe.json")["sizes"]
    assert [row["outside"] for row in rows] == sorted(row["outside"] for row in rows)
    for row in rows:
        assert row["outside"] - 2 * row["wall_40"] == pytest.approx(row["dn"], rel=0.1)


def heel(**changes: Any) -> Finding:
    """The heel finding of a side opening, with some facts changed."""
    facts: dict[str, Any] = {"level": 0.225, "volume": 0.5, "capacity": 6.0, "form": "side", "start": 1.7, "stop": 0.1}
    (finding,) = check_heel(**{**facts, **changes}, display=METRIC, place="outlets[0].elevation")
    return finding


def test_what_stays_below_the_lowest_outlet_is_an_attention() -> None:
    finding = heel()
    assert finding.grade is Grade.ATTENTION
    assert plain(finding.text) == "0.500 m³ stays below the outlet's lower edge, 0.225 m."
    assert "another way" in finding.advice
    assert "stays below the outlet's plane," in heel(form="down").text
    assert "stays below the pipe's inlet," in heel(form="pipe").text
    assert "stays below the pipe's discharging end," in heel(form="rising_pipe").text
    assert "stays below the crest," in heel(form="weir").text


def test_a_stop_above_the_heel_makes_it_a_note_and_no_heel_raises_no_caution() -> None:
    assert heel(stop=0.3).grade is Grade.NOTE
    assert heel(volume=0.0, level=0.0).grade is Grade.NO_CAUTION


def test_a_film_in_the_tip_of_a_cone_is_no_heel() -> None:
    assert heel(volume=5.9e-5).grade is Grade.NO_CAUTION
    assert heel(volume=6.1e-5).grade is Grade.ATTENTION
