"""The row of answers over the stage."""

from __future__ import annotations

from PySide6.QtCore import QEvent, QPointF, QRectF, QSize, Qt
from PySide6.QtGui import QHelpEvent, QPainter, QPaintEvent
from PySide6.QtWidgets import QToolTip, QWidget

from headfall_app.document import Document
from headfall_app.paint.fonts import font, text_width
from headfall_app.paint.lettering import elided
from headfall_app.paint.theme import Theme
from headfall_app.view.answer_words import Answer, answers_of

TALL = 74
_NAME, _FIGURE, _RANGE = 13.0, 47.0, 68.0
_SHARES = (5, 4, 4, 5, 4)
_GAP = 16.0
_SIZES = ((31, 17), (26, 15), (24, 15), (20, 13), (17, 12))


class AnswersRow(QWidget):
    """Five answers on the same three baselines, greyed while they belong to an earlier case."""

    def __init__(self, document: Document, theme: Theme, parent: QWidget | None = None) -> None:
        super().__init__(parent)
        self._document, self._theme = document, theme
        self._answers: tuple[Answer, ...] = ()
        self.setAccessibleName("Answers")
        self.setFixedHeight(TALL)
        self.setAttribute(Qt.WidgetAttribute.WA_OpaquePaintEvent)
        document.answers_changed.connect(self.refresh)
        self.refresh()

    def set_theme(self, theme: Theme) -> None:
        """Paint in another set of colours."""
        self._theme = theme
        self.update()

    def sizeHint(self) -> QSize:
        return QSize(1056, TALL)

    @property
    def answers(self) -> tuple[Answer, ...]:
        """What the row says; empty while there are no answers."""
        return self._answers

    def refresh(self) -> None:
        """Say and paint the answers anew."""
        answers = self._document.answers
        self._answers = answers_of(answers, self._document.display) if answers is not None else ()
        said = " ".join(answer.sentence for answer in self.answers)
        if said and self._document.is_stale:
            said = f"Last good answers. {said}"
        if said != self.accessibleDescription():
            self.setAccessibleDescription(said)
        self.update()

    def cells(self) -> list[QRectF]:
        """Return the cells' boxes."""
        whole, left, boxes = float(sum(_SHARES)), 0.0, []
        for share in _SHARES:
            wide = self.width() * share / whole
            boxes.append(QRectF(left, 0.0, wide, TALL))
            left += wide
        return boxes

    def paintEvent(self, event: QPaintEvent) -> None:
        painter = QPainter(self)
        painter.fillRect(self.rect(), self._theme.colour("surface"))
        theme = self._theme.greyed if self._document.is_stale else self._theme
        answers = self.answers
        for index, box in enumerate(self.cells()):
            if index:
                painter.fillRect(QRectF(round(box.left()), 2.0, 1.0, TALL - 4.0), theme.colour("hair"))
            if index < len(answers):
                inner = box.adjusted(_GAP if index else 0.0, 0.0, -8.0, 0.0)
                _paint_answer(painter, inner, answers[index], theme, first=index == 0)

    def event(self, event: QEvent) -> bool:
        if event.type() == QEvent.Type.ToolTip and isinstance(event, QHelpEvent):
            for answer, box in zip(self.answers, self.cells(), strict=False):
                if box.contains(QPointF(event.pos())):
                    QToolTip.showText(event.globalPos(), answer.sentence, self)
            return True
        return super().event(event)


def _paint_answer(painter: QPainter, box: QRectF, answer: Answer, theme: Theme, first: bool) -> None:
    muted, ink = theme.colour("muted"), theme.colour("ink")
    painter.setPen(muted)
    for text, baseline in ((answer.name, _NAME), (answer.under, _RANGE)):
        size = 12 if text_width(text, 12) <= box.width() else 11
        painter.setFont(font(size))
        painter.drawText(QPointF(box.left(), baseline), elided(text, box.width(), size))
    worded = len(answer.figure) == 1 and not answer.figure[0][0][:1].isdigit()
    sizes = _SIZES if first and not worded else _SIZES[2:]
    large, small = next((pair for pair in sizes if figure_width(answer, *pair) <= box.width()), sizes[-1])
    left = box.left()
    painter.setPen(ink)
    for index, (text, is_number) in enumerate(answer.figure):
        size = large if is_number else small
        if index:
            left += _space(is_number, large)
        shown = elided(text, box.right() - left, size, 600)
        painter.setFont(font(size, 600))
        painter.drawText(QPointF(left, _FIGURE), shown)
        left += text_width(shown, size, 600)
    if answer.aside and left + 12.0 + text_width(answer.aside, 11) <= box.right():
        painter.setPen(muted)
        painter.setFont(font(11))
        painter.drawText(QPointF(left + 10.0, _FIGURE), answer.aside)


def _space(before_number: bool, large: int) -> float:
    return 0.27 * large if before_number else 0.13 * large


def figure_width(answer: Answer, large: int, small: int) -> float:
    """Return how wide a figure is with numbers and units in two sizes [logical px]."""
    wide = 0.0
    for index, (text, is_number) in enumerate(answer.figure):
        wide += text_width(text, large if is_number else small, 600)
        if index:
            wide += _space(is_number, large)
    return wide
