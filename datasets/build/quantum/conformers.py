"""Low-energy conformers of a liquid: ETKDG, MMFF, GFN2-xTB, Boltzmann weights at 298.15 K.

ETKDG version 3 (Riniker and Landrum 2015, 10.1021/acs.jcim.5b00654) without pruning, which would
drop hydroxyl rotamers; MMFF94 (Halgren 1996, 10.1002/(SICI)1096-987X(199604)17:5/6<490::AID-
JCC1>3.0.CO;2-P); GFN2-xTB (Bannwarth, Ehlert and Grimme 2019, 10.1021/acs.jctc.8b01176).
"""

from __future__ import annotations

import importlib
from dataclasses import dataclass
from typing import Any

import numpy as np
from numpy.typing import NDArray
from scipy.optimize import minimize
from scipy.spatial.distance import pdist
from symmetry import degeneracy, frame
from units import BOHR_A, DIPOLE_D, HARTREE_KJ_MOL, RT_KJ_MOL

Chem: Any = importlib.import_module("rdkit.Chem")
AllChem: Any = importlib.import_module("rdkit.Chem.AllChem")
transforms: Any = importlib.import_module("rdkit.Chem.rdMolTransforms")
tblite: Any = importlib.import_module("tblite.interface")

SEED = 20261
# kJ/mol: force-field energies are rough, so the first window is wide.
_FORCE_FIELD_WINDOW = 25.0
_FLIPPED = 10
_TURNABLE = (
    "O=C-[OX2]-[H]",
    "O=C-[NX3;H1;!R]-[#6]",
    "O=C-[OX2;!R]-[$(C=O)]",
    "O=[$(C([OX2])[OX2])]-[OX2;!R]-[#6]",
    "O=[CX3;H1]-[OX2;!R]-[#6]",
)
_FORCE_HARTREE_BOHR = 5e-4


@dataclass(frozen=True, slots=True)
class Conformer:
    """Positions in angstrom, energy in kJ/mol, dipole in debye, number of copies, weight."""

    positions: NDArray[np.float64]
    energy: float
    dipole: float
    copies: float
    weight: float = 0.0


def weights(energies_kJ_mol: NDArray[np.float64], copies: NDArray[np.float64]) -> Any:
    """Boltzmann weights at 298.15 K, adding up to one."""
    factor = copies * np.exp(-(energies_kJ_mol - energies_kJ_mol.min()) / RT_KJ_MOL)
    return factor / factor.sum()


def conformers(smiles: str) -> tuple[NDArray[np.int64], list[Conformer]]:
    """Atomic numbers and the distinct GFN2-xTB minima, lowest first, weights set."""
    plain = Chem.MolFromSmiles(smiles)
    molecule = Chem.AddHs(plain)
    numbers = np.array([a.GetAtomicNum() for a in molecule.GetAtoms()])
    atoms, matches = frame(molecule)
    centres = Chem.FindMolChiralCenters(plain, includeUnassigned=False, useLegacyImplementation=0)
    starts = _starts(molecule, plain)
    found = []
    for start in starts[: _limit(plain)]:
        positions, energy, dipole = relax(numbers, start)
        count = degeneracy(positions[atoms], matches, bool(centres))
        found.append(Conformer(positions, energy, dipole, count))
    kept = _distinct(found)
    share = weights(np.array([c.energy for c in kept]), np.array([c.copies for c in kept]))
    lowest = kept[0].energy
    return numbers, [
        Conformer(c.positions, c.energy - lowest, c.dipole, c.copies, float(w))
        for c, w in zip(kept, share, strict=True)
    ]


