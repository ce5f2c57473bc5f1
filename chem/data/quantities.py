"""The quantities the program knows: name, unit at the edges, column name, SI factor, bounds.

One row here is all a new quantity needs to be listed, filtered, shown and exported. Inside the
program numbers are SI; `to_si` and `from_si` are plain arithmetic so that tables convert at once
(a test checks every factor against Pint).
"""

from __future__ import annotations

from collections.abc import Iterable
from dataclasses import dataclass
from typing import TypeVar

import numpy as np
from numpy.typing import NDArray

from stillroom.chem.data.constants import (
    AVOGADRO,
    COULOMB,
    DEBYE,
    ELEMENTARY_CHARGE,
    ZERO_CELSIUS,
)
from stillroom.chem.data.errors import UnknownQuantity

Number = TypeVar("Number", float, NDArray[np.float64])


@dataclass(frozen=True, slots=True)
class Quantity:
    """One physical quantity and how it is written outside the program.

    `number * factor + offset` in `unit` is the SI value. `low` and `high` bound what is believable
    (in `unit`). `also` lists further units a user may type, each with its factor to SI.
    """

    name: str
    label: str
    heading: str
    unit: str
    suffix: str
    factor: float
    low: float
    high: float
    decimals: int
    offset: float = 0.0
    also: tuple[tuple[str, float], ...] = ()
    derived: bool = False

    @property
    def column(self) -> str:
        """The unit-bearing column name, such as `dipole_D`."""
        return f"{self.name}_{self.suffix}" if self.suffix else self.name

    @property
    def unit_label(self) -> str:
        """The unit as it is printed beside a number; empty for pure numbers."""
        return (
            self.suffix.replace("_", " ") if self.suffix not in _PRINTED else _PRINTED[self.suffix]
        )

    def to_si(self, number: Number) -> Number:
        """Convert from `unit` to SI (float or array of any shape)."""
        return number * self.factor + self.offset

    def from_si(self, si: Number) -> Number:
        """Convert from SI to `unit` (float or array of any shape)."""
        return (si - self.offset) / self.factor


_PRINTED = {
    "": "",
    "A3": "Å³",
    "1e-79_J_m6": "1e-79 J m⁶",
    "g_mol": "g/mol",
    "kg_m3": "kg/m³",
    "cm3_mol": "cm³/mol",
    "degC": "°C",
    "kJ_mol": "kJ/mol",
    "mPa_s": "mPa s",
    "mN_m": "mN/m",
    "percent": "%",
    "MPa0.5": "MPa½",
}

_A3 = COULOMB * 1e-30  # a polarizability volume of 1 angstrom^3 in C^2 m^2/J
_EV = ELEMENTARY_CHARGE
_PER_MOLE = 1e3 / AVOGADRO  # 1 kJ/mol as J per molecule

