"""Ranking all pairs against working them out one by one."""

import itertools

import numpy as np
import pytest

from stillroom.chem import Shelf, interact, load_shelf, rank_pairs
from stillroom.chem.data.errors import OutsideRange, UnknownLiquid
from stillroom.chem.pairs import ranking
from stillroom.chem.pairs.ranking import KEYS, rank


@pytest.fixture(scope="module")
def shelf() -> Shelf:
    whole = load_shelf()
    return whole.take(whole.where("family = nitrile or family = ketone or family = alcohol"))


def worked_out(shelf: Shelf, key: str) -> dict[tuple[str, str], float]:
    """Every unordered pair by `interact`, the slow way."""
    usable = [x for x in shelf if {"dipole", "polarizability", "molar_volume"} <= set(x.values)][
        :24
    ]
    like = {x.id: float(interact(x, x).terms.total) / 1e3 for x in usable}
    found = {}
    for a, b in itertools.combinations_with_replacement(usable, 2):
        pair = interact(a, b)
        total = float(pair.terms.total) / 1e3
        found[a.id, b.id] = {
            "total": total,
            "orientation": pair.shares["orientation"],
            "induction": pair.shares["induction"],
            "dispersion": pair.shares["dispersion"],
            "interchange": total - (like[a.id] + like[b.id]) / 2,
            "coupling": float(pair.terms.coupling),
            "leading-error": float(pair.terms.leading_order_error),
        }[key]
    return found


@pytest.mark.parametrize("key", KEYS)
def test_every_key_agrees_with_the_pairs_one_by_one(shelf: Shelf, key: str) -> None:
    expected = worked_out(shelf, key)
    ids = {i for pair in expected for i in pair}
    rows = np.array([r for r, who in enumerate(shelf.identities) if who.id in ids])
    frame = rank(shelf, key, rows=rows, like=True)
    assert len(frame) == len(expected)
    values = frame.columns[KEYS[key].column]
    for a, b, value in zip(frame.a, frame.b, values, strict=True):
        pair = shelf.identities[a].id, shelf.identities[b].id
        assert value == pytest.approx(expected[pair], rel=1e-9, abs=1e-12)
    steps = np.diff(values)
    assert (steps <= 0).all() if KEYS[key].largest_first else (steps >= 0).all()


@pytest.mark.parametrize("ascending", [True, False])
@pytest.mark.parametrize("top", [1, 7, 50, 10**6])
def test_top_is_the_head_of_the_whole_ranking(shelf: Shelf, ascending: bool, top: int) -> None:
    whole = rank(shelf, "coupling", ascending=ascending)
    head = rank(shelf, "coupling", ascending=ascending, top=top)
    assert head.a.tolist() == whole.a[:top].tolist()
    assert head.b.tolist() == whole.b[:top].tolist()
    assert head.considered == whole.considered == len(whole)


def test_blocks_change_nothing(shelf: Shelf, monkeypatch) -> None:
    whole = rank(shelf, "total", top=40)
    monkeypatch.setattr(ranking, "_BLOCK", 97)
    calls: list[tuple[int, int]] = []
    blocks = rank(shelf, "total", top=40, progress=lambda d, t: calls.append((d, t)) or True)
    assert blocks.a.tolist() == whole.a.tolist()
    assert blocks.b.tolist() == whole.b.tolist()
    assert len(calls) > 3
    assert calls[-1][0] == calls[-1][1] == whole.considered


def test_it_stops_when_told(shelf: Shelf, monkeypatch) -> None:
    monkeypatch.setattr(ranking, "_BLOCK", 97)
    stopped = rank(shelf, "total", progress=lambda done, total: False)
    assert 0 < stopped.considered < rank(shelf, "total").considered


def test_ties_keep_the_order_of_the_shelf() -> None:
    whole = load_shelf()
    alkanes = whole.take(whole.where("dipole = 0 D and known(molar_volume)"))
    found = rank(alkanes, "coupling", top=30)
    assert (found.columns["coupling"] == 0).all()
    pairs = list(zip(found.a.tolist(), found.b.tolist(), strict=True))
    assert pairs == sorted(pairs)


def test_one_liquid_against_the_rest(shelf: Shelf) -> None:
    partner = shelf.row("acetone")
    found = rank(shelf, "interchange", partner=partner)
    assert set(found.a) == {partner}
    assert partner not in set(found.b)  # a like pair has no interchange energy
    assert partner in set(rank(shelf, "total", partner=partner).b)


def test_liquids_without_values_are_named(shelf: Shelf) -> None:
    found = rank(shelf, "total")
    for row in found.left_out:
        values = shelf.liquid(int(row)).values
        assert not {"dipole", "polarizability", "molar_volume"} <= set(values)
    assert set(found.left_out).isdisjoint(set(found.a) | set(found.b))


def test_refusals(shelf: Shelf) -> None:
    with pytest.raises(OutsideRange, match="one of total"):
        rank(shelf, "beauty")
    with pytest.raises(OutsideRange, match="1 or more"):
        rank(shelf, "total", top=0)
    with pytest.raises(UnknownLiquid):
        rank_pairs(shelf, with_liquid="nothing like it")


class TestFrame:
    """`rank_pairs`, the DataFrame."""

    def test_columns_and_attributes(self, shelf: Shelf) -> None:
        frame = rank_pairs(shelf, by="interchange", top=20, temperature="40 degC")
        assert len(frame) == 20
        assert frame["interchange_energy_kJ_mol"].is_monotonic_increasing
        assert {"a", "b", "coupling", "leading_order_error", "verdict"} <= set(frame)
        assert frame.attrs["temperature_K"] == pytest.approx(313.15)
        assert frame.attrs["descending"] is False

    def test_verdicts_are_those_of_the_pairs(self, shelf: Shelf) -> None:
        frame = rank_pairs(shelf, top=15)
        for row in frame.itertuples():
            assert row.verdict == interact(shelf[row.a_id], shelf[row.b_id]).verdict

    def test_a_filter_holds_for_both(self, shelf: Shelf) -> None:
        frame = rank_pairs(shelf, where="family = nitrile")
        families = {shelf[n].identity.family for n in {*frame["a"], *frame["b"]}}
        assert families == {"nitrile"}
