"""Headfall: drain times, resting levels and outlets of gravity-drained tanks. Numbers in, numbers out.

``read_case``, ``solve``, ``Answers.as_dict`` and ``write_case`` are all that a script needs.
"""

from __future__ import annotations

from headfall.answers import Answers
from headfall.case.faults import CaseError, Fault
from headfall.case.model import Case
from headfall.files import read_case, write_case
from headfall.study import solve

__version__ = "0.1.0"

__all__ = ["Answers", "Case", "CaseError", "Fault", "read_case", "solve", "write_case"]
