"""Checks: one file a hazard, plain numbers in, findings out.

A check never says that a thing is in order: it says that it raised no caution, or that it was not made and what it
would need. Law and standards are named as examples only, for whoever decides.

C29, a gallon or barrel without its country, has no file here: such a text is refused at the field where it was typed,
so no case that reaches the checks can hold one.
"""

from __future__ import annotations

from headfall.checks.dip import check_dip, dip_depth, dip_level
from headfall.checks.finding import Finding, Grade
from headfall.checks.heel import check_heel
from headfall.checks.large_outlet import check_large_outlet
from headfall.checks.nominal_size import check_nominal_size
from headfall.checks.order import sorted_findings
from headfall.checks.overflow import check_alarm_level, check_overflow
from headfall.checks.scope import check_scope
from headfall.checks.standing_level import check_standing_level
from headfall.checks.structure import check_base_load, check_hoop_stress, liquid_pressure
from headfall.checks.venting import check_venting

__all__ = [
    "Finding",
    "Grade",
    "check_alarm_level",
    "check_base_load",
    "check_dip",
    "check_heel",
    "check_hoop_stress",
    "check_large_outlet",
    "check_nominal_size",
    "check_overflow",
    "check_scope",
    "check_standing_level",
    "check_venting",
    "dip_depth",
    "dip_level",
    "liquid_pressure",
    "sorted_findings",
]
