"""Exported files: standard CSV, a package that explains it, safe in a spreadsheet, reopened."""

import csv
import hashlib
import json
from pathlib import Path

import pandas as pd
import pytest
from hypothesis import given
from hypothesis import strategies as st

from stillroom.chem import Shelf, interact, load_shelf
from stillroom.chem.choosing import atomic
from stillroom.chem.choosing.cells import neutral, original
from stillroom.chem.choosing.export import export_csv, package_path
from stillroom.chem.choosing.reopen import reopen
from stillroom.chem.choosing.shortlist import Entry
from stillroom.chem.data.errors import BadFile, CannotWrite

ENTRIES = [
    Entry("acetone", note='=SUM(A1), "quoted", ünïcode'),
    Entry("hexane"),
    Entry.pair("water", "acetone", "-1 watch the azeotrope"),
]


@pytest.fixture(scope="module")
def shelf() -> Shelf:
    return load_shelf()


@pytest.fixture
def exported(shelf: Shelf, tmp_path: Path) -> Path:
    return export_csv(ENTRIES, shelf, tmp_path / "list.csv")[0]


class TestFile:
    """The CSV by itself."""

    def test_rfc_4180_layout(self, exported: Path) -> None:
        raw = exported.read_bytes()
        lines = raw.split(b"\r\n")
        assert raw.endswith(b"\r\n")
        assert b"\n" not in raw.replace(b"\r\n", b"")
        assert not lines[0].startswith(b"#")
        with exported.open(newline="", encoding="utf-8") as file:
            rows = list(csv.reader(file, strict=True))
        assert len({len(r) for r in rows}) == 1
        assert len(rows) == 1 + len(ENTRIES)

    def test_numbers_are_those_of_the_core(self, exported: Path, shelf: Shelf) -> None:
        table = pd.read_csv(exported)
        acetone = table[(table.entry == "liquid") & (table.id == "acetone")].iloc[0]
        dipole = shelf["acetone"].dipole
        assert dipole is not None
        assert acetone["dipole_D"] == pytest.approx(float(dipole.to("debye")))
        assert acetone["dipole_uncertainty_D"] == pytest.approx(dipole.uncertainty)
        assert acetone["dipole_source"] == dipole.source
        pair = table[table.entry == "pair"].iloc[0]
        expected = interact(shelf["acetone"], shelf["water"]).to_dict()
        assert pair["total_energy_kJ_mol"] == pytest.approx(expected["total"]["energy_kJ_mol"])
        assert pair["orientation_share"] == pytest.approx(expected["share"]["orientation"])
        assert pair["verdict"] == expected["verdict"]

    def test_no_text_cell_is_run_by_a_spreadsheet(self, exported: Path) -> None:
        with exported.open(newline="", encoding="utf-8") as file:
            for row in csv.reader(file):
                for cell in row:
                    if cell[:1] in ("=", "+", "-", "@"):
                        float(cell)  # only numbers may begin so

    @given(st.text())
    def test_neutralised_text_comes_back(self, text: str) -> None:
        cell = neutral(text)
        assert not cell.startswith(("=", "+", "-", "@", "\t", "\r"))
        assert original(cell) == text


class TestPackage:
    """The Frictionless data package beside it (https://datapackage.org, version 1)."""

    def test_describes_every_column_and_matches_the_file(self, exported: Path) -> None:
        package = json.loads(package_path(exported).read_text(encoding="utf-8"))
        (resource,) = package["resources"]
        content = exported.read_bytes()
        assert resource["path"] == "list.csv"
        assert resource["bytes"] == len(content)
        assert resource["hash"] == f"sha256:{hashlib.sha256(content).hexdigest()}"
        header = content.decode().splitlines()[0].split(",")
        assert [f["name"] for f in resource["schema"]["fields"]] == header
        for field in resource["schema"]["fields"]:
            assert field["type"] in ("string", "number")
            assert field["description"]
            assert field["unit"] or field["type"] == "string"

    def test_cites_every_source_it_uses(self, exported: Path) -> None:
        package = json.loads(package_path(exported).read_text(encoding="utf-8"))
        cited = " ".join(s["title"] for s in package["sources"])
        table = pd.read_csv(exported)
        for column in (c for c in table if c.endswith("_source")):
            for key in table[column].dropna():
                assert key.startswith("from ") or f"{key}: " in cited

    def test_settings_are_in_it(self, shelf: Shelf, tmp_path: Path) -> None:
        path, package = export_csv(ENTRIES, shelf.at("40 degC"), tmp_path / "warm.csv")
        settings = json.loads(package.read_text(encoding="utf-8"))["stillroom"]
        assert settings["temperature_K"] == pytest.approx(313.15)
        assert settings["data"] == shelf.data_version
        assert reopen(path, shelf).temperature == pytest.approx(313.15)


