"""One application, no display, settings of nobody, and no word from Qt that is not looked at."""

from __future__ import annotations

import os

os.environ["QT_QPA_PLATFORM"] = "offscreen"

from collections.abc import Callable, Iterator
from dataclasses import dataclass, field
from pathlib import Path

import pytest
from PySide6.QtCore import QDeadlineTimer, QEvent, QEventLoop, QStandardPaths, Qt, QtMsgType, qInstallMessageHandler
from PySide6.QtTest import QTest
from PySide6.QtWidgets import QApplication, QLineEdit, QWidget

from headfall.case.model import Case
from headfall.files import case_from_text, read_case
from headfall_app.document import Document
from headfall_app.entry.field import Field
from headfall_app.questions import STAY, Questions
from headfall_app.resources import resource_path
from headfall_app.settings import Settings
from headfall_app.start import make_application

SOON = 5000
# What the platform without a display says about itself: it fits no window to a size and grabs no keyboard.
OF_THE_PLATFORM = "This plugin does not support "

TANK = """{
  "headfall": 1, "title": "Day tank", "tag": "T-07", "revision": "B",
  "vessel": {"shape": "upright_cylinder", "diameter": "2400 mm", "height": "3 m"},
  "outlets": [{"name": "drain", "kind": "orifice", "opening": {"form": "round", "diameter": "80 mm"}}],
  "inflow": {"kind": "steady", "rate": "1 L/s"},
  "headspace": {"kind": "open"},
  "levels": {"start": "2.5 m", "stop": "200 mm"}
}"""


@pytest.fixture(scope="session")
def application() -> QApplication:
    """The one application of the run."""
    QStandardPaths.setTestModeEnabled(True)
    return make_application()


@pytest.fixture(autouse=True)
def quiet_qt(application: QApplication) -> Iterator[None]:
    """Fail a test in which Qt said anything, and one that leaves a window open."""
    said: list[str] = []

    def keep(kind: QtMsgType, context: object, message: str) -> None:
        if not message.startswith(OF_THE_PLATFORM):
            said.append(message)

    qInstallMessageHandler(keep)
    yield
    application.processEvents()
    left = [widget for widget in application.topLevelWidgets() if widget.isVisible()]
    for widget in left:
        widget.close()
    qInstallMessageHandler(None)
    assert said == []
    assert left == []


@pytest.fixture
def tank() -> Case:
    """An upright tank with one outlet of 80 mm."""
    return case_from_text(TANK)


@pytest.fixture
def drum() -> Case:
    """The drum of the first start."""
    return read_case(resource_path("examples/rinse_drum.headfall"))


@pytest.fixture
def document(application: QApplication, tank: Case) -> Document:
    """A document on the tank."""
    return Document(tank)


@dataclass
class Answering(Questions):
    """Answers the window's questions in a person's place, and keeps what was asked."""

    open: Path | None = None
    save: Path | None = None
    sheet: Path | None = None
    table: Path | None = None
    leaving: str = STAY
    asked: list[str] = field(default_factory=list)

    def file_to_open(self, parent: QWidget, folder: str) -> Path | None:
        self.asked.append("open")
        return self.open

    def file_to_save(self, parent: QWidget, suggested: str) -> Path | None:
        self.asked.append(f"save {Path(suggested).name}")
        return self.save

    def sheet_to_write(self, parent: QWidget, suggested: str) -> Path | None:
        self.asked.append(f"sheet {Path(suggested).name}")
        return self.sheet

    def table_to_write(self, parent: QWidget, suggested: str) -> Path | None:
        self.asked.append(f"table {Path(suggested).name}")
        return self.table

    def unsaved(self, parent: QWidget, title: str) -> str:
        self.asked.append(f"unsaved {title}")
        return self.leaving


@pytest.fixture
def questions() -> Answering:
    """Somebody who answers the window's questions."""
    return Answering()


@pytest.fixture
def settings(tmp_path: Path) -> Settings:
    """Settings in a file of this test alone."""
    return Settings(tmp_path / "settings.ini")


@pytest.fixture
def show(application: QApplication) -> Iterator[Callable[[QWidget], None]]:
    """Show widgets and wait until they can take keys; they are closed and freed after the test."""
    shown: list[QWidget] = []

    def show_now(widget: QWidget) -> None:
        shown.append(widget)
        widget.show()
        widget.activateWindow()
        assert QTest.qWaitForWindowActive(widget, SOON)

    yield show_now
    for widget in shown:
        widget.hide()
        widget.deleteLater()
    application.sendPostedEvents(None, QEvent.Type.DeferredDelete)


@pytest.fixture
def wait_for(application: QApplication) -> Callable[[Callable[[], object]], None]:
    """Let the event loop turn until a condition holds; a test in which it never does fails."""

    def wait(condition: Callable[[], object]) -> None:
        deadline = QDeadlineTimer(SOON)
        while not condition() and not deadline.hasExpired():
            application.processEvents(QEventLoop.ProcessEventsFlag.AllEvents, 50)
        assert condition()

    return wait


@pytest.fixture
def type_into() -> Callable[..., None]:
    """Put the cursor into a field with the mouse, select what is there, type, and end with a key."""

    def type_text(target: Field, text: str, then: Qt.Key | None = Qt.Key.Key_Return) -> None:
        line = target.editor
        assert isinstance(line, QLineEdit)
        QTest.mouseClick(line, Qt.MouseButton.LeftButton)
        QTest.keyClick(line, Qt.Key.Key_A, Qt.KeyboardModifier.ControlModifier)
        QTest.keyClick(line, Qt.Key.Key_Delete)
        QTest.keyClicks(line, text)
        if then is not None:
            QTest.keyClick(line, then)

    return type_text
