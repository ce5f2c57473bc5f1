"""The sheet of one liquid and the pair of two."""

import pytest

from stillroom.chem import interact
from stillroom.tui.widgets.curves import Curves


class TestSheet:
    """Every number leads to its citation."""

    async def test_values_and_the_citation_under_the_cursor(self, workbench) -> None:
        async with workbench() as w:
            await w.go_to("acetone")
            await w.press("enter")
            await w.until(lambda: "sheet" in w.lines[0])
            assert "acetone  C3H6O  CAS 67-64-1  ketone" in w.lines[0]
            shelf = w.app.session.shelf
            for row in range(len(w.grid.source)):
                _, value, _ = w.grid.source.values[row]
                if value is not None and value.source in shelf.sources:
                    assert value.source in w.text
                    citation = shelf.sources[value.source].citation
                    assert citation[:30] in " ".join(w.text.split())
                await w.press("down")

    async def test_missing_values_say_what_they_stop(self, workbench) -> None:
        async with workbench() as w:
            await w.go_to("2,3-butanedione")
            await w.press("enter")
            await w.until(lambda: "sheet" in w.lines[0])
            names = [n for n, _, _ in w.grid.source.values]
            for _ in range(names.index("dipole")):
                await w.press("down")
            assert "no orientation or induction, so no pairs" in " ".join(w.text.split())

    async def test_all_sources(self, workbench) -> None:
        async with workbench() as w:
            await w.go_to("acetone")
            await w.press("enter", "v")
            records = w.app.session.shelf.records("acetone")
            assert len(w.grid.source) == len(records)
            marks = [w.grid.source.marker(i) for i in range(len(records))]
            assert marks.count("*") == sum(r.preferred for r in records)

    async def test_onwards_and_back(self, workbench) -> None:
        async with workbench() as w:
            await w.go_to("acetone")
            await w.press("enter", "l")
            await w.until(lambda: "acetone + acetone" in w.lines[0])
            await w.press("escape")
            await w.until(lambda: "sheet" in w.lines[0])
            await w.press("a")
            assert w.app.session.kept_liquids() == {"acetone"}
            await w.press("escape")
            await w.until(lambda: "shelf" in w.lines[0])


class TestPair:
    """What the screen shows is what the core works out."""

    async def open(self, w, a: str = "acetone", b: str = "chloroform") -> None:
        w.app.call_later(w.app.open_pair, a, b)
        await w.until(lambda: f"{a} + {b}" in w.lines[0])

    async def test_numbers_shares_reasons_and_plot(self, workbench) -> None:
        async with workbench() as w:
            await self.open(w)
            shelf = w.app.session.shelf
            pair = interact(shelf["acetone"], shelf["chloroform"])
            assert f"{float(pair.terms.orientation) / 1e3:.2f}" in w.text
            assert f"{float(pair.terms.total) / 1e3:.2f}" in w.text
            assert f"{pair.distance * 1e9:.3f} nm" in w.text
            assert f"{100 * pair.shares['dispersion']:.0f} %" in w.text
            assert pair.verdict in w.text
            assert "hydrogen bond from chloroform to acetone" in " ".join(w.text.split())
            for label in ("exact average", "leading term", "aligned", "contact"):
                assert label in w.text

    async def test_free_energy(self, workbench) -> None:
        async with workbench() as w:
            await self.open(w)
            assert "internal energy" in w.text
            await w.press("f")
            pair = interact(w.app.session.shelf["acetone"], w.app.session.shelf["chloroform"])
            await w.until(lambda: "orientation free energy" in w.text)
            assert f"{float(pair.terms.total_free) / 1e3:.2f}" in w.text

    async def test_numbers_instead_of_the_plot(self, workbench) -> None:
        async with workbench() as w:
            await self.open(w)
            await w.press("n")
            await w.until(lambda: "C6 1e-79 J m⁶" in w.text)
            assert not w.app.screen.query_one(Curves).display
            assert "verdict:" in w.text

    @pytest.mark.parametrize(
        ("typed", "told"),
        [("0 nm", "out of range"), ("-1 nm", "out of range"), ("3 kg", "nm or angstrom"),
         ("far", "cannot read")],
    )  # fmt: skip
    async def test_a_wrong_distance_is_told(self, workbench, typed: str, told: str) -> None:
        async with workbench() as w:
            await self.open(w)
            await w.press("d")
            await w.answer(typed)
            await w.until(lambda: told in w.text)
            assert w.prompt.text == typed

    async def test_a_distance_and_back_to_contact(self, workbench) -> None:
        async with workbench() as w:
            await self.open(w)
            await w.press("d")
            await w.answer("7 angstrom")
            await w.until(lambda: "given 0.700 nm" in w.text)
            await w.press("d")
            await w.answer("")
            await w.until(lambda: "contact 0." in w.text)

    async def test_model(self, workbench) -> None:
        async with workbench() as w:
            await self.open(w)
            await w.press("m")
            await w.type("london")
            await w.press("enter")
            shelf = w.app.session.shelf
            pair = interact(shelf["acetone"], shelf["chloroform"], dispersion="london")
            await w.until(lambda: f"{float(pair.terms.dispersion) / 1e3:.2f}" in w.text)

    async def test_a_pair_that_cannot_be_worked_out(self, workbench) -> None:
        async with workbench() as w:
            w.app.call_later(w.app.open_pair, "2,3-butanedione", "acetone")
            await w.until(lambda: "has no dipole" in w.text)
            await w.press("f", "n", "a")
            assert "has no dipole" in w.text
