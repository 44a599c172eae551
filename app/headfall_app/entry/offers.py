"""Names offered while one is typed: fittings of the handbook, and listed sizes for a bore."""

from __future__ import annotations

from functools import cache

from PySide6.QtCore import QStringListModel, Qt
from PySide6.QtWidgets import QCompleter

from headfall.outlet.handbook_losses import fittings
from headfall.quantities.listed_bores import pipe_series, series_of
from headfall.resources import read_resource
from headfall_app.entry.line import EntryLine
from headfall_app.entry.plan_rows import Row
from headfall_app.paint.fonts import font

_SHOWN, _WIDTH = 10, 190


def offer(line: EntryLine, row: Row) -> None:
    """Let a line offer the names that can be typed into its entry; of most entries there are none."""
    if (
        row.path[-2:-1]
        and isinstance(row.path[-2], int)
        and row.path[-3:-2] == ("fittings",)
        and row.path[-1] == "name"
    ):
        line.offer(_completer(fitting_names(), line))
    elif row.dimension == "bore":
        line.offer(_completer(bore_names(), line))


@cache
def fitting_names() -> tuple[str, ...]:
    """Return the names of the handbook's fittings."""
    return tuple(fitting.name for fitting in fittings())


@cache
def bore_names() -> tuple[str, ...]:
    """Return the listed sizes as they are typed: steel and stainless pipe, hygienic tube, plastic pipe."""
    data = read_resource("pipe_sizes.json")
    steel = [
        f"NPS {row['nps']} sch {schedule}"
        for key in ("steel", "stainless")
        for row in data[key]["sizes"]
        for schedule in row["walls"]
    ]
    hygienic = [
        size.name for key, _, example in pipe_series() if key.startswith("hygienic") for size in series_of(example)
    ]
    plastic = [f"{size[0]} mm SDR {ratio}" for ratio, rows in data["plastic"]["series"].items() for size in rows]
    return (*dict.fromkeys(steel), *hygienic, *plastic)


@cache
def _model(names: tuple[str, ...]) -> QStringListModel:
    return QStringListModel(list(names))


def _completer(names: tuple[str, ...], line: EntryLine) -> QCompleter:
    completer = QCompleter(line)
    completer.setModel(_model(names))
    completer.setCaseSensitivity(Qt.CaseSensitivity.CaseInsensitive)
    completer.setFilterMode(Qt.MatchFlag.MatchContains)
    completer.setMaxVisibleItems(_SHOWN)
    popup = completer.popup()
    assert popup is not None
    popup.setFont(font(13))
    popup.setMinimumWidth(_WIDTH)
    return completer
