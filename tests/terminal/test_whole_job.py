"""The main job from the first key to the file, in a real pseudo-terminal."""

import csv
import os
import signal
from pathlib import Path

import pandas as pd
import pytest

from stillroom.chem import interact, load_shelf
from stillroom.chem.choosing.shortlist import Entry
from stillroom.chem.choosing.store import Store


def filter_to(terminal, text: str) -> None:
    terminal.send("/")
    terminal.fill("filter", text)


def test_browse_rank_keep_note_and_export(start, tmp_path: Path) -> None:
    terminal = start()
    terminal.until_text("shelf", "liquids", "q quit")
    filter_to(terminal, "acetone")
    terminal.until_text("filter: acetone", "like pair")
    terminal.send("a")
    terminal.until_text("acetone put on shortlist")
    terminal.send("p")
    terminal.until_text("acetone with the rest", "at contact")
    terminal.send("k")
    terminal.until_text("Rank by")
    terminal.send("interchange")
    terminal.until(lambda: "type to narrow" not in terminal.text)
    terminal.send("\r")
    terminal.until_text("by interchange, smallest")
    terminal.send("\x1b[B")  # down
    terminal.send("\r")
    terminal.until_text("verdict on the freely rotating average", "contact")
    terminal.send("a")
    terminal.until_text("put on shortlist")
    terminal.send("3")
    terminal.until_text("2 entries")
    terminal.send("n")
    terminal.fill("note", "=keep me dry")
    terminal.until_text("note: =keep me dry")
    terminal.send("e")
    terminal.fill("export to", "list.csv")
    terminal.until_text("exported to list.csv")
    terminal.send("q")
    terminal.until(terminal.ended)
    assert terminal.process.returncode == 0
    assert b"Traceback" not in terminal.output

    with (tmp_path / "list.csv").open(newline="", encoding="utf-8") as file:
        rows = list(csv.DictReader(file))
    assert [r["entry"] for r in rows] == ["liquid", "pair"]
    assert rows[0]["note"] == "'=keep me dry"
    shelf = load_shelf()
    table = pd.read_csv(tmp_path / "list.csv")
    dipole = shelf["acetone"].dipole
    assert dipole is not None
    assert table["dipole_D"][0] == pytest.approx(dipole.number)
    assert table["dipole_source"][0] == dipole.source
    expected = interact(shelf[rows[1]["id"]], shelf[rows[1]["partner_id"]])
    assert table["total_energy_kJ_mol"][1] == pytest.approx(float(expected.terms.total) / 1e3)
    assert table["verdict"][1] == expected.verdict


def test_killed_in_the_middle_it_comes_back_with_everything(start, tmp_path: Path) -> None:
    terminal = start()
    terminal.until_text("liquids")
    filter_to(terminal, "dimethyl sulfoxide")
    terminal.until_text("filter: dimethyl sulfoxide")
    terminal.send("a")
    terminal.until_text("put on shortlist")
    terminal.send("t")
    terminal.fill("temperature", "40 degC")
    terminal.until_text("40 °C")
    os.kill(terminal.process.pid, signal.SIGKILL)
    terminal.process.wait()

    with Store.open(tmp_path / "store.sqlite3") as store:
        assert store.entries() == [Entry("dimethyl-sulfoxide")]
    again = start()
    again.until_text("filter: dimethyl sulfoxide", "40 °C")


def test_two_programs_on_one_store(start) -> None:
    one, two = start(), start()
    for terminal, name in ((one, "acetone"), (two, "ethanol")):
        terminal.until_text("liquids")
        filter_to(terminal, name)
        terminal.until_text(f"filter: {name}")
        terminal.send("a")
        terminal.until_text("put on shortlist")
    for terminal in (one, two):
        terminal.send("3")
        terminal.until_text("acetone", "ethanol", "2 entries")


@pytest.mark.parametrize("number", [signal.SIGTERM, signal.SIGHUP])
def test_ends_in_good_order_on_a_signal(start, number) -> None:
    terminal = start()
    terminal.until_text("liquids")
    os.kill(terminal.process.pid, number)
    terminal.until(terminal.ended)
    terminal.read()
    assert terminal.process.returncode == 128 + number
    # xterm: leave the alternate screen, show the cursor.
    assert b"\x1b[?1049l" in terminal.output
    assert b"\x1b[?25h" in terminal.output
    assert b"Traceback" not in terminal.output


@pytest.mark.parametrize(
    "environment",
    [{"NO_COLOR": "1"}, {"TERM": "xterm"}, {"TERM": "xterm-16color"}, {"TERM": "vt100"}],
)
def test_plain_terminals(start, environment) -> None:
    terminal = start(**environment)
    terminal.until_text("shelf", "liquids", "> ")
    filter_to(terminal, "acetone")
    terminal.until_text("! strained")
    terminal.send("q")
    terminal.until(terminal.ended)
    assert terminal.process.returncode == 0


@pytest.mark.parametrize("size", [(80, 24), (160, 50)])
def test_fills_its_terminal(start, size) -> None:
    terminal = start(size=size)
    terminal.until_text("q quit")
    assert "q quit" in terminal.screen.display[-1]
    assert "shelf" in terminal.screen.display[0]


def test_tiny_and_back(start) -> None:
    terminal = start()
    terminal.until_text("liquids")
    filter_to(terminal, "acetone")
    terminal.resize(30, 8)
    terminal.until_text("too small")
    terminal.resize(80, 24)
    terminal.until_text("filter: acetone", "like pair")


def test_the_temperature_can_be_given_at_the_start(start) -> None:
    start("--temperature", "60 degC").until_text("60 °C", "liquids")
