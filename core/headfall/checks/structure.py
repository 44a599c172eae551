"""C35: pressure at the base, weight of the liquid and a screen of the hoop stress."""

from __future__ import annotations

from headfall.checks.finding import Finding, Grade
from headfall.checks.limits import limit
from headfall.quantities.display import DisplayUnits

RULE = "C35"
_SHELL = "hoop stress"
_THICKNESS = "structure.shell_thickness"
_DECIDES = (
    "Shell, floor and supports are a structural engineer's decision, with rules such as EN 14015, API 650, EN 13445 or "
    "ASME VIII."
)


def liquid_pressure(*, density: float, gravity: float, depth: float) -> float:
    """Return the gauge pressure ρ·g·h under a depth of liquid [Pa].

    ``density`` [kg/m³], ``gravity`` [m/s²], ``depth`` [m]. Source: ``hydrostatics``.
    """
    return density * gravity * depth


def hoop_stress(*, shape: str, pressure: float, diameter: float, thickness: float, joint_efficiency: float) -> float:
    """Return the membrane stress of a thin shell [Pa].

    ``pressure`` [Pa], ``diameter`` and ``thickness`` [m], ``joint_efficiency`` [1]. σ = p·D/(2·t·E) for the
    cylinders ``upright_cylinder`` and ``drum``, p·D/(4·t·E) for ``sphere``; valid for t/D below 0.05, away from
    joints, heads and supports. Raises KeyError for another shape. Source: ``thin_shell``.
    """
    divisor = {"upright_cylinder": 2.0, "drum": 2.0, "sphere": 4.0}[shape]
    return pressure * diameter / (divisor * thickness * joint_efficiency)


def check_base_load(
    *,
    density: float,
    gravity: float,
    start: float,
    overflow: float,
    overflow_volume: float,
    empty_mass: float | None,
    display: DisplayUnits,
) -> list[Finding]:
    """Return the pressure at the lowest point and the weight of the liquid, both with liquid at overflow.

    ``density`` [kg/m³], ``gravity`` [m/s²], levels ``start`` and ``overflow`` [m], ``overflow_volume`` [m³],
    ``empty_mass`` of the vessel [kg] or None where it was not entered. No limit is entered for either, so neither is
    compared: they are there for whoever designs the base. Source: ``hydrostatics``.
    """
    pressure = liquid_pressure(density=density, gravity=gravity, depth=overflow)
    at_start = liquid_pressure(density=density, gravity=gravity, depth=start)
    liquid = density * gravity * overflow_volume
    base = Finding(
        rule=RULE,
        grade=Grade.NO_CAUTION,
        subject="pressure at the base",
        text=f"The lowest point carries {display.text(pressure, 'pressure')} of liquid at overflow and "
        f"{display.text(at_start, 'pressure')} at start; no limit is entered to compare with.",
        advice=f"It rests on still liquid alone, without the gas above it. {_DECIDES}",
        source="hydrostatics",
        value=pressure,
        kind="pressure",
        place="levels.overflow",
    )
    return [base, _weight(liquid, None if empty_mass is None else empty_mass * gravity, display)]


def _weight(liquid: float, empty: float | None, display: DisplayUnits) -> Finding:
    liquid_text = display.text(liquid, "force")
    if empty is None:
        return Finding(
            rule=RULE,
            grade=Grade.NOT_CHECKED,
            subject="weight on the base",
            text=f"Full to overflow the liquid weighs {liquid_text}; the vessel's own weight is not entered.",
            advice=f"Enter the empty mass to have it added. {_DECIDES}",
            source="hydrostatics",
            value=liquid,
            kind="force",
            place="structure.empty_mass",
            needs="empty mass",
        )
    return Finding(
        rule=RULE,
        grade=Grade.NOTE,
        subject="weight on the base",
        text=f"Full to overflow the vessel weighs {display.text(liquid + empty, 'force')}, {liquid_text} of it liquid.",
        advice=f"How supports share it, wind, settlement and earthquake are not in it. {_DECIDES}",
        source="hydrostatics",
        value=liquid + empty,
        kind="force",
        place="structure.empty_mass",
    )


def check_hoop_stress(
    *,
    shape: str,
    diameter: float | None,
    pressure: float,
    thickness: float | None,
    allowable: float | None,
    joint_efficiency: float,
    display: DisplayUnits,
) -> list[Finding]:
    """Return the hoop screen of a cylinder, a drum or a sphere; not checked where the screen does not apply.

    ``shape`` and ``diameter`` [m] of the vessel (None where it has no one diameter); ``pressure`` at its lowest point
    with liquid at overflow, that of the gas included [Pa]; ``thickness`` of the shell [m] and ``allowable`` stress
    [Pa], None where not entered; ``joint_efficiency`` [1]. Attention above 0.6 of the allowable stress.
    Source: ``thin_shell``.
    """
    if shape not in ("upright_cylinder", "drum", "sphere") or diameter is None:
        form = {"box": "Flat walls need a plate calculation", "cone": "A conical shell needs a calculation of its own"}
        reason = f"{form.get(shape, 'This shape needs a calculation of its own')}; the hoop screen does not apply."
        return [_not_made(reason, needs="plate calculation" if shape == "box" else "shell calculation", place="vessel")]
    if thickness is None:
        return [_not_made("No shell thickness is entered.", needs="shell thickness", place=_THICKNESS)]
    thin = limit("thin_shell").value
    if thickness / diameter >= thin:
        reason = (
            f"A shell of {display.text(thickness, 'bore')} on {display.text(diameter, 'length')} is not thin; the "
            f"screen ends at {thin:g} of the diameter."
        )
        return [_not_made(reason, needs="thick-shell calculation", place=_THICKNESS)]
    stress = hoop_stress(
        shape=shape, pressure=pressure, diameter=diameter, thickness=thickness, joint_efficiency=joint_efficiency
    )
    if allowable is None:
        reason = f"The hoop stress is {display.text(stress, 'stress')}; no allowable stress is entered to compare with."
        return [_not_made(reason, needs="allowable stress", place="structure.allowable_stress", stress=stress)]
    return [_compared(stress, allowable, display)]


def _not_made(reason: str, *, needs: str, place: str, stress: float | None = None) -> Finding:
    return Finding(
        rule=RULE,
        grade=Grade.NOT_CHECKED,
        subject=_SHELL,
        text=reason,
        advice=_DECIDES,
        source="thin_shell",
        value=stress,
        kind="" if stress is None else "stress",
        place=place,
        needs=needs,
    )


def _compared(stress: float, allowable: float, display: DisplayUnits) -> Finding:
    bound = limit("hoop_attention").value * allowable
    figures = f"The hoop stress is {display.text(stress, 'stress')}"
    allowed = f"the allowable {display.text(allowable, 'stress')}"
    grade = Grade.ATTENTION
    if stress > allowable:
        text = f"{figures}, above {allowed}."
    elif stress > bound:
        text = f"{figures}, {display.text(stress / allowable, 'ratio')} of {allowed}."
    else:
        grade = Grade.NO_CAUTION
        text = f"{figures}, not above 0.6 of {allowed}; no caution is raised by this check."
    return Finding(
        rule=RULE,
        grade=grade,
        subject=_SHELL,
        text=text,
        advice=f"A screen only: the pressure inside on a thin shell, without corrosion, wind, buckling, nozzles or "
        f"supports. {_DECIDES}",
        source="thin_shell",
        value=stress,
        limit=bound,
        kind="stress",
        place=_THICKNESS,
    )
