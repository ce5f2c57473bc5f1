"""The store: durable at every moment, shared between programs, never damaged by us."""

import os
import signal
import sqlite3
import subprocess
import sys
import textwrap
from pathlib import Path

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from stillroom.chem.choosing import store as store_module
from stillroom.chem.choosing.locations import store_path
from stillroom.chem.choosing.shortlist import Entry
from stillroom.chem.choosing.store import Store
from stillroom.chem.data.errors import (
    BadNumber,
    CannotWrite,
    StoreBusy,
    StoreDamaged,
    UnknownShortlist,
)


@pytest.fixture
def path(tmp_path: Path) -> Path:
    return tmp_path / "deep" / "store.sqlite3"


class TestKeeping:
    """What is put in comes out again, also by another program."""

    def test_entries_keep_their_order_and_notes(self, path: Path) -> None:
        with Store.open(path) as store:
            assert store.add("mine", Entry("water", note="cheap"))
            assert store.add("mine", Entry.pair("water", "acetone"))
            store.set_note("mine", Entry("water"), "very cheap")
        with Store.open(path) as store:
            assert store.entries("mine") == [
                Entry("water", note="very cheap"),
                Entry("acetone", "water"),
            ]
            assert store.shortlists() == ["mine"]

    def test_adding_twice_says_so_and_keeps_the_note(self, path: Path) -> None:
        with Store.open(path) as store:
            assert store.add("mine", Entry("water", note="first"))
            assert not store.add("mine", Entry("water", note="second"))
            assert store.entries("mine")[0].note == "first"

    def test_a_pair_is_unordered(self, path: Path) -> None:
        with Store.open(path) as store:
            store.add("mine", Entry.pair("water", "acetone"))
            assert not store.add("mine", Entry.pair("acetone", "water"))

    def test_removed_entry_can_come_back_where_it_was(self, path: Path) -> None:
        with Store.open(path) as store:
            for name in "abc":
                store.add("mine", Entry(name))
            place = store.remove("mine", Entry("b"))
            store.add("mine", Entry("b"), place)
            assert [e.a for e in store.entries("mine")] == ["a", "b", "c"]

    def test_moving_stops_at_the_ends(self, path: Path) -> None:
        with Store.open(path) as store:
            for name in "abc":
                store.add("mine", Entry(name))
            store.move("mine", Entry("a"), 1)
            store.move("mine", Entry("c"), 9)
            store.move("mine", Entry("b"), -9)
            assert [e.a for e in store.entries("mine")] == ["b", "a", "c"]

    def test_settings_hold_anything_json_can(self, path: Path) -> None:
        with Store.open(path) as store:
            store.set_setting("view", {"columns": ["dipole"], "temperature": 298.15})
            store.set_setting("view", {"columns": []})
            assert store.get_setting("view") == {"columns": []}
            assert store.get_setting("other") is None

    @settings(max_examples=30, deadline=None)
    @given(note=st.text(max_size=80))
    def test_notes_come_back_printable(self, tmp_path_factory, note: str) -> None:
        with Store.open(tmp_path_factory.mktemp("s") / "s") as store:
            store.add("mine", Entry("water", note=note))
            kept = store.entries("mine")[0].note
        assert kept.isprintable()
        if note.isprintable():
            assert kept == " ".join(note.split())


