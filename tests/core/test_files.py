"""Case files on disk: whole or untouched."""

from __future__ import annotations

import errno
import hashlib
import json
import os
import re
import sys
from pathlib import Path
from typing import Any

import pytest

from headfall.case.editing import replace_at
from headfall.case.faults import CaseError
from headfall.case.model import Case
from headfall.case.reading import read_case_data
from headfall.files import FileError, case_from_text, case_text, fingerprint, read_case, replace_file, write_case

SOUND: dict[str, Any] = {
    "headfall": 1,
    "title": "Day tank",
    "vessel": {"shape": "upright_cylinder", "diameter": "2.4 m", "height": "3 m"},
    "outlets": [{"kind": "orifice", "opening": {"form": "round", "diameter": "50 mm"}}],
    "levels": {"start": "2.8 m", "stop": "0.1 m"},
}
EXAMPLES = sorted((Path(__file__).parents[2] / "resources" / "examples").glob("*.headfall"))


@pytest.fixture
def case() -> Case:
    return read_case_data(SOUND)


def refusal(path: Path) -> str:
    """Return the lines of what keeps a file from being read."""
    with pytest.raises(CaseError) as caught:
        read_case(path)
    return str(caught.value)


def test_a_case_comes_back_from_its_file(case: Case, tmp_path: Path) -> None:
    write_case(case, tmp_path / "day tank.headfall")
    assert read_case(str(tmp_path / "day tank.headfall")) == case
    assert (tmp_path / "day tank.headfall").read_bytes() == case_text(case).encode()
    assert os.listdir(tmp_path) == ["day tank.headfall"]


@pytest.mark.parametrize("path", EXAMPLES, ids=lambda path: path.stem)
def test_the_examples_are_sound(path: Path) -> None:
    assert read_case(path).headspace is not None


def test_faults_in_parts_and_between_parts_are_reported_together(tmp_path: Path) -> None:
    data = {**SOUND, "levels": {"start": "3.5 m", "stop": "soon"}, "date": 7}
    (tmp_path / "x.headfall").write_text(json.dumps(data))
    places = [line.partition(":")[0] for line in refusal(tmp_path / "x.headfall").splitlines()]
    assert places == ["levels.stop", "date", "levels.start"]


def test_a_level_above_the_overflow_is_reported_once(tmp_path: Path) -> None:
    data = {**SOUND, "levels": {"start": "2.8 m", "stop": "0 m", "overflow": "2 m"}}
    (tmp_path / "x.headfall").write_text(json.dumps(data))
    assert refusal(tmp_path / "x.headfall").count("\n") == 0


def test_a_case_is_read_from_text_as_from_a_file(case: Case) -> None:
    assert case_from_text(case_text(case)) == case
    with pytest.raises(CaseError, match="The file is empty"):
        case_from_text("")


def test_a_file_that_is_not_there_says_so(tmp_path: Path) -> None:
    assert refusal(tmp_path / "none.headfall") == f"There is no file {tmp_path / 'none.headfall'}. Open another file."
    assert refusal(tmp_path) == f"{tmp_path} is a folder. Open a case file in it."
    assert refusal(Path("a\0b")).endswith("cannot be read: its name cannot be used. Open another file.")


def test_a_file_that_cannot_be_read_says_why(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    def refuse(_self: Path) -> bytes:
        raise PermissionError(errno.EACCES, "Permission denied")

    path = tmp_path / "x.headfall"
    path.write_text("{}")
    monkeypatch.setattr(Path, "read_bytes", refuse)
    assert refusal(path) == f"{path} cannot be read: permission denied. Open another file."


def test_a_very_large_file_is_not_read(tmp_path: Path) -> None:
    path = tmp_path / "x.headfall"
    with open(path, "wb") as stream:
        stream.truncate(60_000_000)
    assert refusal(path) == f"{path} is too large to be a case. Open another file."


def test_a_case_that_could_not_be_read_back_is_not_written(case: Case, tmp_path: Path) -> None:
    path = tmp_path / "x.headfall"
    write_case(case, path)
    before = path.read_bytes()
    wrong = replace_at(case, ("levels", "start"), None)
    with pytest.raises(CaseError, match=r"levels\.start: This is missing"):
        write_case(wrong, path)
    assert path.read_bytes() == before


@pytest.mark.parametrize("step", ["fsync", "replace"])
@pytest.mark.parametrize("problem", [OSError(errno.ENOSPC, "No space left on device"), KeyboardInterrupt()])
def test_the_old_file_survives_any_failure(
    step: str, problem: BaseException, case: Case, tmp_path: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    path = tmp_path / "x.headfall"
    path.write_bytes(b"what stood here before")

    def fail(*_arguments: object) -> None:
        raise problem

    monkeypatch.setattr(os, step, fail)
    with pytest.raises((FileError, KeyboardInterrupt)) as caught:
        write_case(case, path)
    monkeypatch.undo()
    if isinstance(caught.value, FileError):
        assert caught.value.sentence == f"{path} was not written: the disk is full."
    assert path.read_bytes() == b"what stood here before"
    assert os.listdir(tmp_path) == ["x.headfall"]


def test_a_file_that_cannot_be_written_says_why(case: Case, tmp_path: Path) -> None:
    missing = tmp_path / "no folder" / "x.headfall"
    with pytest.raises(FileError) as caught:
        write_case(case, missing)
    assert str(caught.value) == f"{missing} was not written: there is no such folder."
    assert isinstance(caught.value, OSError)
    with pytest.raises(FileError, match="was not written: that is a folder"):
        write_case(case, tmp_path)
    with pytest.raises(FileError, match="its name cannot be used"):
        replace_file("a\0b", b"")


def test_a_link_stays_a_link_and_permissions_stay(case: Case, tmp_path: Path) -> None:
    path, link = tmp_path / "x.headfall", tmp_path / "link.headfall"
    path.write_bytes(b"before")
    path.chmod(0o640)
    mode = path.stat().st_mode
    if sys.platform == "win32":  # links need an account with more rights there
        link = path
    else:
        link.symlink_to(path)
    write_case(case, link)
    assert link.resolve() == path.resolve()
    assert path.read_bytes() == case_text(case).encode()
    assert path.stat().st_mode == mode


def test_a_fingerprint_is_three_groups_and_tells_cases_apart(case: Case) -> None:
    assert re.fullmatch(r"[0-9a-f]{4} [0-9a-f]{4} [0-9a-f]{4}", fingerprint(case))
    assert fingerprint(case) == fingerprint(read_case_data(dict(reversed(SOUND.items()))))
    assert fingerprint(case) != fingerprint(replace_at(case, ("title",), "Day tank 2"))


def test_the_fingerprint_of_a_case_is_kept_from_version_to_version(case: Case) -> None:
    # A printed sheet must still fit its case years later.
    text = (
        '{"headfall":1,"levels":{"start":"2.8 m","stop":"0.1 m"},'
        '"outlets":[{"kind":"orifice","opening":{"diameter":"50 mm","form":"round"}}],"title":"Day tank",'
        '"vessel":{"diameter":"2.4 m","height":"3 m","shape":"upright_cylinder"}}'
    )
    assert hashlib.sha256(text.encode()).hexdigest()[:12] == "984a78ce2d5d"
    assert fingerprint(case) == "984a 78ce 2d5d"
