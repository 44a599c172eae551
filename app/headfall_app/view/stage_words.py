"""The picture in words, for those who listen."""

from __future__ import annotations

from headfall.answers import Answers
from headfall.quantities import DisplayUnits, duration
from headfall_app.paint.scene import level_at
from headfall_app.view.answer_words import answers_of

_ITEMS = {
    "cursor": "Time cursor: arrow keys move it.",
    "overflow": "Overflow level: arrow keys move it.",
    "start": "Start level: arrow keys move it.",
    "stop": "Stop level: arrow keys move it.",
}


def stage_sentence(answers: Answers | None, display: DisplayUnits, time: float, stale: bool, item: str) -> str:
    """Return what the picture shows and what the keyboard is on."""
    if answers is None:
        return "No answers yet."
    system = answers.system
    parts = [_ITEMS.get(item, ""), "Last good answers." if stale else ""]
    levels = f"Start {display.text(system.start, 'level')}, stop {display.text(system.stop, 'level')}"
    parts.append(f"{levels}, overflow {display.text(system.overflow, 'level')}.")
    now = display.text(level_at(answers.curve, time), "level")
    parts.append(f"After {duration(time)} the level stands at {now}.")
    parts.extend(answer.sentence for answer in answers_of(answers, display)[:2])
    return " ".join(part for part in parts if part)