def relax(
    numbers: NDArray[np.int64], start_A: NDArray[np.float64]
) -> tuple[NDArray[np.float64], float, float]:
    """Optimise with GFN2-xTB; positions in angstrom, energy in kJ/mol, dipole in debye."""
    calculator = tblite.Calculator("GFN2-xTB", numbers, start_A / BOHR_A)
    calculator.set("verbosity", 0)
    state: Any = None

    def energy_and_gradient(flat: NDArray[np.float64]) -> tuple[float, NDArray[np.float64]]:
        nonlocal state
        calculator.update(flat.reshape(-1, 3))
        state = calculator.singlepoint(state)
        return float(state.get("energy")), state.get("gradient").ravel()

    best = minimize(
        energy_and_gradient,
        (start_A / BOHR_A).ravel(),
        jac=True,
        method="L-BFGS-B",
        options={"gtol": _FORCE_HARTREE_BOHR, "maxiter": 300, "maxcor": 20},
    )
    energy, _ = energy_and_gradient(best.x)
    dipole = float(np.linalg.norm(state.get("dipole"))) * DIPOLE_D
    return best.x.reshape(-1, 3) * BOHR_A, energy * HARTREE_KJ_MOL, dipole


def _limit(plain: Any) -> int:
    """Most conformers to relax: fewer for large molecules, to bound the cost."""
    return 12 if plain.GetNumHeavyAtoms() <= 8 else 8 if plain.GetNumHeavyAtoms() <= 12 else 3


def _starts(molecule: Any, plain: Any) -> list[NDArray[np.float64]]:
    """Distinct force-field minima in angstrom, lowest first."""
    turning = AllChem.CalcNumRotatableBonds(plain, False)
    polar = sum(a.GetTotalNumHs() > 0 for a in plain.GetAtoms() if a.GetAtomicNum() in (7, 8, 16))
    size = plain.GetNumHeavyAtoms()
    # Rotamers of a single hydroxyl come up once in ten, so even ethanol needs tens of starts.
    count = min(200 if size <= 8 else 100 if size <= 12 else 40, 30 + 20 * (turning + polar))
    settings = AllChem.ETKDGv3()
    settings.randomSeed = SEED
    settings.pruneRmsThresh = -1.0
    identifiers = list(AllChem.EmbedMultipleConfs(molecule, count, settings))
    if not identifiers:
        settings.useRandomCoords = True
        identifiers = list(AllChem.EmbedMultipleConfs(molecule, count, settings))
    identifiers += _flipped(molecule, identifiers[:_FLIPPED])
    if AllChem.MMFFHasAllMoleculeParams(molecule):
        energies = [e for _, e in AllChem.MMFFOptimizeMoleculeConfs(molecule, maxIters=1000)]
    elif AllChem.UFFHasAllMoleculeParams(molecule):
        energies = [e for _, e in AllChem.UFFOptimizeMoleculeConfs(molecule, maxIters=1000)]
    else:
        energies = [0.0] * len(identifiers)
    made = [
        Conformer(molecule.GetConformer(i).GetPositions(), e * 4.184, 0.0, 1.0)
        for i, e in zip(identifiers, energies, strict=True)
    ]
    kept = _distinct(made)
    lowest = kept[0].energy
    return [c.positions for c in kept if c.energy - lowest < _FORCE_FIELD_WINDOW]


def _flipped(molecule: Any, identifiers: list[int]) -> list[int]:
    """Copies with one O=C-X-R group turned from cis to trans, and their numbers.

    ETKDG follows crystal structures and never makes these, though some are populated: acids next
    to an acceptor (pyruvic acid), secondary amides, anhydrides, carbonates, formates.
    """
    made = []
    for pattern in _TURNABLE:
        for match in molecule.GetSubstructMatches(Chem.MolFromSmarts(pattern)):
            for identifier in identifiers:
                copy = Chem.Conformer(molecule.GetConformer(identifier))
                transforms.SetDihedralDeg(copy, *match, 180.0)
                made.append(molecule.AddConformer(copy, assignId=True))
    return made


def _distinct(found: list[Conformer]) -> list[Conformer]:
    """Drop repeats: energy within 0.3 kJ/mol, dipole within 0.05 D, atom distances within 0.04 A.

    Distances are compared sorted, so that neither numbering nor handedness matters.
    """
    kept: list[tuple[Conformer, NDArray[np.float64]]] = []
    for one in sorted(found, key=lambda c: c.energy):
        distances = np.sort(pdist(one.positions))
        for other, known in kept:
            if (
                one.energy - other.energy < 0.3
                and abs(one.dipole - other.dipole) < 0.05
                and np.sqrt(np.mean((distances - known) ** 2)) < 0.04
            ):
                break
        else:
            kept.append((one, distances))
    return [one for one, _ in kept]
