"""Conversion factors out of atomic units, from the CODATA values in SciPy."""

from __future__ import annotations

from scipy.constants import Avogadro, R, angstrom, e, physical_constants, speed_of_light

_HARTREE = physical_constants["Hartree energy"][0]
_BOHR = physical_constants["Bohr radius"][0]

BOHR_A = _BOHR / angstrom
HARTREE_KJ_MOL = _HARTREE * Avogadro / 1e3
HARTREE_EV = _HARTREE / e
# The debye is 1e-21 / c coulomb metre.
DIPOLE_D = e * _BOHR * speed_of_light / 1e-21
POLARIZABILITY_A3 = BOHR_A**3
# In 1e-79 J m^6, the unit of the shelf.
C6_SHELF = _HARTREE * _BOHR**6 / 1e-79
RT_KJ_MOL = R * 298.15 / 1e3
