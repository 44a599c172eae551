"""The top of the project stays the short list it is."""

from __future__ import annotations

from tests.rules.source_files import PROJECT

BELONGS = {"README.md", "DEVELOPERS.md", "pyproject.toml", "app", "core", "tests", "resources", "packaging"}
MADE_ON_THE_WAY = {"build", "dist", "__pycache__"}


def test_the_top_level_holds_what_belongs_there_and_nothing_else() -> None:
    found = {
        entry.name
        for entry in PROJECT.iterdir()
        if not entry.name.startswith(".") and not entry.name.endswith(".egg-info")
    }
    assert found - MADE_ON_THE_WAY == BELONGS
