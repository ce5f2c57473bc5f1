"""The grid shows and formats only what is in view, and its keys do what they say."""

from __future__ import annotations

import re

import pytest
from hypothesis import given
from hypothesis import strategies as st
from rich.cells import cell_len
from textual.app import App, ComposeResult

from stillroom.tui.widgets.columns import Column
from stillroom.tui.widgets.grid import Grid

SIZES = [(80, 24), (160, 50)]


class Table(App[None]):
    def __init__(self, source=None, cursor: int = 0) -> None:
        super().__init__()
        self.first_source, self.first_cursor = source, cursor
        self.told: list[tuple[str, int]] = []

    def compose(self) -> ComposeResult:
        yield Grid(empty="no [rows] here")

    def on_mount(self) -> None:
        if self.first_source is not None:
            self.grid.set_source(self.first_source, self.first_cursor)
        self.grid.focus()

    @property
    def grid(self) -> Grid:
        return self.query_one(Grid)

    def on_grid_moved(self, event: Grid.Moved) -> None:
        self.told.append(("moved", event.row))

    def on_grid_chosen(self, event: Grid.Chosen) -> None:
        self.told.append(("chosen", event.row))

    def lines(self) -> list[str]:
        return [self.grid.render_line(y).text for y in range(self.grid.size.height)]

    def rows(self) -> list[int]:
        """Return the numbers of the rows in view."""
        found = [re.search(r"row (\d+) ", line) for line in self.lines()]
        return [int(m[1]) for m in found if m]

    def under_cursor(self) -> list[str]:
        return [line for line in self.lines() if line.startswith(">")]


