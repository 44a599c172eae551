"""The line over greyed answers."""

from __future__ import annotations

from headfall.case.model import Path
from headfall_app.document import Document
from headfall_app.words import key_of, label_of, lowered, words

_NAMED_AT_MOST = 2


def stale_sentence(document: Document) -> str:
    """Return whose answers are shown and which entry to mend; empty while the answers are those of the case."""
    if not document.is_stale or not document.faults:
        return ""
    mend = f"Mend {_wanted(document)} to go on."
    if document.answers is None:
        return f"No answers yet. {mend}"
    if document.wrong:
        return f"Last good answers. {mend}"
    return f"Last good answers, from before the last change. {mend}"


def _wanted(document: Document) -> str:
    paths = list(dict.fromkeys(fault.path for fault in document.faults))
    if not all(paths) or len(paths) > _NAMED_AT_MOST:
        return "the entries that are marked"
    return " and ".join(entry_phrase(path, len(document.case.outlets)) for path in paths)


def entry_phrase(path: Path, outlets: int = 1) -> str:
    """Return an entry as a sentence names it: ``the outlet's diameter``, ``outlet 2's diameter``, ``the start level``.

    ``outlets`` is how many the case has: a single one needs no number.
    """
    table = words()["in_a_sentence"]
    owner = table["owners"].get(path[0], "the")
    if path[0] == "outlets":
        numbered = outlets > 1 and len(path) > 1
        owner = f"outlet {int(path[1]) + 1}'s" if numbered else owner
        if len(path) <= 2:
            return owner.removesuffix("'s")
    elif len(path) == 1 and path[0] in table["owners"]:
        return str(owner).removesuffix("'s")
    if path[:2] == ("vessel", "heads") and len(path) == 4:
        return f"the {_called(path)} of {owner} {_called(path[:3])}"
    return f"{owner} {_called(path)}"


def _called(path: Path) -> str:
    name: str = words()["in_a_sentence"]["entries"].get(key_of(path)) or lowered(label_of(path))
    return name
