"""Polar groups: patterns and group moments from `curated/group_moments.csv`, and halogens.

Halogens on one carbon act as one group (a CCl3 is not three dipoles). A perhalogenated carbon whose
neighbours are perhalogenated too carries no moment: its bond moments cancel where they sit.
"""

from __future__ import annotations

import csv
from dataclasses import dataclass
from pathlib import Path

from rdkit import Chem

_HALOGENS = {9, 17, 35, 53}

# Moments in debye of one to four geminal halogens, after CH3X, CH2X2, CHX3 and CX4 or 1,1-di- and
# 1,1,1-trihaloethanes; aryl and vinyl halides after halobenzenes and haloethenes. From memory.
_ALKYL = {9: (1.90, 2.20, 2.32), 17: (2.05, 2.06, 1.78), 35: (2.05, 2.05, 1.50), 53: (1.90, 1.6, 1)}
_ARYL = {9: 1.60, 17: 1.69, 35: 1.70, 53: 1.70}
_VINYL = {9: (1.43, 1.38), 17: (1.45, 1.34), 35: (1.42, 1.30), 53: (1.30, 1.20)}


@dataclass(frozen=True, slots=True)
class Pattern:
    """One kind of polar group; `axial` if its moment lies along the bond that holds it."""

    name: str
    query: Chem.Mol
    moment: float
    axial: bool


@dataclass(frozen=True, slots=True)
class Found:
    """One polar group found in a molecule: its atoms, the hetero atoms among
    them (`core`), its moment in debye, and whether that lies along the bond that holds it."""

    name: str
    atoms: frozenset[int]
    core: frozenset[int]
    moment: float
    axial: bool


def read_groups(path: Path) -> list[Pattern]:
    """Read the patterns in order of priority."""
    with path.open(encoding="utf-8", newline="") as file:
        rows = list(csv.DictReader(file))
    return [
        Pattern(
            r["group"], Chem.MolFromSmarts(r["smarts"]), float(r["moment_D"]), r["axial"] == "yes"
        )
        for r in rows
    ]


def find_groups(molecule: Chem.Mol, patterns: list[Pattern]) -> list[Found]:
    """Return the polar groups of a molecule; each hetero atom belongs to one group at most."""
    taken: set[int] = set()
    found: list[Found] = []
    for pattern in patterns:
        for match in molecule.GetSubstructMatches(pattern.query):
            hetero = {
                i for i in match if molecule.GetAtomWithIdx(i).GetAtomicNum() not in (1, 6, 14)
            }
            core = hetero or set(match)
            if core & taken:
                continue
            taken |= core
            found.append(
                Found(
                    pattern.name, frozenset(match), frozenset(core), pattern.moment, pattern.axial
                )
            )
    return found + _halogen_groups(molecule, taken)


def _halogen_groups(molecule: Chem.Mol, taken: set[int]) -> list[Found]:
    """Group the halogens by the carbon that carries them."""
    found = []
    for atom in molecule.GetAtoms():
        bound = [
            n.GetIdx()
            for n in atom.GetNeighbors()
            if n.GetAtomicNum() in _HALOGENS and n.GetIdx() not in taken
        ]
        if atom.GetAtomicNum() != 6 or not bound:
            continue
        moment = _halogen_moment(atom, [molecule.GetAtomWithIdx(i).GetAtomicNum() for i in bound])
        if moment:
            axial = atom.GetIsAromatic() or len(bound) == 3
            found.append(
                Found(
                    "halogen", frozenset([atom.GetIdx(), *bound]), frozenset(bound), moment, axial
                )
            )
    return found


def _halogen_moment(atom: Chem.Atom, halogens: list[int]) -> float:
    """Moment in debye of the halogens on one carbon."""
    count, lead = len(halogens), halogens[0]
    if atom.GetIsAromatic():
        return _ARYL[lead]
    if atom.GetHybridization() == Chem.HybridizationType.SP2:
        return _VINYL[lead][min(count, 2) - 1]
    if atom.GetHybridization() == Chem.HybridizationType.SP:
        return 0.5
    if count == 4:
        return 0.0 if len(set(halogens)) == 1 else 0.5
    if _perhalogenated(atom) and all(
        _perhalogenated(n) for n in atom.GetNeighbors() if n.GetAtomicNum() not in _HALOGENS
    ):
        return 0.0
    if count == 3 and atom.GetTotalNumHs() == 1:
        return 1.05 if lead != 9 else 1.65
    if count == 2 and atom.GetTotalNumHs() == 2:
        return 1.60
    return _ALKYL[lead][count - 1]


def _perhalogenated(atom: Chem.Atom) -> bool:
    """Whether an atom has no hydrogen and only carbon, nitrogen or halogen neighbours."""
    bears_halogen = any(n.GetAtomicNum() in _HALOGENS for n in atom.GetNeighbors())
    return (atom.GetTotalNumHs() == 0 and bears_halogen) or atom.GetAtomicNum() == 7
