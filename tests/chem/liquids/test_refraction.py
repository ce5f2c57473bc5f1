"""Polarizability from the refractive index against gas-phase values, and its inverse."""

import csv
from pathlib import Path

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from stillroom.chem.data.constants import COULOMB
from stillroom.chem.liquids.refraction import lorentz_lorenz_polarizability

TABLE = Path(__file__).parents[2] / "reference" / "refraction.csv"
with TABLE.open(encoding="utf-8") as file:
    ROWS = list(csv.DictReader(file))


@pytest.mark.parametrize("row", ROWS, ids=lambda row: row["name"])
def test_agrees_with_gas_phase_polarizabilities(row: dict[str, str]) -> None:
    # Source of each range: the source column.
    volume = float(row["molar_mass_g_mol"]) / float(row["density_kg_m3"]) * 1e-3
    alpha = lorentz_lorenz_polarizability(float(row["refractive_index"]), volume)
    low, high = float(row["polarizability_low_A3"]), float(row["polarizability_high_A3"])
    assert low <= float(alpha) / COULOMB * 1e30 <= high


@given(st.floats(1.01, 2.0), st.floats(1e-5, 1e-3))
def test_the_local_field_relation_holds(n: float, volume: float) -> None:
    """Clausius-Mossotti backwards: (n^2 - 1)/(n^2 + 2) = (4 pi/3) (N/V) a, a in m^3."""
    a = float(lorentz_lorenz_polarizability(n, volume)) / COULOMB
    reduced = 4 * np.pi / 3 * 6.02214076e23 / volume * a
    assert np.sqrt((1 + 2 * reduced) / (1 - reduced)) == pytest.approx(n, rel=1e-9)


def test_no_index_no_polarizability() -> None:
    assert np.isnan(lorentz_lorenz_polarizability(np.nan, 1e-4))
    assert lorentz_lorenz_polarizability(1.0, 1e-4) == 0.0
