"""The stage: section, staff and curve as one painted widget that can be taken hold of."""

from __future__ import annotations

from PySide6.QtCore import QEvent, QPointF, QRectF, QSize, Qt, Signal
from PySide6.QtGui import QFocusEvent, QKeyEvent, QMouseEvent, QPainter, QPaintEvent, QResizeEvent
from PySide6.QtWidgets import QWidget

from headfall.answers import Answers
from headfall_app.document import Document
from headfall_app.paint import lettering
from headfall_app.paint.kept import Kept
from headfall_app.paint.layout import Frame, arrange
from headfall_app.paint.scene import Scene
from headfall_app.paint.stage_picture import Attention, paint_stage
from headfall_app.paint.theme import Theme
from headfall_app.view.level_drag import LevelDrag, unit_of
from headfall_app.view.shown_scene import ShownScene
from headfall_app.view.stage_targets import Target, next_item, stage_items, target_at, value_step
from headfall_app.view.stage_words import stage_sentence
from headfall_app.view.time_cursor import TimeCursor

LEAST_WIDTH, LEAST_HEIGHT = 560, 250
_ARROWS = {
    Qt.Key.Key_Up: 1,
    Qt.Key.Key_Down: -1,
    Qt.Key.Key_Right: 1,
    Qt.Key.Key_Left: -1,
    Qt.Key.Key_PageUp: 10,
    Qt.Key.Key_PageDown: -10,
}


