"""Laws that every kind of outlet keeps, whatever its sizes, the level, the tailwater and the headspace."""

from __future__ import annotations

from dataclasses import replace

import numpy as np
import pytest
from hypothesis import assume, given, settings
from hypothesis import strategies as st

from headfall.outlet.orifice import OrificeOutlet
from headfall.outlet.outlet import FREE, HIGH, LOW, TYPICAL, Conditions, Outlet
from headfall.outlet.pipe import PipeOutlet
from headfall.outlet.pipe_sections import NamedLoss, PipeSection
from headfall.outlet.standpipe import Standpipe
from headfall.outlet.weir import Weir

G = 9.80665
sizes, levels = st.floats(0.02, 0.4), st.floats(0.0, 4.0)
viscosities = st.sampled_from([0.0, 1e-6, 3e-5, 1e-3])


@st.composite
def orifices(draw: st.DrawFn) -> OrificeOutlet:
    shape, facing = draw(st.sampled_from(["round", "rectangle"])), draw(st.sampled_from(["down", "side"]))
    width = draw(sizes)
    height = width if shape == "round" else draw(sizes)
    return OrificeOutlet(
        "drain", shape, facing, width, height, 0.5, 1, 0.59, 0.61, 0.63, "unwin_1911", G,
        blocked=draw(st.sampled_from([0.0, 0.4])), viscosity=draw(viscosities), handbook=True,
    )  # fmt: skip


@st.composite
def pipes(draw: st.DrawFn) -> PipeOutlet:
    bore, length = draw(sizes), draw(st.floats(0.0, 30.0))
    fixed = draw(st.sampled_from([None, 0.02]))
    fittings = (NamedLoss("elbow", 0.5, 0.75, 0.9, draw(st.sampled_from([0.0, 800.0]))),)
    sections = [PipeSection(bore, length, (3e-5, 4.5e-5, 9e-5), fixed, fittings)]
    if draw(st.booleans()):
        sections.append(PipeSection(draw(sizes), draw(st.floats(0.0, 10.0)), (3e-5, 4.5e-5, 9e-5), fixed))
    entry = NamedLoss("entry", 0.4, 0.5, 0.6, draw(st.sampled_from([0.0, 160.0])))
    viscosity = draw(st.sampled_from([1e-6, 3e-5, 1e-3]))
    return PipeOutlet("line", "drain", 0.5, draw(st.floats(-2.0, 1.0)), tuple(sections), entry, G, viscosity)


@st.composite
def weirs(draw: st.DrawFn) -> Weir:
    form = draw(st.sampled_from(["rectangular", "vnotch", "broad_crested"]))
    given = draw(st.sampled_from([None, (0.55, 0.6, 0.65)]))
    width = draw(sizes)
    channel = draw(st.sampled_from([None, width, 2 * width]))
    return Weir(
        "weir", "drain", form, draw(st.sampled_from([0.0, 0.5])), G, width, draw(st.floats(0.3, 2.0)), channel, given
    )


@st.composite
def standpipes(draw: st.DrawFn) -> Standpipe:
    diameter = draw(sizes)
    line = None
    if draw(st.booleans()):
        section = PipeSection(diameter, 2.0, (3e-5, 4.5e-5, 9e-5))
        line = PipeOutlet("line", "drain", 0.5, -1.5, (section,), NamedLoss("entry", 0.4, 0.5, 0.6), G, 1e-6)
    return Standpipe("pipe", "overflow", diameter, 0.5, G, line)


OUTLETS = st.one_of(orifices(), pipes(), weirs(), standpipes())
PRESSED = st.one_of(orifices(), pipes())


def flow(outlet: Outlet, level: float, conditions: Conditions = FREE, end: int = TYPICAL) -> float:
    return float(outlet.flow(np.array([level]), outlet.coefficients[:, [end]], 1.0, conditions)[0])


@settings(max_examples=300, deadline=None)
@given(OUTLETS, levels, levels)
def test_more_level_never_passes_less(outlet: Outlet, one: float, other: float) -> None:
    low, high = sorted((one, other))
    assert flow(outlet, low) <= flow(outlet, high) * (1 + 1e-9)


@settings(max_examples=300, deadline=None)
@given(PRESSED, levels, st.floats(-1.0, 2.0), st.floats(-1.0, 2.0))
def test_more_pressure_never_passes_less(outlet: Outlet, level: float, one: float, other: float) -> None:
    low, high = sorted((one, other))
    less, more = (flow(outlet, level, Conditions(p, -np.inf)) for p in (low, high))
    assert less <= more * (1 + 1e-6) + 1e-12


