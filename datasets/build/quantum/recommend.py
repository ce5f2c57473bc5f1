"""Write `computed.csv`: one calibrated value for each liquid and quantity, with its uncertainty.

Run as `python datasets/build/quantum/recommend.py` after `calibrate.py`; needs NumPy only.

A family's own factor is used where its left-one-out error is smaller than the error of the common
factor, else the common one. The uncertainty is 1.25 times the mean absolute error that goes with
the factor (the ratio of standard to mean absolute deviation of a normal distribution), and for a
dipole also the effect of uncertain conformer energies. Dipoles come from PBE0 where there is one,
else from GFN2-xTB. C6 is D4's own, 6 % off on 25 molecules with oscillator-strength values; where
D4's polarizability departs from the refractive index, C6 is less certain by 1.5 times as much, as
it goes with the power 3/2 of the polarizability (Slater and Kirkwood 1931, 10.1103/PhysRev.37.682).
"""

from __future__ import annotations

import sys
from collections import defaultdict

import numpy as np
from cache import HERE, RAW, Row, current, read_liquids, read_rows, write
from units import RT_KJ_MOL

COLUMNS = ["id", "quantity", "value", "unit", "method", "factor", "uncertainty", "spread"]
_NORMAL = 1.2533
_C6_ERROR = 0.06
# Typical errors in kJ/mol of relative conformer energies of small molecules: half a kilocalorie
# for a hybrid functional with D4, one for GFN2-xTB (from memory of 10.1039/C7CP04913G and
# 10.1021/acs.jctc.8b01176).
_CONFORMER_ERROR = {"PBE0/def2-SVPD": 2.0, "GFN2-xTB": 4.0}
_ROUTES = (
    ("dipole", "GFN2-xTB", "xtb", "dipole_D", "debye"),
    ("dipole", "PBE0/def2-SVPD", "pbe0_dipole", "dipole_D", "debye"),
    ("polarizability", "D4", "xtb", "polarizability_A3", "angstrom**3"),
    ("ionization_energy", "IPEA1-xTB", "xtb", "ionization_energy_eV", "eV"),
)


def choice(table: list[Row], quantity: str, method: str, family: str) -> tuple[float, float]:
    """Factor and standard uncertainty for a family."""
    mine = {r["family"]: r for r in table if (r["quantity"], r["method"]) == (quantity, method)}
    own, every = mine.get(family), mine["all"]
    if own is None or not own["own_factor"]:
        return float(every["factor"]), _NORMAL * float(every["mae"])
    if float(own["own_mae"]) < float(own["mae"]):
        return float(own["own_factor"]), _NORMAL * float(own["own_mae"])
    return float(own["factor"]), _NORMAL * float(own["mae"])


def conformer_uncertainty(moments: list[float], shares: list[float], error: float) -> float:
    """Error in debye of the root mean square dipole from independent errors of the energies.

    With weights w and mean square M, d(M)/d(E_i) = -w_i (mu_i^2 - M) / RT.
    """
    square, share = np.array(moments) ** 2, np.array(shares) / sum(shares)
    mean = float(share @ square)
    if mean == 0:
        return 0.0
    off = np.linalg.norm(share * (square - mean)) * error / RT_KJ_MOL
    return float(min(off / (2 * mean**0.5), np.ptp(moments)))


def _ensembles(liquids: dict[str, Row]) -> dict[tuple[str, str], tuple[list[float], list[float]]]:
    """Dipoles and weights of the conformers by method and liquid."""
    found: dict[tuple[str, str], tuple[list[float], list[float]]] = defaultdict(lambda: ([], []))
    for row in current(RAW / "conformers.csv", liquids, ("id", "conformer")):
        moments, shares = found["GFN2-xTB", row["id"]]
        moments.append(float(row["dipole_D"]))
        shares.append(float(row["weight"]))
    for row in current(RAW / "pbe0_dipole.csv", liquids):
        energy, copies, dipole = (
            np.array(row[name].split(), dtype=float)
            for name in ("energies_kJ_mol", "copies", "dipoles_D")
        )
        share = copies * np.exp(-energy / RT_KJ_MOL)
        found["PBE0/def2-SVPD", row["id"]] = (dipole.tolist(), share.tolist())
    return found


def main() -> int:
    """Write the file; a better method replaces a poorer one."""
    liquids = read_liquids()
    table = read_rows(HERE / "calibration.csv")
    ensembles = _ensembles(liquids)
    best: dict[tuple[str, str], dict[str, object]] = {}
    for quantity, method, file, column, unit in _ROUTES:
        for row in current(RAW / f"{file}.csv", liquids):
            factor, error = choice(table, quantity, method, liquids[row["id"]]["family"])
            if quantity == "dipole":
                moments, shares = ensembles[method, row["id"]]
                extra = conformer_uncertainty(moments, shares, _CONFORMER_ERROR[method])
                error = float(np.hypot(error, factor * extra))
            best[row["id"], quantity] = {
                "id": row["id"],
                "quantity": quantity,
                "value": f"{factor * float(row[column]):.4g}",
                "unit": unit,
                "method": method,
                "factor": f"{factor:.4f}",
                "uncertainty": f"{error:.2g}",
                "spread": row["dipole_spread_D"] if quantity == "dipole" else "",
            }
    ratio = {
        row["id"]: float(row["measured"]) / float(row["computed"])
        for row in read_rows(HERE / "calibration_pairs.csv")
        if row["quantity"] == "polarizability"
    }
    common, _ = choice(table, "polarizability", "D4", "all")
    for row in current(RAW / "xtb.csv", liquids):
        off = 1.5 * (ratio.get(row["id"], common) / common - 1)
        error = float(np.hypot(_C6_ERROR, off)) * float(row["c6_1e-79_J_m6"])
        best[row["id"], "c6"] = {
            "id": row["id"],
            "quantity": "c6",
            "value": f"{float(row['c6_1e-79_J_m6']):.4g}",
            "unit": "1e-79 J m**6",
            "method": "D4",
            "factor": "1",
            "uncertainty": f"{error:.2g}",
            "spread": "",
        }
    write(HERE / "computed.csv", [best[key] for key in sorted(best)], COLUMNS)
    print(f"{len(best)} values")
    return 0


if __name__ == "__main__":
    sys.exit(main())
