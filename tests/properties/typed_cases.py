"""Cases as a person might type them, for the laws of reading, writing and changing a case."""

from __future__ import annotations

from typing import Any

from hypothesis import strategies as st


def quantities(units: list[str], low: float = 0.1, high: float = 50) -> st.SearchStrategy[str]:
    numbers = st.floats(low, high).map(lambda value: f"{value:.4g}") | st.sampled_from(["1/2", "3 1/8", "2,5", "7"])
    return st.builds(
        lambda number, gap, unit: f"{number}{gap}{unit}", numbers, st.sampled_from([" ", "  "]), st.sampled_from(units)
    )


LENGTHS = quantities(["m", "mm", "ft", "in", "cm"])
TEXTS = st.text(st.characters(exclude_categories=["Cs"]), max_size=20)
ENDS = st.one_of(
    st.just({"form": "flat"}),
    st.fixed_dictionaries({"form": st.just("cone"), "depth": LENGTHS}),
    st.fixed_dictionaries({"form": st.just("ellipsoidal")}, optional={"ratio": st.integers(1, 4) | st.floats(1, 4)}),
    st.fixed_dictionaries(
        {"form": st.just("torispherical")},
        optional={"crown_ratio": st.floats(0.6, 2), "knuckle_ratio": st.floats(0.02, 0.5)},
    ),
    st.just({"form": "hemispherical"}),
)


def sized(shape: str, *names: str, **optional: st.SearchStrategy[Any]) -> st.SearchStrategy[dict[str, Any]]:
    sizes: dict[str, st.SearchStrategy[Any]] = {"shape": st.just(shape), **dict.fromkeys(names, LENGTHS)}
    return st.fixed_dictionaries(sizes, optional=optional)


WALLS: dict[str, st.SearchStrategy[Any]] = {
    "sizes": st.sampled_from(["inside", "outside"]),
    "wall": LENGTHS,
    "lining": st.just("0 mm"),
    "displacement": st.lists(
        st.fixed_dictionaries(
            {"from": st.just("0 in"), "to": LENGTHS, "volume": quantities(["L", "US gal", "m³"])},
        ),
        max_size=2,
    ),
}
SLOPED = st.fixed_dictionaries({"form": st.just("sloped"), "fall": LENGTHS})
SLOPES = st.integers(1, 4) | st.floats(0.5, 4)
BASINS = st.fixed_dictionaries(
    {
        "shape": st.just("basin"),
        **dict.fromkeys(("base_length", "base_width", "depth"), LENGTHS),
        "side_slope": SLOPES | st.lists(SLOPES, min_size=2, max_size=2),
    },
    optional={"displacement": WALLS["displacement"]},
)
RISING = st.lists(st.integers(1, 5000), min_size=1, max_size=5, unique=True).map(lambda steps: [0, *sorted(steps)])


def table(column: str, unit: str, **optional: st.SearchStrategy[Any]) -> st.SearchStrategy[dict[str, Any]]:
    rows = RISING.map(lambda steps: [[f"{step} mm", f"{step * 3 + 1} {unit}"] for step in steps])
    return st.fixed_dictionaries(
        {"shape": st.just("table"), "column": st.just(column), "rows": rows}, optional=dict(optional)
    )


