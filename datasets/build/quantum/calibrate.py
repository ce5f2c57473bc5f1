"""Compare computed with measured values and list the outliers.

    python datasets/build/quantum/calibrate.py

Writes `calibration.csv`, `calibration_pairs.csv` and `outliers.csv`. Needs NumPy only.
"""

from __future__ import annotations

import sys

from cache import DATASETS, HERE, RAW, Row, current, read_liquids, read_rows, write
from calibration import CHECKS, COLUMNS, PAIRS, Check, columns, factor, pairs, summary

OUTLIERS = [
    "id",
    "quantity",
    "method",
    "family",
    "measured",
    "measured_source",
    "computed_unscaled",
    "computed",
    "difference",
    "relative_difference",
    "n_conformers",
    "spread",
]


def outliers(check: Check, found: list[Row], details: dict[str, Row]) -> list[dict[str, object]]:
    """Pairs whose scaled value differs by more than the check allows, largest first."""
    scale = factor(*columns(found))
    own = {
        str(line["family"]): float(str(line["own_factor"]))
        for line in summary(found)
        if check.own and line["own_factor"]
    }
    rows: list[dict[str, object]] = []
    for row in found:
        scale_here = own.get(row["family"], scale)
        measured, computed = float(row["measured"]), float(row["computed"])
        off = scale_here * computed - measured
        if abs(off) > check.limit or abs(off) > max(check.relative * measured, check.floor):
            detail = details[row["id"]]
            rows.append(
                {
                    **{name: row[name] for name in PAIRS[:-1]},
                    "computed_unscaled": row["computed"],
                    "computed": f"{scale_here * computed:.3f}",
                    "difference": f"{off:.3f}",
                    "relative_difference": f"{off / measured:.3f}",
                    "n_conformers": detail["conformers"],
                    "spread": detail.get("dipole_spread_D") if check.quantity == "dipole" else "",
                }
            )
    return sorted(rows, key=lambda r: -abs(float(str(r["difference"]))))


def main() -> int:
    """Write the three files and print the calibration."""
    liquids, values = read_liquids(), read_rows(DATASETS / "values.csv")
    every: list[Row] = []
    table: list[dict[str, object]] = []
    far: list[dict[str, object]] = []
    for check in CHECKS:
        found = pairs(check, liquids, values)
        if not found:
            continue
        details = {r["id"]: r for r in current(RAW / f"{check.file}.csv", liquids)}
        every += found
        table += summary(found)
        far += outliers(check, found, details)
    write(HERE / "calibration_pairs.csv", every, PAIRS)
    write(HERE / "calibration.csv", table, COLUMNS)
    write(HERE / "outliers.csv", far, OUTLIERS)
    print("  ".join(f"{name[:17]:>10}" for name in COLUMNS))
    for line in table:
        print("  ".join(f"{str(line[name])[:17]:>10}" for name in COLUMNS))
    print(f"{len(far)} outliers")
    return 0


if __name__ == "__main__":
    sys.exit(main())
