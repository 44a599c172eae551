"""Laws that every run keeps, over random vessels, outlets and inflows."""

from __future__ import annotations

from dataclasses import replace

import numpy as np
import pytest
from hypothesis import assume, given, settings
from hypothesis import strategies as st
from scipy.integrate import solve_ivp

from headfall.liquids import water
from headfall.outlet.orifice import OrificeOutlet
from headfall.runs import Runs
from headfall.sizes import times_at
from headfall.system import System
from headfall.vessel import ends
from headfall.vessel.box import Box
from headfall.vessel.cone import Cone
from headfall.vessel.drum import Drum
from headfall.vessel.profile import Profile
from headfall.vessel.sphere import Sphere
from headfall.vessel.upright_cylinder import UprightCylinder

PROFILES: list[Profile] = [
    UprightCylinder(2.0, 3.0, ends.flat()),
    UprightCylinder(2.0, 3.0, ends.torispherical(2.0, 1.0, 0.1)),
    Box(2.0, 1.5, 3.0),
    Cone(2.0, 0.0, 3.0),
    Cone(0.5, 2.5, 3.0),
    Drum(2.0, 4.0, ends.flat(), ends.flat()),
    Drum(2.0, 4.0, ends.torispherical(2.0, 1.0, 0.1), ends.ellipsoidal(2.0, 2.0)),
    Sphere(2.4),
]

fractions = st.floats(0.05, 0.98)


@st.composite
def systems(draw: st.DrawFn, most_inflow: float = 6e-3) -> System:
    profile = draw(st.sampled_from(PROFILES))
    shape = draw(st.sampled_from(["round", "rectangle"]))
    facing = draw(st.sampled_from(["down", "side"]))
    size = draw(st.floats(0.02, 0.09))
    height = size if shape == "round" else draw(st.floats(0.02, 0.3))
    elevation = draw(st.floats(0.0, 0.2)) if facing == "down" else 0.5 * height + draw(st.floats(0.0, 0.3))
    hole = OrificeOutlet(
        "drain", shape, facing, size, height, elevation, 1, 0.59, 0.61, 0.63, "own_coefficient", 9.80665
    )
    outlets = [hole]
    if draw(st.booleans()):
        outlets.append(replace(hole, shape="round", width=0.03, height=0.03, facing="side", elevation=0.9))
    start, stop = (draw(fractions) * profile.height for _ in range(2))
    return System(
        profile=profile,
        outlets=tuple(outlets),
        inflow=draw(st.one_of(st.just(0.0), st.floats(1e-5, most_inflow))),
        liquid=water(293.15),
        start=start,
        stop=stop,
        overflow=profile.height,
        high=None,
        drain_time=None,
        gravity=9.80665,
        pressure=101325.0,
        headspace_declared=True,
    )


@given(systems())
@settings(max_examples=400, deadline=None)
def test_curve_is_well_formed(system: System) -> None:
    for curve, (end, why) in zip(Runs(system).curves, Runs(system).ends, strict=True):
        if abs(system.start - system.stop) <= system.tolerance:
            continue
        assert curve.ends == why
        assert 200 <= len(curve.time) <= 2000
        assert np.all(np.diff(curve.time) > 0)
        assert curve.time[0] == 0
        assert curve.level[0] == system.start
        assert curve.level[-1] == pytest.approx(end, abs=1e-12)
        steps = np.diff(curve.level)
        assert np.all(steps <= 0) or np.all(steps >= 0)


@given(systems())
@settings(max_examples=80, deadline=None)
def test_what_left_and_what_stayed_is_what_was_there(system: System) -> None:
    curve = Runs(system).curves[1]
    assume(len(curve.time) > 1)
    out = np.concatenate([[0.0], np.cumsum(np.diff(curve.time) * 0.5 * (curve.outflow[1:] + curve.outflow[:-1]))])
    balance = curve.volume - curve.volume[0] - system.inflow * curve.time + out
    moved = system.inflow * curve.time[-1] + out[-1] + 1e-9
    assert np.abs(balance).max() < 2e-3 * moved


