"""Laws that a run keeps through any outlet, under any headspace, against any tailwater."""

from __future__ import annotations

from dataclasses import replace

import numpy as np
import pytest
from hypothesis import assume, given, settings
from hypothesis import strategies as st
from scipy.integrate import cumulative_simpson, solve_ivp

from headfall.discharge import Receiver
from headfall.liquids import water
from headfall.outlet.headspace import (
    ClosedHeadspace,
    Headspace,
    OpenHeadspace,
    PressurisedHeadspace,
    VentedHeadspace,
    air_density,
)
from headfall.outlet.orifice import OrificeOutlet
from headfall.outlet.outlet import Outlet
from headfall.outlet.pipe import PipeOutlet
from headfall.outlet.pipe_sections import NamedLoss, PipeSection
from headfall.outlet.standpipe import Standpipe
from headfall.outlet.weir import Weir
from headfall.runs import Runs
from headfall.system import System
from headfall.vessel import ends
from headfall.vessel.basin import Basin
from headfall.vessel.drum import Drum
from headfall.vessel.inclined_drum import InclinedDrum
from headfall.vessel.profile import Profile
from headfall.vessel.sphere import Sphere
from headfall.vessel.stack import Stack
from headfall.vessel.table import AreaTable, VolumeTable
from headfall.vessel.upright_cylinder import UprightCylinder

G = 9.80665
CYLINDER = UprightCylinder(2.0, 3.0, ends.flat())
PROFILES: list[Profile] = [
    CYLINDER,
    Drum(2.0, 4.0, ends.flat(), ends.torispherical(2.0, 1.0, 0.1)),
    InclinedDrum(2.0, 4.0, ends.ellipsoidal(2.0), ends.flat(), 0.1),
    Basin(2.0, 1.5, 1.0, 0.5, 2.0),
    AreaTable([0.0, 0.5, 0.5, 2.0], [1.0, 2.0, 3.0, 4.0], "conic"),
    VolumeTable([0.0, 0.4, 1.0, 2.2], [0.0, 0.6, 2.0, 6.0]),
    Stack([UprightCylinder(1.0, 0.5, ends.cone(0.5)), UprightCylinder(2.0, 1.5, ends.flat())]),
    Sphere(2.0),
]
TYPICAL = 1


def hole(facing: str, size: float, elevation: float, viscosity: float = 0.0) -> OrificeOutlet:
    return OrificeOutlet(
        "hole", "round", facing, size, size, elevation, 1, 0.59, 0.61, 0.63, "unwin_1911", G,
        viscosity=viscosity, handbook=True,
    )  # fmt: skip


def pipe(bore: float, drop: float, viscosity: float, fixed: float | None) -> PipeOutlet:
    section = PipeSection(bore, 6.0, (3e-5, 4.5e-5, 9e-5), fixed, (NamedLoss("elbow", 0.5, 0.75, 0.9),))
    return PipeOutlet("line", "drain", 0.1, 0.1 - drop, (section,), NamedLoss("entry", 0.4, 0.5, 0.6), G, viscosity)


@st.composite
def outlets(draw: st.DrawFn) -> Outlet:
    size = draw(st.floats(0.03, 0.12))
    kind = draw(st.sampled_from(["down", "side", "pipe", "weir", "notch", "standpipe"]))
    viscosity = draw(st.sampled_from([1e-6, 5e-5, 1e-3]))
    if kind == "pipe":
        return pipe(size, draw(st.sampled_from([0.0, 1.2, -0.2])), viscosity, draw(st.sampled_from([None, 0.02])))
    if kind == "weir":
        return Weir("weir", "drain", "rectangular", 0.4, G, width=0.3)
    if kind == "notch":
        return Weir("weir", "drain", "vnotch", 0.4, G, angle=1.5)
    if kind == "standpipe":
        return Standpipe("standpipe", "drain", size + 0.05, 0.4, G)
    return hole(kind, size, 0.0 if kind == "down" else 0.2, viscosity if draw(st.booleans()) else 0.0)


@st.composite
def systems(draw: st.DrawFn) -> System:
    profile = draw(st.sampled_from(PROFILES))
    first = draw(outlets())
    start, stop = (draw(st.floats(0.05, 0.95)) * profile.height for _ in range(2))
    inflow = draw(st.one_of(st.just(0.0), st.floats(1e-4, 2e-2)))
    held = [first]
    if draw(st.booleans()):
        held.append(hole("side", 0.05, 0.6))
    tail: list[float | Receiver] = [draw(st.sampled_from([-np.inf, -np.inf, 0.3, 0.8])), *(-np.inf for _ in held[1:])]
    if inflow == 0 and len(held) == 1 and draw(st.booleans()):
        tail = [
            Receiver(UprightCylinder(1.5, 1.0, ends.flat()), profile, draw(st.sampled_from([-1.0, 0.2])), 0.5, start)
        ]
    return System(
        profile=profile,
        outlets=tuple(held),
        inflow=inflow,
        liquid=water(293.15),
        start=start,
        stop=stop,
        overflow=profile.height,
        high=None,
        drain_time=None,
        gravity=G,
        pressure=101325.0,
        headspace_declared=True,
        headspace=draw(headspaces(profile, start)),
        tailwaters=tuple(tail),
    )


