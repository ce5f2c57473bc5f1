"""Dipole moments: sources that agree, sources that do not, and published check values."""

from __future__ import annotations

from pathlib import Path

import pandas as pd
import pytest

TABLES = ("nist-cccbdb-2015", "poling-2001", "muller-2012")
CHECKS = pd.read_csv(Path(__file__).parent / "reference" / "dipoles.csv")


@pytest.fixture(scope="module")
def tabled(values: pd.DataFrame) -> pd.DataFrame:
    """Dipole moments by liquid and table, in debye."""
    rows = values[(values.quantity == "dipole") & values.source.isin(TABLES)]
    return rows.pivot(index="id", columns="source", values="value")


def test_where_two_tables_agree_the_preferred_value_is_theirs(
    tabled: pd.DataFrame, preferred: pd.DataFrame
) -> None:
    """Tables within 0.1 D of each other; the preferred value within 0.1 D of their mean.

    Symmetric molecules may stand at 0.1 D in the one-decimal table; their value is exactly zero.
    """
    both = tabled[tabled.notna().sum(axis=1) >= 2]
    agree = both[both.max(axis=1) - both.min(axis=1) <= 0.1 + 1e-9]
    off = (preferred.dipole.reindex(agree.index) - agree.mean(axis=1)).abs()
    assert off[off > 0.1].empty, off[off > 0.1].to_dict()
    assert len(agree) >= 80


def test_every_disagreement_above_0_2_debye_has_a_decision(
    tabled: pd.DataFrame, decisions: pd.DataFrame
) -> None:
    wide = tabled[tabled.max(axis=1) - tabled.min(axis=1) > 0.2 + 1e-9]
    decided = decisions[
        (decisions.quantity == "dipole") & decisions.action.isin(["prefer", "reject"])
    ]
    missing = sorted(set(wide.index) - set(decided.id.str.lower()))
    assert not missing
    assert len(wide) >= 15


def test_recalled_values_far_from_a_table_have_a_decision(
    values: pd.DataFrame, decisions: pd.DataFrame
) -> None:
    rows = values[
        (values.quantity == "dipole") & ~values.note.fillna("").str.startswith("not used")
    ]
    spread = rows.groupby("id").value.agg(lambda v: v.max() - v.min())
    wide = set(spread[spread > 0.2 + 1e-9].index)
    decided = decisions[
        (decisions.quantity == "dipole") & decisions.action.isin(["prefer", "reject"])
    ]
    assert wide <= set(decided.id.str.lower()), wide - set(decided.id.str.lower())


@pytest.mark.parametrize("row", list(CHECKS.itertuples()), ids=list(CHECKS.id))
def test_dipole_agrees_with_a_published_value(row: pd.Series, preferred: pd.DataFrame) -> None:
    """Sources in `reference/dipoles.csv`, from memory."""
    assert preferred.dipole[row.id] == pytest.approx(row.dipole_D, abs=row.tolerance_D), row.source


@pytest.mark.parametrize(
    ("name", "low", "high"),
    [
        ("cyclohexane", 0.0, 0.0),
        ("1,4-dioxane", 0.0, 0.0),
        ("1,2-dichloroethane", 1.1, 2.0),
        ("2-butanone", 2.7, 2.9),
        ("ethanolamine", 2.0, 2.6),
        ("diethanolamine", 2.3, 3.2),
        ("ethylene-glycol", 2.0, 2.6),
        ("diethylene-glycol", 2.0, 2.8),
        ("triethylene-glycol", 2.5, 3.4),
        ("glycerol", 2.3, 3.0),
        ("1,2-propanediol", 2.0, 2.6),
    ],
)
def test_known_errors_of_the_tables_do_not_reach_the_shelf(
    preferred: pd.DataFrame, name: str, low: float, high: float
) -> None:
    """Ranges from memory of McClellan (1963, 1974) and Riddick (1986)."""
    assert low <= preferred.dipole[name] <= high


def test_homologous_series_are_level(preferred: pd.DataFrame) -> None:
    """Within 0.2 D: a chain end far away does not change a group moment (common practice)."""
    for series in (
        "ethanol 1-propanol 1-butanol 1-pentanol 1-hexanol 1-heptanol 1-octanol 1-nonanol",
        "2-butanone 2-pentanone 2-hexanone 2-heptanone 2-octanone",
        "ethyl-acetate propyl-acetate butyl-acetate pentyl-acetate",
        "propionitrile butyronitrile valeronitrile",
        "1-chloropropane 1-chlorobutane 1-chloropentane 1-chlorohexane",
    ):
        moments = preferred.dipole.loc[series.split()]
        assert moments.max() - moments.min() <= 0.25, moments.to_dict()
