"""The curated list of liquids: which CAS number, under which name, family and synonyms."""

from __future__ import annotations

import csv
from dataclasses import dataclass
from pathlib import Path


@dataclass(frozen=True, slots=True)
class Chosen:
    """One line of the selection; `state` is `liquid` or `melt` (solid at 25 C, used molten)."""

    cas: str
    name: str
    family: str
    synonyms: tuple[str, ...]
    state: str
    smiles: str

    @property
    def id(self) -> str:
        """The name as typed on a command line: lower case, spaces to hyphens."""
        return slug(self.name)


def slug(name: str) -> str:
    """Return the identifier of a name: `Ethylene glycol` gives `ethylene-glycol`."""
    return name.strip().lower().replace(" ", "-")


def read_selection(path: Path) -> list[Chosen]:
    """Read the selection file; order is kept."""
    with path.open(encoding="utf-8", newline="") as file:
        return [
            Chosen(
                cas=row["cas"],
                name=row["name"],
                family=row["family"],
                synonyms=tuple(s for s in row["synonyms"].split(" | ") if s),
                state=row["state"],
                smiles=row["smiles"],
            )
            for row in csv.DictReader(file)
        ]
