"""Make ``resources/core/units.json``: what a person may type as a unit, with exact factors from pint.

Run it from the checkout after a change of the table below: ``python packaging/make_units.py``.
"""

from __future__ import annotations

import json
from fractions import Fraction
from pathlib import Path
from typing import Any

import pint

TARGET = Path(__file__).parents[1] / "resources" / "core" / "units.json"

# dimension: (what it is called, example, SI unit as pint spells it, {written: (pint's expression, other spellings)})
# Kept apart on purpose: mPa and MPa, mL and ML, min and the mega-inch that pint reads in "Min".
TABLE: dict[str, tuple[str, str, str, dict[str, tuple[str, str]]]] = {
    "length": (
        "a length",
        "80 mm or 3 1/8 in",
        "meter",
        {
            "m": ("meter", "metre, metres, meter, meters"),
            "mm": ("millimeter", "millimetre, millimetres, millimeter, millimeters"),
            "cm": ("centimeter", "centimetre, centimetres, centimeter, centimeters"),
            "dm": ("decimeter", "decimetre, decimetres, decimeter, decimeters"),
            "km": ("kilometer", "kilometre, kilometres, kilometer, kilometers"),
            "um": ("micrometer", "micron, microns, micrometre, micrometres, micrometer, micrometers"),
            "in": ("inch", "\", '', inch, inches, in."),
            "ft": ("foot", "', foot, feet, ft."),
            "yd": ("yard", "yard, yards"),
            "thou": ("thou", ""),
        },
    ),
    "area": (
        "an area",
        "1.5 m² or 16 ft²",
        "meter**2",
        {
            "m²": ("meter**2", "sq m, square metre, square metres, square meter, square meters"),
            "mm²": ("millimeter**2", "sq mm, square millimetre, square millimetres"),
            "cm²": ("centimeter**2", "sq cm, square centimetre, square centimetres"),
            "dm²": ("decimeter**2", ""),
            "in²": ("inch**2", "sq in, square inch, square inches"),
            "ft²": ("foot**2", "sq ft, square foot, square feet"),
            "yd²": ("yard**2", "sq yd"),
            "ha": ("hectare", "hectare, hectares"),
        },
    ),
    "volume": (
        "a volume",
        "12 m³ or 500 US gal",
        "meter**3",
        {
            "m³": ("meter**3", "cu m, cubic metre, cubic metres, cubic meter, cubic meters"),
            "L": ("liter", "l, ltr, litre, litres, liter, liters"),
            "mL": ("milliliter", "ml, millilitre, millilitres, milliliter, milliliters"),
            "cL": ("centiliter", "cl"),
            "dL": ("deciliter", "dl"),
            "hL": ("hectoliter", "hl, hectolitre, hectolitres, hectoliter, hectoliters"),
            "kL": ("kiloliter", "kl, kilolitre, kilolitres"),
            "ML": ("megaliter", "megalitre, megalitres"),
            "mm³": ("millimeter**3", ""),
            "cm³": ("centimeter**3", "cc, cubic centimetre, cubic centimetres"),
            "dm³": ("decimeter**3", ""),
            "in³": ("inch**3", "cu in, cubic inch, cubic inches"),
            "ft³": ("foot**3", "cu ft, cubic foot, cubic feet"),
            "yd³": ("yard**3", "cu yd"),
            "US gal": ("gallon", "USgal, gal US, gal (US), US gallon, US gallons, US gals"),
            "imp gal": (
                "imperial_gallon",
                "UK gal, gal imp, gal (imp), gal (UK), imp gallon, imp gallons, "
                "imperial gallon, imperial gallons, UK gallon, UK gallons, Imp gal",
            ),
            "oil bbl": (
                "oil_barrel",
                "bbl oil, bbl(oil), bbl (oil), US bbl(oil), US bbl (oil), oil barrel, oil barrels",
            ),
            "imp bbl": ("imperial_barrel", "imp barrel, imp barrels"),
        },
    ),
    "flow": (
        "a flow",
        "12 L/min or 40 US gal/min",
        "meter**3/second",
        {
            "L/s": (
                "liter/second",
                "l/s, lps, litre/s, litres/s, liter/s, liters/s, litre/second, litres/second, liters/second, L/sec",
            ),
            "L/min": (
                "liter/minute",
                "l/min, lpm, litre/min, litres/min, liter/min, liters/min, litre/minute, litres/minute, liters/minute",
            ),
            "L/h": (
                "liter/hour",
                "l/h, L/hr, lph, litre/h, litres/h, liter/h, liters/h, litre/hour, litres/hour, liters/hour",
            ),
            "L/d": ("liter/day", "l/d, L/day, litres/day, liters/day"),
            "mL/s": ("milliliter/second", "ml/s"),
            "mL/min": ("milliliter/minute", "ml/min"),
            "mL/h": ("milliliter/hour", "ml/h"),
            "hL/h": ("hectoliter/hour", "hl/h"),
            "ML/d": ("megaliter/day", "ML/day"),
            "m³/s": ("meter**3/second", "cumec, cumecs"),
            "m³/min": ("meter**3/minute", ""),
            "m³/h": ("meter**3/hour", "m3/hr, m3/hour, cubic metres/hour, cubic meters/hour, cubic metre/hour"),
            "m³/d": ("meter**3/day", "m3/day"),
            "cm³/s": ("centimeter**3/second", "cc/s"),
            "cm³/min": ("centimeter**3/minute", "cc/min"),
            "dm³/s": ("decimeter**3/second", ""),
            "ft³/s": ("foot**3/second", "cfs, cusec, cusecs, cu ft/s, ft3/sec"),
            "ft³/min": ("foot**3/minute", "cfm, cu ft/min"),
            "ft³/h": ("foot**3/hour", "ft3/hr, cfh"),
            "US gal/min": (
                "gallon/minute",
                "US gpm, USgpm, usgpm, gpm US, gpm (US), US gallons/minute, US gallons/min",
            ),
            "US gal/s": ("gallon/second", "US gps"),
            "US gal/h": ("gallon/hour", "US gal/hr, US gph, US gallons/hour"),
            "US gal/d": ("gallon/day", "US gal/day, US gpd"),
            "imp gal/min": (
                "imperial_gallon/minute",
                "UK gal/min, imp gpm, UK gpm, igpm, gpm (imp), imp gallons/minute",
            ),
            "imp gal/s": ("imperial_gallon/second", "UK gal/s"),
            "imp gal/h": ("imperial_gallon/hour", "UK gal/h, imp gal/hr, imp gph"),
            "imp gal/d": ("imperial_gallon/day", "UK gal/d, imp gal/day"),
            "US mgd": ("1000000*gallon/day", "US Mgal/d, US Mgal/day, US MGD"),
            "imp mgd": ("1000000*imperial_gallon/day", "imp Mgal/d, imp Mgal/day, imp MGD"),
            "oil bbl/h": ("oil_barrel/hour", "oil bbl/hr"),
            "oil bbl/d": ("oil_barrel/day", "oil bbl/day"),
        },
    ),
    "time": (
        "a time",
        "22 min 5 s or 1:23:45",
        "second",
        {
            "s": ("second", "sec, secs, second, seconds, s."),
            "ms": ("millisecond", "millisecond, milliseconds"),
            "min": ("minute", "mins, minute, minutes, min."),
            "h": ("hour", "hr, hrs, hour, hours"),
            "d": ("day", "day, days"),
            "week": ("week", "weeks, wk"),
        },
    ),
    "temperature": (
        "a temperature",
        "15 °C or 59 °F",
        "kelvin",
        {
            "degC": ("degC", "°C, C, deg C, celsius, degree celsius, degrees celsius"),
            "degF": ("degF", "°F, F, deg F, fahrenheit, degree fahrenheit, degrees fahrenheit"),
            "K": ("kelvin", "kelvin"),
            "degR": ("degR", "°R, rankine"),
        },
    ),
    "pressure": (
        "a pressure",
        "20 kPa or 3 psi",
        "pascal",
        {
            "Pa": ("pascal", "pascal, pascals, N/m2"),
            "hPa": ("hectopascal", ""),
            "kPa": ("kilopascal", "kN/m2, kilopascal, kilopascals"),
            "MPa": ("megapascal", "N/mm2, MN/m2, megapascal, megapascals"),
            "GPa": ("gigapascal", "kN/mm2"),
            "mPa": ("millipascal", ""),
            "bar": ("bar", "bars"),
            "mbar": ("millibar", "millibar, millibars"),
            "psi": ("psi", "lbf/in2, lb/in2"),
            "ksi": ("ksi", ""),
            "psf": ("force_pound/foot**2", "lbf/ft2"),
            "atm": ("atmosphere", ""),
            "mmH2O": ("0.1*centimeter_H2O", "mm H2O, mmWC, mmWG, mm WC, mm WG"),
            "cmH2O": ("centimeter_H2O", "cm H2O, cmWC, cmWG, cm WC, cm WG"),
            "mH2O": ("100*centimeter_H2O", "m H2O, mWC, mWG, m WC, m WG"),
            "inH2O": ("2.54*centimeter_H2O", "in H2O, inWC, inWG, in WC, in WG"),
            "ftH2O": ("30.48*centimeter_H2O", "ft H2O, ftWC, ftWG, ft WC, ft WG"),
            "mmHg": ("millimeter_Hg", "mm Hg, torr, Torr"),
            "inHg": ("inch_Hg", "in Hg"),
            "kgf/cm²": ("kilogram_force/centimeter**2", "kg/cm2"),
        },
    ),
    "density": (
        "a density",
        "998 kg/m³ or 62.3 lb/ft³",
        "kilogram/meter**3",
        {
            "kg/m³": ("kilogram/meter**3", ""),
            "g/cm³": ("gram/centimeter**3", "g/cc"),
            "kg/L": ("kilogram/liter", "kg/l, kg/dm3"),
            "g/L": ("gram/liter", "g/l"),
            "g/mL": ("gram/milliliter", "g/ml"),
            "t/m³": ("metric_ton/meter**3", ""),
            "lb/ft³": ("pound/foot**3", "lbm/ft3, pcf"),
            "lb/US gal": ("pound/gallon", "lbm/US gal"),
            "lb/imp gal": ("pound/imperial_gallon", "lb/UK gal"),
        },
    ),
    "dynamic_viscosity": (
        "a dynamic viscosity",
        "1 mPa·s or 1 cP",
        "pascal*second",
        {
            "Pa·s": ("pascal*second", "Pas, Pa-s, N s/m2, N·s/m2, kg/(m s), kg/m/s"),
            "mPa·s": ("millipascal*second", "mPas, mPa-s"),
            "uPa·s": ("micropascal*second", "uPas"),
            "cP": ("centipoise", "centipoise, cp"),
            "P": ("poise", "poise"),
            "lb/(ft·s)": ("pound/foot/second", "lb/ft/s"),
            "lbf·s/ft²": ("force_pound*second/foot**2", ""),
        },
    ),
    "kinematic_viscosity": (
        "a kinematic viscosity",
        "1 mm²/s or 1 cSt",
        "meter**2/second",
        {
            "m²/s": ("meter**2/second", ""),
            "mm²/s": ("millimeter**2/second", ""),
            "cm²/s": ("centimeter**2/second", ""),
            "cSt": ("centistokes", "centistokes, cst"),
            "St": ("stokes", "stokes"),
            "ft²/s": ("foot**2/second", ""),
        },
    ),
    "acceleration": (
        "an acceleration",
        "9.81 m/s² or 32.2 ft/s²",
        "meter/second**2",
        {
            "m/s²": ("meter/second**2", "m/s/s"),
            "cm/s²": ("centimeter/second**2", ""),
            "ft/s²": ("foot/second**2", ""),
        },
    ),
    "mass": (
        "a mass",
        "1200 kg or 2600 lb",
        "kilogram",
        {
            "kg": ("kilogram", "kilogram, kilograms, kilo, kilos"),
            "g": ("gram", "gram, grams"),
            "mg": ("milligram", "milligram, milligrams"),
            "t": ("metric_ton", "tonne, tonnes"),
            "lb": ("pound", "lbs, lbm, pound, pounds"),
            "US ton": ("short_ton", "short ton, short tons, US tons"),
            "imp ton": ("long_ton", "long ton, long tons, imp tons, UK ton, UK tons"),
        },
    ),
    "force": (
        "a force",
        "2 kN or 450 lbf",
        "newton",
        {
            "N": ("newton", "newton, newtons"),
            "kN": ("kilonewton", "kilonewton, kilonewtons"),
            "MN": ("meganewton", ""),
            "lbf": ("force_pound", "lb-f"),
            "kip": ("1000*force_pound", "kips"),
            "kgf": ("kilogram_force", "kp"),
        },
    ),
    "velocity": (
        "a velocity",
        "1.5 m/s or 5 ft/s",
        "meter/second",
        {
            "m/s": ("meter/second", "mps, metres/second, meters/second"),
            "mm/s": ("millimeter/second", ""),
            "cm/s": ("centimeter/second", ""),
            "m/min": ("meter/minute", ""),
            "mm/min": ("millimeter/minute", ""),
            "m/h": ("meter/hour", ""),
            "mm/h": ("millimeter/hour", ""),
            "cm/h": ("centimeter/hour", ""),
            "km/h": ("kilometer/hour", ""),
            "ft/s": ("foot/second", "fps"),
            "ft/min": ("foot/minute", "fpm"),
            "in/s": ("inch/second", ""),
            "in/min": ("inch/minute", ""),
            "in/h": ("inch/hour", ""),
        },
    ),
    "angle": (
        "an angle",
        "30° or 0.52 rad",
        "radian",
        {
            "rad": ("radian", "radian, radians"),
            "deg": ("degree", "°, degree, degrees"),
        },
    ),
}


