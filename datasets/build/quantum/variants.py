"""Is the geometry, the basis or the functional to blame where PBE0 dipoles come out too high?

    python datasets/build/quantum/variants.py [--until HH:MM]

Rigid molecules of the families in question and two controls, lowest conformer: GFN2-xTB geometry
against one optimised with PBE0/def2-SVP, def2-TZVPD against def2-SVPD, and the range-separated
hybrid CAM-B3LYP (Yanai, Tew and Handy 2004, 10.1016/j.cplett.2004.06.011) against PBE0. Rows go to
`raw/variants.csv` as they come.
"""

from __future__ import annotations

import argparse
import importlib
import sys
import time
from typing import Any

import numpy as np
from cache import RAW, append, current, read_liquids
from scipy.optimize import minimize
from units import BOHR_A

MOLECULES = (
    "nitromethane",
    "formic-acid",
    "acetone",
    "ethylene-carbonate",
    "acetonitrile",
    "beta-propiolactone",
    "dimethyl-sulfoxide",
    "gamma-butyrolactone",
    "cyclopentanone",
    "sulfolane",
)
METHODS = (
    ("PBE0/def2-SVPD//GFN2-xTB", "pbe0", "def2-SVPD", False),
    ("CAM-B3LYP/def2-SVPD//GFN2-xTB", "camb3lyp", "def2-SVPD", False),
    ("PBE0/def2-TZVPD//GFN2-xTB", "pbe0", "def2-TZVPD", False),
    ("PBE0/def2-SVPD//PBE0/def2-SVP", "pbe0", "def2-SVPD", True),
)
COLUMNS = ["id", "fingerprint", "method", "dipole_D", "seconds"]


def field(numbers: list[int], positions_A: Any, functional: str, basis: str) -> Any:
    """A density-fitted Kohn-Sham object, not yet solved."""
    pyscf: Any = importlib.import_module("pyscf")
    dft: Any = importlib.import_module("pyscf.dft")
    pyscf.lib.num_threads(1)
    atoms = list(zip(numbers, positions_A.tolist(), strict=True))
    molecule = pyscf.gto.M(atom=atoms, basis=basis, unit="angstrom", verbose=0)
    made = dft.RKS(molecule, xc=functional).density_fit()
    made.grids.level = 1
    made.conv_tol = 1e-8
    return made


def optimised(numbers: list[int], start_A: Any) -> Any:
    """Positions in angstrom after PBE0/def2-SVP, largest force 5e-4 hartree/bohr."""

    def energy_and_gradient(flat: Any) -> tuple[float, Any]:
        made = field(numbers, flat.reshape(-1, 3) * BOHR_A, "pbe0", "def2-SVP")
        energy = made.kernel()
        return float(energy), made.nuc_grad_method().kernel().ravel()

    best = minimize(
        energy_and_gradient,
        (start_A / BOHR_A).ravel(),
        jac=True,
        method="L-BFGS-B",
        options={"gtol": 5e-4, "maxiter": 25},
    )
    return best.x.reshape(-1, 3) * BOHR_A


def main() -> int:
    """Compute what is missing."""
    parser = argparse.ArgumentParser(description=__doc__)
    parser.add_argument("--until", default="99:99", help="start nothing after this local time")
    until = parser.parse_args().until
    liquids = read_liquids()
    key = ("id", "method")
    done = {tuple(row[k] for k in key) for row in current(RAW / "variants.csv", liquids, key)}
    lowest = {
        row["id"]: row
        for row in current(RAW / "conformers.csv", liquids, ("id", "conformer"))
        if row["conformer"] == "0"
    }
    for method, functional, basis, relax in METHODS:
        for name in MOLECULES:
            if (name, method) in done or name not in lowest or time.strftime("%H:%M") >= until:
                continue
            start = time.process_time()
            row = lowest[name]
            numbers = [int(z) for z in row["atoms"].split()]
            positions = np.array(row["xyz_A"].split(), dtype=float).reshape(-1, 3)
            if relax:
                positions = optimised(numbers, positions)
            made = field(numbers, positions, functional, basis)
            made.kernel()
            record = {
                "id": name,
                "fingerprint": row["fingerprint"],
                "method": method,
                "dipole_D": f"{np.linalg.norm(made.dip_moment(verbose=0)):.3f}",
                "seconds": f"{time.process_time() - start:.1f}",
            }
            append(RAW / "variants.csv", [record], COLUMNS)
    return 0


if __name__ == "__main__":
    sys.exit(main())
