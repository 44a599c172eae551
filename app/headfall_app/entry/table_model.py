"""A table of the case as Qt's views ask for it: cells as typed, units in the headings, wrong cells with reasons."""

from __future__ import annotations

from PySide6.QtCore import QAbstractTableModel, QModelIndex, QPersistentModelIndex, Qt

from headfall.case.model import Path
from headfall.quantities import is_bare_number
from headfall_app.document import Document
from headfall_app.entry.plan_rows import Row
from headfall_app.entry.table_cells import Rows, columns_at, units_at
from headfall_app.entry.typed import Refused, read_typed, value_or_none
from headfall_app.words import lowered, name_of, words

Index = QModelIndex | QPersistentModelIndex
WRONG = Qt.ItemDataRole.UserRole
"""Whether a cell could not be read, or contradicts another one."""


class RowsModel(QAbstractTableModel):
    """The rows as the document holds them; a cell that could not be read keeps its text and its reason."""

    def __init__(self, row: Row, document: Document) -> None:
        super().__init__()
        self._row, self._document = row, document
        self._shown: tuple[Rows, tuple[str, ...]] = ((), ())
        self._faults: dict[Path, str] = {}
        self.follow()

    def follow(self) -> None:
        """Show what the document holds, and tell the view what has changed."""
        case, path = self._document.case, self._row.path
        rows: Rows = value_or_none(case, path) or ()
        columns = columns_at(case, path)
        if (len(rows), len(columns)) != (len(self._shown[0]), len(self._shown[1])):
            self.beginResetModel()
            self._shown, self._units = (rows, columns), units_at(case, path)
            self.endResetModel()
            return
        self._shown, self._units = (rows, columns), units_at(case, path)
        self.layoutChanged.emit()
        self.headerDataChanged.emit(Qt.Orientation.Horizontal, 0, len(columns) - 1)

    def show_faults(self, faults: dict[Path, str]) -> None:
        """Keep the faults between entries that stand at cells or rows."""
        if faults != self._faults:
            self._faults = faults
            self.layoutChanged.emit()

    def rowCount(self, parent: Index = QModelIndex()) -> int:  # noqa: B008
        return len(self._shown[0])

    def columnCount(self, parent: Index = QModelIndex()) -> int:  # noqa: B008
        return len(self._shown[1])

    def headerData(self, section: int, orientation: Qt.Orientation, role: int = Qt.ItemDataRole.DisplayRole) -> object:
        if orientation == Qt.Orientation.Vertical:
            return str(section + 1) if role == Qt.ItemDataRole.DisplayRole else None
        if role not in (Qt.ItemDataRole.DisplayRole, Qt.ItemDataRole.ToolTipRole):
            return None
        column = self._shown[1][section]
        name: str = words()["columns"].get(column, column)
        unit = self._units[section].replace("deg", "°").replace("^2", "²").replace("^3", "³").replace("*", "·")
        return f"{name}\n{unit}" if role == Qt.ItemDataRole.DisplayRole else f"{name}, {unit}"

    def flags(self, index: Index) -> Qt.ItemFlag:
        return super().flags(index) | Qt.ItemFlag.ItemIsEditable

    def data(self, index: Index, role: int = Qt.ItemDataRole.DisplayRole) -> object:
        path = self.path_of(index)
        wrong = self._document.wrong.get(path)
        if role == Qt.ItemDataRole.EditRole:
            return wrong.text if wrong else self._text(index)
        if role == Qt.ItemDataRole.DisplayRole:
            return wrong.text if wrong else self._short(self._text(index), index.column())
        if role == WRONG:
            return wrong is not None or path in self._faults or path[:-1] in self._faults
        if role == Qt.ItemDataRole.ToolTipRole:
            return wrong.sentence if wrong else self._faults.get(path) or self._text(index)
        if role == Qt.ItemDataRole.AccessibleTextRole:
            return f"{name_of(path)}: {wrong.text if wrong else self._text(index)}"
        if role == Qt.ItemDataRole.AccessibleDescriptionRole and wrong is not None:
            return wrong.sentence
        return None

    def setData(self, index: Index, value: object, role: int = Qt.ItemDataRole.EditRole) -> bool:
        if role != Qt.ItemDataRole.EditRole:
            return False
        path, text = self.path_of(index), str(value).strip()
        former = self._document.wrong.get(path)
        if text == (former.text if former else self._text(index)):
            return False
        what = f"Change a cell of the {lowered(self._row.label)}"
        if is_bare_number(text):
            text = f"{text} {self._units[index.column()]}"
        cell = Row(path, "quantity", "cell", self._shown[1][index.column()])
        try:
            self._document.set(path, read_typed(self._document.case, cell, text), what)
        except Refused as refusal:
            self._document.set_wrong(path, text, str(refusal), what)
        return True

    def path_of(self, index: Index) -> Path:
        """Return the path of a cell."""
        return (*self._row.path, index.row(), index.column())

    def _text(self, index: Index) -> str:
        row = self._shown[0][index.row()]
        return row[index.column()].text if index.column() < len(row) else ""

    def _short(self, text: str, column: int) -> str:
        """Return a cell's text without the unit that stands in the heading."""
        number = text.removesuffix(self._units[column]).rstrip()
        return number if number != text and is_bare_number(number) else text
