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
from headfall.checks.laminar_losses import check_laminar_losses
from headfall.checks.large_outlet import check_large_outlet
from headfall.checks.low_reynolds import check_low_reynolds
from headfall.checks.nominal_size import check_nominal_size, is_made_of_pipe
from headfall.checks.order import sorted_findings
from headfall.checks.overflow import check_alarm_level, check_overflow, check_overflow_outlets
from headfall.checks.scope import check_scope
from headfall.checks.standing_level import check_standing_level
from headfall.checks.structure import check_base_load, check_hoop_stress, liquid_pressure
from headfall.checks.surging import check_surging
from headfall.checks.table_rule import check_table_end, check_table_rule
from headfall.checks.temperature import check_temperature
from headfall.checks.thick_plate import check_thick_plate
from headfall.checks.transition import check_transition
from headfall.checks.venting import (
    check_closed_headspace,
    check_open_headspace,
    check_pressurised_headspace,
    check_vented_headspace,
)

__all__ = [
    "Finding",
    "Grade",
    "check_alarm_level",
    "check_base_load",
    "check_closed_headspace",
    "check_dip",
    "check_heel",
    "check_hoop_stress",
    "check_laminar_losses",
    "check_large_outlet",
    "check_low_reynolds",
    "check_nominal_size",
    "check_open_headspace",
    "check_overflow",
    "check_overflow_outlets",
    "check_pressurised_headspace",
    "check_scope",
    "check_standing_level",
    "check_surging",
    "check_table_end",
    "check_table_rule",
    "check_temperature",
    "check_thick_plate",
    "check_transition",
    "check_vented_headspace",
    "dip_depth",
    "dip_level",
    "is_made_of_pipe",
    "liquid_pressure",
    "sorted_findings",
]
