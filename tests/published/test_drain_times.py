"""Drain times against closed forms, and against printed answers of textbook examples.

The closed forms follow from A(h)·dh/dt = Q_in − C_d·a·√(2gh), integrated by hand; their values were computed with 30
digits by mpmath, apart from this program. The textbook answers were read in an open collection of worked examples
(FOSSEE Python Textbook Companions) that reprints the answers of the books named beside each check.
"""

from __future__ import annotations

import pytest

from tests.published.conftest import Solver, own, round_hole

SURVEY_GRAVITY = {"gravity": "9.81 m/s^2"}
FOOT_GRAVITY = {"gravity": "32.2 ft/s^2"}


def cylinder(diameter: str, height: str, **floor: object) -> dict[str, object]:
    return {"shape": "upright_cylinder", "diameter": diameter, "height": height, **floor}


def cone(top: str, bottom: str, height: str) -> dict[str, object]:
    return {"shape": "cone", "top_diameter": top, "bottom_diameter": bottom, "height": height}


def drum(diameter: str, length: str) -> dict[str, object]:
    return {"shape": "drum", "diameter": diameter, "length": length}


CLOSED_FORMS = {
    # t = 2A(√h1 − √h2)/(C_d·a·√(2g))
    "upright cylinder": (cylinder("2 m", "3 m"), ("50 mm", 0.61), "3 m", "0.5 m", 1214.07343453781028),
    # t = (2/5)·π·(R/H)²·h^2.5/(C_d·a·√(2g))
    "cone, point down": (cone("2 m", "0 m", "2 m"), ("40 mm", 0.62), "2 m", "0 m", 515.0483173888044),
    # t = π/k·[2·r0²·√h + (4/3)·r0·m·h^1.5 + (2/5)·m²·h^2.5]
    "frustum": (cone("2 m", "0.6 m", "2 m"), ("50 mm", 0.6), "2 m", "0.2 m", 502.0759496766718),
    # t = (16·√2/15)·π·R^2.5/(C_d·a·√(2g))
    "sphere": ({"shape": "sphere", "diameter": "3 m"}, ("60 mm", 0.61), "3 m", "0 m", 1709.716838685462),
    # t = (14/15)·π·R^2.5/(C_d·a·√(2g))
    "hemispherical bowl": (
        cylinder("3 m", "1 mm", floor={"form": "hemispherical"}),
        ("50 mm", 0.6),
        "1.5 m",
        "0 m",
        1548.667986665989,
    ),
    # t = 4L/(3k)·[(2R − h2)^1.5 − (2R − h1)^1.5]
    "drum, full": (drum("2 m", "5 m"), ("50 mm", 0.62), "2 m", "0 m", 3497.492720793242),
    "drum, partly": (drum("2 m", "5 m"), ("50 mm", 0.62), "1.6 m", "0.3 m", 2428.024359434807),
}


@pytest.mark.parametrize("name", CLOSED_FORMS)
def test_closed_form(name: str, answers_to: Solver) -> None:
    vessel, (diameter, coefficient), start, stop, seconds = CLOSED_FORMS[name]
    answers = answers_to(vessel, round_hole(diameter, coefficient), start, stop)
    assert answers.draw_down.time.typical == pytest.approx(seconds, rel=1e-11)


PRISM = {"shape": "box", "length": "5 m", "width": "2 m", "height": "4 m"}


def test_inflow_level_falling_towards_equilibrium(answers_to: Solver) -> None:
    # t = (2A/k²)·[k(√h1 − √h2) + Q·ln((k√h1 − Q)/(k√h2 − Q))], h_e = (Q/k)²
    inflow = {"kind": "steady", "rate": "5 L/s"}
    answers = answers_to(PRISM, round_hole("60 mm", 0.61), "3 m", "1 m", inflow=inflow)
    assert answers.draw_down.time.typical == pytest.approx(3866.673639638586, rel=1e-11)
    assert answers.equilibrium.level.typical == pytest.approx(0.4284941559509005, rel=1e-12)


def test_inflow_level_rising_towards_equilibrium(answers_to: Solver) -> None:
    inflow = {"kind": "steady", "rate": "12 L/s"}
    answers = answers_to(PRISM, round_hole("60 mm", 0.61), "0.5 m", "2 m", inflow=inflow)
    assert answers.draw_down.time.typical == pytest.approx(5167.971770431954, rel=1e-11)
    assert answers.equilibrium.level.typical == pytest.approx(2.468126338277187, rel=1e-12)


