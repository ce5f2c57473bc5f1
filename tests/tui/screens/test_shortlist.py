"""The shortlist screen: notes, order, removal and its undoing, lists, export."""

import csv
from pathlib import Path

import pytest

from stillroom.chem.choosing.shortlist import Entry
from stillroom.chem.choosing.store import Store


@pytest.fixture
def kept(store_path: Path) -> None:
    with Store.open(store_path) as store:
        for entry in (Entry("acetone"), Entry("water"), Entry.pair("acetone", "water")):
            store.add("shortlist", entry)


async def open_list(w) -> None:
    await w.press("3")
    await w.until(lambda: "shortlist" in w.lines[0] and "entries" in w.lines[0])


async def test_an_empty_list_says_how_to_begin(workbench) -> None:
    async with workbench() as w:
        await open_list(w)
        assert "press a on a liquid or a pair" in w.text
        for key in ("enter", "n", "e", "delete", "u", "left_square_bracket"):
            await w.press(key)
        assert "nothing kept yet" in w.text


async def test_liquids_and_pairs_with_their_verdict(workbench, kept) -> None:
    async with workbench() as w:
        await open_list(w)
        assert w.first_cells == ["acetone", "water", "acetone + water"]
        assert [w.grid.source.marker(i) for i in range(3)] == [" ", " ", "&"]
        assert "x unreliable" in w.text
        await w.press("end", "enter")
        await w.until(lambda: "acetone + water" in w.lines[0])
        await w.press("escape")
        await w.until(lambda: "entries" in w.lines[0])
        await w.press("home", "enter")
        await w.until(lambda: "sheet" in w.lines[0])


async def test_note(workbench, kept) -> None:
    async with workbench() as w:
        await open_list(w)
        await w.press("n")
        await w.answer("cheap and dry")
        await w.until(lambda: "note: cheap and dry" in w.text)
        await w.press("n")
        assert w.prompt.text == "cheap and dry"
        await w.press("escape")
        assert w.app.session.entries()[0].note == "cheap and dry"


async def test_remove_and_bring_back(workbench, kept) -> None:
    async with workbench() as w:
        await open_list(w)
        await w.press("down", "delete")
        await w.until(lambda: w.first_cells == ["acetone", "acetone + water"])
        assert "u brings it back" in w.lines[0]
        await w.press("u")
        await w.until(lambda: w.first_cells == ["acetone", "water", "acetone + water"])


async def test_order(workbench, kept) -> None:
    async with workbench() as w:
        await open_list(w)
        await w.press("right_square_bracket")
        await w.until(lambda: w.first_cells[:2] == ["water", "acetone"])
        assert w.grid.cursor == 1
        await w.press("left_square_bracket")
        await w.until(lambda: w.first_cells[:2] == ["acetone", "water"])


async def test_several_lists(workbench, kept) -> None:
    async with workbench() as w:
        await open_list(w)
        await w.press("l")
        await w.type("new")
        await w.press("enter")
        await w.answer("wash step")
        await w.until(lambda: "wash step: 0 entries" in w.lines[0])
        await w.press("l")
        await w.press("enter")
        await w.until(lambda: "entries" in w.lines[0])
        assert set(w.app.session.store.shortlists()) == {"shortlist", "wash step"}


async def test_export_and_its_refusal(workbench, kept, tmp_path: Path) -> None:
    target = tmp_path / "out.csv"
    async with workbench() as w:
        await open_list(w)
        await w.press("e")
        await w.answer(str(target))
        await w.until(lambda: "exported to" in w.lines[0])
        with target.open(newline="", encoding="utf-8") as file:
            rows = list(csv.DictReader(file))
        assert [r["entry"] for r in rows] == ["liquid", "liquid", "pair"]
        await w.press("e")
        await w.answer(str(target))
        await w.until(lambda: "exists already" in w.text)
        assert w.prompt.text == str(target)
        await w.answer(str(tmp_path / "none" / "x.csv"))
        await w.until(lambda: "cannot write" in w.text)
        await w.press("escape")
        await w.until(lambda: not w.prompt.is_open)


async def test_a_liquid_that_left_the_shelf_stays_on_the_list(workbench, store_path) -> None:
    with Store.open(store_path) as store:
        store.add("shortlist", Entry("unobtainium"))
    async with workbench() as w:
        await open_list(w)
        assert w.first_cells == ["unobtainium"]
        await w.press("enter")
        assert "no longer on the shelf" in w.lines[0]
