"""Columns beyond the physics: counted electrons, partition, limits."""

from __future__ import annotations

import pytest

from stillroom.chem import load_shelf
from stillroom.chem.data.quantities import quantity


@pytest.mark.parametrize(
    ("name", "electrons"),
    [
        ("water", 8),
        ("acetone", 24),
        ("benzene", 30),
        ("chloroform", 26),
        ("dimethyl-sulfoxide", 26),
    ],
)
def test_valence_electrons_are_counted_from_the_formula(name: str, electrons: int) -> None:
    """Sum of group numbers: H 1, C 4, N 5, O and S 6, halogens 7."""
    value = load_shelf()[name].values["valence_electrons"]
    assert (value.number, value.kind, value.uncertainty) == (electrons, "derived", 0.0)


@pytest.mark.parametrize(
    ("name", "column"),
    [
        ("log_p", "log_p"),
        ("water_solubility", "water_solubility_percent"),
        ("autoignition_temperature", "autoignition_temperature_degC"),
        ("lower_flammability_limit", "lower_flammability_limit_percent"),
        ("upper_flammability_limit", "upper_flammability_limit_percent"),
        ("exposure_limit", "exposure_limit_ppm"),
        ("valence_electrons", "valence_electrons"),
    ],
)
def test_column_names_carry_their_unit(name: str, column: str) -> None:
    assert quantity(name).column == column
    assert quantity(column) is quantity(name)


def test_limits_and_partition_do_not_change_with_the_temperature_of_the_shelf() -> None:
    shelf = load_shelf()
    warm = shelf.at(318.15)["acetone"]
    for name in ("log_p", "exposure_limit", "lower_flammability_limit"):
        assert warm.values[name].number == shelf["acetone"].values[name].number
