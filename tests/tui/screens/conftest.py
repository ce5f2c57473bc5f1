"""A workbench on a fresh store, driven by keys at a fixed size."""

import asyncio
from collections.abc import AsyncIterator, Callable
from contextlib import asynccontextmanager
from pathlib import Path

import pytest
from textual.widgets import Input

from stillroom.chem import load_shelf
from stillroom.chem.choosing.store import Store
from stillroom.tui.app import Workbench
from stillroom.tui.session import Session
from stillroom.tui.widgets.grid import Grid
from stillroom.tui.widgets.prompt import Prompt

SHELF = load_shelf()


class Driver:
    """Presses keys and reads what stands on the screen."""

    def __init__(self, app: Workbench, pilot) -> None:
        self.app, self.pilot = app, pilot

    async def press(self, *keys: str) -> None:
        await self.pilot.press(*keys)
        await self.pilot.pause()

    async def type(self, text: str) -> None:
        await self.pilot.press(*[{" ": "space"}.get(c, c) for c in text])
        await self.pilot.pause()

    async def until(self, condition: Callable[[], bool]) -> None:
        for _ in range(400):
            if condition():
                return
            await asyncio.sleep(0.02)
            await self.pilot.pause()
        raise AssertionError("waited in vain for a condition; the screen says\n" + self.text)

    async def answer(self, text: str) -> None:
        """Replace the prompt's text and accept it."""
        await self.until(lambda: self.prompt.is_open and isinstance(self.app.focused, Input))
        await self.press("ctrl+a", "ctrl+k")
        await self.type(text)
        await self.press("enter")

    async def go_to(self, name: str) -> None:
        """Filter the shelf to a liquid; the cursor goes to the best match."""
        await self.press("slash")
        await self.answer(name)
        await self.until(lambda: self.app.session.view.filter == name)

    @property
    def grid(self) -> Grid:
        return self.app.screen.query_one(Grid)

    @property
    def prompt(self) -> Prompt:
        return self.app.screen.query_one(Prompt)

    @property
    def lines(self) -> list[str]:
        """What the terminal shows, line by line."""
        screen = self.app.screen
        width, height = self.app.size
        strips = screen._compositor.render_strips(self.app.size)
        return ["".join(s.text for s in strips[y]).ljust(width) for y in range(height)]

    @property
    def text(self) -> str:
        return "\n".join(self.lines)

    @property
    def first_cells(self) -> list[str]:
        return [self.grid.source.cells(i)[0] for i in range(len(self.grid.source))]


@pytest.fixture
def store_path(tmp_path: Path) -> Path:
    return tmp_path / "store.sqlite3"


@pytest.fixture
def workbench(store_path: Path):
    """Return a context manager that opens the workbench: `async with workbench() as w`."""

    @asynccontextmanager
    async def opened(size: tuple[int, int] = (80, 24)) -> AsyncIterator[Driver]:
        with Store.open(store_path) as store:
            app = Workbench(Session(SHELF, store))
            async with app.run_test(size=size) as pilot:
                await pilot.pause()
                yield Driver(app, pilot)

    return opened
