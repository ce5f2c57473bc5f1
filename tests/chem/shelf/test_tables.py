"""Reading tables: what is there arrives, and a broken cell is named by file, row and column."""

import csv
from pathlib import Path

import pytest
from hypothesis import HealthCheck, given, settings
from hypothesis import strategies as st

from stillroom.chem import Shelf, load_shelf
from stillroom.chem.data.constants import DEBYE
from stillroom.chem.data.errors import BadFile, StillroomError


class TestWhole:
    """The small tables, unbroken."""

    def test_identities_and_structure(self, mini: Shelf) -> None:
        who = mini["acetic acid"].identity
        assert (who.id, who.cas, who.formula) == ("acetic-acid", "64-19-7", "C2H4O2")
        assert who.structure.hbond_donor == "strong"
        assert who.structure.vapour_dimer is True
        assert who.structure.group_dipole_rss == pytest.approx(1.7 * DEBYE)
        assert mini["water"].identity.structure.vapour_dimer is False
        assert mini["acetone"].identity.synonyms == ("propanone", "dimethyl ketone")

    def test_blank_cells_are_unknown_and_never_zero(self, mini: Shelf) -> None:
        blank = mini["mystery"]
        structure = blank.identity.structure
        assert structure.hbond_donor is None
        assert structure.vapour_dimer is None
        assert structure.polar_groups is None
        assert structure.group_dipole_rss is None
        assert not blank.values
        assert mini["alpha-pinene"].ionization_energy is None

    def test_the_preferred_value_is_the_one_on_the_shelf(self, mini: Shelf) -> None:
        dipole = mini["acetone"].need("dipole")
        assert (dipole.number, dipole.kind) == (pytest.approx(2.88), "measured")
        every = [r.value.number for r in mini.records("acetone") if r.value.quantity == "dipole"]
        assert every == [2.88, 2.7]
        assert mini.records("nothing") == ()

    def test_hazards_and_sources(self, mini: Shelf) -> None:
        assert [h.hazard for h in mini.hazards["chloroform"]] == ["carcinogen", "toxic"]
        assert "water" not in mini.hazards
        assert mini.sources["book"].full == "A Handbook 2000"

    def test_the_version_follows_the_numbers_and_not_the_place(self, folder: Path) -> None:
        one = load_shelf(folder)
        edit(folder, "sources.csv", "A Handbook", "Another")
        assert load_shelf(folder).data_version == one.data_version
        edit(folder, "values.csv", "2.88", "2.89")
        assert load_shelf(folder).data_version != one.data_version

    def test_a_byte_order_mark_and_either_line_end_are_fine(self, folder: Path) -> None:
        for name in ("liquids.csv", "values.csv"):
            content = (folder / name).read_bytes().replace(b"\r\n", b"\n")
            (folder / name).write_bytes(b"\xef\xbb\xbf" + content)
        assert load_shelf(folder)["acetone"].dipole is not None

    def test_unsafe_text_in_any_cell_is_cleaned(self, folder: Path) -> None:
        edit(folder, "liquids.csv", "Mystery Blend", "Mystery\x1b[31m Blend\u202e")
        edit(folder, "values.csv", "book,0.3,0,not preferred", "bo\x07ok,0.3,0,not\x9b2J")
        edit(folder, "sources.csv", "A Handbook,2000", "A\x1b]52;c;x\x07,20\x0800")
        edit(folder, "hazards.csv", "highly flammable", "highly\x1b[0m flammable")
        shelf = load_shelf(folder)
        texts = [shelf["mystery"].name, shelf.hazards["acetone"][0].hazard]
        texts += [shelf.sources["book"].full]
        for record in shelf.records("acetone"):
            texts += [record.value.source, record.value.note]
        assert "bo ok" in texts
        assert all(text.isprintable() for text in texts)


def edit(folder: Path, name: str, old: str, new: str) -> None:
    path = folder / name
    with path.open(encoding="utf-8", newline="") as file:
        text = file.read()
    assert old in text
    with path.open("w", encoding="utf-8", newline="") as file:
        file.write(text.replace(old, new, 1))