@settings(max_examples=300, deadline=None)
@given(st.one_of(orifices(), weirs(), pipes()), levels, levels, levels)
def test_more_tailwater_never_lets_more_out(outlet: Outlet, level: float, one: float, other: float) -> None:
    low, high = sorted((one, other))
    # A free end keeps its kinetic energy, a drowned one loses it: in laminar flow the former counts double.
    assume(not isinstance(outlet, PipeOutlet) or low > outlet.discharge_elevation)
    more, less = (flow(outlet, level, Conditions(0.0, tail)) for tail in (low, high))
    assert less <= more + 1e-6 * abs(more) + 1e-12


@settings(max_examples=200, deadline=None)
@given(OUTLETS, levels)
def test_the_general_way_agrees_with_the_free_one(outlet: Outlet, level: float) -> None:
    assert flow(outlet, level, Conditions(0.0, -np.inf)) == pytest.approx(flow(outlet, level), rel=1e-7, abs=1e-13)


@settings(max_examples=200, deadline=None)
@given(OUTLETS, levels)
def test_the_ends_of_the_range_stand_on_both_sides(outlet: Outlet, level: float) -> None:
    low, typical, high = (flow(outlet, level, end=end) for end in (LOW, TYPICAL, HIGH))
    assert low <= typical * (1 + 1e-12) and typical <= high * (1 + 1e-12)


@settings(max_examples=200, deadline=None)
@given(OUTLETS, levels)
def test_nothing_flows_below_the_lower_edge(outlet: Outlet, level: float) -> None:
    assert flow(outlet, min(level, outlet.lower_edge)) == 0.0


@settings(max_examples=200, deadline=None)
@given(st.one_of(orifices(), weirs()), st.floats(0.5, 3.0), st.floats(0.5, 3.0))
def test_back_is_forth_the_other_way_round(outlet: Outlet, one: float, other: float) -> None:
    forth = flow(outlet, one, Conditions(0.0, other))
    assert flow(outlet, other, Conditions(0.0, one)) == pytest.approx(-forth, rel=1e-7, abs=1e-13)


@settings(max_examples=200, deadline=None)
@given(OUTLETS, levels)
def test_edges_hold_every_kink(outlet: Outlet, level: float) -> None:
    """Between two edges the slope changes slowly: a step of a millionth either way sees the same slope."""
    edges = outlet.edges(1.0, outlet.coefficients[:, TYPICAL])
    step = 1e-6
    assume(level > outlet.lower_edge + 0.01 and all(abs(level - edge) > 0.01 for edge in edges))
    before, here, after = (flow(outlet, level + d) for d in (-step, 0.0, step))
    assert after - here == pytest.approx(here - before, rel=2e-3, abs=1e-11)


@settings(max_examples=200, deadline=None)
@given(sizes, st.floats(0.0, 2.0), st.floats(0.01, 4.0))
def test_a_pipe_of_no_length_is_its_equivalent_orifice(bore: float, loss: float, head: float) -> None:
    section = PipeSection(bore, 0.0)
    pipe = PipeOutlet("line", "drain", 0.5, 0.5, (section,), NamedLoss("entry", loss, loss, loss), G, 1e-6)
    coefficient = (1 + loss) ** -0.5
    hole = OrificeOutlet("hole", "round", "down", bore, bore, 0.5, 1, *(coefficient,) * 3, "own_coefficient", G)
    assert flow(pipe, 0.5 + head) == pytest.approx(flow(hole, 0.5 + head), rel=1e-9)


@settings(max_examples=100, deadline=None)
@given(pipes(), st.floats(0.1, 0.9), levels)
def test_a_pipe_cut_in_two_is_the_same_pipe(pipe: PipeOutlet, share: float, level: float) -> None:
    first = pipe.sections[0]
    halves = (replace(first, length=share * first.length), replace(first, length=(1 - share) * first.length, losses=()))
    cut = replace(pipe, sections=(*halves, *pipe.sections[1:]))
    assert flow(cut, level) == pytest.approx(flow(pipe, level), rel=1e-9, abs=1e-15)


@settings(max_examples=200, deadline=None)
@given(pipes(), st.floats(0.001, 6.0))
def test_the_head_is_spent_to_the_last(pipe: PipeOutlet, head: float) -> None:
    row = pipe.coefficients[:, [TYPICAL]]
    speed = pipe.velocity(np.array([head]), row)
    assert pipe.head_loss(speed, row) == pytest.approx(head, rel=1e-11)


@settings(max_examples=100, deadline=None)
@given(OUTLETS, st.floats(0.6, 4.0), st.floats(1.0, 2.0))
def test_a_larger_outlet_passes_more(outlet: Outlet, level: float, scale: float) -> None:
    row = outlet.coefficients[:, [TYPICAL]]
    small, large = (float(outlet.flow(np.array([level]), row, s)[0]) for s in (1.0, scale))
    assert small <= large * (1 + 1e-9)
