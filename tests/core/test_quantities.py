"""Text to SI: what is accepted."""

from __future__ import annotations

import pytest

from headfall.quantities import Quantity, is_bare_number, parse
from headfall.quantities.units import dimension, dimensions


@pytest.mark.parametrize(
    ("text", "metres", "unit"),
    [
        ("80 mm", 0.08, "mm"),
        ("80mm", 0.08, "mm"),
        ("2.4 m", 2.4, "m"),
        ("2,5 m", 2.5, "m"),
        ("0,125 m", 0.125, "m"),
        (".5 m", 0.5, "m"),
        ("2. m", 2.0, "m"),
        ("1e-3 m", 0.001, "m"),
        ("1E\u22123 m", 0.001, "m"),
        ("-3 m", -3.0, "m"),
        ("\u22123 m", -3.0, "m"),
        ("+3 m", 3.0, "m"),
        ("3/4 in", 0.01905, "in"),
        ("1 1/2 in", 0.0381, "in"),
        ("1-1/2 in", 0.0381, "in"),
        ("½ in", 0.0127, "in"),
        ("1½ in", 0.0381, "in"),
        ("1 ½ in", 0.0381, "in"),
        ("1\u20442 in", 0.0127, "in"),
        ("3 1/8 in", 0.079375, "in"),
        ('3⅛"', 0.079375, '"'),
        ("6 ft 2 in", 1.8796, "ft in"),
        ("6' 2\"", 1.8796, "' \""),
        ("6'2\"", 1.8796, "' \""),
        ("6'-2\"", 1.8796, "' \""),
        ("6′ 2″", 1.8796, "′ ″"),
        ("6'2 1/2\"", 1.8923, "' \""),
        ("5 ft 3 1/2 in", 1.6129, "ft in"),
        ("-6 ft 2 in", -1.8796, "ft in"),
        ("6\u00a0ft\u00a02\u00a0in", 1.8796, "ft in"),
        ("  6 ft ", 1.8288, "ft"),
        ("80 MM", 0.08, "MM"),
        ("3 furlong", 603.505207010414, "furlong"),
    ],
)
def test_lengths(text: str, metres: float, unit: str) -> None:
    assert parse(text, "length") == Quantity(text, pytest.approx(metres, rel=1e-15), "length", unit)


@pytest.mark.parametrize("text", ["69 mm", "6.9 cm", "0.069 m", "0,069 m", "69e-3 m"])
def test_the_unit_typed_does_not_show_in_the_value(text: str) -> None:
    assert parse(text, "length").value == 0.069


@pytest.mark.parametrize(
    ("text", "seconds", "unit"),
    [
        ("20 min", 1200.0, "min"),
        ("1:23:45", 5025.0, "h:min:s"),
        ("1:23:45,5", 5025.5, "h:min:s"),
        ("22 min 5 s", 1325.0, "min s"),
        ("36 min 05 s", 2165.0, "min s"),
        ("1 h 20 min", 4800.0, "h min"),
        ("1h20min", 4800.0, "h min"),
        ("3 d 4 h", 273600.0, "d h"),
        ("1325 s", 1325.0, "s"),
        ("2 hours", 7200.0, "hours"),
        ("1 Min", 60.0, "Min"),
        ("1 h 0,5 min", 3630.0, "h min"),
    ],
)
def test_times(text: str, seconds: float, unit: str) -> None:
    assert parse(text, "time") == Quantity(text, seconds, "time", unit)


@pytest.mark.parametrize(
    ("text", "dimension_name", "value"),
    [
        ("15 degC", "temperature", 288.15),
        ("15 °C", "temperature", 288.15),
        ("59 °F", "temperature", 288.15),
        ("59 f", "temperature", 288.15),
        ("-40 F", "temperature", 233.15),
        ("0 K", "temperature", 0.0),
        ("5 m3/h", "flow", 5 / 3600),
        ("5 m³ / h", "flow", 5 / 3600),
        ("5 m^3/h", "flow", 5 / 3600),
        ("12 litres per minute", "flow", 0.0002),
        ("40 US gal/min", "flow", 40 * 3.785411784e-3 / 60),
        ("40 US gpm", "flow", 40 * 3.785411784e-3 / 60),
        ("1 US mgd", "flow", 3785.411784 / 86400),
        ("1 cfs", "flow", 0.028316846592),
        ("1 imp gal", "volume", 4.54609e-3),
        ("1 U.S. gal", "volume", 3.785411784e-3),
        ("1 oil bbl", "volume", 42 * 3.785411784e-3),
        ("1 hL", "volume", 0.1),
        ("5 mL", "volume", 5e-6),
        ("5 ML", "volume", 5000.0),
        ("160 MPa", "pressure", 160e6),
        ("160 N/mm²", "pressure", 160e6),
        ("160 mPa", "pressure", 0.16),
        ("10 mmH2O", "pressure", 98.0665),
        ("1 psi", "pressure", 6894.757293168362),
        ("998 kg/m^3", "density", 998.0),
        ("1 mPa·s", "dynamic_viscosity", 0.001),
        ("1 mPa s", "dynamic_viscosity", 0.001),
        ("1 mPa.s", "dynamic_viscosity", 0.001),
        ("1 cP", "dynamic_viscosity", 0.001),
        ("1 cSt", "kinematic_viscosity", 1e-6),
        ("9.80665 m/s^2", "acceleration", 9.80665),
        ("9.80665 m·s⁻²", "acceleration", 9.80665),
        ("9.80665 m s^-2", "acceleration", 9.80665),
        ("2600 lb", "mass", 2600 * 0.45359237),
        ("450 lbf", "force", 450 * 4.4482216152605),
        ("3 mile/hour", "velocity", 1.34112),
        ("90°", "angle", 1.5707963267948966),
        ("1 sq ft", "area", 0.09290304),
    ],
)
def test_other_dimensions(text: str, dimension_name: str, value: float) -> None:
    assert parse(text, dimension_name).value == pytest.approx(value, rel=1e-13)


@pytest.mark.parametrize("name", dimensions())
def test_every_example_can_be_typed(name: str) -> None:
    for example in dimension(name).example.split(" or "):
        assert parse(example, name).value > 0.0


@pytest.mark.parametrize("text", ["3", " 3 ", "-2,5", "1 1/2", "½", "1e3"])
def test_a_bare_number_has_no_unit(text: str) -> None:
    assert is_bare_number(text)


@pytest.mark.parametrize("text", ["", "3 mm", "mm", "3 4 5", "1:20:00"])
def test_what_is_no_bare_number(text: str) -> None:
    assert not is_bare_number(text)
