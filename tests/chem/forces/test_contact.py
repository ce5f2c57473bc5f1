"""Contact distances against diffraction, and what makes a molecule too long for one centre."""

import csv
from pathlib import Path

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from stillroom.chem.forces.contact import (
    PACKING_FRACTION,
    contact_diameter,
    contact_distance,
    elongation,
)

TABLE = Path(__file__).parents[2] / "reference" / "contact_distances.csv"
with TABLE.open(encoding="utf-8") as file:
    ROWS = list(csv.DictReader(file))
USUAL = [row for row in ROWS if row["follows_rule"] == "yes"]
EXCEPTIONS = [row for row in ROWS if row["follows_rule"] == "no"]


def nanometres(row: dict[str, str]) -> float:
    return float(contact_diameter(float(row["molar_volume_cm3_mol"]) * 1e-6)) * 1e9


@pytest.mark.parametrize("row", USUAL, ids=lambda row: row["name"])
def test_the_rule_gives_the_first_diffraction_peak(row: dict[str, str]) -> None:
    # Source of each peak: the source column. The peak is known to its half width or so.
    assert nanometres(row) == pytest.approx(
        float(row["first_peak_nm"]), abs=float(row["half_width_nm"])
    )


def test_the_rule_is_right_on_average_to_the_uncertainty_it_claims() -> None:
    # 3 %, the relative standard uncertainty of a contact distance in a pair's budget.
    ratio = np.array([nanometres(row) / float(row["first_peak_nm"]) for row in USUAL])
    assert np.sqrt(np.mean((ratio - 1) ** 2)) < 0.03


def test_water_is_the_exception_that_the_source_says_it_is() -> None:
    (water,) = EXCEPTIONS
    assert water["name"] == "water"
    ratio = nanometres(water) / float(water["first_peak_nm"])
    assert 1.15 < ratio < 1.25  # an open network: neighbours nearer than its volume suggests


@given(st.floats(1e-5, 1e-3))
def test_spheres_of_that_diameter_fill_the_packing_fraction(volume: float) -> None:
    # Volume of N_A spheres over the molar volume, N_A = 6.02214076e23 (SI).
    spheres = 6.02214076e23 * np.pi / 6 * float(contact_diameter(volume)) ** 3
    assert spheres / volume == pytest.approx(PACKING_FRACTION, rel=1e-12)


@given(st.floats(1e-5, 1e-3), st.floats(1e-5, 1e-3))
def test_unlike_contact_is_symmetric_and_between_the_like_ones(a: float, b: float) -> None:
    distance = float(contact_distance(a, b))
    low, high = sorted((float(contact_diameter(a)), float(contact_diameter(b))))
    assert distance == float(contact_distance(b, a))
    assert low * (1 - 1e-12) <= distance <= high * (1 + 1e-12)


def test_a_missing_volume_gives_no_distance() -> None:
    assert np.isnan(contact_distance(np.nan, 1e-4))


def test_alkanes_pass_from_compact_to_elongated() -> None:
    # Molar volumes of the n-alkanes at 25 degC in cm^3/mol: CRC Handbook (from memory); the number
    # of bonds is one less than the number of carbon atoms.
    volumes = {5: 116.1, 6: 131.6, 8: 163.5, 10: 195.9, 16: 294.1}
    ratios = [float(elongation(n - 1, v * 1e-6)) for n, v in volumes.items()]
    assert ratios == sorted(ratios)
    assert ratios[0] < 1.6 < ratios[-1]
    # Stretched hexadecane is about 2.3 nm long between the ends of its methyl groups (from memory).
    assert ratios[-1] * float(contact_diameter(294.1e-6)) == pytest.approx(2.3e-9, rel=0.05)
