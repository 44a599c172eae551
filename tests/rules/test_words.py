"""What people read is plain: no promise of safety, no exclamation, no path of somebody's machine."""

from __future__ import annotations

import re

import pytest

from tests.rules.source_files import PROJECT, python_files, shown, spoken_strings, text_files

NEVER_SAID = re.compile(r"\b(safe|safely|safer|unsafe|please)\b", re.IGNORECASE)
EXCLAMATION = re.compile(r"[\w)”’\"]!(?![=\w])")
# In a sentence only: `errors` is also a word of Python's own.
FAULT_WORD = re.compile(r"\berrors?\b", re.IGNORECASE)
MACHINE_PATH = re.compile(r"(?<![\w.])/(?:home|root|Users|work|tmp)/\w|\b[A-Z]:\\\\?\w")
READ_BY_PEOPLE = {".json", ".md", ".headfall"}


def spoken() -> list[tuple[str, str]]:
    """Place and text of everything that may be shown to a person."""
    code = [
        (f"{shown(file)}:{line}", text) for file in python_files("core", "app") for line, text in spoken_strings(file)
    ]
    resources = [file for file in sorted((PROJECT / "resources").rglob("*")) if file.suffix in READ_BY_PEOPLE]
    data = [
        (f"{shown(file)}:{number}", line)
        for file in [*resources, *sorted(PROJECT.glob("*.md"))]
        for number, line in enumerate(file.read_text(encoding="utf-8").splitlines(), start=1)
    ]
    assert code and data
    return code + data


@pytest.mark.parametrize("pattern", [NEVER_SAID, EXCLAMATION], ids=["safe or please", "exclamation"])
def test_nothing_shown_to_people_says_what_is_never_said(pattern: re.Pattern[str]) -> None:
    said = [f"{place}: {text.strip()}" for place, text in spoken() if pattern.search(text)]
    assert not said, "\n".join(said)


def test_no_sentence_of_the_program_speaks_of_errors() -> None:
    sentences = [(place, text) for place, text in spoken() if place.split(":")[0].endswith(".py") and " " in text]
    said = [f"{place}: {text}" for place, text in sentences if FAULT_WORD.search(text)]
    assert not said, "\n".join(said)


def test_no_file_names_a_path_of_somebodys_machine() -> None:
    found = [
        f"{shown(file)}:{number}"
        for file in text_files()
        for number, line in enumerate(file.read_text(encoding="utf-8").splitlines(), start=1)
        if MACHINE_PATH.search(line)
    ]
    assert not found, "\n".join(found)


@pytest.mark.parametrize(
    ("pattern", "caught", "let_through"),
    [
        (NEVER_SAID, "It is safe to drain", "such as a site's safety rules"),
        (EXCLAMATION, "It overflows!", "QLabel { x: y } a != b"),
        (MACHINE_PATH, 'open("/' + 'home/someone/x")', "L/s per m/work"),
    ],
)
def test_the_patterns_catch_what_they_should(pattern: re.Pattern[str], caught: str, let_through: str) -> None:
    assert pattern.search(caught)
    assert not pattern.search(let_through)
