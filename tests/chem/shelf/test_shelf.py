"""The shelf: names lead to liquids, rows stay rows, broken tables say where."""

from pathlib import Path

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from stillroom.chem import Shelf, load_shelf
from stillroom.chem.data.errors import (
    AmbiguousLiquid,
    BadFile,
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


LIQUIDS = (
    "id,name,synonyms,cas,smiles,inchikey,formula,family,hbond_donor,hbond_acceptor,vapour_dimer,"
    "polar_groups,group_dipole_rss_D,flexible_polar_bonds,longest_path_bonds\n"
    "this,this,that,1-2-3,CC,,C2H6,alkane,none,none,no,0,0,0,1\n"
)
VALUES = (
    "id,quantity,value,unit,temperature_K,kind,source,uncertainty,preferred,note\n"
    "this,dipole,1.5,debye,,measured,x,0.1,1,\n"
    "this,density,800,kg/m**3,298.15,measured,x,1,1,\n"
)


@pytest.mark.parametrize(
    ("file", "old", "new", "told"),
    [
        ("values.csv", "dipole,1.5", "dipole,one", "values.csv, row 2, column value: 'one'"),
        ("values.csv", "dipole,", "dipol,", "row 2, column quantity: unknown quantity 'dipol'"),
        ("values.csv", "debye", "kg", "row 2, column unit: unit 'kg', expected 'debye'"),
        (
            "values.csv",
            "800,kg/m**3,298.15,measured",
            "800,kg/m**3,298.15,guessed",
            "row 3, column",
        ),
        ("values.csv", "0.1,1,", "0.1,1", "row 2: 9 cells, expected 10"),
        ("values.csv", "298.15", "warm", "row 3, column temperature_K: 'warm' is not a number"),
        ("values.csv", "0.1", "nan", "column uncertainty"),
        ("values.csv", "quantity,", "quality,", "row 1: has no column quantity"),
        ("liquids.csv", "no,0,0,0,1", "no,0,0,0,many", "column longest_path_bonds: 'many'"),
    ],
)
def test_a_broken_table_says_file_row_and_column(tmp_path: Path, file, old, new, told) -> None:
    content = {"liquids.csv": LIQUIDS, "values.csv": VALUES}
    for name, text in content.items():
        (tmp_path / name).write_text(text, encoding="utf-8")
    assert load_shelf(tmp_path)["that"].dipole is not None
    assert old in content[file]
    (tmp_path / file).write_text(content[file].replace(old, new, 1), encoding="utf-8")
    with pytest.raises(BadFile) as caught:
        load_shelf(tmp_path)
    assert told in str(caught.value)


def test_missing_and_unreadable_tables(tmp_path: Path) -> None:
    with pytest.raises(BadFile, match=r"liquids\.csv: not found"):
        load_shelf(tmp_path)
    (tmp_path / "liquids.csv").write_bytes(b"\xff\xfe\x00")
    with pytest.raises(BadFile, match=r"liquids\.csv: cannot be read"):
        load_shelf(tmp_path)
