"""Kirkwood's correlation factor against published factors and in its limits."""

import csv
from pathlib import Path

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from stillroom.chem.data.constants import AVOGADRO, DEBYE
from stillroom.chem.liquids.association import SMALLEST_DIPOLE, kirkwood_factor

TABLE = Path(__file__).parents[2] / "reference" / "kirkwood_inputs.csv"
with TABLE.open(encoding="utf-8") as file:
    ROWS = list(csv.DictReader(file))


@pytest.mark.parametrize("row", ROWS, ids=lambda row: row["name"])
def test_agrees_with_published_factors(row: dict[str, str]) -> None:
    # Source of inputs and factors: the source column. 25 degC.
    g = kirkwood_factor(
        float(row["permittivity"]), float(row["refractive_index"]),
        float(row["molar_volume_cm3_mol"]) * 1e-6, float(row["dipole_D"]) * DEBYE, 298.15,
    )  # fmt: skip
    assert float(g) == pytest.approx(float(row["kirkwood_factor"]), abs=float(row["tolerance"]))


@given(st.floats(1.2, 1.7), st.floats(20e-6, 300e-6), st.floats(0.5, 5.0), st.floats(200, 450))
def test_onsagers_liquid_has_no_correlation(n, volume, debye, t) -> None:
    """L. Onsager, J. Am. Chem. Soc. 58 (1936) 1486: g = 1 by construction.

    His equation for a polar liquid, (e - n2)(2e + n2)/(e (n2 + 2)^2) = N mu^2/(9 eps0 kT V), is
    quadratic in e; its solution must give a factor of 1.
    """
    n2, mu = n * n, debye * DEBYE
    eps0, k = 8.8541878188e-12, 1.380649e-23  # CODATA
    right = AVOGADRO * mu**2 / (9 * eps0 * k * t * volume) * (n2 + 2) ** 2
    # 2 e^2 - (n2 + right) e - n2^2 = 0
    e = ((n2 + right) + np.sqrt((n2 + right) ** 2 + 8 * n2**2)) / 4
    assert float(kirkwood_factor(e, n, volume, mu, t)) == pytest.approx(1.0, rel=1e-6)


def test_no_factor_for_nearly_no_dipole() -> None:
    # Hexane: eps 1.88, n 1.3723 (CRC Handbook, from memory): a quotient of two small numbers.
    assert np.isnan(kirkwood_factor(1.88, 1.3723, 131.6e-6, 0.08 * DEBYE, 298.15))
    assert np.isnan(kirkwood_factor(20.0, 1.35, 80e-6, 0.0, 298.15))
    assert np.isfinite(kirkwood_factor(20.0, 1.35, 80e-6, SMALLEST_DIPOLE, 298.15))


def test_it_falls_with_the_square_of_the_dipole_moment() -> None:
    one, two = (float(kirkwood_factor(20.7, 1.36, 74e-6, m * DEBYE, 298.15)) for m in (1.44, 2.88))
    assert one == pytest.approx(4 * two, rel=1e-12)
