"""The line a person types into: it commits, reverts and steps, and never blocks a key."""

from __future__ import annotations

from PySide6.QtCore import QEvent, Qt, Signal
from PySide6.QtGui import QFocusEvent, QKeyEvent, QKeySequence
from PySide6.QtWidgets import QCompleter, QLineEdit, QWidget

_STEPS = {
    Qt.Key.Key_Up: 1,
    Qt.Key.Key_Down: -1,
    Qt.Key.Key_PageUp: 10,
    Qt.Key.Key_PageDown: -10,
}
_UNDO_KEYS = (QKeySequence.StandardKey.Undo, QKeySequence.StandardKey.Redo)


class EntryLine(QLineEdit):
    """A line edit with three wishes: ``committed``, ``reverted`` and ``stepped``, and two facts about the cursor."""

    committed = Signal()
    reverted = Signal()
    stepped = Signal(int)
    """How many steps up; negative is down."""
    entered = Signal()
    left = Signal()

    def __init__(self, parent: QWidget | None = None) -> None:
        super().__init__(parent)
        # editingFinished fires twice (Return, then loss of focus): isModified tells the first from the second.
        self.editingFinished.connect(self.finish)
        # A file dropped on the window is to be opened, not written into a field.
        self.setAcceptDrops(False)

    def offer(self, completer: QCompleter) -> None:
        """Offer names while one is typed; Down opens the list, choosing one takes it in."""
        self.setCompleter(completer)
        # The line takes the highlighted name without counting it as typed; queued, since it does so after this signal.
        completer.highlighted.connect(self._is_being_chosen, Qt.ConnectionType.QueuedConnection)
        completer.activated.connect(self._take_chosen)

    def _is_being_chosen(self, name: str) -> None:
        if self.hasFocus() and self.text() == name:
            self.setModified(True)

    def _take_chosen(self, name: str) -> None:
        self.setText(name)
        self.setModified(True)
        self.finish()

    def _close_offers(self) -> bool:
        """Close the list of names; returns whether one was open."""
        popup = self.completer().popup() if self.completer() is not None else None
        is_open = popup is not None and popup.isVisible()
        if popup is not None and is_open:
            popup.hide()
        return is_open

    def finish(self) -> None:
        """Take in what was typed, if anything was."""
        if self.isModified():
            self.committed.emit()

    def event(self, event: QEvent) -> bool:
        # Undo belongs to the line while something is being typed, and to the document else.
        if (
            event.type() == QEvent.Type.ShortcutOverride
            and isinstance(event, QKeyEvent)
            and not self.isModified()
            and any(event.matches(key) for key in _UNDO_KEYS)
        ):
            event.ignore()
            return False
        return super().event(event)

    def keyPressEvent(self, event: QKeyEvent) -> None:
        step = _STEPS.get(Qt.Key(event.key()))
        if event.key() == Qt.Key.Key_Down and self.completer() is not None and not _is_stepped(self.text()):
            self.completer().setCompletionPrefix(self.text() if self.isModified() else "")
            self.completer().complete()
        elif step is not None and event.modifiers() in (
            Qt.KeyboardModifier.NoModifier,
            Qt.KeyboardModifier.KeypadModifier,
        ):
            self.finish()
            self.stepped.emit(step)
        elif event.key() == Qt.Key.Key_Escape and self._close_offers():
            return
        elif event.key() == Qt.Key.Key_Escape:
            self.reverted.emit()
        else:
            super().keyPressEvent(event)

    def focusInEvent(self, event: QFocusEvent) -> None:
        super().focusInEvent(event)
        self.entered.emit()

    def focusOutEvent(self, event: QFocusEvent) -> None:
        super().focusOutEvent(event)
        if event.reason() == Qt.FocusReason.PopupFocusReason:
            return
        if event.reason() != Qt.FocusReason.ActiveWindowFocusReason:
            # The number stands at the beginning: it is what must be seen of a text that is too long.
            self.setCursorPosition(0)
        self.left.emit()


def _is_stepped(text: str) -> bool:
    """Whether Up and Down step a text: one that is a number and a unit, and no name."""
    return (
        text[:1].isdigit() and " sch" not in text and "SDR" not in text and "hygienic" not in text and "°" not in text
    )
