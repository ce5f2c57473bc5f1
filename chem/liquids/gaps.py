"""What a liquid lacks, and what that disables."""

from __future__ import annotations

from stillroom.chem.data.quantities import QUANTITIES
from stillroom.chem.liquids.liquid import Liquid

DISABLES = {
    "dipole": "no orientation or induction, so no pairs",
    "polarizability": "no induction or dispersion, so no pairs",
    "ionization_energy": "dispersion falls back to the model that does not need it",
    "molar_mass": "no molar volume",
    "density": "no molar volume, so pairs need a given distance",
    "melting_point": "frozen or not cannot be told",
    "boiling_point": "boiling or not cannot be told",
    "critical_temperature": "density and vaporization enthalpy follow temperature less surely",
    "vaporization_enthalpy": "no cohesive energy or solubility parameter",
    "permittivity": "no Kirkwood factor, so association goes unnoticed",
    "refractive_index": "no Kirkwood factor, so association goes unnoticed",
    "flash_point": "flammability is not known here",
    "lower_flammability_limit": "which vapour concentration can burn is not known here",
    "exposure_limit": "no limit known here, which does not mean that none is set",
}


def gaps(liquid: Liquid) -> list[tuple[str, str]]:
    """Return (quantity, consequence) for each stored quantity the liquid lacks here."""
    return [
        (name, DISABLES.get(name, ""))
        for name, q in QUANTITIES.items()
        if not q.derived and name not in liquid.values
    ]
