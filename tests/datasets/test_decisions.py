"""Curated lines: each speaks of a liquid on the shelf, gives a reason, and has its effect."""

from __future__ import annotations

import pandas as pd


def test_every_decision_names_a_liquid_on_the_shelf(
    decisions: pd.DataFrame, liquids: pd.DataFrame
) -> None:
    unknown = set(decisions.id) - set(liquids.id)
    assert not unknown


def test_every_decision_has_a_reason(decisions: pd.DataFrame) -> None:
    assert decisions.reason.str.len().min() >= 3
    overrides = decisions[decisions.file == "overrides.csv"]
    assert overrides.reason.str.len().min() >= 12


def test_no_liquid_has_two_preferred_values_by_hand(decisions: pd.DataFrame) -> None:
    by_hand = decisions[decisions.action == "prefer"]
    twice = by_hand[by_hand.duplicated(["id", "quantity"], keep=False)]
    assert twice.empty, twice[["id", "quantity", "source"]].to_string()


def test_rejected_values_stay_visible_with_their_reason(
    decisions: pd.DataFrame, values: pd.DataFrame
) -> None:
    rejected = decisions[decisions.action == "reject"]
    keyed = values.set_index(["id", "quantity", "source"]).sort_index()
    for row in rejected.itertuples():
        hits = keyed.loc[[(row.id, row.quantity, row.source)]]
        assert (hits.preferred == 0).all(), row
        assert hits.note.str.startswith("not used: ").all(), row


def test_preferred_by_hand_is_preferred_in_the_table(
    decisions: pd.DataFrame, values: pd.DataFrame
) -> None:
    used = values[values.preferred == 1].set_index(["id", "quantity"]).source
    for row in decisions[decisions.action == "prefer"].itertuples():
        assert used[(row.id, row.quantity)] == row.source, row


def test_recalled_values_never_displace_a_table_unless_decided(
    decisions: pd.DataFrame, values: pd.DataFrame
) -> None:
    decided = set(
        map(tuple, decisions[decisions.action == "prefer"][["id", "quantity"]].to_numpy())
    )
    usable = values[~values.note.fillna("").str.startswith("not used:")]
    for (name, quantity), rows in usable.groupby(["id", "quantity"]):
        best = rows[rows.preferred == 1].iloc[0]
        others = rows[~rows.source.str.startswith("memory-") & (rows.kind != "estimated")]
        if best.source.startswith("memory-") and len(others):
            assert (name, quantity) in decided, (name, quantity)
