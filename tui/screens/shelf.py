"""The shelf screen: what is on the shelf, and how good is each number?"""

from __future__ import annotations

from collections.abc import Iterable, Sequence
from typing import ClassVar

import numpy as np
from rich.text import Text
from textual.binding import Binding, BindingType
from textual.timer import Timer
from textual.widget import Widget
from textual.widgets import Static

from stillroom.chem.data.errors import StillroomError
from stillroom.chem.data.quantities import QUANTITIES
from stillroom.chem.shelf.cautions import caution_line
from stillroom.chem.shelf.shelf import Shelf
from stillroom.tui.formatting import cell
from stillroom.tui.screens.base import WorkScreen
from stillroom.tui.screens.picker import Picker
from stillroom.tui.sheet_text import like_summary
from stillroom.tui.widgets.grid import Column, Grid

_TEXT_COLUMNS = {"family": ("family", 12), "formula": ("formula", 10), "cas": ("CAS", 11)}

_SAVE_AFTER = 0.7  # seconds of rest before the place of the cursor is kept


class ShelfRows:
    """The rows of a shelf as the grid wants them."""

    def __init__(
        self,
        shelf: Shelf,
        rows: np.ndarray,
        columns: Sequence[str],
        kept: frozenset[str],
        marked: str = "",
    ) -> None:
        self.shelf = shelf
        self.rows = rows
        self._names = list(columns)
        self._kept = kept
        self._marked = marked
        self.columns = [Column("name", "name", 22, grow_to=40), *map(_column, columns)]

    def __len__(self) -> int:
        return len(self.rows)

    def cells(self, row: int) -> Sequence[str]:
        """Return the texts of one row."""
        at = int(self.rows[row])
        who = self.shelf.identities[at]
        texts = [who.name]
        for name in self._names:
            if name in _TEXT_COLUMNS:
                texts.append(getattr(who, name))
            else:
                texts.append(cell(self.shelf.columns[name].value(at), QUANTITIES[name]))
        return texts

    def marker(self, row: int) -> str:
        """Return `1` for the first of a pair, `*` for a liquid on the shortlist."""
        key = self.shelf.identities[int(self.rows[row])].id
        return "1" if key == self._marked else "*" if key in self._kept else " "


def _column(name: str) -> Column:
    if name in _TEXT_COLUMNS:
        title, width = _TEXT_COLUMNS[name]
        return Column(name, title, width)
    q = QUANTITIES[name]
    width = max(len(q.heading), len(q.unit_label), 7)
    return Column(name, q.heading, width, align="right", unit=q.unit_label)


