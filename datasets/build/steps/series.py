"""Homologous series, and which members are off the smooth line of their series.

For each quantity a quadratic in the number of carbons n (in its logarithm for boiling points, in
1/n for those that level off) is fitted to the members from four carbons
up; while the worst member is further off than the tolerance it is left out and the line fitted
again. The tolerances allow for what a quadratic cannot follow over the series at hand.
"""

from __future__ import annotations

import csv
from collections.abc import Callable
from dataclasses import dataclass
from math import log
from pathlib import Path

import numpy as np

FROM_CARBONS = 4
_FEWEST = 6

TOLERANCES: dict[str, float] = {
    "molar_volume": 1.0,
    "polarizability": 0.25,
    "boiling_point": 4.0,
    "vaporization_enthalpy": 2.5,
    "refractive_index": 0.003,
    "surface_tension": 0.6,
    "permittivity": 0.15,
    "vapor_pressure": 0.35,
    "log_p": 0.35,
}
"""In the unit of the quantity; molar volume in cm^3/mol; permittivity and vapour pressure as the
natural logarithm."""

_ABSCISSA: dict[str, Callable[[float], float]] = {
    "boiling_point": log,
    "refractive_index": lambda n: 1.0 / n,
    "surface_tension": lambda n: 1.0 / n,
    "permittivity": lambda n: 1.0 / n,
}
_TRANSFORMS: dict[str, Callable[[float], float]] = {"permittivity": log, "vapor_pressure": log}


@dataclass(frozen=True, slots=True)
class Member:
    """One member of a series; `carbons` counts those that vary along it."""

    series: str
    carbons: int
    id: str


@dataclass(frozen=True, slots=True)
class Departure:
    """A member off its line; `residual` in the unit of the tolerance."""

    series: str
    quantity: str
    id: str
    residual: float


def read_series(path: Path) -> list[Member]:
    """Read the curated series."""
    with path.open(encoding="utf-8", newline="") as file:
        return [Member(r["series"], int(r["carbons"]), r["id"]) for r in csv.DictReader(file)]


def departures(
    members: list[Member], values: dict[tuple[str, str], float]
) -> tuple[list[Departure], int]:
    """Return the members off their lines, and how many values were compared.

    `values` holds preferred values by (id, quantity), with `molar_volume` in cm^3/mol among them.
    """
    found: list[Departure] = []
    compared = 0
    for series in sorted({m.series for m in members}):
        own = [m for m in members if m.series == series and m.carbons >= FROM_CARBONS]
        for quantity, tolerance in TOLERANCES.items():
            known = [m for m in own if (m.id, quantity) in values]
            if len(known) < _FEWEST:
                continue
            compared += len(known)
            found += _off_the_line(series, quantity, tolerance, known, values)
    return found, compared


def _off_the_line(
    series: str,
    quantity: str,
    tolerance: float,
    known: list[Member],
    values: dict[tuple[str, str], float],
) -> list[Departure]:
    """Leave out the worst member until all others lie within the tolerance."""
    transform = _TRANSFORMS.get(quantity, float)
    abscissa = _ABSCISSA.get(quantity, float)
    x = np.array([abscissa(float(m.carbons)) for m in known])
    y = np.array([transform(values[(m.id, quantity)]) for m in known])
    inside = np.ones(x.size, dtype=bool)
    while True:
        line = np.polyfit(x[inside], y[inside], 2)
        residual = y - np.polyval(line, x)
        worst = int(np.argmax(np.where(inside, np.abs(residual), 0.0)))
        if abs(residual[worst]) <= tolerance or inside.sum() < _FEWEST:
            break
        inside[worst] = False
    return [
        Departure(series, quantity, m.id, float(r))
        for m, r in zip(known, residual, strict=True)
        if abs(r) > tolerance
    ]
