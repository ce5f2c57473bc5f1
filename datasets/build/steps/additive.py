"""Additive mean polarizability, as an independent check of the Lorentz-Lorenz values.

K. J. Miller, J. Am. Chem. Soc. 112, 8533-8542 (1990), doi 10.1021/ja00179a044: atomic hybrid
polarizabilities (ahp), which simply add up; parameters in angstrom^3, recalled from memory. Atoms
outside the scheme give no estimate.
"""

from __future__ import annotations

from rdkit import Chem

AHP = {
    "H": 0.387,
    "CTE": 1.061,
    "CTR": 1.352,
    "CBR": 1.896,
    "CDI": 1.283,
    "F": 0.296,
    "Cl": 2.315,
    "Br": 3.013,
    "I": 5.415,
    "NTE": 0.964,
    "NTR2": 1.030,
    "NPI2": 1.090,
    "NDI": 0.956,
    "OTE": 0.637,
    "OTR4": 0.569,
    "OPI2": 0.274,
    "STE": 3.000,
    "STR4": 3.729,
    "SPI2": 2.700,
}

_SP2 = Chem.HybridizationType.SP2
_SP = Chem.HybridizationType.SP


def additive_polarizability(molecule: Chem.Mol) -> float | None:
    """Return the sum of the atomic hybrid polarizabilities in angstrom^3, None if not covered."""
    total = 0.0
    for atom in molecule.GetAtoms():
        kind = _kind(atom)
        if kind not in AHP:
            return None
        total += AHP[kind] + atom.GetTotalNumHs() * AHP["H"]
    return total


def _kind(atom: Chem.Atom) -> str:
    """Name the hybrid of an atom in Miller's notation; an unknown name if there is none."""
    symbol = str(atom.GetSymbol())
    if symbol == "C":
        return _carbon(atom)
    if symbol == "N":
        return _nitrogen(atom)
    if symbol == "O":
        if any(b.GetBondType() == Chem.BondType.DOUBLE for b in atom.GetBonds()):
            return "OTR4"
        if atom.GetFormalCharge() < 0:
            return "OTR4"
        return "OPI2" if atom.GetIsAromatic() or _beside_pi(atom) else "OTE"
    if symbol == "S":
        if atom.GetTotalDegree() > 2:
            return "STE"
        if any(b.GetBondType() == Chem.BondType.DOUBLE for b in atom.GetBonds()):
            return "STR4"
        return "SPI2" if atom.GetIsAromatic() else "STE"
    return symbol


def _carbon(atom: Chem.Atom) -> str:
    """Hybrid of a carbon: tetrahedral, trigonal, trigonal at a ring fusion, digonal."""
    if atom.GetHybridization() == _SP:
        return "CDI"
    if atom.GetHybridization() == _SP2:
        trigonal = [n for n in atom.GetNeighbors() if n.GetIsAromatic()]
        return "CBR" if atom.GetIsAromatic() and len(trigonal) == 3 else "CTR"
    return "CTE"


def _nitrogen(atom: Chem.Atom) -> str:
    """Hybrid of a nitrogen: amine, pyridine-like, with its pair in a pi system, nitrile."""
    if atom.GetHybridization() == _SP:
        return "NDI"
    if atom.GetIsAromatic():
        return "NTR2" if atom.GetTotalDegree() == 2 else "NPI2"
    if atom.GetHybridization() == _SP2 and atom.GetTotalDegree() == 2:
        return "NTR2"
    return "NPI2" if atom.GetFormalCharge() > 0 or _beside_pi(atom) else "NTE"


def _beside_pi(atom: Chem.Atom) -> bool:
    """Whether a neighbour has a double or aromatic bond that the lone pair can join."""
    return any(
        bond.GetBondType() in (Chem.BondType.DOUBLE, Chem.BondType.AROMATIC)
        and neighbour.GetSymbol() in ("C", "N")
        for neighbour in atom.GetNeighbors()
        for bond in neighbour.GetBonds()
    )
