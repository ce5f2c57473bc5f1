"""C6 models against dipole oscillator strength distributions, and their limits."""

import csv
import math
from pathlib import Path

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from stillroom.chem.data.constants import BOHR, C6_ATOMIC_UNIT, COULOMB, ELEMENTARY_CHARGE
from stillroom.chem.data.errors import OutsideRange
from stillroom.chem.forces.dispersion import (
    dispersion_c6,
    london_c6,
    model_uncertainty,
    model_used,
    slater_kirkwood_c6,
)
from stillroom.chem.liquids.structure import valence_electrons

TABLE = Path(__file__).parents[2] / "reference" / "c6_oscillator_strength.csv"
with TABLE.open(encoding="utf-8") as file:
    ROWS = list(csv.DictReader(file))


def computed(row: dict[str, str], model: str) -> float:
    alpha = float(row["polarizability_bohr3"]) * BOHR**3 * COULOMB
    energy = float(row["ionization_energy_eV"]) * ELEMENTARY_CHARGE
    n = valence_electrons(row["formula"])
    return float(dispersion_c6(alpha, alpha, energy, energy, n, n, model)) / C6_ATOMIC_UNIT


@pytest.mark.parametrize("row", ROWS, ids=lambda row: row["name"])
def test_default_is_within_twelve_percent_of_oscillator_strengths(row: dict[str, str]) -> None:
    assert computed(row, "auto") == pytest.approx(float(row["c6_hartree_bohr6"]), rel=0.12)


def mean_error(model: str) -> float:
    return float(
        np.mean([abs(computed(r, model) / float(r["c6_hartree_bohr6"]) - 1) for r in ROWS])
    )


def test_default_beats_both_single_formulas() -> None:
    assert mean_error("geometric") < mean_error("london")
    assert mean_error("geometric") < mean_error("slater-kirkwood")


@pytest.mark.parametrize("row", ROWS, ids=lambda row: row["name"])
def test_the_two_formulas_bracket_the_truth(row: dict[str, str]) -> None:
    true = float(row["c6_hartree_bohr6"])
    assert computed(row, "london") < true < computed(row, "slater-kirkwood") * 1.02


def test_without_ionization_energy_the_model_that_needs_none_is_used() -> None:
    c6 = dispersion_c6(1e-40, 1e-40, math.nan, 1e-18, 8, 8)
    assert c6 == dispersion_c6(1e-40, 1e-40, 1e-18, 1e-18, 8, 8, "slater-kirkwood-effective")
    assert model_used(False, True) == "slater-kirkwood-effective"


def test_without_formula_londons_is_used() -> None:
    c6 = dispersion_c6(1e-40, 1e-40, 1e-18, 1e-18, math.nan, 8)
    assert c6 == london_c6(1e-40, 1e-40, 1e-18, 1e-18)
    assert model_used(True, False) == "london"


def test_unknown_model_is_refused() -> None:
    with pytest.raises(OutsideRange, match="geometric"):
        dispersion_c6(1, 1, 1, 1, 1, 1, "best")


alphas = st.floats(1e-41, 1e-38)
energies = st.floats(5e-19, 4e-18)
counts = st.integers(2, 100)


@given(alphas, alphas, energies, energies, counts, counts)
def test_symmetric_and_never_above_the_geometric_mean(a, b, i, j, n, m) -> None:
    for model in ("london", "slater-kirkwood", "geometric"):
        ab = dispersion_c6(a, b, i, j, n, m, model)
        assert ab == pytest.approx(float(dispersion_c6(b, a, j, i, m, n, model)), rel=1e-12)
        like = dispersion_c6(a, a, i, i, n, n, model) * dispersion_c6(b, b, j, j, m, m, model)
        assert ab <= math.sqrt(float(like)) * (1 + 1e-12)


@given(alphas, energies, counts)
def test_uncertainty_is_at_least_the_known_error_of_the_model(a, i, n) -> None:
    spread = model_uncertainty(london_c6(a, a, i, i), slater_kirkwood_c6(a, a, n, n))
    assert float(spread) >= 0.05
