"""A small table in the panel: rows of quantities, typed, pasted or read from a file."""

from __future__ import annotations

from pathlib import Path as FilePath

from PySide6.QtCore import QAbstractTableModel, QModelIndex, QPersistentModelIndex, Qt
from PySide6.QtGui import QColor, QFont, QGuiApplication, QKeyEvent, QKeySequence
from PySide6.QtWidgets import QFileDialog, QGridLayout, QHBoxLayout, QHeaderView, QTableView, QWidget

from headfall.case import editing
from headfall.case.model import TableVessel
from headfall.quantities import Quantity
from headfall_app.document import Document
from headfall_app.entry.field import Field
from headfall_app.entry.heading import Link
from headfall_app.entry.pasted import PasteRefused, rows_from
from headfall_app.entry.plan_rows import Row
from headfall_app.entry.typed import Refused, read_typed, value_or_none
from headfall_app.label import label
from headfall_app.paint.fonts import font
from headfall_app.words import words

_ROW, _MOST_ROWS = 24, 9
Index = QModelIndex | QPersistentModelIndex


class RowsModel(QAbstractTableModel):
    """The rows as the document holds them; a cell that could not be read keeps its text and its reason."""

    def __init__(self, row: Row, document: Document) -> None:
        super().__init__()
        self._row, self._document = row, document

    @property
    def rows(self) -> tuple[tuple[Quantity, ...], ...]:
        """The rows that can be read."""
        return value_or_none(self._document.case, self._row.path) or ()

    @property
    def columns(self) -> tuple[str, ...]:
        """The dimension of each column."""
        metadata = editing.attribute_of(self._document.case, self._row.path)
        columns: tuple[str, ...] = metadata["rows"]
        vessel = value_or_none(self._document.case, self._row.path[:-1])
        if isinstance(vessel, TableVessel):
            return (columns[0], "area" if vessel.column == "area" else "volume")
        return columns

    def rowCount(self, parent: Index = QModelIndex()) -> int:  # noqa: B008
        return len(self.rows)

    def columnCount(self, parent: Index = QModelIndex()) -> int:  # noqa: B008
        return len(self.columns)

    def headerData(self, section: int, orientation: Qt.Orientation, role: int = Qt.ItemDataRole.DisplayRole) -> object:
        if role != Qt.ItemDataRole.DisplayRole:
            return None
        if orientation == Qt.Orientation.Vertical:
            return str(section + 1)
        names: dict[str, str] = words()["columns"]
        return names.get(self.columns[section], self.columns[section])

    def flags(self, index: Index) -> Qt.ItemFlag:
        return super().flags(index) | Qt.ItemFlag.ItemIsEditable

    def data(self, index: Index, role: int = Qt.ItemDataRole.DisplayRole) -> object:
        path = (*self._row.path, index.row(), index.column())
        wrong = self._document.wrong.get(path)
        if role in (Qt.ItemDataRole.DisplayRole, Qt.ItemDataRole.EditRole):
            if wrong is not None:
                return wrong.text
            row = self.rows[index.row()]
            return row[index.column()].text if index.column() < len(row) else ""
        if wrong is not None and role == Qt.ItemDataRole.ToolTipRole:
            return wrong.sentence
        if wrong is not None and role == Qt.ItemDataRole.ForegroundRole:
            return QColor("#A23A12")
        return None

    def setData(self, index: Index, value: object, role: int = Qt.ItemDataRole.EditRole) -> bool:
        if role != Qt.ItemDataRole.EditRole:
            return False
        path = (*self._row.path, index.row(), index.column())
        cell = Row(path, "quantity", "cell", self.columns[index.column()])
        text, what = str(value).strip(), f"Change a cell of {self._row.label.lower()}"
        row = self.rows[index.row()]
        before = row[index.column()].text if index.column() < len(row) else ""
        if text == before and path not in self._document.wrong:
            return False
        try:
            self._document.set(path, read_typed(self._document.case, cell, text), what)
        except Refused as refusal:
            self._document.set_wrong(path, text, str(refusal), what)
        return True


class TableView(QTableView):
    """A table that takes pasted rows."""

    def __init__(self, field: TableField) -> None:
        super().__init__()
        self._field = field

    def keyPressEvent(self, event: QKeyEvent) -> None:
        if event.matches(QKeySequence.StandardKey.Paste):
            self._field.paste(QGuiApplication.clipboard().text())
        else:
            super().keyPressEvent(event)


