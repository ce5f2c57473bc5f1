"""Fill `raw/xtb.csv` and `raw/conformers.csv`: GFN2-xTB, IPEA1-xTB and D4 for every liquid.

    python datasets/build/quantum/xtb.py [id ...]

Ionization: IPEA1-xTB (Asgeirsson, Bauer and Grimme 2017, 10.1039/C7SC00601B), neutral minus cation
at the neutral's geometry, less the published shift of 4.846 eV. Polarizability and C6: D4
(Caldeweyher et al. 2019, 10.1063/1.5090222). All at the lowest conformer except the dipole.
"""

from __future__ import annotations

import importlib
import sys
import time
from collections.abc import Mapping
from typing import Any

import numpy as np
from cache import RAW, append, current, fingerprint, read_liquids
from conformers import Conformer, conformers
from numpy.typing import NDArray
from shape import length, surface
from units import BOHR_A, C6_SHELF, HARTREE_EV, POLARIZABILITY_A3

tblite: Any = importlib.import_module("tblite.interface")
dftd4: Any = importlib.import_module("dftd4.interface")

METHOD = "GFN2-xTB"
SHIFT_EV = 4.846
# Geometries are kept for the dipoles at a better level. GFN2-xTB misplaces rotamers of halides and
# alcohols by 5 kJ/mol and more, hence the wide window.
_KEPT_KJ_MOL = 15.0
_KEPT = 8
COLUMNS = [
    "id",
    "fingerprint",
    "method",
    "heavy_atoms",
    "dipole_D",
    "dipole_spread_D",
    "dipole_lowest_D",
    "polarizability_A3",
    "c6_1e-79_J_m6",
    "ionization_energy_eV",
    "conformers",
    "conformers_3_kJ_mol",
    "conformers_10_kJ_mol",
    "length_nm",
    "area_nm2",
    "volume_nm3",
    "seconds",
]
GEOMETRY = [
    "id",
    "fingerprint",
    "conformer",
    "energy_kJ_mol",
    "copies",
    "weight",
    "dipole_D",
    "atoms",
    "xyz_A",
]


def compute(liquid: Mapping[str, str]) -> tuple[dict[str, object], list[dict[str, object]]]:
    """One row of `xtb.csv` and the rows of `conformers.csv` for a liquid."""
    start = time.process_time()
    numbers, found = conformers(liquid["smiles"])
    lowest = found[0].positions
    share = np.array([c.weight for c in found])
    moments = np.array([c.dipole for c in found])
    energies = np.array([c.energy for c in found])
    mean_square = float(share @ moments**2)
    spread = float(np.sqrt(max(share @ (moments - share @ moments) ** 2, 0.0)))
    area, volume = surface(numbers, lowest)
    dispersion = dftd4.DispersionModel(numbers, lowest / BOHR_A).get_properties()
    polarizability = dispersion["polarizabilities"].sum() * POLARIZABILITY_A3
    c6 = dispersion["c6 coefficients"].sum() * C6_SHELF
    mark = {"id": liquid["id"], "fingerprint": fingerprint(liquid["smiles"])}
    row = {
        **mark,
        "method": METHOD,
        "heavy_atoms": int((numbers > 1).sum()),
        "dipole_D": f"{mean_square**0.5:.3f}",
        "dipole_spread_D": f"{spread:.3f}",
        "dipole_lowest_D": f"{moments[0]:.3f}",
        "polarizability_A3": f"{polarizability:.4f}",
        "c6_1e-79_J_m6": f"{c6:.3f}",
        "ionization_energy_eV": f"{_ionization(numbers, lowest):.3f}",
        "conformers": len(found),
        "conformers_3_kJ_mol": int((energies <= 3).sum()),
        "conformers_10_kJ_mol": int((energies <= 10).sum()),
        "length_nm": f"{length(numbers, lowest) / 10:.4f}",
        "area_nm2": f"{area / 100:.4f}",
        "volume_nm3": f"{volume / 1000:.5f}",
        "seconds": f"{time.process_time() - start:.2f}",
    }
    near = [c for c in found if c.energy <= _KEPT_KJ_MOL][:_KEPT]
    return row, [{**mark, **_geometry(k, c, numbers)} for k, c in enumerate(near)]


def _geometry(index: int, one: Conformer, numbers: NDArray[np.int64]) -> dict[str, object]:
    return {
        "conformer": index,
        "energy_kJ_mol": f"{one.energy:.3f}",
        "copies": f"{one.copies:.4g}",
        "weight": f"{one.weight:.4f}",
        "dipole_D": f"{one.dipole:.3f}",
        "atoms": " ".join(map(str, numbers)),
        "xyz_A": " ".join(f"{x:.4f}" for x in one.positions.ravel()),
    }


def _ionization(numbers: NDArray[np.int64], positions_A: NDArray[np.float64]) -> float:
    """Vertical ionization energy in eV."""
    energy = []
    for charge in (0, 1):
        system = tblite.Calculator(
            "IPEA1-xTB", numbers, positions_A / BOHR_A, charge=charge, uhf=charge
        )
        system.set("verbosity", 0)
        energy.append(float(system.singlepoint().get("energy")))
    return (energy[1] - energy[0]) * HARTREE_EV - SHIFT_EV


def main(only: list[str]) -> int:
    """Compute what is missing, small molecules first; return the number of failures."""
    liquids = read_liquids()
    done = {row["id"] for row in current(RAW / "xtb.csv", liquids)}
    left = [x for x in liquids.values() if x["id"] not in done and (not only or x["id"] in only)]
    failed = 0
    for liquid in sorted(left, key=lambda x: (len(x["smiles"]), x["id"])):
        try:
            row, geometries = compute(liquid)
        except Exception as error:  # any library may fail on one molecule; the rest go on
            failed += 1
            print(f"{liquid['id']}: {type(error).__name__}: {error}", file=sys.stderr, flush=True)
            continue
        append(RAW / "conformers.csv", geometries, GEOMETRY)
        append(RAW / "xtb.csv", [row], COLUMNS)
    return failed


if __name__ == "__main__":
    sys.exit(min(main(sys.argv[1:]), 1))
