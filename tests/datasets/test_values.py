"""Every value has unit, kind, source and uncertainty, and one of them is preferred."""

from __future__ import annotations

import csv

import pandas as pd
import pytest
from steps.candidate import UNITS
from steps.shelf import COLUMNS

TEMPERATURE_DEPENDENT = (
    "density",
    "vaporization_enthalpy",
    "vapor_pressure",
    "permittivity",
    "refractive_index",
    "viscosity",
    "surface_tension",
)


def test_units_are_those_of_the_quantity(values: pd.DataFrame) -> None:
    assert (values.unit == values.quantity.map(UNITS)).all()


def test_one_value_is_preferred_unless_all_are_out_of_use(values: pd.DataFrame) -> None:
    out_of_use = values.note.fillna("").str.startswith("not used:")
    grouped = values.assign(usable=~out_of_use).groupby(["id", "quantity"])
    counts = grouped.agg(preferred=("preferred", "sum"), usable=("usable", "sum"))
    wrong = counts[counts.preferred != (counts.usable > 0).astype(int)]
    assert wrong.empty, wrong.index.tolist()
    assert not (values.preferred.eq(1) & out_of_use).any()


def test_every_uncertainty_is_positive_and_not_absurd(values: pd.DataFrame) -> None:
    assert (values.uncertainty > 0).all()
    used = values[(values.preferred == 1) & ~values.quantity.str.contains("point|temperature")]
    used = used[(used.value > 0) & ~used.quantity.isin(["dipole", "log_p"])]
    # correlations at low pressure; limits of flammability of different vessels and criteria
    wide_by_nature = dict.fromkeys(
        ("vapor_pressure", "lower_flammability_limit", "upper_flammability_limit"), 2.0
    )
    limit = used.quantity.map(wide_by_nature).fillna(0.35)
    wide = used[used.uncertainty > limit * used.value]
    assert wide.empty, wide[["id", "quantity", "value", "uncertainty"]].to_string()


def test_values_that_follow_temperature_state_one(values: pd.DataFrame) -> None:
    follows = values.quantity.isin(TEMPERATURE_DEPENDENT)
    assert values[follows].temperature_K.notna().all()
    used = values[follows & (values.preferred == 1)]
    assert used.temperature_K.between(270, 345).all()


def test_preferred_values_are_near_25_degrees_or_just_above_melting(
    values: pd.DataFrame, liquids: pd.DataFrame, selection: pd.DataFrame
) -> None:
    state = liquids.cas.map(selection.state)
    used = values[(values.preferred == 1) & values.quantity.isin(TEMPERATURE_DEPENDENT)]
    used = used[(used.quantity != "refractive_index") & (used.id.map(state) == "liquid")]
    far = used[(used.temperature_K - 298.15).abs() > 10.01]
    assert far.empty, far[["id", "quantity", "temperature_K"]].to_string()


def test_recalled_values_carry_a_wide_uncertainty(values: pd.DataFrame) -> None:
    """Floors stated in the README for values recalled from memory."""
    recalled = values[values.source.str.startswith("memory-")]
    floors = {"dipole": 0.02, "ionization_energy": 0.005, "density": 0.0, "refractive_index": 1e-4}
    for quantity, floor in floors.items():
        rows = recalled[recalled.quantity == quantity]
        assert (rows.uncertainty >= floor).all(), quantity
    ionization = recalled[recalled.quantity == "ionization_energy"]
    assert ionization.uncertainty.median() >= 0.05
    dipole = recalled[recalled.quantity == "dipole"]
    assert dipole.uncertainty.median() >= 0.1


def test_kind_fits_the_source(values: pd.DataFrame) -> None:
    """Correlations, sums of atomic weights and Lorentz-Lorenz values are derived, not measured."""
    derived = ("perry-", "vdi-", "mulero-", "jasper-", "viswanath-", "mcgarry-", "landolt-")
    from_fit = values.source.str.startswith(derived)
    assert (values[from_fit].kind == "derived").all()
    for source in ("lorentz-lorenz", "ciaaw-atomic-weights", "crc-2014-permittivity-fit"):
        assert (values[values.source == source].kind == "derived").all(), source
    assert not (values.kind == "computed").any()


def test_sources_resolve_and_all_are_used(
    values: pd.DataFrame, hazards: pd.DataFrame, sources: pd.DataFrame
) -> None:
    used = set(values.source) | set(hazards.source)
    assert used == set(sources.key)
    assert sources.citation.str.len().min() > 20
    recalled = sources[sources.key.str.startswith("memory-")]
    assert recalled.citation.str.contains("from memory").all()


def test_the_wide_table_holds_the_preferred_values_as_written(
    values: pd.DataFrame, liquids: pd.DataFrame, shelf: pd.DataFrame
) -> None:
    wide = values[values.preferred == 1].pivot(index="id", columns="quantity", values="value")
    for quantity, column in COLUMNS.items():
        expected = wide.get(quantity, pd.Series(dtype=float)).reindex(liquids.id).to_numpy()
        pd.testing.assert_series_equal(
            shelf.loc[liquids.name, column].reset_index(drop=True),
            pd.Series(expected, name=column),
        )
    for column in ("cas", "smiles", "formula", "family"):
        assert list(shelf.loc[liquids.name, column]) == list(liquids[column])


@pytest.mark.parametrize("name", ["liquids", "values", "sources", "hazards", "shelf"])
def test_no_cell_could_run_in_a_spreadsheet_or_disturb_a_terminal(name: str) -> None:
    from steps.paths import DATASETS

    with (DATASETS / f"{name}.csv").open(encoding="utf-8", newline="") as file:
        for row in csv.DictReader(file):
            for column, cell in row.items():
                text = cell.strip()
                assert text.isprintable(), (name, column, cell)
                number = text.lstrip("-").replace(".", "", 1).replace("e-", "", 1).isdigit()
                if text and not number and column != "smiles":
                    assert text[0] not in "=+-@", (name, column, cell)
