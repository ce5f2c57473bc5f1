"""The terminal itself: can the workbench open here, is it large enough, has the line dropped?"""

from __future__ import annotations

import asyncio
import contextlib
import os
import signal
import sys
import threading
import time
from typing import ClassVar

from rich.text import Text
from textual import events
from textual.app import App, RenderResult
from textual.binding import Binding, BindingType
from textual.geometry import Size
from textual.widget import Widget

SMALLEST = Size(60, 16)
"""Below this the screens do not fit."""
GRACE = 3.0
"""Seconds that an orderly end may take after a signal; a stalled line would hold it for ever."""
_ENDING = tuple(
    getattr(signal, name) for name in ("SIGHUP", "SIGTERM", "SIGINT") if hasattr(signal, name)
)


def check_terminal() -> str | None:
    """Return in one line why the workbench cannot open here, or None if it can."""
    # Textual reads standard input and draws on standard error; standard output is asked for too,
    # because whoever sends it to a file or a pipe expects text there.
    streams = {
        "standard input": sys.stdin,
        "standard output": sys.stdout,
        "standard error": sys.stderr,
    }
    for name, stream in streams.items():
        if stream is None or stream.closed or not stream.isatty():
            return f"the workbench needs a terminal, and {name} is not one (see stillroom --help)"
    term = os.environ.get("TERM", "")
    if term in ("", "dumb", "unknown"):
        said = f"TERM={term}" if term else "TERM is not set"
        return f"the workbench needs a terminal that can move the cursor, and {said}"
    encoding = (sys.stderr.encoding or "").lower().replace("-", "").replace("_", "")
    if encoding != "utf8":
        return f"the workbench needs a UTF-8 locale, and this one is {sys.stderr.encoding}"
    return None


def can_come_back() -> bool:
    """Return whether a shell with job control stands behind this process.

    Such a shell lives in our session and gave us a process group of our own. Without one (the
    program is the session leader, or runs inside a script) a stopped program stays stopped.
    """
    if not hasattr(os, "getsid"):
        return False
    try:
        parent = os.getppid()
        return os.getsid(parent) == os.getsid(0) and os.getpgid(parent) != os.getpgrp()
    except OSError:
        return False


class TooSmall(Widget):
    """Covers a screen that does not fit; what lies under it stays as it is."""

    DEFAULT_CSS = """
    TooSmall { overlay: screen; position: absolute; width: 100vw; height: 100vh; }
    TooSmall { background: $background; content-align: center middle; text-align: center; }
    """

    def render(self) -> RenderResult:
        """Say which size is needed."""
        have, need = self.app.size, SMALLEST
        return Text(
            f"{have.width}x{have.height} is too small\n"
            f"{need.width}x{need.height} is needed\n"
            "nothing is lost\n"
            "q quits"
        )


class TerminalApp(App[int]):
    """An application that treats its terminal with care.

    Nothing is animated. Below `SMALLEST` it covers the screen and takes no key but those that
    quit; focus and typed text stay. A dropped line (SIGHUP), SIGTERM and SIGINT end it in good
    order with the return code 128 + signal. Ctrl+Z suspends only if there is a shell to return to.
    """

    BINDINGS: ClassVar[list[BindingType]] = [
        Binding("ctrl+z", "suspend_process", "suspend", show=False)
    ]
    _QUIT_KEYS = frozenset({"q", "ctrl+q", "ctrl+c"})

    def on_mount(self) -> None:
        """Take charge of the terminal."""
        self.animation_level = "none"
        if not self.is_headless:
            self._end_on_signals()
        self.screen_change_signal.subscribe(self, lambda _: self._fit())
        # Back from a suspension at the same size, Textual would leave the screen blank.
        self.app_resume_signal.subscribe(self, lambda _: self.refresh(layout=True))
        self.call_after_refresh(self._fit)

    def on_resize(self) -> None:
        """Cover or uncover the screen, once the new size is known."""
        self.call_later(self._fit)

    async def on_event(self, event: events.Event) -> None:
        """Let nothing but quitting through while the screen is covered."""
        if self.too_small and isinstance(event, events.InputEvent | events.Paste):
            if isinstance(event, events.Key) and event.key in self._QUIT_KEYS:
                await self.run_action("quit")
            return
        await super().on_event(event)

    @property
    def too_small(self) -> bool:
        """Whether the terminal is too small for the screens."""
        return self.size.width < SMALLEST.width or self.size.height < SMALLEST.height

    def _fit(self) -> None:
        small = self.too_small
        for screen in self.screen_stack:
            for cover in screen.query(TooSmall):
                cover.display = small
                cover.refresh()
        if small and not self.screen.query(TooSmall):
            self.screen.mount(TooSmall())

    def action_suspend_process(self) -> None:
        """Give the terminal back to the shell, if there is one."""
        if can_come_back():
            super().action_suspend_process()
        else:
            self.notify("there is no shell to come back from; q quits", markup=False)

    def _end_on_signals(self) -> None:
        """Hear of ending signals in a thread of its own.

        Neither `loop.add_signal_handler` nor a handler in Python is enough: when a stalled line has
        filled the queue of output, the main thread waits in a write and gets to neither. Python
        writes the number of every signal it handles to a pipe, whichever thread the system chose
        to interrupt; this is where the thread listens.
        """
        settings = getattr(self._driver, "attrs_before", None)
        loop = asyncio.get_running_loop()
        hear, tell = os.pipe()
        os.set_blocking(tell, False)
        signal.set_wakeup_fd(tell, warn_on_full_buffer=False)
        for number in _ENDING:
            signal.signal(number, lambda *_: None)  # all is done by the thread

        def listen() -> None:
            while (number := os.read(hear, 1)[0]) not in _ENDING:
                pass  # the terminal was resized, or we were stopped and go on
            with contextlib.suppress(RuntimeError):  # the loop has ended already
                loop.call_soon_threadsafe(lambda: self.exit(return_code=128 + number))
            _end_by_force(number, settings)

        threading.Thread(target=listen, daemon=True).start()


def _end_by_force(number: int, settings: list[object] | None) -> None:
    """End the process if it still runs after the grace; kept data are in the store already."""
    time.sleep(GRACE)
    restoring = threading.Thread(target=_restore, args=(settings,), daemon=True)
    restoring.start()
    restoring.join(0.5)  # a stalled line takes no output, not even this
    os._exit(128 + number)


def _restore(settings: list[object] | None) -> None:
    import termios

    with contextlib.suppress(OSError, termios.error):
        if settings is not None:
            termios.tcsetattr(0, termios.TCSANOW, settings)  # type: ignore[arg-type]
        os.write(2, b"\x1b[<u\x1b[?2004l\x1b[?1049l\x1b[?25h\x1b[?1004l")
