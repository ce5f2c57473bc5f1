"""A list to pick from: one entry, or several to switch on and off. Typing narrows the list."""

from __future__ import annotations

from collections.abc import Sequence
from typing import ClassVar

from rich.text import Text
from textual.app import ComposeResult
from textual.binding import Binding, BindingType
from textual.containers import Vertical
from textual.screen import ModalScreen
from textual.widgets import Input, OptionList, Static
from textual.widgets.option_list import Option


class Picker(ModalScreen[list[str] | None]):
    """Returns the picked keys, or None when left with escape (single choice only).

    `choices` are (key, label) pairs; with `several`, `picked` are switched on to begin with, enter
    switches an entry, and escape returns what is on.
    """

    BINDINGS: ClassVar[list[BindingType]] = [
        Binding("escape", "leave", "done", priority=True),
        Binding("up", "move(-1)", "up", show=False, priority=True),
        Binding("down", "move(1)", "down", show=False, priority=True),
        Binding("pageup", "move(-8)", "up", show=False, priority=True),
        Binding("pagedown", "move(8)", "down", show=False, priority=True),
    ]

    def __init__(
        self,
        title: str,
        choices: Sequence[tuple[str, str]],
        *,
        several: bool = False,
        picked: Sequence[str] = (),
    ) -> None:
        super().__init__()
        self._title = title
        self._choices = list(choices)
        self._several = several
        self._picked = [p for p in picked if p in dict(choices)]
        self._start = picked[0] if picked else None

    def compose(self) -> ComposeResult:
        """Make the title, the narrowing line and the list."""
        hint = (
            "enter switches on or off, esc when done"
            if self._several
            else "enter picks, esc leaves"
        )
        with Vertical(id="picker"):
            yield Static(Text.assemble((self._title, "bold"), "   ", hint), id="picker-title")
            yield Input(placeholder="type to narrow the list", id="picker-input")
            yield OptionList(id="picker-list")

    def on_mount(self) -> None:
        """Fill the list; the typing line keeps the focus."""
        self.query_one(OptionList).can_focus = False
        self._fill("", self._start)
        self.query_one(Input).focus()

    def on_input_changed(self, event: Input.Changed) -> None:
        """Narrow the list to what is typed."""
        self._fill(event.value, None)

    def on_input_submitted(self) -> None:
        """Pick or switch the highlighted entry."""
        options = self.query_one(OptionList)
        if options.highlighted is None:
            return
        key = options.get_option_at_index(options.highlighted).id
        assert key is not None
        if not self._several:
            self.dismiss([key])
            return
        if key in self._picked:
            self._picked.remove(key)
        else:
            self._picked.append(key)
        self._fill(self.query_one(Input).value, key)

    def action_leave(self) -> None:
        """Leave the list."""
        self.dismiss(list(self._picked) if self._several else None)

    def action_move(self, step: int) -> None:
        """Move the highlight."""
        options = self.query_one(OptionList)
        if options.option_count:
            at = (options.highlighted or 0) + step
            options.highlighted = max(0, min(options.option_count - 1, at))

    def _fill(self, typed: str, keep: str | None) -> None:
        options = self.query_one(OptionList)
        options.clear_options()
        wanted = typed.casefold().split()
        at = 0
        fits = [c for c in self._choices if all(w in " ".join(c).casefold() for w in wanted)]
        if typed.strip():  # names that begin with what is typed come first
            start = typed.strip().casefold()
            fits.sort(key=lambda c: not c[1].casefold().startswith(start))
        for key, label in fits:
            mark = ("[on]  " if key in self._picked else "[  ]  ") if self._several else ""
            if key == keep:
                at = options.option_count
            options.add_option(Option(Text(mark + label), id=key))
        options.highlighted = at if options.option_count else None
