"""Who the liquids are: names, CAS numbers, structures, formulas."""

from __future__ import annotations

import pandas as pd
import pytest
from chemicals.identifiers import search_chemical
from CoolProp import CoolProp

from stillroom.chem.liquids.structure import valence_electrons

FAMILIES = {
    "acid", "acyl halide", "alcohol", "aldehyde", "alkane", "alkene", "amide", "amine",
    "anhydride", "aromatic", "brominated", "carbonate", "chlorinated", "diol", "ester", "ether",
    "fluorinated", "glycol ether", "inorganic", "iodinated", "isocyanate", "ketone", "lactone",
    "nitrile", "nitro", "organosilicon", "phenol", "phosphorus", "pyridine", "sulfide/thiol",
    "sulfoxide/sulfone", "terpene",
}  # fmt: skip

TABLE_ERRORS = {"triethylsilane": "the table draws the triethylsilyl radical"}
"""Liquids whose entry in the identifier table of `chemicals` 1.5.2 is wrong."""


def test_every_liquid_has_a_closed_shell(liquids: pd.DataFrame) -> None:
    """An even number of valence electrons (common practice: no stable liquid here is a radical)."""
    counts = liquids.formula.map(valence_electrons)
    assert counts.notna().all()
    assert list(liquids.id[counts % 2 == 1]) == []


def test_ids_are_the_names_in_lower_case_with_hyphens(liquids: pd.DataFrame) -> None:
    expected = liquids.name.str.lower().str.replace(" ", "-")
    assert list(liquids.id) == list(expected)
    assert liquids.id.is_unique
    assert list(liquids.id) == sorted(liquids.id)


def test_no_name_or_synonym_means_two_liquids(liquids: pd.DataFrame) -> None:
    owner: dict[str, str] = {}
    clashes = []
    for row in liquids.itertuples():
        words = {str(row.name).lower(), str(row.id)}
        words |= {s.lower() for s in str(row.synonyms).split(" | ") if s and s != "nan"}
        for word in words:
            if owner.setdefault(word, str(row.id)) != row.id:
                clashes.append(f"{word}: {owner[word]} and {row.id}")
    assert not clashes, clashes


def test_cas_numbers_have_a_valid_check_digit(liquids: pd.DataFrame) -> None:
    def valid(cas: str) -> bool:
        digits = cas.replace("-", "")
        weighted = sum(i * int(d) for i, d in enumerate(reversed(digits[:-1]), start=1))
        return weighted % 10 == int(digits[-1])

    assert [c for c in liquids.cas if not valid(c)] == []


def test_families_come_from_the_closed_list(liquids: pd.DataFrame) -> None:
    assert set(liquids.family) == FAMILIES


def test_structures_agree_with_the_identifier_table_by_cas_number(liquids: pd.DataFrame) -> None:
    """Skeletons (first InChIKey block) against the PubChem-derived table of `chemicals` 1.5.2."""
    wrong, checked = [], 0
    for row in liquids[~liquids.id.isin(TABLE_ERRORS)].itertuples():
        try:
            known = search_chemical(row.cas)
        except ValueError:
            continue
        checked += 1
        if known.InChI_key.split("-")[0] != str(row.inchikey).split("-")[0]:
            wrong.append(row.id)
    assert not wrong
    assert checked > 0.98 * len(liquids)


def test_molar_masses_agree_with_the_identifier_table(
    liquids: pd.DataFrame, preferred: pd.DataFrame
) -> None:
    """Molar masses of PubChem in `chemicals` 1.5.2; heavy water is listed there as such."""
    wrong = []
    for row in liquids[~liquids.id.isin(TABLE_ERRORS)].itertuples():
        try:
            known = search_chemical(row.cas)
        except ValueError:
            continue
        if abs(preferred.molar_mass[row.id] - known.MW) > 0.02:
            wrong.append((row.id, preferred.molar_mass[row.id], known.MW))
    assert not wrong


def test_molar_masses_agree_with_coolprop(liquids: pd.DataFrame, preferred: pd.DataFrame) -> None:
    by_cas = {CoolProp.get_fluid_param_string(f, "CAS"): f for f in CoolProp.FluidsList()}
    common = [(i, by_cas[c]) for i, c in zip(liquids.id, liquids.cas, strict=True) if c in by_cas]
    assert len(common) >= 30
    for name, fluid in common:
        expected = CoolProp.PropsSI("M", fluid) * 1e3
        assert preferred.molar_mass[name] == pytest.approx(expected, rel=2e-4), name


def test_cached_structures_cover_exactly_the_selection(
    liquids: pd.DataFrame, selection: pd.DataFrame, structures: pd.DataFrame
) -> None:
    assert set(selection.index) == set(structures.index) == set(liquids.cas)


@pytest.mark.parametrize(
    ("name", "donor", "acceptor", "dimer", "groups", "flexible"),
    [
        ("water", "strong", "strong", "no", 1, 0),
        ("chloroform", "weak", "none", "no", 1, 0),
        ("dichloromethane", "weak", "weak", "no", 1, 0),
        ("hexane", "none", "none", "no", 0, 0),
        ("acetone", "none", "strong", "no", 1, 0),
        ("acetic-acid", "strong", "strong", "yes", 1, 0),
        ("ethylene-glycol", "strong", "strong", "no", 2, 3),
        ("1,4-dioxane", "none", "strong", "no", 2, 0),
        ("1,2-dichloroethane", "none", "weak", "no", 2, 1),
        ("1,2-dimethoxyethane", "none", "strong", "no", 2, 3),
        ("1-hexyne", "weak", "weak", "no", 0, 0),
        ("ethanethiol", "weak", "weak", "no", 1, 0),
        ("aniline", "strong", "strong", "no", 1, 0),
        ("dimethyl-sulfoxide", "none", "strong", "no", 1, 0),
        ("carbon-tetrachloride", "none", "none", "no", 0, 0),
        ("succinonitrile", "none", "strong", "no", 2, 1),
        ("propylene-carbonate", "none", "strong", "no", 1, 0),
    ],
)
def test_structure_columns_of_known_molecules(
    liquids: pd.DataFrame,
    name: str,
    donor: str,
    acceptor: str,
    dimer: str,
    groups: int,
    flexible: int,
) -> None:
    """Common practice: what every chemist reads off these formulas."""
    row = liquids.loc[name]
    assert (row.hbond_donor, row.hbond_acceptor, row.vapour_dimer) == (donor, acceptor, dimer)
    assert (row.polar_groups, row.flexible_polar_bonds) == (groups, flexible)


@pytest.mark.parametrize(
    ("name", "bonds"), [("hexane", 5), ("benzene", 3), ("water", 0), ("ethanol", 2), ("decane", 9)]
)
def test_longest_path_is_the_topological_diameter(
    liquids: pd.DataFrame, name: str, bonds: int
) -> None:
    assert liquids.longest_path_bonds[name] == bonds
