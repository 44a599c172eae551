"""Listed bores against a general-purpose library's table of steel pipe, and against printed inside diameters."""

from __future__ import annotations

import json
import math
from fractions import Fraction

import pytest
from fluids.piping import nearest_pipe

from headfall.quantities import QuantityFault, parse
from headfall.quantities.listed_bores import listed_bore, series_of
from headfall.resources import read_resource

STEEL = [
    (row["nps"], schedule, row["outside"], wall)
    for key in ("steel", "stainless")
    for row in read_resource("pipe_sizes.json")[key]["sizes"]
    for schedule, wall in row["walls"].items()
]


def test_the_list_is_not_empty() -> None:
    assert len(STEEL) > 200


@pytest.mark.parametrize(("nps", "schedule", "outside", "wall"), STEEL)
def test_steel_pipe_against_the_library(nps: str, schedule: str, outside: float, wall: float) -> None:
    """ASME B36.10M and B36.19M as the library carries them."""
    inches = float(sum(Fraction(part) for part in nps.split("-")))
    _, inside, library_outside, library_wall = nearest_pipe(NPS=inches, schedule=schedule)
    assert outside == pytest.approx(library_outside * 1000, abs=0.006)
    assert wall == pytest.approx(library_wall * 1000, abs=0.006)
    size = listed_bore(f"NPS {nps} sch {schedule}")
    assert size is not None and size.bore == pytest.approx(inside, abs=1.2e-5)


@pytest.mark.parametrize(
    ("typed", "bore"),
    [
        ("NPS 4 sch 40", 102.26),
        ("DN 100 sch 40", 102.26),
        ("4 in sch 40", 102.26),
        ("NPS 3 sch 40", 77.93),
        ("NPS 1 sch 40", 26.64),
        ("NPS 6 sch 80", 146.36),
        ("NPS 2 sch 10S", 54.76),
        # From 10 and 12 inches on the S schedules are thinner than their namesakes.
        ("NPS 12 sch 40", 303.18),
        ("NPS 12 sch 40S", 304.84),
        ("NPS 10 sch 80", 242.82),
        ("NPS 10 sch 80S", 247.7),
        ("DN 65 hygienic", 66.0),
        ("2 in hygienic", 47.5),
        ("110 mm SDR 17", 96.8),
        ("4 in OD hygienic", 97.38),
        ("6 in OD hygienic", 146.86),
        ("PE 110 SDR 11", 90.0),
        ("630 mm SDR 26", 581.8),
    ],
)
def test_printed_inside_diameters(typed: str, bore: float) -> None:
    """Inside diameters in millimetres as printed in pipe tables (from memory)."""
    assert parse(typed, "bore").value * 1000 == pytest.approx(bore, abs=0.011)
    assert parse(typed, "bore").text == typed


@pytest.mark.parametrize(("ratio", "power"), [("11", 14), ("13.6", 16), ("17", 18), ("21", 20), ("26", 22)])
def test_plastic_walls_follow_the_preferred_numbers(ratio: str, power: int) -> None:
    """e = d/(2·S + 1) with S a preferred number, 10^(k/20), to hundredths, then up to the next tenth of a millimetre

    (ISO 4065, from memory); the ratio in the name is 2·S + 1 rounded. ISO 4427 takes 2.0 and 3.0 mm for the 1.9 and
    2.9 mm of the smallest sizes (from memory).
    """
    series = 2 * 10 ** (power / 20) + 1
    assert series == pytest.approx(float(ratio), abs=0.2)
    for outside, wall in read_resource("pipe_sizes.json")["plastic"]["series"][ratio]:
        tenths = math.ceil(round(100 * outside / series) / 10)
        polyethylene = {("11", 20): 20, ("11", 32): 30}
        assert round(10 * wall) == polyethylene.get((ratio, outside), tenths)


# Walls in thousandths of an inch, NPS 1/2 to 24 (ASME B36.19M, from memory).
STAINLESS = {
    "5S": [65, 65, 65, 65, 65, 65, 83, 83, 83, 83, 109, 109, 109, 134, 156, 156, 165, 165, 188, 218],
    "10S": [83, 83, 109, 109, 109, 109, 120, 120, 120, 120, 134, 134, 148, 165, 180, 188, 188, 188, 218, 250],
}


@pytest.mark.parametrize("schedule", STAINLESS)
def test_stainless_walls_in_inches(schedule: str) -> None:
    rows = read_resource("pipe_sizes.json")["stainless"]["sizes"]
    for row, thousandths in zip(rows, STAINLESS[schedule], strict=True):
        assert row["walls"][schedule] == pytest.approx(thousandths * 0.0254, abs=0.0051)


# DIN 11866 series A, inside diameters in mm by DN (from memory).
HYGIENIC = {10: 10, 15: 16, 20: 20, 25: 26, 32: 32, 40: 38, 50: 50, 65: 66, 80: 81, 100: 100, 125: 125, 150: 150}


def test_hygienic_tube_by_dn() -> None:
    found = {int(size.nominal): round(size.bore * 1000, 6) for size in series_of("DN 65 hygienic")}
    assert found == HYGIENIC


# ASME BPE, walls in thousandths of an inch by outside diameter in inches (from memory).
INCH_TUBE = {"1/2": 65, "3/4": 65, "1": 65, "1-1/2": 65, "2": 65, "2-1/2": 65, "3": 65, "4": 83, "6": 109}


def test_hygienic_tube_by_inches() -> None:
    sizes = {size.nominal: size for size in series_of("2 in OD hygienic")}
    assert sizes.keys() == INCH_TUBE.keys()
    for nominal, thousandths in INCH_TUBE.items():
        inches = float(sum(Fraction(part) for part in nominal.split("-")))
        assert sizes[nominal].outside_diameter == pytest.approx(inches * 0.0254)
        assert sizes[nominal].wall == pytest.approx(thousandths * 25.4e-6, abs=5e-6)


def test_a_series_rises_and_holds_the_size_itself() -> None:
    sizes = series_of("NPS 4 sch 80")
    assert [size.bore for size in sizes] == sorted(size.bore for size in sizes)
    assert "NPS 4 sch 80 (DN 100)" in {size.name for size in sizes}
    assert series_of("102 mm") == ()


@pytest.mark.parametrize(
    ("typed", "sentence"),
    [
        (
            "NPS 4 sch 45",
            "NPS 4 sch 45 is not a listed schedule. "
            "Type a schedule of NPS 4: 10, 30, 40, 80, 160, STD, XS, 5S, 10S, 40S, 80S.",
        ),
        ("110 SDR 18", "110 SDR 18 is not a listed series. Type one of SDR 11, 13.6, 17, 21, 26."),
        ("4", "4 has no unit. Type a bore, such as 102.26 mm or NPS 4 sch 40."),
        ("4 kg", "4 kg is a mass. Type a bore, such as 102.26 mm or NPS 4 sch 40."),
    ],
)
def test_what_is_not_listed_is_told(typed: str, sentence: str) -> None:
    with pytest.raises(QuantityFault) as fault:
        parse(typed, "bore")
    assert fault.value.sentence == sentence


def test_every_series_names_its_source() -> None:
    sources = read_resource("sources.json")
    data = read_resource("pipe_sizes.json")
    assert all(block["source"] in sources for block in data.values()), json.dumps(list(data))
