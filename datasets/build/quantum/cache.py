"""Result files that grow a row at a time, and the liquids they belong to.

Rows are appended as they come, so an interrupted run loses only what it was computing. A row
carries a fingerprint of its SMILES; a row whose fingerprint no longer matches `liquids.csv` is
ignored when read. The last row of a key wins.
"""

from __future__ import annotations

import csv
import hashlib
from collections.abc import Iterable, Mapping, Sequence
from pathlib import Path

HERE = Path(__file__).resolve().parent
RAW = HERE / "raw"
DATASETS = HERE.parents[1]

Row = dict[str, str]


def fingerprint(smiles: str) -> str:
    """First twelve hexadecimal digits of the SHA-256 of a SMILES."""
    return hashlib.sha256(smiles.encode()).hexdigest()[:12]


def read_rows(path: Path) -> list[Row]:
    """Rows of a CSV file, none if it does not exist."""
    if not path.exists():
        return []
    with path.open(encoding="utf-8", newline="") as file:
        return list(csv.DictReader(file))


def read_liquids() -> dict[str, Row]:
    """Rows of `liquids.csv` by id."""
    return {row["id"]: row for row in read_rows(DATASETS / "liquids.csv")}


def current(path: Path, liquids: Mapping[str, Row], key: Sequence[str] = ("id",)) -> list[Row]:
    """Rows that still belong to a liquid, one for each key, sorted by key."""
    kept: dict[tuple[str, ...], Row] = {}
    for row in read_rows(path):
        liquid = liquids.get(row["id"])
        if liquid is not None and row["fingerprint"] == fingerprint(liquid["smiles"]):
            kept[tuple(row[name] for name in key)] = row
    return [kept[name] for name in sorted(kept)]


def append(path: Path, rows: Iterable[Mapping[str, object]], columns: Sequence[str]) -> None:
    """Append rows; write the header first when the file is new."""
    new = not path.exists()
    path.parent.mkdir(exist_ok=True)
    with path.open("a", encoding="utf-8", newline="") as file:
        writer = csv.DictWriter(file, columns, lineterminator="\n")
        if new:
            writer.writeheader()
        writer.writerows(rows)


def write(path: Path, rows: Iterable[Mapping[str, object]], columns: Sequence[str]) -> None:
    """Write a whole file, header first."""
    with path.open("w", encoding="utf-8", newline="") as file:
        writer = csv.DictWriter(file, columns, lineterminator="\n")
        writer.writeheader()
        writer.writerows(rows)