def exact_conversion(registry: Any, expression: str, si: str) -> tuple[Fraction, Fraction]:
    """Return factor and offset, SI value = factor·value + offset, of a unit pint knows."""
    if expression in ("degC", "degF"):
        # pint turns the offset of a scale into a float; both scales are exact by definition.
        factor = Fraction(1) if expression == "degC" else Fraction(5, 9)
        return factor, Fraction("273.15") if expression == "degC" else Fraction("459.67") * factor
    number, _, rest = expression.partition("*") if expression[0].isdigit() else ("1", "", expression)
    magnitude = registry.Quantity(Fraction(number), rest).to(si).magnitude
    # Factors are ratios but for the degree of arc, whose 50 digits of pi a float cannot hold anyway.
    return Fraction(repr(float(magnitude))) if si == "radian" else Fraction(magnitude), Fraction(0)


def unit_table() -> dict[str, Any]:
    """Return the content of ``units.json``."""
    registry: Any = pint.UnitRegistry(non_int_type=Fraction)
    table: dict[str, Any] = {}
    for dimension, (called, example, si, units) in TABLE.items():
        entries = []
        for written, (expression, others) in units.items():
            factor, offset = exact_conversion(registry, expression, si)
            spellings = [other for other in others.split(", ") if other]
            entry = {"unit": written, "pint": expression, "factor": str(factor), "spellings": spellings}
            entries.append(entry | {"offset": str(offset)} if offset else entry)
        table[dimension] = {"called": called, "example": example, "si": si, "units": entries}
    return table


def lines(table: dict[str, Any]) -> str:
    """Return the table as JSON with one unit a line."""
    blocks = []
    for dimension, block in table.items():
        facts = ((key, json.dumps(block[key], ensure_ascii=False)) for key in ("called", "example", "si"))
        head = ", ".join(f'"{key}": {fact}' for key, fact in facts)
        units = ",\n".join("    " + json.dumps(entry, ensure_ascii=False) for entry in block["units"])
        blocks.append(f'  "{dimension}": {{{head}, "units": [\n{units}\n  ]}}')
    return "{\n" + ",\n".join(blocks) + "\n}\n"


if __name__ == "__main__":
    TARGET.write_text(lines(unit_table()), encoding="utf-8")
