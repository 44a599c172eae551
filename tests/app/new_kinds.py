"""Cases of every newer kind of vessel, outlet and surroundings, for the tests of the picture."""

from __future__ import annotations

from typing import Any

from headfall.case.model import Case
from headfall.quantities import display_units
from headfall.study import solve
from headfall_app.paint.layout import Frame
from headfall_app.paint.pipe_run import Run, pipe_run
from headfall_app.paint.scene import Scene, scene_of

from .test_paint_layout import case_of

SIZES = ((1056, 602), (944, 430), (1576, 760), (896, 400))
TANK = {"shape": "upright_cylinder", "diameter": "2.4 m", "height": "3 m"}
LEVELS = {"start": "2.5 m", "stop": "0.5 m"}
PIPE = {"name": "line", "kind": "pipe", "bore": "100 mm", "length": "8 m"}
HOLE = {"name": "hole", "kind": "orifice", "opening": {"form": "round", "diameter": "80 mm"}}
LOW_TANK = {"vessel": {"shape": "upright_cylinder", "diameter": "2 m", "height": "2.5 m"}, "elevation": "-1.2 m"}
DRUM = {"shape": "drum", "diameter": "2 m", "length": "5.6 m", "heads": {"form": "torispherical"}, "fall": "150 mm"}
STANDPIPE = {"name": "overflow", "kind": "weir", "form": "standpipe", "diameter": "150 mm", "crest": "2.6 m"}
NOTCH = {"name": "notch", "kind": "weir", "form": "vnotch", "angle": "90 deg", "crest": "2.0 m"}


def tank(*outlets: dict[str, Any], levels: dict[str, str] | None = None, **more: Any) -> Case:
    """Return a case of an open upright tank."""
    return case_of(TANK, LEVELS | (levels or {}), outlets=list(outlets), **more)


CASES = {
    "pipe that falls": tank(PIPE | {"discharge_elevation": "-1.1 m", "valve": {"kv": 80}}),
    "pipe through the wall": tank(PIPE | {"elevation": "0.3 m", "discharge_elevation": "-0.8 m"}),
    "pipe that rises": tank(
        PIPE | {"elevation": "0.2 m", "discharge_elevation": "1.2 m", "tailwater": "1.4 m"}, levels={"stop": "1.5 m"}
    ),
    "pipe under water": tank(PIPE | {"discharge_elevation": "-2 m", "tailwater": "-1.4 m"}),
    "pipe of two bores": tank(
        PIPE | {"bore": "150 mm", "discharge_elevation": "-2 m", "sections": [{"bore": "80 mm", "length": "4 m"}]}
    ),
    "long drop": tank(PIPE | {"discharge_elevation": "-25 m", "tailwater": "-24 m"}),
    "drum with a fall": case_of(
        DRUM,
        {"start": "80 %", "stop": "103 mm"},
        outlets=[PIPE | {"bore": "NPS 4 sch 40", "discharge_elevation": "-1.2 m", "station": "300 mm"}],
        headspace={"kind": "vented", "bore": "80 mm"},
    ),
    "two tanks": tank(HOLE | {"tailwater": LOW_TANK | {"level": "-1 m"}}, levels={"stop": "1.2 m"}),
    "two tanks, pipe": tank(
        PIPE | {"elevation": "0.3 m", "discharge_elevation": "-1 m", "tailwater": LOW_TANK | {"level": "-1 m"}},
        levels={"stop": "1.2 m"},
    ),
    "two tanks, side": tank(
        HOLE | {"facing": "side", "elevation": "0.3 m", "tailwater": LOW_TANK | {"elevation": "0 m", "level": "0.2 m"}},
        levels={"stop": "1.6 m"},
    ),
    "standpipe": tank(HOLE, STANDPIPE | {"role": "overflow"}, inflow={"kind": "steady", "rate": "25 L/s"}),
    "standpipe that runs down": tank(HOLE, STANDPIPE | {"crest": "1.6 m", "discharge_elevation": "-1 m"}),
    "notch": tank(NOTCH, levels={"stop": "2.1 m"}, inflow={"kind": "steady", "rate": "2 L/s"}),
    "side under water": tank(HOLE | {"facing": "side", "elevation": "0.3 m", "tailwater": "0.6 m"}),
    "closed": tank(HOLE, headspace={"kind": "closed"}),
    "several": tank(
        PIPE | {"name": "north", "bore": "80 mm", "discharge_elevation": "-1 m"},
        PIPE | {"name": "south", "bore": "80 mm", "discharge_elevation": "-1.5 m"},
        HOLE,
    ),
}
PIPED = [name for name, case in CASES.items() if any(outlet.kind == "pipe" for outlet in case.outlets)]
RECEIVED = ["two tanks", "two tanks, pipe", "two tanks, side"]


def shown(name: str, share: float = 0.35) -> Scene:
    """Return the scene of one of the cases, a share of the run after its start."""
    answers = solve(CASES[name])
    return scene_of(answers, display_units("metric"), now=share * float(answers.curve.time[-1]))


def pipes(frame: Frame, scene: Scene) -> list[Run]:
    return [pipe_run(frame, scene, outlet) for outlet in scene.outlets if outlet.facing == "pipe"]