class Stage(QWidget):
    """The picture of the answers. The time cursor and the flags of start, stop and overflow can be dragged."""

    frame_changed = Signal()
    """The geometry is another: what stands on the stage has to be put in its place."""

    released = Signal()
    """What was dragged is let go, or the vessel is shown another way: the page may be laid out anew."""

    def __init__(self, document: Document, theme: Theme, parent: QWidget | None = None) -> None:
        super().__init__(parent)
        self._document, self._theme = document, theme
        self._cursor = TimeCursor()
        self._show = "auto"
        self._hovered, self._focused = "", ""
        self._dragged: LevelDrag | None = None
        self._grip = 0.0
        self._drags_time = False
        self._time_before = 0.0
        self._points = False
        self._shown = ShownScene(document)
        self._kept = Kept()
        # Not marked opaque: Qt would paint it twice, by itself and again under the slider.
        self.setMouseTracking(True)
        self.setFocusPolicy(Qt.FocusPolicy.StrongFocus)
        self.setMinimumSize(LEAST_WIDTH, LEAST_HEIGHT)
        self.setAccessibleName("Section and level against time")
        document.answers_changed.connect(self.refresh)
        document.pointed_changed.connect(self.update)
        document.replaced.connect(self._start_over)
        self.refresh()

    def set_theme(self, theme: Theme) -> None:
        """Paint in another set of colours."""
        self._theme = theme
        self.update()

    def sizeHint(self) -> QSize:
        return QSize(1056, 602)

    # What is shown ----------------------------------------------------------------------------------------------------

    @property
    def answers(self) -> Answers | None:
        """The last good answers."""
        return self._document.answers

    @property
    def time(self) -> float:
        """Where the time cursor stands [s]."""
        answers = self.answers
        return self._cursor.time(float(answers.curve.time[-1])) if answers is not None else 0.0

    @property
    def scene(self) -> Scene | None:
        """What is drawn now, None while there are no answers."""
        return self._shown.scene(self.time)

    def frame(self, scene: Scene) -> Frame:
        """Return the geometry of the stage at its present size."""
        return self._shown.frame(scene, self.width(), self.height(), self._show)

    def needed_height(self, width: int, available: int) -> int:
        """Return how much of a height the picture can use at a width."""
        scene = self.scene
        if scene is None:
            return available
        return max(min(round(arrange(width, available, scene, self._show).needed), available), LEAST_HEIGHT)

    def refresh(self) -> None:
        """Say and paint the answers anew."""
        self.setAccessibleDescription(
            stage_sentence(self.answers, self._document.display, self.time, self._document.is_stale, self._focused)
        )
        self.frame_changed.emit()
        self.update()

    def _start_over(self) -> None:
        self._cursor.release()
        self._show = "auto"

    def paintEvent(self, event: QPaintEvent) -> None:
        painter = QPainter(self)
        painter.fillRect(self.rect(), self._theme.colour("surface"))
        scene = self.scene
        if scene is None:
            words = "No answers yet. Mend the entries that are marked at the left."
            lettering.write(painter, QPointF(2.0, 19.0), words, self._theme.colour("muted"))
            return
        theme = self._theme.greyed if self._document.is_stale else self._theme
        attention = Attention(self._hovered, self._focused if self.hasFocus() else "")
        paint_stage(painter, self.frame(scene), scene, theme, attention, self._kept)

    def resizeEvent(self, event: QResizeEvent) -> None:
        super().resizeEvent(event)
        self.frame_changed.emit()

    def switch_cut(self) -> None:
        """Show a long vessel whole, or cut again."""
        self._show = "auto" if self._show == "whole" else "whole"
        self.frame_changed.emit()
        self.released.emit()
        self.update()

    @property
    def is_dragged(self) -> bool:
        """Whether something on the stage is being dragged."""
        return self._dragged is not None or self._drags_time

    # Pointer ----------------------------------------------------------------------------------------------------------

    def target(self, at: QPointF) -> Target:
        """Return what lies under the pointer."""
        scene = self.scene
        return target_at(at, self.frame(scene), scene) if scene is not None else Target()

    def mousePressEvent(self, event: QMouseEvent) -> None:
        if event.button() != Qt.MouseButton.LeftButton:
            return
        target = self.target(event.position())
        if target.kind == "flag":
            self._focus_on(target.key)
            self._dragged = LevelDrag(self._document, target.key)
            self._grip = event.position().y() - target.row
        elif target.kind == "time":
            self._focus_on("cursor")
            self._drags_time, self._time_before = True, self.time
            self._put_time(event.position())
        elif target.kind == "outline":
            self.switch_cut()

    def mouseMoveEvent(self, event: QMouseEvent) -> None:
        scene = self.scene
        if scene is not None and self._dragged is not None:
            frame = self.frame(scene)
            step = value_step(frame, unit_of(self._document.case, self._dragged.key))
            self._dragged.move(frame.level(event.position().y() - self._grip), step)
        elif self._drags_time:
            self._put_time(event.position())
        else:
            self._hover(self.target(event.position()))

    def mouseReleaseEvent(self, event: QMouseEvent) -> None:
        if self._dragged is not None:
            self._dragged.finish()
        self._dragged, self._drags_time = None, False
        self.released.emit()

    def mouseDoubleClickEvent(self, event: QMouseEvent) -> None:
        target = self.target(event.position())
        if target.kind == "time":
            self._cursor.release()
            self.refresh()
        elif target.kind == "flag" and target.key == "overflow":
            self._document.set(("levels", "overflow"), None, "Put the overflow level back to the top")

    def leaveEvent(self, event: QEvent) -> None:
        self._hover(Target())

    def _put_time(self, at: QPointF) -> None:
        scene = self.scene
        if scene is not None:
            self._cursor.put(self.frame(scene).time(at.x()), float(scene.curve.time[-1]))
            self.refresh()

    def _hover(self, target: Target) -> None:
        shapes = {
            "flag": Qt.CursorShape.SizeVerCursor,
            "time": Qt.CursorShape.SizeHorCursor,
            "outline": Qt.CursorShape.PointingHandCursor,
        }
        self.setCursor(shapes.get(target.kind, Qt.CursorShape.ArrowCursor))
        key = target.key if target.kind in ("flag", "outline") else ""
        if key != self._hovered:
            self._hovered = key
            self.update()
        if target.path is not None and target.path != self._document.pointed:
            self._points = True
            self._document.pointed = target.path
        elif target.path is None and self._points:
            self._points = False
            self._document.pointed = self._document.cursor

    # Keyboard ---------------------------------------------------------------------------------------------------------

    def focusInEvent(self, event: QFocusEvent) -> None:
        items = stage_items(self.scene)
        if event.reason() == Qt.FocusReason.BacktabFocusReason:
            self._focus_on(items[-1])
        elif not self._focused or event.reason() == Qt.FocusReason.TabFocusReason:
            self._focus_on(items[0])
        super().focusInEvent(event)
        self.update()

    def focusOutEvent(self, event: QFocusEvent) -> None:
        super().focusOutEvent(event)
        self.update()

    def event(self, event: QEvent) -> bool:
        # Tab goes through the flags before it leaves the stage.
        if isinstance(event, QKeyEvent) and event.type() == QEvent.Type.KeyPress:
            turns = {Qt.Key.Key_Tab: True, Qt.Key.Key_Backtab: False}
            key = Qt.Key(event.key())
            item = next_item(stage_items(self.scene), self._focused, turns[key]) if key in turns else ""
            if item:
                self._focus_on(item)
                return True
        return super().event(event)

    def _focus_on(self, item: str) -> None:
        self._focused = item
        self.refresh()

    def keyPressEvent(self, event: QKeyEvent) -> None:
        key = Qt.Key(event.key())
        if key == Qt.Key.Key_Escape and (self._dragged is not None or self._drags_time):
            self._give_up()
        elif self._focused == "cursor" and self._move_cursor(key):
            pass
        elif self._focused not in ("", "cursor") and key in _ARROWS:
            drag = LevelDrag(self._document, self._focused)
            drag.nudge(_ARROWS[key])
            drag.finish()
        else:
            super().keyPressEvent(event)

    def _give_up(self) -> None:
        if self._dragged is not None:
            self._dragged.give_up()
        elif self.answers is not None:
            self._cursor.put(self._time_before, float(self.answers.curve.time[-1]))
        self._dragged, self._drags_time = None, False
        self.refresh()
        self.released.emit()

    def _move_cursor(self, key: Qt.Key) -> bool:
        scene = self.scene
        if scene is None or key not in (*_ARROWS, Qt.Key.Key_Home, Qt.Key.Key_End):
            return False
        end = float(scene.curve.time[-1])
        times = self.frame(scene).times
        step = times.step * times.unit / 10.0
        ends = {Qt.Key.Key_Home: 0.0, Qt.Key.Key_End: end}
        time = ends[key] if key in ends else (round(self.time / step) + _ARROWS[key]) * step
        self._cursor.put(time, end)
        self.refresh()
        return True

    def slider_box(self) -> QRectF:
        """Return where the inflow's slider stands on the stage."""
        scene = self.scene
        if scene is None:
            return QRectF(0.0, self.height() - 92.0, 420.0, 80.0)
        frame = self.frame(scene)
        wide = max(frame.across.right + 12.0, 300.0)
        wide = min(wide, frame.staff_left - 8.0)
        top = min(self.height() - 90.0, frame.bottom + frame.under + 72.0)
        return QRectF(0.0, max(round(top), 0.0), wide, 80.0)