def headspaces(profile: Profile, start: float) -> st.SearchStrategy[Headspace]:
    capacity = profile.capacity * (1 + 1e-9)
    room = capacity - float(profile.volume(np.array(start)))
    weight = 998.2 * G
    closed = ClosedHeadspace(lambda level: capacity - profile.volume(level), room, 101325.0 / weight)
    vents = [VentedHeadspace(np.pi / 4 * d * d, 0.6, air_density(101325.0), 998.2, G, 10.0) for d in (0.004, 0.02)]
    pressed = [PressurisedHeadspace(p) for p in (-0.4, 1.5)]
    return st.sampled_from([OpenHeadspace(), OpenHeadspace(), closed, *vents, *pressed])


def net(runs: Runs, level: float) -> float:
    flow = runs.discharge.flow(np.array([level]), runs.rows([TYPICAL]))
    return float(flow[0]) - runs.system.inflow


@settings(max_examples=250, deadline=None)
@given(systems())
def test_what_left_and_what_stayed_is_what_was_there(system: System) -> None:
    """Along the curve the volume falls by what flows out less what flows in, to 2e-4 of the capacity."""
    curve = Runs(system).curves[TYPICAL]
    assume(len(curve.time) > 20 and curve.ends != "at rest")
    # Where the flow leaps at the end, the last point stands after the leap: the one before is held up to it.
    outflow = np.append(curve.outflow[:-1], curve.outflow[-2]) if curve.ends == "surging" else curve.outflow
    lost = cumulative_simpson(outflow - system.inflow, x=curve.time, initial=0.0)
    off = curve.volume - curve.volume[0] + lost
    assert np.max(np.abs(off)) < 2e-4 * system.profile.capacity
    assert np.all(np.diff(curve.time) > 0)
    assert np.all(np.diff(curve.level) <= 1e-12) or np.all(np.diff(curve.level) >= -1e-12)


@settings(max_examples=120, deadline=None)
@given(systems())
def test_time_agrees_with_an_integrator(system: System) -> None:
    runs = Runs(system)
    end, why = runs.ends[TYPICAL]
    assume(why == "stop" and abs(end - system.start) > 0.01 * system.profile.height)
    # Close to rest an integrator's event is no sharper than its own error.
    rest = float(runs.rest[TYPICAL])
    assume(abs(end - rest) > 0.02 * system.profile.height)
    found = runs.time_to(end, TYPICAL)

    def change(_time: float, volume: np.ndarray) -> list[float]:
        level = float(system.profile.level(np.clip(volume, 0.0, system.profile.capacity))[0])
        return [-net(runs, level)]

    def there(_time: float, volume: np.ndarray) -> float:
        return float(volume[0]) - float(system.profile.volume(np.array(end)))

    there.terminal = True  # type: ignore[attr-defined]
    first = float(system.profile.volume(np.array(system.start)))
    run = solve_ivp(change, (0.0, 2 * found + 1), [first], events=there, rtol=1e-8, atol=1e-10, max_step=found / 20)
    assert len(run.t_events[0]) == 1
    assert found == pytest.approx(float(run.t_events[0][0]), rel=2e-5)


@settings(max_examples=120, deadline=None)
@given(systems(), st.floats(0.1, 0.9))
def test_times_add_up(system: System, share: float) -> None:
    runs = Runs(system)
    end, why = runs.ends[TYPICAL]
    assume(why == "stop" and abs(end - system.start) > 0.01 * system.profile.height)
    middle = system.start + share * (end - system.start)
    first = runs.time_to(middle, TYPICAL)
    rest = Runs(replace(system, start=middle)).time_to(end, TYPICAL)
    assert first + rest == pytest.approx(runs.time_to(end, TYPICAL), rel=1e-8)


@settings(max_examples=250, deadline=None)
@given(systems())
def test_the_level_rests_where_out_is_in(system: System) -> None:
    runs = Runs(system)
    rest = float(runs.rest[TYPICAL])
    assume(0 < rest < system.profile.height)
    step = 1e-7 * system.profile.height
    # Right at it, or a leap from less to more.
    assert net(runs, rest - step) <= 1e-9 and net(runs, rest + step) >= -1e-9


@settings(max_examples=150, deadline=None)
@given(systems())
def test_the_curve_ends_where_the_run_says(system: System) -> None:
    runs = Runs(system)
    for index in range(3):
        curve = runs.curves[index]
        assert curve.level[-1] == pytest.approx(runs.ends[index][0], abs=1e-9)
        assert curve.level[0] == system.start
        assert np.isfinite(curve.time).all() and np.isfinite(curve.outflow).all()
