"""The wide table: one row a liquid, one unit-bearing column a quantity, preferred values only."""

from __future__ import annotations

from steps.candidate import Candidate, written
from steps.liquid import Liquid

COLUMNS = {
    "dipole": "dipole_D",
    "polarizability": "polarizability_A3",
    "ionization_energy": "ionization_energy_eV",
    "molar_mass": "molar_mass_g_mol",
    "density": "density_kg_m3",
    "melting_point": "melting_point_degC",
    "boiling_point": "boiling_point_degC",
    "critical_temperature": "critical_temperature_degC",
    "vaporization_enthalpy": "vaporization_enthalpy_kJ_mol",
    "vapor_pressure": "vapor_pressure_kPa",
    "permittivity": "permittivity",
    "refractive_index": "refractive_index",
    "viscosity": "viscosity_mPa_s",
    "surface_tension": "surface_tension_mN_m",
    "flash_point": "flash_point_degC",
    "autoignition_temperature": "autoignition_temperature_degC",
    "lower_flammability_limit": "lower_flammability_limit_percent",
    "upper_flammability_limit": "upper_flammability_limit_percent",
    "exposure_limit": "exposure_limit_ppm",
    "log_p": "log_p",
    "water_solubility": "water_solubility_percent",
}
IDENTITY = ("name", "cas", "smiles", "formula", "family")


def shelf_row(liquid: Liquid, smiles: str, values: list[Candidate]) -> list[str]:
    """Return the wide row of a liquid."""
    preferred = {v.quantity: written(v.quantity, v.value) for v in values if v.preferred}
    return [
        liquid.name,
        liquid.cas,
        smiles,
        liquid.formula,
        liquid.family,
        *(preferred.get(quantity, "") for quantity in COLUMNS),
    ]
