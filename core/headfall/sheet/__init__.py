"""What a sizing sheet says, as plain data."""

from __future__ import annotations

from headfall.sheet.build import build_sheet
from headfall.sheet.model import AnswerBox, Column, Heading, Paragraph, Picture, Section, Sheet, Table

__all__ = ["AnswerBox", "Column", "Heading", "Paragraph", "Picture", "Section", "Sheet", "Table", "build_sheet"]
