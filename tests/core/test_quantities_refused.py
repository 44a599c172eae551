"""Text to SI: what is refused, and in which words."""

from __future__ import annotations

from typing import Any

import pytest

from headfall.quantities import QuantityFault, parse

LENGTH = "Type a length, such as 80 mm or 3 1/8 in."
TIME = "Type a time, such as 22 min 5 s or 1:23:45."


def sentence(text: Any, dimension: str) -> str:
    with pytest.raises(QuantityFault) as caught:
        parse(text, dimension)
    assert str(caught.value) == caught.value.sentence
    return caught.value.sentence


@pytest.mark.parametrize(
    ("text", "said"),
    [
        ("", f"Nothing is typed. {LENGTH}"),
        ("   ", f"Nothing is typed. {LENGTH}"),
        ("2400", f"2400 has no unit. {LENGTH}"),
        ("80 L", f"80 L is a volume. {LENGTH}"),
        ("2 kg", f"2 kg is a mass. {LENGTH}"),
        ("5 ft2", f"5 ft2 is an area. {LENGTH}"),
        ("3 hectares", f"3 hectares is an area. {LENGTH}"),
        ("3 mile/hour", f"3 mile/hour is a velocity. {LENGTH}"),
        ("nan m", f"nan m is not a number with a unit. {LENGTH}"),
        ("inf m", f"inf m is not a number with a unit. {LENGTH}"),
        ("-inf m", f"-inf m is not a number with a unit. {LENGTH}"),
        ("m", f"m is not a number with a unit. {LENGTH}"),
        ("5 flurb", f"flurb is not a unit known here. {LENGTH}"),
        ("2.5.3 m", f"2.5.3 is not a number. {LENGTH}"),
        ("1.2 1/2 in", f"1.2 1/2 is not a number. {LENGTH}"),
        ("1/0 in", f"1/0 divides by 0. {LENGTH}"),
        ("1e400 m", f"1e400 is beyond the numbers used here. {LENGTH}"),
        ("1e999999999999 m", f"1e999999999999 is beyond the numbers used here. {LENGTH}"),
        ("9" * 310 + " m", f"{'9' * 310} m is beyond the numbers used here. {LENGTH}"),
        ("9" * 330 + " m", f"This number has too many digits. {LENGTH}"),
        ("9" * 4000 + " m", f"This text is too long for a quantity. {LENGTH}"),
        (None, f"null is not a text with a unit. {LENGTH}"),
        (True, f"true is not a text with a unit. {LENGTH}"),
        (2400, f"2400 is not a text with a unit. {LENGTH}"),
        (["3 m"], f"A list is not a text with a unit. {LENGTH}"),
        ("6 ft 2", f"2 in 6 ft 2 has no unit. {LENGTH}"),
        ("6 ft 14 in", f"14 in in 6 ft 14 in is 1 ft or more. {LENGTH}"),
        ("2 in 6 ft", f"2 in 6 ft does not go from large to small units. {LENGTH}"),
        ("6.5 ft 2 in", f"6.5 ft in 6.5 ft 2 in has a fraction before the last part. {LENGTH}"),
    ],
)
def test_lengths(text: object, said: str) -> None:
    assert sentence(text, "length") == said


@pytest.mark.parametrize(
    ("text", "said"),
    [
        ("1 000 mm", "1 000 has its digits in groups. Type 1000 mm."),
        ("1\u202f000 mm", "1 000 has its digits in groups. Type 1000 mm."),
        ("-1 000 000 mm", "1 000 000 has its digits in groups. Type -1000000 mm."),
        ("1,000.5 mm", "1,000.5 has its digits in groups. Type 1000.5 mm."),
        ("1.000,5 mm", "1.000,5 has its digits in groups. Type 1000.5 mm."),
        ("1'000 mm", "1'000 has its digits in groups. Type 1000 mm."),
        ("1,000 mm", "1,000 can be 1000 or 1.0. Type 1000 mm or 1.0 mm."),
        ("-2,400 m", "2,400 can be 2400 or 2.4. Type -2400 m or -2.4 m."),
    ],
)
def test_digits_are_not_grouped(text: str, said: str) -> None:
    assert sentence(text, "length") == said


