"""``python -m headfall_app`` does what the command ``headfall`` does."""

from __future__ import annotations

import sys

from headfall_app.command import main

if __name__ == "__main__":
    sys.exit(main())
