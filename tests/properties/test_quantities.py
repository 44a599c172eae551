"""Round trips and equivalences of typed quantities."""

from __future__ import annotations

import math
import re
from fractions import Fraction

import pint
import pytest
from hypothesis import given
from hypothesis import strategies as st

from headfall.quantities import QuantityFault, display_kinds, display_units, duration, parse, written
from headfall.quantities.units import dimensions, known_unit, spellings
from headfall.resources import read_resource

UNITS = [(name, entry["unit"]) for name in dimensions() for entry in read_resource("units.json")[name]["units"]]
REGISTRY = pint.UnitRegistry()

sizes = st.floats(min_value=1e-6, max_value=1e9)


@given(unit=st.sampled_from(UNITS), size=sizes, digits=st.integers(3, 12))
def test_what_is_written_reads_back(unit: tuple[str, str], size: float, digits: int) -> None:
    name, spelling = unit
    known = known_unit(spelling, name)
    assert known is not None
    value = known.to_si(Fraction(size))
    quantity = written(value, spelling, name, digits)
    assert parse(quantity.text, name) == quantity
    assert quantity.unit == spelling
    allowed = float(known.factor) * size * 10.0 ** (1 - digits) + 1e-12 * abs(value)
    assert quantity.value == pytest.approx(value, rel=0.0, abs=allowed)


@given(
    unit=st.sampled_from([("ft in", "length"), ("' \"", "length"), ("h min s", "time"), ("min s", "time")]),
    value=st.floats(min_value=-1e5, max_value=1e5),
)
def test_quantities_of_parts_read_back(unit: tuple[str, str], value: float) -> None:
    quantity = written(value, *unit)
    assert parse(quantity.text, unit[1]) == quantity
    assert quantity.value == pytest.approx(value, rel=1e-3)


@given(value=st.floats(min_value=1e-6, max_value=1e7))
def test_times_by_the_clock_read_back(value: float) -> None:
    quantity = written(value, "h:min:s", "time")
    assert quantity.unit == "h:min:s"
    assert quantity.value == pytest.approx(value, rel=6e-3, abs=1e-12)


@given(whole=st.integers(0, 10**6), decimals=st.text("0123456789", min_size=1, max_size=9))
def test_comma_and_point_mean_the_same(whole: int, decimals: str) -> None:
    by_point = parse(f"{whole}.{decimals} m", "length")
    by_comma = f"{whole},{decimals} m"
    if 1 <= whole <= 999 and len(decimals) == 3:
        with pytest.raises(QuantityFault, match="can be"):
            parse(by_comma, "length")
    else:
        assert parse(by_comma, "length").value == by_point.value


@given(unit=st.sampled_from(UNITS), number=st.decimals(min_value=1, max_value=10**6, places=4))
def test_values_agree_with_pint(unit: tuple[str, str], number: object) -> None:
    name, spelling = unit
    block = read_resource("units.json")[name]
    expression = next(entry["pint"] for entry in block["units"] if entry["unit"] == spelling)
    multiple, _, rest = expression.partition("*") if expression[0].isdigit() else ("1", "", expression)
    by_pint = REGISTRY.Quantity(float(str(number)) * float(multiple), rest).to(block["si"]).magnitude
    assert parse(f"{number} {spelling}", name).value == pytest.approx(by_pint, rel=1e-12)


@given(whole=st.integers(0, 99), above=st.integers(0, 64), below=st.integers(1, 64))
def test_a_mixed_number_is_a_sum(whole: int, above: int, below: int) -> None:
    assert parse(f"{whole} {above}/{below} in", "length").value == float(
        (whole + Fraction(above, below)) * Fraction(127, 5000)
    )


@given(feet=st.integers(0, 500), inches=st.integers(0, 11))
def test_feet_and_inches_add_up(feet: int, inches: int) -> None:
    total = parse(f"{12 * feet + inches} in", "length").value
    assert parse(f"{feet} ft {inches} in", "length").value == total
    assert parse(f"{feet}'-{inches}\"", "length").value == total


@given(text=st.text(max_size=30), name=st.sampled_from(["length", "time", "temperature"]))
def test_any_text_is_read_or_refused_with_a_sentence(text: str, name: str) -> None:
    _read_or_refuse(text, name)


@given(
    text=st.text("0123456789 .,/'\"-−+e½:mfthisndµ²", max_size=16),
    name=st.sampled_from(["length", "time", "area"]),
)
def test_any_digits_are_read_or_refused_with_a_sentence(text: str, name: str) -> None:
    _read_or_refuse(text, name)


def _read_or_refuse(text: str, name: str) -> None:
    try:
        quantity = parse(text, name)
    except QuantityFault as fault:
        assert re.search(r"[.?] Type .+\.$", fault.sentence, re.DOTALL)
    else:
        assert math.isfinite(quantity.value)
        assert quantity.unit
        assert quantity.text == text


@given(value=st.floats(min_value=-1e12, max_value=1e12, allow_subnormal=False), kind=st.sampled_from(display_kinds()))
def test_what_is_shown_is_what_it_is(value: float, kind: str) -> None:
    for system in ("metric", "us"):
        display = display_units(system)
        number = display.number(value, kind)
        assert "-" not in number
        assert "e" not in number
        if kind == "temperature" or "×" in number:
            continue
        shown = float(number.replace("\u2212", "-")) * display.factor(kind)
        coarse = 5.01e-4 * display.factor(kind) if kind == "level" else 0.0
        # The last figure of a level below half a millimetre is its only one.
        relative = 0.5 if kind == "level" and abs(value) < 5.01e-4 else 5.01e-3
        assert shown == pytest.approx(value, rel=relative, abs=max(coarse, 1e-9) if kind == "level" else 0.0)
        if value and kind != "level":
            assert number.strip("\u22120.") != ""


@given(value=st.floats(min_value=0.001, max_value=1e6))
def test_a_duration_can_be_typed(value: float) -> None:
    assert parse(duration(value), "time").value == pytest.approx(value, rel=0.05, abs=1e-3)


@given(name=st.sampled_from(dimensions()), data=st.data())
def test_every_spelling_can_be_typed(name: str, data: st.DataObject) -> None:
    spelling = data.draw(st.sampled_from(sorted(spellings(name))))
    assert parse(f"300 {spelling}", name).value > 0.0
