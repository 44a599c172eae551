"""Spaces that can be searched for.

Qt tells a reader of its PDF that the glyph of the space is a tab, for it asks the font for that one first: whoever
searches for two words, or copies them, finds a tab between them. The tables that say so are not compressed, and both
codes are of one length, so they are mended in place.
"""

from __future__ import annotations

import re

_TABLE = re.compile(rb"begincmap.*?endcmap", re.DOTALL)
_CHARACTERS = re.compile(rb"\[[^\]]*\]")
_TAB, _NO_BREAK, _SPACE = b"<0009>", b"<00A0>", b"<0020>"


def with_plain_spaces(pdf: bytes) -> bytes:
    """Return the PDF with every space in it known to readers as a plain space; its length stays what it was."""
    return _TABLE.sub(lambda table: _CHARACTERS.sub(_mended, table[0]), pdf)


def _mended(characters: re.Match[bytes]) -> bytes:
    return characters[0].replace(_TAB, _SPACE).replace(_NO_BREAK, _SPACE)