V = "values.csv"
L = "liquids.csv"
BROKEN = [
    (V, "dipole,2.88", "dipole,big", "values.csv, row 2, column value: 'big' is not a number"),
    (V, "dipole,2.88", "dipole,", "row 2, column value: '' is not a number"),
    (V, "dipole,2.88", "dipole,nan", "row 2, column value: 'nan' is not a number"),
    (V, "dipole,2.88", "dipole,1e400", "row 2, column value: '1e400' is not a number"),
    (V, "dipole,2.88", "dipole,28.8", "row 2, column value: dipole 28.8, expected 0 to 15 D"),
    (V, "784.5", "0", "row 6, column value: density 0, expected 300 to 5000 kg/m³"),
    (V, "dipole,", "dipol,", "row 2, column quantity: unknown quantity 'dipol'"),
    (V, "debye", "kg", "row 2, column unit: unit 'kg', expected 'debye'"),
    (V, "debye,,measured", "debye,,guessed", "row 2, column kind: kind 'guessed', expected measu"),
    (V, "measured,book,0.1", "measured,book,much", "column uncertainty: 'much' is not a number"),
    (V, "measured,book,0.1", "measured,book,-0.1", "column uncertainty: '-0.1' is negative"),
    (V, "298.15", "warm", "row 6, column temperature_K: 'warm' is not a number"),
    (V, "298.15", "-298.15", "row 6, column temperature_K: '-298.15' is negative"),
    (V, "0.1,1,", "0.1,1", "row 2: 9 cells, expected 10"),
    (V, "0.1,1,", "0.1,1,,", "row 2: 11 cells, expected 10"),
    (V, "0.1,1,", "0.1,yes,", "row 2, column preferred: 'yes', expected 0 or 1"),
    (V, "book,0.3,0", "book,0.3,1", "column preferred: a second preferred dipole"),
    (V, "acetone,", "acetonne,", "row 2, column id: no liquid 'acetonne' in liquids.csv"),
    (V, "quantity,", "quality,", "values.csv, row 1: has no column quantity"),
    (L, "strong,no,1,2.7,0,2", "strong,no,1,2.7,0,many", "column longest_path_bonds: 'many'"),
    (L, "strong,no,1,2.7", "strong,no,1.5,2.7", "column polar_groups: '1.5' is not a count"),
    (L, "strong,no,1,2.7", "strong,no,-1,2.7", "column polar_groups: '-1' is not a count"),
    (L, "strong,no,1,2.7", "strong,no,1,x", "column group_dipole_rss_D: 'x' is not a number"),
    (L, "none,strong,no", "none,huge,no", "column hbond_acceptor: 'huge', expected none, weak, st"),
    (L, "none,strong,no", "some,strong,no", "row 2, column hbond_donor: 'some', expected none"),
    (L, "none,strong,no", "none,strong,maybe", "column vapour_dimer: 'maybe', expected yes, no"),
    (L, "propanal,propanal", "acetone,propanal", "row 3, column id: 'acetone' is there twice"),
    (L, "propanal,propanal", ",propanal", "row 3, column id: is empty"),
    (L, "propanal,propanal", "propanal,\x1b", "row 3, column name: is empty"),
    (L, "id,name", "id,title", "liquids.csv, row 1: has no column name"),
]


@pytest.mark.parametrize(("file", "old", "new", "told"), BROKEN, ids=[b[3] for b in BROKEN])
def test_a_broken_cell_says_file_row_and_column(folder: Path, file, old, new, told) -> None:
    edit(folder, file, old, new)
    with pytest.raises(BadFile) as caught:
        load_shelf(folder)
    assert told in str(caught.value)
    assert str(caught.value).startswith(file)


def test_a_value_that_is_not_preferred_is_checked_when_it_is_asked_for(folder: Path) -> None:
    edit(folder, V, "2.7,debye,,computed", "2.7,debye,,guessed")
    shelf = load_shelf(folder)
    assert shelf.records("water")
    with pytest.raises(BadFile, match="column kind"):
        shelf.records("acetone")


@pytest.mark.parametrize("name", ["liquids.csv", "values.csv", "sources.csv", "hazards.csv"])
class TestWholeFiles:
    """A file that is missing, binary, cut or no table at all."""

    @staticmethod
    def read(folder: Path) -> None:
        shelf = load_shelf(folder)
        assert shelf.sources is not None
        assert shelf.hazards is not None

    def test_missing(self, folder: Path, name: str) -> None:
        (folder / name).unlink()
        with pytest.raises(BadFile, match=f"{name}: not found"):
            self.read(folder)

    def test_a_folder_in_its_place(self, folder: Path, name: str) -> None:
        (folder / name).unlink()
        (folder / name).mkdir()
        with pytest.raises(BadFile, match=f"{name}: cannot be read"):
            self.read(folder)

    @pytest.mark.parametrize("content", [b"\xff\xfe\x00", b"id\n\xe9\n"])
    def test_not_utf_8(self, folder: Path, name: str, content: bytes) -> None:
        (folder / name).write_bytes(content)
        with pytest.raises(BadFile, match=f"{name}: cannot be read"):
            self.read(folder)

    @pytest.mark.parametrize("content", [b"", b"\n", b"PK\x03\x04 is a zip"])
    def test_no_table(self, folder: Path, name: str, content: bytes) -> None:
        (folder / name).write_bytes(content)
        with pytest.raises(BadFile, match=f"{name}, row 1: has no column"):
            self.read(folder)

    def test_a_cell_beyond_what_the_csv_reader_takes(self, folder: Path, name: str) -> None:
        with (folder / name).open("a", encoding="utf-8") as file:
            file.write("x" * (csv.field_size_limit() + 1))
        with pytest.raises(BadFile, match="is not CSV"):
            self.read(folder)


@settings(suppress_health_check=[HealthCheck.function_scoped_fixture], max_examples=60)
@given(st.integers(0, 10**6), st.binary(min_size=1, max_size=3), st.sampled_from([V, L]))
def test_any_damage_is_read_or_told(folder: Path, place: int, noise: bytes, name: str) -> None:
    whole = (folder / name).read_bytes()
    at = place % len(whole)
    try:
        (folder / name).write_bytes(whole[:at] + noise + whole[at + len(noise) :])
        for liquid in load_shelf(folder):
            assert liquid.name.isprintable()
    except StillroomError as problem:
        assert name in str(problem)
    finally:
        (folder / name).write_bytes(whole)
