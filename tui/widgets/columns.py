"""Columns of a table: what they are, how many fit, and how a cell is cut to its width."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass
from typing import Literal, Protocol

from rich.cells import cell_len, set_cell_size

from stillroom.tui.widgets.printable import printable

Align = Literal["left", "right"]
GAP = 1
"""Cells between two columns."""
_LEAST = 3
"""A cut column narrower than this says nothing and is left out."""


@dataclass(frozen=True, slots=True)
class Column:
    """One column: its key, its title and unit in the header, its width in cells.

    `grow_to` is the width it may take when all columns are shown and room is left over.
    """

    key: str
    title: str
    width: int
    align: Align = "left"
    unit: str = ""
    grow_to: int = 0


class RowSource(Protocol):
    """Where a table gets its rows: only the visible ones are ever asked for."""

    @property
    def columns(self) -> Sequence[Column]:
        """The columns; the first one never scrolls away."""
        ...

    def __len__(self) -> int:
        """Return the number of rows."""
        ...

    def cells(self, row: int) -> Sequence[str]:
        """Return the texts of one row, in the order of `columns`."""
        ...

    def marker(self, row: int) -> str:
        """Return one character shown before the row, a space for none."""
        ...


class NoRows:
    """A source with neither columns nor rows."""

    columns: Sequence[Column] = ()

    def __len__(self) -> int:
        return 0

    def cells(self, row: int) -> Sequence[str]:
        """Return nothing; there are no rows."""
        raise IndexError(row)

    def marker(self, row: int) -> str:
        """Return nothing; there are no rows."""
        raise IndexError(row)


@dataclass(frozen=True, slots=True)
class Fit:
    """Which columns are shown: (place, width in cells), and how many are hidden on each side."""

    shown: tuple[tuple[int, int], ...]
    before: int
    after: int

    @property
    def width(self) -> int:
        """Cells that the shown columns take, gaps included."""
        return sum(w for _, w in self.shown) + GAP * max(0, len(self.shown) - 1)


def fit_columns(columns: Sequence[Column], room: int, skipped: int = 0) -> Fit:
    """Return the columns that fit whole in `room` cells.

    The first column always stands; `skipped` columns after it are scrolled away. It gives up to
    half of the room so that the widest other column fits; a column that is wider still is cut.
    """
    if not columns or room < 1:
        return Fit((), 0, max(0, len(columns) - 1))
    rest = columns[1:]
    skipped = max(0, min(skipped, len(rest) - 1))
    spared = room - GAP - max((c.width for c in rest), default=-GAP)
    used = min(columns[0].width, max(spared, (room + 1) // 2), room)
    shown = [(0, used)]
    for place in range(1 + skipped, len(columns)):
        left = room - used - GAP
        width = columns[place].width
        if width > left:
            if len(shown) > 1 or left < _LEAST:
                break
            width = left
        shown.append((place, width))
        used += GAP + width
    after = len(columns) - 1 - skipped - (len(shown) - 1)
    if not skipped and not after:
        shown = _grown(columns, shown, room - used)
    return Fit(tuple(shown), skipped, after)


def _grown(
    columns: Sequence[Column], shown: Sequence[tuple[int, int]], spare: int
) -> list[tuple[int, int]]:
    wider = []
    for place, width in shown:
        more = max(0, min(spare, columns[place].grow_to - width))
        spare -= more
        wider.append((place, width + more))
    return wider


def last_skip(columns: Sequence[Column], room: int) -> int:
    """Return how many columns are scrolled away when the last one just fits."""
    skipped = max(0, len(columns) - 2)
    while skipped and not fit_columns(columns, room, skipped - 1).after:
        skipped -= 1
    return skipped


def cell_text(text: str, width: int, align: Align = "left") -> str:
    """Return the text in exactly `width` cells: padded, or cut with an ellipsis that shows it.

    Examples
    --------
    >>> cell_text("12.5", 6, "right"), cell_text("benzaldehyde", 6), cell_text("水の表", 4)
    ('  12.5', 'benza…', '水 …')
    """
    if width <= 0:
        return ""
    text = printable(text)
    length = cell_len(text)
    if length > width:
        return set_cell_size(text, width - 1) + "…"
    pad = " " * (width - length)
    return pad + text if align == "right" else text + pad
