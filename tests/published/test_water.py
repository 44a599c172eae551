"""Water against the formulations of IAPWS."""

from __future__ import annotations

import iapws
import pytest

from headfall.liquids import water, water_density, water_vapour_pressure, water_viscosity

# IAPWS-95 and IAPWS R12-08 at 0.101325 MPa, computed with the library iapws 1.5.5 and checked with CoolProp 8.0.0:
# t [°C], density [kg/m³], viscosity [µPa·s], vapour pressure [Pa].
IAPWS_95 = [
    (0.01, 999.8438, 1791.132, 611.7),
    (4.0, 999.9749, 1567.292, 813.55),
    (10.0, 999.7025, 1305.9, 1228.2),
    (20.0, 998.2072, 1001.596, 2339.32),
    (25.0, 997.0476, 890.022, 3169.93),
    (30.0, 995.6495, 797.222, 4246.97),
    (40.0, 992.2164, 652.729, 7384.94),
    (50.0, 988.035, 546.516, 12351.95),
    (60.0, 983.1958, 466.035, 19946.43),
    (70.0, 977.7646, 403.548, 31200.93),
    (80.0, 971.7904, 354.051, 47414.47),
    (90.0, 965.3096, 314.175, 70181.77),
    (99.6, 958.6364, 282.769, 99978.79),
]


@pytest.mark.parametrize(("celsius", "density", "viscosity", "vapour_pressure"), IAPWS_95)
def test_iapws_95(celsius: float, density: float, viscosity: float, vapour_pressure: float) -> None:
    state = water(celsius + 273.15)
    # Density 1e-5: the formulation of 1975 lies 3 to 5 millionths below that of 1995.
    assert state.density == pytest.approx(density, rel=1e-5)
    assert state.viscosity == pytest.approx(viscosity * 1e-6, rel=1e-3)
    assert state.vapour_pressure == pytest.approx(vapour_pressure, rel=1e-4)


# IAPWS R7-97, table 35, from memory; recomputed with the library iapws.
@pytest.mark.parametrize(
    ("temperature", "megapascal"), [(300.0, 0.00353658941), (500.0, 2.63889776), (600.0, 12.3443146)]
)
def test_saturation_line_r7_97(temperature: float, megapascal: float) -> None:
    assert water_vapour_pressure(temperature) == pytest.approx(megapascal * 1e6, rel=1e-8)


# IAPWS R12-08, table 4, critical enhancement left out, from memory; recomputed with the library iapws.
@pytest.mark.parametrize(
    ("temperature", "density", "micropascal_second"),
    [
        (298.15, 998.0, 889.7351),
        (298.15, 1200.0, 1437.649467),
        (373.15, 1000.0, 307.883622),
        (433.15, 1.0, 14.538324),
    ],
)
def test_viscosity_r12_08(temperature: float, density: float, micropascal_second: float) -> None:
    assert water_viscosity(temperature, density) == pytest.approx(micropascal_second * 1e-6, rel=1e-7)


@pytest.mark.parametrize("celsius", [1.0, 7.0, 18.0, 33.0, 45.0, 66.0, 82.0, 95.0])
def test_the_library_iapws(celsius: float) -> None:
    library = iapws.IAPWS95(T=celsius + 273.15, P=0.101325)
    assert water_density(celsius + 273.15) == pytest.approx(library.rho, rel=1e-5)
    assert water(celsius + 273.15).viscosity == pytest.approx(library.mu, rel=1e-3)
