"""What a molecular graph tells: hydrogen-bond sites, polar groups, flexible bonds, length."""

from __future__ import annotations

from math import sqrt

from rdkit import Chem

from steps.groups import Found, Pattern, find_groups

_STRONG_DONOR = Chem.MolFromSmarts("[$([OX2;H1,H2]),$([NX3;H1,H2,H3]),$([nH]),$([O]([2H])[2H])]")
_WEAK_DONOR = (
    Chem.MolFromSmarts("[SX2;H1,H2]"),
    Chem.MolFromSmarts("[CX2H1]#[CX2]"),
    Chem.MolFromSmarts("[CX4;H1,H2]([F,Cl,Br,I])[F,Cl,Br,I]"),
    Chem.MolFromSmarts("[CX4;H2,H3][N+](=O)[O-]"),
    Chem.MolFromSmarts("[cH1](c([F]))c([F])"),
)
# Strong: hydrogen-bond basicity of about 0.3 and more on the usual scales (from memory).
_STRONG_ACCEPTOR = Chem.MolFromSmarts(
    "[$([OX1]=[CX3]),$([OX1]=[#16]),$([OX1]=[#15]),$([OX2;H1,H2][#6,#1,O]),$([OX2H2]),"
    "$([OX2]([CX4])[CX4]),$([nX2]),$([NX3;!$(NC=O);!$(NS(=O)=O);!$([N+]);!$(NC(F)(F))]),"
    "$([NX1]#[CX2]),$([NX2]=[CX3]),$([O]([2H])[2H])]"
)
_WEAK_ACCEPTOR = (
    Chem.MolFromSmarts(
        "[$([OX2]),$([o]),$([SX2]),$([s]),$([n]),$([OX1]),$([NX2]),$([NX3]),$([PX3])]"
    ),
    Chem.MolFromSmarts("[CX4;!$(C([F,Cl,Br,I])([F,Cl,Br,I])[F,Cl,Br,I]);!$(C(F)F)][F,Cl,Br,I]"),
    Chem.MolFromSmarts("[c;!$(cF)]"),
    Chem.MolFromSmarts("[C;!$(C[F,Cl])]=,#[C;!$(C[F,Cl])]"),
)
_ACID = Chem.MolFromSmarts("[CX3](=O)[OX2H1]")
_RESTRICTED = (
    Chem.MolFromSmarts("[NX3][CX3]=O"),
    Chem.MolFromSmarts("[OX2;!H1][CX3]=O"),
    Chem.MolFromSmarts("[OX2H1][CX3]=O"),
    Chem.MolFromSmarts("[NX3]C=[NX2]"),
)
_ROTOR_HEAD = Chem.MolFromSmarts("[$([OX2H1]),$([SX2H1]),$([NX3H2])]")


def describe(molecule: Chem.Mol, patterns: list[Pattern]) -> list[str]:
    """Return the structure columns of `raw/structure.csv` in order."""
    groups = find_groups(molecule, patterns)
    rss = sqrt(sum(g.moment**2 for g in groups))
    return [
        _donor(molecule),
        _acceptor(molecule),
        "yes" if molecule.HasSubstructMatch(_ACID) else "no",
        str(len(groups)),
        f"{rss:.2f}",
        str(_flexible_polar_bonds(molecule, groups)),
        str(_longest_path(molecule)),
        " + ".join(sorted(g.name for g in groups)),
    ]


def _donor(molecule: Chem.Mol) -> str:
    """Return the strongest kind of hydrogen-bond donor present."""
    if molecule.HasSubstructMatch(_STRONG_DONOR):
        return "strong"
    return "weak" if any(molecule.HasSubstructMatch(q) for q in _WEAK_DONOR) else "none"


def _acceptor(molecule: Chem.Mol) -> str:
    """Return the strongest kind of hydrogen-bond acceptor present."""
    if molecule.HasSubstructMatch(_STRONG_ACCEPTOR):
        return "strong"
    return "weak" if any(molecule.HasSubstructMatch(q) for q in _WEAK_ACCEPTOR) else "none"


def _longest_path(molecule: Chem.Mol) -> int:
    """Bonds on the longest of the shortest paths between heavy atoms."""
    heavy = [a.GetIdx() for a in molecule.GetAtoms() if a.GetAtomicNum() > 1]
    return int(Chem.GetDistanceMatrix(molecule)[heavy][:, heavy].max())


def _flexible_polar_bonds(molecule: Chem.Mol, groups: list[Found]) -> int:
    """Count rotatable bonds that turn one polar group against another.

    A bond counts if it is single, in no ring and not held planar by conjugation, and if cutting it
    leaves a polar group on each side, neither of which has its moment along the bond.
    """
    if len(groups) < 2:
        return 0
    count = 0
    for bond in molecule.GetBonds():
        if bond.GetBondType() != Chem.BondType.SINGLE or bond.IsInRing() or _held(molecule, bond):
            continue
        left, right = _sides(molecule, bond)
        if _turns(molecule, bond, left, groups) and _turns(molecule, bond, right, groups):
            count += 1
    return count


def _held(molecule: Chem.Mol, bond: Chem.Bond) -> bool:
    """Whether conjugation holds the bond planar (amide C-N, ester and acid C-O)."""
    ends = {bond.GetBeginAtomIdx(), bond.GetEndAtomIdx()}
    return any(
        ends <= set(match[:2])
        for query in _RESTRICTED
        for match in molecule.GetSubstructMatches(query)
    )


def _sides(molecule: Chem.Mol, bond: Chem.Bond) -> tuple[frozenset[int], frozenset[int]]:
    """Atoms on each side of an acyclic bond."""
    start, other = bond.GetBeginAtomIdx(), bond.GetEndAtomIdx()
    seen, todo = {start}, [start]
    while todo:
        current = todo.pop()
        for neighbour in molecule.GetAtomWithIdx(current).GetNeighbors():
            index = neighbour.GetIdx()
            if index not in seen and (current, index) != (start, other):
                seen.add(index)
                todo.append(index)
    return frozenset(seen), frozenset(range(molecule.GetNumAtoms())) - seen


def _turns(molecule: Chem.Mol, bond: Chem.Bond, side: frozenset[int], groups: list[Found]) -> bool:
    """Whether turning `side` about the bond turns the moment of a polar group that sits in it."""
    ends = {bond.GetBeginAtomIdx(), bond.GetEndAtomIdx()}
    if len(side) == 1 and not side & {m[0] for m in molecule.GetSubstructMatches(_ROTOR_HEAD)}:
        return False
    for group in groups:
        on_axis = group.axial and group.atoms & ends and side <= group.atoms
        if group.core <= side and not on_axis:
            return True
    return False
