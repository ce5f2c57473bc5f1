"""Like-pair coefficients of small molecules against a textbook table, through the public API."""

import csv
from pathlib import Path

import pytest

from stillroom.chem import Liquid, PairInteraction, interact

TABLE = Path(__file__).parents[2] / "reference" / "like_pair_coefficients.csv"
with TABLE.open(encoding="utf-8") as file:
    ROWS = list(csv.DictReader(file))


def like_pair(row: dict[str, str]) -> PairInteraction:
    molecule = Liquid(
        row["name"],
        formula=row["formula"],
        dipole=f"{row['dipole_D']} D",
        polarizability=f"{row['polarizability_A3']} angstrom**3",
        ionization_energy=f"{row['ionization_energy_eV']} eV",
    )
    return interact(molecule, molecule, "293 K", distance="1 nm", dispersion="london")


# Source of every expected number: Israelachvili, Intermolecular and Surface Forces, 3rd ed.,
# Table 6.3 (from memory); printed there as whole numbers, hence 3 % or one unit of the last place.
@pytest.mark.parametrize("row", ROWS, ids=lambda row: row["name"])
def test_orientation_as_a_free_energy(row: dict[str, str]) -> None:
    # The table uses the free-energy convention (1/3); the program's C6 is the internal-energy one.
    c = like_pair(row).to_dict()["c6_1e-79_J_m6"]["orientation"] / 2
    assert c == pytest.approx(float(row["c_orientation"]), rel=0.03, abs=0.6)


@pytest.mark.parametrize("row", ROWS, ids=lambda row: row["name"])
def test_induction(row: dict[str, str]) -> None:
    c = like_pair(row).to_dict()["c6_1e-79_J_m6"]["induction"]
    assert c == pytest.approx(float(row["c_induction"]), rel=0.03, abs=0.6)


@pytest.mark.parametrize("row", ROWS, ids=lambda row: row["name"])
def test_dispersion_by_londons_formula(row: dict[str, str]) -> None:
    c = like_pair(row).to_dict()["c6_1e-79_J_m6"]["dispersion"]
    assert c == pytest.approx(float(row["c_dispersion"]), rel=0.03)


@pytest.mark.parametrize("row", ROWS, ids=lambda row: row["name"])
def test_internal_energy_is_twice_the_free_energy_at_leading_order(row: dict[str, str]) -> None:
    orientation = like_pair(row).to_dict()["orientation"]
    assert orientation["leading_energy_kJ_mol"] == pytest.approx(
        2 * orientation["leading_free_energy_kJ_mol"], rel=1e-12
    )
