"""Polarizability from the refractive index."""

from __future__ import annotations

import numpy as np
from numpy.typing import ArrayLike, NDArray

from stillroom.chem.data.constants import AVOGADRO, VACUUM_PERMITTIVITY


def lorentz_lorenz_polarizability(
    refractive_index: ArrayLike, molar_volume: ArrayLike
) -> NDArray[np.float64]:
    """Return the mean optical polarizability of a molecule in C^2 m^2/J.

    alpha = 3 eps0 (V/N_A) (n^2 - 1)/(n^2 + 2) with the refractive index n and molar volume V in
    m^3/mol at the same temperature (shapes broadcast). Source: H. A. Lorentz, Ann. Phys. 9 (1880)
    641; L. Lorenz, Ann. Phys. 11 (1880) 70.
    """
    squared = np.square(np.asarray(refractive_index, float))
    volume = np.asarray(molar_volume, float) / AVOGADRO
    return np.asarray(3 * VACUUM_PERMITTIVITY * volume * (squared - 1) / (squared + 2))
