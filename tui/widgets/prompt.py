"""A one-line prompt: a title, a line to type in, and below it what is wrong or expected."""

from __future__ import annotations

from collections.abc import Callable
from typing import ClassVar

from rich.text import Text
from textual.app import ComposeResult
from textual.binding import Binding, BindingType
from textual.containers import Horizontal
from textual.message import Message
from textual.timer import Timer
from textual.widget import Widget
from textual.widgets import Input, Static

from stillroom.tui.widgets.printable import printable

Check = Callable[[str], str | None]
"""Returns what is wrong with a text, in one line, or None."""


class _Line(Input):
    """The line itself: whatever is typed or pasted, only printable characters get in."""

    BINDINGS: ClassVar[list[BindingType]] = [
        Binding("enter", "submit", "accept"),
        Binding("tab,shift+tab", "stay", "stay in the prompt", show=False),
    ]

    def validate_value(self, value: str) -> str:
        """Keep control characters of a pasted text from the terminal."""
        return printable(value)

    def action_stay(self) -> None:
        """Do nothing: the prompt is left by enter or escape, never by accident."""


class Prompt(Widget):
    """A prompt bar, closed until `open` is called. What was typed stays until it is accepted.

    Enter sends `Submitted` if the check finds nothing wrong, otherwise the error is shown and the
    text stays. Escape sends `Cancelled`. The owner closes the prompt and moves the focus.
    """

    DEFAULT_CSS = """
    Prompt { height: 2; width: 1fr; padding: 0 1; display: none; }
    Prompt Horizontal { height: 1; }
    Prompt #title { width: auto; height: 1; text-style: bold; }
    Prompt _Line { width: 1fr; height: 1; border: none; padding: 0; }
    Prompt _Line:focus { border: none; }
    Prompt #note { height: 1; width: 1fr; }
    """
    BINDINGS: ClassVar[list[BindingType]] = [Binding("escape", "cancel", "cancel")]

    class Changed(Message):
        """The typing paused. `error` is what the check says about the text; floods collapse."""

        def __init__(self, prompt: Prompt, text: str, error: str | None) -> None:
            super().__init__()
            self.prompt = prompt
            self.text = text
            self.error = error

        @property
        def control(self) -> Prompt:
            """The prompt that sent it."""
            return self.prompt

        def can_replace(self, message: Message) -> bool:
            """Only the last text counts."""
            return isinstance(message, Prompt.Changed) and message.prompt is self.prompt

    class Submitted(Message):
        """Enter was pressed on a text that passed the check."""

        def __init__(self, prompt: Prompt, text: str) -> None:
            super().__init__()
            self.prompt = prompt
            self.text = text

        @property
        def control(self) -> Prompt:
            """The prompt that sent it."""
            return self.prompt

    class Cancelled(Message):
        """Escape was pressed."""

        def __init__(self, prompt: Prompt) -> None:
            super().__init__()
            self.prompt = prompt

        @property
        def control(self) -> Prompt:
            """The prompt that sent it."""
            return self.prompt

    def __init__(self, *, delay: float = 0.08, id: str | None = None) -> None:
        super().__init__(id=id)
        self._delay = max(0.001, delay)  # seconds of no typing before `Changed` is sent
        self._check: Check | None = None
        self._hint = ""
        self._timer: Timer | None = None

    def compose(self) -> ComposeResult:
        """Stack the typing line on the note."""
        line = _Line(select_on_focus=False)
        line.cursor_blink = False  # it would send bytes for ever
        with Horizontal():
            yield Static(id="title")
            yield line
        yield Static(id="note")

    @property
    def _line(self) -> Input:
        return self.query_one(_Line)

    @property
    def text(self) -> str:
        """What the line holds."""
        return self._line.value

    @property
    def is_open(self) -> bool:
        """Whether the prompt is shown."""
        return bool(self.display)

    def open(
        self,
        *,
        title: str,
        value: str = "",
        placeholder: str = "",
        validate: Check | None = None,
        select: bool = False,
    ) -> None:
        """Show the prompt and take the focus; `placeholder` says what is expected.

        With `select`, typing replaces the value; moving in it first keeps it.
        """
        self._forget_timer()
        self._check, self._hint = validate, printable(placeholder)
        self.query_one("#title", Static).update(Text(f"{printable(title)}: "))
        line = self._line
        line.placeholder = self._hint
        with self.prevent(Input.Changed):
            line.value = value
        line.cursor_position = len(line.value)
        self._show_note(None)
        self.display = True
        line.focus()
        if select:
            line.select_all()

    def close(self) -> None:
        """Hide the prompt; a change still waiting to be told is dropped."""
        self._forget_timer()
        self.display = False

    def show_error(self, error: str) -> None:
        """Show what went wrong after submitting, such as a file that cannot be written."""
        self._show_note(error)

    def on_input_changed(self, event: Input.Changed) -> None:
        """Wait for a pause in the typing."""
        event.stop()
        self._forget_timer()
        self._timer = self.set_timer(self._delay, self._tell)

    def on_input_submitted(self, event: Input.Submitted) -> None:
        """Accept the text, or say what is wrong with it and keep it."""
        event.stop()
        self._forget_timer()
        error = self._error()
        self._show_note(error)
        if error is None:
            self.post_message(self.Submitted(self, self.text))

    def action_cancel(self) -> None:
        """Give up."""
        self._forget_timer()
        self.post_message(self.Cancelled(self))

    def _tell(self) -> None:
        error = self._error()
        self._show_note(error)
        self.post_message(self.Changed(self, self.text, error))

    def _error(self) -> str | None:
        return None if self._check is None else self._check(self.text)

    def _show_note(self, error: str | None) -> None:
        # The mark, not a colour, tells an error from a hint; an empty line shows the hint itself.
        hint = Text(self._hint if self.text else "", style="dim")
        note = hint if error is None else Text(f"! {printable(error)}", style="bold")
        note.no_wrap, note.overflow = True, "ellipsis"
        self.query_one("#note", Static).update(note)

    def _forget_timer(self) -> None:
        if self._timer is not None:
            self._timer.stop()
            self._timer = None
