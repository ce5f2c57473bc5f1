"""Coupling of two permanent dipoles, and induction, between two molecules."""

from __future__ import annotations

import numpy as np
from numpy.typing import ArrayLike, NDArray

from stillroom.chem.data.constants import BOLTZMANN, COULOMB

Array = NDArray[np.float64]


def coupling(
    dipole_a: ArrayLike, dipole_b: ArrayLike, distance: ArrayLike, temperature: ArrayLike
) -> Array:
    """Return x = mu_a mu_b / (4 pi eps0 r^3 kT), the dipole-dipole energy in units of kT.

    Parameters
    ----------
    dipole_a, dipole_b : array_like
        Dipole moments in C m; shapes broadcast.
    distance : array_like
        Centre-to-centre distance in m.
    temperature : array_like
        Temperature in K.

    Returns
    -------
    float array of the broadcast shape, dimensionless
        See `stillroom.chem.forces.angle_average` for its use. Source: W. H. Keesom, Phys. Z. 22
        (1921) 129.
    """
    product = np.asarray(dipole_a, float) * np.asarray(dipole_b, float)
    cube = np.asarray(distance, float) ** 3
    return np.asarray(product / (COULOMB * cube * BOLTZMANN * np.asarray(temperature, float)))


def orientation_c6(dipole_a: ArrayLike, dipole_b: ArrayLike, temperature: ArrayLike) -> Array:
    """Return the leading internal-energy coefficient C of U = -C/r^6, in J m^6.

    C = 2 mu_a^2 mu_b^2 / (3 (4 pi eps0)^2 kT); the free-energy coefficient is half of it (1/3
    instead of 2/3). Arguments in C m, C m and K; shapes broadcast. Source: Keesom (1921).
    """
    product = np.square(np.asarray(dipole_a, float) * np.asarray(dipole_b, float) / COULOMB)
    return np.asarray(2 * product / (3 * BOLTZMANN * np.asarray(temperature, float)))


def induction_c6(
    dipole_a: ArrayLike,
    dipole_b: ArrayLike,
    polarizability_a: ArrayLike,
    polarizability_b: ArrayLike,
) -> Array:
    """Return C of the induction energy U = -C/r^6 of both directions, in J m^6.

    C = (mu_a^2 alpha_b + mu_b^2 alpha_a) / (4 pi eps0)^2 with dipole moments in C m and mean
    polarizabilities in C^2 m^2/J; shapes broadcast. It does not depend on temperature, so energy
    and free energy agree. Source: P. Debye, Phys. Z. 21 (1920) 178.
    """
    a = np.square(np.asarray(dipole_a, float)) * np.asarray(polarizability_b, float)
    b = np.square(np.asarray(dipole_b, float)) * np.asarray(polarizability_a, float)
    return np.asarray((a + b) / COULOMB**2)
