"""Fit computed to measured values: one factor for each quantity and method, errors by family.

The factor is fitted by least squares through the origin, points further out than `OUT` times the
median deviation left aside; where a family has at least `FAMILY` members its own factor is fitted
too and judged with each member left out in turn. Errors are of the scaled values. Needs NumPy and
the files only.
"""

from __future__ import annotations

from collections import defaultdict
from dataclasses import dataclass

import numpy as np
from cache import RAW, Row, current
from numpy.typing import NDArray

Array = NDArray[np.float64]

OUT = 6.0
FAMILY = 4
PAIRS = ["quantity", "method", "id", "family", "measured", "measured_source", "computed"]
COLUMNS = [
    "quantity",
    "method",
    "family",
    "n",
    "factor",
    "mean_error_unscaled",
    "mae_unscaled",
    "mean_error",
    "mae",
    "rms_error",
    "max_error",
    "own_factor",
    "own_mae",
    "worst",
]


@dataclass(frozen=True, slots=True)
class Check:
    """A column of a raw file, the quantity it is compared with, when a difference is reported.

    `limit` is in the unit of the quantity, `relative` a fraction that counts only when the
    difference also exceeds `floor`. Measured values of `least` or less are left out. With `own`,
    outliers are sought with the family's own factor where it has one.
    """

    file: str
    column: str
    quantity: str
    method: str
    kinds: tuple[str, ...]
    limit: float
    relative: float
    floor: float
    least: float = 0.0
    own: bool = False


CHECKS = (
    Check(
        "pbe0_dipole", "dipole_D", "dipole", "PBE0/def2-SVPD", ("measured",), 0.4, 0.25, 0.15, 0.05
    ),
    # Semi-empirical moments are too rough for anything but gross errors.
    Check("xtb", "dipole_D", "dipole", "GFN2-xTB", ("measured",), 0.6, 9.0, 0.6, 0.05, True),
    Check(
        "xtb", "polarizability_A3", "polarizability", "D4", ("derived", "measured"), 99.0, 0.1, 0.0
    ),
    Check(
        "xtb", "ionization_energy_eV", "ionization_energy", "IPEA1-xTB", ("measured",), 0.8, 9, 0.8
    ),
)


def factor(measured: Array, computed: Array) -> float:
    """Least-squares factor through the origin, far points left aside."""
    # The median of the ratios, of the larger half, is a start that no single point can spoil.
    large = computed >= np.median(computed)
    value = float(np.median(measured[large] / computed[large]))
    for _ in range(20):
        off = np.abs(measured - value * computed)
        keep = off <= OUT * max(float(np.median(off)), 1e-9)
        m, c = measured[keep], computed[keep]
        value, before = float(m @ c / (c @ c)), value
        if value == before:
            break
    return value


def pairs(check: Check, liquids: dict[str, Row], values: list[Row]) -> list[Row]:
    """Preferred values of the kinds asked for beside the computed ones, by id."""
    measured = {
        row["id"]: row
        for row in values
        if row["quantity"] == check.quantity
        and row["preferred"] == "1"
        and row["kind"] in check.kinds
    }
    return [
        {
            "quantity": check.quantity,
            "method": check.method,
            "id": row["id"],
            "family": liquids[row["id"]]["family"],
            "measured": measured[row["id"]]["value"],
            "measured_source": measured[row["id"]]["source"],
            "computed": row[check.column],
        }
        for row in current(RAW / f"{check.file}.csv", liquids)
        if row["id"] in measured and float(measured[row["id"]]["value"]) > check.least
    ]


def columns(found: list[Row]) -> tuple[Array, Array]:
    """Measured and computed values as arrays."""
    return (
        np.array([float(row["measured"]) for row in found]),
        np.array([float(row["computed"]) for row in found]),
    )


def summary(found: list[Row]) -> list[dict[str, object]]:
    """Calibration rows of one check: all liquids, then each family."""
    scale = factor(*columns(found))
    groups: dict[str, list[Row]] = defaultdict(list)
    for row in found:
        groups[row["family"]].append(row)
    named = [("all", found), *sorted(groups.items())]
    return [_line(name, rows, scale) for name, rows in named]


def _line(name: str, rows: list[Row], scale: float) -> dict[str, object]:
    measured, computed = columns(rows)
    raw, error = computed - measured, scale * computed - measured
    own, left_out = "", ""
    if name != "all" and len(rows) >= FAMILY:
        own = f"{factor(measured, computed):.4f}"
        index = np.arange(len(rows))
        off = [
            abs(factor(measured[index != k], computed[index != k]) * computed[k] - measured[k])
            for k in index
        ]
        left_out = f"{np.mean(off):.3f}"
    worst = int(np.abs(error).argmax())
    return {
        "quantity": rows[0]["quantity"],
        "method": rows[0]["method"],
        "family": name,
        "n": len(rows),
        "factor": f"{scale:.4f}",
        "mean_error_unscaled": f"{raw.mean():.3f}",
        "mae_unscaled": f"{np.abs(raw).mean():.3f}",
        "mean_error": f"{error.mean():.3f}",
        "mae": f"{np.abs(error).mean():.3f}",
        "rms_error": f"{np.sqrt((error**2).mean()):.3f}",
        "max_error": f"{error[worst]:.3f}",
        "own_factor": own,
        "own_mae": left_out,
        "worst": rows[worst]["id"],
    }
