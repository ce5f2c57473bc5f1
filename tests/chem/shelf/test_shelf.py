"""The shelf: names lead to liquids, rows stay rows, every number leads to a citation."""

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from stillroom.chem import Shelf, load_shelf
from stillroom.chem.data.errors import (
    AmbiguousLiquid,
    StillroomError,
    UnknownLiquid,
    UnknownQuantity,
)
from stillroom.chem.shelf.cautions import caution_line

SHELF = load_shelf()


@pytest.fixture(scope="module")
def shelf() -> Shelf:
    return SHELF


class TestNames:
    """Whatever a chemist types."""

    @pytest.mark.parametrize(
        ("typed", "name"),
        [
            ("acetone", "acetone"),
            ("  Acetone ", "acetone"),
            ("67-64-1", "acetone"),
            ("CC(C)=O", "acetone"),
            ("propanone", "acetone"),
            ("MEK", "2-butanone"),
            ("THF", "tetrahydrofuran"),
            ("dmso", "dimethyl sulfoxide"),
            ("DMF", "N,N-dimethylformamide"),
            ("n,n dimethyl formamide", "N,N-dimethylformamide"),
            ("n-hexane", "hexane"),
            ("H2O", "water"),
            ("IPA", "2-propanol"),
        ],
    )
    def test_lead_to_the_liquid(self, shelf: Shelf, typed: str, name: str) -> None:
        assert shelf[typed].name == name
        assert typed in shelf

    def test_every_name_leads_to_its_own_liquid(self, shelf: Shelf) -> None:
        for row, who in enumerate(shelf.identities):
            for text in (who.id, who.name, who.cas, who.inchikey, *who.synonyms):
                if text:
                    assert shelf.row(text) == row, text

    def test_a_near_miss_is_suggested(self, shelf: Shelf) -> None:
        with pytest.raises(UnknownLiquid, match="did you mean acetonitrile") as caught:
            _ = shelf["acetonitrle"]
        assert "acetonitrile" in caught.value.suggestions

    def test_a_formula_of_several_liquids_is_not_guessed(self, shelf: Shelf) -> None:
        with pytest.raises(AmbiguousLiquid, match="fits") as caught:
            _ = shelf["C3H6O"]
        assert len(caught.value.candidates) > 1

    @given(st.text(max_size=40))
    def test_any_text_finds_or_complains(self, text: str) -> None:
        try:
            assert SHELF.row(text) < len(SHELF)
        except StillroomError as problem:
            assert str(problem).isprintable()

    def test_search_puts_the_best_first(self, shelf: Shelf) -> None:
        found = [shelf.identities[r].name for r in shelf.matching("acetone")]
        assert found[0] == "acetone"
        assert "diacetone alcohol" in found


class TestRows:
    """Rows keep their number."""

    def test_at_every_temperature(self, shelf: Shelf) -> None:
        warm = shelf.at("40 degC")
        assert warm.identities == shelf.identities
        assert warm.temperature == pytest.approx(313.15)
        assert warm.liquid(5).at(298.15).values == shelf.liquid(5).values

    def test_order_sorts_and_puts_missing_last(self, shelf: Shelf) -> None:
        for descending in (False, True):
            column = shelf.columns["ionization_energy"].si
            values = column[shelf.order("ionization_energy", descending=descending)]
            known = values[~np.isnan(values)]
            assert np.isnan(values[known.size :]).all()
            steps = np.diff(known)
            assert (steps <= 0).all() if descending else (steps >= 0).all()
            assert sorted(shelf.order("name", descending=descending)) == list(range(len(shelf)))
        with pytest.raises(UnknownQuantity):
            shelf.order("colour")

    def test_order_of_texts_puts_blanks_last_and_ties_by_name(self, mini: Shelf) -> None:
        def names(field: str, descending: bool) -> list[str]:
            return [mini.identities[r].name for r in mini.order(field, descending=descending)]

        by_formula = ["alpha-pinene", "acetic acid", "ethanol", "acetone", "propanal"]
        assert names("formula", False)[:5] == by_formula
        assert names("formula", True)[-6:-1] == [
            "acetone", "propanal", "ethanol", "acetic acid", "alpha-pinene",
        ]  # fmt: skip
        for descending in (False, True):
            assert names("formula", descending)[-1] == "Mystery Blend"
            blank = names("hazard", descending)[2:]
            assert blank == sorted(blank, key=str.casefold)

    def test_order_of_numbers_puts_ties_by_name_in_both_directions(self, mini: Shelf) -> None:
        for descending in (False, True):
            order = mini.order("molar_mass", descending=descending)
            found = [mini.identities[r].name for r in order]
            assert found.index("propanal") == found.index("acetone") + 1  # one formula
            assert found[-1] == "Mystery Blend"

    def test_a_smaller_shelf_keeps_the_values(self, shelf: Shelf) -> None:
        rows = shelf.where("family = nitrile")
        small = shelf.take(rows)
        assert [x.name for x in small] == [shelf.identities[r].name for r in rows]
        assert small["acetonitrile"].values == shelf["acetonitrile"].values

    def test_every_number_leads_to_a_citation(self, shelf: Shelf) -> None:
        for who in shelf.identities:
            for record in shelf.records(who.id):
                assert record.value.source in shelf.sources
            for hazard in shelf.hazards.get(who.id, ()):
                assert hazard.source in shelf.sources

    def test_exactly_one_preferred_value_a_quantity(self, shelf: Shelf) -> None:
        for who in shelf.identities:
            preferred = [r.value.quantity for r in shelf.records(who.id) if r.preferred]
            assert len(preferred) == len(set(preferred))


def test_the_caution_line_never_calls_anything_safe(shelf: Shelf) -> None:
    assert "not known here, never safe" in caution_line(())
    for who in shelf.identities:
        assert "safety data sheet" in caution_line(shelf.hazards.get(who.id, ()))
