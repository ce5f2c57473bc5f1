"""The pairs screen: ranked, filtered, turned, stopped."""

from stillroom.chem.pairs.ranking import KEYS, rank
from stillroom.tui.screens.pairs import PairsScreen


async def open_pairs(w) -> None:
    await w.press("2")
    await w.until(lambda: isinstance(w.app.screen, PairsScreen) and len(w.grid.source) > 0)


async def test_ranks_the_whole_shelf(workbench) -> None:
    async with workbench() as w:
        await open_pairs(w)
        expected = rank(w.app.session.shelf, "total")
        assert len(w.grid.source) == len(expected)
        first = [w.app.session.shelf.identities[r[0]].name for r in (expected.a, expected.b)]
        assert list(w.grid.source.cells(0)[:2]) == first
        assert f"{len(expected)} pairs" in w.lines[0]
        assert f"{expected.left_out.size} liquids left out" in w.text
        assert "█" in w.text


async def test_another_key_and_the_other_direction(workbench) -> None:
    async with workbench() as w:
        await open_pairs(w)
        for key in ("coupling", "interchange"):
            await w.press("k")
            await w.type(key)
            await w.press("enter")
            await w.until(lambda key=key: f"by {key}" in w.lines[0] and "pairs," in w.lines[0])
            ranking = w.grid.source.ranking
            values = ranking.columns[KEYS[key].column]
            assert ranking.key == key
            best = values.max() if KEYS[key].largest_first else values.min()
            assert values[0] == best
        await w.press("r")
        await w.until(lambda: w.grid.source.ranking.descending)
        assert (
            w.grid.source.ranking.columns["interchange_energy_kJ_mol"].max()
            == (w.grid.source.ranking.columns["interchange_energy_kJ_mol"][0])
        )


async def test_filtered_shelf_and_whole_shelf(workbench) -> None:
    async with workbench() as w:
        await w.go_to("nitrile")
        shown = len(w.grid.source)
        await open_pairs(w)
        assert "filtered shelf" in w.lines[0]
        assert len(w.grid.source) <= shown * (shown + 1) // 2
        await w.press("s")
        await w.until(lambda: "whole shelf" in w.lines[0] and len(w.grid.source) > 10_000)


async def test_one_liquid_with_the_rest(workbench) -> None:
    async with workbench() as w:
        await open_pairs(w)
        await w.press("w")
        await w.type("ethanol")
        await w.press("enter")
        await w.until(lambda: "ethanol with the rest" in w.lines[0])
        assert set(w.first_cells) == {"ethanol"}
        await w.press("w")
        await w.type("2,3-butanedione")
        await w.press("enter")
        await w.until(lambda: "lacks a value" in w.lines[0])
        assert "no pair to show" in w.text


async def test_find_a_name(workbench) -> None:
    async with workbench() as w:
        await open_pairs(w)
        everything = len(w.grid.source)
        await w.press("slash")
        await w.type("water")
        await w.until(lambda: len(w.grid.source) < everything)
        await w.press("enter")
        for row in range(0, len(w.grid.source), 97):
            assert any("water" in c for c in w.grid.source.cells(row)[:2])
        await w.press("escape")
        await w.until(lambda: len(w.grid.source) == everything)


async def test_open_and_keep(workbench) -> None:
    async with workbench() as w:
        await open_pairs(w)
        await w.press("down", "a")
        (entry,) = w.app.session.entries()
        assert entry.kind == "pair"
        await w.press("enter")
        await w.until(lambda: entry.names(w.app.session.shelf) in w.lines[0])


async def test_the_summary_belongs_to_the_row(workbench) -> None:
    async with workbench() as w:
        await open_pairs(w)
        for _ in range(5):
            await w.press("down")
            a, b = w.grid.source.cells(w.grid.cursor)[:2]
            assert f"{a} + {b}" in w.text


async def test_a_running_ranking_can_be_stopped(workbench, monkeypatch) -> None:
    import threading

    from stillroom.tui.screens import pairs

    held, seen = threading.Event(), []

    def slow(*args, progress, **options):
        while progress(1, 2):
            held.wait(0.02)
        seen.append("stopped")
        return rank(*args, top=1, **options)

    monkeypatch.setattr(pairs, "rank", slow)
    async with workbench() as w:
        await w.press("2")
        await w.until(lambda: "ranking: 1 of 2 pairs" in w.lines[0])
        await w.press("escape")
        await w.until(lambda: seen == ["stopped"])
        assert "ranking" not in w.lines[0]
