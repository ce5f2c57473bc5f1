"""Where the user's own data live; nothing else knows."""

from __future__ import annotations

import os
from pathlib import Path

STORE_VARIABLE = "STILLROOM_STORE"
"""Environment variable that names the store file."""


def store_path(given: Path | None = None) -> Path:
    """Return the store file: the one given, the one in `STILLROOM_STORE`, or the usual place."""
    if given is not None:
        return given.expanduser()
    named = os.environ.get(STORE_VARIABLE)
    if named:
        return Path(named).expanduser()
    from platformdirs import user_data_path

    return user_data_path("stillroom", appauthor=False) / "store.sqlite3"
