"""The sheet: which forces hold this liquid together, and where does each number come from?"""

from __future__ import annotations

from collections.abc import Iterable, Sequence
from typing import ClassVar

from rich.text import Text
from textual.binding import Binding, BindingType
from textual.widget import Widget
from textual.widgets import Static

from stillroom.chem.data.quantities import QUANTITIES
from stillroom.chem.data.values import Value
from stillroom.chem.liquids.gaps import gaps
from stillroom.chem.liquids.liquid import Liquid
from stillroom.chem.shelf.cautions import caution_line, limits_line
from stillroom.chem.shelf.shelf import Shelf
from stillroom.tui.formatting import celsius, quantity_words, with_uncertainty
from stillroom.tui.screens.base import WorkScreen
from stillroom.tui.sheet_text import like_summary
from stillroom.tui.widgets.grid import Column, Grid


class SheetRows:
    """The values of one liquid as the grid wants them: one row a quantity, or one a source."""

    columns = (
        Column("quantity", "quantity", 29),
        Column("value", "value ± standard unc.", 25, align="right"),
        Column("at", "at", 8, align="right"),
        Column("kind", "kind", 9),
        Column("source", "source", 28),
    )

    def __init__(self, shelf: Shelf, liquid: Liquid, *, every: bool) -> None:
        self.values: list[tuple[str, Value | None, str]] = []
        if every:
            for record in shelf.records(liquid.id):
                mark = "*" if record.preferred else " "
                self.values.append((record.value.quantity, record.value, mark))
        else:
            self.values += [(name, value, " ") for name, value in liquid.values.items()]
            self.values += [(name, None, " ") for name, _ in gaps(liquid)]

    def __len__(self) -> int:
        return len(self.values)

    def cells(self, row: int) -> Sequence[str]:
        """Return the texts of one row."""
        name, value, _ = self.values[row]
        label = QUANTITIES[name].label
        if value is None:
            return [label, "-", "", "missing", ""]
        return [
            label,
            with_uncertainty(value),
            celsius(value.temperature),
            value.kind,
            value.source,
        ]

    def marker(self, row: int) -> str:
        """Return `*` for a preferred source."""
        return self.values[row][2]


class SheetScreen(WorkScreen):
    """Values with sources and uncertainty, shares, verdict, cautions of one liquid."""

    name_in_heading = " sheet "
    BINDINGS: ClassVar[list[BindingType]] = [
        Binding("v", "every", "all sources"),
        Binding("l", "like_pair", "like pair"),
        Binding("p", "partners", "rank"),
        Binding("a", "keep", "keep"),
        Binding("escape", "app.step_back", "back"),
    ]

    def __init__(self) -> None:
        super().__init__()
        self._every = False

    def body(self) -> Iterable[Widget]:
        """Return summary, values and the citation of the value under the cursor."""
        yield Static(id="identity")
        yield Grid(empty="no values", id="grid")
        yield Static(id="detail")

    @property
    def liquid(self) -> Liquid:
        """The liquid shown, at the session's temperature."""
        return self.session.shelf[self.session.view.liquid]

    def heading(self) -> str:
        """Name the liquid."""
        who = self.liquid.identity
        return f"{who.name}  {who.formula}  CAS {who.cas or '-'}  {who.family}"

    def focus_body(self) -> None:
        """Focus the grid."""
        self.query_one(Grid).focus()

    def refresh_data(self) -> None:
        """Show the liquid of the session."""
        liquid, width = self.liquid, self.size.width - 2
        hazards = self.session.shelf.hazards.get(liquid.id, ())
        lines = [*like_summary(liquid, width), caution_line(hazards)]
        limits = limits_line(liquid)
        if limits:
            lines.append(limits)
        outside = liquid.outside_liquid_range()
        if outside:
            lines.insert(0, f"not a liquid at this temperature and 1 atm: {outside}")
        if liquid.identity.synonyms:
            lines.insert(0, f"also: {', '.join(liquid.identity.synonyms)}")
        self.query_one("#identity", Static).update(Text("\n".join(lines)))
        grid = self.query_one(Grid)
        source = SheetRows(self.session.shelf, liquid, every=self._every)
        grid.set_source(source, cursor=min(grid.cursor, max(0, len(source) - 1)))
        self._detail()
        self.take_focus()

    def on_grid_moved(self) -> None:
        """Show where the number under the cursor comes from."""
        self._detail()

    def _detail(self) -> None:
        grid = self.query_one(Grid)
        assert isinstance(grid.source, SheetRows)
        detail = self.query_one("#detail", Static)
        if not len(grid.source):
            detail.update("")
            return
        name, value, _ = grid.source.values[grid.cursor]
        if value is None:
            why = dict(gaps(self.liquid)).get(name, "")
            note = self.liquid.notes.get(name, "")
            parts = [f"{quantity_words(name)} is not known here", note, why]
            detail.update(Text("; ".join(p for p in parts if p)))
            return
        source = self.session.shelf.sources.get(value.source)
        lines = [f"{value.source}: {source.full}" if source else value.source]
        if value.note:
            lines.append(value.note)
        elif source and source.note:
            lines.append(source.note)
        detail.update(Text("\n".join(lines)))

    def action_every(self) -> None:
        """Switch between preferred values and the values of every source."""
        self._every = not self._every
        self.refresh_data()

    def action_like_pair(self) -> None:
        """Open the pair of the liquid with itself."""
        self.workbench.open_pair(self.liquid.id, self.liquid.id)

    def action_partners(self) -> None:
        """Rank all pairs of this liquid."""
        self.session.pairs.scope, self.session.pairs.partner = "with", self.liquid.id
        self.workbench.go("pairs")

    def action_keep(self) -> None:
        """Put the liquid on the shortlist."""
        self.say(self.session.keep_liquid(self.liquid.id))
