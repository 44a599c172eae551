"""Listed sizes as people type them, what is said about those that are not listed, and the series they belong to."""

from __future__ import annotations

import subprocess
import sys
from itertools import pairwise

import pytest

from headfall.quantities import QuantityFault, parse, written
from headfall.quantities.listed_bores import ListedBore, listed_bore, pipe_series, series_of
from headfall.resources import read_resource

SCHEDULES = ("10", "20", "30", "40", "80", "160", "STD", "XS", "5S", "10S", "40S", "80S")
EXAMPLES = [
    *(f"NPS 10 sch {schedule}" for schedule in SCHEDULES),
    *("DN 65 hygienic", "2 in OD hygienic"),
    *(f"110 mm SDR {ratio}" for ratio in ("11", "13.6", "17", "21", "26")),
]
ALL = [size for example in EXAMPLES for size in series_of(example)]


def test_the_examples_reach_every_series() -> None:
    assert {size.series for size in ALL} == {key for key, _, _ in pipe_series()}
    assert len(ALL) > 300


@pytest.mark.parametrize(
    ("typed", "name"),
    [
        ("NPS 4 sch 40", "NPS 4 sch 40 (DN 100)"),
        ("nps4 SCH40", "NPS 4 sch 40 (DN 100)"),
        ("4 in sch 40", "NPS 4 sch 40 (DN 100)"),
        ('4" Sch. 40', "NPS 4 sch 40 (DN 100)"),
        ("4-inch schedule 40", "NPS 4 sch 40 (DN 100)"),
        ("DN 100 sch 40", "NPS 4 sch 40 (DN 100)"),
        ("DN100 Sch40", "NPS 4 sch 40 (DN 100)"),
        ("  DN\u00a0100,  sch 40 ", "NPS 4 sch 40 (DN 100)"),
        ("NPS 4 sch 40 (DN 100)", "NPS 4 sch 40 (DN 100)"),
        ("NPS 1-1/2 sch 80", "NPS 1-1/2 sch 80 (DN 40)"),
        ("1 1/2 in sch 80", "NPS 1-1/2 sch 80 (DN 40)"),
        ("1½ in sch 80", "NPS 1-1/2 sch 80 (DN 40)"),
        ("1.5 in sch 80", "NPS 1-1/2 sch 80 (DN 40)"),
        ("1/2 sch 160", "NPS 1/2 sch 160 (DN 15)"),
        ("NPS 6 STD", "NPS 6 sch STD (DN 150)"),
        ("NPS 6 sch xs", "NPS 6 sch XS (DN 150)"),
        ("DN 50 sch 10S", "NPS 2 sch 10S (DN 50)"),
        ("DN 65 hygienic", "DN 65 hygienic"),
        ("dn65 Hygienic tube", "DN 65 hygienic"),
        ("2 in OD hygienic", "2 in OD hygienic"),
        ("2 in hygienic", "2 in OD hygienic"),
        ('1-1/2" OD sanitary', "1-1/2 in OD hygienic"),
        ("110 mm SDR 17", "110 mm SDR 17"),
        ("PE 110 SDR 17", "110 mm SDR 17"),
        ("DN 110 SDR 17", "110 mm SDR 17"),
        ("OD 110 SDR17", "110 mm SDR 17"),
        ("pvc 63 sdr 13,6", "63 mm SDR 13.6"),
    ],
)
def test_what_people_type(typed: str, name: str) -> None:
    size = listed_bore(typed)
    assert size is not None
    assert size.name == name
    quantity = parse(typed, "bore")
    assert (quantity.text, quantity.value, quantity.dimension, quantity.unit) == (typed, size.bore, "length", "mm")


@pytest.mark.parametrize("size", ALL, ids=lambda size: size.name)
def test_every_name_is_read_as_its_own_size(size: ListedBore) -> None:
    assert listed_bore(size.name) == size


@pytest.mark.parametrize(
    "text", ["", "100 mm", "4 in", "1 1/2 in", "80", "sch 40", "NPS", "schedule", "9" * 80 + " sch 40"]
)
def test_what_names_no_listed_size(text: str) -> None:
    assert listed_bore(text) is None
    assert series_of(text) == ()


NPS = "1/2, 3/4, 1, 1-1/4, 1-1/2, 2, 2-1/2, 3, 3-1/2, 4, 5, 6, 8, 10, 12, 14, 16, 18, 20, 24"
DN = "15, 20, 25, 32, 40, 50, 65, 80, 90, 100, 125, 150, 200, 250, 300, 350, 400, 450, 500, 600"


