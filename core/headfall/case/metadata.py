"""What an attribute of a case says about itself, for reading, writing, changing and entering it.

Every attribute that the file may leave out is ``None`` when it was not typed; its default stands in the
attribute's metadata (and is applied in ``headfall.system``), so that a case is written back just as it was read.

``dimension``  the attribute is a text quantity of this dimension (``level`` may also be a percentage or a volume)
``sign``       ``positive``, ``not_negative`` or ``any``
``default``    what counts when nothing was typed, as it would be typed
``number``     the attribute is a plain number; with ``low`` and ``high`` (both allowed) or ``above`` (not allowed)
``integer``    the attribute is a whole number
``choices``    the attribute is one of these words
``text``       the attribute is free text
``end``        the attribute is the end of a vessel; with ``pair`` it may also be two of them
``opening``    the attribute is an opening
``coefficient`` the attribute is the word ``handbook`` or a range
``parts``      the attribute is a list of parts that may be left out; ``one`` says what one of them is called
``rows``       the attribute is a list of rows of quantities, one dimension a column; a column may name several that
               will do, joined by ``|``; columns from ``least`` on may be left out
``quantities`` the attribute is a list of quantities of this dimension
``or_part``    the attribute is a plain value or, in its place, a part
``or_pair``    the attribute is a plain value or two of them
``tests``      the attribute is a list of field tests (empty until they are built)
``required``   it must be present
"""

from __future__ import annotations

from dataclasses import field
from typing import Any

Path = tuple[str | int, ...]
"""Where something stands in a case: ``("outlets", 0, "opening", "diameter")``."""


def quantity(
    dimension: str, *, sign: str = "positive", default: str | None = None, required: bool = False, **more: Any
) -> Any:
    """Return a field for a text quantity."""
    facts = {"dimension": dimension, "sign": sign, "default": default, "required": required, **more}
    return field(default=None, metadata=facts)


def number(*, default: float | None = None, required: bool = False, **facts: Any) -> Any:
    """Return a field for a plain number."""
    return field(default=None, metadata={"number": True, "default": default, "required": required, **facts})


def whole(*, default: int, low: int, high: int) -> Any:
    """Return a field for a whole number."""
    return field(default=None, metadata={"integer": True, "low": low, "high": high, "default": default})


def choice(*choices: str, default: str | None = None, required: bool | None = None) -> Any:
    """Return a field for one of several words."""
    needed = default is None if required is None else required
    return field(default=None, metadata={"choices": choices, "default": default, "required": needed})


def text(default: str = "") -> Any:
    """Return a field for free text."""
    return field(default=None, metadata={"text": True, "default": default, "required": False})


def list_of(one: str, *, required: bool = False) -> Any:
    """Return a field for a list of parts."""
    return field(default=None, metadata={"parts": True, "one": one, "required": required})


def rows(*columns: str, least: int | None = None, required: bool = False) -> Any:
    """Return a field for rows of quantities."""
    facts = {"rows": columns, "least": len(columns) if least is None else least, "required": required}
    return field(default=None, metadata=facts)


def quantities(dimension: str) -> Any:
    """Return a field for a list of quantities."""
    return field(default=None, metadata={"quantities": dimension, "required": False})
