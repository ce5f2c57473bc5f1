"""A shortlist as CSV, with a Frictionless data package beside it that explains every column.

The CSV follows RFC 4180 (UTF-8, CRLF, one header row, no comment lines). The package holds the
schema with units, the citations of all sources used, the settings, the program and data versions
and a checksum: enough for `reopen` to rebuild the list and say what has changed.
"""

from __future__ import annotations

import csv
import hashlib
import io
import json
from collections.abc import Sequence
from pathlib import Path
from typing import Any

from stillroom.chem.choosing.atomic import write_files
from stillroom.chem.choosing.cells import neutral
from stillroom.chem.choosing.layout import Field, Row, fields, plain
from stillroom.chem.choosing.shortlist import Entry
from stillroom.chem.data.errors import CannotWrite, StillroomError
from stillroom.chem.pairs.pair import PairInteraction, interact
from stillroom.chem.shelf.shelf import Shelf

PACKAGE_SUFFIX = ".datapackage.json"


def package_path(path: Path) -> Path:
    """Return where the data package of an exported CSV file lies."""
    return path.with_suffix(PACKAGE_SUFFIX)


def export_csv(
    entries: Sequence[Entry], shelf: Shelf, path: Path, *, name: str = "", overwrite: bool = False
) -> tuple[Path, Path]:
    """Write the entries at the shelf's temperature to `path` and return both files' paths.

    Raises
    ------
    CannotWrite
        If the list is empty, a file exists (unless `overwrite`), or it cannot be written.
    """
    if not entries:
        raise CannotWrite(str(path), "the shortlist is empty")
    if not path.name or path.suffix == ".json":
        raise CannotWrite(str(path), "name a CSV file, such as list.csv")
    rows = [row_of(entry, shelf) for entry in entries]
    columns = fields(rows, shelf)
    content = _csv(rows, columns).encode()
    package = _package(rows, columns, shelf, path, content, name)
    text = json.dumps(package, indent=2, ensure_ascii=False) + "\n"
    beside = package_path(path)
    write_files([(path, content), (beside, text.encode())], overwrite=overwrite)
    return path, beside


def row_of(entry: Entry, shelf: Shelf) -> Row:
    """Return an entry with what the shelf knows of it, or why it knows nothing."""
    gone = entry.missing_from(shelf)
    if gone:
        return Row(entry, None, None, None, f"not on the shelf: {', '.join(gone)}")
    first = shelf[entry.a]
    second = shelf[entry.b] if entry.b else None
    pair: PairInteraction | None = None
    problem = first.outside_liquid_range()
    if second is not None:
        try:
            pair = interact(first, second, shelf.temperature)
            problem = None  # the verdict of the pair says so
        except StillroomError as error:
            problem = str(error)
    return Row(entry, first, second, pair, problem or "")


def _csv(rows: Sequence[Row], columns: Sequence[Field]) -> str:
    buffer = io.StringIO(newline="")
    writer = csv.writer(buffer, lineterminator="\r\n")
    writer.writerow([c.name for c in columns])
    for row in rows:
        cells = [plain(c.content(row)) for c in columns]
        writer.writerow(
            ["" if c is None else neutral(c) if isinstance(c, str) else repr(c) for c in cells]
        )
    return buffer.getvalue()


def _package(
    rows: Sequence[Row],
    columns: Sequence[Field],
    shelf: Shelf,
    path: Path,
    content: bytes,
    name: str,
) -> dict[str, Any]:
    used = {v.source for r in rows for x in (r.first, r.second) if x for v in x.values.values()}
    used |= {h.source for r in rows for i in r.entry.key for h in shelf.hazards.get(i, ())}
    return {
        "profile": "tabular-data-package",
        "name": "shortlist",
        "title": name or path.stem,
        "description": "Shortlist exported by stillroom. Energies are internal energies unless "
        "named free energies; negative means attraction. Dipole moments are of the gas phase.",
        "sources": [
            {"title": f"{key}: {source.citation} {source.year}".strip(),
             "path": f"https://doi.org/{source.doi}" if source.doi else ""}
            for key, source in shelf.sources.items()
            if key in used
        ],
        "stillroom": {
            "version": program_version(),
            "data": shelf.data_version,
            "temperature_K": shelf.temperature,
            "dispersion_model": "auto",
        },
        "resources": [
            {
                "name": "entries",
                "path": path.name,
                "profile": "tabular-data-resource",
                "format": "csv",
                "mediatype": "text/csv",
                "encoding": "utf-8",
                "dialect": {"delimiter": ",", "lineTerminator": "\r\n", "doubleQuote": True},
                "bytes": len(content),
                "hash": f"sha256:{hashlib.sha256(content).hexdigest()}",
                "schema": {
                    "fields": [
                        {"name": c.name, "type": c.type, "unit": c.unit,
                         "description": c.description}
                        for c in columns
                    ],
                    "missingValues": [""],
                },
            }
        ],
    }  # fmt: skip


def program_version() -> str:
    """Return the installed version of stillroom."""
    from importlib.metadata import PackageNotFoundError, version

    try:
        return version("stillroom")
    except PackageNotFoundError:
        return "not installed"
