"""The closed table of units against pint, from which it was made."""

from __future__ import annotations

import subprocess
import sys
from fractions import Fraction
from pathlib import Path
from typing import Any

import pint
import pytest

from headfall.quantities import units
from headfall.resources import read_resource

ENTRIES = [(name, entry) for name, block in read_resource("units.json").items() for entry in block["units"]]
PACKAGING = Path(__file__).parents[2] / "packaging"


@pytest.fixture(scope="module")
def registry() -> Any:
    return pint.UnitRegistry()


@pytest.mark.parametrize(("name", "entry"), ENTRIES, ids=[f"{name} {entry['unit']}" for name, entry in ENTRIES])
def test_every_unit_agrees_with_pint(name: str, entry: dict[str, Any], registry: Any) -> None:
    si = read_resource("units.json")[name]["si"]
    multiple, _, expression = entry["pint"].partition("*") if entry["pint"][0].isdigit() else ("1", "", entry["pint"])
    unit = units.known_unit(entry["unit"], name)
    assert unit is not None
    for number in (0.0, 1.0, 37.5):
        by_pint = registry.Quantity(number * float(multiple), expression).to(si).magnitude
        assert unit.to_si(Fraction(number)) == pytest.approx(by_pint, rel=1e-12, abs=1e-12 * abs(float(unit.factor)))


@pytest.mark.parametrize("name", units.dimensions())
def test_no_spelling_means_two_units(name: str) -> None:
    spelled = {}
    for entry in read_resource("units.json")[name]["units"]:
        for spelling in (entry["unit"], *entry["spellings"]):
            plain = units.plain(spelling)
            assert spelled.setdefault(plain, entry["unit"]) == entry["unit"], plain


def test_no_spelling_belongs_to_two_dimensions() -> None:
    spelled: dict[str, str] = {}
    for name in units.dimensions():
        for spelling in units.spellings(name):
            assert spelled.setdefault(spelling, name) == name, spelling


def test_the_file_is_what_the_script_makes() -> None:
    script = "import make_units, sys; sys.stdout.buffer.write(make_units.lines(make_units.unit_table()).encode())"
    made = subprocess.run([sys.executable, "-c", script], cwd=PACKAGING, capture_output=True, check=True).stdout
    committed = (Path(__file__).parents[2] / "resources" / "core" / "units.json").read_bytes()
    assert made.decode().splitlines() == committed.decode().splitlines()


def test_a_known_unit_needs_no_pint() -> None:
    script = (
        "import sys; from headfall.quantities import parse, display_units\n"
        "parse('80 mm', 'length'); display_units('us').text(1.0, 'volume')\n"
        "print(sorted({'pint', 'scipy'} & set(sys.modules)))"
    )
    command = [sys.executable, "-c", f"import sys; sys.path[:0] = {[str(Path(units.__file__).parents[2])]}\n{script}"]
    assert subprocess.run(command, capture_output=True, check=True, text=True).stdout == "[]\n"