class TableField(Field):
    """The table with what can be done to it under it."""

    def __init__(self, row: Row, document: Document, parent: QWidget | None = None) -> None:
        self.view = TableView(self)
        self.model = RowsModel(row, document)
        super().__init__(row, document, self.view, parent)
        self.view.setModel(self.model)
        self.view.setFont(font(12))
        self.view.verticalHeader().setDefaultSectionSize(_ROW)
        self.view.verticalHeader().setFont(font(11))
        self.view.horizontalHeader().setFont(font(11, QFont.Weight.DemiBold.value))
        self.view.horizontalHeader().setSectionResizeMode(QHeaderView.ResizeMode.Stretch)
        self.view.setTabKeyNavigation(False)
        self.refresh()

    def _lay_out(self) -> None:
        grid = self._grid = QGridLayout(self)
        grid.setContentsMargins(0, 2, 0, 6)
        grid.setVerticalSpacing(3)
        links = QHBoxLayout()
        links.setContentsMargins(0, 0, 0, 0)
        self._links = []
        for text, name, act in (
            ("add a row", "Add a row to the table", self.add_row),
            ("remove", "Remove the row of the table", self.remove_row),
            ("paste", "Paste rows into the table", self._paste_clipboard),
            ("from a file", "Read rows from a file", self._open_file),
        ):
            link = Link(text, name)
            link.clicked.connect(act)
            links.addWidget(link)
            self._links.append(link)
        links.addStretch(1)
        self._hint = label("echo", 11, wraps=True)
        grid.addWidget(self.editor, 0, 0)
        grid.addLayout(links, 1, 0)
        grid.addWidget(self._reason, 2, 0)
        self._label.hide()
        self._echo.hide()

    def refresh(self) -> None:
        """Show what the document holds."""
        self.model.layoutChanged.emit()
        shown = min(max(self.model.rowCount(), 2), _MOST_ROWS)
        self.view.setFixedHeight(self.view.horizontalHeader().sizeHint().height() + shown * _ROW + 4)
        wrong = [entry for path, entry in self.document.wrong.items() if path[: len(self.row.path)] == self.row.path]
        self.show_reason(wrong[0].sentence if wrong else "")

    def add_row(self) -> None:
        """Add a row after the one that is chosen, or at the end."""
        here = self.view.currentIndex().row()
        index = here + 1 if here >= 0 else self.model.rowCount()
        self.document.change(editing.insert_part(self.document.case, self.row.path, index), "Add a row")

    def remove_row(self) -> None:
        """Take out the chosen row, or the last one."""
        here = self.view.currentIndex().row()
        index = here if here >= 0 else self.model.rowCount() - 1
        try:
            changed = editing.remove_part(self.document.case, (*self.row.path, index))
        except (ValueError, LookupError):
            self.show_reason("A table needs its rows: this one cannot be left out.")
            return
        self.document.change(changed, "Remove a row", self._moved(index))

    def _moved(self, index: int):  # type: ignore[no-untyped-def]
        depth = len(self.row.path)

        def moved(path):  # type: ignore[no-untyped-def]
            if path[:depth] != self.row.path or len(path) <= depth or int(path[depth]) < index:
                return path
            return None if path[depth] == index else (*self.row.path, int(path[depth]) - 1, *path[depth + 1 :])

        return moved

    def paste(self, text: str) -> None:
        """Replace the rows by those of a text, as one step of undo; a text that is no table changes nothing."""
        columns = self.model.columns
        metadata = editing.attribute_of(self.document.case, self.row.path)
        try:
            rows = rows_from(text, columns, self._units(), int(metadata["least"]))
        except PasteRefused as refusal:
            self.show_reason(str(refusal))
            return
        case = editing.replace_at(self.document.case, self.row.path, rows)
        inside = self.row.path
        self.document.change(case, "Paste rows", lambda path: None if path[: len(inside)] == inside else path)

    def _units(self) -> tuple[str, ...]:
        last = self.model.rows[-1] if self.model.rows else ()
        usual = words()["usual_units"]
        columns = self.model.columns
        return tuple(last[i].unit if i < len(last) else usual.get(column, "") for i, column in enumerate(columns))

    def _paste_clipboard(self) -> None:
        self.paste(QGuiApplication.clipboard().text())

    def _open_file(self) -> None:
        name, _ = QFileDialog.getOpenFileName(self, "Rows from a file", "", "Tables (*.csv *.txt *.tsv);;All files (*)")
        if name:
            self.read_file(FilePath(name))

    def read_file(self, file: FilePath) -> None:
        """Replace the rows by those of a file; a file that cannot be read changes nothing."""
        try:
            text = file.read_text(encoding="utf-8-sig")
        except (OSError, UnicodeDecodeError) as problem:
            self.show_reason(f"{file.name} cannot be read as text: {problem.__class__.__name__}.")
            return
        self.paste(text)

    def set_echo_width(self, width: int) -> None:
        """It has no echo."""

    def hide_echo(self, hidden: bool = True) -> None:
        """It has no echo."""
