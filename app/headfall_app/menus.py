"""The menus: every wish a person can have, with its key."""

from __future__ import annotations

from collections.abc import Callable
from functools import partial
from pathlib import Path
from typing import Protocol

from PySide6.QtGui import QAction, QActionGroup, QKeySequence
from PySide6.QtWidgets import QMenu, QMenuBar, QWidget

from headfall_app.document import Document
from headfall_app.resources import resource_path
from headfall_app.settings import PAPERS, THEMES, Settings

_THEME_WORDS = {"system": "As the system", "light": "Light", "dark": "Dark"}
_UNIT_WORDS = {"metric": "Metric", "us": "US"}
_PAPER_WORDS = {"a4": "A4", "letter": "Letter"}


def add_action(menu: QMenu, text: str, act: Callable[[], object], keys: str | QKeySequence.StandardKey = "") -> QAction:
    """Add a line to a menu."""
    action = menu.addAction(text)
    action.triggered.connect(lambda _checked=False: act())
    if keys:
        action.setShortcuts(keys if isinstance(keys, QKeySequence.StandardKey) else [QKeySequence(keys)])
    return action


def add_choices(
    menu: QMenu, words: dict[str, str], choose: Callable[[str], object], current: Callable[[], str]
) -> QActionGroup:
    """Add lines of which one is marked; the mark is set whenever the menu opens."""
    group = QActionGroup(menu)
    for value, text in words.items():
        action = menu.addAction(text)
        action.setCheckable(True)
        action.setData(value)
        action.triggered.connect(lambda _checked=False, chosen=value: choose(chosen))
        group.addAction(action)

    def mark() -> None:
        for action in group.actions():
            action.setChecked(action.data() == current())

    menu.aboutToShow.connect(mark)
    mark()
    return group


class Wishes(Protocol):
    """What the menus ask of their window."""

    settings: Settings
    document: Document

    @property
    def units(self) -> str: ...

    @property
    def paper(self) -> str: ...

    def new_case(self) -> None: ...
    def open_case(self) -> None: ...
    def open_file(self, file: Path) -> bool: ...
    def open_example(self, file: Path) -> None: ...
    def save(self) -> bool: ...
    def save_as(self) -> bool: ...
    def export_sheet(self) -> None: ...
    def close(self) -> bool: ...
    def choose_paper(self, name: str) -> None: ...
    def choose_units(self, units: str) -> None: ...
    def choose_theme(self, name: str) -> None: ...
    def switch_units(self) -> None: ...
    def switch_whole(self) -> None: ...
    def add_outlet(self, kind: str = "") -> None: ...
    def show_tables(self) -> None: ...
    def show_help(self, page: str) -> None: ...
    def help_in_hand(self) -> None: ...


class Menus(QMenuBar):
    """The menus Case, Edit, Show and Help; each line calls a method of the window."""

    def __init__(self, window: Wishes, parent: QWidget | None = None) -> None:
        super().__init__(parent)
        self._window = window
        self.case, self.edit = self.addMenu("&Case"), self.addMenu("&Edit")
        self.view, self.help = self.addMenu("&Show"), self.addMenu("&Help")
        self._fill_case()
        self._fill_edit()
        self._fill_show()
        self._fill_help()

    def _fill_case(self) -> None:
        window, menu, key = self._window, self.case, QKeySequence.StandardKey
        add_action(menu, "&New", window.new_case, key.New)
        add_action(menu, "&Open…", window.open_case, key.Open)
        self.examples = menu.addMenu("Open an e&xample")
        self.recent = menu.addMenu("Open a &recent case")
        self.recent.aboutToShow.connect(self._fill_recent)
        self._fill_examples()
        menu.addSeparator()
        add_action(menu, "&Save", window.save, key.Save)
        add_action(menu, "Save &as…", window.save_as, "Ctrl+Shift+S")
        menu.addSeparator()
        add_action(menu, "&Export the sheet as PDF…", window.export_sheet, "Ctrl+E")
        paper = menu.addMenu("&Paper of the sheet")
        add_choices(paper, {name: _PAPER_WORDS[name] for name in PAPERS}, window.choose_paper, lambda: window.paper)
        menu.addSeparator()
        add_action(menu, "&Quit", window.close, "Ctrl+Q")

    def _fill_examples(self) -> None:
        for file in sorted(resource_path("examples").glob("*.headfall")):
            name = file.stem.replace("_", " ").capitalize().replace(" us", ", US units")
            add_action(self.examples, name, partial(self._window.open_example, file))

    def _fill_recent(self) -> None:
        self.recent.clear()
        files = self._window.settings.recent
        for file in files:
            add_action(self.recent, file.name, partial(self._window.open_file, file)).setToolTip(str(file))
        if not files:
            self.recent.addAction("None so far").setEnabled(False)
            return
        self.recent.addSeparator()
        add_action(self.recent, "Empty this list", self._window.settings.forget_recent)

    def _fill_edit(self) -> None:
        stack, key = self._window.document.undo_stack, QKeySequence.StandardKey
        # The stack's own actions name the step, and go quietly when the window does.
        undo, redo = stack.createUndoAction(self.edit), stack.createRedoAction(self.edit)
        undo.setShortcuts(key.Undo)
        redo.setShortcuts([QKeySequence("Ctrl+Shift+Z"), QKeySequence("Ctrl+Y")])
        self.edit.addActions([undo, redo])
        self.edit.addSeparator()
        add_action(self.edit, "Add an &outlet", self._window.add_outlet, "Ctrl+Shift+A")
        add_action(self.edit, "Add a &pipe", partial(self._window.add_outlet, "pipe"))
        add_action(self.edit, "Add a &weir", partial(self._window.add_outlet, "weir"))

    def _fill_show(self) -> None:
        window, menu = self._window, self.view
        add_action(menu, "&Tables", window.show_tables, "Ctrl+T")
        menu.addSeparator()
        add_choices(menu.addMenu("&Units"), _UNIT_WORDS, window.choose_units, lambda: window.units)
        add_choices(
            menu.addMenu("&Colours"),
            {name: _THEME_WORDS[name] for name in THEMES},
            window.choose_theme,
            lambda: window.settings.theme,
        )
        add_action(menu, "&Metric or US units", window.switch_units, "Ctrl+U")
        self.whole = add_action(menu, "&Whole or cut drawing", window.switch_whole, "Ctrl+L")

    def _fill_help(self) -> None:
        window, key = self._window, QKeySequence.StandardKey
        add_action(self.help, "&Help at the entry in hand", window.help_in_hand, key.HelpContents)
        self.help.addSeparator()
        add_action(self.help, "Five-minute &tour", partial(window.show_help, "tour"))
        add_action(self.help, "The case &file", partial(window.show_help, "case-format"))
        add_action(self.help, "&About Headfall and its sources", partial(window.show_help, "about"))
