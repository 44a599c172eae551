"""One movement of the inflow slider: the case changed, everything worked out anew, the page painted."""

from __future__ import annotations

import tempfile
from pathlib import Path

import numpy as np
from PySide6.QtWidgets import QApplication

from headfall.files import read_case
from headfall.quantities import written
from headfall_app.settings import Settings
from headfall_app.start import make_application
from headfall_app.window import Window
from tests.bench.answers import EXAMPLE
from tests.bench.clock import each, spread

FRAMES = 120


def print_frames() -> None:
    """Print the time of a slider frame in a window of 1400 by 900, and that of a repaint alone."""
    application = make_application()
    with tempfile.TemporaryDirectory() as folder:
        window = Window(read_case(EXAMPLE), Settings(Path(folder) / "bench.ini"))
        window.resize(1400, 900)
        window.show()
        application.processEvents()
        _print_both(window, application)
        # Nothing is left to save, so that closing asks nothing.
        window.document.undo_stack.clear()
        window.close()
        window.deleteLater()
        application.processEvents()


def _print_both(window: Window, application: QApplication) -> None:
    def move(flow: float) -> None:
        rate = written(flow, "L/s", "flow")
        window.document.set(("inflow", "rate"), rate, "Set the inflow", gesture="bench")
        # The announcement is a timer of no length; the paints follow it in the same turn.
        application.processEvents()

    first, *times = each(move, [float(flow) for flow in np.linspace(0.0, 0.02, FRAMES + 1)])
    print(f"  {'slider frame, all worked out anew':34}{spread(times)}   first {1e3 * first:.1f} ms")
    repaints = each(lambda _: window.page.stage.repaint(), range(FRAMES))
    print(f"  {'repaint of the stage alone':34}{spread(repaints)}")
