"""The shelf screen at 80x24."""

from stillroom.tui.session import DEFAULT_COLUMNS


class TestBrowsing:
    """All liquids are there, and the one under the cursor is summed up."""

    async def test_opens_with_everything(self, workbench) -> None:
        async with workbench() as w:
            assert len(w.grid.source) == len(w.app.session.shelf)
            assert f"{len(w.grid.source)} of {len(w.grid.source)} liquids" in w.lines[0]
            assert "25 °C" in w.lines[0]

    async def test_sums_up_shares_verdict_and_caution(self, workbench) -> None:
        async with workbench() as w:
            await w.go_to("acetone")
            assert "like pair" in w.text
            assert "dispersion" in w.text
            assert "! strained" in w.text
            assert "Caution" in w.text
            assert "safety data sheet" in " ".join(w.text.split())

    async def test_says_what_is_missing(self, workbench) -> None:
        async with workbench() as w:
            await w.go_to("2,3-butanedione")
            assert "has no dipole" in w.text


class TestFilter:
    """The filter works while typing and loses nothing."""

    async def test_narrows_while_typing(self, workbench) -> None:
        async with workbench() as w:
            await w.press("slash")
            await w.type("nitrile")
            await w.until(lambda: len(w.grid.source) < 100)
            assert w.prompt.is_open

    async def test_a_half_typed_expression_keeps_the_last_rows(self, workbench) -> None:
        async with workbench() as w:
            await w.press("slash")
            await w.type("dipole > 4 D")
            await w.until(lambda: 0 < len(w.grid.source) < 100)
            before = len(w.grid.source)
            await w.type(" and")
            await w.until(lambda: "cannot read filter" in w.text)
            assert len(w.grid.source) == before
            await w.press("enter")
            assert w.prompt.is_open
            await w.type(" permittivity > 40")
            await w.press("enter")
            await w.until(lambda: not w.prompt.is_open)
            assert 0 < len(w.grid.source) < before

    async def test_a_wrong_unit_is_told_and_stays(self, workbench) -> None:
        async with workbench() as w:
            await w.press("slash")
            await w.type("dipole > 3 kg")
            await w.press("enter")
            await w.until(lambda: "is not a dipole" in w.text)
            assert w.prompt.text == "dipole > 3 kg"

    async def test_escape_brings_the_old_filter_back(self, workbench) -> None:
        async with workbench() as w:
            await w.go_to("nitrile")
            before = w.first_cells
            await w.press("slash")
            await w.type("water")
            await w.until(lambda: len(w.grid.source) < len(before))
            await w.press("escape")
            await w.until(lambda: w.first_cells == before)
            await w.press("escape")
            await w.until(lambda: len(w.grid.source) == len(w.app.session.shelf))

    async def test_the_cursor_goes_to_the_best_match(self, workbench) -> None:
        async with workbench() as w:
            await w.go_to("acetone")
            assert w.app.session.view.liquid == "acetone"

    async def test_nothing_fits(self, workbench) -> None:
        async with workbench() as w:
            await w.go_to("zzzz")
            assert "no liquid fits" in w.text
            await w.press("enter", "x", "a", "p", "r")
            assert "no liquid fits" in w.text or "pairs" in w.text


class TestOrder:
    """Any column sorts; the cursor stays on its liquid."""

    async def test_by_a_picked_column(self, workbench) -> None:
        async with workbench() as w:
            await w.go_to("nitrile")
            await w.press("down", "down")
            liquid = w.app.session.view.liquid
            await w.press("o")
            await w.type("boiling")
            await w.press("enter")
            await w.until(lambda: w.app.session.view.sort == "boiling_point")
            boils = [w.app.session.shelf[n].boiling_point for n in w.first_cells]
            numbers = [b.number for b in boils if b is not None]
            assert numbers == sorted(numbers)
            assert w.app.session.view.liquid == liquid
            shown = w.grid.source.cells(w.grid.cursor)[0]
            assert w.app.session.shelf[shown].id == liquid
            assert "▲" in w.lines[1]
            await w.press("r")
            await w.until(lambda: "▼" in w.lines[1])

    async def test_columns_can_be_chosen(self, workbench) -> None:
        async with workbench() as w:
            await w.press("c")
            await w.type("viscosity")
            await w.press("enter", "escape")
            await w.until(lambda: "viscosity" in w.app.session.view.columns)
            assert w.app.session.view.columns == [*DEFAULT_COLUMNS, "viscosity"]
            for _ in range(12):
                await w.press("right")
            assert "visc" in w.lines[1]
            assert w.first_cells[0][:8] in w.text  # the name stays in view


class TestKeeping:
    """Liquids go onto the shortlist, two of them make a pair."""

    async def test_keep(self, workbench) -> None:
        async with workbench() as w:
            await w.go_to("acetone")
            await w.press("a")
            assert "acetone put on shortlist" in w.lines[0]
            assert w.app.session.kept_liquids() == {"acetone"}
            await w.press("a")
            assert "already on" in w.lines[0]
            assert any(line[1] == "*" for line in w.lines)

    async def test_first_and_second_open_the_pair(self, workbench) -> None:
        async with workbench() as w:
            await w.go_to("acetone")
            await w.press("x")
            assert "first of a pair" in w.lines[0]
            await w.go_to("water")
            await w.press("x")
            await w.until(lambda: "pair" in w.lines[0] and "acetone + water" in w.lines[0])
            await w.press("escape")
            await w.until(lambda: "shelf" in w.lines[0])

    async def test_partners(self, workbench) -> None:
        async with workbench() as w:
            await w.go_to("acetone")
            await w.press("p")
            await w.until(lambda: "acetone with the rest" in w.lines[0])
            await w.until(lambda: len(w.grid.source) > 100)
            assert set(w.first_cells) == {"acetone"}
