"""Citations: the curated list, cut to the keys in use."""

from __future__ import annotations

import csv
from pathlib import Path

COLUMNS = ("key", "citation", "year", "doi", "isbn", "note")


def used_sources(path: Path, keys: set[str]) -> tuple[tuple[str, ...], list[list[str]]]:
    """Return header and rows of the sources in use; stop if a key has no citation."""
    with path.open(encoding="utf-8", newline="") as file:
        known = {row["key"]: row for row in csv.DictReader(file)}
    missing = sorted(keys - set(known))
    if missing:
        raise SystemExit(f"sources without a citation: {', '.join(missing)}")
    return COLUMNS, [[known[key][c] for c in COLUMNS] for key in sorted(keys)]
