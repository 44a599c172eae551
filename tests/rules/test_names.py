"""A file's name says what is in it."""

from __future__ import annotations

from tests.rules.source_files import PROJECT, ROOMS, shown

SAYS_NOTHING = {"util", "utils", "misc", "common", "helper", "helpers", "manager", "managers", "stuff", "tools"}


def test_no_file_has_a_name_that_says_nothing() -> None:
    files = [file for room in (*ROOMS, "resources") for file in (PROJECT / room).rglob("*")]
    assert len(files) > 50
    vague = [shown(file) for file in files if SAYS_NOTHING & set(file.stem.lower().split("_"))]
    assert not vague, "\n".join(vague)