@pytest.mark.parametrize("size", SIZES)
class TestMoving:
    """The cursor moves by rows and pages; the view follows by half pages."""

    async def test_five_million_rows_open_and_only_those_in_view_are_formatted(
        self, size, numbered
    ):
        source = numbered(5_000_000)
        app = Table(source)
        async with app.run_test(size=size) as pilot:
            body = size[1] - 2
            assert app.rows() == list(range(body))
            await pilot.press("end")
            assert app.grid.cursor == 4_999_999
            assert app.rows() == list(range(5_000_000 - body, 5_000_000))
            await pilot.press("home")
            assert app.rows() == list(range(body))
            assert len(source.asked) <= 2 * body

    async def test_the_view_moves_by_half_a_page_when_the_cursor_leaves_it(self, size, numbered):
        body = size[1] - 2
        app = Table(numbered(1000), cursor=body - 2)
        async with app.run_test(size=size) as pilot:
            await pilot.press("down")
            assert (app.grid.cursor, app.rows()[0]) == (body - 1, 0)
            await pilot.press("down")
            assert (app.grid.cursor, app.rows()[0]) == (body, body - body // 2)
            app.grid.move_to(app.rows()[0] + 1)
            top = app.rows()[0]
            await pilot.press("up")
            assert (app.grid.cursor, app.rows()[0]) == (top, top)
            await pilot.press("up")
            assert (app.grid.cursor, app.rows()[0]) == (top - 1, max(0, top - 1 - body // 2))

    async def test_a_page_moves_cursor_and_view_by_what_is_in_view(self, size, numbered):
        app = Table(numbered(1000))
        async with app.run_test(size=size) as pilot:
            body = size[1] - 2
            await pilot.press("down", "down", "pagedown")
            assert app.grid.cursor == 2 + body
            assert app.rows()[0] == body
            await pilot.press("pageup")
            assert (app.grid.cursor, app.rows()[0]) == (2, 0)

    async def test_the_ends_hold(self, size, numbered):
        app = Table(numbered(3))
        async with app.run_test(size=size) as pilot:
            await pilot.press("up", "pageup", "home", "left")
            assert app.told == []
            await pilot.press("end", "down", "pagedown")
            assert app.grid.cursor == 2
            assert app.rows() == [0, 1, 2]

    async def test_messages_tell_the_row(self, size, numbered):
        app = Table(numbered(10))
        async with app.run_test(size=size) as pilot:
            await pilot.press("down")
            await pilot.press("enter")
            assert app.told == [("moved", 1), ("chosen", 1)]

    async def test_the_cursor_row_is_marked_by_a_character_and_by_reversal(self, size, numbered):
        app = Table(numbered(100), cursor=7)
        async with app.run_test(size=size) as pilot:
            await pilot.pause()
            (line,) = app.under_cursor()
            assert "row 7 " in line
            at = app.lines().index(line)
            (here,), (below,) = app.grid.render_line(at), app.grid.render_line(at + 1)
            assert here.style.reverse
            assert not below.style.reverse

    async def test_one_style_run_a_line(self, size, numbered):
        app = Table(numbered(100))
        async with app.run_test(size=size):
            assert all(len(list(app.grid.render_line(y))) == 1 for y in range(size[1]))


@pytest.mark.parametrize("size", SIZES)
class TestColumns:
    """The first column stands; the others scroll by whole columns; the header says what is out."""

    async def test_scrolling_sideways_reaches_every_column_and_comes_back(self, size, numbered):
        app = Table(numbered(50, columns=17))
        async with app.run_test(size=size) as pilot:
            seen: set[str] = set()
            before, after = app.grid.hidden_columns()
            assert before == 0
            while True:
                header = app.lines()[0]
                assert header.split()[0] == "name"
                seen |= set(re.findall(r"col \d+", header))
                left, right = app.grid.hidden_columns()
                second = app.lines()[1]
                assert f"‹ {left}" in second or not left
                assert f"{right} more ›" in second or not right
                if not right:
                    break
                await pilot.press("right")
                assert app.grid.hidden_columns()[0] == left + 1
            assert seen == {f"col {i}" for i in range(1, 18)}
            await pilot.press("right")
            assert app.grid.hidden_columns()[1] == 0
            await pilot.press(*["left"] * 14)
            assert app.grid.hidden_columns() == (0, after)

    async def test_units_stand_under_their_titles(self, size, numbered):
        app = Table(numbered(5, unit="kJ/mol"))
        async with app.run_test(size=size):
            titles, units = app.lines()[:2]
            end = titles.index("col 1") + len("col 1")
            assert units[:end].endswith("kJ/mol")

    async def test_a_header_without_units_and_with_all_columns_takes_one_line(self, size, numbered):
        app = Table(numbered(5, columns=2, unit=""))
        async with app.run_test(size=size):
            assert app.rows() == [0, 1, 2, 3, 4]
            assert "row 0 " in app.lines()[1]

    async def test_the_sorted_column_carries_an_arrow(self, size, numbered):
        app = Table(numbered(5))
        async with app.run_test(size=size) as pilot:
            app.grid.show_sorted("c2", descending=True)
            await pilot.pause()
            assert "col 2▼" in app.lines()[0]
            app.grid.show_sorted("name")
            await pilot.pause()
            assert "name▲" in app.lines()[0]
            assert "▼" not in app.lines()[0]
            app.grid.show_sorted("none of them")
            await pilot.pause()
            assert "▲" not in app.lines()[0]


class TestData:
    """Replacing rows keeps the cursor where it is told; odd rows do no harm."""

    async def test_an_empty_source_says_so_and_keys_do_nothing(self, numbered):
        app = Table(numbered(0))
        async with app.run_test(size=(80, 24)) as pilot:
            await pilot.press("down", "enter", "end", "pagedown", "right")
            assert app.told == []
            assert app.grid.cursor == 0
            assert "no [rows] here" in "\n".join(app.lines())

    async def test_no_source_at_all_shows_the_empty_text(self):
        app = Table()
        async with app.run_test(size=(80, 24)) as pilot:
            await pilot.press("down", "enter", "right")
            assert app.lines()[0].startswith("no [rows] here")

    async def test_the_cursor_goes_where_it_is_told_and_is_in_view(self, numbered):
        app = Table(numbered(1000), cursor=500)
        async with app.run_test(size=(80, 24)) as pilot:
            await pilot.pause()
            assert "row 500 " in app.under_cursor()[0]
            app.grid.set_source(numbered(2000), cursor=1999)
            await pilot.pause()
            assert "row 1999 " in app.under_cursor()[0]
            app.grid.set_source(numbered(10), cursor=1999)
            await pilot.pause()
            assert app.grid.cursor == 9
            assert app.rows() == list(range(10))
            assert app.told == []

    async def test_sideways_place_is_kept_while_the_columns_are_the_same(self, numbered):
        app = Table(numbered(10, columns=30))
        async with app.run_test(size=(80, 24)) as pilot:
            await pilot.press("right", "right")
            app.grid.set_source(numbered(20, columns=30))
            assert app.grid.hidden_columns()[0] == 2
            app.grid.set_source(numbered(20, columns=29))
            assert app.grid.hidden_columns()[0] == 0

    async def test_the_cursor_stays_in_view_at_any_size(self, numbered):
        app = Table(numbered(1000, columns=30), cursor=500)
        async with app.run_test(size=(80, 24)) as pilot:
            await pilot.press(*["right"] * 3)
            for size in ((160, 50), (60, 16), (30, 4), (4, 3), (2, 1), (80, 24)):
                await pilot.resize_terminal(*size)
                await pilot.pause(0.05)
                assert app.grid.size == size
                assert all(cell_len(line) == size[0] for line in app.lines())
                if size[1] > 2:
                    assert len(app.under_cursor()) == 1

    async def test_wide_characters_keep_the_columns_in_line(self, numbered):
        source = numbered(2)
        source.cells = lambda row: [
            "水とエタノールの混合物と長い名前",
            *(f"{i}" for i in range(12)),
        ]
        app = Table(source)
        async with app.run_test(size=(80, 24)):
            assert {cell_len(line) for line in app.lines()} == {80}
            assert "…" in app.lines()[2]


@given(st.lists(st.text(), min_size=3, max_size=3), st.text(), st.text(), st.text())
def test_no_control_character_leaves_the_grid(cells, marker, title, unit):
    class Hostile:
        columns = (
            Column("a", title, 20),
            Column("b", title, 9, "right", unit),
            Column("c", "", 30),
        )

        def __len__(self) -> int:
            return 1

        def cells(self, row: int):
            return cells

        def marker(self, row: int) -> str:
            return marker

    grid = Grid(empty=title)
    grid.set_source(Hostile())
    grid._fit = type(grid._fit)(((0, 20), (1, 9), (2, 30)), 0, 0)  # no screen to measure here
    for line in (grid._header_line(0), grid._header_line(1), grid._row_line(0)):
        assert line.isprintable()
        assert cell_len(line) == 3 + 20 + 1 + 9 + 1 + 30


SCRIPT = """
from textual.app import App
from stillroom.tui.widgets.grid import Column, Grid

class Rows:
    columns = (Column("n", "\\x1b]52;c;aGk=\\x07", 30), Column("u", "u", 9, "right", "\\x9b31m"))
    def __len__(self): return 40
    def cells(self, row): return [f"\\x1b]52;c;aGk=\\x07row {row} \\x1b[5m\\u202e\\x00", "\\x9b2J"]
    def marker(self, row): return "\\x07"

class Show(App):
    BINDINGS = [("q", "quit", "quit")]
    def compose(self): yield Grid()
    def on_mount(self):
        self.query_one(Grid).set_source(Rows())
        self.query_one(Grid).focus()

Show().run(mouse=False)
"""


def test_hostile_cells_reach_no_terminal(run_in_terminal):
    """Standard output of a real pseudo-terminal; sequences as in ECMA-48."""
    program = run_in_terminal(SCRIPT)
    program.wait_for_text(b"row 21 ")
    start = len(program.output)
    program.send(b"\x1b[6~")  # page down
    program.wait_for_text(b"row 39 ", start)
    program.send(b"q")
    program.wait_for(program.ended)
    text = program.output.decode()
    for bad in ("\x1b]52", "\x00", "\x9b", "\u202e", "\x1b[5m"):
        assert bad not in text
