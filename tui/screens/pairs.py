"""The pairs screen: which liquids attract each other how, and can the average be trusted?"""

from __future__ import annotations

from collections.abc import Iterable, Sequence
from typing import ClassVar

import numpy as np
from rich.text import Text
from textual import work
from textual.binding import Binding, BindingType
from textual.widget import Widget
from textual.widgets import Static
from textual.worker import get_current_worker

from stillroom.chem.pairs.pair import FORCES, interact
from stillroom.chem.pairs.ranking import KEYS, Ranking, rank
from stillroom.chem.pairs.verdicts import VerdictBook
from stillroom.chem.shelf.shelf import Shelf
from stillroom.tui.formatting import VERDICT_MARKS, number, share
from stillroom.tui.screens.base import WorkScreen
from stillroom.tui.screens.picker import Picker
from stillroom.tui.sheet_text import shares_line, verdict_line
from stillroom.tui.widgets.bars import share_bar
from stillroom.tui.widgets.grid import Column, Grid

_BAR = 10
_NUMBERS = (
    ("total_energy_kJ_mol", "total", "kJ/mol", 7, 2),
    ("interchange_energy_kJ_mol", "interch", "kJ/mol", 8, 2),
    ("coupling", "x", "", 5, 2),
)


class PairRows:
    """A ranking as the grid wants it; `order` are the places in the ranking that are shown."""

    def __init__(
        self, shelf: Shelf, ranking: Ranking, book: VerdictBook, order: np.ndarray
    ) -> None:
        self.shelf, self.ranking, self.order = shelf, ranking, order
        self._book = book
        self.columns = [
            Column("a", "first", 16, grow_to=36),
            Column("b", "second", 16, grow_to=36),
            Column("bar", "or/in/disp", _BAR),
            *(Column(k, t, w, align="right", unit=u) for k, t, u, w, _ in _NUMBERS),
            Column("leading_order_error", "lead err", 8, align="right"),
            Column("verdict", "verdict", 12),
            Column("orientation_share", "orient", 6, align="right"),
            Column("induction_share", "induct", 6, align="right"),
            Column("dispersion_share", "disp", 6, align="right"),
            Column("distance_nm", "contact", 7, align="right", unit="nm"),
        ]

    def __len__(self) -> int:
        return len(self.order)

    def rows(self, place: int) -> tuple[int, int]:
        """Return both shelf rows of a shown place."""
        at = self.order[place]
        return int(self.ranking.a[at]), int(self.ranking.b[at])

    def cells(self, row: int) -> Sequence[str]:
        """Return the texts of one row."""
        at = self.order[row : row + 1]
        a, b = self.ranking.a[at], self.ranking.b[at]
        values = {k: float(v[at[0]]) for k, v in self.ranking.columns.items()}
        verdict = self._verdict(row)
        who = self.shelf.identities
        return [
            who[a[0]].name,
            who[b[0]].name,
            share_bar([values[f"{f}_share"] for f in FORCES], _BAR),
            *(number(values[k], d) for k, _, _, _, d in _NUMBERS),
            f"{100 * values['leading_order_error']:.1f} %",
            f"{VERDICT_MARKS[verdict]} {verdict}",
            *(share(values[f"{f}_share"]) for f in FORCES),
            number(values["distance_nm"], 3),
        ]

    def marker(self, row: int) -> str:
        """Return the mark of the verdict."""
        return VERDICT_MARKS[self._verdict(row)]

    def _verdict(self, row: int) -> str:
        at = self.order[row : row + 1]
        error = self.ranking.columns["leading_order_error"][at]
        (verdict,) = self._book.verdicts(self.ranking.a[at], self.ranking.b[at], error)
        return verdict


