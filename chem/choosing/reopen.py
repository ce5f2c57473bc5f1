"""Rebuilds a shortlist from an exported file and says what has changed since."""

from __future__ import annotations

import csv
import hashlib
import io
import json
import math
from dataclasses import dataclass
from pathlib import Path
from typing import Any

from stillroom.chem.choosing.cells import original
from stillroom.chem.choosing.export import package_path, program_version, row_of
from stillroom.chem.choosing.layout import fields, plain
from stillroom.chem.choosing.shortlist import Entry
from stillroom.chem.data.clean import clean_text
from stillroom.chem.data.errors import BadFile
from stillroom.chem.shelf.shelf import Shelf

_NEEDED = ("entry", "id", "partner_id", "note")


@dataclass(frozen=True, slots=True)
class Reopened:
    """What a file holds: entries in order, the temperature of the export, and the changes."""

    entries: tuple[Entry, ...]
    temperature: float
    changes: tuple[str, ...]


def reopen(path: Path, shelf: Shelf) -> Reopened:
    """Read an exported CSV file, or the data package beside it.

    The list is compared with `shelf` carried to the temperature of the export.

    Raises
    ------
    BadFile
        If a file is missing, not an export of stillroom, or a cell in it is wrong.
    """
    if path.name.endswith(".json"):
        package = _package(path)
        path = path.parent / str(package["resources"][0]["path"])
        content = _read(path)
    else:
        content = _read(path)
        package = _package(package_path(path))
    settings = package["stillroom"]
    changes = _versions(package, content, shelf)
    rows = _rows(path, content)
    entries = tuple(_entry(path, line, row) for line, row in rows)
    now = shelf.at(float(settings["temperature_K"]))
    for entry, (_, row) in zip(entries, rows, strict=True):
        changes += _changed(entry, row, now)
    return Reopened(entries, now.temperature, tuple(changes))


def _read(path: Path) -> bytes:
    try:
        return path.read_bytes()
    except OSError as problem:
        raise BadFile(str(path), problem.strerror or str(problem)) from None


def _package(path: Path) -> dict[str, Any]:
    try:
        package = json.loads(_read(path))
        float(package["stillroom"]["temperature_K"])
        package["resources"][0]["path"], package["resources"][0]["hash"]
    except (ValueError, KeyError, TypeError, IndexError):
        raise BadFile(str(path), "not the data package of an exported shortlist") from None
    found: dict[str, Any] = package
    return found


def _versions(package: dict[str, Any], content: bytes, shelf: Shelf) -> list[str]:
    changes = []
    if package["resources"][0]["hash"] != f"sha256:{hashlib.sha256(content).hexdigest()}":
        changes.append("the CSV file was edited after the export (its checksum differs)")
    for key, what, now in (
        ("version", "program version", program_version()),
        ("data", "data version", shelf.data_version),
    ):
        then = package["stillroom"].get(key, "unknown")
        if then != now:
            changes.append(f"{what} was {clean_text(str(then), 40)}, is {now}")
    return changes


def _rows(path: Path, content: bytes) -> list[tuple[int, dict[str, str]]]:
    try:
        reader = csv.reader(io.StringIO(content.decode("utf-8-sig"), newline=""), strict=True)
        lines = [(reader.line_num, cells) for cells in reader if cells]
    except (UnicodeDecodeError, csv.Error) as problem:
        raise BadFile(str(path), f"not a UTF-8 CSV file ({problem})") from None
    header = lines[0][1] if lines else []
    missing = [c for c in _NEEDED if c not in header]
    if missing:
        raise BadFile(str(path), f"has no column {', '.join(missing)}", row=1)
    rows = []
    for line, cells in lines[1:]:
        if len(cells) != len(header):
            raise BadFile(str(path), f"{len(cells)} cells, expected {len(header)}", row=line)
        rows.append((line, dict(zip(header, cells, strict=True))))
    return rows


def _entry(path: Path, line: int, row: dict[str, str]) -> Entry:
    kind, a, b = (
        row["entry"],
        clean_text(original(row["id"])),
        clean_text(original(row["partner_id"])),
    )
    if kind not in ("liquid", "pair"):
        raise BadFile(
            str(path), f"'{clean_text(kind, 40)}', expected liquid or pair", line, "entry"
        )
    if not a:
        raise BadFile(str(path), "empty, expected the key of a liquid", line, "id")
    if (kind == "pair") != bool(b):
        raise BadFile(str(path), "a pair, and only a pair, has a partner", line, "partner_id")
    note = clean_text(original(row["note"]))
    return Entry.pair(a, b, note) if b else Entry(a, "", note)


def _changed(entry: Entry, then: dict[str, str], shelf: Shelf) -> list[str]:
    """Compare every cell with what would be exported now."""
    if gone := entry.missing_from(shelf):
        return [f"{entry.title}: no longer on the shelf ({', '.join(gone)})"]
    row = row_of(entry, shelf)
    changes = []
    for field in fields([row], shelf):
        if field.name in ("note", "reasons") or field.name not in then:
            continue
        now, cell = plain(field.content(row)), original(then[field.name])
        if not _same(now, cell):
            was = clean_text(cell, 40) or "missing"
            changes.append(f"{entry.title}: {field.name} was {was}, is {_shown(now)}")
    return changes


def _same(now: str | float | None, cell: str) -> bool:
    if not isinstance(now, float):
        return (now or "") == cell
    try:
        return math.isclose(now, float(cell), rel_tol=1e-6, abs_tol=1e-9)
    except ValueError:
        return False


def _shown(value: str | float | None) -> str:
    return "missing" if value is None else f"{value:.6g}" if isinstance(value, float) else value
