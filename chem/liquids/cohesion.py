"""Cohesive energy and solubility parameter from the vaporization enthalpy."""

from __future__ import annotations

import numpy as np
from numpy.typing import ArrayLike, NDArray

from stillroom.chem.data.constants import GAS_CONSTANT


def cohesive_energy(
    vaporization_enthalpy: ArrayLike, temperature: ArrayLike
) -> NDArray[np.float64]:
    """Return the molar cohesive energy dHvap - RT in J/mol (internal energy; J/mol and K).

    The vapour is taken as ideal and monomeric; a vapour that dimerises (carboxylic acids) makes the
    true cohesive energy larger. Source: J. H. Hildebrand, R. L. Scott, The Solubility of
    Nonelectrolytes, 3rd ed. 1950.
    """
    return np.asarray(
        np.asarray(vaporization_enthalpy, float) - GAS_CONSTANT * np.asarray(temperature, float)
    )


def solubility_parameter(cohesive: ArrayLike, molar_volume: ArrayLike) -> NDArray[np.float64]:
    """Return the square root of the cohesive energy density in Pa^0.5 (J/mol and m^3/mol).

    Source: Hildebrand and Scott, as above. NaN where the cohesive energy is negative.
    """
    density = np.asarray(cohesive, float) / np.asarray(molar_volume, float)
    return np.asarray(np.sqrt(np.where(density >= 0, density, np.nan)))
