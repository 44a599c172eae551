"""A small table in the panel: rows of quantities, typed, pasted or read from a file."""

from __future__ import annotations

from pathlib import Path as FilePath

from PySide6.QtWidgets import QFileDialog, QGridLayout, QHBoxLayout, QWidget

from headfall.case import editing
from headfall.case.model import Path
from headfall_app.document import Document
from headfall_app.entry.changes import left, shifted
from headfall_app.entry.field import Field
from headfall_app.entry.heading import Link
from headfall_app.entry.pasted import PasteRefused, cells_from, is_one_cell
from headfall_app.entry.plan_rows import Row
from headfall_app.entry.table_cells import columns_at, least_columns, read_cells, units_at
from headfall_app.entry.table_model import RowsModel
from headfall_app.entry.table_view import ROW, TableView
from headfall_app.label import label
from headfall_app.words import lowered, name_of

_FEWEST_ROWS, _MOST_ROWS = 2, 9
_FILES = "Tables (*.csv *.txt *.tsv);;All files (*)"


class TableField(Field):
    """The table with what can be done to it under it."""

    def __init__(self, row: Row, document: Document, parent: QWidget | None = None) -> None:
        self.view = TableView(self.paste, self.add_row)
        self.model = RowsModel(row, document)
        self._sentence = ""
        super().__init__(row, document, self.view, parent)
        self.view.setModel(self.model)
        self.view.setFont(self.view.font())
        self.view.entered_table.connect(self.point)
        self.view.left_table.connect(self.unpoint)
        self.view.selectionModel().currentChanged.connect(lambda *_: self._say_reason())
        self.refresh()

    def _lay_out(self) -> None:
        grid = self._grid = QGridLayout(self)
        grid.setContentsMargins(0, 2, 0, 6)
        grid.setVerticalSpacing(3)
        links = QHBoxLayout()
        links.setContentsMargins(0, 0, 0, 0)
        links.setSpacing(10)
        name = lowered(name_of(self.row.path))
        self.links: list[Link] = []
        for text, said, act in (
            ("add a row", f"Add a row to {name}", self.add_row),
            ("remove it", f"Remove the row in hand of {name}", self.remove_row),
            ("paste", f"Paste rows into {name}", self._paste_clipboard),
            ("from a file", f"Read the rows of {name} from a file", self._open_file),
        ):
            link = Link(text, said)
            link.clicked.connect(act)
            links.addWidget(link)
            self.links.append(link)
        links.addStretch(1)
        self._remark = label("remark", 12, wraps=True)
        self._remark.hide()
        grid.addWidget(self.editor, 0, 0)
        grid.addLayout(links, 1, 0)
        grid.addWidget(self._reason, 2, 0)
        grid.addWidget(self._remark, 3, 0)
        self._label.hide()
        self._echo.hide()

    def tab_stops(self) -> tuple[QWidget, ...]:
        """The table, then what can be done to it."""
        return (self.view, *self.links)

    def refresh(self) -> None:
        """Show what the document holds."""
        here = self.view.currentIndex()
        place = (here.row(), here.column())
        self.model.follow()
        if place[0] >= 0 and not self.view.currentIndex().isValid() and self.model.rowCount():
            self.view.setCurrentIndex(self.model.index(min(place[0], self.model.rowCount() - 1), place[1]))
        shown = min(max(self.model.rowCount(), _FEWEST_ROWS), _MOST_ROWS)
        heading = self.view.heading_height()
        self.view.horizontalHeader().setFixedHeight(heading)
        self.view.setFixedHeight(heading + shown * ROW + 2)
        self._say_reason()

    def go_to(self, path: Path) -> None:
        """Put the cursor into the table, at the cell or row of the path."""
        within = [int(step) for step in path[len(self.row.path) :]]
        if within:
            self.view.setCurrentIndex(self.model.index(within[0], within[1] if len(within) > 1 else 0))
        super().go_to(path)

    def show_faults(self, faults: dict[Path, str]) -> None:
        """Show the faults between entries that stand at this table, its rows or its cells."""
        depth = len(self.row.path)
        own = {path: sentence for path, sentence in faults.items() if path[:depth] == self.row.path}
        self.model.show_faults(own)
        self._sentence = next(iter(own.values()), "")
        self._say_reason()

    def _say_reason(self) -> None:
        """Say what is wrong with the cell in hand, else with the first wrong one and how many more there are."""
        depth = len(self.row.path)
        wrong = {path: entry for path, entry in self.document.wrong.items() if path[:depth] == self.row.path}
        here = wrong.get(self.model.path_of(self.view.currentIndex()))
        first = here or next((wrong[path] for path in sorted(wrong, key=str)), None)
        if first is None:
            self.show_reason(self._sentence)
            return
        row, column = int(first.path[depth]) + 1, int(first.path[depth + 1]) + 1
        more = f" {len(wrong) - 1} more to mend." if len(wrong) > 1 else ""
        self.show_reason(f"Row {row}, column {column}: {first.sentence}{more}")

    def say(self, remark: str) -> None:
        """Say something under the table that is not wrong."""
        self._remark.setText(remark)
        self._remark.setVisible(bool(remark))

    def add_row(self) -> None:
        """Add a row after the one that is chosen, or at the end."""
        here = self.view.currentIndex()
        index = here.row() + 1 if here.isValid() else self.model.rowCount()
        changed = editing.insert_part(self.document.case, self.row.path, index)
        self.document.change(changed, "Add a row", lambda path: shifted(path, self.row.path, index, 1))
        self.view.setCurrentIndex(self.model.index(index, 0))

    def remove_row(self) -> None:
        """Take out the chosen row, or the last one."""
        here = self.view.currentIndex()
        index = here.row() if here.isValid() else self.model.rowCount() - 1
        try:
            changed = editing.remove_part(self.document.case, (*self.row.path, index))
        except ValueError:
            self.say("A table needs its last two rows: type over them.")
            return
        self.say("")
        self.document.change(changed, "Remove a row", lambda path: left(path, self.row.path, index))

    def paste(self, text: str) -> None:
        """Replace the rows by those of a text, or the cell in hand by its one value, as one step of undo."""
        here = self.view.currentIndex()
        if here.isValid() and is_one_cell(text):
            self.model.setData(here, text)
            return
        self._take(text, "Paste rows")

    def _take(self, text: str, what: str) -> None:
        case, path = self.document.case, self.row.path
        try:
            pasted = cells_from(text, columns_at(case, path), units_at(case, path), least_columns(case, path))
        except PasteRefused as refusal:
            self.show_reason(str(refusal))
            return
        changed, wrong = read_cells(case, path, pasted.cells)
        depth = len(path)
        self.document.change(changed, what, lambda one: None if one[:depth] == path else one, wrong)
        over = pasted.columns_left_out
        columns = "1 column more was" if over == 1 else f"{over} columns more were"
        self.say(f"{columns} left out." if over else "")

    def _paste_clipboard(self) -> None:
        from PySide6.QtGui import QGuiApplication

        self._take(QGuiApplication.clipboard().text(), "Paste rows")

    def _open_file(self) -> None:
        name, _ = QFileDialog.getOpenFileName(self, "Rows from a file", "", _FILES)
        if name:
            self.read_file(FilePath(name))

    def read_file(self, file: FilePath) -> None:
        """Replace the rows by those of a file, as one step of undo; a file that cannot be read changes nothing."""
        try:
            text = file.read_text(encoding="utf-8-sig")
        except OSError as trouble:
            self.show_reason(f"{file.name} was not read: {trouble.strerror or 'it cannot be opened'}.")
        except UnicodeDecodeError:
            self.show_reason(f"{file.name} was not read. It is not text in UTF-8: save it as CSV in UTF-8.")
        else:
            self._take(text, f"Rows from {file.name}")

    def set_echo_width(self, width: int) -> None:
        """It has no echo."""

    def hide_echo(self, hidden: bool = True) -> None:
        """It has no echo."""
