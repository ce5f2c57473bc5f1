"""Physical constants (CODATA 2022; SI exact where marked), written out so that no import is needed.

A test compares each with `scipy.constants`.
"""

from __future__ import annotations

import math

AVOGADRO = 6.02214076e23  # 1/mol, exact (SI 2019)
BOLTZMANN = 1.380649e-23  # J/K, exact (SI 2019)
GAS_CONSTANT = AVOGADRO * BOLTZMANN  # J/(mol K), exact
ELEMENTARY_CHARGE = 1.602176634e-19  # C, exact (SI 2019)
SPEED_OF_LIGHT = 299792458.0  # m/s, exact
PLANCK = 6.62607015e-34  # J s, exact (SI 2019)
HBAR = PLANCK / (2 * math.pi)  # J s
ELECTRON_MASS = 9.1093837139e-31  # kg, CODATA 2022
VACUUM_PERMITTIVITY = 8.8541878188e-12  # F/m, CODATA 2022
COULOMB = 4 * math.pi * VACUUM_PERMITTIVITY  # 4 pi eps0, C^2/(J m)
BOHR = 5.29177210544e-11  # m, CODATA 2022
HARTREE = 4.3597447222060e-18  # J, CODATA 2022
DEBYE = 1e-21 / SPEED_OF_LIGHT  # C m; 1 D = 1e-18 esu cm by definition
ZERO_CELSIUS = 273.15  # K, exact
REFERENCE_TEMPERATURE = 298.15  # K, the default temperature of the whole program
C6_ATOMIC_UNIT = HARTREE * BOHR**6  # J m^6
