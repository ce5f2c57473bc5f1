"""Single handbook values of common solvents, and polarizabilities measured independently."""

from __future__ import annotations

from pathlib import Path

import pandas as pd
import pytest

CHECKS = pd.read_csv(Path(__file__).parent / "reference" / "properties.csv")


@pytest.mark.parametrize(
    "row", list(CHECKS.itertuples()), ids=[f"{r.id} {r.quantity}" for r in CHECKS.itertuples()]
)
def test_property_agrees_with_a_handbook(
    row: pd.Series, preferred: pd.DataFrame, temperatures: pd.DataFrame
) -> None:
    """Sources in `reference/properties.csv`, from memory."""
    assert preferred.loc[row.id, row.quantity] == pytest.approx(row.value, abs=row.tolerance)
    if pd.notna(row.temperature_K):
        assert abs(temperatures.loc[row.id, row.quantity] - row.temperature_K) <= 5.1


def test_lorentz_lorenz_polarizabilities_agree_with_measured_ones(values: pd.DataFrame) -> None:
    """CRC Handbook, section 10 (from memory): within 8 % each, 3 % on average."""
    rows = values[values.quantity == "polarizability"]
    ours = rows[rows.source == "lorentz-lorenz"].set_index("id").value
    theirs = rows[rows.source == "memory-crc-polarizability"].set_index("id").value
    ratio = (ours.reindex(theirs.index) / theirs).dropna()
    off = ratio[(ratio - 1.0).abs() > 0.08]
    assert off.empty, off.round(3).to_dict()
    assert len(ratio) >= 50
    assert (ratio - 1.0).abs().mean() < 0.03


def test_lorentz_lorenz_uses_index_and_density_at_one_temperature(values: pd.DataFrame) -> None:
    """Recomputed from the wide inputs: alpha = 3M/(4 pi N rho) (n^2-1)/(n^2+2)."""
    from math import pi

    from scipy.constants import Avogadro

    rows = values[values.source == "lorentz-lorenz"]
    pattern = r"n_D = ([\d.]+) .* and ([\d.]+) kg/m\^3 .* at ([\d.]+) degC"
    found = rows.note.str.extract(pattern).astype(float)
    assert found.notna().all().all()
    index, density, celsius = (found[i] for i in range(3))
    mass = values[values.quantity == "molar_mass"].set_index("id").value.reindex(rows.id)
    square = index.to_numpy() ** 2
    volume = mass.to_numpy() / 1e3 / density.to_numpy() / Avogadro * 1e30
    alpha = 3 / (4 * pi) * volume * (square - 1) / (square + 2)
    assert alpha == pytest.approx(rows.value.to_numpy(), rel=8e-4)
    assert (celsius + 273.15).to_numpy() == pytest.approx(rows.temperature_K.to_numpy(), abs=0.06)
