"""The shortlist screen: what have I kept, why, and how do I hand it on?"""

from __future__ import annotations

from collections.abc import Iterable, Sequence
from pathlib import Path
from typing import ClassVar

from rich.text import Text
from textual.binding import Binding, BindingType
from textual.widget import Widget
from textual.widgets import Static

from stillroom.chem.choosing.export import export_csv, package_path
from stillroom.chem.choosing.shortlist import Entry
from stillroom.chem.data.errors import CannotWrite, StillroomError
from stillroom.chem.pairs.pair import interact
from stillroom.chem.shelf.cautions import caution_line
from stillroom.chem.shelf.shelf import Shelf
from stillroom.tui.formatting import VERDICT_MARKS, number
from stillroom.tui.screens.base import WorkScreen
from stillroom.tui.screens.picker import Picker
from stillroom.tui.sheet_text import like_summary, shares_line, verdict_line
from stillroom.tui.widgets.grid import Column, Grid
from stillroom.tui.widgets.prompt import Prompt

_NEW = "(new shortlist)"


class EntryRows:
    """The entries of a shortlist as the grid wants them."""

    columns = (
        Column("entry", "entry", 34),
        Column("total", "total", 7, align="right", unit="kJ/mol"),
        Column("verdict", "verdict", 12),
        Column("note", "note", 19, grow_to=60),
    )

    def __init__(self, shelf: Shelf, entries: Sequence[Entry]) -> None:
        self.entries = list(entries)
        self._shelf = shelf

    def __len__(self) -> int:
        return len(self.entries)

    def cells(self, row: int) -> Sequence[str]:
        """Return the texts of one row."""
        entry = self.entries[row]
        try:
            pair = interact(
                self._shelf[entry.a], self._shelf[entry.b or entry.a], self._shelf.temperature
            )
        except StillroomError:  # the summary says what is missing
            return [entry.names(self._shelf), "-", "-", entry.note]
        total = number(float(pair.terms.total) / 1e3, 2)
        verdict = f"{VERDICT_MARKS[pair.verdict]} {pair.verdict}"
        return [entry.names(self._shelf), total, verdict, entry.note]

    def marker(self, row: int) -> str:
        """Return `&` for a pair."""
        return "&" if self.entries[row].kind == "pair" else " "


