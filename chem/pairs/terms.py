"""All energy terms of pairs of molecules, evaluated over arrays in SI units."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
from numpy.typing import ArrayLike, NDArray

from stillroom.chem.data.constants import AVOGADRO, BOLTZMANN
from stillroom.chem.forces.angle_average import aligned_energy, angle_average, leading_terms
from stillroom.chem.forces.dispersion import dispersion_c6
from stillroom.chem.forces.polar import coupling, induction_c6, orientation_c6

Array = NDArray[np.float64]


@dataclass(frozen=True, slots=True)
class Molecule:
    """What the pair formulas need of one side, as arrays of any broadcastable shape (SI).

    `dipole` C m, `polarizability` C^2 m^2/J, `ionization` J, `electrons` number of valence
    electrons (NaN where unknown).
    """

    dipole: ArrayLike
    polarizability: ArrayLike
    ionization: ArrayLike
    electrons: ArrayLike


@dataclass(frozen=True, slots=True)
class PairTerms:
    """Energies of pairs at given distances: float arrays of one broadcast shape, J/mol unless said.

    `coupling` is x (dimensionless). `orientation` is the exact internal energy and
    `orientation_free` the exact free energy of the angle average; `leading` (-2/3) and
    `leading_free` (-1/3) are the leading terms of both; `aligned` is the head-to-tail energy.
    `induction` and `dispersion` are energies and free energies alike. `c6_*` are the coefficients
    C of -C/r^6 in J m^6 (orientation: leading internal energy).
    """

    distance: Array
    temperature: Array
    coupling: Array
    orientation: Array
    orientation_free: Array
    leading: Array
    leading_free: Array
    aligned: Array
    induction: Array
    dispersion: Array
    c6_orientation: Array
    c6_induction: Array
    c6_dispersion: Array

    @property
    def total(self) -> Array:
        """Internal energy: orientation + induction + dispersion, J/mol."""
        return np.asarray(self.orientation + self.induction + self.dispersion)

    @property
    def total_free(self) -> Array:
        """Free energy: orientation (free) + induction + dispersion, J/mol."""
        return np.asarray(self.orientation_free + self.induction + self.dispersion)

    @property
    def shares(self) -> tuple[Array, Array, Array]:
        """Orientation, induction and dispersion over the total internal energy; sum to 1."""
        total = self.total
        return (self.orientation / total, self.induction / total, self.dispersion / total)

    @property
    def leading_order_error(self) -> Array:
        """Relative error of the leading internal energy against the exact one; 0 without dipoles.

        U_leading/U_exact - 1, always zero or positive: the leading term overstates the attraction.
        """
        ratio = np.divide(
            self.leading, self.orientation, out=np.ones_like(self.leading),
            where=self.orientation < 0,
        )  # fmt: skip
        return np.where(np.isnan(self.leading), np.nan, ratio - 1)

    @property
    def force(self) -> Array:
        """Return -dw/dr of the free energy w(r), in N per molecule pair (negative: attraction).

        The coupling goes as r^-3, so dF/dr = -3 U/r for orientation; the others go as r^-6.
        """
        slope = 3 * self.orientation + 6 * (self.induction + self.dispersion)
        return np.asarray(slope / self.distance / AVOGADRO)


def pair_terms(
    a: Molecule, b: Molecule, distance: ArrayLike, temperature: ArrayLike, model: str = "auto"
) -> PairTerms:
    """Evaluate all terms for molecules `a` and `b` at `distance` (m) and `temperature` (K).

    Shapes broadcast. `model` is one of `stillroom.chem.forces.dispersion.MODELS`. Sources of the
    formulas are given with the functions of `stillroom.chem.forces`.
    """
    r = np.asarray(distance, float)
    rt = AVOGADRO * BOLTZMANN * np.asarray(temperature, float)
    x = coupling(a.dipole, b.dipole, r, temperature)
    free, energy = angle_average(x)
    leading_free, leading = leading_terms(x)
    c6_orientation = orientation_c6(a.dipole, b.dipole, temperature)
    c6_induction = induction_c6(a.dipole, b.dipole, a.polarizability, b.polarizability)
    c6_dispersion = dispersion_c6(
        a.polarizability, b.polarizability, a.ionization, b.ionization, a.electrons, b.electrons,
        model,
    )  # fmt: skip
    per_mole = AVOGADRO / r**6
    return PairTerms(
        distance=r,
        temperature=np.asarray(temperature, float),
        coupling=x,
        orientation=energy * rt,
        orientation_free=free * rt,
        leading=leading * rt,
        leading_free=leading_free * rt,
        aligned=aligned_energy(x) * rt,
        induction=-c6_induction * per_mole,
        dispersion=-c6_dispersion * per_mole,
        c6_orientation=c6_orientation,
        c6_induction=c6_induction,
        c6_dispersion=c6_dispersion,
    )
