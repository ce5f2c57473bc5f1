"""Sort the raw files and drop rows that were computed again or whose liquid has changed.

python datasets/build/quantum/tidy.py
"""

from __future__ import annotations

import sys

from cache import RAW, current, read_liquids, read_rows, write

KEYS = {
    "xtb": ("id",),
    "conformers": ("id", "conformer"),
    "pbe0_dipole": ("id",),
    "variants": ("id", "method"),
    "solvent_descriptors": ("id",),
}


def main() -> int:
    """Rewrite every file; nothing may be computing meanwhile."""
    liquids = read_liquids()
    for name, key in KEYS.items():
        path = RAW / f"{name}.csv"
        rows = read_rows(path)
        if rows:
            kept = current(path, liquids, key)
            write(path, kept, list(rows[0]))
            print(f"{name}: {len(kept)} of {len(rows)} rows kept")
    return 0


if __name__ == "__main__":
    sys.exit(main())
