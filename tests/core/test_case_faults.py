"""Faults build their own sentences from a place, what was found and what is wanted."""

from __future__ import annotations

import pytest

from headfall.case.faults import CaseError, Fault, place, place_words
from headfall.case.model import Path


@pytest.mark.parametrize(
    ("path", "expected"),
    [
        ((), ""),
        (("title",), "title"),
        (("outlets", 1, "opening", "diameter"), "outlets[1].opening.diameter"),
        (("vessel", "heads", 0, "depth"), "vessel.heads[0].depth"),
        (("vessel", "two words"), 'vessel."two words"'),
        (("a\nb",), '"a b"'),
    ],
)
def test_a_place_is_written_as_in_the_file(path: Path, expected: str) -> None:
    assert place(path) == expected


@pytest.mark.parametrize(
    ("path", "expected"),
    [
        ((), "The case"),
        (("outlets", 1, "opening", "diameter"), "Outlet 2, diameter"),
        (("outlets", 0), "Outlet 1"),
        (("outlets", 0, "opening"), "Outlet 1, opening"),
        (("outlets", 0, "edge_radius"), "Outlet 1, edge radius"),
        (("vessel", "diameter"), "Vessel, diameter"),
        (("vessel", "heads", 0, "depth"), "Vessel, low head, depth"),
        (("vessel", "heads"), "Vessel, heads"),
        (("vessel", "heads", 1), "Vessel, high head"),
        (("vessel", "heads", "depth"), "Vessel, heads, depth"),
        (("levels", "start"), "Start level"),
        (("inflow", "rate"), "Inflow"),
        (("target", "drain_time"), "Time to drain"),
    ],
)
def test_a_place_has_plain_words(path: Path, expected: str) -> None:
    assert place_words(path) == expected


@pytest.mark.parametrize(
    ("found", "wanted", "sentence"),
    [
        ("2 kg is a mass", "a length, such as 80 mm", "2 kg is a mass. Type a length, such as 80 mm."),
        ("Pipes are not built yet", "Use an orifice", "Pipes are not built yet. Use an orifice."),
        ("Pipes are not built yet.", "", "Pipes are not built yet."),
        ("40 gal can be two volumes", "Did you mean US gal?", "40 gal can be two volumes. Did you mean US gal?"),
        ("2\nkg is a mass", "a length", "2 kg is a mass. Type a length."),
    ],
)
def test_a_sentence_says_what_was_found_and_what_is_wanted(found: str, wanted: str, sentence: str) -> None:
    assert Fault(("vessel",), found, wanted).sentence == sentence
    assert Fault(("vessel",), found, wanted).line == f"vessel: {sentence}"
    assert Fault((), found, wanted).line == sentence


def test_a_case_error_holds_its_faults_and_is_a_value_error() -> None:
    faults = [Fault(("title",), "7 is not text", "text"), Fault((), "The file is empty", "Open another file")]
    refusal = CaseError(faults)
    assert isinstance(refusal, ValueError)
    assert refusal.faults == tuple(faults)
    assert str(refusal) == "title: 7 is not text. Type text.\nThe file is empty. Open another file."
    assert refusal.sentence == "7 is not text. Type text. The file is empty. Open another file."
