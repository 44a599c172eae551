"""Cases for the sizing sheet: one a shape, an ending and a system of units. All places and tags are invented."""

from __future__ import annotations

import json
from functools import cache
from typing import Any

from headfall.answers import Answers
from headfall.files import case_from_text
from headfall.study import solve

Data = dict[str, Any]

REMARKS = " ".join(["The drum is emptied before each change of product, and the time is part of the wash plan."] * 25)
LONG_TITLE = "Rinse drum of the second wash line at the batch house, rebuilt after the survey, with six outlets in all"


def _outlet(diameter: str, elevation: str = "0 m", facing: str = "down", name: str = "drain") -> Data:
    opening = {"form": "round", "diameter": diameter}
    return {
        "name": name,
        "kind": "orifice",
        "entry": "sharp_edged",
        "facing": facing,
        "opening": opening,
        "elevation": elevation,
    }


def _case(vessel: Data, outlets: list[Data], levels: str, inflow: str = "0 L/s", **more: Any) -> str:
    start, stop, *overflow = levels.split(", ")
    data = {
        "headfall": 1,
        "title": "Rinse drum",
        "tag": "T-12",
        "revision": "C",
        "date": "2031-04-02",
        "author": "A. Example",
        "site": "Quillhaven batch house",
        "vessel": vessel,
        "outlets": outlets,
        "inflow": {"kind": "steady", "rate": inflow},
        "headspace": {"kind": "open"},
        "levels": {"start": start, "stop": stop, **({"overflow": overflow[0]} if overflow else {})},
        **more,
    }
    return json.dumps(data)


def _drum(heads: Any) -> Data:
    return {"shape": "drum", "diameter": "2000 mm", "length": "5600 mm", "heads": heads}


def _cylinder(**floor: Any) -> Data:
    return {"shape": "upright_cylinder", "diameter": "2.4 m", "height": "3 m", "floor": {"form": "flat", **floor}}


def _cone(top: str, bottom: str) -> Data:
    return {"shape": "cone", "top_diameter": top, "bottom_diameter": bottom, "height": "2.5 m"}


_TORISPHERICAL = {"form": "torispherical", "crown_ratio": 1, "knuckle_ratio": 0.1}
_DRUM, _SPHERE = _drum(_TORISPHERICAL), {"shape": "sphere", "diameter": "3 m"}
_IN_25_MINUTES = {"drain_time": "25 min"}
_SIX = [_outlet("40 mm", name=f"drain {number}") for number in range(1, 4)] + [
    _outlet("50 mm", f"0.{number} m", "side", f"branch {number}") for number in range(1, 4)
]

CASES = {
    "drum with inflow": _case(_DRUM, [_outlet("80 mm")], "1.8 m, 100 mm, 1.95 m", "3 L/s", target=_IN_25_MINUTES),
    "drum": _case(_DRUM, [_outlet("80 mm")], "1.8 m, 100 mm, 1.95 m", target=_IN_25_MINUTES),
    "full drum to its lowest point": _case(_DRUM, [_outlet("80 mm")], "2 m, 0 m"),
    "drum with flat heads": _case(_drum({"form": "flat"}), [_outlet("80 mm")], "1.8 m, 0.1 m", target=_IN_25_MINUTES),
    "drum with two heads": _case(
        _drum([{"form": "ellipsoidal"}, {"form": "hemispherical"}]), [_outlet("80 mm")], "1.8 m, 0.1 m"
    ),
    "drum, raised outlet": _case(_DRUM, [_outlet("80 mm", "50 mm")], "1.8 m, 0.1 m"),
    "cylinder": _case(_cylinder(), [_outlet("50 mm")], "2.8 m, 0.1 m, 2.9 m", target={"drain_time": "20 min"}),
    "cylinder with inflow": _case(
        _cylinder(), [_outlet("50 mm")], "2.8 m, 0.1 m, 2.9 m", "1 L/s", target={"drain_time": "60 min"}
    ),
    "cylinder close to rest": _case(_cylinder(), [_outlet("50 mm")], "2.8 m, 0.3486 m", "3.131 L/s"),
    "cylinder to its floor": _case(_cylinder(), [_outlet("50 mm")], "2.8 m, 0 m"),
    "cylinder on a cone": _case(_cylinder(form="cone", depth="600 mm"), [_outlet("50 mm")], "2.8 m, 0 m"),
    "cylinder on a dished floor": _case(_cylinder(form="torispherical"), [_outlet("50 mm")], "2.8 m, 0.1 m", "1 L/s"),
    "box with two drains": _case(
        {"shape": "box", "length": "4 m", "width": "2 m", "height": "1.5 m"},
        [_outlet("40 mm"), _outlet("60 mm", name="second")],
        "1.4 m, 0.05 m",
    ),
    "cone": _case(_cone("3 m", "0 m"), [_outlet("60 mm")], "2.4 m, 0.2 m", target={"drain_time": "10 min"}),
    "frustum, wide below": _case(_cone("1 m", "3 m"), [_outlet("60 mm")], "2.4 m, 0.2 m"),
    "frustum with inflow": _case(
        _cone("3 m", "0.5 m"), [_outlet("60 mm")], "2.4 m, 0.2 m", "2 L/s", target={"drain_time": "30 min"}
    ),
    "sphere": _case(_SPHERE, [_outlet("60 mm")], "2.9 m, 0.1 m"),
    "sphere with inflow": _case(_SPHERE, [_outlet("60 mm")], "2.9 m, 0.2 m", "3 L/s"),
    "side outlet": _case(_cylinder(), [_outlet("80 mm", "0.3 m", "side")], "2.8 m, 0.3 m"),
    "side outlet to its edge": _case(_cylinder(), [_outlet("80 mm", "0.3 m", "side")], "2.8 m, 0.262 m"),
    "fills": _case(_DRUM, [_outlet("80 mm")], "0.1 m, 1.8 m, 1.95 m", "25 L/s"),
    "overflows": _case(_DRUM, [_outlet("80 mm")], "1.8 m, 100 mm, 1.95 m", "25 L/s", target=_IN_25_MINUTES),
    "never reached": _case(_DRUM, [_outlet("80 mm")], "1.8 m, 100 mm, 1.95 m", "8 L/s", target=_IN_25_MINUTES),
    "heel": _case(_cylinder(), [_outlet("80 mm", "0.3 m", "side")], "2.8 m, 0.1 m", target={"drain_time": "10 min"}),
    "six outlets": _case(
        _DRUM, _SIX, "1.8 m, 100 mm", "2 L/s", target={"drain_time": "30 min"}, title=LONG_TITLE, remarks=REMARKS
    ),
    "US units": _case(
        {"shape": "upright_cylinder", "diameter": "8 ft", "height": "10 ft"},
        [_outlet("2 in")],
        "9 ft 2 1/8 in, 4 in, 9.5 ft",
        "10 US gal/min",
        units="us",
        target={"drain_time": "30 min"},
        structure={"shell_thickness": "1/4 in", "allowable_stress": "20 ksi"},
    ),
    "least typed": json.dumps(
        {
            "headfall": 1,
            "vessel": {"shape": "upright_cylinder", "diameter": "2.4 m", "height": "3 m"},
            "outlets": [
                {"kind": "orifice", "opening": {"form": "rectangle", "width": "60 mm", "height": "40 mm"}, "count": 2}
            ],
            "levels": {"start": "2.8 m", "stop": "0.1 m"},
        }
    ),
}
WITHOUT_A_TIME = ("never reached", "heel")


@cache
def answers_to(name: str) -> Answers:
    """The answers to a case, solved once."""
    return solve(case_from_text(CASES[name]))
