"""SI to what a person reads, and to what can be typed again."""

from __future__ import annotations

import math

import pytest

from headfall.quantities import display_kinds, display_units, duration, duration_parts, written

METRIC, US = display_units("metric"), display_units("us")


def read(text: str) -> str:
    return text.replace("\u00a0", "_").replace("\u2212", "~")


@pytest.mark.parametrize(
    ("value", "kind", "metric", "us"),
    [
        (0.347, "level", "0.347_m", "1.138_ft"),
        (0.1, "level", "0.100_m", "0.328_ft"),
        (2.0, "level", "2.000_m", "6.562_ft"),
        (0.0, "level", "0.000_m", "0.000_ft"),
        (-0.2, "level", "~0.200_m", "~0.656_ft"),
        (-0.0, "level", "0.000_m", "0.000_ft"),
        (-1e-14, "level", "0.000_m", "0.000_ft"),
        (1e-5, "level", "0.00001_m", "0.00003_ft"),
        (0.0918, "bore", "91.8_mm", "3.614_in"),
        (0.08, "bore", "80_mm", "3.15_in"),
        (0.1, "bore", "100_mm", "3.937_in"),
        (0.0127, "bore", "12.7_mm", "0.5_in"),
        (1.234, "bore", "1234_mm", "48.58_in"),
        (9.996, "length", "10.0_m", "32.8_ft"),
        (2.17, "volume", "2.17_m³", "573_US gal"),
        (123.456, "volume", "123_m³", "32600_US gal"),
        (0.9999, "volume", "1.00_m³", "264_US gal"),
        (0.02, "flow", "20.0_L/s", "317_US gal/min"),
        (-0.003, "flow", "~3.00_L/s", "~47.6_US gal/min"),
        (0.0, "flow", "0_L/s", "0_US gal/min"),
        (1e-7, "flow", "0.000100_L/s", "0.00159_US gal/min"),
        (4.52, "area", "4.52_m²", "48.7_ft²"),
        (0.00196, "opening_area", "1960_mm²", "3.04_in²"),
        (101325.0, "pressure", "101_kPa", "14.7_psi"),
        (160e6, "stress", "160_MPa", "23.2_ksi"),
        (999.1, "density", "999_kg/m³", "62.4_lb/ft³"),
        (0.001138, "viscosity", "1.14_mPa·s", "1.14_mPa·s"),
        (288.15, "temperature", "15_°C", "59_°F"),
        (258.15, "temperature", "~15_°C", "5_°F"),
        (273.15, "temperature", "0_°C", "32_°F"),
        (4.57, "velocity", "4.57_m/s", "15.0_ft/s"),
        (9.80665, "acceleration", "9.81_m/s²", "32.2_ft/s²"),
        (1000.0, "force", "1.00_kN", "225_lbf"),
        (1200.0, "mass", "1200_kg", "2650_lb"),
        (0.61, "ratio", "0.61", "0.61"),
        (0.6121, "ratio", "0.612", "0.612"),
        (123456.0, "reynolds", "123000", "123000"),
        (1.2e13, "area", "1.20×10¹³_m²", "1.29×10¹⁴_ft²"),
        (2213.0, "time", "36_min_53_s", "36_min_53_s"),
    ],
)
def test_answers(value: float, kind: str, metric: str, us: str) -> None:
    assert read(METRIC.text(value, kind)) == metric
    assert read(US.text(value, kind)) == us


@pytest.mark.parametrize("kind", display_kinds())
@pytest.mark.parametrize("system", ["metric", "us"])
def test_parts_make_the_text_and_units_their_factor(system: str, kind: str) -> None:
    display = display_units(system)
    number, unit = display.parts(0.034567, kind)
    assert f"{number}\u00a0{unit}".rstrip("\u00a0") == display.text(0.034567, kind)
    assert unit == display.unit(kind)
    assert display.factor(kind) > 0.0


def test_factors() -> None:
    assert METRIC.factor("bore") == 0.001
    assert US.factor("level") == 0.3048
    assert US.factor("temperature") == pytest.approx(5 / 9)
    assert METRIC.factor("ratio") == 1.0


@pytest.mark.parametrize("value", [math.nan, math.inf, -math.inf])
def test_what_is_not_finite_is_never_shown(value: float) -> None:
    with pytest.raises(ValueError, match="finite"):
        METRIC.text(value, "level")
    with pytest.raises(ValueError, match="finite"):
        duration(value)
    with pytest.raises(ValueError, match="finite"):
        written(value, "mm", "length")


def test_there_are_two_sets() -> None:
    with pytest.raises(ValueError, match="imperial"):
        display_units("imperial")


@pytest.mark.parametrize(
    ("seconds", "said"),
    [
        (0.0, "0_s"),
        (0.04, "0.040_s"),
        (0.347, "0.35_s"),
        (0.999, "1.0_s"),
        (9.4, "9.4_s"),
        (59.94, "59.9_s"),
        (59.96, "1_min_00_s"),
        (119.6, "2_min_00_s"),
        (1202.0, "20_min_02_s"),
        (3599.7, "1_h_00_min_00_s"),
        (5825.0, "1_h_37_min_05_s"),
        (35999.6, "10_h_00_min"),
        (50000.0, "13_h_53_min"),
        (172799.0, "2_d_0_h"),
        (273600.0, "3_d_4_h"),
        (9e6, "104_d"),
        (-75.0, "~1_min_15_s"),
    ],
)
def test_durations(seconds: float, said: str) -> None:
    assert read(duration(seconds)) == said


def test_parts_of_a_duration() -> None:
    assert duration_parts(2213.0) == [("36", "min"), ("53", "s")]
    assert METRIC.parts(2213.0, "time") == ("36\u00a0min\u00a053", "s")


@pytest.mark.parametrize(
    ("value", "unit", "dimension", "text"),
    [
        (0.00102, "L/min", "flow", "61.2 L/min"),
        (0.001, "L/min", "flow", "60 L/min"),
        (0.0, "L/s", "flow", "0 L/s"),
        (0.0819, "mm", "length", "81.9 mm"),
        (12.3456, "mm", "length", "12346 mm"),
        (-0.25, "m", "length", "-0.25 m"),
        (0.0254, '"', "length", '1"'),
        (1.8811, "ft in", "length", "6 ft 2.06 in"),
        (1.8796, "' \"", "length", "6' 2\""),
        (0.30479999, "ft in", "length", "1 ft"),
        (-1.8796, "ft in", "length", "-6 ft 2 in"),
        (1325.0, "min s", "time", "22 min 5 s"),
        (59.99999, "min s", "time", "1 min"),
        (5025.2, "h:min:s", "time", "1:23:45"),
        (12.345, "h:min:s", "time", "0:00:12.3"),
        (288.15, "°C", "temperature", "15 °C"),
        (603.505207010414, "furlong", "length", "3 furlong"),
        (1e-20, "m3", "volume", "1.00e-20 m3"),
    ],
)
def test_written_quantities(value: float, unit: str, dimension: str, text: str) -> None:
    assert written(value, unit, dimension).text == text


def test_more_digits_on_request() -> None:
    assert written(0.00102345, "L/min", "flow", digits=5).text == "61.407 L/min"


@pytest.mark.parametrize("unit", ["kg", "flurb", "m kg"])
def test_a_unit_of_another_dimension_cannot_be_written(unit: str) -> None:
    with pytest.raises(ValueError, match="not a unit of a length"):
        written(1.0, unit, "length")
