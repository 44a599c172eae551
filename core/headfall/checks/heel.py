"""C31: liquid that no outlet draws."""

from __future__ import annotations

from headfall.checks.finding import Finding, Grade
from headfall.checks.wording import edge_words
from headfall.quantities.display import DisplayUnits

RULE = "C31"
_TRIVIAL = 1e-5


def check_heel(
    *,
    level: float,
    volume: float,
    capacity: float,
    form: str,
    start: float,
    stop: float,
    display: DisplayUnits,
    place: str,
) -> list[Finding]:
    """Return an attention where liquid stays below the lowest outlet and the run is to go down to it or further.

    ``level`` is where the lowest outlet runs dry [m]: the plane of a ``down`` opening, the lower edge of a ``side``
    one, the inlet of a ``pipe``, the discharging end of a ``rising_pipe``, the crest of a ``weir`` (``form``);
    ``volume`` what stays below it [m³], of the ``capacity`` [m³] of the vessel: a hundred-thousandth of it
    raises no caution (common practice); ``start`` and ``stop`` of the run [m]; ``place`` the entry that sets the level,
    such as ``outlets[0].elevation``. With a higher stop the rest is a note. Source: ``volume_balance``.
    """
    where = display.text(level, "level")
    if volume <= _TRIVIAL * capacity:
        grade = Grade.NO_CAUTION
        text = "No liquid stays below the lowest outlet; no caution is raised by this check."
        advice = "What clings to the wall or stands in pockets is not counted."
    else:
        grade = Grade.ATTENTION if stop <= min(level, start) else Grade.NOTE
        text = f"{display.text(volume, 'volume')} stays below {edge_words(form)}, {where}."
        advice = "No outlet draws it. Take it out another way, or set the outlet lower."
    return [
        Finding(
            rule=RULE,
            grade=grade,
            subject="liquid left below the lowest outlet",
            text=text,
            advice=advice,
            source="volume_balance",
            value=max(volume, 0.0),
            limit=0.0,
            kind="volume",
            place=place,
        )
    ]
