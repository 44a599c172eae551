"""The program's own face, loaded by name."""

from __future__ import annotations

from functools import lru_cache

from PySide6.QtGui import QFont, QFontDatabase, QFontMetricsF

from headfall_app.resources import resource_path

FAMILY = "Source Sans Pro"
_FILES = ("SourceSansPro-Regular.otf", "SourceSansPro-Semibold.otf", "SourceSansPro-Bold.otf")


@lru_cache(maxsize=1)
def load_fonts() -> None:
    """Register the face's files; needs a running application, and does nothing the second time."""
    for name in _FILES:
        QFontDatabase.addApplicationFont(str(resource_path(f"fonts/{name}")))


@lru_cache(maxsize=64)
def font(nominal: int, weight: int = 400) -> QFont:
    """Return the face at a nominal size; it is drawn a tenth larger, for its letters are low. Treat it as frozen."""
    load_fonts()
    made = QFont(FAMILY)
    made.setFamilies([FAMILY, "DejaVu Sans"])
    made.setPixelSize(round(nominal * 1.1))
    made.setWeight(QFont.Weight(weight))
    made.setHintingPreference(QFont.HintingPreference.PreferNoHinting)
    # Ligatures make a printed word impossible to search for.
    made.setFeature(QFont.Tag("liga"), 0)
    return made


@lru_cache(maxsize=64)
def metrics(nominal: int, weight: int = 400) -> QFontMetricsF:
    """Return the face's measures at a nominal size."""
    return QFontMetricsF(font(nominal, weight))


@lru_cache(maxsize=64)
def cap_height(nominal: int, weight: int = 400) -> float:
    """Return how tall a capital is drawn [logical px]."""
    return metrics(nominal, weight).capHeight()


@lru_cache(maxsize=4096)
def text_width(text: str, nominal: int, weight: int = 400) -> float:
    """Return how wide a text is drawn [logical px]."""
    return metrics(nominal, weight).horizontalAdvance(text)
