"""Hydrostatic pressure and the hoop stress of a thin shell, in closed form.

Values worked out from p = ρ·g·h and σ = ρ·g·h·D/(2·t), the membrane formula.
"""

from __future__ import annotations

import pytest

from headfall.checks.structure import hoop_stress, liquid_pressure


def test_pressure_under_four_metres_of_water() -> None:
    # ρ = 1000 kg/m³, g = 9.80665 m/s², h = 4 m; closed form: 39 226.6 Pa, exact.
    assert liquid_pressure(density=1000.0, gravity=9.80665, depth=4.0) == pytest.approx(39226.6, rel=1e-9)


def test_force_on_a_floor_of_five_metres_diameter() -> None:
    # The same 4 m of water on a floor of 5 m diameter; closed form: 770 212.489 908 N.
    pressure = liquid_pressure(density=1000.0, gravity=9.80665, depth=4.0)
    assert pressure * 3.141592653589793 * 5.0**2 / 4.0 == pytest.approx(770212.489908, rel=1e-9)


def test_hoop_stress_of_a_twelve_metre_tank() -> None:
    # D = 12 m, t = 8 mm, 6 m of water; closed form: 44.129925 MPa.
    pressure = liquid_pressure(density=1000.0, gravity=9.80665, depth=6.0)
    stress = hoop_stress(
        shape="upright_cylinder", pressure=pressure, diameter=12.0, thickness=0.008, joint_efficiency=1.0
    )
    assert stress == pytest.approx(44129924.99999999, rel=1e-12)