class PairsScreen(WorkScreen):
    """Ranked pairs of the whole shelf, of the filtered shelf, or of one liquid with the rest."""

    name_in_heading = " pairs "
    BINDINGS: ClassVar[list[BindingType]] = [
        Binding("enter", "open", "pair"),
        Binding("k", "key", "rank by"),
        Binding("r", "reverse", "reverse"),
        Binding("s", "scope", "scope"),
        Binding("w", "partner", "one with all"),
        Binding("slash", "find", "find"),
        Binding("a", "keep", "keep"),
        Binding("escape", "stop", "back"),
    ]

    def __init__(self) -> None:
        super().__init__()
        self._asked: tuple[object, ...] = ()
        self._progress = ""

    def body(self) -> Iterable[Widget]:
        """Return grid and summary."""
        yield Grid(empty="no pair to show", id="grid")
        yield Static(id="summary")

    def heading(self) -> str:
        """Say which pairs are shown and in which order."""
        if self._progress:
            return self._progress
        view = self.session.pairs
        source = self.query_one(Grid).source
        count = len(source) if isinstance(source, PairRows) else 0
        scope = {
            "all": "whole shelf",
            "filtered": "filtered shelf" if self.session.view.filter else "whole shelf",
            "with": f"{self._partner_name()} with the rest",
        }[view.scope]
        end = "largest" if self._descending() else "smallest"
        found = f", name {view.names}" if view.names else ""
        return f"{count} pairs, {scope}{found}, by {view.key}, {end} first"

    def _partner_name(self) -> str:
        partner, shelf = self.session.pairs.partner, self.session.shelf
        return shelf.identities[shelf.row(partner)].name if partner in shelf else partner

    def _descending(self) -> bool:
        view = self.session.pairs
        return KEYS[view.key].largest_first if view.ascending is None else not view.ascending

    def focus_body(self) -> None:
        """Focus the grid."""
        self.query_one(Grid).focus()

    def refresh_data(self) -> None:
        """Rank again if anything that matters has changed."""
        view, session = self.session.pairs, self.session
        asked = (view.scope, view.partner, view.key, view.ascending, session.temperature,
                 session.view.filter if view.scope != "all" else "")  # fmt: skip
        if asked != self._asked:
            self._asked = asked
            self._progress = "ranking ..."
            self._rank()
        self.take_focus()

    @work(thread=True, exclusive=True, group="rank")
    def _rank(self) -> None:
        """Rank in a thread, so that typing goes on."""
        worker = get_current_worker()
        view, shelf = self.session.pairs, self.session.shelf
        rows = self.session.matching(self.session.view.filter) if view.scope == "filtered" else None
        partner = shelf.row(view.partner) if view.scope == "with" else None

        def progress(done: int, total: int) -> bool:
            if not worker.is_cancelled:
                self.app.call_from_thread(
                    self._tell, f"ranking: {done} of {total} pairs, esc stops"
                )
            return not worker.is_cancelled

        ranking = rank(
            shelf,
            view.key,
            rows=rows,
            partner=partner,
            ascending=view.ascending,
            progress=progress,
        )
        self.app.call_from_thread(self._ranked, shelf, ranking)

    def _tell(self, text: str) -> None:
        self._progress = text
        self.refresh_heading()

    def _ranked(self, shelf: Shelf, ranking: Ranking) -> None:
        self._progress = ""
        self._ranking, self._shelf, self._book = ranking, shelf, VerdictBook(shelf)
        self._show(0)
        if not len(ranking) and self.session.pairs.scope == "with":
            self.say(f"{self._partner_name()} lacks a value here, so it has no pairs")

    def _show(self, cursor: int) -> None:
        order = np.arange(len(self._ranking))
        if self.session.pairs.names.strip():
            fits = np.zeros(len(self._shelf), dtype=bool)
            fits[self._shelf.matching(self.session.pairs.names)] = True
            order = order[fits[self._ranking.a] | fits[self._ranking.b]]
        source = PairRows(self._shelf, self._ranking, self._book, order)
        grid = self.query_one(Grid)
        grid.set_source(source, cursor=min(cursor, max(0, len(order) - 1)))
        grid.show_sorted(KEYS[self.session.pairs.key].column, descending=self._descending())
        self.refresh_heading()
        self._summarise()

    def _current(self) -> tuple[str, str] | None:
        source = self.query_one(Grid).source
        if not isinstance(source, PairRows) or not len(source):
            return None
        a, b = source.rows(self.query_one(Grid).cursor)
        return self._shelf.identities[a].id, self._shelf.identities[b].id

    def _summarise(self) -> None:
        current, summary = self._current(), self.query_one("#summary", Static)
        if current is None:
            summary.update("")
            return
        pair = interact(self._shelf[current[0]], self._shelf[current[1]], self._shelf.temperature)
        lines = [
            f"{pair.a.name} + {pair.b.name}",
            shares_line(pair, self.size.width - 2, "at contact"),
        ]
        lines.append(verdict_line(pair))
        if out := self._ranking.left_out.size:
            lines.append(f"{out} liquids left out: no dipole moment, polarizability or volume here")
        summary.update(Text("\n".join(lines)))

    def on_grid_moved(self) -> None:
        """Sum up the pair under the cursor."""
        self._summarise()

    def on_grid_chosen(self) -> None:
        """Open the pair."""
        self.action_open()

    def action_open(self) -> None:
        """Open the pair under the cursor."""
        current = self._current()
        if current is not None:
            self.workbench.open_pair(*current)

    def action_key(self) -> None:
        """Pick what to rank by."""

        def picked(keys: list[str] | None) -> None:
            if keys:
                self.session.pairs.key, self.session.pairs.ascending = keys[0], None
                self._again()

        choices = [(name, f"{name}: {key.meaning}") for name, key in KEYS.items()]
        self.app.push_screen(Picker("Rank by", choices, picked=[self.session.pairs.key]), picked)

    def action_reverse(self) -> None:
        """Turn the order round."""
        self.session.pairs.ascending = self._descending()
        self._again()

    def action_scope(self) -> None:
        """Switch between filtered and whole shelf."""
        view = self.session.pairs
        view.scope = "all" if view.scope == "filtered" else "filtered"
        self._again()

    def action_partner(self) -> None:
        """Pick one liquid to pair with the rest."""

        def picked(keys: list[str] | None) -> None:
            if keys:
                self.session.pairs.scope, self.session.pairs.partner = "with", keys[0]
                self._again()

        who = self.session.shelf.identities
        choices = [(w.id, " ".join((w.name, *w.synonyms))) for w in who]
        self.app.push_screen(
            Picker("Pair with the rest", choices, picked=[self.session.view.liquid]), picked
        )

    def action_find(self) -> None:
        """Show only pairs with a name, while typing."""
        before = self.session.pairs.names

        def typed(text: str) -> None:
            self.session.pairs.names = text
            self._show(0)

        self.ask("name", before, typed, typed=typed, cancelled=lambda: typed(before))

    def action_keep(self) -> None:
        """Put the pair on the shortlist."""
        current = self._current()
        if current is not None:
            self.say(self.session.keep_pair(*current))

    def action_stop(self) -> None:
        """Stop the ranking, or take the name filter off, or go back."""
        if self._progress:
            self.workers.cancel_group(self, "rank")
            self._asked = ()
            self._tell("")
        elif self.session.pairs.names:
            self.session.pairs.names = ""
            self._show(0)
        else:
            self.workbench.go("shelf")

    def _again(self) -> None:
        self.session.save()
        self.refresh_data()
        self.refresh_heading()
