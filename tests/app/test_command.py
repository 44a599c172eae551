"""The command: exit statuses, one line a fault, no traceback, nothing half written."""

from __future__ import annotations

import json
import subprocess
import sys
from pathlib import Path

import pytest
from PySide6.QtGui import QImage

from headfall_app.command import main
from headfall_app.resources import resource_path

DRUM = str(resource_path("examples/rinse_drum.headfall"))
EXAMPLES = sorted(resource_path("examples").glob("*.headfall"))


@pytest.fixture
def bad_file(tmp_path: Path) -> str:
    """A case file with two faults."""
    file = tmp_path / "bad.headfall"
    text = Path(DRUM).read_text(encoding="utf-8")
    file.write_text(text.replace('"80 mm"', '"80 kg"').replace('"1.8 m"', "null"), encoding="utf-8")
    return str(file)


def test_figures_are_a_table(capsys: pytest.CaptureFixture[str]) -> None:
    assert main(["figures", DRUM]) == 0
    said = capsys.readouterr()
    assert "Rinse drum  T-12  revision A" in said.out
    assert "Time to the stop level        36 min 53 s         35 min 07 s to 38 min 51 s" in said.out
    assert "\u00a0" not in said.out
    assert said.err == ""


@pytest.mark.parametrize("file", EXAMPLES, ids=lambda file: file.stem)
def test_figures_of_every_example(file: Path, capsys: pytest.CaptureFixture[str]) -> None:
    assert main(["figures", str(file)]) == 0
    assert "Time to the stop level" in capsys.readouterr().out


def test_figures_as_json(capsys: pytest.CaptureFixture[str]) -> None:
    assert main(["figures", DRUM, "--json"]) == 0
    figures = json.loads(capsys.readouterr().out)
    assert figures["headfall"] == 1
    assert figures["title"] == "Rinse drum"
    assert figures["draw_down"]["reaches_stop"] is True


def test_a_run_that_never_reaches_its_stop_is_an_answer(tmp_path: Path, capsys: pytest.CaptureFixture[str]) -> None:
    file = tmp_path / "never.headfall"
    file.write_text(Path(DRUM).read_text(encoding="utf-8").replace('"3 L/s"', '"10 L/s"'), encoding="utf-8")
    assert main(["figures", str(file)]) == 0
    assert "never reached" in capsys.readouterr().out
    assert main(["figures", str(file), "--json"]) == 0
    assert json.loads(capsys.readouterr().out)["draw_down"]["time_s"] is None


@pytest.mark.parametrize("command", [["figures"], ["sheet", "-o", "out.pdf"], ["picture", "-o", "out.png"]])
def test_bad_input_is_one_line_a_fault_and_writes_nothing(
    command: list[str],
    bad_file: str,
    tmp_path: Path,
    capsys: pytest.CaptureFixture[str],
    monkeypatch: pytest.MonkeyPatch,
) -> None:
    monkeypatch.chdir(tmp_path)
    assert main([*command, bad_file]) == 2
    said = capsys.readouterr()
    assert said.out == ""
    lines = said.err.splitlines()
    assert [line.split(":")[0] for line in lines] == ["outlets[0].opening.diameter", "levels.start"]
    assert [path.name for path in tmp_path.iterdir()] == ["bad.headfall"]


def test_a_file_that_is_not_there(capsys: pytest.CaptureFixture[str]) -> None:
    assert main(["figures", "nowhere.headfall"]) == 2
    assert capsys.readouterr().err == "There is no file nowhere.headfall. Open another file.\n"


@pytest.mark.parametrize("command", ["record", "register"])
def test_what_is_not_built_yet(command: str, capsys: pytest.CaptureFixture[str]) -> None:
    assert main([command, "anything"]) == 2
    assert capsys.readouterr().err == f"{command} is not built yet.\n"


@pytest.mark.parametrize(
    "arguments",
    [
        ["figures"],
        ["sheet", DRUM],
        ["sheet", DRUM, "-o", "x.pdf", "--paper", "a0"],
        ["--colour"],
        ["figures", "a", "b"],
    ],
)
def test_bad_usage(arguments: list[str], capsys: pytest.CaptureFixture[str]) -> None:
    with pytest.raises(SystemExit) as ended:
        main(arguments)
    assert ended.value.code == 2
    said = capsys.readouterr().err
    assert said.startswith("usage: headfall")
    assert "error" not in said


