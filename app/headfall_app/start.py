"""Starting: the application, its first window, and a picture of the window where there is no display."""

from __future__ import annotations

import gc
import sys
from pathlib import Path
from tempfile import TemporaryDirectory

from PySide6.QtCore import QBuffer, QIODevice, QTimer
from PySide6.QtGui import QPixmap
from PySide6.QtWidgets import QApplication

from headfall.files import read_case, replace_file
from headfall_app.icon import icon
from headfall_app.incidents import catch_incidents
from headfall_app.resources import resource_path
from headfall_app.settings import Settings, data_folder
from headfall_app.style import prepare_application
from headfall_app.version import version
from headfall_app.window import FIRST, SMALLEST, Window

FIRST_CASE = "examples/rinse_drum.headfall"


def make_application() -> QApplication:
    """Return the application with our name, style and face."""
    application = QApplication.instance()
    if not isinstance(application, QApplication):
        application = QApplication(["headfall"])
    application.setApplicationName("headfall")
    application.setApplicationDisplayName("")
    application.setWindowIcon(icon())
    prepare_application(application)
    return application


def run_window(file: Path | None) -> int:
    """Show the window on a case file, or on the first example, until it is closed."""
    application = make_application()
    settings = Settings()
    window = Window(read_case(resource_path(FIRST_CASE)), settings, version=version())
    catch_incidents(data_folder() / "headfall.log", window.message.say)
    if settings.geometry.isEmpty():
        # The first start: as large as the screen has room for.
        window.resize(FIRST.boundedTo(window.screen().availableSize()).expandedTo(SMALLEST))
    if file is not None:
        window.open_file(file)
    window.show()
    # The collector was held back for the start; see the command.
    QTimer.singleShot(0, gc.enable)
    # Before the interpreter ends: a window that outlives its application ends the process badly.
    status = application.exec()
    sys.excepthook = sys.__excepthook__
    window.deleteLater()
    application.processEvents()
    return status


def write_picture(file: Path, target: Path, theme: str, size: tuple[int, int]) -> None:
    """Write a picture of the window on a case; raises FileError where it cannot be written."""
    application = make_application()
    # A picture looks the same for everybody: nobody's settings are read, none are kept.
    with TemporaryDirectory() as folder:
        settings = Settings(Path(folder) / "settings.ini")
        settings.theme = theme
        picture = _picture(application, file, settings, size)
    content = QBuffer()
    content.open(QIODevice.OpenModeFlag.WriteOnly)
    picture.save(content, "PNG")
    replace_file(target, bytes(content.data().data()))


def _picture(application: QApplication, file: Path, settings: Settings, size: tuple[int, int]) -> QPixmap:
    window = Window(read_case(file), settings, version=version())
    window.document.open(file)
    window.resize(*size)
    window.show()
    application.processEvents()
    picture = window.grab()
    window.close()
    window.deleteLater()
    application.processEvents()
    return picture
