"""What all screens share: a heading, one prompt line, the key line, and the session."""

from __future__ import annotations

from collections.abc import Callable, Iterable
from typing import TYPE_CHECKING

from rich.text import Text
from textual.app import ComposeResult
from textual.screen import Screen
from textual.timer import Timer
from textual.widget import Widget
from textual.widgets import Static

from stillroom.tui.formatting import celsius
from stillroom.tui.session import Session
from stillroom.tui.widgets.keys import KeyLine
from stillroom.tui.widgets.printable import printable
from stillroom.tui.widgets.prompt import Prompt

if TYPE_CHECKING:
    from stillroom.tui.app import Workbench


_MESSAGE_SECONDS = 6.0


class WorkScreen(Screen[None]):
    """A screen of the workbench. Subclasses give `body`, `heading` and `refresh_data`."""

    name_in_heading = ""

    def __init__(self) -> None:
        super().__init__()
        self._on_text: Callable[[str], None] | None = None
        self._on_submit: Callable[[str], None] | None = None
        self._on_cancel: Callable[[], None] | None = None
        self._message = ""
        self._message_timer: Timer | None = None

    @property
    def session(self) -> Session:
        """The state that all screens share."""
        return self.workbench.session

    @property
    def workbench(self) -> Workbench:
        """The application, by its own type."""
        from stillroom.tui.app import Workbench

        assert isinstance(self.app, Workbench)
        return self.app

    def compose(self) -> ComposeResult:
        """Stack heading, body, prompt and key line."""
        yield Static(id="heading")
        yield from self.body()
        yield Prompt(id="prompt")
        yield KeyLine()

    def body(self) -> Iterable[Widget]:
        """Return the widgets between heading and prompt."""
        raise NotImplementedError

    def heading(self) -> str:
        """Return what the heading says after the screen's name."""
        return ""

    def refresh_data(self) -> None:
        """Show the session's present state."""
        raise NotImplementedError

    def on_screen_resume(self) -> None:
        """Show what other screens changed meanwhile."""
        self.refresh_data()
        self.refresh_heading()

    def refresh_heading(self) -> None:
        """Rewrite the heading line; a message stands in for it while it lasts."""
        text = Text.assemble(
            (self.name_in_heading, "bold reverse"),
            (f" {celsius(self.session.temperature)} ", "bold"),
            " ",
            (printable(self._message), "bold") if self._message else printable(self.heading()),
            no_wrap=True,
            overflow="ellipsis",
        )
        self.query_one("#heading", Static).update(text)

    def say(self, message: str) -> None:
        """Show a short message in the heading line for some seconds; it covers nothing else."""
        if self._message_timer is not None:
            self._message_timer.stop()
        self._message = message
        self._message_timer = self.set_timer(_MESSAGE_SECONDS, self._unsay)
        self.refresh_heading()

    def _unsay(self) -> None:
        self._message = ""
        self.refresh_heading()

    def ask(
        self,
        title: str,
        value: str,
        submitted: Callable[[str], None],
        *,
        typed: Callable[[str], None] | None = None,
        cancelled: Callable[[], None] | None = None,
        check: Callable[[str], str | None] | None = None,
        placeholder: str = "",
        select: bool = True,
    ) -> None:
        """Open the prompt line.

        `submitted` gets the text on enter, `typed` at every change, `cancelled` is called on
        escape; typing replaces `value` if `select`; `check` returns what is wrong with a text,
        shown under the line, or None.
        """
        self._on_text, self._on_submit, self._on_cancel = typed, submitted, cancelled
        self.query_one(Prompt).open(
            title=title, value=value, placeholder=placeholder, validate=check, select=select
        )

    def on_prompt_changed(self, event: Prompt.Changed) -> None:
        """Hand typed text on."""
        event.stop()
        if self._on_text is not None:
            self._on_text(event.text)

    def on_prompt_submitted(self, event: Prompt.Submitted) -> None:
        """Hand the entered text on and give the focus back."""
        event.stop()
        self.query_one(Prompt).close()
        self.take_focus()
        if self._on_submit is not None:
            self._on_submit(event.text)

    def on_prompt_cancelled(self, event: Prompt.Cancelled) -> None:
        """Give the focus back."""
        event.stop()
        self.query_one(Prompt).close()
        self.take_focus()
        if self._on_cancel is not None:
            self._on_cancel()

    def take_focus(self) -> None:
        """Put the focus where the keys of the screen work; an open prompt keeps it."""
        if not self.query_one(Prompt).is_open:
            self.focus_body()

    def focus_body(self) -> None:
        """Put the focus on the widget that takes the screen's keys."""
