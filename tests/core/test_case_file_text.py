"""A file that is no text, no JSON, or says a thing twice."""

from __future__ import annotations

import json
from typing import Any

import pytest

from headfall.case.faults import CaseError
from headfall.case.file_text import data_from_bytes, data_from_text
from headfall.case.reading import read_parts

SOUND: dict[str, Any] = {
    "headfall": 1,
    "vessel": {"shape": "upright_cylinder", "diameter": "2.4 m", "height": "3 m"},
    "outlets": [{"opening": {"form": "round", "diameter": "50 mm"}}],
    "levels": {"start": "2.8 m", "stop": "0.1 m"},
}


def lines(data: object) -> list[str]:
    """Return the faults of some data, one a line."""
    return [fault.line for fault in read_parts(data)[1]]


@pytest.mark.parametrize(
    ("content", "line"),
    [
        (b"", "The file is empty. Open another file."),
        (b" \n", "The file is empty. Open another file."),
        (
            b'{\n "headfall": 1,,}',
            "The file is not JSON: it cannot be read from line 2, column 16. Mend the file there, or open another.",
        ),
        (
            b'{"title": "caf\xe9"}',
            "The file is not UTF-8 text: byte 15 does not belong there. Save it as UTF-8, or open another file.",
        ),
        (
            b"[" * 200_000,
            "The file has brackets within brackets without end. Mend the file there, or open another.",
        ),
    ],
)
def test_a_file_that_is_no_json_says_where(content: bytes, line: str) -> None:
    with pytest.raises(CaseError) as refusal:
        data_from_bytes(content)
    assert str(refusal.value) == line


def test_a_byte_order_mark_is_passed_over() -> None:
    assert data_from_bytes(b"\xef\xbb\xbf{}") == {}


def test_a_key_given_twice_is_a_fault() -> None:
    text = json.dumps(SOUND).replace('"diameter": "2.4 m"', '"diameter": "2.4 m", "diameter": "2.5 m"')
    assert lines(data_from_text(text)) == ["vessel.diameter: This key is given more than once. Give it once."]
    top = json.dumps(SOUND).replace('"headfall": 1', '"headfall": 1, "headfall": 1')
    assert lines(data_from_text(top)) == ["headfall: This key is given more than once. Give it once."]


@pytest.mark.parametrize(
    ("number", "said"),
    [
        ("NaN", "NaN"),
        ("Infinity", "Infinity"),
        ("-Infinity", "-Infinity"),
        ("1e999", "Infinity"),
        ("9" * 5000, "Infinity"),
    ],
)
def test_numbers_that_are_not_finite_are_named_at_their_place(number: str, said: str) -> None:
    text = json.dumps({**SOUND, "structure": {"joint_efficiency": 0}}).replace(
        'efficiency": 0', f'efficiency": {number}'
    )
    expected = f"structure.joint_efficiency: {said} is not a finite number. Type a number above 0 and up to 1."
    assert lines(data_from_text(text)) == [expected]
