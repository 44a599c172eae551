"""The fields a person types into: quantities, plain numbers and free text."""

from __future__ import annotations

from PySide6.QtWidgets import QWidget

from headfall.case.model import LossRange
from headfall.quantities import Quantity
from headfall_app.document import Document
from headfall_app.entry.echo import echo_of, level_echo
from headfall_app.entry.field import ECHO_WIDTH, GAP, Field
from headfall_app.entry.handbook import handbook_says
from headfall_app.entry.line import EntryLine
from headfall_app.entry.offers import offer
from headfall_app.entry.plan_rows import Row
from headfall_app.entry.stepping import number_in, stepped, written
from headfall_app.entry.typed import Refused, read_typed, unit_for, value_or_none
from headfall_app.words import lowered


def _change_of(row: Row) -> str:
    return f"Change the {lowered(row.label)}"


_FRAME = 18
"""What border, paddings and the cursor of a line take beside its text [px]."""


class LineField(Field):
    """A label and a line; what was typed stays in the line until it can be read, with the reason under it."""

    def __init__(self, row: Row, document: Document, parent: QWidget | None = None) -> None:
        self.line = EntryLine()
        super().__init__(row, document, self.line, parent)
        offer(self.line, row)
        self.line.committed.connect(self.commit)
        self.line.reverted.connect(self.revert)
        self.line.stepped.connect(self.step)
        self.line.entered.connect(self.point)
        self.line.left.connect(document.end_gesture)
        self.line.left.connect(self.unpoint)
        self._shown = self._handbook = ""

    def refresh(self) -> None:
        """Show what the document holds; a text that is being typed stays unless its entry was changed elsewhere."""
        wrong = self.document.wrong.get(self.row.path)
        text = wrong.text if wrong else self.text_of(value_or_none(self.document.case, self.row.path))
        if text != self._shown or not self.line.isModified():
            self._shown = text
            if self.line.text() != text:
                self.line.setText(text)
                if not self.line.hasFocus():
                    self.line.setCursorPosition(0)
            self.line.setModified(False)
        self._say_untyped()
        self.show_echo()
        self.show_reason(wrong.sentence if wrong else "")

    def _say_untyped(self) -> None:
        """Say in the empty line what counts while nothing is typed."""
        self._handbook = handbook_says(self.document, self.row)
        said = self._handbook or self.row.default.replace("deg", "°") or self.row.untyped
        if self.line.placeholderText() != said:
            self.line.setPlaceholderText(said)

    def commit(self) -> None:
        """Read the line: a good text goes into the case, another one is kept beside its reason."""
        typed, path, what = self.line.text().strip(), self.row.path, _change_of(self.row)
        self.line.setModified(False)
        self._shown = typed
        try:
            self.document.set(path, read_typed(self.document.case, self.row, typed), what)
        except Refused as refusal:
            self.document.set_wrong(path, typed, str(refusal), what)
        self.refresh()

    def revert(self) -> None:
        """Put back what stood before: first the text the document holds, then the last good value."""
        if self.line.isModified():
            self.line.setText(self._shown)
        elif self.row.path in self.document.wrong:
            value = value_or_none(self.document.case, self.row.path)
            self.document.set(self.row.path, value, f"Put back the {lowered(self.row.label)}")
        self.line.selectAll()

    def step(self, steps: int) -> None:
        """Step the number; one stay in the field is one step of undo."""
        if self.row.path in self.document.wrong:
            return
        text = self.stepped_text(self.line.text() or self.row.default, steps)
        try:
            value = read_typed(self.document.case, self.row, text) if text else None
        except Refused:
            return
        if text:
            gesture = ("step", self.row.path)
            self.document.set(self.row.path, value, _change_of(self.row), gesture)

    def text_of(self, value: object) -> str:
        """Return the text of a value as the line shows it; empty where nothing was typed."""
        return "" if value is None else str(value)

    def stepped_text(self, text: str, steps: int) -> str:
        """Return the text some steps up; empty where there is nothing to step."""
        return ""

    def show_echo(self) -> None:
        """Say beside the line what its value is in the units of the answers, or that it is a default."""
        default = not self._shown and self.row.default and self.row.kind != "text"
        said = "handbook" if not self._shown and self._handbook else "default" if default else ""
        self.set_untyped(not self._shown)
        self.set_echo(said or self.echo_text())

    def echo_text(self) -> str:
        """Return the typed value in the units of the answers; empty where it is typed in them."""
        return ""


class MeasuredField(LineField):
    """A line that shares its width with the echo beside it, by what stands in both."""

    def __init__(self, row: Row, document: Document, parent: QWidget | None = None) -> None:
        super().__init__(row, document, parent)
        self.line.textChanged.connect(self.share_width)

    def share_width(self) -> None:
        text = self.line.text() or self.line.placeholderText()
        need = self.line.fontMetrics().horizontalAdvance(text) + _FRAME
        echo, room = self.echo_need(), self.room() - GAP
        if echo <= ECHO_WIDTH <= room - need:
            self.set_echo_width(ECHO_WIDTH)
        else:
            self.set_echo_width(echo if 0 < echo <= room - need else 0)


class QuantityField(MeasuredField):
    """A quantity with its unit; a bare number takes the unit that stood here before."""

    def set_echo_width(self, width: int) -> None:
        super().set_echo_width(width)
        # What a listed size is inside must be seen: without room beside the line it stands below it.
        self.say_below(f"{self.echo} inside" if width <= 0 and self.row.dimension == "bore" and self.echo else "")

    def text_of(self, value: object) -> str:
        return value.text if isinstance(value, Quantity) else ""

    def stepped_text(self, text: str, steps: int) -> str:
        unit = unit_for(self.document.case, self.row)
        number = number_in(text, unit)
        if number is None:
            return ""
        return f"{written(stepped(number, steps), text)} {unit}"

    def echo_text(self) -> str:
        value = value_or_none(self.document.case, self.row.path)
        wrong = self.row.path in self.document.wrong
        if isinstance(value, Quantity) and self.row.dimension == "level" and value.dimension != "length":
            return "" if wrong else level_echo(self.document, self.row.path)
        return echo_of(value, self.row, self.document.display) if isinstance(value, Quantity) and not wrong else ""


class NumberField(MeasuredField):
    """A plain number without a unit."""

    def text_of(self, value: object) -> str:
        if isinstance(value, LossRange):
            return "; ".join(f"{one or 0.0:.6g}" for one in (value.low, value.typical, value.high))
        if isinstance(value, tuple):
            return "; ".join(f"{one:.6g}" for one in value)
        return f"{value:.10g}" if isinstance(value, (int, float)) else ""

    def stepped_text(self, text: str, steps: int) -> str:
        number = number_in(text, "")
        if number is None:
            return ""
        return written(number + steps if self.row.whole else stepped(number, steps), text)


class TextField(LineField):
    """Free text; it takes the whole width, having no echo."""

    def __init__(self, row: Row, document: Document, parent: QWidget | None = None) -> None:
        super().__init__(row, document, parent)
        self.hide_echo()


class ListField(LineField):
    """Several quantities in one line, a semicolon or a comma between them."""

    def __init__(self, row: Row, document: Document, parent: QWidget | None = None) -> None:
        super().__init__(row, document, parent)
        self.hide_echo()

    def text_of(self, value: object) -> str:
        return "; ".join(one.text for one in value) if isinstance(value, tuple) else ""
