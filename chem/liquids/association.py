"""Evidence that the molecules of a liquid are not freely rotating neighbours."""

from __future__ import annotations

import numpy as np
from numpy.typing import ArrayLike, NDArray

from stillroom.chem.data.constants import AVOGADRO, BOLTZMANN, DEBYE, VACUUM_PERMITTIVITY

SMALLEST_DIPOLE = 0.3 * DEBYE
"""C m: below it the factor divides two small numbers and says nothing (n-hexane would get -2)."""


def kirkwood_factor(
    permittivity: ArrayLike,
    refractive_index: ArrayLike,
    molar_volume: ArrayLike,
    dipole: ArrayLike,
    temperature: ArrayLike,
) -> NDArray[np.float64]:
    """Return Kirkwood's correlation factor g (dimensionless, shapes broadcast).

    g = 9 eps0 kT V (eps - n^2)(2 eps + n^2) / (N_A mu^2 eps (n^2 + 2)^2) with the gas-phase dipole
    moment mu (C m) and molar volume V (m^3/mol). 1 means no preferred orientation of neighbours,
    above 1 parallel (chains of hydrogen bonds), below 1 antiparallel. NaN below `SMALLEST_DIPOLE`.
    Source: J. G. Kirkwood, J. Chem. Phys. 7 (1939) 911; H. Froehlich, Theory of
    Dielectrics, 2nd ed. 1958; n^2 stands for the high-frequency permittivity.
    """
    eps, n2 = np.asarray(permittivity, float), np.square(np.asarray(refractive_index, float))
    moment = np.square(np.asarray(dipole, float))
    volume = np.asarray(molar_volume, float) / AVOGADRO
    kt = BOLTZMANN * np.asarray(temperature, float)
    top = 9 * VACUUM_PERMITTIVITY * kt * volume * (eps - n2) * (2 * eps + n2)
    bottom = moment * eps * (n2 + 2) ** 2
    enough = np.asarray(dipole, float) >= SMALLEST_DIPOLE
    nothing = np.full_like(top * bottom, np.nan)
    return np.asarray(np.divide(top, bottom, out=nothing, where=enough))