def test_help_and_version(capsys: pytest.CaptureFixture[str]) -> None:
    with pytest.raises(SystemExit) as ended:
        main(["--help"])
    assert ended.value.code == 0
    said = capsys.readouterr().out
    assert all(command in said for command in ("figures", "sheet", "picture", "record", "register"))
    with pytest.raises(SystemExit) as ended:
        main(["--version"])
    assert ended.value.code == 0
    assert capsys.readouterr().out.startswith("headfall ")


@pytest.mark.parametrize("paper", ["a4", "letter"])
def test_the_sheet_is_written(paper: str, tmp_path: Path, capsys: pytest.CaptureFixture[str]) -> None:
    target = tmp_path / "sheet.pdf"
    assert main(["sheet", DRUM, "-o", str(target), "--paper", paper]) == 0
    assert target.read_bytes().startswith(b"%PDF")
    assert [path.name for path in tmp_path.iterdir()] == ["sheet.pdf"]
    assert capsys.readouterr().err == ""


@pytest.mark.parametrize("command", ["sheet", "picture"])
def test_a_place_that_cannot_be_written(command: str, tmp_path: Path, capsys: pytest.CaptureFixture[str]) -> None:
    target = tmp_path / "nowhere" / "out"
    assert main([command, DRUM, "-o", str(target)]) == 1
    assert capsys.readouterr().err == f"{target} was not written: there is no such folder.\n"


def test_a_picture_of_the_window(tmp_path: Path) -> None:
    target = tmp_path / "window.png"
    assert main(["picture", DRUM, "-o", str(target), "--theme", "dark", "--size", "1280x720"]) == 0
    picture = QImage(str(target))
    assert (picture.width(), picture.height()) == (1280, 720)
    assert picture.pixelColor(640, 4).lightness() < 60


def test_a_defect_is_said_without_a_traceback(
    capsys: pytest.CaptureFixture[str], monkeypatch: pytest.MonkeyPatch
) -> None:
    def failing(*_: object) -> str:
        raise ZeroDivisionError("a defect")

    monkeypatch.setattr("headfall_app.figures_table.figures_table", failing)
    assert main(["figures", DRUM]) == 1
    assert capsys.readouterr().err == "Headfall itself failed here: ZeroDivisionError: a defect.\n"


def test_figures_need_no_qt() -> None:
    code = (
        "import sys; from headfall_app.command import main; status = main(sys.argv[1:]); "
        "loaded = [name for name in sys.modules if name.split('.')[0] in ('PySide6', 'shiboken6', 'pyqtgraph')]; "
        "sys.exit(status or bool(loaded))"
    )
    ran = subprocess.run(
        [sys.executable, "-c", code, "figures", DRUM], capture_output=True, text=True, encoding="utf-8"
    )
    assert (ran.returncode, ran.stderr) == (0, "")


def test_the_first_paint_loads_neither_scipy_nor_pint_nor_pyqtgraph(tmp_path: Path) -> None:
    code = (
        "import sys; from headfall_app.command import main; status = main(sys.argv[1:]); "
        "loaded = {name.split('.')[0] for name in sys.modules} & {'scipy', 'pint', 'pyqtgraph'}; "
        "print(sorted(loaded)); sys.exit(status)"
    )
    target = str(tmp_path / "window.png")
    command = [sys.executable, "-c", code, "picture", DRUM, "-o", target]
    ran = subprocess.run(command, capture_output=True, text=True, encoding="utf-8")
    assert (ran.returncode, ran.stdout.strip()) == (0, "[]")


def test_a_name_that_is_neither_file_nor_command_opens_no_window(capsys: pytest.CaptureFixture[str]) -> None:
    assert main(["nosuch"]) == 2
    assert capsys.readouterr().err == "nosuch: There is no such file, and no such command. Type headfall --help.\n"
