"""One clear line and status 2 where the program cannot go on, from the shell's point of view."""

import os
import subprocess
import sys
from pathlib import Path

import pytest

COMMAND = [sys.executable, "-m", "stillroom.tui.cli"]


def run(*words: str, cwd: Path, stdout=subprocess.PIPE, **environment: str):
    return subprocess.run(
        [*COMMAND, *words],
        stdout=stdout,
        stderr=subprocess.PIPE,
        stdin=subprocess.DEVNULL,
        text=True,
        cwd=cwd,
        env={**os.environ, "STILLROOM_STORE": str(cwd / "store"), **environment},
    )


def complains(done, *told: str) -> None:
    assert done.returncode == 2
    assert len(done.stderr.splitlines()) == 1, done.stderr
    assert "Traceback" not in done.stderr
    for part in told:
        assert part in done.stderr


def test_no_terminal(tmp_path: Path) -> None:
    complains(run(cwd=tmp_path), "needs a terminal")


def test_a_damaged_store(tmp_path: Path) -> None:
    (tmp_path / "store").write_text("not a store " * 100, encoding="utf-8")
    before = (tmp_path / "store").read_bytes()
    complains(run("shortlist", "show", cwd=tmp_path), "damaged or not a store")
    complains(run("shortlist", "add", "acetone", cwd=tmp_path), "damaged or not a store")
    assert (tmp_path / "store").read_bytes() == before


def test_a_damaged_store_in_a_terminal(start, tmp_path: Path) -> None:
    (tmp_path / "store.sqlite3").write_text("not a store " * 100, encoding="utf-8")
    terminal = start()
    terminal.until(terminal.ended)
    terminal.read()
    assert terminal.process.returncode == 2
    assert "damaged or not a store" in " ".join(terminal.text.split())
    assert b"Traceback" not in terminal.output


def test_a_dumb_terminal(start) -> None:
    terminal = start(TERM="dumb")
    terminal.until(terminal.ended)
    terminal.read()
    assert terminal.process.returncode == 2
    assert "TERM=dumb" in terminal.text.replace("\n", "")


@pytest.mark.parametrize("where", ["/proc/none/store", "/dev/null/store", "."])
def test_a_store_that_cannot_be_written(tmp_path: Path, where: str) -> None:
    complains(run("--store", where, "shortlist", "add", "acetone", cwd=tmp_path), "cannot write")


def test_exports_that_cannot_be_written(tmp_path: Path) -> None:
    assert run("shortlist", "add", "acetone", cwd=tmp_path).returncode == 0
    for path in ("/proc/x.csv", "none/x.csv", ".", "/dev/full"):
        complains(run("shortlist", "export", path, cwd=tmp_path), "cannot write")
    assert run("shortlist", "export", "x.csv", cwd=tmp_path).returncode == 0
    before = (tmp_path / "x.csv").read_bytes()
    complains(run("shortlist", "export", "x.csv", cwd=tmp_path), "exists already")
    assert (tmp_path / "x.csv").read_bytes() == before


@pytest.mark.parametrize("words", [("list",), ("rank", "--format", "csv"), ("show", "acetone")])
def test_a_full_disk_behind_standard_output(tmp_path: Path, words) -> None:
    with Path("/dev/full").open("w", encoding="utf-8") as full:
        complains(run(*words, cwd=tmp_path, stdout=full), "No space left")


def test_a_reader_that_goes_away_is_no_error(tmp_path: Path) -> None:
    script = " ".join([*COMMAND, "rank", "--top", "5000", "--format", "csv", "|", "head", "-1"])
    done = subprocess.run(script, shell=True, capture_output=True, text=True, cwd=tmp_path)
    assert done.stdout.startswith("a,b,")
    assert "Error" not in done.stderr
    assert "Traceback" not in done.stderr