def test_schaschke_hemispherical_vessel(answers_to: Solver) -> None:
    # C. Schaschke, Fluid Mechanics: Worked Examples for Engineers, ex. 6.4, p. 149: 2285 s (there 4/3 taken as 1.333).
    vessel = cylinder("4 m", "1 mm", floor={"form": "hemispherical"})
    answers = answers_to(vessel, round_hole("50 mm", 0.6), "1.5 m", "0 m", surroundings=SURVEY_GRAVITY)
    assert answers.draw_down.time.typical == pytest.approx(2285.0, rel=4e-4)


@pytest.mark.parametrize(("stop", "seconds"), [("2 m", 39.6), ("0 m", 107.7)])
def test_choudhary_prakash_large_orifice(stop: str, seconds: float, answers_to: Solver) -> None:
    # A. K. Choudhary and Om Prakash, Fluid Mechanics, ex. 6.16, p. 198; printed to 0.1 s.
    vessel = cylinder("4 m", "5 m")
    answers = answers_to(vessel, round_hole("0.5 m", 0.6), "5 m", stop, surroundings=SURVEY_GRAVITY)
    assert answers.draw_down.time.typical == pytest.approx(seconds, abs=0.06)


@pytest.mark.parametrize(("stop", "seconds", "within"), [("2.5 m", 1577, 1.0), ("0 m", 5384.733625, 0.01)])
def test_choudhary_prakash_half_head(stop: str, seconds: float, within: float, answers_to: Solver) -> None:
    # The same, ex. 6.18 and 6.19, p. 200: 26 min 17 s, and 1 h 29 min 44.733625 s. A 10 cm² hole, here a square one.
    vessel = {"shape": "box", "length": "3.2 m", "width": "1 m", "height": "5 m"}
    opening = {"form": "rectangle", "width": "50 mm", "height": "20 mm"}
    hole = {"opening": opening, "coefficient": own(0.6)}
    answers = answers_to(vessel, hole, "5 m", stop, surroundings=SURVEY_GRAVITY)
    assert answers.draw_down.time.typical == pytest.approx(seconds, abs=within)


def test_sarkar_horizontal_boiler(answers_to: Solver) -> None:
    # B. K. Sarkar, Fluid Mechanics and Hydraulic Machines, ex. 4.9, p. 89: 18.1 min.
    answers = answers_to(drum("2 m", "8 m"), round_hole("100 mm", 0.8), "2 m", "0 m", surroundings=SURVEY_GRAVITY)
    assert (answers.draw_down.time.typical or 0) / 60 == pytest.approx(18.1, abs=0.06)


def test_lal_frustum(answers_to: Solver) -> None:
    # J. Lal, Hydraulics, ex. 3.7, p. 84: 9 square inches, 10 ft down to 2 ft in 5.14 min. A 3 in square hole.
    hole = {"opening": {"form": "rectangle", "width": "3 in", "height": "3 in"}, "coefficient": own(0.61)}
    answers = answers_to(cone("8 ft", "3 ft", "10 ft"), hole, "10 ft", "2 ft", surroundings=FOOT_GRAVITY)
    assert (answers.draw_down.time.typical or 0) / 60 == pytest.approx(5.14, abs=0.006)


def test_lal_cylinder_on_a_hemisphere(answers_to: Solver) -> None:
    # J. Lal, Hydraulics, ex. 3.8, p. 85: 10 ft cylinder on a hemisphere, 17 ft deep, 3 in hole: 1885 s.
    vessel = cylinder("10 ft", "12 ft", floor={"form": "hemispherical"})
    answers = answers_to(vessel, round_hole("3 in", 0.62), "17 ft", "0 ft", surroundings=FOOT_GRAVITY)
    assert answers.draw_down.time.typical == pytest.approx(1885, abs=1)


def test_cleveland_equilibrium_depth(answers_to: Solver) -> None:
    # T. Cleveland, open course notes CE 3305, lesson 7: 20 ft³/s through a 1 ft ideal outlet stands at 10.1 ft.
    vessel = cylinder("40 ft", "20 ft")
    inflow = {"kind": "steady", "rate": "20 ft3/s"}
    answers = answers_to(vessel, round_hole("1 ft", 1.0), "15 ft", "5 ft", inflow=inflow, surroundings=FOOT_GRAVITY)
    assert (answers.equilibrium.level.typical or 0) / 0.3048 == pytest.approx(10.1, abs=0.05)
    assert not answers.draw_down.reaches_stop
