"""PBE0/def2-SVPD dipoles of the populated conformers, on their GFN2-xTB geometries.

    python datasets/build/quantum/pbe0.py [--until HH:MM] [--processes N] [--only ID ...]

PBE0 (Adamo and Barone 1999, 10.1063/1.478522), def2-SVPD (Rappoport and Furche 2010,
10.1063/1.3484283), density fitting, PySCF (Sun et al. 2020, 10.1063/5.0006074). Conformers within
12 kJ/mol at GFN2-xTB up to six heavy atoms, 8 kJ/mol above; their weights at 298.15 K come from the
PBE0 energy plus the D4 correction and the number of copies. Liquids with a measured dipole that
are common (for calibration) or stand in `outliers.csv` take turns with those without one, cheapest
first; the rest, and hydrocarbons, follow. Rows go to `raw/pbe0_dipole.csv` as they come.
"""

from __future__ import annotations

import argparse
import importlib
import multiprocessing
import sys
import time
from collections import Counter, defaultdict
from collections.abc import Iterator
from concurrent.futures import FIRST_COMPLETED, Future, ProcessPoolExecutor, wait
from typing import Any

import numpy as np
from cache import DATASETS, HERE, RAW, Row, append, current, read_liquids, read_rows
from conformers import weights
from units import BOHR_A, HARTREE_KJ_MOL

METHOD = "PBE0/def2-SVPD//GFN2-xTB"
BASIS = "def2-SVPD"
# Window at GFN2-xTB in kJ/mol and most conformers, up to and above this many heavy atoms.
_SMALL, _WINDOW_KJ_MOL, _MOST = 6, (12.0, 8.0), (6, 4)
_HEAVY = 12
# Tabulated values a liquid needs to count as common, and the size up to which it calibrates.
_COMMON, _COMMON_HEAVY = 28, 8
COLUMNS = [
    "id",
    "fingerprint",
    "method",
    "heavy_atoms",
    "dipole_D",
    "dipole_spread_D",
    "dipole_min_D",
    "dipole_max_D",
    "conformers",
    "coverage",
    "energies_kJ_mol",
    "copies",
    "dipoles_D",
    "seconds",
]


def compute(rows: list[Row]) -> dict[str, object]:
    """The row of one liquid from its conformer rows."""
    start = time.process_time()
    numbers = [int(z) for z in rows[0]["atoms"].split()]
    energies, moments = list[float](), list[float]()
    for row in rows:
        positions = np.array(row["xyz_A"].split(), dtype=float).reshape(-1, 3)
        total, moment = single_point(numbers, positions)
        energies.append(total * HARTREE_KJ_MOL)
        moments.append(moment)
    energy = np.array(energies) - min(energies)
    dipole = np.array(moments)
    copies = np.array([float(row["copies"]) for row in rows])
    share = weights(energy, copies)
    return {
        "id": rows[0]["id"],
        "fingerprint": rows[0]["fingerprint"],
        "method": METHOD,
        "heavy_atoms": sum(z > 1 for z in numbers),
        "dipole_D": f"{np.sqrt(share @ dipole**2):.3f}",
        "dipole_spread_D": f"{np.sqrt(max(share @ (dipole - share @ dipole) ** 2, 0.0)):.3f}",
        "dipole_min_D": f"{dipole.min():.3f}",
        "dipole_max_D": f"{dipole.max():.3f}",
        "conformers": len(rows),
        "coverage": f"{sum(float(row['weight']) for row in rows):.3f}",
        "energies_kJ_mol": " ".join(f"{x:.2f}" for x in energy),
        "copies": " ".join(f"{x:.4g}" for x in copies),
        "dipoles_D": " ".join(f"{x:.3f}" for x in dipole),
        "seconds": f"{time.process_time() - start:.1f}",
    }


