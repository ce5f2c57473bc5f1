"""Write `raw/solvent_descriptors.csv`: hydrogen-bond acidity and basicity of common solvents.

    python datasets/build/quantum/hbond.py

The Minnesota Solvent Descriptor Database (Winget, Dolney, Giesen, Cramer and Truhlar, University of
Minnesota, 2010; used in 10.1021/jp810292n), as carried by PySCF: refractive index at 20 and 25 degC
for the sodium D line, Abraham's summed hydrogen-bond acidity and basicity, macroscopic surface
tension and relative permittivity at 25 degC. Only numbers are taken, and only by import.
Disagreements with `values.csv` are printed.
"""

from __future__ import annotations

import importlib
import sys
from typing import Any

from cache import DATASETS, RAW, fingerprint, read_liquids, read_rows, write
from scipy.constants import Avogadro, calorie

# cal mol^-1 angstrom^-2, the unit of the database, in mN/m.
SURFACE_TENSION = calorie / Avogadro / 1e-20 * 1e3
COLUMNS = [
    "id",
    "fingerprint",
    "solvent",
    "hbond_acidity",
    "hbond_basicity",
    "refractive_index_20_degC",
    "refractive_index_25_degC",
    "surface_tension_mN_m",
    "permittivity",
]
ALIASES = {
    "E-2-pentene": "trans-2-pentene",
    "butanone": "2-butanone",
    "butanonitrile": "butyronitrile",
    "butylethanoate": "butyl acetate",
    "a-chlorotoluene": "benzyl chloride",
    "butylether": "dibutyl ether",
    "E-1,2-dichloroethene": "trans-1,2-dichloroethylene",
    "Z-1,2-dichloroethene": "cis-1,2-dichloroethylene",
    "ethylethanoate": "ethyl acetate",
    "ethylmethanoate": "ethyl formate",
    "ethylphenylether": "phenetole",
    "p-isopropyltoluene": "p-cymene",
    "methylethanoate": "methyl acetate",
    "methylmethanoate": "methyl formate",
    "N-methylformamide(E/Zmixture)": "N-methylformamide",
    "pentyl ethanoate": "pentyl acetate",
    "perfluorobenzene": "hexafluorobenzene",
    "propanonitrile": "propionitrile",
    "propyl ethanoate": "propyl acetate",
    "tetrahydrothiophene-S,S-dioxide": "sulfolane",
}
# Column of the database, quantity of values.csv.
_CHECKS = (
    ("refractive_index_20_degC", "refractive_index"),
    ("surface_tension_mN_m", "surface_tension"),
    ("permittivity", "permittivity"),
)
_TOLERANCE = 0.02


def _key(name: str) -> str:
    return "".join(c for c in name.lower() if c.isalnum() or c == ",")


def main() -> int:
    """Write the table; print unmatched names and disagreements beyond 2 %."""
    smd: Any = importlib.import_module("pyscf.solvent.smd")
    liquids = read_liquids()
    known: dict[str, str] = {}
    for row in liquids.values():
        for name in (row["name"], row["id"], *row["synonyms"].split(" | ")):
            known.setdefault(_key(name), row["id"])
    rows, unmatched = [], []
    for solvent, numbers in smd.solvent_db.items():
        if not solvent:  # an empty template entry
            continue
        found = known.get(_key(ALIASES.get(solvent, solvent)))
        if found is None:
            unmatched.append(solvent)
            continue
        index20, index25, acidity, basicity, tension, permittivity = numbers[:6]
        rows.append(
            {
                "id": found,
                "fingerprint": fingerprint(liquids[found]["smiles"]),
                "solvent": solvent,
                "hbond_acidity": acidity,
                "hbond_basicity": basicity,
                # Negative numbers stand for a value not given.
                "refractive_index_20_degC": index20 if index20 > 0 else "",
                "refractive_index_25_degC": index25 if index25 > 0 else "",
                "surface_tension_mN_m": f"{tension * SURFACE_TENSION:.2f}" if tension > 0 else "",
                "permittivity": permittivity,
            }
        )
    write(RAW / "solvent_descriptors.csv", sorted(rows, key=lambda r: str(r["id"])), COLUMNS)
    print(f"{len(rows)} solvents matched; unmatched: {'; '.join(unmatched)}")
    _compare(rows)
    return 0


def _compare(rows: list[dict[str, Any]]) -> None:
    values = {
        (row["id"], row["quantity"]): row
        for row in read_rows(DATASETS / "values.csv")
        if row["preferred"] == "1"
    }
    for column, quantity in _CHECKS:
        compared, far = 0, []
        for row in rows:
            ours = values.get((row["id"], quantity))
            if ours is None or row[column] == "":
                continue
            compared += 1
            ratio = float(ours["value"]) / float(row[column])
            if abs(ratio - 1) > _TOLERANCE:
                far.append(
                    f"  {row['id']}: database {row[column]}, values.csv {ours['value']} at "
                    f"{ours['temperature_K']} K ({ours['source']}), ratio {ratio:.3f}"
                )
        print(f"{quantity}: {compared} compared, {len(far)} beyond {_TOLERANCE:.0%}")
        print("\n".join(far))


if __name__ == "__main__":
    sys.exit(main())
