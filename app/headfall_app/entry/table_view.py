"""The view of a table that is typed into: keys of a spreadsheet, wrong cells in the colour of limits."""

from __future__ import annotations

from collections.abc import Callable

from PySide6.QtCore import QModelIndex, QPersistentModelIndex, QSize, Qt, Signal
from PySide6.QtGui import QFocusEvent, QFont, QGuiApplication, QKeyEvent, QKeySequence, QPainter, QPalette
from PySide6.QtWidgets import (
    QAbstractItemDelegate,
    QHeaderView,
    QStyledItemDelegate,
    QStyleOptionViewItem,
    QTableView,
    QWidget,
)

from headfall_app.entry.table_model import WRONG
from headfall_app.paint.fonts import font
from headfall_app.paint.theme import theme

ROW = 24
Index = QModelIndex | QPersistentModelIndex


class CellPainter(QStyledItemDelegate):
    """Paints a wrong cell in the colour of limits, with a bar at its left edge."""

    def paint(self, painter: QPainter, option: QStyleOptionViewItem, index: Index) -> None:
        if index.data(WRONG):
            base = option.palette.color(QPalette.ColorRole.Base)
            colours = theme("dark" if base.lightnessF() < 0.5 else "light")
            option = QStyleOptionViewItem(option)
            for role in (QPalette.ColorRole.Text, QPalette.ColorRole.HighlightedText):
                option.palette.setColor(role, colours.colour("limit"))
            option.palette.setColor(QPalette.ColorRole.Highlight, colours.colour("limit_soft"))
            painter.fillRect(option.rect, colours.colour("limit_soft"))
            super().paint(painter, option, index)
            painter.fillRect(option.rect.adjusted(0, 0, 3 - option.rect.width(), 0), colours.colour("limit"))
            return
        super().paint(painter, option, index)


class TableView(QTableView):
    """A small table that can be typed into; Enter goes on to the next cell, Tab leaves the table."""

    entered_table = Signal()
    left_table = Signal()

    def __init__(self, paste: Callable[[str], None], add_row: Callable[[], None]) -> None:
        super().__init__()
        self.setObjectName("rows")
        self._paste, self._add_row = paste, add_row
        self.setFont(font(12))
        self.setItemDelegate(CellPainter(self))
        # The view hears it first: it has closed the editor by then.
        self.itemDelegate().closeEditor.connect(self._go_on)
        self.setTabKeyNavigation(False)
        self.setSelectionMode(QTableView.SelectionMode.SingleSelection)
        self.setHorizontalScrollBarPolicy(Qt.ScrollBarPolicy.ScrollBarAlwaysOff)
        self.setCornerButtonEnabled(False)
        down, across = self.verticalHeader(), self.horizontalHeader()
        down.setSectionResizeMode(QHeaderView.ResizeMode.Fixed)
        down.setDefaultSectionSize(ROW)
        down.setFont(font(11))
        down.setFixedWidth(26)
        down.setDefaultAlignment(Qt.AlignmentFlag.AlignCenter)
        across.setFont(font(11, QFont.Weight.DemiBold.value))
        across.setSectionResizeMode(QHeaderView.ResizeMode.Stretch)
        across.setMinimumSectionSize(30)
        across.setHighlightSections(False)
        across.setDefaultAlignment(Qt.AlignmentFlag.AlignLeft | Qt.AlignmentFlag.AlignVCenter)

    def heading_height(self) -> int:
        """Return the height of the two lines of the headings [px]."""
        return max(self.horizontalHeader().sizeHint().height(), 2 * self.horizontalHeader().fontMetrics().height() + 6)

    def sizeHint(self) -> QSize:
        return QSize(200, self.heading_height() + 3 * ROW)

    def keyPressEvent(self, event: QKeyEvent) -> None:
        here = self.currentIndex()
        if event.matches(QKeySequence.StandardKey.Paste):
            self._paste(QGuiApplication.clipboard().text())
        elif event.matches(QKeySequence.StandardKey.Copy) and here.isValid():
            QGuiApplication.clipboard().setText(str(here.data(Qt.ItemDataRole.EditRole)))
        elif event.key() == Qt.Key.Key_Delete and here.isValid():
            self.model().setData(here, "")
        elif event.key() == Qt.Key.Key_Insert:
            self._add_row()
        elif event.key() in (Qt.Key.Key_Return, Qt.Key.Key_Enter):
            # The key that ends an editor comes by here too, before the editor has closed.
            if here.isValid() and self.state() != QTableView.State.EditingState:
                self.edit(here)
        else:
            super().keyPressEvent(event)

    def _go_on(self, _editor: QWidget, hint: QAbstractItemDelegate.EndEditHint) -> None:
        here = self.currentIndex()
        if hint == QAbstractItemDelegate.EndEditHint.SubmitModelCache:
            self._go_on_from(here.row(), here.column())

    def _go_on_from(self, row: int, column: int) -> None:
        model = self.model()
        row, column = (row, column + 1) if column + 1 < model.columnCount() else (row + 1, 0)
        if row < model.rowCount():
            self.setCurrentIndex(model.index(row, column))

    def focusInEvent(self, event: QFocusEvent) -> None:
        super().focusInEvent(event)
        if not self.currentIndex().isValid() and self.model().rowCount():
            self.setCurrentIndex(self.model().index(0, 0))
        self.entered_table.emit()

    def focusOutEvent(self, event: QFocusEvent) -> None:
        super().focusOutEvent(event)
        self.left_table.emit()