class TestRefusing:
    """A file that cannot be written leaves what was there."""

    def test_an_existing_file_is_kept(self, exported: Path, shelf: Shelf) -> None:
        before = exported.read_bytes()
        with pytest.raises(CannotWrite, match="exists already"):
            export_csv(ENTRIES[:1], shelf, exported)
        assert exported.read_bytes() == before
        export_csv(ENTRIES[:1], shelf, exported, overwrite=True)
        assert exported.read_bytes() != before

    def test_a_full_disk_keeps_the_old_files(
        self, exported: Path, shelf: Shelf, monkeypatch
    ) -> None:
        before = exported.read_bytes()

        def full(_: int) -> None:
            raise OSError(28, "No space left on device")

        monkeypatch.setattr(atomic.os, "fsync", full)
        with pytest.raises(CannotWrite, match="No space left"):
            export_csv(ENTRIES, shelf, exported, overwrite=True)
        assert exported.read_bytes() == before
        assert {p.name for p in exported.parent.iterdir()} == {"list.csv", "list.datapackage.json"}

    def test_places_that_take_no_file(self, shelf: Shelf, tmp_path: Path) -> None:
        for path in (tmp_path, tmp_path / "none" / "x.csv", Path("/proc/x.csv")):
            with pytest.raises(CannotWrite):
                export_csv(ENTRIES, shelf, path)
        with pytest.raises(CannotWrite, match="empty"):
            export_csv([], shelf, tmp_path / "empty.csv")


class TestReopening:
    """A colleague opens the file."""

    @pytest.mark.parametrize("which", [lambda p: p, package_path])
    def test_entries_and_notes_come_back(self, exported: Path, shelf: Shelf, which) -> None:
        found = reopen(which(exported), shelf)
        assert list(found.entries) == ENTRIES
        assert found.changes == ()

    def test_an_edited_number_is_told(self, exported: Path, shelf: Shelf) -> None:
        text = exported.read_bytes().decode()
        exported.write_bytes(text.replace("ketone", "keton").encode())
        changes = reopen(exported, shelf).changes
        assert any("edited" in c for c in changes)
        assert any("acetone: family was keton, is ketone" in c for c in changes)

    def test_a_liquid_that_has_left_the_shelf_is_told_and_kept(self, exported, shelf) -> None:
        smaller = shelf.take(shelf.where("not name = n-hexane"))
        found = reopen(exported, smaller)
        assert Entry("hexane") in found.entries
        assert any("hexane: no longer on the shelf" in c for c in found.changes)

    @pytest.mark.parametrize(
        ("change", "told"),
        [
            (lambda t: t.replace("entry,id", "entry,key"), "no column id"),
            (lambda t: t.replace("liquid,acetone", "fluid,acetone"), "row 2, column entry"),
            (lambda t: t.replace("liquid,acetone", "liquid,"), "row 2, column id"),
            (lambda t: t.replace("pair,acetone,water", "pair,acetone,"), "column partner_id"),
            (lambda t: t + "short,row\r\n", "row 5: 2 cells"),
            (lambda t: "", "no column"),
            (lambda t: 'a,"b\r\n', "not a UTF-8 CSV"),
        ],
    )
    def test_a_broken_file_says_where(self, exported: Path, shelf: Shelf, change, told) -> None:
        exported.write_bytes(change(exported.read_bytes().decode()).encode())
        with pytest.raises(BadFile, match=told):
            reopen(exported, shelf)

    def test_missing_files(self, exported: Path, shelf: Shelf, tmp_path: Path) -> None:
        with pytest.raises(BadFile, match=r"nothing\.csv"):
            reopen(tmp_path / "nothing.csv", shelf)
        package_path(exported).write_text("{}", encoding="utf-8")
        with pytest.raises(BadFile, match="not the data package"):
            reopen(exported, shelf)
