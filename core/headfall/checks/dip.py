"""C17: the surface dips down to the opening and air goes out with the liquid."""

from __future__ import annotations

from collections.abc import Callable

import numpy as np
import numpy.typing as npt

from headfall.checks.finding import Finding, Grade
from headfall.checks.limits import limit
from headfall.quantities.display import DisplayUnits

Array = npt.NDArray[np.float64]

RULE = "C17"
_SEARCH_POINTS = 65
_SEARCH_ROUNDS = 4


def dip_depth(flow: Array, *, facing: str, gravity: float) -> Array:
    """Return the depth of liquid over an opening at which the surface is drawn down to it [m], the shape of ``flow``.

    ``flow`` is what one opening passes [m³/s]; ``facing`` is ``down`` (depth above its plane) or ``side`` (above its
    centre); ``gravity`` [m/s²]. h = k·(Q²/g)^0.2 with k of ``limits.json``, for liquid without swirl; swirl draws air
    from further above. Source: ``lubin_springer_1967``.
    """
    factor = limit("dip_downward" if facing == "down" else "dip_side").value
    return np.asarray(factor * (np.square(flow) / gravity) ** 0.2, dtype=np.float64)


def dip_level(flow_at: Callable[[Array], Array], *, facing: str, elevation: float, top: float, gravity: float) -> float:
    """Return the highest level at which the dip of the flow there reaches the opening [m].

    ``flow_at`` gives the flow through one opening [m³/s] for levels [m] of shape (n,); ``elevation`` is the plane of
    a downward opening and the centre of a side one [m]; ``top`` the highest level to look at [m], which is returned
    where the dip reaches the opening even there. Between elevation and top the dip is searched for from above, to
    1e-6 of that span. Source: ``lubin_springer_1967``.
    """
    low, high = elevation, top
    if high <= low:
        return elevation
    for _ in range(_SEARCH_ROUNDS):
        levels = np.linspace(low, high, _SEARCH_POINTS)
        # At the opening itself both sides are nil or the dip is the deeper one: the lowest point counts as reached.
        reached = levels - elevation <= dip_depth(flow_at(levels), facing=facing, gravity=gravity)
        reached[0] = True
        highest = int(np.flatnonzero(reached)[-1])
        if highest == _SEARCH_POINTS - 1:
            return float(levels[-1])
        low, high = float(levels[highest]), float(levels[highest + 1])
    return 0.5 * (low + high)


def check_dip(
    *,
    outlet: str,
    level: float,
    lowest: float,
    tolerance: float,
    display: DisplayUnits,
    runs_dry: bool = False,
    place: str = "levels.stop",
) -> list[Finding]:
    """Return a stop where the run goes below the dip level of one outlet, an attention where it only passes it.

    ``outlet`` is what the sentences call it, such as ``the outlet``; ``level`` is the one that ``dip_level`` finds for
    its typical flow [m], below which the run is not defended: the finding's limit; ``lowest`` the lowest level of the
    run [m]; levels that differ by no more than ``tolerance`` [m] are equal. ``runs_dry`` says that this outlet passes
    nothing there, while another one draws from further below: only the stretch above that is not defended then, and it
    is an attention. Source: ``lubin_springer_1967``.
    """
    grade, text, advice = _words(outlet, level, lowest, lowest < level - tolerance, runs_dry, display)
    return [
        Finding(
            rule=RULE,
            grade=grade,
            subject=f"air drawn into {outlet}",
            text=text,
            advice=advice,
            source="lubin_springer_1967",
            value=lowest,
            limit=level,
            kind="level",
            place=place,
        )
    ]


def _words(
    outlet: str, level: float, lowest: float, undefended: bool, runs_dry: bool, display: DisplayUnits
) -> tuple[Grade, str, str]:
    level_text, lowest_text = display.text(level, "level"), display.text(lowest, "level")
    basis = "It rests on the no-swirl dip, such as Lubin and Springer (1967), which is the best case"
    if undefended and runs_dry:
        text = f"From {level_text} down until {outlet} runs dry, air may be drawn into it."
        advice = f"{basis}: do not rely on that stretch. What follows rests on the lower outlets alone."
        return Grade.ATTENTION, text, advice
    if undefended:
        text = f"Below {level_text} air may be drawn into {outlet}; the run's lowest level is {lowest_text}."
        advice = (
            f"{basis}: do not rely on the run below {level_text}, and a swirl draws air from further above. "
            f"Set the stop level at {level_text}, or count on a longer time; fit a vortex breaker against swirl."
        )
        return Grade.STOP, text, advice
    text = (
        f"The run stays at or above {lowest_text}, the dip of {outlet} begins at {level_text}; no caution is raised by "
        "this check."
    )
    return Grade.NO_CAUTION, text, f"{basis}: a swirl can draw air from further above."
