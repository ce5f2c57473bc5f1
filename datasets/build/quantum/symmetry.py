"""How many equal copies of a conformer a molecule has.

A labelled conformer with rotational symmetry number s counts 1/s, twice that when its mirror image
is another conformer of the same molecule: gauche 1,2-dichloroethane counts twice as much as anti.
"""

from __future__ import annotations

import importlib
from typing import Any

import numpy as np
from numpy.typing import NDArray

Chem: Any = importlib.import_module("rdkit.Chem")

# Copies closer than this (angstrom, root mean square) are the same; torsional minima of one
# molecule lie further apart.
_SAME_A = 0.15
_MATCHES = 2000


def frame(molecule: Any) -> tuple[list[int], list[tuple[int, ...]]]:
    """Atoms that define a conformer (heavy ones and hydrogen not on carbon) and their symmetry.

    Atoms count as equal by element and number of hydrogens, whatever the bond orders drawn.
    """
    atoms = [a.GetIdx() for a in molecule.GetAtoms() if _defines(a)]
    place = {atom: k for k, atom in enumerate(atoms)}
    bare = Chem.RWMol()
    for index in atoms:
        atom = molecule.GetAtomWithIdx(index)
        copy = Chem.Atom(atom.GetAtomicNum())
        hydrogens = sum(n.GetAtomicNum() == 1 for n in atom.GetNeighbors())
        copy.SetIsotope(1 + hydrogens)
        copy.SetNoImplicit(True)
        bare.AddAtom(copy)
    for bond in molecule.GetBonds():
        ends = bond.GetBeginAtomIdx(), bond.GetEndAtomIdx()
        if all(end in place for end in ends):
            bare.AddBond(place[ends[0]], place[ends[1]], Chem.BondType.SINGLE)
    bare.UpdatePropertyCache(strict=False)
    Chem.FastFindRings(bare)
    matches = bare.GetSubstructMatches(bare, uniquify=False, maxMatches=_MATCHES)
    return atoms, list(matches)


def degeneracy(
    positions_A: NDArray[np.float64], matches: list[tuple[int, ...]], resolved: bool
) -> float:
    """Return 1/s for an achiral or resolved molecule, 2/s for a chiral conformer."""
    here = positions_A - positions_A.mean(axis=0)
    turns, mirrors = 0, 0
    for match in matches:
        proper, improper = _distances(here, here[list(match)])
        turns += proper < _SAME_A
        mirrors += improper < _SAME_A
    return (1.0 if mirrors or resolved else 2.0) / max(turns, 1)


def _defines(atom: Any) -> bool:
    if atom.GetAtomicNum() != 1:
        return True
    neighbours = atom.GetNeighbors()
    return not neighbours or neighbours[0].GetAtomicNum() != 6


def _distances(a: NDArray[np.float64], b: NDArray[np.float64]) -> tuple[float, float]:
    """Root mean square distance after the best rotation, and after the best reflection."""
    singular = np.linalg.svd(a.T @ b, compute_uv=False)
    sign = np.sign(np.linalg.det(a.T @ b)) or 1.0
    # A planar or linear set has a zero singular value: rotation and reflection then coincide.
    total = (a * a).sum() + (b * b).sum()
    straight = singular[0] + singular[1]
    found = [total - 2 * (straight + sign * turn * singular[2]) for turn in (1, -1)]
    return tuple(float(np.sqrt(max(f, 0.0) / len(a))) for f in found)  # type: ignore[return-value]
