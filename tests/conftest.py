"""Settings of the tests that hold in every room."""

from __future__ import annotations

import os

from hypothesis import settings

# A busy machine must not fail a property by its clock; a printed blob lets a person repeat a failure.
# The same examples on every run; HYPOTHESIS_PROFILE=search looks for new ones.
settings.register_profile("headfall", deadline=None, print_blob=True, derandomize=True)
settings.register_profile("search", deadline=None, print_blob=True)
settings.load_profile(os.environ.get("HYPOTHESIS_PROFILE", "headfall"))
