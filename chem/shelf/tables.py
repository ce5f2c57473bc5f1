"""Reads the shipped CSV tables (liquids, values, sources, hazards) into columns and records."""

from __future__ import annotations

import csv
import hashlib
import io
import math
from collections.abc import Iterable, Iterator, Mapping, Sequence
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

    @property
    def full(self) -> str:
        """Citation, year and number in one line."""
        year = "" if self.year in self.citation else self.year
        number = f"doi:{self.doi}" if self.doi else f"ISBN {self.isbn}" if self.isbn else ""
        return " ".join(part for part in (self.citation, year, number) if part)


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

VALUES = "values.csv"


def shipped() -> Traversable:
    """Return the folder of tables that the program carries."""
    return files("stillroom.datasets")


def fingerprint(folder: Traversable) -> str:
    """Return the first 12 hex digits of the SHA-256 of liquids and values together."""
    digest = hashlib.sha256()
    for name in ("liquids.csv", "values.csv"):
        digest.update((folder / name).read_bytes())
    return digest.hexdigest()[:12]


def cells(
    folder: Traversable, name: str, needed: tuple[str, ...]
) -> tuple[list[str], Iterator[tuple[int, list[str]]]]:
    """Return the header of a CSV file, and its rows with their line numbers.

    Raises
    ------
    BadFile
        If the file is missing, not UTF-8 CSV, or lacks one of the `needed` columns; while the rows
        are read, if one has too many or too few cells.
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

    def checked() -> Iterator[tuple[int, list[str]]]:
        width = len(header)
        for row in reader:
            if len(row) != width:
                raise BadFile(name, f"{len(row)} cells, expected {width}", row=reader.line_num)
            yield reader.line_num, row

    return header, checked()


def rows(folder: Traversable, name: str, needed: tuple[str, ...]) -> Iterator[Row]:
    """Yield each row of a CSV file with its line number, cells by column; raises as `cells`."""
    header, lines = cells(folder, name, needed)
    for line, row in lines:
        yield line, dict(zip(header, row, strict=True))


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


class Records(Mapping[str, Sequence[Record]]):
    """Every value of every liquid, by liquid id, in file order.

    Only the cells are held; records are made when somebody asks for a liquid, so that opening the
    shelf does not wait for seventeen thousand of them.
    """

    def __init__(self, header: list[str], rows: Iterable[tuple[int, list[str]]]) -> None:
        self._header = header
        self._rows: dict[str, list[tuple[int, list[str]]]] = {}
        key, self._preferred = header.index("id"), header.index("preferred")
        for line, row in rows:
            self._rows.setdefault(row[key], []).append((line, row))

    def __getitem__(self, key: str) -> Sequence[Record]:
        return [self._record(line, row) for line, row in self._rows[key]]

    def __iter__(self) -> Iterator[str]:
        return iter(self._rows)

    def __len__(self) -> int:
        return len(self._rows)

    def preferred(self, key: str) -> Iterator[Value]:
        """Yield the preferred values of a liquid."""
        for line, row in self._rows.get(key, ()):
            if row[self._preferred] == "1":
                yield self._record(line, row).value

    def _record(self, line: int, row: list[str]) -> Record:
        return _record(line, dict(zip(self._header, row, strict=True)))


def read_records(folder: Traversable) -> Records:
    """Return every value of every liquid."""
    needed = ("id", "quantity", "value", "unit", "temperature_K", "kind", "source", "uncertainty",
              "preferred", "note")  # fmt: skip
    return Records(*cells(folder, VALUES, needed))


def _record(line: int, row: dict[str, str]) -> Record:
    """Return one row of the values table; raises `BadFile` with row and column."""
    q = QUANTITIES.get(row["quantity"])
    if q is None:
        raise BadFile(VALUES, f"unknown quantity '{row['quantity']}'", line, "quantity")
    if row["unit"] not in (q.unit, q.unit or "1"):
        raise BadFile(VALUES, f"unit '{row['unit']}', expected '{q.unit or 1}'", line, "unit")
    if row["kind"] not in KINDS:
        raise BadFile(VALUES, f"kind '{row['kind']}', expected {', '.join(KINDS)}", line, "kind")
    temperature, spread = row["temperature_K"], row["uncertainty"]
    value = Value(
        quantity=q.name,
        number=_number(row["value"], VALUES, line, "value"),
        unit=q.unit,
        kind=row["kind"],
        source=row["source"],
        uncertainty=_number(spread, VALUES, line, "uncertainty") if spread else math.nan,
        temperature=_number(temperature, VALUES, line, "temperature_K") if temperature else None,
        note=row["note"],
    )
    return Record(value, row["preferred"] == "1")


def preferred_columns(ids: Sequence[str], records: Records) -> Columns:
    """Return one column per quantity with the preferred value of each liquid, in `ids` order."""
    columns: Columns = {}
    for place, key in enumerate(ids):
        for value in records.preferred(key):
            if value.quantity not in columns:
                columns[value.quantity] = Column.empty(value.definition, len(ids))
            columns[value.quantity].put(place, value)
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