@given(systems())
@settings(max_examples=25, deadline=None)
def test_agrees_with_a_general_integrator(system: System) -> None:
    runs = Runs(system)
    curve = runs.curves[1]
    assume(len(curve.time) > 1 and curve.ends != "at rest")
    until = curve.time[-1] * 0.8

    def rate(_: float, volume: np.ndarray) -> np.ndarray:
        level = system.profile.level(np.clip(volume, 0.0, system.profile.capacity))
        return system.inflow - runs.flow(np.repeat(level, 3))[1:2]

    answer = solve_ivp(rate, (0.0, until), [curve.volume[0]], rtol=1e-8, atol=1e-10, method="LSODA")
    ours = np.interp(until, curve.time, curve.volume)
    assert answer.y[0, -1] == pytest.approx(ours, rel=2e-3, abs=2e-4)


@given(systems(), st.floats(0.1, 0.9))
@settings(max_examples=80, deadline=None)
def test_times_add_up(system: System, part: float) -> None:
    runs = Runs(system)
    assume(runs.reaches[1] and abs(system.start - system.stop) > 0.05)
    between = system.start + part * (system.stop - system.start)
    first = Runs(replace(system, stop=between)).curves[1].time[-1]
    second = Runs(replace(system, start=between)).curves[1].time[-1]
    assert first + second == pytest.approx(runs.curves[1].time[-1], rel=1e-10)


@given(systems())
@settings(max_examples=80, deadline=None)
def test_range_brackets_the_typical(system: System) -> None:
    low, typical, high = (curve.time[-1] for curve in Runs(system).curves)
    if all(Runs(system).reaches) and system.start != system.stop:
        assert (high <= typical <= low) if system.stop < system.start else (low <= typical <= high)
    rest = Runs(system).rest
    assert rest[2] <= rest[1] <= rest[0]


@given(systems())
@settings(max_examples=80, deadline=None)
def test_equilibrium_passes_the_inflow(system: System) -> None:
    runs = Runs(system)
    assume(system.inflow > 0)
    assert runs.flow(runs.rest) == pytest.approx(np.full(3, system.inflow), rel=1e-9)


@given(systems(most_inflow=1e-3))
@settings(max_examples=60, deadline=None)
def test_more_inflow_never_drains_sooner(system: System) -> None:
    assume(system.stop < system.start - 0.05)
    with_more = replace(system, inflow=system.inflow * 1.1 + 1e-6)
    assume(Runs(with_more).reaches[1])
    assert Runs(with_more).curves[1].time[-1] > Runs(system).curves[1].time[-1] * (1 - 1e-12)


@given(systems())
@settings(max_examples=60, deadline=None)
def test_sizing_times_agree_with_the_run(system: System) -> None:
    runs = Runs(system)
    assume(all(runs.reaches) and system.stop < system.start - 0.01)
    times = times_at(runs, np.ones(3), (0, 1, 2))
    assert times == pytest.approx([curve.time[-1] for curve in runs.curves], rel=1e-8)


@given(st.floats(0.5, 5.0), st.floats(0.5, 4.0), st.floats(0.01, 0.1))
def test_scaling_by_gravity(diameter: float, head: float, hole: float) -> None:
    """Four times the gravity halves the time."""
    profile = UprightCylinder(diameter, 5.0, ends.flat())
    outlet = OrificeOutlet("drain", "round", "down", hole, hole, 0.0, 1, 0.6, 0.6, 0.6, "own_coefficient", 9.80665)
    base = System(
        profile, (outlet,), 0.0, water(293.15), head, 0.1, 5.0, None, None, 9.80665, 101325.0, headspace_declared=True
    )
    heavy = replace(base, outlets=(replace(outlet, gravity=4 * 9.80665),))
    assert 2 * Runs(heavy).curves[1].time[-1] == pytest.approx(Runs(base).curves[1].time[-1], rel=1e-13)
