"""The scene and the geometry that the stage shows, kept while nothing they rest on changes."""

from __future__ import annotations

from headfall.answers import Answers
from headfall_app.document import Document
from headfall_app.paint.layout import Frame, arrange
from headfall_app.paint.scene import Scene, scene_of


class ShownScene:
    """The last scene and frame; made anew only for other answers, another time, entry, unit or size."""

    def __init__(self, document: Document) -> None:
        self._document = document
        self._scene: Scene | None = None
        self._answers: Answers | None = None
        self._scene_key: tuple[object, ...] = ()
        self._frame: Frame | None = None
        self._framed: Answers | None = None
        self._frame_key: tuple[object, ...] = ()

    def scene(self, time: float) -> Scene | None:
        """Return what is drawn with the cursor at a time [s], None while there are no answers."""
        answers, document = self._document.answers, self._document
        if answers is None:
            return None
        key = (time, document.pointed, document.display)
        if self._scene is None or answers is not self._answers or key != self._scene_key:
            self._answers, self._scene_key = answers, key
            self._scene = scene_of(answers, document.display, now=time, lit=document.pointed)
        return self._scene

    def frame(self, scene: Scene, width: int, height: int, show: str) -> Frame:
        """Return the geometry at a size [logical px]."""
        key = (width, height, show, scene.display.system, self._document.pointed)
        if self._frame is None or self._answers is not self._framed or key != self._frame_key:
            self._framed, self._frame_key = self._answers, key
            self._frame = arrange(width, height, scene, show)
        return self._frame
