"""Relations between quantities that every liquid should obey; departures are named and explained.

Trouton's constant: vaporization enthalpy over boiling point, at the boiling point, carried there by
Watson's rule with exponent 0.38 (K. M. Watson, Ind. Eng. Chem. 35, 398 (1943)). Kirkwood's factor:
J. G. Kirkwood, J. Chem. Phys. 7, 911 (1939), in the form of H. Froehlich, Theory of Dielectrics
(1949), with the squared refractive index as optical permittivity.
"""

from __future__ import annotations

import csv
from dataclasses import dataclass
from pathlib import Path

from scipy.constants import Avogadro, Boltzmann, epsilon_0

from steps.phase import KELVIN

TROUTON = (75.0, 115.0)
"""J/(mol K); 85 to 90 is usual, more in long chains (common practice)."""
TROUTON_BONDED = (85.0, 130.0)
"""The same for strong donors of hydrogen bonds: 105 to 115 is usual in alcohols, 120 in diols."""
KIRKWOOD = (0.3, 5.0)
SMALLEST_DIPOLE = 0.5
"""Debye; below it the factor is the quotient of two small numbers and says nothing."""
INDEX_ALLOWANCE = 1.04
"""n^2 over permittivity: both come at their own temperatures and frequencies."""
_GULDBERG = 1.5  # critical over boiling temperature, where the critical one is not known
_DEBYE = 3.33564e-30


@dataclass(frozen=True, slots=True)
class Finding:
    """A liquid outside a limit."""

    check: str
    id: str
    value: float


Values = dict[tuple[str, str], float]


def read_explanations(path: Path) -> dict[tuple[str, str], str]:
    """Read why liquids fall outside, by (check, id)."""
    with path.open(encoding="utf-8", newline="") as file:
        return {(r["check"], r["id"]): r["reason"] for r in csv.DictReader(file)}


def findings(ids: list[str], donors: set[str], values: Values) -> list[Finding]:
    """Return every liquid outside the limits of a check; `donors` are the strong ones."""
    found = []
    for name in ids:
        trouton = trouton_constant(name, values)
        low, high = TROUTON_BONDED if name in donors else TROUTON
        if trouton is not None and not low <= trouton <= high:
            found.append(Finding("trouton", name, trouton))
        kirkwood = kirkwood_factor(name, values)
        if kirkwood is not None and not KIRKWOOD[0] <= kirkwood <= KIRKWOOD[1]:
            found.append(Finding("kirkwood", name, kirkwood))
        index, eps = values.get((name, "refractive_index")), values.get((name, "permittivity"))
        if index is not None and eps is not None and index**2 / eps > INDEX_ALLOWANCE:
            found.append(Finding("index", name, index**2 / eps))
    return found


def trouton_constant(name: str, values: Values, temperature: float = 298.15) -> float | None:
    """Return the vaporization entropy at the boiling point in J/(mol K), None if not known."""
    enthalpy = values.get((name, "vaporization_enthalpy"))
    celsius = values.get((name, "boiling_point"))
    if enthalpy is None or celsius is None:
        return None
    boiling = celsius + KELVIN
    critical = values.get((name, "critical_temperature"))
    tc = _GULDBERG * boiling if critical is None else critical + KELVIN
    at_boiling = enthalpy * 1e3 * ((1 - boiling / tc) / (1 - temperature / tc)) ** 0.38
    return float(at_boiling / boiling)


def kirkwood_factor(name: str, values: Values, temperature: float = 298.15) -> float | None:
    """Return the Kirkwood-Froehlich factor, None if not known or the dipole is too small."""
    needed = ("permittivity", "refractive_index", "density", "molar_mass", "dipole")
    numbers = [values.get((name, q)) for q in needed]
    if any(x is None for x in numbers):
        return None
    eps, index, density, mass, dipole = (float(x) for x in numbers if x is not None)
    if dipole < SMALLEST_DIPOLE:
        return None
    optical = index**2
    per_volume = density / mass * 1e3 * Avogadro
    shape = (eps - optical) * (2 * eps + optical) / (eps * (optical + 2) ** 2)
    scale = 9 * epsilon_0 * Boltzmann * temperature / (per_volume * (dipole * _DEBYE) ** 2)
    return float(scale * shape)
