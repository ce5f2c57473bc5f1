"""The numbers in the data dictionary are those of the data."""

from __future__ import annotations

import re
from pathlib import Path

import pandas as pd
import pytest

TEXT = (Path(__file__).resolve().parents[2] / "datasets" / "README.md").read_text(encoding="utf-8")
CORE = ["dipole", "polarizability", "molar_mass", "density", "melting_point", "boiling_point"]


def test_counts_of_liquids_melts_and_complete_rows(
    liquids: pd.DataFrame, selection: pd.DataFrame, preferred: pd.DataFrame
) -> None:
    stated = re.search(r"(\d+) liquids, (\d+) of them melts; (\d+) have dipole", TEXT)
    assert stated is not None
    complete = int(preferred[CORE].notna().all(axis=1).sum())
    melts = int((selection.state == "melt").sum())
    assert [int(n) for n in stated.groups()] == [len(liquids), melts, complete]


def test_coverage_table(values: pd.DataFrame) -> None:
    used = values[values.preferred == 1]
    rows = re.findall(r"^\| (\w+) \| (\d+) \| (\d+) \| (\d+) \| (\d+) \| (\d+) \|$", TEXT, re.M)
    assert len(rows) == 20
    for quantity, *numbers in rows:
        of_it = used[used.quantity == quantity]
        kinds = [int((of_it.kind == k).sum()) for k in ("measured", "derived", "estimated")]
        recalled = int(of_it.source.str.startswith("memory-").sum())
        assert [int(n) for n in numbers] == [len(of_it), *kinds, recalled], quantity


def test_counts_of_recalled_and_solution_dipoles(values: pd.DataFrame) -> None:
    rows = values[(values.preferred == 1) & (values.quantity == "dipole")]
    recalled = rows[rows.source.str.startswith("memory-")]
    assert f"{len(recalled)} of the dipoles" in TEXT
    in_solution = int(recalled.note.str.contains("solution").sum())
    assert f"At least {in_solution} preferred dipoles" in TEXT


def test_fit_of_the_thermal_expansion(
    liquids: pd.DataFrame, selection: pd.DataFrame, structures: pd.DataFrame
) -> None:
    from steps.curated import read_decisions
    from steps.expansion import fit_expansion
    from steps.identity import liquid_of
    from steps.paths import CURATED
    from steps.selection import read_selection

    decisions = read_decisions(CURATED / "values")
    chosen = read_selection(CURATED / "selection.csv")
    fit = fit_expansion([liquid_of(c, structures.formula[c.cas], decisions) for c in chosen])
    stated = re.search(
        r"−([\d.]+)·10⁻⁴ \+ ([\d.]+)/Tb per kelvin .*?\n([\d.]+)·10⁻⁴ on (\d+)", TEXT
    )
    assert stated is not None
    a, b, scatter, count = (float(n) for n in stated.groups())
    assert -fit.a * 1e4 == pytest.approx(a, abs=0.006)
    assert fit.b == pytest.approx(b, abs=0.0006)
    assert fit.scatter * 1e4 == pytest.approx(scatter, abs=0.006)
    assert fit.count == count


def test_every_file_and_column_is_in_the_dictionary(
    liquids: pd.DataFrame, values: pd.DataFrame
) -> None:
    for name in ("liquids", "values", "sources", "hazards", "shelf"):
        assert f"`{name}.csv`" in TEXT
    for column in liquids.columns:
        assert f"`{column}`" in TEXT, column
    for quantity in values.quantity.unique():
        assert f"`{quantity}`" in TEXT, quantity
