"""The wheel carries both packages with their data files, and its core answers without Qt."""

from __future__ import annotations

import subprocess
import sys
import zipfile
from pathlib import Path

import pytest

PROJECT = Path(__file__).resolve().parents[2]


@pytest.fixture(scope="module")
def unpacked(tmp_path_factory: pytest.TempPathFactory) -> Path:
    """Return the folder that the project's wheel, built from this checkout, was unpacked into."""
    folder = tmp_path_factory.mktemp("wheel")
    subprocess.run(
        [sys.executable, "-m", "hatchling", "build", "--target", "wheel", "--directory", str(folder)],
        cwd=PROJECT,
        check=True,
        capture_output=True,
    )
    (wheel,) = folder.glob("headfall-*.whl")
    with zipfile.ZipFile(wheel) as archive:
        archive.extractall(folder / "site")
    return folder / "site"


def test_every_file_of_the_packages_and_their_data_is_in_the_wheel(unpacked: Path) -> None:
    rooms = {
        "core/headfall": "headfall",
        "app/headfall_app": "headfall_app",
        "resources/core": "headfall/data",
        "resources/fonts": "headfall_app/data/fonts",
        "resources/app": "headfall_app/data/app",
        "resources/examples": "headfall_app/data/examples",
    }
    wanted = {
        f"{target}/{file.relative_to(PROJECT / source).as_posix()}"
        for source, target in rooms.items()
        for file in (PROJECT / source).rglob("*")
        if file.is_file() and "__pycache__" not in file.parts
    }
    found = {file.relative_to(unpacked).as_posix() for file in unpacked.rglob("*") if file.is_file()}
    assert wanted - found == set()


def test_the_core_of_the_wheel_reads_its_own_data(unpacked: Path) -> None:
    lines = f"""
import sys
sys.path.insert(0, r"{unpacked}")
sys.path[:] = [entry for entry in sys.path if not entry.startswith(r"{PROJECT / "core"}")]
import headfall, headfall.resources
print(headfall.__file__)
print(headfall.resources.resource_path("sources.json"))
"""
    ran = subprocess.run([sys.executable, "-c", lines], cwd=unpacked, capture_output=True, text=True, check=True)
    package, sources = map(Path, ran.stdout.splitlines())
    assert package.is_relative_to(unpacked)
    assert sources.is_relative_to(unpacked)
    assert sources.is_file()


def test_the_wheel_and_the_library_say_the_same_version(unpacked: Path) -> None:
    (information,) = unpacked.glob("headfall-*.dist-info")
    version = information.name.removesuffix(".dist-info").removeprefix("headfall-")
    assert f'__version__ = "{version}"' in (unpacked / "headfall" / "__init__.py").read_text(encoding="utf-8")