class ShortlistScreen(WorkScreen):
    """Liquids and pairs kept, with notes, in an order of your own; export to CSV."""

    name_in_heading = " shortlist "
    BINDINGS: ClassVar[list[BindingType]] = [
        Binding("enter", "open", "open"),
        Binding("n", "note", "note"),
        Binding("e", "export", "export CSV"),
        Binding("delete", "remove", "remove"),
        Binding("u", "undo", "undo"),
        Binding("left_square_bracket", "move(-1)", "up"),
        Binding("right_square_bracket", "move(1)", "down"),
        Binding("l", "lists", "lists"),
        Binding("escape", "app.go('shelf')", "back"),
    ]

    def __init__(self) -> None:
        super().__init__()
        self._removed: tuple[str, Entry, float] | None = None

    def body(self) -> Iterable[Widget]:
        """Return grid and summary."""
        yield Grid(empty="nothing kept yet: press a on a liquid or a pair", id="grid")
        yield Static(id="summary")

    def heading(self) -> str:
        """Name the list and count it."""
        source = self.query_one(Grid).source
        return f"{self.session.shortlist}: {len(source)} entries (energies: like pair or pair)"

    def focus_body(self) -> None:
        """Focus the grid."""
        self.query_one(Grid).focus()

    def refresh_data(self) -> None:
        """Show the entries of the current list."""
        self._show(self.query_one(Grid).cursor)
        self.take_focus()

    def _show(self, cursor: int) -> None:
        source = EntryRows(self.session.shelf, self.session.entries())
        self.query_one(Grid).set_source(source, cursor=max(0, min(cursor, len(source) - 1)))
        self.refresh_heading()
        self._summarise()

    def _current(self) -> Entry | None:
        grid = self.query_one(Grid)
        source = grid.source
        return (
            source.entries[grid.cursor] if isinstance(source, EntryRows) and len(source) else None
        )

    def _summarise(self) -> None:
        entry, summary = self._current(), self.query_one("#summary", Static)
        if entry is None:
            summary.update("")
            return
        shelf, width = self.session.shelf, self.size.width - 2
        try:
            first = shelf[entry.a]
            if entry.kind == "pair":
                pair = interact(first, shelf[entry.b], shelf.temperature)
                lines = [shares_line(pair, width, "at contact"), verdict_line(pair)]
            else:
                lines = [*like_summary(first, width), caution_line(shelf.hazards.get(first.id, ()))]
        except StillroomError as problem:
            lines = [str(problem)]
        if entry.note:
            lines.insert(0, f"note: {entry.note}")
        summary.update(Text("\n".join(lines)))

    def on_grid_moved(self) -> None:
        """Sum up the entry under the cursor."""
        self._summarise()

    def on_grid_chosen(self) -> None:
        """Open the entry."""
        self.action_open()

    def action_open(self) -> None:
        """Open the sheet or the pair."""
        entry = self._current()
        if entry is None:
            return
        if any(key not in self.session.shelf for key in (entry.a, entry.b) if key):
            self.say("this liquid is no longer on the shelf")
        elif entry.kind == "pair":
            self.workbench.open_pair(entry.a, entry.b)
        else:
            self.workbench.open_sheet(entry.a)

    def action_note(self) -> None:
        """Write the note of the entry."""
        entry = self._current()
        if entry is None:
            return

        def submitted(text: str) -> None:
            self.session.store.set_note(self.session.shortlist, entry, text)
            self._show(self.query_one(Grid).cursor)

        self.ask("note", entry.note, submitted, placeholder="why is it on the list?", select=False)

    def action_remove(self) -> None:
        """Take the entry off; undo brings it back."""
        entry = self._current()
        if entry is None:
            return
        place = self.session.store.remove(self.session.shortlist, entry)
        self._removed = (self.session.shortlist, entry, place)
        self._show(self.query_one(Grid).cursor)
        self.say(f"{entry.title} removed; u brings it back")

    def action_undo(self) -> None:
        """Bring the entry removed last back, with its note."""
        if self._removed is None:
            self.say("nothing to bring back")
            return
        name, entry, place = self._removed
        self._removed = None
        self.session.store.add(name, entry, place)
        self._show(self.query_one(Grid).cursor)
        self.say(f"{entry.title} is back on {name}")

    def action_move(self, step: int) -> None:
        """Move the entry up or down."""
        entry, cursor = self._current(), self.query_one(Grid).cursor
        if entry is not None:
            self.session.store.move(self.session.shortlist, entry, step)
            self._show(cursor + step)

    def action_lists(self) -> None:
        """Pick another shortlist or begin a new one."""

        def picked(keys: list[str] | None) -> None:
            if keys == [_NEW]:
                self.ask("name of the new shortlist", "", self._open_list)
            elif keys:
                self._open_list(keys[0])

        choices = [(name, name) for name in self.session.store.shortlists()]
        picker = Picker("Shortlists", [*choices, (_NEW, _NEW)], picked=[self.session.shortlist])
        self.app.push_screen(picker, picked)

    def _open_list(self, name: str) -> None:
        self.session.use_shortlist(name)
        self._show(0)

    def action_export(self) -> None:
        """Ask for a file and export the list to it."""
        if self._current() is None:
            self.say("nothing to export")
            return

        def submitted(text: str) -> None:
            path = Path(text.strip()).expanduser()
            try:
                export_csv(self.session.entries(), self.session.shelf, path)
            except CannotWrite as problem:  # the path stands in the line above
                again(text, f"cannot write: {problem.problem}")
                return
            except StillroomError as problem:
                again(text, str(problem))
                return
            self.say(f"exported to {path}; {package_path(path).name} beside it explains it")

        def again(text: str, problem: str) -> None:
            self.ask("export to", text, submitted, placeholder="a new file, such as list.csv")
            self.query_one(Prompt).show_error(problem)

        value = f"{self.session.shortlist}.csv"
        self.ask("export to", value, submitted, placeholder="a new file, such as list.csv")
