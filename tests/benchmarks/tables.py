"""Which table widget? Time, memory and bytes of three, side by side: `python tables.py [SIZE]`.

Each runs alone in a pseudo-terminal of 80x24 (or the size given, such as 200x60) on the same
numbers, 12 columns. Time and memory are counted from the key that asks for the table to its first
rows on the terminal, so that imports and the making of the numbers are left out. Bytes are what
the terminal gets for a Down key, as a mean: with the cursor inside the page, and over one page of
rows that come into view.
"""

from __future__ import annotations

import sys
from importlib.util import find_spec
from typing import Any

import numpy as np
from terminal_session import TerminalSession
from textual.app import App
from textual.widget import Widget

WIDGETS = {
    "grid": "Grid of this project",
    "builtin": "built-in DataTable",
    "fast": "textual-fastdatatable",
}
ROWS = (500, 10_000, 100_000)
COLUMNS = 12
QUIET = 0.15  # seconds without output that end a repaint
DOWN = b"\x1b[B"


def texts(row: int, values: np.ndarray) -> list[str]:
    """Return the cells of one row: a name and numbers."""
    return [f"name {row:06d}", *(f"{v:.2f}" for v in values[row])]


def make_grid(values: np.ndarray) -> Widget:
    """Make this project's table."""
    from stillroom.tui.widgets.grid import Column, Grid

    class Rows:
        columns = (
            Column("name", "name", 12),
            *(Column(f"c{i}", f"c{i}", 6, "right") for i in range(1, COLUMNS)),
        )

        def __len__(self) -> int:
            return len(values)

        def cells(self, row: int) -> list[str]:
            return texts(row, values)

        def marker(self, row: int) -> str:
            del row
            return " "

    grid = Grid()
    grid.set_source(Rows())
    return grid


def make_builtin(values: np.ndarray) -> Widget:
    """Make Textual's own table."""
    from textual.widgets import DataTable

    table: DataTable[str] = DataTable(cursor_type="row")
    table.add_columns("name", *(f"c{i}" for i in range(1, COLUMNS)))
    for row in range(len(values)):
        table.add_row(*texts(row, values))
    return table


def make_fast(values: np.ndarray) -> Widget:
    """Make the Arrow-backed table."""
    from textual_fastdatatable import ArrowBackend, DataTable

    rows = [texts(row, values) for row in range(len(values))]
    names = ["name", *(f"c{i}" for i in range(1, COLUMNS))]
    data = dict(zip(names, map(list, zip(*rows, strict=True)), strict=True))
    return DataTable(backend=ArrowBackend.from_pydict(data), cursor_type="row")


MAKERS = {"grid": make_grid, "builtin": make_builtin, "fast": make_fast}


class Show(App[None]):
    """Shows a table when asked by a key."""

    def __init__(self, widget: str, rows: int) -> None:
        super().__init__()
        self.widget = widget
        self.values = np.random.default_rng(1).uniform(0, 100, (rows, COLUMNS - 1))
        self.animation_level = "none"
        if widget == "fast":
            import textual_fastdatatable  # noqa: F401  # its imports are not the table's time

    def on_ready(self) -> None:
        """Say that the key may come."""
        assert self._driver is not None
        self._driver.write("READY")

    def on_key(self, event: Any) -> None:
        """Make the table."""
        if event.key == "g":
            table = MAKERS[self.widget](self.values)
            self.screen.mount(table)
            self.call_after_refresh(table.focus)


def measure(widget: str, rows: int, size: tuple[int, int]) -> tuple[float, float, float, float]:
    """Return seconds to display, extra MB, bytes per key inside the page and while scrolling."""
    with TerminalSession([sys.executable, __file__, "--show", widget, str(rows)], size) as session:
        session.until(b"READY")
        session.settle(0.5)
        memory, start = session.memory_mb(), len(session.output)
        session.send(b"g")
        seconds = session.until(b"name 000009", start)
        session.settle(0.5)
        extra = session.memory_mb() - memory

        def keys(count: int) -> float:
            total = 0
            for _ in range(count):
                session.send(DOWN)
                total += session.settle(QUIET)
            return total / count

        keys(1)
        inside = keys(8)
        keys(size[1] - 12)  # to the end of the page
        return seconds, extra, inside, keys(size[1])


def main(size: tuple[int, int]) -> None:
    """Print one row per widget and number of rows, ratios against the grid beside the numbers."""
    print(f"12 columns at {size[0]}x{size[1]}; in brackets: times the grid's")
    heads = ("seconds to display", "extra MB", "bytes/key in page", "bytes/key scrolling")
    print(f"{'rows':>7}  {'table':22}" + "".join(f"{h:>21}" for h in heads))
    for rows in ROWS:
        base: tuple[float, ...] = ()
        for widget, label in WIDGETS.items():
            if widget == "fast" and find_spec("textual_fastdatatable") is None:
                print(f"{rows:7}  {label:22}  not installed, left out")
                continue
            found = measure(widget, rows, size)
            base = base or found
            shown = f"{found[0]:.2f}", f"{found[1]:.1f}", f"{found[2]:.0f}", f"{found[3]:.0f}"
            cells = [
                f"{text} ({value / max(first, least):.1f})"
                for text, value, first, least in zip(
                    shown, found, base, (1e-3, 0.1, 1, 1), strict=True
                )
            ]
            print(f"{rows:7}  {label:22}" + "".join(f"{c:>21}" for c in cells), flush=True)


if __name__ == "__main__":
    if sys.argv[1:2] == ["--show"]:
        Show(sys.argv[2], int(sys.argv[3])).run(mouse=False)
    else:
        width, height = (sys.argv[1] if len(sys.argv) > 1 else "80x24").split("x")
        main((int(width), int(height)))
