"""What persists between sessions: theme, window, recent cases, paper, folder."""

from __future__ import annotations

from pathlib import Path

from PySide6.QtCore import QByteArray, QSettings, QStandardPaths

from headfall_app.resources import resource_path

THEMES = ("system", "light", "dark")
PAPERS = ("a4", "letter")
_RECENT_KEPT = 8


def data_folder() -> Path:
    """Return the program's own data folder, where the settings and the log lie."""
    return Path(QStandardPaths.writableLocation(QStandardPaths.StandardLocation.AppDataLocation))


def is_own_folder(folder: Path) -> bool:
    """Whether a folder is one of the program's own, where nobody means to keep a case."""
    return folder.resolve().is_relative_to(resource_path("app").resolve().parent)


class Settings:
    """The settings in one INI file; a value that makes no sense counts as not set."""

    def __init__(self, file: Path | None = None) -> None:
        self._store = QSettings(str(file or data_folder() / "settings.ini"), QSettings.Format.IniFormat)

    def _word(self, key: str, words: tuple[str, ...]) -> str:
        value = self._store.value(key, words[0])
        return value if value in words else words[0]

    @property
    def theme(self) -> str:
        """``system``, ``light`` or ``dark``."""
        return self._word("theme", THEMES)

    @theme.setter
    def theme(self, name: str) -> None:
        self._store.setValue("theme", name)

    @property
    def paper(self) -> str:
        """``a4`` or ``letter``."""
        return self._word("paper", PAPERS)

    @paper.setter
    def paper(self, name: str) -> None:
        self._store.setValue("paper", name)

    @property
    def geometry(self) -> QByteArray:
        """Where the window stood; empty at the first start."""
        value = self._store.value("geometry", QByteArray())
        return value if isinstance(value, QByteArray) else QByteArray()

    @geometry.setter
    def geometry(self, geometry: QByteArray) -> None:
        self._store.setValue("geometry", geometry)

    @property
    def folder(self) -> str:
        """The folder last opened from or saved to, while it is there; else the person's documents, or home."""
        documents = QStandardPaths.writableLocation(QStandardPaths.StandardLocation.DocumentsLocation)
        for name in (str(self._store.value("folder", "") or ""), documents):
            if name and Path(name).is_dir() and not is_own_folder(Path(name)):
                return name
        return str(Path.home())

    @property
    def recent(self) -> list[Path]:
        """Case files opened or saved lately that are still there, newest first."""
        value = self._store.value("recent", [])
        names = [value] if isinstance(value, str) else value if isinstance(value, list) else []
        return [Path(name) for name in names if Path(name).is_file()]

    def remember(self, file: Path) -> None:
        """Put a case file at the head of the recent ones."""
        file = file.resolve()
        others = [other for other in self.recent if other != file]
        self._store.setValue("recent", [str(path) for path in [file, *others][:_RECENT_KEPT]])
        if not is_own_folder(file.parent):
            self._store.setValue("folder", str(file.parent))

    def forget_recent(self) -> None:
        """Empty the list of recent cases."""
        self._store.remove("recent")

    def sync(self) -> None:
        """Write the file now."""
        self._store.sync()
