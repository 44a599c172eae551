"""The tables beside the page: the run at chosen times, level by level, and at other temperatures."""

from __future__ import annotations

from pathlib import Path as FilePath

from PySide6.QtCore import QAbstractTableModel, QModelIndex, QPersistentModelIndex, QSize, Qt, Signal
from PySide6.QtGui import QFont, QGuiApplication, QKeyEvent, QKeySequence
from PySide6.QtWidgets import QDialog, QHBoxLayout, QHeaderView, QPushButton, QTableView, QVBoxLayout, QWidget

from headfall.case.model import Path
from headfall.files import FileError, replace_file
from headfall_app.document import Document
from headfall_app.entry.heading import Link
from headfall_app.label import label
from headfall_app.paint.fonts import font
from headfall_app.questions import Questions
from headfall_app.tables_content import STAGES, TEMPERATURES, TIMES, AnswerTable, tables_of

_TITLES = {TIMES: "At chosen times", STAGES: "Level by level", TEMPERATURES: "At other temperatures"}
_ENTRIES: dict[str, Path] = {
    TIMES: ("tables", "times"),
    STAGES: ("tables", "level_step"),
    TEMPERATURES: ("liquid", "also_at"),
}
_ROW = 24
Index = QModelIndex | QPersistentModelIndex


class _Shown(QAbstractTableModel):
    """One table for a view."""

    def __init__(self, table: AnswerTable) -> None:
        super().__init__()
        self.table = table

    def show_table(self, table: AnswerTable) -> None:
        self.beginResetModel()
        self.table = table
        self.endResetModel()

    def rowCount(self, parent: Index = QModelIndex()) -> int:  # noqa: B008
        return len(self.table.rows)

    def columnCount(self, parent: Index = QModelIndex()) -> int:  # noqa: B008
        return len(self.table.columns)

    def headerData(self, section: int, orientation: Qt.Orientation, role: int = Qt.ItemDataRole.DisplayRole) -> object:
        if role == Qt.ItemDataRole.DisplayRole and orientation == Qt.Orientation.Horizontal:
            return self.table.columns[section].title.replace(", ", "\n")
        return None

    def data(self, index: Index, role: int = Qt.ItemDataRole.DisplayRole) -> object:
        if role == Qt.ItemDataRole.DisplayRole:
            return self.table.rows[index.row()][index.column()].shown
        if role == Qt.ItemDataRole.TextAlignmentRole:
            return Qt.AlignmentFlag.AlignRight | Qt.AlignmentFlag.AlignVCenter
        return None


class _View(QTableView):
    """A table to read and to copy from."""

    copy_wanted = Signal()

    def keyPressEvent(self, event: QKeyEvent) -> None:
        if event.matches(QKeySequence.StandardKey.Copy):
            self.copy_wanted.emit()
        else:
            super().keyPressEvent(event)


