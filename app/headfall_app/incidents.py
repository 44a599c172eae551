"""What happens when the program itself fails: a sentence for the person, the details into a log file."""

from __future__ import annotations

import sys
from collections.abc import Callable
from pathlib import Path
from types import TracebackType

_LOG_SIZE, _LOGS_KEPT = 500_000, 1


def catch_incidents(log: Path, say: Callable[[str, list[str]], None]) -> None:
    """Let an uncaught exception be said in a sentence and its details written to the log, and the window go on."""

    def hook(kind: type[BaseException], incident: BaseException, trace: TracebackType | None) -> None:
        if issubclass(kind, KeyboardInterrupt):
            sys.__excepthook__(kind, incident, trace)
            return
        details = f"The details are in {log}." if _logged(log, incident) else f"No details could be written to {log}."
        say(
            "Something in Headfall itself failed.",
            ["What you typed is still here: save it under another name.", details],
        )

    sys.excepthook = hook


def _logged(file: Path, incident: BaseException) -> bool:
    """Write the details of an incident to the log and return whether that went well."""
    # Loaded here alone: a start without an incident needs no log.
    import logging
    from logging.handlers import RotatingFileHandler

    try:
        file.parent.mkdir(parents=True, exist_ok=True)
        handler = RotatingFileHandler(file, maxBytes=_LOG_SIZE, backupCount=_LOGS_KEPT, encoding="utf-8")
    except OSError:
        return False
    handler.setFormatter(logging.Formatter("%(asctime)s %(name)s %(message)s"))
    record = logging.LogRecord("headfall", logging.ERROR, "", 0, "Uncaught", None, None)
    record.exc_info = (type(incident), incident, incident.__traceback__)
    handler.emit(record)
    handler.close()
    return True
