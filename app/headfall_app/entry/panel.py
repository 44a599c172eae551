"""The entry panel: every entry of the case, grouped as on a drawing."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import fields
from itertools import pairwise

from PySide6.QtCore import QEvent, Qt
from PySide6.QtWidgets import QApplication, QScrollArea, QVBoxLayout, QWidget

from headfall.case.model import Case, Path
from headfall.quantities import DisplayUnits
from headfall_app.document import Document
from headfall_app.entry.field import Field
from headfall_app.entry.group import GroupBox
from headfall_app.entry.plan import Group, groups_of, rows_hang_on
from headfall_app.entry.plan_vessel import has_inside
from headfall_app.entry.typed import value_or_none
from headfall_app.paint.theme import Theme
from headfall_app.undo import WrongEntry

WIDTH, NARROW_WIDTH, WIDE_WINDOW = 300, 292, 1400


_Seen = tuple[Case, dict[Path, WrongEntry], DisplayUnits]


class EntryPanel(QWidget):
    """The groups in a column that scrolls; follows the document and lights the entry that is pointed at."""

    def __init__(self, document: Document, theme: Theme, parent: QWidget | None = None) -> None:
        super().__init__(parent)
        self.setObjectName("entry")
        self.setAttribute(Qt.WidgetAttribute.WA_StyledBackground)
        self.theme = theme
        self._document = document
        self._boxes: list[GroupBox] = []
        self._shown: tuple[Group, ...] = ()
        self._column_widget = QWidget()
        self._column_widget.setObjectName("entry")
        self._column = QVBoxLayout(self._column_widget)
        self._column.setSpacing(0)
        self._seen: _Seen | None = None
        self._begins_anew = False
        self._column.addStretch(1)
        self._area = QScrollArea(self)
        self._area.setObjectName("entry")
        self._area.setWidgetResizable(True)
        self._area.setHorizontalScrollBarPolicy(Qt.ScrollBarPolicy.ScrollBarAlwaysOff)
        self._area.setFocusPolicy(Qt.FocusPolicy.NoFocus)
        self._area.setWidget(self._column_widget)
        layout = QVBoxLayout(self)
        layout.setContentsMargins(0, 0, 0, 0)
        layout.addWidget(self._area)
        self._area.verticalScrollBar().rangeChanged.connect(self._set_margins)
        self.set_narrow(False)
        document.changed.connect(self._follow)
        document.answers_changed.connect(self._follow_answers)
        document.pointed_changed.connect(self._light)
        document.replaced.connect(self._begin_anew)
        self._follow()
        self._open_what_is_typed()

    def set_theme(self, theme: Theme) -> None:
        """Take the colours of another theme; the style sheet of the window brings them."""
        self.theme = theme

    def set_narrow(self, narrow: bool) -> None:
        """Take the width for a window narrower than 1400."""
        self._is_narrow = narrow
        self.setFixedWidth(NARROW_WIDTH if narrow else WIDTH)
        self._set_margins()

    def _set_margins(self, *_range: int) -> None:
        # The scroll bar stands inside the right margin, so that the fields keep their width when it comes and goes.
        bar = self._area.verticalScrollBar()
        taken = bar.sizeHint().width() if bar.maximum() > 0 else 0
        self._column.setContentsMargins(16 if self._is_narrow else 20, 4, 20 - taken, 12)

    def fields(self) -> Iterator[Field]:
        """All fields, from top to bottom."""
        for box in self._boxes:
            yield from box.fields()

    def groups(self) -> tuple[GroupBox, ...]:
        """All groups, from top to bottom."""
        return tuple(self._boxes)

    def field_at(self, path: Path) -> Field | None:
        """Return the field of an entry; None where none is shown."""
        found = (box.field_at(path) for box in self._boxes)
        return next((field for field in found if field is not None), None)

    def go_to(self, path: Path) -> None:
        """Unfold the group of an entry, bring it into view and put the cursor there."""
        box = self.box_of(path)
        field = self.field_at(path) or self._field_around(path)
        if box is None:
            return
        box.heading.set_folded(False)
        if field:
            field.go_to(path)
        else:
            box.setFocus(Qt.FocusReason.OtherFocusReason)
        self._bring_into_view(field or box)

    def _field_around(self, path: Path) -> Field | None:
        """Return the field of the list, table or range that an entry stands in."""
        around = (field for field in self.fields() if path[: len(field.row.path)] == field.row.path)
        return next((field for field in around if field.row.kind in ("table", "list", "number")), None)

    def open_group(self, box: GroupBox) -> None:
        """Unfold a group, bring it to the top and put the cursor into its first field."""
        box.heading.set_folded(False)
        first = next(box.fields(), None)
        self._settle()
        self._area.verticalScrollBar().setValue(box.y())
        if first:
            first.editor.setFocus(Qt.FocusReason.TabFocusReason)

    def box_of(self, path: Path) -> GroupBox | None:
        """Return the group an entry stands in."""
        fits = [box for box in self._boxes if any(row.path == path for row in box.group.rows)]
        field = self._field_around(path)
        fits += [box for box in self._boxes if field is not None and field.row in box.group.rows]
        fits += [box for box in self._boxes if box.group.path and path[: len(box.group.path)] == box.group.path]
        return fits[0] if fits else self._boxes[-1] if len(path) == 1 else None

    def _begin_anew(self) -> None:
        self._begins_anew = True

    def _go_to_top(self) -> None:
        # Groups that go can take the cursor with them, and the area follows the cursor: so only when all is in place.
        self._begins_anew = False
        self._settle()
        self._area.verticalScrollBar().setValue(0)

    def _follow(self) -> None:
        self._show_document()
        if self._begins_anew:
            self._open_what_is_typed()
            self._go_to_top()

    def _open_what_is_typed(self) -> None:
        for box in self._boxes:
            if box.group.key == "inside":
                box.heading.set_folded(not has_inside(self._document.case.vessel))

    def _show_document(self) -> None:
        before, self._seen = self._seen, (self._document.case, self._document.wrong, self._document.display)
        groups = self._shown if _same_rows(before, self._seen) else groups_of(self._document.case)
        if groups == self._shown:
            for box in self._boxes:
                if not _alike(box.group.path, before, self._seen):
                    box.refresh()
            return
        if [group.key for group in groups] != [box.group.key for box in self._boxes]:
            self._arrange(groups)
        for box, group in zip(self._boxes, groups, strict=True):
            box.show_rows(group)
            box.refresh()
        self._shown = groups
        self._order_tabs()
        self._follow_answers()

    def _order_tabs(self) -> None:
        stops = [stop for box in self._boxes for stop in box.tab_stops()]
        for one, other in pairwise(stops):
            QWidget.setTabOrder(one, other)

    def _arrange(self, groups: tuple[Group, ...]) -> None:
        kept = {box.group.key: box for box in self._boxes}
        while self._column.count():
            self._column.takeAt(0)
        self._boxes = [
            kept.pop(group.key) if group.key in kept else GroupBox(group, self._document) for group in groups
        ]
        for box in self._boxes:
            self._column.addWidget(box)
        self._column.addStretch(1)
        for box in kept.values():
            box.hide()
            box.setParent(None)
            box.deleteLater()

    def _follow_answers(self) -> None:
        for box in self._boxes:
            box.refresh_answers()

    def _light(self) -> None:
        pointed = self._document.pointed
        for field in self.fields():
            field.set_lit(field.row.path == pointed)
        lit = self.field_at(pointed) if pointed else None
        if lit and not lit.editor.hasFocus():
            self._bring_into_view(lit)

    def _bring_into_view(self, widget: QWidget) -> None:
        self._settle()
        self._area.ensureWidgetVisible(widget, 0, 40)

    def _settle(self) -> None:
        # A group unfolded just now has its height only after the event loop has turned, unless it is asked for here.
        QApplication.sendPostedEvents(None, QEvent.Type.LayoutRequest)
        self._column.activate()
        self._column_widget.resize(self._column_widget.width(), self._column.sizeHint().height())


def _same_rows(before: _Seen | None, now: _Seen) -> bool:
    """Whether the rows are certainly the same: what they hang on has not changed."""
    if before is None:
        return False
    pairs = zip(rows_hang_on(before[0]), rows_hang_on(now[0]), strict=True)
    return all(former is present for former, present in pairs)


def _alike(path: Path, before: _Seen | None, now: _Seen) -> bool:
    """Whether nothing that a group shows has changed: parts of a case that were not edited are the same objects."""
    if before is None or before[1] or now[1] or before[2] is not now[2]:
        return False
    if not path:
        return all(getattr(before[0], item.name) is getattr(now[0], item.name) for item in fields(Case))
    return value_or_none(before[0], path) is value_or_none(now[0], path)
