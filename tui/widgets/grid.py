"""A table that formats only the rows in view, over any number of rows."""

from __future__ import annotations

from typing import ClassVar

from rich.segment import Segment
from rich.style import Style
from textual import events
from textual.binding import Binding, BindingType
from textual.geometry import Region
from textual.message import Message
from textual.strip import Strip
from textual.widget import Widget

from stillroom.tui.widgets.columns import (
    GAP,
    Column,
    Fit,
    NoRows,
    RowSource,
    cell_text,
    fit_columns,
    last_skip,
)

__all__ = ["Column", "Grid", "RowSource"]

_PREFIX = 3  # cursor mark, the row's own marker, a space
_ARROWS = {False: "▲", True: "▼"}
_CURSOR = Style(reverse=True)
_HEADER = Style(bold=True)


class Grid(Widget, can_focus=True):
    """Rows under a fixed header; the first column stays when the others scroll sideways.

    The view moves by half a page when the cursor leaves it: over a slow line a held key then
    repaints two lines most of the time instead of all of them.
    """

    ALLOW_SELECT = False
    DEFAULT_CSS = "Grid { height: 1fr; width: 1fr; }"
    BINDINGS: ClassVar[list[BindingType]] = [
        Binding("up", "step(-1)", "row up", show=False),
        Binding("down", "step(1)", "row down", show=False),
        Binding("pageup", "page(-1)", "page up", show=False),
        Binding("pagedown", "page(1)", "page down", show=False),
        Binding("home", "first", "first row", show=False),
        Binding("end", "last", "last row", show=False),
        Binding("left", "sideways(-1)", "columns left", show=False),
        Binding("right", "sideways(1)", "columns right", show=False),
    ]

    class Moved(Message):
        """The cursor stands on another row. A flood of these collapses to the last one."""

        def __init__(self, grid: Grid, row: int) -> None:
            super().__init__()
            self.grid = grid
            self.row = row

        @property
        def control(self) -> Grid:
            """The grid that sent it."""
            return self.grid

        def can_replace(self, message: Message) -> bool:
            """Only the last position counts."""
            return isinstance(message, Grid.Moved) and message.grid is self.grid

    class Chosen(Message):
        """Enter was pressed on a row."""

        def __init__(self, grid: Grid, row: int) -> None:
            super().__init__()
            self.grid = grid
            self.row = row

        @property
        def control(self) -> Grid:
            """The grid that sent it."""
            return self.grid

    def __init__(self, empty: str = "nothing to show", *, id: str | None = None) -> None:
        super().__init__(id=id)
        self._empty = empty
        self._source: RowSource = NoRows()
        self._cursor = 0
        self._top = 0
        self._skipped = 0
        self._sort = ("", False)
        self._fit = Fit((), 0, 0)

    # What others set and ask.

    @property
    def source(self) -> RowSource:
        """Where the rows come from."""
        return self._source

    @property
    def cursor(self) -> int:
        """The row under the cursor; 0 when there are no rows."""
        return self._cursor

    def set_source(self, source: RowSource, cursor: int = 0) -> None:
        """Show other rows, the cursor on `cursor` (moved inside if need be). Sends no message."""
        if [c.key for c in source.columns] != [c.key for c in self._source.columns]:
            self._skipped = 0
        self._source = source
        self._cursor = max(0, min(cursor, len(source) - 1))
        self._arrange()

    def show_sorted(self, key: str, *, descending: bool = False) -> None:
        """Mark the column that the rows are ordered by; an unknown key marks none."""
        self._sort = (key, descending)
        self.refresh()

    def hidden_columns(self) -> tuple[int, int]:
        """Return how many columns are out of view, left and right."""
        return self._fit.before, self._fit.after

    def move_to(self, row: int) -> None:
        """Put the cursor on a row (moved inside if need be) and send `Moved` if it changed."""
        row = max(0, min(row, len(self._source) - 1))
        if row == self._cursor:
            return
        before, top = self._cursor, self._top
        self._cursor = row
        self._reveal()
        if self._top == top:
            self.refresh(self._line_of(before), self._line_of(row))
        else:
            self.refresh()
        self.post_message(self.Moved(self, row))

    # Keys.

    def action_step(self, by: int) -> None:
        """Move the cursor by rows."""
        self.move_to(self._cursor + by)

    def action_page(self, by: int) -> None:
        """Move the cursor and the view by a whole page."""
        rows = by * max(1, self._body)
        top = self._top
        self._top = self._clamped(top + rows)
        if self._top != top:
            self.refresh()
        self.move_to(self._cursor + rows)

    def action_first(self) -> None:
        """Go to the first row."""
        self.move_to(0)

    def action_last(self) -> None:
        """Go to the last row."""
        self.move_to(len(self._source) - 1)

    def action_sideways(self, by: int) -> None:
        """Scroll by one column."""
        if (by > 0 and not self._fit.after) or (by < 0 and not self._fit.before):
            return
        self._skipped = max(0, self._skipped + by)
        self._arrange()

    def key_enter(self, event: events.Key) -> None:
        """Choose the row. Not a binding: it would hide what the screen calls its enter key."""
        event.stop()
        if len(self._source):
            self.post_message(self.Chosen(self, self._cursor))

    # Layout.

    @property
    def _room(self) -> int:
        return self.size.width - _PREFIX

    @property
    def _header(self) -> int:
        """Lines of the header: a second one for units and for the count of hidden columns."""
        columns = self._source.columns
        if not columns:
            return 0
        return 2 if self._fit.before or self._fit.after or any(c.unit for c in columns) else 1

    @property
    def _body(self) -> int:
        return max(0, self.size.height - self._header)

    def _clamped(self, top: int) -> int:
        return max(0, min(top, len(self._source) - self._body))

    def _reveal(self) -> None:
        self._top = self._clamped(self._top)
        if self._body and not self._top <= self._cursor < self._top + self._body:
            self._top = self._clamped(self._cursor - self._body // 2)

    def _arrange(self) -> None:
        columns = self._source.columns
        self._skipped = min(self._skipped, last_skip(columns, self._room))
        self._fit = fit_columns(columns, self._room, self._skipped)
        self._reveal()
        self.refresh()

    def on_resize(self) -> None:
        """Fit columns and view to the new size."""
        self._arrange()

    # Drawing: one style run a line.

    def _line_of(self, row: int) -> Region:
        return Region(0, self._header + row - self._top, self.size.width, 1)

    def render_line(self, y: int) -> Strip:
        """Return line `y` of the view."""
        width, style = self.size.width, self.rich_style
        header = self._header
        row = self._top + y - header
        if y < header:
            text, style = self._header_line(y), style + _HEADER
        elif row < len(self._source):
            text = self._row_line(row)
            if row == self._cursor and self.has_focus:
                style += _CURSOR
        elif y == header and not len(self._source):
            text = self._empty
        else:
            return Strip.blank(width, style)
        return Strip([Segment(cell_text(text, width), style)], width)

    def _row_line(self, row: int) -> str:
        cells, columns = self._source.cells(row), self._source.columns
        mark = ">" if row == self._cursor else " "
        texts = [cell_text(cells[i], w, columns[i].align) for i, w in self._fit.shown]
        return f"{mark}{cell_text(self._source.marker(row), 1)} {(' ' * GAP).join(texts)}"

    def _header_line(self, y: int) -> str:
        columns = self._source.columns
        texts = []
        for place, width in self._fit.shown:
            column = columns[place]
            text, arrow = (column.title, "") if y == 0 else (column.unit, "")
            if y == 0 and column.key == self._sort[0]:
                arrow = _ARROWS[self._sort[1]]
            elif y == 1 and place == 0:
                text = " ".join(filter(None, (text, self._hidden_text())))
            cut = cell_text(text, width - len(arrow), column.align)
            if arrow and column.align == "left":
                cut = cell_text(cut.rstrip() + arrow, width)
                arrow = ""
            texts.append(cut + arrow)
        return " " * _PREFIX + (" " * GAP).join(texts)

    def _hidden_text(self) -> str:
        left, right = self.hidden_columns()
        if left and right:
            return f"‹ {left} · {right} more ›"
        return f"‹ {left} more" if left else f"{right} more ›" if right else ""
