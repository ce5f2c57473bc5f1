"""What the molecule's structure says about it, as the program needs it at run time."""

from __future__ import annotations

import re
from dataclasses import dataclass

_GROUP = re.compile(r"([A-Z][a-z]?)([0-9]*)")

VALENCE_ELECTRONS = {
    "H": 1, "D": 1, "B": 3, "Al": 3, "Ti": 4,
    "C": 4, "Si": 4, "Ge": 4, "Sn": 4, "N": 5, "P": 5, "As": 5,
    "O": 6, "S": 6, "Se": 6, "F": 7, "Cl": 7, "Br": 7, "I": 7,
}  # fmt: skip
"""Electrons outside the noble-gas core, for Ge to I outside the filled d shell too."""


@dataclass(frozen=True, slots=True)
class Structure:
    """Facts read off the structural formula; None where the structure is not known.

    `hbond_donor` and `hbond_acceptor` are none, weak or strong; `vapour_dimer` is true for
    carboxylic acids; `polar_groups` counts polar groups and `group_dipole_rss` (C m) is the root
    sum of squares of their moments; `flexible_polar_bonds` counts rotations that change the
    dipole; `longest_path_bonds` is the number of bonds along the longest path of heavy atoms.
    """

    hbond_donor: str | None = None
    hbond_acceptor: str | None = None
    vapour_dimer: bool | None = None
    polar_groups: int | None = None
    group_dipole_rss: float | None = None
    flexible_polar_bonds: int | None = None
    longest_path_bonds: int | None = None


def valence_electrons(formula: str) -> float:
    """Return the number of valence electrons of a Hill formula, NaN if an element is unknown.

    Examples
    --------
    >>> valence_electrons("C2H6O")
    20.0
    """
    if not formula or not re.fullmatch(r"(?:[A-Z][a-z]?[0-9]*)+", formula):
        return float("nan")
    total = 0
    for element, count in _GROUP.findall(formula):
        if element not in VALENCE_ELECTRONS:
            return float("nan")
        total += VALENCE_ELECTRONS[element] * int(count or 1)
    return float(total)