class ShelfScreen(WorkScreen):
    """Browse, filter, sort, choose columns; the liquid under the cursor is summed up below."""

    name_in_heading = " shelf "
    BINDINGS: ClassVar[list[BindingType]] = [
        Binding("enter", "sheet", "sheet"),
        Binding("slash", "filter", "filter"),
        Binding("o", "sort", "order"),
        Binding("r", "reverse", "reverse"),
        Binding("c", "columns", "columns"),
        Binding("x", "pair", "pair"),
        Binding("p", "partners", "rank"),
        Binding("a", "keep", "keep"),
        Binding("escape", "clear", "clear"),
    ]

    def __init__(self) -> None:
        super().__init__()
        self._first = ""
        self._save_timer: Timer | None = None

    def body(self) -> Iterable[Widget]:
        """Return grid and summary."""
        yield Grid(empty="no liquid fits this filter (esc clears it)", id="grid")
        yield Static(id="summary")

    def heading(self) -> str:
        """Say how many are shown and how."""
        view, shown = self.session.view, len(self._source())
        text = f"{shown} of {len(self.session.shelf)} liquids"
        if view.filter:
            text += f", filter: {view.filter}"
        return f"{text}, by {view.sort.replace('_', ' ')}{' down' if view.descending else ''}"

    def focus_body(self) -> None:
        """Focus the grid."""
        self.query_one(Grid).focus()

    def refresh_data(self) -> None:
        """Show the session's rows, the cursor staying on its liquid."""
        self._show(self.session.rows())
        self.take_focus()

    def _source(self) -> ShelfRows:
        source = self.query_one(Grid).source
        assert isinstance(source, ShelfRows)
        return source

    def _show(self, rows: np.ndarray) -> None:
        session = self.session
        kept = session.kept_liquids()
        source = ShelfRows(session.shelf, rows, session.view.columns, kept, self._first)
        at = [
            i for i, r in enumerate(rows) if session.shelf.identities[r].id == session.view.liquid
        ]
        grid = self.query_one(Grid)
        grid.set_source(source, cursor=at[0] if at else 0)
        grid.show_sorted(session.view.sort, descending=session.view.descending)
        self.refresh_heading()
        self._summarise()

    def _summarise(self) -> None:
        row = self._shelf_row()
        summary = self.query_one("#summary", Static)
        if row is None:
            summary.update("")
            return
        liquid = self.session.shelf.liquid(row)
        width = self.size.width - 2
        hazards = self.session.shelf.hazards.get(liquid.id, ())
        lines = [_clipped(line, width) for line in like_summary(liquid, width)]
        caution = caution_line(hazards)
        if len(caution) > (room := 2 * width - 8):  # words wrap, so not every cell is used
            caution = caution[: room - 1] + "…"
        summary.update(Text("\n").join([*lines, Text(caution)]))

    def _shelf_row(self) -> int | None:
        source = self._source()
        cursor = self.query_one(Grid).cursor
        return int(source.rows[cursor]) if len(source) else None

    def _current(self) -> str | None:
        row = self._shelf_row()
        return None if row is None else self.session.shelf.identities[row].id

    def on_grid_moved(self) -> None:
        """Remember the liquid and sum it up."""
        current = self._current()
        if current is not None and current != self.session.view.liquid:
            self.session.view.liquid = current
            if self._save_timer is not None:
                self._save_timer.stop()
            # Not at every key: a save waits for the disk.
            self._save_timer = self.set_timer(_SAVE_AFTER, self.session.save)
        self._summarise()

    def on_grid_chosen(self) -> None:
        """Open the sheet."""
        self.action_sheet()

    def action_sheet(self) -> None:
        """Open the sheet of the liquid under the cursor."""
        current = self._current()
        if current is not None:
            self.workbench.open_sheet(current)

    def action_filter(self) -> None:
        """Filter while typing; escape brings the old filter back."""
        before = self.session.view.filter

        def typed(text: str) -> None:
            try:
                rows = self.session.rows(text)
            except StillroomError:
                return  # half-typed; the prompt says so and the last good rows stay
            self.session.view.filter = text
            best = self.session.matching(text)
            if text.strip() and len(best):
                self.session.view.liquid = self.session.shelf.identities[best[0]].id
            self._show(rows)

        def submitted(text: str) -> None:
            typed(text)
            self.session.save()

        def cancelled() -> None:
            self.session.view.filter = before
            self._show(self.session.rows())

        self.ask(
            "filter",
            before,
            submitted,
            typed=typed,
            cancelled=cancelled,
            check=self._problem,
            placeholder="a name, or dipole > 3 D and boiling_point < 180 degC",
        )

    def _problem(self, text: str) -> str | None:
        try:
            self.session.matching(text)
        except StillroomError as problem:
            return str(problem)
        return None

    def action_clear(self) -> None:
        """Take the filter off; with none, the mark of the first of a pair."""
        if self.session.view.filter:
            self.session.view.filter = ""
            self.session.save()
        else:
            self._first = ""
        self._show(self.session.rows())

    def action_reverse(self) -> None:
        """Turn the order round."""
        self.session.view.descending = not self.session.view.descending
        self.session.save()
        self._show(self.session.rows())

    def action_sort(self) -> None:
        """Pick the column to order by."""

        def picked(keys: list[str] | None) -> None:
            if keys:
                self.session.view.sort = keys[0]
                self.session.save()
                self._show(self.session.rows())

        choices = [(n, n) for n in ("name", "family", "formula", "cas")] + _quantity_choices()
        self.app.push_screen(Picker("Order by", choices, picked=[self.session.view.sort]), picked)

    def action_columns(self) -> None:
        """Pick the columns to show."""

        def picked(keys: list[str] | None) -> None:
            if keys is not None:
                self.session.view.columns = keys
                self.session.save()
                self._show(self.session.rows())

        choices = [(n, title) for n, (title, _) in _TEXT_COLUMNS.items()] + _quantity_choices()
        picker = Picker("Columns", choices, several=True, picked=self.session.view.columns)
        self.app.push_screen(picker, picked)

    def action_pair(self) -> None:
        """Mark the first liquid of a pair, or open the pair with the second."""
        current = self._current()
        if current is None:
            return
        if not self._first:
            self._first = current
            self._show(self._source().rows)
            self.say(f"{current} is the first of a pair; press x on the second")
            return
        first, self._first = self._first, ""
        self.workbench.open_pair(first, current)

    def action_partners(self) -> None:
        """Rank all pairs of the liquid under the cursor."""
        current = self._current()
        if current is not None:
            self.session.pairs.scope, self.session.pairs.partner = "with", current
            self.workbench.go("pairs")

    def action_keep(self) -> None:
        """Put the liquid on the shortlist."""
        current = self._current()
        if current is not None:
            self.say(self.session.keep_liquid(current))
            self._show(self._source().rows)


def _quantity_choices() -> list[tuple[str, str]]:
    return [
        (name, f"{q.label}{', ' + q.unit_label if q.unit_label else ''}")
        for name, q in QUANTITIES.items()
    ]


def _clipped(line: str | Text, width: int) -> Text:
    text = line if isinstance(line, Text) else Text(line)
    text.truncate(width, overflow="ellipsis")
    return text
