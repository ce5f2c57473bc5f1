"""How close two molecules of a liquid come: centre-to-centre contact from molar volume."""

from __future__ import annotations

import numpy as np
from numpy.typing import ArrayLike, NDArray

from stillroom.chem.data.constants import AVOGADRO

Array = NDArray[np.float64]

PACKING_FRACTION = 0.64
"""Share of a liquid's volume inside spheres of the contact diameter: random close packing, 0.6366
(G. D. Scott, D. M. Kilgour, J. Phys. D 2 (1969) 863). It puts benzene at 0.567 nm, carbon
tetrachloride at 0.582 nm and acetonitrile at 0.475 nm, near the first centre-to-centre peaks seen
by diffraction; water's open network (0.28 nm seen, 0.332 nm by this rule) is the exception."""

BOND_PROJECTION = 0.127e-9
"""m, advance per bond along a zigzag chain: 0.154 nm x sin(112 deg / 2), the carbon-carbon bond and
angle of an n-alkane (common practice)."""

END_CAPS = 0.40e-9
"""m, both ends of a chain: two methyl radii of 0.20 nm (L. Pauling, The Nature of the Chemical
Bond, 3rd ed. 1960)."""


def contact_diameter(molar_volume: ArrayLike) -> Array:
    """Return the diameter d of spheres that fill `PACKING_FRACTION` of the liquid, in m.

    d = (6 eta V / (pi N_A))^(1/3) with the molar volume V in m^3/mol (any shape).

    Examples
    --------
    >>> print(f"{contact_diameter(73.94e-6) * 1e9:.3f} nm")  # acetone
    0.532 nm
    """
    volume = np.asarray(molar_volume, float) / AVOGADRO
    return np.asarray(np.cbrt(6 * PACKING_FRACTION * volume / np.pi))


def contact_distance(molar_volume_a: ArrayLike, molar_volume_b: ArrayLike) -> Array:
    """Return the mean of both contact diameters in m (molar volumes in m^3/mol, broadcast)."""
    return (contact_diameter(molar_volume_a) + contact_diameter(molar_volume_b)) / 2


def elongation(longest_path_bonds: ArrayLike, molar_volume: ArrayLike) -> Array:
    """Return a molecule's stretched length over its contact diameter (dimensionless, broadcast).

    Length = bonds on the longest path x `BOND_PROJECTION` + `END_CAPS`. At 1.6 the ends reach
    0.3 of a diameter beyond the sphere, where r^-6 differs by a factor of 5 from its value at the
    centre distance: one centre per molecule is then too coarse. For rings the zigzag overstates
    the length somewhat.
    """
    length = np.asarray(longest_path_bonds, float) * BOND_PROJECTION + END_CAPS
    return length / contact_diameter(molar_volume)