_ALL = (
    Quantity(
        "dipole", "dipole moment (gas)", "dipole", "debye", "D", DEBYE, 0.0, 15.0, 2,
        also=(("coulomb*meter", 1.0),),
    ),
    Quantity(
        "polarizability", "polarizability volume (mean)", "alpha", "angstrom**3", "A3", _A3,
        0.1, 200.0, 2, also=(("coulomb**2*meter**2/joule", 1.0),),
    ),
    Quantity(
        "ionization_energy", "ionization energy", "IE", "eV", "eV", _EV, 3.0, 30.0, 2,
        also=(("kJ/mol", _PER_MOLE),),
    ),
    Quantity(
        "c6", "dispersion C6 of the like pair", "C6", "1e-79*joule*meter**6", "1e-79_J_m6", 1e-79,
        0.1, 1e5, 1, also=(("joule*meter**6", 1.0),), derived=True,
    ),
    Quantity(
        "valence_electrons", "valence electrons", "Nval", "", "", 1.0, 1.0, 2000.0, 0, derived=True,
    ),
    Quantity("molar_mass", "molar mass", "M", "g/mol", "g_mol", 1e-3, 1.0, 2000.0, 2),
    Quantity("density", "density", "density", "kg/m**3", "kg_m3", 1.0, 300.0, 5000.0, 1),
    Quantity(
        "molar_volume", "molar volume", "V", "cm**3/mol", "cm3_mol", 1e-6, 10.0, 2000.0, 2,
        derived=True,
    ),
    Quantity(
        "melting_point", "melting point", "melts", "degC", "degC", 1.0, -200.0, 300.0, 1,
        offset=ZERO_CELSIUS,
    ),
    Quantity(
        "boiling_point", "boiling point (1 atm)", "boils", "degC", "degC", 1.0, -50.0, 600.0, 1,
        offset=ZERO_CELSIUS,
    ),
    Quantity(
        "critical_temperature", "critical temperature", "Tc", "degC", "degC", 1.0, 0.0, 900.0, 1,
        offset=ZERO_CELSIUS,
    ),
    Quantity(
        "vaporization_enthalpy", "vaporization enthalpy", "dHvap", "kJ/mol", "kJ_mol", 1e3,
        5.0, 250.0, 2,
    ),
    Quantity("vapor_pressure", "vapour pressure", "pvap", "kPa", "kPa", 1e3, 1e-9, 2000.0, 3),
    Quantity("permittivity", "relative permittivity", "eps", "", "", 1.0, 1.0, 250.0, 2),
    Quantity("refractive_index", "refractive index (sodium D)", "nD", "", "", 1.0, 1.2, 2.0, 4),
    Quantity("viscosity", "viscosity", "visc", "mPa*s", "mPa_s", 1e-3, 0.05, 1e5, 3),
    Quantity("surface_tension", "surface tension", "surf", "mN/m", "mN_m", 1e-3, 5.0, 100.0, 1),
    Quantity(
        "flash_point", "flash point", "flash", "degC", "degC", 1.0, -100.0, 350.0, 0,
        offset=ZERO_CELSIUS,
    ),
    Quantity(
        "autoignition_temperature", "autoignition temperature", "autoign", "degC", "degC", 1.0,
        0.0, 800.0, 0, offset=ZERO_CELSIUS,
    ),
    Quantity(
        "lower_flammability_limit", "lower flammability limit in air", "LFL", "percent", "percent",
        0.01, 0.1, 50.0, 2,
    ),
    Quantity(
        "upper_flammability_limit", "upper flammability limit in air", "UFL", "percent", "percent",
        0.01, 1.0, 100.0, 1,
    ),
    Quantity(
        "exposure_limit", "exposure limit (8 h average, vapour)", "TWA", "ppm", "ppm", 1e-6,
        1e-5, 5000.0, 3,
    ),
    Quantity("log_p", "octanol-water partition, log P", "logP", "", "", 1.0, -5.0, 20.0, 2),
    Quantity(
        "water_solubility", "solubility in water (by mass)", "w(aq)", "percent", "percent",
        0.01, 0.0, 100.0, 3,
    ),
    Quantity(
        "cohesive_energy", "cohesive energy", "Ecoh", "kJ/mol", "kJ_mol", 1e3, 1.0, 250.0, 2,
        derived=True,
    ),
    Quantity(
        "solubility_parameter", "solubility parameter", "delta", "MPa**0.5", "MPa0.5", 1e3,
        5.0, 60.0, 2, derived=True,
    ),
    Quantity(
        "kirkwood_factor", "Kirkwood correlation factor", "gK", "", "", 1.0, 0.05, 20.0, 2,
        derived=True,
    ),
    Quantity("hbond_acidity", "hydrogen-bond acidity", "acid", "", "", 1.0, 0.0, 2.0, 2),
    Quantity("hbond_basicity", "hydrogen-bond basicity", "base", "", "", 1.0, 0.0, 2.0, 2),
)  # fmt: skip

QUANTITIES: dict[str, Quantity] = {q.name: q for q in _ALL}
BY_COLUMN: dict[str, Quantity] = {q.column: q for q in _ALL}


def quantity(name: str, where: str = "") -> Quantity:
    """Return the quantity called `name` (plain name or unit-bearing column name).

    Raises
    ------
    UnknownQuantity
        If there is none; near names are suggested.
    """
    key = name.strip()
    found = QUANTITIES.get(key) or BY_COLUMN.get(key)
    if found is None:
        raise UnknownQuantity(key, near(key, QUANTITIES), where)
    return found


def near(name: str, known: Iterable[str], count: int = 3) -> list[str]:
    """Return up to `count` of the `known` names that look like `name`."""
    from difflib import get_close_matches

    return get_close_matches(name.lower(), list(known), n=count, cutoff=0.6)