@pytest.mark.parametrize(
    ("text", "dimension", "said"),
    [
        ("40 gal", "volume", "Which gallon? Type US gal or imp gal."),
        ("40 gallons", "length", "Which gallon? Type US gal or imp gal."),
        ("40 gpm", "flow", "Which gallon? Type US gal/min or imp gal/min."),
        ("40 GPM", "flow", "Which gallon? Type US gal/min or imp gal/min."),
        ("40 gal/min", "flow", "Which gallon? Type US gal/min or imp gal/min."),
        ("40 gallons per hour", "flow", "Which gallon? Type US gal/h or imp gal/h."),
        ("2 mgd", "flow", "Which gallon? Type US mgd or imp mgd."),
        ("2 bbl", "volume", "Which barrel? Type oil bbl for one of 42 US gal, or imp bbl for one of 36 imp gal."),
        ("2 barrel", "volume", "Which barrel? Type oil bbl for one of 42 US gal, or imp bbl for one of 36 imp gal."),
        ("2 ton", "mass", "Which ton? Type t for one of 1000 kg, US ton or imp ton."),
        ("2 pints", "volume", "Which measure? Type a volume in L or in US gal, a mass in kg or in lb."),
        ("2 mil", "length", "Which mil? Type mm or thou."),
        ("3 MPA", "pressure", "MPA is not a unit known here. Type MPa or mPa."),
        ("1 Mm", "length", "Mm is not a unit known here. Type mm."),
        ("22:05", "time", "22:05 can be minutes or hours. Type 22 min 05 s or 22 h 05 min."),
    ],
)
def test_what_has_more_than_one_meaning_is_asked_about(text: str, dimension: str, said: str) -> None:
    assert sentence(text, dimension) == said


@pytest.mark.parametrize(
    ("text", "said"),
    [
        ("1:75:00", f"1:75:00 counts 60 or more in its minutes or seconds. {TIME}"),
        ("1 h 75 min", f"75 min in 1 h 75 min is 1 h or more. {TIME}"),
        ("1 h -20 min", f"-20 min is not a unit known here. {TIME}"),
        ("5 m", f"5 m is a length. {TIME}"),
    ],
)
def test_times(text: str, said: str) -> None:
    said = said.replace("-20 min is not", "h -20 min is not")
    assert sentence(text, "time") == said


def test_nothing_is_colder_than_absolute_zero() -> None:
    said = sentence("-300 degC", "temperature")
    assert said == "-300 degC lies below absolute zero. Type a temperature, such as 15 °C or 59 °F."


@pytest.mark.parametrize(
    ("text", "dimension"),
    [
        ("1 Min", "length"),  # a mega-inch
        ("3 kinch", "length"),
        ("3 m10", "length"),
        ("3 m dozen", "length"),
        ("3 m*2", "length"),
        ("3 m percent", "length"),
        ("3 __class__", "length"),
        ("3 (m", "length"),
        ("3 delta_degC", "temperature"),
        ("3 c", "velocity"),
        ("2 Mg", "mass"),
    ],
)
def test_what_only_pint_would_accept_is_refused(text: str, dimension: str) -> None:
    with pytest.raises(QuantityFault):
        parse(text, dimension)


def test_a_fault_keeps_its_facts() -> None:
    with pytest.raises(QuantityFault) as caught:
        parse("80 L", "length")
    assert caught.value.found == "80 L is a volume"
    assert caught.value.wanted == "a length, such as 80 mm or 3 1/8 in"
    assert caught.value.question is None


def test_an_unknown_dimension_is_a_fault_of_the_program() -> None:
    with pytest.raises(KeyError):
        parse("80 mm", "colour")