TABLES = st.one_of(
    table("area", "ft²", between=st.sampled_from(["linear", "conic"])),
    table("volume", "L", between=st.just("linear")),
    table("increment", "US gal"),
)
PARTS = st.one_of(
    sized("upright_cylinder", "diameter", "height", floor=ENDS | SLOPED, **WALLS),
    sized("box", "length", "width", "height", floor=SLOPED | st.just({"form": "flat"}), **WALLS),
    sized("cone", "top_diameter", "bottom_diameter", "height", **WALLS),
    sized("sphere", "diameter", **WALLS),
    BASINS,
    TABLES,
)
DRUMS = sized(
    "drum", "diameter", "length", heads=ENDS | st.lists(ENDS, min_size=2, max_size=2), fall=st.just("0 mm"), **WALLS
)
STACKS = st.fixed_dictionaries(
    {"shape": st.just("stack"), "parts": st.lists(PARTS, min_size=1, max_size=3)},
    optional={"displacement": WALLS["displacement"]},
)
VESSELS = st.one_of(PARTS, DRUMS, STACKS)
COEFFICIENTS = st.just("handbook") | st.lists(st.floats(0.1, 1.5), min_size=3, max_size=3).map(
    lambda range_: dict(zip(("low", "typical", "high"), sorted(range_), strict=True))
)
RANGES = st.lists(st.integers(0, 5) | st.floats(0, 5), min_size=3, max_size=3).map(
    lambda range_: dict(zip(("low", "typical", "high"), sorted(range_), strict=True))
)
LOSSES = st.floats(0, 5) | st.integers(0, 5) | RANGES
BORES = LENGTHS | st.just("NPS 4 sch 40")
RECEIVERS = st.fixed_dictionaries(
    {"vessel": VESSELS, "elevation": st.just("-20 m"), "level": st.sampled_from(["-20 m", "-65 ft 2 in"])}
)
SHARED: dict[str, st.SearchStrategy[Any]] = {
    "name": TEXTS,
    "count": st.integers(1, 10000),
    "role": st.sampled_from(["drain", "overflow"]),
    "blocked": st.just(0) | st.floats(0, 1),
    "tailwater": LENGTHS | st.just("-2 m") | RECEIVERS,
}
ORIFICES = st.fixed_dictionaries(
    {
        "kind": st.just("orifice"),
        "opening": st.fixed_dictionaries({"form": st.just("round"), "diameter": LENGTHS})
        | st.fixed_dictionaries({"form": st.just("rectangle"), "width": LENGTHS, "height": LENGTHS}),
    },
    optional={
        **SHARED,
        "entry": st.sampled_from(["sharp_edged", "square_edged", "bellmouth", "reentrant_free"]),
        "facing": st.sampled_from(["down", "side"]),
        "elevation": LENGTHS,
        "coefficient": COEFFICIENTS,
    },
)
RUNS: dict[str, st.SearchStrategy[Any]] = {
    "material": st.just("concrete"),
    "fittings": st.lists(
        st.fixed_dictionaries(
            {"name": TEXTS, "loss": LOSSES}, optional={"laminar_loss": st.floats(0, 1000), "count": st.integers(1, 9)}
        ),
        max_size=3,
    ),
    "valve": st.fixed_dictionaries(
        {}, optional={"opening": st.floats(0, 1), "characteristic": st.just("equal_percentage")}
    ).flatmap(lambda rest: st.sampled_from([{"kv": 40, **rest}, {"cv": 12.5, **rest}])),
}
FRICTION = st.sampled_from([{}, {"roughness": "0.05 mm"}, {"friction_factor": 0.02}])
PIPES = st.builds(
    lambda pipe, friction: {**pipe, **friction},
    st.fixed_dictionaries(
        {"kind": st.just("pipe"), "bore": BORES},
        optional={
            **SHARED,
            **RUNS,
            "entry": st.sampled_from(["sharp_edged", "bellmouth"]),
            "entry_loss": LOSSES,
            "length": LENGTHS,
            "elevation": LENGTHS,
            "discharge_elevation": st.just("-2 m"),
            "sections": st.lists(st.fixed_dictionaries({"bore": BORES, "length": LENGTHS}, optional=RUNS), max_size=2),
        },
    ),
    FRICTION,
)
WEIR_SIZES = st.sampled_from(
    [
        {"form": "rectangular", "width": "1 ft"},
        {"form": "rectangular", "width": "1 m", "channel_width": "2 m"},
        {"form": "vnotch", "angle": "60 deg"},
        {"form": "broad_crested", "width": "7 in"},
        {"form": "standpipe", "diameter": "NPS 4 sch 40", "discharge_elevation": "-1 m"},
        {"form": "standpipe", "diameter": "0.1 m", "roughness": "1 mm"},
    ]
)
WEIRS = st.builds(
    lambda weir, sizes: {**weir, **sizes},
    st.fixed_dictionaries(
        {"kind": st.just("weir"), "crest": LENGTHS}, optional={**SHARED, "coefficient": COEFFICIENTS}
    ),
    WEIR_SIZES,
)
OUTLETS = st.one_of(ORIFICES, PIPES, WEIRS)
LEVELS = LENGTHS | st.sampled_from(["80 %", "15 m³", "200 US gal", "12.5%"])
PROPERTIES = st.lists(st.integers(0, 90), min_size=1, max_size=4, unique=True).map(
    lambda degrees: [[f"{degree} degC", "900 kg/m³", "30 cSt", "1 kPa"][: 3 + degree % 2] for degree in sorted(degrees)]
)
LIQUIDS = st.one_of(
    st.fixed_dictionaries(
        {},
        optional={
            "name": st.just("water"),
            "temperature": st.just("60 degF"),
            "also_at": st.lists(st.sampled_from(["5 degC", "40 degC"]), max_size=2),
        },
    ),
    st.fixed_dictionaries(
        {"density": st.just("62 lb/ft³"), "viscosity": st.sampled_from(["1 cP", "30 cSt"])},
        optional={"name": TEXTS, "temperature": st.just("5 degC"), "vapour_pressure": st.just("0 Pa")},
    ),
    st.fixed_dictionaries({"name": TEXTS, "properties": PROPERTIES}, optional={"also_at": st.just(["15 degC"])}),
)
HEADSPACES = st.one_of(
    st.sampled_from([{"kind": "open"}, {"kind": "closed"}, {"kind": "pressurised", "gauge_pressure": "-1 kPa"}]),
    st.fixed_dictionaries({"kind": st.just("vented"), "bore": BORES}, optional={"coefficient": st.floats(0.5, 1)}),
)
CASES = st.fixed_dictionaries(
    {
        "headfall": st.just(1),
        "vessel": VESSELS,
        "outlets": st.lists(OUTLETS, min_size=1, max_size=3),
        "levels": st.fixed_dictionaries(
            {"start": LEVELS, "stop": LEVELS},
            optional={
                "high": LEVELS,
                "site_datum": st.just("-3 m"),
                "shown": st.sampled_from(["height", "percent", "volume"]),
            },
        ),
    },
    optional={
        "title": TEXTS,
        "remarks": TEXTS,
        "units": st.sampled_from(["metric", "us"]),
        "liquid": LIQUIDS,
        "inflow": st.fixed_dictionaries(
            {"kind": st.just("steady")}, optional={"rate": quantities(["L/s", "US gal/min"])}
        ),
        "headspace": HEADSPACES,
        "target": st.fixed_dictionaries(
            {},
            optional={
                "drain_time": quantities(["min", "s", "h"]),
                "highest_level": LEVELS,
                "flow_at": st.fixed_dictionaries({"level": LEVELS, "flow": quantities(["L/s"])}),
            },
        ),
        "tables": st.fixed_dictionaries(
            {}, optional={"times": st.lists(quantities(["min", "h"]), max_size=3), "level_step": LENGTHS}
        ),
        "structure": st.fixed_dictionaries(
            {}, optional={"shell_thickness": LENGTHS, "joint_efficiency": st.floats(0.1, 1)}
        ),
        "surroundings": st.fixed_dictionaries({}, optional={"gravity": quantities(["m/s^2"])}),
        "field_tests": st.just([]),
    },
)
JUNK = st.recursive(
    st.none() | st.booleans() | st.integers() | st.floats() | st.text(max_size=12) | LENGTHS,
    lambda inner: st.lists(inner, max_size=3) | st.dictionaries(st.text(max_size=8), inner, max_size=4),
    max_leaves=12,
)
