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

LIQUIDS = "liquids.csv"
VALUES = "values.csv"


def shipped() -> Traversable:
    """Return the folder of tables that the program carries."""
    return files("stillroom.datasets")


def fingerprint(folder: Traversable) -> str:
    """Return the first 12 hex digits of the SHA-256 of liquids and values together."""
    digest = hashlib.sha256()
    for name in (LIQUIDS, VALUES):
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
        text = path.read_text(encoding="utf-8-sig")  # spreadsheets put a byte order mark first
    except FileNotFoundError:
        raise BadFile(name, "not found") from None
    except (OSError, UnicodeDecodeError) as problem:
        raise BadFile(name, f"cannot be read ({problem})") from None
    reader = csv.reader(io.StringIO(text, newline=""))
    try:
        header = next(reader, [])
    except csv.Error as problem:
        raise BadFile(name, f"is not CSV ({problem})", row=1) from None
    missing = [c for c in needed if c not in header]
    if missing:
        raise BadFile(name, f"has no column {', '.join(missing)}", row=1)

    def checked() -> Iterator[tuple[int, list[str]]]:
        width = len(header)
        try:
            for row in reader:
                if len(row) != width:
                    raise BadFile(name, f"{len(row)} cells, expected {width}", row=reader.line_num)
                yield reader.line_num, row
        except csv.Error as problem:
            raise BadFile(name, f"is not CSV ({problem})", row=reader.line_num) from None

    return header, checked()


def rows(folder: Traversable, name: str, needed: tuple[str, ...]) -> Iterator[Row]:
    """Yield each row of a CSV file with its line number, cells by column; raises as `cells`."""
    header, lines = cells(folder, name, needed)
    for line, row in lines:
        yield line, dict(zip(header, row, strict=True))


def read_identities(folder: Traversable) -> list[Identity]:
    """Return who the liquids are, in file order."""
    name = LIQUIDS
    found = []
    seen = set()
    for line, row in rows(folder, name, ("id", "name", "cas", "smiles", "formula", "family")):
        for column in ("id", "name"):
            if not clean_text(row[column]):
                raise BadFile(name, "is empty", line, column)
        if row["id"] in seen:
            raise BadFile(name, f"'{row['id']}' is there twice", line, "id")
        seen.add(row["id"])
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
        if value is not None and (value < 0 or value != int(value)):
            raise BadFile(name, f"'{row[column]}' is not a count", line, column)
        return None if value is None else int(value)

    def word(column: str, *allowed: str) -> str | None:
        text = row.get(column, "")
        if text and text not in allowed:
            raise BadFile(name, f"'{text}', expected {', '.join(allowed)}", line, column)
        return text or None

    group_dipole = number("group_dipole_rss_D")
    dimer = word("vapour_dimer", "yes", "no")
    return Structure(
        hbond_donor=word("hbond_donor", "none", "weak", "strong"),
        hbond_acceptor=word("hbond_acceptor", "none", "weak", "strong"),
        vapour_dimer=None if dimer is None else dimer == "yes",
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
            if row[self._preferred] not in ("0", "1"):
                told = f"'{row[self._preferred]}', expected 0 or 1"
                raise BadFile(VALUES, told, line, "preferred")
            self._rows.setdefault(row[key], []).append((line, row))

    def __getitem__(self, key: str) -> Sequence[Record]:
        return [self._record(line, row) for line, row in self._rows[key]]

    def __iter__(self) -> Iterator[str]:
        return iter(self._rows)

    def __len__(self) -> int:
        return len(self._rows)

    def preferred(self, key: str) -> Iterator[Value]:
        """Yield the preferred values of a liquid; raises `BadFile` if one is not believable."""
        seen = set()
        for line, row in self._rows.get(key, ()):
            if row[self._preferred] != "1":
                continue
            value = self._record(line, row).value
            q = value.definition
            if not q.low <= value.number <= q.high:
                expected = f"{q.low:g} to {q.high:g} {q.unit_label}".rstrip()
                told = f"{q.name} {value.number:g}, expected {expected}"
                raise BadFile(VALUES, told, line, "value")
            if q.name in seen:
                raise BadFile(VALUES, f"a second preferred {q.name}", line, "preferred")
            seen.add(q.name)
            yield value

    def line(self, key: str) -> int:
        """Return the line of the first value of a liquid."""
        return self._rows[key][0][0]

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
    for column, text in (("temperature_K", temperature), ("uncertainty", spread)):
        if text.startswith("-"):
            raise BadFile(VALUES, f"'{text}' is negative", line, column)
    value = Value(
        quantity=q.name,
        number=_number(row["value"], VALUES, line, "value"),
        unit=q.unit,
        kind=row["kind"],
        source=clean_text(row["source"]),
        uncertainty=_number(spread, VALUES, line, "uncertainty") if spread else math.nan,
        temperature=_number(temperature, VALUES, line, "temperature_K") if temperature else None,
        note=clean_text(row["note"], 1000),
    )
    return Record(value, row["preferred"] == "1")


def preferred_columns(ids: Sequence[str], records: Records) -> Columns:
    """Return one column per quantity with the preferred value of each liquid, in `ids` order."""
    columns: Columns = {}
    for key in records.keys() - set(ids):
        raise BadFile(VALUES, f"no liquid '{key}' in {LIQUIDS}", records.line(key), "id")
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
            clean_text(row["key"]),
            clean_text(row["citation"], 1000),
            clean_text(row["year"]),
            clean_text(row["doi"]),
            clean_text(row["isbn"]),
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
        hazard = Hazard(
            clean_text(row["hazard"]), clean_text(row["detail"]), clean_text(row["source"])
        )
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
