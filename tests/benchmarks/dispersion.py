"""Error of each dispersion model against C6 from oscillator strengths: `python dispersion.py`.

Molecules and sources are in `tests/reference/c6_oscillator_strength.csv`. The README quotes the
table this prints.
"""

from __future__ import annotations

import csv
from pathlib import Path

import numpy as np

from stillroom.chem.data.constants import BOHR, C6_ATOMIC_UNIT, COULOMB, ELEMENTARY_CHARGE
from stillroom.chem.forces.dispersion import MODELS, dispersion_c6
from stillroom.chem.liquids.structure import valence_electrons

TABLE = Path(__file__).parents[1] / "reference" / "c6_oscillator_strength.csv"


def main() -> None:
    """Print one row per model: signed mean, mean absolute and largest error."""
    with TABLE.open(encoding="utf-8") as file:
        rows = list(csv.DictReader(file))
    measured = np.array([float(r["c6_hartree_bohr6"]) for r in rows])
    alpha = np.array([float(r["polarizability_bohr3"]) for r in rows]) * BOHR**3 * COULOMB
    energy = np.array([float(r["ionization_energy_eV"]) for r in rows]) * ELEMENTARY_CHARGE
    electrons = np.array([valence_electrons(r["formula"]) for r in rows])
    print(f"{len(rows)} molecules: {', '.join(r['name'] for r in rows)}")
    print(f"{'model':27}{'mean':>9}{'mean abs':>10}{'largest':>9}")
    for model in MODELS[1:]:
        c6 = dispersion_c6(alpha, alpha, energy, energy, electrons, electrons, model)
        error = c6 / C6_ATOMIC_UNIT / measured - 1
        worst = error[np.argmax(np.abs(error))]
        print(f"{model:27}{error.mean():>+9.1%}{np.abs(error).mean():>10.1%}{worst:>+9.1%}")


if __name__ == "__main__":
    main()
