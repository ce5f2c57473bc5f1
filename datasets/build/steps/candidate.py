"""One value of one quantity from one source, before and after the choice of the preferred one."""

from __future__ import annotations

from dataclasses import dataclass, replace

UNITS = {
    "dipole": "debye",
    "polarizability": "angstrom**3",
    "ionization_energy": "eV",
    "molar_mass": "g/mol",
    "density": "kg/m**3",
    "melting_point": "degC",
    "boiling_point": "degC",
    "critical_temperature": "degC",
    "vaporization_enthalpy": "kJ/mol",
    "vapor_pressure": "kPa",
    "permittivity": "1",
    "refractive_index": "1",
    "viscosity": "mPa*s",
    "surface_tension": "mN/m",
    "flash_point": "degC",
    "autoignition_temperature": "degC",
    "lower_flammability_limit": "percent",
    "upper_flammability_limit": "percent",
    "exposure_limit": "ppm",
    "log_p": "1",
    "water_solubility": "percent",
}
"""Quantities in the order of the wide table, with the unit each is stored in."""

SIGNIFICANT = {
    "dipole": 3,
    "polarizability": 4,
    "ionization_energy": 4,
    "molar_mass": 6,
    "density": 5,
    "vaporization_enthalpy": 4,
    "vapor_pressure": 4,
    "permittivity": 4,
    "refractive_index": 5,
    "viscosity": 4,
    "surface_tension": 4,
    "lower_flammability_limit": 3,
    "upper_flammability_limit": 3,
    "exposure_limit": 3,
    "water_solubility": 3,
}
"""Significant digits written; temperatures in degC and log P have two decimals instead."""


@dataclass(frozen=True, slots=True)
class Candidate:
    """A value in the unit of its quantity; `temperature` in K, None where it has no meaning."""

    id: str
    quantity: str
    value: float
    temperature: float | None
    kind: str
    source: str
    uncertainty: float
    note: str = ""
    rejected: bool = False
    preferred: bool = False
    chosen_by_hand: bool = False

    def change(self, **fields: object) -> Candidate:
        """Return a copy with some fields changed."""
        return replace(self, **fields)  # type: ignore[arg-type]

    def cells(self) -> list[str]:
        """Return the row of `values.csv`."""
        return [
            self.id,
            self.quantity,
            written(self.quantity, self.value),
            UNITS[self.quantity],
            "" if self.temperature is None else f"{self.temperature:.2f}",
            self.kind,
            self.source,
            f"{self.uncertainty:.2g}",
            "1" if self.preferred else "0",
            self.note,
        ]


def written(quantity: str, value: float) -> str:
    """Write a value of a quantity with as many digits as the table keeps."""
    digits = SIGNIFICANT.get(quantity)
    text = f"{value:.2f}" if digits is None else f"{value:.{digits}g}"
    if "e" in text and abs(value) > 1e-4:
        text = f"{float(text):f}".rstrip("0").rstrip(".")
    if "." in text and "e" not in text:
        text = text.rstrip("0").rstrip(".")
    return "0" if text == "-0" else text
