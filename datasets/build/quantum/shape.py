"""Length, surface area and volume of a molecule made of van der Waals spheres."""

from __future__ import annotations

import numpy as np
from numpy.typing import NDArray

Array = NDArray[np.float64]

# Radii in angstrom by atomic number. Bondi 1964, 10.1021/j100785a001; B and Ge, missing there, from
# Mantina et al. 2009, 10.1021/jp8111556, Table 12; Ti, in neither, from Alvarez 2013,
# 10.1039/c3dt50599e.
RADII_A = {
    1: 1.20,
    5: 1.92,
    6: 1.70,
    7: 1.55,
    8: 1.52,
    9: 1.47,
    14: 2.10,
    15: 1.80,
    16: 1.80,
    17: 1.75,
    22: 2.46,
    32: 2.11,
    33: 1.85,
    35: 1.85,
    50: 2.17,
    53: 1.98,
}


def length(numbers: NDArray[np.int64], positions_A: Array) -> float:
    """Largest extent in angstrom: atom distance plus both radii, over all pairs of atoms."""
    radii = np.array([RADII_A[int(z)] for z in numbers])
    distance = np.linalg.norm(positions_A[:, None] - positions_A[None], axis=-1)
    return float((distance + radii[:, None] + radii[None]).max())


def surface(numbers: NDArray[np.int64], positions_A: Array, points: int = 1000) -> Array:
    """Area (angstrom^2) and volume (angstrom^3) of the union of the spheres.

    Points spread evenly over each sphere (Shrake and Rupley 1973, 10.1016/0022-2836(73)90011-9),
    those inside another sphere dropped; the volume is one third of the sum of r . n dA over the
    points left, by the divergence theorem.
    """
    radii = np.array([RADII_A[int(z)] for z in numbers])
    normal = _directions(points)
    area = volume = 0.0
    for i, centre in enumerate(positions_A):
        dots = centre + radii[i] * normal
        inside = np.linalg.norm(dots[:, None] - positions_A[None], axis=-1) < radii - 1e-9
        inside[:, i] = False
        free = ~inside.any(axis=1)
        element = 4 * np.pi * radii[i] ** 2 / points
        area += element * free.sum()
        volume += element * np.einsum("ij,ij->", dots[free], normal[free]) / 3
    return np.array([area, volume])


def _directions(count: int) -> Array:
    """Unit vectors on a golden spiral."""
    index = np.arange(count) + 0.5
    z = 1 - 2 * index / count
    angle = np.pi * (1 + 5**0.5) * index
    ring = np.sqrt(1 - z * z)
    return np.stack([ring * np.cos(angle), ring * np.sin(angle), z], axis=1)