class TablesWindow(QDialog):
    """A window beside the main one; it follows the document and blocks nothing."""

    entry_requested = Signal(object)
    """The path of the entry that asks for the table on show."""

    def __init__(self, document: Document, questions: Questions, folder: str, parent: QWidget | None = None) -> None:
        super().__init__(parent)
        self.setWindowTitle("Headfall tables")
        self._document, self._questions, self._folder = document, questions, folder
        self._tables = {key: AnswerTable(key, "") for key in _TITLES}
        self._key = STAGES
        self._model = _Shown(self._tables[STAGES])
        self._remark = label("remark", 12, wraps=True)
        self._said = label("reason", 12, wraps=True)
        self._said.hide()
        self.view = self._made_view()
        self.links = {key: Link(title, title, self) for key, title in _TITLES.items()}
        self.copy = QPushButton("Copy", self)
        self.export = QPushButton("Export as CSV…", self)
        self.ask = QPushButton("Go to its entry", self)
        for button, act in ((self.copy, self.copy_table), (self.export, self.export_csv), (self.ask, self._ask)):
            button.setAutoDefault(False)
            button.clicked.connect(act)
        for key, link in self.links.items():
            link.setAutoDefault(False)
            link.clicked.connect(lambda _=False, wanted=key: self.show_table(wanted))
        self._lay_out()
        document.answers_changed.connect(self._follow)
        document.changed.connect(self._follow)

    def _made_view(self) -> _View:
        view = _View()
        view.setModel(self._model)
        view.setFont(font(12))
        view.setAccessibleName("Table")
        view.setTabKeyNavigation(False)
        view.setEditTriggers(QTableView.EditTrigger.NoEditTriggers)
        view.setSelectionBehavior(QTableView.SelectionBehavior.SelectRows)
        view.verticalHeader().hide()
        view.verticalHeader().setDefaultSectionSize(_ROW)
        across = view.horizontalHeader()
        across.setFont(font(11, QFont.Weight.DemiBold.value))
        across.setSectionResizeMode(QHeaderView.ResizeMode.Stretch)
        across.setMinimumSectionSize(70)
        across.setHighlightSections(False)
        across.setDefaultAlignment(Qt.AlignmentFlag.AlignRight | Qt.AlignmentFlag.AlignVCenter)
        view.copy_wanted.connect(self.copy_table)
        return view

    def _lay_out(self) -> None:
        column = QVBoxLayout(self)
        column.setContentsMargins(16, 10, 16, 14)
        column.setSpacing(8)
        titles, foot = QHBoxLayout(), QHBoxLayout()
        titles.setSpacing(14)
        for link in self.links.values():
            titles.addWidget(link)
        titles.addStretch(1)
        foot.addWidget(self.ask)
        foot.addStretch(1)
        foot.addWidget(self.copy)
        foot.addWidget(self.export)
        column.addLayout(titles)
        column.addWidget(self._remark)
        column.addWidget(self.view, 1)
        column.addStretch(0)
        column.addWidget(self._said)
        column.addLayout(foot)

    def sizeHint(self) -> QSize:
        return QSize(760, 560)

    @property
    def table(self) -> AnswerTable:
        """The table on show."""
        return self._model.table

    @property
    def remark(self) -> str:
        """What is said over the table."""
        return self._remark.text()

    @property
    def said(self) -> str:
        """What went wrong with a file; empty where nothing did."""
        return self._said.text()

    def show_table(self, key: str = "") -> None:
        """Show one of the tables, ``times``, ``stages`` or ``temperatures``; by itself the first that was asked for."""
        self._work_out()
        asked = [name for name in (TIMES, TEMPERATURES) if self._tables[name].rows]
        self._key = key or next(iter(asked), STAGES)
        self._refresh()
        self.show()
        self.activateWindow()
        self.view.setFocus(Qt.FocusReason.OtherFocusReason)

    def _follow(self) -> None:
        if self.isVisible():
            self._work_out()
            self._refresh()

    def _work_out(self) -> None:
        answers = self._document.answers
        if answers is None:
            remark = "This case has not been worked out yet. Mend the entry that is marked first."
            self._tables = {key: AnswerTable(key, remark) for key in _TITLES}
            return
        self._tables = {table.key: table for table in tables_of(answers, self._document.display)}

    def _refresh(self) -> None:
        table = self._tables[self._key]
        if table != self._model.table or not self._remark.text():
            self._model.show_table(table)
        stale = "Last good answers, while an entry is wrong. " if self._document.is_stale and table.rows else ""
        self._remark.setText(stale + table.remark)
        self.view.setVisible(bool(table.rows))
        self.view.setAccessibleName(_TITLES[self._key])
        self.copy.setEnabled(bool(table.rows))
        self.export.setEnabled(bool(table.rows))
        for key, link in self.links.items():
            link.setFont(font(13, 600 if key == self._key else 400))
            link.setAccessibleDescription("on show" if key == self._key else "")

    def copy_table(self) -> None:
        """Put the table, or its selected rows, on the clipboard with tabs between the columns."""
        chosen = tuple(sorted({index.row() for index in self.view.selectionModel().selectedRows()}))
        some = chosen if len(chosen) > 1 else ()
        QGuiApplication.clipboard().setText(self.table.as_text("\t", some))

    def export_csv(self) -> None:
        """Ask where to write the table, and write it as CSV."""
        title = self._document.case.title or "untitled"
        plain = "".join(letter if letter.isalnum() else "_" for letter in title.lower()).strip("_") or "untitled"
        file = self._questions.table_to_write(self, str(FilePath(self._folder) / f"{plain}_{self._key}.csv"))
        if file is None:
            return
        try:
            replace_file(file, self.table.as_text(",").encode("utf-8-sig"))
        except FileError as trouble:
            self._say(trouble.sentence)
        else:
            self._say("")

    def _say(self, sentence: str) -> None:
        self._said.setText(sentence)
        self._said.setVisible(bool(sentence))

    def _ask(self) -> None:
        self.entry_requested.emit(_ENTRIES[self._key])
