"""Settings of the tests that hold in every room."""

from __future__ import annotations

from hypothesis import settings

# A busy machine must not fail a property by its clock; a printed blob lets a person repeat a failure.
settings.register_profile("headfall", deadline=None, print_blob=True)
settings.load_profile("headfall")