class TestRefusing:
    """One clear error for each thing that cannot be done."""

    def test_unknown_names(self, path: Path) -> None:
        with Store.open(path) as store:
            with pytest.raises(UnknownShortlist, match="no shortlist called 'nope'"):
                store.entries("nope")
            with pytest.raises(UnknownShortlist, match="'water' is not on shortlist"):
                store.remove("shortlist", Entry("water"))
            with pytest.raises(UnknownShortlist):
                store.delete("nope")
            with pytest.raises(BadNumber, match="visible character"):
                store.create("\x1b")

    @pytest.mark.parametrize(
        "content", [b"not a database at all" * 99, b"SQLite format 3\0" + b"x" * 4096]
    )
    def test_a_foreign_file_is_left_as_it_was(self, tmp_path: Path, content: bytes) -> None:
        file = tmp_path / "file"
        file.write_bytes(content)
        with pytest.raises(StoreDamaged, match="it was left as it is"):
            Store.open(file)
        assert file.read_bytes() == content

    def test_another_programs_database_is_left_alone(self, tmp_path: Path) -> None:
        file = tmp_path / "other.sqlite3"
        with sqlite3.connect(file) as other:
            other.execute("CREATE TABLE theirs (x)")
        before = file.read_bytes()
        with pytest.raises(StoreDamaged, match="another program"):
            Store.open(file)
        assert file.read_bytes() == before

    def test_a_broken_page_is_noticed(self, path: Path) -> None:
        with Store.open(path) as store:
            for i in range(200):
                store.add("mine", Entry(f"liquid-{i}", note="x" * 300))
        content = bytearray(path.read_bytes())
        content[5000:9000] = os.urandom(4000)
        path.write_bytes(content)
        with pytest.raises(StoreDamaged), Store.open(path) as store:
            store.entries("mine")

    def test_a_newer_layout_is_not_touched(self, path: Path) -> None:
        Store.open(path).close()
        with sqlite3.connect(path) as raw:
            raw.execute(f"PRAGMA user_version = {store_module.VERSION + 1}")
        with pytest.raises(StoreDamaged, match="newer"):
            Store.open(path)

    def test_a_place_that_cannot_be_written(self, tmp_path: Path) -> None:
        (tmp_path / "file").write_text("")
        with pytest.raises(CannotWrite):
            Store.open(tmp_path / "file" / "store")
        with pytest.raises(CannotWrite, match="folder"):
            Store.open(tmp_path)

    def test_a_full_disk_loses_nothing(self, path: Path) -> None:
        with Store.open(path) as store:
            store.add("mine", Entry("water"))
            # SQLite's own limit stands in for the disk: the same error, SQLITE_FULL.
            store._connection.execute("PRAGMA max_page_count = 1")
            with pytest.raises(CannotWrite, match="full"):
                store.set_setting("large", "x" * 100_000)
        with Store.open(path) as store:
            assert store.entries("mine")[0] == Entry("water")

    def test_a_store_held_by_another_program(self, path: Path, monkeypatch) -> None:
        monkeypatch.setattr(store_module, "BUSY_SECONDS", 0.05)
        with Store.open(path) as store:
            other = sqlite3.connect(path, isolation_level=None)
            other.execute("BEGIN EXCLUSIVE")
            with pytest.raises(StoreBusy, match="in use"):
                store.add("mine", Entry("water"))
            other.execute("ROLLBACK")
            other.close()
            assert store.add("mine", Entry("water"))


WRITER = textwrap.dedent(
    """
    import sys
    from pathlib import Path
    from stillroom.chem.choosing.shortlist import Entry
    from stillroom.chem.choosing.store import Store
    with Store.open(Path(sys.argv[1])) as store:
        for i in range(int(sys.argv[3])):
            store.add("mine", Entry(f"{sys.argv[2]}-{i}"))
            print(i, flush=True)
    """
)


def start(path: Path, name: str, count: int) -> "subprocess.Popen[str]":
    command = [sys.executable, "-c", WRITER, str(path), name, str(count)]
    return subprocess.Popen(command, stdout=subprocess.PIPE, text=True)


def test_killed_while_writing_it_keeps_everything_it_had_promised(path: Path) -> None:
    for round_ in range(3):
        writer = start(path, f"round{round_}", 100_000)
        assert writer.stdout is not None
        told = -1
        while told < 20:
            told = int(writer.stdout.readline())
        os.kill(writer.pid, signal.SIGKILL)
        rest = writer.stdout.read().split()
        writer.wait()
        told = max([told, *map(int, rest)])
        with Store.open(path) as store:
            kept = {e.a for e in store.entries("mine")}
        assert {f"round{round_}-{i}" for i in range(told + 1)} <= kept


def test_two_programs_write_to_one_store(path: Path) -> None:
    Store.open(path).close()
    writers = [start(path, name, 40) for name in ("left", "right")]
    for writer in writers:
        writer.communicate()
        assert writer.returncode == 0
    with Store.open(path) as store:
        kept = [e.a for e in store.entries("mine")]
    assert len(kept) == 80
    assert len(set(kept)) == 80


def test_the_place_of_the_store(monkeypatch, tmp_path: Path) -> None:
    monkeypatch.delenv("STILLROOM_STORE", raising=False)
    assert "stillroom" in str(store_path())
    monkeypatch.setenv("STILLROOM_STORE", str(tmp_path / "env"))
    assert store_path() == tmp_path / "env"
    assert store_path(tmp_path / "given") == tmp_path / "given"
