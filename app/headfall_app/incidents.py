"""What happens when the program itself fails: a sentence for the person, the details into a log file."""

from __future__ import annotations

import logging
import sys
from collections.abc import Callable
from logging.handlers import RotatingFileHandler
from pathlib import Path
from types import TracebackType

_LOG_SIZE, _LOGS_KEPT = 500_000, 1


def start_log(folder: Path) -> Path:
    """Send the log into a file of the folder and return its path; where it cannot be written there is no log."""
    file = folder / "headfall.log"
    try:
        folder.mkdir(parents=True, exist_ok=True)
        handler: logging.Handler = RotatingFileHandler(
            file, maxBytes=_LOG_SIZE, backupCount=_LOGS_KEPT, encoding="utf-8", delay=True
        )
    except OSError:
        handler = logging.NullHandler()
    handler.setFormatter(logging.Formatter("%(asctime)s %(name)s %(message)s"))
    logging.getLogger().addHandler(handler)
    return file


def catch_incidents(log: Path, say: Callable[[str, list[str]], None]) -> None:
    """Let an uncaught exception be said in a sentence and logged with its details, and the window go on."""

    def hook(kind: type[BaseException], incident: BaseException, trace: TracebackType | None) -> None:
        if issubclass(kind, KeyboardInterrupt):
            sys.__excepthook__(kind, incident, trace)
            return
        logging.getLogger("headfall").error("Uncaught", exc_info=(kind, incident, trace))
        say(
            "Something in Headfall itself failed.",
            ["What you typed is still here: save it under another name.", f"The details are in {log}."],
        )

    sys.excepthook = hook
