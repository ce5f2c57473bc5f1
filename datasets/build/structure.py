"""Make `raw/structure.csv`: what the molecular graph alone tells about each liquid.

Run by hand when the selection changes (`python datasets/build/structure.py`); it needs RDKit, which
the build proper does not. Structures come from the selection's `smiles` column where given, else
from the identifier table of `chemicals` by CAS number; the InChIKey skeleton of the drawn structure
must agree with that table, or the run stops.
"""

from __future__ import annotations

import csv
import sys
from pathlib import Path

sys.path.insert(0, str(Path(__file__).resolve().parent))

from chemicals.identifiers import search_chemical
from rdkit import Chem, RDLogger
from rdkit.Chem import rdMolDescriptors
from steps.additive import additive_polarizability
from steps.graph import describe
from steps.groups import read_groups
from steps.paths import CURATED, RAW
from steps.selection import read_selection

COLUMNS = (
    "cas",
    "smiles",
    "inchikey",
    "formula",
    "hbond_donor",
    "hbond_acceptor",
    "vapour_dimer",
    "polar_groups",
    "group_dipole_rss_D",
    "flexible_polar_bonds",
    "longest_path_bonds",
    "groups",
    "additive_polarizability_A3",
)


def main() -> int:
    """Write the cache; return 1 when a structure and its CAS number disagree."""
    RDLogger.DisableLog("rdApp.*")
    groups = read_groups(CURATED / "group_moments.csv")
    rows, wrong = [], []
    for chosen in read_selection(CURATED / "selection.csv"):
        known = _known(chosen.cas)
        smiles = chosen.smiles or (known[0] if known else "")
        molecule = Chem.MolFromSmiles(smiles)
        if not smiles or molecule is None:
            wrong.append(f"{chosen.name} ({chosen.cas}): no readable structure")
            continue
        key = Chem.MolToInchiKey(molecule)
        if known and known[1].split("-")[0] != key.split("-")[0]:
            wrong.append(f"{chosen.name} ({chosen.cas}): {key} drawn, {known[1]} tabulated")
        formula = rdMolDescriptors.CalcMolFormula(molecule, True, True)
        graph = describe(molecule, groups)
        additive = additive_polarizability(molecule)
        rows.append(
            [
                chosen.cas,
                Chem.MolToSmiles(molecule),
                key,
                formula,
                *graph,
                "" if additive is None else f"{additive:.2f}",
            ]
        )
    with (RAW / "structure.csv").open("w", encoding="utf-8", newline="") as file:
        writer = csv.writer(file, lineterminator="\n")
        writer.writerow(COLUMNS)
        writer.writerows(rows)
    print("\n".join(wrong), file=sys.stderr)
    return 1 if wrong else 0


def _known(cas: str) -> tuple[str, str] | None:
    """SMILES and InChIKey that the identifier table gives for a CAS number."""
    try:
        found = search_chemical(cas)
    except ValueError:
        return None
    return found.smiles, found.InChI_key


if __name__ == "__main__":
    sys.exit(main())