def single_point(numbers: list[int], positions_A: Any) -> tuple[float, float]:
    """Energy with D4 in hartree and dipole moment in debye."""
    pyscf: Any = importlib.import_module("pyscf")
    dft: Any = importlib.import_module("pyscf.dft")
    dftd4: Any = importlib.import_module("dftd4.interface")
    pyscf.lib.num_threads(1)
    atoms = list(zip(numbers, positions_A.tolist(), strict=True))
    molecule = pyscf.gto.M(atom=atoms, basis=BASIS, ecp=_core(numbers), unit="angstrom", verbose=0)
    field = dft.RKS(molecule, xc="pbe0").density_fit()
    field.grids.level = 1  # acetone: within 0.0005 D of level 2, half the time
    field.conv_tol = 1e-7
    field.max_memory = 1500
    energy = field.kernel()
    if not field.converged:
        raise ArithmeticError("the self-consistent field did not converge")
    model = dftd4.DispersionModel(np.array(numbers), positions_A / BOHR_A)
    correction = model.get_dispersion(dftd4.DampingParam(method="pbe0"), grad=False)["energy"]
    return float(energy + correction), float(np.linalg.norm(field.dip_moment(verbose=0)))


def _core(numbers: list[int]) -> dict[str, str] | None:
    """Effective cores of the def2 family for elements past krypton."""
    symbols: Any = importlib.import_module("pyscf.data.elements")
    return {symbols.ELEMENTS[z]: BASIS for z in numbers if z > 36} or None


def queue(only: list[str]) -> Iterator[list[Row]]:
    """Conformer rows of each liquid still to do, in the order described above."""
    liquids = read_liquids()
    done = {r["id"]: int(r["conformers"]) for r in current(RAW / "pbe0_dipole.csv", liquids)}
    groups: dict[str, list[Row]] = defaultdict(list)
    for row in current(RAW / "conformers.csv", liquids, ("id", "conformer")):
        groups[row["id"]].append(row)
    values = read_rows(DATASETS / "values.csv")
    count = Counter(row["id"] for row in values)
    moment = {
        row["id"]: float(row["value"])
        for row in values
        if row["quantity"] == "dipole" and row["kind"] in ("measured", "derived")
    }
    suspect = {row["id"] for row in read_rows(HERE / "outliers.csv") if row["quantity"] == "dipole"}
    ranked = []
    for name, rows in groups.items():
        heavy = sum(int(z) > 1 for z in rows[0]["atoms"].split())
        large = heavy > _SMALL
        near = [r for r in rows if float(r["energy_kJ_mol"]) <= _WINDOW_KJ_MOL[large]]
        rows = near[: _MOST[large]]
        common = moment.get(name, 0) > 0.2 and count[name] >= _COMMON and heavy <= _COMMON_HEAVY
        common |= name in suspect
        polar = set(rows[0]["atoms"].split()) - {"1", "6"}
        unknown = name not in moment and polar
        rank = 0 if common else 1 if unknown else 2 if moment.get(name, 0) > 0 else 3
        if done.get(name, 0) < len(rows) and heavy <= _HEAVY and (not only or name in only):
            atoms = len(rows[0]["atoms"].split())
            ranked.append((rank, len(rows) * (atoms + 3 * heavy) ** 2, name, rows))
    ranked.sort(key=lambda r: r[:3])
    # The first two groups take turns.
    place = Counter[int]()
    turns = []
    for rank, _, name, rows in ranked:
        turns.append((max(rank, 1), place[rank], rank, name, rows))
        place[rank] += 1
    yield from (rows for *_, rows in sorted(turns, key=lambda r: r[:4]))


def main() -> int:
    """Work through the queue until it is empty or the time is up."""
    parser = argparse.ArgumentParser(description=__doc__)
    parser.add_argument("--until", default="99:99", help="start nothing after this local time")
    parser.add_argument("--processes", type=int, default=1)
    parser.add_argument("--only", nargs="*", default=[])
    options = parser.parse_args()
    failed, work = 0, queue(options.only)
    running: dict[Future[dict[str, object]], str] = {}
    context = multiprocessing.get_context("spawn")
    with ProcessPoolExecutor(options.processes, mp_context=context) as pool:
        while True:
            while len(running) < options.processes and time.strftime("%H:%M") < options.until:
                rows = next(work, None)
                if rows is None:
                    break
                running[pool.submit(compute, rows)] = rows[0]["id"]
            if not running:
                return min(failed, 1)
            for future in wait(running, return_when=FIRST_COMPLETED).done:
                name = running.pop(future)
                try:
                    append(RAW / "pbe0_dipole.csv", [future.result()], COLUMNS)
                except Exception as error:  # one molecule may fail; the rest go on
                    failed += 1
                    print(f"{name}: {type(error).__name__}: {error}", file=sys.stderr, flush=True)


if __name__ == "__main__":
    sys.exit(main())