@pytest.mark.parametrize(
    ("typed", "sentence"),
    [
        ("NPS 7 sch 40", f"NPS 7 sch 40 is not a listed pipe size. Type one of NPS {NPS}."),
        ("DN 110 sch 40", f"DN 110 sch 40 is not a listed pipe size. Type one of DN {DN}."),
        (
            "NPS 5 sch 30",
            "NPS 5 sch 30 is not a listed schedule. "
            "Type a schedule of NPS 5: 10, 40, 80, 160, STD, XS, 5S, 10S, 40S, 80S.",
        ),
        (
            "20 sch 40",
            "20 sch 40 does not say whether it goes by inches or by DN. Type NPS 20 sch 40 or DN 20 sch 40.",
        ),
        ("65 hygienic", "65 hygienic does not say whether it goes by inches or by DN. Type DN 65 hygienic."),
        (
            "7 sch 40",
            "7 sch 40 does not say whether it goes by inches or by DN. Type a listed size, such as NPS 4 sch 40.",
        ),
        ("NPS 4 sch 40 (DN 80)", "NPS 4 is DN 100, not DN 80. Type NPS 4 sch 40 or DN 80 sch 40."),
        (
            "DN 100",
            "DN 100 leaves the wall open. "
            "Type its schedule too, such as DN 100 sch 40, or the bore itself, such as 102.26 mm.",
        ),
        ("NPS 1/0 sch 40", "1/0 divides by 0. Type a listed size, such as NPS 4 sch 40."),
        (
            "DN 66 hygienic",
            "DN 66 hygienic is not a listed size. "
            "Type one of DN 10, 15, 20, 25, 32, 40, 50, 65, 80, 100, 125, 150 hygienic.",
        ),
        (
            "5 in hygienic",
            "5 in hygienic is not a listed size. Type one of 1/2, 3/4, 1, 1-1/2, 2, 2-1/2, 3, 4, 6 in OD hygienic.",
        ),
        (
            "DN 2 in hygienic",
            "DN 2 in hygienic is both a DN and in inches. Type DN 65 hygienic or 2 in OD hygienic.",
        ),
        (
            "4 in SDR 17",
            "4 in SDR 17 is in inches. Type an outside diameter in mm, such as 110 mm SDR 17.",
        ),
        (
            "100 mm SDR 26",
            "100 mm SDR 26 is not a listed size. "
            "Type one of 90, 110, 125, 140, 160, 180, 200, 225, 250, 280, 315, 355, 400, 450, 500, 560, 630 mm SDR 26.",
        ),
        ("110 mm SDR 18", "110 mm SDR 18 is not a listed series. Type one of SDR 11, 13.6, 17, 21, 26."),
    ],
)
def test_what_is_said_of_a_size_that_is_not_listed(typed: str, sentence: str) -> None:
    with pytest.raises(QuantityFault) as caught:
        parse(typed, "bore")
    assert caught.value.sentence == sentence
    assert series_of(typed) == ()


def test_a_listed_size_is_no_length_elsewhere() -> None:
    with pytest.raises(QuantityFault):
        parse("NPS 4 sch 40", "length")


@pytest.mark.parametrize("typed", ["102.26 mm", "4 in", "1 1/2 in", "0,1 m"])
def test_a_plain_length_is_a_bore(typed: str) -> None:
    assert parse(typed, "bore") == parse(typed, "length")


def test_the_unit_of_a_listed_size_writes_its_bore() -> None:
    quantity = parse("NPS 4 sch 40", "bore")
    assert written(quantity.value, quantity.unit, quantity.dimension, 5).text == "102.26 mm"


@pytest.mark.parametrize("size", ALL, ids=lambda size: size.name)
def test_a_bore_is_the_outside_less_two_walls(size: ListedBore) -> None:
    assert size.bore == pytest.approx(size.outside_diameter - 2 * size.wall, abs=1e-9)
    assert 0.0 < size.wall < 0.25 * size.outside_diameter
    assert size.source in read_resource("sources.json")


def test_a_series_keeps_to_one_kind_and_schedule_and_rises() -> None:
    for typed, count in [("DN 100 sch 40", 20), ("NPS 2 sch 10S", 20), ("DN 65 hygienic", 12), ("2 in hygienic", 9)]:
        sizes = series_of(typed)
        assert len(sizes) == count
        assert len({(size.series, size.schedule) for size in sizes}) == 1
        bores = [size.bore for size in sizes]
        assert all(above > below for below, above in pairwise(bores))
        assert listed_bore(typed) in sizes
    neighbours = [size.name for size in series_of("110 mm SDR 17")]
    place = neighbours.index("110 mm SDR 17")
    assert neighbours[place - 1 : place + 2] == ["90 mm SDR 17", "110 mm SDR 17", "125 mm SDR 17"]


def test_every_series_has_a_title_and_an_example_of_its_own() -> None:
    assert [key for key, _, _ in pipe_series()] == ["steel", "stainless", "hygienic", "hygienic_inch", "plastic"]
    for key, title, example in pipe_series():
        size = listed_bore(example)
        assert size is not None and size.series == key
        assert title


def test_the_nominal_sizes_of_the_caution_are_those_of_the_list() -> None:
    """The caution about nominal sizes keeps schedule 40 in a list of its own."""
    for row in read_resource("nominal_pipe.json")["sizes"]:
        size = listed_bore(f"DN {row['dn']} sch 40")
        assert size is not None
        assert size.nominal == row["nps"].replace(" ", "-")
        assert size.outside_diameter == pytest.approx(row["outside"] / 1000)
        assert size.wall == pytest.approx(row["wall_40"] / 1000)


def test_the_list_is_read_only_when_a_listed_size_is_typed() -> None:
    script = (
        "import headfall.study\n"
        "from headfall.quantities import parse\n"
        "from headfall.resources import read_resource\n"
        "from unittest.mock import patch\n"
        "import headfall.quantities.listed_bores as bores\n"
        "with patch.object(bores, 'read_resource', side_effect=LookupError):\n"
        "    parse('80 mm', 'bore')\n"
        "    try:\n"
        "        parse('NPS 4 sch 40', 'bore')\n"
        "    except LookupError:\n"
        "        print('read')\n"
    )
    found = subprocess.run([sys.executable, "-c", script], capture_output=True, text=True, check=True, timeout=60)
    assert found.stdout.split() == ["read"]
