"""How a pasted text is cut into cells."""

from __future__ import annotations

import pytest

from headfall_app.entry.pasted import PasteRefused, cells_from

COLUMNS, UNITS = ("length", "area"), ("m", "m²")


@pytest.mark.parametrize(
    ("text", "cells"),
    [
        ("0;1\n1,5;2", (("0 m", "1 m²"), ("1.5 m", "2 m²"))),
        ("0\t1\n1,5\t2", (("0 m", "1 m²"), ("1.5 m", "2 m²"))),
        ("0,1\n1.5,2", (("0 m", "1 m²"), ("1.5 m", "2 m²"))),
        ('"0,5","1"\n"1,5","2"', (("0.5 m", "1 m²"), ("1.5 m", "2 m²"))),
        ("0 1\n1.5 2", (("0 m", "1 m²"), ("1.5 m", "2 m²"))),
        ("Depth;Surface\n0;1\n1;2", (("0 m", "1 m²"), ("1 m", "2 m²"))),
        ("depth_ft,area_ft2\n0,1", (("0 ft", "1 ft2"),)),
        ("depth [mm];area [m2]\n0;1", (("0 mm", "1 m2"),)),
        ("level m;area m2\n0;1", (("0 m", "1 m2"),)),
        ("0 ft;1 ft²\n6 in;2", (("0 ft", "1 ft²"), ("6 in", "2 m²"))),
        # A decimal point elsewhere: what this comma means is asked, not guessed.
        ("0.5;1\n1,250;2", (("0.5 m", "1 m²"), ("1,250 m", "2 m²"))),
        ("\n0;1\n\n1;\n", (("0 m", "1 m²"), ("1 m", ""))),
    ],
)
def test_how_a_text_is_cut(text: str, cells: tuple[tuple[str, ...], ...]) -> None:
    assert cells_from(text, COLUMNS, UNITS, 2).cells == cells


def test_columns_too_many_are_counted() -> None:
    assert cells_from("0;1;a\n1;2;b;c", COLUMNS, UNITS, 2).columns_left_out == 2


@pytest.mark.parametrize("text", ["", "   \n", "level;area\n", "a\nb\n", "0\n1\n", "level m;volume m3\n0;1"])
def test_what_is_no_table_is_refused_with_what_is_wanted(text: str) -> None:
    with pytest.raises(PasteRefused) as refusal:
        cells_from(text, COLUMNS, UNITS, 2)
    assert str(refusal.value).count(".") == 2
