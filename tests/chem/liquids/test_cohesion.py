"""Cohesive energy and solubility parameter against handbook tables."""

import csv
from pathlib import Path

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from stillroom.chem.liquids.cohesion import cohesive_energy, solubility_parameter

TABLE = Path(__file__).parents[2] / "reference" / "cohesion.csv"
with TABLE.open(encoding="utf-8") as file:
    ROWS = list(csv.DictReader(file))


@pytest.mark.parametrize("row", ROWS, ids=lambda row: row["name"])
def test_agrees_with_handbook_tables(row: dict[str, str]) -> None:
    # Source of each number: the source column. 25 degC.
    energy = cohesive_energy(float(row["vaporization_enthalpy_kJ_mol"]) * 1e3, 298.15)
    delta = solubility_parameter(energy, float(row["molar_volume_cm3_mol"]) * 1e-6)
    assert float(energy) / 1e3 == pytest.approx(float(row["cohesive_energy_kJ_mol"]), abs=0.1)
    assert float(delta) / 1e3 == pytest.approx(float(row["solubility_parameter_MPa0.5"]), rel=0.01)


@given(st.floats(1e4, 1e5), st.floats(1e-5, 1e-3), st.floats(200, 500))
def test_energy_density_is_the_square(enthalpy: float, volume: float, t: float) -> None:
    # R = 8.314462618 J/(mol K): CODATA.
    energy = cohesive_energy(enthalpy, t)
    assert enthalpy - float(energy) == pytest.approx(8.314462618 * t, rel=1e-9)
    delta = solubility_parameter(energy, volume)
    assert float(delta) ** 2 * volume == pytest.approx(float(energy), rel=1e-12)


def test_no_parameter_where_nothing_holds_the_liquid_together() -> None:
    assert np.isnan(solubility_parameter(cohesive_energy(1e3, 298.15), 1e-4))
    assert np.isnan(solubility_parameter(np.nan, 1e-4))
