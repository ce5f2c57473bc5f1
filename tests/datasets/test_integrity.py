"""Cross-checks on all rows; whatever is outside is named and explained, and nothing else is."""

from __future__ import annotations

import pandas as pd
import pytest
from steps.checks import (
    KIRKWOOD,
    TROUTON,
    findings,
    kirkwood_factor,
    read_explanations,
    trouton_constant,
)
from steps.paths import CURATED, DATASETS
from steps.series import TOLERANCES, Member, departures, read_series

AUDIT = (DATASETS / "AUDIT.md").read_text(encoding="utf-8")
Values = dict[tuple[str, str], float]


@pytest.fixture(scope="module")
def explained() -> dict[tuple[str, str], str]:
    return read_explanations(CURATED / "outliers.csv")


@pytest.fixture(scope="module")
def by_key(values: pd.DataFrame) -> Values:
    """Preferred values by (id, quantity), molar volumes in cm^3/mol among them."""
    return _keyed(values[values.preferred == 1])


@pytest.fixture(scope="module")
def at_room(values: pd.DataFrame) -> Values:
    """The same without melts, whose values stand at other temperatures."""
    used = values[values.preferred == 1]
    return _keyed(used[~((used.temperature_K - 298.15).abs() > 6.0)])


def _keyed(rows: pd.DataFrame) -> Values:
    found = {(r.id, r.quantity): float(r.value) for r in rows.itertuples()}
    for (name, quantity), density in list(found.items()):
        if quantity == "density":
            found[(name, "molar_volume")] = found[(name, "molar_mass")] / density * 1e3
    return found


@pytest.mark.parametrize("check", ["trouton", "kirkwood", "index"])
def test_liquids_outside_a_relation_are_exactly_the_explained_ones(
    check: str, liquids: pd.DataFrame, by_key: Values, explained: dict[tuple[str, str], str]
) -> None:
    donors = set(liquids[liquids.hbond_donor == "strong"].id)
    outside = {f.id for f in findings(list(liquids.id), donors, by_key) if f.check == check}
    assert outside == {name for kind, name in explained if kind == check}


def test_relations_are_checked_on_many_liquids(liquids: pd.DataFrame, by_key: Values) -> None:
    trouton = [t for i in liquids.id if (t := trouton_constant(i, by_key)) is not None]
    kirkwood = [k for i in liquids.id if (k := kirkwood_factor(i, by_key)) is not None]
    assert len(trouton) > 600
    assert len(kirkwood) > 330
    within = pd.Series(trouton).between(*TROUTON).mean()
    assert within > 0.85
    assert pd.Series(kirkwood).between(*KIRKWOOD).mean() > 0.95


@pytest.mark.parametrize(
    ("name", "expected"),
    [("benzene", 87.2), ("hexane", 84.4), ("acetone", 88.3), ("diethyl-ether", 86.3)],
)
def test_trouton_constant_after_watson_agrees_with_measured_ones(
    name: str, expected: float, by_key: Values
) -> None:
    """dHvap(Tb)/Tb: 30.72/353.2, 28.85/341.9, 29.10/329.2, 26.52/307.6 kJ/mol/K (CRC, memory)."""
    assert trouton_constant(name, by_key) == pytest.approx(expected, rel=0.025)


@pytest.mark.parametrize(
    ("name", "low", "high"),
    [
        ("acetone", 0.9, 1.3),
        ("water", 2.5, 2.9),
        ("methanol", 2.6, 3.2),
        ("acetonitrile", 0.7, 1.0),
    ],
)
def test_kirkwood_factor_agrees_with_published_ones(
    name: str, low: float, high: float, by_key: Values
) -> None:
    """Within 15 % of Y. Marcus 1998 (from memory): 1.05, 2.57, 2.82 and about 0.8."""
    factor = kirkwood_factor(name, by_key)
    assert factor is not None
    assert low <= factor <= high


def test_homologous_series_are_smooth_but_for_the_explained_members(
    at_room: Values, explained: dict[tuple[str, str], str]
) -> None:
    found, compared = departures(read_series(CURATED / "series.csv"), at_room)
    assert compared > 900
    named = {(q, i) for q, i in explained if q in TOLERANCES}
    assert {(d.quantity, d.id) for d in found} == named


def test_a_wrong_member_of_a_series_is_found() -> None:
    members = [Member("s", n, f"m{n}") for n in range(4, 14)]
    smooth = {(m.id, "boiling_point"): 100.0 + 25.0 * m.carbons**0.9 for m in members}
    assert departures(members, smooth)[0] == []
    wrong = smooth | {("m9", "boiling_point"): smooth[("m9", "boiling_point")] - 20.0}
    found, compared = departures(members, wrong)
    assert [d.id for d in found] == ["m9"]
    assert found[0].residual == pytest.approx(-20.0, abs=1.0)
    assert compared == 10


def test_every_member_of_a_series_is_on_the_shelf(liquids: pd.DataFrame) -> None:
    assert {m.id for m in read_series(CURATED / "series.csv")} <= set(liquids.id)


def test_audit_explains_every_outlier_and_lists_every_decision(decisions: pd.DataFrame) -> None:
    assert "not explained" not in AUDIT
    for section in (
        "Coverage",
        "Sources behind each quantity",
        "Disagreements",
        "Decisions by hand",
        "Outliers",
        "Homologous series",
        "The twenty least trustworthy values",
    ):
        assert f"\n## {section}\n" in AUDIT
    overrides = decisions[decisions.file == "overrides.csv"]
    assert f"\n{len(overrides)} lines.\n" in AUDIT
    for row in overrides.itertuples():
        assert f"| {row.id} | {row.quantity} | {row.action} |" in AUDIT, row


def test_audit_names_the_twenty_widest_values(values: pd.DataFrame) -> None:
    table = AUDIT.split("## The twenty least trustworthy values")[1]
    rows = [line.split(" | ") for line in table.splitlines() if line.startswith("| ")][1:]
    assert len(rows) == 20
    share = [float(cells[3]) for cells in rows]
    assert share == sorted(share, reverse=True)
    used = values[(values.preferred == 1) & (values.quantity == "viscosity")]
    assert (used.uncertainty / used.value * 100 <= share[-1] + 0.5).sum() >= len(used) - 20


def test_audit_coverage_counts_the_preferred_values(values: pd.DataFrame) -> None:
    used = values[values.preferred == 1].groupby("quantity").size()
    for quantity, count in used.items():
        assert f"\n| {quantity} | {count} | " in AUDIT, quantity
