"""One group of the entry panel: its heading and its fields."""

from __future__ import annotations

from collections.abc import Callable, Iterator

from PySide6.QtCore import Qt
from PySide6.QtWidgets import QVBoxLayout, QWidget

from headfall.case.model import Path
from headfall_app.document import Document
from headfall_app.entry.action import ActionField
from headfall_app.entry.beside import beside
from headfall_app.entry.changes import add_outlet, remove_outlet
from headfall_app.entry.choice import ChoiceField
from headfall_app.entry.field import Field
from headfall_app.entry.fields import ListField, NumberField, QuantityField, TextField
from headfall_app.entry.heading import GroupHeading
from headfall_app.entry.plan_rows import Group, Row
from headfall_app.entry.table_field import TableField
from headfall_app.label import label
from headfall_app.words import group_title, words

_FIELDS: dict[str, Callable[[Row, Document], Field]] = {
    "action": ActionField,
    "list": ListField,
    "table": TableField,
    "quantity": QuantityField,
    "number": NumberField,
    "text": TextField,
    "choice": ChoiceField,
}


class GroupBox(QWidget):
    """A heading over a column of fields, rebuilt only when its rows change."""

    def __init__(self, group: Group, document: Document, parent: QWidget | None = None) -> None:
        super().__init__(parent)
        self._document, self.group = document, Group(group.key, group.path, (), group.folds)
        title = words()["groups"].get(group.key) or (group_title(group.path) if group.path else "")
        self.heading = GroupHeading(title, group.folds, self)
        self.heading.folded_changed.connect(self._fold)
        self._remark = label("remark", 12, wraps=True)
        self._remark.hide()
        self._fields: list[Field] = []
        self._body = QWidget(self)
        self._body.setVisible(not group.folds)
        self._rows = QVBoxLayout(self._body)
        self._rows.setContentsMargins(0, 0, 0, 0)
        self._rows.setSpacing(0)
        column = QVBoxLayout(self)
        column.setContentsMargins(0, 0, 0, 0)
        column.setSpacing(0)
        for widget in (self.heading, self._remark, self._body):
            column.addWidget(widget)
        if group.path[:1] == ("outlets",):
            self._add_outlet_links(int(group.path[1]))
        self.show_rows(group)

    def show_rows(self, group: Group) -> None:
        """Show the rows of the group; fields of rows that stay are kept, with their cursor."""
        if group == self.group:
            return
        shown = {field.row for field in self._fields}
        kept = {field.row: field for field in self._fields}
        while self._rows.count():
            self._rows.takeAt(0)
        self._fields = [kept.pop(row) if row in kept else _FIELDS[row.kind](row, self._document) for row in group.rows]
        for field in self._fields:
            self._rows.addWidget(field)
            if isinstance(field, ActionField) and field.row not in shown:
                field.added.connect(self._go_to_part)
        for field in kept.values():
            field.hide()
            field.setParent(None)
            field.deleteLater()
        self.group = group

    def fields(self) -> Iterator[Field]:
        """The fields in the order they stand."""
        yield from self._fields

    def field_at(self, path: Path) -> Field | None:
        """Return the field of an entry; None where this group does not show it."""
        return max((field for field in self.fields() if field.row.path == path), key=_rank, default=None)

    def tab_stops(self) -> Iterator[QWidget]:
        """What the Tab key stops at, in order."""
        yield from self.heading.links
        for field in self.fields():
            yield from field.tab_stops()

    def refresh(self) -> None:
        """Show what the document holds."""
        for field in self.fields():
            field.refresh()

    def refresh_answers(self) -> None:
        """Show what hangs on the answers: the value beside the heading and faults between entries."""
        self.heading.set_beside(beside(self._document, self.group))
        faults = {fault.path: fault.sentence for fault in reversed(self._document.faults)}
        for field in self.fields():
            field.show_faults(faults if self.field_at(field.row.path) is field else {})

    @property
    def remark(self) -> str:
        """What is said below the heading; empty where nothing is."""
        return self._remark.text()

    def _go_to_part(self, path: Path) -> None:
        """Put the cursor into the first field of a part that was added."""
        within = (field for field in self._fields if field.row.path[: len(path)] == path)
        first = next((field for field in within if field.row.kind != "action"), None)
        if first is not None:
            # It was put in place just now: shown only by the next turn of the event loop, unless it is asked for here.
            first.show()
            first.editor.setFocus(Qt.FocusReason.OtherFocusReason)

    def _fold(self, folded: bool) -> None:
        self._body.setVisible(not folded)

    def _add_outlet_links(self, index: int) -> None:
        for text, name, act in (
            ("add another", f"Add an outlet after outlet {index + 1}", self._add),
            ("copy", f"Copy outlet {index + 1}", self._copy),
            ("remove", f"Remove outlet {index + 1}", self._remove),
        ):
            self.heading.add_link(text, name).clicked.connect(act)

    def _add(self) -> None:
        add_outlet(self._document, int(self.group.path[1]))

    def _copy(self) -> None:
        add_outlet(self._document, int(self.group.path[1]), copy=True)

    def _remove(self) -> None:
        refusal = remove_outlet(self._document, int(self.group.path[1]))
        self._remark.setText(refusal)
        self._remark.setVisible(bool(refusal))


def _rank(field: Field) -> int:
    return field.row.rank
