"""Reads the shipped CSV tables (liquids, values, sources, hazards) into columns and records."""

from __future__ import annotations

import csv
import hashlib
import io
import math
from collections.abc import Iterator
from dataclasses import dataclass
from importlib.resources import files
from importlib.resources.abc import Traversable

from stillroom.chem.data.clean import clean_text
from stillroom.chem.data.constants import DEBYE
from stillroom.chem.data.errors import BadFile
from stillroom.chem.data.quantities import QUANTITIES
from stillroom.chem.data.values import KINDS, Column, Columns, Value
from stillroom.chem.liquids.liquid import Identity
from stillroom.chem.liquids.structure import Structure


@dataclass(frozen=True, slots=True)
class Source:
    """One citation. `key` is what values point to."""

    key: str
    citation: str
    year: str
    doi: str
    isbn: str
    note: str


@dataclass(frozen=True, slots=True)
class Hazard:
    """One known danger of a liquid; the absence of any means not known here, never safe."""

    hazard: str
    detail: str
    source: str


@dataclass(frozen=True, slots=True)
class Record:
    """One row of the values table: a value of one source, preferred or not."""

    value: Value
    preferred: bool


Row = tuple[int, dict[str, str]]


def shipped() -> Traversable:
    """Return the folder of tables that the program carries."""
    return files("stillroom.datasets")


def fingerprint(folder: Traversable) -> str:
    """Return the first 12 hex digits of the SHA-256 of liquids and values together."""
    digest = hashlib.sha256()
    for name in ("liquids.csv", "values.csv"):
        digest.update((folder / name).read_bytes())
    return digest.hexdigest()[:12]


def rows(folder: Traversable, name: str, needed: tuple[str, ...]) -> Iterator[Row]:
    """Yield each row of a CSV file with its line number, columns by name.

    Raises
    ------
    BadFile
        If the file is missing, not UTF-8 CSV, or lacks one of the `needed` columns.
    """
    path = folder / name
    try:
        text = path.read_text(encoding="utf-8")
    except FileNotFoundError:
        raise BadFile(name, "not found") from None
    except (OSError, UnicodeDecodeError) as problem:
        raise BadFile(name, f"cannot be read ({problem})") from None
    reader = csv.reader(io.StringIO(text, newline=""))
    header = next(reader, [])
    missing = [c for c in needed if c not in header]
    if missing:
        raise BadFile(name, f"has no column {', '.join(missing)}", row=1)
    for cells in reader:
        if len(cells) != len(header):
            problem_ = f"{len(cells)} cells, expected {len(header)}"
            raise BadFile(name, problem_, row=reader.line_num)
        yield reader.line_num, dict(zip(header, cells, strict=True))


def read_identities(folder: Traversable) -> list[Identity]:
    """Return who the liquids are, in file order."""
    name = "liquids.csv"
    found = []
    for line, row in rows(folder, name, ("id", "name", "cas", "smiles", "formula", "family")):
        synonyms = tuple(clean_text(s) for s in row.get("synonyms", "").split("|") if s.strip())
        found.append(
            Identity(
                id=clean_text(row["id"]),
                name=clean_text(row["name"]),
                synonyms=synonyms,
                cas=clean_text(row["cas"]),
                smiles=clean_text(row["smiles"]),
                inchikey=clean_text(row.get("inchikey", "")),
                formula=clean_text(row["formula"]),
                family=clean_text(row["family"]),
                structure=_structure(name, line, row),
            )
        )
    return found


def _structure(name: str, line: int, row: dict[str, str]) -> Structure:
    def number(column: str) -> float | None:
        text = row.get(column, "")
        return _number(text, name, line, column) if text else None

    def count(column: str) -> int | None:
        value = number(column)
        return None if value is None else int(value)

    group_dipole = number("group_dipole_rss_D")
    dimer = row.get("vapour_dimer", "")
    return Structure(
        hbond_donor=row.get("hbond_donor") or None,
        hbond_acceptor=row.get("hbond_acceptor") or None,
        vapour_dimer={"yes": True, "no": False}.get(dimer),
        polar_groups=count("polar_groups"),
        group_dipole_rss=None if group_dipole is None else group_dipole * DEBYE,
        flexible_polar_bonds=count("flexible_polar_bonds"),
        longest_path_bonds=count("longest_path_bonds"),
    )


def read_records(folder: Traversable) -> dict[str, list[Record]]:
    """Return every value of every liquid, by liquid id, in file order."""
    name = "values.csv"
    needed = ("id", "quantity", "value", "unit", "temperature_K", "kind", "source", "uncertainty",
              "preferred")  # fmt: skip
    found: dict[str, list[Record]] = {}
    for line, row in rows(folder, name, needed):
        q = QUANTITIES.get(row["quantity"])
        if q is None:
            raise BadFile(name, f"unknown quantity '{row['quantity']}'", line, "quantity")
        if row["unit"] not in (q.unit, q.unit or "1"):
            raise BadFile(name, f"unit '{row['unit']}', expected '{q.unit or 1}'", line, "unit")
        if row["kind"] not in KINDS:
            raise BadFile(name, f"kind '{row['kind']}', expected {', '.join(KINDS)}", line, "kind")
        temperature, spread = row["temperature_K"], row["uncertainty"]
        value = Value(
            quantity=q.name,
            number=_number(row["value"], name, line, "value"),
            unit=q.unit,
            kind=row["kind"],
            source=row["source"],
            uncertainty=_number(spread, name, line, "uncertainty") if spread else math.nan,
            temperature=_number(temperature, name, line, "temperature_K") if temperature else None,
            note=row.get("note", ""),
        )
        found.setdefault(row["id"], []).append(Record(value, row["preferred"] == "1"))
    return found


def preferred_columns(ids: list[str], records: dict[str, list[Record]]) -> Columns:
    """Return one column per quantity with the preferred value of each liquid, in `ids` order."""
    columns: Columns = {}
    for row, key in enumerate(ids):
        for record in records.get(key, ()):
            if record.preferred:
                value = record.value
                if value.quantity not in columns:
                    columns[value.quantity] = Column.empty(value.definition, len(ids))
                columns[value.quantity].put(row, value)
    return columns


def read_sources(folder: Traversable) -> dict[str, Source]:
    """Return the citations by key."""
    return {
        row["key"]: Source(
            row["key"],
            clean_text(row["citation"], 1000),
            row["year"],
            row["doi"],
            row["isbn"],
            clean_text(row["note"], 1000),
        )
        for _, row in rows(
            folder, "sources.csv", ("key", "citation", "year", "doi", "isbn", "note")
        )
    }


def read_hazards(folder: Traversable) -> dict[str, list[Hazard]]:
    """Return the known dangers by liquid id."""
    found: dict[str, list[Hazard]] = {}
    for _, row in rows(folder, "hazards.csv", ("id", "hazard", "detail", "source")):
        hazard = Hazard(row["hazard"], clean_text(row["detail"]), row["source"])
        found.setdefault(row["id"], []).append(hazard)
    return found


def _number(text: str, name: str, line: int, column: str) -> float:
    try:
        number = float(text)
    except ValueError:
        number = math.nan
    if not math.isfinite(number):
        raise BadFile(name, f"'{text}' is not a number", line, column)
    return number
