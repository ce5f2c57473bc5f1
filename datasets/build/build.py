"""Rebuild the data files of `datasets/`.

    python datasets/build/build.py            write them
    python datasets/build/build.py --check    rebuild to a temporary folder and compare bytes

Needs the pinned `chemicals` package; nothing is fetched from a network.
"""

from __future__ import annotations

import argparse
import sys
import tempfile
from pathlib import Path

sys.path.insert(0, str(Path(__file__).resolve().parent))

from steps.audit import write_audit
from steps.candidate import Candidate
from steps.collect import collect
from steps.curated import read_decisions
from steps.expansion import fit_expansion
from steps.hazards import hazard_rows, read_hazards
from steps.identity import STRUCTURE_COLUMNS, liquid_of, read_structures
from steps.package import write_package
from steps.paths import CURATED, DATASETS, RAW
from steps.selection import read_selection
from steps.shelf import COLUMNS, IDENTITY, shelf_row
from steps.sources import used_sources
from steps.tables import check_version
from steps.writer import write_csv

LIQUIDS = ("id", "name", "synonyms", "cas", "smiles", "inchikey", "formula", "family")
VALUES = (
    "id",
    "quantity",
    "value",
    "unit",
    "temperature_K",
    "kind",
    "source",
    "uncertainty",
    "preferred",
    "note",
)
FILES = (
    "liquids.csv",
    "values.csv",
    "sources.csv",
    "hazards.csv",
    "shelf.csv",
    "datapackage.json",
    "AUDIT.md",
)


def main(arguments: list[str] | None = None) -> int:
    """Build or check; return 1 if a check finds a difference."""
    parser = argparse.ArgumentParser(description="Rebuild the data files of datasets/.")
    parser.add_argument("--check", action="store_true", help="compare instead of writing")
    if not parser.parse_args(arguments).check:
        print(build(DATASETS))
        return 0
    with tempfile.TemporaryDirectory() as folder:
        build(Path(folder))
        differing = [
            name
            for name in FILES
            if (Path(folder) / name).read_bytes() != (DATASETS / name).read_bytes()
        ]
    for name in differing:
        print(f"{name} differs from a fresh build; run python datasets/build/build.py")
    return 1 if differing else 0


def build(target: Path) -> str:
    """Write all data files into `target`; return a line of counts."""
    check_version()
    structures = read_structures(RAW / "structure.csv")
    decisions = read_decisions(CURATED / "values")
    curated_hazards = read_hazards(CURATED / "hazards.csv")
    selection = sorted(read_selection(CURATED / "selection.csv"), key=lambda c: c.id)
    liquids = [liquid_of(c, structures[c.cas]["formula"], decisions) for c in selection]
    expansion = fit_expansion(liquids)
    identity, values, hazards, shelf = [], [], [], []
    collected: dict[str, list[Candidate]] = {}
    for chosen, liquid in zip(selection, liquids, strict=True):
        row = structures[liquid.cas]
        found = collect(liquid, decisions, expansion)
        collected[liquid.id] = found
        identity.append(
            [
                liquid.id,
                liquid.name,
                " | ".join(chosen.synonyms),
                liquid.cas,
                row["smiles"],
                row["inchikey"],
                liquid.formula,
                liquid.family,
                *(row[c] for c in STRUCTURE_COLUMNS),
            ]
        )
        values += [candidate.cells() for candidate in found]
        hazards += hazard_rows(liquid, found, curated_hazards)
        shelf.append(shelf_row(liquid, row["smiles"], found))
    keys = {row[6] for row in values} | {row[3] for row in hazards}
    write_csv(target / "liquids.csv", (*LIQUIDS, *STRUCTURE_COLUMNS), identity)
    write_csv(target / "values.csv", VALUES, values)
    write_csv(target / "hazards.csv", ("id", "hazard", "detail", "source"), hazards)
    write_csv(target / "shelf.csv", (*IDENTITY, *COLUMNS.values()), shelf)
    header, sources = used_sources(CURATED / "sources.csv", keys)
    write_csv(target / "sources.csv", header, sources)
    write_package(target)
    donors = {c.id for c in selection if structures[c.cas]["hbond_donor"] == "strong"}
    write_audit(target / "AUDIT.md", collected, donors, decisions, CURATED)
    return (
        f"{len(identity)} liquids, {len(values)} values, {len(sources)} sources; thermal expansion"
        f" {expansion.a:.3e} + {expansion.b:.4f}/Tb per K, scatter {expansion.scatter:.1e},"
        f" n = {expansion.count}"
    )


if __name__ == "__main__":
    sys.exit(main())
