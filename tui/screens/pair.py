"""The pair screen: how do two liquids attract each other, and can I trust the average here?"""

from __future__ import annotations

from collections.abc import Iterable
from typing import ClassVar

from rich.text import Text
from textual.binding import Binding, BindingType
from textual.containers import VerticalScroll
from textual.widget import Widget
from textual.widgets import Static

from stillroom.chem.choosing.shortlist import Entry
from stillroom.chem.data.errors import StillroomError
from stillroom.chem.data.units import parse_distance
from stillroom.chem.forces.dispersion import MODELS
from stillroom.chem.pairs.pair import FORCES, PairInteraction, interact
from stillroom.chem.pairs.profile import along_distance
from stillroom.tui.commands.pair import pair_lines
from stillroom.tui.formatting import VERDICT_MARKS, number, share
from stillroom.tui.screens.base import WorkScreen
from stillroom.tui.screens.picker import Picker
from stillroom.tui.widgets.bars import share_bar
from stillroom.tui.widgets.curves import Curves, Series


class PairScreen(WorkScreen):
    """Energies, shares, plot against distance and reasons of one pair."""

    name_in_heading = " pair "
    BINDINGS: ClassVar[list[BindingType]] = [
        Binding("f", "free", "free energy"),
        Binding("n", "numbers", "numbers"),
        Binding("d", "distance", "distance"),
        Binding("m", "model", "model"),
        Binding("a", "keep", "keep"),
        Binding("escape", "app.step_back", "back"),
    ]

    def __init__(self) -> None:
        super().__init__()
        self.pair_ids = ("", "")
        self._distance: float | None = None
        self._model = "auto"
        self._free = False
        self._numbers = False
        self._pair: PairInteraction | None = None

    def body(self) -> Iterable[Widget]:
        """Return the numbers, the plot and the reasons."""
        yield Static(id="terms")
        yield Curves(id="curves")
        yield VerticalScroll(Static(id="reasons"), id="reasons-box")

    def heading(self) -> str:
        """Name both liquids."""
        return Entry.pair(*self.pair_ids).names(self.session.shelf)

    def focus_body(self) -> None:
        """Focus the reasons, which may scroll."""
        self.query_one("#reasons-box").focus()

    def show_pair(self, a: str, b: str) -> None:
        """Choose the pair to show."""
        self.pair_ids, self._distance = (a, b), None

    def refresh_data(self) -> None:
        """Work out the pair and show it."""
        shelf = self.session.shelf
        terms, reasons = self.query_one("#terms", Static), self.query_one("#reasons", Static)
        curves = self.query_one(Curves)
        try:
            a, b = (shelf[i] for i in self.pair_ids)
            pair = interact(a, b, shelf.temperature, self._distance, self._model)
        except StillroomError as problem:
            self._pair = None
            terms.update(Text(str(problem)))
            reasons.update("")
            curves.display = False
            return
        self._pair = pair
        curves.display = not self._numbers
        if self._numbers:
            terms.update(Text("\n".join(pair_lines(pair))))
            reasons.update("")
        else:
            terms.update(Text("\n".join(self._term_lines(pair))))
            reasons.update(Text("\n".join(_reason_lines(pair))))
            self._plot(pair)
        self.take_focus()

    def _term_lines(self, pair: PairInteraction) -> list[str]:
        """Return a small table: energies, shares, and what they rest on."""
        t, free = pair.terms, self._free
        orientation = t.orientation_free if free else t.orientation
        total = float(t.total_free if free else t.total) / 1e3
        energies = [float(e) / 1e3 for e in (orientation, t.induction, t.dispersion)]
        shares = [pair.shares[f] for f in FORCES]
        spreads = [pair.share_uncertainty[f] for f in FORCES]
        c6 = float(t.c6_orientation + t.c6_induction + t.c6_dispersion) * 1e79
        return [
            f"{'kJ/mol of pairs':16}" + "".join(f"{f:>13}" for f in FORCES) + f"{'total':>15}",
            f"{'free energy' if free else 'internal energy':16}"
            + "".join(f"{number(e, 2):>13}" for e in energies)
            + f"{number(total, 2):>8} ± {pair.total_uncertainty / 1e3:.2f}",
            f"{'share (internal)':16}"
            + "".join(
                f"{share(s) + f' ± {100 * u:.0f}':>13}"
                for s, u in zip(shares, spreads, strict=True)
            )
            + f"   {share_bar(shares, 16)}",
            f"{'contact' if pair.distance_basis == 'contact' else 'given'} "
            f"{pair.distance * 1e9:.3f} nm  x {float(t.coupling):.2f}  "
            f"C6 {c6:.0f}e-79 J m⁶  {pair.model}",
        ]

    def _plot(self, pair: PairInteraction) -> None:
        t = along_distance(pair)
        r = t.distance * 1e9
        exact, leading = (
            (t.orientation_free, t.leading_free) if self._free else (t.orientation, t.leading)
        )
        what = "free energy" if self._free else "internal energy"
        self.query_one(Curves).show(
            [
                Series("exact average", r, exact / 1e3, "e"),
                Series("leading term", r, leading / 1e3, "l"),
                Series("aligned", r, t.aligned / 1e3, "a"),
            ],
            x_label="distance, nm",
            y_label=f"orientation {what}, kJ/mol",
            mark_x=pair.distance * 1e9,
            mark_label="contact" if pair.distance_basis == "contact" else "here",
        )

    def action_free(self) -> None:
        """Switch between internal energy and free energy."""
        self._free = not self._free
        self.refresh_data()

    def action_numbers(self) -> None:
        """Switch between plot and all numbers."""
        self._numbers = not self._numbers
        self.refresh_data()

    def action_distance(self) -> None:
        """Give a distance; an empty line goes back to contact."""

        def check(text: str) -> str | None:
            try:
                if text.strip():
                    parse_distance(text)
            except StillroomError as problem:
                return str(problem)
            return None

        def submitted(text: str) -> None:
            self._distance = parse_distance(text) if text.strip() else None
            self.refresh_data()

        value = "" if self._distance is None else f"{self._distance * 1e9:g} nm"
        self.ask("distance", value, submitted, check=check, placeholder="0.5 nm; empty: contact")

    def action_model(self) -> None:
        """Pick the dispersion model."""

        def picked(keys: list[str] | None) -> None:
            if keys:
                self._model = keys[0]
                self.refresh_data()

        choices = [(m, m) for m in MODELS]
        self.app.push_screen(Picker("Dispersion model", choices, picked=[self._model]), picked)

    def action_keep(self) -> None:
        """Put the pair on the shortlist."""
        if self._pair is not None:
            self.say(self.session.keep_pair(*self.pair_ids))


def _reason_lines(pair: PairInteraction) -> list[str]:
    head = f"verdict on the freely rotating average: {VERDICT_MARKS[pair.verdict]} {pair.verdict}"
    return [head, *(f"- {reason.text}" for reason in pair.reasons)]
